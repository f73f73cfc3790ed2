"""Rows of the table, and the page."""
import dataclasses
import datetime
import platform
import subprocess

import numpy as np
import scipy


@dataclasses.dataclass(frozen=True)
class Row:
    """One line: what ChainSolve took, what ran beside it, and what came out against the goal."""

    job: str
    goal: str
    ours: str
    beside: str = ""
    theirs: str = ""
    measured: str = ""
    reached: object = None

    def cells(self):
        reached = "" if self.reached is None else "yes" if self.reached else "**no**"
        return [self.job, self.goal, self.ours, self.beside, self.theirs, self.measured, reached]


HEADS = ["job", "goal", "ChainSolve", "beside it", "takes", "measured", "reached"]


def times(job, goal, ours, beside, theirs):
    """A row of a quotient of times: theirs by ours, at least the goal. A text in place of seconds tells why there are none."""
    if isinstance(ours, str):
        return Row(job, f"{goal:g}x", ours, beside, _shown(theirs), "none", False)
    if isinstance(theirs, str):
        return Row(job, f"{goal:g}x", _shown(ours), beside, theirs, "no line beside it", None)
    return Row(job, f"{goal:g}x", _shown(ours), beside, _shown(theirs), f"{theirs / ours:.1f}x", theirs / ours >= goal)


def _shown(seconds):
    return seconds if isinstance(seconds, str) else f"{seconds:.3g} s"


def write(path, rows, setting):
    """Writes the page; nothing on it is typed by hand."""
    sdk = subprocess.run(["dotnet", "--version"], check=True, capture_output=True, text=True).stdout.strip()
    size = "small sizes of a quick run, which prove nothing" if setting.quick else f"medians of {setting.count} runs"
    lines = [
        "# Performance",
        "",
        "Written by `tests/ChainSolve.Benchmarks/measure.py`; nothing here is typed by hand. Times are of one machine on one day: what counts are the quotients, since both",
        "sides ran in the same run. `2x` is twice as fast as what stands beside it.",
        "",
        f"{datetime.date.today().isoformat()}; {_machine()}; .NET SDK {sdk}; Python {platform.python_version()}, NumPy {np.__version__}, SciPy {scipy.__version__}; {size}.",
        "",
        f"| {' | '.join(HEADS)} |",
        f"|{'---|' * len(HEADS)}",
        *(f"| {' | '.join(row.cells())} |" for row in rows),
        "",
        "Kernels alone: `dotnet run --project tests/ChainSolve.Benchmarks -c Release -- --filter '*'`.",
        "",
    ]
    path.write_text("\n".join(lines), encoding="utf-8")


def _machine():
    with open("/proc/cpuinfo", encoding="utf-8") as info:
        names = [line.split(":", 1)[1].strip() for line in info if line.startswith("model name")]
    with open("/proc/meminfo", encoding="utf-8") as info:
        kilobytes = int(info.readline().split()[1])
    return f"{names[0]}, {len(names)} processors, {kilobytes / 2**20:.0f} GiB"
