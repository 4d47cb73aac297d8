"""TOML data by place: what an edit is meant to do, to compare with what it did."""

from __future__ import annotations

import json
from typing import Any

from specsheet.tagfile.spans import Place


def at(data: Any, place: Place) -> Any:
    """Return what stands at a place, None where nothing does."""
    for part in place:
        try:
            data = data[part]
        except (KeyError, IndexError, TypeError):
            return None
    return data


def put(data: Any, place: Place, value: object) -> None:
    """Put a value at a place, with the tables around it."""
    for part in place[:-1]:
        data = data[part] if isinstance(part, int) else data.setdefault(part, {})
    data[place[-1]] = value


def drop(data: Any, place: Place) -> None:
    """Remove what stands at a place."""
    for part in place[:-1]:
        data = data[part]
    del data[place[-1]]


def same(one: object, other: object) -> bool:
    """Tell whether two TOML data state the same; an empty table states nothing."""
    return _normal(one) == _normal(other)


def _normal(data: object) -> str:
    # nan equals nan here, and 1 differs from 1.0 and from true
    return json.dumps(_pruned(data), sort_keys=True, default=str)


def _pruned(data: object) -> object:
    if not isinstance(data, dict):
        return data
    pruned = {key: _pruned(value) for key, value in data.items()}
    return {key: value for key, value in pruned.items() if value != {}}
