"""The flow axis of one tag: in which kind and unit the sheet speaks of a mass flow.

A user who stated energy or volume thinks in it. The axis follows where that flow is in proportion
to mass flow at all operating points; else it stays with mass flow.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from specsheet import quantity
from specsheet.fields import TERMS
from specsheet.sheet import rounding, words
from specsheet.sheet.units import Units

if TYPE_CHECKING:
    from specsheet.evaluate.result import Evaluation

#: the proportion may differ between the points by this much [-] (common practice, no source)
_TOLERANCE = 2e-3


@dataclass(frozen=True, slots=True)
class FlowAxis:
    """How mass flows are shown.

    Attributes:
        label: words ("Mass flow").
        kind: kind of flow shown.
        unit: internal spelling of the unit.
        factor: flow shown [SI of its kind] by mass flow [kg/s].
    """

    label: str
    kind: str
    unit: str
    factor: float

    @property
    def printed_unit(self) -> str:
        """The unit as it is printed."""
        return words.unit(self.unit)

    def shown(self, mass_flow: float) -> float:
        """Return a mass flow [kg/s] in the unit shown."""
        return quantity.from_si(mass_flow * self.factor, self.kind, self.unit)

    def text(self, mass_flow: float, digits: int = 3) -> str:
        """Return a mass flow [kg/s] rounded, without the unit."""
        return rounding.significant(self.shown(mass_flow), digits)


def of(evaluation: Evaluation, units: Units) -> FlowAxis:
    """Return the axis of a tag."""
    flows = [
        float(point.values["mass_flow"].value)
        for point in evaluation.points
        if "mass_flow" in point.values
    ]
    for kind in _kinds_stated(evaluation):
        factor = _proportion(evaluation, kind)
        if factor is not None:
            unit = _base_unit(evaluation, kind) or units.pick(kind, [one * factor for one in flows])
            return FlowAxis(TERMS[kind].label, kind, unit, factor)
    return FlowAxis(TERMS["mass_flow"].label, "mass_flow", units.pick("mass_flow", flows), 1.0)


def _kinds_stated(evaluation: Evaluation) -> list[str]:
    stated = [held for point in evaluation.tag.points if (held := point.quantity("flow"))]
    if len({held.base for held in stated}) > 1:
        return []
    kinds = [held.kind for held in stated]
    return [kind for kind in dict.fromkeys(kinds) if kind in TERMS]


def _base_unit(evaluation: Evaluation, kind: str) -> str:
    """Return the unit of a base volume as stated: the value stands at the base that it names."""
    if kind != "base_volume_flow":
        return ""
    return next(
        held.unit
        for point in evaluation.tag.points
        if (held := point.quantity("flow")) and held.kind == kind
    )


def _proportion(evaluation: Evaluation, kind: str) -> float | None:
    """Return flow of that kind by mass flow where all points agree on it."""
    ratios = []
    for point in evaluation.points:
        mass, other = point.values.get("mass_flow"), point.values.get(kind)
        if mass is None or other is None:
            continue
        if isinstance(mass.value, str) or isinstance(other.value, str) or not mass.value > 0.0:
            continue
        ratios.append(other.value / mass.value)
    if not ratios or max(ratios) - min(ratios) > _TOLERANCE * abs(ratios[0]):
        return None
    return ratios[0]
