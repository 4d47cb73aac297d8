"""Mixtures by multi-fluid equations of state with the phase imposed, and the phase checked.

The phase is never left to a blind search: that one is slow, and silently reports one phase inside
the two-phase region of wet gases. The state is computed for the phase stated; whether that phase
is the true one is decided by :mod:`specsheet.fluid.mixture_phase`.
"""

from __future__ import annotations

import itertools
from collections.abc import Mapping
from dataclasses import dataclass
from functools import lru_cache
from typing import Any

from specsheet.findings import Finding
from specsheet.fluid import (
    calorific,
    library,
    limits,
    mixture_phase,
    mixture_state,
    mixture_transport,
    names,
)
from specsheet.fluid.calorific import Composition
from specsheet.fluid.errors import translate
from specsheet.fluid.model import (
    Condition,
    Method,
    Refused,
    bar,
    both,
    caution,
    celsius,
    note,
    stop,
)
from specsheet.fluid.phases import GAS, LIQUID, SUPERCRITICAL, TWO_PHASE
from specsheet.fluid.state import Property, State
from specsheet.quantity.value import Base
from specsheet.sources import cite

_EQUATION = "multi-fluid equation of state"
_SOURCE = cite("coolprop") + ", mixing rules of " + cite("iso20765-2")
_MOLAR = Method("molar mass of the composition", cite("iso6976"), 0.0001)
#: components of ISO 20765-2, within whose scope the equation is at its best
_GERG = frozenset(
    (
        "methane",
        "nitrogen",
        "carbon_dioxide",
        "ethane",
        "propane",
        "n_butane",
        "isobutane",
        "n_pentane",
        "isopentane",
        "n_hexane",
        "n_heptane",
        "n_octane",
        "n_nonane",
        "n_decane",
        "hydrogen",
        "oxygen",
        "carbon_monoxide",
        "water",
        "hydrogen_sulfide",
        "helium",
        "argon",
    )
)
#: dry air as a mixture, where it stands among the components (ISO 6976, rounded to three gases)
AIR: Composition = (("nitrogen", 0.7812), ("oxygen", 0.2096), ("argon", 0.0092))


@dataclass(frozen=True, slots=True)
class Mixture:
    """A mixture; ``phase`` is the one stated, fractions are by mole and sum to one."""

    composition: Composition
    phase: str
    combustion_temperature: float = 288.15

    @property
    def name(self) -> str:
        """What the sheet calls it: its main components."""
        return _name(self.composition)

    def state(self, condition: Condition) -> State:
        """Return the state in the stated phase, with the true phase beside it."""
        temperature, pressure = both(condition)
        findings = self._range().check(temperature, pressure, self.name)
        state = self._updated(temperature, pressure)
        verdict = mixture_phase.decide(self.composition, self.phase, temperature, pressure, state)
        phase = _dense(verdict.phase, state)
        values = self._properties(state, temperature, pressure)
        values.update(verdict.values)
        dew = values.get("dew_temperature")
        if dew is not None and phase == GAS:
            margin = dew._replace(value=temperature - dew.value, uncertainty=0.0)
            values["saturation_margin"] = margin
        return State(
            temperature,
            pressure,
            phase,
            values,
            (*findings, *self._pairs(), *self._polar(), *verdict.findings),
        )

    def base(self, base: Base) -> State:
        """Return the state at base; a gas is taken as gas there even below its dew point."""
        self._range().check(base.temperature, base.pressure, self.name)
        state = self._updated(base.temperature, base.pressure)
        values = self._properties(state, base.temperature, base.pressure)
        if self.phase != GAS:
            return self._liquid_base(base, values, _dense(LIQUID, state))
        density = values["density"].value
        values.update(
            calorific.by_volume(self.composition, density, self.combustion_temperature, base)
        )
        verdict = mixture_phase.decide(
            self.composition, GAS, base.temperature, base.pressure, state
        )
        findings: tuple[Finding, ...] = ()
        if verdict.phase != GAS:
            text = (
                "Some of the gas would condense at the base condition; its volume there is that of "
                "a hypothetical gas, as ISO 6976 has it."
            )
            findings = (note("base-hypothetical", "", text, cite("iso6976")),)
        return State(base.temperature, base.pressure, GAS, values, findings)

    def _liquid_base(self, base: Base, values: dict[str, Property], phase: str) -> State:
        """Return the liquid at base; without a density where it boils there."""
        bubble = mixture_phase.bubble_pressure(self.composition, base.temperature)
        if phase == LIQUID and (bubble is None or bubble < base.pressure):
            return State(base.temperature, base.pressure, LIQUID, values)
        text = (
            "The liquid would boil at the base condition, so a volume of it there has no meaning: "
            "state its flow by mass."
        )
        findings = (note("base-gas", "", text),)
        return State(base.temperature, base.pressure, TWO_PHASE, {}, findings)

    def constants(self) -> Mapping[str, Property]:
        """Return molar mass and calorific values by mass."""
        return {
            "molar_mass": _MOLAR(calorific.molar_mass(self.composition)),
            **calorific.by_mass(self.composition, self.combustion_temperature),
        }

    def _range(self) -> limits.Range:
        return _range(self.composition)

    def _polar(self) -> tuple[Finding, ...]:
        if self.phase == GAS or not mixture_transport.is_polar(self.composition):
            return ()
        text = (
            "Liquids of water, alcohols, ammonia and the like mix far from ideally: the density "
            "may be off by 2 % and no viscosity is given. State a solution (fluid.kind solution) "
            "or density and viscosity at each point."
        )
        return (caution("liquid-mixture-polar", "fluid.mixture", text, _SOURCE),)

    def _pairs(self) -> tuple[Finding, ...]:
        pairs = (
            mixture_state.estimate_pairs(tuple(key for key, _ in self.composition))
            if self.phase == GAS
            else ()
        )
        if not pairs:
            return ()
        table = names.substances()
        text = ", ".join(f"{table[a].name} with {table[b].name}" for a, b in pairs[:3])
        more = f" and {len(pairs) - 3} more" if len(pairs) > 3 else ""
        return (
            caution(
                "mixture-pair-estimated",
                "fluid.mixture",
                f"No mixing parameters are known for {text}{more}; a linear rule stands in. That "
                "is good to some 0.1 % for a gas at a few bar and worse near its dew point.",
                _SOURCE,
            ),
        )

    def _updated(self, temperature: float, pressure: float) -> Any:
        """Return the state object at the state, on a root that the phase allows."""
        try:
            state = mixture_state.settled(self.composition, self.phase, temperature, pressure)
        except library.ERRORS as error:
            mixture_state.forget()
            raise Refused(translate(error, self.name, temperature, pressure)) from None
        if state is not None:
            return state
        raise Refused(
            stop(
                "phase-disagrees",
                "fluid.phase",
                f"No {self.phase} of this composition exists at {celsius(temperature)} and "
                f"{bar(pressure)}. Correct the phase, the pressure or the temperature.",
            )
        )

    def _properties(self, state: Any, temperature: float, pressure: float) -> dict[str, Property]:
        """Return all properties of the state object as it stands."""
        density, sound = state.rhomass(), state.speed_sound()
        dense = state.rhomolar() > 0.5 * state.rhomolar_reducing()
        plain, fast, warm = _methods(self.composition, dense)
        values = {
            "density": plain(density),
            "sound_speed": fast(sound),
            "heat_capacity": warm(state.cpmass()),
        }
        if self.phase == GAS:
            values["compressibility"] = plain(state.compressibility_factor())
            values["isentropic_exponent"] = fast(density * sound * sound / pressure)
            values.update(
                mixture_transport.gas(
                    self.composition, temperature, state.rhomolar(), density, dense=dense
                )
            )
        else:
            values.update(
                mixture_transport.liquid(self.composition, temperature, pressure, density)
            )
        return values


