"""Combination of uncertainties against JCGM 100:2008 and Monte Carlo runs."""

import numpy as np
import pytest
from scipy import stats

from specsheet.methods.gum import TWO_SIGMA, combine, coverage_factor

INFINITE = float("inf")

# JCGM 100:2008, H.1 (end gauge): standard uncertainty [nm] and degrees of freedom
H1 = [(25.0, 18), (5.8, 24), (3.9, 5), (6.7, 8), (16.599, 2), (2.88679, 50)]

# JCGM 100:2008, table H.2: voltage [V], current [A], phase [rad]
VOLTAGE = np.array([5.007, 4.994, 5.005, 4.990, 4.999])
CURRENT = np.array([19.663, 19.639, 19.640, 19.685, 19.678]) / 1000
PHASE = np.array([1.0456, 1.0438, 1.0468, 1.0428, 1.0433])

# JCGM 100:2008, table H.6: thermometer reading and correction [degC]
READING = np.array(
    [21.521, 22.012, 22.512, 23.003, 23.507, 23.999, 24.513, 25.002, 25.503, 26.010, 26.511]
)
CORRECTION = -np.array(
    [0.171, 0.169, 0.166, 0.159, 0.164, 0.165, 0.156, 0.157, 0.159, 0.161, 0.160]
)


def test_end_gauge():
    """JCGM 100:2008, H.1: uc = 32 nm, 16 degrees of freedom, U99 = 93 nm with k = 2.92."""
    parts, freedom = zip(*H1, strict=True)
    found = combine(np.array(parts)[:, np.newaxis], freedom, level=0.99)
    assert found.standard[0] == pytest.approx(32.0, rel=0.02)
    assert int(found.freedom[0]) == 16
    assert found.coverage[0] == pytest.approx(2.92, abs=0.005)
    assert found.expanded[0] == pytest.approx(93.0, rel=0.02)


def test_welch_satterthwaite():
    """JCGM 100:2008, G.4.1, example 2: product of three, uc/y = 1.03 %, 19.0 degrees of freedom."""
    found = combine([[0.25], [0.57], [0.82]], [9, 4, 14], level=0.95)
    assert found.standard[0] == pytest.approx(1.03, abs=0.005)
    assert found.freedom[0] == pytest.approx(19.0, abs=0.05)
    assert found.coverage[0] == pytest.approx(2.09, abs=0.005)


def _correlation(*samples):
    return np.corrcoef(np.array(samples))


def _standard_of_mean(samples):
    return np.std(samples, ddof=1) / np.sqrt(len(samples))


@pytest.mark.parametrize(
    ("quantity", "printed"), [("resistance", 0.071), ("reactance", 0.295), ("impedance", 0.236)]
)
def test_correlated_inputs(quantity, printed):
    """JCGM 100:2008, H.2, table H.4: u(R) = 0.071, u(X) = 0.295, u(Z) = 0.236 ohm."""
    voltage, current, phase = VOLTAGE.mean(), CURRENT.mean(), PHASE.mean()
    impedance = voltage / current
    along, across = {
        "resistance": (np.cos(phase), -np.sin(phase)),
        "reactance": (np.sin(phase), np.cos(phase)),
        "impedance": (1.0, 0.0),
    }[quantity]
    sensitivity = np.array([along / current, -along * impedance / current, across * impedance])
    standard = np.array([_standard_of_mean(item) for item in (VOLTAGE, CURRENT, PHASE)])
    found = combine(
        (sensitivity * standard)[:, np.newaxis],
        [INFINITE] * 3,
        correlation=_correlation(VOLTAGE, CURRENT, PHASE),
    )
    assert found.standard[0] == pytest.approx(printed, abs=0.0006)


def test_calibration_line():
    """JCGM 100:2008, H.3: y1 = -0.1712, y2 = 0.00218, r = -0.930, u(b(30)) = 0.0041 degC."""
    deviation = READING - 20.0
    fit, covariance = np.polyfit(deviation, CORRECTION, 1, cov=True)
    slope, intercept = fit
    assert intercept == pytest.approx(-0.1712, abs=5e-5)
    assert slope == pytest.approx(0.00218, abs=5e-6)
    standard = np.sqrt(np.diag(covariance))
    coefficient = covariance[0, 1] / (standard[0] * standard[1])
    assert coefficient == pytest.approx(-0.930, abs=5e-4)
    found = combine(
        [[10.0 * standard[0]], [standard[1]]],
        [INFINITE, INFINITE],
        correlation=[[1.0, coefficient], [coefficient, 1.0]],
    )
    assert found.standard[0] == pytest.approx(0.0041, abs=5e-5)


@pytest.mark.parametrize(
    ("freedom", "level", "printed"),
    [
        # JCGM 100:2008, table G.2 (from memory)
        (1, 0.95, 12.71), (2, 0.95, 4.30), (3, 0.95, 3.18), (5, 0.95, 2.57), (10, 0.95, 2.23),
        (1, 0.9545, 13.97), (2, 0.9545, 4.53), (4, 0.9545, 2.87), (8, 0.9545, 2.37),
        (20, 0.9545, 2.13), (50, 0.9545, 2.05), (INFINITE, 0.9545, 2.00), (INFINITE, 0.95, 1.96),
        (16, 0.99, 2.92),
    ],
)  # fmt: skip
def test_printed_coverage_factors(freedom, level, printed):
    assert coverage_factor(freedom, level=level) == pytest.approx(printed, abs=0.0051)


