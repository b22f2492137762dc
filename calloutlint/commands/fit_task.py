"""From the options of `fit` to a joint worked out, everything in one unit."""

from argparse import Namespace
from dataclasses import replace
from decimal import Decimal

from calloutlint.callouts.write import Style, write_part
from calloutlint.errors import CalloutlintError
from calloutlint.facts.formulas.acceptance import Spread
from calloutlint.facts.formulas.boundaries import FeatureOfSize, GeometricTolerance
from calloutlint.facts.formulas.worked import Held, Worked, find_fastener, find_hole, find_position, settled
from calloutlint.facts.sizes import amount_in, basic_major, stated_limits, unit_of
from calloutlint.facts.views.fastener import FastenerView
from calloutlint.model.fastener import Fastener
from calloutlint.model.frame import Modifier
from calloutlint.model.size import SizeForm
from calloutlint.model.values import Value
from calloutlint.reading.fit_texts import (
    Position,
    read_fastener,
    read_hole,
    read_length,
    read_position,
    unit_shown,
)
from calloutlint.reading.tolerances import read_process
from calloutlint.report.fit_data import FitSheet
from calloutlint.rulebook.figures import written
from calloutlint.rulebook.kinds import LENGTH
from calloutlint.units import Unit, convert

PROCESS_FORM = "the standard deviations of location and size, such as 'location 0.05, size 0.02'"


def work_out(options: Namespace) -> FitSheet:
    """The joint that the options state, worked out.

    Raises:
        CalloutlintError: fewer than two of the three are given, or a text is not understood.
    """
    given = [name for name in ("fastener", "hole", "position") if getattr(options, name) is not None]
    if len(given) < 2:
        have = f"only --{given[0]} is given" if given else "none is given"
        raise CalloutlintError(f"'fit' needs two of --fastener, --hole and --position; {have}.")
    return _Task(options).sheet()


