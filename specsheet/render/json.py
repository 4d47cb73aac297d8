"""The JSON of one evaluation: SI numbers under the glossary's keys (schema 1).

Scripts depend on this form. A value that does not exist has no key: there is no null and no NaN.
"""

from __future__ import annotations

import json
import math
from collections.abc import Mapping
from typing import TYPE_CHECKING, Any

from specsheet.fields import KINDS, TERMS
from specsheet.findings import Finding, Reserve
from specsheet.sheet.rows import ordered

if TYPE_CHECKING:
    from specsheet.evaluate.result import Check, Evaluation, Result

SCHEMA = 1


def text(evaluation: Evaluation) -> str:
    """Return the JSON text, ended by a line break."""
    made = json.dumps(document(evaluation), ensure_ascii=False, indent=2, allow_nan=False)
    return f"{made}\n"


def document(evaluation: Evaluation) -> dict[str, Any]:
    """Return the JSON document as plain Python data."""
    return {
        "schema": SCHEMA,
        "tag": evaluation.tag.name,
        "family": evaluation.tag.family,
        "points": [
            {"name": point.name, "values": values_data(point.values)} for point in evaluation.points
        ],
        "element": values_data(evaluation.element),
        "base": values_data(evaluation.base),
        "fluid": values_data(evaluation.fluid),
        "line": values_data(evaluation.line),
        "summary": values_data(evaluation.summary),
        "limits": [check_data(check) for check in evaluation.checks],
        "findings": [finding_data(finding) for finding in evaluation.findings],
    }


def values_data(values: Mapping[str, Result]) -> dict[str, Any]:
    """Return values by glossary key, in the order of the glossary; without those that are none."""
    made = {key: value_data(key, values[key]) for key in ordered(values)}
    return {key: value for key, value in made.items() if value is not None}


def value_data(key: str, result: Result) -> dict[str, Any] | None:
    """Return one value as plain Python data; None where it is no number and no text."""
    held: dict[str, Any]
    if isinstance(result.value, str):
        held = {"value": result.value, "unit": ""}
    elif math.isfinite(result.value):
        held = {"value": float(result.value), "unit": si_unit(key)}
    else:
        return None
    held["origin"] = str(result.origin)
    if result.source:
        held["source"] = result.source
    return held


def si_unit(key: str) -> str:
    """Return the SI unit of a term's value; "1" for a plain number."""
    kind = TERMS[key].kind if key in TERMS else "dimensionless"
    return KINDS[kind].si if kind in KINDS else "1"


def check_data(check: Check) -> dict[str, Any]:
    """Return one limit looked at as plain Python data, with its reserve while it still holds."""
    numbers = {"value": check.value, "low": check.low, "high": check.high}
    return {
        "key": check.key,
        "point": check.point,
        **{
            name: float(number)
            for name, number in numbers.items()
            if number is not None and math.isfinite(number)
        },
        "unit": si_unit(check.key),
        "holds": check.holds,
        "level": str(check.level),
        "message": check.message,
        "source": check.source,
        **reserve_data(check.reserve),
    }


def finding_data(finding: Finding) -> dict[str, Any]:
    """Return one finding as plain Python data."""
    held: dict[str, Any] = {
        "level": str(finding.level),
        "code": finding.code,
        "field": finding.field,
        "point": finding.point,
        "message": finding.message,
        "source": finding.source,
    }
    return {**held, **reserve_data(finding.reserve)}


def reserve_data(reserve: Reserve | None) -> dict[str, Any]:
    """Return a reserve under its key; nothing where there is none."""
    if not reserve or not (math.isfinite(reserve.at) and math.isfinite(reserve.fraction)):
        return {}
    return {
        "reserve": {
            "driver": reserve.driver,
            "at": float(reserve.at),
            "unit": si_unit(reserve.driver),
            "fraction": float(reserve.fraction),
        }
    }
