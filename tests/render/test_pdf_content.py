"""What stands in the PDF, read back: every row, pages, outline, labels, description, geometry."""

from __future__ import annotations

from io import BytesIO

import pypdf
import pytest

from specsheet import sheet
from specsheet.evaluate.result import Evaluation
from specsheet.render import pdf
from specsheet.render.pdf.compose import compose
from specsheet.sheet.model import Sheet
from tests.sheet import samples

HELD = {
    "one point": samples.one_point,
    "three points": samples.evaluation,
    "nine points": samples.nine_points,
}


def reader(made: Sheet) -> pypdf.PdfReader:
    return pypdf.PdfReader(BytesIO(pdf.to_bytes(made)), strict=True)


def words(text: str) -> str:
    """Text without any white space: where lines break is not asked."""
    return "".join(text.split())


def everything(made: Sheet) -> str:
    return words("".join(page.extract_text() for page in reader(made).pages))


@pytest.fixture(params=HELD, scope="module")
def held(request: pytest.FixtureRequest) -> Evaluation:
    return HELD[request.param]()


@pytest.mark.parametrize("paper", ["A4", "Letter"])
def test_every_row_is_on_the_sheet(held: Evaluation, paper: str) -> None:
    made = samples.replace(sheet.build(held), paper=paper)
    read = everything(made)
    tables = (made.points, *made.tables, *((made.budget,) if made.budget else ()))
    for table in tables:
        assert words(table.title) in read
        for row in table.rows:
            assert words(row.label) in read
            for cell in row.cells:
                assert words(cell.text) in read
    for name in made.points.columns:
        assert words(name) in read


def test_findings_limits_clauses_annex_and_sources_are_on_the_sheet() -> None:
    made = sheet.build(samples.evaluation())
    read = everything(made)
    for finding in made.findings:
        assert words(finding.message) in read
        assert words(finding.code) in read
    for limit in made.limits:
        assert words(limit.reserve) in read
        assert words(limit.flips) in read
    for clause in made.clauses:
        assert words("".join(clause.sentences[:1])) in read
    for caution in made.cautions:
        assert words(caution) in read
    for working in made.annex:
        assert words(working.equation) in read
    for source in made.sources:
        assert words(source) in read
    for item in made.reply:
        assert words(item.label) in read
    for revision in made.revisions:
        assert words(revision.text) in read


def test_every_page_says_where_it_belongs() -> None:
    pages = reader(sheet.build(samples.evaluation())).pages
    for number, page in enumerate(pages, start=1):
        text = page.extract_text()
        assert f"page {number} of {len(pages)}" in text
        assert "FT-2104 · revision B · 2031-04-17" in text


def test_paper_page_labels_outline_and_description() -> None:
    made = sheet.build(samples.evaluation(given={"job.paper": "Letter"}))
    read = reader(made)
    assert [float(side) for side in read.pages[0].mediabox[2:]] == [612.0, 792.0]
    assert read.page_labels[:2] == ["FT-2104-1", "FT-2104-2"]
    titles = [entry.title for entry in read.outline]
    assert {"Range ruler", "Operating points", "Findings", "Calculation annex"} <= set(titles)
    assert read.metadata is not None
    assert read.metadata.title == ("FT-2104, Orifice plate, concentric square-edged, revision B")
    assert read.metadata.subject == "Steam to digester heating header"
    assert str(read.metadata.creation_date).startswith("2031-04-17 00:00:00")


def test_headings_of_a_table_are_set_again_overleaf() -> None:
    findings = samples.evaluation().findings * 30
    made = sheet.build(samples.evaluation(findings=findings))
    pages = [page.extract_text() for page in reader(made).pages]
    continued = [page for page in pages if "Findings, continued" in page]
    assert continued
    assert all("What is wrong and how to mend it" in page for page in continued)


def test_the_bidders_places_are_known() -> None:
    made = sheet.build(samples.evaluation())
    book = compose(made)
    assert [place.name for place in book.places] == [item.key for item in made.reply]
    for place in book.places:
        assert place.right - place.left > 100.0
        assert place.top - place.bottom > 8.0
        assert 0 <= place.page < len(book.pages)


@pytest.mark.parametrize("paper", ["A4", "Letter"])
def test_no_text_lies_on_another_or_off_the_page(held: Evaluation, paper: str) -> None:
    pdfium = pytest.importorskip("pypdfium2")
    made = samples.replace(sheet.build(held), paper=paper)
    for page in pdfium.PdfDocument(pdf.to_bytes(made)):
        text = page.get_textpage()
        boxes = [text.get_rect(place) for place in range(text.count_rects())]
        width, height = page.get_size()
        for left, bottom, right, top in boxes:
            assert 30.0 < left <= right < width - 30.0
            assert 10.0 < bottom <= top < height - 30.0
        assert not _overlaps(boxes)


def _overlaps(boxes: list[tuple[float, float, float, float]]) -> list[tuple[object, object]]:
    """Pairs of boxes that share more than a hair."""
    found = []
    for place, one in enumerate(boxes):
        for other in boxes[place + 1 :]:
            wide = min(one[2], other[2]) - max(one[0], other[0])
            high = min(one[3], other[3]) - max(one[1], other[1])
            if wide > 0.8 and high > 0.8:
                found.append((one, other))
    return found
