"""Reading tag files: what a good one yields, and every problem of a bad one."""

from __future__ import annotations

import tomllib
from datetime import date

import pytest

from specsheet import tagfile
from specsheet.findings import Origin
from specsheet.quantity import Quantity
from specsheet.tag import Tag
from specsheet.tagfile.words import Number

STEAM = """\
schema  = 1
tag     = "FT-2104"
service = "Steam to digester heating header"
family  = "vortex"
status  = "for inquiry"

[fluid]
kind      = "substance"      # substance | mixture | solution
substance = "water"
phase     = "gas"            # stated by the user, checked by the program
hazards   = ["hot surface"]

[line]
size = "DN 150"
schedule = "40"
upstream_length = "22 D"

[[points]]
name = "minimum"
flow = "0.6 t/h"
pressure = "6.5 bar(g)"
temperature = "180 degC"

[[points]]
name = "normal"
flow = "3.1 t/h"
pressure = "7.0 bar(g)"
temperature = "185 degC"
isentropic_exponent = 1.310

[design]
pressure = "12 bar(g)"

[meter]
size = "size it"

[require]
uncertainty = "1.5 %"
custody_transfer = false

[[revisions]]
mark = "A"
date = 2031-03-04
text = "Issued for inquiry"
by = "KL"

[[revisions]]
mark = "B"
date = "2031-05-06"
"""


def read(text: str) -> Tag:
    """Return the tag of a text that must read without a problem."""
    reading = tagfile.loads(text)
    assert not reading.problems
    assert reading.tag is not None
    return reading.tag


def problems(text: str) -> list[str]:
    return [str(problem) for problem in tagfile.loads(text, "ft.toml").problems]


def broken(old: str, new: str) -> list[str]:
    """Return the problems of the steam file with one thing changed in it."""
    assert STEAM.count(old) >= 1
    return problems(STEAM.replace(old, new, 1))


# -- a good file -------------------------------------------------------------------------------


def test_entries_are_typed() -> None:
    tag = read(STEAM)
    assert tag.name == "FT-2104"
    assert tag.family == "vortex"
    assert tag.phase == "gas"
    assert tag.text("line.size") == "DN 150"
    assert tag.text("line.upstream_length") == "22 D"
    assert tag.words("fluid.hazards") == ("hot surface",)
    assert tag.given["require.custody_transfer"] is False
    assert tag.si("design.pressure") == pytest.approx(12e5 + 101325)
    assert tag.given["meter.size"] == "size it"


def test_a_quantity_keeps_its_digits() -> None:
    normal = read(STEAM).points[1]
    pressure, exponent = normal.quantity("pressure"), normal.quantity("isentropic_exponent")
    assert pressure is not None
    assert pressure.text == "7.0 bar(g)"
    assert pressure.kind == "pressure_gauge"
    assert pressure.value == pytest.approx(7e5)
    assert exponent is not None
    assert exponent.text == "1.310"
    assert exponent.value == 1.31


def test_points_and_revisions_keep_their_order() -> None:
    tag = read(STEAM)
    assert [point.name for point in tag.points] == ["minimum", "normal"]
    assert "name" not in tag.points[0].values
    assert [(item.mark, item.date, item.by) for item in tag.revisions] == [
        ("A", date(2031, 3, 4), "KL"),
        ("B", date(2031, 5, 6), ""),
    ]


def test_defaults_are_assumed_and_never_given() -> None:
    tag = read(STEAM)
    assert tag.assumed["line.material"] == "carbon steel"
    assert tag.origin("line.material") is Origin.ASSUMED
    assert "line.schedule" not in tag.assumed  # it was typed
    assert tag.assumed["require.quantity"] == 1
    pressure = tag.assumed["job.atmospheric_pressure"]
    assert isinstance(pressure, Quantity)
    assert pressure.value == pytest.approx(101325)


def test_a_blank_text_states_nothing() -> None:
    tag = read(STEAM.replace('schedule = "40"', 'schedule = ""\nlining = "  "'))
    assert "line.lining" not in tag.given
    assert tag.assumed["line.schedule"] == "STD"


