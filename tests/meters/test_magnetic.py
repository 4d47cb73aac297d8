"""The electromagnetic meter: response, size, liner, electrodes, earthing and conductivity."""

import warnings

import bore_tools as tools
import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from specsheet.fields import TERMS
from specsheet.findings import Level, Origin
from specsheet.meters.magnetic import FAMILY
from specsheet.meters.shared.limits import of_profile, shortfall

TAP = tools.quantity(0.045, "conductivity", "uS/cm", "450 uS/cm")


def magnetic(flows=(5.0, 15.0, 25.0), fluid=None, **more):
    base = {"fluid__electrical_conductivity": TAP, "fluid__substance": "water"}
    return tools.request("magnetic", list(flows), fluid or tools.water(3), **(base | more))


def codes(element):
    return {finding.code for finding in element.findings}


def test_voltage_of_a_rated_meter():
    """U = k B D v, ISO 20456: 10 mT, 100 mm, 1 m/s gives 1 mV."""
    flow = np.pi / 4 * 0.1**2 * 998.2
    request = magnetic([flow] * 3, meter__size="DN 100")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert values["induced_voltage"] == pytest.approx(0.001, rel=1e-9)


def test_no_loss_at_line_size():
    request = magnetic(meter__size="DN 100")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert values["pressure_loss"] == pytest.approx(0.0, abs=0.0)


def test_loss_of_reducers_at_sixteen_degrees():
    """Crane TP-410 (general library in tests/methods): 100 to 50 mm at 16 degrees."""
    request = magnetic([4.0] * 3, meter__size="DN 50")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    ratio = 0.05 / 0.1023
    sine = np.sin(0.2793 / 2)
    head = 998.2 * (4.0 / 998.2 / (np.pi / 4 * 0.05**2)) ** 2 / 2
    wanted = (0.8 * sine * (1 - ratio**2) + 2.6 * sine * (1 - ratio**2) ** 2) * head
    assert values["pressure_loss"] == pytest.approx(wanted, rel=1e-9)


@pytest.mark.parametrize(
    ("normal", "size"),
    [
        (15.0, "DN 100"),  # 1.9 m/s at line size
        (4.0, "DN 65"),  # 0.5 m/s at DN 100, 0.8 at DN 80, 1.2 at DN 65
        (40.0, "DN 100"),  # 5.1 m/s: too fast, but nothing larger fits the line
    ],
)
def test_size_by_preferred_velocity(normal, size):
    element = FAMILY.size(magnetic([0.8 * normal, normal, 1.2 * normal]))
    assert element.values["meter_size"].value == size


def test_demanded_uncertainty_makes_the_meter_smaller():
    """0.75 % cannot be held at 0.31 m/s: the zero error asks for more velocity."""
    wanted = tools.quantity(0.0075, "ratio", "%")
    plain = FAMILY.size(magnetic([2.4, 8.0, 12.0]))
    held = FAMILY.size(magnetic([2.4, 8.0, 12.0], require__uncertainty=wanted))
    assert held.numbers["bore"] < plain.numbers["bore"]


@pytest.mark.parametrize(
    ("conductivity", "broken"),
    [  # 5 uS/cm = 5e-4 S/m, usual least conductivity; common practice, sources differ
        (4.9e-4, {Level.STOP, Level.CAUTION}),
        (5.1e-4, {Level.CAUTION}),
        (1.9e-3, {Level.CAUTION}),
        (2.1e-3, set()),
    ],
)
def test_low_conductivity(conductivity, broken):
    request = magnetic(fluid__electrical_conductivity=tools.quantity(conductivity, "conductivity"))
    element = FAMILY.size(request)
    of_key = [
        item for item in FAMILY.limits(element, request) if item.key == "electrical_conductivity"
    ]
    values = {"electrical_conductivity": np.array([element.values[of_key[0].key].value])}
    assert {item.level for item in of_key if shortfall(item, values) > 0} == broken


def test_enough_conductivity_is_silent():
    assert codes(FAMILY.size(magnetic())) == set()


