"""The one way from a tag to its evaluation."""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from dataclasses import replace

import numpy as np

from specsheet import fluid, line, packs
from specsheet.evaluate import assemble, summary
from specsheet.evaluate.checks import check_limits
from specsheet.evaluate.common import COMMON_DERIVATIONS
from specsheet.evaluate.limits import limits_of
from specsheet.evaluate.model import Model
from specsheet.evaluate.reserve import scaled
from specsheet.evaluate.result import Evaluation, Result, Sweep
from specsheet.evaluate.sanity import check_statements
from specsheet.evaluate.stream import Points, points_of
from specsheet.findings import Finding, Level
from specsheet.fluid.state import FluidResult
from specsheet.meters import registry
from specsheet.meters.family import Element, Family, Given, Request, Stream
from specsheet.packs import Profile
from specsheet.tag import Tag

_SWEEP_LANES = 41
_RANK = {Level.STOP: 0, Level.CAUTION: 1, Level.NOTE: 2}


def evaluate(tag: Tag) -> Evaluation:
    """Evaluate one tag. Never raises on user data: what is wrong is among the findings."""
    profile = packs.profile(tag.family) if tag.family in packs.family_keys() else None
    state = fluid.derive(tag)
    points = points_of(tag, state)
    pipe = line.pipe_of(tag)
    findings = [*state.findings, *points.findings, *pipe.findings, *check_statements(tag, points)]
    evaluation = Evaluation(
        tag=tag,
        profile=profile,
        fluid_name=state.name,
        points=assemble.point_results(tag, state, points, {}, {}),
        base=_base(tag, state),
        fluid={key: assemble.property_result(found) for key, found in state.constants.items()},
        line=_printed(pipe.values),
        derivations=COMMON_DERIVATIONS,
    )
    family = registry.family(tag.family)
    if profile is None or family is None:
        findings.append(_no_family(tag, profile))
    if profile is not None and family is not None and pipe.pipe is not None and points.names:
        request = _request(tag, profile, pipe.pipe, points)
        evaluation = _with_meter(evaluation, family, request, state, points, findings)
    else:
        evaluation = _without_meter(evaluation, pipe.pipe, state, findings)
    return _finished(evaluation, findings)


def _no_family(tag: Tag, profile: Profile | None) -> Finding:
    if profile is None:
        message = (
            f"There is no meter family {tag.family!r}; `specsheet families` lists them. The fluid "
            "and the line are evaluated without a meter."
        )
        return Finding(Level.STOP, "family-unknown", "family", message)
    message = (
        f"Only the usual limits of the family {profile.title!r} are known; nothing is sized. "
        "Have a bidder size it, and check the limits."
    )
    return Finding(Level.CAUTION, "family-without-equations", "family", message)


def _request(tag: Tag, profile: Profile, pipe: line.Pipe, points: Points) -> Request:
    flows = points.stream.mass_flow
    order = np.argsort(flows)
    middle = int(order[order.size // 2])
    normal = points.names.index("normal") if "normal" in points.names else middle
    return Request(
        tag=tag,
        profile=profile,
        pipe=pipe,
        names=points.names,
        stream=points.stream,
        normal=normal,
        maximum=int(flows.argmax()),
        minimum=int(flows.argmin()),
    )


def _with_meter(
    evaluation: Evaluation,
    family: Family,
    request: Request,
    state: FluidResult,
    points: Points,
    findings: list[Finding],
) -> Evaluation:
    """Return the evaluation with the meter in the line; adds to ``findings``."""
    tag = request.tag
    element = family.size(request)
    beside = line.assess(
        tag,
        request.profile,
        request.pipe,
        state,
        beta=_number(element, "diameter_ratio"),
        meter_diameter=_number(element, "meter_bore"),
    )
    model = Model(
        family,
        element,
        gas=tag.phase == "gas",
        efficiency=tag.si("job.efficiency") or 1.0,
        additional=beside.additional_uncertainty,
    )
    stream, count = request.stream, len(request.names)
    swept = _swept(request, element)
    grid = scaled(stream)
    response = model(_joined(stream, swept, grid))
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
    findings.extend(checked.findings)
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
        checks=checked.checks,
        bands=checked.bands,
        budget=assemble.budget_lines(response.contributions, count),
        sweep=Sweep(swept.mass_flow, in_sweep, in_sweep.get("uncertainty", np.empty(0))),
        derivations=derivations,
    )


def _without_meter(
    evaluation: Evaluation, pipe: line.Pipe | None, state: FluidResult, findings: list[Finding]
) -> Evaluation:
    """Return the evaluation with what the line alone can say; adds to ``findings``."""
    beside = line.assess(evaluation.tag, evaluation.profile, pipe, state)
    findings.extend(beside.findings)
    return replace(
        evaluation,
        line={**evaluation.line, **_printed(beside.values)},
        notes=beside.notes,
    )


def _number(element: Element, key: str) -> float | None:
    found = element.values.get(key)
    return None if found is None or isinstance(found.value, str) else found.value


def _swept(request: Request, element: Element) -> Stream:
    """Return the range at the conditions of the normal point, from below to above it."""
    flows = request.stream.mass_flow
    highest = max(float(flows.max()), _number(element, "upper_range_flow") or 0.0)
    range_ = np.geomspace(0.3 * float(flows.min()), 1.3 * highest, _SWEEP_LANES)
    lanes = request.stream.take(np.full(_SWEEP_LANES, request.normal))
    return lanes.with_flow(range_)


def _joined(*streams: Stream) -> Stream:
    names = Stream.__dataclass_fields__
    return Stream(*(np.concatenate([getattr(one, name) for one in streams]) for name in names))


def _base(tag: Tag, state: FluidResult) -> dict[str, Result]:
    found = state.bases.get(tag.base)
    if found is None:
        return {}
    return {key: assemble.property_result(item) for key, item in found.properties.items()}


def _printed(values: Mapping[str, Given]) -> dict[str, Result]:
    return {key: Result(item.value, item.origin, item.source) for key, item in values.items()}


def _finished(evaluation: Evaluation, findings: Iterable[Finding]) -> Evaluation:
    """Return the evaluation with its findings sorted, worst first, without repeats."""
    unique = dict.fromkeys(findings)
    return replace(evaluation, findings=tuple(sorted(unique, key=lambda item: _RANK[item.level])))
