"""Orifice plates against ISO 5167-2:2003 and published work."""

import numpy as np
import pytest

from specsheet.methods import iso5167_1, iso5167_2

# ISO 5167-2:2003, equation (4): β, ReD, D [m], tappings, C (values of reference cases)
COEFFICIENTS = [
    (0.4, 100000.0, 0.2, "D and D/2", 0.601794),
    (0.5, 100000.0, 0.05, "D and D/2", 0.608471),
    (0.5, 100000.0, 0.2, "D and D/2", 0.606185),
    (0.5, 1000000.0, 0.2, "D and D/2", 0.603129),
    (0.6, 1000000.0, 0.2, "D and D/2", 0.60695),
    (0.6, 50000.0, 0.06, "D and D/2", 0.615424),
    (0.7, 1000000.0, 0.3, "D and D/2", 0.609495),
    (0.75, 10000000.0, 0.5, "D and D/2", 0.605578),
    (0.2, 100000.0, 0.1, "corner", 0.598127),
    (0.5, 10000.0, 0.2, "corner", 0.61858),
    (0.5, 100000.0, 0.2, "corner", 0.606873),
    (0.6, 1000000.0, 0.2, "corner", 0.605407),
    (0.6, 50000.0, 0.06, "corner", 0.614077),
    (0.7, 1000000.0, 0.3, "corner", 0.602295),
    (0.2, 100000.0, 0.1, "flange", 0.597601),
    (0.4, 100000.0, 0.2, "flange", 0.602418),
    (0.5, 10000.0, 0.2, "flange", 0.617855),
    (0.5, 1000000.0, 0.2, "flange", 0.603154),
    (0.7, 1000000.0, 0.3, "flange", 0.602535),
    (0.75, 10000000.0, 0.5, "flange", 0.592647),
]


@pytest.mark.parametrize(("ratio", "reynolds", "inside", "taps", "wanted"), COEFFICIENTS)
def test_discharge_coefficient(ratio, reynolds, inside, taps, wanted):
    found = iso5167_2.discharge_coefficient(
        diameter_ratio=ratio, reynolds_number=reynolds, inside_diameter=inside, taps=taps
    )
    assert found == pytest.approx(wanted, rel=5e-6)


# ISO 5167-2:2003, 5.3.2.2: β, p2/p1, κ, ε
EXPANSIBILITIES = [
    (0.2, 0.98, 1.4, 0.994965),
    (0.5, 0.9, 1.3, 0.971147),
    (0.5, 0.98, 1.3, 0.994285),
    (0.75, 0.8, 1.2, 0.910896),
]


@pytest.mark.parametrize(("ratio", "pressure_ratio", "exponent", "wanted"), EXPANSIBILITIES)
def test_expansibility(ratio, pressure_ratio, exponent, wanted):
    found = iso5167_2.expansibility(
        diameter_ratio=ratio,
        pressure_drop_ratio=1.0 - pressure_ratio,
        isentropic_exponent=exponent,
    )
    assert found == pytest.approx(wanted, rel=2e-6)


# ISO 5167-2:2003, 5.3.3.1: β, ReD, D [m], expanded uncertainty of C [%]
UNCERTAINTIES = [
    (0.15, 100000.0, 0.1, 0.55),
    (0.4, 100000.0, 0.1, 0.5),
    (0.6, 100000.0, 0.1, 0.5),
    (0.7, 1000000.0, 0.2, 0.6669),
    (0.75, 1000000.0, 0.2, 0.75025),
    (0.5, 100000.0, 0.05, 0.6870866142),
    (0.6, 8000.0, 0.1, 1.0),
]


@pytest.mark.parametrize(("ratio", "reynolds", "inside", "percent"), UNCERTAINTIES)
def test_uncertainty_of_coefficient(ratio, reynolds, inside, percent):
    found = iso5167_2.coefficient_uncertainty(
        diameter_ratio=ratio, reynolds_number=reynolds, inside_diameter=inside
    )
    assert found == pytest.approx(percent / 100.0, rel=1e-4)


