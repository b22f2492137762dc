"""Freedoms in plain words, for messages and the overview."""

from collections.abc import Collection

from calloutlint.facts.datums.motion import Freedom

_SLIDES = ("", "slide in one direction", "slide in two directions", "slide in every direction")
_TURNS = ("", "turn about one axis", "turn about two axes", "turn about every axis")


def in_words(freedoms: Collection[Freedom]) -> str:
    """What these freedoms let a part do: `slide in two directions and turn about one axis`; "" for none."""
    turns = sum(freedom.turns for freedom in freedoms)
    said = (_SLIDES[len(freedoms) - turns], _TURNS[turns])
    return " and ".join(filter(None, said))


def letters(freedoms: Collection[Freedom]) -> str:
    """The letters of freedoms in their usual order, set apart: `x y w`; "" for none."""
    return " ".join(freedom.value for freedom in Freedom if freedom in freedoms)
