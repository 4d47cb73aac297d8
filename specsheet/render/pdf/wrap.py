"""Lines from text: broken at spaces, and inside a word only where it is wider than the line."""

from __future__ import annotations

from functools import lru_cache

from specsheet.render.pdf.fonts import Run, run, width


@lru_cache(maxsize=8_000)
def lines(text: str, room: float, size: float) -> tuple[Run, ...]:
    """Return the lines of a text in ``room`` points at ``size`` points; "" gives one empty line."""
    if "\n" not in text and width(text, size) <= room:
        return (run(text, size),)
    made: list[str] = []
    for paragraph in text.split("\n"):
        made.extend(_paragraph(paragraph, room, size))
    return tuple(run(line, size) for line in made)


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
