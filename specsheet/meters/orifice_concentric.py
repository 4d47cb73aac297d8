"""Concentric square-edged orifice plate (ISO 5167-2:2003)."""

from __future__ import annotations

import math
from dataclasses import replace

import numpy as np

from specsheet.findings import Level, Origin
from specsheet.meters.dp import plate, wet, wet_plate
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Bounds, Described, Lanes, Prepared
from specsheet.meters.family import Array, Derivation, Element, Given, Limit, Request
from specsheet.methods import iso5167_2, orifice_plate
from specsheet.methods.iso5167_1 import reynolds_number
from specsheet.sources import cite

_SOURCE = cite("iso5167-2", "5.3.2.1")

#: diameter ratios that a pipe may be smooth enough for, the largest first [-]
_RATIOS = np.array([0.75, 0.65, 0.6, 0.55, 0.5, 0.45])


def _coefficient(lanes: Lanes) -> Array:
    found: Array = iso5167_2.discharge_coefficient(
        diameter_ratio=lanes.diameter_ratio,
        reynolds_number=lanes.reynolds_number,
        inside_diameter=lanes.inside_diameter,
        taps=lanes.choices["taps"],
    )
    return found


def _coefficient_uncertainty(lanes: Lanes) -> Array:
    found: Array = iso5167_2.coefficient_uncertainty(
        diameter_ratio=lanes.diameter_ratio,
        reynolds_number=lanes.reynolds_number,
        inside_diameter=lanes.inside_diameter,
    )
    return wet_plate.uncertainty(found) if wet.is_wet(lanes.numbers) else found


def _prepare(request: Request) -> Prepared:
    read = plate.prepare(request)
    taps = request.tag.text("meter.taps") or "flange"
    thickness = request.tag.si("meter.plate_thickness") or 0.0
    distance = {
        "corner": thickness,
        "flange": 2.0 * 0.0254 + thickness,
    }.get(taps, 1.5 * request.pipe.inside_diameter)
    carried, printed, findings = wet.read(request)
    return Prepared(
        {**read.numbers, **carried, "tapping_distance": distance},
        {"taps": taps},
        {**read.values, **printed},
        (*read.findings, *findings),
    )


def _bounds(request: Request, prepared: Prepared) -> Bounds:  # noqa: ARG001
    return Bounds(smallest=0.1, largest=_largest_ratio(request), smallest_bore=0.0125)


def _largest_ratio(request: Request) -> float:
    """Return the largest β that the roughness of the pipe allows, 0.4 to 0.75 [-]."""
    inside = request.pipe.inside_diameter
    roughness = request.pipe.roughness / math.pi / inside
    highest = _largest_reynolds(inside, request)
    allowed = iso5167_2.largest_roughness(diameter_ratio=_RATIOS, reynolds_number=highest)
    held = ~(roughness > allowed)
    return float(_RATIOS[held.argmax()]) if held.any() else 0.4


def _largest_reynolds(inside: float, request: Request) -> float:
    stream = request.stream
    return float(
        np.max(
            reynolds_number(mass_flow=stream.mass_flow, diameter=inside, viscosity=stream.viscosity)
        )
    )


def _describe(request: Request, element: Element) -> Described:
    common = plate.describe(request, element)
    thickness = float(common.values["plate_thickness"].value)
    inside = float(element.values["inside_diameter_hot"].value)
    edge = orifice_plate.edge_thickness(inside_diameter=inside, thickness=thickness)
    values = {
        **common.values,
        "edge_thickness": Given(edge, Origin.DERIVED, cite("iso5167-2", "5.1.5")),
    }
    bevelled = thickness > edge
    if bevelled:
        values["bevel_angle"] = Given(
            math.radians(45.0), Origin.DERIVED, cite("iso5167-2", "5.1.6")
        )
    roughness = request.pipe.roughness
    if np.isfinite(roughness):
        # The uniform equivalent roughness is about π times the arithmetical mean deviation Ra.
        mean = roughness / math.pi / inside
        values["relative_roughness"] = Given(mean, Origin.DERIVED, cite("iso5167-1", "7.1.5"))
    carried = wet.notes(element.numbers)
    notes = {"element": (*carried, *_make(element, bevelled), *common.notes["element"])}
    return Described(values, notes, common.findings)


