"""Margins that the state decides: flange rating, saturation, vapour pressure, design."""

from __future__ import annotations

import iapws
import pytest
from services import service, service_text

from specsheet import tagfile
from specsheet.evaluate import evaluate
from specsheet.evaluate.result import Check, Evaluation
from specsheet.findings import Level


def supposed(name: str, family: str, *changes: tuple[str, str]) -> Evaluation:
    tag = tagfile.suppose(service_text(name, family), changes).tag
    assert tag is not None
    return evaluate(tag)


def check(evaluation: Evaluation, key: str) -> Check:
    return next(item for item in evaluation.checks if item.key == key)


def rated(pressure: str, temperature: str, rating: str) -> Evaluation:
    return supposed(
        "water",
        "magnetic",
        ("line.material", "carbon steel"),
        ("require.rating", rating),
        ("design.pressure", pressure),
        ("design.temperature", temperature),
    )


def test_the_rating_is_a_check_with_both_reserves_while_it_holds() -> None:
    """ASME B16.5, group 1.1, Class 150: 13.8 bar at 200, 12.1 at 250, 10.2 at 300 °C."""
    evaluation = rated("12 bar(g)", "200 degC", "Class 150")
    pressure, warmth = (check(evaluation, f"flange_{key}") for key in ("pressure", "temperature"))
    assert pressure.holds
    assert warmth.holds
    assert pressure.reserve is not None
    assert warmth.reserve is not None
    assert pressure.reserve.at == pytest.approx(13.8e5)
    assert pressure.reserve.fraction == pytest.approx(0.15, abs=1e-3)
    assert warmth.reserve.at - 273.15 == pytest.approx(250.0 + 50.0 * 0.1 / 1.9, abs=0.1)


def test_a_rating_that_does_not_hold_flips_below() -> None:
    """The same table: 14 bar(g) is allowed up to 195 °C (15.8 bar at 150 °C)."""
    evaluation = rated("14 bar(g)", "220 degC", "Class 150")
    warmth = check(evaluation, "flange_temperature")
    assert not warmth.holds
    assert warmth.high is not None
    assert warmth.high - 273.15 == pytest.approx(195.0, abs=0.1)
    assert "rating-exceeded" in {item.code for item in evaluation.findings}


@pytest.mark.parametrize(
    ("pressure", "temperature"), [("13.7 bar(g)", "200 degC"), ("12 bar(g)", "252 degC")]
)
def test_the_verdict_flips_at_the_reserve_and_not_before(pressure: str, temperature: str) -> None:
    assert check(rated(pressure, temperature, "Class 150"), "flange_pressure").holds
    higher = {"13.7 bar(g)": "13.9 bar(g)"}.get(pressure, pressure)
    warmer = {"252 degC": "253 degC"}.get(temperature, temperature)
    codes = {item.code for item in rated(higher, warmer, "Class 150").findings}
    assert "rating-exceeded" in codes


def test_steam_condenses_where_the_release_says() -> None:
    """IAPWS-IF97, general library: saturation at 8.013 bar(a) and at 185 °C."""
    evaluation = evaluate(service("steam", "vortex"))
    warmth, pressure = check(evaluation, "saturation_margin"), check(evaluation, "vapour_pressure")
    assert warmth.reserve is not None
    assert pressure.reserve is not None
    saturated = iapws.iapws97._TSat_P(0.801325)
    assert (warmth.reserve.driver, pressure.reserve.driver) == ("temperature", "pressure")
    assert warmth.reserve.at == pytest.approx(saturated, abs=0.02)
    assert pressure.reserve.at == pytest.approx(1e6 * iapws.iapws97._PSat_T(458.15), rel=1e-4)


def test_water_flashes_at_its_vapour_pressure() -> None:
    evaluation = evaluate(service("boiling water", "ultrasonic_transit"))
    found = check(evaluation, "vapour_pressure")
    assert found.holds
    assert found.reserve is not None
    assert found.reserve.at == pytest.approx(1e6 * iapws.iapws97._PSat_T(406.65), rel=1e-4)
    assert found.reserve.fraction == pytest.approx(found.reserve.at / 3.02e5 - 1.0)
    near = next(item for item in evaluation.findings if item.code == "near-boiling")
    assert near.reserve == found.reserve


