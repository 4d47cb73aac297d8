"""The rating of a tag: proposed, checked, and what is said where it does not hold."""

import pytest
from line_tags import line_tag

from specsheet.findings import Level, Origin
from specsheet.line.rating import rate

DESIGN = 'pressure = "12 bar(g)"\ntemperature = "220 degC"'
LINE = 'size = "DN 150"\nschedule = "40"\nmaterial = "{}"'


def _codes(result, level=None):
    return [item.code for item in result.findings if level is None or item.level is level]


def _rated(design=DESIGN, require="", material="carbon steel", line="", nominal=150, **parts):
    text = LINE.format(material) + f"\n{line}"
    return rate(line_tag(line=text, design=design, require=require, **parts), nominal=nominal)


@pytest.mark.parametrize(
    ("material", "pressure", "celsius", "rating"),
    [
        # ASME B16.5-2009: group 1.1, Class 150 allows 13.1 bar at 220 degC, Class 300 allows 43.0
        ("carbon steel", 12.0, 220, "Class 150"),
        ("carbon steel", 13.2, 220, "Class 300"),
        ("carbon steel", 19.6, 38, "Class 150"),
        ("carbon steel", 19.7, 38, "Class 300"),
        ("stainless steel 316L", 11.0, 200, "Class 150"),
        ("stainless steel 316L", 11.5, 200, "Class 300"),
        ("stainless steel 316", 400.0, 50, "Class 2500"),
        ("carbon steel", 100.0, 425, "Class 1500"),
    ],
)
def test_the_lowest_class_that_holds_is_proposed(material, pressure, celsius, rating):
    design = f'pressure = "{pressure} bar(g)"\ntemperature = "{celsius} degC"'
    point = 'pressure = "2 bar(g)"\ntemperature = "30 degC"'
    result = _rated(design, material=material, point=point)
    assert result.values["flange_rating"].value == rating
    assert result.values["flange_rating"].origin is Origin.DERIVED
    assert result.values["allowable_pressure"].value >= pressure * 1e5
    assert _codes(result) == []


def test_the_allowable_pressure_at_design_temperature():
    """ASME B16.5-2009, table 2-1.1: 13.8 at 200, 12.1 at 250 degC: 13.12 at 220 degC."""
    found = _rated(require='rating = "Class 150"').values["allowable_pressure"]
    assert found.value == pytest.approx(13.12e5)
    assert "2-1.1" in found.source


def test_a_rating_that_does_not_hold_stops_with_its_margin():
    result = _rated('pressure = "15 bar(g)"\ntemperature = "220 degC"', 'rating = "Class 150"')
    (finding,) = [item for item in result.findings if item.code == "rating-exceeded"]
    assert finding.level is Level.STOP
    assert finding.reserve.fraction == pytest.approx(13.12 / 15 - 1)
    assert result.values["flange_rating"].origin is Origin.GIVEN


def test_an_operating_point_is_checked_too():
    point = 'pressure = "14 bar(g)"\ntemperature = "240 degC"'
    result = _rated("", 'rating = "Class 150"', point=point)
    (finding,) = [item for item in result.findings if item.code == "rating-exceeded"]
    assert finding.point == "normal"
    assert finding.field == "points.normal.pressure"


def test_an_absolute_design_pressure_loses_the_atmosphere():
    """14.13 bar(a) is 13.117 bar(g), just below the 13.12 bar(g) of Class 150 at 220 degC."""
    holds = _rated('pressure = "14.13 bar(a)"\ntemperature = "220 degC"', 'rating = "Class 150"')
    assert "rating-exceeded" not in _codes(holds)
    fails = _rated('pressure = "14.14 bar(a)"\ntemperature = "220 degC"', 'rating = "Class 150"')
    assert "rating-exceeded" in _codes(fails)


@pytest.mark.parametrize(
    ("design", "point", "code"),
    [
        ('pressure = "6 bar(g)"\ntemperature = "220 degC"', "", "operating-above-design-pressure"),
        (
            'pressure = "12 bar(g)"\ntemperature = "50 degC"',
            "",
            "operating-above-design-temperature",
        ),
        (
            DESIGN + '\nminimum_temperature = "-10 degC"',
            'pressure = "7 bar(g)"\ntemperature = "-20 degC"',
            "operating-below-design-temperature",
        ),
    ],
)
def test_operating_beyond_design_stops(design, point, code):
    result = _rated(design, **({"point": point} if point else {}))
    assert code in _codes(result, Level.STOP)


def test_a_missing_design_is_said_and_the_points_stand_in():
    result = _rated("")
    assert "design-pressure-missing" in _codes(result)
    assert "design-temperature-missing" in _codes(result)
    assert result.values["flange_rating"].value == "Class 150"


