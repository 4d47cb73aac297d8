"""Smallest and largest flow between the limits: the verdict turns there."""

from __future__ import annotations

import pytest
from cli_process import demo_text

from specsheet import tagfile
from specsheet.evaluate import Evaluation, evaluate
from specsheet.evaluate.summary import window
from specsheet.findings import Level


def evaluated(text: str) -> Evaluation:
    tag = tagfile.loads(text).tag
    assert tag is not None
    return evaluate(tag)


def broken(found: Evaluation, mass_flow: float) -> list[str]:
    """Return what a meter as sized says of a normal point at another mass flow."""
    text = demo_text(found.tag.name)
    sized = {key: result.value for key, result in found.element.items()}
    stated = {
        "throat": f"{float(sized['throat_diameter']) * 1e3!r} mm",
        "differential_pressure_range": f"{sized['differential_pressure_range']!r} Pa",
        "second_range": f"{sized['second_range']!r} Pa" if "second_range" in sized else "none",
    }
    changes = [(f"meter.{key}", value) for key, value in stated.items()]
    changes += [
        (f"points.{point}.flow", f"{mass_flow * 3600.0!r} kg/h")
        for point in ("minimum", "normal", "maximum")
    ]
    changes += [
        (f"points.{point}.{key}", value)
        for point in ("minimum", "maximum")
        for key, value in (("pressure", "55 bar(g)"), ("temperature", "142 degC"))
    ]
    tag = tagfile.suppose(text, changes, "", None).tag
    assert tag is not None
    return [check.key for check in evaluate(tag).checks if not check.holds]


@pytest.mark.parametrize(
    ("key", "inside", "outside"), [("lower_range_flow", 1.01, 0.99), ("largest_flow", 0.99, 1.01)]
)
def test_limits_hold_up_to_the_flows_told_and_break_beyond(
    key: str, inside: float, outside: float
) -> None:
    found = evaluated(demo_text("FT-2101"))
    flow = float(found.summary[key].value)
    assert broken(found, flow * inside) == []
    assert broken(found, flow * outside) != []


def test_flows_told_are_the_ends_of_the_window() -> None:
    for name in ("FT-2410", "FT-7105", "FT-9105"):
        found = evaluated(demo_text(name))
        told = tuple(
            float(found.summary[key].value) for key in ("lower_range_flow", "largest_flow")
        )
        assert told == window(found.bands)
        assert float(found.summary["turndown_available"].value) == pytest.approx(told[1] / told[0])


def test_no_flow_is_told_where_no_window_is_left() -> None:
    """The Reynolds number of this Venturi asks for more than its range lets pass."""
    found = evaluated(demo_text("FT-3201"))
    assert float(found.summary["turndown_available"].value) == 0.0
    assert "lower_range_flow" not in found.summary
    assert "largest_flow" not in found.summary
    assert any(item.level is Level.CAUTION for item in found.findings)
