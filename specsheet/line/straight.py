"""Straight lengths: what the family's profile wants against what the line has.

Table ``[straight]`` of a profile, all in diameters: ``source``; ``betas``; for each fitting either
``fittings."single bend"`` with ``lengths`` and ``reduced``, or lists in ``upstream``, ``reduced``,
or a list right in the table ("single bend" and "single_bend" are one); ``downstream`` and
``downstream_reduced``. A list has one value for each diameter ratio, or one value for all.
"""

from __future__ import annotations

import math
from bisect import bisect_left
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

from specsheet import quantity
from specsheet.findings import Finding, Given, Level, Origin
from specsheet.packs import Profile
from specsheet.quantity.value import StraightLength
from specsheet.sources import PRACTICE
from specsheet.tag import Tag

#: additional relative uncertainty with a reduced length (ISO 5167-2:2003, 6.2, from memory)
REDUCED_UNCERTAINTY = 0.005
_REMEDY = "lengthen the run, fit a flow conditioner, or choose a family that needs less"
_FITTING = "line.upstream_fitting"
#: fittings that leave swirl or a jet behind which tables do not cover; common practice
_DISTURBING = ("control valve", "swirl")


@dataclass(frozen=True, slots=True)
class StraightResult:
    """What is wanted of the straight lengths, and whether the line has it.

    Attributes:
        values: upstream_length, downstream_length: wanted [m], where they are known.
        notes: one sentence for each side.
        findings: lengths reduced or missing.
        additional_uncertainty: relative uncertainty that a reduced length adds arithmetically to
            the expanded uncertainty of the flow [-]; 0 where none is reduced.
    """

    values: Mapping[str, Given]
    notes: tuple[str, ...]
    findings: tuple[Finding, ...] = ()
    additional_uncertainty: float = 0.0


@dataclass(frozen=True, slots=True)
class _Side:
    """One side of the meter: what is wanted in diameters, and which entry states what is there."""

    name: str
    wanted: float | None
    reduced: float | None
    behind: str = ""

    @property
    def entry(self) -> str:
        return f"line.{self.name}_length"


def straight(
    tag: Tag,
    profile: Profile,
    beta: float | None,
    *,
    pipe_diameter: float,
    meter_diameter: float | None = None,
) -> StraightResult:
    """Compare the straight lengths of the line with those the family wants.

    Args:
        tag: the tag.
        profile: profile of the family, with its table ``straight``.
        beta: diameter ratio [-]; None or NaN where there is none: the longest length is then taken.
        pipe_diameter: inside diameter of the pipe [m].
        meter_diameter: bore of the meter [m] where the lengths count in it; None for the pipe's.
    """
    rules = profile.straight
    source = str(rules.get("source", ""))
    fitting = tag.text(_FITTING) or "single bend"
    full, reduced = _upstream(rules, fitting)
    of = pipe_diameter if meter_diameter is None else meter_diameter
    sides = (
        _Side(
            "upstream",
            _interpolated(rules, full, beta),
            _interpolated(rules, reduced, beta),
            f" after {_words(fitting)}{_assumed(tag)}",
        ),
        _Side(
            "downstream",
            _interpolated(rules, rules.get("downstream"), beta),
            _interpolated(rules, rules.get("downstream_reduced"), beta),
        ),
    )
    values: dict[str, Given] = {}
    notes: list[str] = []
    findings: list[Finding] = []
    additional = 0.0
    for side in sides:
        if side.wanted is None:
            notes.append(
                f"{side.name.capitalize()}: the straight length wanted{side.behind} is not known; "
                "the bidder states it."
            )
            if side.name == "upstream" and rules and fitting in _DISTURBING:
                findings.append(_not_listed(side))
            continue
        values[f"{side.name}_length"] = Given(side.wanted * of, Origin.DERIVED, source)
        if side.wanted == 0.0:
            notes.append(f"{side.name.capitalize()}: no straight length wanted ({source}).")
            continue
        note, found, extra = _judge(tag, side, of, pipe_diameter, source)
        notes.append(note)
        findings.extend(found)
        additional = max(additional, extra)
    return StraightResult(values, tuple(notes), tuple(findings), additional)


