"""Numbers in the messages of findings: three significant digits and the shown unit."""

from __future__ import annotations

from collections.abc import Mapping

from specsheet import quantity
from specsheet.fields import KINDS, term


def number(value: float, digits: int = 3) -> str:
    """Return a number with significant digits, without an exponent where it stays readable."""
    if value == 0.0 or 1e-3 <= abs(value) < 1e7:
        text = f"{value:.{digits}g}"
        return f"{float(text):,.0f}".replace(",", " ") if "e" in text else text
    return f"{value:.{digits}g}"


def say(key: str, value: float, units: Mapping[str, float | str] | None = None) -> str:
    """Return a value of a glossary key with its unit.

    Args:
        key: glossary key.
        value: SI value.
        units: the job's own shown units by kind.
    """
    of = term(key)
    unit = of.shown or str((units or {}).get(of.kind, "")) or KINDS[of.kind].shown
    shown = number(quantity.from_si(value, of.kind, unit))
    return shown if unit == "1" else f"{shown} {unit}"
