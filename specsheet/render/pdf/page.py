"""Pages and frames: where the next thing goes, and the marks a page is made of.

The origin is the lower left corner; y falls as the page fills. Marks are written straight as page
content, in the order they are made, so equal sheets give equal bytes.
"""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass, field
from functools import cache

from specsheet.render.pdf import fonts, style, wrap
from specsheet.render.pdf.fonts import Run
from specsheet.render.pdf.style import Style

_BOLD_STROKE = 0.035  # of the size: the stroke that makes a regular letter look bold


@cache
def _look(look: Style) -> str:
    """Return the operators that set font, size, colour and weight of a text."""
    weight = f"2 Tr {look.size * _BOLD_STROKE:.3f} w {look.colour} RG" if look.bold else "0 Tr"
    return f"{fonts.name(0)} {look.size:g} Tf {look.colour} rg {weight}"


@dataclass(frozen=True, slots=True)
class Place:
    """A place that the bidder fills in: page [0..], lower left and upper right corner [pt]."""

    name: str
    label: str
    page: int
    left: float
    bottom: float
    right: float
    top: float


@dataclass(frozen=True, slots=True)
class Heading:
    """A heading for the outline of the document."""

    title: str
    page: int
    top: float


class Page:
    """One page: its content as it is written.

    Texts that follow one another share one text object, and what is set already is not set again.
    The rules between the rows of tables are drawn together, last.

    Attributes:
        fonts: code pages of the font that its texts need.
    """

    def __init__(self) -> None:
        self.fonts = {0}
        self._code: list[str] = []
        self._set: Style | None = None  # style of the open text object
        self._rules: list[str] = []

    def content(self) -> str:
        """Return everything on the page as page content."""
        rules = [f"{style.HAIRLINE} RG 0.4 w", *self._rules, "S"] if self._rules else []
        return "\n".join([*self._code, *(("ET",) if self._set else ()), *rules, ""])

    def _draw(self, code: str) -> None:
        if self._set is not None:
            self._code.append("ET")
            self._set = None
        self._code.append(code)

    def text(self, x: float, y: float, text: str, look: Style) -> None:
        """Set one line with its left end at x and its baseline at y."""
        self.run(x, y, fonts.run(text, look.size), look)

    def right(self, x: float, y: float, text: str, look: Style) -> None:
        """Set one line with its right end at x."""
        run = fonts.run(text, look.size)
        self.run(x - run.width, y, run, look)

    def middle(self, x: float, y: float, text: str, look: Style) -> None:
        """Set one line with its middle at x."""
        run = fonts.run(text, look.size)
        self.run(x - run.width / 2.0, y, run, look)

    def run(self, x: float, y: float, run: Run, look: Style) -> None:
        """Set one line, made at the size of ``look``, with its left end at x."""
        text, _, shown, pages = run
        if not text:
            return
        if look != self._set:
            start = "BT " if self._set is None else ""
            self._code.append(f"{start}{_look(look)}")
            self._set = look
        self._code.append(f"1 0 0 1 {x:.2f} {y:.2f} Tm {shown}")
        if pages:
            self.fonts |= pages

    def rule(self, x1: float, x2: float, y: float) -> None:
        """Draw the hairline below a row."""
        self._rules.append(f"{x1:.2f} {y:.2f} m {x2:.2f} {y:.2f} l")

    def line(
        self, x1: float, y1: float, x2: float, y2: float, colour: str, thick: float = 0.5
    ) -> None:
        """Draw a straight line."""
        self._draw(f"{colour} RG {thick:g} w {x1:.2f} {y1:.2f} m {x2:.2f} {y2:.2f} l S")

    def box(
        self, x: float, y: float, wide: float, high: float, fill: str = "", edge: str = ""
    ) -> None:
        """Draw a rectangle from its lower left corner, filled, edged or both."""
        paint = "B" if fill and edge else "f" if fill else "S"
        colours = (f"{fill} rg " if fill else "") + (f"{edge} RG 0.6 w " if edge else "")
        self._draw(f"{colours}{x:.2f} {y:.2f} {wide:.2f} {high:.2f} re {paint}")

    def shape(self, corners: list[tuple[float, float]], fill: str, edge: str = "") -> None:
        """Draw a closed polygon."""
        path = " ".join(
            f"{x:.2f} {y:.2f} {'m' if place == 0 else 'l'}" for place, (x, y) in enumerate(corners)
        )
        colours = f"{fill} rg " + (f"{edge} RG 0.8 w " if edge else "")
        self._draw(f"{colours}{path} h {'B' if edge else 'f'}")


