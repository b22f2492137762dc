"""The arithmetic of one joint in words that a checker can redo by hand."""

from decimal import Decimal

from calloutlint.facts.formulas.verdict import Decision
from calloutlint.facts.formulas.worked import Held, Sought, find_hole
from calloutlint.model.frame import Modifier
from calloutlint.report.fit_data import FitSheet, Measured
from calloutlint.rulebook.figures import written
from calloutlint.rulebook.kinds import LENGTH

NO_TILT = " It is not projected, and P or D is not stated: the tilt of the fastener is left out."


def length(sheet: FitSheet, amount: Decimal) -> str:
    """A length as the joint's unit writes it."""
    return written(amount, LENGTH, sheet.unit)


def held(sheet: FitSheet) -> str:
    """How the joint is held: `floating`, `fixed in a hole of position ⌀0.2 Ⓟ 12`."""
    hold = sheet.worked.held
    if not hold.fixed:
        return "floating"
    if hold.tolerance is None:
        return "fixed in a hole whose position is not stated"
    zone = "" if hold.projected else ", without a projected zone"
    reach = "" if hold.projection is None else f", projection {length(sheet, hold.projection)}"
    depth = "" if hold.depth is None or hold.projected else f", depth {length(sheet, hold.depth)}"
    return f"fixed in a hole of position ⌀{length(sheet, hold.tolerance)}{zone}{reach}{depth}"


def verdict(sheet: FitSheet) -> str:
    """What was sought, or whether it fits, with the sum that shows it."""
    return _FOUND[sheet.sought](sheet)


def _judged(sheet: FitSheet) -> str:
    worked = sheet.worked
    if worked.spare < 0:
        return f"Does not fit: {_budget(sheet)} → short by {length(sheet, -worked.spare)}. {_cures(sheet)}"
    if worked.spare == 0:
        return f"Fits, line to line: {_budget(sheet)} → nothing is left over.{_tail(sheet)}"
    left = length(sheet, worked.spare)
    return f"Fits: {_budget(sheet)} → {left} is left over.{_tail(sheet)}"


def _position(sheet: FitSheet) -> str:
    worked = sheet.worked
    sum_ = f"smallest hole {length(sheet, worked.hole.mmc)} − fastener {length(sheet, worked.fastener)}"
    clearance = length(sheet, worked.hole.mmc - worked.fastener)
    taken = f" = {clearance}{_share(sheet, '−')}" if worked.held.demand else ""
    largest = length(sheet, worked.tolerance.amount)
    if worked.spare < 0:
        return f"No position tolerance fits: {sum_}{taken} = {length(sheet, worked.spare)}.{_lean(sheet)}"
    if worked.held.fixed and worked.held.tolerance is None:
        half = length(sheet, worked.tolerance.amount / 2)
        return (
            f"The position tolerances of both holes may add up to {largest}, such as {half} each, with a "
            f"projected zone on the fixing hole: {sum_} = {largest}."
        )
    return f"Position up to ⌀{largest}: {sum_}{taken} = {largest}.{_lean(sheet)}{_tail(sheet)}"


def _hole(sheet: FitSheet) -> str:
    worked = sheet.worked
    pieces = [
        f"fastener {length(sheet, worked.fastener)}",
        f"position {length(sheet, worked.tolerance.amount)}",
    ]
    least = worked.fastener + worked.tolerance.amount + worked.held.demand
    sum_ = f"{' + '.join(pieces)}{_share(sheet, '+')} = {length(sheet, least)}"
    assert worked.drill is not None
    drilled = f"{length(sheet, worked.hole.smallest)} to {length(sheet, worked.hole.largest)}"
    wide = ", and the bonus at Ⓛ" if worked.tolerance.modifier is Modifier.LMC else ""
    return (
        f"Hole of at least {length(sheet, least)} at MMC: {sum_}{wide}. The next stock drill that fits as it "
        f"is usually drilled is {worked.drill.name}, ⌀{length(sheet, worked.drill.diameter)}: {drilled}."
        f"{_lean(sheet)}{_tail(sheet)}"
    )


def _fastener(sheet: FitSheet) -> str:
    worked = sheet.worked
    most = length(sheet, worked.fastener)
    taken = f"{_share(sheet, '−')} = {most}" if worked.held.demand else ""
    screws = f" The largest screws: {' and '.join(sheet.screws)}." if sheet.screws else ""
    return f"Fastener up to ⌀{most}: {_free(sheet)}{taken}.{screws}{_lean(sheet)}{_tail(sheet)}"


