"""The one way from a tag to its evaluation."""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from dataclasses import replace

import numpy as np

from specsheet import line, packs
from specsheet.evaluate import assemble, summary
from specsheet.evaluate.budget import name_largest
from specsheet.evaluate.by_limits import family_by_limits
from specsheet.evaluate.checks import check_limits
from specsheet.evaluate.common import COMMON_DERIVATIONS
from specsheet.evaluate.limits import limits_of
from specsheet.evaluate.model import Model, model_of
from specsheet.evaluate.prepare import NO_PIPE, Prepared, prepare
from specsheet.evaluate.prepare import request as requested
from specsheet.evaluate.reserve import scaled
from specsheet.evaluate.result import Evaluation, Result, Sweep
from specsheet.evaluate.service import judge_habits, judge_service
from specsheet.evaluate.state import phase_checks, rating_checks
from specsheet.evaluate.stream import Lanes, with_lanes
from specsheet.findings import Finding, Level
from specsheet.fluid.state import FluidResult
from specsheet.line import LineResult
from specsheet.meters import registry
from specsheet.meters.family import Element, Family, Given, Request
from specsheet.packs import Profile
from specsheet.tag import Tag

_SWEEP_LANES = 41
_SHARES = np.linspace(0.0, 1.0, _SWEEP_LANES)
_RANK = {Level.STOP: 0, Level.CAUTION: 1, Level.NOTE: 2}


def evaluate(tag: Tag) -> Evaluation:
    """Evaluate one tag. Never raises on user data: what is wrong is among the findings."""
    profile = packs.profile(tag.family) if tag.family in packs.family_keys() else None
    prepared = prepare(tag)
    state = prepared.fluid
    findings = [*prepared.findings(profile)]
    evaluation = Evaluation(
        tag=tag,
        profile=profile,
        fluid_name=state.name,
        base=_base(tag, state),
        fluid={key: assemble.property_result(found) for key, found in state.constants.items()},
        line=_printed(prepared.pipe.values),
        derivations=COMMON_DERIVATIONS,
    )
    family = registry.family(tag.family)
    if profile is None or family is None:
        findings.append(_no_family(tag, profile))
    request = None if profile is None else requested(prepared, profile)
    service = None if profile is None else judge_service(prepared, profile)
    if service is not None:
        findings.extend(service.findings)
    if profile is not None and request is not None and service is not None:
        if family is None:
            family = family_by_limits(profile)
            findings.extend(judge_habits(prepared, profile))
        evaluation = _with_meter(evaluation, family, request, prepared, findings)
        evaluation = replace(evaluation, checks=(*evaluation.checks, *service.checks))
    else:
        evaluation = _without_meter(evaluation, prepared, findings)
    return _finished(evaluation, findings)


def _no_family(tag: Tag, profile: Profile | None) -> Finding:
    if profile is None:
        message = (
            f"There is no meter family {tag.family!r}; `specsheet families` lists them. The fluid "
            "and the line are evaluated without a meter."
        )
        return Finding(Level.STOP, "family-unknown", "family", message)
    message = (
        f"Only the usual limits of the family {profile.title!r} are known: it is judged by them, "
        "and size, loss and error are usual figures. Have a bidder size it."
    )
    return Finding(Level.CAUTION, "family-without-equations", "family", message)


def _with_meter(
    evaluation: Evaluation,
    family: Family,
    request: Request,
    prepared: Prepared,
    findings: list[Finding],
) -> Evaluation:
    """Return the evaluation with the meter in the line; adds to ``findings``."""
    tag, state, points = request.tag, prepared.fluid, prepared.points
    element = family.size(request)
    beside, model = put_into_line(prepared, request, family, element)
    stream, count = request.stream, len(request.names)
    swept = _swept(request, element)
    response = model(with_lanes(stream, swept, scaled(stream)))
    at_points = {key: values[:count] for key, values in response.values.items()}
    in_sweep = {
        key: values[count : count + _SWEEP_LANES] for key, values in response.values.items()
    }
    on_grid = {key: values[count + _SWEEP_LANES :] for key, values in response.values.items()}
    checked = check_limits(request, model, limits_of(family, element, request), at_points, on_grid)
    derivations = (*COMMON_DERIVATIONS, *family.derivations)
    totals = summary.summarise(request, at_points, checked.bands)
    findings.extend(element.findings)
    findings.extend(beside.findings)
    findings.extend(name_largest(checked.findings, request.names, response.contributions))
    findings.extend(summary.check_turndown(request, totals))
    return replace(
        evaluation,
        points=assemble.point_results(
            tag, state, points, at_points, {item.key: item for item in derivations}
        ),
        element=_printed(element.values),
        line={**evaluation.line, **_printed(beside.values)},
        notes={**element.notes, **beside.notes},
        summary=totals,
        checks=(*checked.checks, *phase_checks(prepared), *rating_checks(beside.margin)),
        bands=checked.bands,
        budget=assemble.budget_lines(response.contributions, count),
        sweep=Sweep(swept.mass_flow, in_sweep, in_sweep.get("uncertainty", np.empty(0))),
        derivations=derivations,
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


def _without_meter(
    evaluation: Evaluation, prepared: Prepared, findings: list[Finding]
) -> Evaluation:
    """Return the evaluation with what the line alone can say; adds to ``findings``."""
    tag = evaluation.tag
    pipe = prepared.pipe.pipe
    beside = line.assess(tag, evaluation.profile, pipe, prepared.fluid, service=prepared.facts)
    findings.extend(beside.findings)
    return replace(
        evaluation,
        points=assemble.point_results(tag, prepared.fluid, prepared.points, {}, {}),
        line={**evaluation.line, **_printed(beside.values)},
        notes=beside.notes,
        checks=(*phase_checks(prepared), *rating_checks(beside.margin)),
    )


def _number(element: Element, key: str) -> float | None:
    found = element.values.get(key)
    return None if found is None or isinstance(found.value, str) else found.value


def _swept(request: Request, element: Element) -> Lanes:
    """Return the range at the conditions of the normal point, from below to above it."""
    flows = request.stream.mass_flow
    highest = max(float(flows.max()), _number(element, "upper_range_flow") or 0.0)
    low, high = 0.3 * float(flows.min()), 1.3 * highest
    return Lanes(np.full(_SWEEP_LANES, request.normal), low * (high / low) ** _SHARES)


def _base(tag: Tag, state: FluidResult) -> dict[str, Result]:
    found = state.bases.get(tag.base)
    if found is None:
        return {}
    return {key: assemble.property_result(item) for key, item in found.properties.items()}


def _printed(values: Mapping[str, Given]) -> dict[str, Result]:
    return {key: Result(item.value, item.origin, item.source) for key, item in values.items()}


def _finished(evaluation: Evaluation, findings: Iterable[Finding]) -> Evaluation:
    """Return the evaluation with its findings sorted, worst first, without repeats."""
    unique = dict.fromkeys(_sentence(item) for item in findings)
    return replace(evaluation, findings=tuple(sorted(unique, key=lambda item: _RANK[item.level])))


def _sentence(finding: Finding) -> Finding:
    """Return a finding whose message is a sentence: a capital at its head, a stop at its end."""
    text = finding.message
    whole = f"{text[:1].upper()}{text[1:]}{'' if text.endswith(('.', '!', '?')) else '.'}"
    return finding if whole == text else replace(finding, message=whole)
