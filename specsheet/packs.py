"""The data packs of ``profiles/``: found, read and typed. Data only, no engineering.

A pack is a TOML file that a user may read, correct and extend. From a checkout the folder stands
at the top of the repository; in an installed wheel it stands inside the package.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from functools import cache
from pathlib import Path
from typing import Any

import tomli

from specsheet.fields import Entry

FAMILY_FOLDER = "families"


@cache
def folder() -> Path:
    """Return the folder of the data packs.

    Raises:
        FileNotFoundError: the installation lacks it.
    """
    here = Path(__file__).resolve().parent
    for candidate in (here / "profiles", here.parent / "profiles"):
        if candidate.is_dir():
            return candidate
    raise FileNotFoundError(f"the data packs are missing beside {here}: install specsheet again")


@cache
def table(name: str) -> Mapping[str, Any]:
    """Return the pack ``profiles/<name>.toml`` as plain TOML data (do not change it)."""
    with (folder() / f"{name}.toml").open("rb") as file:
        return tomli.load(file)


@dataclass(frozen=True, slots=True)
class ProfileLimit:
    """A usual limit of a family, from its profile.

    Attributes:
        quantity: glossary key it bounds ("velocity", "temperature").
        low, high: bounds in SI, None where there is none.
        phase: "liquid", "gas" or "" for both.
        level: level of the finding when it does not hold.
        message: what it means to cross it.
        source: citation, "common practice, no source" or "from memory".
    """

    quantity: str
    low: float | None
    high: float | None
    phase: str
    level: str
    message: str
    source: str


@dataclass(frozen=True, slots=True)
class Remark:
    """What usual practice says of a family in a kind of service, from its profile.

    Attributes:
        code: code of the finding.
        when: words of the service that it is about, any of them; "any" for every service.
        unless: words that lift it.
        phase: "liquid", "gas" or "" for both.
        level: level of the finding.
        message: what speaks against the family, and what to do.
        source: citation, "common practice, no source" or "from memory".
        choosing: whether it counts only while a family is being chosen: whoever has chosen the
            family knows it.
    """

    code: str
    when: tuple[str, ...]
    unless: tuple[str, ...]
    phase: str
    level: str
    message: str
    source: str
    choosing: bool


@dataclass(frozen=True, slots=True)
class Typical:
    """A figure usual for the family, printed as typical, for the bidder to confirm."""

    value: float
    source: str


@dataclass(frozen=True, slots=True)
class SizeRange:
    """Nominal sizes in which the family is usually made, or lines it usually goes into (DN)."""

    low: int
    high: int
    source: str


#: where a family can be used: a meter in the line, a probe, from outside, with a free surface
APPLICATIONS = ("closed pipe", "insertion", "clamp-on", "open channel")
#: permanent pressure loss of a family in words: of the order of 0, 0.5, 2 velocity heads, or more
LOSS_CLASSES = ("none", "low", "medium", "high")


@dataclass(frozen=True)
class Profile:
    """The data half of a meter family: ``profiles/families/<key>.toml``.

    Attributes:
        key, title, group, principle: what it is called and how it works.
        phases: phases it can meter.
        applies_to: some of :data:`APPLICATIONS`.
        orientations: orientations of the line that it bears, as ``line.orientation`` has them;
            empty for any.
        loss_class: one of :data:`LOSS_CLASSES`.
        sizes: usual sizes; None where they are not a matter of nominal size.
        turndown: usual turndown in flow.
        uncertainty_calibrated: usual expanded uncertainty of the flow, each meter calibrated.
        uncertainty_uncalibrated: the same without; None where it is never sold so.
        loss_coefficient: usual permanent loss by ρv²/2 in the meter; None where it is no constant.
        entries: what the user may state under ``[meter]``.
        reply: what a bidder must state.
        limits: usual limits of use.
        remarks: what usual practice says of the family in certain services.
        typical: usual figures by name (SI).
        straight: straight-length rules, raw (read by :mod:`specsheet.line`).
        wetted: wetted parts and their usual materials.
        clauses: clause name (calibration, installation, output ...) -> sentences.
        outputs: kinds of output.
        moving_parts: whether anything moves in the flow.
        data: the whole file, raw.
    """

    key: str
    title: str
    group: str
    principle: str
    phases: tuple[str, ...]
    applies_to: tuple[str, ...] = ()
    orientations: tuple[str, ...] = ()
    loss_class: str = ""
    sizes: SizeRange | None = None
    turndown: Typical | None = None
    uncertainty_calibrated: Typical | None = None
    uncertainty_uncalibrated: Typical | None = None
    loss_coefficient: Typical | None = None
    entries: tuple[Entry, ...] = ()
    reply: tuple[Entry, ...] = ()
    limits: tuple[ProfileLimit, ...] = ()
    remarks: tuple[Remark, ...] = ()
    typical: Mapping[str, Typical] = field(default_factory=dict)
    straight: Mapping[str, Any] = field(default_factory=dict)
    wetted: Mapping[str, tuple[str, ...]] = field(default_factory=dict)
    clauses: Mapping[str, tuple[str, ...]] = field(default_factory=dict)
    outputs: tuple[str, ...] = ()
    moving_parts: bool = False
    data: Mapping[str, Any] = field(default_factory=dict)


def _entry(prefix: str, raw: Mapping[str, Any]) -> Entry:
    return Entry(
        path=f"{prefix}.{raw['key']}",
        label=raw["label"],
        kind=raw["kind"],
        help=raw["help"],
        example=raw.get("example", ""),
        choices=tuple(raw.get("choices", ())),
        words=tuple(raw.get("words", ())),
        default=raw.get("default", ""),
        needed=raw.get("needed", ""),
        symbol=raw.get("symbol", ""),
    )


def _limit(raw: Mapping[str, Any]) -> ProfileLimit:
    return ProfileLimit(
        quantity=raw["quantity"],
        low=raw.get("low"),
        high=raw.get("high"),
        phase=raw.get("phase", ""),
        level=raw["level"],
        message=raw["message"],
        source=raw["source"],
    )


def _remark(raw: Mapping[str, Any]) -> Remark:
    return Remark(
        code=raw["code"],
        when=tuple(raw["when"]),
        unless=tuple(raw.get("unless", ())),
        phase=raw.get("phase", ""),
        level=raw["level"],
        message=raw["message"],
        source=raw["source"],
        choosing=raw.get("choosing", False),
    )


def _typical(raw: Mapping[str, Any] | None) -> Typical | None:
    return None if raw is None else Typical(raw["value"], raw["source"])


def _size_range(raw: Mapping[str, Any] | None) -> SizeRange | None:
    return None if raw is None else SizeRange(raw["low"], raw["high"], raw["source"])


@cache
def family_keys() -> tuple[str, ...]:
    """Return the keys of all families that have a profile, sorted."""
    return tuple(sorted(path.stem for path in (folder() / FAMILY_FOLDER).glob("*.toml")))


@cache
def profile(key: str) -> Profile:
    """Return the profile of a family.

    Raises:
        KeyError: there is no such family.
    """
    if key not in family_keys():
        raise KeyError(key)
    raw = table(f"{FAMILY_FOLDER}/{key}")
    usual = raw.get("usual", {})
    return Profile(
        key=key,
        title=raw["title"],
        group=raw["group"],
        principle=raw["principle"],
        phases=tuple(raw["phases"]),
        applies_to=tuple(raw.get("applies_to", ())),
        orientations=tuple(raw.get("orientations", ())),
        loss_class=raw.get("loss_class", ""),
        sizes=_size_range(usual.get("sizes")),
        turndown=_typical(usual.get("turndown")),
        uncertainty_calibrated=_typical(usual.get("uncertainty_calibrated")),
        uncertainty_uncalibrated=_typical(usual.get("uncertainty_uncalibrated")),
        loss_coefficient=_typical(usual.get("loss_coefficient")),
        entries=tuple(_entry("meter", item) for item in raw.get("entries", ())),
        reply=tuple(_entry("reply", item) for item in raw.get("reply", ())),
        limits=tuple(_limit(item) for item in raw.get("limits", ())),
        remarks=tuple(_remark(item) for item in raw.get("remarks", ())),
        typical={
            name: Typical(item["value"], item["source"])
            for name, item in raw.get("typical", {}).items()
        },
        straight=raw.get("straight", {}),
        wetted={name: tuple(parts) for name, parts in raw.get("wetted", {}).items()},
        clauses={name: tuple(lines) for name, lines in raw.get("clauses", {}).items()},
        outputs=tuple(raw.get("outputs", ())),
        moving_parts=raw.get("moving_parts", False),
        data=raw,
    )
