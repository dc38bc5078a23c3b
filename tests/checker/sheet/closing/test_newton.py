"""Newton's method: the last digits in a few steps, and none where it leads away."""

from __future__ import annotations

import math

import pytest

from checker.outcomes import NotEvaluable
from checker.sheet.closing.newton import MOST_STEPS, REACH, inverted, settled

Vector = tuple[float, ...]


def curves(x: Vector) -> Vector:
    """Return residuals that vanish at (ln 2, 1)."""
    return math.exp(x[0]) - 2.0 * x[1], x[0] * x[1] - math.log(2.0)


NEAR = (math.log(2.0) + 0.01, 0.99)


def test_a_root_is_found_to_the_last_digits():
    """Both unknowns are true to twelve digits and more."""
    found = settled(curves, NEAR)
    assert found is not None
    assert found.root == pytest.approx((math.log(2.0), 1.0), rel=1e-14)


def test_known_derivatives_save_evaluations():
    """From the same start fewer evaluations are needed where the inverse of the derivatives is at hand."""
    first = settled(curves, NEAR)
    assert first is not None
    count = [0]

    def counted(x: Vector) -> Vector:
        count[0] += 1
        return curves(x)

    again = settled(counted, NEAR, first.inverse)
    with_inverse, count[0] = count[0], 0
    settled(counted, NEAR)
    assert again is not None
    assert again.root == pytest.approx(first.root, rel=1e-13)
    assert with_inverse < count[0]


def test_an_inverse_that_leads_astray_is_replaced():
    """Derivatives of another place only cost evaluations."""
    found = settled(curves, NEAR, ((-1.0, 0.0), (0.0, -1.0)))
    assert found is not None
    assert found.root == pytest.approx((math.log(2.0), 1.0), rel=1e-13)


def test_a_root_out_of_reach_is_left_to_the_search():
    """A root further away than its neighbourhood is not taken, although the steps lead there."""
    assert settled(lambda x: (x[0] - 1.1 * REACH,), (0.0,)) is None
    assert settled(lambda x: (x[0] - 0.9 * REACH,), (0.0,)) is not None


def test_nothing_is_found_where_nothing_vanishes():
    """Residuals that stay above zero, have no value or no slope lead to no root, with bounded work."""
    count = [0]

    def above(x: Vector) -> Vector:
        count[0] += 1
        return (x[0] ** 2 + 0.1,)

    def nowhere(_: Vector) -> Vector:
        raise NotEvaluable("no state")

    assert settled(above, (0.05,)) is None
    assert count[0] <= 4 * MOST_STEPS
    assert settled(nowhere, (0.0,)) is None
    assert settled(lambda _: (1.0,), (0.0,)) is None


def test_derivatives_are_taken_on_the_side_with_states():
    """At the edge of a model the difference goes inwards."""

    def edged(x: Vector) -> Vector:
        if x[0] > 0.1:
            raise NotEvaluable("no state")
        return (2.0 * x[0] - 0.19,)

    found = settled(edged, (0.1,))
    assert found is not None
    assert found.root[0] == pytest.approx(0.095, rel=1e-12)


def test_the_inverse_of_a_matrix():
    """A matrix that needs its rows exchanged is inverted; one without an inverse is not."""
    assert inverted(((0.0, 2.0), (4.0, 0.0))) == ((0.0, 0.25), (0.5, 0.0))
    assert inverted(((1.0, 2.0), (2.0, 4.0))) is None
