"""Spellings that are read, with their SI value worked out by hand.

The expected figures are written as arithmetic on definitions: 1 in = 25.4 mm and
1 lb = 0.45359237 kg (international yard and pound, 1959), g = 9.80665 m/s2, 1 USgal = 231 in3,
1 impgal = 4.54609 L, 1 bbl = 42 USgal, 1 BTU(IT) = 1055.05585262 J, 1 cal(IT) = 4.1868 J,
1 atm = 101325 Pa (NIST SP 811:2008, appendix B, from memory).
"""

from __future__ import annotations

import pytest

from specsheet.quantity import CUSTOMARY, NORMAL, STANDARD, Quantity, parse

IN = 0.0254
FT = 0.3048
LB = 0.45359237
G = 9.80665
PSI = LB * G / IN**2
FT3 = FT**3
GAL = 231 * IN**3
BBL = 42 * GAL
BTU = 1055.05585262

# text, kind wanted, SI value
ACCEPTED = [
    # mass flow
    ("3.1 t/h", "flow", 3.1 / 3.6),
    ("3.1t/h", "flow", 3.1 / 3.6),
    ("3100 kg/h", "flow", 3.1 / 3.6),
    ("3100 kg/hr", "mass_flow", 3.1 / 3.6),
    ("0.5 kg/s", "mass_flow", 0.5),
    ("30 kg/min", "mass_flow", 0.5),
    ("43200 kg/d", "mass_flow", 0.5),
    ("500 g/s", "mass_flow", 0.5),
    ("12 t/d", "mass_flow", 12000 / 86400),
    ("7200 lb/h", "flow", 2 * LB),
    ("7.2 klb/h", "flow", 2 * LB),
    ("2 lb/s", "flow", 2 * LB),
    ("120 lb/min", "flow", 2 * LB),
    ("5 kg / h", "flow", 5 / 3600),
    ("5 kg h-1", "flow", 5 / 3600),
    ("5 kg·h⁻¹", "flow", 5 / 3600),
    # volume flow, actual
    ("36 m3/h", "flow", 0.01),
    ("36 m³/h", "flow", 0.01),
    ("36 m^3/h", "volume_flow", 0.01),
    ("36 m3/hr", "volume_flow", 0.01),
    ("0.01 m3/s", "volume_flow", 0.01),
    ("864 m3/d", "volume_flow", 0.01),
    ("600 L/min", "volume_flow", 0.01),
    ("600 l/min", "volume_flow", 0.01),
    ("600 lpm", "volume_flow", 0.01),
    ("10 L/s", "volume_flow", 0.01),
    ("36000 L/h", "volume_flow", 0.01),
    ("60 mL/min", "volume_flow", 1e-6),
    ("60 ml/min", "volume_flow", 1e-6),
    ("86.4 ML/d", "volume_flow", 1.0),
    ("86.4 Ml/d", "volume_flow", 1.0),
    ("60 gpm", "volume_flow", GAL),
    ("60 USgal/min", "volume_flow", GAL),
    ("60 GPM", "volume_flow", GAL),
    ("60 igpm", "volume_flow", 4.54609e-3),
    ("86400 bbl/d", "volume_flow", BBL),
    ("3600 bbl/h", "volume_flow", BBL),
    ("86400 bpd", "volume_flow", BBL),
    ("1 acft/d", "volume_flow", 43560 * FT3 / 86400),
    ("8.64 MGD", "volume_flow", 100 * GAL),
    ("60 ft3/min", "volume_flow", FT3),
    ("60 ft³/min", "volume_flow", FT3),
    ("60 acfm", "volume_flow", FT3),
    ("1 ft3/s", "volume_flow", FT3),
    ("1 cusec", "volume_flow", FT3),
    ("2 cumec", "volume_flow", 2.0),
    ("0.5 Sv", "volume_flow", 5e5),
    ("0 m3/h", "flow", 0.0),
    # energy flow and power
    ("3.6 GJ/h", "flow", 1e6),
    ("1.2 MW", "flow", 1.2e6),
    ("850 kW", "energy_flow", 8.5e5),
    ("3600 BTU/h", "energy_flow", BTU),
    ("3600 Btu/h", "energy_flow", BTU),
    ("86400 BTU/d", "energy_flow", BTU),
    ("86.4 MMBTU/d", "energy_flow", 1000 * BTU),
    ("3600 kcal/h", "energy_flow", 4186.8),
    ("15 kW", "power", 15000.0),
    ("2 hp", "power", 1100 * FT * LB * G),
    # pressures
    ("7 bar(g)", "pressure", 7e5),
    ("7.0 bar (g)", "pressure", 7e5),
    ("7 barg", "pressure", 7e5),
    ("7 bar g", "pressure", 7e5),
    ("7 bar gauge", "pressure", 7e5),
    ("7 bar(gauge)", "pressure", 7e5),
    ("7bar(g)", "pressure", 7e5),
    ("7 bar(a)", "pressure", 7e5),
    ("7 bara", "pressure", 7e5),
    ("7 bar abs", "pressure", 7e5),
    ("7 bar(abs)", "pressure", 7e5),
    ("7 bar absolute", "pressure", 7e5),
    ("700 kPa(g)", "pressure", 7e5),
    ("700 kPag", "pressure_gauge", 7e5),
    ("700 kPaa", "pressure_absolute", 7e5),
    ("0.7 MPa(a)", "pressure", 7e5),
    ("0.7 MPa(g)", "pressure", 7e5),
    ("100 psig", "pressure", 100 * PSI),
    ("100 PSIG", "pressure", 100 * PSI),
    ("100 psi(g)", "pressure", 100 * PSI),
    ("14.7 psia", "pressure", 14.7 * PSI),
    ("-0.3 bar(g)", "pressure", -3e4),
    ("−0.3 bar(g)", "pressure", -3e4),
    ("0 bar(a)", "pressure", 0.0),
    ("1013.25 mbar(a)", "pressure_absolute", 101325.0),
    ("1013.25 hPa(a)", "pressure_absolute", 101325.0),
    ("760 mmHg(a)", "pressure_absolute", 760 * 133.322387415),
    ("1 atm(a)", "pressure_absolute", 101325.0),
    ("2 kgf/cm2(g)", "pressure_gauge", 2 * G * 1e4),
    ("2 kgf/cm²(g)", "pressure_gauge", 2 * G * 1e4),
    ("10 inH2O(60degF)(g)", "pressure_gauge", 2488.4),
    ("250 mbar", "pressure_difference", 25000.0),
    ("25 kPa", "pressure_difference", 25000.0),
    ("100 inH2O(60degF)", "pressure_difference", 24884.0),
    ("100 inH₂O(60°F)", "pressure_difference", 24884.0),
    ("100 inH2O(4degC)", "pressure_difference", 24908.2),
    ("100 inH2O(39.2degF)", "pressure_difference", 24908.2),
    ("2500 mmH2O(4degC)", "pressure_difference", 2500e-3 * 999.972 * G),
    ("2 psi", "pressure_difference", 2 * PSI),
    ("10 inHg(32degF)", "pressure_difference", 10 * 25.4 * 133.322387415),
    ("120 N/mm2", "pressure_difference", 1.2e8),
    # temperatures
    ("185 degC", "temperature", 458.15),
    ("185 °C", "temperature", 458.15),
    ("185 ºC", "temperature", 458.15),
    ("185℃", "temperature", 458.15),
    ("185 deg C", "temperature", 458.15),
    ("185 C", "temperature", 458.15),
    ("-10 degC", "temperature", 263.15),
    ("\u221210 degC", "temperature", 263.15),
    ("+40 degC", "temperature", 313.15),
    ("32 degF", "temperature", 273.15),
    ("60 °F", "temperature", 519.67 / 1.8),
    ("300 K", "temperature", 300.0),
    ("540 degR", "temperature", 300.0),
    ("15 K", "temperature_difference", 15.0),
    ("15 degC", "temperature_difference", 15.0),
    ("18 degF", "temperature_difference", 10.0),
    ("-5 K", "temperature_difference", -5.0),
    # lengths, areas, volumes, angles
    ("154.1 mm", "length", 0.1541),
    ("15.41 cm", "length", 0.1541),
    ("6 in", "length", 0.1524),
    ('6"', "length", 0.1524),
    ("6″", "length", 0.1524),
    ("2 ft", "length", 0.6096),
    ("50 um", "roughness", 5e-5),
    ("50 µm", "roughness", 5e-5),
    ("50 μm", "roughness", 5e-5),
    ("2 mil", "roughness", 5.08e-5),
    ("-28 m", "elevation", -28.0),
    ("1000 ft", "elevation", 304.8),
    ("3 mm²", "area", 3e-6),
    ("2 USgal", "volume", 2 * GAL),
    ("2 l", "volume", 2e-3),
    ("45 deg", "angle", 0.7853981633974483),
    ("45°", "angle", 0.7853981633974483),
    # fluid properties
    ("870 kg/m3", "density", 870.0),
    ("870 kg/m³", "density", 870.0),
    ("870 kg m-3", "density", 870.0),
    ("0.87 g/cm3", "density", 870.0),
    ("0.87 kg/L", "density", 870.0),
    ("4.1 g/L", "density", 4.1),
    ("62.4 lb/ft3", "density", 62.4 * LB / FT3),
    ("1 cP", "viscosity", 1e-3),
    ("1 mPa s", "viscosity", 1e-3),
    ("1 mPa.s", "viscosity", 1e-3),
    ("1 mPa·s", "viscosity", 1e-3),
    ("1 mPa*s", "viscosity", 1e-3),
    ("1 mPas", "viscosity", 1e-3),
    ("15.1 uPa s", "viscosity", 1.51e-5),
    ("15.1 µPa·s", "dynamic_viscosity", 1.51e-5),
    ("1e-3 Pa s", "dynamic_viscosity", 1e-3),
    ("0.01 P", "dynamic_viscosity", 1e-3),
    ("46 cSt", "viscosity", 4.6e-5),
    ("46 mm2/s", "viscosity", 4.6e-5),
    ("46 mm²/s", "kinematic_viscosity", 4.6e-5),
    ("1e-6 m2/s", "kinematic_viscosity", 1e-6),
    ("0.46 St", "kinematic_viscosity", 4.6e-5),
    ("450 uS/cm", "conductivity", 0.045),
    ("450 µS/cm", "conductivity", 0.045),
    ("0.45 mS/cm", "conductivity", 0.045),
    ("45 mS/m", "conductivity", 0.045),
    ("0.045 S/m", "conductivity", 0.045),
    ("410 m/s", "velocity", 410.0),
    ("410 m s-1", "velocity", 410.0),
    ("10 ft/s", "velocity", 3.048),
    ("2.1 kJ/kg/K", "heat_capacity", 2100.0),
    ("2.1 kJ/(kg K)", "heat_capacity", 2100.0),
    ("2.1 kJ/(kg·K)", "heat_capacity", 2100.0),
    ("2100 J kg-1 K-1", "heat_capacity", 2100.0),
    ("1 kcal/kg/K", "heat_capacity", 4186.8),
    ("1 BTU/lb/degF", "heat_capacity", 4186.8),
    ("0.6 W/m/K", "thermal_conductivity", 0.6),
    ("0.6 W/(m·K)", "thermal_conductivity", 0.6),
    ("28.1 g/mol", "molar_mass", 0.0281),
    ("28.1 kg/kmol", "molar_mass", 0.0281),
    ("28.1 lb/lbmol", "molar_mass", 0.0281),
    ("50 MJ/kg", "specific_energy", 5e7),
    ("1 BTU/lb", "specific_energy", 2326.0),
    ("39.8 MJ/m3", "volume_energy", 3.98e7),
    ("11 kWh/m3", "volume_energy", 3.96e7),
    ("1000 BTU/ft3", "volume_energy", 1000 * BTU / FT3),
    ("12e-6 1/K", "expansion", 1.2e-5),
    ("12e-6 K-1", "expansion", 1.2e-5),
    ("12 um/m/K", "expansion", 1.2e-5),
    # ratios, numbers, signals, the rest
    ("1.5 %", "ratio", 0.015),
    ("1.5%", "ratio", 0.015),
    ("1.5 percent", "ratio", 0.015),
    ("80 ppm", "ratio", 8e-5),
    ("35 ‰", "ratio", 0.035),
    ("35 g/kg", "ratio", 0.035),
    ("0.3 kg/kg", "ratio", 0.3),
    ("1.31", "dimensionless", 1.31),
    (".5", "dimensionless", 0.5),
    ("１．３１", "dimensionless", 1.31),
    ("-3", "dimensionless", -3.0),
    ("0.35 1/L", "pulse_factor", 350.0),
    ("0.35 pulse/L", "pulse_factor", 350.0),
    ("350 pulses/m3", "pulse_factor", 350.0),
    ("2 pulse/USgal", "pulse_factor", 2 / GAL),
    ("1500 rpm", "rotation", 25.0),
    ("1500 1/min", "rotation", 25.0),
    ("2 kHz", "frequency", 2000.0),
    ("12 mA", "current", 0.012),
    ("3 mV", "voltage", 0.003),
    ("40 ns", "time", 4e-8),
    ("40 µs", "time", 4e-5),
    ("1.5 min", "time", 90.0),
    ("8000 h", "time", 2.88e7),
    ("2 kN", "force", 2000.0),
    ("2 lbf", "force", 2 * LB * G),
    ("12 kg", "mass", 12.0),
    ("12 lb", "mass", 12 * LB),
    ("2 MWh", "energy", 7.2e9),
    ("0.36 1/kWh", "money_rate", 1e-7),
    ("100 1/GJ", "money_rate", 1e-7),
]

