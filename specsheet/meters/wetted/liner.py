"""Liner of an electromagnetic meter: proposed from the profile's table, or checked against it."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.family import Given, Request
from specsheet.meters.wetted.service import Service
from specsheet.sources import PRACTICE

PROPOSE = "propose"
_KELVIN = 273.15


@dataclass(frozen=True, slots=True)
class Liner:
    """The liner as proposed or stated.

    Attributes:
        given: name of it, with its origin.
        low, high: temperatures it bears [K], None where the profile does not know it.
        note: sentence for the sheet.
        findings: what speaks against it.
    """

    given: Given
    low: float | None
    high: float | None
    note: str
    findings: tuple[Finding, ...] = ()


def liner(request: Request, of: Service) -> Liner:
    """Return the first liner of the profile that bears the service, or the one stated, checked."""
    rows = {str(row["name"]): row for row in request.profile.data.get("liners", ())}
    stated = request.tag.text("meter.liner")
    if stated and stated != PROPOSE:
        return _stated(rows, stated, of)
    for name, row in rows.items():
        if not _objections(row, of):
            return _made(name, row, Origin.DERIVED, ())
    name, row = min(rows.items(), key=lambda pair: len(_objections(pair[1], of)))
    finding = Finding(
        Level.STOP,
        "no-liner",
        "meter.liner",
        "No liner of the table bears temperature, vacuum, wear and chemistry together; "
        f"{name} comes nearest, but {'; '.join(_objections(row, of))}. Ask the bidders or choose "
        "another family.",
        source=PRACTICE,
    )
    return _made(name, row, Origin.DERIVED, (finding,))


def _stated(rows: Mapping[str, Mapping[str, Any]], stated: str, of: Service) -> Liner:
    row = rows.get(stated)
    if row is None:
        note = "The liner is not in the table of the family; the bidder confirms its limits."
        finding = Finding(
            Level.CAUTION,
            "liner-unknown",
            "meter.liner",
            f'"{stated}" is not in the table of liners ({", ".join(rows)}); its limits cannot be '
            "checked. Ask the bidder for them, or add it to the profile.",
        )
        return Liner(Given(stated, Origin.GIVEN), None, None, note, (finding,))
    findings = tuple(
        Finding(
            Level.STOP if "°C" in objection or "vacuum" in objection else Level.CAUTION,
            "liner-unsuitable",
            "meter.liner",
            f"{stated}: {objection}. Choose another liner.",
            source=PRACTICE,
        )
        for objection in _objections(row, of)
    )
    return _made(stated, row, Origin.GIVEN, findings)


def _made(
    name: str, row: Mapping[str, Any], origin: Origin, findings: tuple[Finding, ...]
) -> Liner:
    source = "" if origin is Origin.GIVEN else PRACTICE
    low, high = float(row["lowest_temperature"]), float(row["highest_temperature"])
    note = f"Liner {name}: {low - _KELVIN:.0f} to {high - _KELVIN:.0f} °C; {row['note']}."
    return Liner(Given(name, origin, source), low, high, note, findings)


def _objections(row: Mapping[str, Any], of: Service) -> list[str]:
    """Return what speaks against one liner, in words."""
    found = []
    high, low = float(row["highest_temperature"]), float(row["lowest_temperature"])
    if of.hottest > high:
        found.append(
            f"{of.hottest - _KELVIN:.0f} °C is wanted, it bears up to {high - _KELVIN:.0f} °C"
        )
    if of.coldest < low:
        found.append(
            f"{of.coldest - _KELVIN:.0f} °C is wanted, it bears down to {low - _KELVIN:.0f} °C"
        )
    if of.lowest_pressure < float(row["lowest_pressure"]):
        found.append(
            f"a vacuum of {of.lowest_pressure / 1e5:.2g} bar(a) pulls it off the wall; it bears "
            f"{float(row['lowest_pressure']) / 1e5:.2g} bar(a)"
        )
    if of.abrasive and row["abrasion"] != "good":
        found.append(f"its resistance to wear is {row['abrasion']}")
    if of.aggressive and row["chemicals"] != "good":
        found.append(f"its resistance to chemicals is {row['chemicals']}")
    if of.potable and not row["potable"]:
        found.append("it is not usual for drinking water")
    return found
