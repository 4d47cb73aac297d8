"""What every meter with a bore of its own answers: velocities, Reynolds numbers, reducers."""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from specsheet.findings import Finding, Level
from specsheet.meters.family import Array, Derivation, Request, Stream
from specsheet.meters.shared.sizes import Size, line_nominal, series
from specsheet.methods import duct, reducer
from specsheet.sources import MEMORY, PRACTICE

#: temperature of the stated dimensions [K]
REFERENCE_TEMPERATURE = 293.15


def numbers(request: Request, size: Size) -> dict[str, float]:
    """Return the numbers that the functions of this module need, SI."""
    typical = request.profile.typical
    found = {
        "pipe_diameter": request.pipe.inside_diameter,
        "pipe_expansion": request.pipe.expansion,
        "bore": size.bore,
        "tubes": 1.0,
        "connection": size.bore,
        "body_expansion": typical["body_expansion"].value if "body_expansion" in typical else 0.0,
        "reducer_coefficient": 0.0,
    }
    if is_reduced(request, size):
        ratio = min(size.bore / request.pipe.inside_diameter, 1.0)
        angle = typical["reducer_angle"].value
        found["reducer_coefficient"] = float(
            reducer.contraction_coefficient(diameter_ratio=ratio, angle=angle)
            + reducer.enlargement_coefficient(diameter_ratio=ratio, angle=angle)
        )
    return found


def is_reduced(request: Request, size: Size) -> bool:
    """Tell whether the meter is smaller than the line, so that it sits between reducers."""
    return size.nominal < line_nominal(request, series(request.profile))


def reducer_note(request: Request, size: Size, effect: str) -> tuple[str, ...]:
    """Return a sentence on the reducers of a meter smaller than the line; none at line size.

    Args:
        request: the tag's request.
        size: of the meter.
        effect: what the reducers do, to end the sentence.
    """
    if not is_reduced(request, size):
        return ()
    return (f"Smaller than the line: concentric reducer and expander to {size.text}; {effect}.",)


def flow_values(of: Mapping[str, float], stream: Stream, *, gas: bool) -> dict[str, Array]:
    """Return velocity and Reynolds number in pipe and meter, ρv² and the loss of the reducers.

    A meter of several tubes has ``tubes`` of them, of diameter ``bore``; the reducers end at its
    ``connection``.
    """
    rise = stream.temperature - REFERENCE_TEMPERATURE
    pipe = of["pipe_diameter"] * (1.0 + of["pipe_expansion"] * rise)
    bore = of["bore"] * (1.0 + of["body_expansion"] * rise)
    in_pipe = duct.velocity(volume_flow=stream.volume_flow, diameter=pipe)
    in_meter = duct.velocity(volume_flow=stream.volume_flow / of["tubes"], diameter=bore)
    at_flange = duct.velocity(volume_flow=stream.volume_flow, diameter=of["connection"])
    flux = stream.density * in_meter**2
    values = {
        "velocity": in_pipe,
        "reynolds_number": _reynolds(stream, in_pipe, pipe),
        "meter_velocity": in_meter,
        "meter_reynolds_number": _reynolds(stream, in_meter, bore),
        "dynamic_pressure": flux,
        "reducer_loss": of["reducer_coefficient"] * stream.density * at_flange**2 / 2.0,
    }
    if gas:
        values["mach_number"] = in_meter / stream.sound_speed
    return values


def _reynolds(stream: Stream, velocity: Array, diameter: Array) -> Array:
    found: Array = duct.reynolds_number(
        density=stream.density, velocity=velocity, diameter=diameter, viscosity=stream.viscosity
    )
    return found


def pressure_behind(values: Mapping[str, Array], stream: Stream, loss: Array) -> Array:
    """Return the static pressure behind the meter, still in its bore [Pa], absolute.

    The pressure that the smaller bore turns into velocity comes back only in the expander, so it
    counts against the liquid here; so does the whole loss of the reducers, to be safe.
    """
    speed_up = stream.density * (values["meter_velocity"] ** 2 - values["velocity"] ** 2) / 2.0
    return stream.pressure - speed_up - values["reducer_loss"] - loss


def back_pressure_values(
    values: Mapping[str, Array], stream: Stream, loss: Array, needed: Array
) -> dict[str, Array]:
    """Return the pressure a liquid needs behind the meter and by how much it is exceeded.

    Args:
        values: of ``flow_values``.
        stream: the conditions, shape (n,).
        loss: of the meter without reducers [Pa].
        needed: pressure needed behind the meter, absolute [Pa].
    """
    behind = pressure_behind(values, stream, loss)
    return {"minimum_back_pressure": needed, "back_pressure_margin": behind - needed}


def phase_findings(request: Request) -> tuple[Finding, ...]:
    """Return a stop where the family does not meter the phase of the tag."""
    if request.tag.phase in ("", *request.profile.phases):
        return ()
    known = " or ".join(request.profile.phases)
    return (
        Finding(
            Level.STOP,
            "phase-unsuitable",
            "fluid.phase",
            f"This family meters {known} only, and the fluid is a {request.tag.phase}; choose "
            "another family.",
        ),
    )


def vapour_pressure_findings(request: Request) -> tuple[Finding, ...]:
    """Return a caution where a liquid has no vapour pressure, so that flashing goes unchecked."""
    unknown = np.isnan(request.stream.vapour_pressure)
    if request.tag.phase != "liquid" or not unknown.any():
        return ()
    return (
        Finding(
            Level.CAUTION,
            "vapour-pressure-missing",
            "points.vapour_pressure",
            "The vapour pressure is not known, so flashing and cavitation cannot be checked; state "
            "it at each point.",
        ),
    )


_REDUCER_SOURCE = f"Crane TP-410, gradual contraction and enlargement ({MEMORY})"

#: of a meter whose loss is a coefficient on the dynamic pressure in its bore
LOSS_BY_COEFFICIENT = Derivation(
    "pressure_loss",
    "K ρ vm² / 2 + loss of the reducers",
    PRACTICE,
    ("pressure_loss_coefficient", "dynamic_pressure", "reducer_loss"),
)

#: of a meter with a loss of its own
BACK_PRESSURE_MARGIN = Derivation(
    "back_pressure_margin",
    "p - ρ (vm² - v²) / 2 - loss of the reducers - loss of the meter - pmin",
    "Bernoulli",
    ("pressure", "density", "meter_velocity", "velocity", "pressure_loss"),
)

DERIVATIONS = (
    Derivation("velocity", "v = 4 qv / (π D²)", "continuity", ("volume_flow", "inside_diameter")),
    Derivation(
        "reynolds_number",
        "ReD = ρ v D / μ",
        "definition",
        ("density", "velocity", "inside_diameter", "viscosity"),
    ),
    Derivation(
        "meter_velocity", "vm = 4 qv / (π Dm²)", "continuity", ("volume_flow", "meter_bore")
    ),
    Derivation(
        "meter_reynolds_number",
        "Rem = ρ vm Dm / μ",
        "definition",
        ("density", "meter_velocity", "meter_bore", "viscosity"),
    ),
    Derivation("dynamic_pressure", "ρ vm²", "definition", ("density", "meter_velocity")),
    Derivation("mach_number", "Ma = vm / c", "definition", ("meter_velocity", "sound_speed")),
    Derivation(
        "reducer_loss",
        "(0.8 sin(θ/2) (1 - β²) + 2.6 sin(θ/2) (1 - β²)²) ρ vm² / 2, β = Dm / D",
        _REDUCER_SOURCE,
        ("density", "meter_velocity", "meter_bore", "inside_diameter"),
    ),
)
