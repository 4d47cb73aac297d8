"""One tag through the whole pipeline, against an independent library where there is one."""

import math

import pytest

from specsheet import tagfile
from specsheet.evaluate import evaluate
from specsheet.evaluate.summary import _left
from specsheet.evaluate.words import number
from specsheet.findings import Level
from tests.support.tags import NITROGEN, STEAM, WATER, point, tag_of

fluids = pytest.importorskip("fluids")


def values_of(evaluation, index=0):
    return {key: found.value for key, found in evaluation.points[index].values.items()}


@pytest.mark.parametrize(
    ("fluid", "flow", "pressure", "temperature"),
    [
        (STEAM, "3.1 t/h", "7 bar(g)", "185 degC"),
        (STEAM, "1.2 t/h", "7 bar(g)", "220 degC"),
        (NITROGEN, "2.0 t/h", "6 bar(g)", "25 degC"),
        (WATER, "60 t/h", "4 bar(g)", "60 degC"),
    ],
)
def test_orifice_differential_pressure_agrees_with_the_library(fluid, flow, pressure, temperature):
    """`fluids` 1.3 solves ISO 5167-1 for the pressure drop, given the same fluid properties."""
    tag = tag_of(
        point("normal", flow, pressure, temperature),
        fluid=fluid,
        rest='[meter]\ntaps = "flange"\nbore = "76.2 mm"\n',
    )
    evaluation = evaluate(tag)
    values = values_of(evaluation)
    hot = {key: found.value for key, found in evaluation.element.items()}
    solved = fluids.differential_pressure_meter_solver(
        D=hot["inside_diameter_hot"],
        D2=hot["bore_diameter_hot"],
        P1=values["pressure"],
        rho=values["density"],
        mu=values["viscosity"],
        k=values.get("isentropic_exponent", 1.3),
        m=values["mass_flow"],
        meter_type=fluids.flow_meter.ISO_5167_ORIFICE,
        taps="flange",
        epsilon_specified=1.0 if fluid is WATER else None,
    )
    assert values["differential_pressure"] == pytest.approx(values["pressure"] - solved, rel=1e-6)


@pytest.mark.parametrize("family", ["orifice_concentric", "venturi_tube", "vortex", "coriolis"])
def test_velocity_and_reynolds_number_are_those_of_the_pipe(family):
    """DN 150 schedule 40: 168.3 mm less 2 x 7.11 mm (ASME B36.10M, metric columns)."""
    values = values_of(
        evaluate(tag_of(point("normal", "60 t/h", "4 bar(g)", "20 degC"), family=family))
    )
    area = math.pi / 4.0 * 0.15408**2
    # thermal growth from 20 degC is nil here
    assert values["velocity"] == pytest.approx(values["volume_flow"] / area, rel=2e-4)
    reynolds = values["velocity"] * 0.15408 / (values["viscosity"] / values["density"])
    assert values["reynolds_number"] == pytest.approx(reynolds, rel=2e-4)


def test_cold_condensate_near_boiling_is_stopped():
    tag = tag_of(
        point("normal", "14 t/h", "0.30 bar(g)", "104 degC"),
        line='size = "DN 80"\nschedule = "40"',
        rest='[meter]\ndifferential_pressure_range = "250 mbar"\n',
    )
    codes = {finding.code: finding.level for finding in evaluate(tag).findings}
    assert codes["cavitation"] is Level.STOP


def test_wrong_order_of_points_is_said():
    tag = tag_of(
        point("minimum", "60 t/h", "4 bar(g)", "20 degC"),
        point("normal", "30 t/h", "4 bar(g)", "20 degC"),
    )
    found = [item for item in evaluate(tag).findings if item.code == "points-out-of-order"]
    assert [item.field for item in found] == ["points.minimum.flow"]


def spoilt(*points, family="orifice_concentric", rest=""):
    """Return the evaluation of a steam tag whose file has problems."""
    text = f'family = "{family}"\n[fluid]\n{STEAM}\n[line]\nsize = "DN 150"\nschedule = "40"\n'
    reading = tagfile.loads(f'tag = "FT-1"\n{text}{"".join(points)}{rest}')
    assert reading.problems
    return evaluate(reading.tag)


