#!/usr/bin/env python3
"""Times whole commands beside plain Python and SciPy, in one run, and writes docs/performance.md.

Needs the .NET SDK and Python 3 with SciPy. Usage: python3 tests/ChainSolve.Benchmarks/measure.py [--quick]
Every figure on the page comes from this run; medians of three runs, of one with --quick.
"""
import datetime
import os
import pathlib
import platform
import statistics
import subprocess
import sys
import tempfile
import time

import numpy as np
import scipy
import scipy.sparse as sp

ROOT = pathlib.Path(__file__).resolve().parents[2]
RUNS = 1 if "--quick" in sys.argv else 3
FAILURES = [1e-3, 2e-3, 3e-3, 1.5e-3, 2.5e-3]
REPAIRS = [0.01, 0.02, 0.015, 0.03, 0.025]
REPLICAS = 15
LEVELS = REPLICAS + 1
HOURS = 640.0

PAIR = "item unit { up -> down at 1e-3 per h; down -> up at 0.1 per h }\nmeasure m = probability unit is down at 10 h\n"


def lattice_text():
    items = "".join(
        f"item u{i} x {REPLICAS} {{ up -> down at {f} per h; down -> up at {r} per h }}\n" for i, (f, r) in enumerate(zip(FAILURES, REPAIRS)))
    good = " and ".join(f"u{i}.up >= 12" for i in range(len(FAILURES)))
    return items + f"let good = {good}\nmeasure at_time = probability good at {HOURS} h\nmeasure long_run = probability good steady\n"


def median_seconds(run):
    times = []
    for _ in range(RUNS):
        start = time.perf_counter()
        run()
        times.append(time.perf_counter() - start)
    return statistics.median(times)


def command(words):
    return lambda: subprocess.run(words, check=True, stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL)


def lattice_matrix():
    """The generator by Kronecker sums, in SciPy's compressed rows."""
    n = LEVELS
    total = None
    for f, r in zip(FAILURES, REPAIRS):
        up = np.arange(n)
        q = sp.diags([f * (n - 1 - up)[:-1], r * up[1:]], [1, -1], format="csr")
        q = q - sp.diags(np.asarray(q.sum(axis=1)).ravel())
        total = q if total is None else sp.kron(total, sp.identity(n, format="csr"), format="csr") + sp.kron(
            sp.identity(total.shape[0], format="csr"), q, format="csr")
    return total.tocsr()


def uniformization(matrix, hours):
    """What people write by hand: one vector, one product a step, weights by their recurrence in logarithms."""
    q = 1.02 * -matrix.diagonal().min()
    step = (sp.identity(matrix.shape[0], format="csr") + matrix / q).T.tocsr()
    mean = q * hours
    last = int(mean + 8 * np.sqrt(mean) + 20)
    k = np.arange(last + 1)
    log_weights = -mean + k * np.log(mean) - scipy.special.gammaln(k + 1)
    vector = np.zeros(matrix.shape[0])
    vector[0] = 1
    result = np.zeros_like(vector)
    for weight in np.exp(log_weights):
        result += weight * vector
        vector = step @ vector
    return result


def explore_in_python(replicas):
    """Breadth-first in plain Python; the number of states."""
    start = (0,) * len(FAILURES)
    seen = {start}
    open_states = [start]
    rates = 0.0
    while open_states:
        state = open_states.pop()
        for i, down in enumerate(state):
            if down < replicas:
                rates += FAILURES[i] * (replicas - down)
                move(state, i, 1, seen, open_states)
            if down > 0:
                rates += REPAIRS[i] * down
                move(state, i, -1, seen, open_states)
    return len(seen)


def move(state, i, change, seen, open_states):
    target = state[:i] + (state[i] + change,) + state[i + 1:]
    if target not in seen:
        seen.add(target)
        open_states.append(target)


