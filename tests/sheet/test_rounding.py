"""Rounding: significant digits, workshop steps, and numbers set apart in threes."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.evaluate.result import Result
from specsheet.findings import Origin
from specsheet.sheet import limits, rounding, rows
from specsheet.sheet.units import Units
from specsheet.tag import Tag

THIN = "\u202f"
_EMPTY = Tag({})


@pytest.mark.parametrize(
    ("value", "count", "text"),
    [
        (3.98171, 4, "3.982"),
        (0.605432, 4, "0.6054"),
        (642.0999, 4, "642.1"),
        (1054.6, 4, "1055"),
        (9.9996, 4, "10.00"),
        (99.996, 4, "100.0"),
        (168_520.0, 3, f"169{THIN}000"),
        (1_263_400.0, 3, f"1{THIN}260{THIN}000"),
        (12_345.6, 4, f"12{THIN}350"),
        (9999.6, 4, f"10{THIN}000"),
        (0.0, 4, "0"),
        (-0.0, 4, "0"),
        (-3.14159, 3, "−3.14"),
        (0.000154, 3, "0.000154"),
        (1.261e-5, 4, "1.261·10⁻⁵"),
        (3.2e9, 3, "3.20·10⁹"),
        (float("nan"), 4, "–"),
        (float("inf"), 4, "–"),
    ],
)
def test_significant_digits(value: float, count: int, text: str) -> None:
    assert rounding.significant(value, count) == text


@pytest.mark.parametrize(
    ("value", "smallest", "text"),
    [
        (84.8731, 0.01, "84.87"),
        (185.04, 0.1, "185.0"),
        (365.0, 0.18, "365.0"),  # a tenth of a kelvin in °F
        (-0.004, 0.01, "0.00"),
        (-12.346, 0.01, "−12.35"),
        (2619.4, 1.0, "2619"),
        (float("nan"), 0.1, "–"),
    ],
)
def test_steps(value: float, smallest: float, text: str) -> None:
    assert rounding.to_step(value, smallest) == text


@pytest.mark.parametrize(
    ("value", "text"),
    [(9.0, "9"), (0.75, "0.75"), (5637.16, "5637"), (20000.0, f"20{THIN}000"), (0.1, "0.1")],
)
def test_bounds_keep_their_own_digits(value: float, text: str) -> None:
    assert rounding.plain(value) == text


@pytest.mark.parametrize(
    ("key", "si", "kind", "unit", "text"),
    [
        ("bore_diameter", 0.0848731, "length", "mm", "84.87"),
        ("bore_diameter", 0.0848731, "length", "in", "3.341"),  # 0.01 mm is 0.0004 in
        ("bluff_width", 0.00012346, "length", "mm", "0.1235"),  # few steps: digits decide
        ("temperature", 458.15, "temperature", "degC", "185.0"),
        ("temperature", 458.15, "temperature", "degF", "365.0"),
        ("temperature", 273.15, "temperature", "degC", "0.0"),
        ("reynolds_number", 468_123.0, "dimensionless", "1", f"468{THIN}000"),
        ("uncertainty", 0.00734, "ratio", "%", "0.73"),
        ("viscosity", 1.52034e-5, "dynamic_viscosity", "mPa s", "0.0152"),
        ("signal_current", 0.0127213, "current", "mA", "12.72"),
        ("saturation_margin", 14.587, "temperature_difference", "K", "14.6"),
        ("capillary_count", 59.0, "dimensionless", "1", "59"),  # a count has no decimals
        ("path_count", 2.0, "dimensionless", "1", "2"),
    ],
)
def test_each_kind_has_its_own_significance(
    key: str, si: float, kind: str, unit: str, text: str
) -> None:
    assert rows.number(si, key, kind, unit) == text


@pytest.mark.parametrize(
    ("key", "values", "origin", "cells"),
    [
        # condensate close to boiling: a tenth of a kelvin is what the temperatures are good for
        ("saturation_margin", (6.3, 3.2218, 2.0823), Origin.DERIVED, ("6.3", "3.2", "2.1")),
        ("saturation_margin", (0.0, 14.6, 9.0), Origin.DERIVED, ("0.0", "14.6", "9.0")),
        ("saturation_margin", (0.0, 0.0), Origin.DERIVED, ("0", "0")),
        # nothing that is there is printed as nothing
        ("saturation_margin", (14.61, 0.043), Origin.DERIVED, ("14.61", "0.04")),
        ("saturation_margin", (0.9298, 0.9366), Origin.DERIVED, ("0.9298", "0.9366")),
        # a typical value that changes from point to point is computed: no more digits than derived
        ("saturation_margin", (87.333, 130.98), Origin.TYPICAL, ("87.3", "131.0")),
        ("discharge_coefficient", (0.99, 0.99), Origin.TYPICAL, ("0.99", "0.99")),
        ("reynolds_number", (1234.5, 987.65), Origin.DERIVED, ("1230", "988")),
    ],
)
def test_one_row_has_even_digits(
    key: str, values: tuple[float, ...], origin: Origin, cells: tuple[str, ...]
) -> None:
    row = rows.of_results(key, [Result(value, origin) for value in values], Units(_EMPTY))
    assert tuple(cell.text for cell in row.cells) == cells


@pytest.mark.parametrize(
    ("fraction", "text"),
    [(0.32, "+32 %"), (-0.0076, "−0.76 %"), (2e-5, "+0.0020 %"), (-1.8e-9, "0 %")],
)
def test_a_reserve_of_nothing_is_said_so(fraction: float, text: str) -> None:
    assert limits.percent(fraction) == text


@given(st.floats(1e-8, 1e12), st.integers(2, 6))
def test_rounding_moves_no_value_by_more_than_half_a_unit(value: float, count: int) -> None:
    text = rounding.significant(value, count).replace(THIN, "").replace("−", "-")
    mantissa, _, power = text.partition("·10")
    exponent = int(power.translate(str.maketrans("⁻⁰¹²³⁴⁵⁶⁷⁸⁹", "-0123456789"))) if power else 0
    back = float(mantissa) * 10.0**exponent
    assert abs(back - value) <= 0.5000001 * value * 10.0 ** (1 - count)
