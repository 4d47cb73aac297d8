"""Meters that turn: axial turbine, oval gear, rotary piston, nutating disc."""

import bore_checks as checks
import bore_tools as tools
import numpy as np
import pytest

from specsheet.findings import Level, Origin
from specsheet.line.straight import straight
from specsheet.meters import disc_nutating, gear_oval, piston_rotary, turbine_axial
from specsheet.meters.shared.limits import of_profile, shortfall

SWEEPING = {
    "gear_oval": gear_oval.FAMILY,
    "piston_rotary": piston_rotary.FAMILY,
    "disc_nutating": disc_nutating.FAMILY,
}
EVERY = SWEEPING | {"turbine_axial": turbine_axial.FAMILY}
TURBINE = turbine_axial.FAMILY
AREA = np.pi / 4 * 0.1**2


def ask(key, flows, fluid=None, **more):
    return tools.request(key, list(flows), fluid or tools.water(3), **more)


def small(key, flows=(0.3, 1.0, 1.6), fluid=None, **more):
    return ask(key, flows, fluid, diameter=0.0409, nominal=40, **more)


def steam(flows=(0.05, 0.2, 0.4), fluid=None, **more):
    return ask("turbine_axial", flows, fluid or tools.steam(3), phase="gas", **more)


@pytest.mark.parametrize("key", EVERY)
def test_frequency_is_k_factor_by_flow(key):
    """14 pulses by litre at 1 L/s: 14 Hz (definition)."""
    factor = tools.quantity(14000.0, "pulse_factor", "1/m3")
    request = small(key, [0.9982] * 3, meter__size="DN 40", meter__k_factor=factor)
    element = EVERY[key].size(request)
    assert element.values["k_factor"].origin is Origin.GIVEN
    values = EVERY[key].at(element, request.stream)
    assert values["frequency"] == pytest.approx(14.0)


def test_turbine_loss_of_water_at_two_metres_per_second():
    """K = 1 (common practice): ρ v²/2 = 1996 Pa."""
    request = ask("turbine_axial", [2.0 * AREA * 998.2] * 3, meter__size="DN 100")
    values = TURBINE.at(TURBINE.size(request), request.stream)
    assert values["pressure_loss"] == pytest.approx(998.2 * 2.0, rel=1e-9)


def test_turbine_back_pressure():
    """API MPMS 5.3: 2 Δp + 1.25 pv; pv of water at 90 °C 70.18 kPa (IAPWS)."""
    hot = tools.water(3, vapour_pressure=70183.0, temperature=363.15)
    request = ask("turbine_axial", [2.0 * AREA * 998.2] * 3, hot, meter__size="DN 100")
    values = TURBINE.at(TURBINE.size(request), request.stream)
    wanted = 2 * values["pressure_loss"] + 1.25 * 70183.0
    assert values["minimum_back_pressure"] == pytest.approx(wanted)


def test_turbine_range_of_a_size():
    """Up to 7 m/s, 10 to 1 in thin liquid (common practice)."""
    values = TURBINE.size(ask("turbine_axial", [10, 20, 40], meter__size="DN 100")).values
    assert values["largest_volume_flow"].value == pytest.approx(7.0 * AREA)
    assert values["smallest_volume_flow"].value == pytest.approx(0.7 * AREA)


def test_turbine_takes_the_line_size_or_less():
    assert TURBINE.size(ask("turbine_axial", [8, 20, 40])).values["meter_size"].value == "DN 100"
    element = TURBINE.size(ask("turbine_axial", [3, 6, 12]))
    assert element.values["meter_size"].value == "DN 50"
    assert any("flow by the smallest flow" in text for text in element.notes["element"])


@pytest.mark.parametrize(
    ("share", "broken"),
    [
        (0.09, {"below-linear-range"}),
        (0.11, set()),
        (0.99, set()),
        (1.01, {"above-range"}),
        (1.21, {"above-range", "overspeed"}),
    ],
)
@pytest.mark.parametrize("key", ["turbine_axial", "gear_oval"])
def test_range_flips(key, share, broken):
    largest = tools.quantity(0.002, "volume_flow", "m3/s")
    request = small(
        key, [share * 0.002 * 998.2] * 3, meter__size="DN 40", meter__largest_flow=largest
    )
    element = EVERY[key].size(request)
    values = EVERY[key].at(element, request.stream)
    found = {
        item.code for item in EVERY[key].limits(element, request) if shortfall(item, values) > 0
    }
    assert found == broken


