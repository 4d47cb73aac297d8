"""The meter families as a list to choose from."""

from __future__ import annotations

from collections.abc import Sequence

from specsheet import packs
from specsheet.tui.dialogs import Choice


def family_choices() -> Sequence[Choice]:
    """Return all families by title, with how each works and what it can meter."""
    profiles = sorted((packs.profile(key) for key in packs.family_keys()), key=lambda p: p.title)
    return [
        Choice(p.key, f"{p.title}   {p.key}", f"{p.principle} For {' and '.join(p.phases)}.")
        for p in profiles
    ]
