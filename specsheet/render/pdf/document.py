"""The PDF document around the pages: date, identity, outline, page labels.

Equal sheets give equal bytes: the date is that of the revision, the identity comes from the
content, nothing is compressed, and neither clock nor environment has a say.
"""

from __future__ import annotations

import hashlib
from datetime import UTC, date, datetime
from io import BytesIO
from typing import Any

import reportlab
from reportlab.lib.utils import TimeStamp
from reportlab.pdfgen.canvas import Canvas

import specsheet
from specsheet.render.pdf import embed, fonts, style, wrap
from specsheet.render.pdf.page import Book
from specsheet.sheet.model import Sheet

#: date of a sheet without revisions
_NO_DATE = date(2000, 1, 1)


def _canvas(sheet: Sheet) -> Canvas:
    """Return an empty canvas of the sheet's paper, with pinned date and identity."""
    fonts.face()
    canvas = Canvas(
        BytesIO(),
        pagesize=style.PAPERS.get(sheet.paper, style.PAPERS["A4"]),
        invariant=1,
        pageCompression=0,
        lang="en-GB",
        initialFontName=fonts.NAME,
    )
    canvas._doc._timeStamp = _stamp(sheet.date or _NO_DATE)
    _describe(canvas, sheet)
    return canvas


def _stamp(day: date) -> TimeStamp:
    """Return midnight UTC of a day, whatever the clock and the environment say."""
    moment = datetime(day.year, day.month, day.day, tzinfo=UTC)
    stamp = TimeStamp.__new__(TimeStamp)
    stamp.t = moment.timestamp()
    stamp.lt = moment.timetuple()
    stamp.YMDhms = moment.timetuple()[:6]
    stamp.dhh = stamp.dmm = 0
    stamp.tzname = "UTC"
    return stamp


def _describe(canvas: Canvas, sheet: Sheet) -> None:
    parts = (sheet.tag, sheet.title, f"revision {sheet.revision}" if sheet.revision else "")
    author = next((line.text for line in sheet.head if line.key == "job.author"), "")
    canvas.setTitle(", ".join(part for part in parts if part))
    canvas.setAuthor(author)
    canvas.setSubject(sheet.service)
    canvas.setKeywords("")
    canvas.setCreator(f"specsheet {specsheet.__version__}")
    canvas.setProducer(f"reportlab {reportlab.Version}")
    canvas.setViewerPreference("DisplayDocTitle", "true")


def bound(book: Book, sheet: Sheet) -> bytes:
    """Return the finished document: every page with its foot, outline and page labels."""
    _furnish(book, sheet)
    canvas: Any = _canvas(sheet)
    embed.add(canvas._doc, set[int]().union(*(page.fonts for page in book.pages)))
    contents = [page.content().encode("ascii") for page in book.pages]
    canvas._doc.signature = hashlib.md5(b"".join(contents), usedforsecurity=False)
    for index, content in enumerate(contents):
        for place, heading in enumerate(book.headings):
            if heading.page == index:
                key = f"h{place}"
                canvas.bookmarkHorizontal(key, 0, heading.top + 6.0)
                canvas.addOutlineEntry(heading.title, key, level=0)
        canvas.showPage()
        canvas._doc.Pages.pages[-1].stream = content  # as bytes: nothing left to encode
    canvas.addPageLabel(0, style="ARABIC", start=1, prefix=f"{sheet.tag}-")
    data: bytes = canvas.getpdfdata()
    return data


def _furnish(book: Book, sheet: Sheet) -> None:
    """Set the running head and the foot of every page, now that their number is known."""
    left, right = style.SIDE, book.size[0] - style.SIDE
    revision = f"revision {sheet.revision}" if sheet.revision else "no revision"
    day = sheet.date.isoformat() if sheet.date else ""
    name = " · ".join(
        part for part in (wrap.shorten(sheet.tag, 40), wrap.shorten(revision, 30), day) if part
    )
    room = (right - left) * 0.5
    secret = _cut(book.clean(sheet.confidentiality), room)
    for index, page in enumerate(book.pages):
        page.line(left, 36.0, right, 36.0, style.HAIRLINE, 0.5)
        page.text(left, 26.0, book.clean(name), style.QUIET)
        page.middle((left + right) / 2.0, 16.0, secret, style.QUIET)
        page.right(right, 26.0, f"page {index + 1} of {len(book.pages)}", style.QUIET)
        if index:
            y = book.size[1] - style.TOP
            page.text(left, y - 7.0, book.clean(wrap.shorten(sheet.tag, 40)), style.SECTION)
            words = _cut(book.clean(sheet.title), room)
            page.right(right, y - 7.0, words, style.QUIET)


def _cut(text: str, room: float) -> str:
    """Return a text in one line of ``room`` points, ended by an ellipsis where it is cut."""
    line = text.replace("\n", " ")
    if fonts.width(line, style.QUIET.size) <= room:
        return line
    while line and fonts.width(f"{line}…", style.QUIET.size) > room:
        line = line[: int(len(line) * 0.9)]
    return f"{line}…"
