"""The true phase of a mixture, decided in steps from cheap and certain to exact.

1. A screen that is certain for gases: the water cannot saturate, and the sum of z/K by Wilson stays
   below one even 20 K colder (no dew point of 3000 random mixtures lay higher).
2. Water: its fugacity in the gas against that in liquid water (or ice) at the same state.
3. The rest: the tangent-plane test of a cubic equation, where it holds with room to spare.
4. Near the edge: the dew point (gas) or bubble point (liquid) of the equation of state, with gates
   that keep out false solutions.
5. The phase envelope, where it was found beforehand (:mod:`specsheet.fluid.envelope`).
What none of them settles is "unverified", never guessed. No step depends on what was asked before,
but the last: that is taken where nothing else settles the phase, and once it has been found.
"""

from __future__ import annotations

import math
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass, field
from functools import lru_cache
from typing import Any, NamedTuple

from specsheet.findings import Finding, Origin
from specsheet.fluid import (
    dew_curve,
    dew_point,
    envelope,
    if97,
    library,
    mixture_state,
    names,
    water_in_gas,
)
from specsheet.fluid.backends import pure
from specsheet.fluid.calorific import Composition
from specsheet.fluid.model import Method, caution, celsius
from specsheet.fluid.phases import GAS, LIQUID, TWO_PHASE, UNVERIFIED
from specsheet.fluid.state import Property
from specsheet.methods import cubic, equilibrium
from specsheet.sources import cite

#: the Wilson estimate is never colder than the dew point by more than this [K]
MARGIN = 20.0
#: a water content this near to saturation, relative, is saturated and not beyond it
SATURATED = 1e-5
#: a dew point nearer than this is worth a word [K]
NEAR = 3.0

_ESTIMATE = Method("estimate from critical constants", cite("wilson"), 0.08, Origin.TYPICAL)
_DEW = Method("dew point of the equation of state", cite("coolprop"), 0.01)
_ENVELOPE = Method("phase envelope of the equation of state", cite("coolprop"), 0.01)
_WATER_DEW = Method("water in the gas as in liquid water (fugacity)", cite("coolprop"), 0.005)
_BUBBLE = Method("bubble point of the equation of state", cite("coolprop"), 0.03)


@dataclass(frozen=True, slots=True)
class Verdict:
    """What the phase is, and what is known of the dew or bubble point."""

    phase: str
    values: Mapping[str, Property] = field(default_factory=dict)
    findings: tuple[Finding, ...] = ()


def decide(
    composition: Composition, phase: str, temperature: float, pressure: float, state: Any
) -> Verdict:
    """Return the verdict on a mixture whose state object stands at the state imposed.

    Args:
        composition: components and mole fractions.
        phase: the phase stated and imposed.
        temperature: [K]
        pressure: [Pa]
        state: state object of the fluid library, updated.
    """
    if phase == GAS:
        return _gas(composition, temperature, pressure, state)
    return _liquid(composition, temperature, pressure)


def _gas(composition: Composition, temperature: float, pressure: float, state: Any) -> Verdict:
    wet = _wet_verdict(composition, temperature, pressure, state)
    if wet is not None and wet.phase != GAS:
        return wet
    dry = _dry_verdict(composition, temperature, pressure)
    if dry.phase != GAS or wet is None:
        return dry
    # the dew point is the higher of the two: that of water, or that of all else
    warmest = max(
        (*dry.values.values(), *wet.values.values()), key=lambda item: item.value, default=None
    )
    values = {} if warmest is None else {"dew_temperature": warmest}
    return Verdict(GAS, values, (*dry.findings, *wet.findings))


# Water in the gas ----------------------------------------------------------------------------


def _wet_verdict(
    composition: Composition, temperature: float, pressure: float, state: Any
) -> Verdict | None:
    """Return the verdict on the water in a gas; None where there is none to speak of."""
    fraction = dict(composition).get("water", 0.0)
    if fraction <= 0.0 or temperature >= if97.CRITICAL_TEMPERATURE:
        return None
    if fraction * pressure < 0.5 * water_in_gas.saturation(temperature):
        return Verdict(
            GAS, {"dew_temperature": _WATER_DEW(water_in_gas.boiling(fraction * pressure))}
        )
    ratio = fraction / water_in_gas.saturated_fraction(composition, temperature, pressure, state)
    # the enhancement by pressure is taken as the same at the dew point
    dew = water_in_gas.boiling(ratio * water_in_gas.saturation(temperature))
    values = {"dew_temperature": _WATER_DEW(dew)}
    if ratio > 1.0 + SATURATED:
        return Verdict(TWO_PHASE, values)
    return Verdict(GAS, values, _near(dew, temperature, "water"))


# All else in the gas -------------------------------------------------------------------------


@lru_cache(maxsize=64)
def _dry(composition: Composition) -> tuple[tuple[float, ...], tuple[equilibrium.Critical, ...]]:
    """Return fractions of the composition without its water, summing to one, and constants."""
    kept = [(key, fraction) for key, fraction in composition if key != "water"]
    total = sum(fraction for _, fraction in kept)
    return mixture_state.critical(tuple((key, fraction / total) for key, fraction in kept))


def _dry_verdict(composition: Composition, temperature: float, pressure: float) -> Verdict:
    fractions, components = _dry(composition)
    colder = equilibrium.wilson_dew_sum(
        temperature=temperature - MARGIN,
        pressure=pressure,
        fractions=fractions,
        components=components,
    )
    if colder < 1.0:
        return Verdict(GAS, _wilson(composition, pressure))
    if len(fractions) == 1:
        return _lone(composition, temperature, pressure)
    at = _Place(fractions, components, temperature, pressure)
    if _clearly(GAS, at):
        return Verdict(GAS)
    dew = dew_curve.dew_temperature(without_water(composition), pressure)
    if dew is not None and temperature > dew:
        values = {"dew_temperature": _DEW(dew)}
        return Verdict(GAS, values, _near(dew, temperature, "the gas"))
    plain = _by_cubic(GAS, at)
    if dew is None:
        found = envelope.known(without_water(composition)) if plain == UNVERIFIED else None
        return Verdict(plain) if found is None else _by_envelope(found, temperature, pressure)
    return Verdict(LIQUID if plain == LIQUID else TWO_PHASE, {"dew_temperature": _DEW(dew)})


