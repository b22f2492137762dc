"""Screw threads as drawings call them out, looked up in the Unified and ISO metric systems."""

from decimal import Decimal

from calloutlint.model.thread import Thread, ThreadSystem
from calloutlint.trade import metric, unified, unified_series
from calloutlint.trade.inches import ROUNDED, nominal_size
from calloutlint.trade.thread_form import ThreadForm, ThreadLimits
from calloutlint.units import Unit


def series_has(thread: Thread) -> bool | None:
    """Whether the series of a thread has its diameter and pitch; None where any will do or it is not known.

    Sources: ASME B1.1 (UNC, UNF, UNEF, constant-pitch UN; UNJ alike), ISO 261 (M, MJ). UNS has no list, and
    neither has a thread without a series; pipe and power threads are not looked up.
    """
    if thread.diameter is None:
        return None
    if thread.system is ThreadSystem.METRIC:
        return metric.series_has(thread.diameter.amount, thread.pitch.amount if thread.pitch else None)
    if thread.system is ThreadSystem.UNIFIED:
        tpi = thread.tpi.amount if thread.tpi else None
        return unified_series.series_has(thread.diameter.amount, tpi, thread.series)
    return None


def form_of(thread: Thread) -> ThreadForm | None:
    """Basic sizes of a thread: its stated pitch, else the one that its series or the coarse rule fixes.

    None for a thread whose pitch is open (an inch size alone) or whose system is neither.
    """
    if thread.diameter is None:
        return None
    if thread.system is ThreadSystem.METRIC:
        return metric.thread(thread.diameter.amount, pitch_of(thread), thread.series)
    tpi = tpi_of(thread)
    return None if tpi is None else unified.thread(thread.diameter.amount, tpi, thread.series)


def limits_of(thread: Thread, class_: str | None = None) -> ThreadLimits | None:
    """Limits of size of a thread in its own unit, for its own class or another.

    None where it has no class, or one that its standard does not have. Sources: ASME B1.1, ISO 965-1.
    """
    form, wanted = form_of(thread), class_ or thread.class_
    if form is None or wanted is None:
        return None
    return unified.limits(form, wanted) if form.unit is Unit.INCH else metric.limits(form, wanted)


def pitch_of(thread: Thread) -> Decimal | None:
    """Pitch in the thread's unit: as stated, else fixed by its series (`1/4 UNC`) or coarse (`M8`)."""
    if thread.system is ThreadSystem.METRIC and thread.diameter is not None:
        return thread.pitch.amount if thread.pitch else metric.coarse_pitch(thread.diameter.amount)
    tpi = tpi_of(thread)
    return None if tpi is None else 1 / tpi


def tpi_of(thread: Thread) -> Decimal | None:
    """Threads per inch of a Unified thread: as stated, else fixed by its series; None where it is open."""
    if thread.system is not ThreadSystem.UNIFIED or thread.diameter is None:
        return None
    if thread.tpi is None:
        return unified_series.only_tpi(thread.diameter.amount, thread.series)
    return thread.tpi.amount if thread.tpi.amount > 0 else None


def screws_into(screw: Thread, hole: Thread) -> bool | None:
    """Whether a screw thread goes with a tapped one: same system, diameter, pitch and hand.

    `M8` alone is coarse. None where an inch size without a pitch leaves it open, or where the thread is
    neither Unified nor metric.
    """
    if screw.diameter is None or hole.diameter is None:
        return None
    if screw.system is not hole.system or screw.left_hand is not hole.left_hand:
        return False
    if not _same_diameter(screw, hole):
        return False
    pitches = pitch_of(screw), pitch_of(hole)
    return None if None in pitches else pitches[0] == pitches[1]


def _same_diameter(one: Thread, other: Thread) -> bool:
    """Inch sizes are rounded to three places on drawings: `.312` and `5/16` are one size."""
    assert one.diameter is not None
    assert other.diameter is not None
    first, second = one.diameter.amount, other.diameter.amount
    if one.system is ThreadSystem.METRIC:
        return first == second
    return abs(first - second) <= ROUNDED or (nominal_size(first) or first) == (nominal_size(second) or second)
