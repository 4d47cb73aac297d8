"""The glossary agrees with itself and with the unit table, for the common entries and terms."""

from __future__ import annotations

import datetime
import tomllib
from collections import Counter

import pytest

from specsheet.fields import COMMON, JOB, KINDS, PLAIN_KINDS, REVISION, SECTIONS, TERMS, Entry
from specsheet.packs import family_keys, profile
from specsheet.quantity import Refusal, from_si, kinds_of, parse, parse_size, parse_straight, units

FAMILY = tuple(
    entry for key in family_keys() for entry in (*profile(key).entries, *profile(key).reply)
)
ENTRIES = (*COMMON, *REVISION, *JOB, *FAMILY)


def _named(entry: Entry) -> str:
    return entry.path


def _problem(entry: Entry, text: str) -> str:
    """Return why a text is no value of an entry, or "" when it is one."""
    if text in entry.words:
        return ""
    readers = {"nominal_size": parse_size, "straight_length": parse_straight}
    if entry.kind in KINDS:
        read: object = parse(text, entry.kind)
    elif entry.kind in readers:
        read = readers[entry.kind](text)
    else:
        return _plain_problem(entry, text)
    return read.message if isinstance(read, Refusal) else ""


def _plain_problem(entry: Entry, text: str) -> str:
    """Judge a kind that is no quantity: a choice, or a value of TOML."""
    if entry.kind == "choice":
        return "" if text in entry.choices else f"{text} is none of {entry.choices}"
    if entry.kind == "text":
        return ""
    expected = {
        "boolean": bool,
        "integer": int,
        "date": datetime.date,
        "list": list,
        "fractions": dict,
        "units": dict,
    }[entry.kind]
    value = tomllib.loads(f"value = {text}")["value"]
    if type(value) is not expected:
        return f"{text} is no {entry.kind}"
    if entry.kind == "units":
        wrong = [unit for kind, unit in value.items() if kind not in kinds_of(unit)]
        return f"{wrong} are no units" if wrong else ""
    return ""


@pytest.mark.parametrize("entry", ENTRIES, ids=_named)
def test_kind_of_entry_exists(entry: Entry) -> None:
    assert entry.kind in KINDS or entry.kind in PLAIN_KINDS


@pytest.mark.parametrize("entry", [entry for entry in ENTRIES if entry.example], ids=_named)
def test_example_is_read(entry: Entry) -> None:
    assert _problem(entry, entry.example) == ""


@pytest.mark.parametrize("entry", [entry for entry in ENTRIES if entry.default], ids=_named)
def test_default_is_read(entry: Entry) -> None:
    assert _problem(entry, entry.default) == ""


@pytest.mark.parametrize("entry", ENTRIES, ids=_named)
def test_every_quantity_has_an_example(entry: Entry) -> None:
    assert entry.example or entry.kind in ("text", "choice")


@pytest.mark.parametrize("entry", ENTRIES, ids=_named)
def test_choices_belong_to_a_choice(entry: Entry) -> None:
    assert bool(entry.choices) == (entry.kind == "choice")
    assert len(entry.choices) == len(set(entry.choices))


@pytest.mark.parametrize("entry", ENTRIES, ids=_named)
def test_entry_is_explained(entry: Entry) -> None:
    assert entry.label
    assert entry.help.endswith(".")


def _twice(words: list[tuple[str, str]]) -> list[tuple[str, str]]:
    return [word for word, times in Counter(words).items() if times > 1]


@pytest.mark.parametrize(
    "entries",
    [
        (*COMMON, *REVISION, *JOB),
        *(profile(key).entries for key in family_keys()),
        *(profile(key).reply for key in family_keys()),
    ],
    ids=["common", *(f"{key} {part}" for part in ("entries", "reply") for key in family_keys())],
)
def test_paths_and_labels_are_unique(entries: tuple[Entry, ...]) -> None:
    assert _twice([("", entry.path) for entry in entries]) == []
    assert _twice([(entry.section, entry.label) for entry in entries]) == []


def test_every_section_is_known() -> None:
    sections = {section.key for section in SECTIONS} | {"job", "job.base"}
    assert {entry.section for entry in (*COMMON, *REVISION, *JOB)} <= sections


@pytest.mark.parametrize("key", TERMS)
def test_term_is_of_a_known_kind_and_unit(key: str) -> None:
    term = TERMS[key]
    assert term.key == key
    assert term.label
    if term.kind != "text":
        assert not KINDS[term.kind].members
        from_si(1.0, term.kind, term.shown)  # KeyError where the unit table lacks the unit


def test_labels_of_terms_and_kinds_are_unique() -> None:
    labels = [("", term.label) for term in TERMS.values()]
    assert _twice(labels) == []
    assert _twice([("", kind.label) for kind in KINDS.values()]) == []


@pytest.mark.parametrize("key", KINDS)
def test_units_of_kind_are_in_the_unit_table(key: str) -> None:
    kind = KINDS[key]
    assert kind.key == key
    assert all(member in KINDS and not KINDS[member].members for member in kind.members)
    if not kind.members:
        assert kind.shown in units(key)
        from_si(1.0, key, kind.shown)
