"""Why a text is refused, in one sentence: what was wanted, what came, what to write instead.

Off the hot path: this module is imported when the first text is refused.
"""

from __future__ import annotations

import re
import unicodedata
from collections.abc import Callable, Iterable

from specsheet.fields import KINDS
from specsheet.quantity.advice import ADVICE
from specsheet.quantity.limits import SMALLEST, bounds
from specsheet.quantity.mend import mend
from specsheet.quantity.parse import LONGEST, QUANTITY, read
from specsheet.quantity.table import SPELLINGS, find, fold, from_si, kinds_of, to_si, units
from specsheet.quantity.unit import Unit
from specsheet.quantity.value import Refusal
from specsheet.quantity.wording import join, quoted, refusal

#: why a spelling is no unit of the kind, and the units that may have been meant
_Problem = tuple[str, tuple[str, ...]]
_Rule = Callable[[str, str], _Problem | None]

#: how many bad habits in one text are mended, one after the other
_HABITS = 3

_REFERRED = re.compile(r"(.*)\(([ga])\)")


def refuse(text: str, kind: str, echo: str) -> Refusal:
    """Return the refusal of a text that :func:`specsheet.quantity.parse` does not accept.

    Args:
        text: the text with its look-alike characters made plain.
        kind: the kind wanted.
        echo: the text as it is echoed.
    """
    why, offers = _reason(text, kind)
    write = tuple(dict.fromkeys(_accepted(offers, kind, _HABITS)))
    return refusal(label(kind), echo, why, write)


def label(kind: str) -> str:
    """Return the words for a kind, without what stands behind a colon."""
    return KINDS[kind].label.partition(":")[0]


def _accepted(offers: Iterable[str], kind: str, depth: int) -> list[str]:
    """Return the offers that are read; for one that is not, what it is mended to."""
    texts: list[str] = []
    for offer in offers:
        if read(offer, kind, offer) is not None:
            texts.append(offer)
        elif depth:
            texts.extend(_accepted(_reason(offer, kind)[1], kind, depth - 1))
    return texts


def _reason(text: str, kind: str) -> _Problem:
    if len(text) > LONGEST:
        return f"it is longer than {LONGEST} characters", ()
    match = QUANTITY.fullmatch(text)
    if match is None:
        habit = mend(text)
        return habit if habit is not None else (_no_number(text, kind), ())
    number, spaced, joined = match.groups()
    spelling = spaced or joined or ""
    unit = find(kind, spelling)
    if unit is not None:
        return _out_of_bounds(number, unit), _vacuum(number, unit)
    if not spelling:
        return _missing_unit(number, kind)
    found = _first((_gauge_or_absolute, _advised, _of_another_kind, _case), spelling, kind)
    if found is None and (habit := mend(text)) is not None:
        return habit
    why, names = found or _nearest(spelling, kind)
    return why, tuple(f"{number} {name}" for name in names)


def _no_number(text: str, kind: str) -> str:
    if kinds_of(text):
        return f"the number before {text} is missing"
    example = f"20 {units(kind)[0]}" if kind != "dimensionless" else "20"
    return (
        f'a number{" and its unit" if kind != "dimensionless" else ""} is read, such as "{example}"'
    )


def _missing_unit(number: str, kind: str) -> _Problem:
    if kind == "ratio":
        hundredfold = f"{float(number) * 100:.12g}"
        offers = (f"{number} %", f"{hundredfold} %")
        why = "a bare number can be a fraction or a percentage"
        return why, offers if abs(float(number)) <= 1 else offers[:1]
    members = KINDS[kind].members or (kind,)
    return "the unit is missing", tuple(f"{number} {KINDS[member].shown}" for member in members)


def _out_of_bounds(number: str, unit: Unit) -> str:
    typed = float(number)
    value = to_si(typed, unit.kind, unit.name)
    low, high = bounds(unit.kind)
    if value > high:
        return f"the greatest value read is {_limit(high, unit)}"
    if typed != 0.0 and abs(value) < SMALLEST and not unit.offset:
        return "the number is too small to be read"
    if typed == 0.0 and low <= value:
        return "the number is too small to be read"
    if unit.kind == "temperature":
        return f"it must be above absolute zero, {_limit(0.0, unit)}"
    if low == SMALLEST:
        return "it must be above zero"
    if unit.kind == "pressure_absolute":
        return "an absolute pressure is not below zero"
    if unit.kind == "pressure_gauge":
        return f"a full vacuum is about {_limit(-101325.0, unit)}"
    return f"the least value is {_limit(low, unit)}"