@pytest.mark.parametrize(
    ("fluid", "temperature", "code", "level"),
    [  # common practice, no source
        ({"kind": "substance", "substance": "water"}, 288.0, "conductivity-assumed", Level.NOTE),
        ({"kind": "substance", "substance": "water"}, 400.0, "conductivity-missing", Level.CAUTION),
        ({"kind": "slurry", "substance": "water"}, 300.0, "conductivity-assumed", Level.NOTE),
        ({"kind": "given", "substance": ""}, 300.0, "conductivity-missing", Level.CAUTION),
        ({"kind": "petroleum", "substance": ""}, 300.0, "hydrocarbon-does-not-conduct", Level.STOP),
        *(
            ({"kind": "substance", "substance": name}, 280.0, "liquid-does-not-conduct", Level.STOP)
            for name in ("toluene", "ethylene glycol", "methanol", "ammonia", "R134a", "nitrogen")
        ),
        (
            {"kind": "solution", "solute": "ethylene glycol", "substance": ""},
            300.0,
            "conductivity-missing",
            Level.CAUTION,
        ),
    ],
)
def test_unknown_conductivity(fluid, temperature, code, level):
    entries = {f"fluid__{key}": value for key, value in fluid.items()}
    water = {**tools.water(3), "temperature": np.full(3, temperature)}
    request = magnetic(fluid=water, fluid__electrical_conductivity=None, **entries)
    found = {(item.code, item.level) for item in FAMILY.size(request).findings}
    assert (code, level) in found


@pytest.mark.parametrize("fluid", [{"kind": "seawater"}, {"kind": "solution", "solute": "NaOH"}])
def test_salt_water_and_lye_conduct_by_nature(fluid):
    entries = {f"fluid__{key}": value for key, value in fluid.items()}
    found = codes(FAMILY.size(magnetic(fluid__electrical_conductivity=None, **entries)))
    assert not any("conduct" in code for code in found)


def test_a_gas_induces_nothing():
    gas = tools.request("magnetic", [0.1, 0.5, 1.0], tools.steam(3), phase="gas")
    found = FAMILY.size(gas).findings
    assert ("gas-does-not-conduct", Level.STOP) in {(item.code, item.level) for item in found}


@pytest.mark.parametrize(
    ("more", "fluid", "liner"),
    [  # common practice, no source
        ({}, {}, "hard rubber"),
        ({"require__potable_water": True}, {}, "EPDM"),
        ({"fluid__abrasive": True}, {}, "polyurethane"),
        ({"fluid__abrasive": True}, {"temperature": 328.15}, "soft rubber"),
        ({"fluid__ph": tools.quantity(2.0, "dimensionless")}, {}, "PTFE"),
        ({"fluid__hazards": ("corrosive",)}, {"temperature": 433.15, "pressure": 1e6}, "PFA"),
        ({}, {"temperature": 383.15}, "PTFE"),
        (
            {"design__minimum_pressure": tools.quantity(1e3, "pressure_absolute", "bar(a)")},
            {"temperature": 383.15},
            "PFA",
        ),
        ({"fluid__abrasive": True, "fluid__hazards": ("corrosive",)}, {}, "ceramic"),
    ],
)
def test_liner_proposed(more, fluid, liner):
    element = FAMILY.size(magnetic(fluid=tools.water(3, **fluid), **more))
    assert element.values["liner"].value == liner
    assert element.values["liner"].origin is Origin.DERIVED


def test_no_liner_for_very_hot_liquid():
    element = FAMILY.size(magnetic(fluid=tools.water(3, temperature=500.0, pressure=4e6)))
    assert "no-liner" in codes(element)


def test_stated_liner_is_checked():
    element = FAMILY.size(
        magnetic(fluid=tools.water(3, temperature=363.15), meter__liner="hard rubber")
    )
    assert element.values["liner"].origin is Origin.GIVEN
    found = [item for item in element.findings if item.code == "liner-unsuitable"]
    assert found[0].level is Level.STOP
    assert "90 °C is wanted, it bears up to 80 °C" in found[0].message
    assert "liner-unknown" in codes(FAMILY.size(magnetic(meter__liner="cork")))


def test_liner_temperature_is_a_limit_driven_by_temperature():
    element = FAMILY.size(magnetic(meter__liner="hard rubber"))
    found = [item for item in FAMILY.limits(element, magnetic()) if item.key == "temperature"]
    assert found[0].driver == "temperature"
    assert found[0].high == pytest.approx(353.15)


@pytest.mark.parametrize(
    ("more", "metal"),
    [  # common practice, no source
        ({}, "stainless steel 316L"),
        ({"fluid__kind": "seawater"}, "nickel alloy C-22"),
        ({"fluid__chlorides": tools.quantity(3e-4, "ratio")}, "nickel alloy C-22"),
        ({"fluid__ph": tools.quantity(1.0, "dimensionless")}, "tantalum"),
        ({"fluid__ph": tools.quantity(13.0, "dimensionless")}, "nickel alloy C-22"),
    ],
)
def test_electrodes_proposed(more, metal):
    assert FAMILY.size(magnetic(**more)).values["electrode_material"].value == metal


