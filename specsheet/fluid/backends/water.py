"""Water, steam and condensate by IAPWS-IF97 (2007), always; no library of fluids is loaded.

Uncertainties (k = 2, rounded up) are those of the releases, from memory: density 0.05 % in the
liquid and 0.1 % in steam, viscosity 1 % and 2 %, thermal conductivity 2 %, sound speed 0.3 %.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

from specsheet.findings import Finding, Origin
from specsheet.fluid import if97
from specsheet.fluid.model import (
    GAS_CONSTANT,
    Condition,
    Method,
    Refused,
    caution,
    note,
    stop,
)
from specsheet.fluid.phases import GAS, LIQUID, SUPERCRITICAL, TWO_PHASE
from specsheet.fluid.state import Property, State
from specsheet.quantity.value import Base
from specsheet.sources import PRACTICE, cite

#: a stated temperature this near to saturation is taken as saturated [K]
SNAP = 0.05
#: superheat below which steam may well be wet at the meter [K] (common practice, no source)
NEAR = 3.0

_LIQUID = Method("IAPWS-IF97", if97.SOURCE, 0.0005)
_STEAM = Method("IAPWS-IF97", if97.SOURCE, 0.001)
_SOUND = Method("IAPWS-IF97", if97.SOURCE, 0.003)
_HEAT = Method("IAPWS-IF97", if97.SOURCE, 0.005)
_SATURATION = Method("IAPWS-IF97, saturation line", if97.SOURCE, 0.0005)
_VISCOSITY = Method("IAPWS viscosity of water (2008)", cite("iapws-r12-08"), 0.02)
_CONDUCTIVITY = Method("IAPWS thermal conductivity of water (2011)", cite("iapws-r15-11"), 0.02)
_KAPPA = Method("ρc²/p of the real gas, IAPWS-IF97", if97.SOURCE, 0.006)
_MIXED = Method("no slip between vapour and water: 1/ρ = x/ρv + (1-x)/ρl", if97.SOURCE, 0.02)
_MOLAR = Method("molar mass of water", if97.SOURCE, 0.0)

_TAKEN_DRY = note(
    "dryness-assumed",
    "dryness_fraction",
    "Saturated steam is taken as dry. Each per cent of water carried along is up to one per cent "
    "of mass flow that the meter does not see: drain and separate upstream, or state the dryness "
    "fraction.",
    PRACTICE,
)


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
        if97.check_limits(temperature, pressure)
        boiling = if97.saturation_temperature(pressure)
        if boiling is not None and abs(temperature - boiling) <= SNAP:
            return self._saturated(Condition(None, pressure, condition.dryness), self._snapped())
        findings: tuple[Finding, ...] = ()
        if condition.dryness is not None:
            findings = (_dryness_idle(temperature, boiling),)
        if self.phase == GAS and boiling is not None and 0.0 < temperature - boiling < NEAR:
            findings += (_hardly_superheated(temperature - boiling),)
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
        return {"molar_mass": _MOLAR(if97.MOLAR_MASS)}

    def _snapped(self) -> tuple[Finding, ...]:
        return (
            note(
                "on-saturation",
                "temperature",
                f"Pressure and temperature lie on the saturation line within {SNAP} K: the state "
                f"is taken as saturated {'steam' if self.phase == GAS else 'water'}.",
                if97.SOURCE,
            ),
        )

    def _saturated(self, condition: Condition, findings: tuple[Finding, ...]) -> State:
        """Return the saturated state at the pressure or the temperature that is stated."""
        temperature, pressure = if97.saturation(condition)
        dryness = condition.dryness
        if dryness is None:
            dryness = 1.0 if self.phase == GAS else 0.0
            findings += (_TAKEN_DRY,) if self.phase == GAS else ()
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
        module, state = if97.objects()
        state.update(module.PQ_INPUTS, max(pressure, if97.TRIPLE_PRESSURE), dryness)
        gas = dryness == 1.0
        return State(
            temperature,
            pressure,
            GAS if gas else LIQUID,
            _properties(state, temperature, pressure, temperature, gas),
            findings,
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


def _hardly_superheated(superheat: float) -> Finding:
    return caution(
        "near-saturation",
        "temperature",
        f"The steam is superheated by {superheat:.2g} K only: heat lost on the way may make it wet "
        "at the meter. Insulate the line, or state saturated steam by its pressure alone.",
        PRACTICE,
    )


def _single(
    temperature: float, pressure: float, boiling: float | None, findings: tuple[Finding, ...]
) -> State:
    """Return a state off the saturation line."""
    module, state = if97.objects()
    state.update(module.PT_INPUTS, pressure, temperature)
    if boiling is not None:
        phase = GAS if temperature > boiling else LIQUID
    elif pressure < if97.CRITICAL_PRESSURE:
        phase = GAS
    else:
        phase = LIQUID if temperature < if97.CRITICAL_TEMPERATURE else SUPERCRITICAL
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
        ideal = pressure * if97.MOLAR_MASS / (GAS_CONSTANT * temperature)
        values["compressibility"] = _STEAM(ideal / density)
        values["isentropic_exponent"] = _KAPPA(density * sound * sound / pressure)
    if boiling is not None:
        margin = temperature - boiling if gas else boiling - temperature
        values["saturation_temperature"] = _SATURATION(boiling)
        values["saturation_margin"] = _SATURATION(margin)
    vapour = if97.saturation_pressure(temperature)
    if vapour is not None:
        values["vapour_pressure"] = _SATURATION(vapour)
    return values


def _wet(
    temperature: float, pressure: float, dryness: float, findings: tuple[Finding, ...]
) -> State:
    """Return wet steam: density of the mixture without slip, all else of the dry vapour."""
    module, state = if97.objects()
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
        if97.SOURCE,
    )
    return State(temperature, pressure, TWO_PHASE, values, (*findings, wet))
