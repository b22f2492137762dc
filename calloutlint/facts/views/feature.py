"""What the feature of a callout is: inside or outside material, round, a width, a plain surface."""

from __future__ import annotations

from calloutlint.facts.sides import side_by_hole, side_by_letters, side_by_words
from calloutlint.facts.sizes import leading_size
from calloutlint.facts.view import fact, kept
from calloutlint.facts.views.part import PartView
from calloutlint.model.callout import Callout, Meaning
from calloutlint.model.size import SizeForm

SURFACE_WORDS = {Meaning.SURFACE, Meaning.FACE}
SPHERICAL = {SizeForm.SPHERICAL_DIAMETER, SizeForm.SPHERICAL_RADIUS}


class FeatureView(PartView):
    """The feature that a callout speaks of."""

    subject = "feature"
    part: Callout

    @fact
    def internal(self) -> bool | None:
        """Whether it is a hole, slot or other internal feature: by words, joint, hole signs, then letters."""
        return self._side

    @kept
    def _side(self) -> bool | None:
        said = side_by_words(self.part)
        if said is not None:
            return said
        if self._callout.joined:
            return True
        holed = side_by_hole(self.part)
        return side_by_letters(self.part) if holed is None else holed

    @fact
    def of_size(self) -> bool:
        """Whether the callout states a size or a thread."""
        return bool(self.part.threads) or leading_size(self.part) is not None

    @fact
    def threaded(self) -> bool:
        """Whether it is a screw thread."""
        return bool(self.part.threads)

    @fact
    def round(self) -> bool | None:
        """Whether it is a cylinder: a diameter or a thread; unknown where no size is stated."""
        if self.part.threads:
            return True
        size = leading_size(self.part)
        if size is None:
            return True if Meaning.CYLINDER in self.part.meanings else None
        return size.form is SizeForm.DIAMETER

    @fact
    def sphere(self) -> bool | None:
        """Whether it is a sphere; unknown where no size is stated."""
        if Meaning.SPHERE in self.part.meanings:
            return True
        size = leading_size(self.part)
        return size.form in SPHERICAL if size else (False if self.part.threads else None)

    @fact
    def surface(self) -> bool | None:
        """Whether it is a plain surface: it states no size, and words or a datum feature symbol say so."""
        if self.of_size:
            return False
        if self.part.meanings & SURFACE_WORDS:
            return True
        return True if self.part.datum_features and not self.part.meanings else None

    @fact
    def called_surface(self) -> bool:
        """Whether the callout's words say SURFACE or FACE."""
        return bool(self.part.meanings & SURFACE_WORDS)

    @fact
    def several(self) -> bool:
        """Whether the callout speaks for more than one feature."""
        count = self.part.count
        return count is not None and count.number != 1
