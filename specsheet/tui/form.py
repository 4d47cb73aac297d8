"""What the form shows, section by section, rendered from the glossary; no terminal in here."""

from __future__ import annotations

from collections.abc import Container
from dataclasses import dataclass
from typing import TYPE_CHECKING

from specsheet.fields import COMMON, REVISION, SECTIONS, Entry, Section
from specsheet.tui.address import LISTS, Address
from specsheet.tui.late import late
from specsheet.tui.relevance import in_front, is_needed
from specsheet.tui.session import COMPOSITION, Session

if TYPE_CHECKING:
    from specsheet import packs
else:
    packs = late("specsheet.packs")

_SHORT = {"points": "Points", "require": "Require"}


@dataclass(frozen=True, slots=True)
class Row:
    """One row of the form.

    Attributes:
        address: what its field edits (index None also in a list section).
        entry: the entry it belongs to.
        label: words before the field.
        choices: values it cycles through; empty for free text.
        adds: whether its field is always empty and what is typed in it adds a component.
    """

    address: Address
    entry: Entry
    label: str
    choices: tuple[str, ...] = ()
    adds: bool = False


def short_title(section: Section) -> str:
    """Return the one word for a section on the scale at the top."""
    return _SHORT.get(section.key, section.title)


def entries_of(session: Session, section: str) -> tuple[Entry, ...]:
    """Return all entries of a section, in the order of the form."""
    if section == "meter":
        return session.family_entries
    if section == "revisions":
        return REVISION
    return tuple(entry for entry in COMMON if entry.section == section and entry.key != "schema")


def _stated(session: Session, entry: Entry) -> bool:
    if entry.section in LISTS:
        indices = range(len(session.items(entry.section)))
        return any(session.get(Address(entry.path, i)) for i in indices)
    return bool(session.get(Address(entry.path)))


def rows(
    session: Session, section: str, *, everything: bool = False, keep: Container[str] = ()
) -> tuple[Row, ...]:
    """Return the rows to show.

    An entry that holds a text is always there, and so is one whose path is in ``keep``; of the
    others, those that the fluid calls for, or all with ``everything``. A mixture has a row a
    component and one to add the next.
    """
    kind, phase, substance = (
        session.get(Address(f"fluid.{key}")) for key in ("kind", "phase", "substance")
    )
    found: list[Row] = []
    for entry in entries_of(session, section):
        front = in_front(entry, kind, phase, substance)
        if not (front or everything or entry.path in keep or _stated(session, entry)):
            continue
        if entry.kind == "fractions":
            found += _composition(session, entry)
        else:
            found.append(Row(Address(entry.path), entry, entry.label, choices(entry)))
    return tuple(found)


def hidden(session: Session, section: str) -> int:
    """Return how many entries of a section are not in front."""
    return len(rows(session, section, everything=True)) - len(rows(session, section))


def choices(entry: Entry) -> tuple[str, ...]:
    """Return what an entry cycles through: its choices, yes and no, the families."""
    if entry.kind == "boolean":
        return ("yes", "no")
    return packs.family_keys() if entry.path == "family" else entry.choices


def _composition(session: Session, entry: Entry) -> list[Row]:
    found = [
        Row(Address(f"{COMPOSITION}.{name}"), entry, f"  {name}") for name in session.components()
    ]
    return [*found, Row(Address(COMPOSITION), entry, f"{entry.label}: add", adds=True)]


def text_in(session: Session, row: Row, index: int | None = None) -> str:
    """Return the text in the field of a row, at one operating point or revision in a list."""
    if row.adds:
        return session.refused_component
    return session.get(Address(row.address.path, index))


def example(entry: Entry) -> str:
    """Return the example of an entry as it is typed into its field, without the file's quotes."""
    if entry.kind == "boolean":
        return {"true": "yes", "false": "no"}.get(entry.example, "")
    return entry.example.strip("[]").replace('"', "") if entry.kind == "list" else entry.example


def beside(session: Session, row: Row) -> str:
    """Return the words beside a field: a hint while it is empty, the title of a family."""
    text = text_in(session, row)
    if not text:
        return hint(session, row)
    return family_title(text) if row.entry.path == "family" else ""


def family_title(key: str) -> str:
    """Return the words for a meter family; the key itself where it is not known."""
    return packs.profile(key).title if key in packs.family_keys() else key


def hint(session: Session, row: Row) -> str:
    """Return the words beside an empty field: needed, what is assumed, or an example."""
    entry = row.entry
    if row.adds:
        return _sum_of_fractions(session)
    if is_needed(entry, session.get(Address("fluid.kind"))):
        return f"needed, e.g. {example(entry)}" if entry.example else "needed"
    if entry.default:
        return f"assumed: {entry.default}"
    return f"e.g. {example(entry)}" if entry.example else ""


def _sum_of_fractions(session: Session) -> str:
    """Return the sum of the fractions as a plain help to the eye; the verdict is derived."""
    total = 0.0
    names = session.components()
    for name in names:
        text = session.get(Address(f"{COMPOSITION}.{name}"))
        percent = text.endswith("%")
        try:
            total += float(text.removesuffix("%")) / (100.0 if percent else 1.0)
        except ValueError:
            return "substance and fraction, e.g. methane 0.62"
    return f"sum {total:.6g}" if names else "substance and fraction, e.g. methane 0.62"


def section_of(field: str) -> str:
    """Return the key of the section that a finding's field stands in."""
    head = field.split(".")[0]
    return head if "." in field and head in {section.key for section in SECTIONS} else ""


def address_of(session: Session, field: str) -> Address | None:
    """Return the address that a finding's field means ("points.minimum.flow"), or None."""
    parts = field.split(".")
    if parts[0] == "points" and len(parts) > 1:
        return _point_address(session, field, parts)
    if parts[0] == "revisions" and len(parts) == 3 and parts[1].isdecimal():
        return Address(f"revisions.{parts[2]}", int(parts[1]) - 1)
    return Address(field) if session.entry(Address(field)) is not None else None


def _point_address(session: Session, field: str, parts: list[str]) -> Address | None:
    names = session.point_names()
    if field in _POINT_PATHS:
        return Address(field, 0) if names else None
    name = ".".join(parts[1:-1])
    if name in names:
        return Address(f"points.{parts[-1]}", names.index(name))
    whole = ".".join(parts[1:])
    return Address("points.name", names.index(whole)) if whole in names else None


_POINT_PATHS = frozenset(entry.path for entry in COMMON if entry.section == "points")
