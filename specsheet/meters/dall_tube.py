"""Dall tube: high differential, low loss, no standard coefficient."""

from __future__ import annotations

import numpy as np

from specsheet.meters.dp import adapters, body, nozzle
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Described, Device, Lanes, Prepared
from specsheet.meters.family import Array, Derivation, Element, Limit, Request
from specsheet.sources import MEMORY

_SOURCE = f"literature ({MEMORY}); calibration decides"


def _prepare(request: Request) -> Prepared:
    names = ("discharge_coefficient", "loss_ratio", "coefficient_uncertainty")
    figures = {name: float(body.typical(request, name).value) for name in names}
    wanted = body.calibration_wanted(request, "a Dall tube has no standard coefficient")
    return body.prepare(
        request,
        tapping_share=0.5,
        numbers={f"typical_{name}": value for name, value in figures.items()},
        findings=() if wanted is None else (wanted,),
    )


def _coefficient(lanes: Lanes) -> Array:
    return np.full(lanes.mass_flow.shape, lanes.numbers["typical_discharge_coefficient"])


def _uncertainty(lanes: Lanes) -> Array:
    return np.full(lanes.mass_flow.shape, lanes.numbers["typical_coefficient_uncertainty"])


def _loss(lanes: Lanes, coefficient: Array) -> Array:  # noqa: ARG001 - does not depend on it
    return np.full(lanes.mass_flow.shape, lanes.numbers["typical_loss_ratio"])


def _describe(request: Request, element: Element) -> Described:  # noqa: ARG001 - the protocol
    notes = (
        "Dall tube: short, steep convergent, annular slot at the throat, short divergent; one "
        "tapping upstream, one in the slot.",
        "Higher differential and lower loss than a Venturi tube of the same throat; not for "
        "liquids with solids, which fill the slot, nor for flow either way.",
    )
    return Described({}, {"element": notes})


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    return standard_limits(
        source=_SOURCE,
        diameter=(0.15, None),
        ratio=(0.3, 0.8),
        reynolds=(5e5, None),
    )


FAMILY = family(
    Device(
        key="dall_tube",
        source=_SOURCE,
        coefficient=_coefficient,
        coefficient_uncertainty=_uncertainty,
        expansibility=adapters.nozzle_expansibility,
        expansibility_uncertainty=adapters.venturi_expansibility_uncertainty,
        loss=_loss,
        bounds=nozzle.bounds(0.3, 0.8),
        limits=_limits,
        describe=_describe,
        derivations=(
            Derivation(
                "discharge_coefficient", "typical of the make; that of a calibration wins", _SOURCE
            ),
            adapters.NOZZLE_EXPANSIBILITY,
            Derivation(
                "pressure_loss",
                "typical share of Δp (profile)",
                _SOURCE,
                ("differential_pressure",),
            ),
            adapters.THROAT,
            adapters.THROAT_HOT,
        ),
        prepare=_prepare,
        shape=nozzle.SHAPE,
        assumed_expansion="as for a Venturi tube (ISO 5167-4:2003, 5.7.2), assumed",
    )
)
