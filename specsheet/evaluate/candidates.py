"""Meter families held against one tag: which fit, on what conditions, and why others do not.

A family that the service rules out is not sized; one that breaks a stop at an operating point is
not searched for reserves.
"""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from dataclasses import dataclass
from enum import StrEnum
from math import log1p

import numpy as np

from specsheet import line
from specsheet.evaluate.by_limits import family_by_limits
from specsheet.evaluate.checks import SIZED_TO, Checked, Held, hold, judge_limits
from specsheet.evaluate.limits import limits_of
from specsheet.evaluate.model import model_of
from specsheet.evaluate.prepare import NO_PIPE, Prepared
from specsheet.evaluate.prepare import request as requested
from specsheet.evaluate.remarks import remarks
from specsheet.evaluate.reserve import NO_FLIPS, ROUGH, Flips, find_flips, scaled
from specsheet.evaluate.result import Result
from specsheet.evaluate.service import Service, judge_habits, judge_service
from specsheet.evaluate.stream import with_lanes
from specsheet.evaluate.summary import check_turndown, summarise
from specsheet.findings import Finding, Level, Reserve
from specsheet.line import StraightResult
from specsheet.meters import registry
from specsheet.meters.family import Array, Element, Family, Request, Stream
from specsheet.packs import Profile
from specsheet.tagfile import with_family

#: limits of the line, which no choice of a family mends
_OF_LINE = ("line-velocity-high", "line-velocity-low")


class Verdict(StrEnum):
    """Whether a family fits a tag."""

    FITS = "fits"
    CONDITIONS = "fits with conditions"
    UNFIT = "does not fit"


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


def candidates(
    prepared: Prepared, profiles: Iterable[Profile], *, of_flanges: tuple[Finding, ...] = ()
) -> list[Candidate]:
    """Hold families against a prepared tag. Never raises on user data.

    Args:
        prepared: the tag without a meter.
        profiles: the families.
        of_flanges: stops on the flange rating asked for; they concern meters in the line.
    """
    stream = prepared.points.stream
    lanes = with_lanes(stream, scaled(stream)) if prepared.points.names else stream
    tried = [_tried(prepared, profile, lanes, of_flanges) for profile in profiles]
    open_ones = [one for one in tried if isinstance(one, _Trial) and not one.stopped]
    searches = [one.held.search(one.grid) for one in open_ones]
    flips = find_flips(stream, searches, ROUGH)
    found = {one.request.profile.key: own for one, own in zip(open_ones, flips, strict=True)}
    return [
        one
        if isinstance(one, Candidate)
        else _judged(one, found.get(one.request.profile.key, NO_FLIPS))
        for one in tried
    ]


@dataclass(frozen=True)
class _Trial:
    """A family sized and held against the operating points, before its reserves are looked for.

    Attributes:
        request: what it was asked.
        by_equations: as in :class:`Candidate`.
        said: findings on the family as such.
        service: what the service says of it.
        element: the meter as sized.
        runs: the straight lengths.
        values: response at the operating points.
        grid: response for the search.
        held: its limits.
    """

    request: Request
    by_equations: bool
    said: tuple[Finding, ...]
    service: Service
    element: Element
    runs: StraightResult
    values: Mapping[str, Array]
    grid: Mapping[str, Array]
    held: Held

    @property
    def stopped(self) -> bool:
        """Whether a stop rules it out, so that no reserve is of interest."""
        return self.held.stopped or bool(stops((*self.said, *self.element.findings)))


def _tried(
    prepared: Prepared, profile: Profile, lanes: Stream, of_flanges: tuple[Finding, ...]
) -> Candidate | _Trial:
    """Try one family; one that the service rules out is not sized.

    Args:
        prepared: the tag without a meter.
        profile: the family.
        lanes: the operating points, and the flows that reserves are looked for at.
        of_flanges: as in :func:`candidates`.
    """
    family = registry.family(profile.key)
    service = judge_service(prepared, profile)
    in_line = "closed pipe" in profile.applies_to
    said = (*(of_flanges if in_line else ()), *service.findings)
    if stops(said):
        return _unfit(profile, family, said, service)
    own = prepared.tag.family == profile.key
    tag = prepared.tag if own else with_family(prepared.tag, profile.key)
    request = requested(prepared, profile, tag)
    if request is None:
        missing = stops(prepared.findings(profile))
        return _unfit(profile, family, (*said, *missing), service)
    habits = () if family is not None else judge_habits(prepared, profile)
    choosing = remarks(profile, tag.phase, prepared.words, choosing=True)
    return _sized(request, family, lanes, (*said, *habits, *choosing), service)


def _unfit(
    profile: Profile, family: Family | None, findings: Iterable[Finding], service: Service
) -> Candidate:
    """Return a family that is ruled out before it is sized."""
    reasons = _deciding(findings)
    return Candidate(profile, Verdict.UNFIT, family is not None, reasons, unknown=service.unknown)


def stops(findings: Iterable[Finding]) -> tuple[Finding, ...]:
    """Return the stops among findings."""
    return tuple(finding for finding in findings if finding.level is Level.STOP)


def _deciding(findings: Iterable[Finding]) -> tuple[Finding, ...]:
    """Return the stops, else the cautions, without repeats."""
    unique = dict.fromkeys(findings)
    return stops(unique) or tuple(item for item in unique if item.level is Level.CAUTION)


def _sized(
    request: Request,
    equations: Family | None,
    lanes: Stream,
    said: tuple[Finding, ...],
    service: Service,
) -> _Trial:
    """Size one family, or judge it by its limits, and hold it against the operating points."""
    family = equations or family_by_limits(request.profile)
    element = family.size(request)
    runs = _runs(request, element)
    model = model_of(request, family, element, runs.additional_uncertainty)
    every = model(lanes).values
    count = len(request.names)
    values = {key: found[:count] for key, found in every.items()}
    limits = tuple(
        limit for limit in limits_of(family, element, request) if limit.code not in _OF_LINE
    )
    return _Trial(
        request,
        equations is not None,
        said,
        service,
        element,
        runs,
        values,
        {key: found[count:] for key, found in every.items()},
        hold(request, model, limits, values),
    )


def _judged(trial: _Trial, flips: Flips) -> Candidate:
    """Return the verdict on a family that was tried."""
    request, element, runs = trial.request, trial.element, trial.runs
    checked = judge_limits(trial.held, flips, near=False)
    totals = summarise(request, trial.values, checked.bands)
    short = () if trial.stopped else check_turndown(request, totals)
    findings = (*trial.said, *element.findings, *runs.findings, *checked.findings, *short)
    reasons = _deciding(findings)
    return Candidate(
        profile=request.profile,
        verdict=_verdict(reasons),
        by_equations=trial.by_equations,
        reasons=reasons,
        reserve=_tightest(checked),
        size=_text(element, "meter_size"),
        uncertainty=_lane(trial.values, "uncertainty", request.minimum),
        loss=_lane(trial.values, "pressure_loss", request.maximum),
        yearly_energy=_number(totals, "yearly_energy"),
        yearly_cost=_number(totals, "yearly_cost"),
        upstream=_upstream(runs),
        unknown=(*trial.service.unknown, *_not_known(trial.values, runs)),
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
    # by ratio: half the flow is as far as twice the flow
    return min(found, key=lambda reserve: abs(log1p(reserve.fraction)), default=None)


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
