"""From a tag to its findings, with all that they rest on still as arrays."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass, replace

import numpy as np

from specsheet import line, packs
from specsheet.evaluate import summary
from specsheet.evaluate.budget import name_largest
from specsheet.evaluate.by_limits import family_by_limits
from specsheet.evaluate.checks import Checked, hold, judge_limits
from specsheet.evaluate.limits import limits_of
from specsheet.evaluate.model import Model, Response, model_of
from specsheet.evaluate.prepare import NO_PIPE, Prepared, prepare
from specsheet.evaluate.prepare import request as requested
from specsheet.evaluate.reserve import find_flips, scaled
from specsheet.evaluate.result import Result
from specsheet.evaluate.service import Service, judge_habits, judge_service
from specsheet.evaluate.stream import Lanes, with_lanes
from specsheet.findings import Finding, Level
from specsheet.line import LineResult
from specsheet.meters import registry
from specsheet.meters.family import Element, Family, Request
from specsheet.packs import Profile
from specsheet.tag import Tag

_SHARES = np.linspace(0.0, 1.0, 41)
_RANK = {Level.STOP: 0, Level.CAUTION: 1, Level.NOTE: 2}


@dataclass(frozen=True)
class Metered:
    """The meter in its line.

    Attributes:
        family, element: the meter.
        beside: what the line says with it.
        swept: the range, from below to above it.
        response: at the operating points and over the range, in that order.
        checked: what the limits say.
        totals: turndown, and what the loss costs in a year.
        findings: all of them.
    """

    family: Family
    element: Element
    beside: LineResult
    swept: Lanes
    response: Response
    checked: Checked
    totals: dict[str, Result]
    findings: tuple[Finding, ...]


@dataclass(frozen=True)
class Judged:
    """One tag, judged.

    Attributes:
        prepared: the tag without a meter.
        profile: the family's profile, None when the family is unknown.
        beside: what the line says.
        service: what the service says of the family; None when that is unknown.
        metered: the meter; None where none could be put into the line.
        findings: all findings, worst first.
    """

    prepared: Prepared
    profile: Profile | None
    beside: LineResult
    service: Service | None
    metered: Metered | None
    findings: tuple[Finding, ...]


def judge(tag: Tag) -> Judged:
    """Judge one tag. Never raises on user data: what is wrong is among the findings."""
    profile = packs.profile(tag.family) if tag.family in packs.family_keys() else None
    prepared = prepare(tag)
    findings = [*prepared.findings(profile)]
    family = registry.family(tag.family)
    if profile is None or family is None:
        findings.append(_no_family(tag, profile))
    request = service = metered = None
    if profile is not None:
        request, service = requested(prepared, profile), judge_service(prepared, profile)
        findings.extend(service.findings)
    if profile is not None and request is not None:
        if family is None:
            family = family_by_limits(profile)
            findings.extend(judge_habits(prepared, profile))
        metered = _metered(family, request, prepared)
        beside = metered.beside
        findings.extend(metered.findings)
    else:
        pipe = prepared.pipe.pipe
        beside = line.assess(tag, profile, pipe, prepared.fluid, service=prepared.facts)
        findings.extend(beside.findings)
    return Judged(prepared, profile, beside, service, metered, _worst_first(findings))


def _no_family(tag: Tag, profile: Profile | None) -> Finding:
    if profile is None:
        known = f'There is no meter family "{tag.family}"' if tag.family else "State a meter family"
        message = (
            f"{known}; `specsheet families` lists them. The fluid "
            "and the line are evaluated without a meter."
        )
        return Finding(Level.STOP, "family-unknown", "family", message)
    message = (
        f"Only the usual limits of the family {profile.title!r} are known: it is judged by them, "
        "and size, loss and error are usual figures. Have a bidder size it."
    )
    return Finding(Level.CAUTION, "family-without-equations", "family", message)


def _metered(family: Family, request: Request, prepared: Prepared) -> Metered:
    """Return the meter in the line."""
    element = family.size(request)
    beside, model = put_into_line(prepared, request, family, element)
    swept = _swept(request, element)
    answered = model(with_lanes(request.stream, swept, scaled(request.stream)))
    count = len(request.names)
    shown = count + swept.mass_flow.size
    at_points = {key: values[:count] for key, values in answered.values.items()}
    on_grid = {key: values[shown:] for key, values in answered.values.items()}
    held = hold(request, model, limits_of(family, element, request), at_points)
    (flips,) = find_flips(request.stream, (held.search(on_grid),))
    checked = judge_limits(held, flips)
    totals = summary.summarise(request, at_points, checked.bands)
    return Metered(
        family,
        element,
        beside,
        swept,
        Response(
            {key: values[:shown] for key, values in answered.values.items()},
            answered.contributions,
        ),
        checked,
        totals,
        (
            *element.findings,
            *beside.findings,
            *name_largest(checked.findings, request.names, answered.contributions),
            *summary.check_turndown(request, totals),
        ),
    )


def put_into_line(
    prepared: Prepared, request: Request, family: Family, element: Element
) -> tuple[LineResult, Model]:
    """Return what the line says with this meter in it, and the meter as a function."""
    beside = line.assess(
        request.tag,
        request.profile,
        None if request.pipe is NO_PIPE else request.pipe,
        prepared.fluid,
        beta=_number(element, "diameter_ratio"),
        meter_diameter=_number(element, "meter_bore"),
        service=prepared.facts,
    )
    return beside, model_of(request, family, element, beside.additional_uncertainty)


def _number(element: Element, key: str) -> float | None:
    found = element.values.get(key)
    return None if found is None or isinstance(found.value, str) else found.value


def _swept(request: Request, element: Element) -> Lanes:
    """Return the range at the conditions of the normal point, from below to above it."""
    flows = request.stream.mass_flow
    highest = max(float(flows.max()), _number(element, "upper_range_flow") or 0.0)
    low, high = 0.3 * float(flows.min()), 1.3 * highest
    return Lanes(np.full(_SHARES.size, request.normal), low * (high / low) ** _SHARES)


def _worst_first(findings: Iterable[Finding]) -> tuple[Finding, ...]:
    """Return the findings sorted, worst first, without repeats."""
    unique = dict.fromkeys(_sentence(item) for item in findings)
    return tuple(sorted(unique, key=lambda item: _RANK[item.level]))


def _sentence(finding: Finding) -> Finding:
    """Return a finding whose message is a sentence: a capital at its head, a stop at its end."""
    text = finding.message
    whole = f"{text[:1].upper()}{text[1:]}{'' if text.endswith(('.', '!', '?')) else '.'}"
    return finding if whole == text else replace(finding, message=whole)
