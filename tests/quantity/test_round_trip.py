"""Number -> text -> quantity -> number, for every unit of every kind."""

from __future__ import annotations

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from specsheet.quantity import Quantity, from_si, kinds_of, parse, to_si
from specsheet.quantity.limits import bounds
from specsheet.quantity.table import UNITS, fold
from specsheet.quantity.unit import Unit

_NUMBERS = st.floats(min_value=1e-3, max_value=1e4)
_ROWS = st.sampled_from([row for rows in UNITS.values() for row in rows])


def _write(value: float, unit: str, kind: str) -> str:
    return repr(value) if kind == "dimensionless" else f"{value!r} {unit}"


@given(value=_NUMBERS, row=_ROWS)
def test_number_returns(value: float, row: Unit) -> None:
    assume(to_si(value, row.kind, row.name) <= bounds(row.kind)[1])
    text = _write(value, row.name, row.kind)
    read = parse(text, row.kind)
    assert isinstance(read, Quantity)
    assert (read.kind, read.unit, read.text, read.base) == (row.kind, row.name, text, row.base)
    assert from_si(read.value, row.kind, row.name) == pytest.approx(value, rel=1e-9)
    assert read.value == to_si(value, row.kind, row.name)


@given(value=_NUMBERS, row=_ROWS)
def test_every_spelling_means_the_same(value: float, row: Unit) -> None:
    for alias in filter(None, row.aliases):
        assert isinstance(parse(f"1 {alias}", row.kind), Quantity)
        assert to_si(value, row.kind, alias) == to_si(value, row.kind, row.name)


@given(value=st.floats(min_value=-1e4, max_value=1e4).filter(lambda x: x == 0 or abs(x) > 1e-29))
def test_exponent_and_sign_return(value: float) -> None:
    read = parse(f"{value:e}", "dimensionless")
    assert isinstance(read, Quantity)
    assert read.value == float(f"{value:e}")


@given(row=_ROWS)
def test_canonical_spelling_is_folded_already(row: Unit) -> None:
    assert fold(row.name) == row.name
    assert row.kind in kinds_of(row.name)


@pytest.mark.parametrize(
    ("text", "kind", "value"),
    [
        ("-273.149 degC", "temperature", 0.001),
        ("-1.05 bar(g)", "pressure_gauge", -1.05e5),
        ("0 bar(a)", "pressure_absolute", 0.0),
        ("-0 m3/h", "volume_flow", 0.0),
        ("11 km", "elevation", 11000.0),
        ("1e-30 m", "length", 1e-30),
        ("1e30 m", "length", 1e30),
    ],
)
def test_value_at_a_bound_is_read(text: str, kind: str, value: float) -> None:
    read = parse(text, kind)
    assert isinstance(read, Quantity)
    assert read.value == pytest.approx(value, rel=1e-9)
    assert str(read.value)[0] != "-" or value < 0.0
