"""The rows of exploration: speed, growth, and memory for a state and a transition."""
import numpy as np

from . import by_hand, models, runs
from .rows import Row

GOALS = {1: 6e6, 2: 10e6}


def exploration(setting):
    """`check` of growing fleets, each thread count; the time of the smallest model is taken off."""
    pair = setting.tool("check", setting.file("pair", models.PAIR))
    found = {}
    for threads, goal in GOALS.items():
        found[threads] = [(fleet, _explored(setting, fleet, threads)) for fleet in setting.growing]
        yield _speed(setting.ten_million, found[threads], threads, goal, pair, setting)
    done = [(fleet, run) for fleet, run in found[1] if not run.failure]
    if len(done) > 1:
        yield from _growth(done, pair)


def _explored(setting, fleet, threads):
    file = setting.file("explored", fleet.text(soon=1))
    return setting.tool("check", file, "--threads", threads, "--max-states", fleet.states)


def _speed(fleet, found, threads, goal, pair, setting):
    run = next(r for f, r in found if f == fleet)
    small = models.Fleet(4 if setting.quick else 6)
    plain = small.states / runs.seconds(lambda: by_hand.explore(small.replicas), setting.count)
    job = f"exploration with generator from the notation, {fleet.states:,} states, {threads} thread(s), `check` less start-up"
    aim = f"{goal / 1e6:g} M states/s"
    if run.failure:
        return Row(job, aim, run.failure, reached=False)
    speed = fleet.states / max(1e-9, run.seconds - pair.seconds)
    return Row(
        job, aim, f"{run.seconds - pair.seconds:.3g} s", "plain Python, states alone", f"{plain / 1e6:.2f} M states/s",
        f"{speed / 1e6:.2f} M states/s, {speed / plain:.0f}x", speed >= goal)


def _growth(done, pair):
    sizes = [np.log(_transitions(fleet)) for fleet, _ in done]
    slope = np.polyfit(sizes, [np.log(max(1e-3, run.seconds - pair.seconds)) for _, run in done], 1)[0]
    told = "; ".join(f"{_transitions(fleet):.2g}: {run.seconds - pair.seconds:.3g} s" for fleet, run in done)
    yield Row("growth of exploration with transitions, 1 thread: slope in logarithms", "about 1", told, measured=f"{slope:.2f}", reached=slope <= 1.1)
    fleet, run = done[-1]
    size = run.peak - pair.peak
    yield Row(
        f"memory of exploration, {fleet.states:,} states", "", f"{run.peak / 1e9:.2f} GB",
        measured=f"{size / fleet.states:.0f} bytes a state, {size / _transitions(fleet):.1f} a transition")


def _transitions(fleet):
    kinds = len(models.FAILURES)
    return 2 * kinds * fleet.replicas * (fleet.replicas + 1) ** (kinds - 1)
