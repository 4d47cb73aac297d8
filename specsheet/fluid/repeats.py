"""The same thing said of several points or base conditions, said once."""

from __future__ import annotations

import math
from collections.abc import Mapping, Sequence
from dataclasses import replace

from specsheet.findings import Finding, Level
from specsheet.fluid.state import State
from specsheet.quantity.value import Base

_Kind = tuple[Level, str, str]


def over_points(
    findings: Sequence[Finding], states: Mapping[str, State | None]
) -> tuple[Finding, ...]:
    """Return the findings with repeats over points merged into one on the worst point.

    Args:
        findings: in order; those without a point stay as they are.
        states: state of each point by name, None where there is none.
    """
    groups: dict[_Kind | Finding, list[Finding]] = {}
    for item in findings:
        key = (item.level, item.code, _entry(item)) if item.point else item
        groups.setdefault(key, []).append(item)
    return tuple(_merged(group, states) for group in groups.values())


def _entry(finding: Finding) -> str:
    """Return the entry a finding is about, whatever its point."""
    return finding.field.removeprefix(f"points.{finding.point}.")


def _merged(group: Sequence[Finding], states: Mapping[str, State | None]) -> Finding:
    worst = min(group, key=lambda item: _spare(item, states.get(item.point)))
    others = dict.fromkeys(item.point for item in group if item.point != worst.point)
    if not others:
        return worst
    return replace(worst, message=f"{worst.message} The same holds at {', '.join(others)}.")


def _spare(finding: Finding, state: State | None) -> float:
    """Return what is left before, or negative what lies beyond, the edge that matters."""
    if finding.reserve is not None:
        return -finding.reserve.fraction
    if state is None:
        return math.inf
    margin = state.value("saturation_margin")
    if margin is not None:
        return margin
    edge = state.value("dew_temperature")
    return math.inf if edge is None else state.temperature - edge


def over_bases(said: Sequence[tuple[Base, Finding]]) -> tuple[Finding, ...]:
    """Return what is said of base conditions, the same words once for all of them."""
    groups: dict[tuple[Level, str, str], list[tuple[Base, Finding]]] = {}
    for base, item in said:
        groups.setdefault((item.level, item.code, item.message), []).append((base, item))
    found = []
    for (_, _, message), group in groups.items():
        where = "; ".join(base.name for base, _ in group)
        found.append(replace(group[0][1], message=f"At base ({where}): {message}"))
    return tuple(found)
