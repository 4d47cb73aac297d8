"""Findings: what is wrong with a tag, how bad it is, and by what margin.

A finding is data, never an exception: user input that cannot be used, or a limit that does not
hold, travels beside the values to every front end.
"""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum


class Level(StrEnum):
    """How bad a finding is."""

    STOP = "stop"  # do not buy this
    CAUTION = "caution"  # someone must decide
    NOTE = "note"  # for information


class Origin(StrEnum):
    """Where a value comes from; printed on every row of every output."""

    GIVEN = "given"  # typed by the user
    DERIVED = "derived"  # computed by a published method
    ASSUMED = "assumed"  # a default nobody typed
    TYPICAL = "typical"  # usual for the family, for the bidder to confirm


@dataclass(frozen=True, slots=True)
class Given:
    """A value to print, with its origin.

    Attributes:
        value: SI number, or text.
        origin: given, derived, assumed or typical.
        source: citation, or "".
    """

    value: float | str
    origin: Origin
    source: str = ""


@dataclass(frozen=True, slots=True)
class Reserve:
    """By how much one driver can change before a verdict changes.

    Attributes:
        driver: glossary key of what changes ("mass_flow", "temperature", "pressure", ...).
        at: value of the driver at which the verdict flips [SI unit of the driver].
        fraction: (at - present) / present, signed [-]; for a temperature, the difference in kelvin
            divided by the present absolute temperature.
    """

    driver: str
    at: float
    fraction: float

    @property
    def change(self) -> float:
        """By how much the driver can change [SI unit of the driver]."""
        present = 0.0 if self.fraction == -1.0 else self.at / (1.0 + self.fraction)
        return self.at - present


@dataclass(frozen=True, slots=True)
class Finding:
    """One thing to say about a tag.

    Attributes:
        level: stop, caution or note.
        code: short stable name for scripts, words joined by hyphens ("velocity-high").
        field: path of the entry it is about ("points.minimum.flow", "meter.bore"), or "".
        message: one or two sentences: what was wanted, what came, how to mend it.
        point: name of the operating point, or "".
        source: citation of the limit or method, or "".
        reserve: margin to the flip of the verdict, where one driver decides.
    """

    level: Level
    code: str
    field: str
    message: str
    point: str = ""
    source: str = ""
    reserve: Reserve | None = None


@dataclass(frozen=True, slots=True)
class Limit:
    """A limit of use, of the element as sized or of the line.

    Attributes:
        key: glossary key bounded: a value of ``at``, of the stream, or of the element.
        low, high: bounds (SI), None where there is none.
        level: level of the finding when it does not hold.
        code: code of the finding.
        message: what crossing it means and how to mend it.
        source: citation.
        phase: "liquid", "gas" or "" for both.
        driver: glossary key of what would change the verdict: "mass_flow" for values of ``at``,
            the key itself for a property of the stream, "" for the element.
    """

    key: str
    low: float | None
    high: float | None
    level: Level
    code: str
    message: str
    source: str
    phase: str = ""
    driver: str = "mass_flow"
