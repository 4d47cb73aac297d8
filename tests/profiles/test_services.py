"""For every family a service that it must accept and one that it must refuse, with the reason.

The services are invented; that a family suits them or not is common practice, no source, unless a
source is named. What is printed as the reason is the code of the deciding stop finding.
"""

from __future__ import annotations

from functools import cache

import pytest
from family_keys import KEYS
from services import service

from specsheet import packs
from specsheet.evaluate.candidates import Candidate, Verdict, candidates
from specsheet.evaluate.prepare import Prepared, prepare

#: family: (a service it must accept, one it must refuse, code of the reason)
CASES = {
    # Differential pressure: the loss makes a liquid at its boiling point flash (any handbook)
    "orifice_concentric": ("steam", "boiling water", "cavitation"),
    "orifice_eccentric": ("bubbly water", "boiling water", "cavitation"),
    "orifice_segmental": ("sludge", "boiling water", "cavitation"),
    "orifice_quarter_circle": ("fuel oil", "boiling water", "cavitation"),
    "orifice_conical_entrance": ("burner oil", "flare", "above-range"),
    "nozzle_isa_1932": ("steam", "boiling water", "cavitation"),
    "nozzle_long_radius": ("steam", "boiling water", "cavitation"),
    "nozzle_venturi": ("compressed air", "boiling water", "cavitation"),
    "nozzle_critical": ("works gas", "water", "phase-unsuitable"),
    "venturi_tube": ("compressed air", "boiling water", "cavitation"),
    "dall_tube": ("penstock", "boiling water", "cavitation"),
    "cone": ("steam", "boiling water", "cavitation"),
    "wedge": ("sludge", "boiling water", "cavitation"),
    "pitot_tube": ("duct", "boiling water", "cavitation"),
    "pitot_averaging": ("compressed air", "flare", "probe-resonance"),
    "probe_multihole": ("duct", "boiling water", "cavitation"),
    "laminar_element": ("purge air", "penstock", "capillary-count-limit"),
    "variable_area_float": ("house water", "penstock", "inside-diameter-hot-limit"),
    "variable_area_spring": ("fuel oil", "boiling water", "cavitation"),
    # Rotating: bearings and solids; water meters are for water (ISO 4064-1)
    "turbine_axial": ("water", "sludge", "solids"),
    "turbine_woltman": ("water", "fuel oil", "viscosity-limit"),
    "jet_single": ("house water", "burner oil", "viscosity-limit"),
    "jet_multi": ("house water", "water", "meter-velocity-limit"),
    "paddle_wheel": ("water", "sludge", "abrasive-moving-parts"),
    "pelton_wheel": ("dosing water", "water", "volume-flow-limit"),
    # Displacement: thick liquids, small gas flows; never solids
    "piston_rotary": ("burner oil", "water", "overspeed"),
    "piston_reciprocating": ("burner oil", "water", "meter-velocity-limit"),
    "gear_oval": ("bitumen", "sludge", "solids"),
    "gear_helical": ("fuel oil", "sludge", "abrasive-moving-parts"),
    "disc_nutating": ("burner oil", "water", "overspeed"),
    "vane_sliding": ("fuel oil", "sludge", "abrasive-moving-parts"),
    "diaphragm_gas": ("heating gas", "works gas", "pressure-limit"),
    "rotary_gas": ("works gas", "water", "phase-unsuitable"),
    # Waves and fields
    "vortex": ("steam", "bitumen", "meter-reynolds-number-limit"),
    "magnetic": ("sludge", "compressed air", "phase-unsuitable"),
    "lorentz_force": ("sodium", "water", "electrical-conductivity-limit"),
    "ultrasonic_transit": ("water", "bubbly water", "bubbles"),
    "ultrasonic_doppler": ("bubbly water", "water", "scatterer-fraction-limit"),
    "sonar_array": ("penstock", "fuel oil", "reynolds-number-limit"),
    "optical_two_beam": ("compressed air", "water", "phase-unsuitable"),
    "laser_doppler": ("water", "sludge", "solids-fraction-limit"),
    "acoustic_doppler_point": ("canal", "water", "free-surface-needed"),
    # Mass and thermal
    "coriolis": ("fuel oil", "flare", "mach-number-limit"),
    "thermal_inline": ("compressed air", "steam", "steam"),
    "thermal_insertion": ("compressed air", "steam", "steam"),
    "thermal_mems": ("tool air", "compressed air", "volume-flow-limit"),
    "mass_flow_controller": ("tool air", "water", "phase-unsuitable"),
    "intake_air_hot_wire": ("engine intake", "heating gas", "viscosity-limit"),
    "intake_air_vane": ("engine intake", "compressed air", "pressure-limit"),
    "anemometer_vane": ("duct", "compressed air", "pressure-limit"),
    "anemometer_hot_wire": ("duct", "steam", "steam"),
    # Open channels need a free surface; field methods need turbulence or room
    "weir_vnotch": ("brook", "water", "free-surface-needed"),
    "weir_rectangular": ("canal", "penstock", "free-surface-needed"),
    "weir_trapezoidal": ("canal", "water", "free-surface-needed"),
    "weir_broad_crested": ("canal", "water", "free-surface-needed"),
    "flume_parshall": ("canal", "penstock", "free-surface-needed"),
    "flume_rectangular": ("canal", "water", "free-surface-needed"),
    "flume_trapezoidal": ("brook", "water", "free-surface-needed"),
    "flume_u_throat": ("brook", "duct", "phase-unsuitable"),
    "area_velocity_wetted": ("canal", "penstock", "free-surface-needed"),
    "area_velocity_noncontact": ("canal", "penstock", "free-surface-needed"),
    "current_meter_traverse": ("penstock", "house water", "line-size-unusual"),
    "tracer_dilution": ("brook", "bitumen", "reynolds-number-limit"),
    "tracer_transit_time": ("penstock", "burner oil", "reynolds-number-limit"),
}


