"""Substances of the user's own: ``<job>/fluids/*.toml``, one substance a file.

name = "heat transfer oil"
names = ["thermal oil"]              # other names
source = "data sheet of the oil, 2031"
density = [["20 degC", "872 kg/m3"], ["200 degC", "748 kg/m3"]]
viscosity = [["20 degC", "80 mm2/s"], ["200 degC", "1.2 mm2/s"]]
vapour_pressure = [["150 degC", "2 mbar"], ...]   # if known
heat_capacity = [["20 degC", "1.9 kJ/kg/K"], ...] # if known
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from functools import lru_cache
from pathlib import Path
from typing import Any

import tomli

from specsheet import quantity
from specsheet.findings import Finding
from specsheet.fluid import names
from specsheet.fluid.backends.user_table import Table, UserTable
from specsheet.fluid.model import stop
from specsheet.quantity.value import Quantity

FOLDER = "fluids"
_FIELD = "fluid.substance"
_KINDS = {
    "density": "density",
    "viscosity": "viscosity",
    "vapour_pressure": "pressure_absolute",
    "heat_capacity": "heat_capacity",
}


@dataclass(frozen=True, slots=True)
class Found:
    """The user's substance of a name, or None; and what is wrong with its file."""

    fluid: UserTable | None = None
    findings: tuple[Finding, ...] = ()


def find(folder: str, text: str, phase: str) -> Found:
    """Return the substance of that name among the files of a job folder."""
    if not folder:
        return Found()
    for path in sorted((Path(folder) / FOLDER).glob("*.toml")):
        found = _read(str(path), path.stat().st_mtime_ns, phase)
        if found.matches(text):
            return Found(found.fluid, found.findings)
    return Found()


@dataclass(frozen=True, slots=True)
class _File:
    known: frozenset[str]
    fluid: UserTable | None
    findings: tuple[Finding, ...]

    def matches(self, text: str) -> bool:
        return names.normal(text) in self.known


@lru_cache(maxsize=64)
def _read(path: str, changed: int, phase: str) -> _File:
    """Return one file; ``changed`` makes an edited file a new entry of the cache."""
    del changed
    stem = names.normal(Path(path).stem)
    try:
        raw = tomli.loads(Path(path).read_text(encoding="utf-8"))
    except (OSError, UnicodeDecodeError, tomli.TOMLDecodeError) as error:
        text = f"The substance file {path} cannot be read: {error}"
        return _File(frozenset((stem,)), None, (stop("substance-file", _FIELD, text),))
    listed = raw.get("names", [])
    others = listed if isinstance(listed, list) else []
    name = str(raw.get("name", Path(path).stem))
    known = frozenset({stem, names.normal(name), *(names.normal(str(item)) for item in others)})
    tables, wrong = _tables(raw, path)
    if wrong:
        return _File(known, None, tuple(wrong))
    first_viscosity = raw.get("viscosity") or [["", ""]]
    parsed = quantity.parse(str(first_viscosity[0][1]), "viscosity")
    kinematic = isinstance(parsed, Quantity) and parsed.kind == "kinematic_viscosity"
    fluid = UserTable(
        name,
        phase,
        str(raw.get("source", f"{Path(path).name} of the job")),
        tables["density"],
        tables["viscosity"],
        kinematic,
        tables["vapour_pressure"],
        tables["heat_capacity"],
    )
    return _File(known, fluid, ())


def _tables(raw: Mapping[str, Any], path: str) -> tuple[dict[str, Table], list[Finding]]:
    tables: dict[str, Table] = {}
    wrong: list[Finding] = []
    for key, kind in _KINDS.items():
        try:
            tables[key] = _table(raw.get(key, []), kind)
        except ValueError as error:
            text = f"{path}, table {key}: {error}"
            wrong.append(stop("substance-file", _FIELD, text))
    if not wrong and len(tables["density"]) < 2:
        text = f'{path}: a table density = [["20 degC", "872 kg/m3"], ...] of two rows was wanted.'
        wrong.append(stop("substance-file", _FIELD, text))
    return tables, wrong


def _table(rows: Any, kind: str) -> Table:
    """Return a table in SI, rising in temperature.

    Raises:
        ValueError: a row is not a temperature and a value; the text says which.
    """
    if not isinstance(rows, list):
        raise ValueError("rows of a temperature and a value were wanted")
    found = []
    kinds = set()
    for row in rows:
        if not isinstance(row, list) or len(row) != 2:
            raise ValueError(f'a row like ["20 degC", "872 kg/m3"] was wanted, {row!r} came')
        warmth, value = (
            quantity.parse(str(row[0]), "temperature"),
            quantity.parse(str(row[1]), kind),
        )
        if not isinstance(warmth, Quantity):
            raise ValueError(warmth.message)
        if not isinstance(value, Quantity):
            raise ValueError(value.message)
        if not value.value > 0.0:
            raise ValueError(f"a value above zero was wanted, {row[1]!r} came")
        kinds.add(value.kind)
        found.append((warmth.value, value.value))
    if len(kinds) > 1:
        raise ValueError("the viscosities must all be dynamic or all be kinematic")
    found.sort()
    if len({warmth for warmth, _ in found}) != len(found):
        raise ValueError("two rows have the same temperature")
    return tuple(found)
