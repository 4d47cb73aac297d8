"""What the service itself rules out for a family, whatever the size: phase, solids, free gas ...

Read from the profile, for families with and without equations alike. A limit on something that the
tag does not state is no verdict: it is named as not known.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from specsheet.evaluate.prepare import CHANNEL, Prepared, has_pressure, overpressure
from specsheet.evaluate.remarks import remarks
from specsheet.evaluate.result import Check
from specsheet.evaluate.words import facts, number
from specsheet.fields.terms import in_sentence
from specsheet.findings import Finding, Level, Reserve
from specsheet.fluid.state import State
from specsheet.line import unsuited_parts
from specsheet.packs import Profile, ProfileLimit
from specsheet.sources import PRACTICE
from specsheet.tag import Tag

#: quantity of a profile's limit -> entry that states it
ENTRIES = {
    "solids_fraction": "fluid.solids",
    "bubble_fraction": "fluid.bubbles",
    "scatterer_fraction": "fluid.solids",
    "electrical_conductivity": "fluid.electrical_conductivity",
    "saturation_margin": "points.temperature",
}
#: most that anything but a liquid metal conducts [S/m]; common practice
_CONDUCTS = 100.0
#: a line this much smaller than the smallest usual one has no room for the probe; common practice
_FAR_BELOW = 0.5
_IN_LIQUIDS = ("solids_fraction", "bubble_fraction", "scatterer_fraction")


@dataclass(frozen=True)
class Service:
    """What the service says about a family.

    Attributes:
        checks: the limits looked at.
        findings: what does not hold.
        unknown: labels of what would have to be known.
    """

    checks: tuple[Check, ...]
    findings: tuple[Finding, ...]
    unknown: tuple[str, ...]

    @property
    def stopped(self) -> bool:
        """Whether the family is ruled out."""
        return any(finding.level is Level.STOP for finding in self.findings)


def judge_service(prepared: Prepared, profile: Profile) -> Service:
    """Judge a family by the service alone."""
    said = remarks(profile, prepared.tag.phase, prepared.words, choosing=False)
    unsuited = unsuited_parts(profile, prepared.avoided)
    findings = [*_suitable(prepared, profile), *said, *unsuited]
    checks: list[Check] = []
    unknown: list[str] = []
    values = _values(prepared)
    for limit in profile.limits:
        if limit.quantity not in ENTRIES or limit.phase not in ("", prepared.tag.phase):
            continue
        if limit.quantity in _IN_LIQUIDS and prepared.tag.phase != "liquid":
            continue
        value = values.get(limit.quantity)
        if value is None:
            unknown.append(in_sentence(limit.quantity))
            findings.extend(_not_stated(prepared.tag, limit))
            continue
        check = _checked(limit, value, _driver(prepared, limit))
        checks.append(check)
        if not check.holds:
            findings.append(_broken(prepared.tag, check))
    findings.extend(_design_temperature(prepared.tag, profile))
    return Service(tuple(checks), tuple(findings), tuple(dict.fromkeys(unknown)))


def _design_temperature(tag: Tag, profile: Profile) -> Iterator[Finding]:
    """Say where the design reaches beyond the usual temperatures of the family."""
    for limit in profile.limits:
        if limit.quantity != "temperature" or limit.phase not in ("", tag.phase):
            continue
        for entry, bound, sign in (
            ("design.temperature", limit.high, 1.0),
            ("design.minimum_temperature", limit.low, -1.0),
        ):
            stated = tag.si(entry)
            if stated is None or bound is None or sign * (stated - bound) <= 0.0:
                continue
            said = facts("temperature", stated, (limit.low, limit.high), tag.table("job.units"))
            yield Finding(
                Level.CAUTION,
                "design-temperature-limit",
                entry,
                _capital(f"design {said}: {limit.message}."),
                source=limit.source,
                reserve=Reserve("temperature", bound, (bound - stated) / stated),
            )


def _driver(prepared: Prepared, limit: ProfileLimit) -> tuple[str, float] | None:
    """Return what moves a margin to saturation, and its value: the temperature of the point."""
    if limit.quantity != "saturation_margin":
        return None
    states = [state for state in prepared.fluid.points if state is not None]
    known = [(margin, s.temperature) for s in states if (margin := _saturation(s)) is not None]
    return ("temperature", min(known)[1])


def judge_habits(prepared: Prepared, profile: Profile) -> tuple[Finding, ...]:
    """Return what usual practice says of a family without equations: wear, turndown, line size.

    A family with equations derives these itself.
    """
    return (*_wear(prepared.tag, profile), *_turndown(prepared, profile), *_size(prepared, profile))


def _suitable(prepared: Prepared, profile: Profile) -> Iterator[Finding]:
    """Say where phase, free surface or orientation do not suit the family."""
    tag = prepared.tag
    if tag.phase and tag.phase not in profile.phases:
        message = (
            f"{profile.title}: for {' and '.join(profile.phases)} only, and the fluid is stated as "
            f"{tag.phase}. Choose another family."
        )
        yield Finding(Level.STOP, "phase-unsuitable", "fluid.phase", message, source=PRACTICE)
    if profile.applies_to == (CHANNEL,) and has_pressure(prepared):
        message = (
            f"{profile.title}: a free surface is needed, and the line stands under "
            f"{number(overpressure(prepared) / 1e5)} bar(g). Choose a family for closed pipes."
        )
        yield Finding(
            Level.STOP, "free-surface-needed", "points.pressure", message, source=PRACTICE
        )
    orientation = tag.text("line.orientation")
    if profile.orientations and orientation and orientation not in profile.orientations:
        message = (
            f"The line is {orientation}; the family is usually put into lines that are "
            f"{' or '.join(profile.orientations)}. Turn the line, or have the bidder confirm it."
        )
        yield Finding(
            Level.CAUTION, "orientation-unusual", "line.orientation", message, source=PRACTICE
        )


def _values(prepared: Prepared) -> dict[str, float]:
    """Return what is known of the service by glossary key, SI."""
    tag = prepared.tag
    found: dict[str, float] = {}
    # by mass, solids weigh more than by volume: the larger figure, to be safe
    solids = tag.si("fluid.solids")
    solids = tag.si("fluid.solids_mass_fraction") if solids is None else solids
    bubbles = tag.si("fluid.bubbles")
    if solids is not None:
        found["solids_fraction"] = solids
    if bubbles is not None:
        found["bubble_fraction"] = bubbles
    if solids is not None or bubbles is not None:
        found["scatterer_fraction"] = (solids or 0.0) + (bubbles or 0.0)
    states = [state for state in prepared.fluid.points if state is not None]
    conductivity = tag.si("fluid.electrical_conductivity")
    if conductivity is not None:
        found["electrical_conductivity"] = conductivity
    margins = [m for state in states if (m := _saturation(state)) is not None]
    if margins:
        found["saturation_margin"] = min(margins)
    return found


def _saturation(state: State) -> float | None:
    """Return how far a gas stands above its saturation or dew point [K], None where unknown."""
    margin = state.value("saturation_margin")
    if margin is None:
        dew = state.value("dew_temperature")
        margin = None if dew is None else state.temperature - dew
    return margin


def _not_stated(tag: Tag, limit: ProfileLimit) -> Iterator[Finding]:
    """Say that a family cannot do without something that the tag does not state."""
    if limit.low is None or limit.quantity == "saturation_margin":
        return
    beyond = limit.quantity == "electrical_conductivity" and limit.low > _CONDUCTS
    said = facts(limit.quantity, float("nan"), (limit.low, limit.high), tag.table("job.units"))
    yield Finding(
        Level.STOP if beyond else Level.CAUTION,
        f"{limit.quantity.replace('_', '-')}-not-stated",
        ENTRIES[limit.quantity],
        _capital(f"{said.replace('has no value', 'is not stated')}: {limit.message}."),
        source=limit.source,
    )


def _checked(limit: ProfileLimit, value: float, driver: tuple[str, float] | None) -> Check:
    low, high = limit.low, limit.high
    broken = low is not None and value < low
    holds = not broken and (high is None or value <= high)
    bound = low if broken or high is None else high
    reserve = None
    if driver is not None and bound is not None:
        key, present = driver
        reserve = Reserve(key, present + bound - value, (bound - value) / present)
    elif value and bound is not None:
        reserve = Reserve(limit.quantity, bound, (bound - value) / value)
    level, message, source = Level(limit.level), limit.message, limit.source
    return Check(limit.quantity, "", value, low, high, holds, level, message, source, reserve)


def _broken(tag: Tag, check: Check) -> Finding:
    said = facts(check.key, check.value, (check.low, check.high), tag.table("job.units"))
    return Finding(
        check.level,
        f"{check.key.replace('_', '-')}-limit",
        ENTRIES[check.key],
        _capital(f"{said}: {check.message}."),
        source=check.source,
        reserve=check.reserve,
    )


def _wear(tag: Tag, profile: Profile) -> Iterator[Finding]:
    if profile.moving_parts and tag.flag("fluid.abrasive"):
        message = (
            "Solids that wear soon spoil bearings and clearances; choose a family without moving "
            "parts."
        )
        yield Finding(
            Level.STOP, "abrasive-moving-parts", "fluid.abrasive", message, source=PRACTICE
        )


def _turndown(prepared: Prepared, profile: Profile) -> Iterator[Finding]:
    flows = prepared.points.stream.mass_flow
    asked = prepared.tag.si("require.turndown") or float(flows.max() / flows.min())
    usual = profile.turndown
    if usual is not None and asked > usual.value * 1.001:
        message = (
            f"The range asked for is {number(asked)} to 1; {number(usual.value)} to 1 is usual for "
            "the family. Have the bidder state the error at the smallest flow, or split the range."
        )
        yield Finding(Level.CAUTION, "turndown-unusual", "points", message, source=usual.source)


def _size(prepared: Prepared, profile: Profile) -> Iterator[Finding]:
    """Say where a probe or a clamp-on meter meets a line outside its usual sizes."""
    pipe, sizes = prepared.pipe.pipe, profile.sizes
    if pipe is None or sizes is None or "closed pipe" in profile.applies_to:
        return
    line = pipe.nominal or 1000.0 * pipe.inside_diameter
    if sizes.low <= line <= sizes.high:
        return
    message = (
        f"The line is DN {line:.0f}; DN {sizes.low} to DN {sizes.high} is usual for the family. "
        "Have the bidder confirm it, or choose another family."
    )
    level = Level.STOP if line < _FAR_BELOW * sizes.low else Level.CAUTION
    yield Finding(level, "line-size-unusual", "line.size", message, source=sizes.source)


def _capital(text: str) -> str:
    return text[0].upper() + text[1:]
