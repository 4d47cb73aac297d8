"""Tag file <-> typed tag: read with every problem listed, edited leaf by leaf, replaced whole.

* :func:`load`, :func:`loads`  text -> :class:`Reading` (tag and problems)
* :func:`load_job`, :func:`find_job`  ``job.toml`` -> :class:`Job`
* :class:`Document`  a text edited by path, every other line untouched
* :func:`save`, :func:`stamp`  a file replaced whole or not at all
* :func:`adopt`, :func:`with_family`  another family for the same tag
* :func:`suppose`  a text with other values, read; the file stays as it is
* :func:`new_text`  the text a new tag starts from
* :func:`schema`  JSON Schema of the tag file

Each name is imported at its first use: the form draws a tag with the parser alone.
"""

from importlib import import_module
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from specsheet.tagfile.adoption import Adoption, adopt, with_family
    from specsheet.tagfile.document import Document, EditError
    from specsheet.tagfile.jobfile import JOB_FILE, NO_JOB, Job, find_job, load_job
    from specsheet.tagfile.json_schema import schema
    from specsheet.tagfile.new import new_text
    from specsheet.tagfile.problem import Problem, Reading
    from specsheet.tagfile.read import load, loads
    from specsheet.tagfile.source import read_text
    from specsheet.tagfile.supposition import Change, suppose
    from specsheet.tagfile.writing import SaveError, Stamp, save, stamp

_HOMES = {
    "adoption": ("Adoption", "adopt", "with_family"),
    "document": ("Document", "EditError"),
    "jobfile": ("JOB_FILE", "NO_JOB", "Job", "find_job", "load_job"),
    "json_schema": ("schema",),
    "new": ("new_text",),
    "problem": ("Problem", "Reading"),
    "read": ("load", "loads"),
    "source": ("read_text",),
    "supposition": ("Change", "suppose"),
    "writing": ("SaveError", "Stamp", "save", "stamp"),
}
_HOME = {name: home for home, names in _HOMES.items() for name in names}

__all__ = [
    "JOB_FILE",
    "NO_JOB",
    "Adoption",
    "Change",
    "Document",
    "EditError",
    "Job",
    "Problem",
    "Reading",
    "SaveError",
    "Stamp",
    "adopt",
    "find_job",
    "load",
    "load_job",
    "loads",
    "new_text",
    "read_text",
    "save",
    "schema",
    "stamp",
    "suppose",
    "with_family",
]


def __getattr__(name: str) -> object:
    if name not in _HOME:
        raise AttributeError(f"module {__name__!r} has no attribute {name!r}")
    found: object = getattr(import_module(f"{__name__}.{_HOME[name]}"), name)
    globals()[name] = found
    return found
