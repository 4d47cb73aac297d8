"""Meters that leave the bore free: no loss of their own, errors of the reading and of the zero."""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from specsheet.meters.family import Array, Contribution, Derivation, Element, Stream
from specsheet.meters.shared import errors, output, response
from specsheet.methods import signal
from specsheet.sources import PRACTICE

DERIVATIONS = (
    Derivation(
        "pressure_loss", "loss of the reducers; none at line size", PRACTICE, ("reducer_loss",)
    ),
    Derivation(
        "back_pressure_margin",
        "p - ρ (vm² - v²) / 2 - loss of the reducers - pv",
        "Bernoulli",
        ("pressure", "density", "meter_velocity", "velocity", "reducer_loss", "vapour_pressure"),
    ),
    Derivation(
        "error_limit", "error of the reading + zero velocity / vm", PRACTICE, ("meter_velocity",)
    ),
)


def loss_and_error(
    of: Mapping[str, float], stream: Stream, values: Mapping[str, Array], *, gas: bool
) -> dict[str, Array]:
    """Return loss, error limit and, of a liquid, the margin to its vapour pressure.

    Args:
        of: numbers of the element, with ``reading_error`` [-] and ``zero_velocity`` [m/s].
        stream: the conditions, shape (n,).
        values: of ``response.flow_values``.
        gas: whether the fluid is a gas.
    """
    found = {
        "pressure_loss": values["reducer_loss"],
        "error_limit": signal.velocity_error(
            reading_error=of["reading_error"],
            zero_velocity=of["zero_velocity"],
            velocity=values["meter_velocity"],
        ),
    }
    if not gas:
        none = np.zeros_like(stream.density)
        behind = response.pressure_behind(values, stream, none)
        found["back_pressure_margin"] = behind - stream.vapour_pressure
    return found


def contributions(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return reading, zero, current output and density, shape (n,)."""
    of = element.numbers
    speed = np.abs(values["meter_velocity"])
    reading = np.full_like(speed, of["reading_error"])
    with np.errstate(all="ignore"):
        zero = of["zero_velocity"] / speed
    return (
        errors.of_limit("reading", "error of the reading", reading),
        errors.of_limit("zero", "error of the zero velocity", zero),
        output.current_contribution(values, of["current_output_error"]),
        *output.density_contribution(element, stream),
    )
