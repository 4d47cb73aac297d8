"""The fluid at base conditions, and what the user states about it there."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import replace

from specsheet.findings import Finding, Level, Origin
from specsheet.fluid.evaluate import Outcome
from specsheet.fluid.given_values import given
from specsheet.fluid.model import Fluid, caution
from specsheet.fluid.phases import GAS
from specsheet.fluid.state import Property, State
from specsheet.quantity.value import Base
from specsheet.tag import Tag

_DENSITY = "fluid.base_density"
_VOLUME_KEYS = ("gross_calorific_value", "net_calorific_value")
#: what is missing at a point only matters there
_POINTS_ONLY = ("viscosity", "vapour_pressure")
#: what a consumer finds among the constants, at the job's own base
_OWN = ("gross_calorific_value", "net_calorific_value", "wobbe_index", "relative_density")


def bases_of(tag: Tag) -> tuple[Base, ...]:
    """Return the job's own base condition and every other one that a flow is stated at."""
    stated = [
        quantity.base
        for point in tag.points
        if (quantity := point.quantity("flow")) is not None and quantity.base is not None
    ]
    return tuple(dict.fromkeys((tag.base, *stated)))


def constants(tag: Tag, fluid: Fluid) -> dict[str, Property]:
    """Return the properties that depend on no state, stated ones first."""
    values = dict(fluid.constants())
    molar = tag.si("fluid.molar_mass")
    if molar is not None and molar > 0.0:
        values["molar_mass"] = given(molar, 0.001)
    conductivity = tag.si("fluid.electrical_conductivity")
    if conductivity is not None:
        values["electrical_conductivity"] = given(conductivity, 0.05)
    return values


def apply(tag: Tag, fluid: Fluid, base: Base, outcome: Outcome) -> State:
    """Return the state at a base with the stated values in place, and what is said of it."""
    found = outcome.state or State(base.temperature, base.pressure, fluid.phase, {})
    findings = [*found.findings, *outcome.findings]
    values = dict(found.properties)
    density = tag.si(_DENSITY)
    if density is not None and density > 0.0:
        findings = [item for item in findings if item.level is not Level.STOP]
        findings += _differs(base, tag.base, density, values.get("density"))
        values["density"] = given(_moved(density, tag.base, base, fluid.phase), 0.002)
    findings += _calorific(tag, base, values)
    said = tuple(_softened(tag, item, base) for item in findings if item.field not in _POINTS_ONLY)
    return State(found.temperature, found.pressure, found.phase, values, said)


def _moved(density: float, own: Base, base: Base, phase: str) -> float:
    """Return a density stated at the job's base, at another base [kg/m3] (ideal gas)."""
    if phase != GAS or base == own:
        return density
    return density * base.pressure / own.pressure * own.temperature / base.temperature


def _differs(base: Base, own: Base, stated: float, computed: Property | None) -> list[Finding]:
    if base != own or computed is None or abs(stated / computed.value - 1.0) <= 0.01:
        return []
    difference = 100.0 * (stated / computed.value - 1.0)
    text = (
        f"The stated density at base {stated:.4g} kg/m3 is {abs(difference):.3g} % "
        f"{'above' if difference > 0 else 'below'} the computed {computed.value:.4g} kg/m3. The "
        "stated one is used: confirm it, or leave it out."
    )
    return [caution("base-density-given-differs", _DENSITY, text, computed.source)]


def _calorific(tag: Tag, base: Base, values: dict[str, Property]) -> list[Finding]:
    """Put calorific values stated at the job's base in place, moved to this base by density.

    Where one of gross and net is stated and both are computed, the other follows in proportion.
    """
    density = values.get("density")
    move = base.pressure / tag.base.pressure * tag.base.temperature / base.temperature
    stated = {key: value for key in _VOLUME_KEYS if (value := tag.si(f"fluid.{key}")) is not None}
    findings: list[Finding] = []
    ratio = 1.0
    for key, value in stated.items():
        if value <= 0.0:
            continue
        computed = values.get(key)
        if computed is not None:
            ratio = value * move / computed.value
            findings += _calorific_differs(key, value * move, computed, base == tag.base)
        values[key] = given(value * move, 0.005)
        if density is not None:
            values[f"{key}_mass"] = given(value * move / density.value, 0.005)
    for key in _VOLUME_KEYS:
        found = values.get(key)
        if stated and key not in stated and found is not None and density is not None:
            text = "computed from the composition, in proportion to the stated calorific value"
            scaled = Property(found.value * ratio, Origin.DERIVED, text, found.source, 0.005)
            values[key] = scaled
            values[f"{key}_mass"] = scaled._replace(value=scaled.value / density.value)
    return findings


def _calorific_differs(key: str, stated: float, computed: Property, own: bool) -> list[Finding]:
    difference = 100.0 * (stated / computed.value - 1.0)
    if not own or abs(difference) <= 2.0:
        return []
    text = (
        f"The stated {key.replace('_', ' ')} {stated / 1e6:.4g} MJ/m3 is {abs(difference):.3g} % "
        f"{'above' if difference > 0 else 'below'} the computed {computed.value / 1e6:.4g} MJ/m3. "
        "The stated one is used: confirm it and its base, or leave it out."
    )
    return [caution("calorific-value-given-differs", f"fluid.{key}", text, computed.source)]


def _softened(tag: Tag, finding: Finding, base: Base) -> Finding:
    """Return a finding about a base condition: it stops no point, and counts where it is used."""
    field = finding.field
    if field and "." not in field:
        field = f"job.base.{field}" if base == tag.base else ""
    level = finding.level
    if level is Level.STOP:
        level = Level.CAUTION if _used(tag, base) else Level.NOTE
    return replace(finding, level=level, field=field)


def _used(tag: Tag, base: Base) -> bool:
    """Tell whether a flow is stated at a base condition."""
    return any(
        quantity is not None
        and quantity.kind == "base_volume_flow"
        and (quantity.base or tag.base) == base
        for quantity in (point.quantity("flow") for point in tag.points)
    )


def at_own_base(tag: Tag, bases: Mapping[Base, State]) -> dict[str, Property]:
    """Return the values by volume at the job's own base, and stated calorific values by mass."""
    own = bases.get(tag.base)
    if own is None:
        return {}
    keys = (*_OWN, *(f"{key}_mass" for key in _VOLUME_KEYS))
    return {key: own.properties[key] for key in keys if key in own.properties}
