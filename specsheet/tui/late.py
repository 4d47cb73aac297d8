"""Modules that the first screen does without: loaded when something of them is first used."""

from __future__ import annotations

import sys
from importlib.util import LazyLoader, find_spec, module_from_spec
from typing import Any


def late(name: str) -> Any:
    """Return a module that loads itself at the first look into it.

    Args:
        name: full name of the module.

    Raises:
        ImportError: there is no such module.
    """
    if name in sys.modules:
        return sys.modules[name]
    spec = find_spec(name)
    if spec is None or spec.loader is None:
        raise ImportError(f"there is no module {name}")
    spec.loader = LazyLoader(spec.loader)
    module = module_from_spec(spec)
    sys.modules[name] = module
    spec.loader.exec_module(module)
    parent, _, child = name.rpartition(".")
    setattr(sys.modules[parent], child, module)
    return module
