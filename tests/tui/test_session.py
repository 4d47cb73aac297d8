"""The session: edits, refusals, undo, what is unsaved. No terminal."""

from __future__ import annotations

from datetime import date
from pathlib import Path

import pytest

from specsheet.tui.address import Address
from specsheet.tui.opening import open_session
from specsheet.tui.saving import Conflict
from specsheet.tui.session import Session

FLOW = Address("points.flow", 1)
SIZE = Address("line.size")


@pytest.fixture
def session(tag_file: Path) -> Session:
    found = open_session(tag_file)
    assert isinstance(found, Session)
    return found


def test_opening_changes_nothing(session: Session, tag_file: Path) -> None:
    assert not session.dirty
    assert session.text == tag_file.read_text()
    assert session.get(FLOW) == "30 m3/h"
    assert session.point_names() == ("minimum", "normal")


def test_an_edit_changes_its_line_only(session: Session, tag_file: Path) -> None:
    assert session.edit(FLOW, "32 m3/h") == ""
    before, after = tag_file.read_text().splitlines(), session.text.splitlines()
    assert [(a, b) for a, b in zip(before, after, strict=True) if a != b] == [
        ('flow = "30 m3/h"', 'flow = "32 m3/h"')
    ]
    assert session.dirty


def test_the_same_text_is_no_edit(session: Session) -> None:
    session.edit(FLOW, " 30 m3/h ")
    assert not session.dirty
    assert session.undo_name == ""


def test_an_empty_text_removes_the_entry(session: Session) -> None:
    session.edit(SIZE, "")
    assert "DN 80" not in session.text
    assert session.get(SIZE) == ""


@pytest.mark.parametrize(
    ("address", "text", "said"),
    [
        (FLOW, "30", "unit"),
        (FLOW, "30,5 m3/h", "30.5"),
        (Address("points.pressure", 0), "3 bar", "bar(g)"),
        (SIZE, "DN abc", "DN 150"),
        (Address("fluid.phase"), "plasma", "liquid"),
        (Address("require.quantity"), "two", "whole number"),
        (Address("fluid.mixture.methane"), "much", "much"),
        (Address("points.name", 1), "", "needs a name"),
        (Address("points.name", 1), "minimum", "already"),
    ],
)
def test_a_refused_text_is_kept_but_not_stored(
    session: Session, address: Address, text: str, said: str
) -> None:
    before = session.text
    reason = session.edit(address, text)
    assert said in reason
    assert session.get(address) == text
    assert session.refusal(address) == reason
    assert session.text == before
    assert session.dirty


def test_nothing_is_derived_from_a_value_that_is_no_longer_in_its_field(session: Session) -> None:
    session.edit(FLOW, "30 apples")
    assert "30 m3/h" in session.text
    derived = session.text_to_derive()
    assert derived is not None
    assert "30 m3/h" not in derived
    assert "8 m3/h" in derived


def test_mending_a_refused_text_stores_it(session: Session) -> None:
    session.edit(FLOW, "30 apples")
    assert session.edit(FLOW, "31 m3/h") == ""
    assert not session.refused
    assert 'flow = "31 m3/h"' in session.text


def test_saving_leaves_refused_texts_out_and_stays_unsaved(
    session: Session, tag_file: Path
) -> None:
    session.edit(SIZE, "DN 100")
    session.edit(FLOW, "30 apples")
    assert session.save().conflict is Conflict.NONE
    assert "DN 100" in tag_file.read_text()
    assert "30 m3/h" in tag_file.read_text()
    assert session.dirty
    assert session.get(FLOW) == "30 apples"


def test_undo_and_redo_restore_text_and_refusals(session: Session) -> None:
    first = session.text
    session.edit(SIZE, "DN 100")
    second = session.text
    session.edit(FLOW, "30 apples")
    assert session.undo() == "Flow, normal"
    assert (session.text, session.refusal(FLOW)) == (second, "")
    assert session.undo() == "Nominal size"
    assert session.text == first
    assert not session.dirty
    assert session.undo() == ""
    assert session.redo() == "Nominal size"
    assert session.redo() == "Flow, normal"
    assert session.get(FLOW) == "30 apples"
    assert session.redo() == ""


def test_an_edit_after_undo_drops_what_was_undone(session: Session) -> None:
    session.edit(SIZE, "DN 100")
    session.undo()
    session.edit(SIZE, "DN 50")
    assert session.redo_name == ""


def test_undo_past_a_save_is_an_edit_again(session: Session) -> None:
    session.edit(SIZE, "DN 100")
    session.save()
    assert not session.dirty
    session.undo()
    assert session.dirty


def test_points_come_go_and_change_their_names(session: Session) -> None:
    assert session.add_point("maximum") == ""
    session.edit(Address("points.flow", 2), "44 m3/h")
    session.edit(Address("points.name", 1), "usual")
    assert session.point_names() == ("minimum", "usual", "maximum")
    assert "already" in session.add_point("usual")
    assert session.remove_point(0) == ""
    assert session.point_names() == ("usual", "maximum")
    assert session.get(Address("points.flow", 1)) == "44 m3/h"


