"""The shortlist of meter families as text and as JSON."""

from __future__ import annotations

import json
import textwrap
from collections.abc import Iterable, Sequence
from typing import Any

from specsheet.evaluate.candidates import Candidate, Verdict
from specsheet.evaluate.shortlist import Shortlist
from specsheet.evaluate.words import say
from specsheet.findings import Finding, Level
from specsheet.render.json import SCHEMA, finding_data, reserve_data, si_unit

_WIDTH = 100
_HEADINGS = (
    *("family", "basis", "size", "reserve", "U at min", "loss at max", "energy/year"),
    *("straight", "moves"),
)
_NUMBERS = (3, 4, 5, 6, 7)  # columns set flush right
_NOTES = (
    "basis: sized by equations, or judged by the usual limits of the family only. reserve: change "
    "of the flow that crosses the nearest limit. U: expanded "
    "(k = 2), the usual figure where judged by limits. straight: wanted upstream. Prices are not "
    "known here: the order is by verdict, basis, number of conditions, uncertainty (good enough, "
    "below 2 %, below 5 %, more), moving parts and energy."
)


def text(found: Shortlist) -> str:
    """Return the shortlist as a text of at most 100 columns where its words allow."""
    lines = [f"{found.tag.name}: meter families held against the process data", ""]
    common = [item for item in found.findings if item.level is not Level.NOTE]
    if common:
        lines += ["Whatever the family:", *_sentences(common), ""]
    for verdict in Verdict:
        chosen = [item for item in found.candidates if item.verdict is verdict]
        if chosen:
            lines += [f"{verdict} ({len(chosen)})", *_block(found, verdict, chosen), ""]
    lines += textwrap.wrap(_NOTES, _WIDTH)
    return "\n".join(lines) + "\n"


#: verdicts in one word, for a narrow row
_SHORT = {Verdict.FITS: "fits", Verdict.CONDITIONS: "if", Verdict.UNFIT: "no"}
_CELLS = (0, 2, 3, 4, 5)  # of a row: family, size, reserve, uncertainty, loss


def rows(found: Shortlist) -> tuple[str, ...]:
    """Return one short line for every candidate, in their order and in columns."""
    cells = []
    for item in found.candidates:
        row = _row(found, item)
        unfit = item.verdict is Verdict.UNFIT
        rest = [row[at] for at in _CELLS[1:]] if not unfit else [""] * (len(_CELLS) - 1)
        cells.append((_SHORT[item.verdict], row[0], *rest))
    widths = [max(len(row[at]) for row in cells) for at in range(len(cells[0]))]
    return tuple(
        "  ".join(f"{c:<{w}}" for c, w in zip(row, widths, strict=True)).rstrip() for row in cells
    )


def details(item: Candidate) -> str:
    """Return what decides, and what is not known, in sentences."""
    parts = [reason.message for reason in item.reasons]
    if item.verdict is not Verdict.UNFIT:
        parts.append("Moving parts." if item.profile.moving_parts else "No moving parts.")
        if item.upstream is not None:
            parts.append(f"Straight length upstream: {item.upstream:.2f} m.")
    if item.unknown:
        parts.append(f"Not known: {', '.join(item.unknown)}.")
    return " ".join(parts)


def _block(found: Shortlist, verdict: Verdict, chosen: Sequence[Candidate]) -> list[str]:
    if verdict is Verdict.UNFIT:
        return [line for item in chosen for line in _reasons(item)]
    rows = [_HEADINGS, *(_row(found, item) for item in chosen)]
    widths = [max(len(row[at]) for row in rows) for at in range(len(_HEADINGS))]
    table = [_set(row, widths) for row in rows]
    conditions = [line for item in chosen for line in _reasons(item)]
    return [*table, *([""] if conditions else []), *conditions]


def _set(row: Sequence[str], widths: Sequence[int]) -> str:
    cells = (
        f"{cell:>{width}}" if at in _NUMBERS else f"{cell:<{width}}"
        for at, (cell, width) in enumerate(zip(row, widths, strict=True))
    )
    return "  " + "  ".join(cells).rstrip()


def _row(found: Shortlist, item: Candidate) -> tuple[str, ...]:
    units = found.tag.table("job.units")

    def shown(key: str, value: float | None) -> str:
        return "?" if value is None else say(key, value, units)

    length = item.upstream
    return (
        item.profile.key,
        "equations" if item.by_equations else "limits",
        item.size or "line",
        "" if item.reserve is None else f"{100.0 * item.reserve.fraction:+.0f} %",
        shown("uncertainty", item.uncertainty),
        shown("pressure_loss", item.loss),
        shown("yearly_energy", item.yearly_energy),
        "?" if length is None else f"{length:.2f} m",
        "yes" if item.profile.moving_parts else "no",
    )


def _reasons(item: Candidate) -> list[str]:
    if not item.reasons:
        return []
    return textwrap.wrap(
        f"{item.profile.key}: " + " ".join(reason.message for reason in item.reasons),
        _WIDTH,
        initial_indent="  ",
        subsequent_indent="    ",
    )


def _sentences(findings: Iterable[Finding]) -> list[str]:
    return [
        line
        for finding in findings
        for line in textwrap.wrap(
            f"{finding.level}: {finding.message}",
            _WIDTH,
            initial_indent="  ",
            subsequent_indent="    ",
        )
    ]


def as_json(found: Shortlist) -> str:
    """Return the shortlist as JSON: SI numbers; what is not known has no key."""
    data = {
        "schema": SCHEMA,
        "tag": found.tag.name,
        "family": found.tag.family,
        "findings": [finding_data(item) for item in found.findings],
        "candidates": [_candidate(item) for item in found.candidates],
    }
    return json.dumps(data, indent=2, ensure_ascii=False, allow_nan=False) + "\n"


def _candidate(item: Candidate) -> dict[str, Any]:
    values = {
        "uncertainty": item.uncertainty,
        "pressure_loss": item.loss,
        "yearly_energy": item.yearly_energy,
        "yearly_cost": item.yearly_cost,
        "upstream_length": item.upstream,
    }
    return {
        "family": item.profile.key,
        "title": item.profile.title,
        "verdict": str(item.verdict),
        "basis": "equations" if item.by_equations else "limits",
        **({"meter_size": item.size} if item.size else {}),
        "moving_parts": item.profile.moving_parts,
        "loss_class": item.profile.loss_class,
        "values": {
            key: {"value": value, "unit": si_unit(key)}
            for key, value in values.items()
            if value is not None
        },
        **reserve_data(item.reserve),
        "unknown": list(item.unknown),
        "reasons": [finding_data(reason) for reason in item.reasons],
    }
