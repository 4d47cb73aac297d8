"""From the flow a user states (mass, volume, base volume, energy) to mass flow and back."""

from __future__ import annotations

from dataclasses import dataclass

from specsheet.findings import Finding, Level
from specsheet.fluid.state import FluidResult, State
from specsheet.quantity.value import Quantity
from specsheet.tag import Point, Tag


@dataclass(frozen=True, slots=True)
class MassFlow:
    """Mass flow of one point, or why there is none.

    Attributes:
        value: [kg/s], None when it cannot be had.
        finding: what stands in the way.
    """

    value: float | None
    finding: Finding | None = None


def mass_flow(tag: Tag, point: Point, state: State | None, fluid: FluidResult) -> MassFlow:
    """Return the mass flow at one operating point."""
    stated = point.quantity("flow")
    if stated is None:
        return _refused(point, "flow-missing", "state a flow at this point, for example 3.1 t/h")
    if stated.value <= 0.0:
        return _refused(
            point,
            "flow-not-positive",
            f"the flow must be greater than zero; it is {stated.text}. "
            "A meter is sized between its smallest and largest flow, so state the smallest flow "
            "that has to be metered",
        )
    return _from_stated(tag, point, stated, state, fluid)


def _from_stated(
    tag: Tag, point: Point, stated: Quantity, state: State | None, fluid: FluidResult
) -> MassFlow:
    if stated.kind == "mass_flow":
        return MassFlow(stated.value)
    if stated.kind == "volume_flow":
        density = None if state is None else state.value("density")
        if density is None:
            return _refused(
                point,
                "density-missing",
                "a volume flow needs the density at this point; state points.density or mend the "
                "fluid",
            )
        return MassFlow(stated.value * density)
    if stated.kind == "base_volume_flow":
        base_density = density_at_base(tag, fluid, stated)
        if base_density is None:
            return _refused(
                point,
                "base-density-missing",
                "a flow at base conditions needs a gas density there, which this fluid does not "
                "have; state fluid.base_density, or the flow as a mass flow",
            )
        return MassFlow(stated.value * base_density)
    calorific = calorific_value_by_mass(tag, fluid)
    if calorific is None:
        return _refused(
            point,
            "calorific-value-missing",
            "an energy flow needs a calorific value, which this fluid does not have; state "
            "fluid.gross_calorific_value or fluid.net_calorific_value, or the flow as a mass flow",
        )
    return MassFlow(stated.value / calorific)


def _refused(point: Point, code: str, message: str) -> MassFlow:
    field = f"points.{point.name}.flow"
    return MassFlow(None, Finding(Level.STOP, code, field, message, point.name))


def density_at_base(tag: Tag, fluid: FluidResult, stated: Quantity | None = None) -> float | None:
    """Return the density at the base condition of ``stated``, else of the job [kg/m3]."""
    base = tag.base if stated is None or stated.base is None else stated.base
    state = fluid.bases.get(base)
    return None if state is None else state.value("density")


def calorific_value_by_mass(tag: Tag, fluid: FluidResult) -> float | None:
    """Return the calorific value that energy flows are counted with [J/kg]."""
    found = fluid.constants.get(f"{tag.text('fluid.energy_basis')}_calorific_value_mass")
    return None if found is None else found.value