def _vacuum(number: str, unit: Unit) -> tuple[str, ...]:
    """Offer a negative absolute pressure as a gauge pressure, which it must be."""
    if unit.kind != "pressure_absolute" or float(number) >= 0.0:
        return ()
    return (f"{number} {unit.name.removesuffix('(a)')}(g)",)


def _limit(value: float, unit: Unit) -> str:
    return f"{from_si(value, unit.kind, unit.name):.6g} {unit.name}"


def _first(rules: Iterable[_Rule], spelling: str, kind: str) -> _Problem | None:
    """Return what the first rule that applies to a spelling finds."""
    for rule in rules:
        found = rule(spelling, kind)
        if found is not None:
            return found
    return None


def _gauge_or_absolute(spelling: str, kind: str) -> _Problem | None:
    if kind == "pressure_difference":
        referred = find("pressure", spelling)
        if referred is None:
            return None
        why = "a difference of pressure is neither gauge nor absolute"
        return why, (referred.name[: -len("(g)")],)
    step = find("pressure_difference", spelling)
    if step is None or not units(kind)[0].startswith("bar("):
        return None
    why = "it must say whether it is gauge (g) or absolute (a)"
    return why, tuple(name for name in (f"{step.name}(g)", f"{step.name}(a)") if find(kind, name))


def _advised(spelling: str, kind: str) -> _Problem | None:
    folded = fold(spelling)
    referred = _REFERRED.fullmatch(folded)
    stem, letter = (referred[1], f"({referred[2]})") if referred else (folded, "")
    advice = ADVICE.get(stem.casefold().replace(" ", ""))
    if advice is None:
        return None
    endings = (letter,) if letter else ("", "(g)", "(a)")
    names = tuple(
        f"{name}{ending}"
        for name in advice.units
        for ending in endings
        if find(kind, name + ending)
    )
    if names or advice.kind == kind:
        return f"the unit {spelling} {advice.why}", names
    return None


def _of_another_kind(spelling: str, kind: str) -> _Problem | None:
    others = kinds_of(spelling)
    if not others:
        return None
    labels = join(dict.fromkeys(label(other) for other in others))
    return f"{spelling} is the unit of {labels}; {_list(kind)}", ()


def _case(spelling: str, kind: str) -> _Problem | None:
    folded = fold(spelling).casefold()
    tables = [SPELLINGS[kind]]
    if units(kind)[0].startswith("bar("):
        tables.append(SPELLINGS["pressure_difference"])
    names = dict.fromkeys(
        unit.name for table in tables for text, unit in table.items() if text.casefold() == folded
    )
    if not names:
        return None
    return "capital and small letters differ in a unit", tuple(names)


def _nearest(spelling: str, kind: str) -> _Problem:
    from difflib import get_close_matches

    known = SPELLINGS[kind]
    close = get_close_matches(fold(spelling), known, n=3, cutoff=0.6)
    return _unknown(spelling, kind), tuple(dict.fromkeys(known[text].name for text in close))


def _unknown(spelling: str, kind: str) -> str:
    foreign = next((character for character in spelling if not character.isascii()), "")
    if foreign:
        name = unicodedata.name(foreign, "a character without a name").lower()
        return f"the unit {quoted(spelling)} holds {quoted(foreign)}, {name}; {_list(kind)}"
    return f"the unit {quoted(spelling)} is not known; {_list(kind)}"


def _list(kind: str) -> str:
    if kind == "dimensionless":
        return "no unit is read"
    members = KINDS[kind].members or (kind,)
    each = 8 if len(members) == 1 else 3
    names = [name for member in members for name in units(member)[:each]]
    return f"units read are {', '.join(names)}" + (" ..." if len(names) < len(units(kind)) else "")
