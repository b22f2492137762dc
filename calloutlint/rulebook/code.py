"""What a checked text of a rule runs as: one Python expression over the examined view."""

from collections.abc import Callable
from dataclasses import dataclass
from decimal import Decimal
from functools import cached_property
from typing import Any

from calloutlint.facts.view import View

EXAMINED = "examined"


@dataclass(frozen=True)
class Code:
    """A Python expression with the constants that it names; it can be saved and read again."""

    expression: str
    constants: dict[str, Any]

    @cached_property
    def read(self) -> Callable[[View], Any]:
        """The function of the examined view that returns the expression's value."""
        return eval(f"lambda {EXAMINED}: {self.expression}", {"divide": divide, **self.constants})  # type: ignore[no-any-return]

    def __reduce__(self) -> tuple[Any, ...]:
        return Code, (self.expression, self.constants)


def divide(dividend: Decimal | int, divisor: Decimal | int) -> Decimal | None:
    """The quotient, unknown for a division by zero."""
    return Decimal(dividend) / Decimal(divisor) if divisor else None
