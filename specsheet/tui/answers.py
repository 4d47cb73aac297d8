"""The answers that the form offers when it asks what to do with edits."""

from __future__ import annotations

from specsheet.tui.dialogs import Choice

RECOVERING = (
    Choice("recover", "Recover them; undo takes them out again", key="r"),
    Choice("later", "Leave them for the next open", key="l"),
    Choice("discard", "Discard them for good", key="d"),
)

_ELSEWHERE = Choice("elsewhere", "Save under another name", key="n")
_OVERWRITE = Choice("overwrite", "Write my text over what is on disk", key="o")
_RELOAD = Choice("reload", "Take what is on disk; undo brings my text back", key="l")


def saving_over(gone: bool) -> list[Choice]:
    """Return the ways to save where the file changed on disk, or is no longer there."""
    return [_OVERWRITE, _ELSEWHERE] if gone else [_OVERWRITE, _RELOAD, _ELSEWHERE]


def leaving(refused: bool) -> list[Choice]:
    """Return the ways to leave with unsaved edits, some of them refused texts or none."""
    rest = "; the refused texts are offered at the next open" if refused else ""
    return [
        Choice("save", f"Save and leave{rest}", key="s"),
        Choice("keep", "Leave; keep the edits, to be offered at the next open", key="k"),
        Choice("discard", "Leave and discard the edits", key="d"),
    ]
