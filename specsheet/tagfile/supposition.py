"""What if an entry read otherwise: a text with other values, read like any other text."""

from __future__ import annotations

from collections.abc import Iterable

from specsheet.fields import SECTIONS
from specsheet.tagfile.document import Document, EditError
from specsheet.tagfile.jobfile import Job
from specsheet.tagfile.known import tag_sections
from specsheet.tagfile.leaf import entry_of
from specsheet.tagfile.problem import Reading
from specsheet.tagfile.read import loads
from specsheet.tagfile.words import did_you_mean, listed, printable

#: path of an entry and the text it is to hold; "" for nothing
Change = tuple[str, str]


def suppose(
    text: str, changes: Iterable[Change], path: str = "", job: Job | None = None
) -> Reading:
    """Return the reading of a text in which some entries hold other values.

    Args:
        text: the tag file.
        changes: the entries to change, in order ("points.maximum.flow", "140 m3/h").
        path, job: as in :func:`~specsheet.tagfile.read.loads`.

    Raises:
        EditError: the text is no TOML, a path names no entry or point, or a value is refused.
    """
    document = Document(text)
    for entry, value in changes:
        _change(document, entry, value)
    before = {(item.field, item.message) for item in loads(text, path, job).problems}
    reading = loads(document.text(), path, job)
    for problem in reading.problems:
        if (problem.field, problem.message) not in before:
            raise EditError(f"{problem.field}: {problem.message}")
    return reading


def _change(document: Document, path: str, value: str) -> None:
    family = document.get_text("family")
    section = path.split(".")[0]
    if section == "job":
        raise EditError(
            f"{printable(path)}: stands in job.toml, not in a tag file; change it there"
        )
    if entry_of(path, family) is None or (section == "points" and path.count(".") < 2):
        raise EditError(
            f"{printable(path)}: there is no such entry; {_hint(document, path, family)}"
        )
    try:
        document.set(path, value)
    except KeyError:
        names = listed(document.point_names())
        raise EditError(
            f"{printable(path)}: there is no such operating point; known: {names}"
        ) from None


def _hint(document: Document, path: str, family: str) -> str:
    """Return what was meant, or what there is."""
    sections = tag_sections(family)
    section = path.rpartition(".")[0]
    if section == "meter" and section not in sections:
        return f"the family {family or '(none stated)'} takes nothing under [meter]"
    if section == "points" or section.startswith("points."):
        point = section.partition(".")[2] or next(iter(document.point_names()), "normal")
        return did_you_mean(path, (f"points.{point}.{name}" for name in sections["points"]))
    if section in sections:
        prefix = f"{section}." if section else ""
        return did_you_mean(path, (f"{prefix}{name}" for name in sections[section]))
    return did_you_mean(section, (item.key for item in SECTIONS if item.key))
