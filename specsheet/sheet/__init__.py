"""The sheet: an evaluation as rounded, worded rows. All rounding and all wording happens here.

* :func:`build`  Evaluation to :class:`Sheet`
* :func:`diff`   what differs between two sheets
* :mod:`specsheet.sheet.model`  the data classes that every renderer reads
"""

from specsheet.sheet.assemble import build
from specsheet.sheet.difference import Change, diff
from specsheet.sheet.model import Cell, LimitRow, Row, Ruler, Sheet, Table, Working

__all__ = [
    "Cell",
    "Change",
    "LimitRow",
    "Row",
    "Ruler",
    "Sheet",
    "Table",
    "Working",
    "build",
    "diff",
]
