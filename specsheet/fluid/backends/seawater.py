"""Seawater: pure water by IAPWS-IF97 and the saline part of IAPWS R13-08."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache

from specsheet import packs
from specsheet.fluid import if97
from specsheet.fluid.limits import Range
from specsheet.fluid.model import Condition, Method, Refused, both, stop
from specsheet.fluid.phases import LIQUID, TWO_PHASE
from specsheet.fluid.state import Property, State
from specsheet.methods import seawater as method
from specsheet.quantity.value import Base
from specsheet.sources import cite

HIGHEST_SALINITY = 0.12
#: the slope of density over pressure, which the sound speed needs, was measured in the ocean only
SOUND_TEMPERATURE, SOUND_SALINITY = 313.15, 0.05
_SOURCE = cite("iapws-r13-08")
_PLAIN = Method("IAPWS-IF97 and saline part", _SOURCE, 0.001)
_HEAT = Method("IAPWS-IF97 and saline part", _SOURCE, 0.005)
_VISCOSITY = Method("viscosity of water and salt", cite("sharqawy"), 0.03)
_VAPOUR = Method("vapour pressure of water, lowered by the salt", cite("sharqawy"), 0.02)
_RANGE = Range(273.15, 353.15, 100e6, _SOURCE, above=20.0, over=1.0)
_STEP = 0.05  # [K], for the slope of volume over temperature


@cache
def _terms() -> tuple[tuple[int, int, int, float], ...]:
    return tuple((i, j, k, g) for i, j, k, g in packs.table("fluids/seawater")["terms"])


@dataclass(frozen=True, slots=True)
class Seawater:
    """Seawater of one salinity (absolute, by mass [-])."""

    salinity: float
    phase: str

    @property
    def name(self) -> str:
        """What the sheet calls it."""
        return f"seawater, {1000 * self.salinity:.3g} g/kg salt"

    def state(self, condition: Condition) -> State:
        """Return the state of the liquid."""
        temperature, pressure = both(condition)
        if not 0.0 <= self.salinity <= HIGHEST_SALINITY:
            raise Refused(
                stop(
                    "concentration-limit",
                    "fluid.salinity",
                    f"Seawater is described up to {1000 * HIGHEST_SALINITY:g} g/kg of salt; "
                    f"{1000 * self.salinity:.4g} g/kg came. State it as a solution of sodium "
                    "chloride, or state density and viscosity yourself.",
                    _SOURCE,
                )
            )
        findings = _RANGE.check(temperature, pressure, "seawater")
        boiling = if97.saturation_pressure(temperature)
        assert boiling is not None  # the range ends far below the critical point
        vapour = boiling * method.vapour_pressure_ratio(self.salinity)
        phase = LIQUID if pressure > vapour else TWO_PHASE
        values = self._properties(temperature, max(pressure, 1.01 * boiling))
        values["vapour_pressure"] = _VAPOUR(vapour)
        return State(temperature, pressure, phase, values, findings)

    def base(self, base: Base) -> State:
        """Return the state at base."""
        return self.state(Condition(base.temperature, base.pressure))

    def constants(self) -> Mapping[str, Property]:
        """Return nothing: no property of seawater stands apart from its state."""
        return {}

    def _properties(self, temperature: float, pressure: float) -> dict[str, Property]:
        pure = if97.liquid_derivatives(temperature, pressure, _STEP)
        salt = method.saline(
            temperature=temperature, pressure=pressure, salinity=self.salinity, terms=_terms()
        )
        whole = pure.plus(salt)
        density = 1.0 / whole.p
        viscosity = if97.liquid_viscosity(temperature) * method.viscosity_ratio(
            celsius=temperature - 273.15, salinity=self.salinity
        )
        values = {
            "density": _PLAIN(density),
            "heat_capacity": _HEAT(-temperature * whole.tt),
            "viscosity": _VISCOSITY(viscosity),
            "kinematic_viscosity": _VISCOSITY(viscosity / density),
        }
        if temperature <= SOUND_TEMPERATURE and self.salinity <= SOUND_SALINITY:
            values["sound_speed"] = _HEAT(whole.sound_speed())
        return values
