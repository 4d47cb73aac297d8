"""What a sheet is: sections and rows of finished text, ready for any renderer.

Plain data without numpy: everything is rounded and worded already, a renderer only places it.
Positions on the ruler are fractions of its length.
"""

from __future__ import annotations

from dataclasses import dataclass
from datetime import date

from specsheet.findings import Level, Origin

#: text of a cell that has no value
NOTHING = "–"

#: what joins the citations of a row whose columns have different sources
CITATION_JOINT = "; "


def citations(source: str) -> tuple[str, ...]:
    """Return the single citations of a row: several are joined by "; "."""
    return tuple([item for item in source.split(CITATION_JOINT) if item])


@dataclass(frozen=True, slots=True)
class Cell:
    """One value as it is printed.

    Attributes:
        text: rounded, or as typed; :data:`NOTHING` where there is no value.
        origin: where it comes from; None where there is no value.
    """

    text: str
    origin: Origin | None = None


@dataclass(frozen=True, slots=True)
class Row:
    """One row: a quantity and its values.

    Attributes:
        key: glossary key or path of the entry ("velocity", "require.uncertainty").
        label: words for it.
        symbol: the standards' symbol, or "".
        cells: one for each column of its table; a single one where the table has no columns.
        unit: unit of every cell, or "" where the cells carry their own or have none.
        source: citation, or "".
        note: a few words that belong to the row (base condition of a gas volume), or "".
    """

    key: str
    label: str
    symbol: str
    cells: tuple[Cell, ...]
    unit: str = ""
    source: str = ""
    note: str = ""

    @property
    def origins(self) -> tuple[Origin, ...]:
        """The origins met in the row, each once, in the order of the cells."""
        met: list[Origin] = []
        for cell in self.cells:
            if cell.origin is not None and cell.origin not in met:
                met.append(cell.origin)
        return tuple(met)

    @property
    def text(self) -> str:
        """The only value with its unit, for tables without columns."""
        return f"{self.cells[0].text} {self.unit}".strip() if self.cells else NOTHING


@dataclass(frozen=True, slots=True)
class Table:
    """A titled table of rows.

    Attributes:
        key: stable name ("points", "fluid", "meter", "element", "line", "base", ...).
        title: heading.
        columns: names of the operating points; empty where each row has one value.
        rows: the rows.
        note: a sentence printed under the table, or "".
    """

    key: str
    title: str
    columns: tuple[str, ...]
    rows: tuple[Row, ...]
    note: str = ""


@dataclass(frozen=True, slots=True)
class Detail:
    """One line of the head: words and what was stated."""

    key: str
    label: str
    text: str


@dataclass(frozen=True, slots=True)
class LimitRow:
    """One limit at the point where it is tightest.

    Attributes:
        key, label, symbol: what is bounded.
        point: operating point.
        value: the value there, rounded.
        allowed: the bounds in words ("at most 9.0", "20 000 to 7 000 000").
        unit: unit of value and bounds.
        holds: whether it holds at every point.
        level: level of the finding when it does not.
        verdict: "holds", or the level in words.
        reserve: change of the driver that flips the verdict ("+32 %"), or "".
        flips: value of the driver at the flip with its unit, or "".
        message: what crossing it means.
        source: citation.
    """

    key: str
    label: str
    symbol: str
    point: str
    value: str
    allowed: str
    unit: str
    holds: bool
    level: Level
    verdict: str
    reserve: str
    flips: str
    message: str
    source: str


@dataclass(frozen=True, slots=True)
class FindingRow:
    """One finding, in words. ``reserve`` is a phrase ("flow +32 %, at 4.10 t/h"), or ""."""

    level: Level
    code: str
    field: str
    point: str
    message: str
    source: str
    reserve: str


@dataclass(frozen=True, slots=True)
class Clauses:
    """A heading with its sentences (installation, calibration, materials ...)."""

    key: str
    title: str
    sentences: tuple[str, ...]


@dataclass(frozen=True, slots=True)
class Tick:
    """One tick of the ruler: position [0..1], label ("" for a minor tick)."""

    position: float
    label: str


@dataclass(frozen=True, slots=True)
class Window:
    """One window of flow on the ruler.

    Attributes:
        label: words.
        low, high: ends as fractions of the length, clipped to 0..1.
        open_low, open_high: whether the limit leaves that end open, or lies beyond the ruler.
        low_text, high_text: the flows at the ends in the ruler's unit, "" where open.
        level: level of the limit.
    """

    label: str
    low: float
    high: float
    open_low: bool
    open_high: bool
    low_text: str
    high_text: str
    level: Level


@dataclass(frozen=True, slots=True)
class Mark:
    """One operating point on the ruler.

    Attributes:
        name: name of the point.
        text: its flow in the ruler's unit.
        position: [0..1]
        inside: whether every window holds it.
    """

    name: str
    text: str
    position: float
    inside: bool


