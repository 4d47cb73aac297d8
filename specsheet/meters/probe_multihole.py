"""Probe with three or five holes: direction and velocity from the pressures around its head."""

from __future__ import annotations

import math
from collections.abc import Mapping
from functools import partial

import numpy as np

from specsheet.findings import Level
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
from specsheet.methods import pitot, probe
from specsheet.sources import MEMORY

_FIVE = "five holes"
_IDEAL = "ideal flow round a cylinder or a sphere"


def size(request: Request) -> Element:
    """Choose the range for the pressure between centre hole and static pressure."""
    tag = request.tag
    width = tag.si("meter.probe_diameter") or body.figure(request, "probe_diameter")
    holes = tag.text("meter.holes") or _FIVE
    angle = tag.si("meter.hole_angle") or math.radians(45.0)
    expected = tag.si("meter.flow_angle") or 0.0
    numbers = {
        **insertion.numbers_of(request, width, 0.5),
        "hole_angle": angle,
        "flow_angle": expected,
        "uncertainty.probe_calibration": body.figure(request, "calibration_uncertainty"),
        "uncertainty.velocity_profile": body.figure(request, "profile_uncertainty"),
    }
    wanted = body.calibration_wanted(
        request, "every head has its own map of pressures against angle", entry="meter.holes"
    )
    planes = "yaw and pitch (3-D)" if holes == _FIVE else "yaw (2-D)"
    return plain.element(
        request,
        _respond,
        numbers=numbers,
        choices={"holes": holes},
        values={
            "probe_width": Given(width, tag.origin("meter.probe_diameter")),
            "blockage": insertion.blocked(numbers),
        },
        notes={
            "element": (
                f"Head with {holes}: {planes}, side holes at {math.degrees(angle):.0f}°.",
                "Calibrate the head in a free jet over ±30° in steps of 5°, at two velocities or "
                "more, and hand in the map of coefficients.",
                "One transmitter for the centre hole, one for each pair of side holes.",
            )
        },
        findings=() if wanted is None else (wanted,),
        origin_keys=("pipe_diameter_uncertainty",),
    )


def _respond(
    numbers: Mapping[str, float], choices: Mapping[str, str], stream: Stream
) -> Mapping[str, Array]:
    with np.errstate(all="ignore"):
        values = plain.pipe_values(numbers, stream)
        head: Array = pitot.differential_pressure(
            velocity=values["velocity"],
            density=stream.density,
            pressure=stream.pressure,
            isentropic_exponent=stream.isentropic_exponent,
        )
        spherical = choices["holes"] == _FIVE
        side, turned = numbers["hole_angle"], numbers["flow_angle"]
        centre = probe.side_hole_coefficient(angle=turned, spherical=spherical)
        near = probe.side_hole_coefficient(angle=side - turned, spherical=spherical)
        far = probe.side_hole_coefficient(angle=side + turned, spherical=spherical)
        return plain.with_signals(
            numbers,
            {
                **values,
                "differential_pressure": head * centre,
                "side_hole_pressure": head * 0.5 * (near + far),
                "yaw_pressure": head * (near - far),
                "pressure_loss": insertion.loss(numbers, values, stream),
            },
        )


def limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    """Return the limits of use."""
    return (
        *insertion.limits(element, 0.02, MEMORY),
        Limit(
            "differential_pressure",
            10.0,
            None,
            Level.CAUTION,
            "dynamic-pressure-low",
            "below 10 Pa few transmitters hold their zero",
            "common practice, no source",
        ),
        Limit(
            "mach_number",
            None,
            0.3,
            Level.CAUTION,
            "probe-fast",
            "a head calibrated in slow air does not hold for fast gas; calibrate at its speed",
            MEMORY,
            "gas",
        ),
    )


FAMILY = plain.family(
    key="probe_multihole",
    size=size,
    respond=_respond,
    limits=limits,
    budget=partial(insertion.contributions, factors=("probe_calibration", "velocity_profile")),
    derivations=(
        *insertion.DERIVATIONS,
        Derivation(
            "differential_pressure",
            "centre hole less static pressure: q cp, q the dynamic pressure (compressible for a "
            "gas), cp = 1 - 4 sin²α on a cylinder, 1 - 9/4 sin²α on a sphere, α the flow angle",
            _IDEAL,
            ("velocity", "density", "pressure", "isentropic_exponent"),
        ),
        Derivation(
            "side_hole_pressure",
            "mean of the side holes less static pressure: q (cp(θ - α) + cp(θ + α))/2",
            _IDEAL,
            ("differential_pressure",),
        ),
        Derivation(
            "yaw_pressure",
            "difference of a pair of side holes: q (cp(θ - α) - cp(θ + α))",
            _IDEAL,
            ("differential_pressure",),
        ),
    ),
)
