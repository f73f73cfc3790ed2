"""The rows of the table: products, transients, sweeps, memory and start-up."""
import statistics

import numpy as np

from . import by_hand, models, runs
from .rows import Row, times

GIGABYTE = 1e9


def product(setting):
    """One step of uniformization against one product by SciPy."""
    fleet = setting.ten_million
    near, far = 30 / fleet.fastest, 330 / fleet.fastest
    file = setting.file("product", fleet.text(near=near, far=far))
    ours = {threads: setting.timer("steps", file, threads, "near", "far") for threads in (1, 2)}
    matrix = fleet.matrix().T.tocsr()
    vector = np.full(fleet.states, 1.0 / fleet.states)
    theirs = runs.seconds(lambda: matrix @ vector, 3 + setting.count)
    for (threads, took), goal in zip(ours.items(), (5, 10)):
        told = took if isinstance(took, str) else took["step"]
        wide = isinstance(took, dict) and "two doubles" in took["how"]
        job = f"structured product, {fleet.states:,} states, {matrix.nnz:,} nonzeros, {threads} thread(s): a whole step{' in two doubles' if wide else ''}"
        yield times(job, goal, told, "`A @ v` in SciPy's compressed rows", theirs)


def transient(setting):
    """A whole command at q t = 1000 against the hand-written solve alone."""
    fleet = setting.million
    hours = 1000 / (1.02 * fleet.fastest)
    file = setting.file("transient", fleet.text(at_time=hours))
    ours = {threads: setting.tool("solve", file, "--threads", threads) for threads in (2, 1)}
    matrix = fleet.matrix()
    theirs = runs.seconds(lambda: by_hand.uniformization(matrix, hours), setting.count)
    for threads, run in ours.items():
        yield times(
            f"transient, {fleet.states:,} states, q t = 1000, {threads} thread(s), whole command", 8,
            run.failure or run.seconds, "uniformization by hand in SciPy, matrix given", theirs)


def memory(setting):
    """The peak of a transient solve."""
    fleets = [(setting.ten_million, 1.2)]
    if setting.huge:
        fleets.append((models.Fleet(39), 20))
    for fleet, goal in fleets:
        file = setting.file("memory", fleet.text(at_time=100 / fleet.fastest))
        run = setting.tool("solve", file, "--max-states", fleet.states, count=1)
        peak = run.peak / GIGABYTE
        yield Row(
            f"peak memory of a transient solve, {fleet.states:,} states", f"at most {goal} GB",
            run.failure or f"{run.seconds:.3g} s", measured=f"{peak:.2f} GB", reached=not run.failure and peak <= goal)


def sweep(setting):
    """A further point with the same states, where exploring takes most of the first."""
    fleet = setting.million
    file = setting.file("sweep", fleet.text(soon=5 / fleet.fastest))
    took = setting.timer("sweep", file, "soon", "wear", *(f"{w} per h" for w in (1.1e-3, 1.2e-3, 1.3e-3)))
    job = f"a further point of a sweep, {fleet.states:,} states, of the time of the first"
    if isinstance(took, str):
        yield Row(job, "at most 1/5", took, reached=False)
        return
    further = statistics.median(took["further"])
    yield Row(job, "at most 1/5", f"{further:.3g} s", "the first point", f"{took['first']:.3g} s", f"{further / took['first']:.2f}", further <= took["first"] / 5)


def start_up(setting):
    """The whole process of the smallest model; both by turns, since it is short."""
    solve = setting.words("solve", setting.file("pair", models.PAIR))
    version = setting.words("--version")
    took = {name: [] for name in ("hello", "version", "solve")}
    for _ in range(10 if setting.quick else 20):
        for name, words in (("hello", setting.hello), ("version", version), ("solve", solve)):
            run = runs.process(words, setting.limit)
            if run.failure:
                yield Row(f"start-up: {name}", "at most 2x", run.failure, reached=False)
                return
            took[name].append(run.seconds)
    hello, version, ours = (statistics.median(times) for times in took.values())
    beside = "a program that prints one line"
    yield Row(
        "`solve` of a model of two states, whole process", "at most 2x", f"{ours:.3g} s", beside, f"{hello:.3g} s", f"{ours / hello:.1f}x", ours <= 2 * hello)
    yield Row("of which the runtime and the command line: `--version`", "", f"{version:.3g} s", beside, f"{hello:.3g} s", f"{version / hello:.1f}x")
    compiled = [_compiled(setting, words) for words in (solve, setting.hello)]
    yield Row("methods that the runtime compiles in that `solve`", "", f"{compiled[0]}", beside, f"{compiled[1]}")


def _compiled(setting, words):
    """How many methods are compiled while a process runs."""
    log = setting.folder / "compiled.txt"
    log.unlink(missing_ok=True)
    runs.process(words, setting.limit, {"DOTNET_JitStdOutFile": str(log), "DOTNET_JitDisasmSummary": "1"})
    return len(log.read_text(encoding="utf-8").splitlines()) if log.exists() else 0
