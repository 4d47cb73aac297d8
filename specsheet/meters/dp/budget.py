"""Contributions to the uncertainty of the flow by ISO 5167-1:2003, clause 8."""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from specsheet.findings import Origin
from specsheet.meters.dp import transmitter
from specsheet.meters.dp.device import Device, Lanes
from specsheet.meters.dp.response import lanes_of
from specsheet.meters.family import Array, Contribution, Element, Stream
from specsheet.methods import iso5167_1 as equation
from specsheet.methods import orifice_plate
from specsheet.sources import PRACTICE, cite


def contributions(
    device: Device, element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return every contribution, relative standard uncertainty of the flow, shape (n,)."""
    with np.errstate(all="ignore"):
        lanes = lanes_of(device, element, stream)
        return (
            _coefficient(device, element, lanes),
            *_expansion(device, stream, values),
            *_dimensions(element, values["diameter_ratio"]),
            *_hole(element, lanes),
            density(stream),
            *transmitter.contributions(
                element.numbers, element.choices, values["differential_pressure"]
            ),
        )


def _coefficient(device: Device, element: Element, lanes: Lanes) -> Contribution:
    stated = element.numbers.get("calibrated_uncertainty", np.nan)
    if np.isfinite(stated):
        relative = np.full(lanes.mass_flow.shape, stated / 2.0)
        return Contribution(
            "discharge_coefficient",
            "discharge coefficient, calibrated",
            relative,
            Origin.GIVEN,
            "meter.coefficient_uncertainty",
        )
    relative = device.coefficient_uncertainty(lanes) / 2.0
    return Contribution(
        "discharge_coefficient",
        "discharge coefficient",
        relative * np.ones(lanes.mass_flow.shape),
        Origin.DERIVED,
        device.source,
    )


def _expansion(
    device: Device, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    exponent = stream.isentropic_exponent
    if np.isnan(exponent).all():
        return ()
    ratio = values["differential_pressure"] / stream.pressure
    relative = device.expansibility_uncertainty(values["diameter_ratio"], ratio, exponent) / 2.0
    return (
        Contribution(
            "expansibility",
            "expansibility factor",
            np.where(np.isnan(exponent), 0.0, relative),
            Origin.ASSUMED if device.assumed_expansion else Origin.DERIVED,
            device.assumed_expansion or device.source,
        ),
    )


def _dimensions(element: Element, diameter_ratio: Array) -> tuple[Contribution, ...]:
    clause = cite("iso5167-1", "clause 8")
    pipe = element.numbers.get("pipe_diameter_uncertainty", 0.0)
    bore = element.numbers.get("bore_uncertainty", 0.0)
    return (
        Contribution(
            "inside_diameter",
            "inside diameter of the pipe",
            equation.diameter_sensitivity(diameter_ratio=diameter_ratio) * pipe / 2.0,
            Origin(element.choices.get("origin.pipe_diameter_uncertainty", Origin.ASSUMED)),
            clause,
        ),
        Contribution(
            "bore_diameter",
            "bore or throat",
            equation.bore_sensitivity(diameter_ratio=diameter_ratio) * bore / 2.0,
            Origin(element.choices.get("origin.bore_uncertainty", Origin.ASSUMED)),
            clause,
        ),
    )


def _hole(element: Element, lanes: Lanes) -> tuple[Contribution, ...]:
    """Return what a drain or vent hole adds: half of what it changes in the flow, as k = 2.

    ISO/TR 15377 has a rule of its own, which was not seen.
    """
    hole = element.numbers.get("hole", 0.0)
    if not hole:
        return ()
    bore = element.numbers["machined"]
    change = (orifice_plate.effective_bore(bore=bore, hole=hole) / bore) ** 2 - 1.0
    return (
        Contribution(
            "drain_hole",
            "drain or vent hole, half of its correction",
            np.full(lanes.mass_flow.shape, change / 4.0),
            Origin.ASSUMED,
            PRACTICE,
        ),
    )


def density(stream: Stream, exponent: float | Array = 0.5) -> Contribution:
    """Return what the density adds; ``exponent`` is the flow's by density's relative change."""
    return Contribution(
        "density",
        "density",
        exponent * stream.density_uncertainty / 2.0,
        Origin.DERIVED,
        cite("iso5167-1", "clause 8"),
    )
