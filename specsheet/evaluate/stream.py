"""The operating points as arrays: only points that can be evaluated get into the stream."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from specsheet.evaluate.flows import mass_flow
from specsheet.findings import Finding, Level
from specsheet.fluid.state import FluidResult, State
from specsheet.meters.family import Array, Stream
from specsheet.tag import Tag


@dataclass(frozen=True)
class Points:
    """The points that can be evaluated.

    Attributes:
        names: their names, in the order of the file (n of them).
        indices: their positions among all points of the tag.
        stream: their conditions, arrays of shape (n,).
        mass_flows: mass flow of every point of the tag, None where there is none [kg/s].
        findings: why a point was left out.
    """

    names: tuple[str, ...]
    indices: tuple[int, ...]
    stream: Stream
    mass_flows: tuple[float | None, ...]
    findings: tuple[Finding, ...]


@dataclass(frozen=True)
class Lanes:
    """Flows at the conditions of operating points; arrays of shape (m,).

    Attributes:
        points: which point of the stream each flow is at.
        mass_flow: [kg/s].
    """

    points: NDArray[np.intp]
    mass_flow: Array


_COLUMNS = (
    "density",
    "viscosity",
    "isentropic_exponent",
    "sound_speed",
    "vapour_pressure",
)


def points_of(tag: Tag, fluid: FluidResult) -> Points:
    """Return the operating points as a stream, with a finding for each that cannot be used."""
    names: list[str] = []
    indices: list[int] = []
    rows: list[tuple[float, ...]] = []
    flows: list[float | None] = []
    findings: list[Finding] = []
    for index, point in enumerate(tag.points):
        state = fluid.points[index]
        flow = mass_flow(tag, point, state, fluid)
        flows.append(flow.value)
        if flow.finding is not None:
            findings.append(flow.finding)
        missing = _missing(state, point.name)
        findings.extend(missing)
        if flow.value is None or state is None or missing:
            continue
        names.append(point.name)
        indices.append(index)
        rows.append(_row(flow.value, state, tag.phase))
    columns = np.array(rows, dtype=np.float64).reshape(len(rows), 9).T
    return Points(tuple(names), tuple(indices), Stream(*columns), tuple(flows), tuple(findings))


def _missing(state: State | None, name: str) -> list[Finding]:
    """Return a finding for each property without which nothing can be sized."""
    if state is None:
        return []  # the fluid layer has said why
    return [
        Finding(
            Level.STOP,
            f"{key}-missing",
            f"points.{name}.{key}",
            f"no {key} is known at this point; state points.{key} here",
            name,
        )
        for key in ("density", "viscosity")
        if state.value(key) is None
    ]


def _row(flow: float, state: State, phase: str) -> tuple[float, ...]:
    density, viscosity, exponent, sound, vapour = (
        np.nan if (value := state.value(key)) is None else value for key in _COLUMNS
    )
    if phase == "gas":
        vapour = np.nan  # steam has a saturation pressure, but it cannot cavitate
    doubt = state.properties["density"].uncertainty
    return (
        flow,
        density,
        viscosity,
        state.pressure,
        state.temperature,
        exponent,
        sound,
        vapour,
        doubt,
    )


def with_lanes(stream: Stream, *parts: Lanes) -> Stream:
    """Return a stream followed by more flows at its own conditions."""
    places = [np.arange(stream.mass_flow.size), *(part.points for part in parts)]
    flows = [stream.mass_flow, *(part.mass_flow for part in parts)]
    return stream.take(np.concatenate(places)).with_flow(np.concatenate(flows))
