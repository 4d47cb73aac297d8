"""Wet gas in an orifice plate: the over-reading of ISO/TR 11583:2012, where liquid is stated."""

from __future__ import annotations

from collections.abc import Mapping

from specsheet.meters.dp import wet
from specsheet.meters.dp.device import Lanes
from specsheet.meters.family import Array, Derivation
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

#: of the correlation for orifice plates
PLATE = wet.Validity("froude_number", 0.2, 0.014, (0.24, 0.73), _SOURCE)


def numbers_of(lanes: Lanes) -> dict[str, Array]:
    """Return X, the Froude number and the over-reading, by glossary key."""
    found = wet.flow_numbers(lanes)
    over = iso11583.plate_over_reading(**found, **wet.densities_of(lanes))
    return {**found, "over_reading": over}


def over_reading(lanes: Lanes) -> Array | float:
    """Return by what factor the gas flow reads high; 1 in dry gas and in liquid."""
    return numbers_of(lanes)["over_reading"] if wet.is_wet(lanes.numbers) else 1.0


def more(lanes: Lanes) -> Mapping[str, Array]:
    """Return the wet-gas numbers to put out; none in dry gas and in liquid."""
    return numbers_of(lanes) if wet.is_wet(lanes.numbers) else {}


def uncertainty(dry: Array) -> Array:
    """Return the relative expanded uncertainty of C and φ together [-], from that of C.

    That of φ is taken as for a Venturi tube at most, 3 % (from memory).
    """
    found: Array = (dry**2 + iso11583.PLATE_UNCERTAINTY**2) ** 0.5
    return found
