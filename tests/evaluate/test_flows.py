"""Stated flows of every kind become mass flow and come back."""

import pytest

from specsheet.evaluate import evaluate
from specsheet.findings import Level, Origin
from tests.support.tags import NITROGEN, STEAM, WATER, point, tag_of

# CIPM/IAPWS: water at 20 degC, 1 atm is 998.2 kg/m3 (common handbook value)
WATER_20C = 998.2
# ideal gas of 28.0134 g/mol at 0 degC, 101.325 kPa (22.414 L/mol) with Z 0.99955: 1.2504 kg/m3
NITROGEN_NORMAL = 1.2504


def at_normal(tag, key):
    return float(evaluate(tag).points[0].values[key].value)


@pytest.mark.parametrize(
    ("fluid", "flow", "kilograms_per_hour", "tolerance"),
    [
        (WATER, "36 t/h", 36000.0, 1e-12),
        (WATER, "10 kg/s", 36000.0, 1e-12),
        (WATER, "36 m3/h", 36.0 * WATER_20C, 5e-4),  # 5 bar raise the density by 0.02 %
        (NITROGEN, "1000 Nm3/h", 1000.0 * NITROGEN_NORMAL, 2e-4),
        # 15 degC by ideal gas against 0 degC: 273.15 / 288.15
        (NITROGEN, "1000 Sm3/h", 1000.0 * NITROGEN_NORMAL * 273.15 / 288.15, 4e-4),
        (NITROGEN, "1000 m3/h(base)", 1000.0 * NITROGEN_NORMAL * 273.15 / 288.15, 4e-4),
    ],
)
def test_stated_flow_becomes_mass_flow(fluid, flow, kilograms_per_hour, tolerance):
    tag = tag_of(point("normal", flow, "5 bar(g)", "20 degC"), fluid=fluid)
    assert at_normal(tag, "mass_flow") * 3600.0 == pytest.approx(kilograms_per_hour, rel=tolerance)


@pytest.mark.parametrize("key", ["volume_flow", "base_volume_flow"])
def test_flow_comes_back_from_what_was_derived(key):
    """Stating the derived volume flow must give the mass flow that it came from."""
    first = tag_of(point("normal", "2.5 t/h", "5 bar(g)", "20 degC"), fluid=NITROGEN)
    unit = {"volume_flow": "m3/h", "base_volume_flow": "m3/h(base)"}[key]
    text = f"{at_normal(first, key) * 3600.0!r} {unit}"
    second = tag_of(point("normal", text, "5 bar(g)", "20 degC"), fluid=NITROGEN)
    assert at_normal(second, "mass_flow") == pytest.approx(2500.0 / 3600.0, rel=1e-12)


def test_stated_flow_is_echoed_and_the_others_are_derived():
    values = evaluate(tag_of(point("normal", "36.0 m3/h", "5 bar(g)", "20 degC"))).points[0].values
    assert values["volume_flow"].origin is Origin.GIVEN
    assert values["volume_flow"].text == "36.0 m3/h"
    assert values["mass_flow"].origin is Origin.DERIVED


@pytest.mark.parametrize(
    ("flow", "fluid", "code"),
    [
        ("0 t/h", WATER, "flow-not-positive"),
        ("1 MW", WATER, "calorific-value-missing"),
        ("500 Nm3/h", STEAM, "base-density-missing"),
    ],
)
def test_flow_that_cannot_be_used_is_a_stop_with_a_way_out(flow, fluid, code):
    temperature = "20 degC" if fluid is WATER else "200 degC"
    evaluation = evaluate(tag_of(point("normal", flow, "5 bar(g)", temperature), fluid=fluid))
    found = [finding for finding in evaluation.findings if finding.code == code]
    assert [(item.level, item.field) for item in found] == [(Level.STOP, "points.normal.flow")]
    assert "state" in found[0].message
    assert evaluation.sweep is None, "nothing may be sized from a flow that was refused"
