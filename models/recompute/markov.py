"""Slow and plain calculations on Markov chains with many digits, independent of the programs in src.

Needs Python 3 and mpmath. A chain is a dictionary: state -> {state: rate}. Nothing here is clever; that is the point.
"""

import json
import os

from mpmath import mp, mpf

mp.dps = 45


def explore(starts, rates):
    """All states that can be reached; rates(state) yields (target, rate) and may repeat a target."""
    chain, waiting = {}, list(starts)
    while waiting:
        state = waiting.pop()
        if state in chain:
            continue
        row = {}
        for target, rate in rates(state):
            if rate != 0 and target != state:
                row[target] = row.get(target, mpf(0)) + rate
        chain[state] = row
        waiting.extend(row)
    return chain


def stationary(chain):
    """Elimination without subtraction (Grassmann, Taksar and Heyman 1985) of an irreducible chain."""
    order = sorted(chain)
    rows = {s: dict(chain[s]) for s in order}
    into = {s: {} for s in order}
    for s in order:
        for t, r in rows[s].items():
            into[t][s] = r
    pivots = {}
    for k in reversed(order[1:]):
        out = rows[k]
        pivot = sum(out.values())
        pivots[k] = (pivot, dict(into[k]))
        for i, a in into[k].items():
            del rows[i][k]
            for j, b in out.items():
                if i != j:
                    rows[i][j] = rows[i].get(j, mpf(0)) + a * b / pivot
                    into[j][i] = rows[i][j]
        for j in out:
            into[j].pop(k, None)
        del rows[k]
    weight = {order[0]: mpf(1)}
    for k in order[1:]:
        pivot, sources = pivots[k]
        weight[k] = sum(weight[i] * a for i, a in sources.items()) / pivot
    total = sum(weight.values())
    return {s: w / total for s, w in weight.items()}


def transient(chain, start, time, rates=(), totals=()):
    """Uniformization (Jensen 1953): the values sum p(t) r and the totals of their integrals from 0 to t."""
    q = max((sum(row.values()) for row in chain.values()), default=mpf(0)) * mpf("1.02")
    mean = q * time
    p = {s: mpf(start.get(s, 0)) for s in chain}
    rate_sums = [mpf(0)] * len(rates)
    total_sums = [mpf(0)] * len(totals)
    weight, beyond, k = mp.exp(-mean), mpf(1), 0
    while beyond > mpf(10) ** (-mp.dps + 8) or k < mean:
        beyond -= weight
        for i, r in enumerate(rates):
            rate_sums[i] += weight * sum(p[s] * r(s) for s in p if p[s])
        for i, r in enumerate(totals):
            total_sums[i] += max(beyond, mpf(0)) / q * sum(p[s] * r(s) for s in p if p[s])
        following = {s: mpf(0) for s in chain}
        for s, mass in p.items():
            if mass:
                out = mpf(0)
                for t, r in chain[s].items():
                    following[t] += mass * r / q
                    out += r
                following[s] += mass * (q - out) / q
        p = following
        k += 1
        weight = weight * mean / k
    return rate_sums, total_sums


def killed(chain, alive):
    """The chain in which states outside 'alive' are never left."""
    return {s: (row if alive(s) else {}) for s, row in chain.items()}


def earnings(chain, alive, reward):
    """Expected sum of a reward until 'alive' is left, from each state: (-S) x = r by elimination."""
    order = [s for s in sorted(chain) if alive(s)]
    index = {s: i for i, s in enumerate(order)}
    rows = [{} for _ in order]
    right = [mpf(reward(s)) for s in order]
    for s in order:
        i = index[s]
        rows[i][i] = sum(chain[s].values())
        for t, r in chain[s].items():
            if t in index:
                rows[i][index[t]] = rows[i].get(index[t], mpf(0)) - r
    for k in range(len(order)):
        for i in range(k + 1, len(order)):
            if k in rows[i]:
                f = rows[i].pop(k) / rows[k][k]
                for j, v in rows[k].items():
                    if j > k:
                        rows[i][j] = rows[i].get(j, mpf(0)) - f * v
                right[i] -= f * right[k]
    x = [mpf(0)] * len(order)
    for k in reversed(range(len(order))):
        x[k] = (right[k] - sum(v * x[j] for j, v in rows[k].items() if j > k)) / rows[k][k]
    return {s: x[index[s]] for s in order}


def first_moments(chain, start, alive):
    """Mean and standard deviation of the time until 'alive' is left."""
    one = earnings(chain, alive, lambda s: 1)
    two = earnings(chain, alive, lambda s: 2 * one[s])
    mean = sum(p * one.get(s, 0) for s, p in start.items())
    square = sum(p * two.get(s, 0) for s, p in start.items())
    return mean, mp.sqrt(square - mean ** 2)


def entering(chain, holds):
    """The rate at which a condition begins to hold, by state."""
    return lambda s: mpf(0) if holds(s) else sum((r for t, r in chain[s].items() if holds(t)), mpf(0))


class Sheet:
    """Collects expected values and writes them beside the model."""

    def __init__(self, name, states, method, tolerance="1e-12"):
        self.name = name
        self.document = {
            "model": name + ".chain",
            "states": states,
            "method": method,
            "tolerance": tolerance,
            "values": [],
        }

    def add(self, measure, value, source, time=None, tolerance=None):
        entry = {"measure": measure, "time": None if time is None else mp.nstr(mpf(time), 17),
                 "value": mp.nstr(mpf(value), 20), "source": source}
        if tolerance:
            entry["tolerance"] = tolerance
        self.document["values"].append(entry)

    def write(self):
        path = os.path.join(os.path.dirname(os.path.abspath(__file__)), "..", self.name + ".expected.json")
        with open(path, "w", encoding="utf-8", newline="\n") as file:
            json.dump(self.document, file, indent=2)
            file.write("\n")
