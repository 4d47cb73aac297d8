"""Variable-area meter with a spring-loaded plunger."""

from __future__ import annotations

import math
from collections.abc import Mapping

import numpy as np

from specsheet.findings import Origin
from specsheet.meters.dp import body, plain, scale
from specsheet.meters.dp.budget import density as density_contribution
from specsheet.meters.dp.given import guarded
from specsheet.meters.family import (
    Array,
    Contribution,
    Derivation,
    Element,
    Family,
    Given,
    Limit,
    Request,
    Stream,
)
from specsheet.methods import variable_area
from specsheet.methods.gum import RECTANGULAR
from specsheet.sources import PRACTICE

_SOURCE = "balance of forces on the plunger"


def size(request: Request) -> Element:
    """Choose the growth of the opening so that the plunger is fully lifted at the largest flow."""
    tag, stream = request.tag, request.stream
    inside = request.pipe.inside_diameter
    diameter = tag.si("meter.plunger_diameter") or body.figure(request, "plunger_share") * inside
    travel = tag.si("meter.travel") or body.figure(request, "travel_share") * inside
    area = math.pi / 4.0 * diameter**2
    preload = tag.si("meter.spring_preload")
    top = tag.si("meter.full_scale_pressure") or body.figure(request, "full_scale_pressure")
    if preload is None:
        preload = body.figure(request, "preload_share") * top * area
    rate = (top * area - preload) / travel
    lead = int(np.argmax(stream.mass_flow**2 / stream.density))
    margin = 1.0 + (tag.si("meter.margin") or 0.0)
    flow = float(stream.volume_flow[lead]) * margin
    stated = tag.si("meter.slope")
    slope = stated or flow / (travel * math.sqrt(2.0 * top / float(stream.density[lead])))
    numbers = {
        **plain.pipe_numbers(request),
        "area": area,
        "travel": travel,
        "preload": preload,
        "spring_rate": max(rate, 1e-9),
        "slope": slope,
        "error": tag.si("meter.accuracy") or body.figure(request, "error_of_full_scale"),
    }
    values = {
        "plunger_diameter": Given(diameter, tag.origin("meter.plunger_diameter"), PRACTICE),
        "plunger_travel": Given(travel, tag.origin("meter.travel"), PRACTICE),
        "spring_preload": Given(preload, tag.origin("meter.spring_preload"), PRACTICE),
        "spring_full_load": Given(
            preload + numbers["spring_rate"] * travel, Origin.DERIVED, _SOURCE
        ),
        "opening_slope": Given(slope, Origin.GIVEN if stated else Origin.DERIVED, _SOURCE),
        "inside_diameter_hot": plain.hot_inside(numbers, request),
    }
    notes = {
        "element": (
            "Plunger against a spring; the opening grows in proportion to the displacement.",
            "Works in any position; the bidder states the position for which it is adjusted.",
        )
    }
    return Element(numbers, values, notes, (), {})


def at(element: Element, stream: Stream) -> Mapping[str, Array]:
    """Return the response to a stream, arrays of shape (n,)."""
    numbers = element.numbers
    spring = {key: numbers[key] for key in ("spring_rate", "preload", "area")}
    with np.errstate(all="ignore"):
        values = plain.pipe_values(numbers, stream)
        displacement: Array = variable_area.spring_displacement(
            volume_flow=stream.volume_flow,
            slope=numbers["slope"],
            density=stream.density,
            **spring,
        )
        pressure: Array = variable_area.spring_pressure(displacement=displacement, **spring)
        pressure = np.where(pressure < stream.pressure, pressure, np.nan)
        share = displacement / numbers["travel"]
        return {
            **values,
            "displacement": displacement,
            "differential_pressure": pressure,
            "pressure_loss": pressure,
            "pressure_loss_coefficient": pressure / (0.5 * values["dynamic_pressure"]),
            **scale.signals(share, numbers["error"]),
        }


def limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    """Return the limits of use: the travel of the plunger."""
    return (
        *scale.limits(
            "the plunger stands at its stop; choose a larger meter or a stiffer spring",
            "the plunger hardly moves: friction decides the reading; choose a smaller meter",
            _SOURCE,
        ),
    )


def budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return the contributions: the error of the scale, and the density."""
    numbers = element.numbers
    with np.errstate(all="ignore"):
        stretch = numbers["spring_rate"] * values["displacement"]
        load = numbers["preload"] + stretch
        gain = 1.0 + 0.5 * stretch / load  # d ln q / d ln x
        relative = gain * values["error_limit"] / RECTANGULAR
    return (
        Contribution("scale", "scale, share of full travel", relative, Origin.TYPICAL, PRACTICE),
        density_contribution(stream),
    )


FAMILY = Family(
    key="variable_area_spring",
    size=guarded(size),
    at=at,
    limits=limits,
    budget=budget,
    derivations=(
        *plain.derivations(*plain.PIPE, "pressure_loss_coefficient"),
        Derivation(
            "displacement",
            "q = w x sqrt(2 Δp/ρ) with Δp A = F0 + k x, solved for x",
            _SOURCE,
            ("volume_flow", "density", "opening_slope", "spring_preload", "spring_full_load"),
        ),
        Derivation(
            "differential_pressure",
            "Δp = (F0 + k x) / A",
            _SOURCE,
            ("displacement", "spring_preload", "spring_full_load", "plunger_diameter"),
        ),
        Derivation("pressure_loss", "ϖ = Δp", "nothing is recovered", ("differential_pressure",)),
        Derivation(
            "signal_fraction", "x / travel", "definition", ("displacement", "plunger_travel")
        ),
        scale.CURRENT,
        scale.ERROR,
        Derivation(
            "spring_full_load",
            "F1 = Δp at full travel × A; the rate is (F1 - F0) / travel",
            _SOURCE,
            ("plunger_diameter", "plunger_travel", "spring_preload"),
        ),
        Derivation(
            "opening_slope",
            "w = q / (travel × sqrt(2 Δp/ρ)) at the largest flow and full travel",
            _SOURCE,
            ("volume_flow", "density", "plunger_travel"),
        ),
    ),
    signal="signal_fraction",
)
