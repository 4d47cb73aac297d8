"""Shortlist and what-if panel of the form, driven by keys; the answers are the worker's."""

from __future__ import annotations

from pathlib import Path

from specsheet import tagfile
from specsheet.tui import dialogs
from specsheet.tui.address import Address
from specsheet.tui.app import FormApp
from specsheet.tui.leftovers import survey
from specsheet.tui.protocol import Compare, Compared, Failed, Suppose, Supposed
from specsheet.tui.what_if import WhatIf, ends
from specsheet.tui.worker import answer
from tests.tui.conftest import TAG, AtOnce, screen_text, send, until
from tests.tui.driving import at, drive, form_of

FLOW = Address("points.flow", 1)
FAMILY = Address("family")


def test_a_family_is_adopted_and_undone(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await send(pilot, "f11")
        await until(pilot, lambda: "fits  " in screen_text(app), timeout=20.0)
        assert isinstance(app.screen, dialogs.Pick)
        first = screen_text(app).split("fits  ")[1].split()[0]
        assert first in ("magnetic", "ultrasonic_transit")
        await send(pilot, *"coriolis", "enter")
        await until(pilot, lambda: form.session.get(FAMILY) == "coriolis")
        await until(pilot, lambda: "coriolis adopted" in screen_text(app))
        assert tag_file.read_text(encoding="utf-8") == TAG
        await send(pilot, "ctrl+z")
        await until(pilot, lambda: form.session.get(FAMILY) == "vortex")
        assert form.session.text == TAG

    drive(tag_file, evaluator, play)


def test_leaving_the_list_adopts_nothing(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        await send(pilot, "f11")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Pick), timeout=20.0)
        await send(pilot, "escape")
        await until(pilot, lambda: app.screen is form_of(app))
        assert form_of(app).session.text == TAG
        assert not form_of(app).session.dirty

    drive(tag_file, evaluator, play)


def test_what_if_shows_what_changes_and_leaves_no_trace(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await at(app, FLOW)
        await send(pilot, "ctrl+t")
        await until(pilot, lambda: "WHAT IF" in screen_text(app))
        assert isinstance(app.screen, WhatIf)
        await send(pilot, "ctrl+u", *"300 m3/h", "enter")
        await until(pilot, lambda: "Verdict what-if" in screen_text(app), timeout=20.0)
        assert "Do not buy" in screen_text(app)
        assert "meter-velocity" in screen_text(app) or "comes" in screen_text(app)
        await send(pilot, "escape")
        await until(pilot, lambda: app.screen is form)
        assert form.session.get(FLOW) == "30 m3/h"
        assert form.session.text == TAG
        assert not form.session.dirty
        assert not form.session.undo_name
        assert not survey(tag_file).leftovers
        assert all("300 m3/h" not in text for text in evaluator.texts)

    drive(tag_file, evaluator, play, size=(120, 40))
    assert tag_file.read_text(encoding="utf-8") == TAG


def test_what_if_over_a_range_is_a_table(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        await at(app, FLOW)
        await send(pilot, "ctrl+t")
        await until(pilot, lambda: isinstance(app.screen, WhatIf))
        await send(pilot, "ctrl+u", *"10 m3/h to 330 m3/h", "enter")
        await until(pilot, lambda: "points.normal.flow" in screen_text(app), timeout=20.0)
        text = screen_text(app)
        assert "10 m3/h" in text
        assert "330 m3/h" in text
        assert "stop" in text

    drive(tag_file, evaluator, play, size=(120, 40))


def test_a_value_that_cannot_be_is_refused_in_the_panel(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        await at(app, FLOW)
        await send(pilot, "ctrl+t")
        await until(pilot, lambda: isinstance(app.screen, WhatIf))
        await send(pilot, "ctrl+u", *"30 apples", "enter")
        await until(pilot, lambda: "cannot be tried" in screen_text(app), timeout=20.0)
        said = " ".join(screen_text(app).split())
        assert "units read are kg/h, t/h," in said  # the whole of it, in as many rows as it takes

    drive(tag_file, evaluator, play)


def test_the_worker_answers_both_questions() -> None:
    compared = answer(Compare(1, TAG, ""))
    assert isinstance(compared, Compared)
    assert len(compared.fits) == 64
    assert compared.fits[0].row.startswith("fits")
    assert all(fit.detail for fit in compared.fits)
    supposed = answer(Suppose(2, TAG, "", "line.size", "DN 50"))
    assert isinstance(supposed, Supposed)
    assert any("->" in line for line in supposed.lines)
    same = answer(Suppose(3, TAG, "", "line.size", "DN 80"))
    assert isinstance(same, Supposed)
    assert same.lines[-1] == "Nothing changes."
    assert isinstance(answer(Suppose(4, TAG, "", "line.sice", "DN 50")), Failed)
    assert isinstance(answer(Compare(5, "tag = ", "")), Failed)


def test_what_is_set_aside_is_named(tag_file: Path) -> None:
    from specsheet.tui.opening import open_session

    tag_file.write_text(f'{TAG}\n[meter]\nsize = "DN 50"\n', encoding="utf-8")
    session = open_session(tag_file)
    assert not isinstance(session, str)
    assert 'size = "DN 50"' in session.adopt("orifice_concentric")
    assert "# size" in session.text
    assert tagfile.loads(session.text).tag is not None
    session.undo()
    assert not session.dirty
    session.close()


def test_a_range_is_read_by_its_words() -> None:
    assert ends("80 m3/h to 200 m3/h") == ("80 m3/h", "200 m3/h")
    assert ends(" 80 m3/h .. 200 m3/h ") == ("80 m3/h", "200 m3/h")
    assert ends("stainless steel 316L") == ("stainless steel 316L", "")
