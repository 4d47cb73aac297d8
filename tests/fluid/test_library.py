"""The fluid library: loaded late, silently, and never heard in its own words."""

from __future__ import annotations

import subprocess
import sys
import textwrap

import pytest

from specsheet.fluid import evaluate
from specsheet.fluid.backends.mixture import Mixture
from specsheet.fluid.backends.pure import Pure
from specsheet.fluid.errors import translate
from specsheet.fluid.model import Condition


def run(code: str) -> subprocess.CompletedProcess[str]:
    return subprocess.run(
        [sys.executable, "-c", textwrap.dedent(code)], capture_output=True, text=True, check=True
    )


def test_package_loads_neither_numpy_nor_the_library() -> None:
    found = run(
        """
        import sys
        import specsheet.fluid
        print([name for name in ("numpy", "CoolProp") if name in sys.modules])
        """
    )
    assert found.stdout.strip() == "[]"


def test_water_and_solutions_need_no_library_of_fluids() -> None:
    found = run(
        """
        from specsheet.fluid import library
        def forbidden():
            raise AssertionError("loaded")
        library.fluids = forbidden
        from specsheet.fluid import evaluate
        from specsheet.fluid.backends.seawater import Seawater
        from specsheet.fluid.backends.solution import Solution
        from specsheet.fluid.backends.water import Water
        from specsheet.fluid.model import Condition
        here = Condition(300.0, 2e5)
        for fluid in (
            Water("liquid"), Seawater(0.035, "liquid"), Solution("ethylene_glycol", 0.3, "liquid"),
            Solution("sodium_hydroxide", 0.3, "liquid"),
        ):
            assert evaluate.state(fluid, here).state is not None
        print("fine")
        """
    )
    assert found.stdout.strip() == "fine"
    assert found.stderr == ""


def test_nothing_is_printed_and_the_environment_is_left_alone() -> None:
    found = run(
        """
        import os
        before = dict(os.environ)
        from specsheet.fluid import evaluate
        from specsheet.fluid.backends.pure import Pure
        from specsheet.fluid.model import Condition
        assert evaluate.state(Pure("methane", "gas"), Condition(300.0, 1e5)).state is not None
        assert dict(os.environ) == before
        print("fine")
        """
    )
    assert found.stdout == "fine\n"
    assert found.stderr == ""


@pytest.mark.parametrize(
    ("text", "code"),
    [
        ("For now, we don't support T [200 K] below Tmelt(p) [273.153 K]", "frozen"),
        ("p [100000 Pa] below ptriple [517964 Pa] when T [190] is less than Tmin", "frozen"),
        ("Saturation pressure [1 Pa] corresponding to T [2 K] is within 1e-4 %", "on-saturation"),
        ("Two-phase inputs not supported for pseudo-pure for now", "on-saturation"),
        ("Could not match the binary pair [1,2]", "mixture-pair"),
        ("solver_rho_Tp was unable to find a solution", "fluid-no-state"),
        ("", "fluid-no-state"),
    ],
)
def test_messages_are_put_into_our_words(text: str, code: str) -> None:
    found = translate(ValueError(text), "the gas", 300.0, 1e5)
    assert found.code == code
    assert not text or text not in found.message
    for word in ("solver", "Tmelt", "ptriple", "CoolProp", "[", "nan"):
        assert word not in found.message


def test_a_failure_leaves_no_trace_in_the_next_state() -> None:
    """State objects keep the wreck of a failed update; they must be renewed."""
    good = Condition(300.0, 5e5)
    before = evaluate.state(Pure("carbon_dioxide", "gas"), good).state
    assert evaluate.state(Pure("carbon_dioxide", "gas"), Condition(190.0, 1e5)).state is None
    evaluate._state.cache_clear()
    after = evaluate.state(Pure("carbon_dioxide", "gas"), good).state
    assert before is not None
    assert after is not None
    assert after.properties == before.properties


def test_states_of_two_compositions_do_not_mix() -> None:
    """Compositions of the same components share a state object: fractions are set each time."""
    here = Condition(300.0, 5e5)
    lean = Mixture((("methane", 0.9), ("carbon_dioxide", 0.1)), "gas")
    rich = Mixture((("methane", 0.1), ("carbon_dioxide", 0.9)), "gas")
    first = evaluate.state(lean, here).state
    evaluate.state(rich, here)
    evaluate._state.cache_clear()
    again = evaluate.state(lean, here).state
    assert first is not None
    assert again is not None
    assert first.value("density") == again.value("density")
