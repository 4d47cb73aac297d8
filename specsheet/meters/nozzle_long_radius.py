"""Long radius nozzle (ISO 5167-3:2003, 5.2)."""

from __future__ import annotations

from specsheet.meters.dp import adapters, nozzle
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Device
from specsheet.meters.family import Derivation, Element, Limit, Request
from specsheet.methods import iso5167_3
from specsheet.sources import MEMORY, cite

_SOURCE = cite("iso5167-3", "5.2.6.2")


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    return standard_limits(
        source=f"{cite('iso5167-3', '5.2.6.1')} ({MEMORY})",
        diameter=(0.05, 0.63),
        ratio=(0.2, 0.8),
        reynolds=(1e4, 1e7),
    )


FAMILY = family(
    Device(
        key="nozzle_long_radius",
        source=_SOURCE,
        coefficient=adapters.of_ratio_and_reynolds(iso5167_3.long_radius_coefficient),
        coefficient_uncertainty=adapters.constant(0.02),
        expansibility=adapters.nozzle_expansibility,
        expansibility_uncertainty=adapters.nozzle_expansibility_uncertainty,
        loss=adapters.plate_loss,
        bounds=nozzle.bounds(0.2, 0.8),
        limits=_limits,
        describe=nozzle.describe(
            "Long radius nozzle: inlet a quarter of an ellipse, cylindrical throat of 0.6 d.",
            "Tappings D upstream of the inlet and D/2 downstream of it, never beyond the exit.",
        ),
        derivations=(
            Derivation(
                "discharge_coefficient",
                "C = 0.9965 - 0.00653 sqrt(10⁶ β/ReD)",
                _SOURCE,
                ("diameter_ratio", "reynolds_number"),
            ),
            *nozzle.DERIVATIONS,
        ),
        prepare=nozzle.prepare(1.5),
        shape=nozzle.SHAPE,
    )
)
