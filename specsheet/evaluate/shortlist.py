"""Every meter family held against one tag: which fit, on what conditions, and why others do not.

Fluid, points and pipe are derived once. A family that the service rules out is not sized; one that
breaks a limit at an operating point is not searched for reserves.
"""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from dataclasses import dataclass, field
from enum import StrEnum

import numpy as np

from specsheet import line, packs
from specsheet.evaluate.by_limits import family_by_limits
from specsheet.evaluate.checks import SIZED_TO, Checked, check_limits
from specsheet.evaluate.limits import limits_of
from specsheet.evaluate.model import model_of
from specsheet.evaluate.prepare import NO_PIPE, Prepared, prepare
from specsheet.evaluate.prepare import request as requested
from specsheet.evaluate.remarks import remarks
from specsheet.evaluate.reserve import ROUGH, scaled
from specsheet.evaluate.result import Result
from specsheet.evaluate.service import Service, judge_habits, judge_service
from specsheet.evaluate.stream import with_lanes
from specsheet.evaluate.summary import check_turndown, summarise
from specsheet.findings import Finding, Level, Reserve
from specsheet.line import StraightResult
from specsheet.meters import registry
from specsheet.meters.family import Array, Element, Family, Request
from specsheet.packs import Profile
from specsheet.tag import Tag
from specsheet.tagfile import with_family

#: limits of the line, which no choice of a family mends
_OF_LINE = ("line-velocity-high", "line-velocity-low")
#: stops of the flanges that a meter without flanges escapes
_OF_FLANGES = ("rating-exceeded", "rating-temperature")
#: uncertainties that part good from fair and poor [-]; common practice
_CLASSES = (0.01, 0.02, 0.05)
_RANK = {Level.STOP: 0, Level.CAUTION: 1, Level.NOTE: 2}


class Verdict(StrEnum):
    """Whether a family fits a tag."""

    FITS = "fits"
    CONDITIONS = "fits with conditions"
    UNFIT = "does not fit"


_ORDER = (Verdict.FITS, Verdict.CONDITIONS, Verdict.UNFIT)


@dataclass(frozen=True)
class Candidate:
    """One family held against the tag.

    Attributes:
        profile: the family.
        verdict: whether it fits.
        by_equations: whether it was sized; else it was judged by its usual limits only.
        reasons: what decides: the stops, else the cautions; empty where it fits.
        reserve: smallest margin of the flow to a limit that holds; None where none was found.
        size: nominal size in words, or "".
        uncertainty: expanded, k = 2, at the smallest flow [-]; None where not known.
        loss: permanent pressure loss at the largest flow [Pa]; None where not known.
        yearly_energy: of the loss at the normal point [J]; None where not known.
        yearly_cost: in the job's currency; None where no price is stated.
        upstream: straight length wanted upstream [m]; None where not known.
        unknown: what is not known and would have to be.
    """

    profile: Profile
    verdict: Verdict
    by_equations: bool
    reasons: tuple[Finding, ...]
    reserve: Reserve | None = None
    size: str = ""
    uncertainty: float | None = None
    loss: float | None = None
    yearly_energy: float | None = None
    yearly_cost: float | None = None
    upstream: float | None = None
    unknown: tuple[str, ...] = ()


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
        *line.cautions(tag, prepared.fluid).findings,
    )
    of_flanges = tuple(item for item in _stops(beside) if item.code in _OF_FLANGES)
    found = [
        candidate(prepared, packs.profile(key), of_flanges=of_flanges)
        for key in packs.family_keys()
    ]
    # a pipe that is missing is a reason with each family that needs one, not with a channel
    of_pipe = _stops(prepared.pipe.findings)
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


def candidate(
    prepared: Prepared, profile: Profile, *, of_flanges: tuple[Finding, ...] = ()
) -> Candidate:
    """Hold one family against a prepared tag. Never raises on user data.

    Args:
        prepared: the tag without a meter.
        profile: the family.
        of_flanges: stops on the flange rating asked for; they concern meters in the line.
    """
    family = registry.family(profile.key)
    service = judge_service(prepared, profile)
    in_line = "closed pipe" in profile.applies_to
    said = (*(of_flanges if in_line else ()), *service.findings)
    if _stops(said):
        return _unfit(profile, family, said, service)
    own = prepared.tag.family == profile.key
    tag = prepared.tag if own else with_family(prepared.tag, profile.key)
    request = requested(prepared, profile, tag)
    if request is None:
        missing = _stops(prepared.findings(profile))
        return _unfit(profile, family, (*said, *missing), service)
    habits = () if family is not None else judge_habits(prepared, profile)
    choosing = remarks(profile, tag.phase, prepared.words, choosing=True)
    return _sized(request, family, (*said, *habits, *choosing), service)


