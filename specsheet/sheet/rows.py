"""Rows: an entry as typed, or a value rounded, with unit, origin and source."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from functools import lru_cache
from typing import TYPE_CHECKING

from specsheet import quantity
from specsheet.fields import KINDS, TERMS
from specsheet.findings import Origin
from specsheet.quantity.value import Quantity
from specsheet.sheet import rounding, words
from specsheet.sheet.model import CITATION_JOINT, NOTHING, Cell, Row
from specsheet.sheet.units import Units
from specsheet.tag import Tag, Value

if TYPE_CHECKING:
    from specsheet.evaluate.result import Result
    from specsheet.sheet.axis import FlowAxis

_EMPTY = Cell(NOTHING)

#: place of each key in the glossary
PLACES = {key: place for place, key in enumerate(TERMS)}

#: mass flows at the ends of the range, shown in the kind of flow that the user states
_RANGE = ("upper_range_flow", "lower_range_flow", "largest_flow")

#: digits of a given value whose text is not at hand: enough for anything a user types
_STATED = 8


def number(value: float, key: str, kind: str, unit: str) -> str:
    """Return an SI value rounded to significance in ``unit`` (no unit in the text)."""
    return _rounded(value, key, kind, unit, rounding.step(key, kind, value))


def _rounded(value: float, key: str, kind: str, unit: str, smallest: float | None) -> str:
    """Return an SI value rounded to a step [SI], or to significant digits where there is none."""
    shown = quantity.from_si(value, kind, unit)
    if smallest is None:
        return rounding.significant(shown, rounding.digits(key, kind))
    scale_kind = "temperature_difference" if kind == "temperature" else kind
    scale_unit = unit if kind != "temperature" or unit in quantity.units(scale_kind) else "K"
    return rounding.to_step(shown, abs(quantity.from_si(smallest, scale_kind, scale_unit)))


def bound(value: float, kind: str, unit: str) -> str:
    """Return a bound of a limit with the digits it has (no unit in the text)."""
    return rounding.plain(quantity.from_si(value, kind, unit))


def kind_of(key: str) -> str:
    """Return the kind of a term; a key that the glossary lacks is taken for a plain number."""
    return TERMS[key].kind if key in TERMS else "dimensionless"


def unit_of(key: str, values: Sequence[float], units: Units) -> str:
    """Return the unit that the values of a term are shown in."""
    if kind_of(key) not in KINDS:
        return ""
    return units.pick(kind_of(key), values, TERMS[key].shown if key in TERMS else "")


def of_results(
    key: str,
    results: Sequence[Result | None],
    units: Units,
    note: str = "",
    *,
    gas: bool = False,
) -> Row:
    """Return the row of one term: one result for each column, None where there is none.

    Args:
        key: glossary key.
        results: in the order of the columns.
        units: units of the tag.
        note: printed beside the label.
        gas: whether the fluid is a gas, which has other words for a few terms.
    """
    present = [result for result in results if result is not None]
    typed = [result.text for result in present if echoes(result, key)]
    if key in _RANGE and units.flow:
        cells, unit = (
            [_range_flow(result, units.flow) for result in results],
            units.flow.printed_unit,
        )
    elif typed and len(typed) == len(present):
        cells, unit = _as_typed([result.text if result else "" for result in results])
    else:
        numbers = [r.value for r in present if isinstance(r.value, (float, int))]
        internal = unit_of(key, numbers, units) if numbers else ""
        smallest = rounding.shared_step(key, kind_of(key), numbers)
        computed = len(set(numbers)) > 1
        cells = [_cell_text(result, key, internal, smallest, computed) for result in results]
        unit = units.currency if key == "yearly_cost" else words.unit(internal)
    label, symbol = words.named_of(key, gas=gas)
    return Row(
        key=key,
        label=label,
        symbol=symbol,
        cells=tuple(
            [
                _EMPTY if result is None or text == NOTHING else Cell(text, origin(result, key))
                for result, text in zip(results, cells, strict=True)
            ]
        ),
        unit=unit,
        source=CITATION_JOINT.join(
            dict.fromkeys([result.source for result in present if result.source])
        ),
        note=note,
    )


def _range_flow(result: Result | None, axis: FlowAxis) -> str:
    known = result is not None and not isinstance(result.value, str)
    return axis.text(float(result.value), digits=rounding.DIGITS) if known and result else NOTHING


def echoes(result: Result, key: str) -> bool:
    """Tell whether a value is echoed as typed: given, and typed as the kind it is printed as.

    A gauge pressure typed is no absolute pressure, a kinematic viscosity no dynamic one.
    """
    return result.origin is Origin.GIVEN and _is_of(result.text, kind_of(key))


@lru_cache(maxsize=4_000)
def _is_of(text: str, kind: str) -> bool:
    return bool(text) and kind in KINDS and isinstance(quantity.parse(text, kind), Quantity)


def origin(result: Result, key: str) -> Origin:
    """Return the origin that is printed: a number typed as another kind has been converted."""
    if result.origin is not Origin.GIVEN:
        return result.origin
    converted = result.text and not isinstance(result.value, str) and not echoes(result, key)
    return Origin.DERIVED if converted else Origin.GIVEN


def _cell_text(
    result: Result | None, key: str, unit: str, smallest: float | None, computed: bool
) -> str:
    """Return one cell of a row.

    Args:
        result: the value, None for none.
        key: glossary key.
        unit: unit of the row.
        smallest: step that the row shares [SI], None where significant digits decide.
        computed: whether the row changes from point to point: then a typical value is no plain
            figure of the trade, and is rounded as a derived one.
    """
    if result is None:
        return NOTHING
    if isinstance(result.value, str):
        given = result.origin is Origin.GIVEN
        return (result.value if given else result.value.replace("_", " ")) or NOTHING
    if echoes(result, key):
        figures, typed_unit = words.split(result.text)
        return figures if typed_unit == words.unit(unit) else f"{figures} {typed_unit}".strip()
    stated = result.origin is Origin.GIVEN
    if origin(result, key) is Origin.DERIVED or (computed and not stated):
        return _rounded(float(result.value), key, kind_of(key), unit, smallest)
    digits = _STATED if stated else rounding.DIGITS
    return rounding.plain(quantity.from_si(float(result.value), kind_of(key), unit), digits)


def _as_typed(texts: Sequence[str]) -> tuple[list[str], str]:
    """Return the cells of a row of typed quantities and the unit that all of them share."""
    parts = [words.split(text) if text else (NOTHING, "") for text in texts]
    shared = {unit for text, (_, unit) in zip(texts, parts, strict=True) if text}
    if len(shared) == 1:
        return [digits for digits, _ in parts], shared.pop()
    return [f"{digits} {unit}".strip() for digits, unit in parts], ""


def of_points(tag: Tag, key: str, label: str, symbol: str) -> Row:
    """Return the row of one entry of the operating points, as typed."""
    held = [point.values.get(key) for point in tag.points]
    texts = [value.text if isinstance(value, Quantity) else "" for value in held]
    plain = [words.value(value) for value in held]
    quantities = all(isinstance(value, Quantity) for value in held if value is not None)
    cells, unit = _as_typed(texts) if quantities else (plain, "")
    return Row(
        key=f"points.{key}",
        label=label,
        symbol=symbol,
        cells=tuple(
            _EMPTY if value is None else Cell(text, Origin.GIVEN)
            for value, text in zip(held, cells, strict=True)
        ),
        unit=unit,
        note="; ".join(
            dict.fromkeys(base_note(tag, value) for value in held if base_note(tag, value))
        ),
    )


def base_note(tag: Tag, value: Value | None) -> str:
    """Return the base condition of a base volume flow in words, "" for anything else."""
    if not isinstance(value, Quantity) or value.kind != "base_volume_flow":
        return ""
    return f"at {(value.base or tag.base).name}"


def of_entry(tag: Tag, path: str, label: str, symbol: str = "") -> Row:
    """Return the row of one entry, as typed or as assumed."""
    held = tag.get(path)
    text = words.value(held)
    origin = tag.origin(path)
    return Row(
        key=path,
        label=label,
        symbol=symbol,
        cells=(Cell(text, origin) if text != NOTHING else _EMPTY,),
        note=base_note(tag, held),
    )


def ordered(keys: Mapping[str, object] | Sequence[str]) -> list[str]:
    """Return glossary keys in the glossary's order, unknown ones last in their own order."""
    return sorted(keys, key=lambda key: PLACES.get(key, len(PLACES)))
