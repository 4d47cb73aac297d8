"""Solutions in water: glycols, brines, alcohols, caustic, acids, with limits of concentration.

Where the correlations of the fluid library hold they are used; beyond them the equations of
Laliberté and Cooper, each within the concentrations and temperatures measured. The density follows
the pressure by the compressibility of water. Vapour pressure is that of the water by Raoult.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from typing import Any

from specsheet.findings import Finding, Origin
from specsheet.fluid import if97, library, solutes
from specsheet.fluid.backends import user_table
from specsheet.fluid.model import Condition, Method, Refused, both, caution, celsius, note, stop
from specsheet.fluid.phases import LIQUID, TWO_PHASE
from specsheet.fluid.state import Property, State
from specsheet.methods import solutions as method
from specsheet.quantity.value import Base
from specsheet.sources import cite

_MELINDER = cite("melinder")
_LALIBERTE = cite("laliberte")
_DENSITY = Method("correlation of secondary fluids, raised with pressure", _MELINDER, 0.004)
_VISCOSITY = Method("correlation of secondary fluids", _MELINDER, 0.06)
_HEAT = Method("correlation of secondary fluids", _MELINDER, 0.03)
_CONDUCTIVITY = Method("correlation of secondary fluids", _MELINDER, 0.05)
_RAOULT = Method("law of Raoult; strong solutions lie below it", "from memory", 0.1, Origin.TYPICAL)
_LAAR = Method("equations of van Laar and Antoine", "from memory", 0.1, Origin.TYPICAL)

#: constants of van Laar for water with the alcohol (alcohol first), and of Antoine for the alcohol
_ALCOHOLS = {
    "ethanol": ((1.6798, 0.9227), (8.1122, 1592.864, 226.184)),
    "methanol": ((0.8041, 0.5619), (8.08097, 1582.271, 239.726)),
}


@dataclass(frozen=True, slots=True)
class Solution:
    """A solution of one solute in water.

    Attributes:
        key: key of the solute.
        fraction: by mass [-].
        phase: the phase stated.
    """

    key: str
    fraction: float
    phase: str

    @property
    def solute(self) -> solutes.Solute:
        """The solute with its correlations."""
        return solutes.solutes()[self.key]

    @property
    def name(self) -> str:
        """What the sheet calls it."""
        return f"{self.solute.name} {100 * self.fraction:.3g} % by mass in water"

    def state(self, condition: Condition) -> State:
        """Return the state of the liquid."""
        temperature, pressure = both(condition)
        values, findings = self._correlated(temperature, pressure)
        vapour = self._vapour_pressure(temperature)
        phase = LIQUID
        if vapour is None:
            findings += (self._vapour_unknown(),)
        else:
            values["vapour_pressure"] = vapour
            phase = LIQUID if pressure > vapour.value else TWO_PHASE
        return State(temperature, pressure, phase, values, findings)

    def base(self, base: Base) -> State:
        """Return the state at base."""
        values, findings = self._correlated(base.temperature, base.pressure)
        return State(base.temperature, base.pressure, LIQUID, values, findings)

    def constants(self) -> Mapping[str, Property]:
        """Return nothing: no property of a solution stands apart from its state."""
        return {}

    def _correlated(
        self, temperature: float, pressure: float
    ) -> tuple[dict[str, Property], tuple[Finding, ...]]:
        """Return the properties by the first correlation that holds here."""
        own = self.solute.incompressible
        if own is not None and self.fraction <= own.fraction:
            if own.lowest <= temperature <= own.highest:
                return _incompressible(self, own, temperature, pressure), ()
            if self.solute.density is None or temperature < own.lowest:
                raise Refused(self._temperature(temperature, own.lowest, own.highest))
        return self._laliberte(temperature, pressure)

    def _laliberte(
        self, temperature: float, pressure: float
    ) -> tuple[dict[str, Property], tuple[Finding, ...]]:
        density, viscosity = self.solute.density, self.solute.viscosity
        strong = self.solute.strong
        if strong is not None and self.fraction > strong.rows[0][0]:
            return self._strong(strong, temperature, pressure)
        if density is None or self.fraction > density.fraction * 1.02:
            raise Refused(self._fraction(self.solute.highest_fraction))
        lowest = max(density.lowest, if97.LOWEST_TEMPERATURE)  # pure water is part of the equation
        beyond = self._temperature(temperature, lowest, density.highest)
        if not max(lowest - 10.0, 273.15) <= temperature <= density.highest + 10.0:
            raise Refused(beyond)
        findings: tuple[Finding, ...] = ()
        if not lowest <= temperature <= density.highest:
            findings += (_soften(beyond),)
        value = method.laliberte_density(
            celsius=temperature - 273.15,
            solute_fraction=self.fraction,
            water_density=if97.liquid_density(temperature, 101325.0),
            coefficients=density.coefficients,
        ) * _squeeze(pressure)
        found = Method("equation of Laliberté and Cooper", _LALIBERTE, density.uncertainty)
        values = {"density": found(value), **self._heat(temperature)}
        if viscosity is None or not _holds(viscosity, self.fraction, temperature, 15.0):
            return values, (*findings, self._viscosity_unknown(viscosity))
        mixed = method.laliberte_viscosity(
            celsius=temperature - 273.15,
            solute_fraction=self.fraction,
            water_viscosity=if97.liquid_viscosity(temperature),
            coefficients=viscosity.coefficients,
        )
        fluid = Method("equation of Laliberté", _LALIBERTE, viscosity.uncertainty)
        values["viscosity"] = fluid(mixed)
        values["kinematic_viscosity"] = fluid(mixed / value)
        return values, findings

    def _strong(
        self, item: solutes.Strong, temperature: float, pressure: float
    ) -> tuple[dict[str, Property], tuple[Finding, ...]]:
        """Return the density of a strong solution; its viscosity is not known."""
        if not item.lowest <= temperature <= item.highest:
            raise Refused(self._temperature(temperature, item.lowest, item.highest))
        cold = user_table.straight(item.rows, self.fraction)
        if cold is None:
            raise Refused(self._fraction(item.rows[-1][0]))
        value = (cold + item.slope * (temperature - 293.15)) * _squeeze(pressure)
        found = Method("handbook densities of the strong acid", "from memory", item.uncertainty)
        values = {"density": found(value), **self._heat(temperature)}
        return values, (self._viscosity_unknown(None),)

    def _heat(self, temperature: float) -> dict[str, Property]:
        """Return the heat capacity where it was measured, with some degrees to either side."""
        item = self.solute.heat
        if item is None or not _holds(item, self.fraction, temperature, 10.0):
            return {}
        value = method.laliberte_heat_capacity(
            celsius=temperature - 273.15,
            solute_fraction=self.fraction,
            water_heat_capacity=if97.liquid_heat_capacity(temperature),
            coefficients=item.coefficients,
        )
        found = Method("equation of Laliberté, heat capacity", _LALIBERTE, item.uncertainty)
        return {"heat_capacity": found(value)}

    def _vapour_pressure(self, temperature: float) -> Property | None:
        """Return the vapour pressure; None where the solute evaporates in a way not described."""
        pure = if97.saturation_pressure(temperature)
        if pure is None and temperature < if97.LOWEST_TEMPERATURE:
            pure = method.supercooled_vapour_pressure(temperature)
        if pure is None or self.solute.volatile == "yes":
            return None
        share = method.water_mole_fraction(
            solute_fraction=self.fraction,
            molar_mass=self.solute.molar_mass,
            ions=self.solute.ions,
        )
        if self.solute.volatile == "":
            # salts and acids hold their water back: the more so, the stronger the solution
            return _RAOULT(share * pure)._replace(
                uncertainty=min(max(0.1, 1.5 * (1.0 - share)), 1.0)
            )
        (first, second), (a, b, c) = _ALCOHOLS[self.key]
        alcohol, other = method.van_laar(fraction=1.0 - share, first=first, second=second)
        spirit = method.antoine(celsius=temperature - 273.15, a=a, b=b, c=c)
        return _LAAR((1.0 - share) * alcohol * spirit + share * other * pure)

    def _temperature(self, temperature: float, lowest: float, highest: float) -> Finding:
        return stop(
            "fluid-limit",
            "temperature",
            f"{self.name} is described from {celsius(lowest)} to {celsius(highest)}; "
            f"{celsius(temperature)} came. Check the temperature, or state density and viscosity "
            "at each point.",
            _LALIBERTE,
        )

    def _fraction(self, highest: float) -> Finding:
        return stop(
            "concentration-limit",
            "fluid.mass_fraction",
            f"Solutions of {self.solute.name} are described up to {100 * highest:.3g} % by mass; "
            f"{100 * self.fraction:.4g} % came. Check the fraction, or state density and viscosity "
            "at each point.",
        )

    def _viscosity_unknown(self, item: solutes.Correlation | None) -> Finding:
        reach = "no viscosity is known"
        if item is not None:
            reach = (
                f"the viscosity is known up to {100 * item.fraction:.3g} % and from "
                f"{celsius(item.lowest)} to {celsius(item.highest)}"
            )
        text = f"For {self.name} {reach}: state the viscosity at each point."
        return caution("viscosity-missing", "viscosity", text, _LALIBERTE)

    def _vapour_unknown(self) -> Finding:
        text = (
            f"The vapour pressure of {self.name} is not known, because the solute evaporates too: "
            "state it at each point, so that flashing and cavitation can be checked."
        )
        return note("vapour-pressure-missing", "vapour_pressure", text)


def _holds(item: solutes.Correlation, fraction: float, temperature: float, beyond: float) -> bool:
    """Tell whether a correlation holds, some degrees beyond its measurements included."""
    return (
        fraction <= item.fraction * 1.02
        and item.lowest - beyond <= temperature <= item.highest + beyond
    )


def _soften(finding: Finding) -> Finding:
    text = f"{finding.message} The values are extrapolated."
    return caution(finding.code, finding.field, text, finding.source)


def _squeeze(pressure: float) -> float:
    """Return the rise of density with pressure [-]."""
    return 1.0 + method.COMPRESSIBILITY * (pressure - 101325.0)


@cache
def _state_of(name: str) -> Any:
    return library.extension().AbstractState("INCOMP", name)


def _incompressible(
    fluid: Solution, item: solutes.Incompressible, temperature: float, pressure: float
) -> dict[str, Property]:
    module, state = library.extension(), _state_of(item.name)
    try:
        state.set_mass_fractions([fluid.fraction])
        freezing = float(state.keyed_output(module.iT_freeze))
        if temperature < freezing:
            raise Refused(_frozen(fluid, temperature, freezing))
        state.update(module.PT_INPUTS, pressure, temperature)
        density, viscosity = state.rhomass() * _squeeze(pressure), state.viscosity()
        heat, conductivity = state.cpmass(), state.conductivity()
    except library.ERRORS:
        _state_of.cache_clear()
        raise
    return {
        "density": _DENSITY(density),
        "viscosity": _VISCOSITY(viscosity),
        "kinematic_viscosity": _VISCOSITY(viscosity / density),
        "heat_capacity": _HEAT(heat),
        "thermal_conductivity": _CONDUCTIVITY(conductivity),
    }


def _frozen(fluid: Solution, temperature: float, freezing: float) -> Finding:
    return stop(
        "frozen",
        "temperature",
        f"{fluid.name} begins to freeze at {celsius(freezing)}; {celsius(temperature)} came. Raise "
        "the temperature or the concentration.",
        _MELINDER,
    )
