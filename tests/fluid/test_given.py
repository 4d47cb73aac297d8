"""Stated values win and are cross-checked; a fluid can be stated altogether."""

from __future__ import annotations

from pathlib import Path

import pytest
from fluid_tags import HEAD, codes, finding, point, stops, tag

from specsheet import fluid, tagfile
from specsheet.findings import Level, Origin
from specsheet.tag import Tag

WATER = 'kind = "substance"\nsubstance = "water"\nphase = "liquid"'
METHANE = 'kind = "substance"\nsubstance = "methane"\nphase = "gas"'


def test_a_density_off_the_computed_one_wins_with_a_caution() -> None:
    result = fluid.derive(tag(WATER, point("7 bar(g)", "85 degC", density="1046.4 kg/m3")))
    said = finding(result, "density-given-differs")
    assert said.level is Level.CAUTION
    assert said.field == "points.normal.density"
    assert "1046 kg/m3" in said.message
    assert "968.9 kg/m3" in said.message
    assert "7.99 % above" in said.message
    state = result.points[0]
    assert state is not None
    assert state.properties["density"].value == pytest.approx(1046.4)
    assert state.properties["density"].origin is Origin.GIVEN


def test_a_density_that_agrees_says_nothing() -> None:
    result = fluid.derive(tag(WATER, point("7 bar(g)", "85 degC", density="969 kg/m3")))
    assert codes(result) == []


def test_kinematic_viscosity_is_turned_with_the_density_that_counts() -> None:
    result = fluid.derive(
        tag(WATER, point("7 bar(g)", "85 degC", density="960 kg/m3", viscosity="0.35 mm2/s"))
    )
    state = result.points[0]
    assert state is not None
    assert state.value("viscosity") == pytest.approx(0.35e-6 * 960)
    assert state.value("kinematic_viscosity") == pytest.approx(0.35e-6)


def test_density_and_compressibility_of_a_gas_stay_of_one_mind() -> None:
    by_density = fluid.derive(tag(METHANE, point("19 bar(g)", "20 degC", density="14 kg/m3")))
    state = by_density.points[0]
    assert state is not None
    expected = state.pressure * 0.0160428 / (14.0 * 8.314462618 * 293.15)
    assert state.value("compressibility") == pytest.approx(expected, rel=1e-4)
    by_factor = fluid.derive(tag(METHANE, point("19 bar(g)", "20 degC", compressibility="0.95")))
    other = by_factor.points[0]
    assert other is not None
    assert other.value("density") == pytest.approx(
        other.pressure * 0.0160428 / (0.95 * 8.314462618 * 293.15), rel=1e-4
    )


@pytest.mark.parametrize("density", ["0 kg/m3", "-3 kg/m3"])
def test_a_value_that_cannot_be_is_not_used(density: str) -> None:
    reading = tagfile.loads(
        f"{HEAD}[fluid]\n{WATER}\n{point('7 bar(g)', '85 degC', density=density)}"
    )
    if reading.tag is None or reading.tag.points[0].quantity("density") is None:
        return  # refused on reading already
    result = fluid.derive(reading.tag)
    assert finding(result, "given-unusable").field == "points.normal.density"
    assert result.points[0] is not None
    assert result.points[0].value("density") == pytest.approx(968.9, abs=0.1)


def test_a_stated_vapour_pressure_above_the_pressure_flashes() -> None:
    text = 'kind = "petroleum"\nproduct = "crude"\ndensity_15 = "850 kg/m3"\nphase = "liquid"'
    result = fluid.derive(tag(text, point("0 bar(g)", "40 degC", vapour_pressure="1.3 bar(a)")))
    assert "flashing" in stops(result)
    assert "vapour-pressure-missing" not in codes(result)


