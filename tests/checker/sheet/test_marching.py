"""Following a body over a time."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.sheet.marching import march, settle


@given(st.floats(0.01, 60.0), st.floats(-5.0, 5.0))
def test_exponential_decay(duration, start):
    """The course of y' = 1 − y leads to 1 + (y₀ − 1)·e^(−t), also over many time constants."""
    exact = 1.0 + (start - 1.0) * math.exp(-duration)
    assert march(lambda y: 1.0 - y, start, duration) == pytest.approx(exact, abs=1e-6 * (1.0 + abs(start)))


@given(st.floats(0.01, 1e6), st.floats(-5.0, 5.0))
def test_settling_takes_few_steps_however_long_it_lasts(duration, start):
    """A body that settles at 1 is there after any number of time constants, and was on its way before."""
    looks = []

    def rate(y: float) -> float:
        looks.append(y)
        return 1.0 - y

    exact = 1.0 + (start - 1.0) * math.exp(-duration)
    assert settle(rate, start, 1.0, duration) == pytest.approx(exact, abs=1e-8 * (1.0 + abs(start)))
    assert len(looks) < 200


def test_settling_backwards():
    """Two time constants before it was 1 + 2·e² away."""
    assert settle(lambda y: 1.0 - y, 3.0, 1.0, -2.0) == pytest.approx(1.0 + 2.0 * math.exp(2.0), rel=1e-8)


def test_backwards_leads_to_the_start():
    """A negative duration undoes a positive one."""
    last = march(lambda y: 1.0 - y, 3.0, 2.0)
    assert march(lambda y: 1.0 - y, last, -2.0) == pytest.approx(3.0, rel=1e-6)


def test_a_kink_costs_no_accuracy():
    """A rate of 2 below 1 and of 1 above: from 0, one after another."""
    assert march(lambda y: 2.0 if y < 1.0 else 1.0, 0.0, 3.0) == pytest.approx(3.5, abs=1e-6)


def test_an_overshooting_trial_outside_the_model_is_taken_back():
    """A trial step that leaves the range is made smaller; the course itself stays within."""

    def rate(y: float) -> float:
        if y > 1.2:
            raise NotEvaluable("outside", "outside-range")
        return 50.0 * (1.0 - y)

    assert march(rate, 0.0, 10.0) == pytest.approx(1.0, abs=1e-6)


def test_a_course_that_leaves_the_model_says_so():
    """Where the body itself goes out of the range, the model's reason is given."""

    def rate(y: float) -> float:
        if y > 1.0:
            raise NotEvaluable("too hot for the model", "outside-range")
        return 1.0

    with pytest.raises(NotEvaluable, match="too hot"):
        march(rate, 0.0, 2.0)
