"""Characters that look like others: what a word processor or a keyboard makes of plain text."""

from __future__ import annotations

import re
import unicodedata

_MINUS = dict.fromkeys("\u2010\u2011\u2012\u2013\u2014\u2015\u2212\ufe63\uff0d", "-")
_NOTHING = dict.fromkeys("\u200b\u200c\u200d\u2060\ufeff\u00ad", "")
_RAISED = re.compile("[⁰¹²³⁴⁵⁶⁷⁸⁹⁻]+")
_LEVEL = str.maketrans("⁰¹²³⁴⁵⁶⁷⁸⁹⁻", "0123456789-")
_SUBSCRIPT = dict(zip("₀₁₂₃₄₅₆₇₈₉", "0123456789", strict=True))
_FRACTION = {
    "¼": " 1/4",
    "½": " 1/2",
    "¾": " 3/4",
    "⅛": " 1/8",
    "⅜": " 3/8",
    "⅝": " 5/8",
    "⅞": " 7/8",
    "⁄": "/",
    "∕": "/",
}
_SIGN = {
    "°": "deg",
    "º": "deg",
    "˚": "deg",
    "℃": "degC",
    "℉": "degF",
    "µ": "u",
    "μ": "u",
    "·": " ",
    "⋅": " ",
    "∙": " ",
    "•": " ",
    "‰": "permille",
    "″": '"',
    "”": '"',
    "“": '"',
    "’": "'",
    "′": "'",
    "×": "x",
    "≈": "~",
    "≤": "<",
    "≥": ">",
    "…": "..",
}
#: same character in another shape; harmless to change in an echo
_SHAPES = ("<wide>", "<narrow>", "<font>", "<square>", "<noBreak>")
_MEANINGS = _SUBSCRIPT | _FRACTION | _SIGN


def _reshaped(character: str) -> str:
    if character in _MINUS:
        return "-"
    if character in _NOTHING:
        return ""
    if unicodedata.category(character) == "Zs":
        return " "
    if unicodedata.decomposition(character).startswith(_SHAPES):
        return unicodedata.normalize("NFKC", character)
    return character


def tidy(text: str) -> str:
    """Return the text to echo: dashes and full-width characters plain, single spaces.

    Signs with a meaning of their own (°, ³, µ) stay as typed.
    """
    if text.isascii():
        return " ".join(text.split())
    return " ".join("".join(map(_reshaped, text)).split())


def plain(text: str) -> str:
    """Return a tidy text for reading: ° as deg, µ as u, a raised 3 as ^3, a middle dot as space.

    A raised figure keeps its mark, so that "10³ kg" is never read as 103 kg.
    """
    if text.isascii():
        return text
    text = _RAISED.sub(lambda run: "^" + run[0].translate(_LEVEL), text)
    return "".join(_MEANINGS.get(character, character) for character in text).strip()
