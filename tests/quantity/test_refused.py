"""Texts that are refused, with the part of the message that says why or what to write.

Each row is a text met in the trade: decimal commas, ranges, units that say too little, gauge and
absolute mixed up, values that cannot be. The messages are the contract of the form and the file
reader, so a change here is a change to what the user reads.
"""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.fields import KINDS
from specsheet.quantity import Quantity, Refusal, parse
from specsheet.quantity.lookalike import tidy

# text, kind wanted, part of the message
REFUSED = [
    ("5 E3 kg/h", "flow", "write 5e3 kg/h"),
    ("1.5E 3 kg/h", "flow", "write 1.5e3 kg/h"),
    ("3bar(g)-5bar(g)", "pressure", "write 3 bar(g) or 5 bar(g)"),
    ("3bar-5bar", "pressure", "write 3 bar(g), 3 bar(a), 5 bar(g) or 5 bar(a)"),
    ("1,5 bar(g)", "pressure", "write 1.5 bar(g)"),
    ("1,5 t/h", "flow", "write 1.5 t/h"),
    ("0,5 %", "ratio", "write 0.5 %"),
    (",5 mm", "length", "write 0.5 mm"),
    ("12,345 kg/h", "flow", "write 12.345 kg/h or 12345 kg/h"),
    ("12,345,678 kg/h", "flow", "write 12345678 kg/h"),
    ("1.234,5 kg/h", "flow", "write 1234.5 kg/h"),
    ("1,234.5 kg/h", "flow", "write 1234.5 kg/h"),
    ("1'500 kg/h", "flow", "write 1500 kg/h"),
    ("1_500 kg/h", "flow", "write 1500 kg/h"),
    ("12 345.6 kg/h", "flow", "write 12345.6 kg/h"),
    ("1.5.2 kg/h", "flow", "one number is read, with a point as the decimal mark"),
    ("1,5,2 kg/h", "flow", "one number is read, with a point as the decimal mark"),
    ("1,5e3 kg/h", "flow", "write 1.5e3 kg/h"),
    ("3–5 bar(g)", "pressure", "write 3 bar(g) or 5 bar(g)"),
    ("3 to 5 bar(g)", "pressure", "write 3 bar(g) or 5 bar(g)"),
    ("3 bar(g) - 5 bar(g)", "pressure", "write 3 bar(g) or 5 bar(g)"),
    ("3...5 bar(g)", "pressure", "write 3 bar(g) or 5 bar(g)"),
    ("3/5 bar(g)", "pressure", "write 3 bar(g) or 5 bar(g)"),
    ("-10 to 40 degC", "temperature", "write -10 degC or 40 degC"),
    ("≈ 5 t/h", "flow", "write 5 t/h"),
    ("about 5 t/h", "flow", "write 5 t/h"),
    ("ca. 5 t/h", "flow", "write 5 t/h"),
    ("max. 5 t/h", "flow", "write 5 t/h"),
    ("≥ 5 t/h", "flow", "write 5 t/h"),
    ("> 5 t/h", "flow", "write 5 t/h"),
    ("= 5 t/h", "flow", "write 5 t/h"),
    ("~1,5 bar", "pressure", "write 1.5 bar(g) or 1.5 bar(a)"),
    ("185 degC ± 5 K", "temperature", "write 185 degC"),
    ("185 +/- 5 degC", "temperature", "write 185 degC"),
    ("±5 degC", "temperature", 'a number and its unit is read, such as "20 degC"'),
    ("+-5 degC", "temperature", "write 5 degC or -5 degC"),
    ("+ 5 degC", "temperature", "write +5 degC"),
    ("1.5*10^3 kg/h", "flow", "write 1.5e3 kg/h"),
    ("2**3 kg/h", "flow", 'a number and its unit is read, such as "20 kg/h"'),
    ("10^-6 m2/s", "viscosity", "write 1e-6 m2/s"),
    ("3/4 in", "length", "write 0.75 in"),
    ("10:1", "dimensionless", "write 10"),
    ("5.", "dimensionless", "write 5"),
    ("5. mm", "length", "write 5 mm"),
    ("5.mm", "length", "write 5 mm"),
    ("mm", "length", "the number before mm is missing"),
    ("", "length", 'a number and its unit is read, such as "20 mm"'),
    ("hello", "length", 'a number and its unit is read, such as "20 mm"'),
    ("?", "length", 'a number and its unit is read, such as "20 mm"'),
    ("tbd", "flow", 'a number and its unit is read, such as "20 kg/h"'),
    ("-", "flow", 'a number and its unit is read, such as "20 kg/h"'),
    ("NaN", "dimensionless", "a finite number is wanted"),
    ("inf m", "length", "a finite number is wanted"),
    ("-inf", "dimensionless", "a finite number is wanted"),
    ("∞", "dimensionless", "a finite number is wanted"),
    ("1e999 mm", "length", "the greatest value read is 1e+33 mm"),
    ("1e31 m", "length", "the greatest value read is 1e+30 m"),
    ("1e-40 m", "length", "the number is too small to be read"),
    ("0x10 mm", "length", 'the unit "x10 mm" is not known'),
    ("1e mm", "length", "write 1 mm"),
    ("five mm", "length", 'a number and its unit is read, such as "20 mm"'),
    ("5 5 mm", "length", "one number is read, with a point as the decimal mark"),
    ("5 mm 3", "length", "write 5 mm"),
    ("5 mm wide", "length", 'the unit "mm wide" is not known'),
    ("5 mm;", "length", "write 5 mm"),
    ("(5) mm", "length", 'a number and its unit is read, such as "20 mm"'),
    ("$5 mm", "length", 'a number and its unit is read, such as "20 mm"'),
    ("٥ mm", "length", 'a number and its unit is read, such as "20 mm"'),
    ("5 мм", "length", 'the unit "мм" holds "м", cyrillic small letter em'),
    ("150", "length", "write 150 mm"),
    ("185", "temperature", "write 185 degC"),
    ("7", "pressure", "write 7 bar(g) or 7 bar(a)"),
    ("1.5", "viscosity", "write 1.5 mPa s or 1.5 mm2/s"),
    ("0.5", "ratio", "write 0.5 % or 50 %"),
    ("1", "ratio", "write 1 % or 100 %"),
    ("1.5", "ratio", "write 1.5 %"),
    ("0.11", "money_rate", "write 0.11 1/kWh"),
    ("7 bar", "pressure", "write 7 bar(g) or 7 bar(a)"),
    ("100 psi", "pressure", "write 100 psi(g) or 100 psi(a)"),
    ("0.7 MPa", "pressure_absolute", "write 0.7 MPa(a)"),
    ("100 kPa", "pressure_gauge", "write 100 kPa(g)"),
    ("7 bar(g)", "pressure_absolute", "bar(g) is the unit of a gauge pressure"),
    ("7 bar(a)", "pressure_gauge", "bar(a) is the unit of an absolute pressure"),
    ("7 bar(b)", "pressure", "write 7 bar(g), 7 bar(a) or 7 mbar(g)"),
    ("7 bar(d)", "pressure", "write 7 bar(g), 7 bar(a) or 7 mbar(g)"),
    ("1 atm", "pressure", "write 1 atm(g) or 1 atm(a)"),
    ("10 mmHg", "pressure", "write 10 mmHg(g) or 10 mmHg(a)"),
    ("250 mbar(g)", "pressure_difference", "write 250 mbar"),
    ("250 mbar(a)", "pressure_difference", "write 250 mbar"),
    ("2 psig", "pressure_difference", "write 2 psi"),
    (
        "100 inH2O",
        "pressure_difference",
        "write 100 inH2O(60degF), 100 inH2O(4degC) or 100 inH2O(20degC)",
    ),
    ("100 mmH2O", "pressure_difference", "write 100 mmH2O(4degC) or 100 mmH2O(20degC)"),
    ("100 inH2O", "pressure", "write 100 inH2O(60degF)(g), 100 inH2O(60degF)(a), 100"),
    (
        "100 inH2O(g)",
        "pressure",
        "write 100 inH2O(60degF)(g), 100 inH2O(4degC)(g) or 100 inH2O(20degC)(g)",
    ),
    ("10 inHg", "pressure_difference", "write 10 inHg(32degF)"),
    (
        "100 in H2O",
        "pressure_difference",
        "write 100 inH2O(60degF), 100 inH2O(4degC) or 100 inH2O(20degC)",
    ),
    ("7 kg/cm2", "pressure", "write 7 kgf/cm2(g) or 7 kgf/cm2(a)"),
    ("7 kg/cm2(g)", "pressure", "write 7 kgf/cm2(g)"),
    ("7 BAR(G)", "pressure", "write 7 bar(g)"),
    ("7 Bar", "pressure", "write 7 bar(g) or 7 bar(a)"),
    ("7 kpa(a)", "pressure", "write 7 kPa(a)"),
    ("7 mpa(g)", "pressure", "write 7 MPa(g)"),
    ("7 barG", "pressure", "write 7 bar(g)"),
    ("-0.1 bar(a)", "pressure", "write -0.1 bar(g)"),
    ("-0.1 bar(a)", "pressure_absolute", "an absolute pressure is not below zero"),
    ("-1.2 bar(g)", "pressure", "a full vacuum is about -1.01325 bar(g)"),
    ("-273.15 degC", "temperature", "it must be above absolute zero, -273.15 degC"),
    ("-500 degF", "temperature", "it must be above absolute zero, -459.67 degF"),
    ("-1 K", "temperature", "it must be above absolute zero, 0 K"),
    ("0 K", "temperature", "it must be above absolute zero, 0 K"),
    ("-5 mm", "length", "the least value is 0 mm"),
    ("-3 t/h", "flow", "the least value is 0 t/h"),
    ("-1 mbar", "pressure_difference", "the least value is 0 mbar"),
    ("0 kg/m3", "density", "it must be above zero"),
    ("-2 %", "ratio", "the least value is 0 %"),
    ("0 cP", "viscosity", "it must be above zero"),
    ("20 km", "elevation", "the greatest value read is 11 km"),
    ("3 slpm", "flow", "write 3 NL/min or 3 L/min(base)"),
    ("3 SLPM", "flow", "write 3 NL/min or 3 L/min(base)"),
    ("3 sccm", "flow", "write 3 NmL/min"),
    ("3 cfm", "flow", "write 3 ft3/min or 3 scfm"),
    ("3 Nm/h", "flow", "write 3 Nm3/h"),
    ("3 Nm", "flow", "write 3 Nm3/h"),
    ("3 nm3/h", "flow", "write 3 Nm3/h"),
    ("3 NM3/H", "flow", "write 3 Nm3/h"),
    ("3 m3", "flow", "write 3 m3/h"),
    ("3 kg", "flow", "write 3 kg/h"),
    ("3 ton/h", "flow", "write 3 t/h"),
    ("3 T/h", "flow", "write 3 t/h"),
    ("3 Kg/h", "flow", "write 3 kg/h"),
    ("3 M3/h", "flow", "write 3 m3/h"),
    ("3 gal/min", "flow", "write 3 gpm or 3 igpm"),
    ("3 kg/h", "volume_flow", "kg/h is the unit of a mass flow"),
    ("3 m3/h", "mass_flow", "m3/h is the unit of a volume flow at operating conditions"),
    ("3 Nm3/h", "volume_flow", "Nm3/h is the unit of a volume flow at base conditions"),
    ("3 m3/h", "base_volume_flow", "m3/h is the unit of a volume flow at operating conditions"),
    ("3 kW", "mass_flow", "kW is the unit of an energy flow or a power"),
    ("3 mm", "flow", "mm is the unit of a length or a roughness"),
    ("3 degC", "pressure", "degC is the unit of a temperature or a difference of temperature"),
    ("3 kg/m3", "viscosity", "kg/m3 is the unit of a density"),
    ("3 cSt", "dynamic_viscosity", "cSt is the unit of a kinematic viscosity"),
    ("3 mm2/s", "dynamic_viscosity", "mm2/s is the unit of a kinematic viscosity"),
    ("3 mPa", "viscosity", "write 3 mPa s or 3 Pa s"),
    ("3 %", "dimensionless", "% is the unit of a ratio or a percentage; no unit is read"),
    ("3 mm", "dimensionless", "mm is the unit of a length or a roughness; no unit is read"),
    (
        "3 mg/L",
        "ratio",
        "the unit mg/L is a concentration, not a ratio",
    ),
    ("30 wt%", "ratio", "write 30 %"),
    ("60 % RH", "ratio", "write 60 %"),
    (
        "35 MJ/Nm3",
        "volume_energy",
        "the unit MJ/Nm3 names a base of its own",
    ),
    ("0.11 EUR/kWh", "money_rate", "write 0.11 1/kWh"),
    (
        "3 L/pulse",
        "pulse_factor",
        "the unit L/pulse is the value of a pulse; state its inverse, the pulses by volume",
    ),
    ("3 uS", "conductivity", "write 3 uS/m"),
    ("3 kg/hh", "flow", "write 3 kg/h, 3 g/h or 3 mg/h"),
    ("3 furlong", "length", 'the unit "furlong" is not known'),
    ("3 m/m", "length", "write 3 mm"),
    ("3 US/cm", "conductivity", "write 3 uS/cm"),
    ("3 W/m K", "thermal_conductivity", "write 3 W/m/K or 3 mW/m/K"),
    ("3 kJ/kg K", "heat_capacity", "write 3 kJ/kg/K, 3 J/kg/K or 3 J/g/K"),
    ("3 deg", "temperature", "deg is the unit of an angle"),
    ("3 tons", "mass", "write 3 t"),
    ("3 bbl", "flow", "bbl is the unit of a volume"),
    ("EUR 3", "money_rate", 'a number and its unit is read, such as "20 1/kWh"'),
    ("DN 150", "length", 'a number and its unit is read, such as "20 mm"'),
    ("6 x 3 mm", "length", 'the unit "x 3 mm" is not known'),
    ("3 barr(g)", "pressure", "write 3 bar(g), 3 mbar(g) or 3 bar(a)"),
    ("3 kgs/h", "flow", "write 3 kg/h, 3 g/h or 3 mg/h"),
    ("0.111/kWh", "money_rate", 'a number and its unit is read, such as "20 1/kWh"'),
    ("100 in H2O", "pressure", "write 100 inH2O(60degF)(g), 100 inH2O(60degF)(a), 100"),
    ("3 bar(g) to 5 bar(g)", "pressure", "write 3 bar(g) or 5 bar(g)"),
    ("2½ in", "length", "write 2.5 in"),
    ("10³ kg/h", "flow", "write 1e3 kg/h"),
    ("1.5×10⁻³ Pa·s", "viscosity", "write 1.5e-3 Pa s"),
    ("1 500 kg/h", "flow", "write 1500 kg/h"),
    ("5 W", "length", "W is the unit of an energy flow or a power"),
]


