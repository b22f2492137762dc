"""Times the program on 20,000 distinct callouts, and its start: `python -m tests.bench.bench_check`.

Each stage runs in a process of its own after a short run on other callouts, so that none finds the memory
of another warm. Processor time is counted, so that a busy machine spoils little. The figures of one run
compare with one another, not with those of another machine.
"""

import os
import subprocess
import sys
import tempfile
from collections import deque
from collections.abc import Callable, Iterable, Sequence
from concurrent.futures import ProcessPoolExecutor
from multiprocessing import get_context
from pathlib import Path
from statistics import median
from time import process_time

from calloutlint.callouts.parse import grammar, parse_callout
from calloutlint.callouts.spelling import normalise
from calloutlint.cli import collect_seldom
from calloutlint.model.drawing import Package
from calloutlint.reading.sheet import parse_sheet
from calloutlint.rulebook.rulebook import load_rulebook
from calloutlint.units import Unit
from tests.bench.batch import CALLOUTS_PER_SHEET, callout_lines, sheets

SHEETS = 500
STARTS = 15


def bare_parse(count: int, seed: int) -> float:
    """Seconds for the parser alone, on lines that are normalised already."""
    lines = [line for lines in callout_lines(count, seed) for line in lines]
    texts = [(normalise(line).text, "lower" if line.startswith("|") else "line") for line in lines]
    parse = grammar().parse
    return seconds(parse(text, start=start) for text, start in texts)


def parse_and_build(count: int, seed: int) -> float:
    """Seconds from the lines of the callouts to their parts."""
    callouts = callout_lines(count, seed)
    return seconds(parse_callout(lines, Unit.INCH) for lines in callouts)


def whole_check(count: int, seed: int) -> float:
    """Seconds from the text of the sheets to the findings."""
    texts, rulebook = sheets(count, seed), load_rulebook()
    drawings = (parse_sheet(text, f"{number}.txt") for number, text in enumerate(texts))
    return seconds(rulebook.check(Package("bench", (drawing,))) for drawing in drawings)


def seconds(work: Iterable[object]) -> float:
    """Processor seconds that it takes to go through the work; nothing of it is kept."""
    start = process_time()
    deque(work, maxlen=0)
    return process_time() - start


def warm(stage: Callable[[int, int], float]) -> float:
    """Seconds for a stage on the whole batch, after a short run on another one; set up as the program is."""
    collect_seldom()
    stage(5, 2)
    return stage(SHEETS, 1)


def show_stages() -> None:
    """Print what each stage takes for a callout, and how it compares with the first."""
    base = None
    for stage in (bare_parse, parse_and_build, whole_check):
        with ProcessPoolExecutor(1, mp_context=get_context("spawn")) as process:
            taken = process.submit(warm, stage).result()
        base = base or taken
        each = taken / (SHEETS * CALLOUTS_PER_SHEET)
        print(f"{stage.__name__.replace('_', ' '):<18}{each * 1e6:8.1f} µs a callout{taken / base:7.2f} times")


def start(arguments: Sequence[str], compiled: Path) -> float:
    """Processor seconds that this interpreter takes with these arguments, start and end included.

    Modules are kept `compiled` in a folder of this run, as an installed program has them compiled.
    """
    command = [sys.executable, *arguments]
    settings = {name: value for name, value in os.environ.items() if name != "PYTHONDONTWRITEBYTECODE"}
    settings["PYTHONPYCACHEPREFIX"] = str(compiled)
    before = os.times()
    subprocess.run(command, stdout=subprocess.DEVNULL, env=settings, check=False)
    after = os.times()
    return after.children_user + after.children_system - before.children_user - before.children_system


def show_starts() -> None:
    """Print the median start of `check` on one sheet, beside that of its two largest libraries alone."""
    with tempfile.TemporaryDirectory() as folder:
        sheet = Path(folder) / "bracket.txt"
        sheet.write_text(sheets(1)[0], encoding="utf-8")
        commands = {
            "lark and pydantic": ["-c", "import lark, pydantic"],
            "check one sheet": ["-m", "calloutlint", "check", str(sheet)],
        }
        rounds = [
            {name: start(command, Path(folder) / "compiled") for name, command in commands.items()}
            for _ in range(STARTS)
        ]
    base = None
    for name in commands:
        taken = median(times[name] for times in rounds[1:])
        base = base or taken
        print(f"{name:<18}{taken * 1e3:8.1f} ms a start  {taken / base:7.2f} times")


if __name__ == "__main__":
    print(f"{SHEETS * CALLOUTS_PER_SHEET} distinct callouts on {SHEETS} sheets")
    show_stages()
    show_starts()
