"""One joint worked out, on the terminal: the verdict, the worst case to scale, bonus, gauges, acceptance."""

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from decimal import Decimal

from rich.text import Text

from calloutlint.callouts.write import Style
from calloutlint.model.frame import Modifier
from calloutlint.report.fit_data import FitSheet
from calloutlint.report.fit_words import held, length, measured, verdict
from calloutlint.report.screen import Screen
from calloutlint.report.styles import ROLES
from calloutlint.report.tally import SAFETY

MARKS = {Modifier.MMC: " Ⓜ", Modifier.LMC: " Ⓛ"}
LABEL, NUMBER = 29, 9
WIDEST = 90


@dataclass(frozen=True, slots=True)
class Bar:
    """A stretch of a drawing to scale, with what it is. Nil is true position, or the start of the clearance."""

    name: str
    start: Decimal
    end: Decimal
    solid: bool = False

    @property
    def size(self) -> Decimal:
        """Its length."""
        return self.end - self.start


def show_fit(sheet: FitSheet, screen: Screen) -> None:
    """Print a joint worked out."""
    _show_heading(sheet, screen)
    screen.paragraph(verdict(sheet), ROLES.title if sheet.worked.fits else ROLES.critical, indent=1)
    screen.line()
    _show_drawing("Worst case, to scale", list(worst_case(sheet)), sheet, screen)
    _show_drawing("The clearance, enlarged", list(clearance(sheet)), sheet, screen)
    _show_bonus(sheet, screen)
    _show_gauges(sheet, screen)
    _show_seat(sheet, screen)
    _show_acceptance(sheet, screen)
    screen.rule(ROLES.quiet)
    screen.paragraph(SAFETY, ROLES.quiet, indent=1)


def _show_heading(sheet: FitSheet, screen: Screen) -> None:
    screen.rule(ROLES.quiet)
    fastener = sheet.fastener.text if sheet.fastener else "The largest fastener"
    screen.paragraph(f"{fastener} through {sheet.hole}, position {sheet.position}", ROLES.heading, indent=1)
    screen.paragraph(f"{held(sheet).capitalize()}; lengths in {sheet.unit}", indent=1)
    screen.rule(ROLES.quiet)
    screen.line()


def worst_case(sheet: FitSheet) -> Iterator[Bar]:
    """Smallest hole pushed to either side, what that leaves free, the fastener wherever it may be."""
    worked = sheet.worked
    half = worked.hole.mmc / 2
    off = (worked.hole.mmc - worked.inner) / 2
    yield Bar("smallest hole, off left", -half - off, half - off)
    yield Bar("smallest hole, off right", off - half, off + half)
    if worked.inner > 0:
        yield Bar("always free", -worked.inner / 2, worked.inner / 2)
    reach = (worked.fastener + worked.held.demand) / 2
    name = (
        "fastener, leaning" if worked.held.tilts else "fastener, as fixed" if worked.held.demand else "fastener"
    )
    yield Bar(name, -reach, reach, solid=True)


def clearance(sheet: FitSheet) -> Iterator[Bar]:
    """What shares the clearance between smallest hole and fastener, one after the other."""
    worked, nil = sheet.worked, Decimal(0)
    position = worked.hole.mmc - worked.inner
    taken = position + worked.held.demand
    whole = worked.hole.mmc - worked.fastener
    if whole > 0:
        yield Bar("clearance", nil, whole)
    if position > 0:
        yield Bar("position", nil, position, solid=True)
    if worked.held.demand > 0:
        yield Bar("fixing hole", position, taken, solid=True)
    if worked.spare:
        yield Bar("left over" if worked.spare > 0 else "short", min(whole, taken), max(whole, taken))