def test_fractions() -> None:
    text = STEAM.replace('kind      = "substance"', 'kind = "mixture"').replace(
        'substance = "water"', 'mixture = { methane = "62 %", carbon_dioxide = 0.38, argon = 0 }'
    )
    mixture = read(text).table("fluid.mixture")
    assert mixture == {"methane": pytest.approx(0.62), "carbon_dioxide": 0.38, "argon": 0.0}
    assert {type(value) for value in mixture.values()} == {float}  # and no Number


@pytest.mark.parametrize(
    "change",
    [
        lambda text: "\ufeff" + text,
        lambda text: text.replace("\n", "\r\n"),
        lambda text: text.replace('"FT-2104"', "'FT-2104'"),
        lambda text: text.rstrip("\n"),
    ],
    ids=["byte-order mark", "CRLF", "single quotes", "no end of line"],
)
def test_forms_of_the_text_that_read_alike(change: object) -> None:
    assert read(change(STEAM)) == read(STEAM)  # type: ignore[operator]


# -- the file as a whole -----------------------------------------------------------------------


@pytest.mark.parametrize(
    ("text", "line", "said"),
    [
        ("", 1, "the file is empty"),
        ("\ufeff \n\n", 1, "the file is empty"),
        ('tag = "A"\nflow = 3.1 t/h\n', 2, "not valid TOML"),
        ('tag = "A"\n[line\n', 2, "not valid TOML"),
        ('tag = "A"\ntag = "B"\n', 2, "Cannot overwrite a value"),
        ('a = "x"\n\nb = "y', 3, "not valid TOML"),
        ('tag = "A\0"', 1, "NUL"),
        ("\n\ntag\0", 3, "NUL"),
        ("x = " + "[" * 100_000, 1, "too deep"),
        ("x = " + "9" * 5000, 1, "not valid TOML"),
        ("#" * 1_000_001, 1, "1 MB"),
        ("schema = 7\n" + STEAM.replace("schema  = 1\n", ""), 1, "install a newer specsheet"),
    ],
)
def test_a_text_that_gives_no_tag(text: str, line: int, said: str) -> None:
    reading = tagfile.loads(text, "ft.toml")
    assert reading.tag is None
    (problem,) = reading.problems
    assert str(problem).startswith(f"ft.toml:{line}: ")
    assert said in problem.message


def test_a_text_without_a_file_goes_by_a_dash() -> None:
    assert str(tagfile.loads("").problems[0]).startswith("-:1: file: ")


def test_only_comments_is_every_needed_entry_missing() -> None:
    found = problems("# nothing yet\n")
    assert [line.split(": ")[1] for line in found] == ["schema", "tag", "family",
        "fluid.kind", "fluid.phase", "points"]  # fmt: skip


# -- one entry ---------------------------------------------------------------------------------

