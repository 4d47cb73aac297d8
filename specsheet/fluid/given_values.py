"""What the user states about the fluid wins; the computed value beside it is a cross-check."""

from __future__ import annotations

import math
from collections.abc import Mapping, Sequence
from dataclasses import replace

from specsheet.findings import Finding, Level, Origin
from specsheet.fluid.evaluate import Outcome
from specsheet.fluid.model import GAS_CONSTANT, Condition, caution
from specsheet.fluid.phases import GAS, LIQUID, TWO_PHASE, disagreement
from specsheet.fluid.state import Property, State
from specsheet.quantity.value import Quantity
from specsheet.tag import Point, Tag

#: key -> relative uncertainty assumed of a stated value, relative difference that is worth a word
STATED: Mapping[str, tuple[float, float]] = {
    "density": (0.005, 0.02),
    "vapour_pressure": (0.02, 0.10),
    "isentropic_exponent": (0.02, 0.05),
    "compressibility": (0.005, 0.02),
    "sound_speed": (0.01, 0.03),
    "heat_capacity": (0.02, 0.10),
}
_VISCOSITY = (0.05, 0.20)
_MAY_BE_STATED = frozenset({*STATED, "viscosity"})

_LABELS = {
    "density": "density",
    "viscosity": "viscosity",
    "vapour_pressure": "vapour pressure",
    "isentropic_exponent": "isentropic exponent",
    "compressibility": "compressibility factor",
    "sound_speed": "speed of sound",
    "heat_capacity": "heat capacity",
}
_UNITS = {
    "density": (1.0, " kg/m3"),
    "viscosity": (1e3, " mPa s"),
    "vapour_pressure": (1e-5, " bar(a)"),
    "sound_speed": (1.0, " m/s"),
    "heat_capacity": (1e-3, " kJ/kg/K"),
}


def given(value: float, uncertainty: float) -> Property:
    """Return a property the user stated; what it is worth is assumed, and said."""
    text = f"stated; taken as good to {100 * uncertainty:g} %"
    return Property(value, Origin.GIVEN, text, "", uncertainty)


#: what is said of a value that is not known, and needs no saying where the user states it
_SETTLED = {
    "viscosity-missing": "viscosity",
    "viscosity-extrapolated": "viscosity",
    "slurry-viscosity": "viscosity",
    "vapour-pressure-missing": "vapour_pressure",
}


def apply(
    tag: Tag, point: Point, state: State, molar_mass: float | None
) -> tuple[dict[str, Property], Sequence[Finding]]:
    """Return the properties and findings of a state with the values stated at the point in place.

    Args:
        tag: the tag.
        point: what is stated.
        state: what is computed there.
        molar_mass: [kg/mol]; None where it is not known.
    """
    values = dict(state.properties)
    if point.values.keys().isdisjoint(_MAY_BE_STATED):
        _kinematic(values)
        return values, state.findings
    findings = [
        item for item in state.findings if point.quantity(_SETTLED.get(item.code, "")) is None
    ]
    for key, (uncertainty, tolerance) in STATED.items():
        quantity = point.quantity(key)
        if quantity is None:
            continue
        stated = tag.absolute(quantity)
        findings += _unusable(key, stated) or _compare(key, stated, values.get(key), tolerance)
        if _sound(stated):
            values[key] = given(stated, uncertainty)
    _follow_density(point, state, values, molar_mass)
    viscosity = point.quantity("viscosity")
    if viscosity is not None:
        findings += _viscosity(viscosity, values)
    _kinematic(values)
    if "vapour_pressure" in values and point.quantity("vapour_pressure") is not None:
        findings += _boiling(tag, state, values["vapour_pressure"].value)
    return values, findings


#: refusals that a stated density makes good: the point is beyond what is known, not impossible
_BEYOND = ("fluid-limit", "concentration-limit", "fluid-no-state", "mixture-pair")


