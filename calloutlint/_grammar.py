"""Builds a parser from the fragments of its grammar, and keeps it: its tables take longest at start-up."""

from collections.abc import Sequence
from typing import Any

import lark
from lark import Lark

from calloutlint._resources import read_text
from calloutlint._saved import kept


def load_grammar(names: tuple[str, ...], start: str | Sequence[str], **options: Any) -> Lark:
    """The LALR parser for the fragments `grammar/<name>.lark`, joined in this order.

    `options` go to `Lark`; a transformer among them must be an instance of an importable class.
    """
    text = "\n".join(read_text("grammar", f"{name}.lark") for name in names)
    starts = [start] if isinstance(start, str) else list(start)
    plain_options = repr((starts, sorted(options.items(), key=str))).partition(" object at ")[0]
    return kept(lambda: _built(text, starts, options), text, plain_options, lark.__version__)


def _built(text: str, starts: Sequence[str], options: dict[str, Any]) -> Lark:
    """The parser, with the patterns of its lexers compiled: by itself each is when it is first needed."""
    parser = Lark(text, parser="lalr", lexer="contextual", start=starts, **options)
    lexer = parser.parser.lexer
    for each in (*lexer.lexers.values(), lexer.root_lexer):
        _ = each.scanner
    return parser