_FOUND = {
    Sought.NOTHING: _judged,
    Sought.POSITION: _position,
    Sought.HOLE: _hole,
    Sought.FASTENER: _fastener,
}


def _budget(sheet: FitSheet) -> str:
    worked = sheet.worked
    words = f"{_free(sheet)} is always free, the fastener needs {length(sheet, worked.fastener)}"
    if not worked.held.demand:
        return words
    return f"{words}, which leaves {length(sheet, worked.room)}; the fixing hole takes {_taken(sheet)}"


def _free(sheet: FitSheet) -> str:
    worked = sheet.worked
    at_mmc = worked.hole.mmc - worked.inner
    words = f"smallest hole {length(sheet, worked.hole.mmc)} − position {length(sheet, at_mmc)}"
    return f"{words} = {length(sheet, worked.inner)}"


def _share(sheet: FitSheet, sign: str) -> str:
    """The fixing hole's part of a sum: ` − fixing hole 0.5`; empty where it takes nothing."""
    demand = sheet.worked.held.demand
    return f" {sign} fixing hole {length(sheet, demand)}" if demand else ""


def _lean(sheet: FitSheet) -> str:
    """How the tilt makes the fixing hole's part, as a sentence; empty where it does not."""
    return f" The fixing hole takes {_taken(sheet)}." if sheet.worked.held.tilts else ""


def _taken(sheet: FitSheet) -> str:
    """What the fixing hole takes: `0.2 × (1 + 2 × 12/16) = 0.5`, or just its tolerance."""
    hold = sheet.worked.held
    assert hold.tolerance is not None
    tolerance = length(sheet, hold.tolerance)
    if not hold.tilts:
        return tolerance
    assert hold.projection is not None
    assert hold.depth is not None
    factor = f"(1 + 2 × {length(sheet, hold.projection)}/{length(sheet, hold.depth)})"
    return f"{tolerance} × {factor} = {length(sheet, hold.demand)}"


def _cures(sheet: FitSheet) -> str:
    worked, cures = sheet.worked, []
    if worked.held.tilts and worked.room - (worked.held.tolerance or 0) >= 0:
        cures.append("a projected zone on the fixing hole")
    if worked.largest_tolerance is not None:
        cures.append(f"position ⌀{length(sheet, worked.largest_tolerance)} or less")
    least = f"a hole of at least {length(sheet, worked.smallest_hole)} at MMC"
    drilled = find_hole(worked.fastener, worked.tolerance, worked.held, sheet.unit)
    if drilled is None or drilled.drill is None:
        cures.append(least)
    else:
        ends = f"{length(sheet, drilled.hole.smallest)} to {length(sheet, drilled.hole.largest)}"
        cures.append(f"{least}, such as drill {drilled.drill.name} as it is usually drilled, {ends}")
    return f"Cures: {'; '.join(cures)}.{_tail(sheet)}"


def _tail(sheet: FitSheet) -> str:
    return NO_TILT if _open(sheet.worked.held) else ""


def _open(hold: Held) -> bool:
    return hold.fixed and hold.tolerance is not None and not hold.projected and not hold.tilts


def measured(sheet: FitSheet, found: Measured) -> str:
    """What becomes of a measured hole, and why."""
    tolerance, verdict_ = sheet.worked.tolerance, found.verdict
    start = f"Measured {length(sheet, found.size)}, off by ⌀{length(sheet, found.deviation)}: "
    if verdict_.allowed is None:
        why = "the size is outside its limits"
    else:
        bonus = length(sheet, verdict_.allowed - tolerance.amount)
        plus = f" + bonus {bonus} = {length(sheet, verdict_.allowed)}" if tolerance.modifier else ""
        why = f"allowed {length(sheet, tolerance.amount)}{plus}"
    if verdict_.decision is Decision.REJECT and found.at_mmc is not None:
        sum_ = f"{length(sheet, tolerance.amount)} + bonus {length(sheet, found.at_mmc - tolerance.amount)}"
        return f"{start}{why}: reject. At Ⓜ it would be accepted: {sum_} = {length(sheet, found.at_mmc)}."
    words = {
        Decision.ACCEPT: "accept",
        Decision.ACCEPT_WITH_BONUS: "accept, by its bonus; without the modifier it would be rejected",
        Decision.REJECT: "reject; no larger size brings it in",
    }
    if verdict_.rework_to is not None:
        return f"{start}{why}: rework, opening the hole to {length(sheet, verdict_.rework_to)}."
    return f"{start}{why}: {words[verdict_.decision]}."
