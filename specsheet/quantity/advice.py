"""What to say about spellings that are common in the trade but say too little.

Keys are spellings in small letters without spaces.
"""

from __future__ import annotations

from typing import NamedTuple


class Advice(NamedTuple):
    """Why a spelling is not read, and what says it in full.

    Attributes:
        why: words that follow "the unit ...".
        units: units to write instead; the advice is given where the kind wanted has one of them.
        kind: the one kind it is given for, where there is no unit to write instead.
    """

    why: str
    units: tuple[str, ...] = ()
    kind: str = ""


_LITRE_BASE = Advice(
    "names no base: makers use 0, 15, 20 and 21.1 degC for it; find out which,"
    " and use NL/min for 0 degC",
    ("NL/min", "L/min(base)"),
)
_CUBIC_CENTIMETRE_BASE = Advice(
    "names no base: makers use 0, 15, 20 and 21.1 degC for it; find out which,"
    " and use NmL/min for 0 degC",
    ("NmL/min",),
)
_CFM = Advice("does not say whether the volume is actual or at base", ("ft3/min", "scfm"))
_CFH = Advice("does not say whether the volume is actual or at base", ("ft3/h", "scfh"))
_GALLON = Advice("does not say which gallon", ("USgal", "impgal"))
_WATER = "needs the temperature of the liquid column"
_TON = Advice("can mean 1000 kg, 2000 lb or 2240 lb; t is 1000 kg", ("t",))
_TON_HOUR = Advice("can mean 1000 kg, 2000 lb or 2240 lb; t is 1000 kg", ("t/h",))
_BASE_ENERGY = Advice(
    "names a base of its own, but the energy is wanted by cubic metre at the job's base:"
    " convert it first",
    kind="volume_energy",
)
_TORQUE = Advice(
    "begins with the newton metre, which is no flow; a normal cubic metre is Nm3",
    ("Nm3/h",),
)
_MONEY = Advice("names a currency; the job names it once, under currency", ("1/kWh",))
_PULSE = Advice(
    "is the value of a pulse; state its inverse, the pulses by volume",
    kind="pulse_factor",
)

ADVICE: dict[str, Advice] = {
    "slpm": _LITRE_BASE,
    "slm": _LITRE_BASE,
    "sl/min": _LITRE_BASE,
    "nlpm": Advice("is written NL/min", ("NL/min",)),
    "sccm": _CUBIC_CENTIMETRE_BASE,
    "scc/min": _CUBIC_CENTIMETRE_BASE,
    "cfm": _CFM,
    "cfh": _CFH,
    "icfm": Advice("is at inlet conditions; state the actual volume", ("ft3/min",)),
    "nm": _TORQUE,
    "nm/h": _TORQUE,
    "m3": Advice("lacks a time", ("m3/h",)),
    "kg": Advice("lacks a time", ("kg/h",)),
    "t": Advice("lacks a time", ("t/h",)),
    "nm3": Advice("lacks a time", ("Nm3/h",)),
    "sm3": Advice("lacks a time", ("Sm3/h",)),
    "gal": _GALLON,
    "gal/min": Advice("does not say which gallon", ("gpm", "igpm")),
    "gal/h": Advice("does not say which gallon", ("gph", "impgal/h")),
    "gal/d": Advice("does not say which gallon", ("USgal/d", "impgal/d")),
    "1/gal": Advice("does not say which gallon", ("1/USgal",)),
    "pulse/gal": Advice("does not say which gallon", ("1/USgal",)),
    "inh2o": Advice(_WATER, ("inH2O(60degF)", "inH2O(4degC)", "inH2O(20degC)")),
    "inwc": Advice(_WATER, ("inH2O(60degF)", "inH2O(4degC)", "inH2O(20degC)")),
    "mmh2o": Advice(_WATER, ("mmH2O(4degC)", "mmH2O(20degC)")),
    "mmwc": Advice(_WATER, ("mmH2O(4degC)", "mmH2O(20degC)")),
    "mh2o": Advice(_WATER, ("mH2O(4degC)",)),
    "fth2o": Advice(_WATER, ("ftH2O(4degC)",)),
    "inhg": Advice(_WATER, ("inHg(32degF)",)),
    "kg/cm2": Advice("is a force by area, written with the kilogram-force", ("kgf/cm2",)),
    "ton": _TON,
    "tons": _TON,
    "tonne": Advice("is written t", ("t",)),
    "ton/h": _TON_HOUR,
    "tons/h": _TON_HOUR,
    "tph": _TON_HOUR,
    "mg/l": Advice(
        "is a concentration, not a ratio; in dilute water 1 mg/L is close to 1 ppm by mass",
        kind="ratio",
    ),
    "mj/nm3": _BASE_ENERGY,
    "kwh/nm3": _BASE_ENERGY,
    "mj/sm3": _BASE_ENERGY,
    "kwh/sm3": _BASE_ENERGY,
    "btu/scf": _BASE_ENERGY,
    "eur/kwh": _MONEY,
    "usd/kwh": _MONEY,
    "l/pulse": _PULSE,
    "m3/pulse": _PULSE,
    "vol%": Advice("names a basis, which the entry states already", ("%",)),
    "wt%": Advice("names a basis, which the entry states already", ("%",)),
    "mol%": Advice("names a basis, which the entry states already", ("%",)),
    "%rh": Advice("is written %", ("%",)),
}
