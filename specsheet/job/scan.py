"""Files and folders, as named on a command line -> every tag file in them, read."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass
from pathlib import Path

from specsheet import tagfile
from specsheet.job.folder import JobFolder, TagFile, is_folder, open_job, with_duplicates
from specsheet.tagfile import Job, Problem, Reading


@dataclass(frozen=True, slots=True)
class Scan:
    """What was found.

    Attributes:
        files: the tag files in the order named, those of a folder FT-2 before FT-10; each once.
        problems: those of the jobs, each job once, and of folders that hold no tag.
    """

    files: tuple[TagFile, ...]
    problems: tuple[Problem, ...]

    def readings(self) -> tuple[Reading, ...]:
        """Return the readings of all files, in order."""
        return tuple(file.reading for file in self.files)

    @property
    def all_problems(self) -> tuple[Problem, ...]:
        """The problems of jobs, folders and tags together."""
        return (*self.problems, *(p for file in self.files for p in file.reading.problems))


def scan(paths: Iterable[str | Path]) -> Scan:
    """Read every tag file in ``paths``: tag files, folders of tags, folders of jobs.

    Each ``job.toml`` is read once. Two files of one job with the same tag number are a problem.
    """
    jobs: dict[Path, Job] = {}
    found: dict[Path, TagFile] = {}
    groups: dict[Path, list[TagFile]] = {}
    problems: list[Problem] = []
    for path in paths:
        opened = _open(Path(path), jobs)
        problems.extend(opened.problems)
        if not opened.paths and not opened.problems:
            message = "no tag file is in this folder; name one, or the folder of a job"
            problems.append(Problem(str(path), 1, "file", message))
        for item in opened.paths:
            if item not in found:
                found[item] = TagFile(item, tagfile.load(item, opened.job))
                groups.setdefault(opened.folder, []).append(found[item])
    read_once = {job.path: job for job in jobs.values()}
    problems.extend(problem for job in read_once.values() for problem in job.problems)
    for group in groups.values():
        found.update((file.path, file) for file in with_duplicates(group))
    return Scan(tuple(found.values()), tuple(problems))


def _open(path: Path, jobs: dict[Path, Job]) -> JobFolder:
    """Return the job at a path; the job of a single file is read once for its folder."""
    if is_folder(path) or path.name == tagfile.JOB_FILE:
        opened = open_job(path)
        jobs[opened.folder] = opened.job
        return opened
    if path.parent not in jobs:
        jobs[path.parent] = tagfile.find_job(path)
    job = jobs[path.parent]
    # files without a job are compared with none: they may be drafts of one tag
    return JobFolder(Path(job.folder) if job.folder else path, job, (path,))
