"""Every profile of a meter family says what the program and the buyer need, with its sources."""

from __future__ import annotations

import copy
from pathlib import Path
from typing import Any

import pytest
from family_keys import KEYS

from specsheet import packs
from specsheet.fields import COMMON, KINDS, PLAIN_KINDS, TERMS
from specsheet.findings import Level
from specsheet.meters import registry
from specsheet.sources import MEMORY, PRACTICE, SOURCES
from specsheet.tagfile.known import tag_defaults

METERS = Path(registry.__file__).parent

#: what a profile must have; the message of a failing test is the guide for a new one
WANTED = {
    "title": str,
    "group": str,
    "principle": str,
    "phases": list,
    "outputs": list,
    "moving_parts": bool,
    "applies_to": list,
    "loss_class": str,
    "usual": dict,
    "reply": list,
    "clauses": dict,
    "wetted": dict,
}
ALLOWED = {
    "straight": dict,
    "orientations": list,
    "entries": list,
    "limits": list,
    "remarks": list,
    "typical": dict,
}
USUAL = (
    "sizes",
    "turndown",
    "uncertainty_calibrated",
    "uncertainty_uncalibrated",
    "loss_coefficient",
)
ENTRY = (
    "key",
    "label",
    "kind",
    "help",
    "example",
    "choices",
    "words",
    "default",
    "needed",
    "symbol",
)
LIMIT = ("quantity", "low", "high", "phase", "level", "message", "source")
REMARK = ("code", "when", "unless", "phase", "level", "message", "source", "choosing")
STRAIGHT = (
    "source",
    "betas",
    "fittings",
    "upstream",
    "reduced",
    "downstream",
    "downstream_reduced",
)
ENTRIES = {entry.path: entry for entry in COMMON}
FITTINGS = ENTRIES["line.upstream_fitting"].choices
ORIENTATIONS = ENTRIES["line.orientation"].choices


def is_source(text: object) -> bool:
    """Tell whether a text names where a figure comes from."""
    return isinstance(text, str) and (
        PRACTICE in text
        or MEMORY in text
        or text in SOURCES
        or any(source.name.split(":")[0] in text for source in SOURCES.values())
    )


def figures(raw: dict[str, Any]) -> list[tuple[str, object]]:
    """Return every figure's name with its source."""
    found = [(f"limits: {item.get('quantity')}", item.get("source")) for item in raw["limits"]]
    found += [(f"remarks: {r.get('code')}", r.get("source")) for r in raw.get("remarks", [])]
    for table in ("usual", "typical"):
        found.extend(
            (f"{table}.{name}", item.get("source") if isinstance(item, dict) else None)
            for name, item in raw.get(table, {}).items()
        )
    if "straight" in raw:
        found.append(("straight", raw["straight"].get("source")))
    return found


def faults(key: str, raw: dict[str, Any]) -> list[str]:
    """Return what is wrong with the raw data of a profile, each with what was wanted."""
    wrong = [
        f"{name}: wanted, a {kind.__name__}"
        for name, kind in WANTED.items()
        if not isinstance(raw.get(name), kind) or (raw[name] in ("", [], {}) and kind is not bool)
    ]
    raw = {"limits": [], **raw}
    wrong.extend(_unknown(raw))
    wrong.extend(
        f"{name}: each figure needs a source: a citation with a name of the bibliography, "
        f"{PRACTICE!r} or {MEMORY!r}; {source!r} came"
        for name, source in figures(raw)
        if not is_source(source)
    )
    wrong.extend(_words(raw))
    wrong.extend(_usual(raw))
    for item in raw["limits"]:
        wrong.extend(_limit(item))
    for item in raw.get("remarks", []):
        wrong.extend(_remark(item))
    for table in ("entries", "reply"):
        for item in raw.get(table, []):
            wrong.extend(f"{table}: {fault}" for fault in _entry(item))
    wrong.extend(_straight(raw.get("straight", {})))
    wrong.extend(f"default of {path}: {why}" for path, why in tag_defaults(key).refused.items())
    return wrong


def _unknown(raw: dict[str, Any]) -> list[str]:
    """A key of its own is one that a meter module reads."""
    code = "".join(path.read_text(encoding="utf-8") for path in METERS.rglob("*.py"))
    return [
        f"{name}: no module of meters/ reads it"
        for name in raw
        if name not in WANTED and name not in ALLOWED and f'"{name}"' not in code
    ]


def _words(raw: dict[str, Any]) -> list[str]:
    lists = (
        ("phases", ("liquid", "gas")),
        ("applies_to", packs.APPLICATIONS),
        ("orientations", ORIENTATIONS),
    )
    wrong = [
        f"{name}: {word!r} is none of {known}"
        for name, known in lists
        for word in raw.get(name, [])
        if word not in known
    ]
    if raw.get("loss_class") not in packs.LOSS_CLASSES:
        wrong.append(f"loss_class: one of {packs.LOSS_CLASSES} is wanted")
    clauses = raw.get("clauses", {})
    wrong.extend(
        f"clauses.{name}: sentences are wanted, each with a full stop"
        for name in ("calibration", "installation", "output")
        if not clauses.get(name) or not all(line.endswith(".") for line in clauses[name])
    )
    return wrong