@dataclass
class Book:
    """The pages of one document.

    Attributes:
        size: width and height of the paper [pt].
        column: width of a column of values by operating point [pt].
        pages: so far.
        headings: for the outline.
        places: what the bidder fills in.
        overlong: texts that the band at the top had to cut; they are printed in full further on.
        missing: characters without a glyph, in the order met.
    """

    size: tuple[float, float]
    column: float
    pages: list[Page] = field(default_factory=lambda: [Page()])
    headings: list[Heading] = field(default_factory=list)
    places: list[Place] = field(default_factory=list)
    overlong: list[str] = field(default_factory=list)
    missing: dict[str, None] = field(default_factory=dict)

    def top(self, index: int) -> float:
        """Return where the text of a page starts."""
        return self.size[1] - style.TOP - (style.RUNNING_HEAD if index else 0.0)

    def clean(self, text: str) -> str:
        """Return a text that can be printed; what had to be replaced is remembered."""
        printable, missing = fonts.printable(text)
        if missing:
            self.missing.update(dict.fromkeys(missing))
        return printable

    def lines(self, text: str, room: float, look: Style) -> tuple[Run, ...]:
        """Return a text of the user in lines of ``room`` points."""
        runs, missing = wrap.lines(text, room, look.size)
        if missing:
            self.missing.update(dict.fromkeys(missing))
        return runs


@dataclass
class Frame:
    """A column of the book that fills from the top and goes on overleaf.

    Attributes:
        book: the book.
        x, width: left edge and width [pt].
        index: page.
        y: where the next thing starts.
    """

    book: Book
    x: float
    width: float
    index: int
    y: float

    @property
    def page(self) -> Page:
        """The page the frame stands on."""
        return self.book.pages[self.index]

    @property
    def room(self) -> float:
        """Height left on this page."""
        return self.y - style.FOOT

    @property
    def top(self) -> float:
        """Where the frame starts on this page."""
        return self.book.top(self.index)

    @property
    def full(self) -> float:
        """Height of an empty page after the first."""
        return self.book.top(1) - style.FOOT

    def turn(self) -> None:
        """Go on overleaf, on a new page where the frame is the first to come there."""
        self.index += 1
        self.y = self.book.top(self.index)
        if self.index == len(self.book.pages):
            self.book.pages.append(Page())

    def keep(self, height: float) -> bool:
        """Turn the page where ``height`` does not fit; tell whether it was turned."""
        if height <= self.y - style.FOOT or self.y == self.top:
            return False
        self.turn()
        return True

    def skip(self, height: float) -> None:
        """Leave a gap, none at the top of a page."""
        if self.y != self.top:
            self.y -= height

    def heading(self, title: str) -> None:
        """Set a section heading with its rule and put it into the outline."""
        look = style.SECTION
        self.book.headings.append(Heading(title, self.index, self.y))
        self.page.text(self.x, self.y - look.size, title, look)
        below = self.y - look.size - 4.0
        self.page.line(self.x, below, self.x + self.width, below, style.ACCENT, 0.8)
        self.y = below - 2.0

    def paragraph(self, text: str, look: Style, indent: float = 0.0) -> None:
        """Set wrapped text, line by line and overleaf where the page is full."""
        self.put(self.book.lines(text, self.width - indent, look), look, indent)

    def put(self, lines: Iterable[Run], look: Style, indent: float = 0.0) -> None:
        """Set lines made at the size of ``look``, overleaf where the page is full."""
        leading = look.leading
        for line in lines:
            self.keep(leading)
            self.page.run(self.x + indent, self.y - look.size, line, look)
            self.y -= leading


@dataclass
class Columns(Frame):
    """A frame that fills the columns of a page from left to right before it goes on overleaf.

    Attributes:
        lefts: left edges of the columns [pt].
        start: where the columns start on the page they begin on.
        begun: the page they begin on.
        place: column that is being filled.
    """

    lefts: tuple[float, ...] = ()
    start: float = 0.0
    begun: int = 0
    place: int = 0

    @classmethod
    def of(cls, frame: Frame, count: int) -> Columns:
        """Return columns of equal width below what the frame holds so far."""
        wide = (frame.width - (count - 1) * style.GUTTER) / count
        lefts = tuple(frame.x + place * (wide + style.GUTTER) for place in range(count))
        return cls(frame.book, lefts[0], wide, frame.index, frame.y, lefts, frame.y, frame.index)

    @property
    def top(self) -> float:
        """Where the columns start on this page."""
        return self.start if self.index == self.begun else self.book.top(self.index)

    def turn(self) -> None:
        """Go on in the next column, or overleaf."""
        if self.place + 1 < len(self.lefts):
            self.place += 1
            self.y = self.top
        else:
            self.place = 0
            super().turn()
        self.x = self.lefts[self.place]
