"""Where one editable text stands: an entry's path, and the place in its list where it has one."""

from __future__ import annotations

from dataclasses import dataclass

#: sections that are lists of tables: each operating point and each revision is one of them
LISTS = ("points", "revisions")


@dataclass(frozen=True, slots=True, order=True)
class Address:
    """One editable text.

    Attributes:
        path: path of the entry ("line.size", "points.flow"), or of one leaf of a table entry
            ("fluid.mixture.methane").
        index: which operating point or revision, from 0; None outside the lists.
    """

    path: str
    index: int | None = None

    @property
    def section(self) -> str:
        """Key of the section of the form ("" for the top of the file)."""
        return self.path.split(".")[0] if "." in self.path else ""

    @property
    def key(self) -> str:
        """Last part of the path."""
        return self.path.rpartition(".")[2]

    def __str__(self) -> str:
        return self.path if self.index is None else f"{self.path} ({self.index + 1})"