def rescued(tag: Tag, condition: Condition, outcome: Outcome) -> Outcome:
    """Return a bare state for stated values to stand on, where the fluid's own data end.

    Args:
        tag: the tag.
        condition: the point's, where a density is stated.
        outcome: the refusal.
    """
    temperature, pressure = condition.temperature, condition.pressure
    if temperature is None or pressure is None or not (_sound(temperature) and _sound(pressure)):
        return outcome
    if any(item.code not in _BEYOND for item in outcome.findings):
        return outcome
    findings = tuple(
        replace(item, level=Level.CAUTION, message=f"{item.message} The stated values are used.")
        for item in outcome.findings
    )
    return Outcome(State(temperature, pressure, tag.phase, {}, findings))


def _sound(value: float) -> bool:
    return math.isfinite(value) and value > 0.0


def _unusable(key: str, stated: float) -> list[Finding]:
    if _sound(stated):
        return []
    text = f"A {_LABELS[key]} above zero was wanted, {stated:g} came; it is not used."
    return [caution("given-unusable", key, text)]


def _compare(key: str, stated: float, computed: Property | None, tolerance: float) -> list[Finding]:
    """Return the caution for a stated value that strays from the computed one."""
    if computed is None or computed.origin is Origin.GIVEN or computed.value == 0.0:
        return []
    difference = stated / computed.value - 1.0
    if abs(difference) <= max(tolerance, computed.uncertainty):
        return []
    factor, unit = _UNITS.get(key, (1.0, ""))
    text = (
        f"The stated {_LABELS[key]} {stated * factor:.4g}{unit} is {abs(100 * difference):.3g} % "
        f"{'above' if difference > 0 else 'below'} the computed {computed.value * factor:.4g}"
        f"{unit} ({computed.method}). The stated one is used: confirm it, or leave it out."
    )
    return [caution(f"{key.replace('_', '-')}-given-differs", key, text, computed.source)]


def _follow_density(
    point: Point, state: State, values: dict[str, Property], molar_mass: float | None
) -> None:
    """Keep density and compressibility factor of a gas of one mind when one of them is stated."""
    if state.phase != GAS or molar_mass is None:
        return
    ideal = state.pressure * molar_mass / (GAS_CONSTANT * state.temperature)
    has_density = point.quantity("density") is not None
    has_factor = point.quantity("compressibility") is not None
    if has_density and not has_factor and "density" in values:
        text = "p M / (ρ R T) with the stated density"
        factor = ideal / values["density"].value
        values["compressibility"] = Property(factor, Origin.DERIVED, text, "", 0.005)
    if has_factor and not has_density and "compressibility" in values:
        text = "p M / (Z R T) with the stated compressibility factor"
        density = ideal / values["compressibility"].value
        values["density"] = Property(density, Origin.DERIVED, text, "", 0.005)


def _viscosity(stated: Quantity, values: dict[str, Property]) -> list[Finding]:
    """Put the stated viscosity in place; a kinematic one is turned with the density."""
    uncertainty, tolerance = _VISCOSITY
    dynamic = stated.value
    if stated.kind == "kinematic_viscosity":
        density = values.get("density")
        if density is None:
            text = (
                "A kinematic viscosity is stated, but no density to turn it with: state that too."
            )
            return [caution("given-unusable", "viscosity", text)]
        dynamic = stated.value * density.value
    if not _sound(dynamic):
        return _unusable("viscosity", dynamic)
    findings = _compare("viscosity", dynamic, values.get("viscosity"), tolerance)
    values["viscosity"] = given(dynamic, uncertainty)
    return findings


def _kinematic(values: dict[str, Property]) -> None:
    """Derive the kinematic viscosity from what now stands."""
    density, viscosity = values.get("density"), values.get("viscosity")
    if density is not None and viscosity is not None:
        values["kinematic_viscosity"] = Property(
            viscosity.value / density.value,
            Origin.DERIVED,
            "dynamic viscosity by density",
            "",
            viscosity.uncertainty,
        )


def _boiling(tag: Tag, state: State, vapour: float) -> list[Finding]:
    """Return the stop for a liquid below the vapour pressure that the user states."""
    if tag.phase != LIQUID or state.phase != LIQUID or state.pressure > vapour:
        return []
    boiling = replace(
        state,
        phase=TWO_PHASE,
        properties={"vapour_pressure": given(vapour, 0.02)},
    )
    found = disagreement(LIQUID, boiling)
    return [] if found is None else [found]
