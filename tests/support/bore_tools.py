"""Requests built by hand for the tests of meters with a bore of their own."""

from __future__ import annotations

from dataclasses import replace

import numpy as np

from specsheet import packs
from specsheet.line.pipe import Pipe
from specsheet.meters.family import Request, Stream
from specsheet.quantity.value import Quantity
from specsheet.tag import Point, Tag


def quantity(value: float, kind: str, unit: str = "", text: str = "") -> Quantity:
    """Return a quantity by its SI value."""
    return Quantity(value, kind, unit, text or f"{value:g} {unit}".strip())


def water(count: int, **other: float) -> dict[str, np.ndarray]:
    """Return water at 20 °C, 5 bar(a); handbook values rounded."""
    base = {
        "density": 998.2,
        "viscosity": 1.002e-3,
        "pressure": 5e5,
        "temperature": 293.15,
        "isentropic_exponent": np.nan,
        "sound_speed": 1482.0,
        "vapour_pressure": 2339.0,
        "density_uncertainty": 1e-4,
    }
    return {key: np.full(count, float(value)) for key, value in (base | other).items()}


def steam(count: int, **other: float) -> dict[str, np.ndarray]:
    """Return superheated steam at 8 bar(a), 185 °C; rounded."""
    return water(
        count,
        **{
            "density": 3.99,
            "viscosity": 1.52e-5,
            "pressure": 8e5,
            "temperature": 458.15,
            "isentropic_exponent": 1.30,
            "sound_speed": 508.0,
            "vapour_pressure": np.nan,
            "density_uncertainty": 1e-3,
        }
        | other,
    )


def stream(mass_flow: list[float] | np.ndarray, fluid: dict[str, np.ndarray]) -> Stream:
    """Return a stream of the fluid at these mass flows [kg/s]."""
    return Stream(mass_flow=np.asarray(mass_flow, dtype=float), **fluid)


def request(
    family: str,
    flows: list[float],
    fluid: dict[str, np.ndarray],
    *,
    phase: str = "liquid",
    diameter: float = 0.1023,
    nominal: int = 100,
    **given: object,
) -> Request:
    """Return a request with the points minimum, normal and maximum at mass flows [kg/s].

    Keyword arguments are entries with "__" for the dot: ``meter__size="DN 80"``.
    """
    names = ("minimum", "normal", "maximum")
    points = tuple(
        Point(name, {"flow": quantity(flow, "mass_flow", "kg/s")})
        for name, flow in zip(names, flows, strict=True)
    )
    entries = {"tag": "FT-1", "family": family, "fluid.phase": phase, "line.material": "steel"}
    entries |= {key.replace("__", "."): item for key, item in given.items() if item is not None}
    pipe = Pipe(diameter, 6e-3, 12e-6, 5e-5, f"DN {nominal}" if nominal else "", nominal, "steel")
    tag = Tag(given=entries, points=points)
    return Request(tag, packs.profile(family), pipe, names, stream(flows, fluid), 1, 2, 0)


def with_flows(request: Request, kind: str, unit: str, values: list[float]) -> Request:
    """Return the request with its flows stated in another kind and unit (SI values)."""
    points = tuple(
        Point(point.name, {"flow": quantity(value, kind, unit)})
        for point, value in zip(request.tag.points, values, strict=True)
    )
    return replace(request, tag=replace(request.tag, points=points))
