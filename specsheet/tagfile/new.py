"""The text a new tag starts from, rendered from the glossary and the profile of its family."""

from __future__ import annotations

import re
import textwrap
from collections.abc import Iterable

from specsheet import packs
from specsheet.fields import COMMON, SECTIONS, Entry, Section
from specsheet.tagfile.literal import value_text
from specsheet.tagfile.migrate import CURRENT

_WIDTH = 100
_COLUMN = 40  # of the help beside an entry
_GLUE = "\x1f"  # stands for a space inside quotes while lines are broken
_QUOTED = re.compile(r'"[^"]*"')
_BARE_KINDS = ("boolean", "integer", "date", "list", "fractions", "units")

#: what a new file holds besides the entries that every file must state
_USUAL = ("fluid.substance", "line.size", "points.pressure", "points.temperature")


def new_text(tag: str, family: str) -> str:
    """Return a commented starting file for a tag of a family.

    What must be stated is there and blank, to be filled in; everything else is there behind a
    "#", with its help, an example and its choices.

    Raises:
        KeyError: there is no such family.
    """
    profile = packs.profile(family)
    entries = (*COMMON, *profile.entries)
    fixed = {"schema": str(CURRENT), "tag": value_text(tag), "family": value_text(family)}
    blocks = [_head(tag, profile.title)]
    for section in SECTIONS:
        if section.key == "revisions":
            continue  # the first revision is added when the document is issued
        own = [entry for entry in entries if entry.section == section.key]
        blocks.append(_section(section, own, fixed))
    return "\n".join(block for block in blocks if block)


def _head(tag: str, title: str) -> str:
    shown = tag if tag.isprintable() else "new tag"
    return _comment(
        f"{shown}: {title}. Fill in what is blank; take the # away from what you want to "
        "state. "
        'Quantities are written as number and unit, in quotes: "3.1 t/h", "7 bar(g)", "185 degC".'
    )


def _section(section: Section, entries: list[Entry], fixed: dict[str, str]) -> str:
    if not entries:
        return ""
    header = {"": "", "points": "[[points]]\n"}.get(section.key, f"[{section.key}]\n")
    title = _comment(f"{section.title}. {section.help}") if section.key else ""
    if section.key == "points":
        title += _comment("Write one [[points]] for each case: minimum, normal, maximum ...")
    return title + header + "".join(_lines(entries, fixed))


def _lines(entries: Iterable[Entry], fixed: dict[str, str]) -> Iterable[str]:
    for entry in entries:
        if entry.path in fixed:
            yield f"{entry.key} = {fixed[entry.path]}\n"
        elif entry.path == "points.name":
            yield _comment(_told(entry)) + f'{entry.key} = "normal"\n'
        elif entry.needed == "always" or entry.path in _USUAL:
            yield _comment(f"{_told(entry)} {_examples(entry)}") + f'{entry.key} = ""\n'
        else:
            yield _offered(entry)


def _offered(entry: Entry) -> str:
    """Return an entry behind a "#", its help on the same line where that fits, else above."""
    line = f"# {entry.key} = {_example(entry)}"
    beside = f"{line:{_COLUMN}}  # {_told(entry)}"
    return f"{beside}\n" if len(beside) <= _WIDTH else _comment(_told(entry)) + f"{line}\n"


def _told(entry: Entry) -> str:
    """Return the help of an entry with all a user must know to fill it in."""
    parts = [f"{entry.label}. {entry.help}"]
    if entry.needed and entry.needed != "always":
        parts.append(f"Needed {entry.needed}.")
    if entry.choices:
        parts.append(f"One of: {', '.join(entry.choices)}.")
    if entry.words:
        parts.append("Or: " + ", ".join(f'"{word}"' for word in entry.words) + ".")
    if entry.default and entry.default not in entry.words:
        parts.append(f"Assumed if left out: {entry.default}.")
    return " ".join(parts)


def _examples(entry: Entry) -> str:
    """Return the example of a blank entry; its choices are examples enough."""
    return "" if entry.choices or not entry.example else f'For example "{entry.example}".'


def _example(entry: Entry) -> str:
    if entry.kind in _BARE_KINDS:
        return entry.example or "[]"
    return value_text(entry.example or entry.default)


def _comment(text: str) -> str:
    kept = _QUOTED.sub(lambda match: match[0].replace(" ", _GLUE), text)
    lines = textwrap.wrap(
        kept,
        _WIDTH,
        initial_indent="# ",
        subsequent_indent="#   ",
        break_on_hyphens=False,
    )
    return "".join(f"{line}\n" for line in lines).replace(_GLUE, " ")
