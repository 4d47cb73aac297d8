"""Petroleum liquids from density at 15 degC and viscosities at one or two temperatures."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

from specsheet.findings import Finding, Origin
from specsheet.fluid.limits import Range
from specsheet.fluid.model import Condition, Method, both, caution, celsius, note
from specsheet.fluid.phases import LIQUID
from specsheet.fluid.state import Property, State
from specsheet.methods import petroleum as method
from specsheet.quantity.value import Base
from specsheet.sources import cite

_ISO91 = cite("iso91")
_DENSITY = Method("density at 15 °C, corrected for temperature and pressure", _ISO91, 0.002)
_VISCOSITY = Method("through the stated viscosities", cite("astm-d341"), 0.05)
_FAR = Method("through the stated viscosities, extrapolated", cite("astm-d341"), 0.2)
_ONE = Method("the one stated viscosity, near its temperature", "", 0.1)
_HEAT = Method("heat capacity of petroleum", cite("cragoe"), 0.1, Origin.TYPICAL)
_RANGE = Range(223.15, 423.15, 10e6, _ISO91, above=50.0, below=20.0, over=2.0)
#: beyond the stated viscosities ASTM D341 is followed this far without a word [K]
EXTRAPOLATION = 30.0
#: one viscosity alone is used this near to its temperature [K]
NEAR = 2.0


@dataclass(frozen=True, slots=True)
class Petroleum:
    """A petroleum liquid.

    Attributes:
        product: group of the volume correction.
        density_15: at 15 degC and atmospheric pressure [kg/m3].
        viscosities: temperature [K] and kinematic viscosity [m2/s], none, one or two.
        phase: the phase stated.
        atmosphere: pressure that the compression counts from [Pa].
    """

    product: str
    density_15: float
    viscosities: tuple[tuple[float, float], ...]
    phase: str
    atmosphere: float = 101325.0

    @property
    def name(self) -> str:
        """What the sheet calls it."""
        return f"{self.product}, {self.density_15:.4g} kg/m3 at 15 °C"

    def state(self, condition: Condition) -> State:
        """Return the state of the liquid."""
        temperature, pressure = both(condition)
        findings = _RANGE.check(temperature, pressure, self.name)
        density = self._density(temperature, pressure)
        warm = temperature - 273.15
        values = {
            "density": _DENSITY(density),
            "heat_capacity": _HEAT(method.heat_capacity(celsius=warm, density_15=self.density_15)),
        }
        viscosity, said = self._viscosity(temperature)
        if viscosity is not None:
            values["kinematic_viscosity"] = viscosity
            values["viscosity"] = Property(
                viscosity.value * density,
                viscosity.origin,
                viscosity.method,
                viscosity.source,
                viscosity.uncertainty,
            )
        return State(temperature, pressure, LIQUID, values, (*findings, *said, *_vapour_unknown()))

    def base(self, base: Base) -> State:
        """Return the density at base."""
        density = self._density(base.temperature, base.pressure)
        return State(base.temperature, base.pressure, LIQUID, {"density": _DENSITY(density)})

    def constants(self) -> Mapping[str, Property]:
        """Return nothing: no property of a petroleum liquid stands apart from its state."""
        return {}

    def _density(self, temperature: float, pressure: float) -> float:
        warm = temperature - 273.15
        thermal = method.temperature_correction(
            density_15=self.density_15, celsius=warm, product=self.product
        )
        squeezed = method.pressure_correction(
            compressibility=method.compressibility(density_15=self.density_15, celsius=warm),
            gauge_pressure=pressure - self.atmosphere,
        )
        return self.density_15 * thermal * squeezed

    def _viscosity(self, temperature: float) -> tuple[Property | None, tuple[Finding, ...]]:
        """Return the kinematic viscosity, or what to state so that there is one."""
        if len(self.viscosities) == 2:
            return self._through_both(temperature)
        if self.viscosities and abs(self.viscosities[0][0] - temperature) <= NEAR:
            return _ONE(self.viscosities[0][1]), ()
        if self.viscosities:
            known = celsius(self.viscosities[0][0])
            text = (
                f"One viscosity is stated, at {known}; at {celsius(temperature)} a second one is "
                "needed: state fluid.viscosity_2 and its temperature, or the viscosity at each "
                "point."
            )
            return None, (caution("viscosity-missing", "fluid.viscosity_2", text),)
        text = (
            "No viscosity is stated: state fluid.viscosity_1 and fluid.viscosity_2 with their "
            "temperatures, or the viscosity at each point."
        )
        return None, (caution("viscosity-missing", "fluid.viscosity_1", text),)

    def _through_both(self, temperature: float) -> tuple[Property, tuple[Finding, ...]]:
        (first, low), (last, high) = sorted(self.viscosities)
        value = method.kinematic_viscosity(
            temperature=temperature,
            temperature_1=first,
            viscosity_1=low,
            temperature_2=last,
            viscosity_2=high,
        )
        if first - EXTRAPOLATION <= temperature <= last + EXTRAPOLATION:
            return _VISCOSITY(value), ()
        text = (
            f"The viscosities are stated at {celsius(first)} and {celsius(last)}; the one at "
            f"{celsius(temperature)} is more than {EXTRAPOLATION:g} K beyond them and may be off "
            "by a third. State the viscosity at this point."
        )
        found = caution("viscosity-extrapolated", "viscosity", text, cite("astm-d341"))
        return _FAR(value), (found,)


def _vapour_unknown() -> tuple[Finding, ...]:
    text = (
        "The vapour pressure of a petroleum liquid does not follow from its density: state it at "
        "each point, so that flashing and cavitation can be checked."
    )
    return (note("vapour-pressure-missing", "vapour_pressure", text),)
