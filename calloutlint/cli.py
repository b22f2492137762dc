"""The command line: which command, with which options, and the exit status."""

import gc
import os
import sys
from collections.abc import Sequence
from pathlib import Path

from calloutlint import __version__
from calloutlint.commands import check, demo, fit, redline, rulebook, schema, symbols, transcribe
from calloutlint.commands.arguments import Parser, reader_may_leave, understand
from calloutlint.errors import CalloutlintError

COMMANDS = (demo, check, redline, fit, rulebook, transcribe, symbols, schema)

FAILED = 2
OBJECTS_BETWEEN_COLLECTIONS = 200_000


def main(arguments: Sequence[str] | None = None) -> int:
    """Run the command that the arguments state (None: those of the process) and give the exit status."""
    collect_seldom()
    if not sys.stdout:
        return _fail("Standard output is closed: the results have nowhere to go.")
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
    except Exception as fault:
        if sys.flags.dev_mode:
            raise
        return _fail(_own_fault(fault))
    return status


def collect_seldom() -> None:
    """Have Python look for garbage less often: nearly all that a run makes is in use until its end."""
    gc.set_threshold(OBJECTS_BETWEEN_COLLECTIONS)


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
    if not sys.stderr:
        return FAILED
    try:
        sys.stderr.write("".join(lines))
    except OSError:
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stderr.fileno())
    return FAILED


def _own_fault(fault: Exception) -> str:
    """What is said of an error that no input should cause; `python -X dev` shows the whole traceback."""
    place = fault.__traceback__
    while place is not None and place.tb_next is not None:
        place = place.tb_next
    where = f"{Path(place.tb_frame.f_code.co_filename).name}, line {place.tb_lineno}" if place else "unknown"
    return (
        "This is a fault of calloutlint, not of what it was given. Please report it with the sheet: "
        f"{type(fault).__name__}: {fault} ({where})."
    )


def _visible(line: str) -> str:
    return "".join(character if character.isprintable() else "\N{REPLACEMENT CHARACTER}" for character in line)
