"""What the panes say: a sheet, its findings and its ruler as lines of text in named tones."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace

from specsheet.findings import Level, Origin
from specsheet.render.text.ruler import beside, by_flow
from specsheet.sheet.model import Row, Ruler, Sheet, Table
from specsheet.tui.glyphs import LEVEL_LETTERS, ORIGIN_LETTERS, plain_ascii, wants_ascii
from specsheet.tui.lines import Line, wrap
from specsheet.tui.protocol import Trouble

#: worst first; standing cautions go before mere notes
_ORDER = (Level.STOP, Level.CAUTION, None, Level.NOTE)

#: what the letters beside derived values mean
LEGEND = "g given  a assumed  t typical"

_LABEL = 32
_LEAST_LABEL = 20
_GAP = 2
_LONGEST_NAME = 12


@dataclass(frozen=True, slots=True)
class Item:
    """One thing to say about the tag, ready for the list of findings.

    Attributes:
        level: how bad it is; None for a standing caution of the service.
        field: path it is about, or "".
        place: words for where ("Pressure, normal").
        message: the sentence, with reserve and source where there are any.
    """

    level: Level | None
    field: str
    place: str
    message: str

    @property
    def letter(self) -> str:
        """The sign before it."""
        return "!" if self.level is None else LEVEL_LETTERS[self.level]

    @property
    def tone(self) -> str:
        """The name of its colour."""
        return "caution" if self.level is None else self.level.value


def derived(sheet: Sheet, width: int) -> list[Line]:
    """Return all tables of a sheet as lines of ``width`` cells."""
    tables = [sheet.points, *sheet.tables]
    if sheet.budget is not None:
        tables.append(sheet.budget)
    lines: list[Line] = []
    for table in tables:
        if table.rows:
            lines += ([()] if lines else []) + _table(table, width)
    if sheet.limits:
        lines += [(), (("Limits", "head"),), *_limits(sheet, width)]
    if sheet.assumptions:
        lines += [(), (("Assumed, because nothing was stated", "head"),)]
        lines += [_single(row, width, _LEAST_LABEL) for row in sheet.assumptions]
    for clauses in sheet.clauses:
        lines += [(), ((clauses.title, "head"),)]
        for sentence in clauses.sentences:
            lines += [((part, "text"),) for part in wrap(sentence, width)]
    return lines


def _table(table: Table, width: int) -> list[Line]:
    lines: list[Line] = []
    if table.columns:
        label, column = _columns(table, width)
        step = max(1, (width - label) // column)
        for start in range(0, len(table.columns), step):
            part = slice(start, start + step)
            lines.append(_heading(table, part, label, column))
            lines += [_multiple(row, part, label, column) for row in table.rows]
    else:
        lines.append(((table.title, "head"),))
        label = min(_LABEL, max(_LEAST_LABEL, width // 2))
        lines += [_single(row, width, label) for row in table.rows]
    if table.note:
        lines += [((part, "dim"),) for part in wrap(table.note, width)]
    return lines


def _columns(table: Table, width: int) -> tuple[int, int]:
    """Return the width of the label and of one column: labels give way first.

    A number is never cut: columns that do not fit go below one another.
    """
    texts = [cell.text for row in table.rows for cell in row.cells]
    texts += [name[:_LONGEST_NAME] for name in table.columns]
    column = max(len(text) for text in texts) + _GAP + 1
    room = width - column * len(table.columns)
    return max(_LEAST_LABEL, min(_LABEL + 6, room)), column


def _heading(table: Table, part: slice, label: int, column: int) -> Line:
    names = "".join(f"{name[:_LONGEST_NAME]:>{column - 1}} " for name in table.columns[part])
    title = _cut(table.title, label - 1)
    return ((f"{title:<{label}}", "head"), (names, "label"))


def _multiple(row: Row, part: slice, label: int, column: int) -> Line:
    unit = f" {row.unit}" if row.unit else ""
    words = _cut(row.label, label - len(unit) - 1)
    head = f"{words}{unit}"
    pieces = [(words, "label"), (unit, "dim"), (" " * (label - len(head)), "text")]
    for cell in row.cells[part]:
        pieces.append((f"{cell.text:>{column - 1}}", "text"))
        pieces.append((_letter(cell.origin), "dim"))
    if len(row.cells) == 1 and row.note:
        pieces.append((f" {row.note}", "dim"))
    return tuple(pieces)


def _single(row: Row, width: int, label: int) -> Line:
    origin = row.cells[0].origin if row.cells else None
    text = _cut(row.text, max(8, width - label - 3))
    note = f"  {row.note}" if row.note else ""
    return (
        (f"{_cut(row.label, label - 1):<{label}}", "label"),
        (text, "text"),
        (f" {_letter(origin)}", "dim"),
        (note, "dim"),
    )


def _limits(sheet: Sheet, width: int) -> list[Line]:
    lines: list[Line] = []
    for limit in sheet.limits:
        tone = "good" if limit.holds else limit.level.value
        letter = " " if limit.holds else LEVEL_LETTERS[limit.level]
        reserve = f", reserve {limit.reserve}" if limit.reserve else ""
        text = (
            f"{limit.label}: {limit.value} {limit.unit}".rstrip()
            + f" at {limit.point}, {limit.allowed}{reserve}: {limit.verdict}"
        )
        parts = wrap(text, width - 2)
        lines.append(((f"{letter} ", tone), (parts[0], "text")))
        lines += [(("  ", tone), (part, "text")) for part in parts[1:]]
    return lines


def _letter(origin: Origin | None) -> str:
    return " " if origin is None else ORIGIN_LETTERS[origin]


def _cut(text: str, width: int) -> str:
    return text if len(text) <= width else text[: max(0, width - 1)] + "…"


def not_stored(field: str, name: str, reason: str) -> Item:
    """Return what is to say about a text that is not in the file."""
    return Item(Level.STOP, field, name, f"not stored: {reason}")


def items(
    sheet: Sheet | None,
    troubles: Sequence[Trouble],
    refused: Sequence[Item],
    name: Callable[[str], str],
) -> tuple[Item, ...]:
    """Return everything there is to say, worst first.

    Args:
        sheet: the sheet, None where nothing could be derived.
        troubles: entries of the file that could not be read.
        refused: texts that are not in the file.
        name: the words for a field ("points.normal.flow" -> "Flow, normal").
    """
    said = list(refused)
    said += [Item(Level.STOP, item.field, name(item.field), item.message) for item in troubles]
    if sheet is not None:
        for row in sheet.findings:
            reserve = f" {row.reserve}" if row.reserve else ""
            source = f" [{row.source}]" if row.source else ""
            place = name(row.field) or row.point
            said.append(Item(row.level, row.field, place, f"{row.message}{reserve}{source}"))
        said += [Item(None, "", "safety", text) for text in sheet.cautions]
    return tuple(sorted(said, key=lambda item: _ORDER.index(item.level)))


def finding_lines(found: Sequence[Item], width: int) -> tuple[list[Line], list[int]]:
    """Return the findings as wrapped lines, and the item that each line belongs to."""
    lines: list[Line] = []
    owners: list[int] = []
    for number, item in enumerate(found):
        place = f"{item.place}: " if item.place else ""
        for row, part in enumerate(wrap(f"{place}{item.message}", width - 2)):
            letter = item.letter if row == 0 else " "
            lines.append(((f"{letter} ", item.tone), (part, "text")))
            owners.append(number)
    return lines, owners


def ruler_lines(ruler: Ruler, width: int) -> list[Line]:
    """Return the range ruler, below it what else flips a verdict."""
    if wants_ascii():  # words grow: they are laid out as they will be shown
        ruler = _plain(ruler)
    texts, scales = by_flow(ruler, width), beside(ruler, width)
    windows = len(ruler.windows)
    lanes = len(texts) - windows - 2
    # The axis goes right below the points: a low pane still shows both.
    texts = [*texts[:lanes], *texts[-2:], *texts[lanes:-2], *scales]
    tones = ["head"] * lanes + ["text", "label"] + ["accent"] * windows
    tones += ["label", *["accent"] * (len(scales) - 1)] if scales else []
    return [((text, tone),) for text, tone in zip(texts, tones, strict=True)]


def _plain(ruler: Ruler) -> Ruler:
    """Return the ruler with its words in ASCII."""
    return replace(
        ruler,
        label=plain_ascii(ruler.label),
        unit=plain_ascii(ruler.unit),
        windows=tuple(replace(one, label=plain_ascii(one.label)) for one in ruler.windows),
        scales=tuple(
            replace(one, label=plain_ascii(one.label), unit=plain_ascii(one.unit))
            for one in ruler.scales
        ),
    )


def counts(found: Sequence[Item]) -> str:
    """Return how many findings there are of each level, and cautions ("stop 1, safety 2")."""
    numbers = [(level.value, sum(item.level is level for item in found)) for level in Level]
    numbers.append(("safety", sum(item.level is None for item in found)))
    return ", ".join(f"{words} {number}" for words, number in numbers if number)


def worst(found: Sequence[Item]) -> Level | None:
    """Return the worst level met."""
    present = {item.level for item in found}
    return next((level for level in Level if level in present), None)


def summary(sheet: Sheet | None, found: Sequence[Item]) -> str:
    """Return the state of the tag in one line: findings by level and the tightest reserve."""
    told = counts(found) or "no findings"
    if sheet is None:
        return told
    tight = next((limit for limit in sheet.limits if limit.reserve), None)
    if tight is None:
        return told
    flips = f" ({tight.flips})" if tight.flips else ""
    what = f"{tight.label[:1].lower()}{tight.label[1:]} at {tight.point}"
    if tight.holds:
        return f"{told}; reserve {tight.reserve}{flips} to {what}"
    return f"{told}; {what} does not hold; it would at {tight.reserve}{flips}"
