"""Plates beyond ISO 5167, cones, wedges and wet gas against published tables and examples."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import (
    iso5167_3,
    iso5167_5,
    iso5167_6,
    iso11583,
    iso15377,
    segment,
    segmental_plate,
)

# ISO/TR 15377:1998, table of the eccentric plate; the polynomial meets it to 0.001
ECCENTRIC = [(0.46, 0.627), (0.65, 0.629), (0.75, 0.621), (0.84, 0.597)]

# ISO/TR 15377:1998, table of the quarter-circle plate
QUARTER_CIRCLE = [(0.3, 0.774), (0.4, 0.781), (0.45, 0.789), (0.5, 0.802), (0.55, 0.820)]

# ISO 5167-5:2016, annex A, κ = 1.2: β, p2/p1, ε
CONE = [
    (0.45, 0.85, 0.9153),
    (0.45, 0.92, 0.9548),
    (0.45, 0.98, 0.9887),
    (0.55, 0.75, 0.8515),
    (0.55, 0.92, 0.9525),
    (0.55, 0.98, 0.9881),
    (0.65, 0.92, 0.9485),
    (0.65, 0.98, 0.9871),
    (0.70, 0.85, 0.8980),
    (0.70, 0.92, 0.9456),
    (0.70, 0.98, 0.9864),
]

# ISO 5167-6:2019, annex A, κ = 1.2: h/D, p2/p1, ε
WEDGE = [
    (0.2, 0.75, 0.8308),
    (0.2, 0.80, 0.8662),
    (0.3, 0.75, 0.8234),
    (0.3, 0.90, 0.9310),
    (0.3, 0.98, 0.9863),
    (0.4, 0.75, 0.8094),
    (0.4, 0.80, 0.8479),
    (0.4, 0.90, 0.9241),
    (0.5, 0.80, 0.8272),
    (0.5, 0.90, 0.9119),
    (0.6, 0.75, 0.7472),
    (0.6, 0.80, 0.7930),
    (0.6, 0.98, 0.9771),
]


@pytest.mark.parametrize(("ratio", "wanted"), ECCENTRIC)
def test_eccentric(ratio, wanted):
    found = iso15377.eccentric_coefficient(diameter_ratio=ratio)
    assert found == pytest.approx(wanted, rel=1.1e-3)


@pytest.mark.parametrize(("ratio", "wanted"), QUARTER_CIRCLE)
def test_quarter_circle(ratio, wanted):
    found = iso15377.quarter_circle_coefficient(diameter_ratio=ratio)
    assert found == pytest.approx(wanted, rel=7e-4)


def test_conical_entrance():
    """ISO/TR 15377: C = 0.734 for 0.1 <= β <= 0.316."""
    assert iso15377.CONICAL_COEFFICIENT == 0.734


def test_quarter_circle_reaches_low():
    """From memory: ReD from about 250 at β = 0.245 to about 3300 at β = 0.6."""
    lowest = iso15377.quarter_circle_smallest_reynolds
    assert lowest(diameter_ratio=0.245) == pytest.approx(250.0, rel=0.03)
    assert lowest(diameter_ratio=0.6) == pytest.approx(3300.0, rel=0.03)


@pytest.mark.parametrize(("ratio", "pressure_ratio", "wanted"), CONE)
def test_cone_expansibility(ratio, pressure_ratio, wanted):
    found = iso5167_5.expansibility(
        diameter_ratio=ratio, pressure_drop_ratio=1.0 - pressure_ratio, isentropic_exponent=1.2
    )
    assert found == pytest.approx(wanted, rel=1.1e-4)


@pytest.mark.parametrize(("height", "pressure_ratio", "wanted"), WEDGE)
def test_wedge_expansibility(height, pressure_ratio, wanted):
    found = iso5167_3.expansibility(
        diameter_ratio=segment.diameter_ratio(height_ratio=height),
        pressure_drop_ratio=1.0 - pressure_ratio,
        isentropic_exponent=1.2,
    )
    assert found == pytest.approx(wanted, rel=1.1e-4)


def test_cone_loss():
    """ISO 5167-5:2016, 5.7: dc/D = 0.7 loses 0.5094 Δp."""
    ratio = iso5167_5.diameter_ratio(cone_ratio=0.7)
    assert iso5167_5.loss_ratio(diameter_ratio=ratio) == pytest.approx(0.509402, rel=1e-6)


def test_wedge_loss():
    """ISO 5167-6: h/D = 0.7 loses 0.4069 Δp."""
    ratio = segment.diameter_ratio(height_ratio=0.7)
    assert iso5167_6.loss_ratio(diameter_ratio=ratio) == pytest.approx(0.406897, rel=1e-6)


def test_wedge_limits():
    """ISO 5167-6:2019, scope and limits of the uncalibrated wedge."""
    assert iso5167_6.DIAMETERS == (0.05, 0.6)
    assert iso5167_6.HEIGHTS == (0.2, 0.6)
    assert iso5167_6.REYNOLDS == (1e4, 9e6)
    assert iso5167_6.UNCERTAINTY == 0.04


def test_wedge_coefficient_beside_general_library():
    """`fluids` carries the draft of ISO 5167-6 of 2017."""
    flow_meter = pytest.importorskip("fluids.flow_meter")
    for height in (0.2, 0.35, 0.6):
        wanted = flow_meter.C_wedge_meter_ISO_5167_6_2017(D=0.1, H=height * 0.1)
        ratio = segment.diameter_ratio(height_ratio=height)
        found = iso5167_6.discharge_coefficient(diameter_ratio=ratio)
        assert found == pytest.approx(wanted, rel=1e-9)


@pytest.mark.parametrize("taps", ["flange", "vena contracta"])
@pytest.mark.parametrize("inside", [0.08, 0.2])
def test_segmental_beside_general_library(taps, inside):
    """`fluids` carries Miller's constants of 1996."""
    flow_meter = pytest.importorskip("fluids.flow_meter")
    for ratio in (0.4, 0.6, 0.8):
        wanted = flow_meter.C_Miller_1996(
            D=inside,
            Do=ratio * inside,
            rho=1000.0,
            mu=1e-3,
            m=10.0,
            subtype="segmental orifice",
            taps=taps,
        )
        found = segmental_plate.discharge_coefficient(
            diameter_ratio=ratio, inside_diameter=inside, taps=taps
        )
        assert found == pytest.approx(wanted, rel=1e-9)


