"""Axial turbine meter for liquid or gas: a rotor turns in proportion to the velocity.

Sources: API MPMS 5.3 (back pressure), ISO 9951 (gas). Usual figures stand in the profile.
"""

from __future__ import annotations

from specsheet.meters.family import Request
from specsheet.meters.turning.core import Rotor, family

_VARIANTS = {
    "fire service": (
        "Fire service: rotor and bearings that pass the full hydrant flow after long rest; no "
        "strainer that can block, and the approval of the fire authority stated."
    ),
    "hydrant portable": (
        "Portable on a hydrant: 75 mm is usual (common practice, no source), with couplings, a "
        "carrying frame and a backflow preventer."
    ),
}


def _variant(request: Request) -> tuple[str, ...]:
    sentence = _VARIANTS.get(request.tag.text("meter.variant"))
    return () if sentence is None else (sentence,)


FAMILY = family(
    Rotor(
        key="turbine_axial",
        sweeps=False,
        element=("Range, K-factor and loss are figures usual for the bore; bidder to confirm.",),
        installation=(
            "Strainer before the straight length, with its mesh stated by the bidder.",
            "Fill the line slowly: gas that rushes through destroys the bearings.",
            "Flow straightener where swirl is possible; horizontal line unless calibrated upright.",
        ),
        more_notes=_variant,
    )
)
