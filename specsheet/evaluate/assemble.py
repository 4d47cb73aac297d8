"""From arrays to results: every value gets its origin, source and method."""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from math import isnan

from specsheet.evaluate.flows import calorific_value_by_mass, density_at_base
from specsheet.evaluate.result import BudgetLine, PointResult, Result
from specsheet.evaluate.stream import Points
from specsheet.findings import Origin
from specsheet.fluid.state import FluidResult, Property, State
from specsheet.meters.family import Array, Contribution, Derivation
from specsheet.quantity.value import Quantity
from specsheet.tag import Point, Tag

_FLOW_KEYS = {
    "mass_flow": "mass_flow",
    "volume_flow": "volume_flow",
    "base_volume_flow": "base_volume_flow",
    "energy_flow": "energy_flow",
}


def point_results(
    tag: Tag,
    fluid: FluidResult,
    points: Points,
    values: Mapping[str, Array],
    derivations: Mapping[str, Derivation],
) -> tuple[PointResult, ...]:
    """Return the values at every operating point of the tag, evaluated or not."""
    lanes = derived(values, len(points.indices), derivations)
    of_point = dict(zip(points.indices, lanes, strict=True))
    results: list[PointResult] = []
    for index, point in enumerate(tag.points):
        state = fluid.points[index]
        row = _conditions(tag, point, state)
        row.update(_flows(tag, fluid, point, points.mass_flows[index], state))
        for key, result in of_point.get(index, {}).items():
            row.setdefault(key, result)
        results.append(PointResult(point.name, row))
    return tuple(results)


def derived(
    values: Mapping[str, Array], count: int, derivations: Mapping[str, Derivation]
) -> tuple[dict[str, Result], ...]:
    """Return what is known at each of the first ``count`` lanes of a response, by glossary key."""
    lanes: tuple[dict[str, Result], ...] = tuple({} for _ in range(count))
    for key, array in values.items():
        derivation = derivations.get(key)
        origin = Origin.DERIVED if derivation is None else derivation.origin
        source = "" if derivation is None else derivation.source
        for lane, value in zip(lanes, array.tolist(), strict=False):
            if not isnan(value):
                lane[key] = Result(value, origin, source)
    return lanes


def _conditions(tag: Tag, point: Point, state: State | None) -> dict[str, Result]:
    """Return pressure, temperature and the properties of the fluid at one point."""
    row: dict[str, Result] = {}
    pressure = point.quantity("pressure")
    if pressure is not None:
        row.update(_pressures(tag, pressure))
    temperature = point.quantity("temperature")
    if temperature is not None:
        row["temperature"] = Result(temperature.value, Origin.GIVEN, text=temperature.text)
    if state is None:
        return row
    row.setdefault("pressure", Result(state.pressure, Origin.DERIVED, method="saturation"))
    row.setdefault("temperature", Result(state.temperature, Origin.DERIVED, method="saturation"))
    gauge = state.pressure - tag.atmospheric_pressure
    row.setdefault("pressure_gauge", Result(gauge, Origin.DERIVED))
    row["phase"] = Result(state.phase, Origin.DERIVED)
    for key, found in state.properties.items():
        stated = point.quantity(key)
        row[key] = property_result(found, stated)
    return row


def _pressures(tag: Tag, stated: Quantity) -> dict[str, Result]:
    """Return a stated pressure as typed, and what follows from it with the atmosphere."""
    if stated.kind == "pressure_gauge":
        return {
            "pressure": Result(tag.absolute(stated), Origin.DERIVED),
            "pressure_gauge": Result(stated.value, Origin.GIVEN, text=stated.text),
        }
    return {"pressure": Result(stated.value, Origin.GIVEN, text=stated.text)}


def property_result(found: Property, stated: Quantity | None = None) -> Result:
    """Return a property of the fluid as a result; ``stated`` is what the user typed for it."""
    text = stated.text if stated is not None and found.origin is Origin.GIVEN else ""
    return Result(found.value, found.origin, found.source, found.method, text)


def _flows(
    tag: Tag, fluid: FluidResult, point: Point, mass: float | None, state: State | None
) -> dict[str, Result]:
    """Return the flow of one point in every kind that can be had, the stated one as typed."""
    stated = point.quantity("flow")
    if stated is None or mass is None:
        return {}
    row = flows_of(tag, fluid, mass, state)
    row[_FLOW_KEYS[stated.kind]] = _as_stated(tag, stated)
    return row


def flows_of(tag: Tag, fluid: FluidResult, mass: float, state: State | None) -> dict[str, Result]:
    """Return a mass flow [kg/s] in every kind of flow that can be had, by glossary key."""
    row = {"mass_flow": Result(mass, Origin.DERIVED)}
    density = None if state is None else state.value("density")
    if density:
        row["volume_flow"] = Result(mass / density, Origin.DERIVED)
    base_density = density_at_base(tag, fluid)
    if base_density and tag.phase == "gas":
        row["base_volume_flow"] = Result(
            mass / base_density, Origin.DERIVED, method=f"at {tag.base.name}"
        )
    calorific = calorific_value_by_mass(tag, fluid)
    if calorific:
        row["energy_flow"] = Result(
            mass * calorific,
            Origin.DERIVED,
            method=f"{tag.text('fluid.energy_basis')} calorific value",
        )
    return row


def _as_stated(tag: Tag, stated: Quantity) -> Result:
    base = tag.base if stated.base is None else stated.base
    method = f"at {base.name}" if stated.kind == "base_volume_flow" else ""
    return Result(stated.value, Origin.GIVEN, method=method, text=stated.text)


def budget_lines(contributions: Iterable[Contribution], count: int) -> tuple[BudgetLine, ...]:
    """Return the contributions at the first ``count`` lanes, largest first."""
    lines = [
        BudgetLine(
            item.key,
            item.label,
            tuple(item.relative[:count].tolist()),
            item.origin,
            item.source,
        )
        for item in contributions
    ]
    return tuple(sorted(lines, key=lambda line: -max(line.relative, default=0.0)))
