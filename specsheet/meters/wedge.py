"""Wedge meter (ISO 5167-6:2019)."""

from __future__ import annotations

from specsheet.findings import Level
from specsheet.meters.dp import adapters, body, chord
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Bounds, Described, Device, Prepared
from specsheet.meters.family import Derivation, Element, Limit, Request
from specsheet.methods import iso5167_6, segment
from specsheet.sources import cite

_SOURCE = cite("iso5167-6")


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
        coefficient=adapters.of_ratio(iso5167_6.discharge_coefficient),
        coefficient_uncertainty=adapters.constant(iso5167_6.UNCERTAINTY),
        expansibility=adapters.nozzle_expansibility,
        expansibility_uncertainty=adapters.venturi_expansibility_uncertainty,
        loss=adapters.loss_of_ratio(iso5167_6.loss_ratio),
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
        shape=chord.shape("wedge_height", "opening below the wedge"),
        assumed_expansion="as for a Venturi tube (ISO 5167-4:2003, 5.7.2), assumed",
    )
)
