"""What a measurement needs: built programs, models as files, sizes and limits."""
import dataclasses
import json
import pathlib
import subprocess

from . import models, runs

ROOT = pathlib.Path(__file__).resolve().parents[3]


@dataclasses.dataclass(frozen=True)
class Setting:
    """Where things are, and how large and how often."""

    folder: pathlib.Path
    quick: bool
    huge: bool
    limit: float

    @property
    def count(self):
        return 1 if self.quick else 3

    @property
    def million(self):
        """The fleet that stands for a million states."""
        return models.Fleet(7 if self.quick else 15)

    @property
    def ten_million(self):
        return models.Fleet(9 if self.quick else 24)

    @property
    def growing(self):
        """Fleets from a hundred thousand states on, ten times each."""
        replicas = (5, 7, 9) if self.quick else (9, 15, 24, 39) if self.huge else (9, 15, 24)
        return [models.Fleet(r) for r in replicas]

    def build(self):
        """Builds the tool, the benchmark project and a program that prints a line."""
        for words in (
            ["dotnet", "publish", ROOT / "src/ChainSolve.Cli", "-c", "Release", "--use-current-runtime", "-o", self.folder / "tool"],
            ["dotnet", "build", ROOT / "tests/ChainSolve.Benchmarks", "-c", "Release", "-o", self.folder / "timers"],
            ["dotnet", "new", "console", "-n", "hello", "-o", self.folder / "hello"],
            ["dotnet", "publish", self.folder / "hello", "-c", "Release", "-o", self.folder / "hello/out"],
        ):
            subprocess.run([*words, "-v", "q"], check=True, stdout=subprocess.DEVNULL)

    @property
    def hello(self):
        return ["dotnet", self.folder / "hello/out/hello.dll"]

    def file(self, name, text):
        path = self.folder / f"{name}.chain"
        path.write_text(text, encoding="utf-8")
        return path

    def tool(self, *words, count=None):
        """A command of the tool, whole process, medians."""
        return runs.median([*self.words(*words), "--quiet"], self.limit, count or self.count)

    def words(self, *words):
        """A command of the tool as words."""
        return ["dotnet", self.folder / "tool/ChainSolve.Cli.dll", *words]

    def timer(self, *words):
        """What the benchmark project times, as it printed it; a text that tells why where there is nothing."""
        run = runs.process(["dotnet", self.folder / "timers/ChainSolve.Benchmarks.dll", *words], self.limit)
        return run.failure or json.loads(run.output.splitlines()[-1])
