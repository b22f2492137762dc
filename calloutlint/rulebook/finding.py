"""What a rule says of a drawing: a finding, its grade, and the changes that would correct it."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from decimal import Decimal
from enum import IntEnum

from calloutlint.model.callout import Callout
from calloutlint.model.drawing import Drawing
from calloutlint.model.source import Span


class Grade(IntEnum):
    """How much a finding matters, the least first."""

    OBSERVATION = 0
    MINOR = 1
    MAJOR = 2
    CRITICAL = 3

    @property
    def word(self) -> str:
        """The grade as rule sheets, reports and the command line write it."""
        return self.name.lower()


GRADES = {grade.word: grade for grade in Grade}


@dataclass(frozen=True, slots=True)
class Edit:
    """One change of a redline.

    `verb` is `add` or `drop` (a symbol; `drop` also a whole part), `replace` (what a fact of the part says),
    `reorder` (into the standard's order) or `respell` (in canonical text). `target` is the model part to
    change, or a tuple of parts. `word` is the symbol to add or drop, or the name of the target's fact to
    change, None for the part as a whole. `value` is what to write: a length is in the unit of the drawing.
    """

    verb: str
    word: str | None
    target: object
    value: Decimal | str | None = None


@dataclass(frozen=True, slots=True)
class Finding:
    """What a rule found, and where.

    `figures` are the numbers that the message rests on, by the name of the fact, written in the drawing's
    unit. `assumed` says in words what was taken for granted. `drawing` is None for a finding about the
    package as a whole, `callout` None for one about the drawing; `part` and `span` mark the place.
    """

    rule: str
    grade: Grade
    title: str
    message: str
    figures: Mapping[str, str] = field(default_factory=dict)
    assumed: str | None = None
    drawing: Drawing | None = None
    callout: Callout | None = None
    part: object = None
    span: Span | None = None
    edits: tuple[Edit, ...] = ()