@dataclass(frozen=True, slots=True)
class Scale:
    """One driver other than the flow on a linear scale of its own: where its verdict flips.

    Attributes:
        label, unit: the driver.
        low, high: ends of the stretch in which the verdict holds, as fractions of the length.
        open_low, open_high: whether the limit leaves that end open, or lies beyond the scale.
        zero: the zero of the unit.
        flip: the value at the flip, without its unit.
        mark: the driver's value at the operating point; inside where the verdict holds.
        reserve: change that flips the verdict ("−12 K", "+32 %").
        level: level of the limit.
        ceiling: whether the verdict flips at the upper end of the stretch.
    """

    label: str
    unit: str
    low: float
    high: float
    open_low: bool
    open_high: bool
    zero: float
    flip: str
    mark: Mark
    reserve: str
    level: Level
    ceiling: bool

    @property
    def flips(self) -> float:
        """Where the verdict flips, as a fraction of the length."""
        return self.high if self.ceiling else self.low


@dataclass(frozen=True, slots=True)
class Ruler:
    """The range ruler: a logarithmic axis of flow with windows and operating points.

    Attributes:
        label: what the axis shows ("Mass flow").
        unit: its unit.
        ticks: rising.
        windows: tightest first.
        marks: in the order of the operating points.
        usable: ends of the stretch that every window leaves open; None where there is none.
        scales: what flips a verdict beside the flow, tightest first.
        more: a line on the scales left out, or "".
    """

    label: str
    unit: str
    ticks: tuple[Tick, ...]
    windows: tuple[Window, ...]
    marks: tuple[Mark, ...]
    usable: tuple[float, float] | None
    scales: tuple[Scale, ...] = ()
    more: str = ""


@dataclass(frozen=True, slots=True)
class Working:
    """How one derived value comes about.

    Attributes:
        key, label, symbol: the value.
        equation: in plain text; the method in words where no single equation gives it.
        source: citation.
        columns: names of the operating points, empty where the value does not depend on them.
        inputs: the values put in.
        result: the value.
    """

    key: str
    label: str
    symbol: str
    equation: str
    source: str
    columns: tuple[str, ...]
    inputs: tuple[Row, ...]
    result: Row


@dataclass(frozen=True, slots=True)
class RevisionRow:
    """One line of the revision block."""

    mark: str
    date: str
    text: str
    by: str
    checked: str
    approved: str


@dataclass(frozen=True, slots=True)
class Request:
    """One thing the bidder must state: key, words, unit wanted ("" for words) and choices."""

    key: str
    label: str
    unit: str
    choices: tuple[str, ...] = ()
    help: str = ""


@dataclass(frozen=True, slots=True)
class Sheet:
    """One sheet.

    Attributes:
        tag: tag number.
        title: what is bought, in words ("Vortex meter").
        service: what the line does.
        status: where the document stands.
        revision: mark of the last revision, or "".
        date: date of the last revision, None when there is none.
        paper: "A4" or "Letter".
        confidentiality: line printed at the foot, or "".
        verdict: the findings in one sentence.
        worst: level of the worst finding, None when there is none.
        head: the lines of the head, in order.
        points: operating points as stated.
        tables: every other table, in the order of printing.
        ruler: None when the range could not be worked out.
        limits: every limit looked at, those that do not hold first.
        budget: contributions to the uncertainty of the flow, None when there are none.
        findings: worst first.
        assumptions: every assumed value.
        clauses: notes and clauses, in the order of printing.
        cautions: the cautions that the work calls for.
        revisions: oldest first.
        annex: how every derived value comes about.
        sources: every citation used, in the order of first use; rows are marked by its number.
        reply: what the bidder must state.
        remarks: free text of the user.
    """

    tag: str
    title: str
    service: str
    status: str
    revision: str
    date: date | None
    paper: str
    confidentiality: str
    verdict: str
    worst: Level | None
    head: tuple[Detail, ...]
    points: Table
    tables: tuple[Table, ...] = ()
    ruler: Ruler | None = None
    limits: tuple[LimitRow, ...] = ()
    budget: Table | None = None
    findings: tuple[FindingRow, ...] = ()
    assumptions: tuple[Row, ...] = ()
    clauses: tuple[Clauses, ...] = ()
    cautions: tuple[str, ...] = ()
    revisions: tuple[RevisionRow, ...] = ()
    annex: tuple[Working, ...] = ()
    sources: tuple[str, ...] = ()
    reply: tuple[Request, ...] = ()
    remarks: str = ""

    def numbers(self, source: str) -> tuple[int, ...]:
        """Return the numbers of the citations of a row in the list of sources."""
        listed = self.sources
        return tuple([listed.index(item) + 1 for item in citations(source) if item in listed])
