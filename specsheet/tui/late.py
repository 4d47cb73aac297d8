"""Modules that the first screen does without: loaded when something of them is first used."""

from __future__ import annotations

from importlib import import_module
from typing import Any


class _Late:
    """A stand-in that looks everything up in the module of its name, and keeps what it found.

    The library's lazy modules are of no use here: a package of theirs that is first met by the
    import of a module in it loads that module twice, with two classes of one name.
    """

    def __init__(self, name: str) -> None:
        self._name = name

    def __getattr__(self, name: str) -> Any:
        found = getattr(import_module(self._name), name)
        setattr(self, name, found)
        return found


def late(name: str) -> Any:
    """Return a stand-in for a module that is loaded at the first look into it.

    Args:
        name: full name of the module. Where there is none, the first look raises ImportError.
    """
    return _Late(name)
