"""Where heat crosses, and where it cannot come from."""

from __future__ import annotations

from typing import Any

import pytest

from checker.facts.boundaries import against_body, losses, uphill
from checker.facts.cycles import highest_efficiency, highest_performance
from checker.facts.spans import crossings, temperatures
from tests.checker.cases import case, gas_bottle


def _bottle(**wall: str) -> Any:
    record = gas_bottle()
    record["processes"][0]["heat_transfers"] = [{"id": "wall", **wall}]
    found = case(record)
    return found, found.record.processes[0]


def test_a_crossing_has_its_heat_and_its_temperatures() -> None:
    """Heat positive into the system, boundary and reservoir in kelvin; the body at both ends."""
    found, process = _bottle(boundary_temperature="450 K", reservoir_temperature="500 K")
    (crossing,) = crossings(found, process)
    assert crossing.heat == pytest.approx(31160.0)
    assert (crossing.boundary, crossing.reservoir) == (450.0, 500.0)
    assert temperatures(found, "warming") == pytest.approx((300.0, 400.0))


@pytest.mark.parametrize(("reservoir", "runs"), [("449.6 K", True), ("449.8 K", False), ("500 K", False)])
def test_heat_runs_uphill_from_a_colder_reservoir(reservoir: str, runs: bool) -> None:
    """A reservoir colder than the boundary by more than the allowance of 0.3 K cannot heat it."""
    found, process = _bottle(boundary_temperature="450.0 K", reservoir_temperature=reservoir)
    assert bool(uphill(found, process)) is runs


@pytest.mark.parametrize(("boundary", "against"), [("299.5 K", True), ("299.8 K", False), ("350 K", False)])
def test_heat_does_not_enter_below_the_coldest_temperature(boundary: str, against: bool) -> None:
    """Heat cannot enter where it is colder than the body ever is."""
    found, process = _bottle(boundary_temperature=boundary)
    assert bool(against_body(found, process)) is against


def test_a_stirred_body_may_have_hot_places() -> None:
    """With shaft work inside the boundary no temperature of the ends bounds what it is."""
    record = gas_bottle()
    record["processes"][0]["heat_transfers"] = [{"id": "wall", "boundary_temperature": "250 K"}]
    record["processes"][0]["work_transfers"] = [
        {"id": "stirrer", "kind": "shaft", "direction": "in", "inputs": {"energy": "1.0 kJ"}}
    ]
    found = case(record)
    assert against_body(found, found.record.processes[0]) == ()


def test_heat_that_leaves_above_the_surroundings_is_a_loss() -> None:
    """Without a stated reservoir heat that leaves at T_b ≥ T₀ goes to the surroundings; heat that enters does not."""
    record = gas_bottle()
    record["states"]["hot"]["gas"]["inputs"]["temperature"] = "295.0 K"
    record["processes"][0]["heat_transfers"] = [{"id": "wall", "boundary_temperature": "294 K"}]
    found = case(record)
    assert [c.item for c in losses(found, found.record.processes[0])] == ["wall"]
    warmed, process = _bottle(boundary_temperature="450 K")
    assert losses(warmed, process) == ()


def test_no_cycle_beats_the_reversible_one() -> None:
    """Between 600 K and 300 K an efficiency of ½, a heat pump of 2 and a chiller of 1 are the most there can be."""
    record = gas_bottle()
    back = {"id": "cooling", "from": "hot", "to": "cold", "path": "constant volume", "work_transfers": []}
    ends = ({"id": "in", "boundary_temperature": "600 K"}, {"id": "out", "boundary_temperature": "300 K"})
    record["processes"][0]["heat_transfers"] = [ends[0]]
    record["processes"].append({**back, "heat_transfers": [ends[1]]})
    assert highest_efficiency(case(record)) == pytest.approx(0.5)
    assert highest_performance(case({**record, "purpose": "heating"})) is None
    for purpose, best in (("heating", 2.0), ("cooling", 1.0)):
        reverse = {**record, "purpose": purpose}
        reverse["processes"] = [
            {**record["processes"][0], "heat_transfers": [{"id": "in", "boundary_temperature": "300 K"}]},
            {**back, "heat_transfers": [{"id": "out", "boundary_temperature": "600 K"}]},
        ]
        assert highest_performance(case(reverse)) == pytest.approx(best)
