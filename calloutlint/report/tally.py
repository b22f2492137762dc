"""The end of a report: what house sheets changed, how many findings of each grade, what the gate says."""

from rich.text import Text

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
    """Print the tally, the gate, what house sheets changed, and what this tool is no substitute for."""
    screen.rule(ROLES.quiet)
    package = review.package
    callouts = sum(len(drawing.callouts) for drawing in package.drawings)
    scope = (
        counted(len(package.drawings), "drawing"),
        counted(callouts, "callout"),
        counted(review.rulebook_size, "rule"),
    )
    screen.paragraph(f"{', '.join(scope)}: {_grades(review)}.", ROLES.heading, indent=1)
    screen.paragraph(_gate_words(review), indent=1)
    for change in review.house:
        screen.paragraph(change.told, head=Text("House: "), indent=1)
    if review.unread:
        told = f"{counted(review.unread, 'place')} could not be read, so this review cannot pass"
        screen.paragraph(f"{told}: what stands beside unread text was not checked.", indent=1)
    screen.paragraph(SAFETY, ROLES.quiet, indent=1)


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
    return f"{counted(review.at_gate, 'finding').capitalize()} at or above the gate ({review.gate.word})."
