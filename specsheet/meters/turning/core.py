"""A meter that turns: a family names itself and its words, its profile holds the figures."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass

import numpy as np

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.family import Array, Contribution, Element, Family, Given, Request, Stream
from specsheet.meters.shared import output, response, sizes
from specsheet.meters.shared.choice import Rules, choose
from specsheet.meters.turning.limits import limits
from specsheet.meters.turning.method import DERIVATIONS
from specsheet.methods import back_pressure, duct, signal, turning
from specsheet.sources import PRACTICE, cite

#: digits of the register
_DIGITS = 8
_ROOT_THREE = 3.0**0.5


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

    def build(request: Request, item: sizes.Size) -> Element:
        return _build(rotor, request, item)

    def size(request: Request) -> Element:
        found = sizes.candidates(request)
        order = tuple(reversed(found.sizes))
        rules = Rules(at, limits, budget)
        return choose(request, found, order, build, rules, "the largest size")

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
    stated = sizes.stated(request, "largest_flow")
    largest = stated if stated is not None else speed.value * area
    values = {
        "largest_volume_flow": _given(stated is not None, largest, speed.source),
        "smallest_volume_flow": Given(largest / turndown.value, Origin.TYPICAL, turndown.source),
    }
    factor = sizes.stated(request, "k_factor")
    if rotor.sweeps:
        swept = sizes.stated(request, "swept_volume")
        usual = typical["highest_rotation"]
        volume = swept if swept is not None else largest / usual.value
        values["swept_volume"] = _given(swept is not None, volume, usual.source)
        pulses = typical["pulses_per_revolution"]
        found = factor if factor is not None else pulses.value / volume
        values["k_factor"] = _given(factor is not None, found, pulses.source)
        return values
    pulses = typical["pulses_by_bore_cubed"]
    found = factor if factor is not None else pulses.value / bore**3
    values["k_factor"] = _given(factor is not None, found, pulses.source)
    return values


def _phase(request: Request) -> str:
    """Return the phase whose figures apply: a family for liquids rates a gas as a liquid."""
    return request.tag.phase if request.tag.phase in request.profile.phases else "liquid"


def _given(stated: bool, value: float, source: str) -> Given:
    return Given(value, Origin.GIVEN) if stated else Given(value, Origin.TYPICAL, source)


def _build(rotor: Rotor, request: Request, item: sizes.Size) -> Element:
    typical = request.profile.typical
    ranges = _range(rotor, request, item.bore)
    signals = output.output(request)
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
    tag = request.tag
    findings: list[Finding] = []
    if tag.phase == "liquid" and (tag.si("fluid.bubbles") or 0.0) > 0.0:
        message = (
            "Free gas is counted as liquid, and a slug of it overspeeds the meter; fit a gas "
            "separator before the strainer."
        )
        findings.append(
            Finding(Level.CAUTION, "bubbles", "fluid.bubbles", message, source=PRACTICE)
        )
    if tag.flag("fluid.abrasive") or (tag.si("fluid.solids") or 0.0) > 0.0:
        message = "Solids wear bearings and clearances; choose a family without moving parts."
        field = "fluid.abrasive" if tag.flag("fluid.abrasive") else "fluid.solids"
        findings.append(Finding(Level.STOP, "solids", field, message, source=PRACTICE))
    return tuple(findings)


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
            values.update(_back_pressure(stream, values, own))
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


def _back_pressure(stream: Stream, values: Mapping[str, Array], loss: Array) -> dict[str, Array]:
    needed = back_pressure.minimum_back_pressure(
        pressure_loss=loss, vapour_pressure=stream.vapour_pressure
    )
    behind = response.pressure_behind(values, stream, loss)
    return {"minimum_back_pressure": needed, "back_pressure_margin": behind - needed}


def budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return error of the meter, counting, current output and density, relative, shape (n,)."""
    of = element.numbers
    return (
        Contribution(
            "meter_error",
            "error of the meter",
            values["error_limit"] / _ROOT_THREE,
            Origin.TYPICAL,
            PRACTICE,
        ),
        Contribution(
            "counting",
            f"counting pulses for {of['averaging_time']:g} s",
            signal.counting_uncertainty(rate=values["frequency"], time=of["averaging_time"]),
            Origin.DERIVED,
            cite("gum", "4.3.7"),
        ),
        output.current_contribution(values, of["current_output_error"]),
        *output.density_contribution(element, stream),
    )
