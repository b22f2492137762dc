"""Proves rules by the cases in their own sheets."""

from collections import Counter
from collections.abc import Iterator, Sequence
from dataclasses import dataclass

from calloutlint.errors import CalloutlintError
from calloutlint.facts.views.subjects import subjects, walk
from calloutlint.model.drawing import Drawing, Package
from calloutlint.reading.sheet import parse_sheet
from calloutlint.rulebook.finding import Finding
from calloutlint.rulebook.rule import Rule
from calloutlint.rulebook.rulebook import Rulebook
from calloutlint.rulebook.sheet import Case

CASES_FOUND = 2
CASES_CLEAN = 2
WHOLE_SHEET = "sheet"
WHOLE_PACKAGE = "package"


@dataclass(frozen=True, slots=True)
class Proof:
    """The outcome for one rule: how many cases were run, and what is wrong, one sentence each."""

    rule: str
    cases: int
    failures: tuple[str, ...]

    @property
    def holds(self) -> bool:
        """Whether every case came out as the sheet says."""
        return not self.failures


def prove(rulebook: Rulebook, ids: Sequence[str] = ()) -> list[Proof]:
    """Runs the cases of some rules, or of all, each rule beside only those that it yields to.

    A case says what its sheet does as written: what house sheets change in it stays out.
    """
    by_id = {rule.id: rule for rule in rulebook.as_written or rulebook.rules}
    chosen = [by_id[id_] for id_ in ids] if ids else by_id.values()
    return [prove_rule(rule, by_id) for rule in chosen]


def prove_rule(rule: Rule, known: dict[str, Rule]) -> Proof:
    """Runs the cases of one rule; `known` are the rules that it may yield to, by id."""
    failures = list(_shortcomings(rule))
    beside = [known[id_] for id_ in rule.yields_to if id_ in known]
    for number, case in enumerate(rule.sheet.case, start=1):
        name = f"case {number}" + (f" ({case.note})" if case.note else "")
        failures += [f"{name}: {failure}" for failure in _run(rule, beside, case)]
    return Proof(rule.id, len(rule.sheet.case), tuple(failures))


def _shortcomings(rule: Rule) -> Iterator[str]:
    cases = rule.sheet.case
    found = sum(bool(case.finds) for case in cases)
    if found < CASES_FOUND or len(cases) - found < CASES_CLEAN:
        need = f"{CASES_FOUND} that are found and {CASES_CLEAN} that are clean"
        yield f"a sheet needs at least {need}; this one has {found} and {len(cases) - found}"


def _run(rule: Rule, beside: list[Rule], case: Case) -> Iterator[str]:
    try:
        package = package_of(case)
    except CalloutlintError as error:
        yield f"the drawing cannot be read: {error}"
        return
    yield from _unsaid(rule, package)
    findings = [f for f in Rulebook((rule, *beside)).check(package) if f.rule == rule.id]
    places = Counter(place(finding, package) for finding in findings)
    expected = Counter(case.finds)
    yield from (f"nothing found at {name}" for name in (expected - places).elements())
    for name in places - expected:
        messages = " / ".join(f.message for f in findings if place(f, package) == name)
        yield f"found {places[name]} at {name}, where {expected[name]} is expected: {messages}"
    if places == expected:
        yield from _details(case, findings)


def package_of(case: Case) -> Package:
    """The drawings of a case.

    Raises:
        CalloutlintError: it has neither a sheet nor a package, or both, or a drawing cannot be read.
    """
    if (case.sheet is None) == (not case.package):
        raise CalloutlintError("a case needs either 'sheet' or 'package'")
    texts = case.package or {"case.txt": case.sheet or ""}
    return Package("case", tuple(parse_sheet(text, name) for name, text in texts.items()))


def place(finding: Finding, package: Package) -> str:
    """Where a finding stands, as the `finds` of a case writes it."""
    if finding.drawing is None:
        return WHOLE_PACKAGE
    name = finding.callout.balloon if finding.callout else WHOLE_SHEET
    return name if len(package.drawings) == 1 else f"{_drawing_name(finding.drawing)}:{name}"


def _drawing_name(drawing: Drawing) -> str:
    return drawing.number or drawing.file


def _unsaid(rule: Rule, package: Package) -> Iterator[str]:
    """Findings that are lost because every message of the sheet meets an unknown value."""
    for view in walk(subjects(package)):
        if view.subject == rule.subject and rule.broken.read(view) and rule.judge(view) is None:
            yield "it fires, but its message meets a value that is unknown, so it stays silent"


def _details(case: Case, findings: list[Finding]) -> Iterator[str]:
    for finding in findings:
        if case.grade and finding.grade.word != case.grade:
            yield f"the grade is {finding.grade.word}, {case.grade} is expected"
    messages = [finding.message for finding in findings]
    for text in case.says:
        if not any(text in message for message in messages):
            yield f"no message says '{text}': {' / '.join(messages)}"
    for name, value in case.figures.items():
        if not any(finding.figures.get(name) == value for finding in findings):
            shown = [f"{key} = {given}" for finding in findings for key, given in finding.figures.items()]
            yield f"no finding has {name} = {value}: {', '.join(shown) or 'no figures'}"
