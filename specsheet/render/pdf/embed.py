"""The font inside a document: glyphs, widths and meaning of the codes of each page in use.

A code page is embedded whole and is the same in every document, so it is made once.
"""

from __future__ import annotations

from collections.abc import Iterable
from functools import cache
from typing import Any, NamedTuple

from reportlab.pdfbase.pdfdoc import PDFArray, PDFDictionary, PDFName, PDFStream, PDFTrueTypeFont
from reportlab.pdfbase.ttfonts import SUBSETN, makeToUnicodeCMap

from specsheet.render.pdf import fonts

_SYMBOLIC, _NONSYMBOLIC = 4, 32  # flags of a font: codes of its own, or those of a standard set


class _Embedded(NamedTuple):
    """A code page ready to be written: its name, glyphs, widths and character map."""

    name: str
    program: bytes
    widths: str
    meaning: str


def add(document: Any, pages: Iterable[int]) -> None:
    """Add code pages of the font to the fonts of a document (``canvas._doc``)."""
    shared = document.idToObject["BasicFonts"].dict
    for page in sorted(pages):
        name = fonts.name(page).removeprefix("/")
        shared[name] = _font(document, name, _embedded(page))


def _font(document: Any, name: str, page: _Embedded) -> PDFTrueTypeFont:
    font = PDFTrueTypeFont()
    font.Name = name
    font.BaseFont = page.name
    font.FirstChar = 0
    font.LastChar = page.widths.count(" ")
    font.Widths = f"[{page.widths}]"
    font.ToUnicode = document.Reference(_stream(page.meaning), f"meaning {name}")
    program = _stream(page.program)
    program.dictionary["Length1"] = len(page.program)
    glyphs = document.Reference(program, f"glyphs {name}")
    font.FontDescriptor = document.Reference(_descriptor(page.name, glyphs), f"descriptor {name}")
    document.Reference(font, name)
    return font


def _stream(content: str | bytes) -> PDFStream:
    stream = PDFStream()
    stream.content = content
    return stream


def _descriptor(name: str, glyphs: object) -> PDFDictionary:
    face = fonts.face()
    return PDFDictionary(
        {
            "Type": "/FontDescriptor",
            "FontName": PDFName(name),
            "Flags": face.flags & ~_NONSYMBOLIC | _SYMBOLIC,
            "FontBBox": PDFArray(face.bbox),
            "ItalicAngle": face.italicAngle,
            "Ascent": face.ascent,
            "Descent": face.descent,
            "CapHeight": face.capHeight,
            "StemV": face.stemV,
            "MissingWidth": face.defaultWidth,
            "FontFile2": glyphs,
        }
    )


@cache
def _embedded(page: int) -> _Embedded:
    """Return a code page ready to be written."""
    face = fonts.face()
    letters = fonts.code_pages()[page]
    name = f"{SUBSETN(page).decode('ascii')}+{face.name.decode('ascii')}"
    widths = " ".join(f"{face.getCharWidth(letter):.7g}" for letter in letters)
    return _Embedded(name, face.makeSubset(letters), widths, makeToUnicodeCMap(name, letters))
