"""Electromagnetic meter: a conducting liquid induces a voltage across a magnetic field.

Source: ISO 20456 (terms, U = k B D v). Usual limits, liners and figures stand in the profile.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
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
from specsheet.meters.shared.choice import Rules, choose
from specsheet.meters.wetted.conductivity import conductivity_findings, conductivity_limits
from specsheet.meters.wetted.electrode import Part, earthing, electrode
from specsheet.meters.wetted.liner import Liner, liner
from specsheet.meters.wetted.service import is_slurry, service
from specsheet.methods import duct, electromagnetic
from specsheet.sources import PRACTICE, cite

_METHOD = cite("iso20456")


def size(request: Request) -> Element:
    """Choose a size that runs at the velocity liked best, or rate the one stated."""
    found = sizes.candidates(request)
    typical = request.profile.typical
    low, high = typical["preferred_velocity_low"].value, typical["preferred_velocity_high"].value
    flow = float(request.stream.volume_flow[request.normal])

    def dislike(item: sizes.Size) -> tuple[float, float]:
        speed = float(duct.velocity(volume_flow=flow, diameter=item.bore))
        away = max(np.log(low / speed), np.log(speed / high), 0.0) if speed > 0.0 else 0.0
        return round(float(away), 9), -item.bore

    order = tuple(sorted(found.sizes, key=dislike))
    liking = f"the size nearest to {low:g} to {high:g} m/s at the normal flow"
    build = partial(_build, request, _Wetted.of(request), output.output(request))
    return choose(request, found, order, build, Rules(at, limits, budget), liking)


@dataclass(frozen=True, slots=True)
class _Wetted:
    """The wetted parts, which the service decides whatever the size."""

    lined: Liner
    metal: Part
    earth: Part

    @classmethod
    def of(cls, request: Request) -> _Wetted:
        """Return the parts for the service of a request."""
        feels = service(request)
        return cls(liner(request, feels), electrode(request, feels), earthing(request, feels))


def _build(request: Request, wetted: _Wetted, signals: output.Output, item: sizes.Size) -> Element:
    tag, typical = request.tag, request.profile.typical
    lined, metal, earth = wetted.lined, wetted.metal, wetted.earth
    values = {
        **sizes.size_values(request, item),
        "liner": lined.given,
        "electrode_material": metal.given,
        "earthing": earth.given,
        **signals.values,
    }
    conductivity = tag.si("fluid.electrical_conductivity")
    if conductivity is not None:
        values["electrical_conductivity"] = Given(conductivity, Origin.GIVEN)
    numbers = {
        **response.numbers(request, item),
        **signals.numbers,
        **{name: figure.value for name, figure in typical.items()},
        "slurry_noise": typical["slurry_noise"].value if is_slurry(request) else 0.0,
        "free_gas": tag.si("fluid.bubbles") or 0.0,
        "liner_low": np.nan if lined.low is None else lined.low,
        "liner_high": np.nan if lined.high is None else lined.high,
    }
    return Element(
        numbers=numbers,
        values=values,
        notes=_notes(request, item, lined, signals),
        findings=(
            *sizes.size_findings(request, item),
            *signals.findings,
            *lined.findings,
            *metal.findings,
            *earth.findings,
            *conductivity_findings(request),
            *_line_findings(request),
        ),
        choices=signals.choices,
    )


def _notes(
    request: Request, item: sizes.Size, lined: Liner, signals: output.Output
) -> dict[str, tuple[str, ...]]:
    typical = request.profile.typical
    element = [
        f"Induced voltage for a mean flux density of {typical['flux_density'].value * 1e3:g} mT, "
        "usual; the bidder states his excitation.",
        "Full bore: no loss of its own at line size.",
        *response.reducer_note(request, item, "their loss is the pressure loss of the meter"),
    ]
    if is_slurry(request):
        element.append(
            "Slurry: solids that hit the electrodes make noise; ask for a high excitation "
            "frequency or current and a damping of 10 s or more."
        )
    return {"element": tuple(element), "materials": (lined.note,), "output": signals.notes}


def _line_findings(request: Request) -> tuple[Finding, ...]:
    """Return what the run of the line and free gas do."""
    findings: list[Finding] = []
    if request.tag.text("line.orientation") == "vertical down":
        findings.append(
            Finding(
                Level.CAUTION,
                "not-full",
                "line.orientation",
                "A line that falls need not run full, and the meter reads an empty part of the "
                "bore as flow; put it where the flow rises, or in a siphon.",
                source=PRACTICE,
            )
        )
    if (request.tag.si("fluid.bubbles") or 0.0) > 0.0:
        findings.append(
            Finding(
                Level.CAUTION,
                "bubbles",
                "fluid.bubbles",
                "Free gas counts as liquid: the reading is high by its share of the volume, and "
                "bubbles at the electrodes make noise.",
                source=PRACTICE,
            )
        )
    return tuple(findings)


def at(element: Element, stream: Stream) -> Mapping[str, Array]:
    """Return the response to a stream of shape (n,); never raises, NaN where there is none."""
    of = element.numbers
    with np.errstate(all="ignore"):
        values = response.flow_values(of, stream, gas=False)
        values["induced_voltage"] = electromagnetic.induced_voltage(
            flux_density=of["flux_density"],
            diameter=of["bore"],
            velocity=values["meter_velocity"],
        )
        values.update(full_bore.loss_and_error(of, stream, values, gas=False))
        values.update(output.output_values(element, stream))
    return values


def limits(element: Element, request: Request) -> tuple[Limit, ...]:
    """Return the conductivity, the liner's temperatures and the velocities of a slurry."""
    of = element.numbers
    found: list[Limit] = []
    if "electrical_conductivity" in element.values:
        found.extend(conductivity_limits(request))
    if not np.isnan(of["liner_high"]):
        found.append(
            Limit(
                "temperature",
                of["liner_low"],
                of["liner_high"],
                Level.STOP,
                "liner-temperature",
                "the liner does not bear this temperature; choose another liner",
                PRACTICE,
                driver="temperature",
            )
        )
    if is_slurry(request):
        found.append(
            Limit(
                "meter_velocity",
                of["slurry_velocity_low"],
                of["slurry_velocity_high"],
                Level.CAUTION,
                "slurry-velocity",
                "below it solids settle in the meter, above it they wear liner and electrodes; "
                "choose another size",
                PRACTICE,
            )
        )
    return tuple(found)


def budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return reading, zero, current output, slurry noise, free gas and density, shape (n,)."""
    of = element.numbers
    same = np.ones_like(values["meter_velocity"])
    noise: tuple[Contribution, ...] = ()
    if of["slurry_noise"] > 0.0:
        noise = (errors.of_limit("slurry_noise", "noise of the solids", of["slurry_noise"] * same),)
    return (
        *full_bore.contributions(element, stream, values),
        *noise,
        *errors.free_gas(of, same),
    )


DERIVATIONS = (
    *response.DERIVATIONS,
    Derivation(
        "induced_voltage",
        "U = k B Dm vm, k = 1, B usual for the family",
        _METHOD,
        ("meter_bore", "meter_velocity"),
    ),
    *full_bore.DERIVATIONS,
    *output.DERIVATIONS,
)

FAMILY = Family(
    key="magnetic",
    size=size,
    at=at,
    limits=limits,
    budget=budget,
    derivations=DERIVATIONS,
    signal="induced_voltage",
)
