"""What the fluid layer hands on: the state of the fluid at each operating point and base."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import NamedTuple

from specsheet.findings import Finding, Origin
from specsheet.quantity.value import Base


class Property(NamedTuple):
    """One property of the fluid, with where it comes from.

    A named tuple, since a state has a dozen and building them is most of its cost.

    Attributes:
        value: SI value of the term.
        origin: given, derived, assumed or typical.
        method: the method in plain words ("IAPWS-IF97, region 2").
        source: citation, or "" when the user gave it.
        uncertainty: relative expanded uncertainty, k = 2 [-]; what the flow budget uses.
    """

    value: float
    origin: Origin
    method: str
    source: str = ""
    uncertainty: float = 0.0


@dataclass(frozen=True, slots=True)
class State:
    """The fluid at one temperature and pressure.

    Attributes:
        temperature: [K]
        pressure: [Pa], absolute
        phase: what the method finds: "liquid", "gas", "two_phase", "supercritical", "solid" or
            "unverified" where the phase could not be decided.
        properties: glossary key -> property; a key is missing where nothing honest can be said.
        findings: what is wrong at this state.
    """

    temperature: float
    pressure: float
    phase: str
    properties: Mapping[str, Property]
    findings: tuple[Finding, ...] = ()

    def value(self, key: str) -> float | None:
        """Return the SI value of a property, or None where it is missing."""
        found = self.properties.get(key)
        return None if found is None else found.value


@dataclass(frozen=True, slots=True)
class FluidResult:
    """The fluid of one tag.

    Attributes:
        name: what the sheet calls it.
        points: one state for each operating point, in order; None where the point cannot be
            evaluated (a finding says why).
        bases: state at each base condition in use; the job's own base is always there.
        constants: properties that do not depend on the state (molar mass, calorific values ...).
        findings: what is wrong with the fluid as such or at a point.
    """

    name: str
    points: tuple[State | None, ...]
    bases: Mapping[Base, State]
    constants: Mapping[str, Property] = field(default_factory=dict)
    findings: tuple[Finding, ...] = ()
