"""Text to SI and back: the one grammar of file, form, list import and command line.

* :func:`parse`            text -> :class:`Quantity`, or :class:`Refusal` with the text to write
* :func:`parse_size`       "DN 150", "NPS 6" -> :class:`NominalSize`
* :func:`parse_straight`   "20 D", "3.5 m" -> :class:`StraightLength`
* :func:`to_si`, :func:`from_si`, :func:`units`, :func:`kinds_of`   the unit table

The grammar stands in :mod:`specsheet.quantity.parse`. The unit table is plain Python, exact where
a unit is defined exactly, and held against a general units library by the tests; nothing but the
standard library is imported.
"""

from specsheet.quantity.bases import CUSTOMARY, NORMAL, STANDARD
from specsheet.quantity.parse import parse
from specsheet.quantity.sizes import SIZES, parse_size, parse_straight
from specsheet.quantity.table import from_si, kinds_of, to_si, units
from specsheet.quantity.value import Base, NominalSize, Quantity, Refusal, StraightLength

__all__ = [
    "CUSTOMARY",
    "NORMAL",
    "SIZES",
    "STANDARD",
    "Base",
    "NominalSize",
    "Quantity",
    "Refusal",
    "StraightLength",
    "from_si",
    "kinds_of",
    "parse",
    "parse_size",
    "parse_straight",
    "to_si",
    "units",
]