@given(height=st.floats(1e-4, 0.9999))
def test_segment_goes_round(height):
    ratio = segment.diameter_ratio(height_ratio=height)
    back = segment.height_of_ratio(diameter_ratio=ratio)
    assert back == pytest.approx(height, rel=1e-9, abs=1e-10)


@pytest.mark.parametrize(("height", "share"), [(0.0, 0.0), (0.5, 0.5), (1.0, 1.0)])
def test_segment_ends(height, share):
    """No height no area, half the circle, the whole circle."""
    assert segment.area_ratio(height_ratio=height) == pytest.approx(share, abs=1e-12)


# ISO/TR 11583:2012, worked example 1
EXAMPLE = {"gas_density": 50.0, "liquid_density": 800.0}


def _wet(liquid_ratio=0.5, gas_flow=5.31926):
    x = iso11583.lockhart_martinelli(liquid_ratio=liquid_ratio, **EXAMPLE)
    froude = iso11583.gas_froude_number(gas_mass_flow=gas_flow, inside_diameter=0.1, **EXAMPLE)
    throat = iso11583.throat_froude_number(froude_number=froude, diameter_ratio=0.6)
    over = iso11583.over_reading(
        lockhart_martinelli=x,
        froude_number=froude,
        diameter_ratio=0.6,
        liquid_factor=1.0,
        **EXAMPLE,
    )
    coefficient = iso11583.discharge_coefficient(lockhart_martinelli=x, throat_froude_number=throat)
    return x, over, coefficient


def test_wet_gas_example():
    """X = 0.125, C = 0.975421, φ = 1.23552 (ISO/TR 11583:2012, example 1)."""
    x, over, coefficient = _wet()
    assert x == pytest.approx(0.125, rel=1e-9)
    assert coefficient == pytest.approx(0.975421, rel=1e-6)
    assert over == pytest.approx(1.23552, rel=1e-5)


#: over-readings at X = 0.1, 50 and 800 kg/m3, Frg = 2, by older correlations (both from memory)
DE_LEEUW = 1.185309  # De Leeuw (1997), a Venturi tube of β = 0.4: n = 0.606 (1 - e^(-0.746 Frg))
MURDOCK = 1.126  # Murdock (1962), an orifice plate: 1 + 1.26 X


def test_wet_venturi_stands_near_de_leeuw():
    """Two fits of the same effect: within 3 %, the uncertainty stated of either."""
    over = iso11583.over_reading(
        lockhart_martinelli=0.1,
        froude_number=2.0,
        diameter_ratio=0.4,
        liquid_factor=1.0,
        **EXAMPLE,
    )
    assert over == pytest.approx(DE_LEEUW, rel=0.03)


def test_wet_plate_stands_near_murdock():
    """Two fits of the same effect: within 3 %, the uncertainty taken for a plate."""
    over = iso11583.plate_over_reading(lockhart_martinelli=0.1, froude_number=2.0, **EXAMPLE)
    assert over == pytest.approx(MURDOCK, rel=0.03)


def test_dry_gas_does_not_over_read():
    x, over, coefficient = _wet(liquid_ratio=0.0)
    assert x == 0.0
    assert over == pytest.approx(1.0)
    assert coefficient == pytest.approx(1.0)


def test_over_reading_is_continuous_where_the_exponent_changes():
    """Below that Froude number n is constant, above it n rises."""
    turn = -np.log((0.583 - 0.392) / 0.578) / 0.8
    found = [
        iso11583.over_reading(
            lockhart_martinelli=0.1,
            froude_number=froude,
            diameter_ratio=0.6,
            liquid_factor=1.0,
            **EXAMPLE,
        )
        for froude in (turn - 1e-9, turn + 1e-9)
    ]
    assert found[0] == pytest.approx(found[1], rel=1e-8)


def test_wet_plate_at_the_exponent_of_chisholm():
    """Where n = 1/4 the over-reading is Chisholm's (1977): X = 0.1, 50 and 800 kg/m3, 1.122497."""
    froude = (0.3 / (np.sqrt(0.5) - 0.5)) ** 2
    found = iso11583.plate_over_reading(
        lockhart_martinelli=0.1, froude_number=froude, gas_density=50.0, liquid_density=800.0
    )
    assert found == pytest.approx(1.122497, rel=1e-6)


def test_wet_plate_is_continuous_and_grows_with_liquid():
    """The exponent's two parts, 0.214 and 0.2136, meet at Frg = 1.5 within 0.03 % of the flow."""
    near = np.array([1.5 - 1e-9, 1.5 + 1e-9])
    low, high = iso11583.plate_over_reading(
        lockhart_martinelli=0.3, froude_number=near, gas_density=20.0, liquid_density=800.0
    )
    assert low == pytest.approx(high, rel=3e-4)
    x = np.linspace(0.0, 0.3, 31)
    over = iso11583.plate_over_reading(
        lockhart_martinelli=x, froude_number=2.0, gas_density=20.0, liquid_density=800.0
    )
    assert over[0] == 1.0
    assert (np.diff(over) > 0.0).all()
