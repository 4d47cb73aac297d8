"""Editing by path: the diff of an edit is the edited line and nothing else."""

from __future__ import annotations

import difflib
import tomllib
from datetime import date

import pytest

from specsheet import tagfile
from specsheet.tagfile import Document, EditError

TEXT = """\
# Feed water, unit 3
schema  = 1
tag     = 'FT-7'          # from the line list
family  = "vortex"

[fluid]     # as agreed
kind      = "mixture"
mixture   = { methane = 0.62, carbon_dioxide = 0.380 }  # analysis of 3 March
phase     = "gas"
hazards   = [
    "flammable",  # always
    "toxic",
]

# The pipe was measured.
[line]
  size = "DN 150"         # not 6"!
  # schedule = "40"       # Wall of the pipe.
  material = "carbon steel"

[[points]]
name = "normal"
flow = "3.1 t/h"
isentropic_exponent = 1.310

# Winter
[[points]]
name = "cold.start"
flow = "0.4 t/h"
pressure = "7 bar(g)"

[[points]]
flow = "5 t/h"
[require]
quantity = 2
potable_water = false
"""


def diff(document: Document, before: str = TEXT) -> list[str]:
    """Return the removed and added lines of a unified diff without context."""
    lines = difflib.unified_diff(
        before.splitlines(keepends=True), document.text().splitlines(keepends=True), n=0
    )
    return [line for line in lines if not line.startswith(("---", "+++", "@@"))]


def edited(path: str, text: str) -> list[str]:
    document = Document.parse(TEXT)
    document.set(path, text)
    assert document.get_text(path) == text
    return diff(document)


def test_a_document_not_edited_is_the_same() -> None:
    assert Document.parse(TEXT).text() == TEXT


@pytest.mark.parametrize(
    ("path", "text", "old", "new"),
    [
        ("line.size", "DN 200", '  size = "DN 150" ', '  size = "DN 200" '),
        ("line.size", 'say "8"', '  size = "DN 150" ', '  size = "say \\"8\\"" '),
        ("tag", "FT-8", "tag     = 'FT-7' ", "tag     = 'FT-8' "),
        ("tag", "FT'8", "tag     = 'FT-7' ", "tag     = \"FT'8\" "),
        ("points.normal.flow", "3.2 t/h", 'flow = "3.1 t/h"', 'flow = "3.2 t/h"'),
        ("points.cold.start.flow", "1 t/h", 'flow = "0.4 t/h"', 'flow = "1 t/h"'),
        ("points.3.flow", "6 t/h", 'flow = "5 t/h"', 'flow = "6 t/h"'),
        ("points.normal.isentropic_exponent", "1.3000", "= 1.310", "= 1.3000"),
        ("points.normal.isentropic_exponent", "low", "= 1.310", '= "low"'),
        ("require.quantity", "3", "= 2", "= 3"),
        ("require.quantity", "a few", "= 2", '= "a few"'),
        ("require.potable_water", "true", "= false", "= true"),
        ("fluid.mixture.methane", "0.6200", "methane = 0.62,", "methane = 0.6200,"),
        ("fluid.mixture.methane", "62 %", "methane = 0.62,", 'methane = "62 %",'),
        ("fluid.mixture", "argon = 1.0", "{ methane = 0.62, carbon_dioxide = 0.380 }",
         "{ argon = 1.0 }"),
        ("fluid.kind", "substance", '"mixture"', '"substance"'),
    ],
)  # fmt: skip
def test_one_entry_is_one_line(path: str, text: str, old: str, new: str) -> None:
    removed, added = edited(path, text)
    assert old in removed
    assert added[1:] == removed[1:].replace(old, new)


@pytest.mark.parametrize(
    ("path", "text", "below", "line"),
    [
        ("service", "Feed", 'family  = "vortex"', 'service = "Feed"'),
        ("fluid.name", "Gas", "]", 'name = "Gas"'),
        ("line.schedule", "80", '  # schedule = "40"       # Wall of the pipe.',
         '  schedule = "80"'),
        ("line.rating", "PN 16", '  material = "carbon steel"', '  rating = "PN 16"'),
        ("points.normal.pressure", "7 bar(g)", "isentropic_exponent = 1.310",
         'pressure = "7 bar(g)"'),
        ("points.3.temperature", "20 degC", 'flow = "5 t/h"', 'temperature = "20 degC"'),
        ("require.turndown", "10", "potable_water = false", 'turndown = "10"'),
        ("require.documents", "manual, drawing", "potable_water = false",
         'documents = ["manual", "drawing"]'),
        ("fluid.normalise", "true", "]", "normalise = true"),
    ],
)  # fmt: skip
def test_a_new_entry_is_one_line_where_it_belongs(
    path: str, text: str, below: str, line: str
) -> None:
    document = Document.parse(TEXT)
    document.set(path, text)
    assert diff(document) == [f"+{line}\n"]
    assert f"{below}\n{line}\n" in document.text()


