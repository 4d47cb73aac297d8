"""Pitot tubes, probes, laminar elements, variable area and critical nozzles as families."""

import warnings

import dp_tools as tools
import numpy as np
import pytest

from specsheet.fields import TERMS
from specsheet.findings import Level, Origin
from specsheet.meters import registry

FAMILIES = [
    "pitot_tube",
    "pitot_averaging",
    "probe_multihole",
    "laminar_element",
    "variable_area_float",
    "variable_area_spring",
    "nozzle_critical",
]


def water(key, **given):
    flows = given.pop("flows", [5.0, 12.0, 20.0])
    return tools.request(key, flows, tools.water(3), **given)


def steam(key, **given):
    flows = given.pop("flows", [0.3, 0.86, 1.0])
    return tools.request(
        key, flows, tools.steam(3), phase="gas", diameter=0.1541, nominal=150, **given
    )


def evaluated(request, key):
    family = registry.family(key)
    element = family.size(request)
    return family, element, family.at(element, request.stream)


@pytest.mark.parametrize("key", FAMILIES)
@pytest.mark.parametrize("make", [water, steam])
def test_everything_put_out_is_a_term_and_explained(key, make):
    family, element, values = evaluated(make(key), key)
    assert {*values, *element.values} <= TERMS.keys()
    explained = {item.key for item in family.derivations}
    derived = {name for name, given in element.values.items() if given.origin is Origin.DERIVED}
    assert set(values) <= explained
    assert derived <= explained
    for item in family.derivations:
        assert set(item.inputs) <= TERMS.keys(), item
    for name, array in values.items():
        assert array.shape == (3,), name


@pytest.mark.parametrize("key", FAMILIES)
def test_signal_rises_with_flow(key):
    request = steam(key)
    family, element, _ = evaluated(request, key)
    sweep = tools.alone(request.stream, 1, 200).with_flow(np.geomspace(0.02, 1.1, 200))
    signal = family.at(element, sweep)[family.signal]
    assert np.isfinite(signal).all()
    assert (np.diff(signal) > 0.0).all()


@pytest.mark.parametrize("key", FAMILIES)
def test_impossible_flows_give_no_warning(key):
    request = steam(key)
    family, element, _ = evaluated(request, key)
    wild = tools.alone(request.stream, 1, 4).with_flow(np.array([0.0, 1e-9, 50.0, 1e6]))
    with warnings.catch_warnings():
        warnings.simplefilter("error")
        family.budget(element, wild, family.at(element, wild))


@pytest.mark.parametrize("key", FAMILIES)
def test_budget_is_finite_and_named(key):
    request = steam(key)
    family, element, values = evaluated(request, key)
    parts = family.budget(element, request.stream, values)
    assert len({part.key for part in parts}) == len(parts)
    for part in parts:
        assert part.relative.shape == (3,)
        assert np.isfinite(part.relative).all()
        assert part.source


def broken(request, key, code, factor):
    """Tell whether a limit holds at the points, and whether it breaks at another flow."""
    family, element, values = evaluated(request, key)
    limit = next(item for item in family.limits(element, request) if item.code == code)
    more = family.at(element, request.stream.with_flow(request.stream.mass_flow * factor))

    def holds(of):
        found = of[limit.key]
        above = limit.low is None or (found >= limit.low).all()
        return bool(above and (limit.high is None or (found <= limit.high).all()))

    return holds(values), holds(more)


@pytest.mark.parametrize(
    ("key", "code", "factor"),
    [
        ("pitot_tube", "above-range", 5.0),
        ("pitot_tube", "dynamic-pressure-low", 0.05),
        ("pitot_averaging", "probe-resonance", 10.0),
        ("probe_multihole", "dynamic-pressure-low", 0.05),
        ("laminar_element", "capillary-turbulent", 5.0),
        ("laminar_element", "signal-bends", 3.0),
        ("laminar_element", "entrance-long", 10.0),
        ("variable_area_float", "above-scale", 3.0),
        ("variable_area_float", "below-scale", 0.05),
        ("variable_area_spring", "above-scale", 2.0),
        ("variable_area_spring", "below-scale", 0.01),
        ("nozzle_critical", "inlet-pressure-low", 1.2),
        ("nozzle_critical", "throat-reynolds-number-limit", 0.01),
    ],
)
def test_limits_cross(key, code, factor):
    assert broken(steam(key), key, code, factor) == (True, False)


def test_traverse_is_placed_in_millimetres():
    """ISO 5802:2001, log-linear, 4 points: 0.021 D of 154.1 mm is 3.2 mm."""
    _, element, _ = evaluated(steam("pitot_tube"), "pitot_tube")
    assert "3.2, 18.0, 28.4, 53.2" in element.notes["element"][0]


