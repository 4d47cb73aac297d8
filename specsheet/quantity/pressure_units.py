"""Units of pressure: the same steps for a difference, a gauge and an absolute pressure.

Gauge and absolute are kinds, so their units carry (g) or (a) and a difference carries neither. A
column of liquid names its temperature, because the density of the liquid is part of the unit:
water 999.972 kg/m3 at 4 °C, 999.001 kg/m3 at 60 °F (the conventional figures behind 249.082 and
248.84 Pa of NIST SP 811) and, from memory, 998.2063 kg/m3 at 20 °C (248.641 Pa).
"""

from __future__ import annotations

from specsheet.quantity.bases import PSI
from specsheet.quantity.unit import GRAVITY, INCH, Unit, unit

_MMHG = 133.322387415  # conventional millimetre of mercury, 13595.1 kg/m3 x 9.80665 m/s2
_WATER_4C = 999.972 * GRAVITY  # of one metre
_WATER_60F = 999.001 * GRAVITY
_WATER_20C = 998.2063 * GRAVITY

_STEPS = (
    unit("bar", 1e5),
    unit("mbar", 100.0),
    unit("kPa", 1e3, "kN/m2"),
    unit("Pa", 1.0, "N/m2"),
    unit("hPa", 100.0),
    unit("MPa", 1e6, "N/mm2"),
    unit("psi", PSI, "PSI", "lbf/in2"),
    unit("kgf/cm2", GRAVITY * 1e4),
    unit("atm", 101325.0),
    unit("Torr", 101325.0 / 760.0, "torr"),
    unit("mmHg", _MMHG, "mmHg(0degC)"),
    unit("inHg(32degF)", 25.4 * _MMHG, "inHg(0degC)"),
    unit("mmH2O(4degC)", 1e-3 * _WATER_4C),
    unit("mmH2O(20degC)", 1e-3 * _WATER_20C),
    unit("inH2O(4degC)", INCH * _WATER_4C, "inH2O(39.2degF)"),
    unit("inH2O(60degF)", INCH * _WATER_60F),
    unit("inH2O(20degC)", INCH * _WATER_20C, "inH2O(68degF)"),
    unit("ftH2O(4degC)", 12.0 * INCH * _WATER_4C, "ftH2O(39.2degF)"),
    unit("mH2O(4degC)", _WATER_4C),
)


def _referred(letter: str) -> tuple[Unit, ...]:
    """Return the units of a gauge (g) or absolute (a) pressure: bar(g), barg, psig ..."""
    rows = []
    for step in _STEPS:
        aliases = [f"{alias}({letter})" for alias in step.aliases]
        if step.name.isalpha():
            aliases.append(step.name + letter)
        if step.name == "psi":
            aliases.append("PSI" + letter.upper())
        rows.append(unit(f"{step.name}({letter})", step.factor, *aliases))
    return tuple(rows)


PRESSURE_UNITS: dict[str, tuple[Unit, ...]] = {
    "pressure_difference": _STEPS,
    "pressure_gauge": _referred("g"),
    "pressure_absolute": _referred("a"),
}
