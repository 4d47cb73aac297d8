"""Values of the tag as a whole: turndown, and what the pressure loss costs in a year."""

from __future__ import annotations

from collections.abc import Mapping, Sequence

import numpy as np

from specsheet.evaluate.result import Band, Result
from specsheet.evaluate.words import number
from specsheet.findings import Finding, Level, Origin
from specsheet.meters.family import Array, Request

_WINDOW = "from limit to limit, at the normal point"


def window(bands: Sequence[Band]) -> tuple[float | None, float | None]:
    """Return the mass flows between which every limit above a note holds [kg/s]."""
    binding = [band for band in bands if band.level is not Level.NOTE]
    lows = [band.low for band in binding if band.low is not None]
    highs = [band.high for band in binding if band.high is not None]
    return (max(lows) if lows else None, min(highs) if highs else None)


def summarise(
    request: Request, values: Mapping[str, Array], bands: Sequence[Band]
) -> dict[str, Result]:
    """Return turndown asked and available, and the yearly energy and cost of the loss."""
    flows = request.stream.mass_flow
    results = {"turndown": _turndown_asked(request)}
    low, high = window(bands)
    if low is not None and high is not None:
        available = high / low if high > low else 0.0
        results["turndown_available"] = Result(available, Origin.DERIVED, method=_WINDOW)
    if low is None or high is None or low < high:
        results |= {
            key: Result(flow, Origin.DERIVED, method=_WINDOW)
            for key, flow in (("lower_range_flow", low), ("largest_flow", high))
            if flow is not None
        }
    power = float(values["lost_power"][request.normal])
    if np.isfinite(power) and flows.size:
        hours = request.tag.si("job.hours_per_year") or 0.0
        joules = power * hours * 3600.0
        results["lost_power"] = Result(power, Origin.DERIVED, method="at the normal point")
        results["yearly_energy"] = Result(joules, Origin.DERIVED, method=f"{hours:g} h a year")
        price = request.tag.si("job.energy_price")
        if price is not None:
            results["yearly_cost"] = Result(
                joules * price, Origin.DERIVED, method=request.tag.text("job.currency")
            )
    return results


def _turndown_asked(request: Request) -> Result:
    stated = request.tag.quantity("require.turndown")
    if stated is not None:
        return Result(stated.value, Origin.GIVEN, text=stated.text)
    flows = request.stream.mass_flow
    return Result(
        float(flows.max() / flows.min()), Origin.DERIVED, method="largest by smallest flow"
    )


def check_turndown(request: Request, results: Mapping[str, Result]) -> tuple[Finding, ...]:
    """Return a finding when the limits leave less turndown than is asked for."""
    available = results.get("turndown_available")
    asked = float(results["turndown"].value)
    if available is None or float(available.value) >= asked:
        return ()
    return (
        Finding(
            Level.CAUTION,
            "turndown-short",
            "require.turndown" if "require.turndown" in request.tag.given else "points",
            f"The range asked for is {number(asked)} to 1; {_left(float(available.value))} at the "
            "normal point. Choose a smaller range, two meters, or a family with a wider one.",
        ),
    )


def _left(available: float) -> str:
    """Return what the limits leave of the range, in words; 0 where no flow is left."""
    if available == 0.0:
        return "no flow holds all limits"
    return f"the limits leave {number(available)} to 1"
