"""Transit-time ultrasonic meter, inline or clamped on: sound runs faster with the flow.

Sources: ISO 12242 (liquids), ISO 17089 (gases). Usual limits and figures stand in the profile.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import replace
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
from specsheet.meters.shared import errors, full_bore, output, response, sizes
from specsheet.meters.shared.choice import Rules, choose_largest
from specsheet.methods import ultrasonic
from specsheet.sources import PRACTICE, cite

_CLAMPED = "clamp-on"
_METHOD = f"{cite('iso12242')}; {cite('iso17089')}"
_ONE_PATH, _USUAL_PATHS = "1", "2"


def size(request: Request) -> Element:
    """Choose the largest size that the limits allow; clamped on, the pipe is the meter."""
    build = partial(_build, request, output.output(request))
    if request.tag.text("meter.mounting") == _CLAMPED:
        element = build(_pipe_as_meter(request))
        return replace(element, findings=(*sizes.not_positive(request), *element.findings))
    return choose_largest(request, build, Rules(at, limits, budget))


def _pipe_as_meter(request: Request) -> sizes.Size:
    nominal = sizes.line_nominal(request, sizes.series(request.profile))
    return sizes.Size(nominal, request.pipe.inside_diameter, {}, Origin.DERIVED, "pipe")


def _build(request: Request, signals: output.Output, item: sizes.Size) -> Element:
    tag, typical = request.tag, request.profile.typical
    clamped = tag.text("meter.mounting") == _CLAMPED
    paths = _ONE_PATH if clamped else tag.text("meter.paths") or _USUAL_PATHS
    angle = sizes.stated(request, "path_angle")
    path_angle = sizes.stated_or_typical(angle, typical["path_angle"])
    phase = "gas" if tag.phase == "gas" else "liquid"
    error = typical["clamp_on_error" if clamped else f"error_paths_{paths}"]
    numbers = {
        **response.numbers(request, item),
        **signals.numbers,
        **{name: figure.value for name, figure in typical.items()},
        "path_angle": float(path_angle.value),
        "reading_error": error.value,
        "zero_velocity": typical[f"{phase}_zero_velocity"].value,
        "free_gas": tag.si("fluid.bubbles") or 0.0,
    }
    if clamped:
        numbers["body_expansion"] = request.pipe.expansion
    values = {
        **sizes.size_values(request, item),
        "path_count": Given(float(paths), Origin.ASSUMED if clamped else tag.origin("meter.paths")),
        "base_error": Given(error.value, Origin.TYPICAL, error.source),
        **signals.values,
    }
    if not clamped:
        values["path_angle"] = path_angle
    return Element(
        numbers=numbers,
        values=values,
        notes=_notes(request, item, signals, clamped=clamped),
        findings=(
            *sizes.size_findings(request, item),
            *signals.findings,
            *_fluid_findings(request, clamped=clamped),
        ),
        choices={
            **signals.choices,
            "phase": tag.phase,
            "paths": paths,
            "mounting": _CLAMPED if clamped else "inline",
        },
    )


def _notes(
    request: Request, item: sizes.Size, signals: output.Output, *, clamped: bool
) -> dict[str, tuple[str, ...]]:
    if clamped:
        element = [
            "Clamped on outside the pipe, two passes through the fluid; the pipe is the meter, so "
            "its bore, wall and lining enter the reading and are measured on site."
        ]
    else:
        element = [
            "Sensors wetted; path angle and errors are usual figures, bidder to confirm.",
            *response.reducer_note(request, item, "their loss is the pressure loss of the meter"),
        ]
    return {
        "element": tuple(element),
        "installation": ("Paths horizontal, so that neither gas nor sediment lies in them.",),
        "output": signals.notes,
    }


def _fluid_findings(request: Request, *, clamped: bool) -> tuple[Finding, ...]:
    """Return what stops sound: gas in liquid, solids, low density, unknown sound speed, lining."""
    tag, typical = request.tag, request.profile.typical
    findings: list[Finding] = []

    def add(level: Level, code: str, field: str, message: str) -> None:
        findings.append(Finding(level, code, field, message, source=PRACTICE))

    if np.isnan(request.stream.sound_speed).any():
        add(
            Level.CAUTION,
            "sound-speed-missing",
            "points.sound_speed",
            "The sound speed is not known, so no transit time can be told; state it at each point.",
        )
    bubbles, solids = tag.si("fluid.bubbles") or 0.0, tag.si("fluid.solids") or 0.0
    if bubbles > typical["most_bubbles"].value:
        add(
            Level.STOP,
            "bubbles",
            "fluid.bubbles",
            "So much free gas scatters the sound; choose another family, for example magnetic.",
        )
    elif bubbles > 0.0:
        add(
            Level.CAUTION,
            "bubbles",
            "fluid.bubbles",
            "Free gas weakens the sound and counts as liquid; have the bidder confirm it.",
        )
    if solids > typical["most_solids"].value:
        add(
            Level.CAUTION,
            "solids",
            "fluid.solids",
            "So many solids weaken the sound; have the bidder confirm it, or choose magnetic.",
        )
    if clamped and tag.text("line.lining"):
        add(
            Level.CAUTION,
            "lining",
            "line.lining",
            "Sound crosses a lining only where it is bonded without a gap; try it on site first.",
        )
    if clamped and tag.phase == "gas":
        least = typical["least_clamp_on_pressure"].value
        if float(np.nanmin(request.stream.pressure)) < least:
            add(
                Level.STOP,
                "clamp-on-gas-pressure",
                "meter.mounting",
                f"Below {least / 1e5:g} bar(a) too little sound gets through the wall into a gas; "
                "choose an inline meter.",
            )
    return tuple(findings)


def at(element: Element, stream: Stream) -> Mapping[str, Array]:
    """Return the response to a stream of shape (n,); never raises, NaN where there is none."""
    of = element.numbers
    gas = element.choices["phase"] == "gas"
    with np.errstate(all="ignore"):
        values = response.flow_values(of, stream, gas=gas)
        bore = of["bore"] * (
            1.0 + of["body_expansion"] * (stream.temperature - response.REFERENCE_TEMPERATURE)
        )
        if element.choices["mounting"] == _CLAMPED:
            inside = ultrasonic.refracted_angle(
                angle=of["wedge_angle"],
                sound_speed=stream.sound_speed,
                wedge_sound_speed=of["wedge_sound_speed"],
            )
            angle, length = np.pi / 2.0 - inside, 2.0 * bore / np.cos(inside)
        else:
            angle = np.full_like(bore, of["path_angle"])
            length = bore / np.sin(angle)
        factor = ultrasonic.profile_factor(reynolds_number=values["meter_reynolds_number"])
        path = {
            "path_length": length,
            "sound_speed": stream.sound_speed,
            "velocity": values["meter_velocity"] / factor,
            "angle": angle,
        }
        values["profile_factor"] = factor
        values["transit_time"] = ultrasonic.transit_time(**path)
        values["transit_time_difference"] = ultrasonic.time_difference(**path)
        values.update(full_bore.loss_and_error(of, stream, values, gas=gas))
        values.update(output.output_values(element, stream))
    return values


def limits(element: Element, request: Request) -> tuple[Limit, ...]:
    """Return the Reynolds number of a steady profile, where one path cannot see its change."""
    del request
    if element.choices["paths"] != _ONE_PATH:
        return ()
    return (
        Limit(
            "meter_reynolds_number",
            element.numbers["steady_reynolds_number"],
            None,
            Level.CAUTION,
            "profile-undecided",
            "the profile changes between laminar and turbulent flow and one path cannot tell; ask "
            "for more paths",
            PRACTICE,
        ),
    )


def budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return reading, zero, timing, current output, free gas and density, shape (n,)."""
    of = element.numbers
    same = np.ones_like(values["meter_velocity"])
    with np.errstate(all="ignore"):
        resolved = of["time_resolution"] / np.abs(values["transit_time_difference"])
    timing: tuple[Contribution, ...] = ()
    if not np.isnan(resolved).all():
        timing = (errors.of_limit("timing", "resolution of the time difference", resolved),)
    return (
        *full_bore.contributions(element, stream, values),
        *timing,
        *errors.free_gas(of, same),
    )


_PATH = ("meter_velocity", "profile_factor", "sound_speed", "meter_bore", "path_angle")
DERIVATIONS = (
    *response.DERIVATIONS,
    Derivation(
        "profile_factor",
        "k = 3/4 laminar; 1 / (1.119 - 0.011 lg Rem) turbulent",
        "textbook (from memory)",
        ("meter_reynolds_number",),
    ),
    Derivation(
        "transit_time", "td = L / (c + vp cos φ), vp = vm / k, L = Dm / sin φ", _METHOD, _PATH
    ),
    Derivation("transit_time_difference", "Δt = 2 L vp cos φ / (c² - vp² cos² φ)", _METHOD, _PATH),
    *full_bore.DERIVATIONS,
    *output.DERIVATIONS,
)

FAMILY = Family(
    key="ultrasonic_transit",
    size=size,
    at=at,
    limits=limits,
    budget=budget,
    derivations=DERIVATIONS,
    signal="transit_time_difference",
)
