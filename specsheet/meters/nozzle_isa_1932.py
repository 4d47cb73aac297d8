"""ISA 1932 nozzle (ISO 5167-3:2003, 5.1)."""

from __future__ import annotations

from specsheet.meters.dp import adapters, nozzle
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Device
from specsheet.meters.family import Derivation, Element, Limit, Request
from specsheet.methods import iso5167_3
from specsheet.sources import MEMORY, cite

_SOURCE = cite("iso5167-3", "5.1.6.2")


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    ratio = float(element.values["diameter_ratio"].value)
    return standard_limits(
        source=f"{cite('iso5167-3', '5.1.6.1')} ({MEMORY})",
        diameter=(0.05, 0.5),
        ratio=(0.3, 0.8),
        reynolds=(7e4 if ratio < 0.44 else 2e4, 1e7),
    )


FAMILY = family(
    Device(
        key="nozzle_isa_1932",
        source=_SOURCE,
        coefficient=adapters.of_ratio_and_reynolds(iso5167_3.isa_1932_coefficient),
        coefficient_uncertainty=adapters.of_ratio(iso5167_3.isa_1932_uncertainty),
        expansibility=adapters.nozzle_expansibility,
        expansibility_uncertainty=adapters.nozzle_expansibility_uncertainty,
        loss=adapters.plate_loss,
        bounds=nozzle.bounds(0.3, 0.8),
        limits=_limits,
        describe=nozzle.describe(
            "ISA 1932 nozzle: inlet of two arcs, cylindrical throat of 0.3 d, recess at the exit "
            "edge; profile checked with a template.",
            "Corner tappings upstream and downstream.",
        ),
        derivations=(
            Derivation(
                "discharge_coefficient",
                "C = 0.9900 - 0.2262 β^4.1 - (0.00175 β² - 0.0033 β^4.15) (10⁶/ReD)^1.15",
                _SOURCE,
                ("diameter_ratio", "reynolds_number"),
            ),
            *nozzle.DERIVATIONS,
        ),
        prepare=nozzle.prepare(0.5),
        shape=nozzle.SHAPE,
    )
)
