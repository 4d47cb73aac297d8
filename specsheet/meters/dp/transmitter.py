"""The differential-pressure transmitter: its range, its errors, and the legs that reach it."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.family import Array, Contribution, Given, Limit, Request
from specsheet.methods import signal
from specsheet.methods.gum import RECTANGULAR
from specsheet.sources import PRACTICE

#: mantissas of preferred upper range values (R5 numbers, rounded; common practice, no source)
PREFERRED = (1.0, 1.6, 2.5, 4.0, 6.0, 10.0)

#: preferred upper range values [Pa]: 1 mbar to 10 bar
SERIES = np.array([step * 10.0**power for power in range(2, 6) for step in PREFERRED[:-1]] + [1e6])

GRAVITY = 9.80665

#: entries of the transmitter's errors -> words; all relative to the span but the reading's own
ERRORS = {
    "transmitter_accuracy": "transmitter: accuracy, share of span",
    "transmitter_temperature_effect": "transmitter: ambient temperature, share of span",
    "transmitter_stability": "transmitter: drift between calibrations, share of span",
    "transmitter_reading_error": "transmitter: share of reading",
}
_READING = "transmitter_reading_error"

#: usual density of what fills the impulse legs [kg/m3] (from memory)
LEG_DENSITIES = {"water": 998.2, "glycol and water": 1065.0, "silicone oil": 960.0}


def next_range(value: float) -> float:
    """Return the preferred upper range value [Pa] that is not below ``value``."""
    return signal.round_up(value=value, series=PREFERRED)


def error_numbers(request: Request) -> dict[str, float]:
    """Return the transmitter's errors as stated or assumed [-]; one that is not known is 0."""
    return {key: request.tag.si(f"meter.{key}") or 0.0 for key in ERRORS}


def origins(request: Request, keys: tuple[str, ...]) -> dict[str, str]:
    """Return for each entry whether it was given or assumed, as words of the element."""
    return {f"origin.{key}": str(request.tag.origin(f"meter.{key}")) for key in keys}


def contributions(
    numbers: Mapping[str, float],
    choices: Mapping[str, str],
    differential_pressure: Array,
    exponent: float | Array = 0.5,
) -> tuple[Contribution, ...]:
    """Return what the transmitter adds to the uncertainty of the flow.

    An error limit is taken as rectangular (JCGM 100:2008, 4.3.7). Where a second transmitter of
    a lower range is stacked and reaches, its span counts.

    Args:
        numbers: of the element: "range", "second_range" [Pa] and the errors.
        choices: of the element, for the origins.
        differential_pressure: [Pa], shape (n,).
        exponent: relative change of flow by relative change of Δp [-].
    """
    second = numbers.get("second_range", 0.0)
    span = np.where(differential_pressure <= second, second, numbers["range"])
    with np.errstate(all="ignore"):
        share = span / differential_pressure
    found = []
    for key, label in ERRORS.items():
        if limit := numbers.get(key, 0.0):
            scale = np.ones_like(share) if key == _READING else share
            found.append(
                Contribution(
                    key=key,
                    label=label,
                    relative=exponent * limit / RECTANGULAR * scale,
                    origin=Origin(choices.get(f"origin.{key}", Origin.ASSUMED)),
                    source=f"meter.{key}",
                )
            )
    return tuple(found)


def limits(numbers: Mapping[str, float], entry: str) -> tuple[Limit, ...]:
    """Return the limits of the signal: the upper range value and the low-flow cut-off.

    Args:
        numbers: of the element: "cut_off", share of the upper range flow [-].
        entry: path of the entry that states the range.
    """
    cut_off = numbers["cut_off"]
    found = [
        Limit(
            key="signal_fraction",
            low=None,
            high=1.0 + 1e-9,
            level=Level.STOP,
            code="above-range",
            message="the differential pressure is above the upper range value: the transmitter "
            "does not show it; widen the range or the bore",
            source=entry,
        ),
    ]
    if cut_off:
        found.append(
            Limit(
                key="signal_fraction",
                low=cut_off * cut_off,
                high=None,
                level=Level.CAUTION,
                code="below-cut-off",
                message="the flow is below the low-flow cut-off: the output shows none; lower the "
                "cut-off, or add a second transmitter",
                source="meter.low_cut_off",
            )
        )
    return tuple(found)


