"""Critical flow Venturi nozzle: its throat chokes, its inlet pressure sets the flow (ISO 9300)."""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.dp import body, plain
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
from specsheet.methods import iso5167_1, iso9300
from specsheet.sources import MEMORY, PRACTICE, cite

_SOURCE = cite("iso9300")
_STEP = 1e-5

#: the flow rises as sqrt(p ρ), and ρ as p: one by one in all. The density's contribution carries a
#: half of it, so that sqrt(1 - 1/4) in square sum makes it whole
_BESIDE_DENSITY = 0.75**0.5


def size(request: Request) -> Element:
    """Choose the throat that passes the flow of the leading point at its stated pressure."""
    tag = request.tag
    normal = float(request.stream.temperature[request.normal])
    exit_ratio = tag.si("meter.exit_ratio") or body.figure(request, "exit_ratio")
    numbers = {
        **plain.pipe_numbers(request),
        "element_expansion": request.pipe.expansion,
        **body.expansion(request),
        "area_ratio": exit_ratio**2,
        "throat_uncertainty": tag.si("meter.throat_uncertainty") or 0.0,
        "pressure_uncertainty": tag.si("require.pressure_uncertainty") or 0.0,
        "function_uncertainty": body.figure(request, "critical_flow_function_uncertainty"),
    }
    throat = tag.text("meter.throat_form") or "toroidal"
    stated = tag.si("meter.throat")
    bore = stated or _bore(request, numbers, throat)
    findings: tuple[Finding, ...] = ()
    if tag.phase != "gas":
        findings = (
            Finding(
                Level.STOP,
                "critical-nozzle-liquid",
                "fluid.phase",
                "a critical nozzle meters gas only; choose another family",
                source=_SOURCE,
            ),
        )
    numbers["throat"] = bore
    hot = float(
        iso5167_1.grown(length=bore, expansion=numbers["element_expansion"], temperature=normal)
    )
    inside = plain.hot_inside(numbers, request)
    values = {
        "throat_diameter": Given(bore, Origin.GIVEN if stated else Origin.DERIVED, _SOURCE),
        "throat_diameter_hot": Given(hot, Origin.DERIVED, "thermal growth"),
        "inside_diameter_hot": inside,
        "diameter_ratio": Given(hot / float(inside.value), Origin.DERIVED, _SOURCE),
    }
    notes = {
        "element": (
            f"Nozzle with {throat} throat; the flow rises with inlet pressure, so each flow needs "
            "its own pressure, or its own nozzle in a bank.",
            "Throat measured to 0.1 %; no condensation before the throat: dry, clean gas.",
        )
    }
    origins = {
        "origin.throat_uncertainty": str(tag.origin("meter.throat_uncertainty")),
        "origin.pressure_uncertainty": str(tag.origin("require.pressure_uncertainty")),
    }
    return Element(numbers, values, notes, findings, {"throat_form": throat, **origins})


def _bore(request: Request, numbers: Mapping[str, float], throat: str) -> float:
    """Return the throat at 20 °C [m], rounded up to 0.01 mm."""
    stream = request.stream
    flux = _flux(stream, stream.pressure)
    lead = int(np.nanargmax(stream.mass_flow / flux)) if np.isfinite(flux).any() else 0
    flow, viscosity = float(stream.mass_flow[lead]), float(stream.viscosity[lead])
    ideal = float(flux[lead])
    if not np.isfinite(ideal):
        return 0.5 * request.pipe.inside_diameter

    def step(bore: Array) -> Array:
        reynolds = iso5167_1.reynolds_number(mass_flow=flow, diameter=bore, viscosity=viscosity)
        c = iso9300.discharge_coefficient(throat_reynolds_number=reynolds, throat=throat)
        found: Array = np.sqrt(4.0 * flow / (np.pi * c * ideal))
        return found

    start = np.array([np.sqrt(4.0 * flow / (np.pi * ideal))])
    hot = float(iso5167_1.fixed_point(step, start)[0])
    if not np.isfinite(hot):
        hot = float(start[0])
    growth = iso5167_1.grown(
        length=1.0,
        expansion=numbers["element_expansion"],
        temperature=float(stream.temperature[lead]),
    )
    return round(float(np.ceil(round(hot / growth / _STEP, 6))) * _STEP, 9)


