"""Rotary-piston meter: a piston rolls in its chamber and passes a fixed volume by turn.

Sources: OIML R 117 for the class of error (from memory); usual figures stand in the profile.
"""

from __future__ import annotations

from specsheet.meters.turning.core import Rotor, family

FAMILY = family(
    Rotor(
        key="piston_rotary",
        sweeps=True,
        element=(
            "Range, swept volume and loss are figures usual for the bore; bidder to confirm.",
            "Clearances suit one viscosity: state it with the order, for it decides slip and loss.",
        ),
        installation=(
            "Strainer and gas separator before the meter; no straight lengths wanted.",
            "Any position in which the chamber stays full.",
            "A bypass where the line must not stop: the meter can jam.",
        ),
    )
)
