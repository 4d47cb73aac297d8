"""The joined unit table: spelling -> unit for each kind, and conversion to and from SI.

Conversion within a kind only. A base volume flow is scaled, never carried to another base: that
needs the gas (:mod:`specsheet.fluid`). A gauge pressure is scaled, never made absolute.
"""

from __future__ import annotations

import re
from dataclasses import replace
from functools import lru_cache

from specsheet.fields import KINDS
from specsheet.quantity.flow_units import FLOW_UNITS
from specsheet.quantity.plain_units import PLAIN_UNITS
from specsheet.quantity.pressure_units import PRESSURE_UNITS
from specsheet.quantity.unit import Unit

#: kind -> its units, the usual ones first; no unions
UNITS: dict[str, tuple[Unit, ...]] = {
    kind: tuple(replace(row, kind=kind) for row in rows)
    for kind, rows in (PLAIN_UNITS | PRESSURE_UNITS | FLOW_UNITS).items()
}


def _members(kind: str) -> tuple[str, ...]:
    return KINDS[kind].members or (kind,)


#: kind or union -> spelling -> unit
SPELLINGS: dict[str, dict[str, Unit]] = {
    kind: {
        spelling: row
        for member in _members(kind)
        for row in UNITS[member]
        for spelling in (row.name, *row.aliases)
    }
    for kind in KINDS
}

_FOLDS = (
    (re.compile(r"\s*/\s*"), "/"),
    (re.compile(r"\s*([()])\s*"), r"\1"),
    (re.compile(r"(?<=[A-Za-z])\^(?=-?[1-9])"), ""),
    (re.compile(r"(?<=[A-Za-z])[.*](?=[A-Za-z])"), " "),
    (re.compile(r"\bdeg (?=[CFR])"), "deg"),
    (re.compile(r"/\(([A-Za-z]+) ([A-Za-z]+)\)"), r"/\1/\2"),
    (re.compile(r"/(?:hr|hour)\b"), "/h"),
    (re.compile(r"/(?:sec|second)\b"), "/s"),
    (re.compile(r"/(?:day)\b"), "/d"),
    (re.compile(r" ?(?:\(gauge\)|\bgauge| g)$"), "(g)"),
    (re.compile(r" ?(?:\((?:abs|absolute)\)|\b(?:abs|absolute)| a)$"), "(a)"),
    (re.compile(r"^([A-Za-z]+)-1$"), r"1/\1"),
    (re.compile(r" ([A-Za-z]+)-1\b"), r"/\1"),
    (re.compile(r" ([A-Za-z]+)-([23])\b"), r"/\1\2"),
    (re.compile(r"\s+"), " "),
)


def fold(spelling: str) -> str:
    """Return a spelling in the table's style: "kg / m^3" is "kg/m3", "J/(kg K)" is "J/kg/K"."""
    for pattern, replacement in _FOLDS:
        spelling = pattern.sub(replacement, spelling)
    return spelling.strip()


@lru_cache(maxsize=2048)
def find(kind: str, spelling: str) -> Unit | None:
    """Return the unit of a kind (or union) that a spelling means, or None.

    Raises:
        KeyError: there is no such kind (a mistake of ours, not of the user).
    """
    known = SPELLINGS[kind]
    return known.get(spelling) or known.get(fold(spelling))


def _unit(kind: str, spelling: str) -> Unit:
    found = find(kind, spelling or KINDS[kind].shown)
    if found is None:
        raise KeyError(f"{spelling!r} is no unit of the kind {kind!r}")
    return found


def to_si(value: float, kind: str, unit: str) -> float:
    """Return the SI value of a number in ``unit`` ("" for the kind's shown unit).

    Raises:
        KeyError: the kind is unknown, or has no such unit.
    """
    row = _unit(kind, unit)
    return (value + row.offset) * row.factor


def from_si(value: float, kind: str, unit: str = "") -> float:
    """Return an SI value in ``unit`` ("" for the kind's shown unit); numpy arrays pass too.

    Raises:
        KeyError: the kind is unknown, or has no such unit.
    """
    row = _unit(kind, unit)
    return value / row.factor - row.offset


def units(kind: str) -> tuple[str, ...]:
    """Return the canonical spellings of a kind's units, the usual ones first.

    Raises:
        KeyError: there is no such kind.
    """
    return tuple(row.name for member in _members(kind) for row in UNITS[member])


def kinds_of(unit: str) -> tuple[str, ...]:
    """Return the kinds (no unions) that have a unit of this spelling; empty when none has."""
    return tuple(kind for kind in UNITS if unit and find(kind, unit) is not None)
