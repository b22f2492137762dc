"""Every spelling that is read, and the one symbol or word that each stands for.

This table is what the reader itself uses, what `calloutlint symbols` prints and what the writer takes
its canonical forms from.
"""

from typing import NamedTuple


class Spelling(NamedTuple):
    """One row: canonical `symbol`, its `ascii` form, `name` in the trade, and what else is read as it."""

    group: str
    symbol: str
    ascii: str
    name: str
    spellings: tuple[str, ...] = ()

    @property
    def normal(self) -> str:
        """What the grammar sees: the symbol itself, or `‹WORD›` for a word."""
        return f"‹{self.symbol}›" if self.symbol.isascii() and self.symbol[0].isalpha() else self.symbol

    @property
    def every(self) -> tuple[str, ...]:
        """All spellings, the canonical ones included."""
        return tuple(dict.fromkeys((self.symbol, self.ascii, *self.spellings)))


def _rows(group: str, *rows: tuple[str, ...]) -> tuple[Spelling, ...]:
    return tuple(Spelling(group, row[0], row[1], row[2], row[3:]) for row in rows)


CHARACTERISTICS = _rows(
    "characteristic",
    ("⏤", "STR", "straightness", "STRAIGHTNESS", "STRT", "STRAIGHT WITHIN", r"{\Fgdt;u}", "—"),
    ("⏥", "FLAT", "flatness", "FLATNESS", "▱", r"{\Fgdt;c}"),
    ("○", "CIR", "circularity", "CIRCULARITY", "ROUNDNESS", "ROUND WITHIN", "CIRC", "◯", "⚪", r"{\Fgdt;e}"),
    ("⌭", "CYL", "cylindricity", "CYLINDRICITY", r"{\Fgdt;g}"),
    (
        "⌒",
        "LPROF",
        "profile of a line",
        "PROFILE OF A LINE",
        "PROFILE OF LINE",
        "PROFILE LINE",
        "LINE PROFILE",
        "PROF LINE",
        "⏜",
        r"{\Fgdt;k}",
    ),
    (
        "⌓",
        "SPROF",
        "profile of a surface",
        "PROFILE OF A SURFACE",
        "PROFILE OF SURFACE",
        "PROFILE SURFACE",
        "SURFACE PROFILE",
        "PROF SURF",
        "⌔",
        "⏢",
        r"{\Fgdt;d}",
    ),
    ("∠", "ANG", "angularity", "ANGULARITY", "⦟", r"{\Fgdt;a}"),
    (
        "⟂",
        "PERP",
        "perpendicularity",
        "PERPENDICULARITY",
        "SQUARENESS",
        "PERPENDICULAR",
        "PERPENDICULAR TO",
        "PERP TO",
        "SQUARE TO",
        "SQUARE WITH",
        "SQUARE WITHIN",
        "⊥",
        "⏊",
        r"{\Fgdt;b}",
    ),
    (
        "∥",
        "PAR",
        "parallelism",
        "PARALLELISM",
        "PARALLEL",
        "PARALLEL TO",
        "PARALLEL WITH",
        "PAR TO",
        "//",
        "‖",
        "⫽",
        "⫻",
        r"{\Fgdt;f}",
    ),
    ("⌖", "POS", "position", "POSITION", "TRUE POSITION", "TRUE POS", "TP", "T.P.", "⊕", "⨁", r"{\Fgdt;j}"),
    ("◎", "CONC", "concentricity", "CONCENTRICITY", "COAXIALITY", "⌾", "⊚", r"{\Fgdt;r}"),
    ("⌯", "SYM", "symmetry", "SYMMETRY", "≡", r"{\Fgdt;i}"),
    (
        "↗",
        "CRUN",
        "circular runout",
        "CIRCULAR RUNOUT",
        "CIRCULAR RUN-OUT",
        "CIRC RUNOUT",
        "RUNOUT",
        "➚",
        "⭧",
        r"{\Fgdt;h}",
    ),
    ("⌰", "TRUN", "total runout", "TOTAL RUNOUT", "TOTAL RUN-OUT", "⇗", "↗↗", r"{\Fgdt;t}"),
)

