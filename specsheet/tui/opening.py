"""Opening a tag file: a session, or the words for why there is none."""

from __future__ import annotations

from pathlib import Path

from specsheet import tagfile
from specsheet.tagfile.literal import value_text
from specsheet.tagfile.problem import Problem
from specsheet.tagfile.source import read_text
from specsheet.tagfile.syntax import parse
from specsheet.tui.session import Session


def open_session(path: Path) -> Session | str:
    """Return a session on a tag file, or a message that says where it cannot be read.

    A file that does not exist starts a new tag of no family yet; it is made at the first save.
    """
    if _is_absent(path) and path.suffix == ".toml" and path.parent.is_dir():
        return Session(path, _bare_text(path.stem), None)
    text = read_text(path)
    if isinstance(text, Problem):
        return str(text)
    data = parse(text, str(path))
    if isinstance(data, Problem):
        return f"{data}. Mend the line in a text editor and open the file again."
    try:
        content = path.read_bytes()
    except OSError as error:
        return f"{path}: cannot be read: {error.strerror or error}"
    return Session(path, text, content)


def _is_absent(path: Path) -> bool:
    """Tell whether nothing stands at a path; what cannot be looked at is there."""
    try:
        path.stat()
    except FileNotFoundError:
        return True
    except (OSError, ValueError):
        return False
    return False


def new_session(path: Path, tag: str, family: str) -> Session:
    """Return a session on a new tag of a family; its file is made at the first save."""
    return Session(path, tagfile.new_text(tag, family), None)


def _bare_text(tag: str) -> str:
    return f"schema = 1\ntag = {value_text(tag)}\n"
