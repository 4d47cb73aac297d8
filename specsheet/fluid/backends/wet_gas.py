"""Gases with a stated relative humidity, humid and compressed air among them.

Relative humidity is the mole fraction of water by that at saturation, at the same temperature and
pressure. Saturation is found from the fugacity of water in the gas and in liquid water or ice, so
that the rise of the water content with pressure is in it. A water dew point fixes the water
content once, at the pressure of the normal point, so it needs no fluid of its own kind.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import lru_cache

from specsheet.fluid import library, mixture_state, water_in_gas
from specsheet.fluid.backends.mixture import AIR, Mixture
from specsheet.fluid.calorific import Composition
from specsheet.fluid.model import Condition, Refused, bar, both, celsius, stop
from specsheet.fluid.phases import GAS
from specsheet.fluid.state import Property, State
from specsheet.quantity.value import Base

#: states to find the water of a saturated gas from, at most
_STATES = 3
#: a step by the one before, below which the rest of them is a geometric series to 1e-7 or better
_SMALL = 0.015


@dataclass(frozen=True, slots=True)
class WetGas:
    """A gas stated dry, with a relative humidity at every point.

    Attributes:
        dry: mole fractions without water, summing to one.
        relative_humidity: from 0 to 1 [-].
        reference: where the water content counts for base conditions: the normal point.
        combustion_temperature: [K]
    """

    dry: Composition
    relative_humidity: float
    reference: Condition
    combustion_temperature: float = 288.15

    @property
    def phase(self) -> str:
        """Always gas."""
        return GAS

    @property
    def name(self) -> str:
        """What the sheet calls it."""
        return "humid air" if self.dry == AIR else f"wet {Mixture(self.dry, GAS).name}"

    def state(self, condition: Condition) -> State:
        """Return the state with the water that the humidity gives there."""
        both(condition)
        return self._at(condition).state(condition)

    def base(self, base: Base) -> State:
        """Return the state at base of the gas as humid as at the normal point."""
        return self._at(self.reference).base(base)

    def constants(self) -> Mapping[str, Property]:
        """Return molar mass and calorific values of the gas at the normal point."""
        try:
            return self._at(self.reference).constants()
        except Refused:
            return Mixture(self.dry, GAS, self.combustion_temperature).constants()

    def _at(self, condition: Condition) -> Mixture:
        temperature, pressure = both(condition)
        fraction = self.relative_humidity * saturated(self.dry, temperature, pressure)
        return Mixture(wetted(self.dry, fraction), GAS, self.combustion_temperature)


def wetted(dry: Composition, fraction: float) -> Composition:
    """Return a dry composition with a mole fraction of water in it.

    Raises:
        Refused: the fraction is one or more.
    """
    if fraction >= 0.999:
        raise Refused(
            stop(
                "humidity-range",
                "temperature",
                "At this temperature and pressure a gas of the stated humidity would be all water "
                "vapour. Check them, or state the composition with its water.",
            )
        )
    scaled = tuple((key, value * (1.0 - fraction)) for key, value in dry)
    return (*scaled, ("water", fraction)) if fraction > 0.0 else scaled


@lru_cache(maxsize=64)
def saturated(dry: Composition, temperature: float, pressure: float) -> float:
    """Return the mole fraction of water at which a dry gas is saturated with it [-].

    Args:
        dry: mole fractions without water.
        temperature: [K], from -100 degC.
        pressure: [Pa]

    Raises:
        Refused: water alone would fill the space, or there is no such state.
    """
    if not pressure >= 1.0:
        text = f"A pressure was wanted for the humidity, {bar(pressure)} came."
        raise Refused(stop("fluid-limit", "pressure", text))
    if not temperature >= 173.15:
        text = f"Humidity is described from -100 °C; {celsius(temperature)} came."
        raise Refused(stop("fluid-limit", "temperature", text))
    fraction = water_in_gas.saturation(temperature) / pressure
    if fraction >= 0.98:
        text = (
            f"At {celsius(temperature)} and {bar(pressure)} water alone fills the space, so a "
            "relative humidity means nothing. State the composition with its water."
        )
        raise Refused(stop("humidity-range", "temperature", text))
    step = 0.0
    for _ in range(_STATES):
        before, last = fraction, step
        fraction = _held(wetted(dry, min(fraction, 0.98)), temperature, pressure)
        step = fraction - before
        # each step is the same small share of the one before: what is left of them is known
        if abs(step) < 1e-6 * fraction or (last and abs(step) < _SMALL * abs(last)):
            break
    return fraction + step * step / (last - step) if abs(step) < 0.5 * abs(last) else fraction


def _held(wet: Composition, temperature: float, pressure: float) -> float:
    """Return the mole fraction of water at which a gas near to it is saturated [-].

    Raises:
        Refused: there is no such gas.
    """
    try:
        state = mixture_state.updated(wet, GAS, temperature, pressure)
    except library.ERRORS:
        mixture_state.forget()
        text = f"No gas of this composition exists at {celsius(temperature)}."
        raise Refused(stop("fluid-no-state", "temperature", text)) from None
    return water_in_gas.saturated_fraction(wet, temperature, pressure, state)
