"""The screens, driven by keys; values come from an evaluator that answers at once."""

from __future__ import annotations

from pathlib import Path

import pytest

from specsheet.fields import SECTIONS
from specsheet.tui import dialogs
from specsheet.tui.address import Address
from specsheet.tui.app import FormApp
from specsheet.tui.commands import FORM
from specsheet.tui.fields import ChoiceEditor
from specsheet.tui.form_screen import FormScreen
from specsheet.tui.protocol import Derived, Failed
from tests.tui.conftest import AtOnce, screen_text, send, until
from tests.tui.driving import FLOW, at, drive, form_of


def test_typing_and_enter_commit_derive_and_go_on(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await at(app, FLOW)
        await send(pilot, *"31 m3/h", "enter")
        await until(pilot, lambda: form.session.get(FLOW) == "31 m3/h")
        assert form.editor is not None
        assert form.editor.row.entry.path == "points.pressure"
        await until(pilot, lambda: "31 m3/h" in evaluator.texts[-1])
        assert "not saved" in screen_text(app)
        await send(pilot, "ctrl+s")
        await until(pilot, lambda: "31 m3/h" in tag_file.read_text())
        assert "saved FT-1001.toml" in screen_text(app)

    drive(tag_file, evaluator, play)


def test_a_burst_of_keys_lands_in_its_fields(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await at(app, Address("points.flow", 0))
        await send(pilot, *"9 m3/h", "tab", *"29 m3/h", "tab", *"4 bar(g)", "enter")
        await until(pilot, lambda: form.session.get(Address("points.pressure", 0)) == "4 bar(g)")
        assert form.session.get(Address("points.flow", 0)) == "9 m3/h"
        assert form.session.get(FLOW) == "29 m3/h"

    drive(tag_file, evaluator, play)


def test_keys_typed_over_a_change_of_section_are_not_misplaced(
    tag_file: Path, evaluator: AtOnce
) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await at(app, Address("fluid.name"))
        await send(pilot, *"Brine", "pagedown", *"DN 65", "enter")
        await until(pilot, lambda: form.session.get(Address("line.size")) == "DN 65")
        assert form.session.get(Address("fluid.name")) == "Brine"

    drive(tag_file, evaluator, play)


def test_a_refused_text_stays_with_the_reason(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await at(app, FLOW)
        await send(pilot, *"31 apples", "enter", "up")
        await until(pilot, lambda: FLOW in form.session.refused)
        await until(pilot, lambda: 'the unit "apples"' in screen_text(app))
        text = screen_text(app)
        assert "31 apples" in text
        assert "1 refused" in text
        await send(pilot, "ctrl+s")
        await until(pilot, lambda: "not in the file" in screen_text(app))
        assert "apples" not in tag_file.read_text()

    drive(tag_file, evaluator, play)


def test_escape_reverts_and_undo_takes_back(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await at(app, Address("fluid.name"))
        await send(pilot, *"Brine", "escape", "enter")
        await until(pilot, lambda: form.session.undo_name == "")
        assert form.session.get(Address("fluid.name")) == ""
        await at(app, Address("fluid.name"))
        await send(pilot, *"Brine", "enter")
        await until(pilot, lambda: form.session.get(Address("fluid.name")) == "Brine")
        await send(pilot, "ctrl+z")
        await until(pilot, lambda: form.session.get(Address("fluid.name")) == "")
        await until(pilot, lambda: "undone: Name" in screen_text(app))
        await send(pilot, "ctrl+y")
        await until(pilot, lambda: "Brine" in screen_text(app))

    drive(tag_file, evaluator, play)


def test_a_choice_cycles_is_typed_and_is_picked(tag_file: Path, evaluator: AtOnce) -> None:
    phase = Address("fluid.phase")

    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await at(app, phase)
        assert isinstance(form.focused, ChoiceEditor)
        await send(pilot, "right", "enter")
        await until(pilot, lambda: form.session.get(phase) == "gas")
        await at(app, phase)
        await send(pilot, "l", "enter")
        await until(pilot, lambda: form.session.get(phase) == "liquid")
        await at(app, phase)
        await send(pilot, "space")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Pick))
        await send(pilot, *"gas", "enter")
        await until(pilot, lambda: form.session.get(phase) == "gas")

    drive(tag_file, evaluator, play)


def test_the_kind_of_fluid_changes_the_rows_under_the_cursor(
    tag_file: Path, evaluator: AtOnce
) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await at(app, Address("fluid.kind"))
        await send(pilot, "right", "enter", *"Wet gas", "enter")
        await until(pilot, lambda: form.session.get(Address("fluid.kind")) == "mixture")
        await until(pilot, lambda: form.session.get(Address("fluid.name")) == "Wet gas")
        await until(pilot, lambda: "Composition: add" in screen_text(app))
        await form.go_to(Address("fluid.mixture"))
        await send(pilot, *"methane 0.6", "enter")
        await until(pilot, lambda: form.session.components() == ("methane",))
        await until(pilot, lambda: "sum 0.6" in screen_text(app))
        await form.go_to(Address("fluid.mixture"))
        await send(pilot, *"carbon dioxide", "enter")
        await until(pilot, lambda: "write methane 0.62" in screen_text(app))
        assert "carbon dioxide" in screen_text(app)

    drive(tag_file, evaluator, play, (120, 40))


def test_a_substance_is_found_by_a_part_of_its_name(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await at(app, Address("fluid.substance"))
        await send(pilot, "f4")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Pick))
        await send(pilot, *"ammon", "enter")
        await until(pilot, lambda: form.session.get(Address("fluid.substance")) == "ammonia")

    drive(tag_file, evaluator, play)


def test_the_family_picker_tells_how_each_works(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await at(app, Address("family"))
        await send(pilot, "f4")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Pick))
        await send(pilot, *"orifice conc")
        await until(pilot, lambda: "square-edged hole" in screen_text(app))
        await send(pilot, "enter")
        await until(pilot, lambda: form.session.get(Address("family")) == "orifice_concentric")

    drive(tag_file, evaluator, play)