def below(second: float, span: float) -> tuple[float, tuple[Finding, ...]]:
    """Return the second transmitter's range [Pa]; 0 and a finding where it adds nothing."""
    if second < span:
        return second, ()
    return 0.0, (
        Finding(
            Level.CAUTION,
            "second-transmitter-useless",
            "meter.second_range",
            f"the second transmitter must reach lower than the first, {span / 100.0:.4g} mbar; it "
            "is left out here",
        ),
    )


@dataclass(frozen=True)
class Top:
    """The flow at the upper range value: printed where there is one, a finding where not."""

    values: Mapping[str, Given]
    findings: tuple[Finding, ...] = ()


def top_of(flow: float, entry: str, source: str) -> Top:
    """Return how the flow at the upper range value [kg/s] is put out; NaN is out of reach."""
    if np.isfinite(flow):
        return Top({"upper_range_flow": Given(flow, Origin.DERIVED, source)})
    finding = Finding(
        Level.CAUTION,
        "range-out-of-reach",
        entry,
        "no flow gives the upper range value at the pressure of the largest flow; lower the range",
    )
    return Top({}, (finding,))


@dataclass(frozen=True)
class Legs:
    """The impulse legs: what the transmitter sees at rest and how it is calibrated."""

    values: Mapping[str, Given]
    notes: tuple[str, ...]
    findings: tuple[Finding, ...] = ()


def legs(request: Request, upper_range: float, tapping_distance: float) -> Legs:
    """Return the calibrated range with the head of the legs taken into account.

    In a vertical line the tappings stand at two levels: at rest the transmitter sees
    (ρ_leg - ρ) g Δz, with the sign of the flow's direction.

    Args:
        request: the tag, its stream and its pipe.
        upper_range: upper range value of Δp [Pa].
        tapping_distance: along the pipe, between the tappings [m].
    """
    way = {"vertical up": 1.0, "vertical down": -1.0}.get(request.tag.text("line.orientation"))
    notes = _tapping_notes(request)
    if way is None:
        return Legs(_calibrated(0.0, upper_range, Origin.DERIVED), notes)
    density = float(request.stream.density[request.normal])
    filling, leg_density = _leg_density(request, density)
    stated = request.tag.si("meter.tapping_distance")
    rise = tapping_distance if stated is None else stated
    head = (density - leg_density) * GRAVITY * rise * way
    findings: tuple[Finding, ...] = ()
    if abs(head) > 0.005 * upper_range:
        findings = (
            Finding(
                Level.NOTE,
                "impulse-leg-head",
                "meter.leg_fluid",
                f"vertical line: legs filled with {filling} shift the transmitter's zero by "
                f"{head / 100.0:.3g} mbar; calibrate it to the range printed",
                source="hydrostatics",
            ),
        )
    return Legs(_calibrated(head, upper_range + head, Origin.DERIVED), notes, findings)


def _calibrated(low: float, high: float, origin: Origin) -> dict[str, Given]:
    return {
        "calibrated_range_low": Given(low, origin, "hydrostatics of the impulse legs"),
        "calibrated_range_high": Given(high, origin, "hydrostatics of the impulse legs"),
    }


def _leg_density(request: Request, process_density: float) -> tuple[str, float]:
    stated = request.tag.si("meter.leg_density")
    filling = request.tag.text("meter.leg_fluid") or "process fluid"
    if stated is not None:
        return filling, stated
    if filling == "process fluid":
        steam = request.tag.phase == "gas" and request.tag.text("fluid.substance") == "water"
        return ("condensate", LEG_DENSITIES["water"]) if steam else (filling, process_density)
    return filling, LEG_DENSITIES.get(filling, process_density)


def _tapping_notes(request: Request) -> tuple[str, ...]:
    """Return where the tappings point and how the legs run, by phase and orientation."""
    steam = request.tag.phase == "gas" and request.tag.text("fluid.substance") == "water"
    lines: tuple[str, ...]
    if steam:
        lines = (
            "Steam: tappings level, on the side of the pipe; condensate pots at one height; legs "
            "filled with water before start-up; transmitter below the pipe.",
            "Let the legs cool and fill before the transmitter is put on line: steam burns it.",
        )
    elif request.tag.phase == "gas":
        lines = (
            "Gas: tappings on the upper half of the pipe, transmitter above the pipe, legs fall "
            "towards the pipe (1 in 12) so that liquid drains back.",
        )
    else:
        lines = (
            "Liquid: tappings on the side of the pipe, up to 45° below the horizontal; transmitter "
            "below the pipe, legs rise towards the pipe (1 in 12) so that gas returns.",
        )
    return (*lines, f"Run both legs side by side at one temperature ({PRACTICE}).")
