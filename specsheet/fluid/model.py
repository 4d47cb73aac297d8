"""What every kind of fluid must be able to answer, and the small words to answer it with."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Protocol

from specsheet.findings import Finding, Level, Origin
from specsheet.fluid.state import Property, State
from specsheet.quantity.value import Base

#: molar gas constant [J/mol/K], SI 2019
GAS_CONSTANT = 8.31446261815324


@dataclass(frozen=True, slots=True)
class Condition:
    """Where the fluid is wanted.

    Attributes:
        temperature: [K]; None where only the pressure of a saturated fluid is stated.
        pressure: [Pa], absolute; None where only the temperature of a saturated fluid is stated.
        dryness: mass of vapour by mass of wet vapour [-]; None where it is not stated.
    """

    temperature: float | None
    pressure: float | None
    dryness: float | None = None


class Refused(Exception):  # noqa: N818 - no error of ours: the answer to a state that is not there
    """No state can be given; carries the finding that says why. Never leaves this room."""

    def __init__(self, finding: Finding) -> None:
        super().__init__(finding.message)
        self.finding = finding


class Fluid(Protocol):
    """One fluid: immutable, hashable, and the key of every cache.

    Attributes:
        name: what the sheet calls it.
        phase: the phase stated by the user, "liquid" or "gas" ("" where none is stated).
    """

    def __hash__(self) -> int:
        """Fluids are keys of caches."""
        ...

    @property
    def name(self) -> str:
        """What the sheet calls it."""
        ...

    @property
    def phase(self) -> str:
        """The phase stated, "liquid", "gas" or ""."""
        ...

    def state(self, condition: Condition) -> State:
        """Return the state.

        Raises:
            Refused: there is none.
        """
        ...

    def base(self, base: Base) -> State:
        """Return the state at a base condition; without a density where none is meaningful.

        Raises:
            Refused: there is none.
        """
        ...

    def constants(self) -> Mapping[str, Property]:
        """Return the properties that do not depend on the state."""
        ...


@dataclass(frozen=True, slots=True)
class Method:
    """A method: how a value comes about, by which source, and how good it is.

    Attributes:
        words: the method in plain words.
        source: citation.
        uncertainty: relative expanded uncertainty, k = 2 [-].
        origin: derived, or typical where the method gives an order of size only.
    """

    words: str
    source: str
    uncertainty: float = 0.0
    origin: Origin = Origin.DERIVED

    def __call__(self, value: float) -> Property:
        """Return a property found by this method."""
        return Property(value, self.origin, self.words, self.source, self.uncertainty)


def stop(code: str, field: str, message: str, source: str = "") -> Finding:
    """Return a stop finding; ``field`` of a point without its prefix ("pressure")."""
    return Finding(Level.STOP, code, field, message, source=source)


def caution(code: str, field: str, message: str, source: str = "") -> Finding:
    """Return a caution; ``field`` of a point without its prefix ("pressure")."""
    return Finding(Level.CAUTION, code, field, message, source=source)


def note(code: str, field: str, message: str, source: str = "") -> Finding:
    """Return a note; ``field`` of a point without its prefix ("pressure")."""
    return Finding(Level.NOTE, code, field, message, source=source)


def celsius(kelvin: float) -> str:
    """Return a temperature for a message ("184.9 °C")."""
    return f"{kelvin - 273.15:.4g} °C" if abs(kelvin - 273.15) >= 0.05 else "0 °C"


def bar(pascal: float) -> str:
    """Return an absolute pressure for a message ("7.02 bar(a)")."""
    return f"{pascal / 1e5:.4g} bar(a)"


def both(condition: Condition) -> tuple[float, float]:
    """Return temperature [K] and pressure [Pa] of a condition that must state both.

    Raises:
        Refused: one is missing.
    """
    if condition.temperature is None:
        raise Refused(
            stop(
                "temperature-missing",
                "temperature",
                "The temperature is needed to find the state of this fluid: state it.",
            )
        )
    if condition.pressure is None:
        raise Refused(
            stop(
                "pressure-missing",
                "pressure",
                "The pressure is needed to find the state of this fluid: state it.",
            )
        )
    return condition.temperature, condition.pressure
