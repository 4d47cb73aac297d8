"""A meter that turns: a family names itself and its words, its profile holds the figures."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from functools import partial

import numpy as np

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.family import Array, Contribution, Element, Family, Given, Request, Stream
from specsheet.meters.shared import errors, fluid, output, response, sizes
from specsheet.meters.shared.choice import Rules, choose_largest
from specsheet.meters.turning.limits import limits
from specsheet.meters.turning.method import DERIVATIONS
from specsheet.methods import back_pressure, duct, turning
from specsheet.packs import Typical

#: digits of the register
_DIGITS = 8


@dataclass(frozen=True, slots=True)
class Rotor:
    """What sets one family apart.

    Attributes:
        key: of the family.
        sweeps: whether the turning part encloses a volume (displacement), else it is a turbine.
        element, installation: sentences on its make and its place.
        more_notes: further sentences on the element that depend on the tag.
    """

    key: str
    sweeps: bool
    element: tuple[str, ...]
    installation: tuple[str, ...]
    more_notes: Callable[[Request], tuple[str, ...]] = lambda _: ()


def family(rotor: Rotor) -> Family:
    """Return the family of a rotor."""

    def size(request: Request) -> Element:
        build = partial(_build, rotor, request, output.output(request))
        return choose_largest(request, build, Rules(at, limits, budget))

    return Family(
        key=rotor.key,
        size=size,
        at=at,
        limits=limits,
        budget=budget,
        derivations=DERIVATIONS,
        signal="frequency",
    )


def _range(rotor: Rotor, request: Request, bore: float) -> dict[str, Given]:
    """Return K-factor, largest and smallest flow: stated by the user, else usual for the bore."""
    typical = request.profile.typical
    phase = _phase(request)
    speed, turndown = typical[f"{phase}_velocity_high"], typical[f"{phase}_turndown"]
    area = float(duct.area(diameter=bore))

    def rated(key: str, usual: float, source: str) -> Given:
        return sizes.stated_or_typical(sizes.stated(request, key), Typical(usual, source))

    top = rated("largest_flow", speed.value * area, speed.source)
    largest = float(top.value)
    values = {
        "largest_volume_flow": top,
        "smallest_volume_flow": Given(largest / turndown.value, Origin.TYPICAL, turndown.source),
    }
    if rotor.sweeps:
        fastest = typical["highest_rotation"]
        swept = rated("swept_volume", largest / fastest.value, fastest.source)
        values["swept_volume"] = swept
        pulses, volume = typical["pulses_per_revolution"], float(swept.value)
    else:
        pulses, volume = typical["pulses_by_bore_cubed"], bore**3
    values["k_factor"] = rated("k_factor", pulses.value / volume, pulses.source)
    return values


def _phase(request: Request) -> str:
    """Return the phase whose figures apply: a family for liquids rates a gas as a liquid."""
    return request.tag.phase if request.tag.phase in request.profile.phases else "liquid"


def _build(rotor: Rotor, request: Request, signals: output.Output, item: sizes.Size) -> Element:
    typical = request.profile.typical
    ranges = _range(rotor, request, item.bore)
    register = signals.numbers["pulse"] * 10.0**_DIGITS
    largest = float(request.stream.volume_flow[request.maximum])
    values = {
        **sizes.size_values(request, item),
        **ranges,
        "pressure_loss_coefficient": sizes.stated_or_typical(None, typical["inertial"]),
        "rollover_time": Given(
            float(turning.time_to_roll_over(register=register, volume_flow=largest)),
            Origin.DERIVED,
            "definition",
        ),
        **signals.values,
    }
    numbers = {
        **response.numbers(request, item),
        **signals.numbers,
        **{name: figure.value for name, figure in typical.items()},
        **{key: float(found.value) for key, found in ranges.items()},
        "reading_error": typical[f"{_phase(request)}_error"].value,
    }
    register_note = f"Register of {_DIGITS} digits, one step for each output pulse."
    return Element(
        numbers=numbers,
        values=values,
        notes={
            "element": (*rotor.element, *rotor.more_notes(request)),
            "installation": rotor.installation,
            "output": (*signals.notes, register_note),
        },
        findings=(
            *sizes.size_findings(request, item),
            *signals.findings,
            *response.phase_findings(request),
            *response.vapour_pressure_findings(request),
            *_fluid_findings(request),
        ),
        choices={
            **signals.choices,
            "phase": _phase(request),
            "rotor": "sweeps" if rotor.sweeps else "turbine",
        },
    )


def _fluid_findings(request: Request) -> tuple[Finding, ...]:
    """Return what free gas and solids do to a meter that turns."""
    return (
        *fluid.bubbles(
            request,
            "Free gas is counted as liquid, and a slug of it overspeeds the meter; fit a gas "
            "separator before the strainer.",
        ),
        *fluid.solids(
            request,
            "Solids wear bearings and clearances; choose a family without moving parts.",
            Level.STOP,
        ),
    )


def at(element: Element, stream: Stream) -> Mapping[str, Array]:
    """Return the response to a stream of shape (n,); never raises, NaN where there is none."""
    of = element.numbers
    gas = element.choices["phase"] == "gas"
    with np.errstate(all="ignore"):
        values = response.flow_values(of, stream, gas=gas)
        flow, speed = stream.volume_flow, values["meter_velocity"]
        own = turning.pressure_loss(
            density=stream.density,
            viscosity=stream.viscosity,
            velocity=speed,
            bore=of["bore"],
            inertial=of["inertial"],
            viscous=of.get("viscous", 0.0),
            starting=of.get("starting_loss", 0.0),
        )
        values["pressure_loss"] = own + values["reducer_loss"]
        values["frequency"] = of["k_factor"] * flow
        values["load"] = flow / of["largest_volume_flow"]
        lowest = _lowest(element, stream)
        values["flow_by_smallest"] = flow / lowest
        leak = np.zeros_like(flow)
        if element.choices["rotor"] == "sweeps":
            leak = turning.slip(
                coefficient=of["slip_coefficient"],
                loss=own,
                viscosity=stream.viscosity,
                velocity=np.abs(speed),
                bore=of["bore"],
            )
            values["slip"] = leak
            values["rotation"] = flow / of["swept_volume"]
        values["error_limit"] = of["reading_error"] * np.maximum(1.0, lowest / flow) + leak
        if not gas:
            needed = back_pressure.minimum_back_pressure(
                pressure_loss=own, vapour_pressure=stream.vapour_pressure
            )
            values.update(response.back_pressure_values(values, stream, own, needed))
        values.update(output.output_values(element, stream))
    return values


def _lowest(element: Element, stream: Stream) -> Array:
    """Return the smallest flow at the fluid of each condition [m3/s]."""
    of = element.numbers
    least = np.full_like(stream.density, of["smallest_volume_flow"])
    if element.choices["rotor"] == "sweeps":
        return least
    if element.choices["phase"] == "gas":
        found: Array = turning.lowest_flow_gas(
            lowest_flow=least,
            density=stream.density,
            reference_density=of["gas_reference_density"],
        )
        return found
    thick: Array = turning.lowest_flow_liquid(
        lowest_flow=least,
        viscosity=stream.viscosity / stream.density,
        onset=of["viscosity_onset"],
    )
    return thick


def budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return error of the meter, counting, current output and density, relative, shape (n,)."""
    of = element.numbers
    return (
        errors.of_limit("meter_error", "error of the meter", values["error_limit"]),
        errors.counting(values, of, "pulses"),
        output.current_contribution(values, of["current_output_error"]),
        *output.density_contribution(element, stream),
    )
