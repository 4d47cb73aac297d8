"""Text that a user may type: long, marked up, in any script. Nothing raises, nothing vanishes."""

from __future__ import annotations

from io import BytesIO

import pypdf
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from specsheet import sheet
from specsheet.evaluate.result import Evaluation
from specsheet.findings import Finding, Level
from specsheet.render import pdf
from specsheet.render.pdf import fonts
from specsheet.tag import Tag
from tests.sheet import samples


def read(**given: str) -> str:
    data = pdf.to_bytes(sheet.build(samples.evaluation(given=dict(given))))
    pages = pypdf.PdfReader(BytesIO(data)).pages
    return " ".join("\n".join(page.extract_text() for page in pages).split())


@pytest.mark.parametrize(
    "text",
    [
        "a [/h] b",
        "<b>bold</b> & R&D <FT-1001>",
        "<img src=http://example.invalid/x.png>",
        "back \\ slash (brackets) %percent",
        "Łódź, Gdańsk, źdźbło",
        "Ωmega ρβμ Δp",
        "Жук",
    ],
)
def test_text_is_printed_as_it_is(text: str) -> None:
    assert text in read(remarks=text)


@pytest.mark.parametrize(
    ("text", "printed"),
    [
        ("tank 漢字", "tank [U+6F22][U+5B57]"),
        ("ok 😀", "ok [U+1F600]"),
        ("⌀ 50", "[U+2300] 50"),
        ("e\u0301te\u0301", "été"),  # decomposed accents are composed
        ("a\u00adb", "ab"),  # soft hyphen
        ("a\tb\x07c\x1bd", "a b c d"),
    ],
)
def test_what_the_font_lacks_is_replaced_where_all_can_see_it(text: str, printed: str) -> None:
    assert printed in read(remarks=text)


def test_missing_letters_are_noted_on_the_sheet() -> None:
    assert "The font has no letter for U+6F22" in read(service="漢")
    assert "The font has no letter" not in read(service="plain")


def test_five_thousand_words_flow_over_the_pages() -> None:
    text = " ".join(f"w{place}" for place in range(5000))
    found = set(read(remarks=text).split())
    assert {f"w{place}" for place in range(5000)} <= found


@pytest.mark.parametrize("key", ["service", "tag", "location", "job.client", "meter.taps"])
def test_a_long_text_is_complete_wherever_it_stands(key: str) -> None:
    text = " ".join(f"w{place}" for place in range(400))
    assert {f"w{place}" for place in range(400)} <= set(read(**{key: text}).split())


def test_a_word_wider_than_the_page_is_broken_and_complete() -> None:
    assert "W" * 500 in read(remarks="W" * 500).replace(" ", "")


def test_a_finding_taller_than_a_page_flows_on() -> None:
    text = "Words: " + " ".join(f"w{place}" for place in range(3000))
    held = samples.evaluation(findings=(Finding(Level.STOP, "x", "meter.bore", text),))
    pages = pypdf.PdfReader(BytesIO(pdf.to_bytes(sheet.build(held)))).pages
    found = set(" ".join(page.extract_text() for page in pages).split())
    assert {f"w{place}" for place in range(3000)} <= found


def test_line_breaks_of_the_user_are_kept() -> None:
    data = pdf.to_bytes(sheet.build(samples.evaluation(given={"remarks": "first\r\nsecond"})))
    text = "\n".join(page.extract_text() for page in pypdf.PdfReader(BytesIO(data)).pages)
    assert "first\nsecond" in text


def test_the_font_has_every_letter_of_the_glossary() -> None:
    made = sheet.build(samples.evaluation())
    assert "[U+" not in read()
    for unit in ("kg/m³", "°C", "µS/cm", "inH₂O", "W/(m·K)", "·10⁻⁵", "−", "√ ϖ κ ε β ≤ ≥ ×"):
        assert fonts.printable(unit) == (unit, ())
    assert made.tag == "FT-2104"


@settings(max_examples=25, deadline=None)
@given(st.text(max_size=200), st.text(min_size=1, max_size=80), st.text(max_size=400))
def test_no_text_raises(service: str, tag: str, remarks: str) -> None:
    given = {"service": service, "tag": tag, "remarks": remarks, "fluid.name": service}
    data = pdf.to_bytes(sheet.build(samples.evaluation(given=dict(given))))
    assert len(pypdf.PdfReader(BytesIO(data)).pages) >= 2


def test_an_empty_tag_is_printed() -> None:
    data = pdf.to_bytes(sheet.build(Evaluation(tag=Tag(given={}))))
    text = pypdf.PdfReader(BytesIO(data)).pages[0].extract_text()
    assert "No objection within the limits checked." in text
