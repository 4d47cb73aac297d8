"""Segmental orifice plate: an opening cut by a chord (Miller)."""

from __future__ import annotations

from specsheet.findings import Level
from specsheet.meters.dp import adapters, chord, plate
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Bounds, Described, Device, Lanes, Prepared
from specsheet.meters.family import Array, Derivation, Element, Limit, Request
from specsheet.methods import segmental_plate
from specsheet.sources import MEMORY, cite

_SOURCE = cite("miller")
_LIMITS = f"{_SOURCE} ({MEMORY})"


def _coefficient(lanes: Lanes) -> Array:
    found: Array = segmental_plate.discharge_coefficient(
        diameter_ratio=lanes.diameter_ratio,
        inside_diameter=lanes.numbers["inside_diameter"],
        taps=lanes.choices["taps"],
    )
    return found


def _prepare(request: Request) -> Prepared:
    read = plate.prepare(request)
    tag = request.tag
    place = tag.text("meter.opening_position") or ("top" if tag.phase == "liquid" else "bottom")
    taps = tag.text("meter.taps") or "flange"
    distance = 2.0 * 0.0254 if taps == "flange" else 1.5 * request.pipe.inside_diameter
    return Prepared(
        {**read.numbers, "tapping_distance": distance},
        {"taps": taps, "opening_position": place},
        read.values,
        read.findings,
    )


def _bounds(request: Request, prepared: Prepared) -> Bounds:  # noqa: ARG001 - the protocol
    return Bounds(smallest=0.35, largest=0.85)


def _describe(request: Request, element: Element) -> Described:
    common = plate.describe(request, element)
    place = element.choices["opening_position"]
    notes = (
        f"Segment open at the {place} of the pipe; its arc runs on the pipe's wall (0.98 D), "
        "the chord is sharp and level.",
        "Tappings on the side of the dam, away from the opening.",
        *common.notes["element"],
    )
    return Described(common.values, {"element": notes}, common.findings)


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    return (
        *standard_limits(
            source=_LIMITS, diameter=(0.1, 0.36), ratio=(0.35, 0.85), reynolds=(1e4, 1e6)
        ),
        *plate.bending_limits(level=Level.NOTE),
    )


FAMILY = family(
    Device(
        key="orifice_segmental",
        source=_SOURCE,
        coefficient=_coefficient,
        coefficient_uncertainty=adapters.constant(0.02),
        expansibility=adapters.plate_expansibility,
        expansibility_uncertainty=adapters.plate_expansibility_uncertainty,
        loss=adapters.plate_loss,
        bounds=_bounds,
        limits=_limits,
        describe=_describe,
        derivations=(
            Derivation(
                "discharge_coefficient",
                "C = a + b β^2.1 + c β⁸ + d β⁴/(1 - β⁴) + e β³; flange tappings from D = 100 mm: "
                "a = 0.6276, b = 0.0828, c = 0.2739, d = -0.0934, e = -0.1132",
                _SOURCE,
                ("diameter_ratio",),
            ),
            adapters.PLATE_EXPANSIBILITY,
            adapters.PLATE_LOSS,
            Derivation(
                "segment_height",
                "mass-flow equation solved for β, then h with β² = (acos(1 - 2 h/D) "
                "- 2 (1 - 2 h/D) sqrt(h/D - (h/D)²))/π; rounded up to 0.01 mm",
                "plane geometry",
                ("mass_flow", "differential_pressure_range", "inside_diameter_hot", "density"),
            ),
            *plate.STRENGTH,
        ),
        prepare=_prepare,
        shape=chord.shape("segment_height", "segment height"),
    )
)
