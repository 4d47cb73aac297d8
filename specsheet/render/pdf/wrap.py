"""Lines from text: broken at spaces, and inside a word only where it is wider than the line."""

from __future__ import annotations

from functools import lru_cache
from typing import NamedTuple

from specsheet.render.pdf.fonts import Run, printable, run, width


class Lines(NamedTuple):
    """A text broken into lines, and the characters that the font lacks."""

    runs: tuple[Run, ...]
    missing: tuple[str, ...]


@lru_cache(maxsize=8_000)
def lines(text: str, room: float, size: float) -> Lines:
    """Return a text in lines of ``room`` points at ``size`` points; "" gives one empty line."""
    text, missing = printable(text)
    if "\n" not in text and width(text, size) <= room:
        return Lines((run(text, size),), missing)
    made: list[str] = []
    for paragraph in text.split("\n"):
        made.extend(_paragraph(paragraph, room, size))
    return Lines(tuple(run(line, size) for line in made), missing)


def _paragraph(text: str, room: float, size: float) -> list[str]:
    made: list[str] = []
    line = ""
    used = 0.0
    blank = width(" ", size)
    for word in text.split(" "):
        for piece in _pieces(word, room, size):
            wide = width(piece, size)
            if line and used + blank + wide > room:
                made.append(line)
                line, used = piece, wide
            else:
                line, used = (f"{line} {piece}", used + blank + wide) if line else (piece, wide)
    made.append(line)
    return made


def _pieces(word: str, room: float, size: float) -> list[str]:
    """Return a word in pieces that each fit the line."""
    if width(word, size) <= room:
        return [word]
    pieces: list[str] = []
    piece = ""
    used = 0.0
    for letter in word:
        wide = width(letter, size)
        if piece and used + wide > room:
            pieces.append(piece)
            piece, used = "", 0.0
        piece += letter
        used += wide
    return [*pieces, piece]


def shorten(text: str, letters: int) -> str:
    """Return a text of no more than so many letters, ended by an ellipsis where it is cut."""
    return text if len(text) <= letters else f"{text[: letters - 1]}…"
