"""The one font of the printed sheet: its widths, its gaps, and the codes of its letters.

Arimo, regular; a heading is the same letter with a thin stroke around it. No font covers every
script: a character without a glyph is replaced where everybody can see it, never dropped.

A letter is written as one byte, so the letters of the font are laid out in code pages, the same
for every document. Page 0 holds ASCII under its own codes and what the program's own words and the
names of western Europe need; the rest follows in the order of Unicode. A document embeds the pages
that it uses, which is nearly always page 0 alone.
"""

from __future__ import annotations

import unicodedata
from functools import cache, lru_cache
from typing import NamedTuple

import fontpkg
from reportlab import rl_config
from reportlab.pdfbase import pdfmetrics
from reportlab.pdfbase.ttfonts import TTFont, TTFontFace

NAME = "Sheet"

#: signs in the program's own words, beside ASCII
_SIGNS = "°±²³·¹×ΔΣαβδεηθκλμνπρστφϖµᵢ–—‘’“”…′″\u202f⁰⁴⁵⁶⁷⁸⁹⁻ⁿ₀₁₂₃₄₅₆₇₈₉−√∞≈≤≥□◊○●"
#: letters of western Europe
_LETTERS = "".join(chr(code) for code in range(0xC0, 0x100) if code not in (0xD7, 0xF7))

_NO_BREAK_SPACE = 0xA0
_FIRST_FREE = 0x80  # code on page 0 behind ASCII
_OTHERS = 0x21  # first code of a letter on the other pages; a space is one on each
_CODES = 0x100

#: characters that only control layout and are dropped: soft hyphen, joiners, marks of direction
_INVISIBLE = dict.fromkeys((0x00AD, 0x200B, 0x200C, 0x200D, 0x200E, 0x200F, 0x2060, 0xFEFF))


@cache
def face() -> TTFontFace:
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
    return loaded.face


def _can_print(letter: str) -> bool:
    return ord(letter) in face().charToGlyph and (letter.isprintable() or letter.isspace())


@cache
def code_pages() -> tuple[tuple[int, ...], ...]:
    """Return the code pages of the font: the letter (Unicode) of each code, 0 for none."""
    first = [*map(ord, _SIGNS + _LETTERS)]
    taken = {*first, *range(_FIRST_FREE), _NO_BREAK_SPACE, *_INVISIBLE}
    others = [
        code for code in sorted(face().charToGlyph) if code not in taken and _can_print(chr(code))
    ]
    room = _CODES - _OTHERS
    return (
        (*[0] * 0x20, *range(0x20, 0x7F), 0, *first),
        *(
            (*[0] * 0x20, 0x20, *others[start : start + room])
            for start in range(0, len(others), room)
        ),
    )


class _Place(NamedTuple):
    """Where a letter stands: its code page, and its code as it is written between brackets."""

    page: int
    written: str


@cache
def _places() -> dict[str, _Place]:
    places = {
        chr(letter): _Place(page, _written(code))
        for page, letters in enumerate(code_pages())
        for code, letter in enumerate(letters)
        if letter
    }
    places[chr(_NO_BREAK_SPACE)] = places[" "] = _Place(0, " ")
    return places


def _written(code: int) -> str:
    if 0x20 <= code < 0x7F:
        return f"\\{chr(code)}" if chr(code) in "\\()" else chr(code)
    return f"\\{code:03o}"


@cache
def _widths() -> dict[str, float]:
    return {chr(code): width / 1000.0 for code, width in face().charWidths.items()}


@lru_cache(maxsize=20_000)
def _relative_width(text: str) -> float:
    widths = _widths()
    return sum(widths.get(letter, 0.5) for letter in text)


def width(text: str, size: float) -> float:
    """Return the width of a text without line breaks [pt]."""
    return _relative_width(text) * size


class Run(NamedTuple):
    """A text in one line at one size, ready to be shown.

    Attributes:
        text: what it says.
        width: [pt]
        shown: the operators that show it where the pen is; page 0 is taken for set, and is set
            again afterwards.
        pages: code pages besides page 0.
    """

    text: str
    width: float
    shown: str
    pages: frozenset[int] = frozenset()


@lru_cache(maxsize=20_000)
def run(text: str, size: float) -> Run:
    """Return a printable text of one line at ``size`` points, ready to be shown."""
    pieces = ["("]
    pages = set()
    now = 0
    places = _places()
    for letter in text:
        page, written = places.get(letter, (0, _written(0)))
        if page != now and letter != " ":
            pieces.append(f") Tj {name(page)} {size:g} Tf (")
            pages.add(page)
            now = page
        pieces.append(written)
    pieces.append(f") Tj {name(0)} {size:g} Tf" if now else ") Tj")
    return Run(text, width(text, size), "".join(pieces), frozenset(pages - {0}))


def name(page: int) -> str:
    """Return the name of a code page in page content."""
    return f"/F{page + 1}"


@lru_cache(maxsize=20_000)
def printable(text: str) -> tuple[str, tuple[str, ...]]:
    """Return a text that the font can print, and the characters it lacks.

    Accents are composed, control characters become spaces (line breaks stay), and a character
    without a glyph becomes its number in brackets: "[U+4E2D]".
    """
    if text.isascii() and text.isprintable():
        return text, ()
    pieces: list[str] = []
    missing: dict[str, None] = {}
    breaks = text.replace("\r\n", "\n").replace("\r", "\n")
    for letter in unicodedata.normalize("NFC", breaks).translate(_INVISIBLE):
        if letter == "\n" or _can_print(letter):
            pieces.append(letter)
        elif letter.isspace() or unicodedata.category(letter) == "Cc":
            pieces.append(" ")
        else:
            missing[letter] = None
            pieces.append(f"[U+{ord(letter):04X}]")
    return "".join(pieces), tuple(missing)
