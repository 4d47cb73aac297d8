"""Units of flow: mass, volume at operating conditions, volume at base conditions, energy.

Most are the product of an amount and a time, so that kg/min and lb/s exist without being listed.
"""

from __future__ import annotations

from specsheet.quantity.bases import CUSTOMARY, NORMAL, STANDARD
from specsheet.quantity.unit import (
    ACRE_FOOT,
    BARREL,
    BTU,
    CALORIE,
    CUBIC_FOOT,
    DAY,
    FOOT,
    GRAVITY,
    HOUR,
    IMPERIAL_GALLON,
    MINUTE,
    POUND,
    US_GALLON,
    Unit,
    unit,
)
from specsheet.quantity.value import Base

_TIMES = {"h": HOUR, "s": 1.0, "min": MINUTE, "d": DAY}
_MASSES = {"kg": 1.0, "t": 1000.0, "g": 1e-3, "lb": POUND, "klb": 1000.0 * POUND, "mg": 1e-6}
_VOLUMES = {
    "m3": 1.0,
    "L": 1e-3,
    "mL": 1e-6,
    "ML": 1e3,
    "dm3": 1e-3,
    "cm3": 1e-6,
    "ft3": CUBIC_FOOT,
    "USgal": US_GALLON,
    "impgal": IMPERIAL_GALLON,
    "bbl": BARREL,
    "acft": ACRE_FOOT,
}
_NORMAL = {"Nm3": 1.0, "kNm3": 1e3, "NL": 1e-3, "NmL": 1e-6}
_STANDARD = {"Sm3": 1.0, "kSm3": 1e3, "MSm3": 1e6}
_CUSTOMARY = {"scf": CUBIC_FOOT}
_JOB = {"m3": 1.0, "L": 1e-3, "ft3": CUBIC_FOOT}

#: the trade's own names for some products: product -> (canonical spelling, other spellings)
_NAMES: dict[str, tuple[str, tuple[str, ...]]] = {
    "L/min": ("L/min", ("lpm", "LPM")),
    "m3/s": ("m3/s", ("cumec",)),
    "m3/h": ("m3/h", ("Am3/h",)),
    "ft3/min": ("ft3/min", ("acfm", "ACFM")),
    "ft3/h": ("ft3/h", ("acfh", "ACFH")),
    "ft3/s": ("ft3/s", ("cusec",)),
    "USgal/min": ("gpm", ("USgal/min", "GPM", "USgpm")),
    "USgal/h": ("gph", ("USgal/h", "GPH")),
    "impgal/min": ("igpm", ("impgal/min", "IGPM")),
    "bbl/d": ("bbl/d", ("bpd", "BPD")),
    "bbl/h": ("bbl/h", ("bph", "BPH")),
    "scf/min": ("scfm", ("scf/min", "SCFM")),
    "scf/h": ("scfh", ("scf/h", "SCFH")),
    "scf/d": ("scf/d", ("scfd", "SCFD")),
    "NL/min": ("NL/min", ("Nl/min",)),
}


def _with_litre(name: str) -> tuple[str, ...]:
    """Return the spelling with a small l where the litre is written L, if any."""
    amount = name.split("/", 1)[0]
    if amount in ("L", "mL", "ML", "NL", "NmL"):
        return (name.replace("L", "l", 1),)
    return ()


def _products(amounts: dict[str, float], suffix: str = "", base: Base | None = None) -> list[Unit]:
    """Return amount/time for every pair, under the trade's name where it has one."""
    rows = []
    for amount, size in amounts.items():
        for time, seconds in _TIMES.items():
            product = f"{amount}/{time}"
            name, aliases = _NAMES.get(product, (product, ()))
            if suffix:
                name, aliases = product + suffix, ()
            spellings = tuple(dict.fromkeys((*aliases, *_with_litre(product + suffix))))
            rows.append(Unit(name, size / seconds, spellings, base=base))
    return rows


def _customary(name: str, factor: float, *aliases: str) -> Unit:
    return Unit(name, factor, aliases, base=CUSTOMARY)


_HEAT_RATES = (
    unit("MW", 1e6),
    unit("kW", 1e3),
    unit("W", 1.0, "J/s"),
    unit("GW", 1e9),
    unit("GJ/h", 1e9 / HOUR),
    unit("MJ/h", 1e6 / HOUR),
    unit("kJ/h", 1e3 / HOUR),
    unit("MJ/s", 1e6),
    unit("GJ/d", 1e9 / DAY),
    unit("TJ/d", 1e12 / DAY),
    unit("kWh/h", 1e3),
    unit("MWh/d", 3.6e9 / DAY),
    unit("BTU/h", BTU / HOUR, "Btu/h", "btu/h"),
    unit("BTU/d", BTU / DAY, "Btu/d", "btu/d"),
    unit("MMBTU/h", 1e6 * BTU / HOUR, "MMBtu/h", "MMbtu/h"),
    unit("MMBTU/d", 1e6 * BTU / DAY, "MMBtu/d", "MMbtu/d"),
    unit("kcal/h", 1e3 * CALORIE / HOUR),
    unit("Mcal/h", 1e6 * CALORIE / HOUR),
    unit("Gcal/h", 1e9 * CALORIE / HOUR),
)

_USUAL = (
    *("kg/h", "t/h", "kg/s", "kg/min", "lb/h", "klb/h", "g/s", "t/d"),
    *("m3/h", "L/min", "m3/s", "L/s", "gpm", "ft3/min", "bbl/d", "m3/d"),
    *("Nm3/h", "Sm3/h", "m3/h(base)", "scfm", "MMSCFD", "NL/min", "Sm3/d", "scfh"),
)


def _usual_first(rows: list[Unit]) -> tuple[Unit, ...]:
    rank = {name: place for place, name in enumerate(_USUAL)}
    return tuple(sorted(rows, key=lambda row: rank.get(row.name, len(rank))))


#: kind -> its units, the usual ones first
FLOW_UNITS: dict[str, tuple[Unit, ...]] = {
    "mass_flow": _usual_first(_products(_MASSES)),
    "volume_flow": _usual_first(
        [
            *_products(_VOLUMES),
            unit("MGD", 1e6 * US_GALLON / DAY, "mgd"),
            unit("Sv", 1e6),  # sverdrup, oceanographic transport
        ]
    ),
    "base_volume_flow": _usual_first(
        [
            *_products(_NORMAL, base=NORMAL),
            *_products(_STANDARD, base=STANDARD),
            *_products(_CUSTOMARY, base=CUSTOMARY),
            _customary("MSCFD", 1e3 * CUBIC_FOOT / DAY, "Mscfd", "Mscf/d"),
            _customary("MMSCFD", 1e6 * CUBIC_FOOT / DAY, "MMscfd", "MMscf/d"),
            *_products(_JOB, suffix="(base)"),
        ]
    ),
    "energy_flow": _HEAT_RATES,
    "power": (*_HEAT_RATES, unit("mW", 1e-3), unit("hp", 550.0 * FOOT * POUND * GRAVITY)),
}
