"""Calorific values and Wobbe index against the worked examples of ISO 6976:2016, annex D."""

from __future__ import annotations

import chemicals
import pytest
from fluid_tags import point, tag

from specsheet import fluid, packs
from specsheet.fluid import calorific, names
from specsheet.fluid.backends.mixture import Mixture
from specsheet.methods import calorific as method
from specsheet.quantity.value import Base

FIRST = (
    ("methane", 0.933212),
    ("ethane", 0.025656),
    ("propane", 0.015368),
    ("nitrogen", 0.01035),
    ("carbon_dioxide", 0.015414),
)
SECOND = (
    ("methane", 0.931819),
    ("ethane", 0.025618),
    ("water", 0.016837),
    ("nitrogen", 0.010335),
    ("carbon_dioxide", 0.015391),
)
THIRD = (
    ("methane", 0.922393),
    ("ethane", 0.025358),
    ("propane", 0.01519),
    ("n_butane", 0.000523),
    ("isobutane", 0.001512),
    ("n_pentane", 0.002846),
    ("isopentane", 0.002832),
    ("neopentane", 0.001015),
    ("n_hexane", 0.002865),
    ("nitrogen", 0.01023),
    ("carbon_dioxide", 0.015236),
)


def at_base(gas: calorific.Composition, combustion: float, metering: float) -> dict[str, float]:
    found = Mixture(gas, "gas", combustion)
    state = found.base(Base("", metering, 101325.0))
    values = {**state.properties, **found.constants()}
    return {key: item.value for key, item in values.items()}


def test_example_1() -> None:
    molar = calorific.molar(FIRST, 288.15)
    assert molar is not None
    assert molar[0] == pytest.approx(906179.9588, rel=1e-7)
    assert calorific.molar_mass(FIRST) == pytest.approx(0.0173884301, rel=2e-5)
    values = at_base(FIRST, 288.15, 288.15)
    assert values["gross_calorific_value_mass"] == pytest.approx(52113961.0, rel=2e-5)
    assert values["gross_calorific_value"] == pytest.approx(38410611.0, rel=2e-4)
    assert values["compressibility"] == pytest.approx(0.99776224, rel=2e-4)


def test_example_2_with_water() -> None:
    # at 15.55 degC; the standard prints 36.874304 MJ/m3 where its equations give 36.87501
    molar = calorific.molar(SECOND, 273.15 + 15.55)
    assert molar is not None
    assert molar[0] == pytest.approx(871443.916, rel=2e-5)
    values = at_base(SECOND, 288.7055556, 288.7055556)
    assert values["gross_calorific_value_mass"] == pytest.approx(51294085.0, rel=5e-5)
    assert values["gross_calorific_value"] == pytest.approx(36875010.0, rel=3e-4)


def test_example_3() -> None:
    values = at_base(THIRD, 298.15, 273.15)
    assert values["gross_calorific_value"] == pytest.approx(41893600.0, rel=3e-4)
    assert values["net_calorific_value"] == pytest.approx(37852280.0, rel=3e-4)
    assert values["density"] == pytest.approx(0.80701, rel=3e-4)
    assert values["relative_density"] == pytest.approx(0.62411, rel=3e-4)
    assert values["wobbe_index"] == pytest.approx(53029300.0, rel=3e-4)


def test_pure_methane() -> None:
    # ISO 6976, 25/0 degC: 39.84 MJ/m3 and 53.45 MJ/m3 (widely quoted)
    text = 'kind = "substance"\nsubstance = "methane"\nphase = "gas"'
    result = fluid.derive(tag(text, point("1 bar(g)", "20 degC", flow="100 Nm3/h")))
    normal = list(result.bases.values())[1]
    assert normal.value("gross_calorific_value") == pytest.approx(39.84e6, rel=0.003)
    assert normal.value("wobbe_index") == pytest.approx(53.45e6, rel=0.003)


@pytest.mark.parametrize("key", sorted(packs.table("fluids/calorific")["gross"]))
def test_table_against_an_independent_library(key: str) -> None:
    """Heats of combustion at 25 degC from standard heats of formation, of the ideal gas."""
    item = names.substances()[key]
    row = packs.table("fluids/calorific")["gross"][key]
    if key == "water":  # heat of condensation (IAPWS: 43.99 kJ/mol at 25 degC)
        assert row[4] == pytest.approx(43.99, rel=1e-3)
        return
    atoms = chemicals.simple_formula_parser(item.formula)
    formation = chemicals.Hfg(item.cas)
    assert formation is not None
    products = chemicals.combustion_stoichiometry(atoms)
    # liquid water among the products, as in ISO 6976
    found = -chemicals.HHV_stoichiometry(products, formation)
    assert found / 1e3 == pytest.approx(row[4], rel=0.004)


@pytest.mark.parametrize("key", sorted(packs.table("fluids/calorific")["gross"]))
def test_table_runs_smoothly_over_temperature(key: str) -> None:
    """A misprint of one digit would break the straight run over 25 K."""
    row = packs.table("fluids/calorific")["gross"][key]
    slope = (row[4] - row[0]) / 25.0
    for value, warmth in zip(row[1:4], (15.0, 15.55, 20.0), strict=True):
        assert value == pytest.approx(row[0] + slope * warmth, abs=0.45)


def test_between_the_temperatures_of_the_table() -> None:
    values = (1.0, 2.0, 4.0)
    run = {"temperatures": (0.0, 10.0, 20.0), "values": values}
    assert method.at_temperature(temperature=5.0, **run) == 1.5
    assert method.at_temperature(temperature=15.0, **run) == 3.0
    assert method.at_temperature(temperature=-5.0, **run) == 1.0
    assert method.at_temperature(temperature=30.0, **run) == 4.0


def test_a_gas_that_does_not_burn_has_no_calorific_value() -> None:
    text = 'kind = "substance"\nsubstance = "nitrogen"\nphase = "gas"'
    result = fluid.derive(tag(text, point("1 bar(g)", "20 degC")))
    assert "gross_calorific_value" not in result.constants
    assert "gross_calorific_value_mass" not in result.constants


def test_energy_by_mass_and_by_volume_agree() -> None:
    values = at_base(THIRD, 288.15, 288.15)
    assert values["gross_calorific_value"] == pytest.approx(
        values["gross_calorific_value_mass"] * values["density"], rel=1e-12
    )
