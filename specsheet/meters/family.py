"""The protocol of a meter family: data (its profile) plus four pure functions.

A family module exports one ``FAMILY``. Everything is in SI; arrays have shape (n,), one element a
flow: the operating points come first, then the sweep along the range, in one call.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass, field
from functools import cached_property

import numpy as np
from numpy.typing import NDArray

from specsheet.findings import Finding, Origin
from specsheet.findings import Given as Given  # every family takes both from here
from specsheet.findings import Limit as Limit
from specsheet.line.pipe import Pipe
from specsheet.packs import Profile
from specsheet.tag import Tag

Array = NDArray[np.float64]


@dataclass(frozen=True)
class Stream:
    """The fluid and its flow at n conditions; every array has shape (n,), SI.

    A value that the fluid layer could not give is NaN there (sound_speed of a brine, say).

    Attributes:
        mass_flow: [kg/s]
        density: [kg/m3]
        viscosity: dynamic [Pa s]
        pressure: absolute, at the meter's inlet [Pa]
        temperature: [K]
        isentropic_exponent: [-], NaN for a liquid
        sound_speed: [m/s]
        vapour_pressure: absolute [Pa], NaN for a gas
        density_uncertainty: relative expanded uncertainty of the density, k = 2 [-]
    """

    mass_flow: Array
    density: Array
    viscosity: Array
    pressure: Array
    temperature: Array
    isentropic_exponent: Array
    sound_speed: Array
    vapour_pressure: Array
    density_uncertainty: Array

    @property
    def volume_flow(self) -> Array:
        """Volume flow at operating conditions [m3/s]."""
        return self.mass_flow / self.density

    @cached_property
    def alike(self) -> bool:
        """Whether all conditions are the same but for the flow."""
        names = [name for name in self.__dataclass_fields__ if name != "mass_flow"]
        table = np.array([getattr(self, name) for name in names])
        first, unknown = table[:, :1], np.isnan(table)
        return bool(((table == first) | unknown & unknown[:, :1]).all())

    def take(self, indices: NDArray[np.intp]) -> Stream:
        """Return the stream at the chosen conditions (repeats allowed)."""
        return Stream(
            self.mass_flow[indices],
            self.density[indices],
            self.viscosity[indices],
            self.pressure[indices],
            self.temperature[indices],
            self.isentropic_exponent[indices],
            self.sound_speed[indices],
            self.vapour_pressure[indices],
            self.density_uncertainty[indices],
        )

    def with_flow(self, mass_flow: Array) -> Stream:
        """Return the same conditions with other mass flows [kg/s]."""
        return Stream(
            mass_flow,
            self.density,
            self.viscosity,
            self.pressure,
            self.temperature,
            self.isentropic_exponent,
            self.sound_speed,
            self.vapour_pressure,
            self.density_uncertainty,
        )


@dataclass(frozen=True, slots=True)
class Derivation:
    """How one derived value comes about; the calculation annex prints it with the numbers put in.

    Attributes:
        key: glossary key of the result.
        equation: in plain text, with the symbols of the glossary.
        source: citation.
        inputs: glossary keys of the values put in, or paths of entries ("design.pressure").
        origin: of the result; typical where a figure usual for the family decides it.
    """

    key: str
    equation: str
    source: str
    inputs: tuple[str, ...] = ()
    origin: Origin = Origin.DERIVED


@dataclass(frozen=True, slots=True)
class Contribution:
    """One contribution to the uncertainty of the flow.

    Attributes:
        key: short stable name ("discharge_coefficient").
        label: words for it.
        relative: standard uncertainty of the flow that it causes, relative, shape (n,) [-].
        origin: where the figure comes from.
        source: citation.
        freedom: degrees of freedom (infinite when not stated).
    """

    key: str
    label: str
    relative: Array
    origin: Origin
    source: str
    freedom: float = float("inf")


@dataclass(frozen=True)
class Request:
    """What a family is asked: everything it may look at.

    Attributes:
        tag: the tag, for the family's own entries (``meter.*``) and the requirements.
        profile: the family's profile.
        pipe: the pipe.
        names: names of the operating points.
        stream: the operating points that could be evaluated, in order (n = len(names)).
        normal: index of the normal point (else the point of the middle flow).
        maximum: index of the point with the largest mass flow.
        minimum: index of the point with the smallest mass flow.
    """

    tag: Tag
    profile: Profile
    pipe: Pipe
    names: tuple[str, ...]
    stream: Stream
    normal: int
    maximum: int
    minimum: int


@dataclass(frozen=True)
class Element:
    """The meter as sized or rated.

    Attributes:
        numbers: what ``at`` needs, SI floats by name.
        values: what the sheet prints of it, by glossary key.
        notes: heading -> sentences on the make of it (edge, bevel, liner, electrodes ...).
        findings: what is wrong with it as such.
        choices: words that ``at`` needs ("taps").
    """

    numbers: Mapping[str, float]
    values: Mapping[str, Given]
    notes: Mapping[str, tuple[str, ...]] = field(default_factory=dict)
    findings: tuple[Finding, ...] = ()
    choices: Mapping[str, str] = field(default_factory=dict)


@dataclass(frozen=True)
class Family:
    """A meter family.

    Attributes:
        key: as in the tag file and the name of its profile.
        size: sizes the element where it is free, rates it where it is given. Never raises on user
            data: what is wrong becomes a finding of the element.
        at: the response to a stream: glossary key -> array of shape (n,); always velocity,
            reynolds_number, pressure_loss and the family's signal.
        limits: limits of use of the element as sized.
        budget: contributions to the uncertainty of the flow, given the response.
        derivations: how each value of ``at`` and of the element comes about.
        signal: glossary key of the family's primary signal, rising with flow.
    """

    key: str
    size: Callable[[Request], Element]
    at: Callable[[Element, Stream], Mapping[str, Array]]
    limits: Callable[[Element, Request], tuple[Limit, ...]]
    budget: Callable[[Element, Stream, Mapping[str, Array]], tuple[Contribution, ...]]
    derivations: tuple[Derivation, ...]
    signal: str
