"""Which unit a row is shown in: the job's choice, else the one typed, else the kind's own."""

from __future__ import annotations

from collections.abc import Iterable
from typing import TYPE_CHECKING

from specsheet import quantity
from specsheet.fields import KINDS
from specsheet.quantity.value import Quantity
from specsheet.tag import Tag

if TYPE_CHECKING:
    from specsheet.sheet.axis import FlowAxis

#: units of a kind from small to large, for values that would be silly in the unit shown
LADDERS = {
    "pressure_difference": ("Pa", "mbar", "bar"),
    "pressure_absolute": ("mbar(a)", "bar(a)"),
    "mass_flow": ("kg/h", "t/h"),
    "volume_flow": ("L/h", "m3/h"),
    "energy_flow": ("kW", "MW"),
    "power": ("W", "kW", "MW"),
    "energy": ("kWh", "MWh"),
    "voltage": ("uV", "mV", "V"),
    "frequency": ("Hz", "kHz"),
    "dynamic_viscosity": ("uPa s", "mPa s", "Pa s"),
    "time": ("ns", "us", "ms", "s"),
}

#: a largest value outside these bounds moves the row to the next unit of its ladder
SMALLEST, LARGEST = 0.1, 20000.0

#: endings of the units of the two kinds of pressure that go together
_ENDINGS = {"pressure_gauge": "(g)", "pressure_absolute": "(a)"}

#: kinds that take over the unit typed elsewhere on the tag
_FOLLOWING = (
    "mass_flow",
    "volume_flow",
    "energy_flow",
    "pressure_gauge",
    "pressure_absolute",
    "pressure_difference",
    "temperature",
    "density",
    "dynamic_viscosity",
    "kinematic_viscosity",
)


class Units:
    """The units one tag is shown in.

    Attributes:
        currency: of prices, or "".
        flow: how the flows at the ends of the range are shown, once that is known.
    """

    def __init__(self, tag: Tag) -> None:
        self._stated = {
            kind: str(unit)
            for kind, unit in tag.table("job.units").items()
            if kind in KINDS and kind != "base_volume_flow" and unit in quantity.units(kind)
        }
        self._typed = _typed(tag)
        self.currency = tag.text("job.currency")
        self.flow: FlowAxis | None = None

    def chosen(self, kind: str) -> str:
        """Return the unit the job or the user's own typing asks for, "" for none.

        A gas volume derived by the program stands at the job's own base condition, so it takes
        no unit that names another.
        """
        return self._stated.get(kind) or self._typed.get(kind, "")

    def pick(self, kind: str, values: Iterable[float], shown: str = "") -> str:
        """Return the unit for a row of SI values of one kind.

        Args:
            kind: key of the kind.
            values: the SI values of the row.
            shown: the term's own unit, "" for the kind's.
        """
        sizes = [abs(value) for value in values]
        if kind in self._stated:
            stated = self._stated[kind]
            # bar for a margin, MPa for a stress: the term's step of the ladder that the job is on
            own = shown and (stated in LADDERS.get(kind, ()) or _silly(kind, stated, sizes))
            return shown if own else stated
        if shown:
            return shown
        if kind in self._typed:
            return self._typed[kind]
        return _scaled(kind, KINDS[kind].shown, sizes)


def _silly(kind: str, unit: str, sizes: list[float]) -> bool:
    largest = quantity.from_si(max(sizes, default=0.0), kind, unit)
    return largest > 0.0 and not SMALLEST <= largest < LARGEST


def _scaled(kind: str, unit: str, sizes: list[float]) -> str:
    ladder = LADDERS.get(kind, ())
    largest = max(sizes, default=0.0)
    if unit not in ladder or largest == 0.0:
        return unit
    at = ladder.index(unit)
    while at + 1 < len(ladder) and quantity.from_si(largest, kind, ladder[at]) >= LARGEST:
        at += 1
    while at > 0 and quantity.from_si(largest, kind, ladder[at]) < SMALLEST:
        at -= 1
    return ladder[at]


def _typed(tag: Tag) -> dict[str, str]:
    """Return kind -> the unit first typed for it; typing psig asks for psia as well."""
    typed: dict[str, str] = {}
    for held in _quantities(tag):
        if held.kind in _FOLLOWING:
            typed.setdefault(held.kind, held.unit)
    for kind, other in (tuple(_ENDINGS), tuple(reversed(_ENDINGS))):
        if kind in typed and other not in typed:
            partner = _partner(typed[kind], kind, other)
            if partner in quantity.units(other):
                typed[other] = partner
    return typed


def _partner(unit: str, kind: str, other: str) -> str:
    """Return the unit of the other kind of pressure with the same stem ("psi(g)": "psi(a)")."""
    return unit.removesuffix(_ENDINGS[kind]) + _ENDINGS[other]


def _quantities(tag: Tag) -> Iterable[Quantity]:
    for point in tag.points:
        yield from (held for held in point.values.values() if isinstance(held, Quantity))
    for path, held in tag.given.items():
        if isinstance(held, Quantity) and not path.startswith("job."):
            yield held
