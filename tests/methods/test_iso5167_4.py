"""Classical Venturi tubes against ISO 5167-4:2003, and the plate as a piece of steel."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import iso5167_4, orifice_plate


@pytest.mark.parametrize(
    ("construction", "coefficient", "percent"),
    [
        ("as cast", 0.984, 0.7),
        ("machined convergent", 0.995, 1.0),
        ("welded sheet iron", 0.985, 1.5),
    ],
)
def test_coefficients(construction, coefficient, percent):
    """ISO 5167-4:2003, 5.5 (as cast and welded published; machined and u(C) from memory)."""
    make = iso5167_4.VENTURIS[construction]
    assert make.discharge_coefficient == coefficient
    assert make.uncertainty == pytest.approx(percent / 100.0)


def test_limits_of_use():
    """ISO 5167-4:2003, 5.5.3 and 5.5.4 (from memory)."""
    machined = iso5167_4.VENTURIS["machined convergent"]
    assert machined.diameter == (0.05, 0.25)
    assert machined.ratio == (0.4, 0.75)
    assert machined.reynolds == (2e5, 1e6)
    welded = iso5167_4.VENTURIS["welded sheet iron"]
    assert welded.diameter == (0.2, 1.2)
    assert welded.ratio == (0.4, 0.7)
    assert welded.reynolds == (2e5, 2e6)


@pytest.mark.parametrize("ratio", [0.3, 0.5, 0.75])
def test_loss_lies_in_the_usual_band(ratio):
    """ISO 5167-4:2003, 5.9 names 5 % to 20 % of Δp as usual (from memory)."""
    gentle = iso5167_4.loss_ratio(diameter_ratio=ratio, divergent_angle=np.radians(7.0))
    steep = iso5167_4.loss_ratio(diameter_ratio=ratio, divergent_angle=np.radians(15.0))
    assert 0.05 < gentle < 0.20
    assert gentle < steep < 0.25


def test_loss_beside_the_chart_of_the_general_library():
    """`fluids` reads the chart of ISO 5167-4 and ASME MFC-3M: both say 8 % to 16 % at D 0.25 m."""
    flow_meter = pytest.importorskip("fluids.flow_meter")
    for ratio in (0.4, 0.5, 0.6, 0.7):
        chart = flow_meter.dP_venturi_tube(D=0.25, Do=0.25 * ratio, P1=2e5, P2=1e5) / 1e5
        found = iso5167_4.loss_ratio(diameter_ratio=ratio, divergent_angle=np.radians(7.0))
        assert found == pytest.approx(chart, abs=0.05)


def test_bending_stress():
    """ISO/TR 9464 (from memory): 100 kPa, β = 0.6, D'/E = 100/3 gives 32.3 MPa."""
    found = orifice_plate.bending_stress(
        differential_pressure=1e5, diameter_ratio=0.6, support_diameter=0.1, thickness=0.003
    )
    assert found == pytest.approx(1e5 * (0.681 - 0.3906) * (100 / 3) ** 2)


def test_a_thin_plate_reads_low():
    """Bending dishes the plate downstream: a thin one reads low, and less so when thicker."""
    errors = [
        orifice_plate.bending_error(
            differential_pressure=5e4,
            diameter_ratio=0.5,
            support_diameter=0.3,
            thickness=thickness,
            elastic_modulus=1.93e11,
        )
        for thickness in (0.003, 0.006)
    ]
    assert errors[0] < errors[1] < 0.0


@given(bore=st.floats(0.02, 0.5), share=st.floats(0.0, 0.1))
def test_drain_hole_goes_round(bore, share):
    hole = share * bore
    counted = orifice_plate.effective_bore(bore=bore, hole=hole)
    assert orifice_plate.measured_bore(effective=counted, hole=hole) == pytest.approx(
        bore, rel=1e-12
    )
    assert counted >= bore


def test_drain_hole_correction():
    """ISO/TR 15377:1998 (from memory): a hole of a tenth of the bore counts 0.55 % of the bore."""
    assert orifice_plate.effective_bore(bore=0.1, hole=0.01) == pytest.approx(0.10055)


@pytest.mark.parametrize("inside", [0.05, 0.1, 0.154, 0.5])
def test_edge_lies_within_the_standard(inside):
    """ISO 5167-2:2003, 5.1.5.1: 0.005 D to 0.02 D, and never above the plate."""
    for thickness in (0.001, 0.003, 0.006, 0.012):
        edge = orifice_plate.edge_thickness(inside_diameter=inside, thickness=thickness)
        assert edge <= thickness
        assert edge <= 0.02 * inside * (1 + 1e-12)
        assert edge >= min(0.005 * inside, thickness)


def test_largest_plate():
    """ISO 5167-2:2003, 5.1.5.3: 0.05 D; up to 3.2 mm for D from 50 mm to 64 mm."""
    assert orifice_plate.largest_thickness(inside_diameter=0.055) == pytest.approx(0.0032)
    assert orifice_plate.largest_thickness(inside_diameter=0.2) == pytest.approx(0.01)


@pytest.mark.parametrize("construction", list(iso5167_4.VENTURIS))
def test_uncertainty_grows_below_the_limit_of_use(construction):
    """ISO 5167-4:2003, 5.5 within the limits, annex B below them (from memory); no jump between."""
    make = iso5167_4.VENTURIS[construction]
    reynolds = np.array([4e4, 1e5, 2e5 * (1 - 1e-9), 2e5, 1e6])
    found = iso5167_4.uncertainty(construction=construction, reynolds_number=reynolds)
    np.testing.assert_allclose(found[2:], make.uncertainty, rtol=1e-6)
    assert found[0] > found[1] > make.uncertainty


def test_low_reynolds_number_of_a_cast_tube():
    """Annex B: C about 0.976 ± 1.5 % at ReD 1e5, so that 0.984 is 0.8 % + 1.5 % in doubt."""
    found = iso5167_4.uncertainty(construction="as cast", reynolds_number=1e5)
    assert found == pytest.approx(0.015 + 0.008 / 0.984)


def test_annex_b_beside_the_general_library():
    """`fluids` carries the coefficients of annex B."""
    flow_meter = pytest.importorskip("fluids.flow_meter")
    pairs = zip(
        flow_meter.as_cast_convergent_venturi_Res[1:],
        flow_meter.as_cast_convergent_venturi_Cs[1:],
        (0.020, 0.015, 0.010),
        strict=True,
    )
    for reynolds, coefficient, doubt in pairs:
        found = iso5167_4.uncertainty(construction="as cast", reynolds_number=reynolds)
        assert found == pytest.approx(doubt + abs(0.984 - coefficient) / 0.984)
