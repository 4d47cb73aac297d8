"""The state of the form in plain Python: text of the tag, edits, undo, what is unsaved.

Nothing here knows of a terminal. The tag file's text is the only truth; every committed edit makes
a new :class:`~specsheet.tui.history.State` and goes into the journal at once.

A text that the grammar refuses stays in its field, in the journal and in undo, but not in the file:
saving leaves the entry in the file as it was and says so. Values are derived without a refused
entry, so that no figure on the screen rests on a text that is no longer there.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from datetime import date
from pathlib import Path
from typing import TYPE_CHECKING, Any

from specsheet import tagfile
from specsheet.fields import Entry
from specsheet.tagfile.syntax import parse
from specsheet.tui.address import LISTS, Address
from specsheet.tui.history import History, Refused, State
from specsheet.tui.journal import Journal, digest
from specsheet.tui.late import late
from specsheet.tui.values import component, entry_at, refusal, shown

if TYPE_CHECKING:
    from specsheet.tagfile import known
    from specsheet.tui import edits, leftovers, saving
else:
    known = late("specsheet.tagfile.known")
    edits = late("specsheet.tui.edits")
    saving = late("specsheet.tui.saving")

COMPOSITION = "fluid.mixture"


class Session:
    """One tag file being edited.

    Attributes:
        path: the file.
        is_new: whether the file does not exist yet.
    """

    def __init__(self, path: Path, text: str, content: bytes | None) -> None:
        """Start from the text of a file.

        Args:
            path: where the file stands, or will.
            text: a valid TOML text.
            content: what stands on disk, None for a file that does not exist yet.
        """
        self.path = path
        self._history = History(State(text))
        self._saved_text = "" if content is None else text
        self._saved_digest = "" if content is None else digest(content)
        self._journal = Journal(path)
        self._parsed: tuple[str, Mapping[str, Any]] = ("", {})

    # What there is

    @property
    def journal(self) -> Path | None:
        """Where the unsaved edits of this session stand; None while there are none."""
        return self._journal.file

    @property
    def text(self) -> str:
        """Text of the tag file as saving would write it."""
        return self._history.state.text

    @property
    def saved(self) -> str:
        """Fingerprint of the file as it was last read or written, "" for a new one."""
        return self._saved_digest

    @property
    def is_new(self) -> bool:
        """Whether the file was never read or written."""
        return not self._saved_digest

    @property
    def dirty(self) -> bool:
        """Whether anything typed is not in the file."""
        return self.text != self._saved_text or bool(self.refused)

    @property
    def refused(self) -> Mapping[Address, Refused]:
        """Texts that could not be stored, each with the reason."""
        return self._history.state.refused

    @property
    def trouble(self) -> str:
        """Why edits are not journalled, or ""."""
        return self._journal.trouble

    @property
    def undo_name(self) -> str:
        """Words for the change that undo takes back, or ""."""
        return self._history.undo_name

    @property
    def redo_name(self) -> str:
        """Words for the change that redo makes again, or ""."""
        return self._history.redo_name

    @property
    def data(self) -> Mapping[str, Any]:
        """The tag file as plain TOML data; a decimal number remembers how it was typed."""
        if self._parsed[0] != self.text:
            data = parse(self.text, str(self.path))
            self._parsed = (self.text, data if isinstance(data, dict) else {})
        return self._parsed[1]

    @property
    def family_entries(self) -> tuple[Entry, ...]:
        """The entries of the tag's meter family; none while the family is unknown."""
        return known.family_entries(self.get(Address("family")))

    def entry(self, address: Address) -> Entry | None:
        """Return the entry that an address belongs to; None for a key the glossary lacks."""
        return entry_at(self.get(Address("family")), address.path)

    def get(self, address: Address) -> str:
        """Return the text in the field of an address: as typed, refused or not."""
        refused = self.refused.get(address)
        return shown(self._raw(address)) if refused is None else refused.text

    def refusal(self, address: Address) -> str:
        """Return why the text of an address was refused, or ""."""
        refused = self.refused.get(address)
        return "" if refused is None else refused.reason

    def items(self, section: str) -> tuple[Mapping[str, Any], ...]:
        """Return the operating points or the revisions as plain data."""
        found = self.data.get(section, [])
        is_list = isinstance(found, list)
        return tuple(item for item in found if isinstance(item, dict)) if is_list else ()

    def point_names(self) -> tuple[str, ...]:
        """Return the names of the operating points, in order."""
        return tuple(self.get(Address("points.name", i)) for i in range(len(self.items("points"))))

    def components(self) -> tuple[str, ...]:
        """Return the names of the components of the mixture, refused ones included."""
        table = self._raw(Address(COMPOSITION))
        names = list(table) if isinstance(table, dict) else []
        leaves = [a.path for a in self.refused if a.path.startswith(f"{COMPOSITION}.")]
        names += [path.removeprefix(f"{COMPOSITION}.") for path in leaves]
        return tuple(dict.fromkeys(names))

    def text_to_derive(self) -> str | None:
        """Text that values are derived from: without the entries that are refused.

        None where the layout of the file does not allow to leave one out: better no figure than
        one that rests on a text that is no longer in its field.
        """
        text = self.text
        try:
            for address in self.refused:
                adds = address.path == COMPOSITION  # a component not added replaces nothing
                if not adds and self._raw(address) is not None:
                    text = edits.unset(text, address)
        except tagfile.EditError:
            return None
        return text

    def name(self, address: Address) -> str:
        """Return words for an address ("Flow, normal")."""
        entry = self.entry(address)
        label = entry.label if entry is not None else address.path
        if entry is not None and entry.path != address.path:
            label = address.path.removeprefix(f"{entry.path}.")
        if address.index is None:
            return label
        key = "points.name" if address.section == "points" else "revisions.mark"
        place = self.get(Address(key, address.index)) or str(address.index + 1)
        return f"{label}, {place}"

    # What can be done

    def edit(self, address: Address, text: str) -> str:
        """Commit the text of one field; return why it is refused, or "".

        An empty text removes the entry. Nothing happens when the text did not change.
        """
        text = text.strip()
        if text == self.get(address):
            return self.refusal(address)
        return self._edit(address, text, self.refused)

    def add_component(self, text: str) -> str:
        """Add a component to the mixture from "methane 0.62"; return why it is refused, or "".

        A refused text is kept as the composition's own until it is mended or emptied.
        """
        text = text.strip()
        whole = Address(COMPOSITION)
        rest = {a: told for a, told in self.refused.items() if a != whole}
        parts = component(text) if text else ""
        if isinstance(parts, tuple):
            return self._edit(Address(f"{COMPOSITION}.{parts[0]}"), parts[1], rest)
        if text != self.refused_component:
            if parts:
                rest[whole] = Refused(text, parts)
            self._change(self.name(whole), State(self.text, rest))
        return parts

    @property
    def refused_component(self) -> str:
        """The text last typed to add a component, where it was refused."""
        told = self.refused.get(Address(COMPOSITION))
        return "" if told is None else told.text

    def _edit(self, address: Address, text: str, others: Mapping[Address, Refused]) -> str:
        reason = self._objection(address, text)
        after = self.text
        if not reason:
            try:
                after = self._stored(address, text)
            except tagfile.EditError as error:
                reason = str(error)
        refused = {a: told for a, told in others.items() if a != address}
        if reason:
            refused[address] = Refused(text, reason)
        self._change(self.name(address), State(after, refused))
        return reason

    def add_point(self, name: str) -> str:
        """Add an operating point behind the others; return why that cannot be, or ""."""
        objection = self._objection(Address("points.name", len(self.items("points"))), name)
        return objection or self._try(f"{name} added", lambda: edits.add_point(self.text, name))

    def remove_point(self, index: int) -> str:
        """Remove an operating point and all that is stated at it; return why not, or ""."""
        name = self.point_names()[index]
        kept: dict[Address, Refused] = {}
        for address, told in self.refused.items():
            if address.section != "points" or address.index is None or address.index < index:
                kept[address] = told
            elif address.index > index:
                kept[Address(address.path, address.index - 1)] = told
        change = f"{name} removed"
        return self._try(change, lambda: edits.remove_point(self.text, index), kept)

    def add_revision(self, mark: str, day: date) -> str:
        """Add a line to the revision block; return why that cannot be, or ""."""
        change = f"revision {mark} added"
        return self._try(change, lambda: edits.add_revision(self.text, mark, day))

    def adopt(self, family: str) -> str:
        """Make the tag one of another family; return what of ``[meter]`` it does not take, or "".

        Entries that the new family does not know go behind a "#" in the file, as
        :func:`specsheet.tagfile.adopt` has it; undo brings the old family back.
        """
        try:
            made = tagfile.adopt(self.text, family)
        except tagfile.EditError as error:
            return f"not adopted: {error}"
        meter = [address for address in self.refused if address.section == "meter"]
        refused = {a: told for a, told in self.refused.items() if a not in meter}
        self._change(f"family {family} adopted", State(made.text, refused))
        return f"{family} adopted" + (
            f"; set aside: {', '.join(made.dropped)}" if made.dropped else ""
        )

    def undo(self) -> str:
        """Take back the last change; return words for it, or "" when there is none."""
        return self._moved("undo", self._history.undo())

    def redo(self) -> str:
        """Make the last undone change again; return words for it, or ""."""
        return self._moved("redo", self._history.redo())

    def recover(self, leftover: leftovers.Leftover) -> None:
        """Take over the edits of an earlier session, as one change that undo can take back."""
        self._change("recovered edits", leftover.state)
        if not self._journal.trouble:
            leftover.discard()

    def save(self, *, force: bool = False) -> saving.Outcome:
        """Write the file, unless it changed on disk since it was read (``force`` overrides)."""
        return self._written(
            saving.write(self.path, self.text, None if force else self._saved_digest)
        )

    def save_as(self, path: Path) -> saving.Outcome:
        """Write a new file of another name and go on with it; an existing file is not replaced."""
        outcome = saving.write(path, self.text, "")
        if outcome.conflict is saving.Conflict.NONE:
            self._journal.clear()
            self.path = path
            self._journal = Journal(path)
        return self._written(outcome)

    def reload(self, text: str, content: bytes) -> None:
        """Take over what stands on disk now, as one change that undo can take back."""
        self._saved_text, self._saved_digest = text, digest(content)
        self._change("reloaded from disk", State(text))

    def give_up(self) -> None:
        """Forget the unsaved edits, on the user's word, and end the session."""
        self._journal.clear()
        self._journal.close()

    def close(self) -> None:
        """End the session; unsaved edits stay in the journal for the next one."""
        if not self.dirty:
            self._journal.clear()
        self._journal.close()

    # Inside

    def _objection(self, address: Address, text: str) -> str:
        if address.path == "points.name":
            return _name_objection(text, address.index, self.point_names())
        return refusal(self.entry(address), address.path, text) if text else ""

    def _stored(self, address: Address, text: str) -> str:
        if text:
            return edits.assign(self.text, address, text)
        stated = self._raw(address) is not None
        return edits.unset(self.text, address) if stated else self.text

    def _try(
        self,
        change: str,
        edit: Callable[[], str],
        refused: Mapping[Address, Refused] | None = None,
    ) -> str:
        try:
            after = edit()
        except tagfile.EditError as error:
            return str(error)
        self._change(change, State(after, self.refused if refused is None else refused))
        return ""

    def _raw(self, address: Address) -> object:
        if address.section in LISTS and address.index is not None:
            items = self.items(address.section)
            known = 0 <= address.index < len(items)
            return items[address.index].get(address.key) if known else None
        if address.path.startswith(f"{COMPOSITION}."):
            table = self._raw(Address(COMPOSITION))
            leaf = address.path.removeprefix(f"{COMPOSITION}.")
            return table.get(leaf) if isinstance(table, dict) else None
        table = self.data.get(address.section, {}) if address.section else self.data
        return table.get(address.key) if isinstance(table, dict) else None

    def _change(self, name: str, state: State) -> None:
        self._history.push(name, state)
        self._record(name)

    def _moved(self, verb: str, name: str) -> str:
        if name:
            self._record(f"{verb} {name}")
        return name

    def _record(self, name: str) -> None:
        if self.dirty:
            self._journal.record(self._history.state, name, self._saved_digest)
        else:
            self._journal.clear()

    def _written(self, outcome: saving.Outcome) -> saving.Outcome:
        if outcome.conflict is saving.Conflict.NONE:
            self._saved_text, self._saved_digest = self.text, outcome.digest
            self._journal.clear()
            if self.refused:
                self._record("refused entries")
        return outcome


def _name_objection(text: str, index: int | None, names: tuple[str, ...]) -> str:
    if not text:
        return "an operating point needs a name"
    taken = any(name == text and place != index for place, name in enumerate(names))
    return f'another operating point is named "{text}" already' if taken else ""
