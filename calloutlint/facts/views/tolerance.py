"""Facts about the tolerance compartment of a frame line."""

from __future__ import annotations

from typing import TYPE_CHECKING

from calloutlint.facts.formulas.coordinates import coordinate
from calloutlint.facts.symbol_names import drawn
from calloutlint.facts.view import Length, Number, fact
from calloutlint.facts.views.part import PartView
from calloutlint.facts.views.process import percent, shares
from calloutlint.model.frame import Modifier, ModifierUse, Zone, ZoneShape

if TYPE_CHECKING:
    from calloutlint.facts.views.frame import FrameView

ZONE_SIGNS = {ZoneShape.WIDTH: "", ZoneShape.DIAMETER: "⌀", ZoneShape.SPHERE: "S⌀"}
MATERIAL = (Modifier.MMC, Modifier.LMC, Modifier.RFS)


class ToleranceView(PartView):
    """The tolerance compartment of a frame line. Its lengths are unknown where no value is written."""

    subject = "tolerance"

    def __init__(self, zone: Zone | None, frame: FrameView) -> None:
        super().__init__(zone, frame.callout)
        self._frame = frame
        self._uses: tuple[ModifierUse, ...] = zone.modifiers if zone else ()

    @fact
    def value(self) -> Length | None:
        """The tolerance as stated."""
        return self._length(self.part.value) if self.part else None

    @fact
    def written(self) -> str:
        """The tolerance value as written."""
        return self.part.value.text if self.part and self.part.value else ""

    @fact
    def label(self) -> str:
        """The tolerance as written, its zone symbol included: `⌀.014`."""
        return ZONE_SIGNS[self.part.shape] + self.written if self.part else ""

    @fact
    def shape(self) -> ZoneShape | None:
        """Width, diameter or sphere; unknown where no tolerance is written."""
        return self.part.shape if self.part else None

    @fact
    def modifiers(self) -> tuple[Modifier, ...]:
        """The modifiers in the order written."""
        return tuple(use.kind for use in self._uses)

    @fact
    def symbols(self) -> tuple[str, ...]:
        """The modifiers as drawn, in the order written."""
        return tuple(drawn(use.kind) for use in self._uses)

    @fact
    def projected(self) -> Length | None:
        """Height of the projected zone; unknown where none is written."""
        return self._amount(Modifier.PROJECTED)

    @fact
    def unequal(self) -> Length | None:
        """Amount of an unequally disposed zone outside the material; unknown where none is written."""
        return self._amount(Modifier.UNEQUAL)

    def _amount(self, kind: Modifier) -> Length | None:
        use = self.part.modifier(kind) if self.part else None
        return self._length(use.value) if use else None

    @fact
    def per_unit(self) -> bool:
        """Whether the tolerance is stated per unit of length or area."""
        return self.part is not None and self.part.per is not None

    @fact
    def out_of_order(self) -> bool:
        """Whether a material condition modifier does not come first, or the statistical symbol not last."""
        kinds = list(self.modifiers)
        late_material = any(kind in MATERIAL for kind in kinds[1:]) and kinds[0] not in MATERIAL
        early_statistical = Modifier.STATISTICAL in kinds[:-1]
        return late_material or early_statistical

    @fact
    def at_lmc(self) -> Length | None:
        """The tolerance with its whole bonus, at the hole's least material condition."""
        bonus = self._frame.hole.bonus
        return None if self.value is None or bonus is None else self.value + bonus

    @fact
    def as_coordinates(self) -> Length | None:
        """The equal ± tolerance on two coordinates that stays in a diametral zone; unknown for others."""
        return coordinate(self.value) if self.value is not None and self.shape is ZoneShape.DIAMETER else None

    @fact
    def accepted(self) -> Number | None:
        """Percent of holes that pass regardless of size, by the spread that the sheet states; else unknown."""
        found = shares(self, self._frame.hole)
        return percent(found.without) if found else None

    @fact
    def accepted_at_mmc(self) -> Number | None:
        """Percent of holes that pass with this tolerance at Ⓜ, by the same spread; else unknown."""
        found = shares(self, self._frame.hole)
        return percent(found.with_bonus) if found else None
