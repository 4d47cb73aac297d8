"""The fluid of one tag: its state at every point and base condition, stated values first."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import replace

from specsheet import packs
from specsheet.findings import Finding, Level
from specsheet.fluid import (
    base_values,
    envelope,
    evaluate,
    gaps,
    given_values,
    mixture_phase,
    repeats,
)
from specsheet.fluid.backends.mixture import Mixture
from specsheet.fluid.backends.water import Water
from specsheet.fluid.backends.wet_gas import WetGas
from specsheet.fluid.build import fluid_of
from specsheet.fluid.lock import LOCK
from specsheet.fluid.model import Condition, Fluid, caution
from specsheet.fluid.phases import LIQUID, UNVERIFIED
from specsheet.fluid.state import FluidResult, Property, State
from specsheet.quantity.value import Base
from specsheet.tag import Point, Tag

#: application of a family that meters with a free surface, as profiles name it
OPEN_CHANNEL = "open channel"


def derive(tag: Tag) -> FluidResult:
    """Return the fluid of a tag. Never raises on what a user states: every doubt is a finding."""
    built = fluid_of(tag)
    fluid = built.fluid
    name = tag.text("fluid.name")
    if fluid is None:
        return FluidResult(
            name, tuple(None for _ in tag.points), {}, findings=_sorted(built.findings)
        )
    with LOCK:
        constants = base_values.constants(tag, fluid)
        points, findings = _points(tag, fluid, constants)
        bases, base_findings = _bases(tag, fluid, findings)
    missing = gaps.unknown(name or fluid.name, points, findings)
    return FluidResult(
        name or fluid.name,
        points,
        bases,
        {**constants, **base_values.at_own_base(tag, bases)},
        _sorted((*built.findings, *findings, *base_findings, *missing)),
    )


def settle(tag: Tag, seconds: float = 10.0) -> bool:
    """Settle what :func:`derive` left unverified about the phase of a mixture.

    Works in a process of its own, so it may be called from a thread while a screen stays alive.
    Afterwards :func:`derive` uses what was found.

    Args:
        tag: the tag.
        seconds: after which the search is given up, for good.

    Returns:
        whether anything was unverified and is settled now.
    """
    if all(state is None or state.phase != UNVERIFIED for state in derive(tag).points):
        return False
    found = fluid_of(tag).fluid
    if not isinstance(found, (WetGas, Mixture)):
        return False
    whole = found.dry if isinstance(found, WetGas) else found.composition
    if not envelope.settle(mixture_phase.without_water(whole), seconds):
        return False
    evaluate.forget()
    return True


def condition_of(tag: Tag, point: Point) -> Condition:
    """Return where the fluid is wanted at an operating point; the air's pressure in a channel."""
    pressure, temperature = point.quantity("pressure"), point.quantity("temperature")
    dryness = point.quantity("dryness_fraction")
    absolute = None if pressure is None else tag.absolute(pressure)
    if absolute is None and temperature is not None and _has_free_surface(tag):
        absolute = tag.atmospheric_pressure
    return Condition(
        None if temperature is None else temperature.value,
        absolute,
        None if dryness is None else dryness.value,
    )


def _has_free_surface(tag: Tag) -> bool:
    """Tell whether a liquid is metered by a family for open channels."""
    if tag.phase != LIQUID or tag.family not in packs.family_keys():
        return False
    return OPEN_CHANNEL in packs.profile(tag.family).applies_to


def _points(
    tag: Tag, fluid: Fluid, constants: Mapping[str, Property]
) -> tuple[tuple[State | None, ...], tuple[Finding, ...]]:
    molar = constants.get("molar_mass")
    states: list[State | None] = []
    findings: list[Finding] = []
    for point in tag.points:
        outcome = evaluate.state(fluid, condition_of(tag, point))
        if outcome.state is None and point.quantity("density") is not None:
            outcome = given_values.rescued(tag, condition_of(tag, point), outcome)
        found = outcome.state
        if found is not None:
            molar_mass = None if molar is None else molar.value
            values, said = given_values.apply(tag, point, found, molar_mass)
            here = tuple(_at(point, item) for item in said)
            found = State(found.temperature, found.pressure, found.phase, values, here)
            findings += here
        findings += [_at(point, item) for item in (*outcome.findings, *_unused(fluid, point))]
        states.append(found)
    by_name = dict(zip((point.name for point in tag.points), states, strict=True))
    return tuple(states), repeats.over_points(findings, by_name)


def _unused(fluid: Fluid, point: Point) -> tuple[Finding, ...]:
    """Return the caution for a dryness fraction of anything but steam."""
    if point.quantity("dryness_fraction") is None or isinstance(fluid, Water):
        return ()
    text = (
        f"A dryness fraction is stated, but only steam has one here: {fluid.name} is computed dry."
    )
    return (caution("dryness-unused", "dryness_fraction", text),)


def _at(point: Point, finding: Finding) -> Finding:
    """Return a finding with the path of its entry at a point; a path in full stays."""
    field = finding.field
    if field and "." not in field:
        field = f"points.{point.name}.{field}"
    return replace(finding, field=field, point=point.name)


def _bases(
    tag: Tag, fluid: Fluid, at_points: tuple[Finding, ...]
) -> tuple[Mapping[Base, State], tuple[Finding, ...]]:
    """Return the state at each base, and what is said of it that no point has said already."""
    bases: dict[Base, State] = {}
    findings: list[tuple[Base, Finding]] = []
    for base in base_values.bases_of(tag):
        outcome = evaluate.base(fluid, base)
        found = base_values.apply(tag, fluid, base, outcome)
        bases[base] = found
        findings += [(base, item) for item in found.findings if not _repeated(item, at_points)]
    return bases, repeats.over_bases(findings)


def _repeated(finding: Finding, others: tuple[Finding, ...]) -> bool:
    return any(
        item.code == finding.code and item.message.startswith(finding.message) for item in others
    )


def _sorted(findings: tuple[Finding, ...]) -> tuple[Finding, ...]:
    """Return the findings worst first, each once, otherwise in the order they came."""
    order = (Level.STOP, Level.CAUTION, Level.NOTE)
    return tuple(sorted(dict.fromkeys(findings), key=lambda item: order.index(item.level)))
