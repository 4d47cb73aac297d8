"""Coriolis meter: the force on tubes that vibrate tells the mass flow, their frequency the density.

Source: ISO 10790 (terms). Sizes, zero stability and tubes are a generic series of the profile:
usual figures, for the bidder to confirm.
"""

from __future__ import annotations

from collections.abc import Mapping
from functools import partial

import numpy as np

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.family import (
    Array,
    Contribution,
    Derivation,
    Element,
    Family,
    Given,
    Limit,
    Request,
    Stream,
)
from specsheet.meters.shared import errors, fluid, output, response, sizes
from specsheet.meters.shared.choice import Rules, choose_largest
from specsheet.meters.wetted.electrode import NICKEL, STEEL
from specsheet.meters.wetted.service import service
from specsheet.methods import back_pressure, coriolis, duct
from specsheet.packs import Typical
from specsheet.sources import PRACTICE, cite

_METHOD = cite("iso10790")
_PROPOSE = "propose"
_SUM = "sum"


def size(request: Request) -> Element:
    """Choose the largest size that holds base error, velocity and loss, or rate the one stated."""
    signals = output.output(request, by_mass=True)
    build = partial(_build, request, signals, _tube_material(request))
    return choose_largest(request, build, Rules(at, limits, budget))


def _figures(request: Request, item: sizes.Size) -> dict[str, Given]:
    """Return zero stability, tubes and errors: stated by the user, else usual for the size."""
    tag, typical = request.tag, request.profile.typical

    def of_size(key: str) -> Given:
        usual = Typical(item.figures[key], item.source)
        return sizes.stated_or_typical(sizes.stated(request, key), usual)

    error = typical["gas_error" if tag.phase == "gas" else "liquid_error"]
    return {
        "tube_bore": of_size("tube_bore"),
        "zero_stability": of_size("zero_stability"),
        "nominal_flow": of_size("nominal_flow"),
        "tube_count": sizes.stated_or_typical(None, typical["tube_count"]),
        "base_error": sizes.stated_or_typical(sizes.stated(request, "base_error"), error),
        "density_error": sizes.stated_or_typical(None, typical["density_error"]),
    }


def _build(request: Request, signals: output.Output, material: Given, item: sizes.Size) -> Element:
    tag, typical = request.tag, request.profile.typical
    figures = _figures(request, item)
    named = {key: float(found.value) for key, found in figures.items()}
    numbers = {
        **response.numbers(request, item),
        **signals.numbers,
        **{name: figure.value for name, figure in typical.items()},
        **named,
        "bore": named["tube_bore"],
        "tubes": named["tube_count"],
        "tube_length": typical["length_ratio"].value * named["tube_bore"],
    }
    values = {
        "meter_size": sizes.size_values(request, item)["meter_size"],
        "tube_material": material,
        **figures,
        **signals.values,
    }
    return Element(
        numbers=numbers,
        values=values,
        notes=_notes(request, item, signals),
        findings=(
            *sizes.size_findings(request, item),
            *signals.findings,
            *response.vapour_pressure_findings(request),
            *_fluid_findings(request),
        ),
        choices={
            **signals.choices,
            "phase": tag.phase,
            "error_form": tag.text("meter.error_form"),
        },
    )


def _tube_material(request: Request) -> Given:
    stated = request.tag.text("meter.tube_material")
    if stated and stated != _PROPOSE:
        return Given(stated, Origin.GIVEN)
    feels = service(request)
    attacked = feels.chlorides or feels.acid or feels.alkaline or feels.corrosive
    return Given(NICKEL if attacked else STEEL, Origin.DERIVED, PRACTICE)


def _notes(
    request: Request, item: sizes.Size, signals: output.Output
) -> dict[str, tuple[str, ...]]:
    element = (
        "Tubes, zero stability and errors are figures usual for the size; the bidder states his.",
        *response.reducer_note(request, item, "their loss is in the pressure loss"),
    )
    if request.tag.phase == "gas":
        where = "Horizontal line with the tubes above it, so that condensate drains."
    else:
        where = "Horizontal line with the tubes below it, so that gas leaves; solids: upright line."
    return {
        "element": element,
        "installation": (
            where,
            "No straight lengths wanted; support the line, not the meter, and keep it from strain.",
            "Block valves on both sides, so that the zero is set full, still and at temperature.",
        ),
        "output": (
            *signals.notes,
            "Density is a second output, for information unless its error is part of the purchase.",
        ),
    }


