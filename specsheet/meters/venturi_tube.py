"""Classical Venturi tube: as cast, machined or welded convergent (ISO 5167-4:2003)."""

from __future__ import annotations

import math

import numpy as np

from specsheet.findings import Finding, Level
from specsheet.line.material import find_material
from specsheet.meters.dp import adapters, wet
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Bounds, Described, Device, Lanes, Prepared, Shape
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


def _loss(lanes: Lanes, coefficient: Array) -> Array:  # noqa: ARG001 - does not depend on it
    found: Array = iso5167_4.loss_ratio(
        diameter_ratio=lanes.diameter_ratio, divergent_angle=lanes.numbers["divergent_angle"]
    )
    return found


def _prepare(request: Request) -> Prepared:
    tag = request.tag
    stated = tag.text("meter.construction")
    construction = stated if stated in VENTURIS else _USUAL
    angle = tag.si("meter.divergent_angle") or math.radians(7.0)
    material = find_material(tag.text("meter.throat_material"))
    temperature = float(request.stream.temperature[request.normal])
    numbers = {"divergent_angle": angle, "tapping_distance": _tapping_distance(request)}
    if material is not None:
        numbers["element_expansion"] = material.expansion(temperature)
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
    carried: tuple[str, ...] = ()
    if wet.is_wet(element.numbers):
        carried = (
            "Wet gas: the flow stated is that of the gas alone; the differential pressure "
            "expected counts the over-reading. The liquid flow must be known from elsewhere.",
        )
    notes = {
        "element": (
            *carried,
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
    return (*found, *wet.limits(element)) if wet.is_wet(element.numbers) else found


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
        loss=_loss,
        bounds=_bounds,
        limits=_limits,
        describe=_describe,
        derivations=_DERIVATIONS,
        prepare=_prepare,
        over_reading=wet.over_reading,
        more=wet.more,
        shape=Shape("throat", "throat_diameter", "throat_diameter_hot", "throat"),
    )
)