def test_a_point_on_the_axis_reads_more_than_the_mean():
    _, _, axis = evaluated(steam("pitot_tube", position="axis"), "pitot_tube")
    _, _, mean = evaluated(steam("pitot_tube", position="mean-velocity point"), "pitot_tube")
    assert (axis["differential_pressure"] > 1.2 * mean["differential_pressure"]).all()


def test_unknown_number_of_points_is_said():
    _, element, _ = evaluated(steam("pitot_tube", points_on_radius="9"), "pitot_tube")
    assert "traverse-points" in [item.code for item in element.findings]


def test_averaging_tube_follows_its_coefficient():
    """v = K sqrt(2 Δp/ρ): K = 0.7 at 2.4376 m/s in water gives 6052 Pa."""
    _, _, values = evaluated(water("pitot_averaging", flow_coefficient="0.7"), "pitot_averaging")
    head = 998.2 * values["velocity"] ** 2 / 2 / 0.49
    np.testing.assert_allclose(values["differential_pressure"], head)


def test_supported_end_is_stiffer():
    _, _, one = evaluated(steam("pitot_averaging"), "pitot_averaging")
    _, _, both = evaluated(steam("pitot_averaging", support="far end supported"), "pitot_averaging")
    ratio = both["natural_frequency"] / one["natural_frequency"]
    assert ratio == pytest.approx((3.9266 / 1.8751) ** 2, rel=1e-4)


def test_laminar_element_is_sized_for_its_range():
    request = steam("laminar_element", differential_pressure_range="20 mbar")
    _, _, values = evaluated(request, "laminar_element")
    assert values["signal_fraction"][2] == pytest.approx(1.0, abs=0.02)
    assert values["meter_reynolds_number"][2] <= 1000.0
    assert values["inertial_share"][2] < 0.1


def test_porous_plug_follows_darcy():
    """Δp = μ L q/(k A): 1e-12 m2, 10 mm, a plug of 40 mm in air of 1.8e-5 Pa s."""
    air = tools.water(3, density=1.2, viscosity=1.8e-5, pressure=1e6, isentropic_exponent=1.4)
    flow = 1e-4
    request = tools.request(
        "laminar_element",
        [1.2 * flow / 4, 1.2 * flow / 2, 1.2 * flow],
        air,
        phase="gas",
        matrix="porous plug",
        plug_diameter="40 mm",
    )
    _, _, values = evaluated(request, "laminar_element")
    stiff = 1.8e-5 * 0.01 * flow / (1e-12 * np.pi / 4 * 0.04**2)
    drop = values["differential_pressure"][2]
    assert drop * (1 - drop / 2e6) == pytest.approx(stiff, rel=1e-9)


def test_float_must_stand_upright():
    _, lying, _ = evaluated(water("variable_area_float"), "variable_area_float")
    assert "float-not-upright" in [item.code for item in lying.findings]
    upright = water("variable_area_float", line__orientation="vertical up")
    _, element, _ = evaluated(upright, "variable_area_float")
    assert element.findings == ()


def test_light_float_swims():
    request = water("variable_area_float", float_density="900 kg/m3")
    _, element, _ = evaluated(request, "variable_area_float")
    assert Level.STOP in [item.level for item in element.findings]


def test_float_reads_about_one_per_cent_at_best():
    """Trade rule: about 1 % at best (common practice, no source)."""
    _, element, values = evaluated(water("variable_area_float"), "variable_area_float")
    assert (values["error_limit"] >= 0.01).all()
    assert element.values["equivalent_full_scale"].origin is Origin.DERIVED


def test_loss_of_a_float_does_not_depend_on_flow():
    _, _, values = evaluated(water("variable_area_float"), "variable_area_float")
    np.testing.assert_allclose(values["pressure_loss"], values["pressure_loss"][0])


def test_critical_nozzle_passes_its_flow_at_its_pressure():
    """Sized at 8 bar: 1 kg/s needs 8 bar, half of it half (the throat is rounded up 0.01 mm)."""
    request = steam("nozzle_critical", flows=[0.5, 0.75, 1.0])
    _, element, values = evaluated(request, "nozzle_critical")
    assert values["inlet_pressure"][2] == pytest.approx(8e5, rel=2e-3)
    assert values["inlet_pressure"][0] == pytest.approx(4e5, rel=4e-3)
    stated = element.values["throat_diameter"].value
    rated = steam("nozzle_critical", flows=[0.5, 0.75, 1.0], throat=f"{stated * 1e3:.4f} mm")
    _, _, again = evaluated(rated, "nozzle_critical")
    np.testing.assert_allclose(again["choked_flow"], values["choked_flow"], rtol=1e-6)


def test_critical_nozzle_is_for_gas():
    _, element, _ = evaluated(water("nozzle_critical"), "nozzle_critical")
    assert "critical-nozzle-liquid" in [item.code for item in element.findings]
