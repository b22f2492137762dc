"""A joint worked out, for programs: the JSON that `fit --report FILE.json` writes."""

from decimal import Decimal
from typing import Literal

from pydantic import BaseModel, ConfigDict, Field

from calloutlint import __version__
from calloutlint.report.fit_data import FitSheet
from calloutlint.report.fit_words import length, measured, verdict
from calloutlint.report.record import Program


class _Entry(BaseModel):
    model_config = ConfigDict(extra="forbid", frozen=True)


class HeldEntry(_Entry):
    """How the joint is held; null for what is not known."""

    how: Literal["floating", "fixed"]
    position: str | None = Field(description="the fixing hole's position tolerance")
    projected: bool
    projection: str | None
    depth: str | None
    takes: str = Field(description="the clearance that the fixing hole uses up")


class BonusEntry(_Entry):
    """The position allowed at one measured size."""

    size: str
    bonus: str
    position: str


class AcceptanceEntry(_Entry):
    """Shares of holes accepted, from 0 to 1, under a spread of standard deviations."""

    location: str
    size: str
    stated: bool = Field(description="false for a typical spread, taken because none was given")
    regardless_of_size: float
    with_bonus: float


class MeasuredEntry(_Entry):
    """What becomes of a measured hole."""

    size: str
    deviation: str
    decision: str
    rework_to: str | None
    message: str


class FitRecord(_Entry):
    """A joint worked out; lengths as text in `units`."""

    program: Program
    units: Literal["inch", "mm"]
    sought: Literal["nothing", "position", "hole", "fastener"]
    fits: bool
    message: str
    fastener: str | None
    fastener_largest: str
    screws: list[str] = Field(description="the largest screws that fit, where the fastener was sought")
    hole_smallest: str
    hole_largest: str
    drill: str | None = Field(description="the stock drill, where the hole was sought")
    position: str
    modifier: Literal["M", "L"] | None
    held: HeldEntry
    always_free: str
    spare: str = Field(description="what is left over; negative is what is short")
    largest_position: str | None
    smallest_hole: str
    bonus: list[BonusEntry]
    gauge_go: str
    gauge_not_go: str
    gauge_pin: str | None
    acceptance: AcceptanceEntry
    measured: MeasuredEntry | None


def fit_record_text(sheet: FitSheet) -> str:
    """The record of a joint as JSON text."""
    return fit_record(sheet).model_dump_json(indent=2) + "\n"


def fit_record(sheet: FitSheet) -> FitRecord:
    """The record of a joint."""
    worked = sheet.worked
    modifier = worked.tolerance.modifier
    return FitRecord(
        program=Program(version=__version__),
        units="inch" if sheet.unit == "inch" else "mm",
        sought=worked.sought.value,
        fits=worked.fits,
        message=verdict(sheet),
        fastener=sheet.fastener.text if sheet.fastener else None,
        fastener_largest=length(sheet, worked.fastener),
        screws=list(sheet.screws),
        hole_smallest=length(sheet, worked.hole.smallest),
        hole_largest=length(sheet, worked.hole.largest),
        drill=worked.drill.name if worked.drill else None,
        position=length(sheet, worked.tolerance.amount),
        modifier=None if modifier is None else "M" if modifier == "M" else "L",
        held=_held(sheet),
        always_free=length(sheet, worked.inner),
        spare=length(sheet, worked.spare),
        largest_position=_known(sheet, worked.largest_tolerance),
        smallest_hole=length(sheet, worked.smallest_hole),
        bonus=_bonus(sheet),
        gauge_go=length(sheet, worked.hole.mmc),
        gauge_not_go=length(sheet, worked.hole.lmc),
        gauge_pin=_known(sheet, sheet.gauge_pin),
        acceptance=_acceptance(sheet),
        measured=_measured(sheet),
    )


def _known(sheet: FitSheet, amount: Decimal | None) -> str | None:
    return None if amount is None else length(sheet, amount)


def _held(sheet: FitSheet) -> HeldEntry:
    hold = sheet.worked.held
    return HeldEntry(
        how="fixed" if hold.fixed else "floating",
        position=_known(sheet, hold.tolerance),
        projected=hold.projected,
        projection=_known(sheet, hold.projection),
        depth=_known(sheet, hold.depth),
        takes=length(sheet, hold.demand),
    )


def _bonus(sheet: FitSheet) -> list[BonusEntry]:
    rows = ([length(sheet, amount) for amount in (row.size, row.bonus, row.allowed)] for row in sheet.rows)
    return [BonusEntry(size=size, bonus=bonus, position=position) for size, bonus, position in rows]


def _acceptance(sheet: FitSheet) -> AcceptanceEntry:
    spread, shares = sheet.process, sheet.accepted
    return AcceptanceEntry(
        location=length(sheet, spread.location),
        size=length(sheet, spread.size),
        stated=sheet.spread is not None,
        regardless_of_size=shares.without,
        with_bonus=shares.with_bonus,
    )


def _measured(sheet: FitSheet) -> MeasuredEntry | None:
    found = sheet.decision
    if found is None:
        return None
    return MeasuredEntry(
        size=length(sheet, found.size),
        deviation=length(sheet, found.deviation),
        decision=found.verdict.decision.value,
        rework_to=_known(sheet, found.verdict.rework_to),
        message=measured(sheet, found),
    )
