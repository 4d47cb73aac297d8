"""The output of a meter that is linear in flow: range of the current, value of a pulse."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

import numpy as np

from specsheet import quantity
from specsheet.findings import Finding, Level, Origin
from specsheet.meters.family import Array, Contribution, Derivation, Element, Given, Request, Stream
from specsheet.methods import signal
from specsheet.methods.gum import RECTANGULAR
from specsheet.quantity.value import Quantity
from specsheet.sources import PRACTICE

#: the range is chosen at least this far above the largest flow; common practice
HEADROOM = 1.05
_MASS, _VOLUME = "mass", "volume"


@dataclass(frozen=True)
class Output:
    """The output as chosen.

    Attributes:
        numbers, choices, values, notes, findings: what it adds to the element.
    """

    numbers: Mapping[str, float]
    choices: Mapping[str, str]
    values: Mapping[str, Given]
    notes: tuple[str, ...]
    findings: tuple[Finding, ...] = ()


def output(request: Request, *, by_mass: bool = False) -> Output:
    """Choose the upper range value and the value of a pulse, unless the user stated them.

    Args:
        request: the tag's request.
        by_mass: whether the meter measures mass itself; else its pulses count volume at
            operating conditions.
    """
    stated = _flow_at(request, request.maximum)
    kind = "mass_flow" if stated is None else stated.kind
    base = _VOLUME if kind == "volume_flow" else _MASS
    span = _range(request, stated)
    mass = span.value
    volume = mass / float(request.stream.density[request.maximum])
    counted = _MASS if by_mass else _VOLUME
    pulse, pulse_origin = _pulse(request, mass if counted == _MASS else volume)
    key = f"pulse_{counted}"
    return Output(
        numbers={
            "upper_range_mass": mass,
            "upper_range_volume": volume,
            "pulse": pulse,
        },
        choices={"range_by": base, "pulse_by": counted, "flow_kind": kind},
        values={
            "upper_range_flow": Given(mass, span.origin, span.source),
            key: Given(pulse, pulse_origin, "" if pulse_origin is Origin.GIVEN else PRACTICE),
        },
        notes=(
            f"4 mA at no flow, 20 mA at {span.text}; linear in flow.",
            f"Pulse output: one pulse for {_say(key, pulse)}.",
        ),
        findings=span.findings,
    )


@dataclass(frozen=True, slots=True)
class _Span:
    value: float
    text: str
    origin: Origin
    source: str
    findings: tuple[Finding, ...] = ()


def _flow_at(request: Request, index: int) -> Quantity | None:
    name = request.names[index]
    for point in request.tag.points:
        if point.name == name:
            return point.quantity("flow")
    return None


def _range(request: Request, stated: Quantity | None) -> _Span:
    """Return the flow at 20 mA: stated by the user, else the largest flow rounded up."""
    largest = float(request.stream.mass_flow[request.maximum])
    wanted = request.tag.quantity("meter.upper_range_value")
    if wanted is not None and wanted.value > 0.0:
        return _stated_range(request, wanted, stated, largest)
    if stated is None:
        mass = signal.round_up(value=largest * HEADROOM * 3600.0) / 3600.0
        return _Span(mass, f"{mass * 3600.0:g} kg/h", Origin.DERIVED, PRACTICE)
    number = quantity.from_si(stated.value, stated.kind, stated.unit)
    rounded = signal.round_up(value=number * HEADROOM)
    text = f"{rounded:.6g} {stated.unit}"
    return _Span(largest * rounded / number, text, Origin.DERIVED, PRACTICE)


def _stated_range(
    request: Request, wanted: Quantity, stated: Quantity | None, largest: float
) -> _Span:
    density = float(request.stream.density[request.maximum])
    if wanted.kind == "mass_flow":
        mass = wanted.value
    elif wanted.kind == "volume_flow":
        mass = wanted.value * density
    elif stated is not None and stated.kind == wanted.kind and stated.base == wanted.base:
        mass = largest * wanted.value / stated.value
    else:
        finding = Finding(
            Level.CAUTION,
            "range-kind",
            "meter.upper_range_value",
            f"The range ({wanted.text}) is stated in another kind of flow than the operating "
            "points; state it as they are, or as a mass flow. The largest flow is used instead.",
        )
        return _Span(largest, "the largest flow", Origin.ASSUMED, "", (finding,))
    findings: tuple[Finding, ...] = ()
    if mass < largest:
        findings = (
            Finding(
                Level.CAUTION,
                "range-exceeded",
                "meter.upper_range_value",
                f"The range ends at {wanted.text}, below the largest flow; widen it.",
                request.names[request.maximum],
            ),
        )
    return _Span(mass, wanted.text, Origin.GIVEN, "", findings)


def _pulse(request: Request, full: float) -> tuple[float, Origin]:
    """Return mass [kg] or volume [m3] of one pulse: stated, else a decade."""
    stated = request.tag.quantity("meter.pulse_output")
    if stated is not None and stated.value > 0.0:
        return stated.value, Origin.GIVEN
    highest = request.profile.typical["highest_pulse_rate"].value
    return signal.round_up(value=full / highest, series=signal.DECADES), Origin.DERIVED


def _say(key: str, value: float) -> str:
    return f"{value:.6g} kg" if key == "pulse_mass" else f"{value * 1000.0:.6g} L"


def output_values(element: Element, stream: Stream) -> dict[str, Array]:
    """Return the share of the span, the current and the rate of the output pulses."""
    numbers, choices = element.numbers, element.choices
    if choices["range_by"] == _VOLUME:
        share = stream.volume_flow / numbers["upper_range_volume"]
    else:
        share = stream.mass_flow / numbers["upper_range_mass"]
    counted = stream.volume_flow if choices["pulse_by"] == _VOLUME else stream.mass_flow
    return {
        "signal_fraction": share,
        "signal_current": signal.current(fraction=share),
        "pulse_rate": counted / numbers["pulse"],
    }


def current_contribution(values: Mapping[str, Array], error: float) -> Contribution:
    """Return what the current output adds: its error is a share of the span [-], typical."""
    with np.errstate(all="ignore"):
        relative = error / RECTANGULAR / values["signal_fraction"]
    return Contribution("current_output", "current output", relative, Origin.TYPICAL, PRACTICE)


def density_contribution(element: Element, stream: Stream) -> tuple[Contribution, ...]:
    """Return what the density adds where a volume is measured and a mass is wanted."""
    return () if is_volume(element) else (_density(stream),)


def density_of_volume(element: Element, stream: Stream) -> tuple[Contribution, ...]:
    """Return what the density adds where a mass is measured and a volume is wanted."""
    return (_density(stream),) if is_volume(element) else ()


def is_volume(element: Element) -> bool:
    """Tell whether the flow wanted is a volume at operating conditions."""
    return element.choices["flow_kind"] == "volume_flow"


def _density(stream: Stream) -> Contribution:
    return Contribution(
        "density",
        "density of the fluid",
        stream.density_uncertainty / 2.0,
        Origin.DERIVED,
        "method of the density",
    )


DERIVATIONS = (
    Derivation("signal_fraction", "flow / upper range value", "definition", ("upper_range_flow",)),
    Derivation(
        "signal_current", "I = 4 mA + 16 mA x share of span", PRACTICE, ("signal_fraction",)
    ),
    Derivation("pulse_rate", "fp = flow / (flow of one pulse x 1 s)", "definition", ()),
    Derivation(
        "upper_range_flow",
        f"largest flow x {HEADROOM:g}, rounded up to 1, 1.2, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10",
        PRACTICE,
        ("mass_flow",),
    ),
)
