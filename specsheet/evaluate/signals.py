"""Which signal of a meter a measured figure is: by its unit, and by the output as specified."""

from __future__ import annotations

from collections.abc import Container, Iterator
from dataclasses import dataclass

from specsheet import quantity
from specsheet.fields import KINDS, term
from specsheet.fields.terms import in_sentence
from specsheet.meters.family import Family
from specsheet.methods import signal as output
from specsheet.quantity.value import Quantity
from specsheet.tag import Tag

_ROOT = "linear in flow"
#: the current of a live zero: less is a fault, and this much is no flow [A]
_ZERO = 0.004


@dataclass(frozen=True, slots=True)
class Signal:
    """A signal as measured.

    Attributes:
        key: glossary key of the value it is.
        value: SI.
        text: as it was typed.
        shown: the same where it is the value itself, "" where it was converted (from percent).
    """

    key: str
    value: float
    text: str
    shown: str

    @classmethod
    def read(cls, text: str, tag: Tag, family: Family, known: Container[str]) -> Signal | str:
        """Return the signal, or what stands against it.

        Args:
            text: as typed.
            tag: the tag: its output characteristic, and the atmosphere of a gauge pressure.
            family: its primary signal.
            known: glossary keys that the family puts out.
        """
        kinds = dict(_readable(tag, family, known))
        reason = ""
        for kind, key in kinds.items():
            held = quantity.parse(text, kind)
            if isinstance(held, Quantity):
                return _of(held, key, tag, text)
            reason = reason or held.message
        wanted = ", ".join(f"{in_sentence(key)} ({_unit(kind)})" for kind, key in kinds.items())
        return f"a signal of this family was wanted: {wanted}; {reason}"


def _readable(tag: Tag, family: Family, known: Container[str]) -> Iterator[tuple[str, str]]:
    """Return kind -> key of everything that can be read off the meter."""
    of = term(family.signal).kind
    if family.signal != "signal_fraction" and family.signal not in _CURRENTS:
        yield ("pressure" if of.startswith("pressure_abs") else of), family.signal
    if "pulse_rate" in known and of != "frequency":
        yield "frequency", "pulse_rate"
    root = tag.text("meter.output_characteristic") in ("", _ROOT)
    current = _CURRENTS[0] if root and _CURRENTS[0] in known else _CURRENTS[1]
    if current in known:
        yield "current", current
        yield "ratio", current


_CURRENTS = ("signal_current_root", "signal_current")


def _unit(kind: str) -> str:
    return KINDS[kind].shown


def _of(held: Quantity, key: str, tag: Tag, text: str) -> Signal | str:
    value = (
        tag.absolute(held) if held.kind.startswith("pressure_") and _absolute(key) else held.value
    )
    if key in _CURRENTS:
        value = output.current(fraction=value) if held.kind == "ratio" else value
        if value <= _ZERO:
            return f"{text}: 4 mA, 0 % of the output, is no flow; a signal above it was wanted"
    if value <= 0.0:
        return f"a signal above zero was wanted; {text} came"
    return Signal(key, value, text, "" if held.kind == "ratio" else held.text)


def _absolute(key: str) -> bool:
    return term(key).kind == "pressure_absolute"