def _flux(stream: Stream, pressure: Array) -> Array:
    """Return the ideal choked mass flux at an inlet pressure [kg/(m2 s)], shape (n,).

    The density follows the pressure at the temperature of the point.
    """
    with np.errstate(all="ignore"):
        found: Array = iso9300.mass_flux(
            isentropic_exponent=stream.isentropic_exponent,
            pressure=pressure,
            density=stream.density * pressure / stream.pressure,
        )
    return found


def at(element: Element, stream: Stream) -> Mapping[str, Array]:
    """Return the response to a stream, arrays of shape (n,)."""
    numbers = element.numbers
    kappa = stream.isentropic_exponent
    with np.errstate(all="ignore"):
        values = plain.pipe_values(numbers, stream)
        bore = iso5167_1.grown(
            length=numbers["throat"],
            expansion=numbers["element_expansion"],
            temperature=stream.temperature,
        )
        reynolds = iso5167_1.reynolds_number(
            mass_flow=stream.mass_flow, diameter=bore, viscosity=stream.viscosity
        )
        c = iso9300.discharge_coefficient(
            throat_reynolds_number=reynolds, throat=element.choices["throat_form"]
        )
        c = np.where(c > 0.0, c, np.nan)
        area = np.pi / 4.0 * bore**2
        passing = c * area * _flux(stream, stream.pressure)
        needed = stream.pressure * stream.mass_flow / passing
        back = iso9300.largest_back_pressure_ratio(
            isentropic_exponent=kappa, area_ratio=numbers["area_ratio"]
        )
        return {
            **values,
            "throat_reynolds_number": reynolds,
            "discharge_coefficient": c,
            "critical_flow_function": iso9300.critical_flow_function(isentropic_exponent=kappa),
            "critical_pressure_ratio": iso9300.critical_pressure_ratio(isentropic_exponent=kappa),
            "choked_flow": passing,
            "inlet_pressure": needed,
            "inlet_pressure_share": needed / stream.pressure,
            "back_pressure_ratio": back,
            "largest_back_pressure": back * needed,
            "pressure_loss": (1.0 - back) * needed,
        }


def limits(element: Element, request: Request) -> tuple[Limit, ...]:  # noqa: ARG001
    """Return the limits of use (ISO 9300:2005, from memory)."""
    _, _, _, low, high = iso9300.THROATS[element.choices["throat_form"]]
    return (
        Limit(
            "throat_reynolds_number",
            low,
            high,
            Level.CAUTION,
            "throat-reynolds-number-limit",
            "outside this the stated uncertainty of the coefficient does not hold; calibrate there",
            _SOURCE,
        ),
        Limit(
            "inlet_pressure_share",
            None,
            1.001,
            Level.STOP,
            "inlet-pressure-low",
            "the stated pressure does not pass this flow; take a larger throat or more pressure",
            _SOURCE,
        ),
        Limit(
            "diameter_ratio",
            None,
            0.25,
            Level.CAUTION,
            "throat-wide",
            "the approach velocity is no longer small; take a wider inlet pipe, or count "
            "stagnation conditions",
            f"{_SOURCE}; {MEMORY}",
            driver="",
        ),
    )