MODIFIERS = _rows(
    "modifier",
    (
        "Ⓜ",
        "(M)",
        "maximum material condition",
        "MMC",
        "@ MMC",
        "AT MMC",
        "@MMC",
        "MMB",
        "<M>",
        "ⓜ",
        r"{\Fgdt;m}",
    ),
    ("Ⓛ", "(L)", "least material condition", "LMC", "@ LMC", "AT LMC", "@LMC", "LMB", "<L>", "ⓛ", r"{\Fgdt;l}"),
    ("Ⓢ", "(S)", "regardless of feature size", "RFS", "RMB", "<S>", "ⓢ", r"{\Fgdt;s}"),
    (
        "Ⓟ",
        "(P)",
        "projected tolerance zone",
        "PROJ",
        "PROJECTED",
        "PROJECTED TOLERANCE ZONE",
        "PROJECTED TOL ZONE",
        "PROJ TOL ZONE",
        "<P>",
        "ⓟ",
        r"{\Fgdt;p}",
    ),
    ("Ⓕ", "(F)", "free state", "FREE STATE", "<F>", "ⓕ"),
    ("Ⓣ", "(T)", "tangent plane", "TANGENT PLANE", "<T>", "ⓣ"),
    ("Ⓤ", "(U)", "unequally disposed profile", "UNEQUALLY DISPOSED", "<U>", "ⓤ"),
    ("Ⓘ", "(I)", "independency", "INDEPENDENCY", "<I>", "ⓘ"),
    ("Ⓔ", "(E)", "envelope requirement", "ENVELOPE REQUIREMENT", "<E>", "ⓔ"),
    ("Ⓡ", "(R)", "reciprocity", "RECIPROCITY", "<R>", "ⓡ"),
    ("Ⓖ", "<G>", "least squares feature", "ⓖ"),
    ("Ⓝ", "<N>", "minimum circumscribed feature", "ⓝ"),
    ("Ⓒ", "<C>", "minimax feature", "ⓒ"),
    ("Ⓧ", "<X>", "maximum inscribed feature", "ⓧ"),
    (
        "⟨ST⟩",
        "<ST>",
        "statistical tolerance",
        "(ST)",
        "〈ST〉",
        "‹ST›",
        "STATISTICAL TOLERANCE",
        "STATISTICAL TOL",
    ),
    ("⟨CF⟩", "<CF>", "continuous feature", "(CF)", "〈CF〉", "‹CF›", "CONTINUOUS FEATURE"),
    ("▷", "(TRANS)", "translation", "▻", "▹", "(>)"),
    ("△", "(DYN)", "dynamic profile", "∆", "DYNAMIC PROFILE"),
)

SIZES = _rows(
    "size",
    (
        "⌀",
        "DIA",
        "diameter",
        "DIA.",
        "DIAM",
        "DIAM.",
        "DIAMETER",
        "Ø",
        "ø",
        "∅",
        "φ",
        "Φ",
        "ϕ",
        "𝜙",
        "%%C",
        r"{\Fgdt;n}",
        r"\U+2205",
        "<MOD-DIAM>",
    ),
    (
        "S⌀",
        "SDIA",
        "spherical diameter",
        "SØ",
        "Sø",
        "S∅",
        "S%%C",
        "S DIA",
        "SPHERICAL DIA",
        "SPHERICAL DIAMETER",
        "SPHER DIA",
        "SPH DIA",
    ),
    ("R", "R", "radius", "RADIUS", "RAD", "RAD."),
    ("CR", "CR", "controlled radius", "CONTROLLED RADIUS"),
    ("SR", "SR", "spherical radius", "SPHERICAL RADIUS", "SPHER R", "SPH R", "SPHER RAD"),
    ("□", "SQ", "square", "SQUARE", "▢", "◻", "⬜", r"{\Fgdt;o}", "<MOD-SQ>"),
    (
        "±",
        "+/-",
        "plus or minus",
        "+-",
        "PLUS OR MINUS",
        "PLUS/MINUS",
        "PLUS-MINUS",
        "%%P",
        r"\U+00B1",
        "<MOD-PM>",
    ),
    ("°", "DEG", "degrees", "DEG.", "DEGREE", "DEGREES", "º", "˚", "%%D", r"\U+00B0", "<MOD-DEG>"),
    ("MAX", "MAX", "maximum", "MAX.", "MAXIMUM"),
    ("MIN", "MIN", "minimum", "MIN.", "MINIMUM"),
    ("REF", "REF", "reference dimension", "REF.", "REFERENCE"),
    ("BSC", "BSC", "basic dimension", "BASIC"),
)

