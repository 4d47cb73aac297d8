"""Wetted materials against the service: short notes with their source, never a guarantee."""

from __future__ import annotations

import re
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass
from functools import cache, lru_cache
from typing import Any

from specsheet.findings import Finding, Level
from specsheet.fluid.state import FluidResult
from specsheet.line.cautions import dangers
from specsheet.line.material import find_material
from specsheet.line.service import Service, service_facts
from specsheet.packs import Profile, table
from specsheet.tag import Tag

_CELSIUS = 273.15
_ORDER = ("avoid", "conditional", "suited")
_CLOSING = (
    "These are notes, no guarantee: a materials engineer chooses for the true composition, "
    "temperature and traces; local codes come first."
)
_AS_LINE = "as the line"
#: parts that are seals, by their names
SEALS = re.compile(r"\b(seals?|gaskets?)\b")
_SEAL = "require.seal_material"
_NOT_OF_SEALS = frozenset(("any", "abrasive", "slurry"))


@dataclass(frozen=True, slots=True)
class MaterialResult:
    """What is said of the wetted materials.

    Attributes:
        notes: one sentence for each rule that holds, the worst first, and a closing one.
        findings: a caution for a stated material that is to be avoided.
    """

    notes: tuple[str, ...]
    findings: tuple[Finding, ...] = ()


@dataclass(frozen=True, slots=True)
class _Part:
    """A wetted part: its name, the text of its material, and the entry that states it, or ""."""

    name: str
    text: str
    entry: str = ""

    @property
    def rules(self) -> frozenset[int]:
        """Return the indices of the rules that concern it."""
        return rules_about(self.text, seal=bool(SEALS.search(self.name)))


def materials(
    tag: Tag,
    profile: Profile | None,
    fluid: FluidResult | None = None,
    *,
    service: Service | None = None,
) -> MaterialResult:
    """Return the notes on the materials that the fluid touches.

    Args:
        tag: the tag; ``require.body_material``, ``require.seal_material`` and ``line.material``
            count as wetted.
        profile: the family's profile with its wetted parts, or None.
        fluid: states at the operating points, where saturation decides temperature or pressure.
        service: facts of the service, where the caller has them already.
    """
    service = service_facts(tag, fluid) if service is None else service
    words = service.words | dangers(service)
    lines: dict[str, list[str]] = {verdict: [] for verdict in _ORDER}
    findings: list[Finding] = []
    parts = [(part, part.rules) for part in _parts(tag, profile)]
    rules, conditions, known = table("compatibility")["rule"], _conditions(), _known(service, words)
    for index in sorted(set().union(*(concerned for _, concerned in parts))):
        rule = rules[index]
        if not _holds(conditions[index], service, known):
            continue
        hit = [part for part, concerned in parts if index in concerned]
        verdict, text, source = rule["verdict"], rule["text"], rule["source"]
        lines[verdict].append(f"{_named(hit)}: {verdict}; {text} ({source}).")
        findings.extend(
            Finding(
                Level.CAUTION,
                "material-avoid",
                part.entry,
                f'"{part.text}" is stated, but {text}. Choose another, or have a materials '
                "engineer confirm it.",
                source=source,
            )
            for part in hit
            if part.entry and verdict == "avoid"
        )
    notes = [line for verdict in _ORDER for line in lines[verdict]]
    return MaterialResult((*notes, _CLOSING), tuple(dict.fromkeys(findings)))


def rules_by_verdict(service: Service, words: frozenset[str]) -> Mapping[str, frozenset[int]]:
    """Return which rules hold in a service, by their verdict ("avoid", "conditional", "suited").

    Args:
        service: facts of the service.
        words: words of the service with its dangers.
    """
    known = _known(service, words)
    found: dict[str, list[int]] = {verdict: [] for verdict in _ORDER}
    rules, conditions, by_word = table("compatibility")["rule"], _conditions(), _by_word()
    for index in set().union(*(by_word.get(word, ()) for word in known)):
        if _holds(conditions[index], service, known):
            found[rules[index]["verdict"]].append(index)
    return {verdict: frozenset(indices) for verdict, indices in found.items()}


def avoided_rules(service: Service, words: frozenset[str]) -> frozenset[int]:
    """Return which rules call a material one to avoid; arguments as :func:`rules_by_verdict`."""
    return rules_by_verdict(service, words)["avoid"]


