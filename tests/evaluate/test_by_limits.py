"""Families of which only the profile is known: size, velocity, loss and error as usual figures.

Velocities and Reynolds numbers are checked against the library `fluids`; limits are read from the
profiles (common practice, no source).
"""

from __future__ import annotations

import math

import pytest
from fluids.core import Reynolds
from services import service, service_text

from specsheet import packs, tagfile
from specsheet.evaluate import Evaluation, evaluate
from specsheet.findings import Level, Origin
from specsheet.meters import registry

KEYS = [key for key in packs.family_keys() if key not in registry.MODULES]


def supposed(name: str, family: str, *changes: tuple[str, str]) -> Evaluation:
    tag = tagfile.suppose(service_text(name, family), changes).tag
    assert tag is not None
    return evaluate(tag)


def codes(evaluation: Evaluation) -> set[str]:
    return {finding.code for finding in evaluation.findings}


@pytest.mark.parametrize("family", KEYS)
@pytest.mark.parametrize("name", ["water", "compressed air", "brook", "boiling water", "sodium"])
def test_every_such_family_is_evaluated_whatever_the_service(family: str, name: str) -> None:
    evaluation = evaluate(service(name, family))
    assert "family-without-equations" in codes(evaluation)
    assert evaluation.points


def test_velocity_reynolds_number_and_loss() -> None:
    evaluation = evaluate(service("water", "turbine_woltman"))
    values = evaluation.points[2].values
    bore = float(evaluation.element["meter_bore"].value)
    velocity = 80.0 / 3600.0 / (math.pi / 4.0 * bore**2)
    assert values["meter_velocity"].value == pytest.approx(velocity, rel=1e-3)
    density, viscosity = float(values["density"].value), float(values["viscosity"].value)
    expected = Reynolds(V=velocity, D=bore, rho=density, mu=viscosity)
    assert values["meter_reynolds_number"].value == pytest.approx(expected, rel=1e-3)
    usual = packs.profile("turbine_woltman").loss_coefficient
    assert usual is not None
    assert values["pressure_loss"].value == pytest.approx(
        usual.value * density * velocity**2 / 2.0, rel=1e-3
    )


def test_the_usual_error_is_the_uncertainty_and_typical() -> None:
    evaluation = evaluate(service("water", "turbine_woltman"))
    usual = packs.profile("turbine_woltman").uncertainty_calibrated
    assert usual is not None
    assert evaluation.points[0].values["uncertainty"].value == pytest.approx(usual.value, rel=0.03)
    assert [line.origin for line in evaluation.budget] == [Origin.TYPICAL]


def test_a_slow_line_gets_a_smaller_meter_and_a_size_stated_is_kept() -> None:
    """0.3 to 1.2 m3/h in DN 100 are 0.01 to 0.04 m/s: a gear meter wants a smaller size."""
    slow = [
        (f"points.{name}.flow", flow)
        for name, flow in (("minimum", "0.3 m3/h"), ("normal", "0.6 m3/h"), ("maximum", "1.2 m3/h"))
    ]
    chosen = supposed("bitumen", "gear_helical", *slow)
    bore = float(chosen.element["meter_bore"].value)
    assert bore < 0.1
    assert "meter-velocity-limit" not in codes(chosen)
    stated = supposed("bitumen", "gear_helical", *slow, ("meter.size", "DN 100"))
    assert stated.element["meter_size"].value == "DN 100"
    assert stated.element["meter_size"].origin is Origin.GIVEN
    assert "meter-velocity-limit" in codes(stated)


def test_reducers_add_their_loss() -> None:
    full = evaluate(service("water", "turbine_woltman"))
    small = supposed("water", "turbine_woltman", ("meter.size", "DN 80"))
    assert full.points[2].values["reducer_loss"].value == 0.0
    assert float(small.points[2].values["reducer_loss"].value) > 0.0


@pytest.mark.parametrize(("flow", "broken"), [("146 m3/h", False), ("150 m3/h", True)])
def test_a_limit_of_the_profile_flips_where_it_stands(flow: str, broken: bool) -> None:
    """5 m/s in 102.26 mm (DN 100 schedule 40) is 147.8 m3/h."""
    evaluation = supposed("water", "turbine_woltman", ("points.maximum.flow", flow))
    stops = {f.code for f in evaluation.findings if f.level is Level.STOP}
    assert ("meter-velocity-limit" in stops) is broken


def test_a_channel_needs_no_pipe_and_shows_no_velocity() -> None:
    evaluation = evaluate(service("brook", "weir_vnotch"))
    assert "line-size-missing" not in codes(evaluation)
    assert "velocity" not in evaluation.points[0].values
    assert not {f.code for f in evaluation.findings if f.level is Level.STOP}


@pytest.mark.parametrize(
    ("family", "name", "changes", "code", "level"),
    [
        ("magnetic", "compressed air", (), "phase-unsuitable", Level.STOP),
        ("weir_vnotch", "water", (), "free-surface-needed", Level.STOP),
        ("vane_sliding", "fuel oil", (("line.orientation", "vertical up"),), "orientation-unusual",
         Level.CAUTION),
        ("vane_sliding", "fuel oil", (("fluid.solids", "1 %"),), "solids-fraction-limit",
         Level.CAUTION),
        ("vane_sliding", "fuel oil", (("fluid.abrasive", "true"),), "abrasive-moving-parts",
         Level.STOP),
        ("ultrasonic_doppler", "penstock", (), "scatterer-fraction-not-stated", Level.CAUTION),
        ("lorentz_force", "penstock", (), "electrical-conductivity-not-stated", Level.STOP),
        ("lorentz_force", "sodium", (("fluid.electrical_conductivity", "5000 S/m"),),
         "electrical-conductivity-limit", Level.STOP),
        ("turbine_woltman", "water", (("require.turndown", "500"),), "turndown-unusual",
         Level.CAUTION),
        ("current_meter_traverse", "water", (), "line-size-unusual", Level.STOP),
        ("turbine_woltman", "dosing water", (), "line-below-series", Level.CAUTION),
    ],
)  # fmt: skip
def test_what_the_service_rules_out(
    family: str, name: str, changes: tuple[tuple[str, str], ...], code: str, level: Level
) -> None:
    found = [f for f in supposed(name, family, *changes).findings if f.code == code]
    assert [finding.level for finding in found] == [level]
    assert found[0].field
    assert found[0].source


def test_a_reserve_says_how_much_the_solids_may_grow() -> None:
    evaluation = supposed("brook", "weir_vnotch", ("fluid.solids", "0.5 %"))
    check = next(one for one in evaluation.checks if one.key == "solids_fraction")
    assert check.holds
    assert check.reserve is not None
    assert check.reserve.at == 0.01
    assert check.reserve.fraction == pytest.approx(1.0)


def test_a_loss_by_a_usual_coefficient_is_typical_and_one_by_equations_derived() -> None:
    for family, origin in (("turbine_woltman", Origin.TYPICAL), ("vortex", Origin.DERIVED)):
        found = evaluate(service("water", family)).points[0].values["pressure_loss"]
        assert found.origin is origin
