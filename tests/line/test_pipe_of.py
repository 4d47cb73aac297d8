"""The pipe of a tag: every way of stating it, and what is said when it is stated badly."""

import math

import pytest
from line_tags import line_tag

from specsheet.findings import Level, Origin
from specsheet.line import pipe_of
from specsheet.line.material import find_material, materials


def _codes(result):
    return [finding.code for finding in result.findings]


def test_size_and_schedule():
    result = pipe_of(line_tag())
    assert result.pipe.inside_diameter == pytest.approx(0.15408)  # ASME B36.10M
    assert result.pipe.wall == pytest.approx(0.00711)
    assert result.pipe.nominal == 150
    assert result.pipe.size == "DN 150"
    assert result.pipe.material == "carbon steel"
    assert result.values["inside_diameter"].origin is Origin.DERIVED
    assert "B36.10M" in result.values["inside_diameter"].source
    assert _codes(result) == []


@pytest.mark.parametrize("size", ["DN 150", "NPS 6"])
def test_both_names_of_a_size(size):
    result = pipe_of(line_tag(line=f'size = "{size}"\nschedule = "sch 80"'))
    assert result.pipe.inside_diameter == pytest.approx(0.1683 - 2 * 0.01097)


def test_a_schedule_nobody_typed_is_assumed_and_said():
    result = pipe_of(line_tag(line='size = "DN 200"'))
    assert result.values["inside_diameter"].origin is Origin.ASSUMED
    assert result.pipe.inside_diameter == pytest.approx(0.2191 - 2 * 0.00818)
    assert "schedule-assumed" in _codes(result)


def test_a_given_inside_diameter_wins():
    result = pipe_of(line_tag(line='inside_diameter = "154.1 mm"'))
    assert result.pipe.inside_diameter == pytest.approx(0.1541)
    assert result.values["inside_diameter"].origin is Origin.GIVEN
    assert math.isnan(result.pipe.wall)
    assert result.pipe.nominal == 0


@pytest.mark.parametrize(
    ("inside", "expected"), [("154.5 mm", []), ("150 mm", ["inside-diameter-disagrees"])]
)
def test_a_given_inside_diameter_is_cross_checked(inside, expected):
    line = f'size = "DN 150"\nschedule = "40"\ninside_diameter = "{inside}"'
    result = pipe_of(line_tag(line=line))
    assert _codes(result) == expected
    assert result.values["inside_diameter"].origin is Origin.GIVEN


def test_outside_and_inside_diameter_give_the_wall():
    result = pipe_of(line_tag(line='outside_diameter = "168.3 mm"\ninside_diameter = "150 mm"'))
    assert result.pipe.wall == pytest.approx(0.00915)


def test_outside_diameter_with_a_wall():
    result = pipe_of(line_tag(line='outside_diameter = "168.3 mm"\nschedule = "8.8 mm"'))
    assert result.pipe.inside_diameter == pytest.approx(0.1507)
    assert result.values["outside_diameter"].origin is Origin.GIVEN


def test_a_listed_size_with_a_wall_of_its_own():
    result = pipe_of(line_tag(line='size = "DN 150"\nschedule = "8.8 mm"'))
    assert result.pipe.inside_diameter == pytest.approx(0.1507)


@pytest.mark.parametrize(
    ("line", "code", "words"),
    [
        ('material = "carbon steel"', "line-size-missing", "line.size"),
        ('size = "DN 150"\nschedule = "55"', "schedule-unlisted", "40, STD"),
        ('size = "DN 150"\nschedule = "99 mm"', "wall-wrong", "no bore"),
        ('size = "DN 2000"', "line-size-unlisted", "inside diameter"),
        ('outside_diameter = "168.3 mm"\nschedule = "40"', "wall-missing", "wall thickness"),
        (
            'outside_diameter = "100 mm"\ninside_diameter = "150 mm"',
            "outside-diameter-wrong",
            "100",
        ),
        ('inside_diameter = "0 mm"', "inside-diameter-wrong", "more than zero"),
        ('size = "DN 15"\nschedule = "40"\nlining = "rubber 9 mm"', "lining-too-thick", "no bore"),
    ],
)
def test_what_cannot_be_used_stops(line, code, words):
    result = pipe_of(line_tag(line=line))
    assert result.pipe is None
    assert "inside_diameter" not in result.values
    (finding,) = [item for item in result.findings if item.level is Level.STOP]
    assert finding.code == code
    assert words in finding.message


