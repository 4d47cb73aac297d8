"""What flips a verdict beside the flow: which checks stand under the ruler, where, in what words.

The figures of the checks are made up; the positions follow from the rule of a scale by hand: zero,
the value and the flip are on it, with 15 % of their span as room beyond all but the zero.
"""

from __future__ import annotations

from dataclasses import replace

import pytest

from specsheet import sheet, tagfile
from specsheet.evaluate import evaluate
from specsheet.evaluate.result import Check
from specsheet.findings import Level, Reserve
from specsheet.sheet import limits, scales
from specsheet.sheet.model import Ruler, Scale
from tests.sheet import samples
from tests.support.house import ROOT

DEMO = ROOT / "profiles" / "demo"
KELVIN = 273.15


def ruler(*checks: Check, given: dict | None = None) -> Ruler:
    made = sheet.build(samples.evaluation(given=given, checks=checks)).ruler
    assert made is not None
    return made


def only(*checks: Check, given: dict | None = None) -> Scale:
    (scale,) = ruler(*checks, given=given).scales
    return scale


def check(
    key: str,
    value: float,
    low: float | None,
    high: float | None,
    reserve: Reserve | None,
    level: Level = Level.STOP,
) -> Check:
    holds = (low is None or value >= low) and (high is None or value <= high)
    return Check(key, "normal", value, low, high, holds, level, "it is beyond", "", reserve)


def own(
    key: str, value: float, low: float | None, high: float | None, level: Level = Level.STOP
) -> Check:
    """A check whose value is its own driver; it flips at the bound that is nearer."""
    bounds = [bound for bound in (low, high) if bound is not None]
    at = min(bounds, key=lambda bound: abs(bound - value))
    return check(key, value, low, high, Reserve(key, at, (at - value) / value), level)


def superheat(margin: float, temperature: float = 458.15, least: float = 0.0) -> Check:
    """A gas so many kelvins above its saturation, as the pipeline checks it."""
    change = least - margin
    held = Reserve("temperature", temperature + change, change / temperature)
    return check("saturation_margin", margin, least, None, held)


def test_a_reserve_of_the_flow_stands_on_the_axis_not_here() -> None:
    flow = check("velocity", 9.0, None, 14.0, Reserve("mass_flow", 1.2, 0.4))
    bare = check("diameter_ratio", 0.5, 0.1, 0.75, None)
    made = ruler(flow, bare)
    assert (made.scales, made.more) == ((), "")


def test_what_holds_below_its_flip() -> None:
    scale = only(own("viscosity", 0.004, None, 0.01))
    assert (scale.label, scale.unit) == ("Dynamic viscosity", "mPa·s")
    assert (scale.ceiling, scale.open_low, scale.open_high) == (True, True, False)
    # 0 to 10 mPa s and 15 % beyond
    assert (scale.zero, scale.low) == (0.0, 0.0)
    assert scale.high == scale.flips == pytest.approx(10.0 / 11.5)
    assert scale.mark.position == pytest.approx(4.0 / 11.5)
    assert (scale.mark.name, scale.mark.text, scale.mark.inside) == ("normal", "4.00", True)
    assert (scale.flip, scale.reserve, scale.level) == ("10.0", "+150 %", Level.STOP)


def test_what_holds_above_its_flip() -> None:
    scale = only(own("electrical_conductivity", 0.04, 0.002, None, Level.CAUTION))
    assert (scale.ceiling, scale.open_low, scale.open_high) == (False, False, True)
    assert scale.flips == scale.low < scale.mark.position < scale.high == 1.0
    assert scale.low / scale.mark.position == pytest.approx(0.05)
    assert (scale.reserve, scale.level) == ("−95 %", Level.CAUTION)


def test_what_does_not_hold_is_hollow_and_beyond_its_flip() -> None:
    above = only(own("solids_fraction", 0.45, None, 0.4))
    assert above.ceiling
    assert not above.mark.inside
    assert above.mark.position > above.flips == above.high
    assert above.reserve == "−11 %"
    below = only(own("electrical_conductivity", 0.0003, 0.0005, None))
    assert not below.ceiling
    assert not below.mark.inside
    assert below.mark.position < below.flips == below.low
    assert below.reserve == "+67 %"


