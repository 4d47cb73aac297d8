"""The inside diameter of the pipe, from whatever the tag states about it."""

from __future__ import annotations

import re
from dataclasses import dataclass, replace

from specsheet import quantity
from specsheet.findings import Finding, Given, Level, Origin
from specsheet.line.dimensions import (
    Wall,
    nominal_sizes,
    outside_diameter,
    schedule_name,
    schedules,
    wall,
)
from specsheet.quantity.value import Quantity, Refusal
from specsheet.sources import cite
from specsheet.tag import Tag

#: DN whose outside diameter differs by more than 1 % between ASME and EN 10220, series 1 [mm]
_OTHER_SERIES = {65: 76.1, 125: 139.7}
_DISAGREE = 0.01
_UNLINED = ("", "none", "no", "unlined")


@dataclass(frozen=True, slots=True)
class Bore:
    """What is known of the bore [m].

    Attributes:
        inside: inside diameter at 20 °C, None where a finding says why it cannot be had.
        outside, thickness: outside diameter and wall, None where not known.
        nominal: DN number, 0 where no size is stated.
        nominal: int = 0
    findings: what is wrong or must be decided.
    """

    inside: Given | None
    outside: Given | None = None
    thickness: Given | None = None
    nominal: int = 0
    findings: tuple[Finding, ...] = ()


def bore_of(tag: Tag) -> Bore:
    """Return the bore of the pipe; a given inside diameter wins over size and schedule."""
    size = _size(tag)
    found = _bore(tag, size)
    return replace(found, nominal=size) if isinstance(size, int) else found


def _size(tag: Tag) -> int | Refusal | None:
    text = tag.text("line.size")
    if not text:
        return None
    size = quantity.parse_size(text)
    return size if isinstance(size, Refusal) else size.dn


def is_lined(tag: Tag) -> bool:
    """Tell whether the pipe has a lining."""
    return tag.text("line.lining").strip().lower() not in _UNLINED


def _bore(tag: Tag, size: int | Refusal | None) -> Bore:
    stated = tag.si("line.inside_diameter")
    if stated is not None:
        return _stated_bore(tag, size, stated)
    outside = tag.si("line.outside_diameter")
    if isinstance(size, Refusal):
        return _nothing("line-size-unknown", "line.size", size.message)
    if outside is not None:
        return _from_outside(tag, outside)
    if size is None:
        message = (
            "The pipe is not stated: state line.size and line.schedule, or the inside diameter."
        )
        return _nothing("line-size-missing", "line.size", message)
    return _from_schedule(tag, size)


def _nothing(code: str, field: str, message: str, source: str = "") -> Bore:
    return Bore(None, findings=(Finding(Level.STOP, code, field, message, source=source),))


def _stated_bore(tag: Tag, size: int | Refusal | None, stated: float) -> Bore:
    inside = Given(stated, Origin.GIVEN)
    if stated <= 0.0:
        message = "The inside diameter must be more than zero."
        return _nothing("inside-diameter-wrong", "line.inside_diameter", message)
    outside = tag.si("line.outside_diameter")
    if outside is not None:
        return _inside_and_outside(inside, stated, outside)
    if not isinstance(size, int) or "line.schedule" not in tag.given:
        return Bore(inside)
    listed = wall(size, tag.text("line.schedule"))
    if listed is None or abs(stated / listed.inside - 1.0) <= _DISAGREE:
        return Bore(inside)
    message = (
        f"The inside diameter stated, {stated * 1000:.4g} mm, differs from the "
        f"{listed.inside * 1000:.4g} mm of {tag.text('line.size')} schedule "
        f"{tag.text('line.schedule')}: the stated one is used; confirm it."
    )
    finding = Finding(
        Level.CAUTION,
        "inside-diameter-disagrees",
        "line.inside_diameter",
        message,
        source=listed.source,
    )
    return Bore(inside, findings=(finding,))


def _inside_and_outside(inside: Given, stated: float, outside: float) -> Bore:
    if outside <= stated:
        message = (
            f"The outside diameter, {outside * 1000:.4g} mm, is not larger than the inside "
            f"diameter, {stated * 1000:.4g} mm: correct one of them."
        )
        return _nothing("outside-diameter-wrong", "line.outside_diameter", message)
    return Bore(
        inside,
        Given(outside, Origin.GIVEN),
        Given((outside - stated) / 2.0, Origin.DERIVED, "half the difference of the diameters"),
    )


