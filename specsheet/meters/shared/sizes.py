"""The size series of a family (``sizes`` in its profile) and the sizes in question for a tag."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, replace
from functools import cache

from specsheet import packs, quantity
from specsheet.findings import Finding, Level, Origin
from specsheet.meters.family import Given, Request
from specsheet.packs import Profile, Typical
from specsheet.quantity.value import Refusal

FREE = "size it"


@dataclass(frozen=True, slots=True)
class Size:
    """One size of a family.

    Attributes:
        nominal: DN number.
        bore: of the meter at 20 °C [m].
        figures: other figures of this size, SI, as the profile names them.
        origin: origin of the bore.
        source: citation of the bore and the figures.
        listed: whether the series holds this size.
    """

    nominal: int
    bore: float
    figures: Mapping[str, float]
    origin: Origin = Origin.TYPICAL
    source: str = ""
    listed: bool = True

    @property
    def text(self) -> str:
        """The size in words."""
        return f"DN {self.nominal}"


@dataclass(frozen=True, slots=True)
class Candidates:
    """The sizes in question.

    Attributes:
        sizes: from small to large; one where the user stated it.
        free: whether the program may choose.
        findings: what is wrong with what the user stated.
    """

    sizes: tuple[Size, ...]
    free: bool
    findings: tuple[Finding, ...] = ()


def series(profile: Profile) -> tuple[Size, ...]:
    """Return the size series of a family, from small to large."""
    return _series(profile.key)


@cache
def _series(key: str) -> tuple[Size, ...]:
    profile = packs.profile(key)
    source = str(profile.data.get("sizes_source", ""))
    sizes = [
        Size(
            nominal=int(row["nominal"]),
            bore=float(row["bore"]),
            figures={key: float(row[key]) for key in row if key not in ("nominal", "bore")},
            source=source,
        )
        for row in profile.data["sizes"]
    ]
    return tuple(sorted(sizes, key=lambda size: size.bore))


def line_nominal(request: Request, sizes: tuple[Size, ...]) -> int:
    """Return the DN of the line; where it is not known, of the size nearest to its bore."""
    if request.pipe.nominal:
        return request.pipe.nominal
    return _nearest_bore(sizes, request.pipe.inside_diameter).nominal


def candidates(request: Request) -> Candidates:
    """Return the sizes in question: the one stated, else every size up to that of the line."""
    found = _in_question(request)
    return replace(found, findings=(*found.findings, *not_positive(request)))


def _in_question(request: Request) -> Candidates:
    sizes = series(request.profile)
    name = request.tag.text("meter.size")
    bore = stated(request, "bore")
    if name and name != FREE:
        found = _stated_size(sizes, name)
    elif bore is not None:
        found = Candidates((_nearest_bore(sizes, bore),), free=False)
    else:
        return _up_to_line(request, sizes)
    if bore is not None and found.sizes:
        size = replace(found.sizes[0], bore=bore, origin=Origin.GIVEN, source="")
        found = replace(found, sizes=(size,))
    return found


def _stated_size(sizes: tuple[Size, ...], name: str) -> Candidates:
    parsed = quantity.parse_size(name)
    if isinstance(parsed, Refusal):
        finding = Finding(Level.STOP, "size-unreadable", "meter.size", parsed.message)
        return Candidates(sizes[-1:], free=False, findings=(finding,))
    for size in sizes:
        if size.nominal == parsed.dn:
            return Candidates((size,), free=False)
    nearest = min(sizes, key=lambda size: abs(size.nominal - parsed.dn))
    known = ", ".join(str(size.nominal) for size in sizes)
    finding = Finding(
        Level.CAUTION,
        "size-not-listed",
        "meter.size",
        f"DN {parsed.dn} is not in the series of this family (DN {known}); it is rated with a "
        f"bore equal to its nominal size and the other figures of DN {nearest.nominal}. Take a "
        "listed size, or state the bidder's figures.",
    )
    own = replace(nearest, nominal=parsed.dn, bore=parsed.dn / 1000.0, listed=False)
    return Candidates((own,), free=False, findings=(finding,))


def _up_to_line(request: Request, sizes: tuple[Size, ...]) -> Candidates:
    nominal = line_nominal(request, sizes)
    fitting = tuple(size for size in sizes if size.nominal <= nominal)
    if fitting:
        return Candidates(fitting, free=True)
    finding = Finding(
        Level.CAUTION,
        "line-below-series",
        "line.size",
        f"The line is smaller than the smallest meter of this family ({sizes[0].text}); the line "
        "would have to be widened around the meter. Choose another family, or accept expanders.",
    )
    return Candidates(sizes[:1], free=True, findings=(finding,))


def _nearest_bore(sizes: tuple[Size, ...], bore: float) -> Size:
    return min(sizes, key=lambda size: abs(size.bore - bore))


def stated(request: Request, key: str) -> float | None:
    """Return what the user stated under ``meter.<key>`` (SI), or None; only if above zero."""
    found = request.tag.si(f"meter.{key}")
    return found if found is not None and found > 0.0 else None


def not_positive(request: Request) -> tuple[Finding, ...]:
    """Return a stop for each figure of the meter that is not above zero."""
    findings = []
    for entry in request.profile.entries:
        found = request.tag.quantity(entry.path)
        if found is not None and not found.value > 0.0:
            message = (
                f"{entry.label} must be greater than zero, and {found.text} came; the figure is "
                "left aside. State it again."
            )
            findings.append(Finding(Level.STOP, "figure-not-positive", entry.path, message))
    return tuple(findings)


def size_values(request: Request, size: Size) -> dict[str, Given]:
    """Return what the sheet prints of the size: its name and bore."""
    name = request.tag.text("meter.size")
    origin = Origin.GIVEN if name and name != FREE else Origin.DERIVED
    return {
        "meter_size": Given(size.text, origin),
        "meter_bore": Given(size.bore, size.origin, size.source),
    }


def size_findings(request: Request, size: Size) -> tuple[Finding, ...]:
    """Return a caution on a meter larger than the line."""
    nominal = line_nominal(request, series(request.profile))
    if size.nominal <= nominal:
        return ()
    return (
        Finding(
            Level.CAUTION,
            "meter-larger-than-line",
            "meter.size",
            f"The meter ({size.text}) is larger than the line (DN {nominal}); it needs expanders "
            "before it, which spoil the profile. Take the line's size or a smaller one.",
        ),
    )


def stated_or_typical(value: float | None, typical: Typical) -> Given:
    """Return what the user stated of the meter, else the figure usual for the family."""
    found = typical.value if value is None else value
    return given_or_typical(found, stated=value is not None, source=typical.source)


def given_or_typical(value: float, *, stated: bool, source: str) -> Given:
    """Return a figure that the user stated, or that rests on one usual for the family."""
    return Given(value, Origin.GIVEN) if stated else Given(value, Origin.TYPICAL, source)
