"""Which rows the form has, what stands beside them, and where a finding points. No terminal."""

from __future__ import annotations

from pathlib import Path

import pytest

from specsheet.fields import COMMON, SECTIONS
from specsheet.tui import form
from specsheet.tui.address import Address
from specsheet.tui.commands import BROWSE, FORM
from specsheet.tui.opening import open_session
from specsheet.tui.session import Session
from specsheet.tui.values import component


@pytest.fixture
def session(tag_file: Path) -> Session:
    found = open_session(tag_file)
    assert isinstance(found, Session)
    return found


def keys(session: Session, section: str, *, everything: bool = False) -> set[str]:
    return {row.entry.key for row in form.rows(session, section, everything=everything)}


@pytest.mark.parametrize(
    ("kind", "there", "not_there"),
    [
        ("substance", {"substance", "phase"}, {"mixture", "salinity", "product"}),
        ("mixture", {"mixture", "basis", "phase"}, {"salinity", "solute"}),
        ("solution", {"solute", "mass_fraction"}, {"mixture", "salinity"}),
        ("seawater", {"salinity"}, {"solute", "mixture"}),
        ("petroleum", {"density_15", "viscosity_1"}, {"mixture"}),
        ("humid_air", {"relative_humidity"}, {"salinity"}),
        ("slurry", {"solids", "solids_density"}, {"salinity"}),
        ("given", {"molar_mass"}, {"mixture"}),
    ],
)
def test_the_kind_of_fluid_decides_what_stands_in_front(
    session: Session, kind: str, there: set[str], not_there: set[str]
) -> None:
    session.edit(Address("fluid.substance"), "")
    session.edit(Address("fluid.kind"), kind)
    shown = keys(session, "fluid")
    assert there <= shown
    assert not (not_there & shown)


@pytest.mark.parametrize("section", [section.key for section in SECTIONS])
def test_every_entry_can_be_reached(session: Session, section: str) -> None:
    wanted = {entry.key for entry in COMMON if entry.section == section} - {"schema"}
    assert wanted <= keys(session, section, everything=True)


def test_an_entry_that_holds_a_text_is_always_shown(session: Session) -> None:
    assert "salinity" not in keys(session, "fluid")
    session.edit(Address("fluid.salinity"), "3.5 %")
    assert "salinity" in keys(session, "fluid")


def test_the_family_brings_its_own_entries(session: Session) -> None:
    assert keys(session, "meter")
    session.edit(Address("family"), "no such family")
    assert keys(session, "meter") == set()


def test_hints_tell_what_is_needed_and_what_is_assumed(session: Session) -> None:
    rows = {row.entry.path: row for row in form.rows(session, "line", everything=True)}
    assert form.hint(session, rows["line.schedule"]) == "assumed: STD"
    assert form.hint(session, rows["line.roughness"]).startswith("e.g. ")
    rows = {row.entry.path: row for row in form.rows(session, "fluid", everything=True)}
    assert form.hint(session, rows["fluid.phase"]).startswith("needed")
    assert form.hint(session, rows["fluid.hazards"]) == "e.g. flammable"


@pytest.mark.parametrize(
    ("text", "read"),
    [
        ("methane 0.62", ("methane", "0.62")),
        ("methane 62 %", ("methane", "62 %")),
        ("methane = 0.62", ("methane", "0.62")),
        ("carbon dioxide 0.38", ("carbon dioxide", "0.38")),
    ],
)
def test_a_component_is_typed_as_name_and_fraction(text: str, read: tuple[str, str]) -> None:
    assert component(text) == read


@pytest.mark.parametrize("text", ["methane", "carbon dioxide", "0.62", "2.3-dimethylbutane 0.1"])
def test_a_component_that_cannot_be_told_apart_is_refused(text: str) -> None:
    assert isinstance(component(text), str)


@pytest.mark.parametrize(
    ("field", "address"),
    [
        ("line.size", Address("line.size")),
        ("tag", Address("tag")),
        ("points.normal.flow", Address("points.flow", 1)),
        ("points.normal", Address("points.name", 1)),
        ("points.flow", Address("points.flow", 0)),
        ("fluid.mixture.methane", Address("fluid.mixture.methane")),
        ("revisions.2.date", Address("revisions.date", 1)),
        ("points.elsewhere.flow", None),
        ("file", None),
    ],
)
def test_a_finding_points_at_its_entry(
    session: Session, field: str, address: Address | None
) -> None:
    assert form.address_of(session, field) == address


def test_a_point_with_a_full_stop_in_its_name_is_found(session: Session) -> None:
    session.edit(Address("points.name", 1), "case 1.5")
    assert form.address_of(session, "points.case 1.5.flow") == Address("points.flow", 1)
    assert session.edit(Address("points.flow", 1), "31 m3/h") == ""
    assert session.get(Address("points.flow", 1)) == "31 m3/h"


@pytest.mark.parametrize("commands", [FORM, BROWSE])
def test_no_two_commands_share_a_key(commands: tuple[object, ...]) -> None:
    used = [key for c in commands for key in c.keys.split(",")]  # type: ignore[attr-defined]
    assert len(used) == len(set(used))
