"""A batch of sheets as a drafting office would have them, made from a seed: no two callouts are alike."""

import random
from collections.abc import Callable, Iterator

CALLOUTS_PER_SHEET = 40

_TITLE = """\
drawing:    WB-{number:04}
revision:   A
title:      Weir bracket {number}
standard:   ASME Y14.5-2018
units:      inch
tolerances: .XX ±.01, .XXX ±.005, angles ±1°
"""

_DATUMS = (
    "⏥ | .00{digit}\nDATUM A",
    "⌀{size} +.0010 -.0000 THRU\n⟂ | ⌀.002 | A\nDATUM B",
    "SLOT {size} ±.002\n⌖ | .004 Ⓜ | A | B\nDATUM C",
)

_THREADS = (".190-32 UNF", ".250-20 UNC", ".3125-18 UNC", ".375-16 UNC", ".500-13 UNC")


def _numbers(rng: random.Random) -> dict[str, str]:
    low, plus, minus = rng.randrange(1000, 9999) / 1000, rng.randrange(1, 20), rng.randrange(1, 20)
    return {
        "low": f"{low:.3f}",
        "high": f"{low + plus / 1000:.3f}",
        "plus": f".{plus:03}",
        "minus": f".{minus:03}",
    }


def _diameter(rng: random.Random) -> str:
    return rng.choice(("⌀{low} +{plus} -{minus}", "⌀{low}-{high}", "⌀{low} ±{plus}")).format(**_numbers(rng))


def _size(rng: random.Random) -> str:
    other = rng.choice(("{low} ±{plus}", "R{low} ±{plus}", "{low}-{high}")).format(**_numbers(rng))
    return rng.choice((other, _diameter(rng)))


def _hole(rng: random.Random) -> str:
    size = f"{rng.randrange(2, 9)}X ⌀.{rng.randrange(200, 700)} +.00{rng.randrange(3, 9)} -.002 THRU"
    step = rng.choice(("", f"\n⌴ ⌀.{rng.randrange(800, 999)} ↧ .{rng.randrange(20, 60)}"))
    return f"{size}{step}\n⌖ | ⌀.0{rng.randrange(10, 30)} Ⓜ | A | B | C"


def _thread(rng: random.Random) -> str:
    size = f"{rng.randrange(2, 13)}X {rng.choice(_THREADS)}-2B ↧ {rng.randrange(50, 99) / 100:.2f}".replace(
        "0.", "."
    )
    return f"{size}\n⌖ | ⌀.0{rng.randrange(10, 40)} Ⓟ .{rng.randrange(30, 80)} | A | B | C"


def _frame(rng: random.Random) -> str:
    tolerance, low = f".{rng.randrange(1, 99):03}", f"{rng.randrange(1000, 9999) / 1000:.3f}"
    return rng.choice(
        (
            f"{_diameter(rng)}\n⌰ | {tolerance} | A | B",
            f"FACE {low} ±.010\n∥ | {tolerance} | A",
            f"SURFACE [{low}]\n⌓ | {tolerance} Ⓤ .{rng.randrange(1, 99):03} | A | B | C",
            f"{_diameter(rng)}\n⌖ | ⌀{tolerance} Ⓜ | A | B | C\n| ⌀.00{rng.randrange(1, 9)} Ⓜ | A",
        )
    )


# How often each kind of callout stands on a drawing of machined parts: common practice, no source.
_MIX: dict[Callable[[random.Random], str], int] = {_size: 4, _hole: 3, _thread: 1, _frame: 2}


def callouts(seed: int = 1) -> Iterator[str]:
    """Distinct callouts without end, each one or more lines of canonical text."""
    rng = random.Random(seed)
    kinds, weights = list(_MIX), list(_MIX.values())
    seen: set[str] = set()
    while True:
        text = rng.choices(kinds, weights)[0](rng)
        if text not in seen:
            seen.add(text)
            yield text


def sheets(count: int, seed: int = 1) -> list[str]:
    """The text of `count` sheets of 40 callouts each."""
    return [
        "\n".join([_TITLE.format(number=number), *(f"{tag}) {text}" for tag, text in enumerate(texts, 1)), ""])
        for number, texts in _numbered(count, seed)
    ]


def callout_lines(count: int, seed: int = 1) -> list[list[str]]:
    """The lines of every callout of the same sheets, without their balloons."""
    return [text.split("\n") for _, texts in _numbered(count, seed) for text in texts]


def _numbered(count: int, seed: int) -> Iterator[tuple[int, list[str]]]:
    """Sheet numbers from 1, each with its callouts; the first three establish the datums A, B and C."""
    supply = callouts(seed)
    for number in range(1, count + 1):
        size = f"{1 + number / 10000:.4f}"
        datums = [text.format(size=size, digit=number % 9 + 1) for text in _DATUMS]
        yield number, datums + [next(supply) for _ in range(CALLOUTS_PER_SHEET - len(datums))]
