"""Write a commented tag file to fill in."""

from __future__ import annotations

from argparse import Namespace
from pathlib import Path

from specsheet import tagfile
from specsheet.cli.choose import known_family
from specsheet.cli.narrate import data, say
from specsheet.cli.status import Status


def run(arguments: Namespace) -> Status:
    """Write the file into the job's tags folder, or the folder named; never over a file."""
    if not known_family(arguments.family):
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
    except OSError as problem:
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
