"""One change of a tag file's text, by address: the way into :class:`specsheet.tagfile.Document`."""

from __future__ import annotations

from datetime import date

from specsheet.tagfile.document import Document, EditError
from specsheet.tui.address import Address


def assign(text: str, address: Address, value: str) -> str:
    """Return the text with ``value`` stated at an address; raises EditError where it cannot be."""
    document = Document.parse(text)
    document.set(_path(document, address), value)
    return document.text()


def unset(text: str, address: Address) -> str:
    """Return the text without the entry at an address; raises EditError where it cannot be."""
    document = Document.parse(text)
    document.unset(_path(document, address))
    return document.text()


def add_point(text: str, name: str) -> str:
    """Return the text with one more operating point, behind the others."""
    document = Document.parse(text)
    document.add_point(name)
    return document.text()


def remove_point(text: str, index: int) -> str:
    """Return the text without an operating point."""
    document = Document.parse(text)
    document.remove_point(_point(document, index))
    return document.text()


def add_revision(text: str, mark: str, day: date) -> str:
    """Return the text with one more line in the revision block."""
    document = Document.parse(text)
    document.add_revision(mark, day, "")
    return document.text()


def _path(document: Document, address: Address) -> str:
    if address.index is None:
        return address.path
    if address.section == "revisions":
        return f"revisions.{address.index + 1}.{address.key}"
    return f"points.{_point(document, address.index)}.{address.key}"


def _point(document: Document, index: int) -> str:
    """Return the name of a point; raises EditError where it names another point as well."""
    names = document.point_names()
    name = names[index]
    if names.index(name) != index:
        raise EditError(f'another operating point is named "{name}"; rename that one first')
    return name
