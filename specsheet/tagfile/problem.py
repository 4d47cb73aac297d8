"""What reading a file yields: the tag and its problems, as data."""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:  # a text is parsed without it
    from specsheet.tag import Tag

#: field of a problem that concerns the file as a whole
WHOLE_FILE = "file"

_CONTROL = re.compile(r"[\x00-\x1f\x7f]")


def in_one_line(path: str) -> str:
    """Return the name of a file for a message of one line: a line end in it is written as \\n."""
    return _CONTROL.sub(lambda found: found[0].encode("unicode_escape").decode("ascii"), path)


@dataclass(frozen=True, slots=True)
class Problem:
    """One thing in a file that could not be used.

    Attributes:
        path: the file, or "" for a text without one (printed as "-").
        line: line it stands on, from 1; 1 where the whole file is meant.
        field: path of the entry ("points.minimum.flow"), or "file".
        message: what was wanted, what came, how to mend it.
        lacking: whether the file holds nothing there, so that nothing of it goes unused.
    """

    path: str
    line: int
    field: str
    message: str
    lacking: bool = False

    def __str__(self) -> str:
        return f"{in_one_line(self.path) or '-'}:{self.line}: {self.field}: {self.message}"


@dataclass(frozen=True, slots=True)
class Reading:
    """What came out of one tag file.

    Attributes:
        tag: everything that could be read; None where nothing could.
        problems: everything that could not, in the order of the file.
        schema: version of the format the file was written in (it is read as the current one).
    """

    tag: Tag | None
    problems: tuple[Problem, ...] = ()
    schema: int = 1
