"""Cone meter (ISO 5167-5:2016)."""

from __future__ import annotations

from specsheet.meters.dp import adapters, body
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Bounds, Described, Device, Prepared, Shape
from specsheet.meters.family import Array, Derivation, Element, Limit, Request
from specsheet.methods import iso5167_5
from specsheet.sources import MEMORY, cite

_SOURCE = cite("iso5167-5")
_MEMORY = f"{_SOURCE} ({MEMORY})"


def _expansibility(ratio: Array, drop: Array, exponent: Array) -> Array:
    found: Array = iso5167_5.expansibility(
        diameter_ratio=ratio, pressure_drop_ratio=drop, isentropic_exponent=exponent
    )
    return found


def _share(ratio: Array) -> Array:
    found: Array = iso5167_5.cone_ratio(diameter_ratio=ratio)
    return found


def _ratio(share: Array) -> Array:
    found: Array = iso5167_5.diameter_ratio(cone_ratio=share)
    return found


def _prepare(request: Request) -> Prepared:
    wanted = body.calibration_wanted(
        request,
        "a cone is within ±5 % without calibration and ±0.5 % with it (common practice, no source)",
    )
    return body.prepare(request, tapping_share=1.0, findings=() if wanted is None else (wanted,))


def _bounds(request: Request, prepared: Prepared) -> Bounds:  # noqa: ARG001 - the protocol
    return Bounds(*iso5167_5.RATIOS, largest_differential=1e6)


def _describe(request: Request, element: Element) -> Described:  # noqa: ARG001 - the protocol
    notes = (
        "Cone hung in the middle of the pipe, apex upstream (26°), rear cone of 67.5°; low "
        f"pressure taken at the centre of the rear face, through the support ({MEMORY}).",
        "The meter tube belongs to the cone: it is calibrated and delivered as one piece.",
    )
    return Described({}, {"element": notes})


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    return standard_limits(
        source=_MEMORY,
        diameter=iso5167_5.DIAMETERS,
        ratio=iso5167_5.RATIOS,
        reynolds=iso5167_5.REYNOLDS,
    )


FAMILY = family(
    Device(
        key="cone",
        source=_SOURCE,
        coefficient=adapters.constant(iso5167_5.COEFFICIENT),
        coefficient_uncertainty=adapters.constant(iso5167_5.UNCERTAINTY),
        expansibility=_expansibility,
        expansibility_uncertainty=adapters.plate_expansibility_uncertainty,
        loss=adapters.loss_of_ratio(iso5167_5.loss_ratio),
        bounds=_bounds,
        limits=_limits,
        describe=_describe,
        derivations=(
            Derivation("discharge_coefficient", "C = 0.82 where not calibrated", _MEMORY),
            Derivation(
                "expansibility",
                "ε = 1 - (0.649 + 0.696 β⁴) Δp/(κ p)",
                _SOURCE,
                ("diameter_ratio", "differential_pressure", "isentropic_exponent", "pressure"),
            ),
            Derivation(
                "pressure_loss",
                "ϖ = (1.09 - 0.813 β) Δp",
                _SOURCE,
                ("differential_pressure", "diameter_ratio"),
            ),
            Derivation(
                "cone_diameter",
                "mass-flow equation solved for β, dc = D sqrt(1 - β²), rounded down to 0.01 mm",
                cite("iso5167-1", "annex A"),
                ("mass_flow", "differential_pressure_range", "inside_diameter_hot", "density"),
            ),
        ),
        prepare=_prepare,
        shape=Shape(
            entry="cone_diameter",
            term="cone_diameter",
            hot_term="",
            label="cone diameter",
            equation="β = sqrt(1 - (dc/D)²)",
            share=_share,
            ratio=_ratio,
            widens=False,
        ),
        assumed_expansion="as for orifice plates (ISO 5167-2:2003, 5.3.3.2), assumed",
    )
)
