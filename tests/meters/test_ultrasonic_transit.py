"""The transit-time ultrasonic meter: times, size, limits, clamp-on."""

import bore_checks as checks
import bore_tools as tools
import numpy as np
import pytest

from specsheet.findings import Level
from specsheet.meters.shared.limits import of_profile, shortfall
from specsheet.meters.ultrasonic_transit import FAMILY

AREA = np.pi / 4 * 0.1**2
CLAMPED = {"meter__mounting": "clamp-on"}


def liquid(flows=(5.0, 15.0, 25.0), fluid=None, **more):
    return tools.request("ultrasonic_transit", list(flows), fluid or tools.water(3), **more)


def gas(flows=(0.05, 0.3, 0.6), fluid=None, **more):
    return tools.request(
        "ultrasonic_transit", list(flows), fluid or tools.steam(3), phase="gas", **more
    )


def found_in(request):
    return {(item.code, item.level) for item in FAMILY.size(request).findings}


def test_time_difference_of_a_diametral_path():
    """Δt = 2 L v cos φ / c² = 2 D v / (c² tan φ) at 45 degrees, v along the path (from memory)."""
    request = liquid([2.0 * AREA * 998.2] * 3, meter__size="DN 100")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    path_velocity = 2.0 / values["profile_factor"]
    wanted = 2 * 0.1 * path_velocity / 1482.0**2
    assert values["transit_time_difference"] == pytest.approx(wanted, rel=1e-4)


def test_clamp_on_takes_the_pipe_and_two_passes():
    request = liquid([10.0] * 3, **CLAMPED)
    element = FAMILY.size(request)
    assert element.values["meter_bore"].value == 0.1023
    values = FAMILY.at(element, request.stream)
    inside = np.arcsin(np.sin(0.6632) * 1482.0 / 2700.0)
    wanted = 2 * 0.1023 / np.cos(inside) / 1482.0
    assert values["transit_time"] == pytest.approx(wanted, rel=2e-3)
    assert values["pressure_loss"] == pytest.approx(0.0, abs=0.0)


@pytest.mark.parametrize("mounting", ["clamp-on", "inline"])
def test_a_figure_of_nothing_is_a_stop_however_it_is_mounted(mounting):
    nothing = tools.quantity(0.0, "angle", "°")
    request = liquid(meter__mounting=mounting, meter__path_angle=nothing)
    found = [item for item in FAMILY.size(request).findings if item.code == "figure-not-positive"]
    assert [(item.level, item.field) for item in found] == [(Level.STOP, "meter.path_angle")]


def test_line_size_unless_the_velocity_is_low():
    assert FAMILY.size(liquid()).values["meter_size"].value == "DN 100"
    assert FAMILY.size(liquid([1.0, 2.0, 3.0])).numbers["bore"] < 0.1


@pytest.mark.parametrize(
    ("speed", "holds"), [(0.29, False), (0.31, True), (11.9, True), (12.1, False)]
)
def test_velocity_window_flips(speed, holds):
    request = liquid([speed * AREA * 998.2] * 3, meter__size="DN 100")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    window = [item for item in of_profile(request) if item.key == "meter_velocity"]
    assert all(shortfall(item, values) == 0.0 for item in window) is holds


def test_one_path_needs_a_steady_profile():
    request = liquid(meter__paths="1")
    found = FAMILY.limits(FAMILY.size(request), request)
    assert [(item.key, item.low) for item in found] == [("meter_reynolds_number", 10000.0)]
    request = liquid(meter__paths="4")
    assert FAMILY.limits(FAMILY.size(request), request) == ()


@pytest.mark.parametrize(("paths", "error"), [("1", 0.010), ("2", 0.005), ("4", 0.003)])
def test_more_paths_less_error(paths, error):
    request = liquid([AREA * 998.2] * 3, meter__size="DN 100", meter__paths=paths)
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert values["error_limit"] == pytest.approx(error + 0.002)


@pytest.mark.parametrize(("share", "level"), [(0.005, Level.CAUTION), (0.02, Level.STOP)])
def test_bubbles(share, level):
    assert ("bubbles", level) in found_in(liquid(fluid__bubbles=tools.quantity(share, "ratio")))


def test_what_stops_sound_is_found():
    many = tools.quantity(0.06, "ratio")
    assert ("solids", Level.CAUTION) in found_in(liquid(fluid__solids=many))
    assert ("lining", Level.CAUTION) in found_in(liquid(line__lining="rubber", **CLAMPED))
    assert ("clamp-on-gas-pressure", Level.STOP) in found_in(gas(**CLAMPED))
    silent = liquid(fluid=tools.water(3, sound_speed=np.nan))
    assert ("sound-speed-missing", Level.CAUTION) in found_in(silent)


def test_budget_without_sound_speed_leaves_the_timing_out():
    request = liquid(fluid=tools.water(3, sound_speed=np.nan))
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    keys = [part.key for part in FAMILY.budget(element, request.stream, values)]
    assert "timing" not in keys


def test_family_keeps_its_promises():
    checks.check_glossary(FAMILY, liquid(), gas(), liquid(**CLAMPED))
    for request in (liquid(), gas(), liquid(**CLAMPED)):
        checks.check_extremes(FAMILY, request)
    checks.check_rising(FAMILY, liquid(meter__size="DN 80"), ("pressure_loss", "signal_current"))
