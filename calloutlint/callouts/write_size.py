"""Canonical text of sizes, threads and hole steps."""

from decimal import Decimal

from calloutlint.callouts.symbols import SIZE_FORMS, SIZE_MODIFIERS, STEPS
from calloutlint.callouts.writing import Writing
from calloutlint.model.hole import HoleStep
from calloutlint.model.size import (
    Count,
    Depth,
    Deviations,
    Limits,
    PlusMinus,
    Size,
    SizeForm,
    SizeStatus,
    Through,
)
from calloutlint.model.thread import Thread, ThreadSystem
from calloutlint.model.values import Value
from calloutlint.units import Unit

_SYMBOL_OF_FORM = {form: symbol for symbol, form in SIZE_FORMS.items()}
_SYMBOL_OF_MODIFIER = {modifier: symbol for symbol, modifier in SIZE_MODIFIERS.items()}
_SYMBOL_OF_STEP = {kind: symbol for symbol, kind in STEPS.items()}
_ENCLOSED = {SizeStatus.BASIC: "[]", SizeStatus.REFERENCE: "()"}


def write_size(size: Size, writing: Writing) -> str:
    """`4X ⌀.281 +.007 -.002 THRU`."""
    body = _form(size, writing) + _body(size, writing)
    if size.status in _ENCLOSED:
        body = _ENCLOSED[size.status][0] + body + _ENCLOSED[size.status][1]
    words = [body]
    words += {SizeStatus.MAXIMUM: ["MAX"], SizeStatus.MINIMUM: ["MIN"]}.get(size.status, [])
    words += [writing.symbol(_SYMBOL_OF_MODIFIER[use]) for use in size.modifiers]
    if size.dual is not None:
        words.append(f"[{_dual(size.dual, size.form, writing)}]")
    return _counted(size.count, " ".join(words) + _extent(size.extent, writing))


def _dual(dual: Size, form: SizeForm, writing: Writing) -> str:
    plain = Writing(writing.style)
    return ("" if dual.form is form else _form(dual, plain)) + _body(dual, plain)


def _counted(count: Count | None, text: str) -> str:
    if count is None:
        return text
    return (
        f"{text} TYP" if count.written.endswith("TYP") and count.number is None else f"{count.written} {text}"
    )


def _form(size: Size, writing: Writing) -> str:
    symbol = _SYMBOL_OF_FORM.get(size.form)
    return "" if symbol is None else writing.form(symbol)


def _body(size: Size, writing: Writing) -> str:
    words = [] if size.nominal is None else [writing.value(size.nominal)]
    if size.fit is not None:
        words.append(str(size.fit))
    if size.tolerance is not None:
        tolerance = _tolerance(size.tolerance, _after_mark(size.nominal, writing))
        words.append(f"({tolerance})" if size.fit is not None else tolerance)
    return " ".join(words)


def _after_mark(nominal: Value | None, writing: Writing) -> Writing:
    """How to write the tolerance of a size: the unit marked on its nominal holds for it."""
    if nominal is None or nominal.unit not in {Unit.INCH, Unit.MM} or writing.unit is None:
        return writing
    return Writing(writing.style, nominal.unit)


def _tolerance(tolerance: PlusMinus | Deviations | Limits, writing: Writing) -> str:
    if isinstance(tolerance, PlusMinus):
        return writing.symbol("±") + writing.value(tolerance.amount)
    if isinstance(tolerance, Deviations):
        return f"{writing.value(tolerance.upper)} {writing.value(tolerance.lower)}"
    if tolerance.named:
        return f"{writing.value(tolerance.first)} MAX {writing.value(tolerance.second)} MIN"
    first = _after_mark(tolerance.second, writing).value(tolerance.first)
    second = _after_mark(tolerance.first, writing).value(tolerance.second)
    if tolerance.first.unit is tolerance.second.unit:
        second = writing.value(tolerance.second)
    return f"{first} - {second}" if " " in first + tolerance.second.text else f"{first}-{second}"


def _extent(extent: Through | Depth | None, writing: Writing) -> str:
    if extent is None:
        return ""
    if isinstance(extent, Through):
        return f" {extent.written}"
    depth = f" {writing.symbol('↧')}"
    return depth if extent.size is None else f"{depth} {write_size(extent.size, writing)}"


def write_thread(thread: Thread, writing: Writing) -> str:
    """`4X .250-20 UNC-2B ↧ .50`."""
    text = _WRITERS[thread.system](thread)
    text += "-LH" if thread.left_hand else ""
    if thread.starts > 1 and not _shows_lead(thread):
        text += f" {thread.starts} START"
    return _counted(thread.count, text + _extent(thread.extent, writing))


def _unified(thread: Thread) -> str:
    size = thread.size if thread.tpi is None else f"{thread.size}-{thread.tpi.text}"
    return f"{size} {thread.series}".rstrip() + _class(thread)


def _metric(thread: Thread) -> str:
    number = thread.size.removeprefix("M").removeprefix("Tr")
    trapezoidal = thread.system is ThreadSystem.TRAPEZOIDAL
    text = f"{'Tr' if trapezoidal else thread.series or 'M'}{number}"
    if thread.pitch is not None:
        lead = _lead(thread)
        if thread.starts == 1:
            text += f"x{thread.pitch.text}"
        else:
            text += f"x{lead} P{thread.pitch.text}" if trapezoidal else f"xPh{lead}P{thread.pitch.text}"
    return text + _class(thread)


def _lead(thread: Thread) -> str:
    lead = thread.pitch.amount * thread.starts if thread.pitch is not None else Decimal(0)
    return f"{lead.normalize():f}"


def _shows_lead(thread: Thread) -> bool:
    return thread.system in {ThreadSystem.METRIC, ThreadSystem.TRAPEZOIDAL} and thread.pitch is not None


def _pipe(thread: Thread) -> str:
    if thread.series in {"G", "R", "Rc", "Rp"}:
        return f"{thread.series} {thread.size}" + (f" {thread.class_}" if thread.class_ else "")
    return _unified(thread)


def _class(thread: Thread) -> str:
    return f"-{thread.class_}" if thread.class_ else ""


_WRITERS = {
    ThreadSystem.UNIFIED: _unified,
    ThreadSystem.ACME: _unified,
    ThreadSystem.METRIC: _metric,
    ThreadSystem.TRAPEZOIDAL: _metric,
    ThreadSystem.PIPE: _pipe,
}


def write_step(step: HoleStep, writing: Writing) -> str:
    """`⌴ ⌀.438 ↧ .25`, `⌵ ⌀.50 X 82°`, `#7 DRILL ↧ .75`."""
    words = [] if step.drill is None else [step.drill]
    words.append(writing.symbol(_SYMBOL_OF_STEP[step.kind]))
    if step.size is not None:
        words.append(write_size(step.size, writing))
    if step.angle is not None:
        words += ["X"] if step.size is not None else []
        words.append(write_size(step.angle, writing))
    return _counted(step.count, " ".join(words) + _extent(step.extent, writing))
