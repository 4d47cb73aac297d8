"""What an entry and a section of the tag file are."""

from __future__ import annotations

from dataclasses import dataclass

#: kinds of an entry that are not quantities
PLAIN_KINDS = (
    "text",
    "choice",
    "boolean",
    "integer",
    "date",
    "list",  # list of texts
    "fractions",  # table: substance -> fraction
    "units",  # table: kind -> unit
    "nominal_size",  # "DN 150" or "NPS 6"
    "straight_length",  # "20 D" or a length
)


@dataclass(frozen=True, slots=True)
class Entry:
    """One thing a user may state.

    Attributes:
        path: where it stands in the file ("line.size", "points.flow", "meter.taps").
        label: words on form and sheet.
        kind: key of a kind of quantity, or one of :data:`PLAIN_KINDS`.
        help: what it means, in a sentence or two, for F1 and the schema.
        example: a valid text, shown in messages and new files.
        choices: the values a choice may take.
        words: words accepted besides a quantity ("size it").
        default: text assumed when nothing is stated; "" for none. Always listed as assumed.
        needed: "always", "" or the condition in words ("when fluid.kind is substance").
        symbol: the standards' symbol, or "".
    """

    path: str
    label: str
    kind: str
    help: str
    example: str = ""
    choices: tuple[str, ...] = ()
    words: tuple[str, ...] = ()
    default: str = ""
    needed: str = ""
    symbol: str = ""

    @property
    def section(self) -> str:
        """First part of the path ("" for the top of the file)."""
        return self.path.rpartition(".")[0]

    @property
    def key(self) -> str:
        """Last part of the path."""
        return self.path.rpartition(".")[2]


@dataclass(frozen=True, slots=True)
class Section:
    """One section of the tag file and of the form."""

    key: str
    title: str
    help: str
