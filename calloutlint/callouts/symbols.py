"""What each symbol of the spelling table is in the model, for the reader and for the writer."""

from calloutlint.model.frame import Characteristic, Modifier, ZoneShape
from calloutlint.model.hole import StepKind
from calloutlint.model.size import SizeForm, SizeModifier

CHARACTERISTICS = {
    "⏤": Characteristic.STRAIGHTNESS,
    "⏥": Characteristic.FLATNESS,
    "○": Characteristic.CIRCULARITY,
    "⌭": Characteristic.CYLINDRICITY,
    "⌒": Characteristic.LINE_PROFILE,
    "⌓": Characteristic.SURFACE_PROFILE,
    "∠": Characteristic.ANGULARITY,
    "⟂": Characteristic.PERPENDICULARITY,
    "∥": Characteristic.PARALLELISM,
    "⌖": Characteristic.POSITION,
    "◎": Characteristic.CONCENTRICITY,
    "⌯": Characteristic.SYMMETRY,
    "↗": Characteristic.CIRCULAR_RUNOUT,
    "⌰": Characteristic.TOTAL_RUNOUT,
}
ANY_CHARACTERISTIC = "".join(CHARACTERISTICS)
"""For the inside of a character class."""

MODIFIERS = {
    "Ⓜ": Modifier.MMC,
    "Ⓛ": Modifier.LMC,
    "Ⓢ": Modifier.RFS,
    "Ⓖ": Modifier.GAUSSIAN,
    "Ⓝ": Modifier.MINIMUM_CIRCUMSCRIBED,
    "Ⓒ": Modifier.MINIMAX,
    "Ⓧ": Modifier.MAXIMUM_INSCRIBED,
    "Ⓟ": Modifier.PROJECTED,
    "Ⓕ": Modifier.FREE_STATE,
    "Ⓣ": Modifier.TANGENT,
    "Ⓤ": Modifier.UNEQUAL,
    "Ⓘ": Modifier.INDEPENDENCY,
    "Ⓔ": Modifier.ENVELOPE,
    "Ⓡ": Modifier.RECIPROCITY,
    "⟨ST⟩": Modifier.STATISTICAL,
    "⟨CF⟩": Modifier.CONTINUOUS_FEATURE,
    "△": Modifier.DYNAMIC,
    "▷": Modifier.TRANSLATION,
    "[CF]": Modifier.CONTACTING,
}
ZONE_SHAPES = {"": ZoneShape.WIDTH, "⌀": ZoneShape.DIAMETER, "S⌀": ZoneShape.SPHERE}

SIZE_FORMS = {
    "⌀": SizeForm.DIAMETER,
    "S⌀": SizeForm.SPHERICAL_DIAMETER,
    "R": SizeForm.RADIUS,
    "CR": SizeForm.CONTROLLED_RADIUS,
    "SR": SizeForm.SPHERICAL_RADIUS,
    "□": SizeForm.SQUARE,
}
SIZE_MODIFIERS = {
    "⟨ST⟩": SizeModifier.STATISTICAL,
    "⟨CF⟩": SizeModifier.CONTINUOUS_FEATURE,
    "Ⓔ": SizeModifier.ENVELOPE,
    "Ⓘ": SizeModifier.INDEPENDENCY,
    "Ⓕ": SizeModifier.FREE_STATE,
    "CT": SizeModifier.COMMON_TOLERANCE,
}
STEPS = {
    "⌴": StepKind.COUNTERBORE,
    "⌵": StepKind.COUNTERSINK,
    "SF": StepKind.SPOTFACE,
    "DRILL": StepKind.DRILL,
    "REAM": StepKind.REAM,
    "BORE": StepKind.BORE,
    "TAP": StepKind.TAP,
}
