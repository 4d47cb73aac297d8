"""The colours: ink and brass, calm, with one warm tone for what needs the eye.

Texts are drawn in named tones. Tones are looked up here and not in the style sheet: there each
would be a component of each widget, and to style all of these took half the time of a start.
"""

from __future__ import annotations

from collections.abc import Mapping
from types import MappingProxyType

from rich.style import Style
from textual.theme import Theme

INK = "ink-and-brass"

THEME = Theme(
    name=INK,
    primary="#c2a15a",
    secondary="#7d8c99",
    accent="#d8b86a",
    foreground="#d9d5cb",
    background="#15191d",
    surface="#1c2227",
    panel="#242b31",
    success="#86b38a",
    warning="#d9b24c",
    error="#e07a64",
    dark=True,
)

#: what a tone changes of the style of the widget that it is drawn in
TONES: Mapping[str, Style] = MappingProxyType(
    {
        "own": Style(),  # the colour of the widget
        "text": Style(color="#d9d5cb"),
        "dim": Style(color="#7d8c99"),
        "label": Style(color="#b2afa8"),
        "head": Style(color="#d9d5cb", bold=True),
        "good": Style(color="#86b38a"),
        "stop": Style(color="#e07a64", bold=True),
        "caution": Style(color="#d9b24c"),
        "note": Style(color="#7d8c99"),
        "accent": Style(color="#d8b86a"),
        "here": Style(color="#15191d", bgcolor="#c2a15a"),
    }
)

_BOLD = Style(bold=True)

#: the same where no colour is wanted
PLAIN_TONES: Mapping[str, Style] = MappingProxyType(
    {tone: Style() for tone in TONES}
    | {"head": _BOLD, "stop": _BOLD, "accent": _BOLD, "here": Style(reverse=True)}
)
