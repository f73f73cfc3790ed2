"""The rows of the long run: whole commands against the best of SciPy's solvers at the same accuracy."""
import dataclasses
import json

from . import by_hand, models, runs
from .rows import times

AGREEMENT = 1e-8
TOLERANCES = (1e-8, 1e-10, 1e-12)
DIRECT_STATES = 5_000
SHORTEST_LIMIT = 5


def steady(setting):
    """Easy, loaded and stiff."""
    levels = 6 if setting.quick else 16
    for basins, goal in (
        (models.Basins("easy", levels, 0.3, (1.0, 1.1, 0.9, 1.2, 0.8)), 8),
        (models.Basins("loaded", levels, 0.95, (1.0, 1.1, 0.9, 1.2, 0.8)), 4),
        (models.Basins("stiff", levels, 0.5, (0.01, 0.1, 1.0, 10.0, 100.0)), 20),
    ):
        yield _row(setting, basins, goal)


def _row(setting, basins, goal):
    run = setting.tool("solve", setting.file(basins.name, basins.text()), "--format", "json")
    measure = {} if run.failure else json.loads(run.output)["measures"][0]
    value = measure["points"][0]["value"] if measure else None
    matrix = basins.matrix()
    # A solver that takes twice as long as the goal asks for decides nothing more.
    limit = setting.limit if run.failure else min(setting.limit, max(SHORTEST_LIMIT, 2 * goal * run.seconds))
    found = {}
    for method in by_hand.METHODS:
        if method != "spsolve" or matrix.shape[0] <= DIRECT_STATES:
            found[method] = runs.call(_solve, (method, basins, matrix, value), limit)
    done = {method: took for method, took in found.items() if not isinstance(took, str)}
    best = min(done, key=done.get) if done else None
    others = ", ".join(f"{m}: {t if isinstance(t, str) else f'{t:.3g} s'}" for m, t in found.items() if m != best)
    how = f", {measure['method']}" if measure else ""
    job = f"steady, {basins.name}, {matrix.shape[0]:,} states, whole command{how}"
    beside = f"SciPy, matrix given: {best or 'none'} ({others})"
    if best or run.failure or not any(t.startswith("not done") for t in found.values()):
        return times(job, goal, run.failure or run.seconds, beside, done[best] if best else "none converged")
    return dataclasses.replace(times(job, goal, run.seconds, beside, limit), theirs=f"over {limit:.0f} s", measured=f"over {limit / run.seconds:.0f}x")


def _solve(method, basins, matrix, value):
    """Seconds of the first tolerance whose value agrees with the one that has a bound."""
    for tolerance in TOLERANCES:
        answer = by_hand.steady(method, matrix, tolerance)
        if answer is None:
            return "did not converge"
        took, vector = answer
        if value is None or abs(basins.value(vector) - value) <= AGREEMENT * value:
            return took
    return "did not agree"
