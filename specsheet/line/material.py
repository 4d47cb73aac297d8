"""Materials of pipes and bodies, from their pack: expansion, roughness, flange group."""

from __future__ import annotations

import re
from dataclasses import dataclass
from functools import cache, lru_cache
from itertools import pairwise

from specsheet.packs import table

_CELSIUS = 273.15
_REFERENCE = 20.0


@dataclass(frozen=True, slots=True)
class Material:
    """One material of the pack.

    Attributes:
        name: as the pack spells it.
        temperatures: to which the mean coefficients reach, from 20 °C [degC].
        coefficients: mean coefficient of linear thermal expansion to each of them [1/K].
        expansion_source: citation of the coefficients.
        roughness: uniform equivalent roughness of a usual wall [m].
        roughness_source: citation, with the condition of the wall.
        group: material group of ASME B16.5, or "".
        kind: "ferritic", "austenitic", "duplex", "nickel", "titanium", "copper", "plastic" ...
    """

    name: str
    temperatures: tuple[float, ...]
    coefficients: tuple[float, ...]
    expansion_source: str
    roughness: float
    roughness_source: str
    group: str
    kind: str

    def expansion(self, temperature: float) -> float:
        """Return the mean coefficient from 20 °C to a temperature [K], in 1/K.

        Linear between the temperatures of the pack; held at the first and last value outside.
        """
        celsius = temperature - _CELSIUS
        nodes = list(zip(self.temperatures, self.coefficients, strict=False))
        if celsius <= nodes[0][0]:
            return nodes[0][1]
        for (low, first), (high, second) in pairwise(nodes):
            if celsius <= high:
                return first + (second - first) * (celsius - low) / (high - low)
        return nodes[-1][1]

    @property
    def highest(self) -> float:
        """Highest temperature with a coefficient [K]."""
        last = min(len(self.temperatures), len(self.coefficients)) - 1
        return self.temperatures[last] + _CELSIUS


@cache
def materials() -> tuple[Material, ...]:
    """Return every material of the pack, in its order."""
    return tuple(material for material, _ in _named())


@cache
def _named() -> tuple[tuple[Material, tuple[str, ...]], ...]:
    pack = table("materials")
    found = []
    for row in pack["material"]:
        source = row.get("roughness_source", pack["roughness_source"])
        material = Material(
            name=row["name"],
            temperatures=tuple(pack["temperatures"]),
            coefficients=tuple(value * 1e-6 for value in row["expansion"]),
            expansion_source=row.get("expansion_source", pack["expansion_source"]),
            roughness=row["roughness"] / 1000,
            roughness_source=f"{source}: {row['roughness_note']}",
            group=row["group"],
            kind=row["class"],
        )
        found.append((material, (row["name"].lower(), *row["names"])))
    return tuple(found)


@lru_cache(maxsize=4096)
def find_material(text: str) -> Material | None:
    """Return the material that a text names, or None.

    The longest name of the pack that stands in the text as whole words wins, so that "stainless
    steel 316L, dual certified" is 316L and not plain stainless or carbon steel.
    """
    lowered = text.lower().replace("-", " ")
    best: tuple[int, Material] | None = None
    for material, names in _named():
        for name in names:
            pattern = rf"(?<![a-z0-9]){re.escape(name.lower().replace('-', ' '))}(?![a-z0-9])"
            specific = len(name) + 100 * any(character.isdigit() for character in name)
            if (best is None or specific > best[0]) and re.search(pattern, lowered):
                best = (specific, material)
    return best[1] if best else None
