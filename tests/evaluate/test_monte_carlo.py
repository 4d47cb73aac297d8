"""The budget against a simulation of the whole flow equation (JCGM 101:2008).

Every quantity of ISO 5167-1, equation 1, is drawn from a normal distribution, the flow is worked
out anew each time, and its spread is held beside the budget's combined standard uncertainty. A
standard deviation from N draws is itself uncertain by 1 / sqrt(2 N) (from memory): the two must
agree within four of those and the terms of second order that the budget leaves out.
"""

from __future__ import annotations

import math

import numpy as np
import pytest
from fluids import flow_meter

from specsheet.evaluate import evaluate
from specsheet.evaluate.result import Evaluation
from tests.support.tags import NITROGEN, point, tag_of

DRAWS = 20_000
#: shares whose sources the simulation draws, by key of the budget
PARTS = (
    *("discharge_coefficient", "expansibility", "inside_diameter", "bore_diameter", "density"),
    *("pressure", "temperature"),
)
REST = '[require]\npressure_uncertainty = "1 %"\ntemperature_uncertainty = "2 K"\n'


@pytest.fixture(scope="module")
def orifice() -> Evaluation:
    """A gas through an orifice plate, from a tenth of the differential pressure upwards."""
    return evaluate(
        tag_of(
            point("minimum", "0.8 t/h", "6 bar(g)", "25 degC"),
            point("normal", "2 t/h", "6 bar(g)", "25 degC"),
            family="orifice_concentric",
            fluid=NITROGEN,
            line='size = "DN 100"\nupstream_length = "60 D"\ndownstream_length = "15 D"',
            rest=REST,
        )
    )


def shares(evaluation: Evaluation, lane: int) -> dict[str, float]:
    return {line.key: line.relative[lane] for line in evaluation.budget}


def simulated(evaluation: Evaluation, lane: int, seed: int) -> float:
    """Return the relative standard deviation of the flow, every quantity drawn."""
    values = {
        key: float(found.value)
        for key, found in evaluation.points[lane].values.items()
        if not isinstance(found.value, str)
    }
    share = shares(evaluation, lane)
    beta = values["diameter_ratio"]
    inside = float(evaluation.element["inside_diameter_hot"].value)
    generator = np.random.default_rng(seed)

    def drawn(value: float, relative: float) -> np.ndarray:
        return value * (1.0 + relative * generator.standard_normal(DRAWS))

    # what a diameter must be uncertain by, from ISO 5167-1:2003, 8.2.2.1
    by_bore, by_pipe = 2.0 / (1.0 - beta**4), 2.0 * beta**4 / (1.0 - beta**4)
    bore = drawn(beta * inside, share["bore_diameter"] / by_bore)
    pipe = drawn(inside, share["inside_diameter"] / by_pipe)
    pressure = drawn(values["pressure"], 0.01 / 2.0)
    temperature = values["temperature"] + 2.0 / 2.0 * generator.standard_normal(DRAWS)
    # the density follows the measured pressure and temperature as in an ideal gas
    density = drawn(values["density"], 2.0 * share["density"])
    density *= pressure / values["pressure"] * values["temperature"] / temperature
    transmitter = math.sqrt(sum(u**2 for key, u in share.items() if key not in PARTS))
    drop = drawn(values["differential_pressure"], 2.0 * transmitter)
    ratio = bore / pipe
    coefficient = drawn(values["discharge_coefficient"], share["discharge_coefficient"])
    expansibility = drawn(1.0, share["expansibility"]) * flow_meter.orifice_expansibility(
        D=pipe,
        Do=bore,
        P1=values["pressure"],
        P2=values["pressure"] - drop,
        k=values["isentropic_exponent"],
    )
    velocity_of_approach = 1.0 / np.sqrt(1.0 - ratio**4)
    area = math.pi / 4.0 * bore**2
    flow = coefficient * velocity_of_approach * expansibility * area * np.sqrt(2 * drop * density)
    assert np.mean(flow) == pytest.approx(values["mass_flow"], rel=2e-3)
    return float(np.std(flow) / np.mean(flow))


@pytest.mark.parametrize("lane", [0, 1])
def test_the_simulation_agrees_with_the_budget(orifice: Evaluation, lane: int) -> None:
    combined = math.sqrt(sum(relative**2 for relative in shares(orifice, lane).values()))
    own_error = 1.0 / math.sqrt(2.0 * DRAWS)
    assert simulated(orifice, lane, seed=20310304) == pytest.approx(
        combined, rel=4.0 * own_error + 0.01
    )


def test_the_transmitter_weighs_more_at_the_smallest_flow(orifice: Evaluation) -> None:
    """Its error is a share of span: at 0.4 of the flow it weighs (1 / 0.4)² times as much."""
    low, high = (shares(orifice, lane)["transmitter_accuracy"] for lane in (0, 1))
    assert low / high == pytest.approx(1.0 / 0.4**2, rel=0.02)


def test_every_source_of_the_budget_is_there(orifice: Evaluation) -> None:
    assert set(PARTS) <= set(shares(orifice, 0))
