"""The evaluation of one tag: values, checks, uncertainty and findings, ready for any front end."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field

from specsheet.findings import Finding, Level, Origin, Reserve
from specsheet.meters.family import Array, Derivation
from specsheet.packs import Profile
from specsheet.tag import Tag


@dataclass(frozen=True, slots=True)
class Result:
    """One value: an SI number, or a text.

    Attributes:
        value: SI number (of the unit of the term's kind), or a text.
        origin: given, derived, assumed or typical.
        source: citation, or "".
        method: the method in plain words, or "".
        text: what the user typed, where the value was given.
    """

    value: float | str
    origin: Origin
    source: str = ""
    method: str = ""
    text: str = ""


@dataclass(frozen=True, slots=True)
class PointResult:
    """All values at one operating point, by glossary key."""

    name: str
    values: Mapping[str, Result]


@dataclass(frozen=True, slots=True)
class Check:
    """One limit at the point where it is tightest.

    Attributes:
        key: glossary key bounded.
        point: operating point at which the limit is nearest to (or furthest beyond) its bound.
        value: the value there (SI).
        low, high: the bounds (SI).
        holds: whether it holds at every point.
        level: level of the finding when it does not.
        message: what crossing it means.
        source: citation.
        reserve: margin to the flip of the verdict at that point, where a driver decides.
    """

    key: str
    point: str
    value: float
    low: float | None
    high: float | None
    holds: bool
    level: Level
    message: str
    source: str
    reserve: Reserve | None = None


@dataclass(frozen=True, slots=True)
class BudgetLine:
    """One contribution to the uncertainty of the flow at each operating point (relative, k = 1)."""

    key: str
    label: str
    relative: tuple[float, ...]
    origin: Origin
    source: str


@dataclass(frozen=True, slots=True)
class Band:
    """One window of flow on the range ruler.

    Attributes:
        key: glossary key of the value that the limit bounds.
        least, most: its bounds [SI], None where there is none.
        low, high: mass flows [kg/s] between which the limit holds; None where it is open.
        level: level of the limit.
    """

    key: str
    least: float | None
    most: float | None
    low: float | None
    high: float | None
    level: Level


@dataclass(frozen=True)
class Sweep:
    """The range, swept at the conditions of the normal point.

    Attributes:
        mass_flow: [kg/s], shape (m,), rising.
        values: glossary key -> array of shape (m,).
        uncertainty: expanded relative uncertainty, k = 2, shape (m,).
    """

    mass_flow: Array
    values: Mapping[str, Array]
    uncertainty: Array


@dataclass(frozen=True)
class Evaluation:
    """Everything that is known about one tag.

    Attributes:
        tag: the tag.
        profile: the family's profile, None when the family is unknown.
        fluid_name: what the sheet calls the fluid.
        points: values at each operating point.
        element: values of the meter as sized.
        base: values at the job's base condition.
        fluid: values of the fluid that do not depend on the point.
        line: values of the pipe and its straight lengths and ratings.
        summary: values of the tag as a whole (turndown, yearly cost ...).
        notes: heading -> sentences (element, installation, calibration, output, materials,
            cautions), in the order of printing.
        checks: every limit looked at, holding or not.
        budget: contributions to the uncertainty at each point, largest first.
        bands: windows of flow for the range ruler, tightest first.
        sweep: the range; None when the tag could not be evaluated.
        derivations: how each derived value comes about.
        findings: all findings, worst first.
    """

    tag: Tag
    profile: Profile | None = None
    fluid_name: str = ""
    points: tuple[PointResult, ...] = ()
    element: Mapping[str, Result] = field(default_factory=dict)
    base: Mapping[str, Result] = field(default_factory=dict)
    fluid: Mapping[str, Result] = field(default_factory=dict)
    line: Mapping[str, Result] = field(default_factory=dict)
    summary: Mapping[str, Result] = field(default_factory=dict)
    notes: Mapping[str, tuple[str, ...]] = field(default_factory=dict)
    checks: tuple[Check, ...] = ()
    budget: tuple[BudgetLine, ...] = ()
    bands: tuple[Band, ...] = ()
    sweep: Sweep | None = None
    derivations: tuple[Derivation, ...] = ()
    findings: tuple[Finding, ...] = ()

    @property
    def worst(self) -> Level | None:
        """Level of the worst finding, None when there is none."""
        for level in (Level.STOP, Level.CAUTION, Level.NOTE):
            if any(finding.level is level for finding in self.findings):
                return level
        return None
