"""Evaluation to sheet: the pieces put together."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import replace
from typing import TYPE_CHECKING

from specsheet.fields import KINDS
from specsheet.findings import Origin
from specsheet.sheet import annex, axis, limits, ruler, tables, words
from specsheet.sheet.model import (
    Cell,
    Clauses,
    Detail,
    Request,
    RevisionRow,
    Row,
    Sheet,
    Table,
    citations,
)
from specsheet.sheet.rows import of_entry
from specsheet.sheet.units import Units
from specsheet.sheet.values import Values
from specsheet.tag import Tag

if TYPE_CHECKING:
    from specsheet.evaluate.result import Evaluation

#: lines of the head after tag, service and status
_HEAD = (
    "document",
    "diagram",
    "location",
    "job.client",
    "job.site",
    "job.title",
    "job.number",
    "job.author",
)

#: defaults that say nothing about the meter
_HOUSEKEEPING = ("schema", "job.schema", "job.paper")

STANDING_CAUTION = (
    "This sheet supports a purchase; it does not replace the codes in force at the site. Parts "
    "under pressure, hazardous areas, safety functions and custody transfer are to be confirmed "
    "by a licensed engineer."
)

_CAUTIONS = "cautions"


def build(evaluation: Evaluation, *, annexed: bool = True) -> Sheet:
    """Return the sheet of one evaluated tag. Never raises on user data.

    Args:
        evaluation: the evaluation.
        annexed: False leaves out the calculation annex and the sources that only it cites, for a
            screen that shows neither.
    """
    tag = evaluation.tag
    units = Units(tag)
    units.flow = flow = axis.of(evaluation, units)
    values = Values(evaluation, units)
    points = tables.points(tag)
    others = (*tables.by_point(values), *tables.single(values))
    budget = tables.budget(evaluation)
    checked = limits.limits(evaluation, units, flow)
    findings = tuple(limits.finding(item, units, flow) for item in evaluation.findings)
    workings = annex.build(values) if annexed else ()
    last = tag.revisions[-1] if tag.revisions else None
    every = [
        row for table in (points, *others, *((budget,) if budget else ())) for row in table.rows
    ]
    cited = [*every, *checked, *findings, *workings]
    return Sheet(
        tag=tag.name,
        title=evaluation.profile.title if evaluation.profile else words.from_key(tag.family),
        service=tag.text("service"),
        status=tag.text("status"),
        revision=last.mark if last else "",
        date=last.date if last else None,
        paper=tag.text("job.paper") or "A4",
        confidentiality=tag.text("job.confidentiality"),
        verdict=limits.verdict(evaluation),
        worst=evaluation.worst,
        head=_head(evaluation),
        points=points,
        tables=others,
        ruler=ruler.build(evaluation, units, flow),
        limits=checked,
        budget=budget,
        findings=findings,
        assumptions=_assumptions(tag, (points, *others), budget),
        clauses=_clauses(evaluation),
        cautions=(*_cautions(evaluation), STANDING_CAUTION),
        revisions=_revisions(tag),
        annex=workings,
        sources=_sources(item.source for item in cited),
        reply=_reply(evaluation, units),
        remarks=tag.text("remarks"),
    )


def _sources(cited: Iterable[str]) -> tuple[str, ...]:
    """Return every citation once, in the order of first use."""
    return tuple(dict.fromkeys(one for source in dict.fromkeys(cited) for one in citations(source)))


def _head(evaluation: Evaluation) -> tuple[Detail, ...]:
    tag = evaluation.tag
    lines = [Detail(path, words.label(path), tag.text(path)) for path in _HEAD]
    lines.insert(0, Detail("fluid.name", "Fluid", evaluation.fluid_name))
    return tuple(line for line in lines if line.text)


def _assumptions(tag: Tag, made: Iterable[Table], budget: Table | None) -> tuple[Row, ...]:
    """Return all assumed values: those that stand in a table, then the rest of the defaults."""
    met: dict[str, Row] = {}
    for table in made:
        for row in table.rows:
            if _is_assumed(row) and row.key not in met:
                met[row.key] = _only_assumed(row, row.label)
    site = {"job.atmospheric_pressure"} if tag.quantity("job.altitude") is not None else set()
    for path in tag.assumed:
        silent = path in site or path in _HOUSEKEEPING or not tables.matters(tag, path)
        if path not in met and not silent:
            met[path] = of_entry(tag, path, words.label(path))
    for row in budget.rows if budget else ():
        if _is_assumed(row):
            met[f"budget.{row.key}"] = _only_assumed(row, f"Contribution: {row.label}")
    return tuple(row for row in met.values() if row.origins)


def _is_assumed(row: Row) -> bool:
    """Tell whether any value of a row is assumed."""
    return any(cell.origin is Origin.ASSUMED for cell in row.cells)


def _only_assumed(row: Row, label: str) -> Row:
    """Return a row as one line of the list: its assumed values, each once."""
    texts = dict.fromkeys(cell.text for cell in row.cells if cell.origin is Origin.ASSUMED)
    return replace(row, label=label, cells=(Cell(", ".join(texts), Origin.ASSUMED),))


def _clauses(evaluation: Evaluation) -> tuple[Clauses, ...]:
    principle = evaluation.profile.principle if evaluation.profile else ""
    how = (Clauses("principle", "Principle", (principle,)),) if principle else ()
    return how + tuple(
        Clauses(key, words.capital(key), tuple(sentences))
        for key, sentences in evaluation.notes.items()
        if key.lower() != _CAUTIONS and sentences
    )


def _cautions(evaluation: Evaluation) -> tuple[str, ...]:
    """Return the sentences under the heading of cautions, however it is capitalised."""
    found = (
        item
        for key, items in evaluation.notes.items()
        if key.lower() == _CAUTIONS
        for item in items
    )
    return tuple(dict.fromkeys(found))


def _revisions(tag: Tag) -> tuple[RevisionRow, ...]:
    return tuple(
        RevisionRow(
            item.mark, item.date.isoformat(), item.text, item.by, item.checked, item.approved
        )
        for item in tag.revisions
    )


def _reply(evaluation: Evaluation, units: Units) -> tuple[Request, ...]:
    """Return what a bidder must state, as the family's profile lists it."""
    if evaluation.profile is None:
        return ()
    return tuple(
        Request(
            item.key,
            item.label,
            words.unit(units.pick(item.kind, ())) if item.kind in KINDS else "",
            item.choices,
            item.help,
        )
        for item in evaluation.profile.reply
    )
