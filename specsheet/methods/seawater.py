"""Seawater: what the salt adds to pure water, and its viscosity.

Sources: IAPWS R13-08 (saline part; coefficients in ``profiles/fluids/seawater.toml``) with pure
water by IAPWS-IF97, as IAPWS advisory note 5 has it; M. H. Sharqawy, J. H. Lienhard and S. M.
Zubair, Desalination and Water Treatment 16 (2010) 354 (viscosity and vapour pressure; from memory).
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

_SALINITY = 0.03516504 * 40.0 / 35.0
_TEMPERATURE = 40.0
_PRESSURE = 100e6


@dataclass(frozen=True, slots=True)
class Derivatives:
    """Derivatives of a Gibbs energy by mass, SI.

    Attributes:
        p: to pressure, the specific volume [m3/kg].
        tt: twice to temperature [J/kg/K2].
        tp: to temperature and pressure [m3/kg/K].
        pp: twice to pressure [m3/kg/Pa].
    """

    p: float
    tt: float
    tp: float
    pp: float

    def plus(self, other: Derivatives) -> Derivatives:
        """Return the sum of two parts."""
        return Derivatives(
            self.p + other.p, self.tt + other.tt, self.tp + other.tp, self.pp + other.pp
        )

    def sound_speed(self) -> float:
        """Return the speed of sound [m/s] (IAPWS R13-08, table 3)."""
        return float(self.p * math.sqrt(self.tt / (self.tp**2 - self.tt * self.pp)))


def saline(
    *,
    temperature: float,
    pressure: float,
    salinity: float,
    terms: Sequence[tuple[int, int, int, float]],
) -> Derivatives:
    """Return the derivatives of the saline part.

    Args:
        temperature: [K], 261 K to 353 K.
        pressure: [Pa], to 100 MPa.
        salinity: absolute, by mass [-], to 0.12.
        terms: powers i, j, k and coefficient.

    Source: IAPWS R13-08, equation 4.
    """
    if salinity <= 0.0:
        return Derivatives(0.0, 0.0, 0.0, 0.0)
    x = math.sqrt(salinity / _SALINITY)
    tau = (temperature - 273.15) / _TEMPERATURE
    pi = (pressure - 101325.0) / _PRESSURE
    p = tt = tp = pp = 0.0
    for i, j, k, coefficient in terms:
        salt = coefficient * (x * x * math.log(x) if i == 1 else x**i)
        if k >= 1:
            p += salt * k * tau**j * pi ** (k - 1)
        if j >= 2:
            tt += salt * j * (j - 1) * tau ** (j - 2) * pi**k
        if j >= 1 and k >= 1:
            tp += salt * j * k * tau ** (j - 1) * pi ** (k - 1)
        if k >= 2:
            pp += salt * k * (k - 1) * tau**j * pi ** (k - 2)
    return Derivatives(
        p / _PRESSURE,
        tt / _TEMPERATURE**2,
        tp / (_TEMPERATURE * _PRESSURE),
        pp / _PRESSURE**2,
    )


def viscosity_ratio(*, celsius: float, salinity: float) -> float:
    """Return the viscosity of seawater by that of pure water [-].

    Args:
        celsius: temperature [degC], 0 to 180.
        salinity: by mass [-], to 0.15.

    Source: Sharqawy and others (2010), equation 22 (from memory).
    """
    a = 1.541 + 1.998e-2 * celsius - 9.52e-5 * celsius**2
    b = 7.974 - 7.561e-2 * celsius + 4.724e-4 * celsius**2
    return 1.0 + a * salinity + b * salinity**2


def vapour_pressure_ratio(salinity: float) -> float:
    """Return the vapour pressure of seawater by that of pure water [-] (salinity by mass).

    Source: law of Raoult with the mean molar mass of sea salt, as Sharqawy and others (2010),
    equation 31, have it (from memory).
    """
    return 1.0 / (1.0 + 0.57357 * salinity / (1.0 - salinity))
