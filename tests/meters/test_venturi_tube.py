"""The Venturi tube: wet gas, limits by construction, loss, sanity band."""

import dp_tools as tools
import numpy as np
import pytest

from specsheet.findings import Level
from specsheet.meters.venturi_tube import FAMILY

# ISO/TR 11583:2012, worked example 1: D = 100 mm, d = 60 mm, 60 bar, κ = 1.3, 50 kPa
GAS = {
    "density": 50.0,
    "viscosity": 1.5e-5,
    "pressure": 6e6,
    "temperature": 293.15,
    "isentropic_exponent": 1.3,
    "sound_speed": 400.0,
    "vapour_pressure": np.nan,
    "density_uncertainty": 0.002,
}


def wet_request(**given):
    flows = [2.0, 4.0, 5.31926]
    entries = {
        "throat": "60 mm",
        "differential_pressure_range": "600 mbar",
        "liquid_ratio": "50 %",
        "liquid_density": "800 kg/m3",
    } | given
    return tools.request(
        "venturi_tube", flows, tools.water(3, **GAS), phase="gas", diameter=0.1, **entries
    )


def test_wet_gas_example():
    """ISO/TR 11583:2012, example 1: 5.31926 kg/s of gas and half as much liquid give 50 kPa."""
    request = wet_request()
    values = FAMILY.at(FAMILY.size(request), request.stream)
    assert values["differential_pressure"][2] == pytest.approx(5e4, rel=1e-5)
    assert values["discharge_coefficient"][2] == pytest.approx(0.975421, rel=1e-6)
    assert values["expansibility"][2] == pytest.approx(0.994236, rel=5e-7)
    assert values["over_reading"][2] == pytest.approx(1.23552, rel=1e-5)
    assert values["lockhart_martinelli"] == pytest.approx(0.125)


def test_wet_gas_needs_the_density_of_the_liquid():
    request = wet_request()
    given = {key: value for key, value in request.tag.given.items() if "liquid_density" not in key}
    tag = type(request.tag)(given=given, assumed=request.tag.assumed, points=request.tag.points)
    element = FAMILY.size(type(request)(tag, *list(vars(request).values())[1:]))
    assert "wet-gas-incomplete" in [item.code for item in element.findings]
    assert "over_reading" not in FAMILY.at(element, request.stream)


def test_wet_gas_limits_cross():
    request = wet_request(liquid_ratio="200 %")
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    found = {limit.code: limit for limit in FAMILY.limits(element, request)}
    assert values["lockhart_martinelli"][0] > found["wet-gas-liquid"].high
    slow = FAMILY.at(element, request.stream.with_flow(request.stream.mass_flow / 50.0))
    assert slow["throat_froude_number"][0] < found["wet-gas-slow"].low


@pytest.mark.parametrize(
    ("construction", "coefficient", "lowest", "highest"),
    [
        ("as cast", 0.984, 2e5, 2e6),
        ("machined convergent", 0.995, 2e5, 1e6),
        ("welded sheet iron", 0.985, 2e5, 2e6),
    ],
)
def test_construction_decides(construction, coefficient, lowest, highest):
    """ISO 5167-4:2003, 5.5 (limits from memory)."""
    request = tools.request(
        "venturi_tube", [20.0, 40.0, 60.0], tools.water(3), diameter=0.2, construction=construction
    )
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    assert values["discharge_coefficient"] == pytest.approx(coefficient)
    limit = next(x for x in FAMILY.limits(element, request) if x.key == "reynolds_number")
    assert (limit.low, limit.high) == (lowest, highest)
    assert limit.level is Level.CAUTION


def test_usual_band_is_said():
    """Trade rule: 0.93 to 0.97, below the standard's constants (common practice, no source)."""
    request = tools.request("venturi_tube", [5.0, 12.0, 20.0], tools.water(3))
    notes = [item for item in FAMILY.size(request).findings if item.code == "coefficient-band"]
    assert len(notes) == 1
    assert "0.93 to 0.97" in notes[0].message
    assert "0.995" in notes[0].message


def test_calibrated_coefficient_wins():
    request = tools.request(
        "venturi_tube",
        [5.0, 12.0, 20.0],
        tools.water(3),
        discharge_coefficient="0.962",
        discharge_coefficient_uncertainty="0.5 %",
    )
    element = FAMILY.size(request)
    values = FAMILY.at(element, request.stream)
    assert values["discharge_coefficient"] == pytest.approx(0.962)
    part = FAMILY.budget(element, request.stream, values)[0]
    assert part.relative == pytest.approx(0.0025)


def test_calibration_without_its_uncertainty_is_said():
    request = tools.request(
        "venturi_tube", [5.0, 12.0, 20.0], tools.water(3), discharge_coefficient="0.962"
    )
    codes = [item.code for item in FAMILY.size(request).findings]
    assert "calibration-uncertainty-missing" in codes


def test_a_steeper_divergent_loses_more():
    losses = []
    for angle in ("7 deg", "15 deg"):
        request = tools.request(
            "venturi_tube", [5.0, 12.0, 20.0], tools.water(3), throat="60 mm", divergent_angle=angle
        )
        losses.append(FAMILY.at(FAMILY.size(request), request.stream)["pressure_loss"])
    assert (losses[1] > losses[0]).all()
