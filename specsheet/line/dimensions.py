"""Dimensions of steel pipe by nominal size and schedule (ASME B36.10M, B36.19M), from the packs."""

from __future__ import annotations

import re
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache

from specsheet.packs import table

_PACKS = ("pipes_b3610", "pipes_b3619")
_NAMES = {"STANDARD": "STD", "EXTRASTRONG": "XS", "XH": "XS", "DOUBLEEXTRASTRONG": "XXS"}


@dataclass(frozen=True, slots=True)
class Wall:
    """One wall of one size: outside diameter [m], wall thickness [m] and where they stand."""

    outside: float
    thickness: float
    source: str

    @property
    def inside(self) -> float:
        """Inside diameter [m]."""
        return self.outside - 2.0 * self.thickness


@cache
def _sizes() -> Mapping[int, Mapping[str, Wall]]:
    sizes: dict[int, dict[str, Wall]] = {}
    for name in _PACKS:
        pack = table(name)
        for row in pack["pipe"]:
            walls = sizes.setdefault(row["dn"], {})
            for schedule, thickness in row["walls"].items():
                wall = Wall(row["outside"] / 1000, thickness / 1000, pack["source"])
                walls.setdefault(schedule, wall)
    return sizes


def nominal_sizes() -> tuple[int, ...]:
    """Return the DN numbers that have a pipe in the packs, rising."""
    return tuple(sorted(_sizes()))


def schedules(dn: int) -> tuple[str, ...]:
    """Return the schedules listed for a size, thinnest wall first (empty for an unlisted size)."""
    walls = _sizes().get(dn, {})
    return tuple(sorted(walls, key=lambda name: walls[name].thickness))


def schedule_name(text: str) -> str:
    """Return a schedule as the packs spell it: "sch. 40s" and "40S" are one."""
    squeezed = re.sub(r"[\s.\-]", "", text).upper()
    bare = re.sub(r"^(SCHEDULE|SCHED|SCH|S(?=\d))", "", squeezed)
    return _NAMES.get(bare, bare)


def wall(dn: int, schedule: str) -> Wall | None:
    """Return the wall of a size and schedule, or None where it is not listed."""
    return _sizes().get(dn, {}).get(schedule_name(schedule))


def outside_diameter(dn: int) -> Wall | None:
    """Return any wall of a size, for its outside diameter; None for an unlisted size."""
    return next(iter(_sizes().get(dn, {}).values()), None)
