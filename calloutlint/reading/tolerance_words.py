"""Words of a `tolerances` line: how signs are spelled, and what is known but gives no size a tolerance."""

import re

NUMBER = r"(?:(?:\d+(?:\s+|-))?\d+/[1-9]\d*|\d*\.\d+|\d+\.?(?!/))"

_SPELLINGS = (
    (re.compile(r"%%p|\\U\+00B1|<MOD-PM>|\+\s*/\s*-|\+-", re.IGNORECASE), "±"),
    (re.compile(r"%%d|\\U\+00B0|<MOD-DEG>|(?<=\d)\s*(?:degrees?|degs?)\b\.?|º|˚", re.IGNORECASE), "°"),
    (re.compile(r"[′’]"), "'"),
    (re.compile(r"[″”]"), '"'),
    (re.compile(r"[‐‑–−]"), "-"),
    (re.compile(r"([±°]\s*\d+)\s*min(?:utes?)?\b\.?", re.IGNORECASE), r"\1'"),
)

ADOPTED = re.compile(r"\b(?:(?:DIN|EN|BS|NF|SS|UNI)[\s-]+){1,3}(?=ISO)", re.IGNORECASE)
"""What national bodies put before the number of an ISO standard they adopt."""

UNCHECKED = re.compile(
    r"""
    (?<!\w)
    (?: ISO[\s-]*(?:22081|13920|8062|20457|3302|9013)     # all sizes; welded, cast, moulded, rubber, cut parts
      | DIN[\s-]*(?:7168|16742|16901|6930|168[0-8])
      | (?:DIN[\s-]*)? EN[\s-]*(?:10243|755|12020)
      | JIS[\s-]*B[\s-]*0\d{3} | GB/T[\s-]*\d{4,5}
    )(?!\d)
    (?:-\d{1,2}(?!\d))? (?:\s*:\s*\d{4})?
    (?:                                                   # its classes: -BF, DCTG 9, RMA 6 (RMAG H), TG6
        [\s-]*\(? (?:(?:class|grade|DCTG|GCTG|GT[AB]|RMAG?|SMI|CT|TG|[MPEL])[\s-]*)?
        (?:[A-H]{1,2}|[fmcv]|sg|\d{1,3}(?:\.\d+)?) (?![\w/.]|\s*-?\s*pl) \)?
    )*
    """,
    re.IGNORECASE | re.VERBOSE,
)
"""General tolerances of standards that are not tabulated here, with their classes (numbers from memory)."""

PROFILE = re.compile(
    rf"(?:⌓|(?i:profile(?:\s+of\s+a\s+surface)?)(?:\s*⌓)?)[\s|:]*{NUMBER}(?i:\s*(?:mm|in)\b)?"
    r"(?:[\s|]+[A-Z](?![\w.°]|\s*±)){0,3}"
)
"""A general profile tolerance, `⌓ 0.5 | A | B | C`, as ISO 22081 and ASME Y14.5 have it."""

_HEIGHT = rf"(?:[\s:=]*R?\s*{NUMBER}(?:\s*-\s*R?\s*{NUMBER})?(?:\s*[x×]\s*45\s*°)?(?:\s*±\s*{NUMBER})?)?"
FILLER = re.compile(
    rf"""
    \b(?: unless\ (?:otherwise\ )?(?:specified|stated|noted|indicated|shown)\b | uos\b
      | (?:surface\ )?(?:finish|roughness|texture)\b
        (?:[\s:=]*(?:R[aqz]|RMS|CLA)\b)? (?:[\s:=]*{NUMBER})? (?:\s*(?:[µμu]?(?:m|in)|RMS|CLA|R[aqz])\b)?
      | \d+\s*RMS\b | R[aqz][\s:=]*{NUMBER} (?:\s*[µμu]?(?:m|in)\b)?
      | (?:(?:break|remove|deburr)\b (?:\s+(?:and|all|sharp|burrs?|edges?|corners?|break)\b)+
          | (?:max\.?\s+)?(?:fillets?|rounds?)\b (?:\s+(?:and|rounds?|fillets?|radi(?:us|i))\b)*)
        (?:\s*max\b\.?)? {_HEIGHT} (?:\s*max\b\.?)?
      | (?:ASME|ANSI)\s*Y\s*14\.\d+M? (?:[\s-]*(?:19|20)\d\d\b)?
      | ISO[\s-]*(?:128|129|286|1101|1302|5458|5459|8015|13715|14405|21920)(?!\d)
        (?:-\d\b)? (?:\s*:\s*\d{{4}}\b)?
      | (?:general|toleranc(?:es?|ing)|tols?|linear|decimals?|dec|dimension(?:s|ing)?|dims?|sizes?)\b\.?
      | (?:angles?|angular|ang|machined|interpret|all\ over|all|and|are|for|on|per|to)\b\.?
      | in\ (?:inch(?:es)?|mm|millimet(?:re|er)s?)\b
    )
    """,
    re.IGNORECASE | re.VERBOSE,
)
"""What may stand among tolerances and gives none: phrases, texture, edges, standards of principles."""


def spelled(written: str) -> str:
    """The text with one spelling for every sign (`±`, `°`, `'`, `"`, `-`) and single spaces."""
    for spelling, canonical in _SPELLINGS:
        written = spelling.sub(canonical, written)
    return " ".join(written.split())


def decimal_points(text: str) -> str:
    """The text with a point for every decimal comma: between two digits, or in `X,X`."""
    return re.sub(r"(?<=\d),(?=\d)|(?<=[Xx]),(?=[Xx])", ".", text)
