"""Pickles parsers, patterns and conditions in their compiled state.

By itself a pattern is pickled as its text, and to compile the patterns of a lexer again is what takes longest
at start-up. Here it is pickled as the program for the engine of `re`. That program belongs to one version of
Python, and so does the file it is kept in; the engine refuses a program that is none of its own.
"""

import marshal
import pickle
import re
from array import array
from importlib import import_module
from types import CodeType, ModuleType
from typing import IO, Any

from lark.parsers.lalr_analysis import Action

PROGRAM = "I"


def write(made: object, file: IO[bytes]) -> None:
    """Pickle an object, to be read with `pickle.load`."""
    _Pickler(file, protocol=pickle.HIGHEST_PROTOCOL).dump(made)


class _Pickler(pickle.Pickler):
    def reducer_override(self, part: Any) -> Any:
        """How to write what would not come back ready for use."""
        if isinstance(part, re.Pattern):
            return pattern_of, _program_of(part)
        if isinstance(part, CodeType):
            return marshal.loads, (marshal.dumps(part),)
        if isinstance(part, Action):  # told apart by identity
            return part.name
        if isinstance(part, ModuleType):
            return import_module, (part.__name__,)
        return NotImplemented


def _program_of(pattern: re.Pattern[str]) -> tuple[Any, ...]:
    """What `re` gives its engine for a pattern."""
    parser, compiler = import_module("re._parser"), import_module("re._compiler")
    parsed = parser.parse(pattern.pattern, pattern.flags)
    program = array(PROGRAM, compiler._code(parsed, pattern.flags))
    return pattern.pattern, pattern.flags, program.tobytes(), pattern.groups, dict(pattern.groupindex)


def pattern_of(text: str, flags: int, program: bytes, groups: int, named: dict[str, int]) -> Any:
    """The pattern that runs a program."""
    names = {number: name for name, number in named.items()}
    by_number = tuple(names.get(number) for number in range(groups + 1))
    engine = import_module("_sre")
    return engine.compile(text, flags, array(PROGRAM, program).tolist(), groups, named, by_number)
