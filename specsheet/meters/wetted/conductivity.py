"""Whether the fluid conducts well enough for an electromagnetic meter."""

from __future__ import annotations

from specsheet.findings import Finding, Level
from specsheet.fluid import solutes
from specsheet.line.service import substance_key
from specsheet.meters.family import Limit, Request
from specsheet.sources import PRACTICE
from specsheet.tag import Tag

_FIELD = "fluid.electrical_conductivity"
#: hotter water is condensate or boiler water as a rule, hence treated [K]; common practice
_TREATED = 363.15


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
    unknown = _unknown(request) if tag.si(_FIELD) is None else None
    return () if unknown is None else (unknown,)


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


def _unknown(request: Request) -> Finding | None:
    """Return the finding on a conductivity that is not stated, as the kind of liquid has it."""
    tag = request.tag
    kind = tag.text("fluid.kind")
    if kind == "petroleum":
        return _does_not_conduct(
            "hydrocarbon-does-not-conduct", "Petroleum liquids do not conduct and induce no voltage"
        )
    parts = _substances(tag)
    if kind in ("substance", "mixture") and parts and "water" not in parts:
        return _does_not_conduct(
            "liquid-does-not-conduct",
            "Pure liquids other than water and their mixtures (hydrocarbons, alcohols, glycols, "
            "refrigerants, liquefied gases) do not conduct, or hardly, and induce no voltage",
        )
    if kind == "seawater":
        return None
    if kind == "solution":
        solute = solutes.find(tag.text("fluid.solute"))
        if solute is not None and solute.ions > 1:
            return None
    hot = float(request.stream.temperature.max()) > _TREATED
    if parts == {"water"} and not hot:
        return Finding(
            Level.NOTE,
            "conductivity-assumed",
            _FIELD,
            "The water is taken to be drinking, cooling or waste water, which conducts enough; "
            "state the conductivity if it is demineralised water or condensate.",
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


def _substances(tag: Tag) -> set[str]:
    """Return the keys of the substances of a liquid, as far as they are stated."""
    if tag.text("fluid.kind") == "mixture":
        return {substance_key(name) for name in tag.table("fluid.mixture")}
    return {substance_key(name)} if (name := tag.text("fluid.substance")) else set()


def _does_not_conduct(code: str, words: str) -> Finding:
    message = (
        f"{words}; choose another family, for example ultrasonic or Coriolis. If a measurement "
        "says otherwise, state the conductivity."
    )
    return Finding(Level.STOP, code, _FIELD, message, source=PRACTICE)
