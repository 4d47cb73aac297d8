"""The response of a differential-pressure device to a stream, and the flow from its signal."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from math import isfinite, nan

import numpy as np
from numpy.typing import NDArray

from specsheet.meters.dp.device import Device, Lanes
from specsheet.meters.family import Array, Element, Stream
from specsheet.methods import iso5167_1 as equation
from specsheet.methods import signal


def lanes_of(device: Device, element: Element, stream: Stream) -> Lanes:
    """Return the lanes of a stream: hot diameters and Reynolds number."""
    numbers = element.numbers
    inside = equation.grown(
        length=numbers["inside_diameter"],
        expansion=numbers["pipe_expansion"],
        temperature=stream.temperature,
    )
    size = equation.grown(
        length=numbers["size"],
        expansion=numbers["element_expansion"],
        temperature=stream.temperature,
    )
    return Lanes(
        diameter_ratio=device.shape.ratio(size / inside),
        inside_diameter=inside,
        reynolds_number=equation.reynolds_number(
            mass_flow=stream.mass_flow, diameter=inside, viscosity=stream.viscosity
        ),
        mass_flow=stream.mass_flow,
        density=stream.density,
        numbers=numbers,
        choices=element.choices,
    )


def coefficient(device: Device, lanes: Lanes) -> Array:
    """Return C: the calibrated one where it is stated, else that of the standard."""
    calibrated = lanes.numbers.get("calibrated_coefficient", nan)
    if isfinite(calibrated):
        return np.full(lanes.mass_flow.shape, calibrated)
    return device.coefficient(lanes)


@dataclass(frozen=True)
class Expansion:
    """ε of a device in one stream as a function of β and Δp/p1: 1 where the stream is liquid."""

    device: Device
    exponent: Array
    liquid: NDArray[np.bool_]
    all_liquid: bool
    all_gas: bool

    @classmethod
    def of(cls, device: Device, stream: Stream) -> Expansion:
        """Return that of a stream; a liquid has no isentropic exponent."""
        exponent = stream.isentropic_exponent
        liquid = np.isnan(exponent)
        return cls(device, exponent, liquid, bool(liquid.all()), not liquid.any())

    def __call__(self, diameter_ratio: Array, ratio: Array) -> Array | float:
        """Return ε, shape (n,) or one for all."""
        if self.all_liquid:
            return 1.0
        found = self.device.expansibility(diameter_ratio, ratio, self.exponent)
        return found if self.all_gas else np.where(self.liquid, 1.0, found)


def drop(
    device: Device, lanes: Lanes, stream: Stream, discharge_coefficient: Array
) -> tuple[Array, Array]:
    """Return Δp [Pa] and ε [-] of the lanes; NaN where the flow would choke."""
    bare = equation.incompressible_differential_pressure(
        mass_flow=lanes.mass_flow * device.over_reading(lanes),
        discharge_coefficient=discharge_coefficient,
        diameter_ratio=lanes.diameter_ratio,
        inside_diameter=lanes.inside_diameter,
        density=stream.density,
    )
    expansion = Expansion.of(device, stream)
    if expansion.all_liquid:
        return bare, np.ones_like(bare)
    pressure = equation.differential_pressure(
        incompressible=bare,
        pressure=stream.pressure,
        expansibility=lambda ratio: expansion(lanes.diameter_ratio, ratio),
    )
    return pressure, np.sqrt(bare / pressure)


def pressure_of(device: Device, element: Element, stream: Stream) -> Array:
    """Return Δp [Pa] at n conditions, shape (n,): all that the sizing asks of a response."""
    with np.errstate(all="ignore"):
        lanes = lanes_of(device, element, stream)
        return drop(device, lanes, stream, coefficient(device, lanes))[0]


def respond(device: Device, element: Element, stream: Stream) -> Mapping[str, Array]:
    """Return everything the device does at n conditions, by glossary key; arrays of shape (n,)."""
    with np.errstate(all="ignore"):
        lanes = lanes_of(device, element, stream)
        c = coefficient(device, lanes)
        pressure, epsilon = drop(device, lanes, stream, c)
        loss = device.loss(lanes, c) * pressure
        area = np.pi / 4.0 * lanes.inside_diameter**2
        velocity = stream.volume_flow / area
        throat = velocity / lanes.diameter_ratio**2
        values = {
            "velocity": velocity,
            "reynolds_number": lanes.reynolds_number,
            "diameter_ratio": lanes.diameter_ratio,
            "throat_velocity": throat,
            "throat_reynolds_number": lanes.reynolds_number / lanes.diameter_ratio,
            "discharge_coefficient": c,
            "expansibility": epsilon,
            "differential_pressure": pressure,
            "pressure_ratio": 1.0 - pressure / stream.pressure,
            "pressure_loss": loss,
            "pressure_loss_coefficient": loss / (0.5 * stream.density * velocity**2),
            "dynamic_pressure": stream.density * velocity**2,
            "back_pressure_margin": stream.pressure - pressure - stream.vapour_pressure,
            **signals(element.numbers, pressure),
            **device.more(lanes),
        }
        if np.isnan(stream.vapour_pressure).all():
            del values["back_pressure_margin"]
        return values


def signals(numbers: Mapping[str, float], differential_pressure: Array) -> dict[str, Array]:
    """Return the transmitter's output: share of span, current linear in Δp and in flow.

    Below the cut-off the root output rests at 4 mA.

    Args:
        numbers: of the element: "range" [Pa], "cut_off" (share of flow) [-].
        differential_pressure: [Pa], shape (n,).
    """
    share = differential_pressure / numbers["range"]
    root = np.sqrt(share)
    shown = np.where(root < numbers.get("cut_off", 0.0), 0.0, root)
    return {
        "signal_fraction": share,
        "signal_current": signal.current(fraction=share),
        "signal_current_root": signal.current(fraction=shown),
    }


def flow_from(
    device: Device, element: Element, stream: Stream, differential_pressure: Array
) -> Array:
    """Return the mass flow [kg/s] that gives a measured Δp [Pa] at the stream's conditions.

    The flow of ``stream`` is the first guess; arrays of shape (n,).
    """
    with np.errstate(all="ignore"):
        lanes = lanes_of(device, element, stream)
        ratio = differential_pressure / stream.pressure
        by_coefficient = equation.mass_flow(
            discharge_coefficient=1.0,
            expansibility=Expansion.of(device, stream)(lanes.diameter_ratio, ratio),
            diameter_ratio=lanes.diameter_ratio,
            inside_diameter=lanes.inside_diameter,
            differential_pressure=differential_pressure,
            density=stream.density,
        )

        def step(mass_flow: Array) -> Array:
            at = lanes.with_flow(mass_flow)
            found: Array = by_coefficient * coefficient(device, at) / device.over_reading(at)
            return found

        flow: Array = equation.fixed_point(step, stream.mass_flow)
        return flow


def ratio_for(device: Device, lanes: Lanes, stream: Stream, differential_pressure: Array) -> Array:
    """Return β [-] that gives Δp [Pa] at the lanes' flow; NaN where none does.

    Args:
        device: the device.
        lanes: the flow; its diameter ratio is the first guess, shape (n,).
        stream: the conditions, shape (n,).
        differential_pressure: [Pa], shape (n,).
    """
    with np.errstate(all="ignore"):
        drop_ratio = differential_pressure / stream.pressure
        expansion = Expansion.of(device, stream)
        area = np.pi / 4.0 * lanes.inside_diameter**2
        speed = lanes.mass_flow / (area * np.sqrt(2.0 * differential_pressure * stream.density))

        def step(invariant: Array) -> Array:
            beta = equation.ratio_of_invariant(invariant=invariant)
            at = lanes.with_ratio(beta)
            through = coefficient(device, at) * expansion(beta, drop_ratio)
            return speed * device.over_reading(at) / through

        guess = lanes.diameter_ratio**2 / np.sqrt(1.0 - lanes.diameter_ratio**4)
        beta: Array = equation.ratio_of_invariant(invariant=equation.fixed_point(step, guess))
        return beta
