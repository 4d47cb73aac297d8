"""Values and keys -> TOML text."""

from __future__ import annotations

import re
from collections.abc import Mapping
from datetime import date

from specsheet.tagfile.words import number_text

_BARE_KEY = re.compile(r"[A-Za-z0-9_-]+")
_ESCAPES = {
    "\\": "\\\\",
    '"': '\\"',
    "\b": "\\b",
    "\t": "\\t",
    "\n": "\\n",
    "\f": "\\f",
    "\r": "\\r",
}


def key_text(key: str) -> str:
    """Return a key as TOML writes it, in quotes only where it needs them."""
    return key if _BARE_KEY.fullmatch(key) else _basic(key)


def value_text(value: object, like: str = "") -> str:
    """Return a value as TOML writes it.

    Args:
        value: text, boolean, number, date, list or table of these.
        like: the TOML text it replaces; its kind of quotes is kept where the value allows.
    """
    if isinstance(value, bool):
        return "true" if value else "false"
    if isinstance(value, str):
        return _string(value, like)
    if isinstance(value, int | float):
        return number_text(value)
    if isinstance(value, date):
        return value.isoformat()
    if isinstance(value, Mapping):
        pairs = (f"{key_text(key)} = {value_text(item)}" for key, item in value.items())
        return f"{{ {', '.join(pairs)} }}"
    if isinstance(value, list | tuple):
        return f"[{', '.join(value_text(item) for item in value)}]"
    raise TypeError(f"{value!r} has no place in a tag file")


def _string(text: str, like: str) -> str:
    single = like.startswith("'") and not like.startswith("'''")
    if single and "'" not in text and text.isprintable():
        return f"'{text}'"
    if like.startswith('"""') or "\n" in text:
        lines = text.split("\n")
        return '"""\n' + "\n".join(_escaped(line) for line in lines) + '"""'
    return _basic(text)


def _basic(text: str) -> str:
    return f'"{_escaped(text)}"'


def _escaped(text: str) -> str:
    return "".join(_ESCAPES.get(char) or _escape(char) for char in text)


def _escape(char: str) -> str:
    control = ord(char) < 0x20 or ord(char) == 0x7F
    return f"\\u{ord(char):04X}" if control else char
