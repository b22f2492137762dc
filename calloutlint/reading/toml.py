"""TOML as users write it: one clear message for whatever is wrong with it."""

from decimal import Decimal
from typing import Any

from calloutlint.errors import SheetError


def read_toml(text: str, file: str) -> dict[str, Any]:
    """The table that a TOML text states; numbers with a point are `Decimal`.

    Raises:
        SheetError: it is no TOML, a number has too many digits, or lists stand in each other too deeply.
    """
    import tomllib  # a check of single sheets does not pay for it

    try:
        return tomllib.loads(text.removeprefix("\ufeff"), parse_float=Decimal)
    except RecursionError:
        raise SheetError(f"{file}: this is no TOML that is read: it is nested too deeply") from None
    except ValueError as error:
        raise SheetError(f"{file}: this is no TOML: {error}") from None
