"""Evaluation to sheet: echo, origin, rounding, limits, ruler, assumptions, annex."""

from __future__ import annotations

import subprocess
import sys
from dataclasses import replace

import pytest

from specsheet import sheet
from specsheet.evaluate.result import Band, Check, Evaluation, PointResult, Result
from specsheet.findings import Level, Origin, Reserve
from specsheet.quantity.value import Base, Quantity
from specsheet.sheet.model import Row, Sheet, Table
from specsheet.sheet.ruler import stagger
from specsheet.tag import Tag
from tests.sheet import samples


def table(made: Sheet, key: str) -> Table:
    return next(one for one in (made.points, *made.tables) if one.key == key)


def row(made: Sheet, section: str, key: str) -> Row:
    return next(one for one in table(made, section).rows if one.key == key)


def texts(line: Row) -> list[str]:
    return [cell.text for cell in line.cells]


@pytest.fixture(scope="module")
def made() -> Sheet:
    return sheet.build(samples.evaluation())


def test_given_values_are_echoed_with_their_own_digits(made: Sheet) -> None:
    pressure = row(made, "points", "points.pressure")
    assert texts(pressure) == ["7.0", "7.0", "7.0"]
    assert pressure.unit == "bar(g)"
    assert pressure.origins == (Origin.GIVEN,)


def test_different_units_stay_in_their_cells() -> None:
    tag = samples.evaluation().tag
    first, second, third = tag.points
    flow = samples.quantity(0.86111, "mass_flow", "3100 kg/h")
    mixed = replace(second, values={**second.values, "flow": flow})
    made = sheet.build(samples.evaluation(tag=replace(tag, points=(first, mixed, third))))
    flows = row(made, "points", "points.flow")
    assert texts(flows) == ["1.116 t/h", "3100 kg/h", "4.2 t/h"]
    assert flows.unit == ""


def test_a_point_without_a_value_shows_a_dash() -> None:
    tag = samples.evaluation().tag
    bare = replace(tag.points[0], values={"flow": tag.points[0].values["flow"]})
    made = sheet.build(samples.evaluation(tag=replace(tag, points=(bare, *tag.points[1:]))))
    assert texts(row(made, "points", "points.pressure")) == ["–", "7.0", "7.0"]


def test_derived_values_are_rounded_and_cited(made: Sheet) -> None:
    density = row(made, "fluid_points", "density")
    assert texts(density) == ["3.982"] * 3
    assert (density.unit, density.source) == ("kg/m³", samples.STEAM)
    assert made.numbers(density.source) == (made.sources.index(samples.STEAM) + 1,)


def test_a_typed_gauge_pressure_is_not_echoed_as_absolute() -> None:
    typed = Result(8e5, Origin.GIVEN, text="7.0 bar(g)")
    points = tuple(
        PointResult(point.name, {**point.values, "pressure": typed})
        for point in samples.evaluation().points
    )
    made = sheet.build(samples.evaluation(points=points))
    absolute = row(made, "fluid_points", "pressure")
    assert texts(absolute) == ["8.000"] * 3
    assert (absolute.unit, absolute.origins) == ("bar(a)", (Origin.DERIVED,))


def test_the_pressure_stated_is_not_derived_back(made: Sheet) -> None:
    keys = [line.key for line in table(made, "fluid_points").rows]
    assert "pressure" in keys
    assert "pressure_gauge" not in keys


def test_mixed_origins_stand_in_their_cells() -> None:
    held = samples.evaluation()
    typed = Result(4.1, Origin.GIVEN, text="4.10 kg/m3")
    first = PointResult(held.points[0].name, {**held.points[0].values, "density": typed})
    made = sheet.build(samples.evaluation(points=(first, *held.points[1:])))
    density = row(made, "fluid_points", "density")
    assert texts(density) == ["4.10", "3.982", "3.982"]
    assert density.origins == (Origin.GIVEN, Origin.DERIVED)


def test_the_base_condition_of_a_stated_volume_is_printed() -> None:
    base = Base("0 °C, 101.325 kPa (DIN 1343)", 273.15, 101325.0)
    flow = Quantity(0.1, "base_volume_flow", "Nm3/h", "360 Nm3/h", base)
    tag = samples.evaluation().tag
    points = tuple(replace(one, values={**one.values, "flow": flow}) for one in tag.points)
    made = sheet.build(samples.evaluation(tag=replace(tag, points=points)))
    assert row(made, "points", "points.flow").note == f"at {base.name}"
    assert row(made, "base", "base").text == f"{base.name}: 0 °C, 101.325 kPa(a)"


