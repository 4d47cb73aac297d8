"""Rules of the trade, each as a service, a family and what must be said of the two.

Where no source is named beside a rule it is common practice, no source.
"""

from __future__ import annotations

from functools import cache

import pytest
from services import service, service_text

from specsheet import packs, tagfile
from specsheet.evaluate import evaluate
from specsheet.evaluate.candidates import Candidate, Verdict, candidates
from specsheet.evaluate.prepare import Prepared, prepare
from specsheet.evaluate.result import Evaluation
from specsheet.evaluate.shortlist import Shortlist, shortlist

FITS, IF, NO = Verdict.FITS, Verdict.CONDITIONS, Verdict.UNFIT

#: service, family, verdict, code among the reasons ("" for none in particular)
VERDICTS = [
    # Conducting and not
    ("cooling water", "magnetic", FITS, ""),
    ("digestate", "magnetic", FITS, ""),
    ("seawater", "magnetic", FITS, ""),
    ("caustic", "magnetic", FITS, ""),
    ("demineralised water", "magnetic", NO, "conductivity-low"),
    ("boiling water", "magnetic", IF, "conductivity-missing"),
    ("compressed air", "magnetic", NO, "phase-unsuitable"),
    # Steam
    ("steam", "vortex", FITS, ""),
    ("steam", "orifice_concentric", FITS, ""),
    ("steam", "nozzle_isa_1932", FITS, ""),
    ("steam", "coriolis", IF, "steam-unusual"),
    ("steam", "ultrasonic_transit", IF, "steam-unusual"),
    ("steam", "turbine_axial", IF, "steam-unusual"),
    ("steam", "rotary_gas", NO, "steam-unusual"),
    ("steam", "thermal_inline", NO, "steam"),
    ("steam", "variable_area_float", IF, "glass-tube"),
    # Gas
    ("compressed air", "thermal_inline", FITS, ""),
    ("natural gas", "ultrasonic_transit", FITS, ""),
    ("natural gas", "turbine_axial", FITS, ""),
    ("natural gas", "diaphragm_gas", NO, "pressure-limit"),
    ("biogas", "ultrasonic_transit", FITS, ""),
    ("biogas", "thermal_inline", IF, "saturation-margin-limit"),  # saturated: doubtful, not wrong
    ("biogas", "thermal_insertion", IF, "saturation-margin-limit"),
    ("biogas", "mass_flow_controller", NO, "saturation-margin-limit"),
    ("steam", "thermal_insertion", NO, "steam"),
    ("biogas", "variable_area_float", IF, "glass-tube"),
    ("flare", "optical_two_beam", IF, "mach-number-high"),
    ("flare", "orifice_conical_entrance", NO, "above-range"),
    ("works gas", "rotary_gas", FITS, ""),
    ("heating gas", "diaphragm_gas", FITS, ""),
    ("duct", "anemometer_vane", IF, "use-unusual"),
    # Oxygen: nothing that rubs without a release for it
    ("oxygen", "turbine_axial", IF, "oxygen-moving-parts"),
    ("oxygen", "rotary_gas", IF, "oxygen-moving-parts"),
    ("oxygen", "variable_area_float", IF, "glass-tube"),
    ("oxygen", "venturi_tube", FITS, ""),
    # Boiling and flashing (the loss takes the liquid to its vapour pressure)
    ("boiling water", "ultrasonic_transit", FITS, ""),
    ("boiling water", "orifice_concentric", NO, "cavitation"),
    ("boiling water", "vortex", NO, "cavitation"),
    ("boiling water", "coriolis", NO, "cavitation"),
    ("boiling water", "turbine_axial", NO, "cavitation"),
    # Thick
    ("fuel oil", "coriolis", FITS, ""),
    ("fuel oil", "gear_helical", FITS, ""),
    ("fuel oil", "orifice_quarter_circle", FITS, ""),
    ("bitumen", "vortex", NO, "meter-reynolds-number-limit"),
    ("bitumen", "gear_oval", FITS, ""),
    # Solids and bubbles
    ("sludge", "wedge", FITS, ""),
    ("sludge", "orifice_segmental", FITS, ""),
    ("sludge", "coriolis", IF, "solids-fraction-limit"),
    ("sludge", "orifice_concentric", IF, "solids-fraction-limit"),
    ("sludge", "turbine_axial", NO, "solids"),
    ("sludge", "paddle_wheel", NO, "abrasive-moving-parts"),
    ("bubbly water", "ultrasonic_doppler", FITS, ""),
    ("bubbly water", "ultrasonic_transit", NO, "bubbles"),
    ("water", "ultrasonic_doppler", NO, "scatterer-fraction-limit"),
    # A family for what it is made for
    ("cooling water", "gear_oval", NO, "overspeed"),
    ("caustic", "gear_oval", IF, "lubrication-poor"),
    ("cooling water", "pitot_tube", IF, "use-unusual"),
    ("cooling water", "tracer_dilution", IF, "use-unusual"),
    ("cooling water", "wedge", IF, "use-unusual"),
    ("water", "orifice_eccentric", IF, "use-unusual"),
    ("penstock", "laminar_element", NO, "capillary-count-limit"),
    ("penstock", "variable_area_spring", NO, "inside-diameter-hot-limit"),
    ("cooling water", "mass_flow_controller", NO, ""),
    ("seawater", "coriolis", IF, "material-unsuited"),
    ("brook", "weir_vnotch", FITS, ""),
    ("penstock", "weir_rectangular", NO, "free-surface-needed"),
    ("canal", "magnetic", NO, "line-size-missing"),
]

