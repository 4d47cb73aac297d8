"""The values of an evaluation as rows, each made once: tables and annex print the same row."""

from __future__ import annotations

from collections.abc import Mapping
from typing import TYPE_CHECKING

from specsheet.sheet import rows, words
from specsheet.sheet.model import Row
from specsheet.sheet.units import Units

if TYPE_CHECKING:
    from specsheet.evaluate.result import Evaluation, Result

#: values by a volume at base conditions
_AT_BASE = ("gross_calorific_value", "net_calorific_value", "wobbe_index")


class Values:
    """Rows of the values of one evaluation.

    Attributes:
        evaluation: the evaluation.
        units: units of the tag.
        varying: keys of the values that stand at the operating points.
        single: values that stand alone, by the first place that has them.
    """

    def __init__(self, evaluation: Evaluation, units: Units) -> None:
        self.evaluation = evaluation
        self.units = units
        self.varying = {key: None for point in evaluation.points for key in point.values}
        self.single: dict[str, Result] = {}
        for place in (evaluation.element, evaluation.base, evaluation.fluid, evaluation.line):
            self._take(place)
        self._take(evaluation.summary)
        self._gas = evaluation.tag.phase == "gas"
        self._made: dict[str, Row | None] = {}

    def _take(self, place: Mapping[str, Result]) -> None:
        for key, result in place.items():
            self.single.setdefault(key, result)

    def results(self, key: str) -> list[Result | None]:
        """Return a value at every point, or the only one it has; empty where there is none."""
        if key in self.varying:
            return [point.values.get(key) for point in self.evaluation.points]
        return [self.single[key]] if key in self.single else []

    def row(self, key: str) -> Row | None:
        """Return the row of a glossary key or of the path of an entry; None without a value."""
        if key not in self._made:
            self._made[key] = self._entry(key) if "." in key else self._row(key)
        return self._made[key]

    def alone(self, key: str, result: Result) -> Row:
        """Return the row of a value that stands alone in its own place."""
        row = self.row(key) if key not in self.varying and self.single.get(key) is result else None
        return row or rows.of_results(key, (result,), self.units, gas=self._gas)

    def _row(self, key: str) -> Row | None:
        results = self.results(key)
        if not results:
            return None
        return rows.of_results(key, results, self.units, self._note(key), gas=self._gas)

    def _note(self, key: str) -> str:
        """Return what a volume at base, or an energy, must say to mean anything."""
        tag = self.evaluation.tag
        if key in _AT_BASE or (key == "base_volume_flow" and key in self.varying):
            return f"at {tag.base.name}"
        return tag.text("fluid.energy_basis") if key == "energy_flow" else ""

    def _entry(self, path: str) -> Row | None:
        tag = self.evaluation.tag
        if tag.get(path) is None:
            return None
        return rows.of_entry(tag, path, words.label(path), words.symbol(path))
