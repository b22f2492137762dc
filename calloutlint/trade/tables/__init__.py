"""The published tables themselves. Every CSV begins with `#` lines that name its source."""

import csv
from functools import cache
from importlib.resources import files


@cache
def read_table(name: str) -> tuple[dict[str, str], ...]:
    """The rows of `NAME.csv` as written, keyed by column heading; `#` lines are left out."""
    text = (files(__name__) / f"{name}.csv").read_text(encoding="utf-8")
    return tuple(csv.DictReader(line for line in text.splitlines() if not line.startswith("#")))
