"""Each command from end to end, as a process: data on stdout, narration on stderr, the status."""

from __future__ import annotations

import json
import re
from pathlib import Path

import pytest
from cli_process import DEMO_TAGS, call, demo_job, run

from specsheet import packs, tagfile
from specsheet.cli.parser import build_parser

COMMANDS = sorted(build_parser()._subparsers._group_actions[0].choices)  # type: ignore[union-attr,arg-type]
PDF_MAGIC = b"%PDF-"


@pytest.fixture
def job(tmp_path: Path) -> Path:
    return demo_job(tmp_path)


def test_help_names_every_command_and_the_exit_statuses() -> None:
    told = run("--help")
    assert told.returncode == 0
    assert all(f"    {command}" in told.stdout for command in COMMANDS)
    assert "exit status: 0 fine; 1 a stop finding" in told.stdout


@pytest.mark.parametrize("command", COMMANDS)
def test_help_of_each_command(command: str, capsys: pytest.CaptureFixture[str]) -> None:
    with pytest.raises(SystemExit) as ended:
        build_parser().parse_args([command, "--help"])
    assert ended.value.code == 0
    assert f"usage: specsheet {command}" in capsys.readouterr().out


def test_an_unknown_command_is_refused_with_the_choices() -> None:
    told = run("derove")
    assert (told.returncode, told.stdout) == (2, "")
    assert "derive" in told.stderr


def test_demo_writes_the_job_and_prints_every_tag(tmp_path: Path) -> None:
    told = run("demo", "--no-form", cwd=tmp_path)
    assert told.returncode == 0, told.stderr
    written = tmp_path / "output" / "demo"
    tags = sorted(path.stem for path in (written / "tags").glob("*.toml"))
    assert tags == list(DEMO_TAGS)
    sheets = {path.stem: path.read_bytes() for path in (tmp_path / "output").glob("*.pdf")}
    assert sorted(sheets) == tags
    assert all(content.startswith(PDF_MAGIC) for content in sheets.values())
    lines = told.stdout.splitlines()
    assert re.split(r"\s{2,}", lines[0])[:3] == ["tag", "service", "family"]
    assert [line.split()[0] for line in lines[1:]] == tags


def test_demo_without_a_terminal_opens_no_form(tmp_path: Path) -> None:
    assert run("demo", cwd=tmp_path).returncode == 0


def test_demo_keeps_what_somebody_wrote_into_its_folder(tmp_path: Path) -> None:
    run("demo", "mine", "--no-form", cwd=tmp_path)
    file = tmp_path / "mine" / "tags" / "FT-2104.toml"
    changed = file.read_text(encoding="utf-8").replace("185 degC", "190 degC")
    file.write_text(changed, encoding="utf-8")
    assert run("demo", "mine", "--no-form", cwd=tmp_path).returncode == 0
    assert file.read_text(encoding="utf-8") == changed