def test_what_the_file_holds_and_cannot_be_used_is_a_stop():
    """Without it steam of a refused temperature passes for saturated steam, on the sheet too."""
    refused = point("normal", "1 t/h", "7 bar(g)", "-300 degC")
    evaluation = spoilt(refused, rest='[meter]\ntapz = "corner"\n')
    found = [item for item in evaluation.findings if item.code == "entry-unusable"]
    assert [item.field for item in found] == ["points.normal.temperature", "meter.tapz"]
    assert {item.level for item in found} == {Level.STOP}
    assert "-273.15 degC" in found[0].message


def test_what_the_job_holds_and_cannot_be_used_is_a_stop(tmp_path):
    job = tmp_path / "job.toml"
    job.write_text('atmospheric_pressure = "1,0 bar(a)"\n')
    text = f'tag = "FT-1"\nfamily = "vortex"\n[fluid]\n{STEAM}\n'
    reading = tagfile.loads(text, str(tmp_path / "FT-1.toml"), tagfile.load_job(job))
    found = [item for item in evaluate(reading.tag).findings if item.code == "entry-unusable"]
    assert [item.field for item in found] == ["job.atmospheric_pressure"]
    assert found[0].message.startswith("The file job.toml holds")


def test_an_entry_that_is_not_filled_in_yet_is_no_unusable_one():
    evaluation = spoilt(point("normal", "1 t/h", "7 bar(g)", "185 degC"), family="")
    said = {item.code: item.message for item in evaluation.findings}
    assert "entry-unusable" not in said
    assert said["family-unknown"].startswith("State a meter family;")


def test_a_tag_without_operating_points_is_stopped():
    found = {item.code: item.level for item in spoilt().findings}
    assert found["points-missing"] is Level.STOP


@pytest.mark.parametrize(
    ("pressure", "code"),
    [("-1.05 bar(g)", "pressure-not-positive"), ("0.4 bar(a)", "pressure-below-atmosphere")],
)
def test_pressure_that_cannot_be_or_may_be_meant_otherwise(pressure, code):
    tag = tag_of(point("normal", "1 t/h", pressure, "20 degC"), fluid=NITROGEN)
    assert code in {item.code for item in evaluate(tag).findings}


def test_turndown_that_the_limits_do_not_leave_is_said():
    tag = tag_of(
        point("minimum", "60 kg/h", "4 bar(g)", "20 degC"),
        point("maximum", "6 t/h", "4 bar(g)", "20 degC"),
        fluid=NITROGEN,
        family="vortex",
    )
    evaluation = evaluate(tag)
    assert evaluation.summary["turndown"].value == pytest.approx(100.0)
    assert float(evaluation.summary["turndown_available"].value) < 100.0
    assert "turndown-short" in {item.code for item in evaluation.findings}
    assert "no flow holds all limits" in _left(0.0)
    assert _left(13.24) == "the limits leave 13.2 to 1"


@pytest.mark.parametrize(
    ("value", "text"),
    [(26_000.0, "26 000"), (7470.0, "7470"), (-1234.0, "-1230"), (0.0015, "0.0015"), (0.0, "0")],
)
def test_numbers_of_a_sentence_are_grouped_as_those_of_the_sheet(value, text):
    assert number(value) == text


def test_yearly_cost_of_the_loss():
    """Hand calculation: P = loss x qv / 0.70, 8000 h, 0.10 a kWh (entries of the job assumed)."""
    evaluation = evaluate(tag_of(point("normal", "60 t/h", "4 bar(g)", "20 degC")))
    values = values_of(evaluation)
    power = values["pressure_loss"] * values["volume_flow"] / 0.70
    assert evaluation.summary["lost_power"].value == pytest.approx(power, rel=1e-12)
    assert evaluation.summary["yearly_energy"].value == pytest.approx(
        power * 8000 * 3600, rel=1e-12
    )


def test_findings_stand_worst_first_and_once():
    tag = tag_of(
        point("minimum", "60 kg/h", "4 bar(g)", "20 degC"),
        point("maximum", "60 t/h", "4 bar(g)", "20 degC"),
        fluid=NITROGEN,
        family="vortex",
    )
    findings = evaluate(tag).findings
    ranks = [list(Level).index(item.level) for item in findings]
    assert ranks == sorted(ranks)
    assert len(set(findings)) == len(findings)