def unsuited_parts(profile: Profile, avoided: frozenset[int]) -> tuple[Finding, ...]:
    """Return a caution for each wetted part of a family of which every usual material is to avoid.

    Args:
        profile: the family's profile with its wetted parts.
        avoided: as :func:`avoided_rules` has it.
    """
    if not avoided:
        return ()
    rules = table("compatibility")["rule"]
    found = []
    for name, choices in profile.wetted.items():
        known = [text for text in choices if text != _AS_LINE]
        hits = [avoided & rules_about(text) for text in known]
        if not known or not all(hits):
            continue
        rule = rules[min(hits[0])]
        message = (
            f"{profile.title}: {name} usually of {' or '.join(known)}, but {rule['text']}. Only "
            "with another material, which the bidder names."
        )
        found.append(
            Finding(Level.CAUTION, "material-unsuited", "family", message, source=rule["source"])
        )
    return tuple(found)


def _parts(tag: Tag, profile: Profile | None) -> Iterator[_Part]:
    line = tag.text("line.material")
    if line:
        yield _Part("pipe", line, "line.material" if "line.material" in tag.given else "")
    body = tag.text("require.body_material")
    if body:
        yield _Part("body", body, "require.body_material")
    seal = tag.text(_SEAL) if _SEAL in tag.given else ""
    if seal:
        yield _Part("seal", seal, _SEAL)
    if profile is not None:
        for name, choices in profile.wetted.items():
            for text in () if seal and SEALS.search(name) else choices:
                yield _Part(name, line if text == _AS_LINE else text)


def _named(parts: Sequence[_Part]) -> str:
    by_text: dict[str, list[str]] = {}
    for part in parts:
        names = by_text.setdefault(part.text, [])
        if part.name not in names:
            names.append(part.name)
    listed = "; ".join(f"{text} ({', '.join(names)})" for text, names in by_text.items())
    return listed[0].upper() + listed[1:]


@dataclass(frozen=True, slots=True)
class _Condition:
    """When a rule holds: for one of the words, and within every bound that it has.

    Attributes:
        when: substances and words of a service; "any" is of every service.
        phase: "liquid", "gas" or "" for both.
        above, below: temperatures [degC], None where there is no bound.
        chlorides_above: mass fraction [-], None where there is no bound.
    """

    when: frozenset[str]
    phase: str
    above: float | None
    below: float | None
    chlorides_above: float | None


@cache
def _conditions() -> tuple[_Condition, ...]:
    """Return the condition of every rule, in their order."""
    return tuple(
        _Condition(
            frozenset(rule["when"]),
            rule.get("phase", ""),
            rule.get("above"),
            rule.get("below"),
            rule.get("chlorides_above"),
        )
        for rule in table("compatibility")["rule"]
    )


@cache
def _by_word() -> Mapping[str, frozenset[int]]:
    """Return the rules that are about each word."""
    words = frozenset().union(*(condition.when for condition in _conditions()))
    return {
        word: frozenset(i for i, condition in enumerate(_conditions()) if word in condition.when)
        for word in words
    }


def _known(service: Service, words: frozenset[str]) -> frozenset[str]:
    """Return every word that a rule may be about in a service; ``words`` with its dangers."""
    return words.union(service.words, service.fractions, ("any",))


def _holds(rule: _Condition, service: Service, known: frozenset[str]) -> bool:
    """Tell whether the service is one the rule is about; an unknown fact holds no bound."""
    if rule.when.isdisjoint(known) or rule.phase not in ("", service.phase):
        return False
    hottest, coldest, chlorides = service.hottest, service.coldest, service.chlorides
    return (
        (rule.above is None or (hottest is not None and hottest - _CELSIUS > rule.above))
        and (rule.below is None or (coldest is not None and coldest - _CELSIUS < rule.below))
        and (
            rule.chlorides_above is None
            or (chlorides is not None and chlorides > rule.chlorides_above)
        )
    )


@lru_cache(maxsize=4096)
def rules_about(text: str, *, seal: bool = False) -> frozenset[int]:
    """Return the indices of the rules that concern a material.

    Args:
        text: the material.
        seal: whether it is a seal: its temperatures stand in the pack of seals, not in the rules,
            and it does not stand in the flow to be worn.
    """
    rules = table("compatibility")["rule"]
    return frozenset(
        index
        for index, rule in enumerate(rules)
        if _touches(rule, text) and not (seal and _NOT_OF_SEALS.issuperset(rule["when"]))
    )


def _touches(rule: Mapping[str, Any], text: str) -> bool:
    material = find_material(text)
    spoken = f"{text} {material.name if material else ''}".lower()
    if any(_word(word).search(spoken) for word in rule.get("except", ())):
        return False
    return any(
        (material is not None and material.kind == word) or _word(word).search(spoken)
        for word in rule["materials"]
    )


@cache
def _word(word: str) -> re.Pattern[str]:
    return re.compile(rf"(?<![a-z0-9]){re.escape(word)}(?![a-z0-9])")
