"""The calculation annex: for every derived value its equation, source and the numbers put in."""

from __future__ import annotations

from collections.abc import Mapping
from typing import TYPE_CHECKING

from specsheet.findings import Origin
from specsheet.sheet import rows, tables
from specsheet.sheet.model import Row, Working
from specsheet.sheet.units import Units

if TYPE_CHECKING:
    from specsheet.evaluate.result import Evaluation, Result
    from specsheet.meters.family import Derivation


def build(evaluation: Evaluation, units: Units) -> tuple[Working, ...]:
    """Return how each derived value comes about, in the glossary's order."""
    stated = {item.key: item for item in evaluation.derivations}
    workings = (
        _working(evaluation, key, stated.get(key), units) for key in rows.ordered(_keys(evaluation))
    )
    return tuple(working for working in workings if working is not None)


def _keys(evaluation: Evaluation) -> list[str]:
    """Return the keys of all values that are derived somewhere, or have a derivation."""
    stated = tables.pressures_stated(evaluation.tag)
    found = {item.key: None for item in evaluation.derivations}
    for values in _places(evaluation):
        for key, result in values.items():
            if result.origin is Origin.DERIVED and key not in stated:
                found[key] = None
    return list(found)


def _places(evaluation: Evaluation) -> list[Mapping[str, Result]]:
    single = [evaluation.element, evaluation.base, evaluation.fluid]
    single += [evaluation.line, evaluation.summary]
    return [*(point.values for point in evaluation.points), *single]


def _working(
    evaluation: Evaluation, key: str, derivation: Derivation | None, units: Units
) -> Working | None:
    result = _row(evaluation, key, units)
    if result is None:
        return None
    inputs = [_row(evaluation, name, units) for name in (derivation.inputs if derivation else ())]
    present = tuple(row for row in inputs if row is not None)
    names = tuple(point.name for point in evaluation.points)
    wide = any(_by_point(evaluation, name) for name in (key, *(row.key for row in present)))
    source = derivation.source if derivation and derivation.source else result.source
    return Working(
        key=key,
        label=result.label,
        symbol=result.symbol,
        equation=derivation.equation if derivation else _method(evaluation, key),
        source=source,
        columns=names if wide else (),
        inputs=present,
        result=result,
    )


def _by_point(evaluation: Evaluation, key: str) -> bool:
    return any(key in point.values for point in evaluation.points)


def _row(evaluation: Evaluation, key: str, units: Units) -> Row | None:
    """Return the row of a value wherever it stands: by point first, else on its own."""
    if _by_point(evaluation, key):
        results = [point.values.get(key) for point in evaluation.points]
        note = f"at {evaluation.tag.base.name}" if key == "base_volume_flow" else ""
        return rows.of_results(key, results, units, note)
    for values in _places(evaluation):
        if key in values:
            return rows.of_results(key, (values[key],), units)
    return None


def _method(evaluation: Evaluation, key: str) -> str:
    """Return the method of a value in words; several where the points differ."""
    methods = {
        values[key].method: None
        for values in _places(evaluation)
        if key in values and values[key].method
    }
    return "; ".join(methods)
