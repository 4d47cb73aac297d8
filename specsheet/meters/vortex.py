"""Vortex meter: a bluff body sheds vortices at a frequency in proportion to the velocity.

Sources: ISO/TR 12764 (frequency, K-factor); usual limits and figures stand in the profile, each
with its source. Volume flow is measured, so a mass flow needs the density at the meter.
"""

from __future__ import annotations

from collections.abc import Mapping
from functools import partial

import numpy as np

from specsheet.findings import Finding, Origin
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
from specsheet.methods import back_pressure, vortex
from specsheet.sources import PRACTICE, cite

_METHOD = cite("iso12764")


def size(request: Request) -> Element:
    """Choose the largest size up to the line's that the limits allow, or rate the one stated."""
    build = partial(_build, request, output.output(request))
    return choose_largest(request, build, Rules(at, limits, budget))


def _build(request: Request, signals: output.Output, item: sizes.Size) -> Element:
    tag, typical = request.tag, request.profile.typical
    width = sizes.stated(request, "bluff_width")
    factor = sizes.stated(request, "k_factor")
    calibrated = factor is not None
    bluff = item.bore * typical["bluff_ratio"].value if width is None else width
    if factor is None:
        strouhal = typical["strouhal_number"].value
        factor = float(vortex.k_factor(strouhal_number=strouhal, bluff_width=bluff, bore=item.bore))
    else:
        strouhal = float(vortex.strouhal_number(k_factor=factor, bluff_width=bluff, bore=item.bore))
    typical_source = typical["strouhal_number"].source
    values = {
        **sizes.size_values(request, item),
        "bluff_width": sizes.given_or_typical(
            bluff, stated=width is not None, source=typical["bluff_ratio"].source
        ),
        "k_factor": sizes.given_or_typical(factor, stated=calibrated, source=typical_source),
        "strouhal_number": Given(
            strouhal,
            Origin.DERIVED if calibrated else Origin.TYPICAL,
            _METHOD if calibrated else typical_source,
        ),
        "pressure_loss_coefficient": sizes.stated_or_typical(
            None, typical["pressure_loss_coefficient"]
        ),
        **signals.values,
    }
    numbers = {
        **response.numbers(request, item),
        **signals.numbers,
        **{name: figure.value for name, figure in typical.items()},
        "bluff_width": bluff,
        "k_factor": factor,
        "averaging_time": sizes.stated(request, "averaging_time") or 10.0,
        "reading_error": typical[f"{tag.phase or 'liquid'}_error"].value,
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
        choices={**signals.choices, "phase": tag.phase},
    )


def _notes(
    request: Request, item: sizes.Size, signals: output.Output
) -> dict[str, tuple[str, ...]]:
    installation = [
        "Bluff body across the plane of the nearest upstream bend, gaskets clear of the bore.",
        "No pulsation or vibration near the shedding frequency; support the line on both sides.",
    ]
    if request.tag.phase == "liquid":
        installation.append("The line stays full: horizontal, or vertical with the flow upward.")
    else:
        installation.append("Horizontal line: bluff body horizontal where condensate may run.")
    effect = (
        "the straight lengths count in the meter's bore, and the loss of both is in the pressure "
        "loss"
    )
    element = (
        "K-factor, bluff width and bore are figures usual for the size; the bidder states his own.",
        *response.reducer_note(request, item, effect),
    )
    return {
        "element": element,
        "installation": tuple(installation),
        "output": signals.notes,
    }


def _fluid_findings(request: Request) -> tuple[Finding, ...]:
    """Return what the fluid itself does to a vortex meter."""
    return (
        *fluid.bubbles(
            request,
            "Free gas in the liquid counts as flow and weakens the vortices; remove it before the "
            "meter.",
        ),
        *fluid.solids(
            request,
            "Solids wear the edges of the bluff body and shift the K-factor; keep the velocity "
            "low or choose a meter without edges.",
        ),
    )


