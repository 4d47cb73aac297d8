"""Water, steam and condensate by IAPWS-IF97 (2007), always; no library of fluids is loaded.

Uncertainties (k = 2, rounded up) are those of the releases, from memory: density 0.05 % in the
liquid and 0.1 % in steam, viscosity 1 % and 2 %, thermal conductivity 2 %, sound speed 0.3 %.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from typing import Any

from specsheet.findings import Finding, Origin
from specsheet.fluid import library
from specsheet.fluid.model import (
    GAS_CONSTANT,
    Condition,
    Method,
    Refused,
    bar,
    caution,
    celsius,
    note,
    stop,
)
from specsheet.fluid.phases import GAS, LIQUID, SUPERCRITICAL, TWO_PHASE
from specsheet.fluid.state import Property, State
from specsheet.methods.seawater import Derivatives
from specsheet.quantity.value import Base
from specsheet.sources import cite

MOLAR_MASS = 0.01801528  # [kg/mol], IAPWS R5-85 and ISO 6976:2016
LOWEST_TEMPERATURE = 273.15
CRITICAL_TEMPERATURE = 647.096
CRITICAL_PRESSURE = 22.064e6
TRIPLE_PRESSURE = 611.2135  # a hair above that of the saturation equation at 273.15 K
HIGHEST_PRESSURE = 100e6
HIGHEST_TEMPERATURE = 2273.15
#: above 1073.15 K (region 5) the pressure is limited further
REGION_5_TEMPERATURE = 1073.15
REGION_5_PRESSURE = 50e6
#: a stated temperature this near to saturation is taken as saturated [K]
SNAP = 0.05

_IF97 = cite("iapws-if97")
_LIQUID = Method("IAPWS-IF97", _IF97, 0.0005)
_STEAM = Method("IAPWS-IF97", _IF97, 0.001)
_SOUND = Method("IAPWS-IF97", _IF97, 0.003)
_HEAT = Method("IAPWS-IF97", _IF97, 0.005)
_SATURATION = Method("IAPWS-IF97, saturation line", _IF97, 0.0005)
_VISCOSITY = Method("IAPWS viscosity of water (2008)", cite("iapws-r12-08"), 0.02)
_CONDUCTIVITY = Method("IAPWS thermal conductivity of water (2011)", cite("iapws-r15-11"), 0.02)
_KAPPA = Method("ρc²/p of the real gas, IAPWS-IF97", _IF97, 0.006)
_MIXED = Method("no slip between vapour and water: 1/ρ = x/ρv + (1-x)/ρl", _IF97, 0.02)
_MOLAR = Method("molar mass of water", cite("iapws-if97"), 0.0)


@cache
def _states() -> tuple[Any, Any]:
    """Return the extension and one state object; callers hold the lock of the room."""
    module = library.extension()
    return module, module.AbstractState("IF97", "Water")


def saturation_temperature(pressure: float) -> float | None:
    """Return the boiling temperature [K] at a pressure [Pa]; None off the saturation line."""
    if not TRIPLE_PRESSURE <= pressure < CRITICAL_PRESSURE:
        return None
    module, state = _states()
    state.update(module.PQ_INPUTS, pressure, 0.0)
    return float(state.T())


def saturation_pressure(temperature: float) -> float | None:
    """Return the vapour pressure [Pa] at a temperature [K]; None off the saturation line."""
    if not LOWEST_TEMPERATURE <= temperature < CRITICAL_TEMPERATURE:
        return None
    module, state = _states()
    state.update(module.QT_INPUTS, 0.0, temperature)
    return float(state.p())


def liquid_density(temperature: float, pressure: float) -> float:
    """Return the density [kg/m3] of liquid water, the pressure raised to boiling if need be."""
    boiling = saturation_pressure(temperature)
    module, state = _states()
    if boiling is not None and pressure <= boiling * (1.0 + 1e-6):
        state.update(module.QT_INPUTS, 0.0, temperature)
    else:
        state.update(module.PT_INPUTS, pressure, temperature)
    return float(state.rhomass())


def liquid_viscosity(temperature: float) -> float:
    """Return the viscosity [Pa s] of liquid water near saturation at a temperature [K]."""
    liquid_density(temperature, 101325.0)
    _, state = _states()
    return float(state.viscosity())


def liquid_derivatives(temperature: float, pressure: float, step: float) -> Derivatives:
    """Return the derivatives of the Gibbs energy of liquid water, SI.

    Args:
        temperature: [K]
        pressure: [Pa], above boiling.
        step: on either side, for the slope of volume over temperature [K].
    """
    module, state = _states()
    low, high = max(temperature - step, LOWEST_TEMPERATURE), temperature + step
    volumes = []
    for side in (low, high):
        state.update(module.PT_INPUTS, pressure, side)
        volumes.append(1.0 / state.rhomass())
    slope = (volumes[1] - volumes[0]) / (high - low)
    state.update(module.PT_INPUTS, pressure, temperature)
    volume, heat, sound = 1.0 / state.rhomass(), state.cpmass(), state.speed_sound()
    curve = -heat / temperature
    return Derivatives(volume, curve, slope, slope**2 / curve - (volume / sound) ** 2)


@dataclass(frozen=True, slots=True)
class Water:
    """Water in any phase; ``phase`` is the one stated."""

    phase: str

    @property
    def name(self) -> str:
        """What the sheet calls it."""
        return "steam" if self.phase == GAS else "water"

    def state(self, condition: Condition) -> State:
        """Return the state; with one of temperature and pressure missing, the saturated one."""
        temperature, pressure = condition.temperature, condition.pressure
        if temperature is None or pressure is None:
            return self._saturated(condition, ())
        _check_limits(temperature, pressure)
        boiling = saturation_temperature(pressure)
        if boiling is not None and abs(temperature - boiling) <= SNAP:
            return self._saturated(Condition(None, pressure, condition.dryness), self._snapped())
        findings: tuple[Finding, ...] = ()
        if condition.dryness is not None:
            findings = (_dryness_idle(temperature, boiling),)
        return _single(temperature, pressure, boiling, findings)

    def base(self, base: Base) -> State:
        """Return the state at base; none of a density for steam, which is liquid there."""
        found = self.state(Condition(base.temperature, base.pressure))
        if self.phase != GAS or found.phase == GAS:
            return found
        return State(
            base.temperature,
            base.pressure,
            found.phase,
            {},
            (
                note(
                    "base-liquid",
                    "",
                    "Steam is liquid at the base condition, so a volume at base has no meaning: "
                    "state steam by mass.",
                ),
            ),
        )

    def constants(self) -> Mapping[str, Property]:
        """Return the molar mass."""
        return {"molar_mass": _MOLAR(MOLAR_MASS)}

    def _snapped(self) -> tuple[Finding, ...]:
        return (
            note(
                "on-saturation",
                "temperature",
                f"Pressure and temperature lie on the saturation line within {SNAP} K: the state "
                f"is taken as saturated {'steam' if self.phase == GAS else 'water'}.",
                _IF97,
            ),
        )

    def _saturated(self, condition: Condition, findings: tuple[Finding, ...]) -> State:
        """Return the saturated state at the pressure or the temperature that is stated."""
        temperature, pressure = _saturation(condition)
        dryness = condition.dryness
        if dryness is None:
            dryness = 1.0 if self.phase == GAS else 0.0
        if not 0.0 <= dryness <= 1.0:
            raise Refused(
                stop(
                    "dryness-range",
                    "dryness_fraction",
                    f"A dryness fraction from 0 % to 100 % was wanted, {dryness:.4g} came.",
                )
            )
        if 0.0 < dryness < 1.0:
            return _wet(temperature, pressure, dryness, findings)
        module, state = _states()
        state.update(module.PQ_INPUTS, max(pressure, TRIPLE_PRESSURE), dryness)
        gas = dryness == 1.0
        return State(
            temperature,
            pressure,
            GAS if gas else LIQUID,
            _properties(state, temperature, pressure, temperature, gas),
            findings,
        )


def _check_limits(temperature: float, pressure: float) -> None:
    """Refuse a state outside the five regions."""
    if temperature < LOWEST_TEMPERATURE:
        raise Refused(
            stop(
                "fluid-limit",
                "temperature",
                f"Water is described from 0 °C; {celsius(temperature)} came. Below it water "
                "freezes: check the temperature.",
                _IF97,
            )
        )
    if temperature > HIGHEST_TEMPERATURE:
        raise Refused(
            stop(
                "fluid-limit",
                "temperature",
                f"Steam is described up to 2000 °C; {celsius(temperature)} came.",
                _IF97,
            )
        )
    highest = REGION_5_PRESSURE if temperature > REGION_5_TEMPERATURE else HIGHEST_PRESSURE
    if not 0.0 < pressure <= highest:
        raise Refused(
            stop(
                "fluid-limit",
                "pressure",
                f"Water at {celsius(temperature)} is described up to {bar(highest)}; "
                f"{bar(pressure)} came.",
                _IF97,
            )
        )


def _saturation(condition: Condition) -> tuple[float, float]:
    """Return temperature [K] and pressure [Pa] of saturation."""
    if condition.pressure is not None:
        temperature = saturation_temperature(condition.pressure)
        if temperature is not None:
            return temperature, condition.pressure
        raise Refused(
            stop(
                "saturation-none",
                "pressure",
                f"Saturated water was wanted, but there is none at {bar(condition.pressure)}: it "
                f"exists from {bar(TRIPLE_PRESSURE)} to {bar(CRITICAL_PRESSURE)}. State the "
                "temperature too.",
                _IF97,
            )
        )
    if condition.temperature is not None:
        pressure = saturation_pressure(condition.temperature)
        if pressure is not None:
            return condition.temperature, pressure
        raise Refused(
            stop(
                "saturation-none",
                "temperature",
                f"Saturated water was wanted, but there is none at "
                f"{celsius(condition.temperature)}: it exists from 0 °C to "
                f"{celsius(CRITICAL_TEMPERATURE)}. State the pressure too.",
                _IF97,
            )
        )
    raise Refused(
        stop(
            "conditions-missing",
            "pressure",
            "Neither pressure nor temperature is stated: state both, or one of them for a "
            "saturated state.",
        )
    )


def _dryness_idle(temperature: float, boiling: float | None) -> Finding:
    away = "there is no saturation at this pressure"
    if boiling is not None:
        away = f"the state is {temperature - boiling:+.3g} K off saturation"
    return caution(
        "dryness-unused",
        "dryness_fraction",
        f"A dryness fraction is stated, but {away}. It is not used: leave out the temperature for "
        "wet steam, or the dryness fraction for superheated steam.",
    )


def _single(
    temperature: float, pressure: float, boiling: float | None, findings: tuple[Finding, ...]
) -> State:
    """Return a state off the saturation line."""
    module, state = _states()
    state.update(module.PT_INPUTS, pressure, temperature)
    if boiling is not None:
        phase = GAS if temperature > boiling else LIQUID
    elif pressure < CRITICAL_PRESSURE:
        phase = GAS
    else:
        phase = LIQUID if temperature < CRITICAL_TEMPERATURE else SUPERCRITICAL
    values = _properties(state, temperature, pressure, boiling, phase != LIQUID)
    return State(temperature, pressure, phase, values, findings)


def _properties(
    state: Any, temperature: float, pressure: float, boiling: float | None, gas: bool
) -> dict[str, Property]:
    """Return all properties of the state object as it stands."""
    density = state.rhomass()
    viscosity = state.viscosity()
    sound = state.speed_sound()
    plain = _STEAM if gas else _LIQUID
    values = {
        "density": plain(density),
        "viscosity": _VISCOSITY(viscosity),
        "kinematic_viscosity": _VISCOSITY(viscosity / density),
        "sound_speed": _SOUND(sound),
        "heat_capacity": _HEAT(state.cpmass()),
        "thermal_conductivity": _CONDUCTIVITY(state.conductivity()),
        "specific_enthalpy": plain(state.hmass()),
    }
    if gas:
        ideal = pressure * MOLAR_MASS / (GAS_CONSTANT * temperature)
        values["compressibility"] = _STEAM(ideal / density)
        values["isentropic_exponent"] = _KAPPA(density * sound * sound / pressure)
    if boiling is not None:
        margin = temperature - boiling if gas else boiling - temperature
        values["saturation_temperature"] = _SATURATION(boiling)
        values["saturation_margin"] = _SATURATION(margin)
    vapour = saturation_pressure(temperature)
    if vapour is not None:
        values["vapour_pressure"] = _SATURATION(vapour)
    return values


def _wet(
    temperature: float, pressure: float, dryness: float, findings: tuple[Finding, ...]
) -> State:
    """Return wet steam: density of the mixture without slip, all else of the dry vapour."""
    module, state = _states()
    state.update(module.PQ_INPUTS, pressure, dryness)
    density, enthalpy = state.rhomass(), state.hmass()
    state.update(module.PQ_INPUTS, pressure, 1.0)
    values = _properties(state, temperature, pressure, temperature, True)
    values["density"] = _MIXED(density)
    values["specific_enthalpy"] = _STEAM(enthalpy)
    values["kinematic_viscosity"] = _VISCOSITY(values["viscosity"].value / density)
    values["dryness_fraction"] = Property(dryness, Origin.GIVEN, "stated at the point")
    del values["sound_speed"], values["compressibility"]
    wet = caution(
        "wet-steam",
        "dryness_fraction",
        f"Wet steam: {100 * (1 - dryness):.3g} % of the mass is water. Density is that of the "
        "mixture without slip; viscosity and isentropic exponent are those of the dry vapour. "
        "Meters read wet steam with an error that the bidder must state; a separator upstream is "
        "the usual remedy.",
        _IF97,
    )
    return State(temperature, pressure, TWO_PHASE, values, (*findings, wet))