#: service, family that stands before another, the other one
ORDERS = [
    ("cooling water", "magnetic", "coriolis"),  # no loss, no price of a large mass meter
    ("cooling water", "magnetic", "orifice_concentric"),
    ("cooling water", "ultrasonic_transit", "turbine_axial"),
    ("cooling water", "turbine_axial", "vortex"),  # DN 300 at low velocity
    ("steam", "orifice_concentric", "coriolis"),
    ("steam", "vortex", "ultrasonic_transit"),
    ("steam", "vortex", "orifice_segmental"),
    ("biogas", "ultrasonic_transit", "orifice_concentric"),
    ("natural gas", "ultrasonic_transit", "coriolis"),
    ("natural gas", "ultrasonic_transit", "orifice_concentric"),
    ("digestate", "magnetic", "coriolis"),
    ("boiling water", "ultrasonic_transit", "magnetic"),
    ("demineralised water", "ultrasonic_transit", "turbine_axial"),
    ("demineralised water", "coriolis", "turbine_axial"),
    ("fuel oil", "coriolis", "turbine_axial"),
    ("sludge", "magnetic", "wedge"),
    ("seawater", "magnetic", "coriolis"),
    ("caustic", "magnetic", "gear_oval"),
    ("compressed air", "ultrasonic_transit", "variable_area_float"),
    ("compressed air", "orifice_concentric", "nozzle_critical"),
    ("oxygen", "venturi_tube", "turbine_axial"),
]

#: service, family, what is changed, code of a finding that must come
CHANGES = [
    # Flanges: ASME B16.5, table 2-1.1: Class 150 allows 13.8 bar at 200 °C
    (
        ("steam", "vortex"),
        {
            "line.material": "carbon steel",
            "require.rating": "Class 150",
            "design.pressure": "14 bar(g)",
            "design.temperature": "200 degC",
        },
        "rating-exceeded",
    ),
    (
        ("water", "magnetic"),
        {"require.rating": "Class 300", "line.rating": "Class 150"},
        "rating-mismatch",
    ),
    (
        ("water", "magnetic"),
        {
            "design.pressure": "5 bar(g)",
            "design.temperature": "50 degC",
        },
        "operating-above-design-pressure",
    ),
    (
        ("water", "magnetic"),
        {
            "require.rating": "PN 16",
            "design.pressure": "10 bar(g)",
            "design.test_pressure": "9 bar(g)",
            "design.temperature": "50 degC",
        },
        "test-pressure-low",
    ),
    # Liner: PTFE bears no vacuum, rubber no heat, what wears softens it
    (
        ("water", "magnetic"),
        {"meter.liner": "PTFE", "design.minimum_pressure": "0.1 bar(a)"},
        "liner-unsuitable",
    ),
    (
        ("water", "magnetic"),
        {"meter.liner": "hard rubber", "design.temperature": "120 degC"},
        "liner-unsuitable",
    ),
    (("sludge", "magnetic"), {"meter.liner": "PTFE"}, "liner-unsuitable"),
    (
        ("water", "magnetic"),
        {"line.material": "PVC", "meter.earthing": "line flanges"},
        "earthing-missing",
    ),
    # Straight lengths: ISO 5167-2:2003, table 3
    (
        ("water", "orifice_concentric"),
        {"line.upstream_length": "3 D"},
        "upstream-length-short",
    ),
    (("steam", "vortex"), {"line.upstream_length": "2 D"}, "upstream-length-short"),
    # Demands of the purchase
    (("water", "vortex"), {"require.uncertainty": "0.1 %"}, "uncertainty-demanded"),
    (
        ("water", "orifice_concentric"),
        {"require.pressure_loss": "1 mbar", "meter.differential_pressure_range": "250 mbar"},
        "pressure-loss-demanded",
    ),
    # Statements that contradict each other
    (("water", "magnetic"), {"points.minimum.flow": "90 m3/h"}, "points-out-of-order"),
    (("water", "vortex"), {"points.normal.temperature": "170 degC"}, "flashing"),
    (("steam", "vortex"), {"points.normal.temperature": "120 degC"}, "phase-disagrees"),
    # Velocity in the line
    (("water", "magnetic"), {"points.maximum.flow": "120 m3/h"}, "line-velocity-high"),
]


@cache
def prepared(name: str) -> Prepared:
    return prepare(service(name))


@cache
def ranked(name: str) -> Shortlist:
    return shortlist(service(name))


def held(name: str, family: str) -> Candidate:
    return candidates(prepared(name), [packs.profile(family)])[0]


def changed(name: str, family: str, changes: dict[str, str]) -> Evaluation:
    tag = tagfile.suppose(service_text(name, family), changes.items()).tag
    assert tag is not None
    return evaluate(tag)


def test_at_least_sixty_rules_stand_here() -> None:
    assert len(VERDICTS) + len(ORDERS) + len(CHANGES) >= 60


@pytest.mark.parametrize(("name", "family", "verdict", "code"), VERDICTS)
def test_verdict(name: str, family: str, verdict: Verdict, code: str) -> None:
    found = held(name, family)
    codes = {reason.code for reason in found.reasons}
    assert (found.verdict, code in codes if code else True) == (verdict, True), codes


@pytest.mark.parametrize(("name", "first", "second"), ORDERS)
def test_order(name: str, first: str, second: str) -> None:
    order = [item.profile.key for item in ranked(name).candidates]
    assert order.index(first) < order.index(second)


@pytest.mark.parametrize(("of", "changes", "code"), CHANGES)
def test_finding(of: tuple[str, str], changes: dict[str, str], code: str) -> None:
    before = {item.code for item in evaluate(service(*of)).findings}
    after = {item.code for item in changed(*of, changes).findings}
    assert code in after
    assert code not in before
