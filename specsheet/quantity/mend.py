"""Numbers written in ways that are not read, and the same number written plainly.

Text only: nothing here knows kinds. Each rule looks for one habit (decimal comma, range,
tolerance, "approx.") and offers the text without it; the caller reads the offer again, so that
several habits in one text are mended one after the other.
"""

from __future__ import annotations

import re
from collections.abc import Callable
from typing import NamedTuple

from specsheet.quantity.parse import NUMBER


class Mend(NamedTuple):
    """What is wrong with the number, and the texts that could have been meant."""

    why: str
    offers: tuple[str, ...] = ()


_QUALIFIER = re.compile(
    r"(?:~|<=?|>=?|=|max\.?|min\.?|ca\.?|approx\.?|about|circa|up to|at least|at most)\s*"
    r"(?=[0-9.+-])(.+)",
    re.IGNORECASE,
)
_TOLERANCE = re.compile(r"([^±]*?)\s*(?:±|\+/-|\+-)\s*([0-9][0-9.,]*)\s*(.*)")
_SIGNS = re.compile(r"([+-]+)\s*([0-9.].*)")
_RANGE = re.compile(
    rf"({NUMBER})(?:\s*|\s*([^0-9\s][^0-9]*?)\s+)(?:-|\.{{2,3}}|to\b|/(?=[0-9]))\s*({NUMBER})"
    r"(?:\s*(\D.*))?"
)
_TIGHT_RANGE = re.compile(rf"({NUMBER})([A-Za-z%()]+)-({NUMBER})\s*([A-Za-z%].*)")
_EXPONENT = re.compile(rf"({NUMBER})\s*[eE]\s*([+-]?[0-9]+)(?:\s*(\D.*))?")
_POWER = re.compile(r"(?:(\S+?)\s*[x*]\s*)?10\s*(?:\^|\*\*)\s*([+-]?[0-9]+)\s*(.*)")
_TO_ONE = re.compile(r"(\S*[0-9])\s*:\s*1")
_FRACTION = re.compile(r"(?:([0-9]+)[ -]+)?([0-9]+)/(2|4|8|16|32|64)(?![0-9])\s*(\D.*)?")
_POINT = re.compile(r"([+-]?[0-9]+)\.(?:\s+(.*)|([A-Za-z%].*))?")
_BLOB = re.compile(
    r"([+-]?[0-9][0-9.,'_ ]*[0-9]|[+-]?,[0-9]+)(?![0-9])([eE][+-]?[0-9]+)?\s*(\D.*)?"
)
_GROUPS = r"[0-9]{1,3}(?:%s[0-9]{3})+"


def _joined(number: str, unit: str | None) -> str:
    return f"{number} {unit.strip()}" if unit and unit.strip() else number


def _not_finite(text: str) -> Mend | None:
    if re.match(r"[+-]?(?:nan|inf|infinity)\b|∞", text, re.IGNORECASE):
        return Mend("a finite number is wanted")
    return None


def _qualifier(text: str) -> Mend | None:
    match = _QUALIFIER.fullmatch(text)
    if match is None:
        return None
    return Mend("one plain value is read, without a word or sign before it", (match[1],))


def _tolerance(text: str) -> Mend | None:
    match = _TOLERANCE.fullmatch(text)
    if match is None or not match[1]:
        return None
    value, _, unit = match.groups()
    offer = value if re.search(r"[A-Za-z%]", value) else _joined(value, unit)
    return Mend("one value is read, without a tolerance", (offer,))


def _signs(text: str) -> Mend | None:
    match = _SIGNS.fullmatch(text)
    if match is None or text[1] in "0123456789.":
        return None
    signs, rest = match.groups()
    if len(signs) == 1:
        return Mend("the sign stands directly before the number", (f"{signs}{rest}",))
    return Mend("one sign is read, not two", (rest, f"-{rest}"))


def _power(text: str) -> Mend | None:
    match = _POWER.fullmatch(text)
    if match is None:
        return None
    mantissa, exponent, unit = match.groups()
    number = f"{mantissa or 1}e{exponent}"
    return Mend("a power of ten is written with e", (_joined(number, unit),))


def _exponent(text: str) -> Mend | None:
    match = _EXPONENT.fullmatch(text)
    if match is None:
        return None
    mantissa, exponent, unit = match.groups()
    offer = _joined(f"{mantissa}e{exponent}", unit)
    return Mend("an exponent stands directly after its number", (offer,))


def _to_one(text: str) -> Mend | None:
    match = _TO_ONE.fullmatch(text)
    return None if match is None else Mend("a proportion is one number", (match[1],))


def _fraction(text: str) -> Mend | None:
    match = _FRACTION.fullmatch(text)
    if match is None:
        return None
    whole, top, bottom, unit = match.groups()
    number = int(whole or 0) + int(top) / int(bottom)
    return Mend("a fraction is written as a decimal number", (_joined(f"{number:.12g}", unit),))


def _range(text: str) -> Mend | None:
    match = _RANGE.fullmatch(text) or _TIGHT_RANGE.fullmatch(text)
    if match is None:
        return None
    low, unit, high, last = match.groups()
    offers = (_joined(low, unit or last), _joined(high, last or unit))
    return Mend("one value is read, not a range", offers)


def _bare_point(text: str) -> Mend | None:
    match = _POINT.fullmatch(text)
    if match is None:
        return None
    number, spaced, joined = match.groups()
    return Mend("a decimal point has figures after it", (_joined(number, spaced or joined),))


def _separators(text: str) -> Mend | None:
    match = _BLOB.fullmatch(text)
    if match is None:
        return None
    blob, exponent, unit = match.groups()
    if not re.search("[,'_ ]|[.].*[.]", blob):
        return None
    sign = blob[0] if blob[0] in "+-" else ""
    numbers = _without_separators(blob[len(sign) :])
    if not numbers:
        return Mend("one number is read, with a point as the decimal mark")
    why = "the decimal mark is a point, and figures are not grouped"
    return Mend(why, tuple(_joined(f"{sign}{n}{exponent or ''}", unit) for n in numbers))


def _without_separators(blob: str) -> tuple[str, ...]:
    """Return the numbers that a blob of figures and separators can mean; none if it is unclear."""
    if re.fullmatch(_GROUPS % "[ '_]" + "(?:[.,][0-9]+)?", blob):
        blob = re.sub("[ '_]", "", blob)
        return (blob.replace(",", "."),)
    if re.search("[ '_]", blob):
        return ()
    if re.fullmatch(_GROUPS % "," + r"\.[0-9]+", blob) or re.fullmatch(_GROUPS % ",", blob):
        grouped = blob.replace(",", "")
        single = blob.count(",") == 1 and "." not in blob
        return (blob.replace(",", "."), grouped) if single else (grouped,)
    if re.fullmatch(_GROUPS % r"\." + "(?:,[0-9]+)?", blob):
        return (blob.replace(".", "").replace(",", "."),)
    if re.fullmatch("[0-9]*,[0-9]+", blob):
        return (f"{blob.split(',')[0] or '0'}.{blob.split(',')[1]}",)
    return ()


_RULES: tuple[Callable[[str], Mend | None], ...] = (
    _not_finite,
    _qualifier,
    _tolerance,
    _signs,
    _power,
    _exponent,
    _to_one,
    _fraction,
    _range,
    _bare_point,
    _separators,
)


def mend(text: str) -> Mend | None:
    """Return the first habit found in a text (as :func:`lookalike.plain` leaves it), or None."""
    for rule in _RULES:
        found = rule(text)
        if found is not None:
            return found
    return None
