"""A meter family named on the command line."""

from __future__ import annotations

from difflib import get_close_matches

from specsheet import packs
from specsheet.cli.narrate import say


def known_family(key: str) -> bool:
    """Tell whether a family has a profile; narrate what was meant when it has none."""
    keys = packs.family_keys()
    if key in keys:
        return True
    near = get_close_matches(key, keys, n=3)
    hint = f"did you mean {' or '.join(near)}? " if near else ""
    say(f"there is no meter family {key!r}; {hint}`specsheet families` lists them")
    return False
