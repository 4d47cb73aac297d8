"""List the meter families, or show what one wants to know and is limited by."""

from __future__ import annotations

from argparse import Namespace

from specsheet import packs, quantity
from specsheet.cli.choose import known_family
from specsheet.cli.narrate import data
from specsheet.cli.status import Status
from specsheet.fields import KINDS, Entry, term
from specsheet.meters import registry
from specsheet.packs import Profile, ProfileLimit


def run(arguments: Namespace) -> Status:
    """Write the list, or one family."""
    key = arguments.family
    if key is None:
        data(_listing())
        return Status.FINE
    if not known_family(key):
        return Status.UNUSABLE
    data(_detail(packs.profile(key)))
    return Status.FINE


def _listing() -> str:
    profiles = [packs.profile(key) for key in packs.family_keys()]
    width = max(len(item.key) for item in profiles)
    lines: list[str] = []
    for group in sorted({item.group for item in profiles}):
        lines.append(f"{group}:")
        for item in profiles:
            if item.group == group:
                built = "" if item.key in registry.MODULES else "  (limits only)"
                lines.append(f"  {item.key:<{width}}  {item.title}{built}")
    return "\n".join(lines)


def _detail(profile: Profile) -> str:
    lines = [
        f"{profile.title} ({profile.key})",
        profile.principle,
        f"phases: {', '.join(profile.phases)}; outputs: {', '.join(profile.outputs)}",
        "",
        "entries under [meter]:",
        *(line for entry in profile.entries for line in _entry(entry)),
        "",
        "usual limits:",
        *(f"  {_limit(limit)}" for limit in profile.limits),
        "",
        "the bidder must state:",
        *(f"  {entry.label}: {entry.help}" for entry in profile.reply),
    ]
    return "\n".join(lines)


def _entry(entry: Entry) -> list[str]:
    options = [*entry.choices, *(f'"{word}"' for word in entry.words)]
    if entry.kind in KINDS:
        options.append(f'{KINDS[entry.kind].label}, such as "{entry.example}"')
    assumed = f" (assumed: {entry.default})" if entry.default else ""
    return [f"  {entry.key}: {' | '.join(options) or entry.kind}{assumed}", f"      {entry.help}"]


def _limit(limit: ProfileLimit) -> str:
    of = term(limit.quantity)
    unit = of.shown or KINDS[of.kind].shown
    bounds = [
        f"{words} {quantity.from_si(bound, of.kind, unit):.6g} {unit}".removesuffix(" 1")
        for words, bound in (("at least", limit.low), ("at most", limit.high))
        if bound is not None
    ]
    phase = f" ({limit.phase})" if limit.phase else ""
    return f"{of.label}{phase}: {', '.join(bounds)}; {limit.message} [{limit.source}]"
