"""The root search: every root of a function along a scan."""

from __future__ import annotations

import math

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.optimize import brentq

from checker.substances.search import bracketed_root, roots

GRID = tuple(step / 20.0 for step in range(-40, 41))


def test_every_root_of_a_cubic_is_found() -> None:
    """Three sign changes on the scan give three roots, in order."""
    found = roots(lambda x: (x + 1.51) * (x - 0.23) * (x - 1.77), GRID, 1e-12)
    assert found == pytest.approx([-1.51, 0.23, 1.77], abs=1e-12)


def test_two_roots_between_neighbouring_scan_points_are_found() -> None:
    """A dip below zero that the scan steps over is found through its minimum."""
    found = roots(lambda x: (x - 0.510) * (x - 0.518), GRID, 1e-12)
    assert found == pytest.approx([0.510, 0.518], abs=1e-9)


def test_a_double_root_is_found_where_the_curve_only_touches() -> None:
    """An extremum that reaches zero within the tolerance is a root."""
    found = roots(lambda x: (x - 0.3137) ** 2, GRID, 1e-12)
    assert found
    assert found[0] == pytest.approx(0.3137, abs=2e-6)


def test_an_extremum_away_from_zero_is_no_root() -> None:
    """A curve that stays on one side has no root."""
    assert roots(lambda x: (x - 0.3137) ** 2 + 1e-3, GRID, 1e-9) == []


def test_a_root_at_the_very_end_counts() -> None:
    """The ends of the scan count within the tolerance, though nothing changes sign there."""
    assert roots(lambda x: x - 2.0, GRID, 1e-12) == [2.0]
    assert roots(lambda x: x + 2.0 + 1e-13, GRID, 1e-12) == [-2.0]


def test_a_root_beside_a_gap_is_found() -> None:
    """Where the function ends between two scan points, its edge is found and searched up to."""

    def half(x: float) -> float:
        return math.nan if x < 0.4999 else x - 0.50001

    assert roots(half, (0.0, 0.25, 0.49, 0.55, 1.0), 1e-12) == pytest.approx([0.50001], abs=1e-12)


def test_a_jump_is_passed_on_for_the_caller_to_check() -> None:
    """A jump through zero gives the parameter of the jump, at which the function is far from zero."""
    found = roots(lambda x: -1.0 if x < 0.123456 else 1.0, GRID, 1e-12)
    assert found == pytest.approx([0.123456], abs=1e-12)


def test_a_function_without_values_has_no_roots() -> None:
    """NaN everywhere ends quietly."""
    assert roots(lambda x: math.nan, GRID, 1e-9) == []


@settings(max_examples=200, deadline=None)
@given(
    root=st.floats(-1.9, 1.9),
    power=st.sampled_from([1, 3, 5]),
    stretch=st.floats(0.01, 100.0),
)
def test_the_bracketed_root_agrees_with_an_independent_method(
    root: float, power: int, stretch: float
) -> None:
    """Chandrupatla's method and Brent's, of another library, find the same root of the same function."""

    def function(x: float) -> float:
        return math.tanh(stretch * (x - root)) ** power + 1e-3 * (x - root)

    ours = bracketed_root(function, (-2.0, function(-2.0)), (2.0, function(2.0)))
    theirs = brentq(function, -2.0, 2.0, xtol=1e-15, rtol=1e-15)
    assert ours == pytest.approx(theirs, abs=1e-9)


def test_a_gap_inside_a_bracket_gives_no_root() -> None:
    """A function that loses its value on the way gives NaN, not a number from nowhere."""
    value = bracketed_root(lambda x: math.nan, (0.0, -1.0), (1.0, 1.0))
    assert math.isnan(value)


def test_the_number_of_evaluations_is_bounded() -> None:
    """Even a function that flips sign at random ends the search."""
    count = 0

    def noise(x: float) -> float:
        nonlocal count
        count += 1
        return 1.0 if hash(x) % 2 else -1.0

    roots(noise, GRID, 1e-9)
    assert count < 500 * len(GRID)
