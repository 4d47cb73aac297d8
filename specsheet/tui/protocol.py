"""What travels between the form and its worker: framed pickles of plain data.

The worker is started by the form itself and talks to nobody else, so its pickles can be trusted.
"""

from __future__ import annotations

import pickle
import struct
from dataclasses import dataclass
from typing import TYPE_CHECKING, Any, BinaryIO

if TYPE_CHECKING:  # the first screen is drawn without it
    from specsheet.sheet.model import Sheet

#: length of the frame that follows, in bytes
HEADER = struct.Struct(">I")


@dataclass(frozen=True, slots=True)
class Derive:
    """Ask for the sheet of a tag file's text; ``path`` tells where its job stands.

    ``settle`` grants the time to decide a phase that a first answer left open.
    """

    number: int
    text: str
    path: str
    settle: bool = False


@dataclass(frozen=True, slots=True)
class Print:
    """Ask for a PDF of a tag file's text in ``folder``; the tag gives it its name."""

    number: int
    text: str
    path: str
    folder: str


@dataclass(frozen=True, slots=True)
class Compare:
    """Ask how every meter family suits a tag file's text."""

    number: int
    text: str
    path: str


@dataclass(frozen=True, slots=True)
class Suppose:
    """Ask what would be if one entry held another value, or several in turn; no file is touched.

    Attributes:
        number: number of the request.
        text, path: as in :class:`Derive`.
        entry: path of the entry ("points.maximum.flow").
        first: the value, or the first of several.
        last: the last of several, "" for one value.
    """

    number: int
    text: str
    path: str
    entry: str
    first: str
    last: str = ""


@dataclass(frozen=True, slots=True)
class Trouble:
    """One entry of the file that could not be used."""

    field: str
    message: str


@dataclass(frozen=True, slots=True)
class Derived:
    """The answer to :class:`Derive`.

    Attributes:
        number: number of the request.
        sheet: the finished sheet; None where nothing could be read.
        troubles: entries that could not be used.
        unsettled: whether asking again with ``settle`` may tell more.
    """

    number: int
    sheet: Sheet | None
    troubles: tuple[Trouble, ...] = ()
    unsettled: bool = False


@dataclass(frozen=True, slots=True)
class Printed:
    """The answer to :class:`Print`: where the PDF stands."""

    number: int
    target: str


@dataclass(frozen=True, slots=True)
class Fit:
    """One meter family held against the tag: its key, a row of words, and what decides."""

    family: str
    row: str
    detail: str


@dataclass(frozen=True, slots=True)
class Compared:
    """The answer to :class:`Compare`: the families, the best first."""

    number: int
    fits: tuple[Fit, ...]


@dataclass(frozen=True, slots=True)
class Supposed:
    """The answer to :class:`Suppose`: what changes, or the table of verdicts, as lines."""

    number: int
    lines: tuple[str, ...]


@dataclass(frozen=True, slots=True)
class Failed:
    """The answer to a request that broke: words for the user."""

    number: int
    message: str


Request = Derive | Print | Compare | Suppose
Answer = Derived | Printed | Compared | Supposed | Failed


def frame(message: Request | Answer) -> bytes:
    """Return a message as it is sent."""
    body = pickle.dumps(message)
    return HEADER.pack(len(body)) + body


def unpack(body: bytes) -> Any:
    """Return the message of a frame without its header."""
    return pickle.loads(body)


def receive(stream: BinaryIO) -> Any:
    """Return the next message of a blocking stream, or None at its end."""
    header = stream.read(HEADER.size)
    if len(header) < HEADER.size:
        return None
    (size,) = HEADER.unpack(header)
    body = stream.read(size)
    return unpack(body) if len(body) == size else None
