"""Flange ratings: the names of ratings, and the pressure each allows at a temperature.

ASME B16.5 by material group and class, EN 1092-1 by PN, both from the packs. Between the
temperatures of a table the pressure is linear (B16.5 permits it); outside, nothing is said.
"""

from __future__ import annotations

import math
import re
from bisect import bisect_left
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from itertools import pairwise
from typing import Any

from specsheet.line.material import Material
from specsheet.packs import table

_BAR = 1e5
_PSI = 6894.757293168361
_CELSIUS = 273.15
CLASS, PN = "Class", "PN"
#: kinds of material that stay tough in the cold
TOUGH = ("austenitic", "nickel")


@dataclass(frozen=True, slots=True)
class Rating:
    """A flange rating: its system ("Class" or "PN") and number."""

    system: str
    number: float

    def __str__(self) -> str:
        return f"{self.system} {self.number:g}"


@dataclass(frozen=True, slots=True)
class Allowed:
    """The pressure a rating allows at a temperature.

    Attributes:
        pressure: gauge [Pa]; None where it is not known.
        source: citation of the table.
        reason: why it is not known, in words, or "".
        forbidden: whether the standard itself ends below that temperature.
    """

    pressure: float | None
    source: str = ""
    reason: str = ""
    forbidden: bool = False


@dataclass(frozen=True, slots=True)
class _Curve:
    temperatures: tuple[float, ...]
    pressures: tuple[float, ...]
    source: str
    complete: bool


def parse_rating(text: str) -> Rating | None:
    """Read "Class 150", "CL300", "600#", "600 lb" or "PN 16"; None where it is none of them."""
    squeezed = re.sub(r"\s+", "", text).upper()
    found = re.fullmatch(r"(?:CLASS|CL\.?)(\d+)(?:LBS?|#)?", squeezed) or re.fullmatch(
        r"(\d+)(?:LBS?|#)", squeezed
    )
    if found and int(found.group(1)) in classes():
        return Rating(CLASS, float(found.group(1)))
    found = re.fullmatch(r"PN(\d+(?:\.\d+)?)", squeezed)
    if found and float(found.group(1)) in pressure_numbers():
        return Rating(PN, float(found.group(1)))
    return None


@cache
def classes() -> tuple[int, ...]:
    """Return the classes of ASME B16.5, rising."""
    groups = table("flanges_b165")["group"].values()
    return tuple(sorted({int(name) for group in groups for name in group["classes"]}))


@cache
def pressure_numbers() -> tuple[float, ...]:
    """Return the PN numbers of EN 1092-1, rising."""
    return tuple(float(number) for number in table("flanges_en1092")["ratings"])


@cache
def standard(system: str) -> str:
    """Return the standard of a system of ratings."""
    return str(table("flanges_b165" if system == CLASS else "flanges_en1092")["standard"])


@cache
def lowest_temperature(system: str) -> float:
    """Return the lowest temperature that the ratings of a system hold at [K]."""
    return float(table("flanges_b165" if system == CLASS else "flanges_en1092")["lowest"]) + (
        _CELSIUS
    )


@cache
def proposals() -> tuple[Rating, ...]:
    """Return the classes to choose from, rising; Class 400 is left out as unusual."""
    return tuple(Rating(CLASS, float(number)) for number in classes() if number != 400)


def allowed(rating: Rating, material: Material | None, temperature: float) -> Allowed:
    """Return the gauge pressure that a rating allows.

    Args:
        rating: class or PN.
        material: of the flange; None where it is not known.
        temperature: [K]

    Below the lowest temperature of B16.5, metals that stay tough keep the rating they have there
    (ASME B16.5: no greater than at -29 °C; from memory); for the others nothing is said.
    """
    if material is None:
        return Allowed(None, reason="the flange material is not known")
    tough = rating.system == CLASS and material.kind in TOUGH
    if temperature < lowest_temperature(rating.system) and not tough:
        floor = lowest_temperature(rating.system) - _CELSIUS
        reason = f"the ratings hold from {floor:.0f} °C up"
        return Allowed(None, standard(rating.system), reason)
    curve = _curve_of(rating, material)
    if curve is None:
        group = f"group {material.group}" if material.group else "no group of the standard"
        name = f"{rating} in {material.name} ({group})"
        return Allowed(None, standard(rating.system), f"there is no table for {name} here")
    return _on_curve(curve, temperature)