HOLES = _rows(
    "hole",
    ("THRU", "THRU", "through", "THROUGH", "THRU.", "THRU HOLE", "THROUGH HOLE"),
    ("THRU ALL", "THRU ALL", "through all", "THROUGH ALL"),
    ("↧", "DEPTH", "depth", "⤓", "↓", r"{\Fgdt;x}", "<HOLE-DEPTH>"),
    ("DEEP", "DEEP", "depth, after its number", "DP", "DP."),
    (
        "⌴",
        "CBORE",
        "counterbore",
        "C'BORE",
        "⊔",
        "C-BORE",
        "C BORE",
        "C/BORE",
        "CTRBORE",
        "COUNTERBORE",
        "COUNTERBORED",
        r"{\Fgdt;v}",
        "<HOLE-SPOT>",
    ),
    (
        "⌵",
        "CSK",
        "countersink",
        "C'SINK",
        "∨",
        "˅",
        "CSINK",
        "C-SINK",
        "C SINK",
        "C'SK",
        "C/SINK",
        "CKSK",
        "COUNTERSINK",
        "COUNTERSUNK",
        r"{\Fgdt;w}",
        "<HOLE-SINK>",
    ),
    (
        "SF",
        "SF",
        "spotface",
        "S.F.",
        "SFACE",
        "S'FACE",
        "SPOTFACE",
        "SPOT FACE",
        "SPOTFACED",
        "⌴ SF",
        "⌴SF",
        "⍽",
    ),
    ("DRILL", "DRILL", "drill", "DRILLED", "DRL", "TAP DRILL"),
    ("REAM", "REAM", "ream", "REAMED", "RM."),
    ("TAP", "TAP", "tap", "TAPPED"),
    ("PL", "PL", "places", "PLACES", "PLCS", "PLCS.", "PLS", "PLC", "PL.", "PLACE", "REQD", "REQ'D"),
    ("TYP", "TYP", "typical", "TYP.", "TYPICAL"),
    ("LH", "LH", "left hand", "L.H.", "LEFT HAND", "LEFT-HAND"),
)

MARKS = _rows(
    "mark",
    ("|", "|", "compartment bar", "│", "┃", "║", "¦", "｜", "▏", "%%V"),
    ("×", "X", "by", "✕", "✖", "⨯"),
    ("+", "+", "plus", "PLUS"),
    ("-", "-", "minus or hyphen", "MINUS", "−", "–", "‐", "‑", "‒", "－"),
    ("'", "'", "minutes", "′", "’", "‘", "´"),
    ('"', '"', "seconds or inch", "″", "”", "“", "''", "′′", "’’"),
    ("↔", "<->", "between", "⟷", "<–>"),
    ("→", "->", "from and to", "⟶", "➔"),
    ("⌮", "ALL AROUND", "all around", "ALL-AROUND", "ALL ROUND"),
    ("ALL OVER", "ALL OVER", "all over", "ALL-OVER"),
    ("▲", "DATUM", "datum feature", "▼", "DATUM FEATURE", "◄", "►", "◀", "▶", "DATUM FEATURE SYMBOL"),
    ("1/2", "1/2", "half", "½"),
    ("1/4", "1/4", "quarter", "¼"),
    ("3/4", "3/4", "three quarters", "¾"),
    ("1/8", "1/8", "eighth", "⅛"),
    ("3/8", "3/8", "three eighths", "⅜"),
    ("5/8", "5/8", "five eighths", "⅝"),
    ("7/8", "7/8", "seven eighths", "⅞"),
)

SPELLINGS: tuple[Spelling, ...] = CHARACTERISTICS + MODIFIERS + SIZES + HOLES + MARKS