def test_atmosphere_and_job_base_are_always_printed(made: Sheet) -> None:
    assert "1.00 bar(a)" in made.points.note
    assert row(made, "base", "job.base.temperature").text == "15 °C"
    assert row(made, "base", "job.base.pressure").text == "101.325 kPa(a)"


def test_altitude_gives_a_derived_atmosphere() -> None:
    tag = samples.evaluation().tag
    given = {key: value for key, value in tag.given.items() if key != "job.atmospheric_pressure"}
    given["job.altitude"] = Quantity(320.0, "elevation", "m", "320 m")
    made = sheet.build(samples.evaluation(tag=replace(tag, given=given)))
    pressure = row(made, "base", "job.atmospheric_pressure")
    assert (pressure.text, pressure.origins) == ("0.9754 bar(a)", (Origin.DERIVED,))


def test_limits_say_reserve_and_flip(made: Sheet) -> None:
    velocity = made.limits[0]  # what does not hold comes first
    assert (velocity.key, velocity.verdict) == ("velocity", "caution")
    assert (velocity.value, velocity.allowed, velocity.unit) == ("15.71", "at most 14", "m/s")
    assert (velocity.reserve, velocity.flips) == ("−11 %", "3.74 t/h")
    margin = next(limit for limit in made.limits if limit.key == "saturation_margin")
    assert (margin.reserve, margin.flips) == ("−9.6 K", "175.4 °C")


@pytest.mark.parametrize(
    ("low", "high", "allowed"),
    [
        (0.1, 0.75, "0.1 to 0.75"),
        (None, 0.75, "at most 0.75"),
        (0.1, None, "at least 0.1"),
        (None, None, "–"),
        (1.0, 1.0, "1"),
    ],
)
def test_bounds_in_words(low: float | None, high: float | None, allowed: str) -> None:
    check = Check("diameter_ratio", "normal", 0.5, low, high, True, Level.STOP, "m", "s")
    made = sheet.build(samples.evaluation(checks=(check,)))
    assert made.limits[0].allowed == allowed


def test_a_reserve_of_any_driver_is_worded() -> None:
    reserve = Reserve("pressure", 6.0e5, -0.25)
    check = Check("density", "normal", 4.0, 3.0, None, True, Level.NOTE, "m", "s", reserve)
    limit = sheet.build(samples.evaluation(checks=(check,))).limits[0]
    assert (limit.reserve, limit.flips) == ("−25 %", "6.000 bar(a)")


def test_the_budget_ends_with_the_expanded_uncertainty(made: Sheet) -> None:
    assert made.budget is not None
    assert [cell.text for cell in made.budget.rows[0].cells] == ["0.25", "0.25", "0.25"]
    assert made.budget.rows[-1].label == "Expanded uncertainty, k = 2"
    assert made.budget.columns == samples.NAMES


def test_every_assumed_value_is_listed(made: Sheet) -> None:
    listed = {line.key: line.text for line in made.assumptions}
    assert listed == {
        "line.material": "carbon steel",
        "line.upstream_fitting": "single bend",
        "require.end_connection": "flanged",
        "job.base.temperature": "15 °C",
        "job.base.pressure": "101.325 kPa(a)",
    }


def test_the_verdict_counts_the_findings(made: Sheet) -> None:
    assert made.verdict == "To be decided before purchase: 2 cautions, 1 note."
    assert sheet.build(samples.evaluation(findings=())).verdict == (
        "No objection within the limits checked."
    )


def test_the_annex_shows_the_numbers_put_in(made: Sheet) -> None:
    working = next(one for one in made.annex if one.key == "differential_pressure")
    assert "√(2 Δp ρ)" in working.equation
    assert [line.key for line in working.inputs] == [
        "mass_flow",
        "discharge_coefficient",
        "expansibility",
        "bore_diameter_hot",
        "density",
    ]
    assert texts(working.result) == ["17.65", "136.2", "250.0"]


def test_every_derived_value_has_a_place_in_the_annex(made: Sheet) -> None:
    explained = {working.key for working in made.annex}
    for part in made.tables:
        for line in part.rows:
            if Origin.DERIVED in line.origins:
                assert line.key in explained


