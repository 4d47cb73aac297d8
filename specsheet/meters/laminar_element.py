"""Laminar flow element: capillaries or a porous plug; the signal is linear in flow."""

from __future__ import annotations

import math
from collections.abc import Mapping

import numpy as np

from specsheet.findings import Level, Origin
from specsheet.meters.dp import body, plain, transmitter
from specsheet.meters.dp import budget as shared_budget
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
from specsheet.methods import capillary
from specsheet.sources import MEMORY, PRACTICE

_PLUG = "porous plug"
_LAW = "Hagen-Poiseuille"

#: Reynolds number aimed at in a capillary at the largest flow [-]
_TARGET = 1000.0

#: inertial share of the signal aimed at there, and the most that still counts as linear [-]
_INERTIAL_TARGET, _INERTIAL_MOST = 0.08, 0.1


def size(request: Request) -> Element:
    """Choose how many capillaries, or how large a plug; or rate what is stated."""
    numbers = {
        **plain.base_numbers(request),
        "uncertainty.resistance": body.figure(request, "resistance_uncertainty"),
        "uncertainty.viscosity": body.figure(request, "viscosity_uncertainty"),
    }
    kind = request.tag.text("meter.matrix") or "capillaries"
    more, values, notes = _plug(request) if kind == _PLUG else _bundle(request)
    return plain.element(
        request,
        _respond,
        numbers={**numbers, **more},
        choices={"matrix": kind, "gas": "yes" if request.tag.phase == "gas" else ""},
        values=values,
        notes={"element": notes, "output": ("Linear: no square root is extracted.",)},
    )


def _lead(request: Request) -> tuple[float, float, float]:
    """Return volume flow [m3/s], viscosity and density at the largest flow."""
    stream, index = request.stream, request.maximum
    flow = float(stream.mass_flow[index] / stream.density[index])
    return flow, float(stream.viscosity[index]), float(stream.density[index])


def _wanted_pressure(request: Request) -> float:
    stated = request.tag.si(f"meter.{plain.RANGE}")
    return stated or body.figure(request, "differential_pressure")


def _count(flow: float, viscosity: float, density: float, bore: float, pressure: float) -> float:
    """Return how many capillaries keep Re at 1000 and the inertial share small."""
    by_reynolds = 4.0 * flow * density / (math.pi * bore * viscosity * _TARGET)
    slow = math.sqrt(_INERTIAL_TARGET * pressure / (capillary.KINETIC_FACTOR * density))
    by_inertia = 4.0 * flow / (math.pi * bore**2 * slow)
    return float(max(1, math.ceil(max(by_reynolds, by_inertia))))


def _bundle(
    request: Request,
) -> tuple[dict[str, float], dict[str, Given], tuple[str, ...]]:
    tag = request.tag
    flow, viscosity, density = _lead(request)
    bore = tag.si("meter.capillary_bore") or body.figure(request, "capillary_bore")
    stated_count, stated_length = tag.si("meter.capillary_count"), tag.si("meter.capillary_length")
    pressure = _wanted_pressure(request)
    count = stated_count or _count(flow, viscosity, density, bore, pressure)
    inertia = float(capillary.bundle_inertia(bore=bore, count=count))
    length = stated_length
    if length is None:
        viscous = max(pressure - inertia * density * flow**2, 1.0)
        length = viscous * count * math.pi * bore**4 / (128.0 * viscosity * flow)
        length = math.ceil(length * 1e3) / 1e3
    resistance = float(capillary.bundle_resistance(bore=bore, length=length, count=count))
    numbers = {
        "resistance": resistance,
        "inertia": inertia,
        "capillary_bore": bore,
        "capillary_count": count,
        "capillary_length": length,
    }
    values = {
        "capillary_bore": Given(bore, tag.origin("meter.capillary_bore")),
        "capillary_count": Given(count, Origin.GIVEN if stated_count else Origin.DERIVED, _LAW),
        "capillary_length": Given(length, Origin.GIVEN if stated_length else Origin.DERIVED, _LAW),
    }
    notes = (
        f"{count:.0f} capillaries side by side, {bore * 1e3:g} mm bore, {length * 1e3:g} mm long.",
        "A filter before the element: one blocked capillary shifts the reading by its share.",
    )
    return numbers, values, notes


def _plug(request: Request) -> tuple[dict[str, float], dict[str, Given], tuple[str, ...]]:
    tag = request.tag
    flow, viscosity, _ = _lead(request)
    permeability = tag.si("meter.permeability") or body.figure(request, "permeability")
    length = tag.si("meter.plug_length") or body.figure(request, "plug_length")
    stated = tag.si("meter.plug_diameter")
    diameter = stated
    if diameter is None:
        area = viscosity * length * flow / (permeability * _wanted_pressure(request))
        diameter = math.ceil(math.sqrt(4.0 * area / math.pi) * 1e3) / 1e3
    area = math.pi / 4.0 * diameter**2
    resistance = float(
        capillary.plug_resistance(length=length, permeability=permeability, area=area)
    )
    numbers = {"resistance": resistance, "inertia": 0.0, "capillary_bore": math.nan}
    values = {
        "permeability": Given(permeability, tag.origin("meter.permeability")),
        "plug_length": Given(length, tag.origin("meter.plug_length")),
        "plug_diameter": Given(diameter, Origin.GIVEN if stated else Origin.DERIVED, "Darcy"),
    }
    notes = ("Porous plug; the bidder states permeability and mean pore, as measured.",)
    return numbers, values, notes


