"""`symbols`: every spelling that is read."""

import sys
from argparse import Namespace

from calloutlint.commands.arguments import Subparsers, plain_option


def add(commands: Subparsers) -> None:
    """Add `symbols` to the commands."""
    parser = commands.add_parser(
        "symbols",
        help="list every spelling that is read",
        description="List every symbol with its ASCII form, its name, and what else is read as it.",
    )
    plain_option(parser)
    parser.set_defaults(run=run)


def run(options: Namespace) -> int:
    """Print the table; the exit status."""
    from calloutlint.report.screen import Screen
    from calloutlint.report.symbols import show_symbols

    show_symbols(Screen(sys.stdout, plain=options.plain))
    return 0
