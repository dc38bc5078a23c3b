"""Times and powers of a body that exchanges heat by UA·ΔT, against one another and against closed forms."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.sheet.approach import Exchange, Profile, exponential_end, exponential_time, power_for

CAPACITY = 4.0e5
LOSSES = Exchange(5.0, 5.0 * 293.0)
"""5 W/K to 293 K, without a heater."""


def heated(power: float) -> Exchange:
    """Return the losses with a heater."""
    return Exchange(LOSSES.coefficient, LOSSES.drive + power)


def even(first: float, last: float) -> Profile:
    """Return a profile of 1 kg with the heat capacity of the trial body."""
    return Profile(1.0, lambda energy: energy / CAPACITY, first * CAPACITY, last * CAPACITY)


@given(st.floats(274.0, 360.0), st.floats(361.0, 390.0), st.floats(600.0, 5000.0))
def test_quadrature_and_closed_form_agree(first, last, power):
    """With a constant heat capacity the time along the path is that of the exponential approach."""
    exact = exponential_time(CAPACITY, first, last, heated(power))
    assert even(first, last).time(heated(power)) == pytest.approx(exact, rel=1e-8)


@given(st.floats(274.0, 390.0), st.floats(1.0, 1e6), st.floats(0.0, 3000.0))
def test_end_and_time_are_each_other_s_inverse(first, duration, power):
    """After the time that leads to a temperature the body has it, and before it the first one."""
    last = exponential_end(CAPACITY, first, duration, heated(power))
    back = exponential_end(CAPACITY, last, -duration, heated(power))
    assert back == pytest.approx(first, rel=1e-6)


@given(st.floats(280.0, 300.0), st.floats(310.0, 350.0), st.floats(351.0, 380.0), st.floats(500.0, 4000.0))
def test_two_parts_take_as_long_as_the_whole(first, middle, last, power):
    """Splitting a heat-up at any temperature between changes nothing."""
    times = [even(a, b).time(heated(power)) for a, b in ((first, middle), (middle, last), (first, last))]
    assert times[0] + times[1] == pytest.approx(times[2], rel=1e-8)


@pytest.mark.parametrize("ua", [1e-1, 1e-3, 1e-6])
def test_without_losses_the_heater_takes_energy_over_power(ua):
    """UA → 0: P·t = ΔE, the deviation of the order of UA·ΔT/P."""
    flow = Exchange(ua, 1000.0 + ua * 293.0)
    for time in (exponential_time(CAPACITY, 293.0, 343.0, flow), even(293.0, 343.0).time(flow)):
        assert 1000.0 * time == pytest.approx(CAPACITY * 50.0, rel=30.0 * ua / 1000.0 + 1e-9)


@given(st.floats(280.0, 330.0), st.floats(1.0, 60.0), st.floats(100.0, 4000.0))
def test_power_for_a_time_takes_that_time(first, rise, power):
    """The power found for a time is the one that took it."""
    profile = even(first, first + rise)
    try:
        asked = profile.time(heated(power))
    except NotEvaluable:
        return
    found = power_for(profile.time, (first, first + rise), LOSSES, lambda _, rate: rate - 1.0 / asked)
    assert profile.time(heated(found)) == pytest.approx(asked, rel=1e-6)


def test_power_that_cools_faster_than_the_losses():
    """To cool in half the time that the losses need takes a negative power."""
    profile = even(350.0, 310.0)
    alone = profile.time(LOSSES)
    faster, slower = (
        power_for(
            profile.time, (350.0, 310.0), LOSSES, lambda _, rate, part=part: rate - 1.0 / (part * alone)
        )
        for part in (0.5, 2.0)
    )
    assert faster < 0.0 < slower


def test_power_that_holds_a_temperature_is_the_loss():
    """5 W/K over 50 K."""
    assert power_for(lambda _: 0.0, (343.0, 343.0), LOSSES, lambda *_: 0.0) == pytest.approx(250.0)


@given(st.floats(0.01, 30.0))
def test_power_for_any_number_of_time_constants(count):
    """From far below one time constant, where it is C·ΔT/t, to many, where it is the loss at the end."""
    span = count * CAPACITY / LOSSES.coefficient

    def time(flow: Exchange) -> float:
        return exponential_time(CAPACITY, 300.0, 330.0, flow)

    found = power_for(time, (300.0, 330.0), LOSSES, lambda _, rate: rate - 1.0 / span)
    fading = math.exp(-count)
    assert found == pytest.approx(5.0 * ((330.0 - 300.0 * fading) / (1.0 - fading) - 293.0), rel=1e-7)


def test_no_heater_can_do_what_takes_cooling():
    """A heater's energy between 273 K and 226 K with surroundings at 293 K: no power makes it."""
    with pytest.raises(NotEvaluable, match="no power"):
        power_for(even(273.0, 226.0).time, (273.0, 226.0), LOSSES, lambda power, rate: 1e5 * rate - power)


@pytest.mark.parametrize("last", [343.0, 343.1, 400.0, 290.0])
def test_what_lies_beyond_the_steady_temperature_is_never_reached(last):
    """250 W hold 343 K; at or beyond that, or on the other side of the start, no time leads there."""
    for time in (
        lambda: exponential_time(CAPACITY, 300.0, last, heated(250.0)),
        lambda: even(300.0, last).time(heated(250.0)),
    ):
        with pytest.raises(NotEvaluable, match=r"never reached: .* settles at 69\.9 °C"):
            time()


def test_a_temperature_that_stays_tells_no_time():
    """Held at the steady temperature, any time would do; held elsewhere, none."""
    with pytest.raises(NotEvaluable, match="tells no duration"):
        exponential_time(CAPACITY, 343.0, 343.0, heated(250.0))
    with pytest.raises(NotEvaluable, match="never reached"):
        exponential_time(CAPACITY, 333.0, 333.0, heated(250.0))


def test_a_profile_with_a_kink_is_integrated():
    """Melting at 300 K between two stretches: the time is the sum of the three."""

    def temperature(energy: float) -> float:
        return min(energy, 300.0) if energy < 400.0 else 300.0 + (energy - 400.0)

    flow = Exchange(1.0, 350.0)
    exact = math.log(70.0 / 50.0) + 100.0 / 50.0 + math.log(50.0 / 30.0)
    assert Profile(1.0, temperature, 280.0, 420.0).time(flow) == pytest.approx(exact, rel=1e-7)


def test_nothing_hangs_on_a_profile_of_noise():
    """A temperature without any order is given up after a bounded number of looks."""
    with pytest.raises(NotEvaluable):
        Profile(1.0, lambda e: 300.0 + 40.0 * math.sin(1e9 * e), 0.0, 1e6).time(Exchange(1.0, 345.0))


def test_long_before_there_is_no_temperature():
    """Thousands of time constants before, no temperature would have led to this one."""
    with pytest.raises(NotEvaluable, match="so long before"):
        exponential_end(CAPACITY, 343.0, -1e9, LOSSES)
    with pytest.raises(NotEvaluable, match="absolute zero"):
        exponential_end(CAPACITY, 200.0, -1e5, LOSSES)
