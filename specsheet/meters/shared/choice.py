"""Choosing one size among several: every candidate is built, asked and held to the limits."""

from __future__ import annotations

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, replace

import numpy as np

from specsheet.fields.terms import in_sentence
from specsheet.findings import Level
from specsheet.meters.family import Array, Contribution, Element, Limit, Request, Stream
from specsheet.meters.shared import limits as shared_limits
from specsheet.meters.shared import sizes
from specsheet.meters.shared.sizes import Candidates, Size


@dataclass(frozen=True)
class Trial:
    """One candidate, tried.

    Attributes:
        element: the candidate.
        values: its response at the operating points, shape (n,).
        harm: the part of ``stops`` that damages the meter: a bound crossed upwards, or
            cavitation. A meter that cannot read the smallest flow is a lesser evil [-].
        stops, cautions, notes: sum of the shortfalls of the limits of each level [-].
        broken: glossary keys of the limits that it breaks, worst first.
    """

    element: Element
    values: Mapping[str, Array]
    harm: float
    stops: float
    cautions: float
    notes: float
    broken: tuple[str, ...]


@dataclass(frozen=True)
class Rules:
    """The functions of a family that a trial needs."""

    at: Callable[[Element, Stream], Mapping[str, Array]]
    limits: Callable[[Element, Request], tuple[Limit, ...]]
    budget: Callable[[Element, Stream, Mapping[str, Array]], tuple[Contribution, ...]]


def attempt(request: Request, element: Element, rules: Rules, beside: Sequence[Limit]) -> Trial:
    """Try one candidate at the operating points, with the limits ``beside`` the family's own."""
    values = dict(rules.at(element, request.stream))
    parts = rules.budget(element, request.stream, values)
    if parts:
        with np.errstate(all="ignore"):
            values["uncertainty"] = 2.0 * np.sqrt(sum(part.relative**2 for part in parts))
    own = (item for item in rules.limits(element, request) if item.phase in ("", request.tag.phase))
    found = [(shared_limits.shortfall(limit, values), limit) for limit in (*own, *beside)]
    worst = sorted((pair for pair in found if pair[0] > 0.0), key=lambda pair: -pair[0])

    def total(level: Level) -> float:
        return sum(size for size, limit in worst if limit.level is level)

    return Trial(
        element=element,
        values=values,
        harm=sum(size for size, limit in worst if _harmful(limit, values)),
        stops=total(Level.STOP),
        cautions=total(Level.CAUTION),
        notes=total(Level.NOTE),
        broken=tuple(dict.fromkeys(limit.key for _, limit in worst)),
    )


def _harmful(limit: Limit, values: Mapping[str, Array]) -> bool:
    """Tell whether a limit that is broken damages the meter."""
    if limit.level is not Level.STOP:
        return False
    if limit.key == "back_pressure_margin":
        return True
    return limit.high is not None and bool((values[limit.key] > limit.high).any())


def best(trials: Sequence[Trial]) -> int:
    """Return the index of the trial that breaks least; of equals the first.

    The caller puts the candidates in the order in which it likes them. Harm outweighs any other
    stop, a stop any caution, a caution any note.
    """
    scores = [
        tuple(round(part, 9) for part in (trial.harm, trial.stops, trial.cautions, trial.notes))
        for trial in trials
    ]
    return scores.index(min(scores))


def _tried(
    request: Request, order: Sequence[Size], build: Callable[[Size], Element], rules: Rules
) -> list[Trial]:
    """Try the candidates in their order, up to the first that breaks nothing: none beats it."""
    beside = shared_limits.beside_own(request)
    trials: list[Trial] = []
    for size in order:
        trials.append(attempt(request, build(size), rules, beside))
        if not trials[-1].broken:
            break
    return trials


def choose(
    request: Request,
    found: Candidates,
    order: Sequence[Size],
    build: Callable[[Size], Element],
    rules: Rules,
    liking: str,
) -> Element:
    """Return the best candidate, with a note that says why, where the program may choose.

    Args:
        request: the tag's request.
        found: the sizes in question, with what is wrong with what the user stated.
        order: the same sizes, the most liked first.
        build: builds the element of one size; what no size changes is worked out before.
        rules: the family's functions.
        liking: how the order came about ("the largest size").
    """
    trials = _tried(request, order, build, rules)
    index = best(trials)
    element = trials[index].element
    notes = dict(element.notes)
    if found.free:
        reason = _reason(order, trials, index, liking)
        notes["element"] = (*notes.get("element", ()), reason)
    return replace(element, notes=notes, findings=(*found.findings, *element.findings))


def choose_largest(request: Request, build: Callable[[Size], Element], rules: Rules) -> Element:
    """Return the largest candidate that the limits allow, or the size stated, rated."""
    found = sizes.candidates(request)
    order = tuple(reversed(found.sizes))
    return choose(request, found, order, build, rules, "the largest size")


def _reason(order: Sequence[Size], trials: Sequence[Trial], index: int, liking: str) -> str:
    """Say in a sentence why this size was chosen."""
    chosen = trials[index]
    if chosen.stops or chosen.cautions or chosen.notes:
        text = f"{order[index].text} breaks the limits least; no size holds them all"
    else:
        text = f"{order[index].text} is {liking} that holds every limit at every operating point"
    if index:
        broken = ", ".join(in_sentence(key) for key in trials[index - 1].broken)
        text += f"; {order[index - 1].text} would break: {broken}"
    return f"{text}."
