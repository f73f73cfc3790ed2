"""Runs processes and functions under a time limit: their seconds, peak memory and output."""
import dataclasses
import multiprocessing
import os
import pathlib
import re
import statistics
import subprocess
import time


@dataclasses.dataclass(frozen=True)
class Run:
    """One run; `failure` tells why there is no result."""

    seconds: float = 0.0
    peak: int = 0
    output: str = ""
    failure: str = ""


def process(words, limit, environment=None):
    """Runs a process. Its peak of resident memory is read while it runs, since the figure told at its end may be that of its parent."""
    start = time.perf_counter()
    running = subprocess.Popen([str(w) for w in words], stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True, env={**os.environ, **(environment or {})})
    peak = 0
    while True:
        try:
            output, error = running.communicate(timeout=0.005 if peak == 0 else 0.05)
            seconds = time.perf_counter() - start
            break
        except subprocess.TimeoutExpired:
            peak = max(peak, _peak(running.pid))
            if time.perf_counter() - start > limit:
                running.kill()
                running.communicate()
                return Run(peak=peak, failure=f"not done in {limit:.0f} s")
    if running.returncode != 0:
        return Run(seconds, peak, output, f"exit code {running.returncode}: {(error.strip().splitlines() or [''])[0][:150]}")
    return Run(seconds, peak, output)


def median(words, limit, count):
    """The run of median time among several; the first that fails ends it."""
    runs = []
    for _ in range(count):
        runs.append(process(words, limit))
        if runs[-1].failure:
            return runs[-1]
    runs.sort(key=lambda r: r.seconds)
    return runs[len(runs) // 2]


def call(function, arguments, limit):
    """The result of a function in a process of its own; a text that tells why where there is none."""
    context = multiprocessing.get_context("fork")
    receiver, sender = context.Pipe(duplex=False)
    worker = context.Process(target=_send, args=(sender, function, arguments))
    worker.start()
    sender.close()
    try:
        return receiver.recv() if receiver.poll(limit) else f"not done in {limit:.0f} s"
    except EOFError:
        return "ended without a result"
    finally:
        worker.kill()
        worker.join()


def seconds(function, count):
    """The median time of a function."""
    times = []
    for _ in range(count):
        start = time.perf_counter()
        function()
        times.append(time.perf_counter() - start)
    return statistics.median(times)


def _send(sender, function, arguments):
    try:
        sender.send(function(*arguments))
    except (ArithmeticError, MemoryError, RuntimeError, ValueError) as fault:
        sender.send(f"{type(fault).__name__}: {fault}"[:150])


def _peak(pid):
    try:
        found = re.search(r"VmHWM:\s+(\d+) kB", pathlib.Path(f"/proc/{pid}/status").read_text(encoding="ascii"))
        return int(found.group(1)) * 1024 if found else 0
    except OSError:
        return 0