def _from_outside(tag: Tag, outside: float) -> Bore:
    """Outside diameter given: the schedule entry must be a wall thickness ("8 mm")."""
    thickness = _thickness(tag.text("line.schedule"))
    if thickness is None:
        message = (
            "With an outside diameter, state the inside diameter too, or the wall thickness as the "
            'schedule ("8.0 mm"); a schedule belongs to the listed outside diameters only.'
        )
        return _nothing("wall-missing", "line.schedule", message)
    return _from_wall(tag, Given(outside, Origin.GIVEN), thickness)


def _from_wall(tag: Tag, outside: Given, thickness: float) -> Bore:
    inside = float(outside.value) - 2.0 * thickness
    if inside <= 0.0 or thickness <= 0.0:
        message = (
            "The wall does not fit the outside diameter: no bore is left, or it is not positive."
        )
        return _nothing("wall-wrong", "line.schedule", message)
    given = Given(thickness, Origin.GIVEN)
    return _lined(tag, inside, outside, given, "outside diameter less two walls")


def _thickness(text: str) -> float | None:
    read = quantity.parse(text, "length")
    return read.value if isinstance(read, Quantity) else None


def _from_schedule(tag: Tag, dn: int) -> Bore:
    text = tag.text("line.schedule") or "STD"
    if dn not in nominal_sizes():
        listed = ", ".join(str(size) for size in nominal_sizes())
        message = (
            f"There is no pipe of {tag.text('line.size')} in the tables (DN {listed}): "
            "state the inside diameter."
        )
        return _nothing("line-size-unlisted", "line.size", message)
    found = wall(dn, text)
    if found is None:
        return _unlisted_schedule(tag, dn, text)
    origin = Origin.DERIVED if "line.schedule" in tag.given else Origin.ASSUMED
    bore = _lined(
        tag,
        found.inside,
        Given(found.outside, Origin.DERIVED, found.source),
        Given(found.thickness, origin, found.source),
        f"{found.source}, schedule {schedule_name(text)}",
        origin,
    )
    return replace(bore, findings=(*bore.findings, *_schedule_remarks(tag, dn, found, origin)))


def _unlisted_schedule(tag: Tag, dn: int, text: str) -> Bore:
    thickness = _thickness(text)
    listed = outside_diameter(dn)
    if thickness is not None and listed is not None:
        return _from_wall(tag, Given(listed.outside, Origin.DERIVED, listed.source), thickness)
    message = (
        f'Schedule "{text}" is not listed for {tag.text("line.size")}: listed are '
        f"{', '.join(schedules(dn))}; or state a wall thickness or the inside diameter."
    )
    source = listed.source if listed else ""
    return _nothing("schedule-unlisted", "line.schedule", message, source)


def _schedule_remarks(tag: Tag, dn: int, found: Wall, origin: Origin) -> tuple[Finding, ...]:
    remarks = []
    if origin is Origin.ASSUMED:
        message = (
            f"The schedule is not stated: STD is assumed, inside diameter "
            f"{found.inside * 1000:.4g} mm. Confirm it; the flow goes with its square."
        )
        remarks.append(Finding(Level.CAUTION, "schedule-assumed", "line.schedule", message))
    other = _OTHER_SERIES.get(dn)
    if other is not None and "NPS" not in tag.text("line.size").upper():
        message = (
            f"DN {dn} is {found.outside * 1000:.1f} mm outside by ASME but {other:.1f} mm by "
            "EN 10220: if the pipe is of the other series, state its outside diameter."
        )
        source = cite("en10220")
        remarks.append(Finding(Level.CAUTION, "two-series", "line.size", message, source=source))
    return tuple(remarks)


def _lined(
    tag: Tag,
    inside: float,
    outside: Given,
    thickness: Given,
    source: str,
    origin: Origin = Origin.DERIVED,
) -> Bore:
    """Take the lining off the inside diameter where its thickness is stated."""
    lining = tag.text("line.lining").strip()
    if not is_lined(tag):
        return Bore(Given(inside, origin, source), outside, thickness)
    layer = re.search(r"\d+(\.\d+)?\s*(mm|cm|m|in)\b", lining)
    depth = _thickness(layer.group()) if layer else None
    if depth is None:
        message = (
            f'The lining "{lining}" has no thickness ("rubber 5 mm"): the inside diameter is that '
            "of the bare pipe. State the thickness, or the inside diameter."
        )
        finding = Finding(Level.CAUTION, "lining-thickness-missing", "line.lining", message)
        return Bore(Given(inside, origin, source), outside, thickness, findings=(finding,))
    if inside <= 2.0 * depth:
        message = f'The lining "{lining}" leaves no bore in {inside * 1000:.4g} mm: correct it.'
        return _nothing("lining-too-thick", "line.lining", message)
    bore = Given(inside - 2.0 * depth, origin, f"{source}, less two linings")
    return Bore(bore, outside, thickness)