def _on_curve(curve: _Curve, temperature: float) -> Allowed:
    if temperature <= curve.temperatures[0]:
        return Allowed(curve.pressures[0], curve.source)
    above = bisect_left(curve.temperatures, temperature)
    if above < len(curve.temperatures):
        low, high = curve.temperatures[above - 1 : above + 1]
        first, second = curve.pressures[above - 1 : above + 1]
        share = (temperature - low) / (high - low)
        return Allowed(first + (second - first) * share, curve.source)
    last = curve.temperatures[-1] - _CELSIUS
    whose = "the standard" if curve.complete else "the table here"
    reason = f"{whose} ends at {last:.0f} °C for this material"
    return Allowed(None, curve.source, reason, forbidden=curve.complete)


def hottest(rating: Rating, material: Material | None, pressure: float) -> float | None:
    """Return the temperature up to which a rating allows a gauge pressure [K].

    Solved along the rating's table; None where the rating never allows it or is not known. Where
    the table ends before, its last temperature: beyond it nothing is said.
    """
    curve = _curve_of(rating, material)
    if curve is None or curve.pressures[0] < pressure:
        return None
    points = zip(curve.temperatures, curve.pressures, strict=True)
    for (low, first), (high, second) in pairwise(points):
        if second < pressure:
            return low + (high - low) * (first - pressure) / (first - second)
    return curve.temperatures[-1]


def _curve_of(rating: Rating, material: Material | None) -> _Curve | None:
    if material is None:
        return None
    if rating.system == CLASS:
        return _class_curve(material.group, int(rating.number))
    return _pn_curve(material.kind, rating.number)


@cache
def _class_curve(group: str, number: int) -> _Curve | None:
    raw = table("flanges_b165")["group"].get(group)
    if raw is None or str(number) not in raw["classes"]:
        return None
    from_memory = str(number) in raw.get("memory", ())
    unit = _PSI if raw.get("pressure_unit") == "psi" else _BAR
    return _Curve(
        tuple(_kelvin(value, raw) for value in raw["temperatures"]),
        tuple(value * unit for value in raw["classes"][str(number)]),
        f"{raw['source']} (from memory)" if from_memory else raw["source"],
        raw["complete"],
    )


def _kelvin(value: float, raw: Mapping[str, Any]) -> float:
    if raw.get("temperature_unit") == "degF":
        return (value - 32.0) / 1.8 + _CELSIUS
    return value + _CELSIUS


@cache
def _pn_curve(kind: str, number: float) -> _Curve | None:
    pack = table("flanges_en1092")
    rows = pack["group"].get(kind, {})
    pressures = rows.get("pn", {}).get(f"{number:g}")
    if pressures is None:
        if kind not in ("ferritic", "austenitic", "duplex"):
            return None
        room = pack["room"] + _CELSIUS
        return _Curve((room,), (number * _BAR,), pack["source"], complete=False)
    kelvin = tuple(value + _CELSIUS for value in rows["temperatures"])
    return _Curve(kelvin, tuple(value * _BAR for value in pressures), pack["source"], False)


def shell_test(rating: Rating, material: Material | None) -> float | None:
    """Return the gauge pressure of the hydrostatic test of a flange [Pa], None where not known.

    1.5 times the rating at 38 °C, rounded up to the next bar (ASME B16.5-2009, 2.6; from memory).
    """
    if rating.system != CLASS:
        return None
    cold = allowed(rating, material, 38.0 + _CELSIUS).pressure
    return None if cold is None else math.ceil(round(1.5 * cold / _BAR, 6)) * _BAR
