"""Modules loaded at their first use: once each, whoever comes first."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

from specsheet.tui.late import late

ROOT = Path(__file__).parents[2]

#: the classes that a refusal is known by, as the form comes to them: through a stand-in first
_ONE_CLASS = """
from specsheet.tui.values import entry_at, refusal
entry = entry_at("vortex", "line.size")
assert refusal(entry, "line.size", "abc"), "a text that is no size was taken"
from specsheet import quantity
from specsheet.tagfile import values
assert quantity.Refusal is values.Refusal
"""


def test_a_module_is_loaded_at_the_first_look_and_once() -> None:
    done = subprocess.run(
        [sys.executable, "-c", _ONE_CLASS], cwd=ROOT, capture_output=True, text=True, check=False
    )
    assert (done.returncode, done.stderr) == (0, "")


def test_what_a_module_holds_is_found_in_it() -> None:
    import fractions

    assert late("fractions").Fraction is fractions.Fraction
