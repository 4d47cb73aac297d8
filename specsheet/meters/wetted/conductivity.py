"""Whether the fluid conducts well enough for an electromagnetic meter."""

from __future__ import annotations

from specsheet.findings import Finding, Level
from specsheet.meters.family import Request
from specsheet.sources import PRACTICE

_FIELD = "fluid.electrical_conductivity"


def conductivity_findings(request: Request) -> tuple[Finding, ...]:
    """Return what is wrong with the conductivity; common practice, bounds in the profile."""
    tag, typical = request.tag, request.profile.typical
    if tag.phase == "gas":
        return (
            Finding(
                Level.STOP,
                "gas-does-not-conduct",
                "fluid.phase",
                "a gas does not conduct and induces no voltage; choose another family, for "
                "example vortex.",
                source=PRACTICE,
            ),
        )
    found = tag.si(_FIELD)
    if found is None:
        return (_unknown(request),)
    least, usual = typical["least_conductivity"].value, typical["usual_conductivity"].value
    if found >= usual:
        return ()
    stop = found < least
    message = (
        f"the liquid conducts {found * 1e4:.3g} uS/cm; at least {least * 1e4:g} uS/cm is wanted. "
        "Choose another family, for example ultrasonic or Coriolis."
        if stop
        else f"the liquid conducts {found * 1e4:.3g} uS/cm, less than the {usual * 1e4:g} uS/cm of "
        "most meters; demineralised water and condensate need a version made for it."
    )
    return (
        Finding(
            Level.STOP if stop else Level.CAUTION,
            "conductivity-low",
            _FIELD,
            message,
            source=typical["least_conductivity" if stop else "usual_conductivity"].source,
        ),
    )


def _unknown(request: Request) -> Finding:
    """Return the finding on a conductivity that is not stated."""
    if request.tag.text("fluid.kind") == "petroleum":
        return Finding(
            Level.STOP,
            "hydrocarbon-does-not-conduct",
            _FIELD,
            "petroleum liquids do not conduct and induce no voltage; choose another family.",
            source=PRACTICE,
        )
    least = request.profile.typical["least_conductivity"].value
    return Finding(
        Level.CAUTION,
        "conductivity-missing",
        _FIELD,
        f"state the conductivity of the liquid; at least {least * 1e4:g} uS/cm is wanted. "
        "Demineralised water, condensate and most organic liquids conduct less.",
        source=PRACTICE,
    )