ONE_PROBLEM = [
    # what is replaced, by what, line, field, said
    ("schema  = 1\n", "", 1, "schema", "is missing; write schema = 1"),
    ("schema  = 1", 'schema = "1"', 1, "schema", "a whole number (no quotes) was wanted"),
    ("schema  = 1", "schema = true", 1, "schema", "true came"),
    ("schema  = 1", "schema = -1", 1, "schema", "there is no schema -1"),
    ('"vortex"', '"vortx"', 4, "family", 'did you mean "vortex"?'),
    ('"FT-2104"', "2104", 2, "tag", 'the number 2104 came; write tag = "2104"'),
    ('"FT-2104"', '" "', 1, "tag", "is missing"),
    ('"for inquiry"', '"inquiry"', 5, "status", 'did you mean "for inquiry"?'),
    ('"for inquiry"', "[]", 5, "status", "a list came"),
    ("service =", "servce =", 3, "servce", 'did you mean "service"?'),
    ("[design]", "[desing]", 31, "desing", 'did you mean "design"?'),
    ("schedule =", "flow =", 15, "line.flow", "it belongs to [[points]]"),
    ("schedule =", "qwxz =", 15, "line.qwxz", "known: size, schedule"),
    ('size = "size it"', 'bluf_width = "1 mm"', 35, "meter.bluf_width", '"bluff_width"'),
    ('"DN 150"', '"150"', 14, "line.size", ""),
    ('"DN 150"', "150", 14, "line.size", 'write size = "DN 150"'),
    ('"22 D"', '"22 bar"', 16, "line.upstream_length", ""),
    ('["hot surface"]', '"hot surface"', 11, "fluid.hazards", "a list of texts was wanted"),
    ('["hot surface"]', '["toxic", 3]', 11, "fluid.hazards", "a list of texts was wanted"),
    ('"3.1 t/h"', "3.1", 26, "points.normal.flow", 'write flow = "3.1 t/h"'),
    ('"3.1 t/h"', '"3,1 t/h"', 26, "points.normal.flow", "3.1"),
    ('"3.1 t/h"', '"185 degC"', 26, "points.normal.flow", "flow"),
    ('"3.1 t/h"', "{ a = 1 }", 26, "points.normal.flow", "a table came"),
    ('"3.1 t/h"', '"nan t/h"', 26, "points.normal.flow", ""),
    ('"3.1 t/h"', "inf", 26, "points.normal.flow", 'inf came; write flow = "3.1 t/h"'),
    ("1.310", "nan", 29, "points.normal.isentropic_exponent", ""),
    ("1.310", "true", 29, "points.normal.isentropic_exponent", "true came"),
    ('"7.0 bar(g)"', '"7.0 bar"', 27, "points.normal.pressure", ""),
    ('"185 degC"', '"-300 degC"', 28, "points.normal.temperature", ""),
    ('name = "normal"\n', "", 24, "points.2.name", "is missing"),
    ('name = "normal"', 'name = "minimum"', 25, "points.minimum.name", "another point"),
    ('name = "normal"', "name = 3", 25, "points.2.name", 'write name = "3"'),
    ('flow = "3.1 t/h"\n', "", 24, "points.normal.flow", 'write flow = "3.1 t/h"'),
    ("= false", '= "no"', 39, "require.custody_transfer", "true or false (no quotes)"),
    ('"1.5 %"', "1.5", 38, "require.uncertainty", 'write uncertainty = "1.5 %"'),
    ("2031-03-04", "2031-03-04T10:00:00", 43, "revisions.1.date", "year-month-day"),
    ("2031-03-04", '"4.3.2031"', 43, "revisions.1.date", "write date = 2031-03-04"),
    ('"2031-05-06"', '"2031-02-30"', 49, "revisions.2.date", "year-month-day"),
    ('mark = "B"\n', "", 47, "revisions.2.mark", "is missing"),
    ('phase     = "gas"', "", 7, "fluid.phase", "(one of liquid, gas)"),
    ('substance = "water"', "", 7, "fluid.substance", 'write substance = "water"'),
]


@pytest.mark.parametrize(("old", "new", "line", "field", "said"), ONE_PROBLEM)
def test_one_problem_never_loses_the_rest(
    old: str, new: str, line: int, field: str, said: str
) -> None:
    assert old in STEAM
    reading = tagfile.loads(STEAM.replace(old, new, 1), "ft.toml")
    (problem,) = reading.problems
    assert (problem.line, problem.field) == (line, field)
    assert said in problem.message
    assert reading.tag is not None
    assert reading.tag.text("design.pressure") == "12 bar(g)" or "desing" in new
    assert len(reading.tag.points) == 2


@pytest.mark.parametrize(
    ("key", "text", "value"),
    [
        ("flow", "0 t/h", 0.0),
        ("flow", "1e30 t/h", 1e33 / 3600),
        ("temperature", "-273.15 degC", None),
        ("temperature", "-273.1 degC", 0.05),
        ("temperature", "-500 degF", None),
        ("temperature", "9999 degC", 10272.15),
        ("flow", "-3 t/h", None),
        ("flow", "inf t/h", None),
        ("flow", "1e999 t/h", None),
        ("flow", "3 bar", None),
        ("flow", "3", None),
        ("flow", "t/h", None),
        ("pressure", "-1 bar(a)", None),
        ("pressure", "7 m3/h", None),
    ],
)
def test_numbers_nobody_meant(key: str, text: str, value: float | None) -> None:
    """What the grammar reads is left for the evaluation to judge; what it refuses is named."""
    old = {"flow": "3.1 t/h", "temperature": "185 degC", "pressure": "7.0 bar(g)"}[key]
    reading = tagfile.loads(STEAM.replace(f'"{old}"', f'"{text}"'))
    assert reading.tag is not None
    read = reading.tag.points[1].quantity(key)
    if value is None:
        assert read is None
        assert [problem.field for problem in reading.problems] == [f"points.normal.{key}"]
    else:
        assert read is not None
        assert read.value == pytest.approx(value)
        assert reading.problems == ()