def _usual(raw: dict[str, Any]) -> list[str]:
    usual = raw.get("usual", {})
    wrong = [f"usual.{name}: not known" for name in usual if name not in USUAL]
    if "turndown" not in usual:
        wrong.append("usual.turndown: wanted")
    if not {"uncertainty_calibrated", "uncertainty_uncalibrated"} & usual.keys():
        wrong.append("usual.uncertainty_calibrated or usual.uncertainty_uncalibrated: wanted")
    for name, item in usual.items():
        if name == "sizes":
            if not 0 < item.get("low", 0) < item.get("high", 0):
                wrong.append("usual.sizes: low and high, DN, rising")
        elif not item.get("value", 0) > 0:
            wrong.append(f"usual.{name}: a positive value is wanted")
    return wrong


def _limit(item: dict[str, Any]) -> list[str]:
    name = item.get("quantity", "")
    wrong = [f"limits, {name}: {key} is not known" for key in item if key not in LIMIT]
    if name not in TERMS:
        wrong.append(f"limits: {name!r} is no term of the glossary")
    if item.get("level") not in set(Level):
        wrong.append(f"limits, {name}: level is stop, caution or note")
    if item.get("phase", "") not in ("", "liquid", "gas"):
        wrong.append(f"limits, {name}: phase is liquid or gas")
    if "low" not in item and "high" not in item:
        wrong.append(f"limits, {name}: low or high is wanted (SI)")
    if "low" in item and "high" in item and not item["low"] < item["high"]:
        wrong.append(f"limits, {name}: low must lie below high")
    message = item.get("message", "")
    if not message or message.endswith(".") or (message[0].isupper() and not message[:2].isupper()):
        wrong.append(f"limits, {name}: the message goes on a sentence: small letter, no full stop")
    return wrong


def _remark(item: dict[str, Any]) -> list[str]:
    name = item.get("code", "")
    wrong = [f"remarks, {name}: {key} is not known" for key in item if key not in REMARK]
    if not name or not item.get("when"):
        wrong.append(f"remarks, {name}: code and when are wanted")
    if item.get("level") not in set(Level):
        wrong.append(f"remarks, {name}: level is stop, caution or note")
    if item.get("phase", "") not in ("", "liquid", "gas"):
        wrong.append(f"remarks, {name}: phase is liquid or gas")
    message = item.get("message", "")
    if not message or message.endswith(".") or message[0].isupper():
        wrong.append(f"remarks, {name}: the message goes on a sentence: small letter, no full stop")
    return wrong


def _entry(item: dict[str, Any]) -> list[str]:
    name = item.get("key", "?")
    wrong = [f"{name}: {key} is not known" for key in item if key not in ENTRY]
    wrong.extend(
        f"{name}: {key} is wanted" for key in ("label", "kind", "help") if not item.get(key)
    )
    if item.get("kind") not in (*KINDS, *PLAIN_KINDS):
        wrong.append(f"{name}: {item.get('kind')!r} is no kind")
    return wrong


def _straight(raw: dict[str, Any]) -> list[str]:
    known = (*STRAIGHT, *FITTINGS)
    return [f"straight: {name!r} is no fitting" for name in raw if name not in known] + [
        f"straight.fittings: {name!r} is no fitting"
        for name in raw.get("fittings", {})
        if name not in FITTINGS
    ]


@pytest.mark.parametrize("key", packs.family_keys())
def test_profile_is_complete_and_names_its_sources(key: str) -> None:
    wrong = faults(key, dict(packs.table(f"families/{key}")))
    assert not wrong, f"profiles/families/{key}.toml:\n  " + "\n  ".join(wrong)


@pytest.mark.parametrize("key", packs.family_keys())
def test_profile_belongs_to_a_known_family(key: str) -> None:
    assert key in KEYS


def test_every_module_has_a_profile() -> None:
    assert set(registry.MODULES) <= set(packs.family_keys())


def test_every_family_has_a_profile() -> None:
    assert set(KEYS) == set(packs.family_keys())


@pytest.mark.parametrize(
    ("damage", "wanted"),
    [
        (lambda raw: raw["limits"][0].pop("source"), "needs a source"),
        (lambda raw: raw["limits"][0].update(source="everybody knows"), "needs a source"),
        (lambda raw: raw["usual"]["turndown"].pop("source"), "usual.turndown"),
        (lambda raw: raw["typical"]["strouhal_number"].pop("source"), "typical.strouhal_number"),
        (lambda raw: raw["straight"].pop("source"), "straight"),
        (lambda raw: raw.update(colour="blue"), "colour"),
        (lambda raw: raw["limits"][0].update(unit="m/s"), "unit is not known"),
        (lambda raw: raw["limits"][0].update(quantity="speed"), "no term"),
        (lambda raw: raw["phases"].append("plasma"), "phases"),
        (lambda raw: raw["clauses"].pop("calibration"), "clauses.calibration"),
        (lambda raw: raw.update(applies_to=[]), "applies_to"),
        (lambda raw: raw["usual"].pop("uncertainty_calibrated"), "uncertainty"),
        (lambda raw: raw["reply"][0].pop("help"), "help is wanted"),
    ],
)
def test_a_damaged_profile_is_refused(damage: Any, wanted: str) -> None:
    raw = copy.deepcopy(dict(packs.table("families/vortex")))
    damage(raw)
    assert any(wanted in fault for fault in faults("vortex", raw))


def test_names_of_families_are_had_without_reading_a_profile(monkeypatch: Any) -> None:
    monkeypatch.setattr(packs, "table", lambda name: pytest.fail(f"{name} was read"))
    packs.family_keys.cache_clear()
    assert "vortex" in packs.family_keys()
