"""The service of a line: what flows, how hot, under what pressure, and what that implies.

Facts for the material notes and the cautions, from the tag's statements and its substances.
"""

from __future__ import annotations

import re
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from typing import Any

from specsheet.fluid import names
from specsheet.fluid.state import FluidResult
from specsheet.line.demand import demands_of
from specsheet.packs import table
from specsheet.tag import Tag

#: partial pressure of hydrogen sulfide from which a service is sour [Pa], ISO 15156-2, 7.1.2
SOUR = 300.0
_ACIDIC = 5.0


@dataclass(frozen=True)
class Service:
    """The facts of a service.

    Attributes:
        fractions: substance key -> mole fraction; 1 for a pure substance, NaN where not known.
        words: hazards, kind of fluid and derived words ("sour", "chlorides", "abrasive", "acid",
            "demineralised_water", "boiler_water", "potable_water", "sewage", "amine").
        phase: "liquid" or "gas", as stated.
        hottest, coldest: highest and lowest temperature, design and ambient included [K]; None
            where none is known.
        pressure: highest absolute pressure, design included [Pa]; None where none is known.
        chlorides: mass fraction [-], or None.
        sulfide_pressure: partial pressure of hydrogen sulfide [Pa], or None.
    """

    fractions: Mapping[str, float]
    words: frozenset[str]
    phase: str
    hottest: float | None
    coldest: float | None
    pressure: float | None
    chlorides: float | None
    sulfide_pressure: float | None

    def has(self, word: str) -> bool:
        """Tell whether a substance or a word belongs to the service."""
        return word in self.fractions or word in self.words


def service_facts(tag: Tag, fluid: FluidResult | None = None) -> Service:
    """Return the facts of a tag's service."""
    fractions = _fractions(tag)
    demands = demands_of(tag, fluid).every
    warm = [demand.temperature for demand in demands]
    cold = [*warm, *_stated(tag, "design.minimum_temperature")]
    gauges = [demand.pressure for demand in demands]
    pressure = max(gauges) + tag.atmospheric_pressure if gauges else None
    sulfide = _sulfide_pressure(tag, fractions, pressure)
    return Service(
        fractions=fractions,
        words=frozenset(_words(tag, sulfide)),
        phase=tag.phase,
        hottest=max(warm, default=None),
        coldest=min(cold, default=None),
        pressure=pressure,
        chlorides=tag.si("fluid.chlorides"),
        sulfide_pressure=sulfide,
    )


def _stated(tag: Tag, path: str) -> tuple[float, ...]:
    value = tag.si(path)
    return () if value is None else (value,)


def substance_key(text: str) -> str:
    """Return the key of a substance by any of its names; else the text as a key of its own."""
    found = names.find(text)
    if found is not None:
        return found.key
    key = re.sub(r"[^0-9a-z]+", "_", text.lower()).strip("_")
    return _other_names().get(key, key)


@cache
def _other_names() -> Mapping[str, str]:
    packs = (table("ignition")["substance"], table("compatibility")["substance"])
    return {
        re.sub(r"[^0-9a-z]+", "_", name.lower()).strip("_"): key
        for pack in packs
        for key, row in pack.items()
        for name in row.get("names", ())
    }


def _fractions(tag: Tag) -> dict[str, float]:
    kind = tag.text("fluid.kind")
    if kind == "mixture":
        return _mixture(tag)
    found: dict[str, float] = {}
    if kind in ("substance", "slurry") and tag.text("fluid.substance"):
        found[substance_key(tag.text("fluid.substance"))] = 1.0
    if kind == "solution":
        found["water"] = float("nan")
        if tag.text("fluid.solute"):
            found[substance_key(tag.text("fluid.solute"))] = float("nan")
    if kind == "seawater":
        found["water"] = float("nan")
    if kind == "humid_air":
        found["air"] = 1.0
    sulfide = tag.si("fluid.hydrogen_sulfide")
    if sulfide:
        found["hydrogen_sulfide"] = sulfide
    return found


def _mixture(tag: Tag) -> dict[str, float]:
    stated = {
        substance_key(name): float(value)
        for name, value in tag.table("fluid.mixture").items()
        if isinstance(value, int | float) and value > 0.0
    }
    if tag.text("fluid.basis") == "mass":
        stated = _by_mole(stated)
    total = sum(stated.values())
    found = {key: value / total for key, value in stated.items()} if total > 0.0 else {}
    sulfide = tag.si("fluid.hydrogen_sulfide")
    if sulfide:
        found["hydrogen_sulfide"] = sulfide
    return found


def _by_mole(by_mass: Mapping[str, float]) -> dict[str, float]:
    known = names.substances()
    if any(key not in known for key in by_mass):
        return dict.fromkeys(by_mass, float("nan"))
    return {key: value / known[key].molar_mass for key, value in by_mass.items()}


def _sulfide_pressure(
    tag: Tag, fractions: Mapping[str, float], pressure: float | None
) -> float | None:
    fraction = fractions.get("hydrogen_sulfide")
    if fraction is None or pressure is None or tag.phase != "gas" or fraction != fraction:
        return None
    return fraction * pressure


def _words(tag: Tag, sulfide_pressure: float | None) -> set[str]:
    words = {word.strip().lower().replace(" ", "_") for word in tag.words("fluid.hazards")}
    words.add(tag.text("fluid.kind"))
    if sulfide_pressure is not None and sulfide_pressure >= SOUR:
        words.add("sour")
    if tag.si("fluid.chlorides"):
        words.add("chlorides")
    if tag.flag("fluid.abrasive"):
        words.add("abrasive")
    acidity = tag.si("fluid.ph")
    if acidity is not None and acidity < _ACIDIC:
        words.add("acid")
    if tag.flag("require.potable_water"):
        words.add("potable_water")
    words.add(_named(tag))
    return {word for word in words if word}


def _named(tag: Tag) -> str:
    """Return the service that the name of the fluid tells, or the conductivity; "" for none."""
    name = re.sub(r"[^0-9a-z]+", " ", tag.text("fluid.name").lower())
    substance = tag.text("fluid.substance") if tag.text("fluid.kind") == "substance" else ""
    conductivity = tag.si("fluid.electrical_conductivity")
    for word, row in table("compatibility")["named"].items():
        of = row.get("of")
        if of and (tag.phase != "liquid" or not substance or substance_key(substance) != of):
            continue
        pure = conductivity is not None and conductivity < row.get("conductivity_below", 0.0)
        if pure or any(f" {known.lower()} " in f" {name} " for known in row["names"]):
            return str(word)
    return ""


@cache
def hazards() -> Mapping[str, Mapping[str, Any]]:
    """Return the rows of the pack of substances that burn or poison, by key."""
    rows: Mapping[str, Mapping[str, Any]] = table("ignition")["substance"]
    return rows