def test_refused_texts_move_with_their_points(session: Session) -> None:
    session.edit(FLOW, "30 apples")
    session.remove_point(0)
    assert session.get(Address("points.flow", 0)) == "30 apples"
    session.undo()
    assert session.get(FLOW) == "30 apples"


def test_two_points_of_one_name_are_never_mixed_up(tag_file: Path) -> None:
    tag_file.write_text(tag_file.read_text().replace('"normal"', '"minimum"'))
    session = open_session(tag_file)
    assert isinstance(session, Session)
    assert session.get(Address("points.flow", 0)) == "8 m3/h"
    assert session.get(FLOW) == "30 m3/h"
    assert "rename" in session.edit(FLOW, "31 m3/h")
    assert session.text_to_derive() is None
    session.edit(Address("points.name", 0), "lowest")
    assert session.edit(FLOW, "32 m3/h") == ""
    assert (session.get(Address("points.flow", 0)), session.get(FLOW)) == ("8 m3/h", "32 m3/h")


def test_revisions_are_added_behind(session: Session) -> None:
    assert session.add_revision("A", date(2031, 3, 4)) == ""
    session.edit(Address("revisions.text", 0), "Issued for inquiry")
    assert session.get(Address("revisions.date", 0)) == "2031-03-04"
    assert "date = 2031-03-04\n" in session.text
    assert "date" in session.edit(Address("revisions.date", 0), "4th of March")


def test_components_come_and_go(session: Session) -> None:
    session.edit(Address("fluid.mixture.methane"), "0.620")
    session.edit(Address("fluid.mixture.carbon_dioxide"), "38 %")
    assert session.components() == ("methane", "carbon_dioxide")
    assert session.get(Address("fluid.mixture.methane")) == "0.620"
    session.edit(Address("fluid.mixture.methane"), "")
    assert session.components() == ("carbon_dioxide",)


@pytest.mark.parametrize(
    ("path", "text", "line", "back"),
    [
        ("require.custody_transfer", "yes", "custody_transfer = true", "yes"),
        ("require.quantity", "3", "quantity = 3", "3"),
        ("require.output", "4-20 mA, pulse", 'output = ["4-20 mA", "pulse"]', "4-20 mA, pulse"),
        ("require.output", '["a, b", "c"]', 'output = ["a, b", "c"]', '["a, b", "c"]'),
        ("service", 'size 4" pipe', "size 4", 'size 4" pipe'),
    ],
)
def test_each_kind_goes_in_and_comes_back(
    session: Session, path: str, text: str, line: str, back: str
) -> None:
    assert session.edit(Address(path), text) == ""
    assert line in session.text
    assert session.get(Address(path)) == back


def test_a_new_file_is_made_at_the_first_save(tag_file: Path) -> None:
    path = tag_file.with_name("FT-9.toml")
    session = open_session(path)
    assert isinstance(session, Session)
    assert session.is_new
    assert session.get(Address("tag")) == "FT-9"
    assert not path.exists()
    session.edit(Address("family"), "vortex")
    assert session.save().conflict is Conflict.NONE
    assert 'family = "vortex"' in path.read_text()
    assert not session.is_new
    assert not session.dirty


@pytest.mark.parametrize(
    ("content", "said"),
    [
        (b"tag = \n", ":1:"),
        (b'a = 1\nb = "x\n', ":2:"),
        (b"\xff\xfe\x00", "UTF-16"),
        (b"", "empty"),
    ],
)
def test_a_file_that_cannot_be_edited_says_where(tag_file: Path, content: bytes, said: str) -> None:
    tag_file.write_bytes(content)
    message = open_session(tag_file)
    assert isinstance(message, str)
    assert said in message
    assert tag_file.read_bytes() == content


def test_line_ends_and_byte_order_mark_stay(tag_file: Path) -> None:
    tag_file.write_bytes(b"\xef\xbb\xbf" + tag_file.read_bytes().replace(b"\n", b"\r\n"))
    session = open_session(tag_file)
    assert isinstance(session, Session)
    session.edit(SIZE, "DN 100")
    session.save()
    content = tag_file.read_bytes()
    assert b"\n" not in content.replace(b"\r\n", b"")
    assert b'"DN 100"' in content


def test_a_component_that_cannot_be_read_is_kept_until_it_is_mended(session: Session) -> None:
    session.edit(Address("fluid.mixture.methane"), "0.6")
    assert "fraction" in session.add_component("carbon dioxide")
    assert session.refused_component == "carbon dioxide"
    derived = session.text_to_derive()
    assert derived is not None
    assert "methane" in derived
    assert session.add_component("carbon dioxide 0.4") == ""
    assert session.refused_component == ""
    assert session.components() == ("methane", "carbon dioxide")
    session.undo()
    assert session.refused_component == "carbon dioxide"
    assert session.add_component("") == ""
    assert not session.refused
