"""Which side of the material a callout's feature is on: a hole or a shaft, by what the callout says."""

from calloutlint.facts.sizes import leading_size
from calloutlint.model.callout import Callout, Meaning
from calloutlint.model.hole import StepKind
from calloutlint.model.size import Depth, SizeForm, Through
from calloutlint.model.thread import Thread

INTERNAL_WORDS = {Meaning.HOLE, Meaning.SLOT, Meaning.GROOVE, Meaning.BORE}
EXTERNAL_WORDS = {Meaning.SHAFT, Meaning.PIN, Meaning.BOSS, Meaning.TAB}
CARRIERS = {Meaning.BOSS, Meaning.TAB}


def side_by_words(callout: Callout) -> bool | None:
    """True internal, False external, None not said, by the words of the callout.

    A boss or tab beside a thread says where the thread is, not what it is.
    """
    meanings = callout.meanings
    external = meanings & (EXTERNAL_WORDS - CARRIERS if callout.threads else EXTERNAL_WORDS)
    if meanings & INTERNAL_WORDS:
        return None if external else True
    return False if external else None


def side_by_hole(callout: Callout) -> bool | None:
    """True where a diameter goes through, has a depth, or has hole steps; else None."""
    sunk = any(step.kind is not StepKind.TAP for step in callout.steps)
    size = leading_size(callout)
    bored = size is not None and size.form is SizeForm.DIAMETER and isinstance(size.extent, Through | Depth)
    return True if bored or sunk else None


def side_by_letters(callout: Callout) -> bool | None:
    """True internal, False external, None not said, by thread class and fit letter."""
    for thread in callout.threads:
        side = side_of_thread(thread)
        if side is not None:
            return side
    size = leading_size(callout)
    if size is None or size.fit is None:
        return None
    return size.fit.letters[0].isupper()


def side_of_thread(thread: Thread) -> bool | None:
    """True internal, False external by the class: 2B, 6H inside; 2A, 6g outside; None where none is stated."""
    letters = [char for char in thread.class_ or "" if char.isalpha()]
    if not letters:
        return None
    if thread.class_ in {"1A", "2A", "3A", "1B", "2B", "3B"}:
        return letters[0] == "B"
    return letters[0].isupper()
