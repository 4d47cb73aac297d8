"""Each outside library lives in one room, and tests alone use the libraries that check results."""

from __future__ import annotations

import ast
from pathlib import Path

import pytest
from house import SOURCE_FILES, relative

#: library -> the only places that may import it (folders end with a slash)
HOMES = {
    "CoolProp": ("specsheet/fluid/",),
    "reportlab": ("specsheet/render/",),
    "fontpkg": ("specsheet/render/",),
    "textual": ("specsheet/tui/",),
    "rich": ("specsheet/cli/", "specsheet/tui/"),
    "argparse": ("specsheet/cli/",),
    "tomli": ("specsheet/packs.py", "specsheet/tagfile/", "specsheet/fluid/"),
}
ABSENT = {"fluids", "iapws", "chemicals", "pyaga8", "scipy", "pandas", "pint", "tomllib"}
#: rooms that everything is built on and that must load fast
WITHOUT_NUMPY = ("fields", "quantity", "tagfile", "job", "cli")


def _imported(path: Path) -> set[str]:
    """Return the top-level names of all that a file imports, anywhere in it and by any means."""
    found: set[str] = set()
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            found.update(alias.name.partition(".")[0] for alias in node.names)
        elif isinstance(node, ast.ImportFrom) and node.module and not node.level:
            found.add(node.module.partition(".")[0])
        elif isinstance(node, ast.Call) and node.args and isinstance(node.args[0], ast.Constant):
            called = getattr(node.func, "attr", getattr(node.func, "id", ""))
            if called in ("import_module", "find_spec", "__import__"):
                found.add(str(node.args[0].value).partition(".")[0])
    return found


@pytest.mark.parametrize("library", HOMES)
def test_library_stays_in_its_room(library: str) -> None:
    users = [relative(path) for path in SOURCE_FILES if library in _imported(path)]
    assert users, f"{library} is used by nobody: drop it"
    assert [user for user in users if not user.startswith(HOMES[library])] == []


def test_libraries_that_check_results_stay_in_the_tests() -> None:
    assert {relative(path): _imported(path) & ABSENT for path in SOURCE_FILES} == {
        relative(path): set() for path in SOURCE_FILES
    }


@pytest.mark.parametrize("room", WITHOUT_NUMPY)
def test_room_without_numpy(room: str) -> None:
    inside = [path for path in SOURCE_FILES if relative(path).startswith(f"specsheet/{room}/")]
    assert inside
    assert [relative(path) for path in inside if "numpy" in _imported(path)] == []


def test_imports_inside_the_package_are_absolute() -> None:
    relative_imports = [
        f"{relative(path)}:{node.lineno}"
        for path in SOURCE_FILES
        for node in ast.walk(ast.parse(path.read_text(encoding="utf-8")))
        if isinstance(node, ast.ImportFrom) and node.level
    ]
    assert relative_imports == []
