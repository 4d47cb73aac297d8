"""Completion scripts for bash, zsh and fish, rendered from the parser itself."""

from __future__ import annotations

from argparse import ArgumentParser, Namespace, _SubParsersAction
from collections.abc import Mapping

from specsheet.cli.narrate import data
from specsheet.cli.status import Status

_BASH = """\
_specsheet() {{
    local word="${{COMP_WORDS[COMP_CWORD]}}" command="${{COMP_WORDS[1]}}" words=""
    if [ "$COMP_CWORD" -eq 1 ]; then
        words="{commands}"
    else
        case "$command" in
{cases}
        esac
    fi
    COMPREPLY=($(compgen -W "$words" -- "$word") $(compgen -f -- "$word"))
}}
complete -o filenames -F _specsheet specsheet
"""

_ZSH = """\
#compdef specsheet
_specsheet() {{
    if (( CURRENT == 2 )); then
        compadd {commands}
    else
        case "${{words[2]}}" in
{cases}
        esac
        _files
    fi
}}
compdef _specsheet specsheet
"""


def run(arguments: Namespace) -> Status:
    """Write the script for the shell that was asked for."""
    from specsheet.cli.parser import build_parser

    data(_WRITERS[arguments.shell](_words(build_parser())))
    return Status.FINE


def _words(parser: ArgumentParser) -> dict[str, list[str]]:
    """Return command -> its options and fixed choices."""
    found: dict[str, list[str]] = {}
    for action in parser._actions:
        if isinstance(action, _SubParsersAction):
            for name, child in action.choices.items():
                found[name] = [
                    word
                    for item in child._actions
                    for word in (*item.option_strings, *(item.choices or ()))
                ]
    return found


def _bash(words: Mapping[str, list[str]]) -> str:
    cases = "\n".join(
        f'            {name}) words="{" ".join(options)}" ;;' for name, options in words.items()
    )
    return _BASH.format(commands=" ".join(words), cases=cases)


def _zsh(words: Mapping[str, list[str]]) -> str:
    cases = "\n".join(
        f"            {name}) compadd -- {' '.join(options)} ;;" for name, options in words.items()
    )
    return _ZSH.format(commands=" ".join(words), cases=cases)


def _fish(words: Mapping[str, list[str]]) -> str:
    lines = [f"complete -c specsheet -n __fish_use_subcommand -a '{' '.join(words)}'"]
    for name, options in words.items():
        condition = f"-n '__fish_seen_subcommand_from {name}'"
        lines.extend(
            f"complete -c specsheet {condition} -l {option[2:]}"
            if option.startswith("--")
            else f"complete -c specsheet {condition} -a {option}"
            for option in options
            if option != "-h"
        )
    return "\n".join(lines)


_WRITERS = {"bash": _bash, "zsh": _zsh, "fish": _fish}
