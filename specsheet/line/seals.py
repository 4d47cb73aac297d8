"""Seals and gaskets: proposed from their pack, or checked against it.

The pack ``profiles/seals.toml`` holds temperature, vacuum and pressure; what a service does to a
material stands in the rules of ``compatibility``. Usual figures, for the bidder to confirm.
"""

from __future__ import annotations

import re
from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from functools import cache, lru_cache
from typing import Any

from specsheet.findings import Finding, Given, Level, Origin
from specsheet.fluid.state import FluidResult
from specsheet.line.cautions import dangers
from specsheet.line.compatibility import SEALS, rules_about, rules_by_verdict
from specsheet.line.service import Service, service_facts
from specsheet.packs import Profile, table
from specsheet.quantity.wording import join
from specsheet.sources import PRACTICE
from specsheet.tag import Tag

ENTRY = "require.seal_material"
PROPOSE = "propose"
_CELSIUS = 273.15
#: words of a stated text that tell that there is no seal to check
_NONE = re.compile(r"\b(none|no seal|welded)\b")


@dataclass(frozen=True, slots=True)
class Seal:
    """One material of the pack; pressures in Pa, temperatures in K, None where there is no bound.

    Attributes:
        name: as the pack spells it.
        low, high: temperatures it is used between.
        vacuum: lowest absolute pressure.
        pressure: highest gauge pressure.
        note: what it is good for.
        source: citation of the figures.
    """

    name: str
    low: float
    high: float
    vacuum: float | None
    pressure: float | None
    note: str
    source: str


@dataclass(frozen=True, slots=True)
class SealResult:
    """What is said of the seals.

    Attributes:
        values: glossary key -> value; empty where the family has no seal and none is stated.
        notes: sentences for the sheet.
        findings: what speaks against the seal stated, or that none is known to suit.
    """

    values: Mapping[str, Given]
    notes: tuple[str, ...] = ()
    findings: tuple[Finding, ...] = ()


@dataclass(frozen=True, slots=True)
class _Wanted:
    """What a seal has to bear: temperatures in K, pressures in Pa, None where not known.

    Attributes:
        hottest, coldest: temperatures, design included.
        lowest: absolute pressure, design included.
        gauge: highest gauge pressure, design included.
    """

    hottest: float | None
    coldest: float | None
    lowest: float | None
    gauge: float | None

    @classmethod
    def of(cls, tag: Tag, service: Service) -> _Wanted:
        """Return what the tag wants in its service."""
        held = [point.quantity("pressure") for point in tag.points]
        held.append(tag.quantity("design.minimum_pressure"))
        pressures = [tag.absolute(pressure) for pressure in held if pressure is not None]
        highest = service.pressure
        return cls(
            max(filter(None, (service.hottest, tag.si("design.temperature"))), default=None),
            service.coldest,
            min(pressures, default=None),
            None if highest is None else highest - tag.atmospheric_pressure,
        )


def seals(
    tag: Tag,
    profile: Profile | None,
    fluid: FluidResult | None = None,
    *,
    service: Service | None = None,
) -> SealResult:
    """Return the seals that suit, or what speaks against the one stated.

    Args:
        tag: the tag; ``require.seal_material`` states the seal.
        profile: the family's profile; its wetted parts tell whether it has a seal.
        fluid: states at the operating points, where saturation decides temperature or pressure.
        service: facts of the service, where the caller has them already.
    """
    service = service_facts(tag, fluid) if service is None else service
    wanted = _Wanted.of(tag, service)
    stated = tag.text(ENTRY)
    if stated and stated != PROPOSE:
        return _stated(stated, wanted)
    usual = tuple(_usual(profile)) if profile is not None else ()
    if not usual or tag.text("meter.mounting") == "clamp-on":  # from outside nothing is sealed
        return SealResult({})
    words = service.words | dangers(service)
    rules = rules_by_verdict(service, words)
    known = dict.fromkeys((*usual, *_pack()))
    suited = [seal for seal in known if not _against(seal, wanted, rules["avoid"])]
    chosen = [seal for seal in suited if seal in usual] or suited
    if not chosen:
        return SealResult({}, findings=(_nothing(),))
    best = sorted(
        chosen, key=lambda seal: bool(rules["conditional"] & rules_about(seal.name, seal=True))
    )[:3]
    names = join(seal.name for seal in best)
    notes = tuple(_sentence(seal) for seal in best)
    return SealResult({"seal_material": Given(names, Origin.DERIVED, PRACTICE)}, notes)


