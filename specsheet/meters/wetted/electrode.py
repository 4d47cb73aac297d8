"""Electrodes and earthing of an electromagnetic meter. Common practice, no source.

The proposals are a starting point for whoever answers for the materials; the bidders confirm them
for the liquid.
"""

from __future__ import annotations

from dataclasses import dataclass

from specsheet.findings import Finding, Level, Origin
from specsheet.meters.family import Given, Request
from specsheet.meters.wetted.liner import PROPOSE
from specsheet.meters.wetted.service import Service
from specsheet.sources import PRACTICE

STEEL = "stainless steel 316L"
NICKEL = "nickel alloy C-22"
TANTALUM = "tantalum"
RINGS = "earthing rings"
FLANGES = "line flanges"


@dataclass(frozen=True, slots=True)
class Part:
    """A part as proposed or stated.

    Attributes:
        given: what it is, with its origin.
        findings: what speaks against it.
    """

    given: Given
    findings: tuple[Finding, ...] = ()


def electrode(request: Request, of: Service) -> Part:
    """Return the material of the electrodes: proposed, or the one stated, checked."""
    stated = request.tag.text("meter.electrode_material")
    if not stated or stated == PROPOSE:
        return Part(Given(_proposed(of), Origin.DERIVED, PRACTICE))
    wrong = ""
    if stated == STEEL and (of.chlorides or of.acid):
        wrong = "Chlorides or acid attack stainless steel 316L; nickel alloy or tantalum is usual"
    if stated == TANTALUM and of.alkaline:
        wrong = "Alkalis attack tantalum; nickel alloy is usual"
    if not wrong:
        return Part(Given(stated, Origin.GIVEN))
    finding = Finding(
        Level.CAUTION,
        "electrode-unsuitable",
        "meter.electrode_material",
        f"{wrong}; let whoever answers for the materials decide.",
        source=PRACTICE,
    )
    return Part(Given(stated, Origin.GIVEN), (finding,))


def _proposed(of: Service) -> str:
    if of.acid:
        return TANTALUM
    return NICKEL if of.chlorides or of.alkaline or of.aggressive else STEEL


def earthing(request: Request, of: Service) -> Part:
    """Return how the liquid is earthed: proposed, or as stated, checked."""
    stated = request.tag.text("meter.earthing")
    if not stated or stated == PROPOSE:
        return Part(Given(RINGS if of.insulated else FLANGES, Origin.DERIVED, PRACTICE))
    if not (stated == FLANGES and of.insulated):
        return Part(Given(stated, Origin.GIVEN))
    finding = Finding(
        Level.STOP,
        "earthing-missing",
        "meter.earthing",
        "A lined or plastic pipe does not earth the liquid, so the voltage has no reference; ask "
        "for earthing rings or a reference electrode.",
        source=PRACTICE,
    )
    return Part(Given(stated, Origin.GIVEN), (finding,))
