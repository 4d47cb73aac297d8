"""The limits of a source, and what is said outside them."""

from __future__ import annotations

from dataclasses import dataclass

from specsheet.findings import Finding
from specsheet.fluid.model import Refused, bar, caution, celsius, stop


@dataclass(frozen=True, slots=True)
class Range:
    """Where a source holds, and how far beyond it a value is still given, with a caution.

    Attributes:
        lowest, highest: temperatures [K].
        pressure: highest pressure [Pa].
        source: citation.
        below, above: kelvin beyond the limits that are still answered; further off is refused.
        over: factor on the pressure up to which it is still answered.
    """

    lowest: float
    highest: float
    pressure: float
    source: str
    below: float = 0.0
    above: float = 20.0
    over: float = 1.2

    def check(self, temperature: float, pressure: float, what: str) -> tuple[Finding, ...]:
        """Return cautions for a state a little outside the limits.

        Raises:
            Refused: the state is far outside, or not a state at all.
        """
        if not pressure > 0.0 or pressure > self.pressure * self.over:
            raise Refused(
                stop("fluid-limit", "pressure", self._pressure(pressure, what), self.source)
            )
        if not self.lowest - self.below <= temperature <= self.highest + self.above:
            raise Refused(
                stop(
                    "fluid-limit", "temperature", self._temperature(temperature, what), self.source
                )
            )
        found = []
        if pressure > self.pressure:
            text = f"{self._pressure(pressure, what)} The values are extrapolated."
            found.append(caution("fluid-limit", "pressure", text, self.source))
        if not self.lowest <= temperature <= self.highest:
            text = f"{self._temperature(temperature, what)} The values are extrapolated."
            found.append(caution("fluid-limit", "temperature", text, self.source))
        return tuple(found)

    def _pressure(self, pressure: float, what: str) -> str:
        if not pressure > 0.0:
            return f"An absolute pressure above zero was wanted, {bar(pressure)} came."
        return (
            f"The properties of {what} are known up to {bar(self.pressure)}; {bar(pressure)} came. "
            "Check the pressure, or state density and viscosity yourself."
        )

    def _temperature(self, temperature: float, what: str) -> str:
        return (
            f"The properties of {what} are known from {celsius(self.lowest)} to "
            f"{celsius(self.highest)}; {celsius(temperature)} came. Check the temperature, or "
            "state density and viscosity yourself."
        )
