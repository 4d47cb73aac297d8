"""Limits that the state of the fluid decides, not the flow: phase and flange rating.

Each is a check with the temperature or the pressure at which its verdict flips, so that a sheet
shows the margin while it still holds.
"""

from __future__ import annotations

from collections.abc import Iterator

from specsheet.evaluate.prepare import Prepared
from specsheet.evaluate.result import Check
from specsheet.findings import Level, Reserve
from specsheet.fluid.phases import GAS, LIQUID, TWO_PHASE
from specsheet.fluid.state import State
from specsheet.line.rating import Margin

_HOLDS = 1.0 + 1e-9
_FLASHES = "the liquid boils: the meter reads wrong and may be damaged"
_CONDENSES = "the gas condenses: drops and slugs disturb the meter or damage it"


def phase_checks(prepared: Prepared) -> tuple[Check, ...]:
    """Return the margins of the stated phase at the point where each is smallest.

    The margin to saturation flips with the temperature, the vapour pressure with the pressure. A
    point in the other phase breaks them. What the fluid layer does not know gives no check.
    """
    phase = prepared.tag.phase
    states = [
        (point.name, state)
        for point, state in zip(prepared.tag.points, prepared.fluid.points, strict=True)
        if state is not None and state.phase in (LIQUID, GAS, TWO_PHASE)
    ]
    if phase not in (LIQUID, GAS):
        return ()
    by_temperature = [check for name, state in states for check in _saturation(phase, name, state)]
    by_pressure = [check for name, state in states for check in _vapour(phase, name, state)]
    return tuple(min(found, key=_tightness) for found in (by_temperature, by_pressure) if found)


def _tightness(check: Check) -> float:
    """Order by what is left of the driver; what is missing counts below nothing left."""
    assert check.reserve is not None
    return abs(check.reserve.fraction) * (1.0 if check.holds else -1.0)


def _saturation(phase: str, name: str, state: State) -> Iterator[Check]:
    margin = _margin(phase, state)
    if margin is None:
        return
    change = margin if phase == LIQUID else -margin
    reserve = Reserve("temperature", state.temperature + change, change / state.temperature)
    words = _FLASHES if phase == LIQUID else _CONDENSES
    yield _check("saturation_margin", name, margin, (0.0, None), words, "", reserve)


def _margin(phase: str, state: State) -> float | None:
    """Return how far inside its stated phase a state is [K], negative in the other phase."""
    if state.phase == phase:
        return state.value("saturation_margin")
    edge = state.value("saturation_temperature")
    if edge is None and phase == GAS:
        edge = state.value("dew_temperature")
    if edge is None:
        return None
    above = state.temperature - edge
    return above if phase == GAS else -above


def _vapour(phase: str, name: str, state: State) -> Iterator[Check]:
    found = state.properties.get("vapour_pressure")
    if found is None or found.value <= 0.0:
        return
    reserve = Reserve("pressure", found.value, found.value / state.pressure - 1.0)
    bounds = (None, state.pressure) if phase == LIQUID else (state.pressure, None)
    words = _FLASHES if phase == LIQUID else _CONDENSES
    yield _check("vapour_pressure", name, found.value, bounds, words, found.source, reserve)


def rating_checks(margin: Margin | None) -> tuple[Check, ...]:
    """Return what the flange rating leaves of pressure and of temperature, at the hardest demand.

    The temperature at which the rating flips is solved along its table.
    """
    if margin is None:
        return ()
    demand = margin.demand
    words = f"{margin.rating} does not allow it: a higher rating, or another material"
    checks: list[Check] = []
    if demand.pressure > 0.0:
        reserve = Reserve(
            "flange_pressure", margin.pressure, margin.pressure / demand.pressure - 1.0
        )
        bounds = (None, margin.pressure)
        checks.append(
            _check(
                *("flange_pressure", demand.name, demand.pressure, bounds),
                *(words, margin.source, reserve),
            )
        )
    if margin.temperature is not None:
        flips = margin.temperature
        reserve = Reserve("flange_temperature", flips, flips / demand.temperature - 1.0)
        checks.append(
            _check(
                *("flange_temperature", demand.name, demand.temperature, (None, flips)),
                *(words, margin.source, reserve),
            )
        )
    return tuple(checks)


def _check(
    key: str,
    point: str,
    value: float,
    bounds: tuple[float | None, float | None],
    message: str,
    source: str,
    reserve: Reserve,
) -> Check:
    low, high = bounds
    holds = (low is None or value * _HOLDS >= low) and (high is None or value <= high * _HOLDS)
    return Check(key, point, value, low, high, holds, Level.STOP, message, source, reserve)