def _fluid_findings(request: Request) -> tuple[Finding, ...]:
    """Return what free gas and toxic fluids do."""
    bubbles = fluid.bubbles(
        request,
        "Free gas damps the tubes and shifts mass and density readings; remove it before the "
        "meter, or have the bidder state the error with this share of gas.",
    )
    if "toxic" not in request.tag.words("fluid.hazards"):
        return bubbles
    return (
        *bubbles,
        Finding(
            Level.NOTE,
            "containment",
            "fluid.hazards",
            "The tubes are thin: ask for a housing rated as secondary containment, with its "
            "pressure stated.",
            source=PRACTICE,
        ),
    )


def at(element: Element, stream: Stream) -> Mapping[str, Array]:
    """Return the response to a stream of shape (n,); never raises, NaN where there is none."""
    of = element.numbers
    gas = element.choices["phase"] == "gas"
    with np.errstate(all="ignore"):
        values = response.flow_values(of, stream, gas=gas)
        own = _tube_loss(of, stream, values)
        values["pressure_loss"] = own + values["reducer_loss"]
        form = coriolis.error_larger
        if element.choices["error_form"] == _SUM:
            form = coriolis.error_sum
        values["error_limit"] = form(
            base_error=of["base_error"],
            zero_stability=of["zero_stability"],
            mass_flow=np.abs(stream.mass_flow),
        )
        if gas:
            values["pressure_ratio"] = 1.0 - values["pressure_loss"] / stream.pressure
        else:
            needed = back_pressure.minimum_back_pressure(
                pressure_loss=own,
                vapour_pressure=stream.vapour_pressure,
                loss_factor=0.0,
                vapour_factor=of["back_pressure_vapour_factor"],
            )
            values.update(response.back_pressure_values(values, stream, own, needed))
        values.update(output.output_values(element, stream))
    return values


def _tube_loss(of: Mapping[str, float], stream: Stream, values: Mapping[str, Array]) -> Array:
    """Return the loss of the tubes, and of splitting and joining the flow [Pa]."""
    factor = duct.friction_factor(
        reynolds_number=values["meter_reynolds_number"],
        relative_roughness=of["tube_roughness"] / of["bore"],
    )
    friction = duct.friction_loss(
        factor=factor,
        length=of["tube_length"],
        diameter=of["bore"],
        density=stream.density,
        velocity=values["meter_velocity"],
    )
    total: Array = friction + of["split_coefficient"] * values["dynamic_pressure"] / 2.0
    return total


def limits(element: Element, request: Request) -> tuple[Limit, ...]:
    """Return the flow below which the zero stability outweighs the base error."""
    del request
    return (
        Limit(
            "error_limit",
            None,
            element.numbers["base_error"] * (1.0 + 1e-9),
            Level.NOTE,
            "zero-stability",
            "the zero stability adds to the base error here; a smaller meter keeps it longer",
            _METHOD,
        ),
    )


def budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return meter, pressure effect, current output and density, relative, shape (n,)."""
    of = element.numbers
    with np.errstate(all="ignore"):
        pressure = of["pressure_effect"] * np.abs(stream.pressure - of["calibration_pressure"])
        own_density = of["density_error"] / stream.density
    density: tuple[Contribution, ...] = ()
    if output.is_volume(element):
        density = (errors.of_limit("density", "density measured by the meter", own_density),)
    stiffening = "pressure that stiffens the tubes, not corrected"
    return (
        errors.of_limit(
            "meter_error", "base error and zero stability", values["error_limit"], source=_METHOD
        ),
        errors.of_limit("pressure_effect", stiffening, pressure),
        output.current_contribution(values, of["current_output_error"]),
        *density,
    )


DERIVATIONS = (
    *response.DERIVATIONS,
    Derivation(
        "pressure_loss",
        "(f L / d + K) ρ vm² / 2 + loss of the reducers; f by Hagen-Poiseuille or Colebrook-White; "
        "L and K usual figures of the family",
        PRACTICE,
        ("density", "meter_velocity", "meter_reynolds_number", "tube_bore", "reducer_loss"),
    ),
    Derivation(
        "error_limit",
        "the larger of base error and zero stability / qm (or their sum, where so stated)",
        _METHOD,
        ("base_error", "zero_stability", "mass_flow"),
    ),
    Derivation("pressure_ratio", "p2/p1 = 1 - ϖ / p", "definition", ("pressure_loss", "pressure")),
    Derivation(
        "minimum_back_pressure",
        "pmin = b pv, b a usual figure of the family",
        PRACTICE,
        ("vapour_pressure",),
    ),
    Derivation(
        "back_pressure_margin",
        "p - ρ (vm² - v²) / 2 - loss of the reducers - loss of the tubes - pmin",
        "Bernoulli",
        ("pressure", "density", "meter_velocity", "velocity", "pressure_loss"),
    ),
    *output.DERIVATIONS,
)

FAMILY = Family(
    key="coriolis",
    size=size,
    at=at,
    limits=limits,
    budget=budget,
    derivations=DERIVATIONS,
    signal="signal_current",
)
