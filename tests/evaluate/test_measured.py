"""The flow from a measured signal: the inverse of the response, for every family with equations."""

from __future__ import annotations

from functools import cache

import pytest
from cli_process import DEMO, DEMO_TAGS

from specsheet import tagfile
from specsheet.evaluate import Evaluation, evaluate
from specsheet.evaluate.measured import Measured, flow_from_signal
from specsheet.findings import Finding
from specsheet.meters import registry
from specsheet.tag import Tag

#: glossary key of a primary signal -> SI unit to type it in
UNITS = {
    "differential_pressure": "Pa",
    "frequency": "Hz",
    "inlet_pressure": "Pa(a)",
    "induced_voltage": "V",
    "transit_time_difference": "s",
    "heater_power": "W",
}
JOB = tagfile.load_job(DEMO / "job.toml")


@cache
def tag_of(name: str) -> Tag:
    tag = tagfile.load(DEMO / "tags" / f"{name}.toml", JOB).tag
    assert tag is not None
    return tag


@cache
def evaluation(name: str) -> Evaluation:
    return evaluate(tag_of(name))


def measured(name: str, text: str) -> Measured:
    found = flow_from_signal(tag_of(name), text)
    assert isinstance(found, Measured), found
    return found


def flow_at(found: Measured, point: str) -> float:
    by_name = {item.name: item.values["mass_flow"] for item in found.points}
    return float(by_name[point].value)


@pytest.mark.parametrize("name", DEMO_TAGS)
def test_signal_of_a_flow_gives_that_flow(name: str) -> None:
    """Round trip flow -> primary signal -> flow at every point within 1e-9."""
    family = registry.family(tag_of(name).family)
    assert family is not None
    for point in evaluation(name).points:
        if family.signal not in UNITS:
            continue
        signal = float(point.values[family.signal].value)
        found = measured(name, f"{signal!r} {UNITS[family.signal]}")
        expected = float(point.values["mass_flow"].value)
        assert flow_at(found, point.name) == pytest.approx(expected, rel=1e-9)


@pytest.mark.parametrize("name", DEMO_TAGS)
def test_current_and_percent_of_a_flow_give_that_flow(name: str) -> None:
    for point in evaluation(name).points:
        key = next(
            (k for k in ("signal_current_root", "signal_current") if k in point.values), None
        )
        if key is None:
            continue
        current = float(point.values[key].value)
        if current <= 0.0041:
            continue
        expected = float(point.values["mass_flow"].value)
        share = (current - 0.004) / 0.016 * 100.0
        for text in (f"{current * 1e3!r} mA", f"{share!r} %"):
            found = measured(name, text)
            assert flow_at(found, point.name) == pytest.approx(expected, rel=1e-9), text


def test_every_family_of_the_registry_is_turned_round() -> None:
    families = {tag_of(name).family for name in DEMO_TAGS}
    assert families >= set(registry.MODULES)


def test_output_linear_in_differential_pressure_is_read_as_such() -> None:
    """12 mA is half the span of 250 mbar where no root is extracted, a quarter where it is."""
    root = measured("FT-2104", "12 mA")
    text = (DEMO / "tags" / "FT-2104.toml").read_text(encoding="utf-8")
    linear = text.replace(
        "[meter]", '[meter]\noutput_characteristic = "linear in differential pressure"'
    )
    tag = tagfile.loads(linear, "", JOB).tag
    assert tag is not None
    other = flow_from_signal(tag, "12 mA")
    assert isinstance(other, Measured)
    for found, pressure in ((root, 6250.0), (other, 12500.0)):
        values = found.points[0].values
        assert float(values["differential_pressure"].value) == pytest.approx(pressure, rel=1e-9)


def test_more_signal_is_more_flow() -> None:
    flows = [flow_at(measured("FT-2104", f"{step} mbar"), "normal") for step in range(5, 250, 20)]
    assert flows == sorted(flows)
    assert len(set(flows)) == len(flows)


def test_inlet_pressure_of_a_critical_nozzle_sets_the_conditions_too() -> None:
    """At 6.9 bar(g) every point of one temperature passes one flow."""
    found = measured("FT-7110", "6.9 bar(g)")
    assert found.findings == ()
    values = found.points[1].values
    assert float(values["inlet_pressure"].value) == pytest.approx(790500.0, rel=1e-9)
    assert float(values["inlet_pressure_share"].value) == pytest.approx(1.0, rel=1e-9)


def test_signal_above_the_range_is_told() -> None:
    found = measured("FT-2104", "300 mbar")
    assert [item.code for item in found.findings] == ["above-range"]


@pytest.mark.parametrize(
    ("text", "words"),
    [
        ("5 m3/h", "a signal of this family was wanted: differential pressure (mbar), "),
        ("3.9 mA", "4 mA, 0 % of the output, is no flow"),
        ("0 %", "4 mA, 0 % of the output, is no flow"),
        ("0 mbar", "a signal above zero was wanted"),
        ("12,4 mA", "the decimal mark is a point"),
        ("125", "the unit is missing"),
    ],
)
def test_what_is_no_signal_is_refused_in_words(text: str, words: str) -> None:
    found = flow_from_signal(tag_of("FT-2104"), text)
    assert isinstance(found, Finding)
    assert words in found.message


@pytest.mark.parametrize(
    ("text", "words"),
    [("9 bar", "the most it can be there is"), ("4.1 mA", "below the low-flow cut-off")],
)
def test_a_signal_that_no_flow_gives_is_told_at_every_point(text: str, words: str) -> None:
    """4.1 mA is 0.6 % of the flow at 20 mA, the cut-off stands at 3 %; steam chokes at 9 bar."""
    found = measured("FT-2104", text)
    assert found.points == ()
    assert [item.point for item in found.findings] == ["minimum", "normal", "maximum"]
    assert all(words in item.message for item in found.findings)


def test_a_family_without_equations_is_refused() -> None:
    text = (DEMO / "tags" / "FT-6101.toml").read_text(encoding="utf-8")
    tag = tagfile.loads(text.replace('"venturi_tube"', '"sonar_array"'), "", JOB).tag
    assert tag is not None
    found = flow_from_signal(tag, "100 mbar")
    assert isinstance(found, Finding)
    assert "has no equations here" in found.message
