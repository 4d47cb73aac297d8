"""Conical entrance orifice plate for very low Reynolds numbers (ISO/TR 15377:1998)."""

from __future__ import annotations

import math

from specsheet.findings import Level, Origin
from specsheet.meters.dp import adapters, plate
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Bounds, Described, Device, Prepared
from specsheet.meters.family import Array, Derivation, Element, Given, Limit, Request
from specsheet.methods import iso15377
from specsheet.sources import MEMORY, cite

_SOURCE = cite("isotr15377")
_MEMORY = f"{_SOURCE} ({MEMORY})"


def _expansibility(ratio: Array, drop: Array, exponent: Array) -> Array:
    plate_value = adapters.plate_expansibility(ratio, drop, exponent)
    return 0.5 * (plate_value + adapters.nozzle_expansibility(ratio, drop, exponent))


def _expansibility_uncertainty(ratio: Array, drop: Array, exponent: Array) -> Array:
    found: Array = iso15377.conical_expansibility_uncertainty(
        expansibility=_expansibility(ratio, drop, exponent)
    )
    return found


def _bounds(request: Request, prepared: Prepared) -> Bounds:  # noqa: ARG001 - the protocol
    return Bounds(smallest=0.1, largest=0.316, target=0.25, smallest_bore=0.006)


def _describe(request: Request, element: Element) -> Described:
    common = plate.describe(request, element)
    bore = element.numbers["machined"]
    values = {
        **common.values,
        "bevel_angle": Given(math.radians(45.0), Origin.DERIVED, _MEMORY),
        "edge_thickness": Given(0.021 * bore, Origin.DERIVED, _MEMORY),
    }
    notes = (
        "Entrance cone of 45° (±1°), 0.084 d deep, then a cylinder of 0.021 d; corner tappings "
        f"({_MEMORY}).",
        *common.notes["element"],
    )
    return Described(values, {"element": notes}, common.findings)


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    ratio = float(element.values["diameter_ratio"].value)
    return (
        *standard_limits(
            source=_MEMORY,
            diameter=(0.025, 0.5),
            ratio=(0.1, 0.316),
            reynolds=(80.0, 2e5 * ratio),
            bore=("bore_diameter", 0.006),
        ),
        *plate.bending_limits(level=Level.NOTE),
    )


FAMILY = family(
    Device(
        key="orifice_conical_entrance",
        source=_SOURCE,
        coefficient=adapters.constant(iso15377.CONICAL_COEFFICIENT),
        coefficient_uncertainty=adapters.constant(0.02),
        expansibility=_expansibility,
        expansibility_uncertainty=_expansibility_uncertainty,
        loss=adapters.plate_loss,
        bounds=_bounds,
        limits=_limits,
        describe=_describe,
        derivations=(
            Derivation("discharge_coefficient", "C = 0.734", _SOURCE),
            Derivation(
                "expansibility",
                "mean of ε of a sharp plate (ISO 5167-2) and ε of a nozzle (ISO 5167-3)",
                _MEMORY,
                ("diameter_ratio", "pressure_ratio", "isentropic_exponent"),
            ),
            adapters.PLATE_LOSS,
            adapters.BORE,
            Derivation("bevel_angle", "45° (±1°)", _MEMORY),
            Derivation("edge_thickness", "e = 0.021 d", _MEMORY, ("bore_diameter",)),
            *plate.DERIVATIONS,
        ),
        prepare=plate.prepare,
        shape=plate.HOLED,
    )
)