@cache
def _prepared(name: str) -> Prepared:
    return prepare(service(name))


def held(family: str, name: str) -> Candidate:
    """Return a family held against a service."""
    return candidates(_prepared(name), [packs.profile(family)])[0]


def test_every_family_has_its_pair() -> None:
    assert set(CASES) == set(KEYS)


@pytest.mark.parametrize("family", CASES)
def test_family_accepts(family: str) -> None:
    found = held(family, CASES[family][0])
    assert found.verdict is not Verdict.UNFIT, [str(reason) for reason in found.reasons]


@pytest.mark.parametrize("family", CASES)
def test_family_refuses_with_the_reason(family: str) -> None:
    _, name, code = CASES[family]
    found = held(family, name)
    assert found.verdict is Verdict.UNFIT
    assert code in {reason.code for reason in found.reasons}
    assert all(reason.message for reason in found.reasons)


@pytest.mark.parametrize("family", KEYS)
@pytest.mark.parametrize("name", ["water", "compressed air"])
def test_no_family_meters_a_phase_that_its_profile_lacks(family: str, name: str) -> None:
    phase = {"water": "liquid", "compressed air": "gas"}[name]
    found = held(family, name)
    refused = "phase-unsuitable" in {reason.code for reason in found.reasons}
    assert refused is (phase not in packs.profile(family).phases)


# Rules of the trade: common practice, no source, where none is named


def _verdict(family: str, name: str) -> Verdict:
    return held(family, name).verdict


def test_nothing_that_turns_is_put_into_a_sludge() -> None:
    for family in KEYS:
        if packs.profile(family).group in ("rotating", "displacement"):
            assert _verdict(family, "sludge") is Verdict.UNFIT, family
    assert _verdict("magnetic", "sludge") is Verdict.FITS


def test_bubbles_part_doppler_from_transit_time() -> None:
    assert _verdict("ultrasonic_doppler", "bubbly water") is Verdict.FITS
    assert _verdict("ultrasonic_transit", "bubbly water") is Verdict.UNFIT
    assert _verdict("ultrasonic_doppler", "water") is Verdict.UNFIT
    assert _verdict("ultrasonic_transit", "water") is Verdict.FITS


@pytest.mark.parametrize("family", [key for key in KEYS if "thermal" in key])
def test_no_thermal_meter_for_steam(family: str) -> None:
    assert _verdict(family, "steam") is Verdict.UNFIT


def test_a_venturi_loses_less_than_an_orifice() -> None:
    """ISO 5167-4:2003, 5.9: 5 % to 20 % of the differential pressure, an orifice far more."""
    venturi, orifice = (
        held("venturi_tube", "compressed air"),
        held("orifice_concentric", "compressed air"),
    )
    assert venturi.loss is not None
    assert orifice.loss is not None
    assert venturi.loss < 0.5 * orifice.loss


def test_a_displacement_meter_needs_no_straight_length() -> None:
    for family in ("gear_helical", "vane_sliding", "piston_reciprocating", "rotary_gas"):
        assert packs.profile(family).straight["single bend"] == [0]


@pytest.mark.parametrize(
    ("family", "figure", "value"),
    [
        # practice stated for this project: figures of the trade without a source
        ("tracer_dilution", "uncertainty_uncalibrated", 0.01),
        ("tracer_transit_time", "uncertainty_uncalibrated", 0.005),
        ("disc_nutating", "uncertainty_calibrated", 0.01),
        ("cone", "uncertainty_calibrated", 0.005),
        ("cone", "uncertainty_uncalibrated", 0.05),
        ("optical_two_beam", "turndown", 1000),
    ],
)
def test_usual_figures_of_practice(family: str, figure: str, value: float) -> None:
    assert getattr(packs.profile(family), figure).value == value


def test_usual_sizes_of_practice() -> None:
    rotary, turbine = packs.profile("piston_rotary").sizes, packs.profile("turbine_axial").sizes
    assert rotary is not None
    assert rotary.high == 40
    assert turbine is not None
    assert turbine.low <= 40
    assert turbine.high >= 300
