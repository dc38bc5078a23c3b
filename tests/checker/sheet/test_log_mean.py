"""The temperature of a place that moves with the heat."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.sheet.log_mean import entropy_at, log_mean

KELVIN = st.floats(1.0, 4000.0)


@given(KELVIN, KELVIN)
def test_lies_between_the_geometric_and_the_arithmetic_mean(first, last):
    """√(T₁·T₂) ≤ T_lm ≤ (T₁ + T₂)/2, for any two temperatures."""
    found = log_mean(first, last)
    assert math.sqrt(first * last) * (1.0 - 1e-9) <= found <= 0.5 * (first + last) * (1.0 + 1e-9)


@given(KELVIN, KELVIN)
def test_does_not_ask_which_end_comes_first(first, last):
    """Both orders give one mean."""
    assert log_mean(first, last) == pytest.approx(log_mean(last, first), rel=1e-9)


@given(KELVIN, st.floats(-1e-6, 1e-6))
def test_is_smooth_where_the_ends_meet(temperature, part):
    """Close to one another the mean is the middle: no difference of logarithms loses its digits."""
    assert log_mean(temperature, temperature * (1.0 + part)) == pytest.approx(
        temperature * (1.0 + 0.5 * part), rel=1e-12
    )


@pytest.mark.parametrize(("first", "last"), [(0.0, 300.0), (300.0, 0.0), (-5.0, 300.0)])
def test_below_absolute_zero_there_is_none(first, last):
    """A temperature that is not above zero is refused."""
    with pytest.raises(NotEvaluable, match="above absolute zero"):
        log_mean(first, last)


def test_entropy_is_heat_over_the_mean():
    """1000 J over a boundary that goes from 300 K to 400 K carry 1000·ln(4/3)/100 J/K."""
    assert entropy_at(1000.0, 300.0, 400.0) == pytest.approx((10.0 * math.log(4.0 / 3.0),))