@pytest.mark.parametrize(("text", "kind", "part"), REFUSED)
def test_text_is_refused_with_help(text: str, kind: str, part: str) -> None:
    read = parse(text, kind)
    assert isinstance(read, Refusal), f"read as {read.value} {read.unit}"
    assert part in read.message


@pytest.mark.parametrize(("text", "kind"), [row[:2] for row in REFUSED])
def test_message_names_what_was_wanted_and_what_came(text: str, kind: str) -> None:
    read = parse(text, kind)
    assert isinstance(read, Refusal)
    assert read.message.startswith(KINDS[kind].label.partition(":")[0])
    assert (tidy(text) or "nothing") in read.message


@pytest.mark.parametrize(("text", "kind"), [row[:2] for row in REFUSED])
def test_what_is_to_be_written_is_read(text: str, kind: str) -> None:
    read = parse(text, kind)
    assert isinstance(read, Refusal)
    for offer in read.write:
        assert offer in read.message
        assert isinstance(parse(offer, kind), Quantity), offer


def test_long_text_is_shortened_in_the_message() -> None:
    read = parse("9" * 300 + " m", "length")
    assert isinstance(read, Refusal)
    assert "longer than 200 characters" in read.message
    assert len(read.message) < 160


def test_message_is_printable() -> None:
    read = parse("5 \x1b[31m mm\n", "length")
    assert isinstance(read, Refusal)
    assert read.message.isprintable()


