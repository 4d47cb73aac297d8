"""The unit of a row: the job's, the one typed, the kind's own, and the ladder."""

from __future__ import annotations

import pytest

from specsheet import quantity
from specsheet.quantity.value import Quantity
from specsheet.sheet.units import LADDERS, Units
from specsheet.tag import Point, Tag


def tag(flow_unit: str = "", pressure: tuple[str, str] = ("", ""), **job: str) -> Tag:
    values = {}
    if flow_unit:
        values["flow"] = Quantity(1.0, "mass_flow", flow_unit, f"1 {flow_unit}")
    if pressure[0]:
        values["pressure"] = Quantity(1e5, pressure[0], pressure[1], f"1 {pressure[1]}")
    return Tag(given={"job.units": job}, points=(Point("normal", values),))


def test_the_job_decides_first() -> None:
    assert Units(tag("t/h", mass_flow="lb/h")).pick("mass_flow", [1e6]) == "lb/h"


@pytest.mark.parametrize(
    ("stated", "shown", "si", "unit"),
    [
        ("mbar", "MPa", 40e6, "MPa"),  # a stress in the plate
        ("mbar", "MPa", 1e5, "MPa"),
        ("mbar", "Pa", 1500.0, "Pa"),  # a momentum flux
        ("psi", "bar", 3e5, "psi"),  # a job that thinks in psi
        ("psi", "Pa", 20.0, "Pa"),  # unless it would be silly there
        ("mbar", "", 3e5, "mbar"),
    ],
)
def test_a_term_keeps_its_own_unit_where_the_job_names_another_of_that_ladder(
    stated: str, shown: str, si: float, unit: str
) -> None:
    units = Units(tag(pressure_difference=stated))
    assert units.pick("pressure_difference", [si], shown) == unit


def test_then_the_unit_typed() -> None:
    assert Units(tag("t/h")).pick("mass_flow", [0.001]) == "t/h"


def test_then_the_kind() -> None:
    assert Units(tag()).pick("mass_flow", [1.0]) == "kg/h"


def test_a_job_unit_of_the_wrong_kind_is_left_alone() -> None:
    assert Units(tag(mass_flow="bar(g)")).pick("mass_flow", [1.0]) == "kg/h"


def test_a_gas_volume_of_ours_takes_no_unit_that_names_another_base() -> None:
    assert Units(tag(base_volume_flow="Nm3/h")).pick("base_volume_flow", [1.0]) == "m3/h(base)"


@pytest.mark.parametrize(
    ("typed", "unit", "other", "partner"),
    [
        ("pressure_gauge", "psi(g)", "pressure_absolute", "psi(a)"),
        ("pressure_absolute", "kPa(a)", "pressure_gauge", "kPa(g)"),
        ("pressure_gauge", "bar(g)", "pressure_absolute", "bar(a)"),
    ],
)
def test_gauge_and_absolute_go_together(typed: str, unit: str, other: str, partner: str) -> None:
    units = Units(tag(pressure=(typed, unit)))
    assert units.pick(typed, [1e5]) == unit
    assert units.pick(other, [1e5]) == partner


@pytest.mark.parametrize(
    ("kind", "si", "unit"),
    [
        ("pressure_difference", [150.0, 25e3], "mbar"),
        ("pressure_difference", [2.5e6], "bar"),
        ("pressure_difference", [0.5], "Pa"),
        ("pressure_difference", [0.0], "mbar"),
        ("power", [3.0], "W"),
        ("voltage", [2e-6], "uV"),
        ("mass_flow", [10.0], "t/h"),
        ("length", [0.0001], "mm"),  # no ladder: the kind's own
    ],
)
def test_silly_values_move_along_the_ladder(kind: str, si: list[float], unit: str) -> None:
    assert Units(tag()).pick(kind, si) == unit


@pytest.mark.parametrize("kind", LADDERS)
def test_every_step_of_a_ladder_is_a_unit_of_its_kind_and_larger_than_the_last(kind: str) -> None:
    sizes = [quantity.to_si(1.0, kind, step) for step in LADDERS[kind]]
    assert sizes == sorted(set(sizes))
