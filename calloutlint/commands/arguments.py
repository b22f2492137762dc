"""The command line's parser: options that several commands share, and errors in one plain sentence."""

import argparse
import os
import re
import sys
from collections.abc import Iterator, Sequence
from contextlib import contextmanager
from pathlib import Path
from typing import TYPE_CHECKING, Any, NoReturn

from calloutlint.errors import CalloutlintError

if TYPE_CHECKING:
    from calloutlint.rulebook.finding import Grade

    Subparsers = argparse._SubParsersAction["Parser"]
else:
    Subparsers = Any


class Parser(argparse.ArgumentParser):
    """A parser whose errors say what was given, what was expected, and the nearest that is known."""

    def __init__(self, **settings: Any) -> None:
        """As argparse; long options are not to be shortened."""
        super().__init__(**settings, allow_abbrev=False)

    def error(self, message: str) -> NoReturn:
        """Raise what argparse found as an error of ours."""
        raise CalloutlintError(_sentence(self, message))


def understand(parser: Parser, arguments: Sequence[str] | None) -> argparse.Namespace:
    """The options that the arguments state; paths may stand before, between and after options.

    Raises:
        CalloutlintError: an argument is not known, or one is missing or wrong.
    """
    options, rest = parser.parse_known_args(arguments)
    command: Parser = getattr(options, "parser", parser)
    dashes = rest.index("--") if "--" in rest else len(rest)
    unknown = [word for word in rest[:dashes] if word.startswith("-") and word != "-"]
    if unknown or (rest and not hasattr(options, "paths")):
        raise CalloutlintError(_unknown(command, (unknown or rest)[0]))
    if hasattr(options, "paths"):
        options.paths = [*options.paths, *(_path(word) for index, word in enumerate(rest) if index != dashes)]
        if not options.paths:
            raise CalloutlintError(f"'{command.prog}' needs a PATH: a callout sheet, or a folder of sheets.")
    return options


def _unknown(command: Parser, word: str) -> str:
    if not word.startswith("-"):
        return f"'{word}' is one argument too many. {_see(command)}"
    known = [name for name in command._option_string_actions if name.startswith("--")]
    if Path(word).exists():
        hint = f" If the file '{word}' is meant, write it after --."
    else:
        hint = _nearest(word.partition("=")[0], known)
    return f"There is no option '{word}'.{hint} {_see(command)}"


def _nearest(word: str, known: Sequence[str]) -> str:
    from difflib import get_close_matches

    near = get_close_matches(word, known, n=1, cutoff=0.5)
    return f" Was '{near[0]}' meant?" if near else ""


def _see(parser: argparse.ArgumentParser) -> str:
    return f"'{parser.prog} --help' lists what is understood."


_CHOICE = re.compile(r"argument (\S+): invalid choice: (.+) \(choose from (.+)\)")
_MISSING = re.compile(r"the following arguments are required: (.+)")
_ARGUMENT = re.compile(r"argument (\S+): (.+)", re.DOTALL)


def _sentence(parser: argparse.ArgumentParser, message: str) -> str:
    """What argparse says, in the words of this program."""
    if match := _CHOICE.fullmatch(message):
        given, known = match[2].strip("'\""), _commands(parser)
        return f"'{parser.prog}' knows no '{given}'.{_nearest(given, known)} It knows {', '.join(known)}."
    if match := _MISSING.fullmatch(message):
        return f"'{parser.prog}' needs {_one_of(_commands(parser)) or match[1]}. {_see(parser)}"
    if match := _ARGUMENT.fullmatch(message):
        told = match[2] if match[2].endswith(".") else f"{match[2]}."
        return (
            f"{match[1]}: {told}"
            if told.count(".") > 1 or "'" in told
            else f"{match[1]}: {told} {_see(parser)}"
        )
    return f"{message[:1].upper()}{message[1:]}. {_see(parser)}"


def _commands(parser: argparse.ArgumentParser) -> list[str]:
    choices = (action.choices for action in parser._actions if isinstance(action, argparse._SubParsersAction))
    return [name for names in choices for name in names]


def _one_of(names: Sequence[str]) -> str:
    return f"one of {', '.join(names)}" if names else ""


def paths_argument(parser: Parser) -> None:
    """The drawings to work on."""
    parser.add_argument(
        "paths", type=_path, nargs="*", metavar="PATH", help="a callout sheet, or a folder of sheets"
    )
    parser.set_defaults(parser=parser)


def _path(word: str) -> Path:
    """A path; none at all would stand for the folder one is in, which nobody means by ''."""
    if not word.strip():
        raise argparse.ArgumentTypeError("the path is empty; a callout sheet or a folder was expected")
    return Path(word)


def plain_option(parser: Parser) -> None:
    """Output without colours and symbols."""
    parser.add_argument("--plain", action="store_true", help="ASCII only, without colour")
    parser.set_defaults(parser=parser)


def house_option(parser: Parser) -> None:
    """House rules."""
    parser.add_argument(
        "--house",
        type=Path,
        action="append",
        default=[],
        metavar="DIR",
        help="add the rule sheets in DIR to those that ship; may be given several times",
    )


def standard_option(parser: Parser) -> None:
    """The standard for sheets that state none."""
    parser.add_argument(
        "--standard",
        metavar="S",
        help="the standard of drawings that state none, such as 'ASME Y14.5-2018' or 'ISO 1101'",
    )


def grade(word: str) -> "Grade":
    """The grade of that name.

    Raises:
        ArgumentTypeError: there is none.
    """
    from calloutlint.rulebook.finding import GRADES

    try:
        return GRADES[word.lower()]
    except KeyError:
        known = ", ".join(reversed(GRADES))
        raise argparse.ArgumentTypeError(f"there is no grade '{word}'. The grades are {known}.") from None


@contextmanager
def reader_may_leave() -> Iterator[None]:
    """Stop writing in silence if whoever reads the results has closed the pipe."""
    try:
        yield
        sys.stdout.flush()
    except BrokenPipeError:
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