def test_a_new_fraction_goes_into_its_table() -> None:
    removed, added = edited("fluid.mixture.nitrogen", "0.0")
    assert added[1:] == removed[1:].replace("0.380 }", "0.380, nitrogen = 0.0 }")


def test_a_new_section_stands_in_its_place() -> None:
    document = Document.parse(TEXT)
    document.set("design.pressure", "12 bar(g)")
    assert diff(document) == ["+\n", "+[design]\n", '+pressure = "12 bar(g)"\n']
    assert 'flow = "5 t/h"\n\n[design]\npressure = "12 bar(g)"\n[require]' in document.text()
    document.set("meter.size", "DN 80")
    assert '"12 bar(g)"\n\n[meter]\nsize = "DN 80"\n[require]' in document.text()


def test_a_first_fraction_makes_its_table() -> None:
    document = Document.parse('schema = 1\n[fluid]\nkind = "mixture"\n')
    document.set("fluid.mixture.methane", "1.0")
    assert document.text().endswith('kind = "mixture"\nmixture = { methane = 1.0 }\n')


@pytest.mark.parametrize(
    ("path", "lines"),
    [
        ("points.normal.flow", ['-flow = "3.1 t/h"\n']),
        ("require.quantity", ["-quantity = 2\n"]),
        ("line.size", ['-  size = "DN 150"         # not 6"!\n', '+  # not 6"!\n']),
        ("fluid.hazards", ["-hazards   = [\n", '-    "flammable",  # always\n',
                           '-    "toxic",\n', "-]\n"]),
        ("fluid.mixture.methane", None),
        ("line.lining", []),
        ("design.pressure", []),
    ],
)  # fmt: skip
def test_unset(path: str, lines: list[str] | None) -> None:
    document = Document.parse(TEXT)
    document.unset(path)
    assert document.get_text(path) == ""
    if lines is None:
        removed, added = diff(document)
        assert added[1:] == removed[1:].replace(" methane = 0.62,", "")
    else:
        assert diff(document) == lines


def test_removing_the_last_fraction_removes_the_table() -> None:
    document = Document.parse(TEXT)
    document.unset("fluid.mixture.carbon_dioxide")
    assert document.get_text("fluid.mixture") == "methane = 0.62"
    document.unset("fluid.mixture.methane")
    assert "mixture  " not in document.text()
    assert "# analysis of 3 March\n" in document.text()


def test_a_blank_text_unsets() -> None:
    document = Document.parse(TEXT)
    document.set("points.normal.flow", "  ")
    assert diff(document) == ['-flow = "3.1 t/h"\n']


def test_what_a_form_shows() -> None:
    document = Document.parse(TEXT)
    shown = {
        "tag": "FT-7",
        "schema": "1",
        "fluid.mixture": "methane = 0.62, carbon_dioxide = 0.380",
        "fluid.mixture.carbon_dioxide": "0.380",
        "fluid.hazards": "flammable, toxic",
        "points.normal.isentropic_exponent": "1.310",
        "points.cold.start.pressure": "7 bar(g)",
        "require.potable_water": "false",
        "design.pressure": "",
    }
    assert {path: document.get_text(path) for path in shown} == shown


def test_what_a_form_shows_can_be_set_again() -> None:
    document = Document.parse(TEXT)
    for path in ("tag", "fluid.mixture", "points.normal.isentropic_exponent",
                 "require.potable_water", "require.quantity", "line.size"):  # fmt: skip
        document.set(path, document.get_text(path))
    assert document.text() == TEXT


def test_a_list_with_commas_inside_is_shown_as_in_the_file() -> None:
    document = Document.parse(TEXT)
    document.set("require.documents", '["manual, in English", "drawing"]')
    assert document.get_text("require.documents") == '["manual, in English", "drawing"]'


