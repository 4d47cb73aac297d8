"""The colours: ink and brass, calm, with one warm tone for what needs the eye."""

from __future__ import annotations

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
