"""Quarter-circle orifice plate for low Reynolds numbers (ISO/TR 15377:1998)."""

from __future__ import annotations

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.dp import adapters, plate
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Bounds, Described, Prepared
from specsheet.meters.family import Derivation, Element, Given, Limit, Request
from specsheet.methods import iso15377
from specsheet.sources import MEMORY, cite

_SOURCE = cite("isotr15377")
_MEMORY = f"{_SOURCE} ({MEMORY})"

#: largest pipe in which only corner tappings are foreseen [m] (from memory)
_CORNER_ONLY = 0.04


def _prepare(request: Request) -> Prepared:
    read = plate.prepare(request)
    taps = request.tag.text("meter.taps") or "corner"
    findings = list(read.findings)
    if taps == "flange" and request.pipe.inside_diameter < _CORNER_ONLY:
        findings.append(
            Finding(
                Level.CAUTION,
                "taps-not-covered",
                "meter.taps",
                "flange tappings are foreseen above D = 40 mm only; use corner tappings",
                source=_MEMORY,
            )
        )
    distance = 2.0 * 0.0254 if taps == "flange" else 0.0
    return Prepared(
        {**read.numbers, "tapping_distance": distance}, {"taps": taps}, read.values, tuple(findings)
    )


def _bounds(request: Request, prepared: Prepared) -> Bounds:  # noqa: ARG001 - the protocol
    return Bounds(smallest=0.245, largest=0.6, target=0.5, smallest_bore=0.015)


def _describe(request: Request, element: Element) -> Described:
    common = plate.describe(request, element)
    ratio = float(element.values["diameter_ratio"].value)
    radius = iso15377.quarter_circle_radius(diameter_ratio=ratio) * element.numbers["machined"]
    values = {**common.values, "edge_radius": Given(radius, Origin.TYPICAL, _MEMORY)}
    notes = (
        f"Inlet edge rounded to a quarter of a circle, {element.choices['taps']} tappings; the "
        "radius is to be measured and certified.",
        *common.notes["element"],
    )
    return Described(values, {"element": notes}, common.findings)


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    ratio = float(element.values["diameter_ratio"].value)
    lowest = float(iso15377.quarter_circle_smallest_reynolds(diameter_ratio=ratio))
    return (
        *standard_limits(
            source=_SOURCE,
            diameter=(0.025, 0.5),
            ratio=(0.245, 0.6),
            reynolds=(lowest, 1e5 * ratio),
            bore=("bore_diameter", 0.015),
        ),
        *plate.bending_limits(level=Level.NOTE),
    )


FAMILY = family(
    plate.sharp(
        key="orifice_quarter_circle",
        source=_SOURCE,
        coefficient=adapters.of_ratio(iso15377.quarter_circle_coefficient),
        coefficient_uncertainty=adapters.of_ratio(iso15377.quarter_circle_uncertainty),
        bounds=_bounds,
        limits=_limits,
        describe=_describe,
        derivations=(
            Derivation(
                "discharge_coefficient",
                "C = 0.73823 + 0.3309 β - 1.16158 β² + 1.5084 β³",
                _SOURCE,
                ("diameter_ratio",),
            ),
            *plate.SHARP,
            *plate.DERIVATIONS,
        ),
        prepare=_prepare,
    )
)
