"""Start-up stays light: what each front end loads, seen in a fresh interpreter."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

import pytest
from cli_process import demo_job

HEAVY = {"numpy", "pint", "CoolProp", "textual", "reportlab", "rich"}


def _loaded(statements: str, folder: Path | None = None) -> set[str]:
    """Return the top-level modules loaded after running statements in a fresh interpreter."""
    report = "import sys; print('\\n' + ' '.join({name.partition('.')[0] for name in sys.modules}))"
    done = subprocess.run(
        [sys.executable, "-c", f"{statements}\n{report}"],
        capture_output=True,
        encoding="utf-8",
        check=True,
        cwd=folder,
        stdin=subprocess.DEVNULL,
    )
    return set(done.stdout.splitlines()[-1].split())


def _loaded_by(arguments: list[str], folder: Path) -> set[str]:
    """Return what a command has loaded when it ends."""
    statements = (
        "from specsheet.cli import main\n"
        f"try:\n    main({arguments!r})\nexcept SystemExit:\n    pass"
    )
    return _loaded(statements, folder)


@pytest.mark.parametrize(
    "module",
    [
        "specsheet.fields",
        "specsheet.findings",
        "specsheet.sources",
        "specsheet.quantity",
        "specsheet.tag",
        "specsheet.tagfile",
        "specsheet.packs",
        "specsheet.sheet.model",
        "specsheet.job",
        "specsheet.cli",
        "specsheet.tui",
        "specsheet.tui.session",
    ],
)
def test_import_loads_nothing_heavy(module: str) -> None:
    loaded = _loaded(f"import {module}")
    assert "specsheet" in loaded
    assert loaded & HEAVY == set()


@pytest.mark.parametrize(
    ("arguments", "allowed"),
    [
        (["--help"], set()),
        (["families"], set()),
        (["families", "vortex"], set()),
        (["schema"], set()),
        (["completion", "bash"], set()),
        (["new", "FT-1", "--family", "vortex"], set()),
        (["form", "tags"], set()),  # no terminal: it says so before it loads anything
        (["derive", "tags/FT-2104.toml"], {"numpy", "CoolProp"}),
        (["derive", "tags/FT-2104.toml", "--json"], {"numpy", "CoolProp"}),
        (["derive", "tags/absent.toml"], set()),
        (["check", "tags/FT-2104.toml"], {"numpy", "CoolProp"}),
        (["print", "tags/FT-2104.toml"], {"numpy", "CoolProp", "reportlab"}),
    ],
    ids=lambda value: " ".join(value) if isinstance(value, list) else "",
)
def test_command_loads_only_what_it_needs(
    arguments: list[str], allowed: set[str], tmp_path: Path
) -> None:
    assert _loaded_by(arguments, demo_job(tmp_path)) & HEAVY <= allowed


def test_demo_loads_no_form_without_a_terminal(tmp_path: Path) -> None:
    assert "textual" not in _loaded_by(["demo", "--no-form"], tmp_path)


def test_first_screen_loads_no_engineering() -> None:
    loaded = _loaded("import specsheet.tui.app, specsheet.tui.form_screen")
    assert "textual" in loaded
    assert loaded & {"numpy", "pint", "CoolProp", "reportlab"} == set()


def test_reading_and_refusing_load_nothing_heavy() -> None:
    statements = (
        "from specsheet.quantity import parse\n"
        "assert parse('7 bar(g)', 'pressure').value == 7e5\n"
        "assert 'bar(g)' in parse('1,5 bar', 'pressure').message"
    )
    assert _loaded(statements) & HEAVY == set()


def test_the_check_sees_a_heavy_library() -> None:
    assert "numpy" in _loaded("import numpy")
