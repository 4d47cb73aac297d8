"""Slurries and sludges: a carrying liquid with solids in it."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

from specsheet.findings import Finding, Origin
from specsheet.fluid.model import Condition, Fluid, Method, Refused, caution, stop
from specsheet.fluid.state import Property, State
from specsheet.methods import suspensions
from specsheet.quantity.value import Base
from specsheet.sources import cite

_DENSITY = Method("volumes of solids and liquid added", "", 0.01)
_VISCOSITY = Method("suspension of spheres", cite("thomas"), 0.5, Origin.TYPICAL)
#: beyond this volume of solids no formula for spheres says anything
HIGHEST = 0.5


@dataclass(frozen=True, slots=True)
class Slurry:
    """Solids in a liquid; one of the two fractions is stated.

    Attributes:
        carrier: the liquid.
        solids_density: [kg/m3]
        volume_fraction, mass_fraction: of the solids [-]; None where the other is stated.
    """

    carrier: Fluid
    solids_density: float
    volume_fraction: float | None
    mass_fraction: float | None

    @property
    def phase(self) -> str:
        """The phase stated for the carrier."""
        return self.carrier.phase

    @property
    def name(self) -> str:
        """What the sheet calls it."""
        if self.volume_fraction is not None:
            return f"{self.carrier.name} with {100 * self.volume_fraction:.3g} % solids by volume"
        return f"{self.carrier.name} with {100 * (self.mass_fraction or 0):.3g} % solids by mass"

    def state(self, condition: Condition) -> State:
        """Return the state of the slurry."""
        return self._loaded(self.carrier.state(condition))

    def base(self, base: Base) -> State:
        """Return the state at base."""
        return self._loaded(self.carrier.base(base))

    def constants(self) -> Mapping[str, Property]:
        """Return nothing: those of the carrier do not hold."""
        return {}

    def _loaded(self, liquid: State) -> State:
        """Return a state of the carrier with the solids in it."""
        density = liquid.value("density")
        if density is None:
            return liquid
        share = self._share(density)
        mixed = suspensions.density(
            volume_fraction=share, solids_density=self.solids_density, liquid_density=density
        )
        kept = ("vapour_pressure", "saturation_temperature", "saturation_margin")
        values = {key: liquid.properties[key] for key in kept if key in liquid.properties}
        values["density"] = _DENSITY(mixed)
        viscosity = liquid.value("viscosity")
        if viscosity is not None:
            found = viscosity * suspensions.relative_viscosity(share)
            values["viscosity"] = _VISCOSITY(found)
            values["kinematic_viscosity"] = _VISCOSITY(found / mixed)
        return State(
            liquid.temperature,
            liquid.pressure,
            liquid.phase,
            values,
            (*liquid.findings, self._advice(share)),
        )

    def _share(self, density: float) -> float:
        """Return the solids by volume [-].

        Raises:
            Refused: there is more than a slurry can hold.
        """
        share = self.volume_fraction
        if share is None:
            share = suspensions.volume_fraction(
                mass_fraction=self.mass_fraction or 0.0,
                solids_density=self.solids_density,
                liquid_density=density,
            )
        if share <= HIGHEST:
            return share
        raise Refused(
            stop(
                "solids-range",
                "fluid.solids"
                if self.volume_fraction is not None
                else "fluid.solids_mass_fraction",
                f"Up to {100 * HIGHEST:g} % solids by volume make a slurry; {100 * share:.3g} % "
                "came. Check the fraction and the density of the solids.",
            )
        )

    def _advice(self, share: float) -> Finding:
        return caution(
            "slurry-viscosity",
            "viscosity",
            f"{100 * share:.3g} % solids by volume: the viscosity printed is that of hard spheres "
            "and only an order of size; sludges and fibres are thicker and depend on shear. State "
            "the measured viscosity at each point.",
            cite("thomas"),
        )
