"""Classical Venturi tube: as cast, machined or welded convergent (ISO 5167-4:2003)."""

from __future__ import annotations

import math

import numpy as np

from specsheet.findings import Finding, Level
from specsheet.meters.dp import adapters, body, nozzle, wet
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Bounds, Described, Device, Lanes, Prepared
from specsheet.meters.family import Array, Derivation, Element, Given, Limit, Request
from specsheet.methods import iso5167_4
from specsheet.methods.iso5167_4 import VENTURIS
from specsheet.sources import PRACTICE, cite

_SOURCE = cite("iso5167-4", "5.5")

_USUAL = "machined convergent"

#: usual coefficients in the trade, below the standard's (common practice, no source)
_BAND = (0.93, 0.97)


def _coefficient(lanes: Lanes) -> Array:
    if wet.is_wet(lanes.numbers):
        return wet.coefficient(lanes)
    make = VENTURIS[lanes.choices["construction"]]
    return np.full(lanes.mass_flow.shape, make.discharge_coefficient)


def _coefficient_uncertainty(lanes: Lanes) -> Array:
    if wet.is_wet(lanes.numbers):
        return wet.uncertainty(lanes)
    found: Array = iso5167_4.uncertainty(
        construction=lanes.choices["construction"], reynolds_number=lanes.reynolds_number
    )
    return found


def _prepare(request: Request) -> Prepared:
    tag = request.tag
    stated = tag.text("meter.construction")
    construction = stated if stated in VENTURIS else _USUAL
    angle = tag.si("meter.divergent_angle") or math.radians(7.0)
    numbers = {
        "divergent_angle": angle,
        "tapping_distance": _tapping_distance(request),
        **body.expansion(request, "meter.throat_material"),
    }
    values = {"divergent_angle": Given(angle, tag.origin("meter.divergent_angle"))}
    carried, printed, findings = wet.read(request)
    return Prepared(
        {**numbers, **carried}, {"construction": construction}, {**values, **printed}, findings
    )


def _tapping_distance(request: Request) -> float:
    """Return the usual distance of the tappings: half a pipe upstream, the cone, half a throat.

    For β = 0.6 and a convergent of 21°: 0.5 D + 0.4 D / (2 tan 10.5°) + 0.3 D.
    """
    cone = 0.4 / (2.0 * math.tan(math.radians(10.5)))
    return (0.8 + cone) * request.pipe.inside_diameter


def _bounds(request: Request, prepared: Prepared) -> Bounds:  # noqa: ARG001
    make = VENTURIS[prepared.choices["construction"]]
    return Bounds(*make.ratio, largest_differential=1e6)


def _describe(request: Request, element: Element) -> Described:  # noqa: ARG001
    construction = element.choices["construction"]
    make = VENTURIS[construction]
    notes = {
        "element": (
            *wet.notes(element.numbers),
            f"Classical Venturi tube, {construction}: entrance cylinder of D, convergent of 21° "
            "(±1°), cylindrical throat of length d, divergent of 7° to 15°.",
            "At least four tappings in each plane, joined by a ring or triple-T.",
            "Measure the throat in four directions; no diameter may differ by more than 0.1 %.",
        )
    }
    low, high = _BAND
    band = Finding(
        Level.NOTE,
        "coefficient-band",
        "meter.discharge_coefficient",
        f"the standard's coefficient is {make.discharge_coefficient:g}; the trade often meets "
        f"{low:g} to {high:g} below the standard's Reynolds numbers ({PRACTICE}). Have the tube "
        "calibrated where it matters",
        source=PRACTICE,
    )
    return Described({}, notes, (band,))


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    make = VENTURIS[element.choices["construction"]]
    found = standard_limits(
        source=cite("iso5167-4", make.clause),
        diameter=make.diameter,
        ratio=make.ratio,
        reynolds=make.reynolds,
    )
    return (*found, *wet.limits(element, wet.VENTURI))


_DERIVATIONS = (
    Derivation(
        "discharge_coefficient",
        "C = 0.984 as cast, 0.995 machined convergent, 0.985 welded sheet iron",
        _SOURCE,
    ),
    adapters.NOZZLE_EXPANSIBILITY,
    adapters.VENTURI_LOSS,
    adapters.THROAT,
    adapters.THROAT_HOT,
    *wet.DERIVATIONS,
)

FAMILY = family(
    Device(
        key="venturi_tube",
        source=_SOURCE,
        coefficient=_coefficient,
        coefficient_uncertainty=_coefficient_uncertainty,
        expansibility=adapters.nozzle_expansibility,
        expansibility_uncertainty=adapters.venturi_expansibility_uncertainty,
        loss=adapters.venturi_loss,
        bounds=_bounds,
        limits=_limits,
        describe=_describe,
        derivations=_DERIVATIONS,
        prepare=_prepare,
        over_reading=wet.over_reading,
        more=wet.more,
        shape=nozzle.SHAPE,
    )
)
