"""A stated seal goes all the way: file, check, text, JSON."""

from __future__ import annotations

import json
from pathlib import Path

from cli_process import demo_text, run


def test_a_stated_seal_goes_all_the_way(tmp_path: Path) -> None:
    """Heavy fuel oil, designed for 130 °C: NBR bears 100 °C (common practice, no source)."""
    path = tmp_path / "FT-2415.toml"
    stated = demo_text("FT-2415").replace("[require]", '[require]\nseal_material = "NBR"')
    path.write_text(stated, encoding="utf-8")
    checked = run("check", path)
    assert checked.returncode == 1
    assert "require.seal_material" in checked.stdout + checked.stderr
    assert "NBR: 130 °C is wanted, it bears up to 100 °C" in checked.stdout + checked.stderr
    derived = run("derive", path).stdout
    assert "NBR: -30 to 100 °C" in derived
    held = json.loads(run("derive", path, "--json").stdout)["line"]["seal_material"]
    assert (held["value"], held["origin"]) == ("NBR", "given")
