"""Type sizes, colours and distances of the printed sheet: one accent, readable in greyscale."""

from __future__ import annotations

from typing import NamedTuple

PAPERS = {"A4": (595.28, 841.89), "Letter": (612.0, 792.0)}

SIDE = 42.0
TOP = 40.0
FOOT = 50.0
#: height of the line that names the tag on every page but the first
RUNNING_HEAD = 20.0
GUTTER = 20.0
#: distance between two lines as a multiple of the size
LEADING = 1.25

INK = "0.11 0.13 0.15"
GREY = "0.40 0.43 0.45"
HAIRLINE = "0.82 0.84 0.85"
ACCENT = "0.05 0.31 0.37"
TINT = "0.93 0.955 0.96"
MIDDLE = "0.62 0.74 0.77"
WHITE = "1 1 1"


class Style(NamedTuple):
    """How a text is set: size [pt], weight and colour (three numbers from 0 to 1)."""

    size: float
    bold: bool = False
    colour: str = INK

    @property
    def leading(self) -> float:
        """Distance between two lines [pt]."""
        return self.size * LEADING


TAG = Style(23.0, True, ACCENT)
TITLE = Style(11.5, True)
SECTION = Style(9.5, True, ACCENT)
SUBSECTION = Style(8.0, True)
BODY = Style(8.0)
STRONG = Style(8.0, True)
#: of the lists in two columns
LISTED = Style(7.5)
#: of the annex
FINE = Style(7.0)
FINE_STRONG = Style(7.0, True)
QUIET = Style(7.0, False, GREY)
SMALL = Style(6.5, False, GREY)
HEADING = Style(7.0, True, GREY)
BADGE = Style(6.5, True, WHITE)
BADGE_LIGHT = Style(6.5, True, ACCENT)
BADGE_PLAIN = Style(6.5, True, GREY)
