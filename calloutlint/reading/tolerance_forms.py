"""The forms in which a `tolerances` line states an amount: for which sizes, and how much."""

import re

from calloutlint.reading.tolerance_words import NUMBER

_UNIT = r"(?:\s*(?P<unit>mm|in(?:ch(?:es)?)?\b\.?|\"))?"
_AMOUNT = rf"[\s=:]*±\s*(?P<amount>{NUMBER})(?![\d/.]*\s*[°']){_UNIT}"
_ANGLE = (
    rf"[\s=:]*±\s*(?:(?P<degrees>{NUMBER})\s*(?:°|(?![\d/.]*\s*')(?!\d)))?"
    r"\s*(?:(?P<minutes>\d+)\s*')?\s*(?:(?P<seconds>\d+)\s*\")?"
)
_DIMENSIONS = r"(?:[\s:]*(?:dim(?:ension)?s?|tol(?:erance)?s?)\b\.?)*"

ISO_2768 = re.compile(
    r"""
    (?:\bISO[\s-]*|\bEN\s*2|(?<=/)) 2768                # EN 22768 is ISO 2768 under another number
    (?:\s*-?\s*(?:part\s*|T)?[12](?!\d))? (?:\s*[/&+]\s*-?\s*2(?!\d))? (?:\s*:\s*\d{4})? \s*-?\s*
    (?P<linear>fine|medium|coarse|very\ coarse|[fmcv])? \s*-?\s*
    (?P<geometrical>[HKL])?
    (?:\s*-\s*E)? \b                                  # E: the envelope requirement of ISO 2768-2
    """,
    re.IGNORECASE | re.VERBOSE,
)
RANGES = re.compile(
    rf"(?:over\s*)?{NUMBER}\s*(?:mm\s*)?(?:-|to|up\ to|…)\s*{NUMBER}\s*{_AMOUNT}", re.IGNORECASE
)
ANGLES_BY_PLACES = re.compile(rf"X{{0,3}}\.X{{1,3}}\s*°{_ANGLE}", re.IGNORECASE)
ANGLES = re.compile(
    rf"(?:\bangles?\b|\bangular\b|\bang\b\.?|∠|(?<![\w.])X{{1,3}}\s*°){_DIMENSIONS}(?:[\s:]*(?:mach\w*\.?|X\b))?{_ANGLE}",
    re.IGNORECASE,
)
BENDS = re.compile(rf"\bbends?\b{_ANGLE}", re.IGNORECASE)
PLACES = re.compile(
    rf"(?<![\w./])(?:[X0]{{0,4}}\.(?P<places>X{{1,6}}|0{{1,6}})|X{{1,4}}|0)(?![\w.]){_AMOUNT}", re.IGNORECASE
)
_PLACE_WORD = r"(?:pl(?:aces?|cs?)?|decimals?|dec|dims?)\b\.?"
IN_WORDS = re.compile(
    rf"(?P<count>\d|one|two|three|four)[\s-]*{_PLACE_WORD}(?:\s*{_PLACE_WORD})*{_AMOUNT}", re.IGNORECASE
)
FRACTIONS = re.compile(rf"(?:\bfrac(?:tion(?:s|al)?)?\b\.?|\bX/X\b){_DIMENSIONS}{_AMOUNT}", re.IGNORECASE)
DECIMALS = re.compile(rf"\bdec(?:imals?)?\b\.?{_DIMENSIONS}{_AMOUNT}", re.IGNORECASE)
BARE_ANGLE = re.compile(rf"(?=.*[°']){_ANGLE}")
BARE = re.compile(_AMOUNT, re.IGNORECASE)

PROCESS = re.compile(rf"(?P<what>location|position|size)[\s=:]*(?P<amount>{NUMBER}){_UNIT}", re.IGNORECASE)
"""One amount of a `process` line."""
