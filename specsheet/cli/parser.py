"""The words of the command line."""

from __future__ import annotations

from argparse import (
    ArgumentParser,
    ArgumentTypeError,
    RawDescriptionHelpFormatter,
    _SubParsersAction,
)
from collections.abc import Callable

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
  specsheet form FT-2104.toml                 fill it in on the screen
  specsheet check FT-2104.toml                what is wrong, and by what margin
  specsheet shortlist FT-2104.toml            which other families would fit
  specsheet print FT-2104.toml                the datasheet, as PDF in output/

`specsheet COMMAND --help` tells more about one command.

exit status: 0 fine; 1 a stop finding (or a caution with --strict);
2 the input could not be used, each problem as file:line: field: message.

The figures help to specify and compare meters. They replace neither the codes
that apply to the plant nor the judgement of the licensed engineer who signs.
"""

_FILES_HELP = "tag files, or folders that hold them (default: this folder)"
_STRICT_HELP = "exit with 1 on a caution too"

Commands = _SubParsersAction  # the collection of argparse that a command is added to


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
    for add in _COMMANDS:
        add(commands)
    return parser


def _command(
    commands: Commands[ArgumentParser], name: str, help_: str, more: str = "", module: str = ""
) -> ArgumentParser:
    made: ArgumentParser = commands.add_parser(
        name,
        help=help_,
        description=f"{help_[0].upper()}{help_[1:]}.\n\n{more}".strip(),
        formatter_class=RawDescriptionHelpFormatter,
    )
    made.set_defaults(module=module or name)
    return made


def _form(commands: Commands[ArgumentParser]) -> None:
    more = "Needs a terminal of 80 columns or more. F1 explains the entry under the cursor."
    form = _command(commands, "form", "open a tag or a job in the form", more)
    form.add_argument("path", nargs="?", help="tag file or job folder (default: this folder)")


def _demo(commands: Commands[ArgumentParser]) -> None:
    more = "Some of its tags are wrong on purpose: see what is said about them."
    demo = _command(commands, "demo", "write an invented job, print its sheets and open it", more)
    demo.add_argument(
        "folder",
        nargs="?",
        default="output/demo",
        help="where the job goes (default: output/demo); files there already are kept as they are",
    )
    demo.add_argument(
        "--output", default="output", help="where the PDF sheets go (default: output)"
    )
    demo.add_argument("--no-form", action="store_true", help="do not open the form at the end")


def _new(commands: Commands[ArgumentParser]) -> None:
    more = (
        "Every entry of the family stands in the file with its meaning; those that can wait\n"
        "are commented out. A file that exists is never written over."
    )
    new = _command(commands, "new", "write a commented tag file to fill in", more)
    new.add_argument("tag", help="tag number, for example FT-2104")
    new.add_argument(
        "--family", required=True, help="meter family; `specsheet families` lists them"
    )
    new.add_argument(
        "--folder", default=".", help="job folder, or folder of the file (default: this folder)"
    )


def _derive(commands: Commands[ArgumentParser]) -> None:
    more = (
        "The JSON holds SI numbers under the standard terms, each with its origin and source.\n\n"
        "With --signal the flow is found that gives a measured signal, at the conditions of\n"
        "every operating point. A current or a percentage is read as the output is specified:\n"
        "linear in flow unless the tag says otherwise. State other conditions in the file, or\n"
        "suppose them: --set points.normal.pressure='6.4 bar(g)'."
    )
    derive = _command(
        commands, "derive", "derive everything and write the sheet as text or JSON", more
    )
    derive.add_argument("file", help="tag file")
    derive.add_argument(
        "--signal",
        metavar="VALUE",
        help="write the flow that gives this signal instead, as '125 mbar', '12.4 mA' or '52 %%'",
    )
    derive.add_argument("--json", action="store_true", help="JSON with SI numbers")
    derive.add_argument("--strict", action="store_true", help=_STRICT_HELP)
    _add_set(derive)


def _check(commands: Commands[ArgumentParser]) -> None:
    more = (
        "One line a finding: file: level code: entry: message [driver and margin]. The margin\n"
        "says how far the driver may grow (+) or must fall (-) before the verdict changes."
    )
    check = _command(
        commands, "check", "list what is wrong, worst first, with the margin to each limit", more
    )
    check.add_argument("paths", nargs="*", default=["."], help=_FILES_HELP)
    check.add_argument("--strict", action="store_true", help=_STRICT_HELP)
    check.add_argument("--all", action="store_true", help="list notes too")
    _add_set(check)


def _add_set(command: ArgumentParser) -> None:
    command.add_argument(
        "--set",
        action="append",
        default=[],
        type=_change,
        metavar="ENTRY=VALUE",
        help='suppose another value, as points.maximum.flow="140 m3/h"; the file stays as it is; '
        "may be repeated",
    )


def _change(text: str) -> tuple[str, str]:
    path, sign, value = text.partition("=")
    if not sign or not path.strip():
        raise ArgumentTypeError(
            f'ENTRY=VALUE was wanted, as points.maximum.flow="140 m3/h"; {text!r} came'
        )
    return path.strip(), value.strip()


def _whatif(commands: Commands[ArgumentParser]) -> None:
    more = (
        "The file stays as it is. A size that is free is chosen anew at every value; state the\n"
        "size under [meter], or with --set, to see one meter over the whole range.\n"
        "The exit status is 0 whatever the verdicts in the table, 2 where none can be made."
    )
    whatif = _command(commands, "whatif", "table of the verdict against one figure", more)
    whatif.add_argument("file", help="tag file")
    whatif.add_argument("--vary", required=True, metavar="ENTRY", help="as points.maximum.flow")
    whatif.add_argument("--from", required=True, dest="first", help='first value, as "80 m3/h"')
    whatif.add_argument("--to", required=True, dest="last", help='last value, as "200 m3/h"')
    whatif.add_argument("--steps", type=int, default=7, help="number of values (default: 7)")
    whatif.add_argument("--json", action="store_true", help="JSON with SI numbers")
    _add_set(whatif)


def _shortlist(commands: Commands[ArgumentParser]) -> None:
    more = (
        "Families with equations are sized, the others judged by their usual limits. A family\n"
        "that does not fit is listed with the reason. Exit status 1 where none fits, or where the\n"
        "process data have a stop finding whatever the family."
    )
    shortlist = _command(
        commands, "shortlist", "hold every meter family against a tag, the best first", more
    )
    shortlist.add_argument("file", help="tag file")
    shortlist.add_argument("--json", action="store_true", help="JSON with SI numbers")
    shortlist.add_argument(
        "--adopt",
        metavar="FAMILY",
        help="write this family into the file; what stands under [meter] and it does not take "
        'is put behind a "#"',
    )


def _print(commands: Commands[ArgumentParser]) -> None:
    more = "One PDF a tag, named after it. The same tag file always gives the same bytes."
    print_ = _command(commands, "print", "print datasheets as PDF", more, module="print_")
    print_.add_argument("paths", nargs="*", default=["."], help=_FILES_HELP)
    print_.add_argument(
        "--output", default="output", help="folder for the PDF files (default: output)"
    )
    print_.add_argument("--paper", choices=("A4", "Letter"), help="instead of the job's own")
    print_.add_argument("--strict", action="store_true", help=_STRICT_HELP)


def _families(commands: Commands[ArgumentParser]) -> None:
    families = _command(commands, "families", "list the meter families, or show one")
    families.add_argument(
        "family", nargs="?", help="key of a family, to show its entries and limits"
    )


def _schema(commands: Commands[ArgumentParser]) -> None:
    more = "Editors that know JSON Schema complete and check tag files with it."
    _command(commands, "schema", "write the JSON schema of the tag file", more)


def _completion(commands: Commands[ArgumentParser]) -> None:
    more = (
        'bash: eval "$(specsheet completion bash)"\n'
        'zsh:  eval "$(specsheet completion zsh)", after compinit\n'
        "fish: specsheet completion fish | source"
    )
    completion = _command(commands, "completion", "write a completion script for a shell", more)
    completion.add_argument("shell", choices=("bash", "zsh", "fish"))


_COMMANDS: tuple[Callable[[Commands[ArgumentParser]], None], ...] = (
    _form,
    _demo,
    _new,
    _derive,
    _check,
    _whatif,
    _shortlist,
    _print,
    _families,
    _schema,
    _completion,
)
