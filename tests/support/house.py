"""The files of the project, for the tests that hold them to its rules."""

from __future__ import annotations

from pathlib import Path

ROOT = Path(__file__).resolve().parents[2]
SOURCE_FILES = tuple(sorted((ROOT / "specsheet").rglob("*.py")))
TEST_FILES = tuple(sorted((ROOT / "tests").rglob("*.py")))


def relative(path: Path) -> str:
    """Return the path of a file within the project."""
    return path.relative_to(ROOT).as_posix()


def text_files() -> tuple[Path, ...]:
    """Return every text that the project is made of: sources, tests, packs, documents, scripts."""
    folders = ("specsheet", "tests", "profiles", ".ci")
    endings = {".py", ".toml", ".md", ".tcss", ".txt", ".json", ""}
    inside = (path for folder in folders for path in (ROOT / folder).rglob("*"))
    top = (ROOT / name for name in ("README.md", "DEVELOPERS.md", "LICENSE", "pyproject.toml"))
    return tuple(
        path
        for path in (*inside, *top)
        if path.is_file() and path.suffix in endings and "__pycache__" not in path.parts
    )
