"""Eccentric orifice plate (ISO/TR 15377:1998)."""

from __future__ import annotations

from specsheet.findings import Level
from specsheet.meters.dp import adapters, plate
from specsheet.meters.dp.build import family, standard_limits
from specsheet.meters.dp.device import Bounds, Described, Prepared
from specsheet.meters.family import Derivation, Element, Limit, Request
from specsheet.methods import iso15377
from specsheet.sources import cite

_SOURCE = cite("isotr15377")


def _prepare(request: Request) -> Prepared:
    read = plate.prepare(request)
    place = request.tag.text("meter.bore_position") or _natural_place(request)
    return Prepared(read.numbers, {"bore_position": place}, read.values, read.findings)


def _natural_place(request: Request) -> str:
    return "bottom" if request.tag.phase == "gas" or _has_solids(request) else "top"


def _has_solids(request: Request) -> bool:
    tag = request.tag
    return any(tag.si(f"fluid.{key}") for key in ("solids", "solids_mass_fraction"))


def _bounds(request: Request, prepared: Prepared) -> Bounds:  # noqa: ARG001 - the protocol
    return Bounds(smallest=0.46, largest=0.84, smallest_bore=0.05)


def _describe(request: Request, element: Element) -> Described:
    common = plate.describe(request, element)
    place = element.choices["bore_position"]
    passing = "gas" if place == "top" else "solids or condensate"
    notes = (
        f"Bore at the {place} of the pipe, its edge on a circle of 0.98 D, so that {passing} pass.",
        "Corner tappings on the side away from the bore; turned up to 30° out of the vertical "
        "where gas or dirt would reach them (adds up to 2 %; from memory).",
        *common.notes["element"],
    )
    return Described(common.values, {"element": notes}, common.findings)


def _limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    ratio = float(element.values["diameter_ratio"].value)
    return (
        *standard_limits(
            source=_SOURCE,
            diameter=(0.1, 1.0),
            ratio=(0.46, 0.84),
            reynolds=(2e5 * ratio**2, 1e6 * ratio),
            bore=("bore_diameter", 0.05),
        ),
        *plate.bending_limits(level=Level.NOTE),
    )


FAMILY = family(
    plate.sharp(
        key="orifice_eccentric",
        source=_SOURCE,
        coefficient=adapters.of_ratio(iso15377.eccentric_coefficient),
        coefficient_uncertainty=adapters.of_ratio(iso15377.eccentric_uncertainty),
        bounds=_bounds,
        limits=_limits,
        describe=_describe,
        derivations=(
            Derivation(
                "discharge_coefficient",
                "C = 0.9355 - 1.6889 β + 3.0428 β² - 1.7989 β³",
                _SOURCE,
                ("diameter_ratio",),
            ),
            *plate.SHARP,
            *plate.DERIVATIONS,
        ),
        prepare=_prepare,
    )
)
