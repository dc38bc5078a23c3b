"""Linked states that their own inputs or their path fix."""

from __future__ import annotations

from typing import Any

import pytest

from checker.facts.links import differences, found_otherwise, is_known
from tests.checker.cases import cases, gas_bottle


def _circle(cold: dict[str, str]) -> dict[str, Any]:
    """Return a bottle whose first state is declared the same as its last, which follows from the first."""
    record = gas_bottle()
    record["states"]["cold"]["gas"] = {"same_as": "states/hot/gas", "inputs": cold}
    record["states"]["hot"]["gas"] = {}
    record["processes"][0]["heat_transfers"][0]["inputs"] = {"energy": "31.16 kJ"}
    record["processes"][0]["heat_transfers"][0].pop("results", None)
    return record


def test_a_state_from_which_its_link_follows_is_held_against_it() -> None:
    """300 K by its inputs, 400 K by its link: 100 K apart; the volume is the same."""
    found = cases(_circle({"temperature": "300.0 K", "pressure": "5.000 bar"}))["bottle"]
    ((state, home, target),) = found_otherwise(found)
    assert (state.state, home is found, is_known(home, target)) == ("cold", True, True)
    assert home is not None
    (apart,) = differences(found, state, home, target)
    assert (apart.name, apart.linked) == ("temperature", pytest.approx(400.0))
    assert apart.deviation.size == pytest.approx(-100.0)
    assert apart.deviation.tolerance == pytest.approx(0.3)


def test_a_state_taken_from_its_link_has_nothing_to_differ_in() -> None:
    """The link was used, and what stands beside it is compared as any surplus input is."""
    other = gas_bottle(id="other")
    other["states"]["cold"]["gas"] = {
        "same_as": "records/bottle/states/hot/gas",
        "inputs": {"temperature": "350.0 K"},
    }
    assert list(found_otherwise(cases(gas_bottle(), other)["other"])) == []


def test_a_link_to_a_state_without_value_is_known_as_such() -> None:
    """Own inputs fix the state; what it is linked to is not found."""
    lost, other = gas_bottle(), gas_bottle(id="other")
    lost["states"]["hot"]["gas"]["inputs"] = {}
    other["states"]["cold"]["gas"]["same_as"] = "records/bottle/states/hot/gas"
    ((_, home, target),) = found_otherwise(cases(lost, other)["other"])
    assert home is not None
    assert not is_known(home, target)
