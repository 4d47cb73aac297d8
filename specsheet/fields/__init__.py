"""The glossary: every kind of quantity, every entry of the tag file and every derived term, once.

File, form, sheet, schema, help and list headings are rendered from here, so a label is typed
once. This package imports nothing.

* :mod:`specsheet.fields.kinds`   kinds of quantity: SI unit and unit shown by default
* :mod:`specsheet.fields.entries` what the user may state about a tag, section by section
* :mod:`specsheet.fields.job_entries` the revision block and the job
* :mod:`specsheet.fields.terms`   what the program derives
"""

from specsheet.fields.entries import COMMON, SECTIONS
from specsheet.fields.entry import PLAIN_KINDS, Entry, Section
from specsheet.fields.job_entries import JOB, REVISION
from specsheet.fields.kinds import KINDS, Kind
from specsheet.fields.terms import TERMS, Term, term

__all__ = [
    "COMMON",
    "JOB",
    "KINDS",
    "PLAIN_KINDS",
    "REVISION",
    "SECTIONS",
    "TERMS",
    "Entry",
    "Kind",
    "Section",
    "Term",
    "entry",
    "term",
]

_BY_PATH = {item.path: item for item in (*COMMON, *REVISION, *JOB)}


def entry(path: str) -> Entry:
    """Return the common entry of that path; KeyError when the glossary lacks it."""
    return _BY_PATH[path]
