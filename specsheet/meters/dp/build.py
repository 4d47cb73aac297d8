"""A meter family out of a differential-pressure device."""

from __future__ import annotations

from collections.abc import Mapping
from functools import partial

import numpy as np

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.dp import budget, sizing, transmitter
from specsheet.meters.dp.derivations import COMMON
from specsheet.meters.dp.device import Device
from specsheet.meters.dp.given import guarded
from specsheet.meters.dp.notes import output_note
from specsheet.meters.dp.response import respond
from specsheet.meters.family import Derivation, Element, Family, Given, Limit, Request
from specsheet.sources import PRACTICE, cite


def family(device: Device) -> Family:
    """Return the family of a device."""
    return Family(
        key=device.key,
        size=guarded(partial(size, device)),
        at=partial(respond, device),
        limits=partial(limits, device),
        budget=partial(budget.contributions, device),
        derivations=(*COMMON, _ratio(device), *device.derivations),
        signal="differential_pressure",
    )


def _ratio(device: Device) -> Derivation:
    shape = device.shape
    size = shape.hot_term or shape.term
    return Derivation(
        "diameter_ratio", shape.equation, device.source, (size, "inside_diameter_hot")
    )


def size(device: Device, request: Request) -> Element:
    """Size or rate the device for a tag; what is wrong with it becomes a finding."""
    settled = sizing.led(sizing.task(device, request))
    task, sized = settled.task, settled.sized
    bare = task.element(sized.size, sized.span)
    second, remarks = sizing.second_range(settled, bare)
    numbers = {**bare.numbers, "second_range": second, "machined": sized.machined}
    values = {**sizing.given_values(task, sized), **task.prepared.values}
    if second:
        values["second_range"] = Given(second, Origin.DERIVED, PRACTICE)
    element = Element(numbers, values, {}, (), task.choices)
    described = device.describe(request, element)
    flow = sizing.upper_flow(task, element)
    top = transmitter.top_of(flow, f"meter.{sizing.RANGE}", cite("iso5167-1"))
    legs = transmitter.legs(request, sized.span, numbers.get("tapping_distance", 0.0))
    values = {
        **values,
        **described.values,
        **legs.values,
        **top.values,
    }
    return Element(
        numbers=numbers,
        values=values,
        notes=_notes(request, described.notes, legs.notes),
        findings=(
            *task.prepared.findings,
            *sized.findings,
            *remarks,
            *described.findings,
            *legs.findings,
            *top.findings,
            *_unchecked(task.numbers),
        ),
        choices=task.choices,
    )


def _notes(
    request: Request, described: Mapping[str, tuple[str, ...]], tappings: tuple[str, ...]
) -> dict[str, tuple[str, ...]]:
    notes = dict(described)
    notes["installation"] = (*notes.get("installation", ()), *tappings)
    notes |= output_note(request)
    return notes


def _unchecked(numbers: Mapping[str, float]) -> tuple[Finding, ...]:
    """Return a caution where a calibrated coefficient came without its uncertainty."""
    if np.isnan(numbers["calibrated_coefficient"]):
        return ()
    if np.isfinite(numbers["calibrated_uncertainty"]):
        return ()
    return (
        Finding(
            Level.CAUTION,
            "calibration-uncertainty-missing",
            "meter.discharge_coefficient_uncertainty",
            "a calibrated coefficient is stated without its uncertainty; that of the published "
            "coefficient is used. State the one on the certificate",
        ),
    )


def limits(device: Device, element: Element, request: Request) -> tuple[Limit, ...]:
    """Return the device's own limits and those of the transmitter."""
    return (
        *device.limits(element, request),
        *transmitter.limits(element.numbers, f"meter.{sizing.RANGE}"),
    )


def standard_limits(
    *,
    source: str,
    diameter: tuple[float | None, float | None],
    ratio: tuple[float | None, float | None],
    reynolds: tuple[float | None, float | None],
    pressure_ratio: float | None = 0.75,
    bore: tuple[str, float | None] = ("bore_diameter", None),
) -> tuple[Limit, ...]:
    """Return the limits of use that every standardised device has.

    Args:
        source: citation with the clause.
        diameter: smallest and largest D [m].
        ratio: smallest and largest β [-].
        reynolds: smallest and largest ReD [-].
        pressure_ratio: smallest p2/p1 of a gas [-].
        bore: glossary key and smallest value of the machined dimension [m].
    """

    def limit(
        key: str,
        low: float | None,
        high: float | None,
        what: str,
        driver: str = "",
        phase: str = "",
    ) -> Limit:
        code = f"{key.replace('_', '-')}-limit"
        return Limit(key, low, high, Level.CAUTION, code, what, source, phase, driver)

    outside = "outside this the stated uncertainty of the coefficient does not hold"
    found = [
        limit("inside_diameter_hot", *diameter, f"{outside}; calibrate, or choose another line"),
        limit("diameter_ratio", *ratio, f"{outside}; choose another range", ""),
        limit("reynolds_number", *reynolds, f"{outside}; calibrate there", "mass_flow"),
    ]
    if pressure_ratio is not None:
        text = "below this the expansibility equation does not hold; choose a lower range"
        found.append(limit("pressure_ratio", pressure_ratio, None, text, "mass_flow", "gas"))
    if bore[1] is not None:
        found.append(limit(bore[0], bore[1], None, f"{outside}; choose a lower range"))
    return tuple(found)
