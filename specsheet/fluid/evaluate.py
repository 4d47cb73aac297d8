"""One state, cached by fluid and condition, with every failure turned into a finding."""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace
from functools import lru_cache

from specsheet.findings import Finding
from specsheet.fluid import library
from specsheet.fluid.errors import translate
from specsheet.fluid.lock import LOCK
from specsheet.fluid.model import Condition, Fluid, Refused, stop
from specsheet.fluid.phases import disagreement
from specsheet.fluid.state import State
from specsheet.quantity.value import Base

#: below these no fluid flows through a meter [K], [Pa]
LOWEST_TEMPERATURE, LOWEST_PRESSURE = 1.0, 1.0


@dataclass(frozen=True, slots=True)
class Outcome:
    """A state, or the findings that say why there is none."""

    state: State | None
    findings: tuple[Finding, ...] = ()


def state(fluid: Fluid, condition: Condition) -> Outcome:
    """Return the state of a fluid, its phase checked against the one stated."""
    temperature, pressure = condition.temperature, condition.pressure
    if temperature is not None and not LOWEST_TEMPERATURE <= temperature < math.inf:
        return _too_low("temperature", temperature, LOWEST_TEMPERATURE, "K")
    if pressure is not None and not LOWEST_PRESSURE <= pressure < math.inf:
        return _too_low("pressure", pressure, LOWEST_PRESSURE, "Pa")
    with LOCK:
        return _state(fluid, condition)


def _too_low(field: str, value: float, lowest: float, unit: str) -> Outcome:
    """Return the refusal of a temperature or pressure at which nothing flows."""
    text = f"An absolute {field} above {lowest:g} {unit} was wanted, {value:g} {unit} came."
    return Outcome(None, (stop("fluid-limit", field, text),))


@lru_cache(maxsize=256)
def _state(fluid: Fluid, condition: Condition) -> Outcome:
    outcome = _guarded(
        lambda: fluid.state(condition),
        fluid.name,
        condition.temperature or 0.0,
        condition.pressure or 0.0,
    )
    found = outcome.state
    if found is None or not fluid.phase:
        return outcome
    wet = condition.dryness is not None and found.value("dryness_fraction") is not None
    wrong = None if wet else disagreement(fluid.phase, found)
    if wrong is None:
        return outcome
    return Outcome(replace(found, findings=(*found.findings, wrong)), ())


def forget() -> None:
    """Drop the states kept, so that the next ones use what was learnt since."""
    _state.cache_clear()
    _base.cache_clear()


def base(fluid: Fluid, condition: Base) -> Outcome:
    """Return the state of a fluid at a base condition."""
    with LOCK:
        return _base(fluid, condition)


@lru_cache(maxsize=64)
def _base(fluid: Fluid, condition: Base) -> Outcome:
    return _guarded(
        lambda: fluid.base(condition), fluid.name, condition.temperature, condition.pressure
    )


def _guarded(call: Callable[[], State], name: str, temperature: float, pressure: float) -> Outcome:
    try:
        return Outcome(call())
    except Refused as refused:
        return Outcome(None, (refused.finding,))
    except library.ERRORS as error:
        return Outcome(None, (translate(error, name, temperature, pressure),))


def states(fluid: Fluid, conditions: Sequence[Condition]) -> tuple[Outcome, ...]:
    """Return the states of a fluid at any conditions, in their order (for what-if questions)."""
    return tuple(state(fluid, condition) for condition in conditions)
