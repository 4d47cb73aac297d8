"""Start-up stays light: what everything else is built on loads no heavy library."""

from __future__ import annotations

import subprocess
import sys

import pytest

HEAVY = {"numpy", "pint", "CoolProp", "textual", "reportlab", "tomlkit"}


def _loaded(statements: str) -> set[str]:
    """Return the top-level modules loaded after running statements in a fresh interpreter."""
    report = "import sys; print(' '.join({name.partition('.')[0] for name in sys.modules}))"
    done = subprocess.run(
        [sys.executable, "-c", f"{statements}\n{report}"],
        capture_output=True,
        text=True,
        check=True,
    )
    return set(done.stdout.split())


@pytest.mark.parametrize(
    "module",
    [
        "specsheet.fields",
        "specsheet.findings",
        "specsheet.sources",
        "specsheet.quantity",
        "specsheet.tag",
        "specsheet.packs",
    ],
)
def test_import_loads_nothing_heavy(module: str) -> None:
    loaded = _loaded(f"import {module}")
    assert "specsheet" in loaded
    assert loaded & HEAVY == set()


def test_reading_and_refusing_load_nothing_heavy() -> None:
    statements = (
        "from specsheet.quantity import parse\n"
        "assert parse('7 bar(g)', 'pressure').value == 7e5\n"
        "assert 'bar(g)' in parse('1,5 bar', 'pressure').message"
    )
    assert _loaded(statements) & HEAVY == set()


def test_the_check_sees_a_heavy_library() -> None:
    assert "numpy" in _loaded("import numpy")
