"""The fluid library, loaded on first use, silently: the only module that touches CoolProp.

Water, steam and aqueous solutions need the extension alone (some 10 ms). The library of fluids
behind it (0.3 s) is loaded when a pure substance, a mixture or humid air is first asked for.
Tables that triple the time of loading are switched off, so that every entry point gives the same
figures; the library says so on standard output, which is kept quiet meanwhile.
"""

from __future__ import annotations

import contextlib
import ctypes
import importlib
import importlib.util
import os
import sys
import types
from collections.abc import Iterator
from functools import cache
from typing import Any

_SWITCH = "COOLPROP_DISABLE_SUPERANCILLARIES_ENTIRELY"

#: what the library raises for states it cannot find
ERRORS = (ValueError, IndexError, RuntimeError, OverflowError, ZeroDivisionError)


@cache
def extension() -> Any:
    """Return the extension module without the library of fluids."""
    found = importlib.util.find_spec("CoolProp")
    if "CoolProp" in sys.modules or found is None or found.submodule_search_locations is None:
        return _plain()
    stub = types.ModuleType("CoolProp")
    stub.__path__ = list(found.submodule_search_locations)
    sys.modules["CoolProp"] = stub
    try:
        return importlib.import_module("CoolProp.CoolProp")
    except ImportError:
        sys.modules.pop("CoolProp", None)
        return _plain()
    finally:
        if sys.modules.get("CoolProp") is stub:
            del sys.modules["CoolProp"]


def _plain() -> Any:
    with _quiet():
        return importlib.import_module("CoolProp.CoolProp")


@cache
def fluids() -> Any:
    """Return the extension module with its library of fluids loaded."""
    module = extension()
    with _quiet():
        module.AbstractState("HEOS", "Nitrogen")
    return module


@contextlib.contextmanager
def _quiet() -> Iterator[None]:
    """Keep standard output clean and the slow tables off while the library loads."""
    before = os.environ.get(_SWITCH)
    os.environ[_SWITCH] = "1"
    try:
        with _silenced():
            yield
    finally:
        if before is None:
            del os.environ[_SWITCH]


@contextlib.contextmanager
def _silenced() -> Iterator[None]:
    """Send standard output of the whole process nowhere; a process without one needs nothing."""
    if sys.stdout is not None:
        sys.stdout.flush()
    try:
        saved = os.dup(1)
    except OSError:
        yield
        return
    silence = os.open(os.devnull, os.O_WRONLY)
    os.dup2(silence, 1)
    try:
        yield
    finally:
        _flush()
        os.dup2(saved, 1)
        os.close(saved)
        os.close(silence)


def _flush() -> None:
    """Flush the buffers of the C library, so that nothing of the library comes out later."""
    with contextlib.suppress(OSError, AttributeError, TypeError):
        ctypes.CDLL(None).fflush(None)
