"""One unit of one kind, and the constants that the unit tables are built from."""

from __future__ import annotations

from dataclasses import dataclass

from specsheet.quantity.value import Base

# Exact by definition (yard and pound agreement of 1959; BIPM SI Brochure for the rest).
INCH = 0.0254
FOOT = 0.3048
POUND = 0.45359237
GRAVITY = 9.80665
CALORIE = 4.1868  # calorie, International Table
BTU = 1055.05585262  # British thermal unit, International Table

CUBIC_FOOT = FOOT**3
US_GALLON = 231.0 * INCH**3
IMPERIAL_GALLON = 4.54609e-3
BARREL = 42.0 * US_GALLON  # of petroleum
ACRE_FOOT = 43560.0 * CUBIC_FOOT  # international foot; the US survey foot differs by 6e-6

MINUTE = 60.0
HOUR = 3600.0
DAY = 86400.0


@dataclass(frozen=True, slots=True)
class Unit:
    """One unit of one kind: SI value = (number + offset) x factor.

    Attributes:
        name: canonical spelling.
        factor: SI value of one step of the unit.
        aliases: other spellings accepted.
        offset: added to the number first; only temperatures have one.
        kind: key of the kind; never a union.
        base: base condition that the unit names, or None.
    """

    name: str
    factor: float
    aliases: tuple[str, ...] = ()
    offset: float = 0.0
    kind: str = ""
    base: Base | None = None


def unit(name: str, factor: float, *aliases: str, offset: float = 0.0) -> Unit:
    """Return one row of a unit table; the kind is added when the tables are joined."""
    return Unit(name, factor, aliases, offset)
