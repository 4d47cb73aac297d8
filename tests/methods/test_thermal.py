"""Heat transfer of a thermal meter."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import thermal


def test_prandtl_number_of_gases():
    """Eucken: 2/3 for a monatomic gas (exact); 0.737 for a diatomic one (from memory)."""
    assert thermal.prandtl_number(isentropic_exponent=5 / 3) == pytest.approx(2 / 3)
    assert thermal.prandtl_number(isentropic_exponent=1.4) == pytest.approx(0.737, abs=1e-3)


def test_conductivity_of_air():
    """Handbook value of air at 20 °C and 1 atm: 0.0257 W/m/K (from memory), within 5 %."""
    found = thermal.thermal_conductivity(
        viscosity=1.82e-5,
        isentropic_exponent=1.4,
        pressure=101325.0,
        density=1.204,
        temperature=293.15,
    )
    assert found == pytest.approx(0.0257, rel=0.05)


@pytest.mark.parametrize("reynolds", [1.0, 40.0, 1000.0])
def test_nusselt_number_against_another_correlation(reynolds):
    """Hilpert for air, Nu = C Re^m: 0.891 Re^0.33, 0.821 Re^0.385, 0.615 Re^0.466 (from memory)."""
    factor, power = {1.0: (0.891, 0.33), 40.0: (0.821, 0.385), 1000.0: (0.615, 0.466)}[reynolds]
    found = thermal.nusselt_number(reynolds_number=reynolds, prandtl_number=0.71)
    assert found == pytest.approx(factor * reynolds**power, rel=0.12)


@given(st.floats(0.01, 1e4), st.floats(0.5, 1.2))
def test_reynolds_and_nusselt_round_trip(reynolds, prandtl):
    nusselt = thermal.nusselt_number(reynolds_number=reynolds, prandtl_number=prandtl)
    back = thermal.reynolds_number(nusselt_number=nusselt, prandtl_number=prandtl)
    assert back == pytest.approx(reynolds, rel=1e-9)