@pytest.mark.parametrize(
    "text", ["1-" * 99, "1," * 99, "~" * 199, "1 a " * 49, "1/" * 99, "+-" * 99]
)
def test_hostile_text_is_refused_with_few_offers(text: str) -> None:
    """Habits are mended a few deep only, so that a long text cannot multiply its offers."""
    read = parse(text, "flow")
    assert isinstance(read, Refusal)
    assert len(read.write) <= 32


_NUMBERS = ["1", "5", "1.5", ",", ".", "-", "+", "±", "~", "/", "x10^", "³", "½", "NaN", "'", "_"]
_WORDS = [" ", "e", "to ", ":", "*", "(", ")", "bar", "(g)", "kg/h", "m3/h", "%", "degC", "inH2O"]
_PIECES = st.sampled_from([*_NUMBERS, *_WORDS])


@given(
    text=st.one_of(st.text(max_size=30), st.lists(_PIECES, max_size=8).map("".join)),
    kind=st.sampled_from(sorted(KINDS)),
)
def test_any_text_is_read_or_refused(text: str, kind: str) -> None:
    """No text raises, and every text offered to be written is one that is read."""
    read = parse(text, kind)
    if isinstance(read, Refusal):
        assert read.message.isprintable()
        assert all(isinstance(parse(offer, kind), Quantity) for offer in read.write)
    else:
        assert read.kind in (KINDS[kind].members or (kind,))
