"""What the uncertainty of the flow is made of, beside what the family itself contributes.

A family says how the flow depends on the density; what makes the density uncertain is the same
for all: the method that derives it, the measured pressure and temperature, the composition, and
the operating point itself where nothing compensates for it.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace

import numpy as np

from specsheet.findings import Finding, Origin
from specsheet.meters.family import Array, Contribution, Stream
from specsheet.methods.gum import RECTANGULAR
from specsheet.sources import PRACTICE, cite
from specsheet.tag import Tag

#: a stream with this uncertainty of density shows a family's exponent: it contributes half of it
_UNIT = 2.0
_DENSITY = "density"


@dataclass(frozen=True)
class DensityInUse:
    """How well the density in use is known, beside the method that derives it.

    Attributes:
        gas: whether pressure and temperature decide it as in a gas.
        pressure: expanded relative uncertainty of the measured pressure, k = 2 [-].
        temperature: expanded uncertainty of the measured temperature, k = 2 [K].
        composition: expanded relative uncertainty of density by composition, k = 2 [-].
        fixed: density that is used at every point [kg/m3], None where it is compensated.
        origins: origin of each figure by the key of its entry.
    """

    gas: bool
    pressure: float
    temperature: float
    composition: float
    fixed: float | None
    origins: dict[str, Origin]


_ENTRIES = ("pressure_uncertainty", "temperature_uncertainty", "composition_uncertainty")


def density_in_use(tag: Tag, normal_density: float) -> DensityInUse:
    """Return what the tag says of the density in use; ``normal_density`` in kg/m3."""
    figures = {key: tag.si(f"require.{key}") or 0.0 for key in _ENTRIES}
    fixed = tag.text("require.compensation") == "none"
    return DensityInUse(
        gas=tag.phase == "gas",
        pressure=figures["pressure_uncertainty"],
        temperature=figures["temperature_uncertainty"],
        composition=figures["composition_uncertainty"],
        fixed=normal_density if fixed else None,
        origins={key: tag.origin(f"require.{key}") for key in (*_ENTRIES, "compensation")},
    )


def exponent_stream(stream: Stream) -> Stream:
    """Return the stream with which a family's budget shows how its flow depends on density."""
    return replace(stream, density_uncertainty=np.full(stream.mass_flow.shape, _UNIT))


def with_density(
    contributions: Sequence[Contribution], stream: Stream, density: DensityInUse
) -> tuple[Contribution, ...]:
    """Return the budget with the density's contribution split into what makes it uncertain.

    Args:
        contributions: the family's, for :func:`exponent_stream`.
        stream: the stream itself.
        density: how well the density in use is known.
    """
    found: list[Contribution] = []
    for item in contributions:
        if item.key != _DENSITY:
            found.append(item)
            continue
        exponent = item.relative * (2.0 / _UNIT)
        found.append(replace(item, relative=exponent * stream.density_uncertainty / 2.0))
        found.extend(_of_density(exponent, stream, density))
    return tuple(found)


def _of_density(exponent: Array, stream: Stream, density: DensityInUse) -> list[Contribution]:
    """Return pressure, temperature, composition and missing compensation, where they count."""
    clause = cite("iso5168")
    found: list[Contribution] = []

    def add(key: str, entry: str, label: str, relative: Array, source: str) -> None:
        found.append(Contribution(key, label, relative, density.origins[entry], source))

    if density.fixed is not None:
        # the true density may lie anywhere between that in use and that of the point
        spread = np.abs(stream.density / density.fixed - 1.0) / RECTANGULAR
        add("compensation", "compensation", "density not compensated", exponent * spread, PRACTICE)
    elif density.gas:
        # sensitivity of an ideal gas: density rises as p / T
        relative = exponent * density.pressure / 2.0
        add("pressure", "pressure_uncertainty", "pressure, measured", relative, clause)
        relative = exponent * density.temperature / 2.0 / stream.temperature
        add("temperature", "temperature_uncertainty", "temperature, measured", relative, clause)
    if density.composition:
        relative = exponent * density.composition / 2.0
        add("composition", "composition_uncertainty", "composition", relative, clause)
    return found


def largest(contributions: Sequence[Contribution], lane: int, count: int = 3) -> tuple[str, ...]:
    """Return the labels of the largest contributions at one lane, largest first."""
    known = [item for item in contributions if np.isfinite(item.relative[lane])]
    known.sort(key=lambda item: -float(item.relative[lane]))
    return tuple(item.label for item in known[:count] if item.relative[lane] > 0.0)


def name_largest(
    findings: Sequence[Finding], names: Sequence[str], contributions: Sequence[Contribution]
) -> tuple[Finding, ...]:
    """Return the findings, those on the uncertainty with its three largest contributions named."""
    named: list[Finding] = []
    for finding in findings:
        if finding.code == "uncertainty-demanded" and finding.point in names:
            worst = largest(contributions, names.index(finding.point))
            message = f"{finding.message} Most of it comes from: {'; '.join(worst)}."
            finding = replace(finding, message=message)
        named.append(finding)
    return tuple(named)
