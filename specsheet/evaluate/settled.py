"""Evaluation with patience: a phase that could not be decided at once gets a few seconds more."""

from __future__ import annotations

from specsheet import fluid
from specsheet.evaluate.pipeline import evaluate
from specsheet.evaluate.result import Evaluation
from specsheet.tag import Tag

#: time that the search for a phase may take [s]
PATIENCE = 10.0


def unsettled(evaluation: Evaluation) -> bool:
    """Tell whether the phase at some operating point was left undecided."""
    return any(finding.code == "phase-unverified" for finding in evaluation.findings)


def evaluate_settled(tag: Tag, seconds: float = PATIENCE) -> Evaluation:
    """Evaluate one tag; where its phase is undecided, search for it and evaluate again.

    Args:
        tag: the tag.
        seconds: after which the search is given up, for good in this process.
    """
    first = evaluate(tag)
    if unsettled(first) and fluid.settle(tag, seconds):
        return evaluate(tag)
    return first
