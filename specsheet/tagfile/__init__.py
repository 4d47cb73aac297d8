"""Tag file <-> typed tag: read with every problem listed, edited leaf by leaf, replaced whole.

* :func:`load`, :func:`loads`  text -> :class:`Reading` (tag and problems)
* :func:`load_job`, :func:`find_job`  ``job.toml`` -> :class:`Job`
* :class:`Document`  a text edited by path, every other line untouched
* :func:`save`, :func:`stamp`  a file replaced whole or not at all
* :func:`adopt`, :func:`with_family`  another family for the same tag
* :func:`suppose`  a text with other values, read; the file stays as it is
* :func:`new_text`  the text a new tag starts from
* :func:`schema`  JSON Schema of the tag file
"""

from specsheet.tagfile.adopt import Adoption, adopt, with_family
from specsheet.tagfile.document import Document, EditError
from specsheet.tagfile.jobfile import JOB_FILE, NO_JOB, Job, find_job, load_job
from specsheet.tagfile.new import new_text
from specsheet.tagfile.problem import Problem, Reading
from specsheet.tagfile.read import load, loads
from specsheet.tagfile.save import SaveError, Stamp, save, stamp
from specsheet.tagfile.schema import schema
from specsheet.tagfile.source import read_text
from specsheet.tagfile.suppose import Change, suppose

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
