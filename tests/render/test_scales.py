"""The scales under the range ruler, as drawn: sides, signs, room, and no words over one another."""

from __future__ import annotations

from io import BytesIO

import pypdf
import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet import sheet
from specsheet.evaluate.result import Check
from specsheet.findings import Level, Reserve
from specsheet.render import pdf, text
from specsheet.render.pdf import fonts, style
from specsheet.render.text import ruler as letters
from specsheet.sheet.model import Mark, Ruler, Scale, Sheet
from tests.sheet import samples


def scale(
    flip: float, mark: float, *, ceiling: bool = True, low: float = 0.0, label: str = "Temperature"
) -> Scale:
    """A scale from its zero at the left; ``low`` closes the far end where it is not 0."""
    return Scale(
        label=label,
        unit="°C",
        low=low if ceiling else flip,
        high=flip if ceiling else 1.0,
        open_low=ceiling and not low,
        open_high=not ceiling,
        zero=0.0,
        flip="170.4",
        mark=Mark("minimum", "182.0", mark, mark <= flip if ceiling else mark >= flip),
        reserve="−12 K",
        level=Level.STOP,
        ceiling=ceiling,
    )


def with_scales(*held: Scale, more: str = "") -> Ruler:
    made = sheet.build(samples.evaluation()).ruler
    assert made is not None
    return samples.replace(made, scales=held, more=more)


def bar(held: Scale) -> str:
    """The drawn part of a scale on a sheet of 80 columns."""
    (line,) = letters.beside(with_scales(held), 80)[1:]
    return line[28:].split("  ")[0]


@pytest.mark.parametrize(
    ("held", "drawn"),
    [
        (scale(0.87, 0.4), "◂┿━━━━━━━━◆━━━━━━━━━━┫────"),
        (scale(0.4, 0.87), "◂┿━━━━━━━━┫──────────◇────"),
        (scale(0.4, 0.87, ceiling=False), "─┴────────┣━━━━━━━━━━◆━━━▸"),
        (scale(0.87, 0.4, ceiling=False), "─┴────────◇──────────┣━━━▸"),
        (scale(0.87, 0.6, low=0.4), "─┴────────┣━━━━◆━━━━━┫────"),
        # closer than a column, or the same: the mark stands on the side that is true of it
        (scale(0.87, 0.87), "◂┿━━━━━━━━━━━━━━━━━━◆┫────"),
        (scale(0.87, 0.871), "◂┿━━━━━━━━━━━━━━━━━━━┫◇───"),
        (scale(0.87, 0.87, ceiling=False), "─┴───────────────────┣◆━━▸"),
        (scale(0.87, 0.869, ceiling=False), "─┴──────────────────◇┣━━━▸"),
        # at the ends
        (scale(0.87, 0.0), "◂◆━━━━━━━━━━━━━━━━━━━┫────"),
        (scale(0.0, 0.0), "◆┫────────────────────────"),
        (scale(0.001, 0.87, ceiling=False), "─┣━━━━━━━━━━━━━━━━━━━◆━━━▸"),
    ],
)
def test_the_sides_of_a_flip_in_letters(held: Scale, drawn: str) -> None:
    assert bar(held) == drawn


def test_figures_stand_in_columns_with_their_words_above() -> None:
    head, line, more = letters.beside(with_scales(scale(0.87, 0.4), more="1 more."), 80)
    assert head.split() == ["Beside", "the", "flow", "value", "flips", "at", "reserve"]
    for words, figure in (("value", "182.0"), ("flips at", "170.4"), ("reserve", "−12 K")):
        assert head.index(words) + len(words) == line.index(figure) + len(figure)
    assert more.strip() == "1 more."


@pytest.mark.parametrize("width", [80, 100, 118, 160])
def test_a_long_name_gives_way_and_keeps_its_unit(width: int) -> None:
    held = scale(0.87, 0.4, label="Inside diameter at operating temperature")
    _, line = letters.beside(with_scales(held), width)
    assert len(line) == width
    assert line[:26].endswith("…, °C")


