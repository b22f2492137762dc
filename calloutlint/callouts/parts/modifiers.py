"""The modifiers of a frame by the symbol, word or bare letter that stands for them."""

from calloutlint.model.frame import Modifier

MODIFIER_OF = {
    "Ⓜ": Modifier.MMC,
    "Ⓛ": Modifier.LMC,
    "Ⓢ": Modifier.RFS,
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
BARE_MODIFIERS = {letter: Modifier(letter) for letter in "MLSPFTUIER"}
WITH_NUMBER = frozenset({Modifier.PROJECTED, Modifier.UNEQUAL, Modifier.OFFSET_ZONE, Modifier.SIMULTANEOUS})
_WORDS = {modifier.value: modifier for modifier in Modifier if len(modifier.value) in {2, 3}}


def modifier_of(text: str) -> Modifier:
    """The modifier that a piece names: `Ⓜ`, `CZ`, `[PL]`, `[M]`."""
    known = MODIFIER_OF.get(text)
    if known is not None:
        return known
    plain = text.replace(" ", "").replace("‹", "").replace("›", "")
    inside = plain.strip("[]")
    return MODIFIER_OF.get(plain) or BARE_MODIFIERS.get(inside) or _WORDS[inside]
