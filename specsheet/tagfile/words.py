"""Words of the messages: what came, the nearest known name, a text made safe to print."""

from __future__ import annotations

from collections.abc import Iterable
from datetime import date

_LONGEST = 60


class Number(float):
    """A TOML float that remembers how it was typed ("1.310")."""

    __slots__ = ("text",)
    text: str

    def __new__(cls, text: str) -> Number:
        """Make one from its text, as tomli hands it over."""
        number = super().__new__(cls, text)
        number.text = text.replace("_", "")
        return number

    def __reduce__(self) -> tuple[type[Number], tuple[str]]:
        return Number, (self.text,)


def number_text(value: float) -> str:
    """Return a TOML number as it was typed."""
    return value.text if isinstance(value, Number) else str(value)


def printable(text: str, longest: int = _LONGEST) -> str:
    """Return ``text`` shortened, with everything that is not printable escaped."""
    short = text if len(text) <= longest else text[: longest - 1] + "…"
    return "".join(c if c.isprintable() else c.encode("unicode_escape").decode() for c in short)


def came(value: object) -> str:
    """Return words for a TOML value that was not wanted."""
    if isinstance(value, bool):
        return "true" if value else "false"
    if isinstance(value, int | float):
        return f"the number {printable(number_text(value))}"
    if isinstance(value, str):
        return f'the text "{printable(value)}"'
    if isinstance(value, date):
        return f"the date {value}"
    if isinstance(value, list):
        return "a list"
    return "a table" if isinstance(value, dict) else f"the time {value}"


def nearest(word: str, known: Iterable[str]) -> str:
    """Return the known name most like ``word``, or "" when none is near."""
    if len(word) > _LONGEST:
        return ""
    import difflib  # only for a name that is not known

    names = {name.casefold(): name for name in known}
    close = difflib.get_close_matches(word.casefold(), names, 1)
    return names[close[0]] if close else ""


def listed(known: Iterable[str]) -> str:
    """Return the known names in one line."""
    return ", ".join(known)


def did_you_mean(word: str, known: Iterable[str]) -> str:
    """Return the end of a message: the nearest known name, or all of them."""
    names = tuple(known)
    close = nearest(word, names)
    return f'did you mean "{close}"?' if close else f"known: {listed(names)}"