def test_stated_base_density_and_calorific_value() -> None:
    text = METHANE + '\nbase_density = "0.70 kg/m3"\ngross_calorific_value = "38 MJ/m3"'
    result = fluid.derive(tag(text, point("1 bar(g)", "20 degC", flow="100 Nm3/h")))
    own, normal = result.bases.values()
    assert own.value("density") == 0.70
    assert normal.value("density") == pytest.approx(0.70 * 288.15 / 273.15)
    assert "base-density-given-differs" in codes(result)
    assert result.constants["gross_calorific_value"].origin is Origin.GIVEN
    assert result.constants["gross_calorific_value_mass"].value == pytest.approx(38e6 / 0.70)
    # the energy of a stream is the same by either base
    assert normal.value("gross_calorific_value") == pytest.approx(38e6 * 288.15 / 273.15)


GIVEN = 'kind = "given"\nphase = "liquid"'


def test_a_liquid_stated_at_points_is_interpolated_between_them_only() -> None:
    result = fluid.derive(
        tag(
            GIVEN,
            point("5 bar(g)", "10 degC", "minimum", density="900 kg/m3", viscosity="8 mPa s"),
            point("5 bar(g)", "40 degC", "maximum", density="880 kg/m3", viscosity="2 mPa s"),
            point("5 bar(g)", "25 degC"),
            point("5 bar(g)", "60 degC", "hot"),
        )
    )
    between, beyond = result.points[2], result.points[3]
    assert between is not None
    assert between.value("density") == pytest.approx(890.0)
    # ln mu straight over 1/T: by hand
    share = (1 / 283.15 - 1 / 298.15) / (1 / 283.15 - 1 / 313.15)
    assert between.value("viscosity") == pytest.approx(8e-3 * 0.25**share)
    assert between.properties["density"].origin is Origin.DERIVED
    assert beyond is not None
    assert beyond.value("density") is None
    assert beyond.value("viscosity") is None


def test_a_gas_stated_by_molar_mass_and_compressibility() -> None:
    text = 'kind = "given"\nphase = "gas"\nmolar_mass = "28 g/mol"'
    result = fluid.derive(
        tag(text, point("9 bar(g)", "20 degC", compressibility="0.99", viscosity="0.018 mPa s"))
    )
    state = result.points[0]
    assert state is not None
    assert state.value("density") == pytest.approx(
        1001325 * 0.028 / (0.99 * 8.314462618 * 293.15), rel=1e-6
    )
    assert "base-ideal" in codes(result)


FILE = """
name = "thermal oil"
names = ["heat transfer oil"]
source = "data sheet of the oil, 2031"
density = [["20 degC", "872 kg/m3"], ["200 degC", "748 kg/m3"]]
viscosity = [["20 degC", "80 mm2/s"], ["200 degC", "1.2 mm2/s"]]
vapour_pressure = [["100 degC", "0.3 mbar(a)"], ["200 degC", "20 mbar(a)"]]
"""


def own(folder: Path, text: str, temperature: str) -> Tag:
    (folder / "fluids").mkdir(exist_ok=True)
    (folder / "fluids" / "oil.toml").write_text(text, encoding="utf-8")
    stated = tag(
        'kind = "substance"\nsubstance = "Heat-transfer oil"\nphase = "liquid"',
        point("3 bar(g)", temperature),
    )
    return Tag(stated.given, stated.assumed, stated.points, stated.revisions, "", str(folder))


def test_a_substance_of_the_job(tmp_path: Path) -> None:
    result = fluid.derive(own(tmp_path, FILE, "110 degC"))
    state = result.points[0]
    assert result.name == "thermal oil"
    assert state is not None
    assert state.value("density") == pytest.approx(810.0)
    assert 1.2e-6 < (state.value("kinematic_viscosity") or 0.0) < 80e-6
    assert 30.0 < (state.value("vapour_pressure") or 0.0) < 2000.0
    assert state.properties["density"].source == "data sheet of the oil, 2031"


def test_a_substance_of_the_job_is_not_extrapolated(tmp_path: Path) -> None:
    result = fluid.derive(own(tmp_path, FILE, "220 degC"))
    assert result.points == (None,)
    assert finding(result, "fluid-limit").field == "points.normal.temperature"


