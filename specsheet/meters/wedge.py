"""Wedge meter (ISO 5167-6:2019)."""

from __future__ import annotations

from specsheet.findings import Level
from specsheet.meters.dp import adapters, body
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Bounds, Described, Device, Lanes, Prepared, Shape
from specsheet.meters.family import Array, Derivation, Element, Limit, Request
from specsheet.methods import iso5167_6, segment
from specsheet.sources import cite

_SOURCE = cite("iso5167-6")


def _coefficient(lanes: Lanes) -> Array:
    found: Array = iso5167_6.discharge_coefficient(diameter_ratio=lanes.diameter_ratio)
    return found


def _loss(lanes: Lanes, coefficient: Array) -> Array:  # noqa: ARG001 - does not depend on it
    found: Array = iso5167_6.loss_ratio(diameter_ratio=lanes.diameter_ratio)
    return found


def _share(ratio: Array) -> Array:
    found: Array = segment.height_of_ratio(diameter_ratio=ratio)
    return found


def _ratio(share: Array) -> Array:
    found: Array = segment.diameter_ratio(height_ratio=share)
    return found


def _prepare(request: Request) -> Prepared:
    wanted = body.calibration_wanted(
        request, "a wedge is within ±4 % without calibration", Level.NOTE
    )
    return body.prepare(request, tapping_share=2.0, findings=() if wanted is None else (wanted,))


def _bounds(request: Request, prepared: Prepared) -> Bounds:  # noqa: ARG001 - the protocol
    low, high = (float(segment.diameter_ratio(height_ratio=h)) for h in iso5167_6.HEIGHTS)
    return Bounds(low, high, target=0.6, largest_differential=1e6)


def _describe(request: Request, element: Element) -> Described:  # noqa: ARG001
    notes = [
        "V-shaped wedge of 90° (±2°) across the pipe, opening below or beside it so that solids "
        "and condensate pass.",
        "Both tappings on the side of the wedge, at equal distances.",
    ]
    if request.tag.phase == "liquid" and request.tag.flag("fluid.abrasive"):
        notes.append(
            "Abrasive liquid: harden the apex; diaphragm seals of equal make on both taps."
        )
    return Described({}, {"element": tuple(notes)})


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    low, high = (float(segment.diameter_ratio(height_ratio=h)) for h in iso5167_6.HEIGHTS)
    return standard_limits(
        source=_SOURCE,
        diameter=iso5167_6.DIAMETERS,
        ratio=(low, high),
        reynolds=iso5167_6.REYNOLDS,
    )


FAMILY = family(
    Device(
        key="wedge",
        source=_SOURCE,
        coefficient=_coefficient,
        coefficient_uncertainty=adapters.constant(iso5167_6.UNCERTAINTY),
        expansibility=adapters.nozzle_expansibility,
        expansibility_uncertainty=adapters.venturi_expansibility_uncertainty,
        loss=_loss,
        bounds=_bounds,
        limits=_limits,
        describe=_describe,
        derivations=(
            Derivation("discharge_coefficient", "C = 0.77 - 0.09 β", _SOURCE, ("diameter_ratio",)),
            adapters.NOZZLE_EXPANSIBILITY,
            Derivation(
                "pressure_loss",
                "ϖ = (1.09 - 0.79 β) Δp",
                _SOURCE,
                ("differential_pressure", "diameter_ratio"),
            ),
            Derivation(
                "wedge_height",
                "mass-flow equation solved for β, then the opening h of that share of the circle; "
                "rounded up to 0.01 mm",
                cite("iso5167-1", "annex A"),
                ("mass_flow", "differential_pressure_range", "inside_diameter_hot", "density"),
            ),
        ),
        prepare=_prepare,
        shape=Shape(
            entry="wedge_height",
            term="wedge_height",
            hot_term="",
            label="opening below the wedge",
            equation="β² = (acos(1 - 2 h/D) - 2 (1 - 2 h/D) sqrt(h/D - (h/D)²)) / π",
            share=_share,
            ratio=_ratio,
        ),
        assumed_expansion="as for a Venturi tube (ISO 5167-4:2003, 5.7.2), assumed",
    )
)
