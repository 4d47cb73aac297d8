"""The range ruler: limits as bars over a logarithmic axis, operating points standing on it."""

from __future__ import annotations

from specsheet.findings import Level
from specsheet.render.pdf import fonts, scales, style, wrap
from specsheet.render.pdf.fonts import Run
from specsheet.render.pdf.page import Frame, Page
from specsheet.render.pdf.style import Style
from specsheet.sheet.model import Mark, Ruler, Window
from specsheet.sheet.ruler import stagger

_GUTTER = 108.0  # for the words at the left
_LANE = 13.0  # of a window
_BAR = 7.0
_LABEL_LANE = 9.5  # of the names of the points
_AXIS = 24.0  # below the axis line
_NAME = Style(7.0, True)
_END = Style(6.2, False, style.INK)
_LONGEST = 30  # letters of a point's name


def draw(frame: Frame, ruler: Ruler) -> None:
    """Draw the ruler across the frame."""
    left = frame.x + _GUTTER
    long = frame.width - _GUTTER - 8.0
    names = [
        frame.book.clean(f"{wrap.shorten(mark.name, _LONGEST)} {mark.text}") for mark in ruler.marks
    ]
    widths = [fonts.width(name, _NAME.size) for name in names]
    centres = [
        min(max(left + mark.position * long, left + wide / 2), left + long - wide / 2)
        for mark, wide in zip(ruler.marks, widths, strict=True)
    ]
    lanes = stagger(centres, widths, 8.0)
    head = (max(lanes, default=0) + 1) * _LABEL_LANE + 5.0
    body = len(ruler.windows) * _LANE + 6.0
    frame.skip(9.0)
    frame.keep(head + body + _AXIS + scales.height(ruler) + 18.0)
    frame.heading("Range ruler")
    top = frame.y - head
    axis = top - body
    page = frame.page
    _usable(page, ruler, left, long, top, axis)
    for mark, lane in zip(ruler.marks, lanes, strict=True):
        x = left + mark.position * long
        page.line(x, axis, x, top + lane * _LABEL_LANE + 0.5, style.INK, 0.7)
    for place, window in enumerate(ruler.windows):
        words = frame.book.lines(window.label, _GUTTER - 10.0, style.QUIET)[0]
        _window(page, window, words, frame.x, left, long, top - 4.0 - place * _LANE)
    _axis(frame, ruler, left, long, axis)
    for mark, name, centre, lane in zip(ruler.marks, names, centres, lanes, strict=True):
        _named(page, name, centre, top + lane * _LABEL_LANE)
        _mark(page, mark, left + mark.position * long, axis)
    frame.y = axis - _AXIS
    scales.draw(frame, ruler, _GUTTER)


def _usable(page: Page, ruler: Ruler, left: float, long: float, top: float, axis: float) -> None:
    """Tint the stretch that every window leaves open."""
    if ruler.usable is None:
        return
    start, end = (left + place * long for place in ruler.usable)
    page.box(start, axis, end - start, top - axis, fill=style.TINT)
    for x in (start, end):
        page.line(x, axis, x, top, style.MIDDLE, 0.6)


def _window(
    page: Page, window: Window, words: Run, x: float, left: float, long: float, y: float
) -> None:
    """Draw one window: its words, its bar, and the flows where it ends."""
    start, end = left + window.low * long, left + window.high * long
    tone = style.ACCENT if window.level is Level.STOP else style.MIDDLE
    page.run(x + _GUTTER - 10.0 - words.width, y - _BAR + 1.0, words, style.QUIET)
    page.box(start, y - _BAR, max(end - start, 0.6), _BAR, fill=tone)
    for is_open, tip, into in ((window.open_low, start, 5.0), (window.open_high, end, -5.0)):
        if is_open:  # the limit leaves this end open: cut the bar to an arrow
            for edge in (y, y - _BAR):
                page.shape([(tip, y - _BAR / 2), (tip, edge), (tip + into, edge)], style.WHITE)
    base = y - _BAR + 1.2
    if not window.open_low and window.low_text:
        wide = fonts.width(window.low_text, _END.size)
        # inside the bar where it would stand in the words at the left
        at = start - wide - 2.5 if start - wide > left - 4.0 else start + 2.5
        page.box(at - 1.0, base - 1.0, wide + 2.0, _END.size, fill=style.WHITE)
        page.text(at, base, window.low_text, _END)
    if not window.open_high and window.high_text:
        wide = fonts.width(window.high_text, _END.size)
        page.box(end + 1.5, base - 1.0, wide + 2.0, _END.size, fill=style.WHITE)
        page.text(end + 2.5, base, window.high_text, _END)


def _axis(frame: Frame, ruler: Ruler, left: float, long: float, y: float) -> None:
    """Draw the axis with its ticks; a label that would touch the one before is left out."""
    page = frame.page
    page.line(left, y, left + long, y, style.INK, 1.1)
    taken = left - 20.0
    for tick in ruler.ticks:
        x = left + tick.position * long
        page.line(x, y, x, y - (5.0 if tick.label else 2.6), style.INK, 0.5)
        half = fonts.width(tick.label, style.QUIET.size) / 2.0
        if tick.label and x - half > taken and x + half <= left + long + 6.0:
            page.middle(x, y - 13.0, tick.label, style.QUIET)
            taken = x + half + 4.0
    words = frame.book.clean(f"{ruler.label}, {ruler.unit}")
    page.right(frame.x + _GUTTER - 10.0, y - 13.0, words, Style(7.0, True))


def _named(page: Page, name: str, centre: float, y: float) -> None:
    """Set the name of a point over the pins that pass behind it."""
    wide = fonts.width(name, _NAME.size)
    page.box(centre - wide / 2 - 1.5, y + 0.8, wide + 3.0, _NAME.size + 0.8, fill=style.WHITE)
    page.middle(centre, y + 2.5, name, _NAME)


def _mark(page: Page, mark: Mark, x: float, axis: float) -> None:
    """Draw an operating point on the axis: filled where every window holds it, else hollow."""
    size = 3.4
    corners = [(x, axis + size), (x + size, axis), (x, axis - size), (x - size, axis)]
    page.shape(corners, style.ACCENT if mark.inside else style.WHITE, style.ACCENT)