# text, SI value, base; the bases are those of DIN 1343, ISO 13443 and the US gas trade
BASES = [
    ("36 Nm3/h", 0.01, NORMAL),
    ("36 Nm³/h", 0.01, NORMAL),
    ("600 NL/min", 0.01, NORMAL),
    ("600 Nl/min", 0.01, NORMAL),
    ("36 Sm3/h", 0.01, STANDARD),
    ("864 Sm3/d", 0.01, STANDARD),
    ("60 scfm", FT3, CUSTOMARY),
    ("60 SCFM", FT3, CUSTOMARY),
    ("3600 scfh", FT3, CUSTOMARY),
    ("86.4 MSCFD", FT3, CUSTOMARY),
    ("0.0864 MMSCFD", FT3, CUSTOMARY),
    ("0.0864 MMscf/d", FT3, CUSTOMARY),
    ("36 m3/h(base)", 0.01, None),
    ("36 m³/h (base)", 0.01, None),
]


@pytest.mark.parametrize(("text", "kind", "value"), ACCEPTED)
def test_spelling_is_read(text: str, kind: str, value: float) -> None:
    read = parse(text, kind)
    assert isinstance(read, Quantity), read.message
    assert read.value == pytest.approx(value, rel=2e-6 if "H2O" in read.unit else 1e-7)


