"""The commands that try things out: shortlist, adopting a family, --set and whatif."""

from __future__ import annotations

import json
from pathlib import Path

import pytest
from cli_process import call, run
from family_keys import KEYS
from services import service_text

from specsheet import tagfile

FLOW = "points.maximum.flow"


@pytest.fixture
def water(tmp_path: Path) -> Path:
    file = tmp_path / "FT-1.toml"
    file.write_text(service_text("water", "turbine_woltman"), encoding="utf-8")
    return file


def test_shortlist_names_every_family_under_its_verdict(
    water: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    told = call(capsys, "shortlist", water)
    assert (told.returncode, told.stderr) == (0, "")
    fits, _, rest = told.stdout.partition("fits with conditions")
    assert "\n  coriolis " in fits
    assert "does not fit" in rest
    assert "thermal_mems: Thermal micro-sensor meter: for gas only" in rest
    assert all(key in told.stdout for key in KEYS)


def test_lines_of_the_shortlist_stay_within_the_page(
    water: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    told = call(capsys, "shortlist", water)
    assert max(map(len, told.stdout.splitlines())) <= 110


def test_shortlist_as_json_has_si_numbers_and_no_null(
    water: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    told = call(capsys, "shortlist", water, "--json")
    document = json.loads(told.stdout)
    assert "null" not in told.stdout
    by_key = {item["family"]: item for item in document["candidates"]}
    assert sorted(by_key) == sorted(KEYS)
    woltman = by_key["turbine_woltman"]
    assert (woltman["basis"], woltman["moving_parts"]) == ("limits", True)
    assert woltman["values"]["uncertainty"] == {"value": pytest.approx(0.02, rel=0.03), "unit": "1"}
    weir = by_key["weir_vnotch"]
    assert weir["verdict"] == "does not fit"
    assert [reason["code"] for reason in weir["reasons"]] == ["free-surface-needed"]


def test_a_file_without_flows_is_unusable(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    file = tmp_path / "FT-1.toml"
    file.write_text(service_text("water").replace("flow = ", "# flow = "), encoding="utf-8")
    told = call(capsys, "shortlist", file)
    assert told.returncode == 2
    assert "flow: is missing" in told.stderr


def test_a_tag_that_no_family_fits_ends_with_one(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    """Without a pipe nothing can be sized, and under pressure there is no free surface."""
    file = tmp_path / "FT-1.toml"
    text = service_text("water").replace('size = "DN 100"\n', "")
    file.write_text(text, encoding="utf-8")
    assert call(capsys, "shortlist", file).returncode == 1


def test_adopt_changes_the_family_and_says_what_goes_behind_a_hash(water: Path) -> None:
    water.write_text(
        water.read_text(encoding="utf-8") + '[meter]\nsize = "DN 80"\n', encoding="utf-8"
    )
    told = run("shortlist", water, "--adopt", "weir_vnotch")
    assert (told.returncode, told.stdout) == (0, "")
    assert 'weir_vnotch does not take `size = "DN 80"`; put behind a #' in told.stderr
    text = water.read_text(encoding="utf-8")
    assert 'family = "weir_vnotch"' in text
    assert '# size = "DN 80"' in text
    assert not tagfile.load(water).problems


@pytest.mark.parametrize(
    ("family", "hint"),
    [("vortes", "did you mean vortex"), ("zzz", "`specsheet families` lists them")],
)
def test_adopt_refuses_and_leaves_the_file(
    family: str, hint: str, water: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    before = water.read_bytes()
    told = call(capsys, "shortlist", water, "--adopt", family)
    assert told.returncode == 2
    assert hint in told.stderr
    assert water.read_bytes() == before


def test_set_supposes_a_value_and_leaves_the_file(
    water: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    before = water.read_bytes()
    assert call(capsys, "check", water).returncode == 0
    told = call(capsys, "check", water, "--set", f"{FLOW}=150 m3/h")
    assert told.returncode == 1
    assert "meter-velocity-limit" in told.stdout
    derived = call(capsys, "derive", water, "--json", "--set", f"{FLOW}=150 m3/h")
    assert derived.returncode == 1
    flow = json.loads(derived.stdout)["points"][2]["values"]["volume_flow"]
    assert flow["value"] == pytest.approx(150 / 3600)
    assert water.read_bytes() == before


@pytest.mark.parametrize("command", ["derive", "check", "whatif"])
@pytest.mark.parametrize(
    ("change", "words"),
    [
        (f"{FLOW}=150", "the unit is missing"),
        ("points.peak.flow=150 m3/h", "there is no such operating point"),
        ("fluid.bubles=1 %", 'did you mean "fluid.bubbles"'),
        ("job.altitude=100 m", "job.toml"),
    ],
)
def test_a_bad_change_is_refused_in_words(
    command: str, change: str, words: str, water: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    more = ["--vary", FLOW, "--from", "80 m3/h", "--to", "90 m3/h"] if command == "whatif" else []
    told = call(capsys, command, water, "--set", change, *more)
    assert told.returncode == 2
    assert told.stdout == ""
    assert f"{water}: --set " in told.stderr
    assert words in told.stderr


def test_a_change_without_a_sign_is_refused_by_the_command_line(water: Path) -> None:
    told = run("check", water, "--set", FLOW)
    assert (told.returncode, told.stdout) == (2, "")
    assert "ENTRY=VALUE was wanted" in told.stderr


def test_whatif_writes_a_row_a_value(water: Path, capsys: pytest.CaptureFixture[str]) -> None:
    told = call(capsys, "whatif", water, "--vary", FLOW, "--from", "80 m3/h", "--to", "200 m3/h")
    assert (told.returncode, told.stderr) == (0, "")
    rows = told.stdout.splitlines()
    assert rows[0].split()[:2] == [FLOW, "verdict"]
    assert [row.split()[0] for row in rows[1:8]] == ["80", "100", "120", "140", "160", "180", "200"]
    assert [row.split()[2] for row in rows[1:8]] == ["caution"] * 4 + ["stop"] * 3


def test_whatif_as_json(water: Path, capsys: pytest.CaptureFixture[str]) -> None:
    told = call(
        capsys,
        *("whatif", water, "--vary", FLOW, "--from", "80 m3/h", "--to", "200 m3/h"),
        *("--steps", "3", "--json"),
    )
    document = json.loads(told.stdout)
    assert document["varied"] == FLOW
    assert [trial["value"] for trial in document["trials"]] == ["80 m3/h", "140 m3/h", "200 m3/h"]
    assert document["trials"][2]["worst"]["code"] == "meter-velocity-limit"
    assert document["trials"][0]["values"]["velocity"]["unit"] == "m/s"


@pytest.mark.parametrize(
    ("vary", "first", "last", "steps", "words"),
    [
        (FLOW, "80", "90 m3/h", "3", "the unit is missing"),
        (FLOW, "80 m3/h", "90 kg/h", "3", "two kinds"),
        (FLOW, "80 m3/h", "90 m3/h", "1", "--steps"),
        ("line.size", "DN 80", "DN 100", "3", "only a quantity"),
        ("points.peak.flow", "80 m3/h", "90 m3/h", "3", "no such operating point"),
    ],
)
def test_whatif_refuses_in_words(
    vary: str, first: str, last: str, steps: str, words: str, water: Path,
    capsys: pytest.CaptureFixture[str],
) -> None:  # fmt: skip
    told = call(
        capsys, "whatif", water, "--vary", vary, "--from", first, "--to", last, "--steps", steps
    )
    assert (told.returncode, told.stdout) == (2, "")
    assert words in told.stderr
