#!/usr/bin/env python3
"""Times whole commands beside plain Python and SciPy, in one run, and writes docs/performance.md.

Needs the .NET SDK and a Python 3 that has SciPy. Run it on a machine that does nothing else; with --quick, to try the script itself, small sizes are taken.
"""
import argparse
import dataclasses
import os
import pathlib
import tempfile

os.environ.setdefault("OMP_NUM_THREADS", "1")

from measuring import exploring, jobs, rows, setting as settings, steady  # noqa: E402 - threads are set before NumPy is loaded

GROUPS = {
    "start-up": jobs.start_up,
    "product": jobs.product,
    "transient": jobs.transient,
    "exploration": exploring.exploration,
    "steady": steady.steady,
    "memory": jobs.memory,
    "sweep": jobs.sweep,
}


def main():
    options = argparse.ArgumentParser(description=__doc__)
    options.add_argument("--quick", action="store_true", help="small sizes and single runs")
    options.add_argument("--huge", action="store_true", help="a hundred million states too")
    options.add_argument("--limit", type=float, help="seconds that one run may take; 900 if not given, 8 with --quick")
    options.add_argument("--only", choices=GROUPS, nargs="+", default=list(GROUPS), help="these jobs alone")
    options.add_argument("--out", type=pathlib.Path, default=settings.ROOT / "docs/performance.md", help="the page")
    chosen = options.parse_args()
    with tempfile.TemporaryDirectory() as folder:
        setting = settings.Setting(pathlib.Path(folder), chosen.quick, chosen.huge, chosen.limit or (8 if chosen.quick else 900))
        setting.build()
        table = []
        for name in chosen.only:
            for row in GROUPS[name](setting):
                row = dataclasses.replace(row, reached=None) if chosen.quick else row
                table.append(row)
                print(" | ".join(row.cells()), flush=True)
        rows.write(chosen.out, table, setting)


if __name__ == "__main__":
    main()
