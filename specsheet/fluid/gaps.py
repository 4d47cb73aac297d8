"""What no method gives for a fluid is said, never left out without a word."""

from __future__ import annotations

from collections.abc import Sequence

from specsheet.fields.terms import in_sentence
from specsheet.findings import Finding
from specsheet.fluid.model import note
from specsheet.fluid.phases import GAS, LIQUID
from specsheet.fluid.state import State

_BOTH = ("sound_speed", "heat_capacity", "thermal_conductivity")
#: what a meter of each phase may need; vapour pressure has findings of its own where it is missing
_WANTED = {
    LIQUID: ("viscosity", *_BOTH),
    GAS: ("viscosity", "compressibility", "isentropic_exponent", *_BOTH),
}
#: nothing to state at a point
_NO_ENTRY = "thermal_conductivity"


def unknown(
    name: str, points: Sequence[State | None], findings: Sequence[Finding]
) -> tuple[Finding, ...]:
    """Return the note on properties that are missing at some point and not spoken of elsewhere.

    Args:
        name: of the fluid.
        points: its states.
        findings: what is said already.
    """
    said = {item.code for item in findings}
    missing = {
        key: None
        for state in points
        if state is not None
        for key in _WANTED.get(state.phase, ())
        if key not in state.properties and f"{key}-missing" not in said
    }
    if not missing:
        return ()
    *first, last = (in_sentence(key).split(",")[0] for key in missing)
    listed = f"{', '.join(first)} and {last}" if first else last
    text = f"The sheet leaves out {listed} of {name}: no method for that is at hand."
    if tuple(missing) != (_NO_ENTRY,):
        text += " State at each point what the meter needs."
    return (note("property-unknown", "fluid", text),)
