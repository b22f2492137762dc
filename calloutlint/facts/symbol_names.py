"""How messages write the symbols of compartments."""

from calloutlint.model.frame import Modifier

NAMED = {
    Modifier.CONTINUOUS_FEATURE: "⟨CF⟩",
    Modifier.STATISTICAL: "⟨ST⟩",
    Modifier.TRANSLATION: "▷",
    Modifier.DYNAMIC: "△",
}


def drawn(modifier: Modifier) -> str:
    """A modifier as it is drawn: a single letter in a circle, ⟨ST⟩, CZ."""
    letters = modifier.value
    circled = chr(ord("Ⓐ") + ord(letters) - ord("A")) if len(letters) == 1 else letters
    return NAMED.get(modifier, circled)