def test_problems_stand_in_the_order_of_the_file() -> None:
    text = STEAM.replace('"1.5 %"', "1.5").replace('"gas"', '"vapour"').replace("flow", "fluw")
    assert [int(line.split(":")[1]) for line in problems(text)] == [10, 18, 20, 24, 26, 38]


@pytest.mark.parametrize(
    ("section", "said"),
    [
        ("points = []\n", "points: at least one operating point is wanted"),
        ('points = "normal"\n', 'points: operating points were wanted, the text "normal" came'),
        ("points = [3]\n", "points.1: a section [points.1] was wanted, the number 3 came"),
        ("[points]\nname = 'normal'\n", "points: operating points were wanted, a table came"),
        ("revisions = 3\n", "revisions: revisions were wanted, the number 3 came"),
        ("line = 'DN 150'\n", "line: a section [line] was wanted"),
        ("fluid = []\n", "fluid: a section [fluid] was wanted, a list came"),
    ],
)
def test_sections_of_the_wrong_type(section: str, said: str) -> None:
    found = problems(f'schema = 1\ntag = "A"\nfamily = "vortex"\n{section}')
    assert any(f"ft.toml:4: {said}" in line for line in found)


@pytest.mark.parametrize(
    ("mixture", "said"),
    [
        ("{}", "a table of numbers was wanted"),
        ("0.62", "the number 0.62 came"),
        ("{ methane = nan }", "methane: a finite number was wanted, the number nan came"),
        ("{ methane = true }", "methane: a number was wanted, true came"),
        ('{ methane = "much" }', "methane: "),
        ("{ methane = 1" + "0" * 400 + " }", "methane: a finite number"),
    ],
)
def test_fractions_that_are_none(mixture: str, said: str) -> None:
    (found,) = broken('hazards   = ["hot surface"]', f"mixture = {mixture}")
    assert found.startswith("ft.toml:11: fluid.mixture: ")
    assert said in found


def test_needed_by_the_kind_of_fluid_only_where_nothing_goes_without_it() -> None:
    (found,) = broken('"substance" ', '"mixture"')
    assert found.startswith("ft.toml:7: fluid.mixture: is missing; write mixture = {")
    (found,) = broken('"substance" ', '"solution"')
    assert found.startswith("ft.toml:7: fluid.solute: is missing")
    assert broken('"substance" ', '"given"') == []


def test_an_unknown_family_leaves_its_section_unread() -> None:
    text = STEAM.replace('"vortex"', '"lutefisk"').replace('size = "size it"', "anything = 1")
    (found,) = problems(text)
    assert found.startswith("ft.toml:4: family: ")
    assert "known: " in found


def test_messages_are_safe_to_print() -> None:
    for found in broken('"gas"', '"\\u001b[31mred' + "x" * 500 + '"'):
        assert found.isprintable()
        assert len(found) < 250
    for found in broken('"gas"', '"gas"\n"\\u001b[2J' + "y" * 999 + '" = 1'):
        assert found.isprintable()
        assert len(found) < 1000


def test_older_schema_is_read_as_the_current_one() -> None:
    old = STEAM.replace("schema  = 1", "schema = 0").replace("size = ", "nominal_size = ", 1)
    reading = tagfile.loads(old)
    assert reading.problems == ()
    assert reading.schema == 0
    assert reading.tag is not None
    assert reading.tag.text("line.size") == "DN 150"


def test_current_schema_does_not_know_the_old_name() -> None:
    (found,) = broken("size = ", "nominal_size = ")
    assert "line.nominal_size: unknown entry" in found


def test_old_and_new_name_together_are_reported() -> None:
    both = STEAM.replace("schema  = 1", "schema = 0").replace(
        'size = "DN 150"', 'size = "DN 150"\nnominal_size = "DN 200"', 1
    )
    reading = tagfile.loads(both)
    assert [problem.field for problem in reading.problems] == ["line.nominal_size"]
    assert reading.tag is not None
    assert reading.tag.text("line.size") == "DN 150"


def test_numbers_remember_their_digits() -> None:
    data = tomllib.loads("a = 1.310\nb = 1_000.50\nc = 1e3", parse_float=Number)
    assert [value.text for value in data.values()] == ["1.310", "1000.50", "1e3"]
    assert data == {"a": 1.31, "b": 1000.5, "c": 1000.0}
