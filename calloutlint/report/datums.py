"""The datum scheme of each drawing on the terminal: its datum features, and who takes which freedom."""

from collections.abc import Sequence

from rich.cells import cell_len, set_cell_size
from rich.text import Text

from calloutlint.callouts.write import write_part
from calloutlint.facts.datums.motion import FREEDOMS
from calloutlint.facts.datums.scheme import schemes_of
from calloutlint.model.drawing import Package
from calloutlint.model.frame import Segment
from calloutlint.report.datum_data import DatumOverview, FeatureLine, FrameLine, datum_overview
from calloutlint.report.screen import Screen
from calloutlint.report.styles import ROLES
from calloutlint.report.terminal import show_heading

_LEGEND = (
    "x y z: slides along the axes; u v w: turns about them. A letter is the datum that takes the freedom, "
    "a dot is one that stays. The first datum stands along z."
)


def show_datums(package: Package, screen: Screen) -> None:
    """Print the datum scheme of every drawing of a package."""
    for scheme in schemes_of(package):
        for sheet in scheme.sheets:
            show_heading(sheet, screen)
        show_overview(datum_overview(scheme), screen)
    screen.paragraph(_LEGEND, ROLES.quiet, indent=1)


def show_overview(overview: DatumOverview, screen: Screen) -> None:
    """Print the datum features of one drawing, its frames in force, and what had to be assumed."""
    if not overview.features:
        screen.paragraph("The drawing has no datum features, and no frame refers to any.", indent=1)
        screen.line()
        return
    screen.line(" Datum features", ROLES.title)
    _show_features(overview.features, screen)
    if overview.frames:
        screen.line(" Frames in force", ROLES.title)
        _show_frames(overview.frames, screen)
    if overview.assumed:
        words = f"{'; '.join(overview.assumed)}."
        screen.paragraph(words, ROLES.quiet, head=Text("Assumed: ", ROLES.quiet), indent=1)
        screen.line()


def _show_features(features: Sequence[FeatureLine], screen: Screen) -> None:
    marks = [" ".join(f"({balloon})" for balloon in feature.balloons) for feature in features]
    kinds = max(len(feature.kind) for feature in features)
    balloons = max(cell_len(screen.spell(mark)) for mark in marks)
    for feature, mark in zip(features, marks, strict=True):
        head = Text.assemble(
            (screen.spell(feature.letter).ljust(2), ROLES.rule),
            " ",
            feature.kind.ljust(kinds),
            "  ",
            (set_cell_size(screen.spell(mark), balloons), ROLES.balloon),
            "  ",
        )
        words = _controlled(feature, screen)
        if not words:
            head.rstrip()
        screen.paragraph(words, head=head, indent=3)
    screen.line()


def _controlled(feature: FeatureLine, screen: Screen) -> str:
    """How a datum feature is controlled: its targets, its size, its form, its relation to other datums."""
    said = [" ".join(feature.targets)] if feature.targets else []
    said += ["size"] if feature.sized else []
    said += [_line(segment, screen) for segment in feature.lines]
    return ", ".join(said) or ("nothing controls it" if feature.balloons else "")


def _line(segment: Segment, screen: Screen) -> str:
    """A frame line as a phrase: `⟂ ⌀.002 to A B`."""
    cells = _cells(segment, screen)
    control = 2 if segment.zone is not None else 1
    to = f" to {' '.join(cells[control:])}" if segment.datums else ""
    return " ".join(cells[:control]) + to


def _show_frames(frames: Sequence[FrameLine], screen: Screen) -> None:
    names = [screen.spell(_name(frame.segment, screen)) for frame in frames]
    width = max(map(cell_len, names))
    cell = 2 + max(cell_len(screen.spell(taker or "?")) for frame in frames for taker in frame.takers)
    titles = "".join(_column(freedom.value, place, cell) for place, freedom in enumerate(FREEDOMS))
    screen.line(" " * (3 + width + 2) + titles.rstrip(), ROLES.quiet)
    for frame, name in zip(frames, names, strict=True):
        row = Text.assemble((set_cell_size(name, width), ROLES.rule), "  ")
        for place, taker in enumerate(frame.takers):
            shown = "?" if taker is None else screen.spell(taker) or _dot(screen)
            row.append(_column(shown, place, cell), "" if taker else ROLES.quiet)
        screen.paragraph(_remark(frame), head=row, indent=3)
    screen.line()


def _column(text: str, place: int, width: int) -> str:
    """One freedom's column; a gap parts the slides from the turns."""
    return ("  " if place == 3 else "") + set_cell_size(text, width)


def _dot(screen: Screen) -> str:
    return screen.spell("·") if screen.glyphs.dot != "-" else "."


def _name(segment: Segment, screen: Screen) -> str:
    """The datum compartments of a frame line in canonical text."""
    return " | ".join(_cells(segment, screen)[-len(segment.datums) :])


def _cells(segment: Segment, screen: Screen) -> list[str]:
    return [cell.strip() for cell in str(write_part(segment, screen.glyphs.spelling)).split("|")]


def _remark(frame: FrameLine) -> str:
    """Who uses a frame, which datum it could do without, and what it leaves."""
    said = [f"({', '.join(frame.balloons)})"]
    if frame.tied:
        which = "" if frame.tied == frame.balloons else f", of them {', '.join(frame.tied)}"
        said[0] += f"{which} together"
    said += [f"{name} takes nothing" for name in frame.idle]
    if frame.left == "not known":
        said.append("what is left is not known")
    elif frame.left:
        said.append(f"may still {frame.left}")
    return "; ".join(said)
