"""06-call-desk: Erlang's loss formula for the long run, plain uniformization in doubles for the first minutes.

In the long run the three kinds share the lines as one stream of load a = a1 + a2 + a3: the chain is reversible and its
product form, cut at the number of lines, sums to Erlang's. The transient part takes some minutes.
"""

import math

from mpmath import mp, mpf

from markov import Sheet

lines = 80
arrivals = (14.0, 2.5, 3.0)
lengths = (2.0, 10.0, 6.0)

loads = [mpf(a) * mpf(h) for a, h in zip(arrivals, lengths)]
load = sum(loads)
blocking = mpf(1)
for n in range(1, lines + 1):
    before = blocking
    blocking = load * blocking / (n + load * blocking)

index = {}
for a in range(lines + 1):
    for b in range(lines + 1 - a):
        for c in range(lines + 1 - a - b):
            index[a, b, c] = len(index)
states = list(index)

sheet = Sheet("06-call-desk", len(states), "Erlang's loss formula (from memory) and uniformization in doubles")


def leaving(s):
    arrival = sum(arrivals) if sum(s) < lines else 0.0
    return arrival + sum(n / h for n, h in zip(s, lengths))


q = 1.02 * max(leaving(s) for s in states)
# into[j]: the sources of state j with their share of q.
into = []
for s in states:
    sources = []
    for k in range(3):
        if s[k] > 0:
            i = index[s[:k] + (s[k] - 1,) + s[k + 1:]]
            sources.append((i, arrivals[k] / q))
        if sum(s) < lines:
            i = index[s[:k] + (s[k] + 1,) + s[k + 1:]]
            sources.append((i, (s[k] + 1) / lengths[k] / q))
    into.append(sources)
stay = [(q - leaving(s)) / q for s in states]
busy = [sum(s) for s in states]

times = (2, 4)
weights = [mp.exp(-mpf(q) * t) for t in times]
steps = int(q * times[-1] + 12 * math.sqrt(q * times[-1]) + 40)
full_at, busy_at = [mpf(0)] * len(times), [mpf(0)] * len(times)
p = [0.0] * len(states)
p[index[0, 0, 0]] = 1.0
for k in range(steps):
    full_now = math.fsum(p[i] for i, n in enumerate(busy) if n == lines)
    busy_now = math.fsum(p[i] * n for i, n in enumerate(busy))
    for i, t in enumerate(times):
        full_at[i] += weights[i] * full_now
        busy_at[i] += weights[i] * busy_now
        weights[i] *= mpf(q) * t / (k + 1)
    p = [p[i] * stay[i] + sum(p[j] * w for j, w in into[i]) for i in range(len(states))]

for i, t in enumerate(times):
    sheet.add("full_soon", full_at[i], "uniformization in doubles", t, "1e-11")
for i, t in enumerate(times):
    sheet.add("busy_soon", busy_at[i], "uniformization in doubles", t, "1e-11")
sheet.add("full_lr", blocking, "Erlang's loss formula B(lines, a)")
sheet.add("busy_lr", load * (1 - blocking), "a (1 - B)")
sheet.add("calls_lr", loads[0] * (1 - blocking), "a1 (1 - B)")
sheet.add("longs_lr", loads[1] * (1 - blocking), "a2 (1 - B)")
sheet.add("lost_lr", sum(arrivals) * blocking, "arrival rate x B")
# In the long run as many busy periods of all lines begin as end. They end at the mean rate of leaving in full states;
# by reversibility they begin at the arrival rate times the chance of one line free, B lines / a.
one_free = blocking * lines / load
sheet.add("frequency", sum(arrivals) * one_free, "arrival rate x chance of one free line, B n / a")
sheet.add("full_spell", load / (sum(arrivals) * lines), "B / frequency")
sheet.write()