@pytest.mark.parametrize("family", packs.family_keys())
def test_new_writes_a_file_that_is_read_again(
    family: str, tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    told = call(capsys, "new", "FT-1", "--family", family, "--folder", tmp_path)
    assert (told.returncode, told.stdout) == (0, f"{tmp_path / 'FT-1.toml'}\n")
    reading = tagfile.load(tmp_path / "FT-1.toml")
    assert reading.tag is not None
    assert (reading.tag.name, reading.tag.family) == ("FT-1", family)


def test_new_goes_into_the_tags_of_a_job_and_writes_over_nothing(job: Path) -> None:
    told = run("new", "FT-1", "--family", "vortex", "--folder", job)
    assert told.stdout.strip() == str(job / "tags" / "FT-1.toml")
    before = (job / "tags" / "FT-2104.toml").read_bytes()
    refused = run("new", "FT-2104", "--family", "vortex", "--folder", job)
    assert refused.returncode == 2
    assert "exists already" in refused.stderr
    assert (job / "tags" / "FT-2104.toml").read_bytes() == before


@pytest.mark.parametrize(
    ("tag", "family", "hint"),
    [
        ("FT-1", "vortes", "did you mean vortex?"),
        ("FT-1", "zzz", "`specsheet families` lists them"),
        ("../FT-1", "vortex", "cannot name a file"),
        (" . ", "vortex", "cannot name a file"),
    ],
)
def test_new_refuses(tag: str, family: str, hint: str, tmp_path: Path) -> None:
    told = run("new", tag, "--family", family, cwd=tmp_path)
    assert (told.returncode, told.stdout) == (2, "")
    assert hint in told.stderr
    assert list(tmp_path.iterdir()) == []


def test_derive_writes_text(job: Path) -> None:
    told = run("derive", job / "tags" / "FT-2104.toml")
    assert told.returncode == 0, told.stderr
    assert told.stderr == ""
    assert "Bore at 20 °C" in told.stdout


def test_derive_writes_json_with_si_numbers(job: Path) -> None:
    told = run("derive", job / "tags" / "FT-2104.toml", "--json")
    document = json.loads(told.stdout)
    assert (document["tag"], document["family"]) == ("FT-2104", "orifice_concentric")
    names = [point["name"] for point in document["points"]]
    assert names == ["minimum", "normal", "maximum"]
    normal = document["points"][1]["values"]
    assert normal["mass_flow"]["value"] == pytest.approx(3100 / 3600)
    assert (normal["mass_flow"]["unit"], normal["mass_flow"]["origin"]) == ("kg/s", "given")
    # 250 mbar was stated for a bore that makes it at the largest flow
    largest = document["points"][2]["values"]["differential_pressure"]
    assert largest["value"] == pytest.approx(25000, rel=2e-3)
    assert 0.2 <= document["element"]["diameter_ratio"]["value"] <= 0.75


def test_derive_of_a_tag_that_must_not_be_bought_ends_with_one(job: Path) -> None:
    told = run("derive", job / "tags" / "FT-2305.toml", "--json")
    assert told.returncode == 1
    assert any(item["level"] == "stop" for item in json.loads(told.stdout)["findings"])


def test_check_lists_each_finding_with_file_level_and_code(job: Path) -> None:
    told = run("check", job)
    assert told.returncode == 1
    pattern = re.compile(rf"{re.escape(str(job))}/tags/\S+\.toml: (stop|caution) [a-z0-9-]+: .+")
    lines = told.stdout.splitlines()
    assert lines
    assert all(pattern.match(line) for line in lines), lines
    assert told.stderr.startswith(f"{len(DEMO_TAGS)} tags: ")


def test_check_says_by_what_margin(job: Path) -> None:
    told = run("check", job / "tags" / "FT-2305.toml")
    assert re.search(r"stop .*\[mass flow -\d+\.\d%\]$", told.stdout, re.MULTILINE)


@pytest.mark.parametrize(
    ("tag", "options", "status"),
    [("FT-2104", (), 0), ("FT-5102", (), 0), ("FT-5102", ("--strict",), 1), ("FT-2305", (), 1)],
)
def test_check_status(tag: str, options: tuple[str, ...], status: int, job: Path) -> None:
    assert run("check", job / "tags" / f"{tag}.toml", *options).returncode == status


def test_check_lists_notes_only_when_asked(job: Path) -> None:
    file = job / "tags" / "FT-2104.toml"
    assert ": note " not in run("check", file).stdout
    assert ": note " in run("check", file, "--all").stdout


def test_a_mistake_in_the_job_file_is_named_and_ends_with_two(job: Path) -> None:
    file = job / "job.toml"
    text = file.read_text(encoding="utf-8")
    file.write_text(text.replace('"1.005 bar(a)"', '"1,005 bar(a)"'), encoding="utf-8")
    line = text[: text.index("atmospheric_pressure")].count("\n") + 1
    for command in ("check", "print", "derive"):
        path = job / "tags" / "FT-2104.toml"
        told = run(command, path, cwd=job)
        assert told.returncode == 2, command
        found = [x for x in told.stderr.splitlines() if "job.toml:" in x]
        assert len(found) == 1
        assert f"job.toml:{line}: atmospheric_pressure: " in found[0]


def test_print_writes_the_same_bytes_every_time(job: Path) -> None:
    first = run("print", "tags/FT-2104.toml", cwd=job)
    assert (first.returncode, first.stdout) == (0, "output/FT-2104.pdf\n")
    before = (job / "output" / "FT-2104.pdf").read_bytes()
    assert before.startswith(PDF_MAGIC)
    run("print", "tags/FT-2104.toml", cwd=job)
    assert (job / "output" / "FT-2104.pdf").read_bytes() == before


def test_print_takes_another_paper_and_folder(job: Path) -> None:
    run("print", "tags/FT-2104.toml", "--paper", "Letter", "--output", "sheets", cwd=job)
    content = (job / "sheets" / "FT-2104.pdf").read_bytes()
    assert re.search(rb"/MediaBox \[ 0 0 612 792 \]", content)


def test_print_of_two_files_with_one_tag_prints_the_first(job: Path) -> None:
    copy = job / "tags" / "FT-2104-copy.toml"
    copy.write_bytes((job / "tags" / "FT-2104.toml").read_bytes())
    told = run("print", "tags", cwd=job)
    assert told.returncode == 2
    assert told.stdout.count("output/FT-2104.pdf") == 1
    assert "already" in told.stderr


def test_families_lists_every_profile() -> None:
    told = run("families")
    assert told.returncode == 0
    listed = [line.split()[0] for line in told.stdout.splitlines() if line.startswith("  ")]
    assert sorted(listed) == list(packs.family_keys())


@pytest.mark.parametrize("family", packs.family_keys())
def test_families_shows_entries_limits_and_replies(
    family: str, capsys: pytest.CaptureFixture[str]
) -> None:
    told = call(capsys, "families", family)
    profile = packs.profile(family)
    assert told.returncode == 0
    for entry in (*profile.entries, *profile.reply):
        assert entry.help in told.stdout
    for limit in profile.limits:
        assert limit.message in told.stdout


def test_families_refuses_an_unknown_one() -> None:
    told = run("families", "vortez")
    assert (told.returncode, told.stdout) == (2, "")
    assert "did you mean vortex?" in told.stderr


def test_schema_is_json() -> None:
    told = run("schema")
    assert told.returncode == 0
    assert json.loads(told.stdout)["$schema"].startswith("https://json-schema.org/")


def test_output_is_utf8_in_any_locale(job: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setenv("PYTHONIOENCODING", "latin-1")
    assert "Δp" in run("derive", job / "tags" / "FT-2104.toml").stdout


def test_derive_finds_the_flow_from_a_signal(job: Path) -> None:
    told = run("derive", job / "tags" / "FT-2104.toml", "--signal", "125 mbar")
    assert told.returncode == 0, told.stderr
    assert told.stdout.startswith("FT-2104  flow from 125 mbar (differential pressure)\n")
    assert max(map(len, told.stdout.splitlines())) <= 80
    as_json = run("derive", job / "tags" / "FT-2104.toml", "--signal", "125 mbar", "--json")
    document = json.loads(as_json.stdout)
    assert document["signal"] == {
        "text": "125 mbar",
        "key": "differential_pressure",
        "value": pytest.approx(12500.0),
    }
    assert [point["name"] for point in document["points"]] == ["minimum", "normal", "maximum"]
    flow = document["points"][1]["values"]["mass_flow"]
    assert flow["unit"] == "kg/s"
    shown = re.search(r"^Mass flow +kg/h +\d+ +(\d+)", told.stdout, re.MULTILINE)
    assert shown
    assert float(shown[1]) == pytest.approx(flow["value"] * 3600.0, rel=5e-4)


@pytest.mark.parametrize("signal", ["12,4 mA", "9 bar", "5 m3/h"])
def test_derive_refuses_a_signal_that_cannot_be(job: Path, signal: str) -> None:
    told = run("derive", job / "tags" / "FT-2104.toml", "--signal", signal)
    assert told.returncode == 2
    assert signal in told.stdout + told.stderr
    assert "Traceback" not in told.stderr