def test_every_source_is_listed_once(made: Sheet) -> None:
    assert len(set(made.sources)) == len(made.sources)
    for part in (made.points, *made.tables):
        for line in part.rows:
            assert not line.source or made.numbers(line.source)


def test_the_ruler_stands_in_the_unit_typed(made: Sheet) -> None:
    assert made.ruler is not None
    assert (made.ruler.label, made.ruler.unit) == ("Mass flow", "t/h")
    assert [mark.text for mark in made.ruler.marks] == ["1.116", "3.1", "4.2"]  # as typed
    assert [mark.inside for mark in made.ruler.marks] == [False, True, False]
    places = [mark.position for mark in made.ruler.marks]
    assert places == sorted(places)
    assert all(0.0 < place < 1.0 for place in places)


def test_the_usable_stretch_is_what_all_windows_leave_open(made: Sheet) -> None:
    assert made.ruler is not None
    assert made.ruler.usable is not None
    low, high = made.ruler.usable
    assert low == max(window.low for window in made.ruler.windows)
    assert high == min(window.high for window in made.ruler.windows)


def test_a_user_who_states_volume_reads_volume() -> None:
    held = samples.evaluation()
    thin = PointResult(
        "maximum",
        {**held.points[2].values, "volume_flow": Result(0.4, Origin.DERIVED)},
    )
    held = replace(
        held,
        points=(*held.points[:2], thin),
        element={"upper_range_flow": Result(1.16667, Origin.DERIVED)},
    )
    points = tuple(
        replace(
            one,
            values={
                **one.values,
                "flow": Quantity(
                    float(result.values["volume_flow"].value), "volume_flow", "m3/h", "9 m3/h"
                ),
            },
        )
        for one, result in zip(held.tag.points, held.points, strict=True)
    )
    made = sheet.build(replace(held, tag=replace(held.tag, points=points)))
    assert made.ruler is not None
    assert (made.ruler.label, made.ruler.unit) == ("Volume flow, operating", "m³/h")
    # at maximum, 1.0394 kg/s is 1.0394 / 1.16667 x 0.4 m3/s; at normal, 1.0394 / 3.9817 m3/s
    assert made.limits[0].flips == "1280 m³/h"
    assert made.ruler.windows[1].high_text == "940"
    assert row(made, "element", "upper_range_flow").text == "1055 m³/h"


def test_without_flows_there_is_no_ruler() -> None:
    assert sheet.build(samples.evaluation(points=())).ruler is None


def test_labels_of_one_lane_never_touch() -> None:
    positions, widths = [10.0, 12.0, 14.0, 60.0], [20.0, 20.0, 20.0, 20.0]
    lanes = stagger(positions, widths, 2.0)
    assert lanes == (0, 1, 2, 0)


def test_the_room_imports_without_numpy() -> None:
    code = "import sys, specsheet.sheet; sys.exit('numpy' in sys.modules)"
    assert subprocess.run([sys.executable, "-c", code], check=False).returncode == 0


def test_a_base_volume_rules_in_the_unit_stated() -> None:
    base = Base("0 °C, 101.325 kPa (DIN 1343)", 273.15, 101325.0)
    held = samples.evaluation()
    flows = [
        Quantity(flow * 1.2, "base_volume_flow", "Nm3/h", "9 Nm3/h", base) for flow in samples.FLOWS
    ]
    points = tuple(
        replace(one, values={**one.values, "flow": flow})
        for one, flow in zip(held.tag.points, flows, strict=True)
    )
    results = tuple(
        PointResult(
            one.name,
            {
                **one.values,
                "base_volume_flow": Result(flow.value, Origin.GIVEN, text=flow.text),
                "mass_flow": Result(flow.value / 1.2, Origin.DERIVED),
            },
        )
        for one, flow in zip(held.points, flows, strict=True)
    )
    made = sheet.build(samples.evaluation(tag=replace(held.tag, points=points), points=results))
    assert made.ruler is not None
    assert (made.ruler.label, made.ruler.unit) == ("Volume flow, base", "Nm³/h")
    assert made.findings[0].reserve == "Verdict flips at a flow of 4490 Nm³/h (−11 %)"