def test_dense_gas_widens_the_range():
    """ISO 9951: the smallest flow goes with 1/√ρ; 4.8 kg/m3 is four times 1.2 kg/m3."""
    request = steam(fluid=tools.steam(3, density=4.8), meter__size="DN 100")
    element = TURBINE.size(request)
    values = TURBINE.at(element, request.stream)
    least = element.numbers["smallest_volume_flow"] / 2
    assert values["flow_by_smallest"] == pytest.approx(request.stream.volume_flow / least)


def test_thick_liquid_narrows_the_range_and_is_found():
    thick = tools.water(3, viscosity=0.03)
    request = ask("turbine_axial", [10, 20, 40], thick, meter__size="DN 100")
    element = TURBINE.size(request)
    values = TURBINE.at(element, request.stream)
    thin = request.stream.volume_flow / element.numbers["smallest_volume_flow"]
    assert values["flow_by_smallest"] == pytest.approx(thin / (0.03 / 998.2 / 5e-6))
    values = dict(values) | {"kinematic_viscosity": request.stream.viscosity / 998.2}
    of_viscosity = [item for item in of_profile(request) if item.key == "kinematic_viscosity"]
    assert shortfall(of_viscosity[0], values) > 0


@pytest.mark.parametrize("variant", ["fire service", "hydrant portable"])
def test_variants_have_their_words(variant):
    plain = TURBINE.size(ask("turbine_axial", [10, 20, 40])).notes["element"]
    special = TURBINE.size(ask("turbine_axial", [10, 20, 40], meter__variant=variant))
    assert len(special.notes["element"]) == len(plain) + 1


@pytest.mark.parametrize("key", SWEEPING)
def test_swept_volume_gives_rotation(key):
    """1 L/s with 0.25 L by turn: 4 turns by second (definition)."""
    swept = tools.quantity(0.25e-3, "volume", "L")
    request = small(key, [0.9982] * 3, meter__size="DN 40", meter__swept_volume=swept)
    values = SWEEPING[key].at(SWEEPING[key].size(request), request.stream)
    assert values["rotation"] == pytest.approx(4.0)


@pytest.mark.parametrize("key", SWEEPING)
def test_slip_vanishes_and_loss_rises_with_viscosity(key):
    slips, losses = [], []
    for viscosity in (1e-3, 1e-2, 1e-1):
        request = small(key, fluid=tools.water(3, viscosity=viscosity), meter__size="DN 40")
        values = SWEEPING[key].at(SWEEPING[key].size(request), request.stream)
        slips.append(values["slip"][2])
        losses.append(values["pressure_loss"][2])
    assert slips[0] > slips[1] > slips[2] > 0
    assert slips[0] < 0.01
    assert losses[0] < losses[1] < losses[2]


@pytest.mark.parametrize("key", SWEEPING)
def test_displacement_needs_no_straight_lengths_and_no_gas(key):
    request = small(key)
    found = straight(request.tag, request.profile, None, pipe_diameter=0.04)
    assert found.findings == ()
    gas = small(key, [0.01, 0.02, 0.03], tools.steam(3), phase="gas")
    codes = {(item.code, item.level) for item in SWEEPING[key].size(gas).findings}
    assert ("phase-unsuitable", Level.STOP) in codes


@pytest.mark.parametrize("key", EVERY)
def test_bubbles_and_solids(key):
    some = tools.quantity(0.01, "ratio")
    element = EVERY[key].size(small(key, fluid__bubbles=some, fluid__abrasive=True))
    codes = {(item.code, item.level) for item in element.findings}
    assert {("bubbles", Level.CAUTION), ("solids", Level.STOP)} <= codes


def test_rotary_piston_goes_up_to_forty_millimetres():
    """Common practice, no source."""
    element = piston_rotary.FAMILY.size(ask("piston_rotary", [1, 2, 3]))
    assert element.numbers["bore"] <= 0.040


def test_register_rolls_over():
    """10^8 pulses of 1 L at 1.6 kg/s of water: 62.4e6 s, some 722 d."""
    element = gear_oval.FAMILY.size(small("gear_oval", meter__size="DN 40"))
    assert element.values["pulse_volume"].value == pytest.approx(1e-3)
    assert element.values["rollover_time"].value / 86400 == pytest.approx(722, rel=1e-3)


@pytest.mark.parametrize("key", EVERY)
def test_family_keeps_its_promises(key):
    requests = [small(key, meter__size="DN 40")]
    if key == "turbine_axial":
        requests.append(steam())
    checks.check_glossary(EVERY[key], *requests)
    for request in requests:
        checks.check_extremes(EVERY[key], request)
        checks.check_rising(EVERY[key], request, ("pressure_loss", "load", "signal_current"))
