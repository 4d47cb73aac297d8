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
class NominalSize:
    """A nominal pipe size.

    Attributes:
        dn: DN number (150); a name, not a dimension.
        nps: NPS designator without the letters ("6", "1 1/2").
        text: what was typed, as it is echoed.
    """

    dn: int
    nps: str
    text: str


@dataclass(frozen=True, slots=True)
class StraightLength:
    """A straight length of pipe, stated in inside diameters or as a length; one of them is None.

    Attributes:
        diameters: multiple of the inside diameter D [-]
        metres: length [m]
        text: what was typed, as it is echoed.
    """

    diameters: float | None
    metres: float | None
    text: str

    def in_diameters(self, inside_diameter: float) -> float:
        """Return the length as a multiple of the inside diameter [m], which is above zero."""
        if self.diameters is not None:
            return self.diameters
        return (self.metres or 0.0) / inside_diameter


@dataclass(frozen=True, slots=True)
class Refusal:
    """A text that is no acceptable quantity.

    Attributes:
        message: what was wanted, what came, what to write instead.
        write: the texts to write instead, each of them acceptable; empty where nobody can know.
    """

    message: str
    write: tuple[str, ...] = ()
