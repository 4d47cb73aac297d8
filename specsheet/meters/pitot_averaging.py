"""Averaging pitot tube: a bar with holes across the pipe; wake frequency against its own."""

from __future__ import annotations

from collections.abc import Mapping
from functools import partial

import numpy as np

from specsheet.findings import Level, Origin
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
from specsheet.methods import probe
from specsheet.sources import MEMORY, PRACTICE

#: usual widths of the bar [m] against the smallest inside diameter they are used in [m]
_WIDTHS = ((0.0, 0.010), (0.1, 0.015), (0.25, 0.025), (0.8, 0.040))
_MOST = 0.8
_COEFFICIENT = "meter.flow_coefficient"


def size(request: Request) -> Element:
    """Choose width and range; the flow coefficient is typical unless it is stated."""
    tag = request.tag
    stated = tag.si("meter.probe_width")
    width = stated or max(w for d, w in _WIDTHS if d <= request.pipe.inside_diameter)
    k = tag.si(_COEFFICIENT)
    propped = tag.text("meter.support") == "far end supported"
    calibrated = tag.si("meter.flow_coefficient_uncertainty")
    numbers = {
        **insertion.numbers_of(request, width, 1.0),
        "flow_coefficient": k or body.figure(request, "flow_coefficient"),
        "width": width,
        "wall": body.figure(request, "wall_share") * width,
        "length": request.pipe.inside_diameter,
        "eigenvalue": probe.PROPPED if propped else probe.HELD_AT_ONE_END,
        "strouhal_number": body.figure(request, "strouhal_number"),
        "uncertainty.flow_coefficient": calibrated
        or body.figure(request, "coefficient_uncertainty"),
    }
    origin = tag.origin("meter.probe_width") if stated else Origin.TYPICAL
    coefficient = Given(k, Origin.GIVEN) if k else body.typical(request, "flow_coefficient")
    wanted = None if k else body.calibration_wanted(request, _why(), entry=_COEFFICIENT)
    return plain.element(
        request,
        _respond,
        numbers=numbers,
        choices={"origin.flow_coefficient": str(Origin.GIVEN if calibrated else Origin.TYPICAL)},
        values={
            "probe_width": Given(width, origin, PRACTICE),
            "flow_coefficient": coefficient,
            "blockage": insertion.blocked(numbers),
        },
        notes={
            "element": (
                "Bar across the whole pipe, holes at points of equal area towards the flow, one "
                "or more behind; state shape and holes of the bar offered.",
                "Support the far end where eddies come near the natural frequency.",
            )
        },
        findings=() if wanted is None else (wanted,),
        origin_keys=("pipe_diameter_uncertainty",),
    )


def _why() -> str:
    return "the flow coefficient belongs to the make of the bar, and a typical one is used"


def _respond(
    numbers: Mapping[str, float],
    choices: Mapping[str, str],  # noqa: ARG001 - the protocol
    stream: Stream,
) -> Mapping[str, Array]:
    with np.errstate(all="ignore"):
        values = plain.pipe_values(numbers, stream)
        pressure = 0.5 * values["dynamic_pressure"] / numbers["flow_coefficient"] ** 2
        wake = probe.wake_frequency(
            strouhal_number=numbers["strouhal_number"],
            velocity=values["velocity"],
            width=numbers["width"],
        )
        natural = probe.natural_frequency(
            eigenvalue=numbers["eigenvalue"],
            length=numbers["length"],
            width=numbers["width"],
            wall=numbers["wall"],
            fluid_density=stream.density,
        )
        return plain.with_signals(
            numbers,
            {
                **values,
                "differential_pressure": pressure,
                "pressure_loss": insertion.loss(numbers, values, stream),
                "wake_frequency": wake,
                "natural_frequency": natural,
                "frequency_ratio": wake / natural,
            },
        )


def limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    """Return the limits of use."""
    return (
        *insertion.limits(element, 0.25, PRACTICE),
        Limit(
            "frequency_ratio",
            None,
            _MOST,
            Level.STOP,
            "probe-resonance",
            "eddies shake the bar near its natural frequency and it may break; support the far "
            "end, take a wider bar, or lower the velocity",
            PRACTICE,
        ),
    )


FAMILY = plain.family(
    key="pitot_averaging",
    size=size,
    respond=_respond,
    limits=limits,
    budget=partial(insertion.contributions, factors=("flow_coefficient",)),
    derivations=(
        *insertion.DERIVATIONS,
        Derivation(
            "differential_pressure",
            "Δp = ρ v² / (2 K²)",
            "definition of the flow coefficient K",
            ("density", "velocity", "flow_coefficient"),
        ),
        Derivation(
            "wake_frequency",
            "fw = Sr v / b",
            f"Strouhal number ({MEMORY})",
            ("velocity", "probe_width"),
        ),
        Derivation(
            "natural_frequency",
            "fn = λ²/(2 π L²) sqrt(E I / m); λ = 1.875 held at one end, 3.927 with the far end "
            "supported; m with the fluid inside and as much as it displaces",
            "beam theory",
            ("probe_width", "inside_diameter_hot", "density"),
        ),
        Derivation(
            "frequency_ratio",
            "fw / fn",
            "definition",
            ("wake_frequency", "natural_frequency"),
        ),
    ),
)