def at(element: Element, stream: Stream) -> Mapping[str, Array]:
    """Return the response to a stream of shape (n,); never raises, NaN where there is none."""
    of = element.numbers
    gas = element.choices["phase"] == "gas"
    with np.errstate(all="ignore"):
        values = response.flow_values(of, stream, gas=gas)
        factor = vortex.k_factor_hot(
            k_factor=of["k_factor"],
            expansion=of["body_expansion"],
            temperature_rise=stream.temperature - response.REFERENCE_TEMPERATURE,
        )
        values["frequency"] = factor * stream.volume_flow
        own = of["pressure_loss_coefficient"] * values["dynamic_pressure"] / 2.0
        values["pressure_loss"] = own + values["reducer_loss"]
        values["error_limit"] = of["reading_error"] * np.maximum(
            1.0, of["linear_reynolds_number"] / values["meter_reynolds_number"]
        )
        if not gas:
            values.update(_back_pressure(of, stream, values, own))
        values.update(output.output_values(element, stream))
    return values


def _back_pressure(
    of: Mapping[str, float], stream: Stream, values: Mapping[str, Array], loss: Array
) -> dict[str, Array]:
    needed = back_pressure.minimum_back_pressure(
        pressure_loss=loss,
        vapour_pressure=stream.vapour_pressure,
        loss_factor=of["back_pressure_loss_factor"],
        vapour_factor=of["back_pressure_vapour_factor"],
    )
    behind = response.pressure_behind(values, stream, loss)
    return {
        **response.back_pressure_values(values, stream, loss, needed),
        "cavitation_index": back_pressure.cavitation_index(
            pressure=behind + loss,
            downstream_pressure=behind,
            vapour_pressure=stream.vapour_pressure,
        ),
    }


def limits(element: Element, request: Request) -> tuple[Limit, ...]:
    """Return none beyond those of the profile: every limit of the family is a usual figure."""
    del element, request
    return ()


def budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return error of the meter, counting, current output and density, relative, shape (n,)."""
    of = element.numbers
    return (
        errors.of_limit("meter_error", "error of the meter", values["error_limit"]),
        errors.counting(values, of, "vortices"),
        output.current_contribution(values, of["current_output_error"]),
        *output.density_contribution(element, stream),
    )


DERIVATIONS = (
    *response.DERIVATIONS,
    Derivation("frequency", "f = K qv", _METHOD, ("k_factor", "volume_flow")),
    Derivation(
        "k_factor",
        "K = 4 Sr / (π Dm² d); at temperature K / (1 + α Δt)³",
        _METHOD,
        ("strouhal_number", "meter_bore", "bluff_width"),
    ),
    Derivation("bluff_width", "d = share of the bore, usual", PRACTICE, ("meter_bore",)),
    Derivation(
        "strouhal_number",
        "Sr = K π Dm² d / 4, where the K-factor is stated",
        _METHOD,
        ("k_factor", "meter_bore", "bluff_width"),
    ),
    response.LOSS_BY_COEFFICIENT,
    Derivation(
        "minimum_back_pressure",
        "pmin = a ϖ + b pv (a, b usual figures of the family), ϖ without the reducers",
        PRACTICE,
        ("pressure_loss", "reducer_loss", "vapour_pressure"),
    ),
    response.BACK_PRESSURE_MARGIN,
    Derivation(
        "cavitation_index",
        "(p2 - pv) / (p1 - p2), before and behind the meter in its bore",
        cite("isa75.23"),
        ("pressure", "vapour_pressure", "pressure_loss"),
    ),
    Derivation(
        "error_limit",
        "error of the reading, times Re(linear) / Rem below the linear range",
        PRACTICE,
        ("meter_reynolds_number",),
    ),
    *output.DERIVATIONS,
)

FAMILY = Family(
    key="vortex",
    size=size,
    at=at,
    limits=limits,
    budget=budget,
    derivations=DERIVATIONS,
    signal="frequency",
)
