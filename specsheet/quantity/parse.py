"""Text to quantity: the strict grammar, on the path of every key pressed in the form.

    quantity = number [ " " ] unit        "3.1 t/h"   "-10 degC"   "7 bar(g)"   "1e-6 m2/s"
    number   = [ sign ] digits [ "." digits ] [ "e" [ sign ] digits ]
    unit     = a spelling of the unit table for the kind wanted

A unit that begins with a figure (1/kWh) needs the space. A plain number takes no unit
("1.31"); a ratio always takes one ("1.5 %", "80 ppm", "0.3 kg/kg"), because a bare 0.5 can mean
50 % or 0.5 %. A temperature difference is stated in K, degC or degF: the kind of the entry tells
it from a temperature. The point is the only decimal mark; everything else is refused with the
text to write instead (:mod:`specsheet.quantity.refuse`).
"""

from __future__ import annotations

import re

from specsheet.quantity.limits import SMALLEST, bounds
from specsheet.quantity.lookalike import plain, tidy
from specsheet.quantity.table import SPELLINGS, find
from specsheet.quantity.unit import Unit
from specsheet.quantity.value import Quantity, Refusal

NUMBER = r"[+-]?(?:[0-9]+(?:\.[0-9]+)?|\.[0-9]+)(?:[eE][+-]?[0-9]+)?"
QUANTITY = re.compile(rf"({NUMBER})(?:\s+(\S.*)|([A-Za-z%\"].*))?")
LONGEST = 200


def parse(text: str, kind: str) -> Quantity | Refusal:
    """Read a text as a quantity of a kind, or of one member of a union.

    Args:
        text: what the user typed.
        kind: key of :data:`specsheet.fields.KINDS` ("length", "flow").

    Raises:
        KeyError: there is no such kind (a mistake of ours, not of the user).
    """
    echo = tidy(text)
    ready = plain(echo)
    found = read(ready, kind, echo)
    if found is not None:
        return found
    # Imported here because most texts are accepted and start-up pays for every module.
    from specsheet.quantity.refuse import refuse

    return refuse(ready, kind, echo)


def read(text: str, kind: str, echo: str) -> Quantity | None:
    """Return the quantity of a text whose characters are plain already, or None."""
    known = SPELLINGS[kind]
    match = QUANTITY.fullmatch(text) if len(text) <= LONGEST else None
    if match is None:
        return None
    number, spaced, joined = match.groups()
    spelling = spaced or joined or ""
    unit = known.get(spelling) or find(kind, spelling)
    if unit is None or (value := _value(number, unit)) is None:
        return None
    return Quantity(value, unit.kind, unit.name, echo, unit.base)


def _value(number: str, unit: Unit) -> float | None:
    """Return the SI value, or None where no value of the kind can be that low, high or tiny."""
    typed = float(number)
    value = (typed + unit.offset) * unit.factor
    low, high = bounds(unit.kind)
    if not low <= value <= high:
        return None
    if -SMALLEST < value < SMALLEST and _is_tiny(number, typed, unit):
        return None
    return value + 0.0  # -0 becomes 0


def _is_tiny(number: str, typed: float, unit: Unit) -> bool:
    """Tell whether a number other than zero would be lost by underflow, or nearly so."""
    if unit.offset:
        return False
    return typed != 0.0 or bool(re.search("[1-9]", re.split("[eE]", number)[0]))
