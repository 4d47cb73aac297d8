"""The usual cautions of a service, raised by what the tag states and by the substances themselves.

They defer to local codes and licensed practice; none of them is a safety assessment.
"""

from __future__ import annotations

from dataclasses import dataclass

from specsheet.findings import Finding
from specsheet.fluid.state import FluidResult
from specsheet.line.explosive import explosive_findings, explosive_notes
from specsheet.line.service import Service, hazards, service_facts
from specsheet.sources import MEMORY, PRACTICE
from specsheet.tag import Tag

_CELSIUS = 273.15
#: a surface hotter than this burns the skin within seconds [degC]
TOUCH = 60.0
#: below it a service counts as cryogenic here [degC]
COLD = -40.0
#: above it a pressure counts as high here, absolute [Pa]
HIGH_PRESSURE = 100e5
#: mole fraction of oxygen above which a gas counts as enriched (from memory)
ENRICHED = 0.235
_TRACE = 1e-6
_HYDROGEN_RICH = 0.05

#: words for a danger in the tag that mean another one here
_SAME = {"oxygen": "oxygen_enriched", "hot": "hot_surface"}

#: danger or requirement -> what is printed
_TEXTS = {
    "toxic": "Toxic fluid{toxic}: tight joints and seals, drains and vents to a safe place, gas "
    "detection and protective equipment as the site and the law demand.",
    "oxygen_enriched": "Oxygen: clean, degrease and seal the meter for oxygen service, with a "
    "certificate; materials, lubricants and velocity by the oxygen code of the site.",
    "hydrogen": "Hydrogen: it leaks through the smallest gap, burns unseen and can make metals "
    "brittle; joints, materials and ventilation by the applicable code.",
    "asphyxiant": "The gas displaces air: ventilate and test closed spaces before entry.",
    "corrosive": "Corrosive fluid: flush before opening; protective equipment.",
    "steam": "Steam: drain condensate upstream and warm the line slowly; water hammer destroys "
    "meters and hurts people.",
    "hot_surface": "Hot surface{hottest} (skin burns above {touch:.0f} °C, {practice}): guard "
    "or insulate; keep the electronics within their ambient limits.",
    "cryogenic": "Cryogenic service: cold burns, brittle materials, and liquid trapped between "
    "valves bursts the pipe as it warms; relief and low-temperature materials by code.",
    "high_pressure": "High pressure, up to {bar:.0f} bar(a): isolate, vent and prove free of "
    "pressure before opening; work only by licensed staff.",
    "custody_transfer": "Custody transfer: type approval, verification and seals by the metrology "
    "law of the place; the accuracy class there decides, not this sheet.",
    "safety_function": "Safety function ({safety}): the integrity of the whole loop is verified by "
    "a competent person (IEC 61508, IEC 61511); this sheet only asks for the figures.",
    "sewage": "Sewage, sludge and their gas: they carry germs and give off hydrogen sulfide and "
    "methane; test for gas and ventilate before opening, hygiene by the rules of the site.",
    "static": "Flammable liquid that may hardly conduct: flow and filters charge it; bond and "
    "earth the meter, and keep to the velocity of the site's code (IEC TS 60079-32-1, {memory}).",
    "potable_water": "Drinking water: every wetted part carries the approval for drinking water "
    "that the law of the place demands.",
}


@dataclass(frozen=True, slots=True)
class CautionResult:
    """The cautions of a tag: notes to print, and findings where a statement does not fit."""

    notes: tuple[str, ...]
    findings: tuple[Finding, ...] = ()


def cautions(
    tag: Tag, fluid: FluidResult | None = None, *, service: Service | None = None
) -> CautionResult:
    """Return the cautions that the service of a tag calls for, and what contradicts them.

    Args:
        tag: the tag.
        fluid: states at the operating points.
        service: facts of the service, where the caller has them already.
    """
    service = service_facts(tag, fluid) if service is None else service
    known = dangers(service)
    asked = {
        name
        for name in ("custody_transfer", "safety_function", "potable_water")
        if tag.get(f"require.{name}")
    }
    facts = {
        "toxic": _toxic_names(service),
        "hottest": _hottest(service),
        "touch": TOUCH,
        "practice": PRACTICE,
        "memory": MEMORY,
        "bar": (service.pressure or 0.0) / 1e5,
        "safety": tag.text("require.safety_function"),
    }
    notes = [text.format(**facts) for name, text in _TEXTS.items() if name in known | asked]
    notes.extend(explosive_notes(tag, service, known))
    return CautionResult(tuple(notes), tuple(explosive_findings(tag, service, known)))


def dangers(service: Service) -> frozenset[str]:
    """Return the dangers a service has: those stated, and those its facts have by nature.

    Words: toxic, flammable, static, asphyxiant, oxygen_enriched, hydrogen, steam, hot_surface,
    cryogenic, high_pressure, and the ones the tag states.
    """
    found = {_SAME.get(word, word) for word in service.words}
    found.update(_by_substance(service))
    water = service.fractions.get("water", 0.0)
    conditions = {
        "flammable": "petroleum" in service.words,
        "steam": water == 1.0 and service.phase == "gas",
        "oxygen_enriched": service.fractions.get("oxygen", 0.0) > ENRICHED,
        "hydrogen": service.fractions.get("hydrogen", 0.0) > _HYDROGEN_RICH,
        "hot_surface": service.hottest is not None and service.hottest > TOUCH + _CELSIUS,
        "cryogenic": service.coldest is not None and service.coldest < COLD + _CELSIUS,
        "high_pressure": service.pressure is not None and service.pressure > HIGH_PRESSURE,
    }
    found.update(name for name, holds in conditions.items() if holds)
    if "flammable" in found and service.phase == "liquid" and "water" not in service.fractions:
        found.add("static")
    return frozenset(found)


def _by_substance(service: Service) -> set[str]:
    found = set()
    for key, fraction in service.fractions.items():
        if fraction <= _TRACE:  # a fraction that is not known (NaN) counts
            continue
        row = hazards().get(key, {})
        if row.get("toxic"):
            found.add("toxic")
        if row.get("ignition"):
            found.add("flammable")
        if row.get("asphyxiant") and service.phase == "gas" and fraction > 0.5:
            found.add("asphyxiant")
    return found


def _toxic_names(service: Service) -> str:
    keys = [key for key in service.fractions if hazards().get(key, {}).get("toxic")]
    return f" ({', '.join(key.replace('_', ' ') for key in keys)})" if keys else ""


def _hottest(service: Service) -> str:
    return "" if service.hottest is None else f", up to {service.hottest - _CELSIUS:.0f} °C"
