"""Write a commented tag file to fill in."""

from __future__ import annotations

from argparse import Namespace
from difflib import get_close_matches
from pathlib import Path

from specsheet import packs, tagfile
from specsheet.cli.narrate import data, say
from specsheet.cli.status import Status


def run(arguments: Namespace) -> Status:
    """Write the file into the job's tags folder, or the folder named; never over a file."""
    if arguments.family not in packs.family_keys():
        near = get_close_matches(arguments.family, packs.family_keys(), n=3)
        hint = f"did you mean {' or '.join(near)}? " if near else ""
        say(f"there is no meter family {arguments.family!r}; {hint}`specsheet families` lists them")
        return Status.UNUSABLE
    target = _target(Path(arguments.folder), arguments.tag)
    if target is None:
        say(f"{arguments.tag!r} cannot name a file; use letters, digits, '-', '_' and '.'")
        return Status.UNUSABLE
    if target.exists():
        say(f"{target} exists already and is left as it is; open it with `specsheet form {target}`")
        return Status.UNUSABLE
    try:
        target.parent.mkdir(parents=True, exist_ok=True)
        tagfile.save(target, tagfile.new_text(arguments.tag, arguments.family))
    except (OSError, tagfile.SaveError) as problem:
        say(f"{target}: file: cannot be written: {problem}")
        return Status.UNUSABLE
    data(str(target))
    say(f"fill it in with `specsheet form {target}`, or in any editor")
    return Status.FINE


def _target(folder: Path, tag: str) -> Path | None:
    """Return the path of the new file, None when the tag makes no file name."""
    if not tag.strip(" .") or any(not (mark.isalnum() or mark in "-_. ") for mark in tag):
        return None
    inside = folder / "tags" if (folder / "job.toml").is_file() else folder
    return inside / f"{tag}.toml"