def _not_listed(side: _Side) -> Finding:
    """Return the caution for a fitting after which no length is known to be enough."""
    message = (
        f"No straight length{side.behind} is known to be enough for the family; {_REMEDY}, and "
        "have the bidder confirm it."
    )
    return Finding(
        Level.CAUTION, "upstream-length-not-listed", side.entry, message, source=PRACTICE
    )


def _words(fitting: str) -> str:
    return "no fitting" if fitting == "none" else f'the fitting "{fitting}"'


def _assumed(tag: Tag) -> str:
    return "" if _FITTING in tag.given else " (assumed)"


def _judge(
    tag: Tag, side: _Side, of: float, pipe_diameter: float, source: str
) -> tuple[str, tuple[Finding, ...], float]:
    """Return the note, the findings and the additional uncertainty of one side."""
    assert side.wanted is not None
    wanted = f"{side.wanted:.3g} D ({side.wanted * of:.2f} m){side.behind}"
    cited = f" ({source})" if source else ""
    stated = _stated(tag, side.entry)
    if stated is None:
        message = f"{side.name.capitalize()}: {wanted} wanted{cited}; what is there is not stated."
        code = f"{side.name}-length-not-stated"
        return message, (Finding(Level.NOTE, code, side.entry, message, source=source),), 0.0
    there = stated.in_diameters(pipe_diameter) * pipe_diameter / of
    has = f"{side.name.capitalize()}: {there:.3g} D there, {wanted} wanted{cited}"
    if there >= side.wanted * (1.0 - 1e-9):
        return f"{has}: enough.", (), 0.0
    if side.reduced is not None and there >= side.reduced * (1.0 - 1e-9):
        message = (
            f"{has}: only the reduced length of {side.reduced:.3g} D is met, which adds "
            f"{100.0 * REDUCED_UNCERTAINTY:.1f} % to the uncertainty of the flow."
        )
        code = f"{side.name}-length-reduced"
        finding = Finding(Level.CAUTION, code, side.entry, message, source=source)
        return message, (finding,), REDUCED_UNCERTAINTY
    short = f"{side.wanted - there:.3g}"
    message = f"{has}: {short} D {'is' if short == '1' else 'are'} missing; {_REMEDY}."
    code = f"{side.name}-length-short"
    return message, (Finding(Level.CAUTION, code, side.entry, message, source=source),), 0.0


def _stated(tag: Tag, entry: str) -> StraightLength | None:
    read = quantity.parse_straight(tag.text(entry)) if tag.text(entry) else None
    return read if isinstance(read, StraightLength) else None


def _upstream(rules: Mapping[str, Any], fitting: str) -> tuple[Any, Any]:
    """Return the lists of full and of reduced lengths of a fitting, None where there is none."""
    names = (fitting, fitting.replace(" ", "_"))
    row = _first(rules.get("fittings"), names)
    if isinstance(row, Mapping):
        return row.get("lengths"), row.get("reduced")
    full = _first(rules.get("upstream"), names)
    return _first(rules, names) if full is None else full, _first(rules.get("reduced"), names)


def _first(table: Any, names: tuple[str, ...]) -> Any:
    if not isinstance(table, Mapping):
        return None
    return next((table[name] for name in names if name in table), None)


def _interpolated(rules: Mapping[str, Any], lengths: Any, beta: float | None) -> float | None:
    """Return the length at a diameter ratio, linear between those of the table, held outside.

    None where the profile says nothing usable (a list of another length, a value below zero).
    """
    if isinstance(lengths, int | float):
        lengths = [lengths]
    if not isinstance(lengths, Sequence) or not lengths or isinstance(lengths, str):
        return None
    if not all(isinstance(value, int | float) and value >= 0.0 for value in lengths):
        return None
    if len(lengths) == 1:
        return float(lengths[0])
    betas = rules.get("betas", ())
    if len(betas) != len(lengths):
        return None
    if beta is None or math.isnan(beta):
        return float(max(lengths))
    if beta <= betas[0]:
        return float(lengths[0])
    above = bisect_left(betas, beta)
    if above == len(betas):
        return float(lengths[-1])
    low, high = betas[above - 1 : above + 1]
    first, second = lengths[above - 1 : above + 1]
    return float(first + (second - first) * (beta - low) / (high - low))
