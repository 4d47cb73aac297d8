"""Nozzles against the tables of ISO 5167-3:2003, annex A, and the general library."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import iso5167_3

# ISO 5167-3:2003, annex A, ISA 1932 nozzle: β, ReD, C (four decimals)
ISA_1932 = [
    (0.44, 100000, 0.9789),
    (0.44, 1e06, 0.982),
    (0.44, 1e07, 0.9822),
    (0.44, 20000, 0.9616),
    (0.5, 100000, 0.9733),
    (0.5, 1e06, 0.9766),
    (0.56, 1e07, 0.969),
    (0.56, 20000, 0.9464),
    (0.6, 100000, 0.9588),
    (0.6, 1e06, 0.9619),
    (0.6, 1e07, 0.9621),
    (0.6, 20000, 0.9411),
    (0.66, 100000, 0.9464),
    (0.66, 1e06, 0.9487),
    (0.66, 1e07, 0.9488),
    (0.7, 100000, 0.9361),
    (0.7, 1e06, 0.9375),
    (0.7, 1e07, 0.9376),
    (0.7, 20000, 0.928),
    (0.76, 1e06, 0.9166),
    (0.76, 1e07, 0.9166),
    (0.8, 1e06, 0.8996),
]

# ISO 5167-3:2003, annex A, long radius nozzle: β, ReD, C (four decimals)
LONG_RADIUS = [
    (0.2, 10000, 0.9673),
    (0.2, 100000, 0.9873),
    (0.2, 1e06, 0.9936),
    (0.3, 1e06, 0.9929),
    (0.4, 10000, 0.9552),
    (0.4, 100000, 0.9834),
    (0.4, 1e06, 0.9924),
    (0.4, 1e07, 0.9952),
    (0.5, 10000, 0.9503),
    (0.5, 100000, 0.9819),
    (0.5, 1e07, 0.995),
    (0.6, 10000, 0.9459),
    (0.7, 10000, 0.9419),
    (0.7, 100000, 0.9792),
    (0.7, 1e06, 0.991),
    (0.7, 1e07, 0.9948),
    (0.8, 10000, 0.9381),
    (0.8, 100000, 0.978),
    (0.8, 1e06, 0.9907),
]

# ISO 5167-3:2003, annex A, Venturi nozzle: β, C (four decimals)
VENTURI_NOZZLE = [
    (0.316, 0.9847),
    (0.4, 0.9826),
    (0.6, 0.9661),
    (0.7, 0.9464),
    (0.75, 0.9321),
    (0.775, 0.9236),
]


@pytest.mark.parametrize(("ratio", "reynolds", "wanted"), ISA_1932)
def test_isa_1932(ratio, reynolds, wanted):
    found = iso5167_3.isa_1932_coefficient(diameter_ratio=ratio, reynolds_number=reynolds)
    assert found == pytest.approx(wanted, rel=1.1e-4)


@pytest.mark.parametrize(("ratio", "reynolds", "wanted"), LONG_RADIUS)
def test_long_radius(ratio, reynolds, wanted):
    found = iso5167_3.long_radius_coefficient(diameter_ratio=ratio, reynolds_number=reynolds)
    assert found == pytest.approx(wanted, rel=1.1e-4)


@pytest.mark.parametrize(("ratio", "wanted"), VENTURI_NOZZLE)
def test_venturi_nozzle(ratio, wanted):
    found = iso5167_3.venturi_nozzle_coefficient(diameter_ratio=ratio)
    assert found == pytest.approx(wanted, rel=1.1e-4)


def test_expansibility_of_a_worked_example():
    """ISO/TR 11583:2012, example (ε of ISO 5167-4:2003, 5.6): β = 0.6, 50 kPa of 60 bar."""
    found = iso5167_3.expansibility(
        diameter_ratio=0.6, pressure_drop_ratio=1.0 / 120.0, isentropic_exponent=1.3
    )
    assert found == pytest.approx(0.994236, rel=5e-7)


@pytest.mark.parametrize("exponent", [1.0, 1.15, 1.4, 1.67])
@pytest.mark.parametrize("ratio", [0.2, 0.5, 0.8])
def test_expansibility_beside_general_library(ratio, exponent):
    flow_meter = pytest.importorskip("fluids.flow_meter")
    for drop in (1e-3, 0.05, 0.25):
        wanted = flow_meter.nozzle_expansibility(
            D=1.0, Do=ratio, P1=1e5, P2=1e5 * (1.0 - drop), k=exponent
        )
        found = iso5167_3.expansibility(
            diameter_ratio=ratio, pressure_drop_ratio=drop, isentropic_exponent=exponent
        )
        assert found == pytest.approx(wanted, rel=1e-9)


@given(ratio=st.floats(0.1, 0.8), exponent=st.floats(1.0, 1.7))
def test_expansibility_is_one_without_a_drop(ratio, exponent):
    drops = np.array([0.0, 1e-14, 1e-12])
    found = iso5167_3.expansibility(
        diameter_ratio=ratio, pressure_drop_ratio=drops, isentropic_exponent=exponent
    )
    np.testing.assert_allclose(found, 1.0, atol=1e-11)


def test_expansibility_is_continuous_at_exponent_one():
    around = np.array([1.0 - 1e-9, 1.0, 1.0 + 1e-9])
    found = iso5167_3.expansibility(
        diameter_ratio=0.5, pressure_drop_ratio=0.1, isentropic_exponent=around
    )
    np.testing.assert_allclose(found, found[1], rtol=1e-8)


def test_uncertainties():
    """ISO 5167-3:2003, 5.1.7 and 5.3.4 (from memory)."""
    assert iso5167_3.isa_1932_uncertainty(diameter_ratio=0.5) == pytest.approx(0.008)
    assert iso5167_3.isa_1932_uncertainty(diameter_ratio=0.7) == pytest.approx(0.010)
    assert iso5167_3.isa_1932_uncertainty(diameter_ratio=0.6) == pytest.approx(0.008)
    found = iso5167_3.venturi_nozzle_uncertainty(diameter_ratio=0.6)
    assert found == pytest.approx(0.012 + 0.015 * 0.6**4)
