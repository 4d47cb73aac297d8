"""The flow axis of one tag: in which kind and unit the sheet speaks of a flow.

A user who stated volume or energy thinks in it, so the sheet follows where all points state the
same kind. Limits are found as mass flows: at a point, they are converted by that point's own
proportion; on the ruler, whose windows belong to the normal point, by the normal point's.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from statistics import median_low
from typing import TYPE_CHECKING

from specsheet import quantity
from specsheet.fields import TERMS
from specsheet.quantity.value import Quantity
from specsheet.sheet import rounding, words
from specsheet.sheet.units import Units

if TYPE_CHECKING:
    from specsheet.evaluate.result import Evaluation, PointResult


@dataclass(frozen=True, slots=True)
class FlowAxis:
    """How flows are shown.

    Attributes:
        label: words ("Mass flow").
        kind: kind of flow shown.
        unit: internal spelling of the unit.
        factor: flow shown [SI of its kind] by mass flow [kg/s], at the normal point.
        factors: the same at each operating point, by name.
    """

    label: str
    kind: str
    unit: str
    factor: float
    factors: Mapping[str, float]

    @property
    def printed_unit(self) -> str:
        """The unit as it is printed."""
        return words.unit(self.unit)

    def shown(self, mass_flow: float, point: str = "") -> float:
        """Return a mass flow [kg/s] in the unit shown, at a point or at the normal one."""
        factor = self.factors.get(point, self.factor)
        return quantity.from_si(mass_flow * factor, self.kind, self.unit)

    def text(self, mass_flow: float, point: str = "", digits: int = 3) -> str:
        """Return a mass flow [kg/s] rounded, without the unit."""
        return rounding.significant(self.shown(mass_flow, point), digits)


def of(evaluation: Evaluation, units: Units) -> FlowAxis:
    """Return the axis of a tag."""
    flows = mass_flows(evaluation)
    kind = _kind_stated(evaluation)
    factors = {
        point.name: _number(point, kind) / flows[point.name]
        for point in evaluation.points
        if point.name in flows and kind in point.values
    }
    if not factors or len(factors) < len(flows):
        kind, factors = "mass_flow", dict.fromkeys(flows, 1.0)
    values = [flows[name] * factor for name, factor in factors.items()]
    unit = _base_unit(evaluation, kind) or units.pick(kind, values)
    normal = _normal(flows)
    return FlowAxis(TERMS[kind].label, kind, unit, factors.get(normal, 1.0), factors)


def mass_flows(evaluation: Evaluation) -> dict[str, float]:
    """Return the mass flow of each operating point that has one [kg/s]."""
    found = {
        point.name: _number(point, "mass_flow")
        for point in evaluation.points
        if "mass_flow" in point.values
    }
    return {name: flow for name, flow in found.items() if flow > 0.0}


def _number(point: PointResult, key: str) -> float:
    value = point.values[key].value
    return float("nan") if isinstance(value, str) else float(value)


def _normal(flows: Mapping[str, float]) -> str:
    """Return the name of the normal point, else of the point of the middle flow."""
    if not flows or "normal" in flows:
        return "normal"
    middle = median_low(flows.values())
    return next(name for name, flow in flows.items() if flow == middle)


def _stated(evaluation: Evaluation) -> list[Quantity]:
    return [held for point in evaluation.tag.points if (held := point.quantity("flow"))]


def _kind_stated(evaluation: Evaluation) -> str:
    """Return the kind of flow that all points state alike, mass flow where they differ."""
    kinds = {(held.kind, held.base) for held in _stated(evaluation)}
    return next(iter(kinds))[0] if len(kinds) == 1 else "mass_flow"


def _base_unit(evaluation: Evaluation, kind: str) -> str:
    """Return the unit of a base volume as stated: the value stands at the base that it names."""
    return _stated(evaluation)[0].unit if kind == "base_volume_flow" else ""