def _stated(stated: str, wanted: _Wanted) -> SealResult:
    """Check the seal stated; chemistry is left to the notes on materials, which see it too."""
    values = {"seal_material": Given(stated, Origin.GIVEN)}
    if _NONE.search(stated.lower()):
        return SealResult(values)
    seal = find_seal(stated)
    if seal is None:
        known = ", ".join(item.name for item in _pack())
        message = (
            f'"{stated}" is not in the table of seals ({known}); its limits cannot be checked. Ask '
            "the bidder for them, or add it to the profile."
        )
        return SealResult(
            values, findings=(Finding(Level.CAUTION, "seal-unknown", ENTRY, message),)
        )
    findings = tuple(
        Finding(
            level,
            "seal-unsuitable",
            ENTRY,
            f"{stated}: {words}. Choose another seal.",
            source=seal.source,
        )
        for level, words in _objections(seal, wanted)
    )
    return SealResult(values, (_sentence(seal),), findings)


def _nothing() -> Finding:
    message = (
        "No seal of the table bears temperature, vacuum, pressure and chemistry together. Ask the "
        "bidders what they offer, or for a meter without seals."
    )
    return Finding(Level.CAUTION, "no-seal", ENTRY, message, source=PRACTICE)


def _sentence(seal: Seal) -> str:
    name = f"{seal.name[0].upper()}{seal.name[1:]}"
    low, high = seal.low - _CELSIUS, seal.high - _CELSIUS
    return f"{name}: {low:.0f} to {high:.0f} °C; {seal.note} ({seal.source})."


def _usual(profile: Profile) -> Iterator[Seal]:
    """Return the seals of the pack that are usual for a family, in its order."""
    for part, choices in profile.wetted.items():
        if SEALS.search(part):
            yield from (seal for text in choices if (seal := find_seal(text)) is not None)


def _against(seal: Seal, wanted: _Wanted, avoided: frozenset[int]) -> bool:
    return bool(avoided & rules_about(seal.name, seal=True)) or any(_objections(seal, wanted))


def _objections(seal: Seal, wanted: _Wanted) -> Iterator[tuple[Level, str]]:
    """Return what speaks against a seal, in words, with the level of it."""
    hottest, coldest, lowest, gauge = wanted.hottest, wanted.coldest, wanted.lowest, wanted.gauge
    if hottest is not None and hottest > seal.high:
        yield (
            Level.STOP,
            f"{hottest - _CELSIUS:.0f} °C is wanted, it bears up to {seal.high - _CELSIUS:.0f} °C",
        )
    if coldest is not None and coldest < seal.low:
        yield (
            Level.STOP,
            f"{coldest - _CELSIUS:.0f} °C is wanted, it bears down to {seal.low - _CELSIUS:.0f} °C",
        )
    if seal.vacuum is not None and lowest is not None and lowest < seal.vacuum:
        yield (
            Level.CAUTION,
            f"it does not stay tight at {lowest / 1e5:.2g} bar(a); at least "
            f"{seal.vacuum / 1e5:.2g} bar(a) is usual",
        )
    if seal.pressure is not None and gauge is not None and gauge > seal.pressure:
        yield (
            Level.CAUTION,
            f"{gauge / 1e5:.4g} bar(g) is wanted, as a flat gasket it bears up to "
            f"{seal.pressure / 1e5:.4g} bar(g)",
        )


@cache
def _pack() -> tuple[Seal, ...]:
    return tuple(seal for seal, _ in _named())


@cache
def _named() -> tuple[tuple[Seal, tuple[str, ...]], ...]:
    return tuple(
        (_seal(row), tuple(_plain(name) for name in (row["name"], *row["names"])))
        for row in table("seals")["seal"]
    )


def _seal(row: Mapping[str, Any]) -> Seal:
    def pascal(key: str) -> float | None:
        return None if key not in row else float(row[key]) * 1e5

    return Seal(
        name=row["name"],
        low=row["low"] + _CELSIUS,
        high=row["high"] + _CELSIUS,
        vacuum=pascal("vacuum"),
        pressure=pascal("pressure"),
        note=row["note"],
        source=row["source"],
    )


def _plain(text: str) -> str:
    return " ".join(re.findall(r"[a-z0-9]+", text.lower()))


@lru_cache(maxsize=1024)
def find_seal(text: str) -> Seal | None:
    """Return the seal that a text names, the longest name first; None where the pack has none."""
    spoken = f" {_plain(text)} "
    found = [
        (len(name), seal) for seal, names in _named() for name in names if f" {name} " in spoken
    ]
    return max(found, key=lambda pair: pair[0])[1] if found else None
