"""Completion scripts for bash, zsh and fish, rendered from the parser itself."""

from __future__ import annotations

from argparse import ArgumentParser, Namespace, _SubParsersAction
from collections.abc import Iterable
from dataclasses import dataclass

from specsheet import packs
from specsheet.cli.narrate import data
from specsheet.cli.status import Status

_FILE_ARGUMENTS = frozenset({"file", "folder", "output", "path", "paths"})
_FAMILY_ARGUMENTS = frozenset({"family"})

_BASH = """\
_specsheet() {{
    local IFS=$' \\n' word="${{COMP_WORDS[COMP_CWORD]}}" words="" files=""
    if [ "$COMP_CWORD" -eq 1 ]; then
        words="{commands}"
    else
        case "${{COMP_WORDS[1]}}" in
{cases}
        esac
    fi
    COMPREPLY=($(compgen -W "$words" -- "$word"))
    if [ -n "$files" ]; then
        IFS=$'\\n'
        COMPREPLY+=($(compgen -f -- "$word"))
    fi
}}
complete -o filenames -F _specsheet specsheet
"""

_ZSH = """\
#compdef specsheet
_specsheet() {{
    if (( CURRENT == 2 )); then
        compadd -- {commands}
        return
    fi
    case "${{words[2]}}" in
{cases}
    esac
}}
compdef _specsheet specsheet
"""


@dataclass(frozen=True, slots=True)
class _Command:
    """What can follow a command: its options and fixed words, and whether files can."""

    name: str
    words: tuple[str, ...]
    files: bool


def run(arguments: Namespace) -> Status:
    """Write the script for the shell that was asked for."""
    from specsheet.cli.parser import build_parser

    data(_WRITERS[arguments.shell](tuple(_commands(build_parser()))))
    return Status.FINE


def _commands(parser: ArgumentParser) -> Iterable[_Command]:
    for action in parser._actions:
        if isinstance(action, _SubParsersAction):
            for name, child in action.choices.items():
                yield _command(name, child)


def _command(name: str, parser: ArgumentParser) -> _Command:
    words: list[str] = []
    names = {item.dest for item in parser._actions}
    for item in parser._actions:
        words.extend((*item.option_strings, *(item.choices or ())))
    if names & _FAMILY_ARGUMENTS:
        words.extend(packs.family_keys())
    return _Command(name, tuple(words), bool(names & _FILE_ARGUMENTS))


def _bash(commands: tuple[_Command, ...]) -> str:
    cases = "\n".join(
        f'            {item.name}) words="{" ".join(item.words)}"'
        f"{' files=yes' if item.files else ''} ;;"
        for item in commands
    )
    return _BASH.format(commands=_names(commands), cases=cases)


def _zsh(commands: tuple[_Command, ...]) -> str:
    cases = "\n".join(
        f"        {item.name}) compadd -- {' '.join(item.words)}"
        f"{'; _files' if item.files else ''} ;;"
        for item in commands
    )
    return _ZSH.format(commands=_names(commands), cases=cases)


def _fish(commands: tuple[_Command, ...]) -> str:
    lines = [f"complete -c specsheet -f -n __fish_use_subcommand -a '{_names(commands)}'"]
    for item in commands:
        condition = f"-n '__fish_seen_subcommand_from {item.name}'"
        files = "" if item.files else " -f"
        lines.extend(
            f"complete -c specsheet{files} {condition} -l {word[2:]}"
            if word.startswith("--")
            else f"complete -c specsheet{files} {condition} -a {word}"
            for word in item.words
            if word != "-h"
        )
    return "\n".join(lines)


def _names(commands: tuple[_Command, ...]) -> str:
    return " ".join(item.name for item in commands)


_WRITERS = {"bash": _bash, "zsh": _zsh, "fish": _fish}
