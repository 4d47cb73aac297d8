"""Families that read a differential pressure without throttling the flow: range, signals, legs."""

from __future__ import annotations

from collections.abc import Callable, Mapping

import numpy as np

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.dp import transmitter
from specsheet.meters.dp.derivations import COMMON
from specsheet.meters.dp.given import guarded
from specsheet.meters.dp.notes import output_note
from specsheet.meters.dp.response import signals
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
from specsheet.methods import iso5167_1 as equation
from specsheet.sources import PRACTICE

RANGE = "differential_pressure_range"

#: numbers and choices -> response to a stream
Respond = Callable[[Mapping[str, float], Mapping[str, str], Stream], Mapping[str, Array]]

#: glossary keys of what any meter answers of its pipe
PIPE = ("inside_diameter_hot", "velocity", "reynolds_number", "dynamic_pressure")

#: glossary keys of what these families share with the throttling ones
SHARED = (
    *PIPE,
    "pressure_loss_coefficient",
    "signal_fraction",
    "signal_current",
    "signal_current_root",
    "differential_pressure_range",
    "upper_range_flow",
    "second_range",
    "calibrated_range_low",
    "calibrated_range_high",
)


def pipe_numbers(request: Request) -> dict[str, float]:
    """Return the numbers of the pipe."""
    return {
        "inside_diameter": request.pipe.inside_diameter,
        "pipe_expansion": request.pipe.expansion,
    }


def base_numbers(request: Request) -> dict[str, float]:
    """Return the numbers of pipe and transmitter."""
    return {
        **pipe_numbers(request),
        "cut_off": request.tag.si("meter.low_cut_off") or 0.0,
        "second_range": request.tag.si("meter.second_range") or 0.0,
        "pipe_diameter_uncertainty": request.tag.si("meter.pipe_diameter_uncertainty") or 0.0,
        **transmitter.error_numbers(request),
    }


def pipe_values(numbers: Mapping[str, float], stream: Stream) -> dict[str, Array]:
    """Return velocity, Reynolds number and momentum flux in the pipe; arrays of shape (n,)."""
    inside = hot_diameter(numbers, stream)
    velocity = stream.volume_flow / (np.pi / 4.0 * inside**2)
    return {
        "velocity": velocity,
        "reynolds_number": equation.reynolds_number(
            mass_flow=stream.mass_flow, diameter=inside, viscosity=stream.viscosity
        ),
        "dynamic_pressure": stream.density * velocity**2,
    }


def hot_diameter(numbers: Mapping[str, float], stream: Stream) -> Array:
    """Return the inside diameter of the pipe at operating temperature [m], shape (n,)."""
    hot: Array = equation.grown(
        length=numbers["inside_diameter"],
        expansion=numbers["pipe_expansion"],
        temperature=stream.temperature,
    )
    return hot


def hot_inside(numbers: Mapping[str, float], request: Request) -> Given:
    """Return the inside diameter of the pipe at the normal point, to print."""
    inside = float(hot_diameter(numbers, request.stream)[request.normal])
    return Given(inside, Origin.DERIVED, "thermal growth")


def with_signals(numbers: Mapping[str, float], values: Mapping[str, Array]) -> dict[str, Array]:
    """Return the values with the loss coefficient and the transmitter's outputs added."""
    return {
        **values,
        "pressure_loss_coefficient": values["pressure_loss"] / (0.5 * values["dynamic_pressure"]),
        **signals(numbers, values["differential_pressure"]),
    }


def element(
    request: Request,
    respond: Respond,
    *,
    numbers: Mapping[str, float],
    choices: Mapping[str, str],
    values: Mapping[str, Given],
    notes: Mapping[str, tuple[str, ...]],
    findings: tuple[Finding, ...] = (),
    tapping_distance: float = 0.0,
    origin_keys: tuple[str, ...] = (),
) -> Element:
    """Choose the range where it is free and put the element together."""
    tag = request.tag
    margin = 1.0 + (tag.si("meter.margin") or 0.0)
    choices = {**transmitter.origins(request, (*transmitter.ERRORS, *origin_keys)), **choices}
    stated = tag.si(f"meter.{RANGE}")
    span, more = (
        (stated, ()) if stated is not None else _range(request, respond, numbers, choices, margin)
    )
    origin = tag.origin(f"meter.{RANGE}") if stated is not None else Origin.DERIVED
    second, useless = transmitter.below(numbers["second_range"], span)
    complete = {**numbers, "range": span, "second_range": second}
    flow = _upper_flow(request, respond, complete, choices, span)
    top = transmitter.top_of(flow, f"meter.{RANGE}", "response at the upper range value")
    legs = transmitter.legs(request, span, tapping_distance)
    printed = {
        **values,
        "inside_diameter_hot": hot_inside(complete, request),
        RANGE: Given(span, origin, PRACTICE),
        **top.values,
        **legs.values,
    }
    if second:
        printed["second_range"] = Given(second, tag.origin("meter.second_range"), "")
    installation = (*notes.get("installation", ()), *legs.notes)
    return Element(
        numbers=complete,
        values=printed,
        notes={**notes, "installation": installation, **output_note(request)},
        findings=(*findings, *more, *useless, *legs.findings, *top.findings),
        choices=choices,
    )


def _range(
    request: Request,
    respond: Respond,
    numbers: Mapping[str, float],
    choices: Mapping[str, str],
    margin: float,
) -> tuple[float, tuple[Finding, ...]]:
    """Return the preferred range above the largest Δp, and a finding where there is none."""
    stream = request.stream.with_flow(request.stream.mass_flow * margin)
    found = respond({**numbers, "range": 1.0}, choices, stream)["differential_pressure"]
    if not np.isfinite(found).any():
        return float(transmitter.SERIES[-1]), (
            Finding(
                Level.STOP,
                "differential-pressure-impossible",
                f"meter.{RANGE}",
                "no differential pressure can be found at any operating point; check flow, pipe "
                "size and the entries of the meter",
            ),
        )
    return transmitter.next_range(float(np.nanmax(found))), ()


def _upper_flow(
    request: Request,
    respond: Respond,
    numbers: Mapping[str, float],
    choices: Mapping[str, str],
    span: float,
) -> float:
    """Return the flow at the upper range value, at the conditions of the largest flow [kg/s]."""
    index: np.ndarray = np.array([request.maximum])
    stream = request.stream.take(index)

    def step(flow: Array) -> Array:
        drop = respond(numbers, choices, stream.with_flow(flow))["differential_pressure"]
        return flow * np.sqrt(span / drop)

    return float(equation.fixed_point(step, stream.mass_flow)[0])


def limits(element: Element) -> tuple[Limit, ...]:
    """Return the limits of the transmitter."""
    return transmitter.limits(element.numbers, f"meter.{RANGE}")


def derivations(*keys: str) -> tuple[Derivation, ...]:
    """Return those of the group's derivations that a family shares."""
    return tuple(item for item in COMMON if item.key in keys)


def family(
    *,
    key: str,
    size: Callable[[Request], Element],
    respond: Respond,
    limits: Callable[[Element, Request], tuple[Limit, ...]],
    budget: Callable[[Element, Stream, Mapping[str, Array]], tuple[Contribution, ...]],
    derivations: tuple[Derivation, ...],
) -> Family:
    """Return a family whose signal is a differential pressure; the arguments are the family's."""

    def at(element: Element, stream: Stream) -> Mapping[str, Array]:
        return respond(element.numbers, element.choices, stream)

    return Family(
        key=key,
        size=guarded(size),
        at=at,
        limits=limits,
        budget=budget,
        derivations=derivations,
        signal="differential_pressure",
    )