def _by_envelope(found: envelope.Envelope, temperature: float, pressure: float) -> Verdict:
    """Return the verdict on a gas whose phase envelope is known."""
    crossings = found.crossings(pressure)
    if not crossings:
        return Verdict(GAS)  # above the highest pressure of two phases
    values = {"dew_temperature": _ENVELOPE(crossings[-1])}
    if temperature > crossings[-1]:
        return Verdict(GAS, values, _near(crossings[-1], temperature, "the gas"))
    colder = len(crossings) > 1 and temperature < crossings[0]
    return Verdict(LIQUID if colder else TWO_PHASE, values)


def _lone(composition: Composition, temperature: float, pressure: float) -> Verdict:
    """Return the verdict on a gas of one component and water."""
    key = next(key for key, _ in composition if key != "water")
    vapour = pure.Pure(key, GAS).vapour_pressure(temperature)
    return Verdict(GAS if vapour is None or pressure < vapour else TWO_PHASE)


class _Place(NamedTuple):
    """A mixture somewhere: temperature [K], pressure [Pa]."""

    fractions: Sequence[float]
    components: Sequence[equilibrium.Critical]
    temperature: float
    pressure: float


def _around(stated: str, at: _Place) -> Iterator[str]:
    """Yield the phase by a cubic equation a little nearer to the other phase, there, and beyond.

    Dew points of the cubic and the multi-fluid equation lie within 5 % of the temperature (250
    random mixtures of up to six components), so an answer must hold that much colder and warmer.
    """
    nearer = -dew_point.CUBIC_MARGIN if stated == GAS else dew_point.CUBIC_MARGIN
    for factor in (1.0 + nearer, 1.0, 1.0 - nearer):
        yield cubic.phase(
            temperature=at.temperature * factor,
            pressure=at.pressure,
            fractions=at.fractions,
            components=at.components,
        )


def _clearly(stated: str, at: _Place) -> bool:
    """Tell whether a cubic equation gives the phase stated with room to spare (:func:`_around`)."""
    other = cubic.LIQUID if stated == GAS else cubic.GAS
    return all(phase not in (cubic.TWO, other) for phase in _around(stated, at))


def _by_cubic(stated: str, at: _Place) -> str:
    """Return the phase where a cubic equation gives it with room to spare, else unverified."""
    found = set(_around(stated, at))
    other = cubic.LIQUID if stated == GAS else cubic.GAS
    if cubic.TWO in found:
        return TWO_PHASE if len(found) == 1 else UNVERIFIED
    if other not in found:
        return stated
    return (LIQUID if stated == GAS else GAS) if len(found) == 1 else UNVERIFIED


@lru_cache(maxsize=64)
def without_water(composition: Composition) -> Composition:
    """Return a composition without its water, summing to one."""
    fractions, _ = _dry(composition)
    keys = [key for key, _ in composition if key != "water"]
    return tuple(zip(keys, fractions, strict=True))


@lru_cache(maxsize=64)
def _wilson(composition: Composition, pressure: float) -> Mapping[str, Property]:
    fractions, components = _dry(composition)
    found = equilibrium.wilson_dew_temperature(
        pressure=pressure, fractions=fractions, components=components
    )
    return {"dew_temperature": _ESTIMATE(found)}


def _near(dew: float, temperature: float, what: str) -> tuple[Finding, ...]:
    if temperature - dew > NEAR:
        return ()
    return (
        caution(
            "near-dew-point",
            "temperature",
            f"The dew point of {what} at this pressure is {celsius(dew)}, only "
            f"{max(temperature - dew, 0.0):.1f} K below the temperature: liquid may form at "
            "the meter. Heat or insulate the line, or choose a meter that bears droplets.",
        ),
    )


# Liquids -------------------------------------------------------------------------------------


def _liquid(composition: Composition, temperature: float, pressure: float) -> Verdict:
    bubble = bubble_pressure(composition, temperature)
    if bubble is not None:
        values = {"vapour_pressure": _BUBBLE(bubble)}
        return Verdict(LIQUID if pressure > bubble else TWO_PHASE, values)
    fractions, components = mixture_state.critical(composition)
    warmer = equilibrium.wilson_bubble_pressure(
        temperature=temperature + MARGIN, fractions=fractions, components=components
    )
    if pressure > warmer:
        return Verdict(LIQUID)
    return Verdict(_by_cubic(LIQUID, _Place(fractions, components, temperature, pressure)))


@lru_cache(maxsize=64)
def bubble_pressure(composition: Composition, temperature: float) -> float | None:
    """Return the bubble pressure [Pa] of a liquid mixture; None where it is not sure."""
    table = names.substances()
    module = library.fluids()
    try:
        state = module.AbstractState(
            "HEOS", "&".join(table[key].equation for key, _ in composition)
        )
        state.set_mole_fractions([fraction for _, fraction in composition])
        state.update(module.QT_INPUTS, 0.0, temperature)
        found = float(state.p())
        vapour = state.mole_fractions_vapor()
    except library.ERRORS:
        return None
    trivial = all(abs(y - z) < 1e-4 for y, (_, z) in zip(vapour, composition, strict=True))
    return found if math.isfinite(found) and found > 0.0 and not trivial else None
