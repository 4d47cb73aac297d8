"""The built distributions, installed where nothing of the checkout can be found."""

from __future__ import annotations

import json
import os
import subprocess
import sys
import tarfile
import venv
import zipfile
from pathlib import Path

import pytest
from cli_process import DEMO_TAGS
from house import ROOT

pytestmark = pytest.mark.packaging


def _run(*command: str | Path, cwd: Path) -> subprocess.CompletedProcess[str]:
    environment = {key: value for key, value in os.environ.items() if key != "PYTHONPATH"}
    return subprocess.run(
        [str(word) for word in command],
        cwd=cwd,
        capture_output=True,
        encoding="utf-8",
        stdin=subprocess.DEVNULL,
        check=True,
        env=environment,
    )


@pytest.fixture(scope="session")
def built(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """The folder of an sdist, and of the wheel that was built from it."""
    folder = tmp_path_factory.mktemp("dist")
    _run(sys.executable, "-m", "build", "--outdir", folder, ROOT, cwd=folder)
    return folder


def test_wheel_carries_the_packs_and_the_types(built: Path) -> None:
    (wheel,) = built.glob("*.whl")
    inside = set(zipfile.ZipFile(wheel).namelist())
    packs = {path.relative_to(ROOT).as_posix() for path in (ROOT / "profiles").rglob("*.toml")}
    assert {f"specsheet/{path}" for path in packs} <= inside
    assert {"specsheet/py.typed", "specsheet/tui/look.tcss"} <= inside
    assert not any(name.startswith(("tests/", "profiles/", "output/")) for name in inside)


def test_sdist_carries_what_a_test_run_needs(built: Path) -> None:
    (archive,) = built.glob("*.tar.gz")
    with tarfile.open(archive) as opened:
        inside = {name.partition("/")[2] for name in opened.getnames()}
    wanted = {"README.md", "DEVELOPERS.md", "LICENSE", "pyproject.toml", "profiles/demo/job.toml"}
    assert wanted <= inside
    assert "tests/packaging/test_distributions.py" in inside


def test_installed_wheel_runs_away_from_the_checkout(built: Path, tmp_path: Path) -> None:
    place = tmp_path / "environment"
    venv.create(place, with_pip=True)
    scripts = place / ("Scripts" if os.name == "nt" else "bin")
    (wheel,) = built.glob("*.whl")
    _run(scripts / "python", "-m", "pip", "install", "--quiet", wheel, cwd=tmp_path)
    work = tmp_path / "work"
    work.mkdir()
    told = _run(scripts / "specsheet", "demo", "--no-form", cwd=work)
    assert "FT-2104" in told.stdout
    assert len(list((work / "output").glob("*.pdf"))) == len(DEMO_TAGS)
    tag = work / "output" / "demo" / "tags" / "FT-2104.toml"
    derived = _run(scripts / "python", "-m", "specsheet", "derive", tag, "--json", cwd=tmp_path)
    assert json.loads(derived.stdout)["element"]["bore_diameter"]["unit"] == "m"
    where = _run(
        scripts / "python", "-c", "import specsheet; print(specsheet.__file__)", cwd=tmp_path
    )
    assert Path(where.stdout.strip()).is_relative_to(place)
