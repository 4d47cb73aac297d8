"""What a file may say: the entries of each section, common and of the meter family."""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from dataclasses import dataclass
from functools import cache

from specsheet import packs
from specsheet.fields import COMMON, JOB, REVISION, Entry
from specsheet.quantity.value import Refusal
from specsheet.tag import Value
from specsheet.tagfile.values import from_text


class Keys(dict[str, Entry]):
    """The entries of one section, by key.

    Attributes:
        required: those that every file must state.
    """

    def __init__(self, entries: Iterable[Entry] = ()) -> None:
        super().__init__((entry.key, entry) for entry in entries)
        self.required = tuple(entry for entry in self.values() if entry.needed == "always")


#: of a section in which nothing is known
NO_KEYS = Keys()


@dataclass(frozen=True, slots=True)
class Defaults:
    """What is assumed where nothing is stated: path -> value, and path -> why it is unusable."""

    values: Mapping[str, Value]
    refused: Mapping[str, str]


@cache
def family_entries(family: str) -> tuple[Entry, ...]:
    """Return the entries of ``[meter]``; none for an unknown family."""
    return packs.profile(family).entries if family in packs.family_keys() else ()


@cache
def tag_sections(family: str) -> Mapping[str, Keys]:
    """Return section -> key -> entry of a tag file ("" is the top of the file)."""
    return _sections((*COMMON, *family_entries(family), *REVISION))


@cache
def job_sections() -> Mapping[str, Keys]:
    """Return section -> key -> entry of ``job.toml``: "job" is its top, "job.base" its [base]."""
    return _sections(JOB)


@cache
def tag_defaults(family: str) -> Defaults:
    """Return what is assumed of a tag of that family."""
    return _defaults((*COMMON, *family_entries(family)))


@cache
def job_defaults() -> Defaults:
    """Return what is assumed of a job."""
    return _defaults(JOB)


def _sections(entries: Iterable[Entry]) -> Mapping[str, Keys]:
    found: dict[str, list[Entry]] = {}
    for entry in entries:
        found.setdefault(entry.section, []).append(entry)
    return {section: Keys(group) for section, group in found.items()}


def _defaults(entries: Iterable[Entry]) -> Defaults:
    values: dict[str, Value] = {}
    refused: dict[str, str] = {}
    for entry in entries:
        if not entry.default:
            continue
        value = from_text(entry, entry.default)
        if isinstance(value, Refusal):
            refused[entry.path] = value.message
        else:
            values[entry.path] = value
    return Defaults(values, refused)
