"""Tag file -> typed tag, with every problem listed.

A problem with one entry never costs the rest: the tag is built from what could be read, so that
a form can open a damaged file and show it. Only a file that is no TOML, or that a newer version
wrote, gives no tag.
"""

from __future__ import annotations

from collections.abc import Mapping
from datetime import date
from pathlib import Path
from typing import Any

from specsheet import packs
from specsheet.fields import REVISION, SECTIONS
from specsheet.tag import Point, Revision, Tag, Value
from specsheet.tagfile.collect import Collector, blank, needed_message
from specsheet.tagfile.jobfile import NO_JOB, Job, find_job
from specsheet.tagfile.known import NO_KEYS, job_defaults, tag_defaults, tag_sections
from specsheet.tagfile.migrate import CURRENT, migrate
from specsheet.tagfile.problem import Problem, Reading
from specsheet.tagfile.source import BOM, objection, read_text
from specsheet.tagfile.syntax import newer, parse, schema_of
from specsheet.tagfile.words import came, did_you_mean

_SECTION_KEYS = tuple(section.key for section in SECTIONS if section.key)
_TABLES = ("fluid", "line", "design", "require", "meter")
_REVISION_KEYS = tuple(entry.key for entry in REVISION)

#: the one entry without which a fluid of that kind means nothing
_ESSENTIAL = {"substance": "substance", "mixture": "mixture", "solution": "solute"}


def load(path: str | Path, job: Job | None = None) -> Reading:
    """Read a tag file.

    Args:
        path: the file.
        job: the job it belongs to, where the caller has read it already (and reports its
            problems); else ``job.toml`` is looked for in the folder of the file and the folder
            above, and its problems are added to the tag's.

    Returns:
        The reading. Nothing that stands at ``path`` raises.
    """
    text = read_text(path)
    found = find_job(path) if job is None else job
    reading = Reading(None, (text,)) if isinstance(text, Problem) else loads(text, str(path), found)
    if job is not None or not found.problems:
        return reading
    return Reading(reading.tag, (*reading.problems, *found.problems), reading.schema)


def loads(text: str, path: str = "", job: Job | None = None) -> Reading:
    """Read the text of a tag file; ``path`` is only its name in messages and in the tag."""
    refused = objection(text, path)
    if refused:
        return Reading(None, (refused,))
    text = text.removeprefix(BOM)
    data = parse(text, path)
    if isinstance(data, Problem):
        return Reading(None, (data,))
    schema = schema_of(data)
    if schema > CURRENT:
        return Reading(None, (newer(text, path, schema),), schema)
    return _read(migrate(data, schema), text, path, NO_JOB if job is None else job, schema)


def _read(data: dict[str, Any], text: str, path: str, job: Job, schema: int) -> Reading:
    family = data.get("family")
    family = family if isinstance(family, str) else ""
    sections = tag_sections(family)
    collector = Collector(text, path, sections)
    _check_schema(data, collector)
    known = _check_family(family, collector)
    given: dict[str, Value] = dict(collector.table(data, sections[""], beside=_SECTION_KEYS))
    for section in _TABLES:
        if section == "meter" and not known:
            continue  # what may stand there is not known
        raw = data.get(section, {})
        values = collector.table(
            raw, sections.get(section, NO_KEYS), place=(section,), field=section
        )
        given.update((f"{section}.{key}", value) for key, value in values.items())
    _check_fluid(data.get("fluid"), given, collector, sections)
    points = _points(data.get("points"), collector, sections)
    revisions = _revisions(data.get("revisions", []), collector, sections)
    given.update(job.given)
    assumed = _assumed(family, given, collector)
    problems = collector.problems()
    unused = (*_unused("", problems), *_unused("job.", job.problems))
    tag = Tag(given, assumed, points, revisions, path, job.folder, unused)
    return Reading(tag, problems, schema)


def _unused(prefix: str, problems: tuple[Problem, ...]) -> tuple[tuple[str, str], ...]:
    """Return path and message of each problem about something that stands in the file."""
    return tuple((prefix + item.field, item.message) for item in problems if not item.lacking)


def _check_schema(data: Mapping[str, Any], collector: Collector) -> None:
    schema = data.get("schema", CURRENT)
    if isinstance(schema, int) and not isinstance(schema, bool) and schema < 0:
        message = f"there is no schema {schema}; write schema = {CURRENT}"
        collector.add(("schema",), "schema", message)


def _check_family(family: str, collector: Collector) -> bool:
    if not family.strip():
        return False  # reported as missing, or as no text
    if family in packs.family_keys():
        return True
    hint = did_you_mean(family, packs.family_keys())
    collector.add(("family",), "family", f"{came(family)} is no meter family; {hint}")
    return False


def _check_fluid(
    raw: object, given: Mapping[str, Value], collector: Collector, sections: Any
) -> None:
    key = _ESSENTIAL.get(str(given.get("fluid.kind")))
    if key and isinstance(raw, dict) and blank(raw.get(key, "")):
        message = needed_message(sections["fluid"][key])
        collector.add(("fluid",), f"fluid.{key}", message, lacking=True)


def _points(raw: object, collector: Collector, sections: Any) -> tuple[Point, ...]:
    keys = sections["points"]
    if raw is None or raw == []:
        message = (
            "at least one operating point is wanted; write [[points]] and below it "
            'name = "normal", flow, pressure and temperature'
        )
        collector.add(("points",), "points", message, lacking=True)
        return ()
    if not isinstance(raw, list):
        message = f"operating points were wanted, {came(raw)} came; write [[points]] (two brackets)"
        collector.add(("points",), "points", message)
        return ()
    points: list[Point] = []
    for index, item in enumerate(raw):
        place = ("points", index)
        name = point_name(item, index)
        if any(name == point.name for point in points):
            message = f'another point is named "{name}" already; give each its own name'
            collector.add((*place, "name"), f"points.{name}.name", message)
        values = collector.table(item, keys, place=place, field=f"points.{name}")
        points.append(Point(name, {key: v for key, v in values.items() if key != "name"}))
    return tuple(points)


def point_name(item: object, index: int) -> str:
    """Return the name of a point; one without a name goes by its number."""
    name = item.get("name") if isinstance(item, dict) else None
    return name if isinstance(name, str) and name.strip() else str(index + 1)


def _revisions(raw: object, collector: Collector, sections: Any) -> tuple[Revision, ...]:
    if not isinstance(raw, list):
        message = f"revisions were wanted, {came(raw)} came; write [[revisions]] (two brackets)"
        collector.add(("revisions",), "revisions", message)
        return ()
    found: list[Revision] = []
    for index, item in enumerate(raw):
        values = collector.table(
            item,
            sections["revisions"],
            place=("revisions", index),
            field=f"revisions.{index + 1}",
        )
        day = values.get("date")
        if isinstance(day, date) and "mark" in values:
            texts = {key: str(values.get(key, "")) for key in _REVISION_KEYS if key != "date"}
            found.append(Revision(date=day, **texts))
    return tuple(found)


def _assumed(family: str, given: Mapping[str, Value], collector: Collector) -> dict[str, Value]:
    assumed: dict[str, Value] = {}
    for defaults in (tag_defaults(family), job_defaults()):
        assumed.update(item for item in defaults.values.items() if item[0] not in given)
        for path, message in defaults.refused.items():
            collector.add((), path, f"the default of the data pack is unusable: {message}")
    return assumed
