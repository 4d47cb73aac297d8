"""Transit times, profile factor and refraction."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from specsheet.methods import ultrasonic


def test_velocity_and_sound_speed_from_two_times():
    """ISO 12242 / ISO 17089 path equations (from memory): 0.2 m at 45 degrees, water."""
    times = {"upstream_time": 0.000135264387, "downstream_time": 0.0001350061301}
    angle = np.radians(45.0)
    assert ultrasonic.velocity(**times, path_length=0.2, angle=angle) == pytest.approx(2, rel=1e-6)
    assert ultrasonic.sound_speed(**times, path_length=0.2) == pytest.approx(1480.0, rel=1e-6)


@given(st.floats(0.01, 3.0), st.floats(200, 2000), st.floats(0.01, 40.0), st.floats(0.3, 1.3))
def test_times_return_velocity_and_sound_speed(length, sound, speed, angle):
    path = {"path_length": length, "sound_speed": sound, "angle": angle}
    down = ultrasonic.transit_time(**path, velocity=speed)
    up = ultrasonic.transit_time(**path, velocity=-speed)
    back = ultrasonic.velocity(
        upstream_time=up, downstream_time=down, path_length=length, angle=angle
    )
    assert back == pytest.approx(speed, rel=1e-8)
    found = ultrasonic.sound_speed(upstream_time=up, downstream_time=down, path_length=length)
    assert found == pytest.approx(sound, rel=1e-12)
    difference = ultrasonic.time_difference(**path, velocity=speed)
    assert difference == pytest.approx(up - down, rel=1e-6, abs=1e-15)


def test_profile_factor_of_laminar_flow_is_exact():
    """Parabola: mean over the area 1/2, along a diameter 2/3 of the peak; the ratio is 3/4."""
    assert ultrasonic.profile_factor(reynolds_number=1000.0) == pytest.approx(0.75)


@pytest.mark.parametrize(("reynolds", "exponent"), [(1e5, 7.0), (1e6, 8.8)])
def test_profile_factor_of_turbulent_flow(reynolds, exponent):
    """Power-law profile y^(1/n) (Nikuradse's n, from memory): mean 2n²/((n+1)(2n+1)), path n/(n+1).

    The ratio is 2n/(2n+1): 0.933 at n = 7. The fitted form lies within 1.5 % of it.
    """
    wanted = 2 * exponent / (2 * exponent + 1)
    assert ultrasonic.profile_factor(reynolds_number=reynolds) == pytest.approx(wanted, rel=0.015)


@pytest.mark.parametrize("edge", [2000.0, 4000.0])
def test_profile_factor_has_no_jump(edge):
    ends = ultrasonic.profile_factor(reynolds_number=np.array([edge * 0.999999, edge * 1.000001]))
    assert ends[0] == pytest.approx(ends[1], rel=1e-5)


def test_refraction_and_total_reflection():
    """Snell: 38 degrees in acrylic at 2700 m/s is 19.7 degrees in water at 1480 m/s."""
    found = ultrasonic.refracted_angle(
        angle=np.radians(38.0), sound_speed=1480.0, wedge_sound_speed=2700.0
    )
    assert np.degrees(found) == pytest.approx(19.72, abs=0.01)
    with np.errstate(invalid="ignore"):
        lost = ultrasonic.refracted_angle(
            angle=np.radians(38.0), sound_speed=5000.0, wedge_sound_speed=2700.0
        )
    assert np.isnan(lost)
