"""Thermal mass meter, inline: the heat that the gas takes from a probe tells its mass flow.

Source: ISO 14511 (terms); heat transfer by King's law in the form of Kramers. Usual figures stand
in the profile.
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
from specsheet.meters.shared import errors, output, response, sizes
from specsheet.meters.shared.choice import Rules, choose_largest
from specsheet.methods import thermal
from specsheet.sources import MEMORY, PRACTICE, cite

_METHOD = f"Kramers (1946), King's law ({MEMORY})"
#: air at 20 °C: conductivity [W/m/K], viscosity [Pa s], Prandtl number [-]; from memory
_AIR = {"conductivity": 0.0257, "viscosity": 1.82e-5, "prandtl": 0.71}
#: 0 °C, 101.325 kPa (DIN 1343)
_NORMAL_TEMPERATURE, _NORMAL_PRESSURE = 273.15, 101325.0


def size(request: Request) -> Element:
    """Choose the largest size that the limits allow, or rate the one stated."""
    build = partial(_build, request, output.output(request, by_mass=True))
    element = choose_largest(request, build, Rules(at, limits, budget))
    factor = at(element, request.stream)["gas_factor"][request.normal]
    if not np.isfinite(factor):
        return element
    told = Given(float(factor), Origin.DERIVED, _METHOD)
    return replace(element, values={**element.values, "gas_factor": told})


def _build(request: Request, signals: output.Output, item: sizes.Size) -> Element:
    tag, typical = request.tag, request.profile.typical
    numbers = {
        **response.numbers(request, item),
        **signals.numbers,
        **{name: figure.value for name, figure in typical.items()},
    }
    values = {
        **sizes.size_values(request, item),
        "base_error": sizes.stated_or_typical(None, typical["reading_error"]),
        "pressure_loss_coefficient": sizes.stated_or_typical(
            None, typical["pressure_loss_coefficient"]
        ),
        **signals.values,
    }
    return Element(
        numbers=numbers,
        values=values,
        notes={
            "element": (
                "Probe and excess temperature are usual figures; the bidder states the gas, the "
                "mixture and the conversion factor he calibrated with.",
            ),
            "installation": (
                "Probe from the side or from above, so that condensate does not reach it; flow "
                "conditioner in the meter where the bidder wants one.",
            ),
            "output": signals.notes,
        },
        findings=(
            *sizes.size_findings(request, item),
            *signals.findings,
            *response.phase_findings(request),
            *_fluid_findings(request),
        ),
        choices={**signals.choices, "phase": tag.phase},
    )


def _fluid_findings(request: Request) -> tuple[Finding, ...]:
    """Return what steam, dirt and a changing mixture do."""
    tag = request.tag
    findings: list[Finding] = []

    def add(level: Level, code: str, field: str, message: str) -> None:
        findings.append(Finding(level, code, field, message, source=PRACTICE))

    if tag.text("fluid.substance") == "water":
        add(
            Level.STOP,
            "steam",
            "fluid.substance",
            "Steam condenses on the probe; choose vortex or differential pressure.",
        )
    if tag.text("fluid.kind") == "mixture":
        add(
            Level.CAUTION,
            "mixture",
            "fluid.mixture",
            "The reading changes with the composition; state its range, so that the bidder can "
            "state what it costs.",
        )
    if tag.flag("fluid.abrasive"):
        add(
            Level.CAUTION,
            "dirt",
            "fluid.abrasive",
            "Dust coats the probe and lowers the reading; filter the gas, or plan cleaning.",
        )
    return tuple(findings)


def at(element: Element, stream: Stream) -> Mapping[str, Array]:
    """Return the response to a stream of shape (n,); never raises, NaN where there is none."""
    of = element.numbers
    with np.errstate(all="ignore"):
        values = response.flow_values(of, stream, gas=True)
        own = of["pressure_loss_coefficient"] * values["dynamic_pressure"] / 2.0
        values["pressure_loss"] = own + values["reducer_loss"]
        prandtl = thermal.prandtl_number(isentropic_exponent=stream.isentropic_exponent)
        conductivity = thermal.thermal_conductivity(
            viscosity=stream.viscosity,
            isentropic_exponent=stream.isentropic_exponent,
            pressure=stream.pressure,
            density=stream.density,
            temperature=stream.temperature,
        )
        reynolds = values["meter_reynolds_number"] * of["probe_diameter"] / of["bore"]
        nusselt = thermal.nusselt_number(reynolds_number=reynolds, prandtl_number=prandtl)
        values["heater_power"] = thermal.heater_power(
            nusselt_number=nusselt,
            conductivity=conductivity,
            length=of["probe_length"],
            rise=of["excess_temperature"],
        )
        in_air = thermal.reynolds_number(
            nusselt_number=nusselt * conductivity / _AIR["conductivity"],
            prandtl_number=_AIR["prandtl"],
        )
        values["gas_factor"] = in_air * _AIR["viscosity"] / (reynolds * stream.viscosity)
        values["normal_velocity"] = (
            values["meter_velocity"]
            * stream.pressure
            / _NORMAL_PRESSURE
            * _NORMAL_TEMPERATURE
            / stream.temperature
        )
        values.update(output.output_values(element, stream))
        share = np.abs(values["signal_fraction"])
        values["error_limit"] = of["reading_error"] + of["span_error"] / share
    return values


def limits(element: Element, request: Request) -> tuple[Limit, ...]:
    """Return none beyond those of the profile: every limit of the family is a usual figure."""
    del element, request
    return ()


def budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return error of the meter, of the gas conversion, and current output, shape (n,)."""
    of = element.numbers
    conversion = np.full_like(stream.density, of["conversion_error"])
    return (
        errors.of_limit("meter_error", "error of reading and span", values["error_limit"]),
        errors.of_limit("gas_conversion", "conversion from the gas of calibration", conversion),
        output.current_contribution(values, of["current_output_error"]),
        *output.density_of_volume(element, stream),
    )


_GAS = ("viscosity", "isentropic_exponent", "pressure", "density", "temperature")
DERIVATIONS = (
    *response.DERIVATIONS,
    Derivation(
        "heater_power",
        "P = π L λ Nu ΔT, Nu = 0.42 Pr^0.20 + 0.57 Pr^0.33 Re^0.50 on the probe, λ = μ cp / Pr, "
        "Pr = 4 κ / (9 κ - 5)",
        _METHOD,
        ("meter_reynolds_number", *_GAS),
    ),
    Derivation(
        "gas_factor",
        "mass flow of air that takes the same heat, by mass flow of the gas",
        _METHOD,
        ("heater_power",),
    ),
    Derivation(
        "normal_velocity",
        "vm p / 101.325 kPa x 273.15 K / T, ideal gas",
        cite("din1343"),
        ("meter_velocity", "pressure", "temperature"),
    ),
    response.LOSS_BY_COEFFICIENT,
    Derivation(
        "error_limit",
        "error of the reading + error of the span / share of span",
        f"form of {cite('iso14511')}",
        ("base_error", "signal_fraction"),
    ),
    *output.DERIVATIONS,
)

FAMILY = Family(
    key="thermal_inline",
    size=size,
    at=at,
    limits=limits,
    budget=budget,
    derivations=DERIVATIONS,
    signal="heater_power",
)
