"""IAPWS-IF97 (2007): its limits, its saturation line and liquid water, without a fluid library.

The state object is shared by all of the room: whoever uses it holds the lock of the room and sets
the state anew.
"""

from __future__ import annotations

from functools import cache
from typing import Any

from specsheet.fluid import library
from specsheet.fluid.model import Condition, Refused, bar, celsius, stop
from specsheet.methods.seawater import Derivatives
from specsheet.sources import cite

SOURCE = cite("iapws-if97")
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


@cache
def objects() -> tuple[Any, Any]:
    """Return the extension and one state object; callers hold the lock of the room."""
    module = library.extension()
    return module, module.AbstractState("IF97", "Water")


def saturation_temperature(pressure: float) -> float | None:
    """Return the boiling temperature [K] at a pressure [Pa]; None off the saturation line."""
    if not TRIPLE_PRESSURE <= pressure < CRITICAL_PRESSURE:
        return None
    module, state = objects()
    state.update(module.PQ_INPUTS, pressure, 0.0)
    return float(state.T())


def saturation_pressure(temperature: float) -> float | None:
    """Return the vapour pressure [Pa] at a temperature [K]; None off the saturation line."""
    if not LOWEST_TEMPERATURE <= temperature < CRITICAL_TEMPERATURE:
        return None
    module, state = objects()
    state.update(module.QT_INPUTS, 0.0, temperature)
    return float(state.p())


def liquid_density(temperature: float, pressure: float) -> float:
    """Return the density [kg/m3] of liquid water, the pressure raised to boiling if need be."""
    boiling = saturation_pressure(temperature)
    module, state = objects()
    if boiling is not None and pressure <= boiling * (1.0 + 1e-6):
        state.update(module.QT_INPUTS, 0.0, temperature)
    else:
        state.update(module.PT_INPUTS, pressure, temperature)
    return float(state.rhomass())


def liquid_viscosity(temperature: float) -> float:
    """Return the viscosity [Pa s] of liquid water near saturation at a temperature [K]."""
    liquid_density(temperature, 101325.0)
    _, state = objects()
    return float(state.viscosity())


def liquid_heat_capacity(temperature: float) -> float:
    """Return the isobaric heat capacity [J/kg/K] of liquid water near saturation, at [K]."""
    liquid_density(temperature, 101325.0)
    _, state = objects()
    return float(state.cpmass())


def liquid_derivatives(temperature: float, pressure: float, step: float) -> Derivatives:
    """Return the derivatives of the Gibbs energy of liquid water, SI.

    Args:
        temperature: [K]
        pressure: [Pa], above boiling.
        step: on either side, for the slope of volume over temperature [K].
    """
    module, state = objects()
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


def check_limits(temperature: float, pressure: float) -> None:
    """Refuse a state outside the five regions."""
    if temperature < LOWEST_TEMPERATURE:
        raise Refused(
            stop(
                "fluid-limit",
                "temperature",
                f"Water is described from 0 °C; {celsius(temperature)} came. Below it water "
                "freezes: check the temperature.",
                SOURCE,
            )
        )
    if temperature > HIGHEST_TEMPERATURE:
        raise Refused(
            stop(
                "fluid-limit",
                "temperature",
                f"Steam is described up to 2000 °C; {celsius(temperature)} came. Check the "
                "temperature, or state density and viscosity at each point.",
                SOURCE,
            )
        )
    highest = REGION_5_PRESSURE if temperature > REGION_5_TEMPERATURE else HIGHEST_PRESSURE
    if not 0.0 < pressure <= highest:
        raise Refused(
            stop(
                "fluid-limit",
                "pressure",
                f"Water at {celsius(temperature)} is described up to {bar(highest)}; "
                f"{bar(pressure)} came. Check the pressure, or state density and viscosity at each "
                "point.",
                SOURCE,
            )
        )


def saturation(condition: Condition) -> tuple[float, float]:
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
                SOURCE,
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
                SOURCE,
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
