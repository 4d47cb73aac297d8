"""Words of the sheet: units as they are printed, labels, and values that are not quantities."""

from __future__ import annotations

import re
from collections.abc import Mapping
from datetime import date
from functools import lru_cache

from specsheet.fields import TERMS, entry
from specsheet.findings import Level, Origin
from specsheet.quantity.value import Quantity
from specsheet.sheet.model import NOTHING

#: words for a level, for one and for several
LEVELS = {
    Level.STOP: ("stop", "stops"),
    Level.CAUTION: ("caution", "cautions"),
    Level.NOTE: ("note", "notes"),
}

#: mark of each origin, the same in every output, and the line that explains them
MARKS = {Origin.GIVEN: "●", Origin.DERIVED: "○", Origin.ASSUMED: "□", Origin.TYPICAL: "◊"}
LEGEND = "● given   ○ derived   □ assumed   ◊ typical, for the bidder to confirm"

_NUMBER = re.compile(
    r"([-+−]?\d+(?:[ \u00a0\u202f]\d{3})*(?:\.\d+)?(?:[eE][-+]?\d+)?)\s*(.*)", re.DOTALL
)
_WATER = re.compile(r"H2O")


@lru_cache(maxsize=2_000)
def unit(text: str) -> str:
    """Return a unit as it is printed ("kg/m3" gives "kg/m³", "degC" gives "°C", "1" gives "")."""
    if text == "1":
        return ""
    water = _WATER.sub("H₂O", text)
    raised = re.sub(r"(?<=[A-Za-z])([23])(?=$|[/ (·])", _raise, water)
    for plain, printed in (("degC", "°C"), ("degF", "°F"), ("(base)", " (base)")):
        raised = raised.replace(plain, printed)
    if raised.startswith("u"):
        raised = f"µ{raised[1:]}"
    return (
        "°"
        if raised == "deg"
        else raised.replace("/kg/K", "/(kg·K)").replace("W/m/K", "W/(m·K)").replace("Pa s", "Pa·s")
    )


def _raise(found: re.Match[str]) -> str:
    return {"2": "²", "3": "³"}[found.group(1)]


@lru_cache(maxsize=4_000)
def split(typed: str) -> tuple[str, str]:
    """Return the number, digit for digit, and the unit of a typed quantity.

    A text that does not start with a number comes back whole, with an empty unit.
    """
    found = _NUMBER.fullmatch(typed.strip())
    if found is None:
        return typed, ""
    return found.group(1).strip(), unit(found.group(2).strip())


def typed(text: str) -> str:
    """Return a typed quantity with its own digits and its unit as printed."""
    number, printed = split(text)
    return f"{number} {printed}".strip()


def value(held: object) -> str:
    """Return an entry's value in words; a quantity as typed."""
    if held is None:
        return NOTHING
    if isinstance(held, Quantity):
        return typed(held.text)
    if isinstance(held, bool):
        return "yes" if held else "no"
    if isinstance(held, date):
        return held.isoformat()
    if isinstance(held, tuple):
        return ", ".join(str(item) for item in held) or NOTHING
    if isinstance(held, Mapping):
        parts = (f"{str(key).replace('_', ' ')} {number}" for key, number in held.items())
        return ", ".join(parts) or NOTHING
    return str(getattr(held, "text", held)) or NOTHING


def capital(text: str) -> str:
    """Return ``text`` with its first letter as a capital."""
    return text[:1].upper() + text[1:]


def from_key(key: str) -> str:
    """Return words for a key that the glossary lacks."""
    return capital(key.rpartition(".")[2].replace("_", " "))


def label(key: str) -> str:
    """Return the glossary's words for a term or a path."""
    if key in TERMS:
        return TERMS[key].label
    try:
        return entry(key).label
    except KeyError:
        return from_key(key)


def symbol(key: str) -> str:
    """Return the glossary's symbol of a term or a path, "" where it has none."""
    if key in TERMS:
        return TERMS[key].symbol
    try:
        return entry(key).symbol
    except KeyError:
        return ""


def named_of(key: str, *, gas: bool) -> tuple[str, str]:
    """Return label and symbol of a term, as a gas or a liquid has them."""
    of_gas = TERMS[key].of_gas if key in TERMS and gas else None
    return of_gas or (label(key), symbol(key))


def named(text: str, sign: str) -> str:
    """Return a label with its symbol behind it, where the label does not end in it already."""
    return text if text.endswith(sign) else f"{text}  {sign}"


def count(number: int, level: Level) -> str:
    """Return "1 stop", "2 cautions"."""
    one, several = LEVELS[level]
    return f"{number} {one if number == 1 else several}"
