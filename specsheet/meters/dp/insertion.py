"""What probes across the pipe share: blockage, drag, uncertainty of area and profile."""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from specsheet.findings import Level, Origin
from specsheet.meters.dp import body, budget, plain, transmitter
from specsheet.meters.family import (
    Array,
    Contribution,
    Derivation,
    Element,
    Given,
    Limit,
    Request,
    Stream,
)
from specsheet.methods import probe
from specsheet.sources import MEMORY

_DRAG = f"drag of a cylinder ({MEMORY})"

DERIVATIONS: tuple[Derivation, ...] = (
    *plain.derivations(*plain.SHARED),
    Derivation(
        "blockage",
        "B = 4 b l / (π D²)",
        "plane geometry",
        ("probe_width", "inside_diameter_hot"),
    ),
    Derivation("pressure_loss", "ϖ = CD B ρ v²/2", _DRAG, ("blockage", "density", "velocity")),
)


def numbers_of(request: Request, width: float, share: float) -> dict[str, float]:
    """Return the numbers of pipe, transmitter and probe.

    Args:
        request: the tag's request.
        width: of the probe [m].
        share: length in the flow by D [-].
    """
    inside = request.pipe.inside_diameter
    return {
        **plain.base_numbers(request),
        "blockage": float(
            probe.blockage(width=width, length=share * inside, inside_diameter=inside)
        ),
        "drag_coefficient": body.figure(request, "drag_coefficient"),
    }


def blocked(numbers: Mapping[str, float]) -> Given:
    """Return the frontal area of the probe by that of the pipe, to print [-]."""
    return Given(numbers["blockage"], Origin.DERIVED, "plane geometry")


def loss(
    request_numbers: Mapping[str, float], values: Mapping[str, Array], stream: Stream
) -> Array:
    """Return the permanent loss of the probe [Pa], shape (n,)."""
    found: Array = probe.pressure_loss(
        drag_coefficient=request_numbers["drag_coefficient"],
        blockage=request_numbers["blockage"],
        density=stream.density,
        velocity=values["velocity"],
    )
    return found


def contributions(
    element: Element, stream: Stream, values: Mapping[str, Array], factors: tuple[str, ...]
) -> tuple[Contribution, ...]:
    """Return the budget of a probe.

    Args:
        element: holds "uncertainty.<factor>" (relative expanded, k = 2) for each factor.
        stream, values: the conditions and the response, shape (n,).
        factors: names of the factors, such as "velocity_profile".
    """
    numbers, ones = element.numbers, np.ones(stream.mass_flow.shape)
    found = [
        Contribution(
            factor,
            factor.replace("_", " "),
            ones * numbers[f"uncertainty.{factor}"] / 2.0,
            Origin(element.choices.get(f"origin.{factor}", Origin.TYPICAL)),
            element.choices.get(f"source.{factor}", MEMORY),
        )
        for factor in factors
    ]
    return (
        *found,
        Contribution(
            "inside_diameter",
            "area of the pipe",
            ones * 2.0 * numbers["pipe_diameter_uncertainty"] / 2.0,
            Origin(element.choices.get("origin.pipe_diameter_uncertainty", Origin.ASSUMED)),
            "meter.pipe_diameter_uncertainty",
        ),
        budget.density(stream),
        *transmitter.contributions(numbers, element.choices, values["differential_pressure"]),
    )


def limits(element: Element, largest_blockage: float, source: str) -> tuple[Limit, ...]:
    """Return the limits of the transmitter and of the blockage."""
    return (
        *plain.limits(element),
        Limit(
            "blockage",
            None,
            largest_blockage,
            Level.CAUTION,
            "probe-blocks-pipe",
            "the probe takes so much of the pipe that it changes the flow it measures; choose a "
            "thinner probe",
            source,
            driver="",
        ),
    )
