"""Roots: all that are there, verified, with bounded work; where there is none, none."""

from __future__ import annotations

import math

import pytest

from checker.outcomes import NotEvaluable
from checker.sheet.roots import MOST_TRIALS, VERIFIED, roots_on, system_roots

GRID = [i / 10.0 for i in range(-30, 31)]


def test_every_change_of_sign_is_a_root():
    """(x − 1)(x + 2)(x − 2.55) has three."""
    found = roots_on(lambda x: (x - 1.0) * (x + 2.0) * (x - 2.55), GRID)
    assert found == pytest.approx([-2.0, 1.0, 2.55], abs=1e-12)


def test_a_jump_is_no_root():
    """A pole changes its sign and never vanishes: the value at the end of the search tells."""
    assert roots_on(lambda x: 1.0 / (x - 0.55), GRID) == []
    assert roots_on(lambda x: 1.0 if x > 0.55 else -1.0, GRID) == []


def test_a_root_at_the_edge_of_a_model_is_found():
    """Between the last point with a value and the edge behind it a root may lie."""

    def function(x: float) -> float:
        if x > 0.999:
            raise NotEvaluable("no state")
        return x - 0.97

    assert roots_on(function, GRID) == pytest.approx([0.97], abs=1e-12)


def test_no_value_anywhere_is_no_root():
    """A function without a value raises nothing."""

    def function(_: float) -> float:
        raise NotEvaluable("no state")

    assert roots_on(function, GRID) == []
    assert system_roots(lambda x: [function(v) for v in x], [(0.0, 0.0)], (-1.0, -1.0), (1.0, 1.0)) == []


def circle(x: tuple[float, ...]) -> list[float]:
    """Return residuals that vanish where a line crosses a circle, twice."""
    return [(x[0] ** 2 + x[1] ** 2 - 1.0), x[0] - x[1]]


def test_several_solutions_of_a_system_are_all_listed():
    """Starts on both sides lead to both; each is verified."""
    found = system_roots(circle, [(1.0, 0.5), (-1.0, -0.5), (0.9, 0.9)], (-3.0, -3.0), (3.0, 3.0))
    half = math.sqrt(0.5)
    assert sorted(found) == [pytest.approx((-half, -half)), pytest.approx((half, half))]
    assert all(max(map(abs, circle(root))) <= VERIFIED for root in found)


def test_a_least_square_that_is_no_solution_is_not_returned():
    """The nearest point of two curves that do not meet is no root."""
    found = system_roots(
        lambda x: [x[0] ** 2 + x[1] ** 2 + 0.1, x[0] - x[1]], [(1.0, 1.0)], (-3.0, -3.0), (3.0, 3.0)
    )
    assert found == []


def test_a_search_has_an_end():
    """Each start costs at most its trials, each with one evaluation per unknown for the derivatives."""
    count = [0]

    def rough(x: tuple[float, ...]) -> list[float]:
        count[0] += 1
        return [math.sin(1e6 * x[0]) + 2.0, math.cos(1e6 * x[1]) + 2.0]

    assert system_roots(rough, [(0.1, 0.2)] * 3, (-1.0, -1.0), (1.0, 1.0)) == []
    assert count[0] <= 3 * (MOST_TRIALS + 1) * 3
