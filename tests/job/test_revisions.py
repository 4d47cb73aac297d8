"""The current revision and the mark of the next."""

from __future__ import annotations

from datetime import date

import pytest

from specsheet.job import current_revision, next_mark
from specsheet.tag import Revision, Tag


def tag(*marks: str) -> Tag:
    return Tag({}, revisions=tuple(Revision(mark, date(2031, 3, 4)) for mark in marks))


def test_the_last_of_the_block_is_current() -> None:
    current = current_revision(tag("A", "B"))
    assert current is not None
    assert current.mark == "B"
    assert current_revision(tag()) is None


@pytest.mark.parametrize(
    ("mark", "following"),
    [
        ("A", "B"),
        ("Z", "AA"),
        ("AZ", "BA"),
        ("ZZ", "AAA"),
        ("b", "c"),
        ("0", "1"),
        ("9", "10"),
        ("09", "10"),
        ("001", "002"),
        ("P1", "P2"),
        ("1.A", "1.B"),
        ("as built", "as built1"),
        ("Ab", "Ab1"),
        ("final!", "final!1"),
        ("", "1"),
    ],
)
def test_next_mark(mark: str, following: str) -> None:
    assert next_mark(tag(mark)) == following


def test_the_first_mark() -> None:
    assert next_mark(tag()) == "A"
