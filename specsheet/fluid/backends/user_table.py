"""A substance of the user's own, from tables of density and viscosity over temperature."""

from __future__ import annotations

import itertools
import math
from collections.abc import Mapping
from dataclasses import dataclass

from specsheet.findings import Finding, Origin
from specsheet.fluid.limits import Range
from specsheet.fluid.model import Condition, Method, both, caution
from specsheet.fluid.phases import GAS, LIQUID, TWO_PHASE
from specsheet.fluid.state import Property, State
from specsheet.quantity.value import Base

#: temperature [K] and value, rising in temperature
Table = tuple[tuple[float, float], ...]


@dataclass(frozen=True, slots=True)
class UserTable:
    """A liquid known by tables.

    Attributes:
        name: what the sheet calls it.
        phase: the phase stated.
        source: where the user has the tables from.
        density: [kg/m3]
        viscosity: kinematic [m2/s] or dynamic [Pa s], by ``kinematic``.
        kinematic: whether the viscosity is kinematic.
        vapour_pressure: [Pa]
        heat_capacity: [J/kg/K]
    """

    name: str
    phase: str
    source: str
    density: Table
    viscosity: Table = ()
    kinematic: bool = False
    vapour_pressure: Table = ()
    heat_capacity: Table = ()

    def state(self, condition: Condition) -> State:
        """Return the state between the rows of the tables."""
        temperature, pressure = both(condition)
        limits = Range(self.density[0][0], self.density[-1][0], 1e9, self.source, above=0.0)
        limits.check(temperature, pressure, self.name)
        found = Method("table of the job", self.source, 0.01, Origin.GIVEN)
        density = straight(self.density, temperature)
        assert density is not None  # the limits are those of this table
        values = {"density": found(density)}
        findings = self._viscosity(values, temperature, density)
        heat = straight(self.heat_capacity, temperature)
        if heat is not None:
            values["heat_capacity"] = found(heat)
        vapour = logarithmic(self.vapour_pressure, temperature)
        phase = GAS if self.phase == GAS else LIQUID
        if vapour is not None:
            values["vapour_pressure"] = found(vapour)
            if phase == LIQUID and pressure <= vapour:
                phase = TWO_PHASE
        return State(temperature, pressure, phase, values, findings)

    def base(self, base: Base) -> State:
        """Return the state at base."""
        return self.state(Condition(base.temperature, base.pressure))

    def constants(self) -> Mapping[str, Property]:
        """Return nothing."""
        return {}

    def _viscosity(
        self, values: dict[str, Property], temperature: float, density: float
    ) -> tuple[Finding, ...]:
        viscosity = logarithmic(self.viscosity, temperature)
        if viscosity is None:
            text = (
                f"The table of {self.name} has no viscosity at this temperature: extend it, or "
                "state the viscosity at the point."
            )
            return (caution("viscosity-missing", "viscosity", text),)
        found = Method("table of the job", self.source, 0.03, Origin.GIVEN)
        dynamic = viscosity * density if self.kinematic else viscosity
        values["viscosity"] = found(dynamic)
        values["kinematic_viscosity"] = found(dynamic / density)
        return ()


def straight(table: Table, temperature: float) -> float | None:
    """Return the value between two rows on a straight line; None outside the table."""
    for (first, low), (last, high) in itertools.pairwise(table):
        if first <= temperature <= last:
            return low + (high - low) * (temperature - first) / (last - first)
    return None


def logarithmic(table: Table, temperature: float) -> float | None:
    """Return the value between two rows, its logarithm straight over 1/T; None outside."""
    inverse = tuple((-1.0 / row[0], math.log(row[1])) for row in table)
    found = straight(inverse, -1.0 / temperature)
    return None if found is None else math.exp(found)