class _Task:
    """The options as a joint in one unit: the hole's, else the position's, else the fastener's."""

    def __init__(self, options: Namespace) -> None:
        self._options = options
        stated = Unit(options.units) if options.units else None
        screw = read_fastener(options.fastener, stated) if options.fastener is not None else None
        self._default = stated or _unit_of_fastener(screw) or _first_shown(options) or Unit.MM
        self._size = read_hole(options.hole, self._default) if options.hole is not None else None
        self._zone = self._position("--position", options.position)
        self.unit = self._chosen_unit()
        self.fastener = FastenerView(screw, self.unit) if screw else None

    def _position(self, option: str, text: str | None) -> Position | None:
        return read_position(option, text, self._default) if text is not None else None

    def _chosen_unit(self) -> Unit:
        if self._size is not None:
            return unit_of(self._size) or self._default
        return self._zone.unit if self._zone and unit_shown(self._options.position) else self._default

    def sheet(self) -> FitSheet:
        """The joint worked out, with what is asked beside it."""
        return FitSheet(
            unit=self.unit,
            worked=self._solve(),
            fastener=self.fastener,
            hole=self._hole_words(),
            position=self._position_words(),
            spread=self._spread(),
            measured=self._measured(),
        )

    def _solve(self) -> Worked:
        hole, zone, held = self._hole(), self._tolerance(), self._held()
        if self.fastener is None:
            assert hole is not None
            assert zone is not None
            return _found(
                find_fastener(hole, zone, held), "no fastener passes: nothing of the hole is always free"
            )
        largest = self.fastener.diameter
        if largest is None:
            raise CalloutlintError(f"--fastener: the diameter of '{self.fastener.text}' is not known.")
        if hole is None:
            assert zone is not None
            return _found(find_hole(largest, zone, held, self.unit), "no stock drill is large enough")
        if zone is None:
            return find_position(largest, hole, GeometricTolerance(Decimal(0), Modifier.MMC), held)
        return Worked(largest, hole, zone, held)

    def _hole(self) -> FeatureOfSize | None:
        if self._size is None:
            return None
        limits = stated_limits(self._size)
        if limits is None:
            raise CalloutlintError(f"--hole: ISO 286 gives no limits for '{self._options.hole}'.")
        if not 0 < limits[0] <= limits[1]:
            raise CalloutlintError(f"--hole: the limits of '{self._options.hole}' hold no size.")
        own = unit_of(self._size) or self._default
        smallest, largest = (settled(convert(limit, own, self.unit)) for limit in limits)
        return FeatureOfSize(smallest, largest)

    def _tolerance(self) -> GeometricTolerance | None:
        if self._zone is None:
            return None
        zone = self._zone.zone
        kinds = [kind for kind in (Modifier.MMC, Modifier.LMC) if zone.modifier(kind)]
        if len(kinds) > 1:
            raise CalloutlintError(f"--position: '{self._options.position}' is at Ⓜ and at Ⓛ. Expected is one.")
        amount = self._here(zone.value)
        assert amount is not None
        return GeometricTolerance(amount, kinds[0] if kinds else None, self._here(zone.maximum))

    def _held(self) -> Held:
        text = self._options.fixed
        lengths = ("projection", "thickness", "depth")
        if text is None:
            idle = next((name for name in lengths if getattr(self._options, name) is not None), None)
            if idle:
                raise CalloutlintError(f"--{idle} says something of a fixed fastener: give --fixed too.")
            return Held()
        projection, thickness, depth = (self._length(name) for name in lengths)
        if depth == 0:
            raise CalloutlintError("--depth: nothing is fixed in a depth of nil.")
        zone = self._position("--fixed", text or None)
        projected = zone.zone.modifier(Modifier.PROJECTED) if zone else None
        reach = projection if projection is not None else thickness
        if reach is None and projected is not None:
            reach = self._here(projected.value)
        tolerance = self._here(zone.zone.value) if zone else None
        return Held(True, tolerance, projected is not None, reach, depth)

    def _length(self, name: str) -> Decimal | None:
        text = getattr(self._options, name)
        if text is None:
            return None
        amount, unit = read_length(f"--{name}", text, self._default)
        return settled(convert(amount, unit, self.unit))

    def _here(self, value: Value | None) -> Decimal | None:
        amount = amount_in(value, self.unit)
        return None if amount is None else settled(amount)

    def _hole_words(self) -> str:
        if self._size is None:
            return "the hole that fits"
        return str(write_part(replace(self._size, form=SizeForm.DIAMETER), Style.UNICODE))

    def _position_words(self) -> str:
        if self._zone is None:
            return "to be found"
        marks = {Modifier.MMC: " Ⓜ", Modifier.LMC: " Ⓛ"}
        amount = written(self._here(self._zone.zone.value), LENGTH, self.unit)
        return f"⌀{amount}" + "".join(mark for kind, mark in marks.items() if self._zone.zone.modifier(kind))

    def _spread(self) -> Spread | None:
        text = self._options.process
        if text is None:
            return None
        process = read_process(text, unit_shown(text) or self._default)
        location, size = (process.location, process.size) if process else (None, None)
        if location is None:
            raise CalloutlintError(f"--process: '{text}' is not understood. Expected is {PROCESS_FORM}.")
        return Spread(self._here(location) or Decimal(0), self._here(size) or Decimal(0))

    def _measured(self) -> tuple[Decimal, Decimal] | None:
        if self._options.measured is None:
            return None
        size, off = (read_length("--measured", text, self._default) for text in self._options.measured)
        return settled(convert(*size, self.unit)), settled(convert(*off, self.unit))


def _found(worked: Worked | None, otherwise: str) -> Worked:
    if worked is None:
        raise CalloutlintError(f"There is no answer: {otherwise}.")
    return worked


def _unit_of_fastener(fastener: Fastener | None) -> Unit | None:
    if fastener is None:
        return None
    diameter = basic_major(fastener.thread) if fastener.thread else None
    return diameter.unit if diameter else unit_of(fastener.pin) if fastener.pin else None


def _first_shown(options: Namespace) -> Unit | None:
    texts = (
        options.hole,
        options.position,
        options.fixed,
        options.projection,
        options.thickness,
        options.depth,
    )
    return next((unit for text in texts if text and (unit := unit_shown(text))), None)