def _show_drawing(title: str, bars: Sequence[Bar], sheet: FitSheet, screen: Screen) -> None:
    if not bars:
        return
    low, high = min(bar.start for bar in bars), max(bar.end for bar in bars)
    columns = min(screen.width, WIDEST) - LABEL - NUMBER - 3
    scale = (high - low) / (columns - 1)
    screen.line(f" {title}", ROLES.title)
    for bar in bars:
        first, last = (round((end - low) / scale) for end in (bar.start, bar.end))
        drawn = " " * first + _drawn(last - first + 1, bar.solid, screen)
        label = f"   {bar.name}".ljust(LABEL) + length(sheet, bar.size).rjust(NUMBER)
        style = ROLES.critical if bar.name == "short" else ""
        screen.line(Text(f"{screen.spell(label)}  {drawn}", style))
    screen.line(f"   1 column is {length(sheet, scale)} {_unit(sheet)}", ROLES.quiet)
    screen.line()


def _drawn(columns: int, solid: bool, screen: Screen) -> str:
    plain = screen.glyphs.spelling is Style.ASCII
    if columns == 1:
        return "|" if plain else "│"
    left, line, right = ("[#]" if solid else "|-|") if plain else ("▐█▌" if solid else "├─┤")
    return left + line * (columns - 2) + right


def _show_bonus(sheet: FitSheet, screen: Screen) -> None:
    tolerance = sheet.worked.tolerance
    mark = MARKS.get(tolerance.modifier, "") if tolerance.modifier else ", regardless of feature size"
    screen.line(
        f" Allowed position against measured size: ⌀{length(sheet, tolerance.amount)}{mark}", ROLES.title
    )
    screen.line("   " + "".join(name.rjust(12) for name in ("size", "bonus", "position")), ROLES.quiet)
    rows = sheet.rows
    for place, row in enumerate(rows):
        ends = {0: "  MMC", len(rows) - 1: "  LMC"}
        cells = "".join(length(sheet, each).rjust(12) for each in (row.size, row.bonus, row.allowed))
        screen.line(f"   {cells}{ends.get(place, '')}")
    if sheet.decision is not None:
        screen.line()
        screen.paragraph(measured(sheet, sheet.decision), indent=3)
    screen.line()


def _show_gauges(sheet: FitSheet, screen: Screen) -> None:
    hole = sheet.worked.hole
    screen.line(" Gauges, nominal", ROLES.title)
    plugs = f"Plug for size: go ⌀{length(sheet, hole.mmc)}, not go ⌀{length(sheet, hole.lmc)}."
    if sheet.gauge_pin is not None:
        pin = f"Pin for position: ⌀{length(sheet, sheet.gauge_pin)}, the virtual condition."
    elif sheet.worked.tolerance.modifier is Modifier.MMC:
        pin = "No pin for position: the virtual condition is nil."
    else:
        pin = "Position has to be measured: only at Ⓜ can a pin gauge it."
    screen.paragraph(f"{plugs} {pin}", indent=3)
    screen.line()


def _show_seat(sheet: FitSheet, screen: Screen) -> None:
    seat = sheet.seat
    if seat is None:
        return
    screen.line(f" {seat.name.capitalize()}, {seat.source}", ROLES.title)
    least = length(sheet, seat.counterbore)
    words = f"Up to ⌀{length(sheet, seat.largest)}: a counterbore for it is at least ⌀{least}."
    if seat.bearing is not None:
        words += (
            f" Pushed to one side of the largest hole, it covers {length(sheet, seat.bearing)} on the other."
        )
    screen.paragraph(words, indent=3)
    screen.line()


def _show_acceptance(sheet: FitSheet, screen: Screen) -> None:
    spread, shares = sheet.process, sheet.accepted
    screen.line(" Acceptance", ROLES.title)
    typical = "" if sheet.spread else "a typical spread, ±3 of them just filling the limits and the zone: "
    words = (
        f"Standard deviations ({typical}location {length(sheet, spread.location)} in each direction, size "
        f"{length(sheet, spread.size)}): {_percent(shares.without)} of the holes pass regardless of feature "
        f"size, {_percent(shares.with_bonus)} at{MARKS[sheet.with_bonus.modifier or Modifier.MMC]}."
    )
    screen.paragraph(words, indent=3)
    screen.line()


def _percent(share: float) -> str:
    return f"{100 * share:.1f} %"


def _unit(sheet: FitSheet) -> str:
    return "in" if sheet.unit == "inch" else "mm"
