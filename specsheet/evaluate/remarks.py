"""What usual practice says of a family in a kind of service, read from its profile.

A profile names the services by words; here the words of a service are gathered, and the remarks
that concern it become findings.
"""

from __future__ import annotations

from collections.abc import Iterator

import numpy as np

from specsheet.evaluate.stream import Points
from specsheet.findings import Finding, Level
from specsheet.line.cautions import dangers
from specsheet.line.service import Service
from specsheet.packs import Profile
from specsheet.sources import PRACTICE
from specsheet.tag import Tag

ANY = "any"
#: a liquid at least this thick somewhere counts as viscous here [Pa s]; common practice
VISCOUS = 5e-3
_OXYGEN = "oxygen_enriched"


def service_words(tag: Tag, facts: Service, points: Points) -> frozenset[str]:
    """Return the words of a service: hazards, substances, what is carried along, "viscous"."""
    words = {*facts.words, *facts.fractions, *dangers(facts), ANY}
    if any(tag.si(f"fluid.{entry}") for entry in ("solids", "solids_mass_fraction")):
        words.add("solids")
    if tag.si("fluid.bubbles"):
        words.add("bubbles")
    viscosity = points.stream.viscosity
    if tag.phase == "liquid" and bool(np.any(viscosity >= VISCOUS)):
        words.add("viscous")
    return frozenset(words)


def remarks(
    profile: Profile, phase: str, words: frozenset[str], *, choosing: bool
) -> Iterator[Finding]:
    """Yield what usual practice says of a family in a service.

    Args:
        profile: the family.
        phase: phase of the fluid.
        words: of the service, as :func:`service_words` has them.
        choosing: whether the remarks for whoever chooses a family are wanted, or all others.
    """
    for remark in profile.remarks:
        if remark.choosing is not choosing or remark.phase not in ("", phase):
            continue
        if words.isdisjoint(remark.when) or not words.isdisjoint(remark.unless):
            continue
        level, message = Level(remark.level), f"{profile.title}: {remark.message}."
        yield Finding(level, remark.code, "family", message, source=remark.source)
    if not choosing and profile.moving_parts and _OXYGEN in words:
        message = (
            f"{profile.title}: parts that rub and struck particles can ignite in oxygen; only a "
            "version cleaned, free of oil and released for oxygen by its maker, at the velocity "
            "that the oxygen code of the site allows."
        )
        yield Finding(Level.CAUTION, "oxygen-moving-parts", "family", message, source=PRACTICE)
