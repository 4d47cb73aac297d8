"""What a parsed quantity is, and what a refused one is."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Base:
    """A base (reference) condition that a gas volume is stated at.

    Attributes:
        name: words for it ("0 °C, 101.325 kPa (DIN 1343)").
        temperature: [K]
        pressure: [Pa], absolute
    """

    name: str
    temperature: float
    pressure: float


@dataclass(frozen=True, slots=True)
class Quantity:
    """A quantity as the user typed it, with its value in SI.

    Attributes:
        value: in the SI unit of its kind (:data:`specsheet.fields.KINDS`). A gauge pressure stays
            a difference to the atmosphere: :meth:`specsheet.tag.Tag.absolute` adds the rest.
        kind: key of its kind; never a union ("pressure_gauge", not "pressure").
        unit: the unit typed, in its canonical spelling.
        text: what was typed, as it is echoed.
        base: the base condition of a base volume flow; None for the job's own (unit m3/h(base))
            and for every other kind.
    """

    value: float
    kind: str
    unit: str
    text: str
    base: Base | None = None


@dataclass(frozen=True, slots=True)
class Refusal:
    """A text that is no acceptable quantity: what was wanted, what came, what to write instead."""

    message: str
