"""What the form asks beside deriving: which family fits, and what if an entry were another."""

from __future__ import annotations

from typing import TYPE_CHECKING

from specsheet.tui.address import Address
from specsheet.tui.form_editing import FormEditing
from specsheet.tui.late import late
from specsheet.tui.pages import address_in

if TYPE_CHECKING:
    from specsheet.tui import dialogs, protocol, what_if
else:
    dialogs = late("specsheet.tui.dialogs")
    protocol = late("specsheet.tui.protocol")
    what_if = late("specsheet.tui.what_if")

_CANNOT = "mend the refused entry first: it cannot be left out of the file"


class FormAsking(FormEditing):
    """The part of the form that asks questions; only adopting a family changes the tag."""

    _comparing = 0

    async def action_shortlist(self) -> None:
        """Hold every family against the tag."""
        await self.commit_all()
        text = self.session.text_to_derive()
        if text is None:
            self.say(_CANNOT)
            return
        self._comparing = self.evaluator.compare(text, str(self.session.path))
        self.say("every family is held against the tag")

    async def action_what_if(self) -> None:
        """Open the what-if panel on the entry that has the focus."""
        editor = self.editor
        if editor is None or editor.row.adds:
            self.say("put the focus on the entry that is to vary")
            return
        await self.commit_all()
        text = self.session.text_to_derive()
        if text is None:
            self.say(_CANNOT)
            return
        address, path = address_in(editor), str(self.session.path)
        entry = self._path_of(address)

        def ask(first: str, last: str) -> int:
            return self.evaluator.suppose(text, path, entry, first, last)

        name, present = self.session.name(address), self.session.get(address)
        self.app.push_screen(what_if.WhatIf(name, present, ask))

    def _path_of(self, address: Address) -> str:
        """Return the path of an address as the tag file's tools have it."""
        if address.index is None:
            return address.path
        name = self.session.point_names()[address.index]
        return f"{address.section}.{name}.{address.key}"

    def take(self, answer: protocol.Answer) -> None:
        """Show what the evaluator answered."""
        panel = next((s for s in self.app.screen_stack if isinstance(s, what_if.WhatIf)), None)
        if isinstance(answer, protocol.Compared):
            self._show_families(answer)
        elif isinstance(answer, protocol.Supposed):
            if panel is not None:
                panel.show(answer.number, answer.lines)
        elif isinstance(answer, protocol.Failed) and panel is not None:
            panel.refuse(answer.number, answer.message)
        elif isinstance(answer, protocol.Failed) and answer.number == self._comparing:
            self.say(f"families cannot be compared: {answer.message}")
        else:
            super().take(answer)

    def _show_families(self, answer: protocol.Compared) -> None:
        if answer.number != self._comparing:
            return

        async def chosen(family: str | None) -> None:
            if not family or family == self.session.get(Address("family")):
                return
            told = self.session.adopt(family)
            await self.sync_pages()
            await self._changed()
            self.say(f"{told}; Ctrl+Z brings the old family back")

        choices = [dialogs.Choice(fit.family, fit.row, fit.detail) for fit in answer.fits]
        now = self.session.get(Address("family"))
        self.app.push_screen(
            dialogs.Pick(
                "Families, the best first; Enter adopts one", dialogs.matching(choices), now=now
            ),
            chosen,
        )
