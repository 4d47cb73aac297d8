"""The PDF document around the pages: date, identity, outline, page labels.

Equal sheets give equal bytes: the date is that of the revision, the identity comes from the
content, nothing is compressed, and neither clock nor environment has a say.
"""

from __future__ import annotations

import hashlib
from collections.abc import Sequence
from datetime import date

import specsheet
from specsheet.render.pdf import embed, fonts, style, wrap
from specsheet.render.pdf.objects import Objects, string
from specsheet.render.pdf.page import Book
from specsheet.sheet.model import Sheet

#: date of a sheet without revisions
_NO_DATE = date(2000, 1, 1)


def close(book: Book, sheet: Sheet) -> bytes:
    """Return the finished document: every page with its foot, outline and page labels."""
    _furnish(book, sheet)
    objects = Objects()
    root, tree = objects.add(), objects.add()
    info = objects.add(_description(sheet))
    contents = [page.content().encode("ascii") for page in book.pages]
    used = embed.fonts_of(objects, set[int]().union(*(page.fonts for page in book.pages)))
    resources = objects.add(f"<< /Font {used} >>")
    pages = [_page(objects, tree, content, resources) for content in contents]
    _tree(objects, tree, book, pages)
    outline = _outline(objects, book, pages)
    labels = f"<< /Nums [0 << /S /D /St 1 /P {string(f'{sheet.tag}-')} >>] >>"
    objects.put(
        root,
        f"<< /Type /Catalog /Pages {tree} 0 R /Outlines {outline} 0 R /PageLabels {labels} "
        "/Lang (en-GB) /ViewerPreferences << /DisplayDocTitle true >> >>",
    )
    identity = hashlib.md5(b"".join(contents), usedforsecurity=False).hexdigest()
    return objects.file(root, info, identity)


def _description(sheet: Sheet) -> str:
    parts = (sheet.tag, sheet.title, f"revision {sheet.revision}" if sheet.revision else "")
    author = next((line.text for line in sheet.head if line.key == "job.author"), "")
    program = string(f"specsheet {specsheet.__version__}")
    day = sheet.date or _NO_DATE
    # midnight UTC of the day of the revision, whatever the clock and the environment say
    midnight = f"(D:{day.year:04d}{day.month:02d}{day.day:02d}000000Z)"
    return (
        f"<< /Title {string(', '.join(part for part in parts if part))} /Author {string(author)} "
        f"/Subject {string(sheet.service)} /Creator {program} /Producer {program} "
        f"/CreationDate {midnight} /ModDate {midnight} >>"
    )


def _page(objects: Objects, tree: int, content: bytes, resources: int) -> int:
    stream = objects.stream(content)
    return objects.add(
        f"<< /Type /Page /Parent {tree} 0 R /Resources {resources} 0 R /Contents {stream} 0 R >>"
    )


def _tree(objects: Objects, tree: int, book: Book, pages: Sequence[int]) -> None:
    """Write the list of the pages and the size of their paper."""
    kids = " ".join(f"{page} 0 R" for page in pages)
    wide, high = book.size
    objects.put(
        tree,
        f"<< /Type /Pages /Count {len(pages)} /Kids [{kids}] /MediaBox [0 0 {wide:g} {high:g}] >>",
    )


def _outline(objects: Objects, book: Book, pages: Sequence[int]) -> int:
    """Add the outline with one entry for each heading, in the order of the pages."""
    headings = sorted(book.headings, key=lambda heading: heading.page)
    root = objects.add()
    first, last = root + 1, root + len(headings)
    for place, heading in enumerate(headings, start=first):
        before = f"/Prev {place - 1} 0 R " if place > first else ""
        after = f"/Next {place + 1} 0 R " if place < last else ""
        goal = f"[{pages[heading.page]} 0 R /XYZ 0 {heading.top + 6.0:.2f} 0]"
        objects.add(
            f"<< /Title {string(heading.title)} /Parent {root} 0 R {before}{after}/Dest {goal} >>"
        )
    ends = f"/First {first} 0 R /Last {last} 0 R " if headings else ""
    objects.put(root, f"<< /Type /Outlines {ends}/Count {len(headings)} >>")
    return root


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
