"""Gaps: what a result lacks is reported once, by the right rule."""

from __future__ import annotations

from typing import Any

import pytest

from checker.facts.gaps import gaps, gaps_of, unexplained
from checker.facts.use import untraceable
from tests.checker.cases import case, gas_bottle

ALL = {"internal_energy_change": "31.16 kJ", "entropy_generation": "0.020 kJ/K"}


def _without(*path: str | int, **results: str) -> dict[str, Any]:
    record = gas_bottle(results or ALL)
    node: Any = record
    for part in path[:-1]:
        node = node[part]
    del node[path[-1]]
    return record


@pytest.mark.parametrize(
    ("path", "rule", "pointer"),
    [
        (("states", "cold", "gas", "inputs", "pressure"), "state-undetermined", "states/cold/gas"),
        (("bodies", "gas", "inputs", "cv"), "constants-missing", "bodies/gas"),
        (("processes", 0, "heat_transfers"), "heat-transfers-not-stated", "processes/warming"),
        (
            ("processes", 0, "heat_transfers", 0, "boundary_temperature"),
            "boundary-temperature-missing",
            "processes/warming/heat_transfers/wall",
        ),
    ],
)
def test_what_is_missing_costs_results_and_is_reported_by_one_rule(
    path: tuple[str | int, ...], rule: str, pointer: str
) -> None:
    """A gap that costs a result explains it, so that no other rule reports the same loss."""
    found = case(_without(*path))
    costly = {gap.pointer: costs for gap, costs in gaps_of(found, rule) if costs}
    assert list(costly) == [pointer]
    assert "processes/warming/entropy_generation" in costly[pointer]
    assert not list(unexplained(found))


def test_a_missing_mass_is_nobody_elses_gap() -> None:
    """What no gap explains is left to the rule for results that could not be recomputed."""
    found = case(_without("bodies", "gas", "inputs", "mass"))
    assert {c.statement.pointer for c in unexplained(found)} == {f"processes/warming/{name}" for name in ALL}


def test_a_complete_record_has_no_costly_gap() -> None:
    """In a complete record no gap costs anything."""
    found = case(gas_bottle(ALL))
    assert not any(gap.costs(c) for gap in gaps(found) for c in found.compared)


def test_a_result_that_open_digits_hide_is_traceable():
    """A formula leads to it; only its deviation cannot be judged from a mass of one digit."""
    record = gas_bottle({"internal_energy_change": "40 kJ"})
    record["bodies"]["gas"]["inputs"]["mass"] = "0.1 kg"
    found = case(record)
    pointer = "processes/warming/internal_energy_change"
    assert [c.statement.pointer for c in unexplained(found)] == [pointer]
    assert not untraceable(found, pointer)