def test_an_empty_tag_gives_a_sheet() -> None:
    made = sheet.build(Evaluation(tag=Tag(given={})))
    assert (made.tag, made.paper, made.ruler, made.budget) == ("", "A4", None, None)
    assert made.verdict == "No objection within the limits checked."


def test_the_price_of_energy_names_its_currency() -> None:
    price = Quantity(3.9e-8, "money_rate", "1/kWh", "0.14 1/kWh")
    given = {"job.energy_price": price, "job.currency": "EUR"}
    made = sheet.build(samples.evaluation(given=given))
    assert row(made, "summary", "job.energy_price").text == "0.14 EUR/kWh"


def test_what_was_stated_is_not_printed_twice() -> None:
    element = {
        "differential_pressure_range": Result(25e3, Origin.GIVEN),
        "bore_diameter": Result(0.0742, Origin.GIVEN),
    }
    made = sheet.build(samples.evaluation(element=element))
    keys = [line.key for line in table(made, "element").rows]
    assert keys == [
        "meter.taps",
        "meter.bore",
        "meter.differential_pressure_range",
        "bore_diameter",
    ]
    assert row(made, "element", "bore_diameter").text == "74.2 mm"


def test_a_given_value_keeps_every_digit() -> None:
    made = sheet.build(samples.evaluation(element={"meter_bore": Result(0.1540832, Origin.GIVEN)}))
    assert row(made, "element", "meter_bore").text == "154.0832 mm"


@pytest.mark.parametrize("heading", ["cautions", "Cautions"])
def test_cautions_stand_by_themselves(heading: str) -> None:
    made = sheet.build(samples.evaluation(notes={heading: ("Toxic.", "Toxic."), "output": ()}))
    assert made.cautions[0] == "Toxic."
    assert len(made.cautions) == 2  # and the standing one
    assert [clause.key for clause in made.clauses] == ["principle"]


def test_two_windows_of_one_value_are_told_apart_by_their_bounds() -> None:
    limits = [
        ("signal_fraction", None, 1.0),
        ("signal_fraction", 0.0009, None),
        ("meter_velocity", 1.0, 4.0),
        ("meter_velocity", None, 10.0),
        ("meter_reynolds_number", 20_000.0, None),
        ("meter_reynolds_number", 5000.0, None),
        ("mach_number", None, 0.3),
    ]
    limits.append(limits[-1])  # the same bound for another reason: one lane
    bands = tuple(Band(key, low, high, 0.1, 2.0, Level.CAUTION) for key, low, high in limits)
    made = sheet.build(replace(samples.evaluation(), bands=bands))
    assert made.ruler is not None
    assert [window.label for window in made.ruler.windows] == [
        "Signal ≤ 100 %",
        "Signal ≥ 0.09 %",
        "Velocity 1 to 4 m/s",
        "Velocity ≤ 10 m/s",
        "Reynolds number ≥ 20\u202f000",
        "Reynolds number ≥ 5000",
        "Mach number",
    ]


@pytest.mark.parametrize(
    ("phase", "label", "symbol"),
    [("liquid", "Vapour pressure", "pv"), ("gas", "Saturation pressure", "ps")],
)
def test_a_gas_has_a_saturation_pressure(phase: str, label: str, symbol: str) -> None:
    held = samples.evaluation()
    point = PointResult("normal", {"vapour_pressure": Result(1.123e6, Origin.DERIVED)})
    tag = replace(held.tag, given={**held.tag.given, "fluid.phase": phase})
    line = row(
        sheet.build(replace(held, tag=tag, points=(point,))), "fluid_points", "vapour_pressure"
    )
    assert (line.label, line.symbol, texts(line), line.unit) == (label, symbol, ["11.23"], "bar(a)")


def test_energies_say_what_they_are_of() -> None:
    """Gross and net differ by a tenth, volumes at 15 °C and at 0 °C by 5 %."""
    held = samples.evaluation()
    point = PointResult("normal", {"energy_flow": Result(3.4e6, Origin.DERIVED)})
    fluid = {"gross_calorific_value": Result(3.8e7, Origin.DERIVED)}
    tag = replace(held.tag, given={**held.tag.given, "fluid.energy_basis": "net"})
    made = sheet.build(replace(held, tag=tag, points=(point,), fluid=fluid))
    assert row(made, "fluid_points", "energy_flow").note == "net"
    assert row(made, "fluid", "gross_calorific_value").note == f"at {tag.base.name}"
