"""Whether the fluid conducts well enough for an electromagnetic meter."""

from __future__ import annotations

from specsheet.findings import Finding, Level
from specsheet.meters.family import Limit, Request
from specsheet.sources import PRACTICE

_FIELD = "fluid.electrical_conductivity"


def conductivity_findings(request: Request) -> tuple[Finding, ...]:
    """Return a finding where the fluid does not conduct, or nobody knows whether it does."""
    tag = request.tag
    if tag.phase == "gas":
        return (
            Finding(
                Level.STOP,
                "gas-does-not-conduct",
                "fluid.phase",
                "A gas does not conduct and induces no voltage; choose another family, for "
                "example vortex.",
                source=PRACTICE,
            ),
        )
    return () if tag.si(_FIELD) is not None else (_unknown(request),)


def conductivity_limits(request: Request) -> tuple[Limit, ...]:
    """Return the least conductivity of any meter, and of most meters; both from the profile."""
    typical = request.profile.typical
    key = "electrical_conductivity"
    return (
        Limit(
            key,
            typical["least_conductivity"].value,
            None,
            Level.STOP,
            "conductivity-low",
            "the liquid conducts too little for this family; choose another, for example "
            "ultrasonic or Coriolis",
            typical["least_conductivity"].source,
            driver=key,
        ),
        Limit(
            key,
            typical["usual_conductivity"].value,
            None,
            Level.CAUTION,
            "conductivity-unusual",
            "the liquid conducts less than most meters want; demineralised water and condensate "
            "need a version made for it",
            typical["usual_conductivity"].source,
            driver=key,
        ),
    )


def _unknown(request: Request) -> Finding:
    """Return the finding on a conductivity that is not stated."""
    if request.tag.text("fluid.kind") == "petroleum":
        return Finding(
            Level.STOP,
            "hydrocarbon-does-not-conduct",
            _FIELD,
            "Petroleum liquids do not conduct and induce no voltage; choose another family.",
            source=PRACTICE,
        )
    least = request.profile.typical["least_conductivity"].value
    return Finding(
        Level.CAUTION,
        "conductivity-missing",
        _FIELD,
        f"State the conductivity of the liquid; at least {least * 1e4:g} uS/cm is wanted. "
        "Demineralised water, condensate and most organic liquids conduct less.",
        source=PRACTICE,
    )
