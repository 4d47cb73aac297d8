"""Limits checked, with their reserve, and the findings in words."""

from __future__ import annotations

from typing import TYPE_CHECKING

from specsheet.fields import KINDS
from specsheet.findings import Finding, Level, Reserve
from specsheet.sheet import rounding, rows, words
from specsheet.sheet.axis import FlowAxis
from specsheet.sheet.model import NOTHING, FindingRow, LimitRow
from specsheet.sheet.units import Units

if TYPE_CHECKING:
    from specsheet.evaluate.result import Check, Evaluation

_ORDER = {Level.STOP: 0, Level.CAUTION: 1, Level.NOTE: 2}

_VERDICTS = {
    Level.STOP: "Do not buy as specified",
    Level.CAUTION: "To be decided before purchase",
    Level.NOTE: "No objection within the limits checked",
}


def limits(evaluation: Evaluation, units: Units, axis: FlowAxis) -> tuple[LimitRow, ...]:
    """Return every limit looked at, those that do not hold first, worst first."""
    checks = sorted(evaluation.checks, key=lambda check: (check.holds, _ORDER[check.level]))
    gas = evaluation.tag.phase == "gas"
    return tuple(_limit(check, units, axis, gas=gas) for check in checks)


def _limit(check: Check, units: Units, axis: FlowAxis, *, gas: bool) -> LimitRow:
    kind = rows.kind_of(check.key)
    bounds = [value for value in (check.low, check.high) if value is not None]
    unit = rows.unit_of(check.key, [check.value, *bounds], units)
    low, high = (
        None if value is None else rows.bound(value, kind, unit)
        for value in (check.low, check.high)
    )
    change, flips = reserve(check.reserve, units, axis, check.point)
    label, symbol = words.named_of(check.key, gas=gas)
    return LimitRow(
        key=check.key,
        label=label,
        symbol=symbol,
        point=check.point,
        value=rows.number(check.value, check.key, kind, unit),
        allowed=_allowed(low, high),
        unit=words.unit(unit),
        holds=check.holds,
        level=check.level,
        verdict="holds" if check.holds else words.LEVELS[check.level][0],
        reserve=change,
        flips=flips,
        message=words.capital(check.message),
        source=check.source,
    )


def _allowed(low: str | None, high: str | None) -> str:
    if low is not None and high is not None:
        return low if low == high else f"{low} to {high}"
    if low is not None:
        return f"at least {low}"
    return NOTHING if high is None else f"at most {high}"


def reserve(held: Reserve | None, units: Units, axis: FlowAxis, point: str) -> tuple[str, str]:
    """Return the change that flips a verdict and the driver's value there, both in words.

    A temperature changes by kelvins, everything else by a percentage of its present value.
    """
    if held is None:
        return "", ""
    if held.driver == "mass_flow":
        return percent(held.fraction), f"{axis.text(held.at, point)} {axis.printed_unit}".strip()
    kind = rows.kind_of(held.driver)
    if kind not in KINDS:
        return percent(held.fraction), ""
    unit = rows.unit_of(held.driver, [held.at], units)
    flips = f"{rows.number(held.at, held.driver, kind, unit)} {words.unit(unit)}".strip()
    if kind != "temperature" or held.fraction == -1.0:
        return percent(held.fraction), flips
    return f"{signed(held.change)} K", flips


def percent(fraction: float) -> str:
    """Return a signed fraction as a percentage of at most two digits ("+32 %").

    Less than a hundred-thousandth is nothing: a limit that stands there was sized to.
    """
    return f"{signed(100.0 * fraction)} %" if abs(fraction) >= 1e-5 else "0 %"


def signed(value: float) -> str:
    """Return a number of two digits, whole from ten on, with its sign."""
    text = rounding.group(f"{value:.0f}") if abs(value) >= 9.95 else rounding.significant(value, 2)
    return text if text.startswith("−") or text in ("0", NOTHING) else f"+{text}"


def finding(held: Finding, units: Units, axis: FlowAxis) -> FindingRow:
    """Return one finding in words."""
    change, flips = reserve(held.reserve, units, axis, held.point)
    phrase = f"Verdict flips at {_driver(held.reserve)} {flips} ({change})" if flips else ""
    return FindingRow(
        level=held.level,
        code=held.code,
        field=held.field,
        point=held.point,
        message=words.capital(held.message),
        source=held.source,
        reserve=phrase,
    )


def _driver(held: Reserve | None) -> str:
    """Return the words for a driver inside a sentence; a flow is shown in the user's own kind."""
    if held is None or held.driver == "mass_flow":
        return "a flow of"
    return f"a {words.label(held.driver).lower()} of"


def verdict(evaluation: Evaluation) -> str:
    """Return the findings in one sentence."""
    levels = [held.level for held in evaluation.findings]
    counted = [words.count(levels.count(level), level) for level in _ORDER if level in levels]
    said = _VERDICTS[evaluation.worst or Level.NOTE]
    return f"{said}: {', '.join(counted)}." if counted else f"{said}."
