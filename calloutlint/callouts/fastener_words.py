"""What the words and the standard of a fastener designation say about it: head, standard, washer, pin."""

import re

from calloutlint.model.fastener import Head

_STANDARD = re.compile(
    r"\b(?:(?:DIN|BS|NF|SS|UNI)\s+)?(?:EN\s+)?"
    r"(?:(?:ASME|ANSI)(?:/ASME)?\s*B\d+(?:\.\d+)*M?|(?:ISO|DIN|JIS|EN|GB(?:/T)?)\s*B?\s*\d{1,5}(?:-[1-9](?![\dx.]|\s*x))?)"
    r"(?:[-:](?:19|20)\d\d)?\b",
    re.IGNORECASE,
)

# The first pattern that is found decides, so the narrower name stands before the wider one.
_HEADS: tuple[tuple[str, Head | None], ...] = (
    (
        r"FLANGE|LOW[ -]HEAD|WASHER[ -]HEAD|\b(?:ROUND|RD\.?|T)[ -]?(?:HEAD|HD)\b|TRUSS|OVAL|BINDING|CARRIAGE",
        None,
    ),
    (r"SET[ -]?SCREW|GRUB|\bSS[SH]?S\b|HEADLESS", Head.NONE),
    (r"\bSTUDS?\b|THREADED ROD|ALL[ -]?THREAD", Head.STUD),
    (r"(?:HEXALOB\w*|TORX)\b.*\b(?:FLAT|COUNTERSUNK|CSK)", Head.FLAT),
    (r"\bFHS?CS\b|\bSFHCS\b|(?:SOC\w*|SKT|HEX\w*)\b.*\b(?:FLAT|COUNTERSUNK|CSK)", Head.SOCKET_COUNTERSUNK),
    (r"FLAT (?:HEAD|HD\.?) (?:SOC|SKT|CAP)|(?:COUNTERSUNK|CSK)\b.*\b(?:SOC|SKT)", Head.SOCKET_COUNTERSUNK),
    (r"\bS?BHS?CS\b|BUTTON", Head.SOCKET_BUTTON),
    (r"\bFIL\w*\.?\s*(?:HEAD|HD)|FILLISTER|CHEESE", Head.FILLISTER),
    (r"\bPAN\b|\bPHMS\b|\bPHCR\b|\bPHPS\b", Head.PAN),
    (r"\bSHCS\b|\bSOC(?:KET|\.)?\s*(?:HEAD|HD|HE?X|CAP|SCR)|\bSKT\b|HEX\w*[ -]SOCKET|ALLEN", Head.SOCKET_CAP),
    (r"FLAT\s*(?:HEAD|HD)|\bFHMS\b|COUNTERSUNK|\bCSK\b", Head.FLAT),
    (r"\bHEX\w*\b(?! NUT)|\bHH(?:CS|B|MS)?\b|\bHCS\b", Head.HEX),
)
_HEAD_OF_STANDARD = {
    Head.SOCKET_CAP: ("ISO 4762", "DIN 912", "ISO 12474"),
    Head.SOCKET_BUTTON: ("ISO 7380", "ISO 7380-1"),
    Head.SOCKET_COUNTERSUNK: ("ISO 10642", "DIN 7991"),
    Head.HEX: ("ISO 4014", "ISO 4017", "ISO 8765", "ISO 8676", "DIN 931", "DIN 933", "DIN 960", "DIN 961"),
    Head.PAN: ("ISO 7045", "ISO 1580", "ISO 14583", "DIN 7985"),
    Head.FLAT: ("ISO 2009", "ISO 7046", "ISO 7046-1", "ISO 7046-2", "ISO 14581", "DIN 963", "DIN 965"),
    Head.FILLISTER: ("ISO 1207", "ISO 7048", "ISO 14580", "DIN 84"),
    Head.NONE: ("ISO 4026", "ISO 4027", "ISO 4028", "ISO 4029", "DIN 913", "DIN 914", "DIN 915", "DIN 916"),
    Head.STUD: ("DIN 835", "DIN 938", "DIN 939", "DIN 975", "DIN 976", "DIN 976-1"),
}
_PIN_STANDARDS = ("ISO 2338", "ISO 8733", "ISO 8734", "ISO 8735", "DIN 7", "DIN 6325", "ASME B18.8.2")

_PIN = re.compile(r"\b(?:DOWELS?|PINS?)\b", re.IGNORECASE)
_SCREW = re.compile(r"\b(?:SCREWS?|SCRS?|BOLTS?|CAPSCREWS?|FASTENERS?|THREADED|HARDWARE)\b", re.IGNORECASE)
_OTHERWISE_SIZED = re.compile(
    r"SHOULDER|STRIPPER|RIVET|WOOD\s*SCREW|\bNAIL|\bINSERT"
    r"|\b(?:ROLL|SPRING|TAPER(?:ED)?|COTTER|SPLIT|SLOTTED)\s*PIN|\bPINS?\s*,\s*(?:ROLL|SPRING|TAPER|COTTER|SPLIT)",
    re.IGNORECASE,
)
_WASHER = re.compile(
    r"(?<!NO )(?<!WITHOUT )(?<!LOCK )(?<!LOCK)(?<!SPRING )\bWASHERS?\b(?! HEAD)|\bSEMS\b", re.IGNORECASE
)


def standard_in(text: str) -> tuple[str | None, str]:
    """The standard named in a designation in its usual spelling (`ISO 4762`, `ASME B18.3`), and the rest."""
    match = _STANDARD.search(text)
    if match is None:
        return None, text
    rest = text[: match.start()] + " ; " + text[match.end() :]
    spelled = re.sub(r"(?<=[A-Z])\s*(B?)\s*(\d)", r" \1\2", " ".join(match[0].upper().split()), count=1)
    return spelled, rest


def head_in(text: str, standard: str | None) -> Head | None:
    """The head that a designation names in words, or else by its standard; None where neither says."""
    for pattern, head in _HEADS:
        if re.search(pattern, text, re.IGNORECASE):
            return head
    number = _bare_number(standard)
    return next((head for head, standards in _HEAD_OF_STANDARD.items() if number in standards), None)


def names_pin(text: str, standard: str | None) -> bool:
    """Whether words or standard say that this is a pin."""
    return bool(_PIN.search(text)) or _bare_number(standard) in _PIN_STANDARDS


def names_screw(text: str) -> bool:
    """Whether words say that this is threaded."""
    return bool(_SCREW.search(text)) or head_in(text, None) is not None


def is_otherwise_sized(text: str) -> bool:
    """Whether it is a fastener whose nominal size is not the diameter in the hole: shoulder screw, rivet …"""
    return bool(_OTHERWISE_SIZED.search(text))


def has_washer(text: str) -> bool:
    """Whether a plain washer goes under the head."""
    return bool(_WASHER.search(text))


def _bare_number(standard: str | None) -> str:
    """A standard without its year and without the national prefix of an adopted one."""
    number = re.sub(r"[-:](?:19|20)\d\d$", "", standard or "")
    return re.sub(r"^.*(?=ISO )", "", number)
