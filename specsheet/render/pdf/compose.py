"""The order of things on the printed sheet."""

from __future__ import annotations

from specsheet.render.pdf import annex, body, document, head, ruler, style
from specsheet.render.pdf.page import Book, Frame
from specsheet.sheet.model import Sheet

_ANNEX = 0.4  # of a page: with less room left the annex starts overleaf


def to_bytes(sheet: Sheet) -> bytes:
    """Return the sheet as a PDF document; equal sheets give equal bytes."""
    return document.bound(compose(sheet), sheet)


def compose(sheet: Sheet) -> Book:
    """Return the pages of the sheet, without running heads and feet."""
    size = style.PAPERS.get(sheet.paper, style.PAPERS["A4"])
    book = Book(size, body.narrowest(sheet))
    frame = Frame(book, style.SIDE, book.size[0] - 2.0 * style.SIDE, 0, book.top(0))
    head.band(frame, sheet)
    head.details(frame, sheet)
    head.verdict(frame, sheet)
    if sheet.ruler is not None:
        ruler.draw(frame, sheet.ruler)
    head.legend(frame)
    body.by_point(frame, sheet, sheet.points)
    body.findings(frame, sheet)
    for table in sheet.tables:
        if table.columns:
            body.by_point(frame, sheet, table)
    body.limits(frame, sheet)
    body.singles(frame, sheet)
    body.assumptions(frame, sheet)
    if sheet.budget is not None:
        body.by_point(frame, sheet, sheet.budget)
    body.clauses(frame, sheet)
    head.cautions(frame, sheet)
    body.reply(frame, sheet)
    body.revisions(frame, sheet)
    if sheet.annex or sheet.sources:
        frame.skip(14.0)
        frame.keep(frame.full * _ANNEX)
        annex.draw(frame, sheet)
    return book
