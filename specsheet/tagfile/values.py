"""One TOML value -> what the entry holds, or a refusal. Also from plain text, for defaults."""

from __future__ import annotations

import math
import re
from collections.abc import Callable, Mapping
from datetime import date, datetime
from typing import Any

import tomli

from specsheet import quantity
from specsheet.fields import KINDS, PLAIN_KINDS, Entry
from specsheet.quantity.value import Refusal
from specsheet.tag import Value
from specsheet.tagfile.words import (
    Number,
    came,
    did_you_mean,
    listed,
    nearest,
    number_text,
    printable,
)

_NUMBER = re.compile(r"[+-]?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?", re.ASCII)
_ISO_DATE = re.compile(r"\d{4}-\d{2}-\d{2}")


def from_toml(entry: Entry, raw: object) -> Value | Refusal:
    """Return what an entry holds, from its TOML value.

    Quantities become :class:`~specsheet.quantity.value.Quantity`; a nominal size and a straight
    length are checked and stay the text typed. A blank text is the caller's to leave out.
    """
    if entry.words and isinstance(raw, str) and raw.strip() in entry.words:
        return raw.strip()
    return _READERS.get(entry.kind, _quantity)(entry, raw)


def from_text(entry: Entry, text: str) -> Value | Refusal:
    """Return what an entry holds, from its text as a form or a default gives it."""
    raw = to_toml(entry, text)
    return raw if isinstance(raw, Refusal) else from_toml(entry, raw)


def to_toml(entry: Entry, text: str) -> Any | Refusal:
    """Return the TOML value that states ``text`` under an entry: the type its kind is kept in.

    A text that is no value of that type is returned as it is, so that the reader can refuse it
    and nothing typed is lost. Only lists and tables that cannot be taken apart are refused.
    """
    text = text.strip()
    if text in entry.words:
        return text
    if entry.kind == "boolean":
        return {"true": True, "yes": True, "false": False, "no": False}.get(text.casefold(), text)
    if entry.kind == "integer":
        return int(text) if re.fullmatch(r"[+-]?\d{1,18}", text) else text
    if entry.kind == "date" and _ISO_DATE.fullmatch(text):
        found = _iso(text)
        return text if found is None else found
    if entry.kind == "list" and not text.startswith("["):
        return [part for part in (item.strip() for item in text.split(",")) if part]
    if entry.kind in ("list", "fractions", "units"):
        braced = text if text[:1] in ("[", "{") else "{" + text + "}"
        return _literal(entry, braced)
    return text


def is_number(text: str) -> bool:
    """Tell whether a text is a decimal number as TOML writes one."""
    return _NUMBER.fullmatch(text.strip()) is not None


def _literal(entry: Entry, text: str) -> Any | Refusal:
    try:
        return tomli.loads(f"value = {text}", parse_float=Number)["value"]
    except (ValueError, RecursionError):
        return Refusal(_wanted(entry, _NAMES[entry.kind], text))


def _iso(text: str) -> date | None:
    try:
        return date.fromisoformat(text)
    except ValueError:
        return None


def _written(entry: Entry) -> str:
    """Return the example of an entry as a line of the file."""
    quoted = entry.kind not in ("boolean", "integer", "date", "list", "fractions", "units")
    return f'{entry.key} = "{entry.example}"' if quoted else f"{entry.key} = {entry.example}"


def _wanted(entry: Entry, wanted: str, raw: object) -> str:
    example = f"; write {_written(entry)}" if entry.example else ""
    return f"{wanted} was wanted, {came(raw)} came{example}"


_NAMES = {
    "text": "a text in quotes",
    "choice": "one of the choices",
    "boolean": "true or false (no quotes)",
    "integer": "a whole number (no quotes)",
    "date": "a date (year-month-day)",
    "list": "a list of texts",
    "fractions": "a table of numbers",
    "units": "a table of units",
}


def _refused(entry: Entry, raw: object) -> Refusal:
    return Refusal(_wanted(entry, _NAMES[entry.kind], raw))


def _text(entry: Entry, raw: object) -> Value | Refusal:
    if isinstance(raw, str):
        return raw
    if isinstance(raw, int | float) and not isinstance(raw, bool):
        typed = printable(number_text(raw))
        wanted = f'a text was wanted, {came(raw)} came; write {entry.key} = "{typed}"'
        return Refusal(wanted)
    return _refused(entry, raw)


def _choice(entry: Entry, raw: object) -> Value | Refusal:
    if not isinstance(raw, str):
        return Refusal(f"one of {listed(entry.choices)} was wanted, {came(raw)} came")
    if raw in entry.choices:
        return raw
    close = nearest(raw, entry.choices)
    hint = f'; did you mean "{close}"?' if close else ""
    return Refusal(f"one of {listed(entry.choices)} was wanted, {came(raw)} came{hint}")


