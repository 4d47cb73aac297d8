"""The JSON contract: keys, SI numbers, origins, findings with their reserve; never a NaN.

The golden file is the contract as others' scripts see it. To record it again after a change that
is meant: ``python -m tests.render.record``; read the difference before it is committed.
"""

from __future__ import annotations

import json
from pathlib import Path

from specsheet.evaluate.result import Check, PointResult, Result
from specsheet.findings import Finding, Level, Origin, Reserve
from specsheet.render import json as sheet_json
from tests.sheet import samples

GOLDEN = Path(__file__).parent / "golden" / "sheet.json"


def test_golden() -> None:
    assert sheet_json.text(samples.evaluation()) == GOLDEN.read_text(encoding="utf-8")


def test_the_document_has_the_parts_of_the_contract() -> None:
    document = json.loads(sheet_json.text(samples.evaluation()))
    assert {
        "schema",
        "tag",
        "family",
        "points",
        "element",
        "base",
        "fluid",
        "limits",
        "findings",
    } <= set(document)
    assert (document["schema"], document["tag"]) == (1, "FT-2104")
    normal = document["points"][1]
    assert normal["name"] == "normal"
    assert normal["values"]["mass_flow"] == {"value": 0.86111, "unit": "kg/s", "origin": "given"}
    assert normal["values"]["density"]["source"] == samples.STEAM
    assert document["element"]["bore_diameter"]["unit"] == "m"


def test_numbers_are_not_rounded() -> None:
    document = sheet_json.document(samples.evaluation())
    assert document["element"]["bore_diameter"]["value"] == 0.0848731


def test_findings_carry_their_reserve() -> None:
    first = sheet_json.document(samples.evaluation())["findings"][0]
    assert first["code"] == "velocity-high"
    assert first["reserve"] == {
        "driver": "mass_flow",
        "at": 1.0394,
        "unit": "kg/s",
        "fraction": -0.1091,
    }


def test_limits_carry_their_reserve_while_they_hold() -> None:
    held = {limit["key"]: limit for limit in sheet_json.document(samples.evaluation())["limits"]}
    assert held["saturation_margin"] == {
        "key": "saturation_margin",
        "point": "normal",
        "value": 14.587,
        "low": 5.0,
        "unit": "K",
        "holds": True,
        "level": "caution",
        "message": "the steam is close to saturation",
        "source": samples.PRACTICE,
        "reserve": {
            "driver": "temperature",
            "at": 448.563,
            "unit": "K",
            "fraction": -0.020926,
        },
    }
    assert held["velocity"]["holds"] is False
    assert "reserve" not in held["diameter_ratio"]


def test_no_number_is_no_key() -> None:
    nan = Result(float("nan"), Origin.DERIVED)
    infinite = Result(float("inf"), Origin.DERIVED)
    point = PointResult("normal", {"sound_speed": nan, "density": infinite})
    finding = Finding(
        Level.NOTE, "x", "", "m", reserve=Reserve("mass_flow", float("inf"), float("inf"))
    )
    bare = Check("velocity", "normal", float("nan"), None, 14.0, True, Level.STOP, "m", "")
    made = sheet_json.document(
        samples.evaluation(points=(point,), findings=(finding,), checks=(bare,))
    )
    assert made["points"][0]["values"] == {}
    assert not {"value", "low", "reserve"} & set(made["limits"][0])
    assert "reserve" not in made["findings"][0]


def test_words_are_values_without_a_unit() -> None:
    values = sheet_json.document(samples.evaluation())["points"][0]["values"]
    assert values["phase"] == {
        "value": "gas",
        "unit": "",
        "origin": "derived",
        "source": samples.STEAM,
    }