def _dense(phase: str, state: Any) -> str:
    """Return the phase, with a fluid too dense for a gas or too light for a liquid called so."""
    ratio = state.rhomolar() / state.rhomolar_reducing()
    if phase == GAS and ratio > 1.0:
        return SUPERCRITICAL
    return GAS if phase == LIQUID and ratio < 0.7 else phase


@lru_cache(maxsize=64)
def _name(composition: Composition) -> str:
    table = names.substances()
    dry = [(key, fraction) for key, fraction in composition if key != "water"]
    total = sum(fraction for _, fraction in dry)
    if all(
        key == gas and abs(fraction / total - share) < 1e-9
        for (key, fraction), (gas, share) in itertools.zip_longest(dry, AIR, fillvalue=("", 0.0))
    ):
        return "humid air"
    ranked = sorted(composition, key=lambda item: -item[1])
    listed = [table[key].name for key, _ in ranked[:3]]
    more = f" and {len(ranked) - 3} more" if len(ranked) > 3 else ""
    return "mixture of " + ", ".join(listed) + more


@lru_cache(maxsize=64)
def _range(composition: Composition) -> limits.Range:
    """Return the limits: of the equation within its components, wide enough for ISO 20765-2."""
    weighty = [names.substances()[key] for key, fraction in composition if fraction >= 0.01]
    highest = min(item.highest_temperature for item in weighty)
    if all(key in _GERG for key, _ in composition):
        return limits.Range(60.0, max(700.0, highest), 70e6, cite("iso20765-2"), above=300.0)
    pressure = max(item.highest_pressure for item in weighty)
    return limits.Range(60.0, max(500.0, highest), pressure, _SOURCE, above=200.0)


@lru_cache(maxsize=64)
def _methods(composition: Composition, dense: bool) -> tuple[Method, Method, Method]:
    """Return the methods of density, sound speed and heat capacity, with honest uncertainties."""
    known = all(key in _GERG for key, _ in composition)
    factor = (1.0 if known else 3.0) * (3.0 if dense else 1.0)
    if dense and mixture_transport.is_polar(composition):
        factor = 10.0
    plain = Method(_EQUATION, _SOURCE, 0.002 * factor)
    fast = Method(_EQUATION, _SOURCE, 0.005 * factor)
    warm = Method(_EQUATION, _SOURCE, 0.02 * factor)
    return plain, fast, warm
