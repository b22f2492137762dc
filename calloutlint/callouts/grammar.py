"""Loads a grammar from its fragments, and keeps the built parser: its tables take longest at start-up."""

from collections.abc import Sequence
from typing import Any

import lark
from lark import Lark

from calloutlint._resources import read_text
from calloutlint._saved import load, save, saved_path


def load_grammar(names: tuple[str, ...], start: str | Sequence[str], **options: Any) -> Lark:
    """The LALR parser for the fragments `grammar/<name>.lark`, joined in this order.

    `options` go to `Lark`; a transformer among them must be an instance of an importable class.
    """
    text = "\n".join(read_text("grammar", f"{name}.lark") for name in names)
    starts = [start] if isinstance(start, str) else list(start)
    plain_options = repr((starts, sorted(options.items(), key=str))).partition(" object at ")[0]
    path = saved_path(text, plain_options, lark.__version__)
    if path is not None and (saved := load(path, Lark.load)) is not None:
        return saved
    built = Lark(text, parser="lalr", lexer="contextual", start=starts, **options)
    if path is not None:
        save(path, built.save)
    return built
