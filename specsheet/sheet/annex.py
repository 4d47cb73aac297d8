"""The calculation annex: for every derived value its equation, source and the numbers put in."""

from __future__ import annotations

from typing import TYPE_CHECKING

from specsheet.findings import Origin
from specsheet.sheet import rows, tables
from specsheet.sheet.model import Working
from specsheet.sheet.values import Values

if TYPE_CHECKING:
    from specsheet.meters.family import Derivation


def build(values: Values) -> tuple[Working, ...]:
    """Return how each derived value comes about, in the glossary's order."""
    stated = {item.key: item for item in values.evaluation.derivations}
    workings = (_working(values, key, stated.get(key)) for key in rows.ordered(_keys(values)))
    return tuple(working for working in workings if working is not None)


def _keys(values: Values) -> list[str]:
    """Return the keys of all values that are derived somewhere, or have a derivation."""
    typed = tables.pressures_stated(values.evaluation.tag)
    found = {item.key: None for item in values.evaluation.derivations}
    for key in (*values.varying, *values.single):
        if any(one is not None and one.origin is Origin.DERIVED for one in values.results(key)):
            found[key] = None
    return [key for key in found if key not in typed]


def _working(values: Values, key: str, derivation: Derivation | None) -> Working | None:
    result = values.row(key)
    if result is None or result.origins == (Origin.GIVEN,):
        return None
    named = (values.row(name) for name in (derivation.inputs if derivation else ()))
    inputs = tuple(row for row in named if row is not None)
    wide = any(row.key in values.varying for row in (result, *inputs))
    points = values.evaluation.points
    return Working(
        key=key,
        label=result.label,
        symbol=result.symbol,
        equation=(derivation.equation if derivation else "") or _method(values, key),
        source=(derivation.source if derivation else "") or result.source,
        columns=tuple(point.name for point in points) if wide else (),
        inputs=inputs,
        result=result,
    )


def _method(values: Values, key: str) -> str:
    """Return the method of a value in words; several where the points differ."""
    methods = {one.method: None for one in values.results(key) if one is not None and one.method}
    return "; ".join(methods)
