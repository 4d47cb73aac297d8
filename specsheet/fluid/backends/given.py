"""A fluid whose values the user states at each point; nothing is looked up.

Between two points a liquid's density runs straight over temperature and the logarithm of its
viscosity straight over 1/T; a gas keeps the straight run of its compressibility factor over
pressure and temperature. Nothing is carried beyond the points.
"""

from __future__ import annotations

import itertools
import math
from collections.abc import Callable, Mapping
from dataclasses import dataclass

from specsheet.findings import Finding, Origin
from specsheet.fluid.model import GAS_CONSTANT, Condition, Method, Refused, both, note, stop
from specsheet.fluid.phases import GAS
from specsheet.fluid.state import Property, State
from specsheet.quantity.value import Base

_BETWEEN = Method("between the values stated at two points", "", 0.02)
_GAS_LAW = Method("gas law with the stated molar mass and compressibility factor", "", 0.01)
_IDEAL = Method("ideal gas with the stated molar mass", "", 0.01, Origin.TYPICAL)


@dataclass(frozen=True, slots=True)
class Row:
    """What is stated at one point, SI; None where it is not.

    Attributes:
        temperature: [K]
        pressure: [Pa]
        density: [kg/m3]
        viscosity: dynamic [Pa s]
        compressibility: [-]
    """

    temperature: float
    pressure: float
    density: float | None
    viscosity: float | None
    compressibility: float | None


@dataclass(frozen=True, slots=True)
class Given:
    """A fluid known by the rows the user states."""

    phase: str
    rows: tuple[Row, ...]
    molar_mass: float | None = None
    name: str = "fluid as stated"

    def state(self, condition: Condition) -> State:
        """Return what the rows say at a condition; a property they do not cover is missing."""
        temperature, pressure = both(condition)
        values: dict[str, Property] = {}
        density = self._density(temperature, pressure)
        if density is not None:
            values["density"] = density
        viscosity = self._between(temperature, lambda row: row.viscosity, logarithm=True)
        if viscosity is not None:
            values["viscosity"] = _BETWEEN(viscosity)
        if self.phase == GAS and self.molar_mass is not None and density is not None:
            factor = pressure * self.molar_mass / (density.value * GAS_CONSTANT * temperature)
            values["compressibility"] = _GAS_LAW(factor)
        return State(temperature, pressure, self.phase, values)

    def base(self, base: Base) -> State:
        """Return the density at base: by the ideal gas for a gas, between the rows for a liquid."""
        if self.phase != GAS:
            return self.state(Condition(base.temperature, base.pressure))
        if self.molar_mass is None:
            raise Refused(
                stop(
                    "base-density-missing",
                    "fluid.base_density",
                    "The density at base conditions is not known: state it, or the molar mass.",
                )
            )
        ideal = base.pressure * self.molar_mass / (GAS_CONSTANT * base.temperature)
        text = "The density at base is that of an ideal gas of the stated molar mass."
        findings: tuple[Finding, ...] = (note("base-ideal", "fluid.molar_mass", text),)
        return State(base.temperature, base.pressure, GAS, {"density": _IDEAL(ideal)}, findings)

    def constants(self) -> Mapping[str, Property]:
        """Return the molar mass where it is stated."""
        if self.molar_mass is None:
            return {}
        return {"molar_mass": Property(self.molar_mass, Origin.GIVEN, "stated")}

    def _density(self, temperature: float, pressure: float) -> Property | None:
        if self.phase != GAS:
            found = self._between(temperature, lambda row: row.density, logarithm=False)
            return None if found is None else _BETWEEN(found)
        if self.molar_mass is not None:
            factor = self._between(temperature, lambda row: row.compressibility, logarithm=False)
            if factor is not None:
                ideal = pressure * self.molar_mass / (GAS_CONSTANT * temperature)
                return _GAS_LAW(ideal / factor)
        # density by the gas law is density over p/T, which changes as slowly as 1/Z does
        found = self._between(
            temperature,
            lambda row: (
                None if row.density is None else row.density * row.temperature / row.pressure
            ),
            logarithm=False,
        )
        return None if found is None else _BETWEEN(found * pressure / temperature)

    def _between(
        self, temperature: float, pick: Callable[[Row], float | None], *, logarithm: bool
    ) -> float | None:
        """Return a value between the rows that state it; None outside their temperatures."""
        known = sorted(
            (row.temperature, value) for row in self.rows if (value := pick(row)) is not None
        )
        if not known or not known[0][0] - 0.5 <= temperature <= known[-1][0] + 0.5:
            return None
        for (first, low), (last, high) in itertools.pairwise(known):
            if last > first and first <= temperature <= last:
                if logarithm:
                    share = (1 / first - 1 / temperature) / (1 / first - 1 / last)
                    return math.exp(math.log(low) + share * math.log(high / low))
                return low + (high - low) * (temperature - first) / (last - first)
        nearest = min(known, key=lambda item: abs(item[0] - temperature))
        return nearest[1]
