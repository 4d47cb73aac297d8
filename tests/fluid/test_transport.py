"""Viscosity and conductivity of gases: the equations alone, against an independent library."""

from __future__ import annotations

import chemicals
import pytest

from specsheet import packs
from specsheet.fluid import mixture_transport, names, transport
from specsheet.methods import gas_viscosity

AIR = (("nitrogen", 0.7812), ("oxygen", 0.2096), ("argon", 0.0092))


@pytest.mark.parametrize(
    ("fractions", "viscosities", "masses"),
    [
        ([0.5, 0.5], [8.8e-6, 14.7e-6], [2.016, 44.01]),
        ([0.7, 0.2, 0.1], [17.6e-6, 14.7e-6, 9.6e-6], [28.0, 44.0, 18.0]),
        ([0.05] * 20, [1e-5 + i * 1e-6 for i in range(20)], [2.0 + 5 * i for i in range(20)]),
    ],
)
def test_wilke(fractions: list[float], viscosities: list[float], masses: list[float]) -> None:
    found = gas_viscosity.wilke(
        fractions=fractions,
        viscosities=viscosities,
        molar_masses=[mass / 1e3 for mass in masses],
    )
    assert found == pytest.approx(chemicals.Wilke(fractions, viscosities, masses), rel=1e-10)


def test_mixing_rules_leave_a_lone_gas_alone() -> None:
    shared = {"fractions": [0.0, 1.0], "viscosities": [9e-6, 18e-6], "molar_masses": [0.002, 0.028]}
    assert gas_viscosity.wilke(**shared) == pytest.approx(18e-6)
    found = gas_viscosity.wassiljewa(conductivities=[0.18, 0.026], **shared)
    assert found == pytest.approx(0.026)


def test_corresponding_states() -> None:
    for key in ("krypton", "xenon", "nitrogen"):
        item = names.substances()[key]
        found = gas_viscosity.yoon_thodos(
            temperature=320.0,
            critical_temperature=item.critical_temperature,
            critical_pressure=item.critical_pressure,
            molar_mass=item.molar_mass,
        )
        other = chemicals.viscosity.Yoon_Thodos(
            320.0, item.critical_temperature, item.critical_pressure, 1e3 * item.molar_mass
        )
        assert found == pytest.approx(other, rel=1e-10)


@pytest.mark.parametrize("key", sorted(packs.table("fluids/viscosity")["gas"]))
def test_handbook_vapours_against_corresponding_states(key: str) -> None:
    """A coefficient typed wrong would be off by far more than the two methods differ."""
    item = names.substances()[key]
    temperature = max(300.0, 1.05 * item.critical_temperature * 0.7)
    found = transport.dilute(item, temperature).value
    other = gas_viscosity.yoon_thodos(
        temperature=temperature,
        critical_temperature=item.critical_temperature,
        critical_pressure=item.critical_pressure,
        molar_mass=item.molar_mass,
    )
    assert found == pytest.approx(other, rel=0.3)


# handbook values at 20 degC [mPa s], from memory
@pytest.mark.parametrize(
    ("key", "viscosity"), [("acetone", 0.32), ("diethyl_ether", 0.24), ("tetrahydrofuran", 0.49)]
)
def test_handbook_liquids(key: str, viscosity: float) -> None:
    row = packs.table("fluids/viscosity")["liquid"][key]
    found = gas_viscosity.liquid_equation(
        temperature=293.15, c1=row[0], c2=row[1], c3=row[2], c4=row[3], c5=row[4]
    )
    assert found == pytest.approx(viscosity * 1e-3, rel=0.06)


def test_conductivity_of_air_as_a_mixture_is_that_of_air() -> None:
    found = mixture_transport.gas(AIR, 300.0, 40.0, 1.16, dense=False)["thermal_conductivity"]
    assert found.value == pytest.approx(
        mixture_transport.dilute_conductivity("air", 300.0), rel=0.02
    )


def test_conductivity_of_helium_with_argon() -> None:
    # half and half at 300 K and low pressure: 0.064 W/m/K within 10 % (literature, from memory)
    half = (("helium", 0.5), ("argon", 0.5))
    found = mixture_transport.gas(half, 300.0, 40.0, 0.9, dense=False)["thermal_conductivity"]
    assert found.value == pytest.approx(0.064, rel=found.uncertainty)


def test_a_mixture_without_a_conductivity_model_has_none() -> None:
    gas = (("methane", 0.9), ("hydrogen_sulfide", 0.1))
    assert "thermal_conductivity" not in mixture_transport.gas(gas, 300.0, 40.0, 0.7, dense=False)
