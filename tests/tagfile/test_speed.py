"""How much slower a tag is read than its TOML alone, in one run."""

from __future__ import annotations

import time
import tomllib
from collections.abc import Callable

import pytest

from specsheet import tagfile

POINT = """
[[points]]
name = "point {0}"
flow = "{0}.5 t/h"
pressure = "7.0 bar(g)"
temperature = "185 degC"
"""
TEXT = """\
schema = 1
tag = "FT-{0}"
service = "Steam to header {0}"
family = "vortex"
[fluid]
kind = "substance"
substance = "water"
phase = "gas"
[line]
size = "DN 150"
schedule = "40"
upstream_length = "22 D"
[design]
pressure = "12 bar(g)"
temperature = "220 degC"
[require]
uncertainty = "1.5 %"
"""


def seconds(work: Callable[[str], object], texts: list[str]) -> float:
    """Return the best of three runs over all texts."""
    best = float("inf")
    for _ in range(3):
        start = time.perf_counter()
        for text in texts:
            work(text)
        best = min(best, time.perf_counter() - start)
    return best


@pytest.mark.benchmark
def test_reading_two_hundred_tags() -> None:
    texts = [
        TEXT.replace("{0}", str(n)) + "".join(POINT.replace("{0}", str(k)) for k in range(1, 4))
        for n in range(200)
    ]
    assert tagfile.loads(texts[0]).problems == ()
    toml, tags = seconds(tomllib.loads, texts), seconds(tagfile.loads, texts)
    print(f"\n{tags / 200 * 1e3:.2f} ms a tag, {tags / toml:.1f} times its TOML alone")
    assert tags / toml < 4