def processor():
    with open("/proc/cpuinfo", encoding="utf-8") as info:
        names = [line.split(":", 1)[1].strip() for line in info if line.startswith("model name")]
    return f"{names[0]}, {len(names)} processors" if names else platform.processor()


def main():
    with tempfile.TemporaryDirectory() as folder:
        folder = pathlib.Path(folder)
        tool, hello = folder / "tool", folder / "hello"
        subprocess.run(["dotnet", "publish", ROOT / "src/ChainSolve.Cli", "-c", "Release", "--use-current-runtime", "-o", tool, "-v", "q"], check=True, stdout=subprocess.DEVNULL)
        subprocess.run(["dotnet", "new", "console", "-n", "hello", "-o", hello], check=True, stdout=subprocess.DEVNULL)
        subprocess.run(["dotnet", "publish", hello, "-c", "Release", "-o", hello / "out", "-v", "q"], check=True, stdout=subprocess.DEVNULL)
        (folder / "lattice.chain").write_text(lattice_text(), encoding="utf-8")
        (folder / "pair.chain").write_text(PAIR, encoding="utf-8")
        solve = ["dotnet", str(tool / "ChainSolve.Cli.dll")]
        lattice = str(folder / "lattice.chain")
        states = LEVELS ** len(FAILURES)

        rows = []

        def row(job, ours, theirs, beside, goal):
            rows.append((job, f"{ours:.2f} s", beside, f"{theirs:.2f} s", f"{theirs / ours:.1f}", goal))
            print(*rows[-1], sep=" | ", flush=True)

        explored = median_seconds(command(solve + ["check", lattice, "--quiet"]))
        small = 6
        plain = median_seconds(lambda: explore_in_python(small)) * states / (small + 1) ** len(FAILURES)
        row(f"exploring {states:,} states, generator included, whole command", explored, plain, "plain Python, states alone, by its rate on a smaller lattice", "")

        matrix = lattice_matrix()
        by_hand = median_seconds(lambda: uniformization(matrix, HOURS))
        for threads in ("1", "2"):
            ours = median_seconds(command(solve + ["solve", lattice, "--quiet", "--measure", "at_time", "--threads", threads]))
            row(f"transient at q·t = {1.02 * -matrix.diagonal().min() * HOURS:.0f}, {threads} thread(s), whole command", ours, by_hand, "uniformization by hand in SciPy, matrix given", "8")

        hello_seconds = median_seconds(command(["dotnet", str(hello / "out" / "hello.dll")]))
        pair = median_seconds(command(solve + ["solve", str(folder / "pair.chain"), "--quiet"]))
        row("a model of two states, whole command", pair, hello_seconds, "a program that prints one line", "0.5")

    write_page(rows)


def write_page(rows):
    sdk = subprocess.run(["dotnet", "--version"], check=True, capture_output=True, text=True).stdout.strip()
    lines = [
        "# Performance",
        "",
        "Written by `tests/ChainSolve.Benchmarks/measure.py`; nothing here is typed by hand. Times are of one machine on one day: what counts is the ratio, since both",
        "sides ran in the same run. Above 1, ChainSolve is the quicker one.",
        "",
        f"{datetime.date.today().isoformat()}; {processor()}; .NET SDK {sdk}; Python {platform.python_version()}, NumPy {np.__version__}, SciPy {scipy.__version__};"
        f" medians of {RUNS} run(s).",
        "",
        "| job | ChainSolve | beside it | takes | ratio | aimed at |",
        "|---|---|---|---|---|---|",
        *(f"| {' | '.join(cells)} |" for cells in rows),
        "",
        "Kernels alone: `dotnet run --project tests/ChainSolve.Benchmarks -c Release -- --filter '*'`.",
        "",
    ]
    (ROOT / "docs" / "performance.md").write_text("\n".join(lines), encoding="utf-8")


if __name__ == "__main__":
    os.environ.setdefault("OMP_NUM_THREADS", "1")
    main()
