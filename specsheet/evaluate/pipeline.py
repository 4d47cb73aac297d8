"""The one way from a tag to its evaluation."""

from __future__ import annotations

from collections.abc import Mapping

import numpy as np

from specsheet.evaluate import assemble
from specsheet.evaluate.common import COMMON_DERIVATIONS
from specsheet.evaluate.judge import judge
from specsheet.evaluate.result import Evaluation, Result, Sweep
from specsheet.evaluate.state import phase_checks, rating_checks
from specsheet.fluid.state import FluidResult
from specsheet.meters.family import Array, Given
from specsheet.tag import Tag


def evaluate(tag: Tag) -> Evaluation:
    """Evaluate one tag. Never raises on user data: what is wrong is among the findings."""
    judged = judge(tag)
    prepared, beside, metered = judged.prepared, judged.beside, judged.metered
    state, points = prepared.fluid, prepared.points
    checks = (*phase_checks(prepared), *rating_checks(beside.margin))
    line = {**_printed(prepared.pipe.values), **_printed(beside.values)}
    constants = {key: assemble.property_result(found) for key, found in state.constants.items()}
    if metered is None:
        return Evaluation(
            tag,
            judged.profile,
            state.name,
            assemble.point_results(tag, state, points, {}, {}),
            base=_base(tag, state),
            fluid=constants,
            line=line,
            notes=beside.notes,
            checks=checks,
            derivations=COMMON_DERIVATIONS,
            findings=judged.findings,
        )
    values, contributions = metered.response.values, metered.response.contributions
    derivations = (*COMMON_DERIVATIONS, *metered.family.derivations)
    by_key = {item.key: item for item in derivations}
    of_service = () if judged.service is None else judged.service.checks
    return Evaluation(
        tag,
        judged.profile,
        state.name,
        assemble.point_results(tag, state, points, values, by_key),
        element=_printed(metered.element.values),
        base=_base(tag, state),
        fluid=constants,
        line=line,
        summary=metered.totals,
        notes={**metered.element.notes, **beside.notes},
        checks=(*metered.checked.checks, *checks, *of_service),
        budget=assemble.budget_lines(contributions, len(points.names)),
        bands=metered.checked.bands,
        sweep=_sweep(metered.swept.mass_flow, values),
        derivations=derivations,
        findings=judged.findings,
    )


def _sweep(flows: Array, values: Mapping[str, Array]) -> Sweep:
    """Return the range, which stands behind the operating points in ``values``."""
    swept = {key: found[-flows.size :] for key, found in values.items()}
    return Sweep(flows, swept, swept.get("uncertainty", np.empty(0)))


def _base(tag: Tag, state: FluidResult) -> dict[str, Result]:
    found = state.bases.get(tag.base)
    if found is None:
        return {}
    return {key: assemble.property_result(item) for key, item in found.properties.items()}


def _printed(values: Mapping[str, Given]) -> dict[str, Result]:
    return {key: Result(item.value, item.origin, item.source) for key, item in values.items()}
