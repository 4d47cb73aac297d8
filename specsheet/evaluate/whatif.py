"""What if one figure of a tag varied: the verdict and the key results at each value, in a row."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass

from specsheet import quantity
from specsheet.evaluate.pipeline import evaluate
from specsheet.evaluate.result import Evaluation, Result
from specsheet.fields import KINDS, Entry
from specsheet.findings import Finding, Level
from specsheet.quantity.value import Quantity, Refusal
from specsheet.tagfile import Change, EditError, Job, suppose
from specsheet.tagfile.leaf import entry_of

#: values of which the largest over the operating points is told
AT_POINTS = ("velocity", "pressure_loss", "uncertainty")
#: values of the meter that are told: a free size is chosen anew at every value
OF_ELEMENT = ("meter_size", "bore_diameter", "throat_diameter", "differential_pressure_range")
MOST_STEPS = 200


@dataclass(frozen=True)
class Trial:
    """The tag at one value of the driver.

    Attributes:
        text: the value, as it would be typed.
        level: of the worst finding; None where there is none.
        worst: the worst finding above a note; None where there is none.
        results: key results by glossary key; those that are not known are missing.
    """

    text: str
    level: Level | None
    worst: Finding | None
    results: Mapping[str, Result]


def values_between(family: str, path: str, first: str, last: str, steps: int) -> tuple[str, ...]:
    """Return evenly spaced values of an entry as texts, in the unit of the first.

    Raises:
        EditError: there is no such entry, it is no quantity, a value is refused, or the two are
            of two kinds.
    """
    entry = entry_of(path, family)
    if entry is None:
        raise EditError(f"{path}: there is no such entry")
    if not 2 <= steps <= MOST_STEPS:
        raise EditError(f"--steps: a number from 2 to {MOST_STEPS} was wanted, {steps} came")
    if entry.kind not in KINDS:
        raise EditError(f"{entry.path}: only a quantity can be varied; this is a {entry.kind}")
    start, end = _read(entry, first), _read(entry, last)
    if (start.kind, start.base) != (end.kind, end.base):
        raise EditError(f"{entry.path}: {first} and {last} are two kinds of quantity; use one")
    low, high = (quantity.from_si(item.value, item.kind, start.unit) for item in (start, end))
    numbers = (low + (high - low) * step / (steps - 1) for step in range(steps))
    return tuple(f"{number:.6g} {start.unit}".removesuffix(" 1") for number in numbers)


def _read(entry: Entry, text: str) -> Quantity:
    found = quantity.parse(text, entry.kind)
    if isinstance(found, Refusal):
        raise EditError(f"{entry.path}: {found.message}")
    return found


def vary(
    text: str,
    path: str,
    values: tuple[str, ...],
    *,
    also: Sequence[Change] = (),
    file: str = "",
    job: Job | None = None,
) -> tuple[Trial, ...]:
    """Evaluate a tag file at each value of one entry; the file is not touched.

    Args:
        text: the tag file.
        path: entry that varies ("points.maximum.flow").
        values: what it holds in turn.
        also: other entries that hold another value at every step.
        file, job: as in :func:`specsheet.tagfile.loads`.

    Raises:
        EditError: the path or a value is refused.
    """
    evaluations: list[Evaluation] = []
    for value in values:
        tag = suppose(text, (*also, (path, value)), file, job).tag
        assert tag is not None  # a text that parses gives a tag
        evaluations.append(evaluate(tag))
    always = set.intersection(*({item.code for item in one.findings} for one in evaluations))
    return tuple(
        Trial(value, one.worst, _telling(one, always), key_results(one))
        for value, one in zip(values, evaluations, strict=True)
    )


def _telling(evaluation: Evaluation, always: set[str]) -> Finding | None:
    """Return the first finding of the worst level, rather one that does not stand everywhere."""
    worst = [
        item
        for item in evaluation.findings
        if item.level is evaluation.worst and item.level is not Level.NOTE
    ]
    return next((item for item in worst if item.code not in always), next(iter(worst), None))


def key_results(evaluation: Evaluation) -> dict[str, Result]:
    """Return what one looks at first: size, and the largest velocity, loss and uncertainty."""
    found = {key: evaluation.element[key] for key in OF_ELEMENT if key in evaluation.element}
    for key in AT_POINTS:
        known = [
            point.values[key]
            for point in evaluation.points
            if key in point.values and not isinstance(point.values[key].value, str)
        ]
        if known:
            found[key] = max(known, key=lambda result: float(result.value))
    return found
