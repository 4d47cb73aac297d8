"""Sentences that every differential-pressure family prints."""

from __future__ import annotations

from specsheet.tag import Tag


def output_note(tag: Tag) -> dict[str, tuple[str, ...]]:
    """Return where the square root is extracted, under its heading; nothing where not stated."""
    output = tag.text("meter.output_characteristic")
    if output == "linear in flow":
        text = "The transmitter extracts the square root: its output is linear in flow."
    elif output:
        text = (
            "The transmitter's output is linear in differential pressure; the receiver extracts "
            "the square root, once."
        )
    else:
        return {}
    return {"output": (text,)}