def test_a_temperature_tells_its_reserve_in_kelvins() -> None:
    scale = only(superheat(14.6))
    assert (scale.label, scale.unit) == ("Temperature", "°C")
    assert (scale.flip, scale.mark.text, scale.reserve) == ("170.4", "185.0", "−15 K")
    assert scale.mark.position == pytest.approx(185.0 / (185.0 * 1.15))


def test_the_zero_of_the_unit_is_on_a_scale_below_zero() -> None:
    scale = only(own("temperature", KELVIN - 190.0, None, KELVIN - 180.0))
    # from 15 % below −190 °C to 0 °C
    length = 190.0 * 1.15
    assert scale.zero == 1.0
    assert scale.mark.position == pytest.approx(28.5 / length)
    assert scale.flips == pytest.approx(38.5 / length)
    assert (scale.mark.text, scale.flip, scale.reserve) == ("−190.0", "−180.0", "+10 K")


def test_values_on_both_sides_of_zero() -> None:
    scale = only(own("temperature", KELVIN + 50.0, KELVIN - 50.0, None))
    assert scale.zero == pytest.approx(0.5)
    assert (scale.flips, scale.mark.position) == pytest.approx((15.0 / 130.0, 115.0 / 130.0))


@pytest.mark.parametrize(
    ("low", "closed"),
    [(KELVIN + 10.0, True), (KELVIN, True), (KELVIN - 30.0, False), (None, False)],
)
def test_the_far_bound_is_drawn_where_the_scale_reaches_it(low: float | None, closed: bool) -> None:
    scale = only(own("temperature", KELVIN + 60.0, low, KELVIN + 80.0))
    assert scale.ceiling
    assert scale.open_low is not closed
    at = low - KELVIN if closed and low is not None else 0.0
    assert scale.low == pytest.approx(at / 92.0)


def test_of_several_limits_on_one_side_the_tightest_stands() -> None:
    loose = own("electrical_conductivity", 0.04, 0.0005, None, Level.STOP)
    tight = own("electrical_conductivity", 0.04, 0.002, None, Level.CAUTION)
    assert only(loose, tight) == only(tight, loose) == only(tight)


def test_limits_that_one_driver_flips_on_either_side_both_stand() -> None:
    hot = own("temperature", 458.15, 200.0, 573.15)
    made = ruler(hot, superheat(14.6))
    assert [scale.ceiling for scale in made.scales] == [False, True]  # 15 K before 115 K


def test_of_broken_limits_the_worst_stands_before_any_that_holds() -> None:
    stop = own("temperature", 400.0, None, 390.0, Level.STOP)
    caution = own("temperature", 400.0, None, 350.0, Level.CAUTION)
    holding = own("temperature", 400.0, None, 400.1, Level.STOP)
    assert only(holding, caution, stop) == only(stop)
    made = ruler(superheat(0.001), caution)
    assert [scale.mark.inside for scale in made.scales] == [False, True]


def vapour(bounds: tuple[float | None, float | None], fraction: float) -> Check:
    """Vapour pressure and pressure the same, but for the last digit of the fraction."""
    return check("vapour_pressure", 6e5, *bounds, Reserve("pressure", 6e5, fraction))


@pytest.mark.parametrize(
    ("phase", "held", "ceiling"),
    [
        ("gas", superheat(0.0), False),
        ("gas", superheat(10.0, least=10.0), False),
        ("liquid", superheat(0.0), True),
        ("gas", own("temperature", 400.0, None, 400.0), True),
        ("liquid", own("temperature", 400.0, 400.0, None), False),
        *(("gas", vapour((6e5, None), last), True) for last in (6e-15, 0.0, -6e-15)),
        *(("liquid", vapour((None, 6e5), last), False) for last in (6e-15, 0.0, -6e-15)),
    ],
)
def test_where_nothing_is_left_the_side_is_still_right(
    phase: str, held: Check, ceiling: bool
) -> None:
    """A gas condenses when it cools or is compressed, a liquid boils the other way round."""
    scale = only(held, given={"fluid.phase": phase})
    assert scale.ceiling is ceiling
    assert scale.mark.inside
    assert scale.mark.position == pytest.approx(scale.flips)
    assert scale.reserve in ("0 K", "0 %")


def test_a_scale_with_nothing_but_zero_on_it() -> None:
    scale = only(own("temperature", KELVIN, None, KELVIN))
    assert (scale.zero, scale.flips, scale.mark.position) == pytest.approx((0.5, 0.5, 0.5))


