"""Flange ratings against published figures."""

import pytest

from specsheet.line.flange import (
    CLASS,
    PN,
    Rating,
    allowed,
    classes,
    lowest_temperature,
    parse_rating,
    proposals,
    shell_test,
)
from specsheet.line.material import find_material
from specsheet.packs import table

GROUPS = {
    "1.1": "A105",
    "1.2": "A216 WCC",
    "2.1": "stainless steel 304",
    "2.2": "stainless steel 316",
    "2.3": "stainless steel 316L",
}

# group, class, temperature [K], allowable gauge pressure [Pa]
PUBLISHED = [
    # ASME B16.5-2009, tables 2-1.1, 2-2.1, 2-2.2, 2-2.3
    ("1.1", 150, 473.15, 1.380e6),
    ("1.1", 300, 373.15, 4.660e6),
    ("1.1", 600, 523.15, 8.390e6),
    ("2.1", 150, 423.15, 1.420e6),
    ("2.1", 150, 573.15, 1.020e6),
    ("2.2", 1500, 311.15, 24.82e6),
    ("2.2", 2500, 673.15, 24.53e6),
    ("2.2", 300, 473.15, 3.570e6),
    ("2.2", 600, 573.15, 6.320e6),
    ("2.3", 300, 473.15, 2.920e6),
    ("2.3", 600, 311.15, 8.270e6),
    ("2.3", 900, 573.15, 7.820e6),
    # ASME B16.5-2003, table F2-1.2: 730 psi at 300 degF
    ("1.2", 300, 422.0388889, 5033172.824),
    # ASME B16.5: linear between temperatures
    ("1.1", 150, 448.15, 1.480e6),
]


def _allowed(group, number, kelvin, system=CLASS):
    return allowed(Rating(system, float(number)), find_material(GROUPS[group]), kelvin)


@pytest.mark.parametrize(("group", "number", "kelvin", "pressure"), PUBLISHED)
def test_published_ratings(group, number, kelvin, pressure):
    found = _allowed(group, number, kelvin)
    assert found.pressure == pytest.approx(pressure, rel=1e-6)
    assert "ASME B16.5" in found.source


@pytest.mark.parametrize("group", ["1.1", "1.2", "2.1", "2.2", "2.3"])
def test_class_600_is_twice_class_300(group):
    """ASME B16.5: above Class 150 the pressure goes with the class, within rounding.

    It holds the classes of group 2.1 that are from memory to the printed rule as well.
    """
    rows = table("flanges_b165")["group"][group]["classes"]
    for number in (int(name) for name in rows):
        if number in (150, 400):
            continue
        for one, other in zip(rows["300"], rows[str(number)], strict=True):
            assert other / one == pytest.approx(number / 300, rel=0.012)


def test_figures_from_memory_say_so():
    assert "from memory" in _allowed("2.1", 300, 400.0).source
    assert "from memory" not in _allowed("2.1", 150, 400.0).source
    assert "from memory" in _allowed("1.1", 16, 400.0, PN).source


@pytest.mark.parametrize("number", [10, 16, 25, 40])
def test_pn_is_the_pressure_in_bar_at_room_temperature(number):
    """EN 1092-1 (from memory): PS at room temperature is PN in bar."""
    for group in ("1.1", "2.2", "2.3"):
        found = _allowed(group, number, 293.15, PN)
        assert found.pressure == pytest.approx(number * 1e5)


def test_pn_of_stainless_steel_is_not_known_when_hot():
    found = _allowed("2.3", 16, 423.15, PN)
    assert found.pressure is None
    assert not found.forbidden


@pytest.mark.parametrize(("celsius", "bar"), [(100, 14.8), (200, 13.3), (225, 12.7), (400, 9.5)])
def test_pn_16_of_carbon_steel(celsius, bar):
    """EN 1092-1, 3E0 (from memory)."""
    assert _allowed("1.1", 16, celsius + 273.15, PN).pressure == pytest.approx(bar * 1e5)


@pytest.mark.parametrize("group", list(GROUPS))
def test_the_pressure_never_rises_with_temperature(group):
    for number in classes():
        found = [_allowed(group, number, kelvin).pressure for kelvin in range(245, 830, 5)]
        known = [value for value in found if value is not None]
        assert known == sorted(known, reverse=True)
        if known:
            assert all(value is None for value in found[len(known) :])  # nothing beyond the table


@pytest.mark.parametrize(
    ("group", "celsius", "forbidden"),
    [("1.1", 538.5, True), ("2.3", 451, True), ("2.2", 451, False)],
)
def test_nothing_is_extrapolated(group, celsius, forbidden):
    found = _allowed(group, 300, celsius + 273.15)
    assert found.pressure is None
    assert found.forbidden is forbidden
    assert "ends at" in found.reason


def test_nothing_is_said_below_the_lowest_temperature():
    """ASME B16.5: the first row holds from -29 degC."""
    assert lowest_temperature(CLASS) == pytest.approx(244.15)
    assert _allowed("1.1", 150, 244.15).pressure == pytest.approx(19.6e5)
    assert _allowed("1.1", 150, 244.0).pressure is None


def test_materials_without_a_table():
    for name in ("duplex", "titanium", "PVC"):
        assert allowed(Rating(CLASS, 150.0), find_material(name), 300.0).pressure is None
    assert allowed(Rating(CLASS, 150.0), None, 300.0).pressure is None


@pytest.mark.parametrize(
    ("text", "rating"),
    [
        ("Class 150", Rating(CLASS, 150)),
        ("CL300", Rating(CLASS, 300)),
        ("600#", Rating(CLASS, 600)),
        ("class 900", Rating(CLASS, 900)),
        ("150 lb", Rating(CLASS, 150)),
        ("PN 16", Rating(PN, 16)),
        ("pn40", Rating(PN, 40)),
        ("PN 2.5", Rating(PN, 2.5)),
    ],
)
def test_names_of_ratings(text, rating):
    assert parse_rating(text) == rating


@pytest.mark.parametrize(
    "text", ["Class 160", "PN 15", "150", "16 bar", "", "ask the piping group"]
)
def test_what_is_no_rating(text):
    assert parse_rating(text) is None


def test_proposals_rise():
    assert [rating.number for rating in proposals()] == [150, 300, 600, 900, 1500, 2500]


@pytest.mark.parametrize(("number", "bar"), [(150, 30.0), (300, 77.0), (600, 154.0), (2500, 639.0)])
def test_shell_test(number, bar):
    """1.5 times the rating at 38 degC, up to the next bar (ASME B16.5-2009, 2.6; from memory)."""
    assert shell_test(Rating(CLASS, number), find_material("A105")) == pytest.approx(bar * 1e5)
    assert shell_test(Rating(PN, 16), find_material("A105")) is None
