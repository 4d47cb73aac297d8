"""Tag file <-> typed tag: read with every problem listed, written leaf by leaf, replaced whole.

* :func:`load`, :func:`loads`  text -> :class:`Reading` (tag and problems)
* :func:`load_job`, :func:`find_job`  ``job.toml`` -> :class:`Job`
"""

from specsheet.tagfile.jobfile import JOB_FILE, NO_JOB, Job, find_job, load_job
from specsheet.tagfile.problem import Problem, Reading
from specsheet.tagfile.read import load, loads

__all__ = [
    "JOB_FILE",
    "NO_JOB",
    "Job",
    "Problem",
    "Reading",
    "find_job",
    "load",
    "load_job",
    "loads",
]
