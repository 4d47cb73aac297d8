"""Random fluids and conditions, within and around the limits, from a seeded generator."""

from __future__ import annotations

import math
import random

from specsheet.fluid import names, solutes
from specsheet.fluid.backends.mixture import AIR, Mixture
from specsheet.fluid.backends.petroleum import Petroleum
from specsheet.fluid.backends.pure import Pure
from specsheet.fluid.backends.seawater import Seawater
from specsheet.fluid.backends.slurry import Slurry
from specsheet.fluid.backends.solution import Solution
from specsheet.fluid.backends.water import Water
from specsheet.fluid.backends.wet_gas import WetGas
from specsheet.fluid.model import Condition, Fluid
from specsheet.fluid.state import State

#: keys whose values must be above zero whatever the state
POSITIVE = (
    "density",
    "viscosity",
    "kinematic_viscosity",
    "sound_speed",
    "heat_capacity",
    "thermal_conductivity",
    "compressibility",
    "isentropic_exponent",
    "vapour_pressure",
    "saturation_temperature",
    "dew_temperature",
)

_GASES = (
    "methane",
    "ethane",
    "propane",
    "n_butane",
    "n_pentane",
    "n_hexane",
    "nitrogen",
    "carbon_dioxide",
    "hydrogen_sulfide",
    "hydrogen",
    "carbon_monoxide",
    "oxygen",
    "argon",
    "water",
    "ammonia",
    "sulfur_dioxide",
)


def fluid(choose: random.Random) -> Fluid:
    """Return a random fluid of any kind."""
    phase = choose.choice(("gas", "liquid"))
    kind = choose.randrange(9)
    if kind == 0:
        return Water(phase)
    if kind in (1, 2):
        return Pure(choose.choice([key for key in names.substances() if key != "water"]), phase)
    if kind == 3:
        item = choose.choice(list(solutes.solutes().values()))
        return Solution(item.key, choose.uniform(0.0, 1.2 * item.highest_fraction), "liquid")
    if kind == 4:
        viscosities = ((313.15, choose.uniform(2, 500) * 1e-6), (373.15, 1.5e-6))
        product = choose.choice(("crude", "fuel oil", "gasoline", "lubricating oil"))
        return Petroleum(product, choose.uniform(650, 1100), viscosities, "liquid")
    if kind == 5:
        return Seawater(choose.uniform(0.0, 0.14), "liquid")
    if kind == 6:
        return WetGas(AIR, choose.random(), Condition(298.15, 101325.0))
    if kind == 7:
        return Slurry(Water("liquid"), choose.uniform(1100, 4000), choose.uniform(0, 0.6), None)
    return Mixture(composition(choose), phase)


def composition(choose: random.Random) -> tuple[tuple[str, float], ...]:
    """Return a random composition of two to six components."""
    keys = choose.sample(_GASES, choose.randint(2, 6))
    weights = [choose.random() ** 3 + 1e-4 for _ in keys]
    total = sum(weights)
    return tuple((key, weight / total) for key, weight in zip(keys, weights, strict=True))


def condition(choose: random.Random) -> Condition:
    """Return a random condition: mostly a plant's, sometimes far from any."""
    if choose.random() < 0.1:
        values = (0.0, -1.0, math.nan, math.inf, 1e-9, 1e9, 1e5, 300.0)
        return Condition(choose.choice(values), choose.choice(values))
    temperature = choose.uniform(150.0, 900.0)
    pressure = 10 ** choose.uniform(3.0, 8.3)
    left_out = choose.random()
    if left_out < 0.05:
        return Condition(None, pressure)
    if left_out < 0.10:
        return Condition(temperature, None, choose.uniform(-0.2, 1.2))
    return Condition(temperature, pressure)


def faults(state: State) -> list[str]:
    """Return what is not physical about a state that no finding warns of."""
    found = []
    for key, item in state.properties.items():
        if not math.isfinite(item.value) or (key in POSITIVE and item.value <= 0.0):
            found.append(f"{key} is {item.value}")
    density = state.value("density")
    if density is not None and not 1e-6 < density < 2.5e4:
        found.append(f"density {density}")
    sound = state.value("sound_speed")
    kappa = state.value("isentropic_exponent")
    wet = state.value("dryness_fraction") is not None
    if density is not None and sound is not None and kappa is not None and not wet:
        off = kappa * state.pressure / (density * sound**2) - 1.0
        if abs(off) > 1e-6:
            found.append(f"isentropic exponent off by {off}")
    return found
