"""The models that are measured: as text for ChainSolve, and as SciPy matrices for what runs beside it."""
import dataclasses

import numpy as np
import scipy.sparse as sp

FAILURES = (1e-3, 2e-3, 3e-3, 1.5e-3, 2.5e-3)
REPAIRS = (0.01, 0.02, 0.015, 0.03, 0.025)

PAIR = "item unit { up -> down at 1e-3 per h; down -> up at 0.1 per h }\nmeasure m = probability unit is down at 10 h\n"


@dataclasses.dataclass(frozen=True)
class Fleet:
    """Five kinds of vehicle, so many of each, that fail and are repaired: a lattice of (replicas + 1)^5 states."""

    replicas: int

    @property
    def states(self):
        return (self.replicas + 1) ** len(FAILURES)

    @property
    def fastest(self):
        """The largest exit rate, per hour."""
        return self.replicas * sum(max(pair) for pair in zip(FAILURES, REPAIRS))

    def text(self, **hours):
        """The model, with a measure for each name: the probability that most of each kind are up after so many hours."""
        kinds = "".join(
            f"item kind{i} x {self.replicas} {{ up -> down at {'wear' if i == 0 else f'{f} per h'}; down -> up at {r} per h }}\n"
            for i, (f, r) in enumerate(zip(FAILURES, REPAIRS)))
        good = " and ".join(f"kind{i}.up >= {self.replicas * 4 // 5}" for i in range(len(FAILURES)))
        measures = "".join(f"measure {name} = probability good at {time:.6g} h\n" for name, time in hours.items())
        return f"given wear = {FAILURES[0]} per h\n{kinds}let good = {good}\n{measures}"

    def matrix(self):
        """The generator in compressed rows; a Kronecker sum of the kinds."""
        total = sp.csr_matrix((1, 1))
        for failure, repair in zip(FAILURES, REPAIRS):
            down = np.arange(self.replicas + 1)
            kind = sp.diags([failure * (self.replicas - down[:-1]), repair * down[1:]], [1, -1], format="csr")
            kind = kind - sp.diags(np.asarray(kind.sum(axis=1)).ravel())
            total = sp.kron(total, sp.identity(len(down), format="csr"), format="csr") + sp.kron(
                sp.identity(total.shape[0], format="csr"), kind, format="csr")
        return total.tocsr()


@dataclasses.dataclass(frozen=True)
class Basins:
    """Five basins in a ring: rain fills, seepage empties, pumps move water on. Not reversible, so that it has to be iterated."""

    name: str
    levels: int
    rain: float
    scales: tuple

    def events(self):
        """Of each event the rate and by basin its change of level."""
        count = len(self.scales)
        for i, scale in enumerate(self.scales):
            yield self.rain * scale, {i: 1}
            yield scale, {i: -1}
            yield 0.2 * scale, {i: -1, (i + 1) % count: 1}

    def text(self):
        top = self.levels - 1
        lines = [f"counter b{i} 0 .. {top}" for i in range(len(self.scales))]
        for number, (rate, changes) in enumerate(self.events()):
            guard = " and ".join(f"b{i} < {top}" if change > 0 else f"b{i} > 0" for i, change in changes.items())
            effect = "; ".join(f"b{i} = b{i} {'+' if change > 0 else '-'} 1" for i, change in changes.items())
            lines.append(f"event e{number} at {rate:.6g} when {guard} {{ {effect} }}")
        return "\n".join([*lines, "measure empty = probability b0 = 0 steady", ""])

    def matrix(self):
        shift = {1: sp.eye(self.levels, k=1, format="csr"), -1: sp.eye(self.levels, k=-1, format="csr")}
        total = None
        for rate, changes in self.events():
            part = sp.identity(1, format="csr") * rate
            for i in range(len(self.scales)):
                part = sp.kron(part, shift[changes[i]] if i in changes else sp.identity(self.levels, format="csr"), format="csr")
            total = part if total is None else total + part
        return (total - sp.diags(np.asarray(total.sum(axis=1)).ravel())).tocsr()

    def value(self, vector):
        """The measure of the model: the share of states whose first basin is empty."""
        return vector[: self.levels ** (len(self.scales) - 1)].sum()
