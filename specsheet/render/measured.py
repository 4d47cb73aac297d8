"""The flow from a measured signal, as text and as JSON."""

from __future__ import annotations

import json
import textwrap

from specsheet.evaluate.measured import Measured
from specsheet.fields import term
from specsheet.fields.terms import in_sentence
from specsheet.render.json import SCHEMA, finding_data, values_data
from specsheet.sheet.rows import kind_of, number, unit_of
from specsheet.sheet.units import Units
from specsheet.sheet.words import unit as unit_text
from specsheet.tag import Tag

_WIDTH = 80
#: what is told of each point, in this order; what a family does not put out is left out
_ROWS = (
    "mass_flow",
    "volume_flow",
    "base_volume_flow",
    "energy_flow",
    "uncertainty",
    "differential_pressure",
    "frequency",
    "signal_fraction",
    "signal_current",
    "signal_current_root",
    "velocity",
    "reynolds_number",
    "discharge_coefficient",
    "expansibility",
    "pressure_loss",
)


def text(tag: Tag, measured: Measured) -> str:
    """Return the table: one column for each operating point's conditions."""
    signal = measured.signal
    units = Units(tag)
    head = f"{tag.name}  flow from {signal.text} ({in_sentence(signal.key)})"
    lines = [head, *textwrap.wrap(_note(measured), _WIDTH), ""]
    rows = [["", "", *(point.name for point in measured.points)]]
    rows += [_row(measured, key, units, tag.base.name) for key in _keys(measured)]
    if measured.points:
        widths = [max(len(row[at]) for row in rows) for at in range(len(rows[0]))]
        lines += [_line(row, widths) for row in rows]
        lines.append("")
    for finding in measured.findings:
        where = f" at {finding.point}" if finding.point else ""
        lines += textwrap.wrap(f"{finding.level}{where}: {finding.message}", _WIDTH)
    return "\n".join(lines).rstrip() + "\n"


def _note(measured: Measured) -> str:
    key = measured.signal.key
    values = {key for point in measured.points for key in point.values}
    linear = "differential pressure" if "differential_pressure" in values else "flow"
    output = {
        "signal_current": f", output linear in {linear}",
        "signal_current_root": ", output linear in flow (square root extracted)",
    }.get(key, "")
    return f"At the conditions of each operating point, the meter as specified{output}."


def _keys(measured: Measured) -> list[str]:
    known = {key for point in measured.points for key in point.values}
    extra = () if measured.signal.key in _ROWS else (measured.signal.key,)
    return [key for key in (*_ROWS[:5], *extra, *_ROWS[5:]) if key in known]


def _row(measured: Measured, key: str, units: Units, base: str) -> list[str]:
    found = [point.values.get(key) for point in measured.points]
    values = [float(item.value) for item in found if item is not None]
    unit = unit_of(key, values, units)
    cells = [
        "–" if item is None else number(float(item.value), key, kind_of(key), unit)
        for item in found
    ]
    label = term(key).label
    if key == "base_volume_flow":
        label = f"{label}, at {base}"
    return [label, unit_text(unit), *cells]


def _line(row: list[str], widths: list[int]) -> str:
    head = f"{row[0]:<{widths[0]}}  {row[1]:<{widths[1]}}"
    cells = (f"{cell:>{width}}" for cell, width in zip(row[2:], widths[2:], strict=True))
    return "  ".join((head, *cells)).rstrip()


def as_json(tag: Tag, measured: Measured) -> str:
    """Return the same as JSON with SI numbers."""
    signal = measured.signal
    document = {
        "schema": SCHEMA,
        "tag": tag.name,
        "family": tag.family,
        "signal": {"text": signal.text, "key": signal.key, "value": signal.value},
        "points": [
            {"name": point.name, "values": values_data(point.values)} for point in measured.points
        ],
        "findings": [finding_data(finding) for finding in measured.findings],
    }
    return json.dumps(document, indent=2, ensure_ascii=False, allow_nan=False) + "\n"