def test_dates_and_lines_of_text() -> None:
    document = Document.parse(TEXT)
    document.set("remarks", 'First line.\nSecond, with "quotes" and a \\.')
    assert document.get_text("remarks") == 'First line.\nSecond, with "quotes" and a \\.'
    document.add_revision("A", date(2031, 3, 4), "Issued", by="KL")
    assert document.text().endswith(
        '\n[[revisions]]\nmark = "A"\ndate = 2031-03-04\ntext = "Issued"\nby = "KL"\n'
    )
    document.add_revision("B", date(2031, 4, 5), "Size changed")
    document.set("revisions.2.date", "2031-04-06")
    assert document.get_text("revisions.2.date") == "2031-04-06"
    tag = tagfile.loads(document.text()).tag
    assert tag is not None
    assert [(item.mark, item.date.day) for item in tag.revisions] == [("A", 4), ("B", 6)]


# -- operating points --------------------------------------------------------------------------


def test_add_a_point() -> None:
    document = Document.parse(TEXT)
    document.add_point("maximum")
    assert diff(document) == ["+\n", "+[[points]]\n", '+name = "maximum"\n']
    document.set("points.maximum.flow", "9 t/h")
    assert '"5 t/h"\n\n[[points]]\nname = "maximum"\nflow = "9 t/h"\n[require]' in document.text()


def test_the_first_point() -> None:
    document = Document.parse('schema = 1\n\n[line]\nsize = "DN 50"\n\n# last\n[require]\n')
    document.add_point("normal")
    assert document.text() == (
        'schema = 1\n\n[line]\nsize = "DN 50"\n\n[[points]]\nname = "normal"\n\n# last\n[require]\n'
    )


def test_remove_a_point_with_its_comment() -> None:
    document = Document.parse(TEXT)
    document.remove_point("cold.start")
    removed = diff(document)
    assert [line for line in removed if line.startswith("+")] == []
    assert sorted(removed) == sorted(
        ["-\n", "-# Winter\n", "-[[points]]\n", '-name = "cold.start"\n', '-flow = "0.4 t/h"\n',
         '-pressure = "7 bar(g)"\n']
    )  # fmt: skip
    assert document.point_names() == ("normal", "2")


def test_rename_a_point() -> None:
    document = Document.parse(TEXT)
    document.rename_point("cold.start", "winter")
    assert diff(document) == ['-name = "cold.start"\n', '+name = "winter"\n']
    document.rename_point("3", "maximum")
    assert document.point_names() == ("normal", "winter", "maximum")


def test_move_a_point_with_its_comment() -> None:
    document = Document.parse(TEXT)
    document.move("cold.start", -1)
    assert document.point_names() == ("cold.start", "normal", "3")
    assert '\n\n# Winter\n[[points]]\nname = "cold.start"\n' in document.text()
    document.move("cold.start", -5)
    document.move("cold.start", 1)
    assert document.text() == TEXT
    document.move("normal", 9)
    assert document.point_names() == ("cold.start", "2", "normal")


def test_two_points_of_one_name() -> None:
    document = Document.parse(TEXT)
    document.rename_point("cold.start", "normal")
    document.set("points.2.flow", "0.5 t/h")
    assert document.get_text("points.normal.flow") == "3.1 t/h"
    document.rename_point("2", "winter")
    assert document.point_names() == ("normal", "winter", "3")
    assert document.get_text("points.winter.flow") == "0.5 t/h"


def test_a_point_that_is_not_there() -> None:
    with pytest.raises(KeyError):
        Document.parse(TEXT).set("points.maximum.flow", "3 t/h")


# -- forms of TOML -----------------------------------------------------------------------------


def test_line_ends_and_mark_survive() -> None:
    before = "\ufeff" + TEXT.replace("\n", "\r\n")
    document = Document.parse(before)
    document.set("line.size", "DN 200")
    document.set("line.lining", "rubber")
    document.set("remarks", "one\ntwo")
    document.add_point("maximum")
    document.remove_point("normal")
    after = document.text()
    assert after.startswith("\ufeff")
    assert after.count("\n") == after.count("\r\n")
    assert document.get_text("remarks") == "one\ntwo"


