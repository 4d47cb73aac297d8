"""Every command of the form, once: key, words, action. Keys, palette and help are made from it."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Command:
    """One command.

    Attributes:
        action: the screen's action.
        keys: keys that call it, comma separated.
        title: words in the palette.
        help: what it does, where the title does not say it all.
        foot: word in the footer, "" where it does not stand there.
        shown: the keys as people write them.
        moves: whether it moves the focus: it then goes before keys typed later.
    """

    action: str
    keys: str
    title: str
    help: str = ""
    foot: str = ""
    shown: str = ""
    moves: bool = False

    @property
    def key_text(self) -> str:
        """The keys as people write them."""
        return self.shown or self.keys.replace(",", " or ").replace("ctrl+", "Ctrl+").upper()

    @property
    def foot_key(self) -> str:
        """The first key in its shortest form, for the footer."""
        return self.key_text.partition(" or ")[0].replace("Ctrl+", "^")


FORM: tuple[Command, ...] = (
    Command("help_entry", "f1", "Help on this entry", "What it means, an example.", "Help"),
    Command("choose", "f4", "Choose from a list", "Choices, families, substances.", "Choose"),
    Command("save", "ctrl+s", "Save", "Write the tag file.", "Save", "Ctrl+S"),
    Command("save_as", "f12", "Save under another name", "", "", "F12"),
    Command("undo", "ctrl+z", "Undo the last edit", "", "", "Ctrl+Z"),
    Command("redo", "ctrl+y,ctrl+r", "Redo", "", "", "Ctrl+Y or Ctrl+R"),
    Command(
        "find", "ctrl+f", "Find an entry", "By its words, path or help.", "Find", "Ctrl+F", True
    ),
    Command("palette", "ctrl+p", "All commands", "This list.", "Commands", "Ctrl+P"),
    Command("print", "f5", "Print the sheet (PDF)", "Into the folder output.", "Print"),
    Command(
        "pane(1)", "f6", "Next pane", "Form, findings, derived values, ruler.", "Pane", "", True
    ),
    Command("pane(-1)", "shift+f6", "Previous pane", "", "", "Shift+F6", True),
    Command("side", "f7", "Show the next pane below", "Where only one has room.", "", "F7"),
    Command("section(1)", "pagedown,ctrl+pagedown", "Next section", "", "", "PgDn", True),
    Command("section(-1)", "pageup,ctrl+pageup", "Previous section", "", "", "PgUp", True),
    Command("across(1)", "alt+right", "Same entry of the next point", "", "", "Alt+Right", True),
    Command("across(-1)", "alt+left", "Same entry of the point before", "", "", "Alt+Left", True),
    Command("everything", "f8", "Show all entries of the section, or the usual ones", "", "", "F8"),
    Command("add_item", "f2", "Add an operating point or revision", "", "", "F2"),
    Command("remove_item", "f3", "Remove this operating point", "", "", "F3"),
    Command("next_finding", "f9", "Go to the next finding", "", "", "F9", True),
    Command(
        "shortlist", "f11", "Families that fit", "Every family; one can be adopted.", "", "F11"
    ),
    Command("what_if", "ctrl+t", "What if this entry held another value", "", "", "Ctrl+T"),
    Command("keys", "f10", "Keys and how the form works", "", "", "F10"),
    Command("back", "ctrl+o", "Back to the list of tags", "", "", "Ctrl+O"),
    Command("quit", "ctrl+q", "Quit", "Asks when something is not saved.", "Quit", "Ctrl+Q"),
)

#: commands of the list of tags
BROWSE: tuple[Command, ...] = (
    Command("open_here", "o", "Open the tag", "", "Open", "Enter"),
    Command("new", "n", "New tag", "Its number, then its family.", "New", "N"),
    Command("find", "slash,ctrl+f", "Find a tag", "", "Find", "/ or Ctrl+F"),
    Command("palette", "ctrl+p", "All commands", "This list.", "Commands", "Ctrl+P"),
    Command("read", "f5", "Look at the folder again", "", "", "F5"),
    Command("keys", "f1,f10,question_mark", "Keys", "", "Help", "F1"),
    Command("quit", "ctrl+q,q", "Quit", "", "Quit", "Ctrl+Q or Q"),
)

#: keys that work in a field without being commands, for the help
EDITING: tuple[tuple[str, str], ...] = (
    ("Enter, Down", "keep the text and go to the next entry"),
    ("Up", "keep the text and go to the entry before"),
    ("Tab, Shift+Tab", "next and previous field; along the points in a grid"),
    ("Esc", "take back what was typed in this field"),
    ("Left, Right, Home, End", "move in the text; change a choice"),
    ("Ctrl+Left, Ctrl+Right", "move by words"),
    ("Ctrl+U, Ctrl+K, Ctrl+W", "delete to the start, to the end, the word before"),
    ("Ctrl+C, Ctrl+X, Ctrl+V", "copy, cut, paste inside the form"),
    ("Space, F4", "open the list of a choice"),
)