def _boolean(entry: Entry, raw: object) -> Value | Refusal:
    return raw if isinstance(raw, bool) else _refused(entry, raw)


def _integer(entry: Entry, raw: object) -> Value | Refusal:
    return raw if isinstance(raw, int) and not isinstance(raw, bool) else _refused(entry, raw)


def _date(entry: Entry, raw: object) -> Value | Refusal:
    if isinstance(raw, date) and not isinstance(raw, datetime):
        return raw
    found = _iso(raw.strip()) if isinstance(raw, str) and _ISO_DATE.fullmatch(raw.strip()) else None
    return _refused(entry, raw) if found is None else found


def _list(entry: Entry, raw: object) -> Value | Refusal:
    if not isinstance(raw, list) or not all(isinstance(item, str) for item in raw):
        return _refused(entry, raw)
    for item in raw:
        if entry.choices and item not in entry.choices:
            return Refusal(f'"{printable(item)}" is not known; {did_you_mean(item, entry.choices)}')
    return tuple(raw)


def _fractions(entry: Entry, raw: object) -> Value | Refusal:
    if not isinstance(raw, dict) or not raw:
        return _refused(entry, raw)
    found: dict[str, float | str] = {}
    for key, value in raw.items():
        number = _fraction(value)
        if isinstance(number, Refusal):
            return Refusal(f"{printable(key)}: {number.message}")
        found[key] = number
    return found


def _fraction(value: object) -> float | Refusal:
    if isinstance(value, str):
        parsed = quantity.parse(value, "ratio")
        return parsed if isinstance(parsed, Refusal) else parsed.value
    if isinstance(value, bool) or not isinstance(value, int | float):
        return Refusal(f"a number was wanted, {came(value)} came")
    try:
        number = float(value)
    except OverflowError:
        number = math.inf
    if not math.isfinite(number):
        return Refusal(f"a finite number was wanted, {came(value)} came")
    return number


def _units(entry: Entry, raw: object) -> Value | Refusal:
    if not isinstance(raw, dict) or not raw:
        return _refused(entry, raw)
    for kind, unit in raw.items():
        if kind not in KINDS:
            hint = did_you_mean(kind, KINDS)
            return Refusal(f'"{printable(kind)}" is no kind of quantity; {hint}')
        known = quantity.units(kind)
        if unit not in known:
            return Refusal(f"{kind}: one of {listed(known)} was wanted, {came(unit)} came")
    return dict(raw)


def _nominal_size(entry: Entry, raw: object) -> Value | Refusal:
    return _checked(entry, raw, quantity.parse_size, "a nominal size")


def _straight_length(entry: Entry, raw: object) -> Value | Refusal:
    return _checked(entry, raw, quantity.parse_straight, "a straight length")


def _checked(
    entry: Entry, raw: object, parse: Callable[[str], object], wanted: str
) -> Value | Refusal:
    if not isinstance(raw, str):
        return Refusal(_wanted(entry, f"{wanted}, as a text in quotes,", raw))
    parsed = parse(raw)
    return parsed if isinstance(parsed, Refusal) else raw


def _quantity(entry: Entry, raw: object) -> Value | Refusal:
    if isinstance(raw, str):
        return quantity.parse(raw, entry.kind)
    number = isinstance(raw, int | float) and not isinstance(raw, bool)
    if not number:
        return Refusal(_wanted(entry, f"{KINDS[entry.kind].label}, as a text in quotes,", raw))
    typed = printable(number_text(raw))  # type: ignore[arg-type]
    if entry.kind == "dimensionless":
        return quantity.parse(typed, entry.kind)
    if not math.isfinite(raw):  # type: ignore[arg-type]
        return Refusal(_wanted(entry, f"{KINDS[entry.kind].label}, with its unit,", raw))
    unit = entry.example.partition(" ")[2]
    return Refusal(
        f"{KINDS[entry.kind].label}, with its unit, was wanted, {came(raw)} came; "
        f'write {entry.key} = "{typed} {unit}" (if {unit} is meant)'
    )


_READERS: Mapping[str, Callable[[Entry, object], Value | Refusal]] = {
    "text": _text,
    "choice": _choice,
    "boolean": _boolean,
    "integer": _integer,
    "date": _date,
    "list": _list,
    "fractions": _fractions,
    "units": _units,
    "nominal_size": _nominal_size,
    "straight_length": _straight_length,
}
assert set(_READERS) == set(PLAIN_KINDS)
