"""Every family held against a tag: it says what a full evaluation says, and ranks."""

from __future__ import annotations

import time
import timeit
from collections.abc import Callable

import pytest
from family_keys import KEYS
from services import service, service_text

from specsheet import packs, tagfile
from specsheet.evaluate import evaluate
from specsheet.evaluate.candidates import Candidate, Verdict
from specsheet.evaluate.shortlist import Shortlist, shortlist
from specsheet.findings import Level
from specsheet.meters import registry

#: findings that every family shares, or that the line makes and no family mends
_SHARED = ("rating", "flange", "design", "hazard", "material", "line-velocity", "family-without")


@pytest.fixture(scope="module")
def water() -> Shortlist:
    return shortlist(service("water", "magnetic"))


def of(found: Shortlist, key: str) -> Candidate:
    return next(item for item in found.candidates if item.profile.key == key)


def test_every_family_is_there_once(water: Shortlist) -> None:
    assert sorted(item.profile.key for item in water.candidates) == sorted(KEYS)


def test_verdicts_come_in_order_and_equations_before_limits(water: Shortlist) -> None:
    order = list(Verdict)
    ranks = [(order.index(c.verdict), not c.by_equations) for c in water.candidates]
    assert ranks == sorted(ranks)


@pytest.mark.parametrize("name", ["water", "compressed air", "steam", "brook"])
def test_the_shortlist_says_what_the_evaluation_says(name: str) -> None:
    for item in shortlist(service(name)).candidates:
        key = item.profile.key
        evaluation = evaluate(service(name, key))
        stops = {f.code for f in evaluation.findings if f.level is Level.STOP}
        own = {code for code in stops if not code.startswith(_SHARED)}
        assert (item.verdict is Verdict.UNFIT) == bool(own), (key, own)
        assert {f.code for f in item.reasons if f.level is Level.STOP} <= stops, key


@pytest.mark.parametrize("key", ["vortex", "coriolis", "orifice_concentric", "turbine_woltman"])
def test_the_figures_are_those_of_the_evaluation(water: Shortlist, key: str) -> None:
    item, evaluation = of(water, key), evaluate(service("water", key))
    smallest, largest = evaluation.points[0].values, evaluation.points[2].values
    assert item.uncertainty == pytest.approx(smallest["uncertainty"].value)
    assert item.loss == pytest.approx(largest["pressure_loss"].value)
    assert item.yearly_energy == pytest.approx(evaluation.summary["yearly_energy"].value)
    assert item.upstream == pytest.approx(evaluation.line["upstream_length"].value)
    assert item.by_equations is (key in registry.MODULES)


def test_what_fits_has_no_reasons_and_what_does_not_says_why(water: Shortlist) -> None:
    for item in water.candidates:
        assert bool(item.reasons) is (item.verdict is not Verdict.FITS)
        levels = {reason.level for reason in item.reasons}
        assert levels <= {Level.STOP} or levels == {Level.CAUTION}


def test_the_reserve_is_a_flow_at_which_the_verdict_changes(water: Shortlist) -> None:
    """Woltman: stop above 5 m/s in DN 100 (common practice), read from the profile."""
    reserve = of(water, "turbine_woltman").reserve
    assert reserve is not None
    limit = next(
        one.high
        for one in packs.profile("turbine_woltman").limits
        if one.high and one.level == "stop"
    )
    velocity = (
        evaluate(service("water", "turbine_woltman")).points[2].values["meter_velocity"].value
    )
    assert reserve.fraction == pytest.approx(limit / float(velocity) - 1.0, rel=1e-6)


def test_what_is_not_known_is_named() -> None:
    found = shortlist(service("boiling water"))
    assert "solids and free gas by volume" in of(found, "ultrasonic_doppler").unknown
    assert "pressure loss" in of(shortlist(service("house water")), "piston_reciprocating").unknown


def test_the_family_of_the_tag_is_judged_as_stated() -> None:
    """A size that is stated is rated, not chosen: 80 m3/h through DN 25 is far too much."""
    stated = tagfile.suppose(service_text("water", "magnetic"), [("meter.size", "DN 25")]).tag
    assert stated is not None
    found = of(shortlist(stated), "magnetic")
    assert (found.size, found.verdict) == ("DN 25", Verdict.UNFIT)


def test_without_a_pipe_no_closed_pipe_family_is_judged() -> None:
    found = shortlist(service("canal"))
    fitting = {c.profile.key for c in found.candidates if c.verdict is not Verdict.UNFIT}
    assert fitting
    assert all("open channel" in packs.profile(key).applies_to for key in fitting)


def test_a_channel_is_told_of_no_missing_pipe_and_a_pressure_line_is(water: Shortlist) -> None:
    assert "line-size-missing" not in {f.code for f in shortlist(service("canal")).findings}
    text = service_text("water").replace('size = "DN 100"\n', "")
    tag = tagfile.loads(text).tag
    assert tag is not None
    found = shortlist(tag)
    assert {item.verdict for item in found.candidates} == {Verdict.UNFIT}
    assert "line-size-missing" in {reason.code for reason in of(found, "tracer_dilution").reasons}
    assert of(water, "tracer_dilution").verdict is not Verdict.UNFIT


def test_without_a_usable_point_nothing_fits_and_the_reason_is_told() -> None:
    tag = tagfile.loads(service_text("water").replace("flow = ", "# flow = ")).tag
    assert tag is not None
    found = shortlist(tag)
    assert {item.verdict for item in found.candidates} == {Verdict.UNFIT}
    assert "flow-missing" in {reason.code for reason in of(found, "vortex").reasons}


@pytest.mark.benchmark
@pytest.mark.parametrize("name", ["water", "steam", "compressed air"])
def test_all_families_cost_less_than_evaluating_each(name: str) -> None:
    """What is shared is derived once, and what is ruled out is not sized (two thirds at most)."""
    tag = service(name)

    def seconds(call: Callable[[], object]) -> float:
        call()
        return min(timeit.repeat(call, timer=time.process_time, number=3, repeat=5)) / 3.0

    whole, single = seconds(lambda: shortlist(tag)), seconds(lambda: evaluate(tag))
    each = len(KEYS) * single
    print(f"{name}: {whole * 1e3:.0f} ms, {whole / each:.2f} of {len(KEYS)} single evaluations")
    assert whole < 0.67 * each
