"""Speed and memory of printing, as ratios of one run: cost of a sheet, growth, peak memory.

What ``print`` costs a tag as a whole is held by ``tests/benchmarks/test_processes.py``.
"""

from __future__ import annotations

import time
import tracemalloc
from io import BytesIO

import pytest
from reportlab.pdfgen.canvas import Canvas

from specsheet import sheet
from specsheet.render import pdf
from specsheet.render.pdf import fonts
from tests.sheet import samples

pytestmark = pytest.mark.benchmark


def seconds(repeats: int, count: int) -> float:
    """Least processor time of ``repeats`` runs for printing ``count`` sheets [s]."""
    made = [sheet.build(samples.evaluation(given={"tag": f"FT-{place}"})) for place in range(count)]
    best = float("inf")
    for _ in range(repeats):
        start = time.process_time()
        for one in made:
            pdf.to_bytes(one)
        best = min(best, time.process_time() - start)
    return best


def plain_canvas(texts: int) -> float:
    """Least processor time for a canvas that does nothing but draw so many short texts [s]."""
    fonts.face()
    best = float("inf")
    for _ in range(5):
        start = time.process_time()
        canvas = Canvas(BytesIO(), invariant=1, pageCompression=0, initialFontName=fonts.NAME)
        canvas.setFont(fonts.NAME, 8)
        for place in range(texts):
            canvas.drawString(50.0 + place % 400, 50.0 + place % 700, f"some text {place}")
        canvas.getpdfdata()
        best = min(best, time.process_time() - start)
    return best


def test_a_sheet_costs_no_more_than_its_texts_drawn_one_by_one() -> None:
    data = pdf.to_bytes(sheet.build(samples.evaluation()))
    assert seconds(10, 1) < 1.5 * plain_canvas(data.count(b" Tj"))


def test_time_grows_in_proportion_to_the_number_of_sheets() -> None:
    seconds(1, 2)
    assert seconds(3, 40) / seconds(3, 10) < 6.0


def test_time_grows_in_proportion_to_the_length_of_a_text() -> None:
    def once(words: int) -> float:
        text = " ".join(f"w{place}" for place in range(words))
        made = sheet.build(samples.evaluation(given={"remarks": text}))
        start = time.process_time()
        pdf.to_bytes(made)
        return time.process_time() - start

    once(100)
    assert once(40_000) / once(10_000) < 8.0


def test_sheets_leave_no_memory_behind() -> None:
    seconds(1, 5)
    tracemalloc.start()
    seconds(1, 20)
    before = tracemalloc.get_traced_memory()[0]
    seconds(1, 20)
    grown = tracemalloc.get_traced_memory()[0] - before
    peak = tracemalloc.get_traced_memory()[1]
    tracemalloc.stop()
    assert grown < 2_000_000
    assert peak < 40_000_000
