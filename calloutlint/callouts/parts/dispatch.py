"""What takes each rule and each terminal of the grammar to its place in the callout."""

from collections.abc import Callable

from lark import Token, Tree

from calloutlint.callouts.parts import (
    place_bracket,
    place_count,
    place_datum,
    place_extent,
    place_frame,
    place_size,
    place_status,
    place_step,
    place_thread,
    place_word,
)
from calloutlint.callouts.parts.state import State

TREES: dict[str, Callable[[State, Tree[Token]], None]] = {
    "size": place_size.take_size,
    "stacked": place_size.take_stacked,
    "thread": place_thread.take_thread,
    "frame": place_frame.take_frame,
    "segment": place_frame.take_segment,
    "target": place_datum.take_target,
    "lost": place_word.take_lost,
}
TOKENS: dict[str, Callable[[State, Token], None]] = {
    "COUNT": place_count.take_count,
    "THRU": place_extent.take_through,
    "DEPTH": place_extent.take_depth,
    "DEEP": place_extent.take_deep,
    "STEP": place_step.take_step,
    "DRILL_NAME": place_step.take_drill_name,
    "BY": place_word.take_by,
    "LEFT_HAND": place_thread.take_left_hand,
    "STARTS": place_thread.take_starts,
    "MAX": place_status.take_status,
    "MIN": place_status.take_status,
    "REFERENCE": place_status.take_status,
    "BASIC": place_status.take_status,
    "SIZE_MODIFIER": place_status.take_size_modifier,
    "BOXED_FORM": place_bracket.take_boxed_form,
    "OPEN_BOX": place_bracket.open_box,
    "CLOSE_BOX": place_bracket.close,
    "OPEN": place_bracket.open_parenthesis,
    "CLOSE": place_bracket.close,
    "PROJECTED_HEIGHT": place_frame.take_projected_height,
    "ANGLE_SIGN": place_size.take_angle_sign,
    "SCOPE": place_frame.take_scope,
    "DATUM_FEATURE": place_datum.take_datum_feature,
    "DATUM_BOX": place_datum.take_boxed_letter,
    "COMPARTMENT": place_datum.take_compartment,
    "NUMBERED_DATUM": place_datum.take_numbered_datum,
    "FASTENER": place_word.take_fastener,
    "WORD": place_word.take_word,
    "ON_CIRCLE": place_word.take_plain,
    "NUMBERED_NOTE": place_word.take_plain,
    "DESIGNATION": place_word.take_plain,
    "WITHIN": place_word.take_plain,
    "SPOKEN": place_word.take_spoken,
    "STRAY": place_word.as_word,
}
# Pieces that may turn out to be plain words: a run of words goes on through them.
MAY_BE_WORDS = {
    "WORD",
    "ON_CIRCLE",
    "NUMBERED_NOTE",
    "DESIGNATION",
    "WITHIN",
    "DEPTH",
    "STRAY",
    "STEP",
    "MAX",
    "MIN",
    "REFERENCE",
    "BASIC",
    "SIZE_MODIFIER",
    "LEFT_HAND",
    "STARTS",
    "DATUM_FEATURE",
    "DATUM_BOX",
    "COMPARTMENT",
    "NUMBERED_DATUM",
    "target",
    "lost",
}
