"""The reserve is the flow at which the verdict really flips."""

from dataclasses import replace

import pytest

from specsheet.evaluate import evaluate
from specsheet.quantity import parse
from tests.support.tags import NITROGEN, WATER, point, tag_of

ORIFICE = '[meter]\nbore = "80 mm"\ndifferential_pressure_range = "400 mbar"\n'
# everything that sizing could choose anew is stated: the reserve is that of the meter as sized
RANGED = 'upper_range_value = "{range}"\npulse_output = "{pulse}"\n'
CASES = [
    ("orifice_concentric", WATER, "90 t/h", ORIFICE),
    ("orifice_concentric", NITROGEN, "3 t/h", ORIFICE),
    (
        "venturi_tube",
        WATER,
        "120 t/h",
        '[meter]\nthroat = "80 mm"\ndifferential_pressure_range = "400 mbar"\n',
    ),
    (
        "vortex",
        WATER,
        "120 t/h",
        '[meter]\nsize = "DN 100"\n' + RANGED.format(range="200 t/h", pulse="10 L"),
    ),
    (
        "vortex",
        NITROGEN,
        "3 t/h",
        '[meter]\nsize = "DN 100"\n' + RANGED.format(range="10 t/h", pulse="100 L"),
    ),
    (
        "magnetic",
        WATER + '\nelectrical_conductivity = "400 uS/cm"',
        "90 t/h",
        '[meter]\nsize = "DN 100"\n' + RANGED.format(range="100 t/h", pulse="10 L"),
    ),
    (
        "coriolis",
        WATER,
        "30 t/h",
        '[meter]\nsize = "DN 50"\n' + RANGED.format(range="40 t/h", pulse="10 kg"),
    ),
]


@pytest.mark.parametrize(("family", "fluid", "flow", "meter"), CASES)
def test_verdict_flips_at_the_flow_that_the_reserve_names(family, fluid, flow, meter):
    """Evaluated again just inside and just outside the flow of the reserve, one limit differs."""
    rest = meter + '[require]\nuncertainty = "2 %"\npressure_loss = "100 mbar"\n'
    tag = tag_of(
        point("normal", flow, "8 bar(g)", "20 degC"), family=family, fluid=fluid, rest=rest
    )
    checks = [
        check
        for check in evaluate(tag).checks
        if check.reserve is not None and check.reserve.driver == "mass_flow"
    ]
    assert len(checks) >= 3
    for check in checks:
        below, above = (holds(tag, check, check.reserve.at * factor) for factor in (0.999, 1.001))
        assert below != above, f"{check.key}: no flip at {check.reserve.at} kg/s"


def holds(tag, check, mass_flow):
    flow = parse(f"{mass_flow!r} kg/s", "flow")
    moved = replace(tag.points[0], values={**tag.points[0].values, "flow": flow})
    found = [
        other.holds
        for other in evaluate(replace(tag, points=(moved,))).checks
        if (other.key, other.low, other.high) == (check.key, check.low, check.high)
    ]
    assert len(found) == 1
    return found[0]


def test_reserve_of_a_proportional_limit_is_exact():
    """Velocity is in proportion to flow: the reserve must be bound / value - 1."""
    tag = tag_of(point("normal", "90 t/h", "8 bar(g)", "20 degC"), rest=ORIFICE)
    check = next(item for item in evaluate(tag).checks if item.key == "velocity" and item.high)
    assert check.reserve.fraction == pytest.approx(check.high / check.value - 1.0, rel=1e-6)


def test_reserve_of_differential_pressure_follows_the_square_root():
    """Liquid: dp ~ q2 but for C(Re), so the flow rises by near sqrt(bound / value) (ISO 5167-1)."""
    tag = tag_of(point("normal", "60 t/h", "8 bar(g)", "20 degC"), rest=ORIFICE)
    check = next(
        item
        for item in evaluate(tag).checks
        if item.key in ("differential_pressure", "signal_fraction") and item.high
    )
    expected = (check.high / check.value) ** 0.5
    assert 1.0 + check.reserve.fraction == pytest.approx(expected, rel=5e-3)


def test_limit_that_no_flow_in_four_decades_crosses_has_no_reserve():
    tag = tag_of(point("normal", "90 t/h", "8 bar(g)", "20 degC"), rest=ORIFICE)
    for check in evaluate(tag).checks:
        if check.reserve is not None and check.reserve.driver == "mass_flow":
            assert -0.99 <= check.reserve.fraction <= 99.0


def test_a_limit_does_not_flip_where_no_flow_is_possible_any_more():
    """Beyond choking nothing has a value: only the limit on the pressure ratio ends before that."""
    tag = tag_of(
        point("normal", "3 t/h", "8 bar(g)", "20 degC"),
        family="orifice_concentric",
        fluid=NITROGEN,
        rest=ORIFICE,
    )
    evaluation = evaluate(tag)
    bands = {(band.key, bool(band.least)): band for band in evaluation.bands}
    end = bands["pressure_ratio", True].high
    assert bands["signal_fraction", True].high is None  # above the cut-off, up to any flow
    assert differential_pressure(tag, end) is not None
    assert differential_pressure(tag, 10.0 * end) is None


def differential_pressure(tag, mass_flow):
    """Return the differential pressure at another flow [Pa], None where there is none."""
    flow = parse(f"{mass_flow!r} kg/s", "flow")
    moved = replace(tag.points[0], values={**tag.points[0].values, "flow": flow})
    found = evaluate(replace(tag, points=(moved,))).points[0].values.get("differential_pressure")
    return None if found is None else found.value
