"""Venturi nozzle (ISO 5167-3:2003, 5.3)."""

from __future__ import annotations

import math

from specsheet.meters.dp import adapters, body, nozzle
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Device, Prepared
from specsheet.meters.family import Derivation, Element, Given, Limit, Request
from specsheet.methods import iso5167_3
from specsheet.sources import MEMORY, cite

_SOURCE = cite("iso5167-3", "5.3.4.2")


def _prepare(request: Request) -> Prepared:
    angle = request.tag.si("meter.divergent_angle") or math.radians(15.0)
    return body.prepare(
        request,
        tapping_share=0.5,
        numbers={"divergent_angle": angle},
        values={"divergent_angle": Given(angle, request.tag.origin("meter.divergent_angle"))},
    )


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    return standard_limits(
        source=f"{cite('iso5167-3', '5.3.4.1')} ({MEMORY})",
        diameter=(0.065, 0.5),
        ratio=(0.316, 0.775),
        reynolds=(1.5e5, 2e6),
        bore=("throat_diameter", 0.05),
    )


FAMILY = family(
    Device(
        key="nozzle_venturi",
        source=_SOURCE,
        coefficient=adapters.of_ratio(iso5167_3.venturi_nozzle_coefficient),
        coefficient_uncertainty=adapters.of_ratio(iso5167_3.venturi_nozzle_uncertainty),
        expansibility=adapters.nozzle_expansibility,
        expansibility_uncertainty=adapters.venturi_expansibility_uncertainty,
        loss=adapters.venturi_loss,
        bounds=nozzle.bounds(0.316, 0.775),
        limits=_limits,
        describe=nozzle.describe(
            "Venturi nozzle: inlet as an ISA 1932 nozzle, cylindrical throat of 0.7 d to 0.75 d, "
            "divergent of up to 30°.",
            "Corner tappings upstream; at least four tappings in the throat, joined to a ring.",
        ),
        derivations=(
            Derivation(
                "discharge_coefficient", "C = 0.9858 - 0.196 β^4.5", _SOURCE, ("diameter_ratio",)
            ),
            adapters.NOZZLE_EXPANSIBILITY,
            adapters.VENTURI_LOSS,
            adapters.THROAT,
            adapters.THROAT_HOT,
        ),
        prepare=_prepare,
        shape=nozzle.SHAPE,
    )
)
