"""The files of the project, for the tests that hold them to its rules."""

from __future__ import annotations

from pathlib import Path

ROOT = Path(__file__).resolve().parents[2]
SOURCE_FILES = tuple(sorted((ROOT / "specsheet").rglob("*.py")))
TEST_FILES = tuple(sorted((ROOT / "tests").rglob("*.py")))


def relative(path: Path) -> str:
    """Return the path of a file within the project."""
    return path.relative_to(ROOT).as_posix()
