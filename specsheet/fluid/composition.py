"""From the fractions a user states to mole fractions that sum to one, with every doubt said."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass

from specsheet.findings import Finding
from specsheet.fluid import liquid_volumes, names
from specsheet.fluid.backends.mixture import AIR
from specsheet.fluid.calorific import Composition
from specsheet.fluid.model import note, stop
from specsheet.fluid.phases import LIQUID

_FIELD = "fluid.mixture"
#: a sum nearer to one than this is rounding of the last printed digit, and is scaled silently
EXACT = 1e-6
#: a sum nearer to one than this is scaled, with a note
CLOSE = 5e-4


@dataclass(frozen=True, slots=True)
class Read:
    """A composition read: mole fractions, or None where it cannot be used."""

    composition: Composition | None
    findings: tuple[Finding, ...] = ()


def read(
    stated: Mapping[str, float | str], basis: str, normalise: bool, phase: str = "gas"
) -> Read:
    """Return the mole fractions of a stated composition.

    Args:
        stated: name -> fraction [-].
        basis: "mole", "mass" or "volume": of ideal gases, which is mole, or of the pure liquids at
            15 degC.
        normalise: whether the user lets the fractions be scaled.
        phase: the phase stated.
    """
    findings = _refusals(stated)
    if findings:
        return Read(None, findings)
    amounts: dict[str, float] = {}
    for text, value in stated.items():
        item = names.find(text)
        assert item is not None  # _refusals has seen to it
        amounts[item.key] = amounts.get(item.key, 0.0) + float(value)
    total = sum(amounts.values())
    off = abs(total - 1.0)
    if off > CLOSE and not normalise:
        return Read(None, (_sum_refused(total),))
    notes = (_scaled(total),) if off > EXACT else ()
    if basis != "volume" or phase != LIQUID:
        return Read(_moles(amounts, basis), notes)
    masses = liquid_volumes.masses(amounts)
    if isinstance(masses, Finding):
        return Read(None, (masses,))
    return Read(_moles(masses, "mass"), (*notes, liquid_volumes.SAID))


def _refusals(stated: Mapping[str, float | str]) -> tuple[Finding, ...]:
    if not stated:
        text = "A composition was wanted, none came: state fluid.mixture, substance by substance."
        return (stop("composition-missing", _FIELD, text),)
    found = []
    for text, value in stated.items():
        if names.find(text) is None:
            near = names.nearest(text)
            hint = f"Did you mean {' or '.join(near)}?" if near else "Check the spelling."
            message = (
                f"A substance was wanted, {text!r} names none. {hint} A formula or CAS number "
                "will do too."
            )
            found.append(stop("substance-unknown", f"{_FIELD}.{text}", message))
        number = float(value) if isinstance(value, (int, float)) else math.nan
        if not 0.0 <= number <= 1e6:  # NaN fails too; percentages are caught by the sum
            message = f"A fraction from 0 to 1 was wanted for {text!r}, {value} came: correct it."
            found.append(stop("fraction-range", f"{_FIELD}.{text}", message))
    if not found and sum(float(value) for value in stated.values()) <= 0.0:
        found.append(
            stop(
                "fractions-sum",
                _FIELD,
                "Fractions that sum to 1 were wanted, all of them are zero: state them.",
            )
        )
    return tuple(found)


def _sum_refused(total: float) -> Finding:
    if 99.0 < total < 101.0:
        text = f"The fractions sum to {total:.6g}: they look like percentages; divide them by 100"
    else:
        text = f"Fractions that sum to 1 were wanted, they sum to {total:.6g}: correct them"
    return stop(
        "fractions-sum", _FIELD, f"{text}, or state fluid.normalise = true to have them scaled."
    )


def _scaled(total: float) -> Finding:
    text = f"The fractions sum to {total:.6g} and were scaled to 1."
    return note("fractions-scaled", _FIELD, text)


def _moles(amounts: Mapping[str, float], basis: str) -> Composition:
    """Return mole fractions that sum to one; air is split into its gases."""
    table = names.substances()
    moles: dict[str, float] = {}
    for key, amount in amounts.items():
        if amount == 0.0:
            continue
        count = amount / table[key].molar_mass if basis == "mass" else amount
        if key == "air" and len(amounts) > 1:
            for part, share in AIR:
                moles[part] = moles.get(part, 0.0) + count * share
        else:
            moles[key] = moles.get(key, 0.0) + count
    total = sum(moles.values())
    return tuple((key, count / total) for key, count in moles.items())