def test_points_are_added_renamed_and_removed(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await form.open_section("points")
        await send(pilot, "f2")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Prompt))
        await send(pilot, "enter")
        await until(pilot, lambda: len(form.session.point_names()) == 3)
        await until(pilot, lambda: form.page.editor(Address("points.flow", 2)) is not None)
        await until(pilot, lambda: app.screen is form and form.focused is not None)
        await form.go_to(Address("points.name", 2))
        await send(pilot, *"peak", "enter", *"40 m3/h", "enter")
        await until(pilot, lambda: form.session.get(Address("points.flow", 2)) == "40 m3/h")
        assert form.session.point_names()[2] == "peak"
        await send(pilot, "f3")
        await until(pilot, lambda: len(form.session.point_names()) == 2)
        await until(pilot, lambda: "peak removed" in screen_text(app))
        await send(pilot, "ctrl+z")
        await until(pilot, lambda: len(form.session.point_names()) == 3)

    drive(tag_file, evaluator, play)


def test_a_revision_is_added(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await form.open_section("revisions")
        await until(pilot, lambda: "F2 adds one" in screen_text(app))
        await send(pilot, "f2")
        await until(pilot, lambda: form.session.get(Address("revisions.mark", 0)) == "A")

    drive(tag_file, evaluator, play)


def test_findings_stand_at_their_entry_and_lead_there(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await until(pilot, lambda: "The velocity is high" in screen_text(app))
        assert "Points C" in screen_text(app)
        await send(pilot, "f6")
        await until(pilot, lambda: getattr(form.focused, "id", "") == "findings")
        await send(pilot, "enter")
        await until(pilot, lambda: form.section == "points" and form.editor is not None)
        await until(
            pilot, lambda: form.focused is not None and form.focused is form.page.editor(FLOW)
        )
        await form.open_section("")
        await send(pilot, "f9")
        await until(pilot, lambda: form.focused is form.page.editor(FLOW))

    drive(tag_file, evaluator, play)


@pytest.mark.parametrize("size", [(80, 24), (160, 50), (60, 16)])
def test_every_section_fits_and_no_field_is_too_narrow(
    tag_file: Path, evaluator: AtOnce, size: tuple[int, int]
) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        for section in SECTIONS:
            await form.open_section(section.key)
            await pilot.pause(0.02)  # type: ignore[attr-defined]
            for editor in form.page.editors:
                assert editor.size.width >= 10, (section.key, editor.row.label)
                assert editor.size.height == 1
        assert max(len(line) for line in screen_text(app).splitlines()) <= size[0]

    drive(tag_file, evaluator, play, size)


def test_a_terminal_that_is_too_small_says_so(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        await pilot.resize_terminal(50, 12)  # type: ignore[attr-defined]
        await until(pilot, lambda: "60 x 16" in screen_text(app))
        await pilot.resize_terminal(80, 24)  # type: ignore[attr-defined]
        await until(pilot, lambda: "FT-1001" in screen_text(app))

    drive(tag_file, evaluator, play)


@pytest.mark.parametrize("size", [(80, 24), (160, 50)])
def test_all_panes_can_be_seen(tag_file: Path, evaluator: AtOnce, size: tuple[int, int]) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        seen = ""
        for _ in range(3):
            await pilot.pause(0.05)  # type: ignore[attr-defined]
            seen += screen_text(app)
            await send(pilot, "f7")
        for words in ("Velocity m/s", "The velocity is high", "Mass flow, t/h", "licensed"):
            assert words in seen

    drive(tag_file, evaluator, play, size)


def test_a_calculation_that_fails_is_seen_and_edits_go_on(
    tag_file: Path, evaluator: AtOnce
) -> None:
    evaluator.answer = lambda number: Failed(number, "the calculation stopped twice")

    async def play(app: FormApp, pilot: object) -> None:
        await until(pilot, lambda: "the calculation stopped twice" in screen_text(app))
        await at(app, Address("fluid.name"))
        await send(pilot, *"Brine", "enter")
        await until(pilot, lambda: form_of(app).session.get(Address("fluid.name")) == "Brine")

    drive(tag_file, evaluator, play)


def test_nothing_derived_is_said_in_words(tag_file: Path, evaluator: AtOnce) -> None:
    evaluator.answer = lambda number: Derived(number, None)

    async def play(app: FormApp, pilot: object) -> None:
        await until(pilot, lambda: "Nothing could be derived" in screen_text(app))

    drive(tag_file, evaluator, play)


def test_help_and_palette_hold_every_command(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await send(pilot, "f1")
        await until(pilot, lambda: "In the file: fluid.kind" in screen_text(app))
        await send(pilot, "escape")
        await until(pilot, lambda: app.screen is form)
        await send(pilot, "ctrl+p")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Pick))
        await until(pilot, lambda: bool(app.screen.found))
        listed = " ".join(choice.label for choice in app.screen.found)
        missing = [c.title for c in FORM if c.title not in listed and c.action != "palette"]
        assert missing == []
        await send(pilot, *"show all", "enter")
        await until(pilot, lambda: app.screen is form and form.page.everything)
        await send(pilot, "f10")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Tell))
        told = " ".join(app.screen._paragraphs)
        assert all(command.title in told for command in FORM)

    drive(tag_file, evaluator, play)


def test_every_command_has_its_action() -> None:
    for command in FORM:
        assert hasattr(FormScreen, f"action_{command.action.partition('(')[0]}"), command.action


def test_find_goes_to_an_entry_of_another_section(tag_file: Path, evaluator: AtOnce) -> None:
    async def play(app: FormApp, pilot: object) -> None:
        form = form_of(app)
        await send(pilot, "ctrl+f")
        await until(pilot, lambda: isinstance(app.screen, dialogs.Pick))
        await send(pilot, *"isentropic", "enter")
        target = Address("points.isentropic_exponent", 0)
        await until(pilot, lambda: form.section == "points" and form.focused is not None)
        await until(pilot, lambda: form.focused is form.page.editor(target))

    drive(tag_file, evaluator, play)