def budget(
    element: Element, stream: Stream, values: Mapping[str, Array]
) -> tuple[Contribution, ...]:
    """Return the contributions to the uncertainty of the flow."""
    numbers = element.numbers
    ones = np.ones_like(values["discharge_coefficient"])
    return (
        Contribution(
            "discharge_coefficient",
            "discharge coefficient",
            ones * iso9300.UNCERTAINTY / 2.0,
            Origin.DERIVED,
            _SOURCE,
        ),
        Contribution(
            "critical_flow_function",
            "critical flow function",
            ones * numbers["function_uncertainty"] / 2.0,
            Origin.TYPICAL,
            MEMORY,
        ),
        Contribution(
            "throat",
            "area of the throat",
            ones * numbers["throat_uncertainty"],
            Origin(element.choices["origin.throat_uncertainty"]),
            "meter.throat_uncertainty",
        ),
        Contribution(
            "inlet_pressure",
            "inlet pressure, beside its part in the density",
            ones * _BESIDE_DENSITY * numbers["pressure_uncertainty"] / 2.0,
            Origin(element.choices["origin.pressure_uncertainty"]),
            "require.pressure_uncertainty",
        ),
        density_contribution(stream),
    )


FAMILY = Family(
    key="nozzle_critical",
    size=guarded(size),
    at=at,
    limits=limits,
    budget=budget,
    derivations=(
        *plain.derivations(*plain.PIPE),
        Derivation(
            "throat_reynolds_number",
            "Red = 4 qm / (π μ d)",
            _SOURCE,
            ("mass_flow", "viscosity", "throat_diameter_hot"),
        ),
        Derivation(
            "discharge_coefficient",
            "C = 0.9959 - 2.720 Red^-0.5 toroidal, 0.9976 - 0.1388 Red^-0.2 cylindrical throat",
            _SOURCE,
            ("throat_reynolds_number",),
        ),
        Derivation(
            "critical_flow_function",
            "C* = sqrt(κ) (2/(κ+1))^((κ+1)/(2(κ-1)))",
            _SOURCE,
            ("isentropic_exponent",),
        ),
        Derivation(
            "critical_pressure_ratio",
            "r* = (2/(κ+1))^(κ/(κ-1))",
            _SOURCE,
            ("isentropic_exponent",),
        ),
        Derivation(
            "choked_flow",
            "qm = C C* (π/4) d² sqrt(p ρ)",
            _SOURCE,
            (
                "discharge_coefficient",
                "critical_flow_function",
                "throat_diameter_hot",
                "pressure",
                "density",
            ),
        ),
        Derivation(
            "inlet_pressure",
            "pressure that passes the flow: p qm / choked flow (density in proportion to pressure)",
            _SOURCE,
            ("pressure", "mass_flow", "choked_flow"),
        ),
        Derivation(
            "inlet_pressure_share",
            "inlet pressure needed / pressure stated",
            "definition",
            ("inlet_pressure", "pressure"),
        ),
        Derivation(
            "back_pressure_ratio",
            "r* + 0.8 (ideal subsonic exit ratio - r*)",
            _SOURCE,
            ("critical_pressure_ratio",),
        ),
        Derivation(
            "largest_back_pressure",
            "ratio × inlet pressure",
            "definition",
            ("back_pressure_ratio", "inlet_pressure"),
        ),
        Derivation(
            "pressure_loss",
            "ϖ = inlet pressure - largest back pressure: the least that keeps it choked",
            "definition",
            ("inlet_pressure", "largest_back_pressure"),
        ),
        Derivation(
            "throat_diameter",
            "d² = 4 qm / (π C C* sqrt(p ρ)), rounded up to 0.01 mm",
            _SOURCE,
            ("mass_flow", "discharge_coefficient", "critical_flow_function", "pressure", "density"),
        ),
        Derivation(
            "throat_diameter_hot",
            "d = d20 (1 + αd (t - 20 °C))",
            PRACTICE,
            ("throat_diameter", "temperature"),
        ),
        Derivation(
            "diameter_ratio",
            "β = d / D",
            "definition",
            ("throat_diameter_hot", "inside_diameter_hot"),
        ),
    ),
    signal="inlet_pressure",
)
