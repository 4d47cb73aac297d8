"""Sentences that every differential-pressure family prints."""

from __future__ import annotations

import numpy as np

from specsheet.meters.family import Request


def output_note(request: Request) -> dict[str, tuple[str, ...]]:
    """Return where the square root is extracted, under its heading; nothing where not stated."""
    output = request.tag.text("meter.output_characteristic")
    if output == "linear in flow":
        text = "The transmitter extracts the square root: its output is linear in flow."
    elif output:
        text = (
            "The transmitter's output is linear in differential pressure; the receiver extracts "
            "the square root, once."
        )
    else:
        return {}
    return {"output": (text, *_turndown(request))}


def _turndown(request: Request) -> tuple[str, ...]:
    """Return what the spread of the flows means for the differential pressure."""
    flows = request.stream.mass_flow
    with np.errstate(all="ignore"):
        spread = float(flows.max() / flows.min())
    if not (np.isfinite(spread) and spread > 1.0):
        return ()
    return (
        f"The flows stand {spread:.3g}:1 apart, so the differential pressures stand about "
        f"{spread**2:.3g}:1.",
    )