def _make(element: Element, bevelled: bool) -> tuple[str, ...]:
    taps = {
        "corner": "corner tappings, in the corner of pipe and plate",
        "flange": "flange tappings, 25.4 mm from each face of the plate",
    }.get(element.choices["taps"], "D and D/2 tappings, from the upstream face")
    bevel = "bevel the downstream side at 45° (±15°)" if bevelled else "no bevel is needed"
    return (
        f"Concentric square-edged plate, {taps}.",
        "Upstream edge sharp: radius not above 0.0004 d, no burr; upstream face flat within "
        f"0.5 %, Ra below 0.0001 d; {bevel}.",
    )


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:
    ratio = float(element.values["diameter_ratio"].value)
    inside = float(element.values["inside_diameter_hot"].value)
    clause = cite("iso5167-2", "5.3.1")
    lowest = iso5167_2.smallest_reynolds_number(
        diameter_ratio=ratio, inside_diameter=inside, taps=element.choices["taps"]
    )
    found = [
        *standard_limits(
            source=clause,
            diameter=(0.05, 1.0),
            ratio=(0.1, 0.75),
            reynolds=(lowest, None),
            bore=("bore_diameter", 0.0125),
        ),
        Limit(
            "differential_pressure",
            None,
            2.5e5,
            Level.CAUTION,
            "differential-pressure-limit",
            "above 250 kPa the standard gives no uncertainty; choose a lower range",
            clause,
        ),
        *plate.bending_limits(),
        *wet.limits(element, wet_plate.PLATE),
    ]
    if np.isfinite(request.pipe.roughness):
        found.append(_roughness(ratio, inside, request))
    return tuple(found)


def _roughness(ratio: float, inside: float, request: Request) -> Limit:
    highest = _largest_reynolds(inside, request)
    return Limit(
        "relative_roughness",
        None,
        float(iso5167_2.largest_roughness(diameter_ratio=ratio, reynolds_number=highest)),
        Level.CAUTION,
        "pipe-roughness",
        "the pipe may be rougher than the coefficient allows: ask for a smooth or honed upstream "
        "length of 10 D, and state line.roughness as measured",
        f"{cite('iso5167-2', '5.3.1, table 1')} (from memory)",
        driver="",
    )


_DERIVATIONS = (
    Derivation(
        "discharge_coefficient",
        "C = 0.5961 + 0.0261 β² - 0.216 β⁸ + 0.000521 (10⁶β/ReD)^0.7 + (0.0188 + 0.0063 A) β^3.5 "
        "(10⁶/ReD)^0.3 + (0.043 + 0.080 e^(-10 L1) - 0.123 e^(-7 L1)) (1 - 0.11 A) β⁴/(1 - β⁴) "
        "- 0.031 (M'2 - 0.8 M'2^1.1) β^1.3 [+ 0.011 (0.75 - β)(2.8 - D/25.4 mm) for D < 71.12 mm]; "
        "A = (19 000 β/ReD)^0.8, M'2 = 2 L'2/(1 - β); L1 = L'2 = 0 corner, 25.4 mm/D flange, "
        "L1 = 1 and L'2 = 0.47 for D and D/2 tappings",
        _SOURCE,
        ("diameter_ratio", "reynolds_number", "inside_diameter_hot"),
    ),
    *plate.SHARP,
    Derivation("bevel_angle", "45°, allowed 30° to 60°", cite("iso5167-2", "5.1.6")),
    Derivation(
        "edge_thickness", "0.005 D to 0.02 D", cite("iso5167-2", "5.1.5"), ("inside_diameter_hot",)
    ),
    Derivation(
        "relative_roughness",
        "Ra/D with Ra = k/π",
        cite("iso5167-1", "7.1.5"),
        ("inside_diameter_hot",),
    ),
    *plate.DERIVATIONS,
    *wet_plate.DERIVATIONS,
)

FAMILY = family(
    replace(
        plate.sharp(
            key="orifice_concentric",
            source=_SOURCE,
            coefficient=_coefficient,
            coefficient_uncertainty=_coefficient_uncertainty,
            bounds=_bounds,
            limits=_limits,
            describe=_describe,
            derivations=_DERIVATIONS,
            prepare=_prepare,
        ),
        over_reading=wet_plate.over_reading,
        more=wet_plate.more,
    )
)
