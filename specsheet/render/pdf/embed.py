"""The font inside a document: glyphs, widths and meaning of the codes of each page in use.

A code page is embedded whole and is the same in every document, so it is made once.
"""

from __future__ import annotations

from collections.abc import Iterable
from functools import cache
from typing import NamedTuple

from specsheet.render.pdf import fonts
from specsheet.render.pdf.objects import Objects

_SYMBOLIC, _NONSYMBOLIC = 4, 32  # flags of a font: codes of its own, or those of a standard set
_MOST = 100  # letters in one block of a character map


class _Embedded(NamedTuple):
    """A code page ready to be written: its name, glyphs, widths and character map."""

    name: str
    program: bytes
    widths: str
    meaning: bytes


def fonts_of(objects: Objects, pages: Iterable[int]) -> str:
    """Add the code pages of the font and return them as a dictionary of resources."""
    made = (f"{fonts.name(page)} {_add(objects, _embedded(page))} 0 R" for page in sorted(pages))
    return f"<< {' '.join(made)} >>"


def _add(objects: Objects, page: _Embedded) -> int:
    program = objects.stream(page.program, f"/Length1 {len(page.program)} ")
    meaning = objects.stream(page.meaning)
    descriptor = objects.add(_descriptor(page.name, program))
    count = page.widths.count(" ") + 1
    return objects.add(
        f"<< /Type /Font /Subtype /TrueType /BaseFont /{page.name} /FirstChar 0 "
        f"/LastChar {count - 1} /Widths [{page.widths}] /FontDescriptor {descriptor} 0 R "
        f"/ToUnicode {meaning} 0 R >>"
    )


def _descriptor(name: str, program: int) -> str:
    face = fonts.face()
    flags = face.flags & ~_NONSYMBOLIC | _SYMBOLIC
    box = " ".join(f"{edge:.0f}" for edge in face.bbox)
    return (
        f"<< /Type /FontDescriptor /FontName /{name} /Flags {flags} "
        f"/FontBBox [{box}] /ItalicAngle {face.italicAngle:g} /Ascent {face.ascent:.0f} "
        f"/Descent {face.descent:.0f} /CapHeight {face.capHeight:.0f} /StemV {face.stemV:.0f} "
        f"/MissingWidth {face.defaultWidth:.0f} /FontFile2 {program} 0 R >>"
    )


@cache
def _embedded(page: int) -> _Embedded:
    """Return a code page ready to be written."""
    face = fonts.face()
    letters = fonts.code_pages()[page]
    # six capitals and a plus stand before the name of a font that is embedded in part
    name = f"AAAAA{chr(ord('A') + page)}+{face.name.decode('ascii')}"
    widths = " ".join(f"{face.getCharWidth(letter):.7g}" for letter in letters)
    return _Embedded(name, face.makeSubset(letters), widths, _meaning(name, letters))


def _meaning(name: str, letters: tuple[int, ...]) -> bytes:
    """Return the character map from codes to Unicode, by which a reader finds and copies text."""
    lines = [
        f"<{code:02X}> <{chr(letter).encode('utf-16-be').hex().upper()}>"
        for code, letter in enumerate(letters)
        if letter
    ]
    blocks = [lines[start : start + _MOST] for start in range(0, len(lines), _MOST)]
    body = [
        "/CIDInit /ProcSet findresource begin",
        "12 dict begin",
        "begincmap",
        f"/CIDSystemInfo << /Registry ({name}) /Ordering ({name}) /Supplement 0 >> def",
        f"/CMapName /{name} def",
        "/CMapType 2 def",
        "1 begincodespacerange\n<00> <FF>\nendcodespacerange",
        *("\n".join((f"{len(block)} beginbfchar", *block, "endbfchar")) for block in blocks),
        "endcmap",
        "CMapName currentdict /CMap defineresource pop",
        "end",
        "end",
    ]
    return "\n".join(body).encode("ascii")
