"""Every meter family held against one tag, ranked. Fluid, points and pipe are derived once."""

from __future__ import annotations

from dataclasses import dataclass, field

from specsheet import line, packs
from specsheet.evaluate.candidates import Candidate, Verdict, candidates, stops
from specsheet.evaluate.prepare import prepare
from specsheet.findings import Finding, Level
from specsheet.tag import Tag

#: stops of the flanges that a meter without flanges escapes
_OF_FLANGES = ("rating-exceeded", "rating-temperature")
#: uncertainties that part good from fair and poor [-]; common practice
_CLASSES = (0.01, 0.02, 0.05)
_RANK = {Level.STOP: 0, Level.CAUTION: 1, Level.NOTE: 2}
_ORDER = (Verdict.FITS, Verdict.CONDITIONS, Verdict.UNFIT)


@dataclass(frozen=True)
class Shortlist:
    """All families, the best first.

    Attributes:
        tag: the tag.
        findings: what is wrong whatever the family, flanges, materials and hazards of the line
            included.
        candidates: every family. Those that fit come first; then those sized by equations before
            those judged by limits, fewer cautions, an uncertainty that is good enough, no moving
            parts, less energy.
    """

    tag: Tag
    findings: tuple[Finding, ...]
    candidates: tuple[Candidate, ...] = field(default=())


def shortlist(tag: Tag) -> Shortlist:
    """Hold every family against one tag. Never raises on user data."""
    prepared = prepare(tag)
    pipe = prepared.pipe.pipe
    beside = (
        *line.rate(tag, prepared.fluid, nominal=pipe.nominal if pipe else 0).findings,
        *line.materials(tag, None, prepared.fluid).findings,
        *line.seals(tag, None, prepared.fluid).findings,
        *line.cautions(tag, prepared.fluid).findings,
    )
    of_flanges = tuple(item for item in stops(beside) if item.code in _OF_FLANGES)
    profiles = [packs.profile(key) for key in packs.family_keys()]
    found = candidates(prepared, profiles, of_flanges=of_flanges)
    # a pipe that is missing is a reason with each family that needs one, not with a channel
    of_pipe = stops(prepared.pipe.findings)
    common = dict.fromkeys(
        item for item in (*prepared.findings(None), *beside) if item not in of_pipe
    )
    worst = sorted(common, key=lambda item: _RANK[item.level])
    wanted = max(tag.si("require.uncertainty") or 0.0, _CLASSES[0])
    return Shortlist(tag, tuple(worst), tuple(sorted(found, key=lambda one: _merit(one, wanted))))


def _merit(candidate: Candidate, wanted: float) -> tuple[float | str, ...]:
    """Return the key of the order; ``wanted`` is the uncertainty that is good enough.

    Better than good enough earns nothing: there what runs without moving parts and without loss
    comes first.
    """
    large = float("inf")
    doubt = large if candidate.uncertainty is None else candidate.uncertainty
    return (
        _ORDER.index(candidate.verdict),
        not candidate.by_equations,
        len(candidate.reasons),
        sum(doubt > edge for edge in (wanted, *_CLASSES) if edge >= wanted),
        candidate.profile.moving_parts,
        large if candidate.yearly_energy is None else candidate.yearly_energy,
        doubt,
        candidate.profile.key,
    )