def test_the_rating_of_the_line_is_taken_over():
    result = _rated(line='rating = "PN 40"')
    assert result.values["flange_rating"].value == "PN 40"
    assert result.values["flange_rating"].source == "line.rating"


def test_two_ratings_do_not_mate():
    result = _rated(require='rating = "Class 300"', line='rating = "Class 150"')
    assert "rating-mismatch" in _codes(result)


def test_a_rating_nobody_knows_is_said():
    result = _rated(require='rating = "heavy"')
    assert "rating-unknown" in _codes(result)
    assert result.values == {}


def test_above_the_end_of_the_standard_stops():
    design = 'pressure = "5 bar(g)"\ntemperature = "545 degC"'
    result = _rated(
        design, 'rating = "Class 300"', point='pressure = "2 bar(g)"\ntemperature = "30 degC"'
    )
    assert "rating-temperature" in _codes(result, Level.STOP)
    assert "allowable_pressure" not in result.values


def test_above_the_end_of_our_table_cautions():
    design = 'pressure = "5 bar(g)"\ntemperature = "500 degC"'
    result = _rated(design, 'rating = "Class 300"', "stainless steel 316")
    assert "rating-not-known" in _codes(result, Level.CAUTION)


def test_no_class_for_a_material_without_table():
    result = _rated(material="titanium")
    assert "rating-not-proposed" in _codes(result)
    assert result.values == {}


def test_the_body_material_decides_before_the_line():
    design = 'pressure = "11.5 bar(g)"\ntemperature = "200 degC"'
    assert _rated(design).values["flange_rating"].value == "Class 150"
    other = _rated(design, 'body_material = "stainless steel 316L"')
    assert other.values["flange_rating"].value == "Class 300"
    assert "stainless steel 316L" in other.notes[0]


@pytest.mark.parametrize(
    ("rating", "nominal", "said"),
    [
        ("Class 150", 600, False),
        ("Class 150", 650, True),
        ("Class 2500", 300, False),
        ("Class 2500", 350, True),
        ("PN 16", 700, False),
    ],
)
def test_sizes_beyond_the_standard(rating, nominal, said):
    """ASME B16.5 covers NPS 24 and less; Class 2500 to NPS 12 (from memory)."""
    result = _rated(
        'pressure = "5 bar(g)"\ntemperature = "60 degC"',
        f'rating = "{rating}"',
        nominal=nominal,
        point='pressure = "2 bar(g)"\ntemperature = "30 degC"',
    )
    assert ("rating-size" in _codes(result)) is said


@pytest.mark.parametrize(
    ("material", "level"), [("carbon steel", Level.CAUTION), ("stainless steel 316", Level.NOTE)]
)
def test_cold_service(material, level):
    design = DESIGN + '\nminimum_temperature = "-46 degC"'
    assert "rating-cold" in _codes(_rated(design, material=material), level)


@pytest.mark.parametrize(
    ("test", "code"),
    [("30 bar(g)", None), ("31 bar(g)", "test-pressure-high"), ("11 bar(g)", "test-pressure-low")],
)
def test_test_pressure(test, code):
    """Class 150, group 1.1: 1.5 times 19.6 bar is 29.4, rounded up to 30 bar(g)."""
    result = _rated(DESIGN + f'\ntest_pressure = "{test}"', 'rating = "Class 150"')
    assert _codes(result) == ([code] if code else [])


@pytest.mark.parametrize(
    ("design", "require", "words"),
    [
        (DESIGN + '\nminimum_pressure = "0 bar(a)"', "", "Vacuum"),
        (DESIGN, 'end_connection = "hygienic"', "flange rating does not apply"),
        (DESIGN, "", "Bolting"),
        (DESIGN, "", "30 bar(g), 1.5 times"),
        ('pressure = "12 bar(g)"\ntemperature = "410 degC"', "", "425 °C"),
    ],
)
def test_what_the_rating_does_not_cover_is_noted(design, require, words):
    assert any(words in note for note in _rated(design, require).notes)


def test_tough_metal_keeps_its_rating_in_the_cold():
    """ASME B16.5: below -29 degC no greater than there (from memory); 15.9 bar(g) for group 2.3."""
    point = 'pressure = "8 bar(g)"\ntemperature = "-150 degC"'
    design = 'pressure = "15 bar(g)"\ntemperature = "40 degC"'
    result = _rated(design, material="stainless steel 316L", point=point)
    assert result.values["flange_rating"].value == "Class 150"
    assert _codes(result) == ["rating-cold"]
    assert result.findings[0].level is Level.NOTE
    brittle = _rated(design, material="carbon steel", point=point)
    assert "rating-not-proposed" in _codes(brittle)
