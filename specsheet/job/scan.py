"""Files and folders, as named on a command line -> every tag file in them, to be read in turn."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass
from pathlib import Path

from specsheet import tagfile
from specsheet.job.folder import JobFolder, TagFile, is_folder, open_job
from specsheet.tagfile import Job, Problem


@dataclass(frozen=True, slots=True)
class Listed:
    """One tag file that was found. It is read when it is wanted: a job may hold thousands.

    Attributes:
        path: the file.
        job: the job it belongs to, read already.
        home: what its tag number is unique in: the folder of the job; the file itself where
            there is none, since files without a job may be drafts of one tag.
    """

    path: Path
    job: Job
    home: Path

    def read(self) -> TagFile:
        """Read the file, within its job. Nothing that stands there raises."""
        return TagFile(self.path, tagfile.load(self.path, self.job))


@dataclass(frozen=True, slots=True)
class Scan:
    """What was found.

    Attributes:
        files: the tag files in the order named, those of a folder FT-2 before FT-10; each once.
        problems: those of the jobs, each job once, and of folders that hold no tag.
    """

    files: tuple[Listed, ...]
    problems: tuple[Problem, ...]


def scan(paths: Iterable[str | Path]) -> Scan:
    """Find every tag file in ``paths``: tag files, folders of tags, folders of jobs.

    Each ``job.toml`` is read once, no tag file is read yet.
    """
    jobs: dict[Path, Job] = {}
    found: dict[Path, Listed] = {}
    problems: list[Problem] = []
    for path in paths:
        opened = _open(Path(path), jobs)
        problems.extend(opened.problems)
        if not opened.paths and not opened.problems:
            message = "no tag file is in this folder; name one, or the folder of a job"
            problems.append(Problem(str(path), 1, "file", message))
        for item in opened.paths:
            found.setdefault(item, Listed(item, opened.job, opened.folder))
    read_once = {job.path: job for job in jobs.values()}
    problems.extend(problem for job in read_once.values() for problem in job.problems)
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
    return JobFolder(Path(job.folder) if job.folder else path, job, (path,))
