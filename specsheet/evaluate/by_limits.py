"""A family of which only the profile is known, as a family: judged by its usual limits.

Velocity and Reynolds number are those of a meter of a nominal size within the usual sizes; loss and
error are the usual figures of the family. Nothing else is claimed.
"""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from specsheet import quantity
from specsheet.findings import Finding, Level, Origin
from specsheet.meters.family import (
    Array,
    Contribution,
    Derivation,
    Element,
    Family,
    Given,
    Limit,
    Request,
    Stream,
)
from specsheet.meters.shared import response
from specsheet.meters.shared.limits import of_profile, shortfall
from specsheet.meters.shared.sizes import FREE
from specsheet.methods import reducer
from specsheet.packs import Profile
from specsheet.quantity.value import NominalSize
from specsheet.sources import PRACTICE

IN_LINE = "closed pipe"
#: nominal sizes that meters are made in; common practice
SERIES = (
    *(4, 6, 8, 10, 15, 20, 25, 32, 40, 50, 65, 80, 100, 125, 150, 200, 250, 300, 350, 400, 450),
    *(500, 600, 700, 800, 900, 1000, 1200, 1400, 1600, 1800, 2000, 2400, 3000),
)
#: meters this much smaller than the line are not looked at; common practice
_SMALLEST = 0.2
_REDUCER_ANGLE = 0.5236  # included, 30 degrees; common practice
_STOP_WEIGHT = 1000.0


def family_by_limits(profile: Profile) -> Family:
    """Return a family whose sizing and response are the usual figures of its profile."""
    return Family(
        key=profile.key,
        size=_size,
        at=_at,
        limits=_no_limits,
        budget=_budget,
        derivations=_DERIVATIONS,
        signal="velocity",
    )


def _size(request: Request) -> Element:
    """Return a meter of the size that breaks the usual limits least; of equals the largest."""
    profile = request.profile
    findings: tuple[Finding, ...] = ()
    in_line = IN_LINE in profile.applies_to and profile.sizes is not None
    bore = request.pipe.inside_diameter
    values: dict[str, Given] = {}
    if in_line and np.isfinite(bore):
        nominal, origin, findings = _nominal(request)
        if nominal != _line_size(request):
            bore = nominal / 1000.0
        values["meter_size"] = Given(f"DN {nominal}", origin, PRACTICE)
        values["meter_bore"] = Given(bore, Origin.TYPICAL, PRACTICE)
    calibrated = profile.uncertainty_calibrated
    error = calibrated or profile.uncertainty_uncalibrated
    numbers = _numbers(request, bore)
    numbers["error"] = error.value / 2.0 if error else np.nan
    choices = {
        "phase": request.tag.phase,
        "error_source": error.source if error else "",
        "error_words": "each meter calibrated"
        if profile.uncertainty_calibrated
        else "uncalibrated",
    }
    return Element(numbers, values, {}, findings, choices)


def _numbers(request: Request, bore: float) -> dict[str, float]:
    pipe, profile = request.pipe, request.profile
    ratio = min(bore / pipe.inside_diameter, 1.0)
    loss = 0.0 if profile.loss_class == "none" else np.nan
    return {
        "pipe_diameter": pipe.inside_diameter,
        "pipe_expansion": pipe.expansion,
        "bore": bore,
        "tubes": 1.0,
        "connection": bore,
        "body_expansion": 0.0,
        "reducer_coefficient": float(
            reducer.contraction_coefficient(diameter_ratio=ratio, angle=_REDUCER_ANGLE)
            + reducer.enlargement_coefficient(diameter_ratio=ratio, angle=_REDUCER_ANGLE)
        ),
        "loss_coefficient": profile.loss_coefficient.value if profile.loss_coefficient else loss,
    }


def _nominal(request: Request) -> tuple[int, Origin, tuple[Finding, ...]]:
    """Return the DN of the meter, whether it was stated, and what is wrong with it."""
    sizes = request.profile.sizes
    assert sizes is not None
    text = request.tag.text("meter.size")
    stated = None if text in ("", FREE) else quantity.parse_size(text)
    if isinstance(stated, NominalSize):
        return stated.dn, Origin.GIVEN, ()
    line = _line_size(request)
    fitting = [
        size
        for size in {*SERIES, line}
        if sizes.low <= size <= min(sizes.high, line) and size >= _SMALLEST * line
    ]
    if fitting:
        return _least_broken(request, sorted(fitting, reverse=True)), Origin.TYPICAL, ()
    nearest = sizes.low if line < sizes.low else sizes.high
    code = "line-below-series" if line < sizes.low else "line-above-series"
    message = (
        f"The line (DN {line}) lies far outside the usual sizes of the family, DN {sizes.low} to "
        f"DN {sizes.high}; choose another family, or have the bidder confirm the size."
    )
    finding = Finding(Level.CAUTION, code, "line.size", message, source=sizes.source)
    return nearest, Origin.TYPICAL, (finding,)


def _line_size(request: Request) -> int:
    nominal = request.pipe.nominal
    inside = 1000.0 * request.pipe.inside_diameter
    return nominal or min(SERIES, key=lambda size: abs(size - inside))


def _least_broken(request: Request, sizes: list[int]) -> int:
    """Return the size that breaks the limits of the profile least; all are asked in one call."""
    stream, count = request.stream, request.stream.mass_flow.size
    line = _line_size(request)
    inside = request.pipe.inside_diameter
    bores = np.array([inside if size == line else size / 1000.0 for size in sizes])
    of = _numbers(request, inside)
    lanes = stream.take(np.tile(np.arange(count), len(sizes)))
    bore = np.repeat(bores, count)
    values = _flow_values({**of, "bore": bore, "connection": bore}, lanes, request.tag.phase)
    broken = np.zeros(len(sizes))
    for limit in of_profile(request):
        found = values.get(limit.key)
        weight = {Level.STOP: _STOP_WEIGHT, Level.CAUTION: 1.0}.get(limit.level, 0.0)
        if found is None or not weight or shortfall(limit, values) == 0.0:
            continue
        rows = found.reshape(len(sizes), count)
        broken += weight * np.array([shortfall(limit, {limit.key: row}) for row in rows])
    return sizes[int(np.argmin(np.round(broken, 9)))]


def _flow_values(of: Mapping[str, float | Array], stream: Stream, phase: str) -> dict[str, Array]:
    return response.flow_values(of, stream, gas=phase == "gas")  # type: ignore[arg-type]


def _at(element: Element, stream: Stream) -> Mapping[str, Array]:
    values = _flow_values(element.numbers, stream, element.choices["phase"])
    own = element.numbers["loss_coefficient"] * values["dynamic_pressure"] / 2.0
    values["pressure_loss"] = own + values["reducer_loss"]
    values["volume_flow"] = stream.volume_flow
    return values


def _no_limits(element: Element, request: Request) -> tuple[Limit, ...]:
    """The limits of the profile are added for every family."""
    del element, request
    return ()


def _budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    del values
    error = np.full(stream.mass_flow.shape, element.numbers["error"])
    words = f"error usual for the family, {element.choices['error_words']}"
    source = element.choices["error_source"]
    return (Contribution("usual_error", words, error, Origin.TYPICAL, source),)


_DERIVATIONS = (
    *response.DERIVATIONS,
    Derivation(
        "pressure_loss",
        "ϖ = K ρ vm² / 2, K usual for the family, and the reducers",
        PRACTICE,
        ("density", "meter_velocity"),
        Origin.TYPICAL,
    ),
)
