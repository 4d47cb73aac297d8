"""The verdict against one figure, as text and as JSON."""

from __future__ import annotations

import json
import textwrap
from collections.abc import Sequence
from typing import Any

from specsheet.evaluate.result import Result
from specsheet.evaluate.whatif import Trial
from specsheet.evaluate.words import say
from specsheet.fields import term
from specsheet.fields.terms import in_sentence
from specsheet.render.json import SCHEMA, finding_data, value_data
from specsheet.tag import Tag

_WIDTH = 100


def text(tag: Tag, path: str, trials: Sequence[Trial]) -> str:
    """Return the table, one row a value."""
    keys = _keys(trials)
    head = [
        path,
        "verdict",
        *(term(key).symbol or term(key).label for key in keys),
        "worst finding",
    ]
    units = tag.table("job.units")
    rows = [head, *(_row(trial, keys, units) for trial in trials)]
    widths = [max(len(row[at]) for row in rows) for at in range(len(head))]
    lines = [
        "  ".join(f"{c:<{w}}" for c, w in zip(row, widths, strict=True)).rstrip() for row in rows
    ]
    legend = ", ".join(
        f"{term(key).symbol} = {in_sentence(key)}" for key in keys if term(key).symbol
    )
    note = "Largest over the operating points; a size that is free is chosen anew at each value."
    return "\n".join((*lines, "", *textwrap.wrap(f"{note} {legend}", _WIDTH))) + "\n"


def _keys(trials: Sequence[Trial]) -> tuple[str, ...]:
    return tuple(dict.fromkeys(key for trial in trials for key in trial.results))


def _row(trial: Trial, keys: Sequence[str], units: Any) -> list[str]:
    worst = trial.worst
    finding = (
        "" if worst is None else f"{worst.code}" + (f" at {worst.point}" if worst.point else "")
    )
    verdict = str(worst.level) if worst is not None else "fine"
    return [
        trial.text,
        verdict,
        *(_shown(trial.results.get(key), key, units) for key in keys),
        finding,
    ]


def _shown(result: Result | None, key: str, units: Any) -> str:
    if result is None:
        return "?"
    return result.value if isinstance(result.value, str) else say(key, result.value, units)


def as_json(tag: Tag, path: str, trials: Sequence[Trial]) -> str:
    """Return the same as JSON with SI numbers."""
    data = {
        "schema": SCHEMA,
        "tag": tag.name,
        "family": tag.family,
        "varied": path,
        "trials": [_trial(trial) for trial in trials],
    }
    return json.dumps(data, indent=2, ensure_ascii=False, allow_nan=False) + "\n"


def _trial(trial: Trial) -> dict[str, Any]:
    values = {key: value_data(key, result) for key, result in trial.results.items()}
    return {
        "value": trial.text,
        "verdict": "fine" if trial.worst is None else str(trial.worst.level),
        **({"worst": finding_data(trial.worst)} if trial.worst is not None else {}),
        "values": {key: value for key, value in values.items() if value is not None},
    }
