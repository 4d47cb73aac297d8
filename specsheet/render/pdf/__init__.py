"""The printed sheet: a PDF in a layout of its own, the same bytes for the same sheet.

* :func:`to_bytes`  the document
* :func:`write`     the document into a file, in one step
"""

from pathlib import Path

from specsheet.render.pdf.compose import to_bytes
from specsheet.sheet.model import Sheet
from specsheet.tagfile.save import save

__all__ = ["to_bytes", "write"]


def write(sheet: Sheet, path: str | Path) -> None:
    """Write the sheet as PDF: the file is replaced whole or not at all.

    Raises:
        specsheet.tagfile.save.SaveError: it could not be written; nothing has changed.
    """
    save(path, to_bytes(sheet))