def _respond(
    numbers: Mapping[str, float], choices: Mapping[str, str], stream: Stream
) -> Mapping[str, Array]:
    with np.errstate(all="ignore"):
        values = plain.pipe_values(numbers, stream)
        pressure: Array = capillary.differential_pressure(
            volume_flow=stream.volume_flow,
            viscosity=stream.viscosity,
            density=stream.density,
            resistance=numbers["resistance"],
            inertia=numbers["inertia"],
            pressure=stream.pressure,
            compressible=bool(choices["gas"]),
        )
        found = {**values, "differential_pressure": pressure, "pressure_loss": pressure}
        if choices["matrix"] != _PLUG:
            bore, count = numbers["capillary_bore"], numbers["capillary_count"]
            reynolds = 4.0 * stream.mass_flow / (np.pi * bore * count * stream.viscosity)
            inertial = numbers["inertia"] * stream.density * stream.volume_flow**2
            found["meter_reynolds_number"] = reynolds
            found["meter_velocity"] = stream.volume_flow / (np.pi / 4.0 * bore**2 * count)
            found["entrance_length"] = capillary.entrance_length(
                reynolds_number=reynolds, bore=bore
            )
            found["inertial_share"] = inertial / pressure
        linear = plain.with_signals(numbers, found)
        del linear["signal_current_root"]
        return linear


def limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    """Return the limits of use: laminar flow, developed profile, small inertial share."""
    found = [*plain.limits(element)]
    if element.choices["matrix"] == _PLUG:
        return tuple(found)
    return (
        *found,
        Limit(
            "meter_reynolds_number",
            None,
            capillary.LARGEST_REYNOLDS,
            Level.STOP,
            "capillary-turbulent",
            "the flow in the capillaries is no longer laminar; take more or narrower ones",
            _LAW,
        ),
        Limit(
            "entrance_length",
            None,
            0.5 * element.numbers["capillary_length"],
            Level.CAUTION,
            "entrance-long",
            "the profile takes more than half the capillary to develop: the signal bends; take "
            "longer or narrower capillaries",
            MEMORY,
        ),
        Limit(
            "inertial_share",
            None,
            _INERTIAL_MOST,
            Level.CAUTION,
            "signal-bends",
            "more than a tenth of the signal is inertial: it is no longer linear in flow; take "
            "more or longer capillaries, or have it calibrated at the density of use",
            PRACTICE,
        ),
    )


def budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return the contributions; viscosity counts in full where the flow is viscous."""
    numbers = element.numbers
    with np.errstate(all="ignore"):
        exponent: Array = capillary.flow_exponent(
            volume_flow=stream.volume_flow,
            viscosity=stream.viscosity,
            density=stream.density,
            resistance=numbers["resistance"],
            inertia=numbers["inertia"],
        )
        viscous = 2.0 * exponent - 1.0
        parts = transmitter.contributions(
            numbers, element.choices, values["differential_pressure"], exponent
        )
    figures = (("resistance", exponent), ("viscosity", viscous))
    return (
        *(
            Contribution(
                name,
                {"resistance": "resistance of the element"}.get(name, name),
                sensitivity * numbers[f"uncertainty.{name}"] / 2.0,
                Origin.TYPICAL,
                MEMORY,
            )
            for name, sensitivity in figures
        ),
        shared_budget.density(stream, 1.0),
        *parts,
    )


FAMILY = plain.family(
    key="laminar_element",
    size=size,
    respond=_respond,
    limits=limits,
    budget=budget,
    derivations=(
        *plain.derivations(*(key for key in plain.SHARED if key != "signal_current_root")),
        Derivation(
            "differential_pressure",
            "S = 128 μ L q/(n π d⁴) + 1.16 ρ (4 q/(n π d²))² for capillaries, μ L q/(k A) for a "
            "plug; Δp = S for a liquid, Δp (1 - Δp/(2 p)) = S for a gas",
            f"{_LAW}, Darcy; kinetic factor {MEMORY}",
            ("volume_flow", "viscosity", "density", "pressure"),
        ),
        Derivation("pressure_loss", "ϖ = Δp", "nothing is recovered", ("differential_pressure",)),
        Derivation(
            "meter_reynolds_number",
            "Re = 4 qm/(n π d μ)",
            "definition",
            ("mass_flow", "capillary_count", "capillary_bore", "viscosity"),
        ),
        Derivation(
            "meter_velocity",
            "v = q / (n π d²/4)",
            "continuity",
            ("volume_flow", "capillary_count", "capillary_bore"),
        ),
        Derivation(
            "entrance_length",
            "Le = 0.06 Re d",
            f"laminar entrance ({MEMORY})",
            ("meter_reynolds_number", "capillary_bore"),
        ),
        Derivation(
            "inertial_share",
            "1.16 ρ v² / Δp",
            _LAW,
            ("density", "meter_velocity", "differential_pressure"),
        ),
        Derivation(
            "capillary_count",
            "so many that Re <= 1000 and 1.16 ρ v² <= 0.08 Δp at the largest flow, rounded up",
            _LAW,
            ("mass_flow", "capillary_bore", "viscosity", "differential_pressure_range"),
        ),
        Derivation(
            "capillary_length",
            "S solved for L at the largest flow and the range wanted, rounded up to 1 mm",
            _LAW,
            ("differential_pressure_range", "volume_flow", "viscosity", "capillary_count"),
        ),
        Derivation(
            "plug_diameter",
            "Darcy solved for the area, rounded up to 1 mm",
            "Darcy",
            ("permeability", "plug_length", "viscosity", "volume_flow"),
        ),
    ),
)
