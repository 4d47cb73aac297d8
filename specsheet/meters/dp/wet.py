"""Wet gas in a Venturi tube: the correction of ISO/TR 11583:2012, where it is asked for."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

import numpy as np

from specsheet.findings import Finding, Level
from specsheet.meters.dp.device import Lanes
from specsheet.meters.family import Array, Derivation, Element, Given, Limit, Request
from specsheet.methods import iso11583
from specsheet.sources import MEMORY, cite

_SOURCE = cite("isotr11583")
_LIMITS = f"{_SOURCE} ({MEMORY})"

DERIVATIONS: tuple[Derivation, ...] = (
    Derivation(
        "lockhart_martinelli",
        "X = (ml/mg) sqrt(ρ/ρl)",
        _SOURCE,
        ("liquid_ratio", "density", "liquid_density"),
    ),
    Derivation(
        "froude_number",
        "Frg = v sqrt(ρ/(ρl - ρ)) / sqrt(g D)",
        _SOURCE,
        ("velocity", "density", "liquid_density", "inside_diameter_hot"),
    ),
    Derivation(
        "throat_froude_number",
        "Frg,th = Frg / β^2.5",
        _SOURCE,
        ("froude_number", "diameter_ratio"),
    ),
    Derivation(
        "over_reading",
        "φ = sqrt(1 + CCh X + X²), CCh = (ρl/ρ)^n + (ρ/ρl)^n, n = max(0.583 - 0.18 β² "
        "- 0.578 exp(-0.8 Frg/H), 0.392 - 0.18 β²); the gas flow is C ε ... / φ with "
        "C = 1 - 0.0463 exp(-0.05 Frg,th) min(1, sqrt(X/0.016))",
        _SOURCE,
        ("lockhart_martinelli", "froude_number", "diameter_ratio", "density", "liquid_density"),
    ),
)


_NOTE = (
    "Wet gas: the flow stated is that of the gas alone; the differential pressure expected counts "
    "the over-reading. The liquid flow must be known from elsewhere."
)


def read(request: Request) -> tuple[dict[str, float], dict[str, Given], tuple[Finding, ...]]:
    """Return numbers, printed values and findings of the liquid carried by a gas."""
    tag = request.tag
    ratio, density = tag.si("meter.liquid_ratio"), tag.si("meter.liquid_density")
    dry = {"liquid_ratio": 0.0, "liquid_density": np.nan, "liquid_factor": 1.0}
    if not ratio:
        return dry, {}, ()
    if tag.phase != "gas" or density is None:
        wanted = "a gas as the phase" if tag.phase != "gas" else "meter.liquid_density"
        finding = Finding(
            Level.CAUTION,
            "wet-gas-incomplete",
            "meter.liquid_ratio",
            f"the wet-gas correction also needs {wanted}; it is left out",
            source=_SOURCE,
        )
        return dry, {}, (finding,)
    word = tag.text("meter.liquid_kind") or "hydrocarbon"
    numbers = {
        "liquid_ratio": ratio,
        "liquid_density": density,
        "liquid_factor": iso11583.LIQUIDS.get(word, 1.0),
    }
    values = {
        "liquid_ratio": Given(ratio, tag.origin("meter.liquid_ratio")),
        "liquid_density": Given(density, tag.origin("meter.liquid_density")),
    }
    return numbers, values, ()


def notes(numbers: Mapping[str, float]) -> tuple[str, ...]:
    """Return what the flow stated is in wet gas; nothing in dry gas and in liquid."""
    return (_NOTE,) if is_wet(numbers) else ()


def is_wet(numbers: Mapping[str, float]) -> bool:
    """Tell whether the correction applies."""
    return numbers.get("liquid_ratio", 0.0) > 0.0


def densities_of(lanes: Lanes) -> dict[str, Any]:
    """Return the densities of gas and liquid, as the equations name them [kg/m3]."""
    return {"gas_density": lanes.density, "liquid_density": lanes.numbers["liquid_density"]}


def flow_numbers(lanes: Lanes) -> dict[str, Array]:
    """Return X and the Froude number of the gas in the pipe, by glossary key."""
    densities = densities_of(lanes)
    return {
        "lockhart_martinelli": iso11583.lockhart_martinelli(
            liquid_ratio=lanes.numbers["liquid_ratio"], **densities
        ),
        "froude_number": iso11583.gas_froude_number(
            gas_mass_flow=lanes.mass_flow, inside_diameter=lanes.inside_diameter, **densities
        ),
    }


def numbers_of(lanes: Lanes) -> dict[str, Array]:
    """Return X, the Froude numbers and the over-reading, by glossary key."""
    found = flow_numbers(lanes)
    x, froude = found["lockhart_martinelli"], found["froude_number"]
    return {
        **found,
        "throat_froude_number": iso11583.throat_froude_number(
            froude_number=froude, diameter_ratio=lanes.diameter_ratio
        ),
        "over_reading": iso11583.over_reading(
            lockhart_martinelli=x,
            froude_number=froude,
            diameter_ratio=lanes.diameter_ratio,
            liquid_factor=lanes.numbers["liquid_factor"],
            **densities_of(lanes),
        ),
    }


def coefficient(lanes: Lanes) -> Array:
    """Return C in wet gas [-]."""
    found = numbers_of(lanes)
    result: Array = iso11583.discharge_coefficient(
        lockhart_martinelli=found["lockhart_martinelli"],
        throat_froude_number=found["throat_froude_number"],
    )
    return result


def uncertainty(lanes: Lanes) -> Array:
    """Return the relative expanded uncertainty of C and φ together [-]."""
    x = numbers_of(lanes)["lockhart_martinelli"]
    result: Array = iso11583.uncertainty(lockhart_martinelli=x)
    return result


def over_reading(lanes: Lanes) -> Array | float:
    """Return by what factor the gas flow reads high; 1 in dry gas and in liquid."""
    return numbers_of(lanes)["over_reading"] if is_wet(lanes.numbers) else 1.0


def more(lanes: Lanes) -> Mapping[str, Array]:
    """Return the wet-gas numbers to put out; none in dry gas and in liquid."""
    return numbers_of(lanes) if is_wet(lanes.numbers) else {}


@dataclass(frozen=True, slots=True)
class Validity:
    """Within what a correlation for wet gas holds.

    Attributes:
        froude: glossary key of the Froude number that bounds it.
        least_froude: its smallest value [-].
        least_density_ratio: smallest density of the gas by that of the liquid [-].
        ratio: smallest and largest β [-].
        source: citation.
    """

    froude: str
    least_froude: float
    least_density_ratio: float
    ratio: tuple[float, float]
    source: str


#: of the correlation for Venturi tubes
VENTURI = Validity("throat_froude_number", 3.0, 0.02, (0.4, 0.75), _LIMITS)


def limits(element: Element, holds: Validity) -> tuple[Limit, ...]:
    """Return the limits of a correlation; none in dry gas and in liquid."""
    if not is_wet(element.numbers):
        return ()

    def limit(
        key: str, low: float | None, high: float | None, code: str, driver: str = ""
    ) -> Limit:
        outside = "outside this the wet-gas correction does not hold; separate the liquid first"
        return Limit(key, low, high, Level.CAUTION, code, outside, holds.source, driver=driver)

    density = holds.least_density_ratio * element.numbers["liquid_density"]
    return (
        limit("lockhart_martinelli", None, 0.3, "wet-gas-liquid"),
        limit(holds.froude, holds.least_froude, None, "wet-gas-slow", "mass_flow"),
        limit("density", density, None, "wet-gas-density", "density"),
        limit("diameter_ratio", *holds.ratio, "wet-gas-ratio"),
    )
