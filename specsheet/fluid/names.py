"""Substances and solutes by name: chemical and trade-neutral names, formula and CAS number.

The list stands in ``profiles/fluids``. Needs no numerical library, so a form may search it while
it starts.
"""

from __future__ import annotations

import difflib
import re
from collections.abc import Iterable, Mapping
from dataclasses import dataclass
from functools import cache
from typing import Any

from specsheet import packs


@dataclass(frozen=True, slots=True)
class Substance:
    """A pure substance with its constants.

    Attributes:
        key: key in the pack and in ``fluid.mixture`` ("carbon_dioxide").
        name: what the sheet calls it ("carbon dioxide").
        formula: molecular formula, or "".
        cas: CAS number, or "".
        names: other names accepted.
        molar_mass: [kg/mol]
        critical_temperature: [K]
        critical_pressure: [Pa]
        acentric_factor: [-]
        lowest_temperature, highest_temperature: limits of the equation of state [K].
        highest_pressure: limit of the equation of state [Pa].
        equation: name of the equation of state in the fluid library.
    """

    key: str
    name: str
    formula: str
    cas: str
    names: tuple[str, ...]
    molar_mass: float
    critical_temperature: float
    critical_pressure: float
    acentric_factor: float
    lowest_temperature: float
    highest_temperature: float
    highest_pressure: float
    equation: str


def normal(text: str) -> str:
    """Return a name without case, spaces and punctuation ("Carbon dioxide" -> "carbondioxide")."""
    return re.sub(r"[^0-9a-z]", "", text.casefold())


@cache
def substances() -> Mapping[str, Substance]:
    """Return all substances by key."""
    return {key: _substance(key, raw) for key, raw in packs.table("fluids/substances").items()}


def _substance(key: str, raw: Mapping[str, Any]) -> Substance:
    return Substance(
        key=key,
        name=raw["name"],
        formula=raw["formula"],
        cas=raw["cas"],
        names=tuple(raw["names"]),
        molar_mass=raw["molar_mass"] / 1e3,
        critical_temperature=raw["critical"][0],
        critical_pressure=raw["critical"][1] * 1e6,
        acentric_factor=raw["acentric"],
        lowest_temperature=raw["limits"][0],
        highest_temperature=raw["limits"][1],
        highest_pressure=raw["limits"][2] * 1e6,
        equation=raw["equation"],
    )


@cache
def _index() -> Mapping[str, str]:
    """Normalised name -> key. A key or name wins over a formula shared by isomers."""
    found: dict[str, str] = {}
    for key, item in substances().items():
        for text in (key, item.name, *item.names):
            found.setdefault(normal(text), key)
    for key, item in substances().items():
        for text in (item.cas, item.equation):
            if text:
                found.setdefault(normal(text), key)
    for formula, keys in _isomers().items():
        plain = [key for key in keys if key.startswith("n_") or key == "hydrogen"]
        if len(keys) == 1 or len(plain) == 1:
            found.setdefault(formula, (plain or keys)[0])
    return found


def _isomers() -> Mapping[str, list[str]]:
    """Normalised formula -> keys. One that several share means the normal isomer, or nothing."""
    found: dict[str, list[str]] = {}
    for key, item in substances().items():
        if item.formula:
            found.setdefault(normal(item.formula), []).append(key)
    return found


def find(text: str) -> Substance | None:
    """Return the substance of that key, name, formula or CAS number, or None."""
    key = _index().get(normal(text))
    return None if key is None else substances()[key]


def nearest(text: str, count: int = 3) -> tuple[str, ...]:
    """Return the names nearest to a text that names no substance, best first."""
    return closest(text, _index(), lambda hit: substances()[_index()[hit]].name, count)


def closest(text: str, index: Iterable[str], name: Any, count: int) -> tuple[str, ...]:
    """Return the display names of the entries of ``index`` nearest to ``text``, without repeats."""
    hits = difflib.get_close_matches(normal(text), list(index), n=3 * count, cutoff=0.6)
    return tuple(dict.fromkeys(name(hit) for hit in hits))[:count]


def search(text: str, limit: int = 20) -> tuple[Substance, ...]:
    """Return the substances whose key, names, formula or CAS number hold the text.

    Those that start with it come first. An empty text returns the first of the list.
    """
    words = {
        key: (key, item.name, *item.names, item.formula, item.cas)
        for key, item in substances().items()
    }
    return tuple(substances()[key] for key in ranked(text, words, limit))


def ranked(text: str, words: Mapping[str, Iterable[str]], limit: int) -> tuple[str, ...]:
    """Return the keys whose words hold a text: equal first, then starting, then holding it.

    Args:
        text: what was typed so far.
        words: key -> every word it is known by.
        limit: at most so many.
    """
    wanted = normal(text)
    found: list[tuple[int, str]] = []
    for key, known in words.items():
        plain = [normal(word) for word in known]
        if wanted in plain:
            found.append((0, key))
        elif any(word.startswith(wanted) for word in plain):
            found.append((1, key))
        elif any(wanted in word for word in plain):
            found.append((2, key))
    return tuple(key for _, key in sorted(found)[:limit])
