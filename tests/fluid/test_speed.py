"""Ratios of speed in one run: our states against plain calls of the fluid library."""

from __future__ import annotations

import subprocess
import sys
import time
from collections.abc import Callable

import pytest
from fluid_tags import point, tag

from specsheet import fluid
from specsheet.fluid import (
    dew_curve,
    evaluate,
    library,
    mixture_phase,
    mixture_transport,
    names,
)
from specsheet.fluid.backends.mixture import Mixture
from specsheet.fluid.backends.pure import Pure
from specsheet.fluid.backends.water import Water
from specsheet.fluid.model import Condition, Fluid

pytestmark = pytest.mark.benchmark

#: a state has these and three more (kinematic viscosity, Z, isentropic exponent) that take the same
WANTED = ("D", "V", "A", "C", "L", "H", "V", "D", "D", "D", "A")
FIVE = Mixture(
    (
        ("methane", 0.90),
        ("ethane", 0.05),
        ("propane", 0.03),
        ("n_butane", 0.01),
        ("nitrogen", 0.01),
    ),
    "gas",
)


def conditions(pressure: float, low: float, high: float) -> list[Condition]:
    return [Condition(low + (high - low) * i / 19, pressure + 10.0 * i) for i in range(20)]


def forget() -> None:
    """Drop every cached figure, but keep the state objects, as after a warm-up."""
    evaluate._state.cache_clear()
    for cached in (
        mixture_transport.dilute_viscosity,
        mixture_transport.dilute_conductivity,
        dew_curve._found,
        mixture_phase._wilson,
    ):
        cached.cache_clear()


def best(action: Callable[[], object]) -> float:
    """Return the shortest of thirty runs [s]: others share the machine."""
    times = []
    for _ in range(30):
        forget()
        start = time.perf_counter()
        action()
        times.append(time.perf_counter() - start)
    return min(times)


def states(what: Fluid, where: list[Condition]) -> float:
    return best(lambda: [evaluate.state(what, condition) for condition in where])


def plain(name: str, where: list[Condition]) -> float:
    """Return the time of the same values by plain calls of the library, each value by itself."""
    module = library.fluids()

    def run() -> None:
        for at in where:
            for key in WANTED:
                module.PropsSI(key, "T", at.temperature, "P", at.pressure, name)
            module.PropsSI("P", "T", at.temperature, "Q", 0, name)
            module.PropsSI("T", "P", at.pressure, "Q", 0, name)

    return best(run)


def test_steam() -> None:
    where = conditions(8e5, 450.0, 600.0)
    ours = states(Water("gas"), where)
    assert ours / plain("IF97::Water", where) <= 0.5


def test_pure_gas() -> None:
    where = conditions(8e5, 290.0, 301.0)
    ours = states(Pure("carbon_dioxide", "gas"), where)
    assert ours / plain("CarbonDioxide", where) <= 0.5


def test_five_component_gas() -> None:
    """The library's own blind flash, for density alone, is the measure."""
    where = conditions(11e5, 315.0, 335.0)
    ours = states(FIVE, where)
    table = names.substances()
    module = library.fluids()
    state = module.AbstractState(
        "HEOS", "&".join(table[key].equation for key, _ in FIVE.composition)
    )
    state.set_mole_fractions([fraction for _, fraction in FIVE.composition])

    def blind() -> None:
        state.update(module.PT_INPUTS, where[0].pressure, where[0].temperature)

    assert ours / (20.0 * best(blind)) <= 0.1


def test_the_first_state_near_the_dew_point_is_cheaper_than_one_blind_flash() -> None:
    """The library's own blind flash at the same state, for density alone, is the measure."""
    table = names.substances()
    module = library.fluids()
    blind = module.AbstractState(
        "HEOS", "&".join(table[key].equation for key, _ in FIVE.composition)
    )
    blind.set_mole_fractions([fraction for _, fraction in FIVE.composition])
    near = Condition(248.0, 60e5)
    ours = best(lambda: evaluate.state(FIVE, near))
    theirs = best(lambda: blind.update(module.PT_INPUTS, near.pressure, near.temperature))
    assert ours / theirs <= 0.7


def test_near_its_dew_point_a_gas_costs_little_more_than_far_from_it() -> None:
    """Once the dew curve of the composition is followed, as after the first state."""
    far = conditions(11e5, 315.0, 335.0)
    near = conditions(60e5, 248.0, 255.0)

    def run(where: list[Condition]) -> float:
        times = []
        for _ in range(20):
            evaluate._state.cache_clear()
            mixture_transport.dilute_viscosity.cache_clear()
            mixture_transport.dilute_conductivity.cache_clear()
            start = time.perf_counter()
            outcomes = [evaluate.state(FIVE, condition) for condition in where]
            times.append(time.perf_counter() - start)
            assert all(outcome.state and outcome.state.phase == "gas" for outcome in outcomes)
        return min(times)

    assert run(near) / run(far) <= 2.5


def test_a_whole_tag_again_is_nearly_free() -> None:
    text = 'kind = "substance"\nsubstance = "steam"\nphase = "gas"'
    stated = tag(text, point("7 bar(g)", "185 degC"), point("7 bar(g)", "175 degC", "minimum"))
    fluid.derive(stated)
    again = best(lambda: fluid.derive(stated))
    where = [Condition(458.15, 8e5), Condition(448.15, 8e5)]
    assert again / plain("IF97::Water", where) <= 3.0


def test_cold_start_for_water_needs_a_fraction_of_the_library() -> None:
    def run(code: str) -> float:
        times = []
        for _ in range(3):
            start = time.perf_counter()
            subprocess.run([sys.executable, "-c", code], check=True)
            times.append(time.perf_counter() - start)
        return min(times)

    head = (
        "from specsheet.fluid import evaluate\n"
        "from specsheet.fluid.model import Condition\n"
        "from specsheet.fluid.backends.{} import {}\n"
        "evaluate.state({}, Condition(450.0, 8e5))\n"
    )
    bare = run("import specsheet.fluid.evaluate, numpy")
    water = run(head.format("water", "Water", "Water('gas')")) - bare
    full = run(head.format("pure", "Pure", "Pure('methane', 'gas')")) - bare
    assert water / full <= 0.3
