"""The modifiers of a frame by the symbol, word, bare or boxed letter that stands for them."""

from calloutlint.callouts.symbols import MODIFIERS
from calloutlint.model.frame import Modifier

BARE_MODIFIERS = {letter: Modifier(letter) for letter in "MLSPFTUIER"}
WITH_NUMBER = frozenset({Modifier.PROJECTED, Modifier.UNEQUAL, Modifier.OFFSET_ZONE, Modifier.SIMULTANEOUS})
_WORDS = {modifier.value: modifier for modifier in Modifier if len(modifier.value) in {2, 3}}


def modifier_of(text: str) -> Modifier:
    """The modifier that a piece names: `Ⓜ`, `CZ`, `[PL]`, `[M]`."""
    known = MODIFIERS.get(text)
    if known is not None:
        return known
    plain = text.replace(" ", "").replace("‹", "").replace("›", "")
    inside = plain.strip("[]")
    return MODIFIERS.get(plain) or BARE_MODIFIERS.get(inside) or _WORDS[inside]
