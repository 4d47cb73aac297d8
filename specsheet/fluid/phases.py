"""The stated phase against the computed one: what is said when they disagree."""

from __future__ import annotations

from dataclasses import replace

from specsheet.findings import Finding, Reserve
from specsheet.fluid.model import bar, caution, celsius, note, stop
from specsheet.fluid.state import State
from specsheet.sources import PRACTICE

LIQUID = "liquid"
GAS = "gas"
TWO_PHASE = "two_phase"
SUPERCRITICAL = "supercritical"
SOLID = "solid"
UNVERIFIED = "unverified"

#: pressure by vapour pressure, below which a liquid is called near boiling
NEAR = 1.05


def disagreement(stated: str, state: State) -> Finding | None:
    """Return what is to be said of a stated phase beside the computed one, or None."""
    found = state.phase
    if found == SOLID:
        return stop(
            "frozen",
            "temperature",
            f"The fluid is frozen at {celsius(state.temperature)}: raise the temperature or check "
            "the fluid.",
        )
    if stated == LIQUID and found in (GAS, TWO_PHASE):
        return _flashing(state)
    if stated == GAS and found in (LIQUID, TWO_PHASE):
        return _condensing(state)
    if found == SUPERCRITICAL:
        return note(
            "supercritical",
            "fluid.phase",
            f"At {celsius(state.temperature)} and {bar(state.pressure)} the fluid is above its "
            "critical point, dense as a liquid and compressible as a gas: make sure that the meter "
            "suits it.",
        )
    if stated == LIQUID and found == LIQUID:
        return _near_boiling(state)
    if found == UNVERIFIED:
        return caution(
            "phase-unverified",
            "fluid.phase",
            f"Whether all of the fluid is {stated} at {celsius(state.temperature)} and "
            f"{bar(state.pressure)} could not be decided; the values hold for the phase stated. "
            "Check the dew or bubble point by other means.",
        )
    return None


def _flashing(state: State) -> Finding:
    """Return the stop for a stated liquid that boils."""
    where = f"at {celsius(state.temperature)} and {bar(state.pressure)}"
    vapour = state.value("vapour_pressure")
    if vapour is not None and state.pressure <= vapour:
        boils = stop(
            "flashing",
            "pressure",
            f"Liquid is stated, but {where} the fluid boils: its vapour pressure is {bar(vapour)}. "
            "Raise the pressure above it, lower the temperature, or state gas.",
        )
        return replace(boils, reserve=_to(vapour, state))
    amount = "is partly gas" if state.phase == TWO_PHASE else "is a gas"
    return stop(
        "phase-disagrees",
        "fluid.phase",
        f"Liquid is stated, but {where} the fluid {amount}. Correct the phase, the pressure or the "
        "temperature.",
    )


def _near_boiling(state: State) -> Finding | None:
    """Return the caution for a liquid that a small loss of pressure would make boil."""
    vapour = state.value("vapour_pressure")
    if vapour is None or state.pressure > NEAR * vapour:
        return None
    spare = state.pressure - vapour
    spare = spare if spare > 1e-6 * vapour else 0.0  # on the line itself only rounding is left
    near = caution(
        "near-boiling",
        "pressure",
        f"The pressure is only {spare / 1e5:.3g} bar above the vapour pressure {bar(vapour)}: the "
        "loss of pressure in the meter may make the liquid flash. Meter it where the pressure is "
        "higher or the liquid colder.",
        PRACTICE,
    )
    return replace(near, reserve=_to(vapour, state))


def _to(vapour: float, state: State) -> Reserve:
    """Return the change of pressure that brings a state to its vapour pressure."""
    return Reserve("pressure", vapour, vapour / state.pressure - 1.0)


def _condensing(state: State) -> Finding:
    """Return the stop for a stated gas that is liquid or drops liquid."""
    where = f"at {celsius(state.temperature)} and {bar(state.pressure)}"
    limit = state.value("saturation_temperature") or state.value("dew_temperature")
    edge = "" if limit is None else f"; it is all gas above {celsius(limit)}"
    amount = "is partly liquid" if state.phase == TWO_PHASE else "is a liquid"
    wet = stop(
        "phase-disagrees",
        "fluid.phase",
        f"Gas is stated, but {where} the fluid {amount}{edge}. Correct the phase, the pressure or "
        "the temperature.",
    )
    if limit is None:
        return wet
    return replace(wet, reserve=Reserve("temperature", limit, limit / state.temperature - 1.0))