def test_stated_electrodes_are_checked():
    steel = magnetic(fluid__kind="seawater", meter__electrode_material="stainless steel 316L")
    assert "electrode-unsuitable" in codes(FAMILY.size(steel))
    alkali = tools.quantity(13.0, "dimensionless")
    metal = magnetic(fluid__ph=alkali, meter__electrode_material="tantalum")
    assert "electrode-unsuitable" in codes(FAMILY.size(metal))


def test_earthing_follows_the_line():
    assert FAMILY.size(magnetic()).values["earthing"].value == "line flanges"
    for lined in ({"line__lining": "rubber"}, {"line__material": "PVC-U"}):
        assert FAMILY.size(magnetic(**lined)).values["earthing"].value == "earthing rings"
    wrong = magnetic(line__lining="rubber", meter__earthing="line flanges")
    assert "earthing-missing" in codes(FAMILY.size(wrong))


def test_slurry_has_its_own_window_and_noise():
    request = magnetic(fluid__abrasive=True, meter__size="DN 100")
    element = FAMILY.size(request)
    window = [item for item in FAMILY.limits(element, request) if item.key == "meter_velocity"]
    assert (window[0].low, window[0].high) == (1.0, 4.0)
    values = FAMILY.at(element, request.stream)
    keys = [item.key for item in FAMILY.budget(element, request.stream, values)]
    assert "slurry_noise" in keys


def test_bubbles_and_falling_line():
    some = tools.quantity(0.01, "ratio", "%")
    element = FAMILY.size(magnetic(fluid__bubbles=some, line__orientation="vertical down"))
    assert {"bubbles", "not-full"} <= codes(element)


@pytest.mark.parametrize(
    ("speed", "holds"), [(0.29, False), (0.31, True), (9.9, True), (10.1, False)]
)
def test_velocity_window_flips(speed, holds):
    flow = speed * np.pi / 4 * 0.1**2 * 998.2
    request = magnetic([flow] * 3, meter__size="DN 100")
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert all(shortfall(item, values) == 0.0 for item in of_profile(request)) is holds


def test_error_and_its_parts():
    """0.5 % of reading and 1 mm/s: 0.6 % at 1 m/s; rectangular, so / sqrt(3)."""
    flow = np.pi / 4 * 0.1**2 * 998.2
    request = magnetic([flow] * 3, meter__size="DN 100")
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    assert values["error_limit"] == pytest.approx(0.006)
    parts = {item.key: item.relative for item in FAMILY.budget(element, request.stream, values)}
    assert parts["reading"] == pytest.approx(0.005 / 3**0.5)
    assert parts["zero"] == pytest.approx(0.001 / 3**0.5)


@settings(deadline=None, max_examples=40)
@given(st.lists(st.floats(1e-3, 1e3), min_size=2, max_size=20, unique=True))
def test_signal_rises_with_flow_and_returns_it(flows):
    element = FAMILY.size(magnetic(meter__size="DN 80"))
    stream = tools.stream(sorted(flows), tools.water(len(flows)))
    values = FAMILY.at(element, stream)
    for key in ("induced_voltage", "pressure_loss", "signal_current", "velocity"):
        assert (np.diff(values[key]) >= 0).all(), key
    back = values["induced_voltage"] / (0.01 * 0.08) * np.pi / 4 * 0.08**2 * 998.2
    assert back == pytest.approx(stream.mass_flow, rel=1e-9)


@pytest.mark.parametrize("flow", [0.0, 1e-300, 1e300, np.inf, np.nan, -1.0])
def test_extreme_input_neither_raises_nor_warns(flow):
    element = FAMILY.size(magnetic())
    stream = tools.stream([flow] * 3, tools.water(3, density=1e-9, viscosity=1e-12))
    with warnings.catch_warnings():
        warnings.simplefilter("error")
        values = FAMILY.at(element, stream)
        FAMILY.budget(element, stream, values)
    assert all(value.shape == (3,) for value in values.values())


def test_every_key_is_in_the_glossary_and_derived():
    told = {item.key for item in FAMILY.derivations}
    element = FAMILY.size(magnetic())
    values = FAMILY.at(element, magnetic().stream)
    assert set(values) <= set(TERMS) & told
    assert set(element.values) <= set(TERMS)
    for item in FAMILY.derivations:
        assert set(item.inputs) <= set(TERMS), item.key
