"""What the parts under pressure must bear: design and operating conditions, in gauge pressure."""

from __future__ import annotations

from dataclasses import dataclass

from specsheet.findings import Finding, Level
from specsheet.fluid.state import FluidResult
from specsheet.tag import Tag


@dataclass(frozen=True, slots=True)
class Demand:
    """A pressure and a temperature that must be borne together.

    Attributes:
        name: "design", or the name of the operating point.
        pressure: gauge [Pa]
        temperature: [K]
        field: entry that states the pressure.
    """

    name: str
    pressure: float
    temperature: float
    field: str

    @property
    def words(self) -> str:
        """The demand in words."""
        where = "design" if self.name == "design" else f"point {self.name}"
        return f"{self.pressure / 1e5:.4g} bar(g) at {self.temperature - 273.15:.4g} °C ({where})"


@dataclass(frozen=True, slots=True)
class Demands:
    """Every demand of a tag.

    Attributes:
        design: the design condition; where no design pressure is stated, None.
        points: the operating points whose pressure and temperature are known.
        findings: what of the design is not stated, or is exceeded by an operating point.
    """

    design: Demand | None
    points: tuple[Demand, ...]
    findings: tuple[Finding, ...] = ()

    @property
    def every(self) -> tuple[Demand, ...]:
        """Return the design condition and the operating points."""
        return self.points if self.design is None else (self.design, *self.points)


def demands_of(tag: Tag, fluid: FluidResult | None = None) -> Demands:
    """Return what must be borne; the fluid's states fill in what saturation decides."""
    points = _points(tag, fluid)
    pressure, temperature = tag.si("design.pressure"), tag.si("design.temperature")
    findings = []
    if pressure is None:
        message = (
            "No design pressure is stated: the flanges can be held only against the operating "
            "points. State the design pressure of the line, the setting of its relief included."
        )
        findings.append(
            Finding(Level.CAUTION, "design-pressure-missing", "design.pressure", message)
        )
    if temperature is None:
        message = (
            "No design temperature is stated: the highest operating temperature is used for the "
            "rating. State the design temperature of the line."
        )
        findings.append(
            Finding(Level.CAUTION, "design-temperature-missing", "design.temperature", message)
        )
    design = None
    hottest = max((point.temperature for point in points), default=None)
    at = hottest if temperature is None else temperature
    if pressure is not None and at is not None:
        gauge = pressure - tag.atmospheric_pressure
        design = Demand("design", gauge, at, "design.pressure")
    findings.extend(_beyond(tag, points, pressure, temperature))
    return Demands(design, points, tuple(findings))


def _points(tag: Tag, fluid: FluidResult | None) -> tuple[Demand, ...]:
    found = []
    for index, point in enumerate(tag.points):
        state = fluid.points[index] if fluid is not None and index < len(fluid.points) else None
        stated = point.quantity("pressure")
        warmth = point.quantity("temperature")
        pressure = tag.absolute(stated) if stated else (state.pressure if state else None)
        temperature = warmth.value if warmth else (state.temperature if state else None)
        if pressure is not None and temperature is not None:
            gauge = pressure - tag.atmospheric_pressure
            field = f"points.{point.name}.pressure"
            found.append(Demand(point.name, gauge, temperature, field))
    return tuple(found)


def _beyond(
    tag: Tag, points: tuple[Demand, ...], pressure: float | None, temperature: float | None
) -> list[Finding]:
    """Return a stop for each operating point beyond the design condition."""
    findings = []
    lowest = tag.si("design.minimum_temperature")
    for point in points:
        if pressure is not None and point.pressure > pressure - tag.atmospheric_pressure + 1.0:
            findings.append(_stop(point, "pressure", "pressure", "above", tag))
        if temperature is not None and point.temperature > temperature + 1e-3:
            findings.append(_stop(point, "temperature", "temperature", "above", tag))
        if lowest is not None and point.temperature < lowest - 1e-3:
            findings.append(_stop(point, "temperature", "minimum_temperature", "below", tag))
    return findings


def _stop(point: Demand, quantity: str, entry: str, side: str, tag: Tag) -> Finding:
    message = (
        f"The {quantity} at {point.name} is {side} the design value, "
        f"{tag.text(f'design.{entry}')}: {point.words}. Correct one of the two."
    )
    code = f"operating-{side}-design-{quantity}"
    return Finding(Level.STOP, code, f"points.{point.name}.{quantity}", message, point.name)
