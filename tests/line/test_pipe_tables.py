"""Pipe dimensions against published figures and an independent library."""

import pytest
from fluids import piping

from specsheet.line.dimensions import nominal_sizes, schedule_name, schedules, wall

DN = {
    0.125: 6, 0.25: 8, 0.375: 10, 0.5: 15, 0.75: 20, 1.0: 25, 1.25: 32, 1.5: 40, 2.0: 50, 2.5: 65,
    3.0: 80, 3.5: 90, 4.0: 100, 5.0: 125, 6.0: 150, 8.0: 200, 10.0: 250, 12.0: 300, 14.0: 350,
    16.0: 400, 18.0: 450, 20.0: 500, 22.0: 550, 24.0: 600, 26.0: 650, 28.0: 700, 30.0: 750,
    32.0: 800, 34.0: 850, 36.0: 900, 38.0: 950, 40.0: 1000, 42.0: 1050, 44.0: 1100, 46.0: 1150,
    48.0: 1200,
}  # fmt: skip

# ASME B36.10M, published pipe charts: NPS, schedule, outside diameter, wall, inside diameter [mm]
_PUBLISHED = """
0.75 160 26.7 5.56 15.58 | 0.75 40 26.7 2.87 20.96 | 0.75 80 26.7 3.91 18.88
1 160 33.4 6.35 20.7 | 1 40 33.4 3.38 26.64 | 1 80 33.4 4.55 24.3
1.5 160 48.3 7.14 34.02 | 1.5 40 48.3 3.68 40.94 | 10 160 273.0 28.58 215.84
12 160 323.8 33.32 257.16 | 12 20 323.8 6.35 311.1 | 12 40 323.8 10.31 303.18
14 10 355.6 6.35 342.9 | 14 40 355.6 11.13 333.34 | 16 10 406.4 6.35 393.7
16 40 406.4 12.7 381.0 | 2 160 60.3 8.74 42.82 | 2 40 60.3 3.91 52.48
2 80 60.3 5.54 49.22 | 20 40 508 15.09 477.82 | 20 80 508 26.19 455.62
24 20 610 9.53 590.94 | 24 80 610 30.96 548.08 | 3 40 88.9 5.49 77.92
4 120 114.3 11.13 92.04 | 4 160 114.3 13.49 87.32 | 4 40 114.3 6.02 102.26
4 80 114.3 8.56 97.18 | 6 120 168.3 14.27 139.76 | 6 160 168.3 18.26 131.78
8 100 219.1 15.09 188.92 | 8 120 219.1 18.26 182.58 | 8 140 219.1 20.62 177.86
8 160 219.1 23.01 173.08 | 8 20 219.1 6.35 206.4 | 8 30 219.1 7.04 205.02
8 40 219.1 8.18 202.74 | 8 80 219.1 12.7 193.7
"""
PUBLISHED = [
    (float(nps), schedule, float(outside), float(thickness), float(inside))
    for row in _PUBLISHED.strip().replace("|", "\n").splitlines()
    for nps, schedule, outside, thickness, inside in [row.split()]
]

# ASME B36.19M (figures from memory, confirmed by the library below): NPS, 10S, 5S [mm]
STAINLESS = [
    (0.5, 2.11, 1.65),
    (1, 2.77, 1.65),
    (4, 3.05, 2.11),
    (6, 3.40, 2.77),
    (8, 3.76, 2.77),
    (12, 4.57, 3.96),
]

SCHEDULES = ("5", "10", "20", "30", "40", "60", "80", "100", "120", "140", "160")
SCHEDULES += ("STD", "XS", "XXS", "5S", "10S", "40S", "80S")
LIBRARY = [
    (nps, schedule, outside, thickness)
    for schedule in (SCHEDULES)
    for nps, _, outside, thickness in zip(*piping.schedule_lookup[schedule], strict=True)
]


@pytest.mark.parametrize(("nps", "schedule", "outside", "thickness", "inside"), PUBLISHED)
def test_published_walls(nps, schedule, outside, thickness, inside):
    found = wall(DN[nps], schedule)
    assert found is not None
    assert found.outside * 1000 == pytest.approx(outside, rel=1e-9)
    assert found.thickness * 1000 == pytest.approx(thickness, rel=1e-9)
    assert found.inside * 1000 == pytest.approx(inside, rel=1e-9)
    assert found.source == "ASME B36.10M-2004"


@pytest.mark.parametrize(("nps", "ten", "five"), STAINLESS)
def test_published_stainless_walls(nps, ten, five):
    assert wall(DN[nps], "10S").thickness * 1000 == pytest.approx(ten, rel=1e-9)
    assert wall(DN[nps], "5S").thickness * 1000 == pytest.approx(five, rel=1e-9)
    assert wall(DN[nps], "5S").source == "ASME B36.19M-2004"


def test_the_whole_table_agrees_with_an_independent_library():
    """``fluids.piping``: every schedule of both standards, nothing missing, nothing more."""
    assert len(LIBRARY) > 330
    for nps, schedule, outside, thickness in LIBRARY:
        found = wall(DN[nps], schedule)
        assert found is not None, (nps, schedule)
        assert found.outside * 1000 == pytest.approx(outside, abs=1e-6), (nps, schedule)
        assert found.thickness * 1000 == pytest.approx(thickness, abs=1e-6), (nps, schedule)
    ours = {(dn, name) for dn in nominal_sizes() for name in schedules(dn)}
    assert ours == {(DN[nps], schedule) for nps, schedule, _, _ in LIBRARY}


@pytest.mark.parametrize("text", ["40", "SCH 40", "sch.40", "Schedule 40", "S40", " 40 "])
def test_spellings_of_a_schedule(text):
    assert schedule_name(text) == "40"


@pytest.mark.parametrize(
    ("text", "name"), [("sch 40s", "40S"), ("std", "STD"), ("XH", "XS"), ("Xxs", "XXS")]
)
def test_other_spellings(text, name):
    assert schedule_name(text) == name


def test_the_two_standards_print_different_outside_diameters():
    """ASME B36.19M prints 273.1 and 323.9 mm, B36.10M 273.0 and 323.8 mm."""
    assert wall(250, "40").outside == pytest.approx(0.2730)
    assert wall(250, "40S").outside == pytest.approx(0.2731)
    assert wall(300, "STD").outside == pytest.approx(0.3238)
    assert wall(300, "40S").outside == pytest.approx(0.3239)


def test_schedules_are_listed_by_rising_wall():
    walls = [wall(200, name).thickness for name in schedules(200)]
    assert walls == sorted(walls)
    assert schedules(77) == ()
    assert wall(77, "40") is None
    assert wall(150, "55") is None