@pytest.mark.parametrize(("text", "value", "base"), BASES)
def test_base_volume_names_its_base(text: str, value: float, base: object) -> None:
    read = parse(text, "flow")
    assert isinstance(read, Quantity), read.message
    assert (read.kind, read.base) == ("base_volume_flow", base)
    assert read.value == pytest.approx(value, rel=1e-12)


@pytest.mark.parametrize(
    ("text", "union", "kind", "unit"),
    [
        ("1 t/h", "flow", "mass_flow", "t/h"),
        ("1 l/min", "flow", "volume_flow", "L/min"),
        ("1 SCFH", "flow", "base_volume_flow", "scfh"),
        ("1 kW", "flow", "energy_flow", "kW"),
        ("1 barg", "pressure", "pressure_gauge", "bar(g)"),
        ("1 psia", "pressure", "pressure_absolute", "psi(a)"),
        ("1 cP", "viscosity", "dynamic_viscosity", "cP"),
        ("1 cSt", "viscosity", "kinematic_viscosity", "cSt"),
        ("1", "dimensionless", "dimensionless", "1"),
    ],
)
def test_union_yields_its_member(text: str, union: str, kind: str, unit: str) -> None:
    read = parse(text, union)
    assert isinstance(read, Quantity)
    assert (read.kind, read.unit) == (kind, unit)


