"""How a terminal report looks: one style for each role, and the characters that frames are drawn with."""

from typing import NamedTuple

from calloutlint.callouts.write import Style
from calloutlint.rulebook.finding import Grade


class Roles(NamedTuple):
    """The style of each thing that a report shows, in the words of rich."""

    heading: str = "bold"
    quiet: str = "dim"
    balloon: str = "bold cyan"
    callout: str = ""
    critical: str = "bold red"
    major: str = "bold yellow"
    minor: str = "cyan"
    observation: str = "blue"
    rule: str = "bold"
    title: str = "bold"
    message: str = ""
    corrected: str = "green"

    def grade(self, grade: Grade) -> str:
        """The style of a grade."""
        return str(getattr(self, grade.name.lower()))


ROLES = Roles()

# Rows: nothing left, a light line left, a heavy line left; columns: the same to the right.
_UNICODE_JUNCTIONS = {
    (False, False): (" ╶╺", "╴─╼", "╸╾━"),
    (False, True): ("╷┌┍", "┐┬┮", "┑┭┯"),
    (True, False): ("╵└┕", "┘┴┶", "┙┵┷"),
    (True, True): ("│├┝", "┤┼┾", "┥┽┿"),
}
_ASCII_JUNCTIONS = {
    (False, False): (" -=", "--=", "==="),
    (False, True): ("|++", "+++", "+++"),
    (True, False): ("|++", "+++", "+++"),
    (True, True): ("|++", "+++", "+++"),
}


class Glyphs(NamedTuple):
    """The characters of a look. `edges` are horizontal lines by weight: none, light, heavy."""

    spelling: Style
    junctions: dict[tuple[bool, bool], tuple[str, str, str]]
    edges: str
    side: str
    torn: str
    pointer: str
    triangle: str
    rule: str
    dot: str

    def junction(self, up: bool, down: bool, left: int, right: int) -> str:
        """The character where lines meet; `left` and `right` are weights from 0 to 2."""
        return self.junctions[up, down][left][right]


UNICODE = Glyphs(Style.UNICODE, _UNICODE_JUNCTIONS, " ─━", "│", "┊", "←", "▼", "─", "·")
ASCII = Glyphs(Style.ASCII, _ASCII_JUNCTIONS, " -=", "|", ":", "<-", "V", "-", "-")
