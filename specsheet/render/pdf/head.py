"""The top of the first page: what is bought, for whom, and the verdict in one line."""

from __future__ import annotations

from specsheet.findings import Level
from specsheet.render.pdf import fonts, style
from specsheet.render.pdf.page import Frame, Page
from specsheet.render.pdf.style import Style
from specsheet.render.pdf.wrap import shorten
from specsheet.sheet.model import Sheet
from specsheet.sheet.words import LEGEND

_COLUMNS = 4  # of the details
_BADGE = 44.0


def band(frame: Frame, sheet: Sheet) -> None:
    """Set the band with tag, meter and service at the left, status and revision at the right."""
    book = frame.book
    aside = _aside(sheet)
    right = max((fonts.width(book.clean(text), look.size) for text, look in aside), default=0.0)
    room = frame.width - right - 44.0
    lines: list[tuple[str, Style]] = []
    for text, look, most in _lines(sheet):
        wrapped = book.lines(text, room, look) if text else ()
        lines += [(line.text, look) for line in wrapped[:most]]
        if len(wrapped) > most:
            lines[-1] = (f"{lines[-1][0]} …", look)
            book.overlong.append(text)
    height = sum(look.leading for _, look in lines) + 14.0
    frame.page.box(frame.x, frame.y - height, frame.width, height, fill=style.TINT)
    frame.page.box(frame.x, frame.y - height, 4.0, height, fill=style.ACCENT)
    y = frame.y - 7.0
    for line, look in lines:
        frame.page.text(frame.x + 16.0, y - look.size, line, look)
        y -= look.leading
    y = frame.y - 12.0
    for text, look in aside:
        frame.page.right(frame.x + frame.width - 12.0, y - look.size, book.clean(text), look)
        y -= look.leading + 2.0
    frame.y -= height + 8.0


def _lines(sheet: Sheet) -> tuple[tuple[str, Style, int], ...]:
    """Return the texts of the band with their styles and the most lines each may take."""
    tag = style.TAG if len(sheet.tag) <= 20 else Style(13.0, True, style.ACCENT)
    return (sheet.tag, tag, 2), (sheet.title, style.TITLE, 2), (sheet.service, Style(9.0), 3)


def overlong(frame: Frame, sheet: Sheet) -> list[tuple[str, str]]:
    """Return the texts that the band had to cut, with their labels, to be printed in full."""
    texts = (("Tag", sheet.tag), ("Meter", sheet.title), ("Service", sheet.service))
    return [(label, text) for label, text in texts if text in frame.book.overlong]


def _aside(sheet: Sheet) -> list[tuple[str, Style]]:
    lines: list[tuple[str, Style]] = []
    if sheet.status:
        lines.append((shorten(sheet.status.upper(), 32), Style(9.0, True)))
    if sheet.revision:
        lines.append((f"Revision {shorten(sheet.revision, 20)}", style.BODY))
    if sheet.date is not None:
        lines.append((sheet.date.isoformat(), style.BODY))
    return lines


def details(frame: Frame, sheet: Sheet) -> None:
    """Set the lines of the head in four columns, words above what was stated."""
    wide = frame.width / _COLUMNS
    for start in range(0, len(sheet.head), _COLUMNS):
        shown = [
            (detail.label, frame.book.lines(detail.text, wide - 10.0, style.BODY))
            for detail in sheet.head[start : start + _COLUMNS]
        ]
        tallest = max(len(lines) for _, lines in shown)
        for row in range(tallest):
            label_height = style.SMALL.leading if row == 0 else 0.0
            frame.keep(label_height + style.BODY.leading)
            for place, (label, lines) in enumerate(shown):
                x = frame.x + place * wide
                if row == 0:
                    frame.page.text(x, frame.y - style.SMALL.size, label, style.SMALL)
                if row < len(lines):
                    y = frame.y - label_height - style.BODY.size
                    frame.page.run(x, y, lines[row], style.BODY)
            frame.y -= label_height + style.BODY.leading
        frame.y -= 4.0


def verdict(frame: Frame, sheet: Sheet) -> None:
    """Set the verdict in its box, with the badge of the worst level."""
    look = Style(9.0, True)
    lines = frame.book.lines(sheet.verdict, frame.width - _BADGE - 34.0, look)
    height = len(lines) * look.leading + 9.0
    frame.skip(3.0)
    frame.keep(height)
    frame.page.box(frame.x, frame.y - height, frame.width, height, edge=style.ACCENT)
    badge(frame.page, frame.x + 8.0, frame.y - 16.2, sheet.worst)
    for place, line in enumerate(lines):
        y = frame.y - 5.0 - look.size - place * look.leading + 1.0
        frame.page.run(frame.x + _BADGE + 18.0, y, line, look)
    frame.y -= height + 4.0


def badge(page: Page, x: float, y: float, level: Level | None) -> None:
    """Draw the badge of a level: shape, tone and word differ, so that colour is not needed."""
    high = 10.6
    if level is Level.STOP:
        page.box(x, y, _BADGE, high, fill=style.INK)
        page.middle(x + _BADGE / 2, y + 3.0, "× STOP", style.BADGE)
    elif level is Level.CAUTION:
        page.box(x, y, _BADGE, high, fill=style.TINT, edge=style.ACCENT)
        page.middle(x + _BADGE / 2, y + 3.0, "! CAUTION", style.BADGE_LIGHT)
    else:
        word = "NOTE" if level is Level.NOTE else "CLEAR"
        page.middle(x + _BADGE / 2, y + 3.0, word, style.BADGE_PLAIN)


def legend(frame: Frame) -> None:
    """Explain the marks of origin and the numbers of the sources."""
    frame.skip(4.0)
    frame.paragraph(f"{LEGEND}   [1] number of the source in the list at the end", style.QUIET)


def cautions(frame: Frame, sheet: Sheet) -> None:
    """Set the cautions, each with a bar at its left."""
    frame.skip(11.0)
    frame.keep(60.0)
    frame.heading("Cautions")
    frame.y -= 3.0
    for text in sheet.cautions:
        for line in frame.book.lines(text, frame.width - 14.0, style.BODY):
            frame.keep(style.BODY.leading)
            high = style.BODY.leading
            frame.page.box(frame.x, frame.y - high - 1.0, 3.0, high, fill=style.ACCENT)
            frame.page.run(frame.x + 12.0, frame.y - style.BODY.size, line, style.BODY)
            frame.y -= high
        frame.y -= 4.0
