"""The sheet as plain text for the terminal, a mail or a pager: 80 columns or more."""

from specsheet.render.text.compose import text

__all__ = ["text"]