def test_a_lining_takes_its_thickness_off():
    line = 'size = "DN 150"\nschedule = "40"\nlining = "hard rubber 4 mm"'
    result = pipe_of(line_tag(line=line))
    assert result.pipe.inside_diameter == pytest.approx(0.15408 - 0.008)
    assert "less two linings" in result.values["inside_diameter"].source
    assert math.isnan(result.pipe.roughness)  # of the lining, not of the steel


def test_a_lining_without_thickness_is_said():
    line = 'size = "DN 150"\nschedule = "40"\nlining = "cement"'
    result = pipe_of(line_tag(line=line))
    assert result.pipe.inside_diameter == pytest.approx(0.15408)
    assert _codes(result) == ["lining-thickness-missing"]


@pytest.mark.parametrize(
    ("size", "said"), [("DN 65", True), ("DN 125", True), ("DN 150", False), ("NPS 2 1/2", False)]
)
def test_some_dn_are_two_pipes(size, said):
    """73.0 and 141.3 mm by ASME B36.10M, 76.1 and 139.7 mm by EN 10220 (from memory)."""
    result = pipe_of(line_tag(line=f'size = "{size}"\nschedule = "40"'))
    assert ("two-series" in _codes(result)) is said


@pytest.mark.parametrize(
    ("material", "celsius", "coefficient"),
    [
        # EN 10088-1, 1.4301: 16.0 to 100, 16.5 to 200, 17.0 to 300 degC
        ("stainless steel 304", 100, 16.0e-6), ("stainless steel 304", 200, 16.5e-6),
        ("stainless steel 304", 250, 16.75e-6), ("1.4301", 300, 17.0e-6), ("F304", -20, 16.0e-6),
        # ASME BPVC II-D, TE-1 (from memory)
        ("carbon steel", 20, 12.1e-6), ("A106 Gr. B", 300, 13.3e-6),
    ],
)  # fmt: skip
def test_expansion_at_the_temperature_of_the_point(material, celsius, coefficient):
    point = f'pressure = "7 bar(g)"\ntemperature = "{celsius} degC"'
    line = f'size = "DN 150"\nschedule = "40"\nmaterial = "{material}"'
    result = pipe_of(line_tag(line=line, point=point))
    assert result.pipe.expansion == pytest.approx(coefficient)
    assert result.values["pipe_expansion"].origin is Origin.DERIVED
    assert result.values["pipe_expansion"].source


def test_expansion_beyond_the_table_is_said():
    line = 'size = "DN 150"\nschedule = "40"\nmaterial = "pvc"'
    result = pipe_of(line_tag(line=line, point='pressure = "2 bar(g)"\ntemperature = "130 degC"'))
    assert "expansion-out-of-table" in _codes(result)


def test_an_unknown_material_is_said_and_nothing_about_it_invented():
    line = 'size = "DN 150"\nschedule = "40"\nmaterial = "unobtainium"'
    result = pipe_of(line_tag(line=line))
    assert _codes(result) == ["material-unknown"]
    assert result.values["pipe_expansion"].origin is Origin.ASSUMED
    assert "roughness" not in result.values
    assert math.isnan(result.pipe.roughness)


def test_a_given_roughness_wins_over_the_typical_one():
    line = 'size = "DN 150"\nschedule = "40"\n'
    typical = pipe_of(line_tag(line=line)).values["roughness"]
    assert typical.origin is Origin.TYPICAL
    assert 0.05e-3 <= typical.value <= 0.10e-3  # ISO 5167-1 table B.1, new steel (from memory)
    given = pipe_of(line_tag(line=line + 'roughness = "0.2 mm"'))
    assert given.pipe.roughness == pytest.approx(0.2e-3)
    assert given.values["roughness"].origin is Origin.GIVEN


@pytest.mark.parametrize(
    ("text", "name"),
    [
        ("stainless steel 316L, dual certified", "stainless steel 316L"),
        ("SS 316", "stainless steel 316"), ("ASTM A105", "carbon steel"),
        ("Super Duplex", "super duplex stainless steel"), ("duplex 2205", "duplex stainless steel"),
        ("galvanised steel", "galvanised steel"), ("alloy steel", "chromium-molybdenum steel"),
        ("Alloy 625", "nickel alloy 625"), ("PVC-U", "polyvinyl chloride"),
        ("stainless steel", "stainless steel 304"), ("A216 WCC", "carbon-manganese steel WCC"),
    ],
)  # fmt: skip
def test_names_of_materials(text, name):
    assert find_material(text).name == name


def test_every_material_names_its_sources():
    for material in materials():
        assert material.expansion_source
        assert material.roughness_source
        assert len(material.coefficients) <= len(material.temperatures)
        assert list(material.coefficients) == sorted(material.coefficients)
        assert 5e-6 < material.coefficients[0] < 2.5e-4
