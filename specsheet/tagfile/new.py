"""The text a new tag starts from, rendered from the glossary and the profile of its family."""

from __future__ import annotations

import textwrap
from collections.abc import Iterable

from specsheet import packs
from specsheet.fields import COMMON, KINDS, SECTIONS, Entry, Section
from specsheet.tagfile.literal import value_text
from specsheet.tagfile.migrate import CURRENT

_WIDTH = 100
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
        f"{shown}: {title}. Fill in what is blank; take the # away from what you want to state. "
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
        value = fixed.get(entry.path)
        if value is None and entry.path == "points.name":
            value = '"normal"'
        if value is None and (entry.needed == "always" or entry.path in _USUAL):
            value = '""'
        if entry.path in fixed:
            yield f"{entry.key} = {value}\n"
        elif value is not None:
            yield _comment(_told(entry)) + f"{entry.key} = {value}\n"
        else:
            yield _comment(_told(entry)) + f"# {entry.key} = {_example(entry)}\n"


def _told(entry: Entry) -> str:
    """Return the help of an entry with all a user must know to fill it in."""
    parts = [f"{entry.label}: {entry.help[:1].lower()}{entry.help[1:]}"]
    if entry.needed and entry.needed != "always":
        parts.append(f"Needed {entry.needed}.")
    if entry.choices:
        parts.append(f"One of: {', '.join(entry.choices)}.")
    elif entry.kind in KINDS or entry.kind == "nominal_size":
        parts.append(f'For example "{entry.example}".' if entry.example else "")
    if entry.words:
        parts.append("Or: " + ", ".join(f'"{word}"' for word in entry.words) + ".")
    if entry.default:
        parts.append(f'If left out, "{entry.default}" is assumed.')
    return " ".join(part for part in parts if part)


def _example(entry: Entry) -> str:
    if entry.kind in _BARE_KINDS:
        return entry.example or "[]"
    return value_text(entry.example or entry.default)


def _comment(text: str) -> str:
    lines = textwrap.wrap(
        text,
        _WIDTH,
        initial_indent="# ",
        subsequent_indent="#   ",
        break_on_hyphens=False,
    )
    return "".join(f"{line}\n" for line in lines)
