"""The end of a report: what is waived, how many findings of each grade, what the gate says."""

from calloutlint.report.screen import Screen
from calloutlint.report.styles import ROLES
from calloutlint.report.words import counted
from calloutlint.review import Review
from calloutlint.rulebook.finding import Grade

SAFETY = (
    "Worst-case arithmetic on callouts is no substitute for the governing standard, local codes and licensed "
    "engineers."
)


def show_tally(review: Review, screen: Screen) -> None:
    """Print the waived findings, the tally, the gate and what this tool is no substitute for."""
    screen.rule(ROLES.quiet)
    _show_waived(review, screen)
    package = review.package
    callouts = sum(len(drawing.callouts) for drawing in package.drawings)
    scope = (
        counted(len(package.drawings), "drawing"),
        counted(callouts, "callout"),
        counted(review.rulebook_size, "rule"),
    )
    screen.paragraph(f"{', '.join(scope)}: {_grades(review)}.", ROLES.heading, indent=1)
    screen.paragraph(_gate_words(review), indent=1)
    if review.unread:
        told = f"{counted(review.unread, 'place')} could not be read, so this review cannot pass"
        screen.paragraph(f"{told}: what stands beside unread text was not checked.", indent=1)
    screen.paragraph(SAFETY, ROLES.quiet, indent=1)


def _show_waived(review: Review, screen: Screen) -> None:
    waived = [judged for judged in review.findings if judged.waived is not None]
    if not waived:
        return
    screen.paragraph(f"{counted(len(waived), 'finding').capitalize()} waived:", indent=1)
    for judged in waived:
        finding = judged.finding
        where = [finding.drawing.name] if finding.drawing else []
        where += [f"({finding.callout.balloon})"] if finding.callout else []
        screen.paragraph(
            " ".join([*where, finding.rule, f"{finding.title}: {judged.waived}"]), ROLES.quiet, indent=3
        )
    screen.line()


def _grades(review: Review) -> str:
    words = []
    for grade in sorted(Grade, reverse=True):
        number = review.count(grade)
        if number:
            words.append(
                counted(number, grade.word) if grade is Grade.OBSERVATION else f"{number} {grade.word}"
            )
    return ", ".join(words) or "no findings"


def _gate_words(review: Review) -> str:
    grade = review.gate.word
    if not review.at_gate:
        return f"The gate is {grade}: nothing stands at it or above."
    return f"The gate is {grade}: {counted(review.at_gate, 'finding')} at it or above."
