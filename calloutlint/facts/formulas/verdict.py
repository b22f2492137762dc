"""What a checker decides on a measured feature, and the table of tolerance against measured size.

Lengths are exact decimals in one unit; a deviation is the diameter of the smallest zone about true position
that holds the measured axis.
"""

from dataclasses import dataclass
from decimal import Decimal
from enum import StrEnum

from calloutlint.facts.formulas.boundaries import FeatureOfSize, GeometricTolerance, allowed, bonus
from calloutlint.model.frame import Modifier

_STEPS = range(5, 13)


class Decision(StrEnum):
    """What becomes of a measured feature."""

    ACCEPT = "accept"
    ACCEPT_WITH_BONUS = "accept with bonus"
    REWORK = "rework"
    REJECT = "reject"


@dataclass(frozen=True, slots=True)
class Verdict:
    """A decision with its reasons: the tolerance `allowed` at the measured size (None out of limits).

    `rework_to` is the size that the least removal of material has to reach, for a rework.
    """

    decision: Decision
    allowed: Decimal | None
    rework_to: Decimal | None = None


@dataclass(frozen=True, slots=True)
class BonusRow:
    """Tolerance at one size: the bonus, and the total that is allowed."""

    size: Decimal
    bonus: Decimal
    allowed: Decimal


def decide(feature: FeatureOfSize, tolerance: GeometricTolerance, size: Decimal, deviation: Decimal) -> Verdict:
    """The decision on a feature of measured actual mating size and location or orientation deviation.

    Accepted as stated or with its bonus; else reworked if taking material away (opening the hole, turning
    down the shaft) about the same axis brings it in; else rejected. Limits belong to what they bound.
    Source: ASME Y14.5, tolerance at MMC, LMC and regardless of feature size; rework is common practice.
    """
    inside = feature.smallest <= size <= feature.largest
    tolerance_there = allowed(feature, tolerance, size) if inside else None
    if tolerance_there is not None and deviation <= tolerance_there:
        stated = deviation <= tolerance.amount
        return Verdict(Decision.ACCEPT if stated else Decision.ACCEPT_WITH_BONUS, tolerance_there)
    target = _least_rework(feature, tolerance, size, deviation)
    if target is None:
        return Verdict(Decision.REJECT, tolerance_there)
    return Verdict(Decision.REWORK, tolerance_there, target)


def _least_rework(
    feature: FeatureOfSize, tolerance: GeometricTolerance, size: Decimal, deviation: Decimal
) -> Decimal | None:
    """The first size towards LMC at which the deviation is allowed; None if there is none.

    Removal helps the location only at MMC, where each size allows its own departure from MMC.
    """
    toward_lmc = 1 if feature.internal else -1
    departure = max((size - feature.mmc) * toward_lmc, Decimal(0))
    if tolerance.modifier is Modifier.MMC:
        departure = max(departure, deviation - tolerance.amount)
    target = feature.mmc + departure * toward_lmc
    if not feature.smallest <= target <= feature.largest:
        return None
    return target if deviation <= allowed(feature, tolerance, target) else None


def bonus_table(
    feature: FeatureOfSize, tolerance: GeometricTolerance, steps: int | None = None
) -> tuple[BonusRow, ...]:
    """Tolerance at `steps` + 1 sizes from MMC to LMC, evenly spaced; by default five to twelve round ones.

    Source: ASME Y14.5, effect of the MMC and LMC modifiers. ValueError for fewer than one step.
    """
    span = feature.lmc - feature.mmc
    count = _round_steps(abs(span)) if steps is None else steps
    if count < 1:
        raise ValueError(f"a bonus table has at least one step, not {count}")
    sizes = [feature.mmc + span * step / count for step in range(count + 1)] if span else [feature.mmc]
    return tuple(
        BonusRow(size, bonus(feature, tolerance, size), allowed(feature, tolerance, size)) for size in sizes
    )


def _round_steps(span: Decimal) -> int:
    """The number of steps whose width has the fewest places, the most of those."""
    return min(_STEPS, key=lambda count: (_places(span / count), -count))


def _places(amount: Decimal) -> int:
    return len(f"{amount.normalize():f}".partition(".")[2])
