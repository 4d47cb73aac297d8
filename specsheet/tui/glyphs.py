"""Signs drawn on the screen, in Unicode or in plain ASCII where the terminal needs it."""

from __future__ import annotations

import locale
import os

#: letter of a finding's level, the worst first: never told by colour alone
LEVEL_LETTERS = {"stop": "S", "caution": "C", "note": "n"}

#: letter of a value's origin, beside the value
ORIGIN_LETTERS = {"given": "g", "derived": " ", "assumed": "a", "typical": "t"}

_PLAIN = str.maketrans(
    {
        "°": "deg ",
        "²": "2",
        "³": "3",
        "·": "-",
        "µ": "u",
        "μ": "mu",
        "ρ": "rho",
        "ν": "nu",
        "κ": "kappa",
        "λ": "lambda",
        "σ": "sigma",
        "ε": "eps",
        "ϖ": "loss",
        "β": "beta",
        "Δ": "d",
        "δ": "d",
        "×": "x",
        "≤": "<=",
        "≥": ">=",
        "±": "+/-",
        "−": "-",
        "–": "-",
        "─": "-",
        "━": "=",
        "┿": "+",
        "│": "|",
        "┴": "+",
        "╴": "-",
        "╷": "|",
        "┣": "[",
        "┫": "]",
        "◂": "<",
        "▸": ">",
        "◆": "*",
        "◇": "o",
        "✓": "+",
        "✗": "x",
        "—": "-",
        "…": "...",
        "√": "sqrt ",
        "\u00a0": " ",
        "\u202f": " ",
        "\u2009": " ",
    }
)


def wants_ascii() -> bool:
    """Tell whether the terminal needs plain ASCII: asked for, or not an UTF-8 locale."""
    if os.environ.get("SPECSHEET_ASCII"):
        return True
    return locale.getpreferredencoding(False).replace("-", "").lower() not in ("utf8", "cp65001")


def plain_ascii(text: str) -> str:
    """Return ``text`` in ASCII; a letter of the user's without a plain form becomes "?"."""
    return text.translate(_PLAIN).encode("ascii", "replace").decode()


def printable(text: str) -> str:
    """Return ``text`` with control characters and line ends made harmless for one line."""
    return "".join(char if char.isprintable() else " " for char in text)
