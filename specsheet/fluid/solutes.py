"""Solutes by name, and what is known of their solutions (``profiles/fluids/solutions``)."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from typing import Any

from specsheet import packs
from specsheet.fluid import names


@dataclass(frozen=True, slots=True)
class Correlation:
    """Coefficients of one property, with the limits of the measurements behind them.

    Attributes:
        coefficients: of the equation.
        fraction: largest mass fraction of the solute [-].
        lowest, highest: temperatures [K].
        uncertainty: relative, k = 2 [-].
    """

    coefficients: tuple[float, ...]
    fraction: float
    lowest: float
    highest: float
    uncertainty: float


@dataclass(frozen=True, slots=True)
class Incompressible:
    """A correlation of the fluid library: its name there and its limits (fraction [-], [K])."""

    name: str
    fraction: float
    lowest: float
    highest: float


@dataclass(frozen=True, slots=True)
class Strong:
    """Densities of a strong solution at 20 degC.

    Attributes:
        rows: mass fraction [-] and density [kg/m3], rising in the fraction.
        slope: of the density over temperature [kg/m3/K].
        lowest, highest: temperatures [K].
        uncertainty: relative, k = 2 [-].
    """

    rows: tuple[tuple[float, float], ...]
    slope: float
    lowest: float
    highest: float
    uncertainty: float


@dataclass(frozen=True, slots=True)
class Solute:
    """A substance dissolved in water.

    Attributes:
        key: key in the pack.
        name: what the sheet calls it.
        formula: molecular formula.
        cas: CAS number.
        names: other names accepted.
        molar_mass: [kg/mol]
        ions: particles in the water from one of the solute.
        volatile: "" where it stays in the water, "alcohol", or "yes".
        pure_density: at 20 degC [kg/m3]; None where a volume fraction has no meaning.
        incompressible: correlation of the fluid library, or None.
        density, viscosity: correlations of our own, or None.
        strong: densities beyond the correlations, or None.
    """

    key: str
    name: str
    formula: str
    cas: str
    names: tuple[str, ...]
    molar_mass: float
    ions: int
    volatile: str
    pure_density: float | None
    incompressible: Incompressible | None
    density: Correlation | None
    viscosity: Correlation | None
    heat: Correlation | None
    strong: Strong | None

    @property
    def highest_fraction(self) -> float:
        """Largest mass fraction that any of its correlations reaches [-]."""
        known = [item.fraction for item in (self.incompressible, self.density) if item is not None]
        return self.strong.rows[-1][0] if self.strong is not None else max(known)


@cache
def solutes() -> Mapping[str, Solute]:
    """Return all solutes by key."""
    return {key: _solute(key, raw) for key, raw in packs.table("fluids/solutions").items()}


def _solute(key: str, raw: Mapping[str, Any]) -> Solute:
    library = raw.get("incompressible")
    return Solute(
        key=key,
        name=raw["name"],
        formula=raw["formula"],
        cas=raw["cas"],
        names=tuple(raw["names"]),
        molar_mass=raw["molar_mass"] / 1e3,
        ions=raw["ions"],
        volatile=raw["volatile"],
        pure_density=raw.get("pure_density"),
        incompressible=None
        if library is None
        else Incompressible(
            library["name"],
            library["fraction"],
            library["temperatures"][0] + 273.15,
            library["temperatures"][1] + 273.15,
        ),
        density=_correlation(raw.get("density")),
        viscosity=_correlation(raw.get("viscosity")),
        heat=_correlation(raw.get("heat")),
        strong=_strong(raw.get("strong")),
    )


def _correlation(raw: Mapping[str, Any] | None) -> Correlation | None:
    if raw is None:
        return None
    return Correlation(
        tuple(raw["coefficients"]),
        raw["fraction"],
        raw["temperatures"][0] + 273.15,
        raw["temperatures"][1] + 273.15,
        raw["uncertainty"],
    )


def _strong(raw: Mapping[str, Any] | None) -> Strong | None:
    if raw is None:
        return None
    return Strong(
        tuple((fraction, density) for fraction, density in raw["rows"]),
        raw["slope"],
        raw["temperatures"][0] + 273.15,
        raw["temperatures"][1] + 273.15,
        raw["uncertainty"],
    )


@cache
def _index() -> Mapping[str, str]:
    found: dict[str, str] = {}
    for key, item in solutes().items():
        for text in (key, item.name, *item.names, item.formula, item.cas):
            found.setdefault(names.normal(text), key)
    return found


def find(text: str) -> Solute | None:
    """Return the solute of that key, name, formula or CAS number, or None."""
    key = _index().get(names.normal(text))
    return None if key is None else solutes()[key]


def nearest(text: str, count: int = 3) -> tuple[str, ...]:
    """Return the names nearest to a text that names no solute, best first."""
    return names.closest(text, _index(), lambda hit: solutes()[_index()[hit]].name, count)


def search(text: str, limit: int = 20) -> tuple[Solute, ...]:
    """Return the solutes whose key, names, formula or CAS number hold the text, best first."""
    words = {
        key: (key, item.name, *item.names, item.formula, item.cas)
        for key, item in solutes().items()
    }
    return tuple(solutes()[key] for key in names.ranked(text, words, limit))
