"""The words of the command line."""

from __future__ import annotations

from argparse import ArgumentParser, RawDescriptionHelpFormatter

from specsheet import __version__

_DESCRIPTION = """\
From one tag's process data to a purchase-ready flow-meter specification.

A tag is a text file. A job is a folder with job.toml and tags/*.toml.
Without a command the form opens on the job in this folder.
"""

_EPILOG = """\
first steps:
  specsheet demo                              see an invented job, printed and opened
  specsheet new FT-2104 --family vortex       write a commented file to fill in
  specsheet form tags/FT-2104.toml            fill it in on the screen
  specsheet check tags                        what is wrong, and by what margin
  specsheet print tags                        the datasheets, as PDF in output/

exit status: 0 fine; 1 a stop finding (or a caution with --strict);
2 the input could not be used, each problem as file:line: field: message.

The figures help to specify and compare meters. They replace neither the codes
that apply to the plant nor the judgement of the licensed engineer who signs.
"""

_FILES_HELP = "tag files, or folders that hold them (default: this folder)"


def build_parser() -> ArgumentParser:
    """Return the parser of the whole command line."""
    parser = ArgumentParser(
        prog="specsheet",
        description=_DESCRIPTION,
        epilog=_EPILOG,
        formatter_class=RawDescriptionHelpFormatter,
    )
    parser.add_argument("--version", action="version", version=f"specsheet {__version__}")
    parser.set_defaults(module="form", path=None)
    commands = parser.add_subparsers(title="commands", metavar="COMMAND", dest="command")

    def command(name: str, help_: str, more: str = "") -> ArgumentParser:
        made: ArgumentParser = commands.add_parser(
            name,
            help=help_,
            description=f"{help_[0].upper()}{help_[1:]}. {more}".strip(),
            formatter_class=RawDescriptionHelpFormatter,
        )
        made.set_defaults(module=name if name != "print" else "print_")
        return made

    form = command("form", "open a tag or a job in the form", "Needs a terminal.")
    form.add_argument("path", nargs="?", help="tag file or job folder (default: this folder)")

    demo = command("demo", "write an invented job, print its sheets and open it")
    demo.add_argument(
        "folder",
        nargs="?",
        default="output/demo",
        help="where the job goes (default: output/demo); files there already are kept as they are",
    )
    demo.add_argument("--output", default="output", help="where the PDF sheets go")
    demo.add_argument("--no-form", action="store_true", help="do not open the form at the end")

    new = command("new", "write a commented tag file to fill in")
    new.add_argument("tag", help="tag number, for example FT-2104")
    new.add_argument(
        "--family", required=True, help="meter family; `specsheet families` lists them"
    )
    new.add_argument("--folder", default=".", help="job folder, or folder of the file")

    derive = command("derive", "derive everything and write the sheet as text or JSON")
    derive.add_argument("file", help="tag file")
    derive.add_argument("--json", action="store_true", help="JSON with SI numbers")
    derive.add_argument("--strict", action="store_true", help="exit with 1 on a caution too")

    check = command("check", "list what is wrong, worst first, with the margin to each limit")
    check.add_argument("paths", nargs="*", default=["."], help=_FILES_HELP)
    check.add_argument("--strict", action="store_true", help="exit with 1 on a caution too")
    check.add_argument("--all", action="store_true", help="list notes too")

    print_ = command("print", "print datasheets as PDF")
    print_.add_argument("paths", nargs="*", default=["."], help=_FILES_HELP)
    print_.add_argument("--output", default="output", help="folder for the PDF files")
    print_.add_argument("--paper", choices=("A4", "Letter"), help="instead of the job's own")
    print_.add_argument("--strict", action="store_true", help="exit with 1 on a caution too")

    families = command("families", "list the meter families, or show one")
    families.add_argument(
        "family", nargs="?", help="key of a family, to show its entries and limits"
    )

    command("schema", "write the JSON schema of the tag file")

    completion = command(
        "completion",
        "write a completion script for a shell",
        'For bash: eval "$(specsheet completion bash)".',
    )
    completion.add_argument("shell", choices=("bash", "zsh", "fish"))
    return parser
