"""Drivers other than the flow: each on a linear scale of its own under the range ruler."""

from __future__ import annotations

from specsheet.findings import Level
from specsheet.render.pdf import fonts, style, wrap
from specsheet.render.pdf.page import Frame, Page
from specsheet.render.pdf.style import Style
from specsheet.sheet.model import Ruler, Scale

_LANE = 12.0  # of a scale
_HEAD = 12.0  # of the words above
_BAR = 3.2
_STOP = 3.6  # half the height of the stroke at the flip
_MARK = 3.4  # half the height of a mark
_RESERVE = 46.0  # for the reserve at the right
_GAP = 3.0
_CLEAR = _MARK + _GAP / 2  # between the middle of a mark and a value beside it
_VALUE = Style(6.2)
_FLIP = Style(6.2, True)


def height(ruler: Ruler) -> float:
    """Return the height of the scales [pt], 0 where there are none."""
    lines = len(ruler.scales) + bool(ruler.more)
    return _HEAD + lines * _LANE + 2.0 if ruler.scales else 0.0


def draw(frame: Frame, ruler: Ruler, gutter: float) -> None:
    """Draw the scales across the frame, their words in ``gutter`` points at the left."""
    if not ruler.scales:
        return
    page, left = frame.page, frame.x + gutter
    right = frame.x + frame.width
    base = frame.y - _HEAD + 3.0
    page.right(left - 10.0, base, "Beside the flow", Style(7.0, True))
    page.text(left, base, "each on a linear scale of its own, zero marked", style.QUIET)
    page.right(right, base, "reserve", style.QUIET)
    texts = [text for scale in ruler.scales for text in (scale.flip, scale.mark.text)]
    # a value at the end of a scale stands beyond it
    aside = max(fonts.width(text, _FLIP.size) for text in texts) + _CLEAR + _GAP
    long = right - _RESERVE - left - 2.0 * aside
    for place, scale in enumerate(ruler.scales):
        y = frame.y - _HEAD - (place + 0.5) * _LANE
        words = _fitted(scale.label, scale.unit, gutter - 10.0)
        page.right(left - 10.0, y - 2.2, words, style.QUIET)
        page.right(right, y - 2.2, scale.reserve, _FLIP)
        _scale(page, scale, left, aside, long, y)
    frame.y -= height(ruler)
    if ruler.more:
        page.text(left, frame.y + 5.0, ruler.more, style.QUIET)


def _scale(page: Page, scale: Scale, left: float, aside: float, long: float, y: float) -> None:
    """Draw one scale: its line, the stretch that holds, its flip and the operating value."""

    def at(position: float) -> float:
        return left + aside + position * long

    right = at(1.0) + aside
    page.line(left, y, right, y, style.MIDDLE, 0.5)
    page.line(at(scale.zero), y - _STOP, at(scale.zero), y + _STOP, style.MIDDLE, 0.5)
    start = left if scale.open_low else at(scale.low)
    end = right if scale.open_high else at(scale.high)
    tone = style.ACCENT if scale.level is Level.STOP else style.MIDDLE
    page.box(start, y - _BAR / 2, max(end - start, 0.6), _BAR, fill=tone)
    for is_open, tip, into in ((scale.open_low, start, 5.0), (scale.open_high, end, -5.0)):
        if is_open:  # the limit leaves this end open: cut the bar to an arrow
            for edge in (y + _BAR / 2, y - _BAR / 2):
                page.shape([(tip, y), (tip, edge), (tip + into, edge)], style.WHITE)
    flips, mark = at(scale.flips), at(scale.mark.position)
    values = [(mark, scale.mark.text, _VALUE), (flips, scale.flip, _FLIP)]
    if scale.ceiling != scale.mark.inside:
        values.reverse()  # the flip stands at the left of the mark
    _before(page, *values[0], y, start if scale.ceiling else left)
    _behind(page, *values[1], y, right if scale.ceiling else end)
    page.line(flips, y - _STOP, flips, y + _STOP, style.INK, 1.2)
    _mark(page, mark, y, inside=scale.mark.inside)


def _before(page: Page, x: float, text: str, look: Style, y: float, stop: float) -> None:
    """Set a value at the left of x; where the stretch ends too soon for it, before that end."""
    wide = fonts.width(text, look.size)
    start = x - _CLEAR - wide
    _value(page, start if start > stop else stop - _GAP - wide, text, look, y)


def _behind(page: Page, x: float, text: str, look: Style, y: float, stop: float) -> None:
    """Set a value at the right of x; where the stretch ends too soon for it, behind that end."""
    start = x + _CLEAR
    fits = start + fonts.width(text, look.size) < stop
    _value(page, start if fits else stop + _GAP, text, look, y)


def _value(page: Page, x: float, text: str, look: Style, y: float) -> None:
    page.box(x - 1.0, y - 3.0, fonts.width(text, look.size) + 2.0, 6.0, fill=style.WHITE)
    page.text(x, y - 2.2, text, look)


def _mark(page: Page, x: float, y: float, *, inside: bool) -> None:
    """Draw the operating value: filled where the verdict holds, else hollow."""
    for size, fill in ((_MARK + 1.0, style.WHITE), (_MARK, style.ACCENT if inside else "")):
        corners = [(x, y + size), (x + size, y), (x, y - size), (x - size, y)]
        page.shape(corners, fill or style.WHITE, style.ACCENT if size == _MARK else "")


def _fitted(label: str, unit: str, room: float) -> str:
    """Return a label with its unit in ``room`` points; the label gives way, the unit stays."""
    behind = f", {unit}" if unit else ""
    letters = len(label)
    while letters > 1 and fonts.width(f"{wrap.shorten(label, letters)}{behind}", 7.0) > room:
        letters -= 1
    return f"{wrap.shorten(label, letters)}{behind}"
