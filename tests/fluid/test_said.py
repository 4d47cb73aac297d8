"""What is said of several points is said once; what is not known is said at all."""

from __future__ import annotations

from fluid_tags import codes, finding, point, tag

from specsheet import fluid

BIOGAS = (
    'kind = "mixture"\nphase = "gas"\nwater_dew_point = "30 degC"\n'
    "mixture = { methane = 0.62, carbon_dioxide = 0.38 }"
)


def test_three_points_near_the_dew_point_are_one_finding_on_the_worst() -> None:
    result = fluid.derive(
        tag(
            BIOGAS,
            point("0.1 bar(g)", "32 degC"),
            point("0.1 bar(g)", "31.5 degC", "minimum"),
            point("0.1 bar(g)", "31 degC", "maximum"),
        )
    )
    assert codes(result).count("near-dew-point") == 1
    said = finding(result, "near-dew-point")
    assert (said.point, said.field) == ("maximum", "points.maximum.temperature")
    assert said.message.endswith("The same holds at normal, minimum.")


def test_a_stop_at_two_points_names_both_and_stands_at_the_worse() -> None:
    text = 'kind = "substance"\nsubstance = "water"\nphase = "liquid"'
    result = fluid.derive(
        tag(text, point("0 bar(g)", "105 degC"), point("0 bar(g)", "120 degC", "maximum"))
    )
    said = finding(result, "flashing")
    assert codes(result).count("flashing") == 1
    assert said.point == "maximum"
    assert "The same holds at normal." in said.message


def test_two_findings_of_one_point_stay_two() -> None:
    text = 'kind = "substance"\nsubstance = "water"\nphase = "liquid"'
    result = fluid.derive(
        tag(text, point("3 bar(g)", "20 degC", density="900 kg/m3", sound_speed="900 m/s"))
    )
    assert {"density-given-differs", "sound-speed-given-differs"} <= set(codes(result))
    assert all("The same holds" not in item.message for item in result.findings)


def test_two_base_conditions_are_one_finding() -> None:
    result = fluid.derive(tag(BIOGAS, point("0.1 bar(g)", "40 degC", flow="300 Nm3/h")))
    assert codes(result).count("base-hypothetical") == 1
    assert "(15 °C, 101.325 kPa; 0 °C, 101.325 kPa" in finding(result, "base-hypothetical").message


def test_a_base_condition_does_not_repeat_what_stops_the_points() -> None:
    text = 'kind = "seawater"\nsalinity = "40 %"\nphase = "liquid"'
    result = fluid.derive(tag(text, point("3 bar(g)", "20 degC")))
    assert codes(result) == ["concentration-limit"]


def test_what_no_method_gives_is_said() -> None:
    text = 'kind = "solution"\nsolute = "NaOH"\nmass_fraction = "30 %"\nphase = "liquid"'
    result = fluid.derive(tag(text, point("3 bar(g)", "20 degC")))
    said = finding(result, "property-unknown").message
    assert "speed of sound and thermal conductivity" in said
    assert "heat capacity" not in said


def test_a_stated_value_is_no_gap() -> None:
    text = 'kind = "solution"\nsolute = "MEG"\nmass_fraction = "30 %"\nphase = "liquid"'
    asked = fluid.derive(tag(text, point("3 bar(g)", "20 degC")))
    told = fluid.derive(tag(text, point("3 bar(g)", "20 degC", sound_speed="1600 m/s")))
    assert "property-unknown" in codes(asked)
    assert "property-unknown" not in codes(told)


def test_natural_gas_has_no_gap() -> None:
    text = 'kind = "mixture"\nphase = "gas"\nmixture = { methane = 0.95, ethane = 0.05 }'
    assert "property-unknown" not in codes(fluid.derive(tag(text, point("8 bar(g)", "20 degC"))))
