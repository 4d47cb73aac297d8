"""Numbers in the messages of findings: three significant digits and the shown unit."""

from __future__ import annotations

import math
from collections.abc import Mapping

from specsheet import quantity
from specsheet.fields import KINDS, term
from specsheet.fields.terms import in_sentence


def number(value: float, digits: int = 3) -> str:
    """Return a number with significant digits, without an exponent where it stays readable."""
    if value == 0.0 or 1e-3 <= abs(value) < 1e7:
        text = f"{value:.{digits}g}"
        if "e" not in text:
            return text
        whole = f"{float(text):.0f}"
        return whole if len(whole.lstrip("-")) < 5 else f"{float(whole):,.0f}".replace(",", " ")
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


def facts(
    key: str,
    value: float,
    bounds: tuple[float | None, float | None],
    units: Mapping[str, float | str] | None = None,
    where: str = "",
) -> str:
    """Return what came and what was wanted, as the beginning of a sentence.

    Args:
        key: glossary key.
        value: SI value; NaN where there is none.
        bounds: lowest and highest, SI; None where it is open.
        units: the job's own shown units by kind.
        where: " at maximum", or "".
    """
    wanted = " and ".join(
        f"{words} {say(key, bound, units)}"
        for words, bound in zip(("at least", "at most"), bounds, strict=True)
        if bound is not None
    )
    given = "has no value" if math.isnan(value) else f"is {say(key, value, units)}"
    return f"{in_sentence(key)} {given}{where}; {wanted} is wanted"
