"""The command line: which command, with which options, and the exit status."""

import os
import sys
from collections.abc import Sequence

from calloutlint import __version__
from calloutlint.commands import check, demo, redline, rulebook, schema, symbols, transcribe
from calloutlint.commands.arguments import Parser, reader_may_leave, understand
from calloutlint.errors import CalloutlintError

COMMANDS = (demo, check, redline, rulebook, transcribe, symbols, schema)

FAILED = 2


def main(arguments: Sequence[str] | None = None) -> int:
    """Run the command that the arguments state (None: those of the process) and give the exit status."""
    try:
        options = understand(build_parser(), arguments)
        status = 0
        with reader_may_leave():
            status = int(options.run(options))
    except CalloutlintError as error:
        return _fail(str(error))
    except KeyboardInterrupt:
        return _fail("Interrupted.")
    except OSError as error:
        return _fail(f"{error.strerror or error}{f': {error.filename}' if error.filename else ''}.")
    return status


def build_parser() -> Parser:
    """The parser with every command."""
    parser = Parser(prog="calloutlint", description="Check the tolerance callouts of mechanical drawings.")
    parser.add_argument("--version", action="version", version=f"calloutlint {__version__}")
    commands = parser.add_subparsers(title="commands", metavar="COMMAND", required=True)
    for command in COMMANDS:
        command.add(commands)
    return parser


def _fail(message: str) -> int:
    lines = (f"calloutlint: {_visible(line)}\n" for line in message.splitlines())
    try:
        sys.stderr.write("".join(lines))
    except OSError:
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stderr.fileno())
    return FAILED


def _visible(line: str) -> str:
    return "".join(character if character.isprintable() else "\N{REPLACEMENT CHARACTER}" for character in line)
