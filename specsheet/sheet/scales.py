"""What decides a verdict beside the flow, each on a linear scale of its own under the ruler.

A scale begins at the zero of the unit shown, so that a reserve has its true share of the picture.
"""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

from specsheet import quantity
from specsheet.fields import KINDS
from specsheet.findings import Level, Reserve
from specsheet.sheet import limits, rows, words
from specsheet.sheet.axis import FlowAxis
from specsheet.sheet.model import Mark, Scale
from specsheet.sheet.units import Units

if TYPE_CHECKING:
    from specsheet.evaluate.result import Check, Evaluation

#: most scales under one ruler; the table of limits holds the rest
MOST = 8

#: room beyond the outermost value, as a share of what is shown [-]
_ROOM = 0.15

#: a value this close to another is that value [-]
_SAME = 1e-9

#: a scale shorter than this shows nothing but its zero, in the unit shown
_NOTHING = 1e-12

_ORDER = {Level.STOP: 0, Level.CAUTION: 1, Level.NOTE: 2}


def build(evaluation: Evaluation, units: Units, axis: FlowAxis) -> tuple[tuple[Scale, ...], str]:
    """Return the scales, the tightest first, and a line on those left out, "" for none.

    One for each driver and side: of several limits that one driver flips on the same side, the
    tightest stands; one that does not hold stands before all that do.
    """
    tightest: dict[tuple[str, bool], tuple[Check, Reserve, float]] = {}
    for check in sorted(evaluation.checks, key=_tightness):
        held = check.reserve
        present = None if held is None else _present(check, held)
        if held is not None and present is not None:
            ceiling = _is_ceiling(check, held, present, evaluation.tag.phase)
            side = (held.driver, ceiling)
            tightest.setdefault(side, (check, held, present))
    found = tuple(
        _scale(check, held, present, units, axis, ceiling=ceiling)
        for (_, ceiling), (check, held, present) in tightest.items()
    )
    left = len(found) - MOST
    said = f"{left} more {'stands' if left == 1 else 'stand'} in the table of limits."
    return found[:MOST], said if left > 0 else ""


def _tightness(check: Check) -> tuple[bool, int, float]:
    """Order broken limits first, the worst first, then by what is left of the driver."""
    size = abs(check.reserve.fraction) if check.reserve else 0.0
    return (True, 0, size) if check.holds else (False, _ORDER[check.level], -size)


def _present(check: Check, held: Reserve) -> float | None:
    """Return the driver's value at the point of a check [SI], None where no scale shows it."""
    if held.driver == "mass_flow" or rows.kind_of(held.driver) not in KINDS:
        return None
    if check.key == held.driver:
        present = check.value
    else:
        present = held.at / (1.0 + held.fraction) if held.fraction != -1.0 else math.nan
    return present if math.isfinite(present) and math.isfinite(held.at) else None


def _is_ceiling(check: Check, held: Reserve, present: float, phase: str) -> bool:
    """Tell whether the verdict holds below the flip, not above it."""
    if check.key == held.driver and held.at in (check.low, check.high):
        return held.at == check.high
    # the driver is the bound itself: a pressure that must stay below that of saturation
    for bound, ceiling in ((check.low, True), (check.high, False)):
        if bound is not None and bound and math.isclose(present, bound, rel_tol=_SAME):
            return ceiling
    if abs(held.fraction) < _SAME:  # nothing is left: a liquid boils above, a gas condenses below
        return phase == "liquid"
    return (held.at > present) == check.holds


def _scale(
    check: Check, held: Reserve, present: float, units: Units, axis: FlowAxis, *, ceiling: bool
) -> Scale:
    kind = rows.kind_of(held.driver)
    unit = rows.unit_of(held.driver, [held.at, present], units)
    value, flip = (quantity.from_si(one, kind, unit) for one in (present, held.at))
    start, end = _ends(value, flip)
    other = _other_bound(check, held, kind, unit, ceiling=ceiling)
    closed = other is not None and start <= other <= end
    edge = other if other is not None and closed else start if ceiling else end
    low, high = (edge, flip) if ceiling else (flip, edge)
    return Scale(
        label=words.label(held.driver),
        unit=words.unit(unit),
        low=(low - start) / (end - start),
        high=(high - start) / (end - start),
        open_low=ceiling and not closed,
        open_high=not ceiling and not closed,
        zero=(0.0 - start) / (end - start),
        flip=rows.number(held.at, held.driver, kind, unit),
        mark=Mark(
            check.point,
            rows.number(present, held.driver, kind, unit),
            (value - start) / (end - start),
            check.holds,
        ),
        reserve=limits.reserve(held, units, axis, check.point)[0],
        level=check.level,
        ceiling=ceiling,
    )


def _ends(value: float, flip: float) -> tuple[float, float]:
    """Return the ends of a scale in the unit shown: zero and both values, with room beyond."""
    low, high = min(0.0, value, flip), max(0.0, value, flip)
    if high - low < _NOTHING:
        return low - 1.0, high + 1.0
    room = _ROOM * (high - low)
    return low - room if low < 0.0 else low, high + room if high > 0.0 else high


def _other_bound(
    check: Check, held: Reserve, kind: str, unit: str, *, ceiling: bool
) -> float | None:
    """Return where a driver that is bounded on both sides stops to hold on the far side."""
    bound = check.low if ceiling else check.high
    if check.key != held.driver or bound is None:
        return None
    return quantity.from_si(bound, kind, unit)
