"""What makes the density uncertain reaches the flow with the exponent of the family."""

import math

import pytest

from specsheet.evaluate import evaluate
from tests.support.tags import NITROGEN, WATER, point, tag_of

#: exponent of the mass flow by density: a differential pressure gives its root (ISO 5167-1,
#: equation 1), a velocity its first power, a mass meter none
EXPONENTS = [("orifice_concentric", 0.5), ("vortex", 1.0), ("coriolis", 0.0)]


def shares(tag, index=0):
    return {line.key: line.relative[index] for line in evaluate(tag).budget}


@pytest.mark.parametrize(("family", "exponent"), EXPONENTS)
def test_measured_pressure_and_temperature_of_a_gas(family, exponent):
    rest = '[require]\npressure_uncertainty = "1 %"\ntemperature_uncertainty = "3 K"\n'
    tag = tag_of(
        point("normal", "2 t/h", "6 bar(g)", "26.85 degC"), family=family, fluid=NITROGEN, rest=rest
    )
    found = shares(tag)
    assert found.get("pressure", 0.0) == pytest.approx(exponent * 0.005, rel=1e-9)
    assert found.get("temperature", 0.0) == pytest.approx(exponent * 1.5 / 300.0, rel=1e-9)


def test_liquid_has_no_such_share():
    found = shares(tag_of(point("normal", "60 t/h", "6 bar(g)", "25 degC"), fluid=WATER))
    assert not {"pressure", "temperature"} & set(found)


@pytest.mark.parametrize(("family", "exponent"), EXPONENTS[:2])
def test_gas_without_compensation_carries_the_change_of_its_density(family, exponent):
    """6 to 8 bar(a) at one temperature: nitrogen's density changes as the pressure within 0.1 %.

    A deviation that may lie anywhere up to a bound has the standard uncertainty bound / sqrt(3)
    (JCGM 100:2008, 4.3.7).
    """
    tag = tag_of(
        point("normal", "2 t/h", "8 bar(a)", "20 degC"),
        point("maximum", "2.5 t/h", "6 bar(a)", "20 degC"),
        family=family,
        fluid=NITROGEN,
        rest='[require]\ncompensation = "none"\n',
    )
    assert shares(tag, 0)["compensation"] == pytest.approx(0.0, abs=1e-12)
    assert shares(tag, 1)["compensation"] == pytest.approx(exponent * 0.25 / 3**0.5, rel=3e-3)
    assert "pressure" not in shares(tag, 1)


def test_composition_counts_where_it_is_stated():
    rest = '[require]\ncomposition_uncertainty = "0.8 %"\n'
    tag = tag_of(point("normal", "2 t/h", "6 bar(g)", "20 degC"), fluid=NITROGEN, rest=rest)
    assert shares(tag)["composition"] == pytest.approx(0.5 * 0.004, rel=1e-9)


@pytest.mark.parametrize("family", ["orifice_concentric", "vortex", "coriolis", "magnetic"])
def test_expanded_uncertainty_is_the_root_of_the_squares(family):
    """JCGM 100:2008, equation 10 with independent contributions, and k of table G.2 (95.45 %)."""
    fluid = WATER + '\nelectrical_conductivity = "300 uS/cm"'
    tag = tag_of(
        point("normal", "60 t/h", "6 bar(g)", "20 degC"),
        family=family,
        fluid=fluid,
        line='size = "DN 150"\nupstream_length = "60 D"\ndownstream_length = "10 D"',
    )
    evaluation = evaluate(tag)
    standard = math.sqrt(sum(line.relative[0] ** 2 for line in evaluation.budget))
    values = evaluation.points[0].values
    coverage = float(values["coverage_factor"].value)
    assert coverage >= 2.0 - 1e-3
    assert float(values["uncertainty"].value) == pytest.approx(coverage * standard, rel=1e-12)


def test_finding_on_the_uncertainty_names_the_three_largest():
    rest = '[require]\nuncertainty = "0.2 %"\n'
    tag = tag_of(point("normal", "2 t/h", "6 bar(g)", "20 degC"), fluid=NITROGEN, rest=rest)
    evaluation = evaluate(tag)
    found = next(item for item in evaluation.findings if item.code == "uncertainty-demanded")
    for line in evaluation.budget[:3]:
        assert line.label in found.message


@pytest.mark.parametrize(
    ("family", "words"), [("orifice_concentric", "over two transmitters"), ("vortex", "two meters")]
)
def test_the_remedy_is_one_that_the_family_has(family, words):
    rest = '[require]\nuncertainty = "0.2 %"\n'
    point_of = point("normal", "2 t/h", "6 bar(g)", "20 degC")
    evaluation = evaluate(tag_of(point_of, fluid=NITROGEN, rest=rest, family=family))
    found = next(item for item in evaluation.findings if item.code == "uncertainty-demanded")
    assert words in found.message
