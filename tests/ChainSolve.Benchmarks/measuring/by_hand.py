"""What people write by hand, in plain Python and with SciPy."""
import time

import numpy as np
import scipy.sparse as sp
import scipy.sparse.linalg as la
import scipy.special

from .models import FAILURES, REPAIRS


def uniformization(matrix, hours):
    """One vector, one product a step, weights by their logarithms."""
    q = 1.02 * -matrix.diagonal().min()
    step = (sp.identity(matrix.shape[0], format="csr") + matrix / q).T.tocsr()
    mean = q * hours
    k = np.arange(int(mean + 8 * np.sqrt(mean) + 20) + 1)
    vector = np.zeros(matrix.shape[0])
    vector[0] = 1
    result = np.zeros_like(vector)
    for weight in np.exp(-mean + k * np.log(mean) - scipy.special.gammaln(k + 1)):
        result += weight * vector
        vector = step @ vector
    return result


def explore(replicas):
    """The states of a fleet, breadth first, and the sum of their rates; no matrix."""
    start = (0,) * len(FAILURES)
    seen = {start}
    open_states = [start]
    rates = 0.0
    while open_states:
        state = open_states.pop()
        for i, down in enumerate(state):
            for change, rate in ((1, FAILURES[i] * (replicas - down)), (-1, REPAIRS[i] * down)):
                if rate > 0:
                    rates += rate
                    target = state[:i] + (down + change,) + state[i + 1:]
                    if target not in seen:
                        seen.add(target)
                        open_states.append(target)
    return len(seen)


def steady(method, matrix, tolerance):
    """The long run of an irreducible chain; seconds with the preparation, and the vector; None where it fails."""
    start = time.perf_counter()
    vector = METHODS[method](matrix.T.tocsc(), tolerance)
    if vector is None or not np.all(np.isfinite(vector)) or vector.sum() == 0:
        return None
    return time.perf_counter() - start, vector / vector.sum()


def _krylov(solver, prepared):
    def solve(balance, tolerance):
        # The last state is set to 1, which leaves a regular system for the others.
        a, b = balance[:-1, :-1].tocsr(), -balance[:-1, -1].toarray().ravel()
        if prepared == "ilu":
            factors = la.spilu(a.tocsc(), drop_tol=1e-3, fill_factor=3)
            m = la.LinearOperator(a.shape, factors.solve)
        else:
            m = sp.diags(1 / a.diagonal())
        options = {"restart": 30} if solver is la.gmres else {}
        x, info = solver(a, b, tol=tolerance, atol=0, M=m, maxiter=3000, **options)
        return np.append(x, 1.0) if info == 0 else None
    return solve


def _direct(balance, _):
    x = la.spsolve(balance[:-1, :-1].tocsc(), -balance[:-1, -1].toarray().ravel())
    return np.append(x, 1.0)


def _gauss_seidel(balance, tolerance):
    # Factoring a triangle in its own order fills nothing in: each solve is one sweep.
    lower = la.splu(sp.tril(balance, format="csc"), permc_spec="NATURAL", diag_pivot_thresh=0)
    upper = sp.triu(balance, k=1, format="csr")
    return _iterate(lambda x: lower.solve(-(upper @ x)), balance.shape[0], tolerance)


def _power(balance, tolerance):
    step = (sp.identity(balance.shape[0], format="csr") + balance.tocsr() / (1.02 * -balance.diagonal().min())).tocsr()
    return _iterate(lambda x: step @ x, balance.shape[0], tolerance)


def _iterate(sweep, count, tolerance):
    x = np.full(count, 1.0 / count)
    for number in range(200_000):
        new = sweep(x)
        new /= new.sum()
        if number % 10 == 0 and np.abs(new - x).sum() < tolerance:
            return new
        x = new
    return None


METHODS = {
    "gmres, Jacobi": _krylov(la.gmres, "diagonal"),
    "bicgstab, Jacobi": _krylov(la.bicgstab, "diagonal"),
    "gmres, ILU": _krylov(la.gmres, "ilu"),
    "bicgstab, ILU": _krylov(la.bicgstab, "ilu"),
    "Gauss-Seidel by triangular solves": _gauss_seidel,
    "power method": _power,
    "spsolve": _direct,
}
