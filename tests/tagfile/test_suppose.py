"""Other values in a text, read without touching the file; refusals in words."""

from __future__ import annotations

import pytest
from services import service_text

from specsheet.tag import Tag
from specsheet.tagfile import EditError, loads, suppose

TEXT = service_text("water", "magnetic")


def supposed(*changes: tuple[str, str]) -> Tag:
    reading = suppose(TEXT, changes)
    assert reading.tag is not None
    return reading.tag


def test_a_supposed_value_is_read_like_a_typed_one() -> None:
    typed = loads(TEXT.replace('flow = "80 m3/h"', 'flow = "140 m3/h"')).tag
    assert supposed(("points.maximum.flow", "140 m3/h")) == typed


def test_changes_are_made_in_order_and_a_blank_one_takes_the_entry_away() -> None:
    tag = supposed(("meter.size", "DN 50"), ("meter.size", "DN 80"), ("line.upstream_length", ""))
    assert tag.text("meter.size") == "DN 80"
    assert "line.upstream_length" not in tag.given


def test_entries_of_another_family_are_known_once_it_is_supposed() -> None:
    tag = supposed(("family", "orifice_concentric"), ("meter.taps", "corner"))
    assert tag.text("meter.taps") == "corner"


def test_problems_that_were_there_before_are_no_refusal() -> None:
    text = TEXT.replace('size = "DN 100"', 'size = "DN hundred"')
    reading = suppose(text, [("points.maximum.flow", "90 m3/h")])
    assert [problem.field for problem in reading.problems] == ["line.size"]


@pytest.mark.parametrize(
    ("path", "value", "words"),
    [
        ("points.maximum.flow", "140", "points.maximum.flow: .*unit is missing"),
        ("points.maximum.flow", "140 bar(g)", "points.maximum.flow: "),
        (
            "points.peak.flow",
            "140 m3/h",
            "no such operating point; known: minimum, normal, maximum",
        ),
        ("points.maximum.flo", "140 m3/h", 'did you mean "points.maximum.flow"'),
        ("points.flow", "140 m3/h", "there is no such entry"),
        ("fluid.bubles", "1 %", 'did you mean "fluid.bubbles"'),
        ("fluids.bubbles", "1 %", 'did you mean "fluid"'),
        ("meter.bore_", "1 mm", 'did you mean "meter.bore"'),
        ("family", "waterwheel", "family: .*is no meter family"),
        ("job.altitude", "100 m", "stands in job.toml"),
        ("line.orientation", "upside down", "line.orientation: "),
        ("", "1", "there is no such entry"),
    ],
)
def test_what_cannot_be_supposed_is_refused_in_words(path: str, value: str, words: str) -> None:
    with pytest.raises(EditError, match=words):
        suppose(TEXT, [(path, value)])


def test_a_family_without_entries_of_its_own_says_so() -> None:
    with pytest.raises(EditError, match=r"weir_vnotch takes nothing under \[meter\]"):
        suppose(service_text("brook", "weir_vnotch"), [("meter.size", "DN 80")])