@pytest.mark.parametrize("level", [0.6827, 0.90, 0.95, TWO_SIGMA, 0.99, 0.9973])
def test_coverage_agrees_with_an_independent_library(level):
    """``scipy.stats.t``, on both sides of the change from the exact series to the expansion."""
    freedom = np.array([1, 2, 3, 4, 5, 7, 10, 19, 30, 39, 40, 41, 42, 60, 100, 1000, 1e6])
    expected = stats.t.ppf(0.5 * (1 + level), freedom)
    assert coverage_factor(freedom, level=level) == pytest.approx(expected, rel=2e-7)


def test_freedom_is_truncated_not_rounded():
    """JCGM 100:2008, G.4.1: the figure, printed to one decimal, loses its decimals (16.7: 16)."""
    whole = coverage_factor([16.0, 16.7, 16.94, 16.96, 17.0])
    assert whole[0] == whole[1] == whole[2]
    assert whole[3] == whole[4] < whole[0]


def test_every_condition_is_combined_on_its_own():
    parts = np.array([[0.3, 0.0, 0.0, 3.0], [0.4, 0.5, 0.0, 4.0]])
    found = combine(parts, [INFINITE, 9])
    assert found.standard == pytest.approx([0.5, 0.5, 0.0, 5.0])
    assert found.freedom[1] == pytest.approx(9.0)
    assert found.freedom[2] == INFINITE
    assert found.freedom[0] == pytest.approx(9 * 0.5**4 / 0.4**4)
    assert found.freedom[3] == pytest.approx(found.freedom[0])
    assert found.expanded == pytest.approx(found.coverage * found.standard)


def test_full_correlation_adds_and_opposite_correlation_cancels():
    """JCGM 100:2008, 5.2.2, note 1: with r = 1 the contributions add."""
    ones = np.ones((2, 2))
    assert combine([[3.0], [4.0]], [INFINITE] * 2, correlation=ones).standard[0] == pytest.approx(7)
    assert combine([[3.0], [-3.0]], [INFINITE] * 2, correlation=ones).standard[0] == 0.0
    none = np.eye(2)
    assert combine([[3.0], [4.0]], [INFINITE] * 2, correlation=none).standard[0] == pytest.approx(5)


def test_monte_carlo_of_a_flow_equation():
    """q = C d^2 sqrt(dp rho): a run of 400 000 agrees within its own sampling error."""
    generator = np.random.default_rng(20260)
    number = 400_000
    relative = {"C": (0.0030, 1.0), "d": (0.0004, 2.0), "dp": (0.0050, 0.5), "rho": (0.0040, 0.5)}
    flow = np.ones(number)
    for standard, power in relative.values():
        flow *= (1.0 + standard * generator.standard_normal(number)) ** power
    parts = [[standard * power] for standard, power in relative.values()]
    found = combine(parts, [INFINITE] * len(parts))
    spread = flow.std() / flow.mean()
    assert spread == pytest.approx(found.standard[0], rel=4.0 / np.sqrt(2 * number))
    inside = np.mean(np.abs(flow / flow.mean() - 1.0) <= found.expanded[0])
    assert inside == pytest.approx(TWO_SIGMA, abs=4 * np.sqrt(TWO_SIGMA * 0.0455 / number))


def test_monte_carlo_of_few_observations():
    """Means of 5 and of 8 readings: the interval holds the truth as often as its level says.

    The formula of Welch and Satterthwaite is an approximation, good to about 1 % here; the plain
    factor 2 would hold it visibly less often.
    """
    generator = np.random.default_rng(777)
    runs = 40_000
    first = generator.normal(0.0, 1.0, (5, runs))
    second = generator.normal(0.0, 1.5, (8, runs))
    parts = np.array([first.std(axis=0, ddof=1) / 5**0.5, second.std(axis=0, ddof=1) / 8**0.5])
    found = combine(parts, [4, 7])
    error = np.abs(first.mean(axis=0) + second.mean(axis=0))
    assert np.mean(error <= found.expanded) == pytest.approx(TWO_SIGMA, abs=0.01)
    assert np.mean(error <= 2.0 * found.standard) < TWO_SIGMA - 0.01


@pytest.mark.parametrize(
    "arguments",
    [
        {"relative": [[1.0], [2.0]], "freedom": [5]},
        {"relative": [[1.0]], "freedom": [0.5]},
        {"relative": [[1.0]], "freedom": [5], "correlation": [[1.0]]},
        {"relative": [[1.0]], "freedom": [INFINITE], "correlation": np.eye(2)},
        {"relative": [[1.0]], "freedom": [INFINITE], "level": 1.0},
    ],
)
def test_our_own_mistakes_are_refused(arguments):
    with pytest.raises(ValueError, match=r"freedom|correlation|level"):
        combine(**arguments)
