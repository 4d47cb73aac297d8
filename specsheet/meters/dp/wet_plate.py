"""Wet gas in an orifice plate: the over-reading of ISO/TR 11583:2012, where liquid is stated."""

from __future__ import annotations

from collections.abc import Mapping

from specsheet.findings import Level
from specsheet.meters.dp import wet
from specsheet.meters.dp.device import Lanes
from specsheet.meters.family import Array, Derivation, Element, Limit
from specsheet.methods import iso11583
from specsheet.sources import cite

#: equations and limits were seen as public code quotes them, not in the report itself
_SOURCE = cite("isotr11583", "clause 7 (second hand)")

DERIVATIONS: tuple[Derivation, ...] = (
    *(item for item in wet.DERIVATIONS if item.key in ("lockhart_martinelli", "froude_number")),
    Derivation(
        "over_reading",
        "φ = sqrt(1 + CCh X + X²), CCh = (ρl/ρ)^n + (ρ/ρl)^n, n = 0.214 below Frg = 1.5, "
        "(1/√2 - 0.3/√Frg)² above; the gas flow is that of the dry equation by φ",
        _SOURCE,
        ("lockhart_martinelli", "froude_number", "density", "liquid_density"),
    ),
)

NOTE = (
    "Wet gas: the flow stated is that of the gas alone; the differential pressure expected counts "
    "the over-reading. The liquid flow must be known from elsewhere."
)


def numbers_of(lanes: Lanes) -> dict[str, Array]:
    """Return X, the Froude number and the over-reading, by glossary key."""
    of = lanes.numbers
    densities = {"gas_density": lanes.density, "liquid_density": of["liquid_density"]}
    x = iso11583.lockhart_martinelli(liquid_ratio=of["liquid_ratio"], **densities)
    froude = iso11583.gas_froude_number(
        gas_mass_flow=lanes.mass_flow, inside_diameter=lanes.inside_diameter, **densities
    )
    return {
        "lockhart_martinelli": x,
        "froude_number": froude,
        "over_reading": iso11583.plate_over_reading(
            lockhart_martinelli=x, froude_number=froude, **densities
        ),
    }


def over_reading(lanes: Lanes) -> Array | float:
    """Return by what factor the gas flow reads high; 1 in dry gas and in liquid."""
    return numbers_of(lanes)["over_reading"] if wet.is_wet(lanes.numbers) else 1.0


def more(lanes: Lanes) -> Mapping[str, Array]:
    """Return the wet-gas numbers to put out; none in dry gas and in liquid."""
    return numbers_of(lanes) if wet.is_wet(lanes.numbers) else {}


def limits(element: Element) -> tuple[Limit, ...]:
    """Return the limits of the correlation; none in dry gas and in liquid."""
    if not wet.is_wet(element.numbers):
        return ()
    outside = "outside this the wet-gas correction does not hold; separate the liquid first"
    density = 0.014 * element.numbers["liquid_density"]

    def limit(
        key: str, low: float | None, high: float | None, code: str, driver: str = ""
    ) -> Limit:
        return Limit(key, low, high, Level.CAUTION, code, outside, _SOURCE, driver=driver)

    return (
        limit("lockhart_martinelli", None, 0.3, "wet-gas-liquid"),
        limit("froude_number", 0.2, None, "wet-gas-slow", "mass_flow"),
        limit("density", density, None, "wet-gas-density", "density"),
        limit("diameter_ratio", 0.24, 0.73, "wet-gas-ratio"),
    )


def uncertainty(dry: Array) -> Array:
    """Return the relative expanded uncertainty of C and φ together [-], from that of C.

    That of φ is taken as for a Venturi tube at most, 3 % (from memory).
    """
    found: Array = (dry**2 + iso11583.PLATE_UNCERTAINTY**2) ** 0.5
    return found
