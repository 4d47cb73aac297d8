"""The folder of a job, and the tag files in it."""

from __future__ import annotations

import re
from dataclasses import dataclass, replace
from pathlib import Path

from specsheet import tagfile
from specsheet.tagfile import JOB_FILE, Job, Problem, Reading

TAGS = "tags"
OFFERS = "offers"

_DIGITS = re.compile(r"(\d+)", re.ASCII)
_UNSAFE = re.compile(r"[^A-Za-z0-9._-]+")


@dataclass(frozen=True, slots=True)
class TagFile:
    """One tag file as it was read."""

    path: Path
    reading: Reading

    @property
    def name(self) -> str:
        """The tag number; the name of the file where that could not be read."""
        tag = self.reading.tag
        return (tag.name if tag else "") or self.path.stem


class Numbers:
    """The tag numbers met so far, so that one that comes twice in a job is found."""

    def __init__(self) -> None:
        self._first: dict[tuple[Path, str], Path] = {}

    def repeated(self, name: str, path: Path, home: Path) -> Problem | None:
        """Return the problem of a file whose tag number an earlier one has, else None.

        Args:
            name: the tag number, upper and lower case alike; "" where none could be read.
            path: the file.
            home: what the number must be unique in, a folder of a job.
        """
        if not name:
            return None
        first = self._first.setdefault((home, name.casefold()), path)
        if first == path:
            return None
        message = f'{first} is tag "{name}" already; each tag needs its own number'
        return Problem(str(path), 1, "tag", message)

    def marked(self, file: TagFile, home: Path) -> TagFile:
        """Return a file as it was read, with the problem of a repeated number if it has one."""
        reading = file.reading
        problem = self.repeated(reading.tag.name if reading.tag else "", file.path, home)
        if problem is None:
            return file
        return replace(file, reading=replace(reading, problems=(*reading.problems, problem)))


@dataclass(frozen=True, slots=True)
class JobFolder:
    """A job as it stands on the disk.

    Attributes:
        folder: the folder of the job; of the file, for a tag file that stands alone.
        job: what ``job.toml`` states, with its problems; NO_JOB where there is none.
        paths: the tag files, FT-2 before FT-10.
        problems: what is wrong with the folder as such.
    """

    folder: Path
    job: Job
    paths: tuple[Path, ...]
    problems: tuple[Problem, ...] = ()

    def read(self) -> tuple[TagFile, ...]:
        """Read every tag file. A tag number that a file before it has too is a problem."""
        numbers = Numbers()
        files = (TagFile(path, tagfile.load(path, self.job)) for path in self.paths)
        return tuple(numbers.marked(file, self.folder) for file in files)

    def find(self, name: str) -> TagFile | None:
        """Return the file of a tag number, upper and lower case alike; None where none has it."""
        wanted = name.casefold()
        return next((file for file in self.read() if file.name.casefold() == wanted), None)

    def offers(self, name: str) -> Path:
        """Return the folder in which the replies for a tag are kept (it need not exist)."""
        return self.folder / OFFERS / file_stem(name)


def open_job(path: str | Path) -> JobFolder:
    """Return the job at ``path``: its folder, its ``job.toml``, or one tag file.

    A folder holds its tags in ``tags/``, or itself where there is no such folder. Nothing that
    stands at ``path`` raises.
    """
    path = Path(path)
    if path.name == JOB_FILE and not is_folder(path):
        path = path.parent
    elif not is_folder(path):
        return JobFolder(path.parent, tagfile.find_job(path), (path,))
    # the job of a folder is found as for a file in it, so that tags/ knows the job above
    job = tagfile.find_job(path / JOB_FILE)
    tags = path / TAGS if is_folder(path / TAGS) else path
    try:
        found = [item for item in tags.iterdir() if _is_tag_file(item)]
    except OSError as error:
        message = f"the folder cannot be listed: {error.strerror}"
        return JobFolder(path, job, (), (Problem(str(tags), 1, "file", message),))
    home = Path(job.folder) if job.folder else path
    return JobFolder(home, job, tuple(sorted(found, key=lambda item: natural_order(item.name))))


def natural_order(name: str) -> tuple[tuple[int, str], ...]:
    """Return a key that sorts names as people count: FT-2 before FT-10, a before B."""
    parts = _DIGITS.split(name.casefold())
    # every second part is a number; one of more than 18 digits counts by its first
    return tuple(
        (int(part[:18]), part) if place % 2 else (-1, part) for place, part in enumerate(parts)
    )


def file_stem(tag: str) -> str:
    """Return the name, without its ending, of the file or folder of a tag.

    Only letters, digits, full stop, hyphen and underscore are kept, so that a tag number can
    neither leave its folder nor be a name that some system refuses.
    """
    return _UNSAFE.sub("-", tag).strip(".-")[:100] or "tag"


def is_folder(path: Path) -> bool:
    """Tell whether a folder stands at ``path``, whatever its name."""
    try:
        return path.is_dir()
    except (OSError, ValueError):
        return False


def _is_tag_file(path: Path) -> bool:
    return path.suffix == ".toml" and path.name != JOB_FILE and not path.name.startswith(".")
