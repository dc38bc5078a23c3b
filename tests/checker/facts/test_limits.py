"""Margins of limits, with the uncertainty of the quantity and of the limit."""

from __future__ import annotations

import math
from typing import Any

import pytest

from checker.facts.limits import limit_of, margins
from tests.checker.cases import cases, gas_bottle


def _margin(limit: dict[str, str], cold: str = "5.000 bar") -> Any:
    record = gas_bottle(limits=[{"id": "l", "quantity": "states/hot/gas/pressure", **limit}])
    record["states"]["cold"]["gas"]["inputs"]["pressure"] = cold
    found = cases(record)["bottle"]
    return next(margins(found, limit_of(found, "l")))


def test_a_margin_is_what_is_left_to_the_bound() -> None:
    """6.667 bar leave 0.333 bar to 7 bar, are 0.667 bar above 6 bar, and 0.667 bar above a lower bound of 6 bar."""
    assert _margin({"at_most": "7 bar"}).size == pytest.approx(1e5 / 3.0)
    assert _margin({"at_most": "6 bar"}).exceeded
    assert _margin({"at_least": "6 bar"}).size == pytest.approx(2e5 / 3.0)
    assert not _margin({"at_least": "6 bar"}).uncertain


@pytest.mark.parametrize(("bound", "certain"), [("6.75 bar", True), ("6.70 bar", False)])
def test_the_uncertainty_of_the_inputs_reaches_to_the_bound(bound: str, certain: bool) -> None:
    """± 0.05 bar at 5 bar, rectangular and k = 2, are 0.077 bar at 400 K: 2·0.05/√3·4/3."""
    margin = _margin({"at_most": bound}, cold="5.000 ± 0.050 bar")
    assert margin.uncertainty == pytest.approx(2.0 * 5e3 / math.sqrt(3.0) * 4.0 / 3.0)
    assert not margin.exceeded
    assert margin.uncertain is (not certain)


def test_a_bound_may_be_uncertain_itself() -> None:
    """± of a limit counts like that of an input."""
    margin = _margin({"at_most": "7.0 ± 0.2 bar"})
    assert margin.uncertainty == pytest.approx(2.0 * 2e4 / math.sqrt(3.0))


def test_a_limit_may_stand_in_another_record() -> None:
    """A pointer across records takes the value from there; from a record that is not there it has none."""
    other = gas_bottle(limits=[{"id": "l", "quantity": "records/bottle/bodies/gas/mass", "at_most": "1 kg"}])
    other["id"] = "other"
    found = cases(gas_bottle(), other)
    assert next(margins(found["other"], limit_of(found["other"], "l"))).value == pytest.approx(0.1)
