"""Substances and solutes by name, formula and CAS number."""

from __future__ import annotations

import subprocess
import sys

import chemicals
import pytest
from fluid_tags import finding, point, tag

from specsheet import fluid
from specsheet.fluid import names, solutes


@pytest.mark.parametrize(
    "text",
    ["carbon_dioxide", "carbon dioxide", "Carbon Dioxide", "CO2", "co2", "124-38-9", "R744"],
)
def test_every_spelling_finds_the_substance(text: str) -> None:
    found = names.find(text)
    assert found is not None
    assert found.key == "carbon_dioxide"


@pytest.mark.parametrize(
    ("text", "key"),
    [
        ("steam", "water"),
        ("condensate", "water"),
        ("boiler feedwater", "water"),
        ("n-Butane", "n_butane"),
        ("i-butane", "isobutane"),
        ("C4H10", "n_butane"),
        ("instrument air", "air"),
        ("propene", "propylene"),
        ("CO", "carbon_monoxide"),
        ("COS", "carbonyl_sulfide"),
        ("R134a", "r134a"),
        ("sulphur dioxide", "sulfur_dioxide"),
    ],
)
def test_trade_neutral_names(text: str, key: str) -> None:
    found = names.find(text)
    assert found is not None
    assert found.key == key


def test_a_formula_of_several_isomers_means_none_of_them() -> None:
    assert names.find("C8H10") is None  # three xylenes and ethylbenzene


def test_unknown_names_get_the_nearest() -> None:
    assert names.find("methan") is None
    assert names.nearest("methan")[0] == "methane"
    assert names.nearest("karbon dioxide")[0] == "carbon dioxide"


def test_search_ranks_starts_before_middles() -> None:
    found = [item.key for item in names.search("but")]
    assert found.index("n_butane") < found.index("isobutane")
    assert names.search("64-17-5")[0].key == "ethanol"
    assert len(names.search("", limit=5)) == 5
    assert names.search("zzzz") == ()


def test_names_are_unique() -> None:
    """No name leads to two substances (formulas of isomers may)."""
    seen: dict[str, str] = {}
    for key, item in names.substances().items():
        for text in {names.normal(word) for word in (key, item.name, *item.names)}:
            assert seen.setdefault(text, key) == key, text


#: substances that the independent library does not know
UNLISTED = {"air", "r1336mzz_e"}


@pytest.mark.parametrize(
    "key", [k for k, s in names.substances().items() if s.cas and k not in UNLISTED]
)
def test_constants_against_an_independent_library(key: str) -> None:
    item = names.substances()[key]
    assert item.molar_mass * 1e3 == pytest.approx(chemicals.MW(item.cas), rel=1e-3)
    critical = chemicals.Tc(item.cas)
    if critical is not None:
        assert item.critical_temperature == pytest.approx(critical, rel=0.015)
    pressure = chemicals.Pc(item.cas)
    if pressure is not None and key not in PRESSURES_IN_DISPUTE:
        assert item.critical_pressure == pytest.approx(pressure, rel=0.06)
    if (
        item.formula
        and "=" not in item.formula
        and "+" not in item.formula
        and key != "heavy_water"
    ):
        atoms = chemicals.simple_formula_parser(item.formula)
        mass = chemicals.molecular_weight(atoms)
        assert item.molar_mass * 1e3 == pytest.approx(mass, rel=2e-3)


#: critical pressures on which sources differ by more than 6 %
PRESSURES_IN_DISPUTE = {"propylene_glycol"}


@pytest.mark.parametrize("key", sorted(solutes.solutes()))
def test_solutes_against_an_independent_library(key: str) -> None:
    item = solutes.solutes()[key]
    assert item.molar_mass * 1e3 == pytest.approx(chemicals.MW(item.cas), rel=2e-3)


@pytest.mark.parametrize(
    ("text", "key"),
    [
        ("MEG", "ethylene_glycol"),
        ("caustic soda", "sodium_hydroxide"),
        ("NaOH", "sodium_hydroxide"),
        ("sulphuric acid", "sulfuric_acid"),
        ("brine", "sodium_chloride"),
        ("1310-58-3", "potassium_hydroxide"),
    ],
)
def test_solutes_by_name(text: str, key: str) -> None:
    found = solutes.find(text)
    assert found is not None
    assert found.key == key


def test_names_load_no_numerical_library() -> None:
    code = (
        "import sys; from specsheet.fluid import names, solutes; names.search('met');"
        "solutes.find('NaCl');"
        "print([m for m in ('numpy', 'CoolProp') if m in sys.modules])"
    )
    found = subprocess.run([sys.executable, "-c", code], capture_output=True, text=True, check=True)
    assert found.stdout.strip() == "[]"


@pytest.mark.parametrize(
    ("text", "words"),
    [
        ("Natural gas", "fluid.kind mixture"),
        ("diesel", "fluid.kind petroleum"),
        ("sea water", "fluid.kind seawater"),
        ("ethylene glycol", "fluid.kind solution"),
        ("sludge", "fluid.kind slurry"),
        ("milk", "fluid.kind given"),
        ("metane", "methane"),
    ],
)
def test_what_is_no_substance_is_shown_the_way(text: str, words: str) -> None:
    stated = tag(f'kind = "substance"\nsubstance = "{text}"\nphase = "liquid"', point())
    said = finding(fluid.derive(stated), "substance-unknown")
    assert said.field == "fluid.substance"
    assert words in said.message


def test_solutes_are_searched_alike() -> None:
    assert [item.key for item in solutes.search("caus")] == [
        "potassium_hydroxide",
        "sodium_hydroxide",
    ]
    assert solutes.search("7647-14-5")[0].key == "sodium_chloride"
