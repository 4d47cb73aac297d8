"""The unit table against a general units library, and its conversions.

pint is the authority on factors. Its definitions lack most of the trade's spellings, so those
are composed here from pint's own units.
"""

from __future__ import annotations

import re

import pint
import pytest

from specsheet.fields import KINDS
from specsheet.quantity import from_si, kinds_of, to_si, units
from specsheet.quantity.table import SPELLINGS, UNITS, find

REGISTRY = pint.UnitRegistry(non_int_type=float)

# our unit -> pint expression, for a part between slashes or a whole unit
PARTS = {
    "L": "liter",
    "mL": "milliliter",
    "ML": "megaliter",
    "NL": "liter",
    "NmL": "milliliter",
    "Nm3": "meter**3",
    "kNm3": "1000*meter**3",
    "Sm3": "meter**3",
    "kSm3": "1000*meter**3",
    "MSm3": "1000000*meter**3",
    "scf": "foot**3",
    "klb": "1000*pound",
    "USgal": "US_liquid_gallon",
    "impgal": "imperial_gallon",
    "bbl": "oil_barrel",
    "acft": "43560*foot**3",
    "BTU": "international_british_thermal_unit",
    "MMBTU": "1000000*international_british_thermal_unit",
    "kcal": "1000*international_calorie",
    "Mcal": "1000000*international_calorie",
    "Gcal": "1000000000*international_calorie",
    "h": "hour",
    "d": "day",
    "min": "minute",
    "t": "metric_ton",
    "in": "inch",
    "mil": "thousandth_of_inch",
    "um": "micrometer",
    "%": "percent",
    "ppm": "ppm",
    "ppb": "1e-9",
    "permille": "0.001",
    "K": "kelvin",
    "degC": "kelvin",
    "degF": "rankine",
    "degR": "rankine",
    "lbmol": "453.59237*mole",
    "kn": "knot",
    "mmHg": "millimeter_Hg",
    "inHg(32degF)": "inHg_32F",
    "mmH2O(4degC)": "meter_H2O_4C/1000",
    "mH2O(4degC)": "meter_H2O_4C",
    "inH2O(4degC)": "inch_H2O_4C",
    "inH2O(60degF)": "inch_H2O_60F",
    "ftH2O(4degC)": "foot_H2O_4C",
    # Density of water at 20 °C and 101.325 kPa 998.207 kg/m3 (IAPWS-95).
    "inH2O(20degC)": "998.207*kilogram/meter**3*standard_gravity*inch",
    "mmH2O(20degC)": "998.207*kilogram/meter**3*standard_gravity*millimeter",
}
WHOLE = {
    "gpm": "US_liquid_gallon/minute",
    "gph": "US_liquid_gallon/hour",
    "igpm": "imperial_gallon/minute",
    "MGD": "1000000*US_liquid_gallon/day",
    "Sv": "sverdrup",
    "scfm": "foot**3/minute",
    "scfh": "foot**3/hour",
    "MSCFD": "1000*foot**3/day",
    "MMSCFD": "1000000*foot**3/day",
    "mPa s": "millipascal*second",
    "Pa s": "pascal*second",
    "uPa s": "micropascal*second",
    "hp": "horsepower",
    "mph": "mile/hour",
    "St": "stokes",
    "cSt": "centistokes",
    "Torr": "torr",
}


REGISTRY.define("thousandth_of_inch = inch / 1000")  # pint has mil as an angle


def _expression(name: str) -> str:
    """Return the pint expression for one of our units."""
    bare = re.sub(r"\((?:g|a|base)\)$", "", name)
    if bare in WHOLE:
        return WHOLE[bare]
    parts = [bare] if bare in PARTS else bare.split("/")
    powered = [PARTS.get(part) or re.sub(r"(?<=[a-z])([23])$", r"**\1", part) for part in parts]
    return "/".join(f"({part})" for part in powered)


def _pairs() -> list[tuple[str, str]]:
    return [(kind, row.name) for kind, rows in UNITS.items() for row in rows]


@pytest.mark.parametrize(("kind", "name"), _pairs(), ids=lambda part: str(part))
def test_factor_against_pint(kind: str, name: str) -> None:
    one = REGISTRY.Quantity(1.0, "dimensionless")
    quantity = one * REGISTRY.parse_expression(_expression(name))
    si = one * REGISTRY.parse_expression(_expression(KINDS[kind].si))
    expected = (quantity / si).to("dimensionless").magnitude
    found = find(kind, name)
    assert found is not None
    assert found.factor == pytest.approx(expected, rel=2e-6 if "H2O" in name else 1e-9)


@pytest.mark.parametrize(
    ("value", "unit", "pint_unit"),
    [
        (-40.0, "degC", "degC"),
        (185.0, "degC", "degC"),
        (60.0, "degF", "degF"),
        (5.0, "degR", "degR"),
    ],
)
def test_temperature_against_pint(value: float, unit: str, pint_unit: str) -> None:
    expected = REGISTRY.Quantity(value, pint_unit).to("kelvin").magnitude
    assert to_si(value, "temperature", unit) == pytest.approx(expected, rel=1e-12)


@pytest.mark.parametrize(
    ("unit", "kind", "value"),
    [
        ("gpm", "volume_flow", 6.30902e-5),
        ("ft3/s", "volume_flow", 0.0283168466),
        ("bbl/d", "volume_flow", 1.84013e-6),
        ("psi", "pressure_difference", 6894.757293),
        ("inH2O(60degF)", "pressure_difference", 248.84),
        ("inH2O(4degC)", "pressure_difference", 249.082),
        ("inHg(32degF)", "pressure_difference", 3386.389),
        ("lb", "mass", 0.45359237),
        ("cP", "dynamic_viscosity", 0.001),
    ],
)
def test_factor_against_tables(unit: str, kind: str, value: float) -> None:
    """NIST SP 811:2008, appendix B (from memory)."""
    assert to_si(1.0, kind, unit) == pytest.approx(value, rel=3e-6)


@pytest.mark.parametrize(("kind", "name"), _pairs(), ids=lambda part: str(part))
def test_conversion_returns(kind: str, name: str) -> None:
    assert from_si(to_si(12.5, kind, name), kind, name) == pytest.approx(12.5, rel=1e-12)


@pytest.mark.parametrize("kind", sorted(KINDS))
def test_spellings_of_a_kind_are_unambiguous(kind: str) -> None:
    members = KINDS[kind].members or (kind,)
    spelled = [
        spelling
        for member in members
        for row in UNITS[member]
        for spelling in (row.name, *row.aliases)
    ]
    assert len(spelled) == len(set(spelled)) == len(SPELLINGS[kind])


def test_shown_unit_is_the_default() -> None:
    assert from_si(458.15, "temperature") == pytest.approx(185.0)
    assert from_si(0.1541, "length") == pytest.approx(154.1)
    assert to_si(1.0, "mass_flow", "") == pytest.approx(1 / 3600)


def test_units_of_a_union_are_its_members() -> None:
    assert units("viscosity") == units("dynamic_viscosity") + units("kinematic_viscosity")


def test_kinds_of_a_unit() -> None:
    assert kinds_of("kW") == ("energy_flow", "power")
    assert kinds_of("bar (g)") == ("pressure_gauge",)
    assert kinds_of("furlong") == ()


@pytest.mark.parametrize(("kind", "unit"), [("length", "kg"), ("lenght", "m"), ("flow", "bar(g)")])
def test_conversion_refuses_what_is_not_in_the_table(kind: str, unit: str) -> None:
    with pytest.raises(KeyError):
        to_si(1.0, kind, unit)