@pytest.mark.parametrize(
    ("units", "expected"),
    [
        ({}, ("bar(g)", "12.00", "16.00")),
        ({"pressure_gauge": "kPa(g)"}, ("kPa(g)", "1200", "1600")),
        ({"pressure_gauge": "psi(g)"}, ("psi(g)", "174.0", "232.1")),  # 6.894757 kPa a psi
    ],
)
def test_a_scale_stands_in_the_units_of_the_job(
    units: dict[str, str], expected: tuple[str, str, str]
) -> None:
    held = own("flange_pressure", 12e5, None, 16e5)
    scale = only(held, given={"job.units": units})
    assert (scale.unit, scale.mark.text, scale.flip) == expected
    assert scale.reserve == "+33 %"


def test_a_temperature_in_fahrenheit_begins_at_its_own_zero() -> None:
    held = own("temperature", KELVIN + 100.0, None, KELVIN + 150.0)
    scale = only(held, given={"job.units": {"temperature": "degF"}})
    assert (scale.unit, scale.mark.text, scale.flip) == ("°F", "212.0", "302.0")
    assert scale.mark.position / scale.flips == pytest.approx(212.0 / 302.0)
    assert scale.reserve == "+50 K"  # as the table of limits tells it


def many(count: int) -> list[Check]:
    keys = ("temperature", "pressure", "viscosity", "density", "kinematic_viscosity")
    sides = [(key, side) for key in keys for side in (0.5, 1.5)]
    return [
        own(key, 1e3, *((None, 1e3 * side) if side > 1.0 else (1e3 * side, None)))
        for key, side in sides[:count]
    ]


@pytest.mark.parametrize(
    ("count", "more"),
    [
        (8, ""),
        (9, "1 more stands in the table of limits."),
        (10, "2 more stand in the table of limits."),
    ],
)
def test_the_loosest_are_left_to_the_table(count: int, more: str) -> None:
    tightest = own("flange_pressure", 12e5, None, 12.1e5)
    made = ruler(*many(count - 1), tightest)
    assert len(made.scales) == min(count, scales.MOST)
    assert made.scales[0].label == "Flange pressure"
    assert made.more == more


@pytest.mark.parametrize(
    "reserve",
    [
        Reserve("temperature", float("inf"), float("inf")),
        Reserve("temperature", float("nan"), 0.1),
        Reserve("temperature", 0.0, -1.0),  # what it was before cannot be told
        Reserve("phase", 1.0, 0.1),  # no quantity
    ],
)
def test_what_cannot_be_drawn_is_left_out(reserve: Reserve) -> None:
    assert ruler(check("saturation_margin", 5.0, 0.0, None, reserve)).scales == ()


@pytest.mark.parametrize("path", sorted(DEMO.glob("tags/*.toml")), ids=lambda path: path.stem)
def test_every_scale_of_the_demo_agrees_with_its_table(path) -> None:
    tag = tagfile.load(path).tag
    assert tag is not None
    held = evaluate(tag)
    made = sheet.build(held)
    assert made.ruler is not None
    told = {(row.holds, row.reserve) for row in made.limits}
    drivers = {
        check.reserve.driver
        for check in held.checks
        if check.reserve is not None and check.reserve.driver != "mass_flow"
    }
    assert len(made.ruler.scales) >= len(drivers) > 0
    for scale in made.ruler.scales:
        assert (scale.mark.inside, scale.reserve) in told
        assert 0.0 <= scale.low <= scale.high <= 1.0
        assert 0.0 <= scale.mark.position <= 1.0
        assert 0.0 <= scale.zero <= 1.0
        inside = scale.low - 1e-9 <= scale.mark.position <= scale.high + 1e-9
        assert inside is scale.mark.inside
        # a positive reserve leads up from the operating value to the flip
        if scale.reserve[0] in "+−":
            assert (scale.flips > scale.mark.position) is (scale.reserve[0] == "+")


def test_the_words_are_those_of_the_table() -> None:
    held = replace(samples.evaluation(), checks=(superheat(14.6),))
    made = sheet.build(held)
    assert made.ruler is not None
    (scale,) = made.ruler.scales
    (row,) = made.limits
    assert (scale.reserve, f"{scale.flip} {scale.unit}") == (row.reserve, row.flips)
    assert limits.percent(0.0) == "0 %"
