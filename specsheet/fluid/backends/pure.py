"""Pure substances (and air) by their reference equations of state."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache, lru_cache
from typing import Any

from specsheet.findings import Finding
from specsheet.fluid import calorific, library, limits, names, saturation, transport
from specsheet.fluid.errors import translate
from specsheet.fluid.model import Condition, Method, Refused, bar, caution, celsius, note, stop
from specsheet.fluid.phases import GAS, LIQUID, SUPERCRITICAL, TWO_PHASE
from specsheet.fluid.state import Property, State
from specsheet.quantity.value import Base
from specsheet.sources import cite

#: a stated temperature this near to saturation is taken as saturated [K]
SNAP = 0.05
#: shares of the critical temperature and pressure within which a density is hard to hold
NEAR_TEMPERATURE, NEAR_PRESSURE = 0.03, 0.2

_EQUATION = "reference equation of state"
_SOURCE = cite("coolprop")
_PLAIN = Method(_EQUATION, _SOURCE, 0.002)
_SOUND = Method(_EQUATION, _SOURCE, 0.01)
_HEAT = Method(_EQUATION, _SOURCE, 0.02)
_KAPPA = Method("ρc²/p of the real gas, " + _EQUATION, _SOURCE, 0.02)
_SATURATION = Method(_EQUATION + ", saturation line", _SOURCE, 0.005)
_MOLAR = Method("molar mass", _SOURCE, 0.0)
#: uncertainties near the critical point, where a kelvin moves the density much (our judgement)
_LOOSE: Mapping[str, float] = {
    "density": 0.02,
    "compressibility": 0.02,
    "sound_speed": 0.05,
    "isentropic_exponent": 0.05,
    "heat_capacity": 0.2,
    "viscosity": 0.05,
    "kinematic_viscosity": 0.05,
    "thermal_conductivity": 0.2,
}


@cache
def state_of(equation: str) -> Any:
    """Return the one state object of an equation; callers hold the lock of the room."""
    return library.fluids().AbstractState("HEOS", equation)


@lru_cache(maxsize=64)
def _range(key: str) -> limits.Range:
    """Return the limits of the equation of a substance."""
    item = names.substances()[key]
    return limits.Range(
        item.lowest_temperature,
        item.highest_temperature,
        item.highest_pressure,
        _SOURCE,
        above=0.1 * item.highest_temperature,
    )


@dataclass(frozen=True, slots=True)
class Pure:
    """A pure substance; ``phase`` is the one stated."""

    key: str
    phase: str
    combustion_temperature: float = 288.15

    @property
    def substance(self) -> names.Substance:
        """The substance with its constants."""
        return names.substances()[self.key]

    @property
    def name(self) -> str:
        """What the sheet calls it."""
        return self.substance.name

    def state(self, condition: Condition) -> State:
        """Return the state; with one of temperature and pressure missing, the saturated one."""
        temperature, pressure = condition.temperature, condition.pressure
        if temperature is None or pressure is None:
            return self._saturated(condition, ())
        findings = _range(self.key).check(temperature, pressure, self.name)
        boiling = self.boiling(pressure)
        if boiling is not None and abs(temperature - boiling) <= SNAP:
            return self._saturated(Condition(None, pressure), (*findings, self._snapped()))
        module, state = library.fluids(), state_of(self.substance.equation)
        self._update(state, module.PT_INPUTS, pressure, temperature, temperature, pressure)
        phase = self._phase(module, state)
        values = self._properties(state, phase, temperature, pressure, boiling)
        near = self._near_critical(temperature, pressure)
        for key in values.keys() & _LOOSE.keys() if near else ():
            wide = max(values[key].uncertainty, _LOOSE[key])
            values[key] = values[key]._replace(uncertainty=wide)
        return State(temperature, pressure, phase, values, (*findings, *near))

    def base(self, base: Base) -> State:
        """Return the state at base; none of a density for a vapour that is liquid there."""
        found = self.state(Condition(base.temperature, base.pressure))
        if self.phase and found.phase in (GAS, LIQUID) and found.phase != self.phase:
            text = (
                f"{self.name} is a {found.phase} at the base condition, so a volume of the "
                f"{self.phase} at base has no meaning: state its flow by mass."
            )
            findings = (note(f"base-{found.phase}", "", text),)
            return State(base.temperature, base.pressure, found.phase, {}, findings)
        density = found.value("density")
        if density is None or self.phase != GAS:
            return found
        composition = ((self.key, 1.0),)
        extra = calorific.by_volume(composition, density, self.combustion_temperature, base)
        return State(
            base.temperature,
            base.pressure,
            found.phase,
            {**found.properties, **extra},
            found.findings,
        )

    def constants(self) -> Mapping[str, Property]:
        """Return molar mass and calorific values by mass."""
        composition = ((self.key, 1.0),)
        return {
            "molar_mass": _MOLAR(self.substance.molar_mass),
            **calorific.by_mass(composition, self.combustion_temperature),
        }

    def boiling(self, pressure: float) -> float | None:
        """Return the boiling temperature [K] at a pressure [Pa]; None off the saturation line."""
        return saturation.boiling_temperature(self.substance, pressure)

    def vapour_pressure(self, temperature: float) -> float | None:
        """Return the vapour pressure [Pa] at a temperature [K]; None off the saturation line."""
        return saturation.vapour_pressure(self.substance, temperature)

    def _near_critical(self, temperature: float, pressure: float) -> tuple[Finding, ...]:
        item = self.substance
        near = (
            abs(temperature / item.critical_temperature - 1.0) < NEAR_TEMPERATURE
            and abs(pressure / item.critical_pressure - 1.0) < NEAR_PRESSURE
        )
        if not near:
            return ()
        text = (
            f"{self.name} is near its critical point ({celsius(item.critical_temperature)}, "
            f"{bar(item.critical_pressure)}): a kelvin or a few per cent of pressure change the "
            "density by many per cent. Meter it elsewhere, or by mass."
        )
        return (caution("near-critical", "temperature", text, _SOURCE),)

    def _update(
        self,
        state: Any,
        inputs: Any,
        first: float,
        second: float,
        temperature: float,
        pressure: float,
    ) -> None:
        try:
            state.update(inputs, first, second)
            density = state.rhomass()
        except library.ERRORS as error:
            state_of.cache_clear()  # what a failed object holds cannot be trusted
            raise Refused(translate(error, self.name, temperature, pressure)) from None
        if not (math.isfinite(density) and density > 0.0):
            state_of.cache_clear()  # what a failed object holds cannot be trusted
            raise Refused(translate(ValueError(), self.name, temperature, pressure))

    def _phase(self, module: Any, state: Any) -> str:
        """Return the phase found; a dense fluid above both critical values is supercritical."""
        found = state.phase()
        if found in (module.iphase_liquid, module.iphase_supercritical_liquid):
            return LIQUID
        if found in (module.iphase_gas, module.iphase_supercritical_gas):
            return GAS
        if found == module.iphase_twophase:
            return TWO_PHASE
        return GAS if state.rhomass() < 0.7 * state.rhomass_critical() else SUPERCRITICAL

    def _snapped(self) -> Finding:
        return note(
            "on-saturation",
            "temperature",
            f"Pressure and temperature lie on the saturation line within {SNAP} K: the state is "
            f"taken as saturated {self.phase}.",
            _SOURCE,
        )

    def _saturated(self, condition: Condition, findings: tuple[Finding, ...]) -> State:
        """Return the saturated state at the pressure or the temperature that is stated."""
        module, state = library.fluids(), state_of(self.substance.equation)
        gas = self.phase == GAS
        quality = 1.0 if gas else 0.0
        temperature, pressure = self._saturation(condition)
        self._update(state, module.PQ_INPUTS, pressure, quality, temperature, pressure)
        phase = GAS if gas else LIQUID
        values = self._properties(state, phase, temperature, pressure, temperature)
        return State(temperature, pressure, phase, values, findings)

    def _saturation(self, condition: Condition) -> tuple[float, float]:
        if condition.pressure is not None:
            temperature = self.boiling(condition.pressure)
            if temperature is not None:
                return temperature, condition.pressure
            field, came = "pressure", bar(condition.pressure)
        elif condition.temperature is not None:
            pressure = self.vapour_pressure(condition.temperature)
            if pressure is not None:
                return condition.temperature, pressure
            field, came = "temperature", celsius(condition.temperature)
        else:
            raise Refused(
                stop(
                    "conditions-missing",
                    "pressure",
                    "Neither pressure nor temperature is stated: state both.",
                )
            )
        raise Refused(
            stop(
                "saturation-none",
                field,
                f"Only the {field} is stated, which gives a saturated state; {self.name} has none "
                f"at {came}. State pressure and temperature.",
                _SOURCE,
            )
        )

    def _properties(
        self, state: Any, phase: str, temperature: float, pressure: float, boiling: float | None
    ) -> dict[str, Property]:
        """Return all properties of the state object as it stands."""
        density, sound = state.rhomass(), state.speed_sound()
        values = {
            "density": _PLAIN(density),
            "sound_speed": _SOUND(sound),
            "heat_capacity": _HEAT(state.cpmass()),
            "specific_enthalpy": _HEAT(state.hmass()),
        }
        values.update(transport.pure(self.substance, state, phase, temperature, density))
        if phase != LIQUID:
            values["compressibility"] = _PLAIN(state.compressibility_factor())
            values["isentropic_exponent"] = _KAPPA(density * sound * sound / pressure)
        if boiling is not None:
            margin = boiling - temperature if phase == LIQUID else temperature - boiling
            values["saturation_temperature"] = _SATURATION(boiling)
            values["saturation_margin"] = _SATURATION(margin)
        vapour = self.vapour_pressure(temperature)
        if vapour is not None:
            values["vapour_pressure"] = _SATURATION(vapour)
        return {key: item for key, item in values.items() if math.isfinite(item.value)}
