"""Devices whose opening is a segment of the pipe, cut by a chord."""

from __future__ import annotations

from specsheet.meters.dp.device import Shape
from specsheet.meters.family import Array
from specsheet.methods import segment


def shape(term: str, label: str) -> Shape:
    """Return the shape of a device whose machined dimension is the height of the segment.

    Args:
        term: key of the entry, and glossary key, of the height.
        label: words for it in a message.
    """
    return Shape(
        entry=term,
        term=term,
        hot_term="",
        label=label,
        equation="β² = (acos(1 - 2 h/D) - 2 (1 - 2 h/D) sqrt(h/D - (h/D)²)) / π",
        share=_share,
        ratio=_ratio,
    )


def _share(ratio: Array) -> Array:
    found: Array = segment.height_of_ratio(diameter_ratio=ratio)
    return found


def _ratio(share: Array) -> Array:
    found: Array = segment.diameter_ratio(height_ratio=share)
    return found
