"""Deviations: what is beyond a tolerance, and what open digits would explain."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.facts.deviation import Deviation, difference
from checker.findings import Grade
from tests.checker.cases import case, gas_bottle

SIZES = st.floats(-1e6, 1e6)
SLACKS = st.floats(0.0, 1e6)


@given(SIZES, SLACKS)
def test_a_deviation_is_beyond_its_tolerance_on_either_side(size: float, tolerance: float) -> None:
    """Beyond means larger in magnitude; below means negative as well."""
    found = Deviation(size, tolerance)
    assert found.beyond is (abs(size) > tolerance)
    assert found.below is (found.beyond and size < 0.0)


@given(SIZES, SLACKS, SLACKS)
def test_digits_make_a_query_of_what_they_explain(size: float, tolerance: float, digits: float) -> None:
    """A deviation within tolerance and digits together is a query; any other has the rule's own grade."""
    explained = abs(size) <= tolerance + digits
    assert Deviation(size, tolerance, digits).grade is (Grade.QUERY if explained else None)


def test_a_difference_needs_both_quantities() -> None:
    """Last less first, None where one of the two has no value."""
    bottle = case(gas_bottle())
    cold, hot = "states/cold/gas/temperature", "states/hot/gas/temperature"
    found = difference(bottle, cold, hot, 0.3)
    assert found is not None
    assert found.size == pytest.approx(100.0)
    assert found.tolerance == pytest.approx(0.3)
    assert found.digits == pytest.approx(0.05 * 2**0.5)
    assert difference(bottle, cold, "states/hot/gas/quality", 0.3) is None
