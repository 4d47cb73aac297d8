"""Loss of reducers and expanders, against a general library."""

import fluids
import numpy as np
import pytest

from specsheet.methods import reducer

ANGLES = [np.radians(degrees) for degrees in (10, 20, 30, 44, 60, 120)]
RATIOS = [0.3, 0.5, 0.75, 0.95]


@pytest.mark.parametrize("angle", ANGLES)
@pytest.mark.parametrize("ratio", RATIOS)
def test_contraction_agrees_with_general_library(ratio, angle):
    """Crane TP-410; the library's coefficient also refers to the smaller bore."""
    wanted = fluids.fittings.contraction_conical_Crane(Di1=1.0, Di2=ratio, angle=np.degrees(angle))
    found = reducer.contraction_coefficient(diameter_ratio=ratio, angle=angle)
    assert found == pytest.approx(wanted, rel=1e-9)


@pytest.mark.parametrize("angle", ANGLES)
@pytest.mark.parametrize("ratio", RATIOS)
def test_enlargement_agrees_with_general_library(ratio, angle):
    """Crane TP-410; the library's coefficient also refers to the smaller bore."""
    wanted = fluids.fittings.diffuser_conical(
        Di1=ratio, Di2=1.0, angle=np.degrees(angle), method="Crane"
    )
    found = reducer.enlargement_coefficient(diameter_ratio=ratio, angle=angle)
    assert found == pytest.approx(wanted, rel=1e-9)


def test_no_reduction_no_loss():
    assert reducer.contraction_coefficient(diameter_ratio=1.0, angle=0.5) == 0.0
    assert reducer.enlargement_coefficient(diameter_ratio=1.0, angle=0.5) == 0.0


def test_sudden_enlargement_into_a_vessel_loses_one_velocity_head():
    """Borda-Carnot: the coefficient tends to one."""
    found = reducer.enlargement_coefficient(diameter_ratio=1e-6, angle=np.pi)
    assert found == pytest.approx(1.0)
