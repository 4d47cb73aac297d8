"""The thermal mass meter: heat, gas factor, size, dry and clean gas."""

import bore_checks as checks
import bore_tools as tools
import numpy as np
import pytest

from specsheet.findings import Level
from specsheet.meters.shared.limits import of_profile, shortfall
from specsheet.meters.thermal_inline import FAMILY

AREA = np.pi / 4 * 0.1**2


def air(flows=(0.02, 0.1, 0.2), fluid=None, **more):
    return tools.request("thermal_inline", list(flows), fluid or gas(), phase="gas", **more)


def gas(**other):
    """Return air at 20 °C, 1 atm; handbook values rounded."""
    base = {
        "density": 1.204,
        "viscosity": 1.82e-5,
        "pressure": 101325.0,
        "temperature": 293.15,
        "isentropic_exponent": 1.4,
        "sound_speed": 343.0,
        "vapour_pressure": np.nan,
    }
    return tools.water(3, **(base | other))


def found_in(request):
    return {(item.code, item.level) for item in FAMILY.size(request).findings}


def test_air_has_a_gas_factor_near_one():
    """By definition 1 for air; the ideal-gas conductivity (5 %) enters with its square."""
    element = FAMILY.size(air())
    assert element.values["gas_factor"].value == pytest.approx(1.0, abs=0.12)


def test_normal_velocity():
    """DIN 1343: 10 m/s at 20 °C, 1 atm is 10 x 273.15 / 293.15 = 9.318 m/s."""
    request = air([10.0 * AREA * 1.204] * 3, meter__size="DN 100")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert values["normal_velocity"] == pytest.approx(9.318, rel=1e-3)


def test_heat_does_not_depend_on_pressure_at_one_mass_flow():
    """King's law: the signal is mass flow, whatever the density (ideal gas)."""
    low = air(meter__size="DN 100")
    high = air(fluid=gas(density=6.02, pressure=5 * 101325.0), meter__size="DN 100")
    signals = [FAMILY.at(FAMILY.size(one), one.stream)["heater_power"] for one in (low, high)]
    assert signals[0] == pytest.approx(signals[1], rel=1e-9)


@pytest.mark.parametrize(
    ("speed", "holds"), [(0.19, False), (0.21, True), (149.0, True), (151.0, False)]
)
def test_window_flips(speed, holds):
    mass = speed * AREA * 1.204 * 293.15 / 273.15
    request = air([mass] * 3, meter__size="DN 100")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    window = [item for item in of_profile(request) if item.key == "normal_velocity"]
    assert all(shortfall(item, values) == 0.0 for item in window) is holds


def test_clean_gas_only():
    assert ("dirt", Level.CAUTION) in found_in(air(fluid__abrasive=True))
    assert ("mixture", Level.CAUTION) in found_in(air(fluid__kind="mixture"))
    assert ("steam", Level.STOP) in found_in(air(fluid__substance="water"))
    water = tools.request("thermal_inline", [1.0, 2.0, 3.0], tools.water(3))
    assert ("phase-unsuitable", Level.STOP) in found_in(water)


def test_error_of_reading_and_span():
    """1 % of reading and 0.5 % of span: 2 % at half of the range (arithmetic)."""
    span = tools.quantity(0.2, "mass_flow", "kg/s")
    request = air([0.1, 0.1, 0.2], meter__upper_range_value=span)
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert values["error_limit"] == pytest.approx([0.02, 0.02, 0.015])


def test_density_counts_only_for_volume():
    request = air()
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    assert "density" not in {p.key for p in FAMILY.budget(element, request.stream, values)}
    volumes = tools.with_flows(request, "volume_flow", "m3/s", request.stream.volume_flow)
    element = FAMILY.size(volumes)
    assert "density" in {p.key for p in FAMILY.budget(element, volumes.stream, values)}


def test_family_keeps_its_promises():
    checks.check_glossary(FAMILY, air())
    checks.check_extremes(FAMILY, air())
    checks.check_rising(FAMILY, air(meter__size="DN 80"), ("pressure_loss", "signal_current"))
