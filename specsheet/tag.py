"""The typed tag: what one tag file and its job say, in SI, before anything is derived."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from datetime import date
from functools import cached_property
from types import MappingProxyType

from specsheet.findings import Origin
from specsheet.quantity.value import Base, Quantity

#: what an entry can hold once read
Value = Quantity | str | float | int | bool | date | tuple[str, ...] | Mapping[str, float | str]

_NOTHING: Mapping[str, Value] = MappingProxyType({})


@dataclass(frozen=True, slots=True)
class Point:
    """One operating point: its name and the values stated at it (keys without "points.")."""

    name: str
    values: Mapping[str, Value]

    def quantity(self, key: str) -> Quantity | None:
        """Return the quantity stated under ``key`` ("flow"), or None."""
        value = self.values.get(key)
        return value if isinstance(value, Quantity) else None


@dataclass(frozen=True, slots=True)
class Revision:
    """One line of the revision block."""

    mark: str
    date: date
    text: str = ""
    by: str = ""
    checked: str = ""
    approved: str = ""


@dataclass(frozen=True)
class Tag:
    """One tag, typed.

    Attributes:
        given: path -> value typed by the user, for every section but points and revisions; the
            job's entries are there too, under "job." ("job.base.temperature").
        assumed: path -> value of each entry that has a default and was not typed.
        points: the operating points, in the order of the file.
        revisions: the revision block, oldest first.
        path: file the tag came from, or "".
        folder: job folder it belongs to, or "".
        unused: path and message of each thing that stands in the file of the tag, or of its job
            ("job."), and cannot be used.
    """

    given: Mapping[str, Value]
    assumed: Mapping[str, Value] = field(default_factory=lambda: _NOTHING)
    points: tuple[Point, ...] = ()
    revisions: tuple[Revision, ...] = ()
    path: str = ""
    folder: str = ""
    unused: tuple[tuple[str, str], ...] = ()

    def get(self, path: str) -> Value | None:
        """Return the value of an entry, given or assumed, or None."""
        value = self.given.get(path)
        return self.assumed.get(path) if value is None else value

    def origin(self, path: str) -> Origin:
        """Tell whether an entry was given or assumed."""
        return Origin.GIVEN if path in self.given else Origin.ASSUMED

    def text(self, path: str) -> str:
        """Return an entry as text ("" when it is not stated); a quantity as typed."""
        value = self.get(path)
        if value is None:
            return ""
        return value.text if isinstance(value, Quantity) else str(value)

    def quantity(self, path: str) -> Quantity | None:
        """Return an entry as a quantity, or None when it is not stated or is a word."""
        value = self.get(path)
        return value if isinstance(value, Quantity) else None

    def si(self, path: str) -> float | None:
        """Return an entry's SI value; a pressure as absolute pressure [Pa]."""
        quantity = self.quantity(path)
        return None if quantity is None else self.absolute(quantity)

    def flag(self, path: str) -> bool:
        """Return a boolean entry (False when it is not stated)."""
        return self.get(path) is True

    def words(self, path: str) -> tuple[str, ...]:
        """Return a list entry (empty when it is not stated)."""
        value = self.get(path)
        return value if isinstance(value, tuple) else ()

    def table(self, path: str) -> Mapping[str, float | str]:
        """Return a table entry (empty when it is not stated)."""
        value = self.get(path)
        return value if isinstance(value, Mapping) else {}

    def absolute(self, quantity: Quantity) -> float:
        """Return the SI value, with the atmosphere added where it is a gauge pressure [Pa]."""
        if quantity.kind == "pressure_gauge":
            return quantity.value + self.atmospheric_pressure
        return quantity.value

    @cached_property
    def name(self) -> str:
        """The tag number."""
        return self.text("tag")

    @cached_property
    def family(self) -> str:
        """Key of the meter family."""
        return self.text("family")

    @cached_property
    def phase(self) -> str:
        """The phase stated: "liquid" or "gas"."""
        return self.text("fluid.phase")

    @cached_property
    def atmospheric_pressure(self) -> float:
        """Pressure of the atmosphere at the site [Pa]: stated, else from the altitude.

        ICAO standard atmosphere (ISO 2533:1975), troposphere; exponent 5.25588.
        """
        if "job.atmospheric_pressure" not in self.given:
            altitude = self.quantity("job.altitude")
            if altitude is not None:
                ratio = 1.0 - 0.0065 / 288.15 * altitude.value
                return float(101325.0 * ratio**5.25588)
        stated = self.quantity("job.atmospheric_pressure")
        return 101325.0 if stated is None else stated.value

    @cached_property
    def base(self) -> Base:
        """The job's own base condition."""
        temperature = self.quantity("job.base.temperature")
        pressure = self.quantity("job.base.pressure")
        kelvin = 288.15 if temperature is None else temperature.value
        pascal = 101325.0 if pressure is None else pressure.value
        return Base(f"{kelvin - 273.15:g} °C, {pascal / 1000:g} kPa", kelvin, pascal)
