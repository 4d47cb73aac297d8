"""Pitot static tube: local velocity, mean velocity by a traverse or by one point (ISO 3966)."""

from __future__ import annotations

from collections.abc import Mapping
from functools import partial

import numpy as np

from specsheet.findings import Finding, Level
from specsheet.meters.dp import body, insertion, plain
from specsheet.meters.family import (
    Array,
    Derivation,
    Element,
    Given,
    Limit,
    Request,
    Stream,
)
from specsheet.methods import pitot, traverse
from specsheet.sources import MEMORY, cite

_SOURCE = cite("iso3966")
_AXIS, _MEAN_POINT = "axis", "mean-velocity point"

#: depth of the point of mean velocity, by radius (ISO 7145, from memory)
_MEAN_DEPTH = 0.242


def size(request: Request) -> Element:
    """Choose the range for the dynamic pressure; place the tube."""
    tag = request.tag
    width = tag.si("meter.probe_diameter") or body.figure(request, "probe_diameter")
    position = tag.text("meter.position") or "traverse"
    profile = f"profile_uncertainty_{'traverse' if position == 'traverse' else 'point'}"
    numbers = {
        **insertion.numbers_of(request, width, 0.5),
        "pitot_coefficient": tag.si("meter.pitot_coefficient") or 1.0,
        "uncertainty.velocity_profile": body.figure(request, profile),
        "uncertainty.pitot_coefficient": body.figure(request, "coefficient_uncertainty"),
    }
    places, findings = _places(request, position)
    return plain.element(
        request,
        _respond,
        numbers=numbers,
        choices={"position": position},
        values={
            "probe_width": Given(width, tag.origin("meter.probe_diameter")),
            "blockage": insertion.blocked(numbers),
        },
        notes={"element": places},
        findings=findings,
        origin_keys=("pipe_diameter_uncertainty",),
    )


def _places(request: Request, position: str) -> tuple[tuple[str, ...], tuple[Finding, ...]]:
    """Return where the head goes, in millimetres from the wall."""
    inside = request.pipe.inside_diameter * 1e3
    if position == _AXIS:
        return (f"Head on the axis, {inside / 2.0:.1f} mm from the wall.",), ()
    if position == _MEAN_POINT:
        depth = _MEAN_DEPTH * inside / 2.0
        return (f"Head {depth:.1f} mm from the wall, where the mean velocity is ({MEMORY}).",), ()
    rule = request.tag.text("meter.traverse_rule") or traverse.LOG_LINEAR
    wanted = request.tag.get("meter.points_on_radius")
    count = int(wanted) if isinstance(wanted, int | float | str) and str(wanted).isdigit() else 4
    findings: tuple[Finding, ...] = ()
    known = traverse.points_on_radius(rule)
    if count not in known:
        findings = (
            Finding(
                Level.CAUTION,
                "traverse-points",
                "meter.points_on_radius",
                f"the {rule} rule has positions for {known[0]} to {known[-1]} points on a radius, "
                f"not {count}; 4 are taken",
                source=cite("iso5802"),
            ),
        )
        count = 4
    places = traverse.round_duct(rule=rule, points=count)
    listed = ", ".join(f"{place * inside:.1f}" for place in places)
    return (
        f"Traverse by the {rule} rule on two diameters at right angles, {2 * count} points on "
        f"each, equal weights: {listed} mm from the wall.",
        "Head parallel to the pipe within 3°; take the mean of the velocities, not of the "
        "pressures.",
    ), findings


def _respond(
    numbers: Mapping[str, float], choices: Mapping[str, str], stream: Stream
) -> Mapping[str, Array]:
    with np.errstate(all="ignore"):
        values = plain.pipe_values(numbers, stream)
        factor = np.ones(stream.mass_flow.shape)
        if choices["position"] == _AXIS:
            factor = pitot.mean_to_centre(reynolds_number=values["reynolds_number"])
        local = values["velocity"] / factor
        pressure: Array = pitot.differential_pressure(
            velocity=local / numbers["pitot_coefficient"],
            density=stream.density,
            pressure=stream.pressure,
            isentropic_exponent=stream.isentropic_exponent,
        )
        return plain.with_signals(
            numbers,
            {
                **values,
                "profile_factor": factor,
                "meter_velocity": local,
                "differential_pressure": pressure,
                "pressure_loss": insertion.loss(numbers, values, stream),
            },
        )


def limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    """Return the limits of use; smallest Δp and probe from memory of ISO 3966."""
    source = f"{_SOURCE} ({MEMORY})"
    return (
        *insertion.limits(element, 0.02, source),
        Limit(
            "mach_number",
            None,
            0.25,
            Level.CAUTION,
            "pitot-fast",
            "above Mach 0.25 the standard's tube is no longer covered; use a probe for fast gas",
            source,
            "gas",
        ),
        Limit(
            "differential_pressure",
            10.0,
            None,
            Level.CAUTION,
            "dynamic-pressure-low",
            "below 10 Pa few transmitters hold their zero; narrow the duct there or use another "
            "family",
            "common practice, no source",
        ),
    )


FAMILY = plain.family(
    key="pitot_tube",
    size=size,
    respond=_respond,
    limits=limits,
    budget=partial(insertion.contributions, factors=("velocity_profile", "pitot_coefficient")),
    derivations=(
        *insertion.DERIVATIONS,
        Derivation(
            "profile_factor",
            "mean by local velocity: on the axis 2 n²/((n + 1)(2 n + 1)), n = 1.66 lg ReD; else 1",
            f"power law ({MEMORY})",
            ("reynolds_number",),
        ),
        Derivation(
            "meter_velocity", "local velocity = v / profile factor", "definition", ("velocity",)
        ),
        Derivation(
            "differential_pressure",
            "Δp = p ((1 + (κ-1)/2 ρ v²/(κ p))^(κ/(κ-1)) - 1) for a gas, ρ v²/2 for a liquid, v the "
            "local velocity by the tube's coefficient",
            _SOURCE,
            ("meter_velocity", "density", "pressure", "isentropic_exponent"),
        ),
    ),
)