@pytest.mark.parametrize(
    ("text", "words"),
    [
        (FILE.replace("872 kg/m3", "872"), "density"),
        (FILE.replace('["20 degC", "872 kg/m3"], ', ""), "two rows"),
        (FILE.replace("density =", "density"), "cannot be read"),
        (FILE.replace("1.2 mm2/s", "1.2 mPa s"), "all be dynamic or all be kinematic"),
        (FILE.replace("872 kg/m3", "-872 kg/m3"), "density"),
    ],
)
def test_a_damaged_substance_file_is_a_finding(tmp_path: Path, text: str, words: str) -> None:
    damaged = own(tmp_path, text, "110 degC")
    if "cannot be read" in words:  # such a file can be known by its own name only
        (tmp_path / "fluids" / "oil.toml").rename(tmp_path / "fluids" / "heat_transfer_oil.toml")
    result = fluid.derive(damaged)
    said = finding(result, "substance-file")
    assert words in said.message
    assert said.level is Level.STOP


def test_an_edited_substance_file_is_read_again(tmp_path: Path) -> None:
    first = fluid.derive(own(tmp_path, FILE, "20 degC")).points[0]
    again = fluid.derive(own(tmp_path, FILE.replace("872", "900"), "20 degC")).points[0]
    assert first is not None
    assert again is not None
    assert (first.value("density"), again.value("density")) == (872.0, 900.0)


def test_stated_values_carry_a_point_beyond_the_data_of_the_fluid() -> None:
    text = 'kind = "solution"\nsolute = "NaOH"\nmass_fraction = "55 %"\nphase = "liquid"'
    bare = fluid.derive(tag(text, point("3 bar(g)", "60 degC")))
    told = fluid.derive(
        tag(text, point("3 bar(g)", "60 degC", density="1560 kg/m3", viscosity="25 mPa s"))
    )
    assert stops(bare) == ["concentration-limit"]
    assert stops(told) == []
    assert finding(told, "concentration-limit").level is Level.CAUTION
    assert told.points[0] is not None
    assert told.points[0].value("kinematic_viscosity") == pytest.approx(0.025 / 1560)


def test_frozen_is_frozen_whatever_is_stated() -> None:
    text = 'kind = "solution"\nsolute = "MEG"\nmass_fraction = "30 %"\nphase = "liquid"'
    result = fluid.derive(tag(text, point("3 bar(g)", "-25 degC", density="1050 kg/m3")))
    assert stops(result) == ["frozen"]


def test_a_missing_phase_is_asked_for() -> None:
    stated = tag(WATER, point("3 bar(g)", "60 degC"))
    without = {key: value for key, value in stated.given.items() if key != "fluid.phase"}
    result = fluid.derive(Tag(without, stated.assumed, stated.points))
    assert stops(result) == ["phase-missing"]


def test_polar_liquid_mixtures_are_not_trusted() -> None:
    text = 'kind = "mixture"\nphase = "liquid"\nmixture = { water = 0.7, ethanol = 0.3 }'
    result = fluid.derive(tag(text, point("3 bar(g)", "20 degC")))
    assert "liquid-mixture-polar" in codes(result)
    assert result.points[0] is not None
    assert "viscosity" not in result.points[0].properties
    # 0.3 by mole is 52.3 % by mass: 908 kg/m3 (OIML R 22, from memory)
    density = result.points[0].properties["density"]
    assert density.value == pytest.approx(908.0, rel=density.uncertainty)


def test_a_stated_calorific_value_draws_the_other_with_it() -> None:
    computed = fluid.derive(tag(METHANE, point("1 bar(g)", "20 degC"))).constants
    text = METHANE + '\ngross_calorific_value = "40 MJ/m3"'
    stated = fluid.derive(tag(text, point("1 bar(g)", "20 degC")))
    ratio = 40e6 / computed["gross_calorific_value"].value
    assert stated.constants["net_calorific_value"].value == pytest.approx(
        ratio * computed["net_calorific_value"].value
    )
    said = finding(stated, "calorific-value-given-differs")
    assert said.field == "fluid.gross_calorific_value"
    assert "40 MJ/m3" in said.message


def test_dryness_of_anything_but_steam_is_said_to_be_unused() -> None:
    result = fluid.derive(tag(METHANE, point("1 bar(g)", "20 degC", dryness_fraction="95 %")))
    assert finding(result, "dryness-unused").field == "points.normal.dryness_fraction"
