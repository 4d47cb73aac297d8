"""Oval-gear meter: two toothed rotors pass the liquid on in chambers of fixed volume.

Sources: OIML R 117 for the class of error (from memory); usual figures stand in the profile.
"""

from __future__ import annotations

from specsheet.meters.turning.core import Rotor, family

FAMILY = family(
    Rotor(
        key="gear_oval",
        sweeps=True,
        element=(
            "Range, swept volume and loss are figures usual for the bore; bidder to confirm.",
            "Clearances suit one viscosity: state it with the order, for it decides slip and loss.",
        ),
        installation=(
            "Strainer and gas separator before the meter; no straight lengths wanted.",
            "Axes of the rotors horizontal, whatever the run of the line.",
            "A bypass where the line must not stop: the meter can jam.",
        ),
    )
)