@pytest.mark.parametrize(
    ("typed", "echo"),
    [
        ("  7.0 bar(g) ", "7.0 bar(g)"),
        ("3.10\u00a0t/h", "3.10 t/h"),
        ("3.10\u202ft/h", "3.10 t/h"),
        ("３.１０ t/h", "3.10 t/h"),
        ("\ufeff3.10 t/h", "3.10 t/h"),
        ("36 m³/h", "36 m³/h"),
        ("1.50E2 kg/h", "1.50E2 kg/h"),
        ("3.10\t t/h\n", "3.10 t/h"),
    ],
)
def test_what_was_typed_is_echoed(typed: str, echo: str) -> None:
    kind = "pressure" if "bar" in typed else "flow"
    read = parse(typed, kind)
    assert isinstance(read, Quantity)
    assert read.text == echo


def test_base_conditions() -> None:
    """DIN 1343 and ISO 13443; 60 °F and 14.696 psia give 379.49 scf/lbmol (GPA figure)."""
    assert (NORMAL.temperature, NORMAL.pressure) == (273.15, 101325.0)
    assert (STANDARD.temperature, STANDARD.pressure) == (288.15, 101325.0)
    molar_volume = 8.314462618 * CUSTOMARY.temperature / CUSTOMARY.pressure
    assert molar_volume * 1000 * LB / FT3 == pytest.approx(379.49, rel=5e-5)


def test_unknown_kind_is_our_mistake() -> None:
    with pytest.raises(KeyError):
        parse("1 m", "lenght")
