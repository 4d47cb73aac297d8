"""Nominal pipe sizes and straight lengths, the two texts that are no plain quantities.

size     = "DN" number  |  "NPS" inches  |  inches ( "in" | '"' )
inches   = number | whole "-" or " " fraction | fraction
straight = number "D"   |  a length with its unit
"""

from __future__ import annotations

import re
from bisect import bisect
from collections.abc import Iterable

from specsheet.quantity.lookalike import plain, tidy
from specsheet.quantity.parse import NUMBER, parse
from specsheet.quantity.value import NominalSize, Quantity, Refusal, StraightLength
from specsheet.quantity.wording import refusal

#: DN -> NPS, paired as in ASME B36.10M and ISO 6708 (from memory)
SIZES: dict[int, str] = {
    6: "1/8",
    8: "1/4",
    10: "3/8",
    15: "1/2",
    20: "3/4",
    25: "1",
    32: "1 1/4",
    40: "1 1/2",
    50: "2",
    65: "2 1/2",
    80: "3",
    90: "3 1/2",
    100: "4",
    125: "5",
    150: "6",
    200: "8",
    250: "10",
    300: "12",
    350: "14",
    400: "16",
    450: "18",
    500: "20",
    550: "22",
    600: "24",
    650: "26",
    700: "28",
    750: "30",
    800: "32",
    850: "34",
    900: "36",
    950: "38",
    1000: "40",
    1050: "42",
    1100: "44",
    1150: "46",
    1200: "48",
    1300: "52",
    1400: "56",
    1500: "60",
    1600: "64",
    1700: "68",
    1800: "72",
    1900: "76",
    2000: "80",
}


_INCHES = re.compile(r"(?:([0-9]+)(?:[ -]+|$))?(?:([0-9]+)/([1-9][0-9]*))?")


def _inches(text: str) -> float | None:
    """Return "1 1/2", "1-1/2", "3/4" or "1.5" as a number, or None."""
    match = _INCHES.fullmatch(text)
    if match is not None and text:
        whole, top, bottom = match.groups()
        return int(whole or 0) + (int(top) / int(bottom) if top else 0.0)
    return float(text) if re.fullmatch(r"[0-9]*\.[0-9]+", text) else None


_DN = re.compile(r"dn ?([0-9]+)", re.IGNORECASE)
_NPS = re.compile(r"(nps ?)?([0-9./ -]*[0-9])( ?(?:in|inch|inches|\"))?", re.IGNORECASE)
_STRAIGHT = re.compile(rf"({NUMBER}) ?(?:x ?)?D")
_DIAMETERS = re.compile(rf"({NUMBER}) ?(?:d|DN|ID|diameters?|pipe diameters)")
_BY_INCHES = {inches: dn for dn, nps in SIZES.items() if (inches := _inches(nps)) is not None}


def parse_size(text: str) -> NominalSize | Refusal:
    """Read a nominal pipe size: "DN 150", "NPS 6", '6"', "NPS 1 1/2", "1.5 in".

    A bare number is refused, since 6 is a size in both series.
    """
    echo = tidy(text)
    ready = re.sub(r"\s+", " ", plain(echo))[:80]
    if match := _DN.fullmatch(ready):
        return _listed(int(match[1]), echo)
    match = _NPS.fullmatch(ready)
    if match is None or (inches := _inches(match[2].strip())) is None:
        return _refuse_size(echo, ready)
    if not (match[1] or match[3]):
        return _refuse_bare(echo, inches)
    dn = _BY_INCHES.get(inches)
    if dn is None:
        write = tuple(f"NPS {SIZES[_BY_INCHES[known]]}" for known in _around(_BY_INCHES, inches))
        return _size_refusal(echo, f"NPS {match[2].strip()} is no listed size", write)
    return NominalSize(dn, SIZES[dn], echo)


def _listed(dn: int, echo: str) -> NominalSize | Refusal:
    if dn in SIZES:
        return NominalSize(dn, SIZES[dn], echo)
    write = tuple(f"DN {known:g}" for known in _around(SIZES, dn))
    return _size_refusal(echo, f"DN {dn} is no listed size", write)


def _around(known: Iterable[float], wanted: float) -> list[float]:
    """Return the next smaller and the next larger of the known sizes."""
    sizes = sorted(known)
    place = bisect(sizes, wanted)
    return sizes[max(place - 1, 0) : place + 1]


def _refuse_bare(echo: str, inches: float) -> Refusal:
    write = [f"DN {inches:g}"] if inches in SIZES else []
    if inches in _BY_INCHES:
        write.append(f"NPS {SIZES[_BY_INCHES[inches]]}")
    return _size_refusal(echo, "DN or NPS is missing", tuple(write))


def _refuse_size(echo: str, ready: str) -> Refusal:
    length = parse(ready, "length")
    if isinstance(length, Quantity):
        dn = round(length.value * 1000.0)
        write = (f"DN {dn}",) if dn in SIZES else ()
        return _size_refusal(echo, "a nominal size is a name, not a length", write)
    from difflib import get_close_matches

    known = [f"DN {dn}" for dn in SIZES] + [f"NPS {nps}" for nps in SIZES.values()]
    near = tuple(get_close_matches(ready.upper(), known, n=2, cutoff=0.7))
    return _size_refusal(echo, 'it is read as "DN 150" or "NPS 6"', near)


def _size_refusal(echo: str, why: str, write: tuple[str, ...]) -> Refusal:
    return refusal("a nominal size", echo, why, write)


def parse_straight(text: str) -> StraightLength | Refusal:
    """Read a straight length of pipe: "20 D" (inside diameters) or a length ("3.5 m")."""
    echo = tidy(text)
    ready = plain(echo)
    match = _STRAIGHT.fullmatch(ready)
    if match is not None:
        multiple = parse(match[1], "dimensionless")
        if isinstance(multiple, Quantity) and multiple.value >= 0.0:
            return StraightLength(multiple.value, None, echo)
        return _straight_refusal(echo, "the least value is 0 D", ())
    length = parse(ready, "length")
    if isinstance(length, Quantity):
        return StraightLength(None, length.value, echo)
    if re.fullmatch(NUMBER, ready):
        why = "D or the unit of a length is missing"
        return _straight_refusal(echo, why, (f"{ready} D", f"{ready} m"))
    if number := _DIAMETERS.fullmatch(ready):
        return _straight_refusal(echo, "inside diameters are written D", (f"{number[1]} D",))
    if number := re.fullmatch(r"(.*[0-9]) ?D", ready):
        multiple = parse(number[1], "dimensionless")
        offers = multiple.write if isinstance(multiple, Refusal) else ()
        return _straight_refusal(echo, "one plain number is read", tuple(f"{n} D" for n in offers))
    return _straight_refusal(echo, 'it is read as "20 D" or "3.5 m"', length.write)


def _straight_refusal(echo: str, why: str, write: tuple[str, ...]) -> Refusal:
    return refusal("a straight length", echo, why, write)
