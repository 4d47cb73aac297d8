"""What undo and redo go back to: whole states of the document, each with the name of its change."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from types import MappingProxyType

from specsheet.tui.address import Address


@dataclass(frozen=True, slots=True)
class Refused:
    """A text that could not be stored, as typed, and why."""

    text: str
    reason: str


_NOTHING: Mapping[Address, Refused] = MappingProxyType({})


@dataclass(frozen=True)
class State:
    """The document at one moment.

    Attributes:
        text: text of the tag file.
        refused: texts that could not be stored; they are shown, kept and journalled, not saved.
    """

    text: str
    refused: Mapping[Address, Refused] = field(default_factory=lambda: _NOTHING)


class History:
    """The states behind and ahead of the present one.

    A tag file is a few kilobytes, so whole texts are kept: undo then restores comments, order and
    spelling exactly, whatever the edit was.
    """

    def __init__(self, state: State) -> None:
        self.state = state
        self._behind: list[tuple[str, State]] = []
        self._ahead: list[tuple[str, State]] = []

    @property
    def undo_name(self) -> str:
        """Name of the change that undo takes back, or "" when there is none."""
        return self._behind[-1][0] if self._behind else ""

    @property
    def redo_name(self) -> str:
        """Name of the change that redo makes again, or "" when there is none."""
        return self._ahead[-1][0] if self._ahead else ""

    def push(self, name: str, state: State) -> None:
        """Make ``state`` the present one by a change of that name; what was undone is dropped."""
        self._behind.append((name, self.state))
        self._ahead.clear()
        self.state = state

    def undo(self) -> str:
        """Go one change back; return its name, or "" when there is none."""
        return self._step(self._behind, self._ahead)

    def redo(self) -> str:
        """Make the last undone change again; return its name, or "" when there is none."""
        return self._step(self._ahead, self._behind)

    def _step(self, source: list[tuple[str, State]], target: list[tuple[str, State]]) -> str:
        if not source:
            return ""
        name, state = source.pop()
        target.append((name, self.state))
        self.state = state
        return name
