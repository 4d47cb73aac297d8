"""A job: a folder with ``job.toml``, its tags in ``tags/`` and the replies in ``offers/``.

* :func:`open`      a folder, ``job.toml`` or a tag file -> :class:`JobFolder`
* :func:`scan`      files and folders -> every tag file in them, each job read once
* :class:`Numbers`  finds a tag number that comes twice in a job
* :func:`current_revision`, :func:`next_mark`  where a document stands
* :func:`file_stem` the name of the file of a tag
"""

from specsheet.job.folder import (
    OFFERS,
    TAGS,
    JobFolder,
    Numbers,
    TagFile,
    file_stem,
    natural_order,
)
from specsheet.job.folder import open_job as open
from specsheet.job.revisions import current_revision, next_mark
from specsheet.job.scan import Listed, Scan, scan

__all__ = [
    "OFFERS",
    "TAGS",
    "JobFolder",
    "Listed",
    "Numbers",
    "Scan",
    "TagFile",
    "current_revision",
    "file_stem",
    "natural_order",
    "next_mark",
    "open",
    "scan",
]
