"""Back pressure of liquids and the cavitation index."""

import pytest

from specsheet.methods import back_pressure


@pytest.mark.parametrize(
    ("loss", "vapour", "needed"),
    [  # API MPMS 5.3, p >= 2 Δp + 1.25 pv: 3, 5 and 8 psi of loss, 100, 10 and 0.5 psi of vapour
        (20684.27188, 689475.7293, 903213.2054),
        (34473.78647, 68947.57293, 155132.0391),
        (55158.05835, 3447.378647, 114625.34),
    ],
)
def test_turbine_back_pressure(loss, vapour, needed):
    found = back_pressure.minimum_back_pressure(pressure_loss=loss, vapour_pressure=vapour)
    assert found == pytest.approx(needed, rel=1e-9)


def test_vortex_factors():
    """2.9 Δp + 1.3 pv in psi: 2.9 x 2 + 1.3 x 0.5 = 6.45; common practice."""
    found = back_pressure.minimum_back_pressure(
        pressure_loss=2.0, vapour_pressure=0.5, loss_factor=2.9, vapour_factor=1.3
    )
    assert found == pytest.approx(6.45)


def test_cavitation_index():
    """Form of ISA-RP75.23, from memory: (2 bar - pv) / 1 bar with pv = 2339.3 Pa."""
    found = back_pressure.cavitation_index(
        pressure=3e5, downstream_pressure=2e5, vapour_pressure=2339.3
    )
    assert found == pytest.approx(1.976607, rel=1e-9)