def test_uncertainty_of_expansibility():
    """ISO 5167-2:2003, 5.3.3.2: 25 kPa at 10 bar, κ = 1.3 gives 0.0673 %."""
    found = iso5167_2.expansibility_uncertainty(pressure_drop_ratio=0.025, isentropic_exponent=1.3)
    assert found == pytest.approx(0.06730769231e-2, rel=1e-6)


@pytest.mark.parametrize(
    ("ratio", "coefficient", "wanted"),
    [(0.3, 0.6, 0.89728), (0.5, 0.605, 0.732594), (0.75, 0.6, 0.451455)],
)
def test_loss(ratio, coefficient, wanted):
    """ISO 5167-2:2003, 5.4.1, equation (7)."""
    found = iso5167_1.loss_ratio(discharge_coefficient=coefficient, diameter_ratio=ratio)
    assert found == pytest.approx(wanted, rel=2e-6)


def test_loss_coefficient():
    """ISO 5167-2:2003, 5.4: K = 30.02 for β = 0.5, C = 0.605."""
    found = iso5167_1.loss_coefficient(discharge_coefficient=0.605, diameter_ratio=0.5)
    assert found == pytest.approx(30.02229, rel=1e-5)


@pytest.mark.parametrize(
    ("ratio", "inside", "taps", "wanted"),
    [
        (0.5, 0.2, "corner", 5000.0),
        (0.7, 0.2, "corner", 16000.0 * 0.49),
        (0.7, 0.2, "D and D/2", 16000.0 * 0.49),
        (0.3, 0.1, "flange", 5000.0),
        (0.7, 0.2, "flange", 170.0 * 0.49 * 200.0),
    ],
)
def test_smallest_reynolds_number(ratio, inside, taps, wanted):
    """ISO 5167-2:2003, 5.3.1."""
    found = iso5167_2.smallest_reynolds_number(
        diameter_ratio=ratio, inside_diameter=inside, taps=taps
    )
    assert found == pytest.approx(wanted)


def test_coefficient_is_continuous_at_the_small_pipe():
    """The added term vanishes at D = 71.12 mm, so nothing jumps there."""
    ratio = np.linspace(0.1, 0.75, 14)
    below, above = (
        iso5167_2.discharge_coefficient(
            diameter_ratio=ratio, reynolds_number=1e5, inside_diameter=inside, taps="corner"
        )
        for inside in (iso5167_2.SMALL_PIPE - 1e-9, iso5167_2.SMALL_PIPE + 1e-9)
    )
    np.testing.assert_allclose(below, above, rtol=1e-8)


def test_roughness_table_at_its_nodes_and_between():
    """ISO 5167-2:2003, table 1 (from memory): β = 0.5 at ReD 1e6 allows Ra/D of 2.2e-4."""
    limit = iso5167_2.largest_roughness
    assert limit(diameter_ratio=0.5, reynolds_number=1e6) == pytest.approx(2.2e-4)
    assert limit(diameter_ratio=0.7, reynolds_number=1e8) == pytest.approx(0.3e-4)
    between = limit(diameter_ratio=0.55, reynolds_number=1e6)
    assert 1.0e-4 < between < 2.2e-4
    ratios = np.array([0.5, 0.55])
    assert limit(diameter_ratio=ratios, reynolds_number=1e6) == pytest.approx([2.2e-4, between])


@pytest.mark.parametrize("taps", ["corner", "flange", "D and D/2"])
def test_general_library_agrees(taps):
    """`fluids` as a second hand at the same equation, over the whole range."""
    flow_meter = pytest.importorskip("fluids.flow_meter")
    word = {"D and D/2": "D"}.get(taps, taps)
    for ratio in (0.12, 0.35, 0.56, 0.74):
        for reynolds in (6e3, 1e5, 1e7):
            for inside in (0.055, 0.15, 0.8):
                flow = reynolds * np.pi * inside * 1e-3 / 4.0
                wanted = flow_meter.C_Reader_Harris_Gallagher(
                    D=inside, Do=ratio * inside, rho=1000.0, mu=1e-3, m=flow, taps=word
                )
                found = iso5167_2.discharge_coefficient(
                    diameter_ratio=ratio,
                    reynolds_number=reynolds,
                    inside_diameter=inside,
                    taps=taps,
                )
                assert found == pytest.approx(wanted, rel=1e-7)
