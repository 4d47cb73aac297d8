"""The printed sheet: a PDF in a layout of its own, the same bytes for the same sheet.

* :func:`to_bytes`   the document
* :func:`write`      the document into a file, in one step
* :func:`store`      a document made before into a file
* :func:`file_name`  the name of the file of a tag
"""

import re
import unicodedata
from dataclasses import replace
from pathlib import Path

from specsheet.render.pdf.compose import to_bytes
from specsheet.sheet.model import Sheet
from specsheet.tagfile.writing import SaveError as WriteError
from specsheet.tagfile.writing import save

__all__ = ["WriteError", "file_name", "store", "to_bytes", "write"]

#: names that one common file system keeps for devices
_RESERVED = re.compile(r"(?i)(con|prn|aux|nul|com\d|lpt\d)(\..*)?")


def file_name(tag: str) -> str:
    """Return a file name for a tag's sheet that every common file system accepts ("FT-1.pdf")."""
    kept = "".join(
        letter if letter.isalnum() or letter in "-_.+" else "_"
        for letter in unicodedata.normalize("NFC", tag)
    )
    name = kept.strip("._")[:80] or "sheet"
    return f"_{name}.pdf" if _RESERVED.fullmatch(name) else f"{name}.pdf"


def write(sheet: Sheet, path: str | Path, paper: str | None = None) -> None:
    """Write the sheet as PDF: the file is replaced whole or not at all. Missing folders are made.

    Args:
        sheet: the sheet.
        path: the file.
        paper: "A4" or "Letter" instead of the sheet's own.

    Raises:
        WriteError: it could not be written; an older file of that name is untouched.
    """
    store(to_bytes(replace(sheet, paper=paper) if paper else sheet), path)


def store(document: bytes, path: str | Path) -> None:
    """Write a document made by :func:`to_bytes`; as :func:`write` otherwise.

    Raises:
        WriteError: it could not be written; an older file of that name is untouched.
    """
    try:
        Path(path).parent.mkdir(parents=True, exist_ok=True)
    except OSError as error:
        reason = error.strerror or type(error).__name__
        raise WriteError(f"{path} was not saved: its folder cannot be made ({reason})") from error
    save(path, document, flush=False)  # it can be printed again
