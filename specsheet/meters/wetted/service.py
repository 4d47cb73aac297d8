"""What the liquid and the line do to the wetted parts, read from the tag once."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np

from specsheet.meters.family import Array, Request

#: words in the name of a pipe material or lining that tell that it does not conduct
_INSULATING = ("pvc", "hdpe", "polyeth", "polyprop", "plastic", "grp", "frp", "glass", "concrete")
#: chlorides above this share attack stainless steel 316L; common practice
_CHLORIDES = 200e-6


@dataclass(frozen=True, slots=True)
class Service:
    """The service as the wetted parts feel it.

    Attributes:
        hottest, coldest: of the design and every operating point [K]
        lowest_pressure: of the design and every operating point, absolute [Pa]
        abrasive: solids that wear.
        corrosive: stated as a hazard.
        aggressive: corrosive, strongly acid or alkaline, or not water at all.
        acid, alkaline: which of the two.
        chlorides: enough of them to attack stainless steel.
        potable: for drinking water.
        insulated: the line is lined or of a material that does not conduct.
    """

    hottest: float
    coldest: float
    lowest_pressure: float
    abrasive: bool
    corrosive: bool
    aggressive: bool
    acid: bool
    alkaline: bool
    chlorides: bool
    potable: bool
    insulated: bool


def service(request: Request) -> Service:
    """Read the service from the tag and its operating points."""
    tag, stream = request.tag, request.stream
    acidity = tag.si("fluid.ph")
    acid = acidity is not None and acidity < 4.0
    alkaline = acidity is not None and acidity > 11.0
    aqueous = tag.text("fluid.kind") in ("seawater", "slurry", "") or (
        tag.text("fluid.substance") == "water"
    )
    corrosive = "corrosive" in tag.words("fluid.hazards")
    lining = tag.text("line.lining").strip().lower()
    pipe = tag.text("line.material").lower()
    return Service(
        hottest=_highest(stream.temperature, tag.si("design.temperature")),
        coldest=_lowest(stream.temperature, tag.si("design.minimum_temperature")),
        lowest_pressure=_lowest(stream.pressure, tag.si("design.minimum_pressure")),
        abrasive=is_slurry(request),
        corrosive=corrosive,
        aggressive=acid or alkaline or corrosive or not aqueous,
        acid=acid,
        alkaline=alkaline,
        chlorides=tag.text("fluid.kind") == "seawater"
        or (tag.si("fluid.chlorides") or 0.0) > _CHLORIDES,
        potable=tag.flag("require.potable_water"),
        insulated=lining not in ("", "none", "no") or any(word in pipe for word in _INSULATING),
    )


def is_slurry(request: Request) -> bool:
    """Tell whether the liquid carries solids."""
    tag = request.tag
    return (
        tag.flag("fluid.abrasive")
        or tag.text("fluid.kind") == "slurry"
        or (tag.si("fluid.solids") or 0.0) > 0.0
        or (tag.si("fluid.solids_mass_fraction") or 0.0) > 0.0
    )


def _highest(values: Array, stated: float | None) -> float:
    return float(np.nanmax(values if stated is None else np.append(values, stated)))


def _lowest(values: Array, stated: float | None) -> float:
    return float(np.nanmin(values if stated is None else np.append(values, stated)))
