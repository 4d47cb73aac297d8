"""Evaluation with patience: a phase that could not be decided at once gets a few seconds more."""

from __future__ import annotations

from collections.abc import Callable
from typing import Protocol, TypeVar

from specsheet import fluid
from specsheet.evaluate.judge import judge
from specsheet.evaluate.pipeline import evaluate
from specsheet.evaluate.result import Evaluation
from specsheet.findings import Finding
from specsheet.tag import Tag

#: time that the search for a phase may take [s]
PATIENCE = 10.0


class _WithFindings(Protocol):
    @property
    def findings(self) -> tuple[Finding, ...]: ...


_Verdict = TypeVar("_Verdict", bound=_WithFindings)


def unsettled(evaluation: _WithFindings) -> bool:
    """Tell whether the phase at some operating point was left undecided."""
    return any(finding.code == "phase-unverified" for finding in evaluation.findings)


def evaluate_settled(tag: Tag, seconds: float = PATIENCE) -> Evaluation:
    """Evaluate one tag; where its phase is undecided, search for it and evaluate again.

    Args:
        tag: the tag.
        seconds: after which the search is given up, for good in this process.
    """
    return _settled(evaluate, tag, seconds)


def findings_settled(tag: Tag, seconds: float = PATIENCE) -> tuple[Finding, ...]:
    """Return the findings of :func:`evaluate_settled`, without the sheet that they belong to."""
    return _settled(judge, tag, seconds).findings


def _settled(work: Callable[[Tag], _Verdict], tag: Tag, seconds: float) -> _Verdict:
    first = work(tag)
    if unsettled(first) and fluid.settle(tag, seconds):
        return work(tag)
    return first
