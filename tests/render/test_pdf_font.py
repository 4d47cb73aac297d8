"""The code pages of the font: what a document embeds, and how its letters are written."""

from __future__ import annotations

from io import BytesIO

import pypdf
import pytest

from specsheet import sheet
from specsheet.fields import TERMS
from specsheet.render import pdf
from specsheet.render.pdf import fonts
from specsheet.sheet import words
from tests.sheet import samples


def printed(**given: str) -> bytes:
    return pdf.to_bytes(sheet.build(samples.evaluation(given=dict(given))))


def embedded(data: bytes) -> set[str]:
    """Names of the fonts in a file."""
    resources = pypdf.PdfReader(BytesIO(data)).pages[0]["/Resources"]
    return {str(font) for font in resources["/Font"]}  # type: ignore[index]


def test_the_programs_own_words_need_one_code_page() -> None:
    assert embedded(printed()) == {"/F1"}
    own = [text for term in TERMS.values() for text in (term.label, term.symbol)]
    own += [words.unit(term.shown) for term in TERMS.values() if term.shown]
    own += [words.LEGEND, "· × − – ≤ ≥ √ 10⁻⁹", "Überströmventil, à côté, año, blåbær"]
    for text in own:
        assert not fonts.run(text, 8.0).pages, text


def test_a_document_holds_the_code_pages_that_it_uses() -> None:
    text = "Łódź, Жук и ёж, Ṽ"
    data = printed(remarks=text)
    assert {"/F1", "/F2"} < embedded(data)
    pages = pypdf.PdfReader(BytesIO(data)).pages
    assert text in " ".join("\n".join(page.extract_text() for page in pages).split())


def test_every_letter_has_one_place() -> None:
    pages = fonts.code_pages()
    letters = [letter for page in pages for letter in page if letter not in (0, 0x20)]
    assert len(letters) == len(set(letters))
    assert all(len(page) <= 256 and page[0x20] == 0x20 for page in pages)
    assert pages[0][0x21:0x7F] == tuple(range(0x21, 0x7F))


def test_a_run_is_as_wide_as_its_text_and_shows_it_escaped() -> None:
    run = fonts.run(r"a(b)\c", 10.0)
    assert run.shown == r"(a\(b\)\\c) Tj"
    assert run.width == pytest.approx(sum(fonts.width(letter, 10.0) for letter in run.text))
    assert fonts.run("a\u00a0b", 8.0).shown == "(a b) Tj"
    assert fonts.run("漢", 8.0).shown == r"(\000) Tj"  # no letter of the font: its empty box