def test_without_room_for_a_bar_the_figures_stay() -> None:
    _, line = letters.beside(with_scales(scale(0.87, 0.4)), 58)
    assert line.split() == ["Temperature,", "°C", "182.0", "170.4", "−12", "K"]


def test_a_sheet_without_such_a_check_is_as_it_was() -> None:
    flow_only = samples.evaluation(checks=samples.evaluation().checks[:2])
    made = sheet.build(flow_only)
    assert made.ruler is not None
    assert letters.beside(made.ruler, 80) == []
    assert "Beside the flow" not in text.text(made)
    assert "Beside the flow" not in first_page(made)
    assert "Beside the flow" in first_page(sheet.build(samples.evaluation()))


@given(st.floats(0, 1), st.floats(0, 1), st.booleans(), st.integers(58, 200))
def test_any_scale_can_be_drawn_in_letters(
    flip: float, mark: float, ceiling: bool, width: int
) -> None:
    _, line = letters.beside(with_scales(scale(flip, mark, ceiling=ceiling)), width)
    assert len(line) <= width
    assert "◆" in line or "◇" in line or width < 63


# On paper


def first_page(made: Sheet) -> str:
    return pypdf.PdfReader(BytesIO(pdf.to_bytes(made))).pages[0].extract_text()


def placed(made: Sheet) -> list[tuple[float, float, float, str]]:
    """Left, right and baseline of every text on the first page [pt]."""
    found: list[tuple[float, float, float, str]] = []

    def visit(said: str, _: list, matrix: list, __: dict, size: float) -> None:
        words = said.strip()
        if words:
            left = float(matrix[4])
            found.append((left, left + fonts.width(words, size), float(matrix[5]), words))

    page = pypdf.PdfReader(BytesIO(pdf.to_bytes(made))).pages[0]
    page.extract_text(visitor_text=visit)
    return found


HARD = (
    scale(0.87, 0.868),
    scale(0.87, 0.872),
    scale(0.87, 0.868, ceiling=False),
    scale(0.87, 0.872, ceiling=False),
    scale(0.0, 0.0),
    scale(1.0, 1.0, ceiling=False),
    scale(0.87, 0.86, low=0.85),
    scale(0.86, 0.87, low=0.85, label="Inside diameter at operating temperature"),
)


def test_no_words_of_the_scales_touch_on_paper() -> None:
    made = sheet.build(samples.evaluation())
    made = samples.replace(made, ruler=with_scales(*HARD, more="2 more stand in the table."))
    texts = placed(made)
    top = next(y for *_, y, words in texts if words == "Beside the flow")
    end = next(y for *_, y, words in texts if words == "2 more stand in the table.")
    own = sorted(item for item in texts if end <= item[2] <= top)
    assert len(own) == 2 + 4 * len(HARD) + 1  # the two heads are read as one text
    for place, (left, right, y, words) in enumerate(own):
        assert style.SIDE - 0.1 <= left <= right <= style.PAPERS["A4"][0] - style.SIDE + 0.1
        for other_left, _, other_y, other in own[place + 1 :]:
            assert abs(other_y - y) > 6.0 or other_left > right, (words, other)


def test_a_full_ruler_stays_on_one_page() -> None:
    check = Check(
        "saturation_margin", "normal", 14.6, 0.0, None, True, Level.STOP, "it condenses", "",
        Reserve("temperature", 443.55, -0.0319),
    )  # fmt: skip
    made = sheet.build(samples.evaluation(checks=(check,)))
    assert made.ruler is not None
    many = samples.replace(
        made.ruler, windows=made.ruler.windows * 5, scales=made.ruler.scales * 8, more="1 more."
    )
    read = pypdf.PdfReader(BytesIO(pdf.to_bytes(samples.replace(made, ruler=many))))
    (page,) = [page.extract_text() for page in read.pages if "Range ruler" in page.extract_text()]
    assert page.count("−15 K") == 8
    assert "1 more." in page
