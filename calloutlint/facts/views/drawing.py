"""Facts about a drawing: its title block, its datum features, its callouts."""

from __future__ import annotations

import re
from decimal import Decimal
from typing import TYPE_CHECKING

from calloutlint.facts.datums.index import DatumIndex
from calloutlint.facts.view import View, fact, kept
from calloutlint.facts.views.callout import CalloutView
from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing, SheetLine, Standard, System
from calloutlint.model.size import Size
from calloutlint.trade import iso286
from calloutlint.units import Unit, convert

if TYPE_CHECKING:
    from calloutlint.facts.views.package import PackageView

CURRENT_ASME = 2018


class StandardView(View):
    """The standard that a drawing states. Everything is unknown where none is, or it is not known."""

    subject = "standard"

    def __init__(self, part: Standard | None) -> None:
        self.part = part
        self.unit = None
        self._system = part.system if part else None

    @fact
    def written(self) -> str:
        """The standard as written; empty where none is stated."""
        return self.part.written if self.part else ""

    @fact
    def known(self) -> bool:
        """Whether it is ASME Y14.5 or ISO GPS."""
        return self._system is not None

    @fact
    def asme(self) -> bool | None:
        """Whether it is ASME Y14.5."""
        return None if self._system is None else self._system is System.ASME

    @fact
    def iso(self) -> bool | None:
        """Whether it is ISO GPS."""
        return None if self._system is None else self._system is System.ISO

    @fact
    def edition(self) -> int | None:
        """The edition's year; unknown where none is stated."""
        return self.part.edition if self.part else None

    @fact
    def superseded(self) -> bool:
        """Whether the stated edition of ASME Y14.5 is older than the current one."""
        return self.asme is True and self.edition is not None and self.edition < CURRENT_ASME


class LineView(View):
    """A line of the sheet outside the callouts."""

    subject = "line"
    part: SheetLine

    def __init__(self, part: SheetLine, drawing: DrawingView) -> None:
        self.part = part
        self.unit = drawing.unit
        self.drawing_model = drawing.part

    @fact
    def number(self) -> int:
        """Its number in the file, from 1."""
        return self.part.number

    @fact
    def text(self) -> str:
        """The line as written."""
        return self.part.text

    @fact
    def key(self) -> str | None:
        """Its key in the title block; unknown for a line that has none."""
        return self.part.key

    @fact
    def reason(self) -> str | None:
        """What is wrong with it; unknown where no more can be said."""
        return self.part.reason

    @fact
    def known(self) -> bool:
        """Whether it was understood."""
        return self.part.known


class DrawingView(View):
    """One sheet of a drawing."""

    subject = "drawing"
    part: Drawing

    def __init__(self, part: Drawing, package: PackageView) -> None:
        self.part = self.drawing_model = part
        self.unit = part.unit
        self.package = package
        self._first: dict[str, Callout] = {}
        for callout in part.callouts:
            self._first.setdefault(callout.balloon, callout)

    @fact
    def standard(self) -> StandardView:
        """The standard that it states."""
        return StandardView(self.part.standard)

    @fact
    def states_standard(self) -> bool:
        """Whether it states a standard at all."""
        return self.part.standard is not None

    @fact
    def states_units(self) -> bool:
        """Whether it states its units."""
        return self.part.unit is not None

    @fact
    def units_as_written(self) -> str:
        """The units as written; empty where there are none."""
        return next((line.value for line in self.part.lines if line.key == "units"), "")

    @fact
    def number(self) -> str:
        """The drawing number; empty where there is none."""
        return self.part.number or ""

    @fact
    def revision(self) -> str:
        """The revision; empty where there is none."""
        return self.part.revision or ""

    @fact
    def sheet(self) -> str:
        """The sheet as written, `sheet 1 of 2`; empty where none is stated."""
        return f"sheet {self.part.sheet}" if self.part.sheet else ""

    @fact
    def has_other_sheets(self) -> bool:
        """Whether it says that it is one of several sheets."""
        found = re.search(r"(?:of|/)\s*(\d+)", self.part.sheet or "", re.IGNORECASE)
        return found is not None and int(found[1]) > 1

    @fact
    def inch(self) -> bool | None:
        """Whether its unit is the inch; unknown where none is stated."""
        return None if self.unit is None else self.unit is Unit.INCH

    @fact
    def mm(self) -> bool | None:
        """Whether its unit is the millimetre; unknown where none is stated."""
        return None if self.unit is None else self.unit is Unit.MM

    @fact
    def general_tolerances(self) -> str:
        """The general tolerances as written; empty where there are none."""
        return self.part.general.written if self.part.general else ""

    @fact
    def withdrawn_general_tolerances(self) -> bool:
        """Whether the general tolerances call ISO 2768-2, withdrawn in 2021."""
        return self.part.general is not None and self.part.general.iso_2768_2 is not None

    @fact
    def has_parts_list(self) -> bool:
        """Whether the sheet lists fasteners."""
        return bool(self.part.fasteners)

    @fact
    def callouts(self) -> tuple[CalloutView, ...]:
        """Its callouts in the order of the sheet."""
        return tuple(CalloutView(callout, self) for callout in self.part.callouts)

    @fact
    def lines(self) -> tuple[LineView, ...]:
        """Its title block lines, and lines that belong to no callout."""
        return tuple(LineView(line, self) for line in self.part.lines)

    @fact
    def defined_letters(self) -> tuple[str, ...]:
        """Datum letters defined on it or on its other sheets in the package, targets included."""
        return tuple(sorted(self.datums.definitions))

    @fact
    def referenced_letters(self) -> tuple[str, ...]:
        """Datum letters referenced on it or on its other sheets in the package."""
        return tuple(sorted(self.datums.references))

    @fact
    def duplicates_another(self) -> bool:
        """Whether an earlier drawing of the package has the same number, revision and sheet."""
        return self.package.is_duplicate(self.part)

    @kept
    def datums(self) -> DatumIndex:
        """The datums of the drawing, its other sheets in the package included."""
        return self.package.datum_index(self.part)

    def first_under(self, balloon: str) -> Callout:
        """The first callout with this balloon number."""
        return self._first[balloon]

    def definers(self, letter: str) -> list[Callout]:
        """The callouts that establish a datum feature, in the order of the sheets."""
        return self.datums.definitions.get(letter, [])

    def is_plane(self, letter: str) -> bool | None:
        """Whether the datum feature is a plain surface; None where it is not known."""
        definers = self.definers(letter)
        return self.package.view_of(definers[0]).feature.surface if definers else None

    def fit_limits(self, size: Size) -> tuple[Decimal, Decimal] | None:
        """Limits of a size by its ISO 286 code, in the drawing's unit; None where the standard has none."""
        if size.nominal is None or size.fit is None or size.nominal.unit not in {Unit.INCH, Unit.MM}:
            return None
        nominal = convert(size.nominal.amount, size.nominal.unit, Unit.MM)
        found = iso286.limits(nominal, size.fit)
        if found is None:
            return None
        target = self.unit or size.nominal.unit
        lower, upper = nominal + found.lower, nominal + found.upper
        return convert(lower, Unit.MM, target), convert(upper, Unit.MM, target)