def test_steam_that_has_condensed_at_one_point_breaks_its_margins_there() -> None:
    """IAPWS-IF97, general library: saturation at 8.013 bar(a) and at 165 °C."""
    evaluation = supposed("steam", "vortex", ("points.minimum.temperature", "165 degC"))
    warmth, pressure = check(evaluation, "saturation_margin"), check(evaluation, "vapour_pressure")
    assert (warmth.point, warmth.holds) == ("minimum", False)
    assert (pressure.point, pressure.holds) == ("minimum", False)
    assert warmth.reserve is not None
    assert pressure.reserve is not None
    saturated = iapws.iapws97._TSat_P(0.801325)
    assert warmth.reserve.at == pytest.approx(saturated, abs=0.02)
    assert warmth.value == pytest.approx(438.15 - saturated, abs=0.02)
    assert pressure.reserve.at == pytest.approx(1e6 * iapws.iapws97._PSat_T(438.15), rel=1e-4)
    (said,) = (item for item in evaluation.findings if item.code == "phase-disagrees")
    assert said.reserve is not None
    assert said.reserve.at == warmth.reserve.at
    assert said.reserve.fraction == pytest.approx(warmth.reserve.fraction)


def test_water_that_boils_at_one_point_breaks_its_margins_there() -> None:
    """IAPWS-IF97, general library: saturation at 3.02 bar(a) and at 140 °C."""
    change = ("points.maximum.temperature", "140 degC")
    evaluation = supposed("boiling water", "ultrasonic_transit", change)
    warmth, pressure = check(evaluation, "saturation_margin"), check(evaluation, "vapour_pressure")
    assert (warmth.point, warmth.holds) == ("maximum", False)
    assert warmth.reserve is not None
    assert warmth.reserve.at == pytest.approx(iapws.iapws97._TSat_P(0.302), abs=0.02)
    assert warmth.reserve.fraction < 0.0
    (said,) = (item for item in evaluation.findings if item.code == "flashing")
    assert said.reserve == pressure.reserve
    assert not pressure.holds


def test_humid_air_below_its_dew_point_breaks_its_margin() -> None:
    """Air with a water dew point of 3 °C, as stated, that is 1 °C warm at one point."""
    evaluation = supposed(
        "compressed air",
        "vortex",
        ("fluid.kind", "humid_air"),
        ("fluid.water_dew_point", "3 degC"),
        ("points.minimum.temperature", "1 degC"),
    )
    warmth = check(evaluation, "saturation_margin")
    assert (warmth.point, warmth.holds) == ("minimum", False)
    assert warmth.reserve is not None
    assert warmth.reserve.at - 273.15 == pytest.approx(3.0, abs=0.2)
    assert warmth.value == pytest.approx(-2.0, abs=0.2)


def test_a_design_beyond_the_family_is_named() -> None:
    """Axial turbine: usual up to 423 K (common practice, its profile)."""
    evaluation = supposed("water", "turbine_axial", ("design.temperature", "180 degC"))
    found = next(i for i in evaluation.findings if i.code == "design-temperature-limit")
    assert (found.level, found.field) == (Level.CAUTION, "design.temperature")
    assert found.reserve is not None
    assert found.reserve.at == pytest.approx(423.0)
    assert "180 degC" in found.message


def test_a_margin_to_saturation_flips_with_the_temperature() -> None:
    """Thermal meter: 10 K above saturation (common practice, its profile); the air is dry."""
    found = check(evaluate(service("compressed air", "thermal_inline")), "saturation_margin")
    assert found.reserve is not None
    assert found.reserve.driver == "temperature"
    assert found.reserve.at == pytest.approx(298.15 * (1.0 + found.reserve.fraction))
    assert found.reserve.at < 298.15


@pytest.mark.parametrize(
    ("name", "family"), [("steam", "vortex"), ("fuel oil", "coriolis"), ("water", "magnetic")]
)
def test_every_limit_that_is_broken_carries_its_reserve(name: str, family: str) -> None:
    """A limit broken by less than a hundredfold says at which flow or state it flips."""
    for share in ("0.4 t/h", "90 t/h"):
        evaluation = supposed(
            name, family, *((f"points.{point}.flow", share) for point in ("minimum", "maximum"))
        )
        broken = {item.key for item in evaluation.checks if not item.holds and item.reserve is None}
        assert not broken