def test_mixed_line_ends_stay_mixed() -> None:
    document = Document.parse('tag = "A"\r\nservice = "B"\n')
    document.set("tag", "C")
    assert document.text() == 'tag = "C"\r\nservice = "B"\n'


def test_a_text_without_a_last_line_end() -> None:
    document = Document.parse(TEXT.rstrip("\n"))
    document.set("require.turndown", "10")
    assert document.text() == TEXT + 'turndown = "10"'


@pytest.mark.parametrize(
    ("before", "path", "text", "after"),
    [
        ('line.size = "a"\n', "line.rating", "b", 'line.size = "a"\nline.rating = "b"\n'),
        ('line = { size = "a" }\n', "line.size", "b", 'line = { size = "b" }\n'),
        ('line = { size = "a" }\n', "line.rating", "b", 'line = { size = "a", rating = "b" }\n'),
        ("line = {}\n", "line.rating", "b", 'line = { rating = "b" }\n'),
        ("[fluid.mixture]\nargon = 1.0\n", "fluid.mixture.argon", "0.9",
         "[fluid.mixture]\nargon = 0.9\n"),
        ("[fluid.mixture]\nargon = 1.0\n", "fluid.mixture", "neon = 1.0",
         "[fluid.mixture]\nneon = 1.0\n"),
        ("[fluid]\nmixture.argon = 1.0\n", "fluid.mixture.neon", "0.0",
         '[fluid]\nmixture.argon = 1.0\nmixture.neon = 0.0\n'),
        ('points = [ { name = "a", flow = "1" } ]\n', "points.a.flow", "2",
         'points = [ { name = "a", flow = "2" } ]\n'),
        ("[line]\n# rating = 3\n", "line.size", "a", '[line]\nsize = "a"\n# rating = 3\n'),
        ("", "tag", "A", 'tag = "A"\n'),
        ("# head\n\n[line]\n", "tag", "A", '# head\ntag = "A"\n\n[line]\n'),
        ("[line]\n", "tag", "A", 'tag = "A"\n[line]\n'),
    ],
)  # fmt: skip
def test_other_ways_to_write_it(before: str, path: str, text: str, after: str) -> None:
    document = Document.parse(before)
    document.set(path, text)
    assert document.text() == after


def test_points_in_one_list_cannot_be_added_to() -> None:
    document = Document.parse('points = [ { name = "a", flow = "1" } ]\n')
    with pytest.raises(EditError, match=r"not written as \[\[points\]\]"):
        document.add_point("b")
    with pytest.raises(EditError):
        document.move("a", 1)


def test_an_entry_of_a_section_that_is_none() -> None:
    document = Document.parse("line = 3\n")
    with pytest.raises(EditError, match="line is no section"):
        document.set("line.size", "DN 50")
    assert document.text() == "line = 3\n"


def test_no_toml() -> None:
    with pytest.raises(EditError, match="line 2: is not valid TOML"):
        Document.parse("a = 1\nb = 3 t/h\n")


def test_job_file() -> None:
    document = Document.parse('schema = 1\nclient = "Tidal Island Works"\n')
    document.set("job.base.temperature", "0 degC")
    document.set("job.units.mass_flow", "t/h")
    document.set("job.altitude", "320 m")
    assert document.text() == (
        'schema = 1\nclient = "Tidal Island Works"\naltitude = "320 m"\n'
        '\n[base]\ntemperature = "0 degC"\n\n[units]\nmass_flow = "t/h"\n'
    )


def test_upgrade() -> None:
    old = 'schema = 0\n[line]\nnominal_size = "DN 50"  # kept\n'
    document = Document.parse(old)
    document.upgrade()
    assert document.text() == 'schema = 1\n[line]\nsize = "DN 50"  # kept\n'
    document.upgrade()
    assert document.text() == 'schema = 1\n[line]\nsize = "DN 50"  # kept\n'


@pytest.mark.parametrize("ending", ["\n", "\r\n"])
@pytest.mark.parametrize("text", ["0\r\n0", "a\nb", "a\rb"])
def test_line_ends_inside_a_text_survive(text: str, ending: str) -> None:
    """TOML folds line ends inside a long string, so a return of the text's own is escaped."""
    document = Document.parse(f'schema = 1{ending}tag = "A"{ending}')
    document.set("tag", text)
    assert tomllib.loads(document.text())["tag"] == text