def _unfit(
    profile: Profile, family: Family | None, findings: Iterable[Finding], service: Service
) -> Candidate:
    """Return a family that is ruled out before it is sized."""
    reasons = _deciding(findings)
    return Candidate(profile, Verdict.UNFIT, family is not None, reasons, unknown=service.unknown)


def _stops(findings: Iterable[Finding]) -> tuple[Finding, ...]:
    return tuple(finding for finding in findings if finding.level is Level.STOP)


def _deciding(findings: Iterable[Finding]) -> tuple[Finding, ...]:
    """Return the stops, else the cautions, without repeats."""
    unique = dict.fromkeys(findings)
    stops = _stops(unique)
    return stops or tuple(item for item in unique if item.level is Level.CAUTION)


def _sized(
    request: Request, equations: Family | None, said: tuple[Finding, ...], service: Service
) -> Candidate:
    """Size one family, or judge it by its limits, and hold it against the operating points."""
    family = equations or family_by_limits(request.profile)
    element = family.size(request)
    runs = _runs(request, element)
    model = model_of(request, family, element, runs.additional_uncertainty)
    every = model(with_lanes(request.stream, scaled(request.stream))).values
    count = len(request.names)
    values = {key: found[:count] for key, found in every.items()}
    grid = {key: found[count:] for key, found in every.items()}
    limits = tuple(
        limit for limit in limits_of(family, element, request) if limit.code not in _OF_LINE
    )
    ruled_out = _stops((*said, *element.findings))
    checked = check_limits(
        request, model, limits, values, None if ruled_out else grid, ROUGH, sparing=True
    )
    stopped = ruled_out or _stops(checked.findings)
    totals = summarise(request, values, checked.bands)
    short = () if stopped else check_turndown(request, totals)
    findings = (*said, *element.findings, *runs.findings, *checked.findings, *short)
    reasons = _deciding(findings)
    return Candidate(
        profile=request.profile,
        verdict=_verdict(reasons),
        by_equations=equations is not None,
        reasons=reasons,
        reserve=_tightest(checked),
        size=_text(element, "meter_size"),
        uncertainty=_lane(values, "uncertainty", request.minimum),
        loss=_lane(values, "pressure_loss", request.maximum),
        yearly_energy=_number(totals, "yearly_energy"),
        yearly_cost=_number(totals, "yearly_cost"),
        upstream=_upstream(runs),
        unknown=(*service.unknown, *_not_known(values, runs)),
    )


def _verdict(reasons: tuple[Finding, ...]) -> Verdict:
    if not reasons:
        return Verdict.FITS
    return Verdict.UNFIT if reasons[0].level is Level.STOP else Verdict.CONDITIONS


def _runs(request: Request, element: Element) -> StraightResult:
    if request.pipe is NO_PIPE:
        return StraightResult({}, ())
    return line.straight(
        request.tag,
        request.profile,
        _element(element, "diameter_ratio"),
        pipe_diameter=request.pipe.inside_diameter,
        meter_diameter=_element(element, "meter_bore"),
    )


def _tightest(checked: Checked) -> Reserve | None:
    """Return the smallest margin of the flow among the limits above a note that hold.

    What the meter was sized to on purpose (its range) is no margin.
    """
    found = [
        check.reserve
        for check in checked.checks
        if check.holds
        and check.level is not Level.NOTE
        and check.reserve is not None
        and check.reserve.driver == "mass_flow"
        and abs(check.reserve.fraction) > SIZED_TO
    ]
    return min(found, key=lambda reserve: abs(reserve.fraction), default=None)


def _element(element: Element, key: str) -> float | None:
    found = element.values.get(key)
    return None if found is None or isinstance(found.value, str) else found.value


def _text(element: Element, key: str) -> str:
    found = element.values.get(key)
    return found.value if found is not None and isinstance(found.value, str) else ""


def _lane(values: Mapping[str, Array], key: str, lane: int) -> float | None:
    found = values.get(key)
    return None if found is None or not np.isfinite(found[lane]) else float(found[lane])


def _number(totals: Mapping[str, Result], key: str) -> float | None:
    found = totals.get(key)
    return None if found is None else float(found.value)


def _upstream(runs: StraightResult) -> float | None:
    found = runs.values.get("upstream_length")
    return None if found is None else float(found.value)


def _not_known(values: Mapping[str, Array], runs: StraightResult) -> tuple[str, ...]:
    wanted = (("uncertainty", "uncertainty"), ("pressure_loss", "pressure loss"))
    missing = [
        words for key, words in wanted if key not in values or bool(np.isnan(values[key]).all())
    ]
    if "upstream_length" not in runs.values:
        missing.append("straight lengths")
    return tuple(missing)
