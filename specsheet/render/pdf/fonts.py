"""The one font of the printed sheet: its widths, its gaps, and how its text is written.

Arimo, regular; a heading is the same letter with a thin stroke around it. No font covers every
script: a character without a glyph is replaced where everybody can see it, never dropped.
"""

from __future__ import annotations

import unicodedata
from functools import cache, lru_cache

import fontpkg
from reportlab import rl_config
from reportlab.pdfbase import pdfmetrics
from reportlab.pdfbase.ttfonts import TTFont

NAME = "Sheet"

#: characters that only control layout and are dropped: soft hyphen, joiners, marks of direction
_INVISIBLE = dict.fromkeys((0x00AD, 0x200B, 0x200C, 0x200D, 0x200E, 0x200F, 0x2060, 0xFEFF))


@cache
def font() -> TTFont:
    """Return the font, loaded and registered once.

    The glyph of U+0000 is taken out: as long as it is there, every character without a glyph
    vanishes without trace.
    """
    loaded = TTFont(NAME, str(fontpkg.path("Arimo")))
    loaded.face.charToGlyph.pop(0, None)
    loaded.face.charWidths.pop(0, None)
    pdfmetrics.registerFont(loaded)
    rl_config.canvas_basefontname = NAME
    rl_config.defaultGraphicsFontName = NAME
    return loaded


@cache
def _widths() -> dict[int, float]:
    return {code: width / 1000.0 for code, width in font().face.charWidths.items()}


@lru_cache(maxsize=20_000)
def _relative_width(text: str) -> float:
    widths = _widths()
    return sum(widths.get(code, 0.5) for code in map(ord, text))


def width(text: str, size: float) -> float:
    """Return the width of a text without line breaks [pt]."""
    return _relative_width(text) * size


@lru_cache(maxsize=20_000)
def printable(text: str) -> tuple[str, tuple[str, ...]]:
    """Return a text that the font can print, and the characters it lacks.

    Accents are composed, control characters become spaces (line breaks stay), and a character
    without a glyph becomes its number in brackets: "[U+4E2D]".
    """
    if text.isascii() and text.isprintable():
        return text, ()
    glyphs = font().face.charToGlyph
    pieces: list[str] = []
    missing: dict[str, None] = {}
    breaks = text.replace("\r\n", "\n").replace("\r", "\n")
    for letter in unicodedata.normalize("NFC", breaks).translate(_INVISIBLE):
        known = ord(letter) in glyphs and (letter.isprintable() or letter.isspace())
        if known or letter == "\n":
            pieces.append(letter)
        elif letter.isspace() or unicodedata.category(letter) == "Cc":
            pieces.append(" ")
        else:
            missing[letter] = None
            pieces.append(f"[U+{ord(letter):04X}]")
    return "".join(pieces), tuple(missing)
