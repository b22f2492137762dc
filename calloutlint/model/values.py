"""Numbers as a drawing states them: exact, with the places and the sign as written."""

from dataclasses import dataclass
from decimal import Decimal

from calloutlint.units import Unit


@dataclass(frozen=True, slots=True)
class Value:
    """A length or an angle as written: `.2500`, `+.002`, `1 1/4`, `0°30'`.

    `text` is the canonical spelling (decimal point, ASCII sign, no unit); `amount` is its exact value in
    `unit`, degrees for an angle. `unit` is None where the drawing states none. Two values are equal only
    if they are written alike: `.2500` is not `.25`.
    """

    text: str
    amount: Decimal
    unit: Unit | None

    @property
    def places(self) -> int:
        """Decimal places as written; 0 for a whole number or a fraction."""
        return len(self.text.partition(".")[2].rstrip("°'\"")) if "/" not in self.text else 0

    @property
    def signed(self) -> bool:
        """Whether a sign is written."""
        return self.text[:1] in {"+", "-"}

    @property
    def has_leading_zero(self) -> bool:
        """Whether a zero stands before the decimal point, as in `0.281`."""
        return self.text.lstrip("+-").startswith("0.")

    @property
    def is_bare_point(self) -> bool:
        """Whether nothing stands before the decimal point, as in `.5`."""
        return self.text.lstrip("+-").startswith(".")
