"""What a checked text of a rule runs as: one Python expression over the examined view."""

from collections.abc import Callable
from dataclasses import dataclass
from decimal import Decimal
from functools import cached_property
from types import CodeType
from typing import Any

from calloutlint.facts.view import View

EXAMINED = "examined"


@dataclass(frozen=True)
class Code:
    """A compiled Python expression with the constants that it names; it can be saved and read again."""

    program: CodeType
    constants: dict[str, Any]

    @cached_property
    def read(self) -> Callable[[View], Any]:
        """The function of the examined view that returns the expression's value."""
        return eval(self.program, {"divide": divide, **self.constants})  # type: ignore[no-any-return]

    def __reduce__(self) -> tuple[Any, ...]:
        return Code, (self.program, self.constants)


def compile_code(expression: str, constants: dict[str, Any]) -> Code:
    """The code of an expression in which the examined view is called EXAMINED."""
    return Code(compile(f"lambda {EXAMINED}: {expression}", "<rule>", "eval"), constants)


def divide(dividend: Decimal | int, divisor: Decimal | int) -> Decimal | None:
    """The quotient, unknown for a division by zero."""
    return Decimal(dividend) / Decimal(divisor) if divisor else None
