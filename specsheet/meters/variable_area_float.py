"""Variable-area meter with a float in a cone (VDI/VDE 3513-1)."""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.dp import body, plain, scale
from specsheet.meters.dp.budget import density as density_contribution
from specsheet.meters.dp.given import guarded
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
from specsheet.methods import signal, variable_area
from specsheet.methods.gum import RECTANGULAR
from specsheet.sources import MEMORY, PRACTICE, cite

_SOURCE = cite("vdi3513")

#: water at 20 °C, and air at 0 °C and 101.325 kPa [kg/m3]: what the equivalent scale counts
_WATER, _AIR = 998.2, 1.293

#: mantissas of full-scale equivalent flows (R5, rounded; common practice, no source)
_SERIES = (1.0, 1.6, 2.5, 4.0, 6.3, 10.0)


def size(request: Request) -> Element:
    """Choose the full-scale equivalent flow, or rate the one stated."""
    tag = request.tag
    gas = tag.phase == "gas"
    float_density = tag.si("meter.float_density") or body.figure(request, "float_density")
    reference = _AIR if gas else _WATER
    numbers = {
        **plain.pipe_numbers(request),
        "float_density": float_density,
        "float_height": body.figure(request, "float_height"),
        "reference_density": reference,
        "scale_density": float(request.stream.density[request.normal]),
        "error": tag.si("meter.accuracy") or body.figure(request, "error_of_full_scale"),
    }
    equivalent = _equivalent(numbers, request.stream)
    stated = tag.si("meter.full_scale")
    findings: tuple[Finding, ...] = ()
    if not np.isfinite(equivalent).all():
        findings = (_swims(),)
    largest = float(np.nanmax(equivalent)) if np.isfinite(equivalent).any() else 1e-6
    full = stated or signal.round_up(value=largest * 3600.0, series=_SERIES) / 3600.0
    numbers["full_scale"] = full
    medium = "air at 0 °C, 101.325 kPa" if gas else "water at 20 °C"
    values = {
        "float_density": Given(float_density, tag.origin("meter.float_density")),
        "equivalent_full_scale": Given(full, Origin.GIVEN if stated else Origin.DERIVED, _SOURCE),
        "equivalent_fluid": Given(medium, Origin.DERIVED, _SOURCE),
        "inside_diameter_hot": plain.hot_inside(numbers, request),
    }
    notes = {
        "element": (
            f"Scale engraved for the fluid at the normal point; capacity compared by {medium}.",
            f"About 1 % of full scale at best, 10:1 ({PRACTICE}).",
        ),
        "installation": _installation(request),
    }
    return Element(numbers, values, notes, (*findings, *_upright(request)), {})


def _swims() -> Finding:
    return Finding(
        Level.STOP,
        "float-swims",
        "meter.float_density",
        "the float is lighter than the fluid and swims; choose a heavier float",
        source=_SOURCE,
    )


def _upright(request: Request) -> tuple[Finding, ...]:
    if request.tag.text("line.orientation") == "vertical up":
        return ()
    return (
        Finding(
            Level.CAUTION,
            "float-not-upright",
            "line.orientation",
            "a float needs vertical flow upwards; turn the line, or choose a meter with a spring",
            source=_SOURCE,
        ),
    )


def _installation(request: Request) -> tuple[str, ...]:
    lines = ["Vertical within 1°, flow upwards; isolating valves and a bypass for cleaning."]
    if request.tag.phase == "gas":
        lines.append("Gas: throttle behind the meter and start slowly: the float hammers.")
    return tuple(lines)


def _equivalent(numbers: Mapping[str, float], stream: Stream) -> Array:
    with np.errstate(all="ignore"):
        found: Array = variable_area.equivalent_flow(
            volume_flow=stream.volume_flow,
            density=stream.density,
            float_density=numbers["float_density"],
            reference_density=numbers["reference_density"],
        )
    return found


def at(element: Element, stream: Stream) -> Mapping[str, Array]:
    """Return the response to a stream, arrays of shape (n,)."""
    numbers = element.numbers
    with np.errstate(all="ignore"):
        values = plain.pipe_values(numbers, stream)
        equivalent = _equivalent(numbers, stream)
        share = equivalent / numbers["full_scale"]
        loss: Array = variable_area.float_loss(
            density=stream.density,
            float_density=numbers["float_density"],
            float_height=numbers["float_height"],
        )
        on_scale: Array = variable_area.equivalent_flow(
            volume_flow=np.ones_like(share),
            density=stream.density,
            float_density=numbers["float_density"],
            reference_density=numbers["scale_density"],
        )
        return {
            **values,
            "equivalent_flow": equivalent,
            "reading_factor": 1.0 / on_scale,
            "pressure_loss": loss,
            **scale.signals(share, numbers["error"]),
        }


def limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    """Return the limits of use: scale and viscosity."""
    immune = request.profile.typical["largest_viscosity"]
    return (
        *scale.limits(
            "the float stands at its stop; choose a larger full scale",
            "below a tenth of full scale there is no mark; choose a smaller full scale",
            _SOURCE,
        ),
        Limit(
            "viscosity",
            None,
            immune.value,
            Level.CAUTION,
            "float-viscosity",
            "above this viscosity the reading depends on it; ask for a float shaped for viscosity "
            "immunity, or for a scale at this viscosity",
            immune.source,
            "liquid",
            "viscosity",
        ),
        Limit(
            "reading_factor",
            0.9,
            1.1,
            Level.NOTE,
            "scale-correction",
            "at this point the scale must be multiplied by the factor shown: the density is not "
            "that of the scale",
            _SOURCE,
            driver="density",
        ),
    )


def budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return the contributions: the error of the scale, and the density."""
    with np.errstate(all="ignore"):
        buoyancy = stream.density / (element.numbers["float_density"] - stream.density)
        return (
            Contribution(
                "scale",
                "scale, share of full scale",
                values["error_limit"] / RECTANGULAR,
                Origin.TYPICAL,
                PRACTICE,
            ),
            density_contribution(stream, 0.5 * (1.0 + buoyancy)),
        )


FAMILY = Family(
    key="variable_area_float",
    size=guarded(size),
    at=at,
    limits=limits,
    budget=budget,
    derivations=(
        *plain.derivations(*plain.PIPE),
        Derivation(
            "equivalent_flow",
            "qe = q sqrt(ρ (ρf - ρe) / (ρe (ρf - ρ))), ρe of water at 20 °C or air at 0 °C",
            _SOURCE,
            ("volume_flow", "density", "float_density"),
        ),
        Derivation(
            "equivalent_full_scale",
            "next of 1, 1.6, 2.5, 4, 6.3, 10 × 10ⁿ m³/h at or above the largest equivalent flow",
            PRACTICE,
            ("equivalent_flow",),
        ),
        Derivation("equivalent_fluid", "by phase", _SOURCE),
        Derivation(
            "reading_factor",
            "true by shown flow: sqrt(ρs (ρf - ρ) / (ρ (ρf - ρs))), ρs the density of the scale",
            _SOURCE,
            ("density", "float_density"),
        ),
        Derivation(
            "signal_fraction",
            "qe / full scale",
            "definition",
            ("equivalent_flow", "equivalent_full_scale"),
        ),
        scale.CURRENT,
        Derivation(
            "pressure_loss",
            "ϖ = (ρf - ρ) g h, h the volume of the float by its cross-section: the float's weight",
            f"balance of forces; h typical ({MEMORY})",
            ("float_density", "density"),
        ),
        scale.ERROR,
    ),
    signal="signal_fraction",
)
