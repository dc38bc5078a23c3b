"""A block as a step: what it finds, what it says where it finds nothing, and how little it needs the second time."""

from __future__ import annotations

from copy import deepcopy
from typing import Any

import pytest

from checker.document import read_document
from checker.outcomes import NotEvaluable
from checker.package import submit
from checker.sheet.build import RecordPlan, build_sheet
from checker.sheet.closing.trials import Search
from checker.sheet.step import evaluate, reevaluate
from tests.checker.cases import package
from tests.checker.records_of_several import joined_vessels, quench

LEFT = "given/states/before/left/temperature"
SHARED = ("states/after/left/temperature", "states/after/right/pressure")


def planned(record: dict[str, Any]) -> RecordPlan:
    """Return the sheet of a record."""
    (found,) = submit(read_document(package(record), "trial.json")).records
    return build_sheet(found)


@pytest.fixture
def evaluations(monkeypatch: pytest.MonkeyPatch) -> list[int]:
    """Return a list whose one item counts the evaluations of residuals."""
    count, plain = [0], Search.residuals

    def counted(self: Search, x: Any) -> list[float]:
        count[0] += 1
        return plain(self, x)

    monkeypatch.setattr(Search, "residuals", counted)
    return count


def drum() -> dict[str, Any]:
    """Return water in a rigid drum with its wall, heated to one temperature that is not known: two phases."""
    record = deepcopy(quench())
    record["bodies"]["bath"] = {
        "substance": "Water",
        "model": "real fluid",
        "inputs": {"mass": "20 kg"},
    }
    record["states"]["before"]["bath"] = {"inputs": {"temperature": "390 K", "quality": "0.01"}}
    record["processes"][0] |= {"path": {"bath": "constant volume"}}
    return record


@pytest.mark.parametrize("record", [joined_vessels(), drum()], ids=["vessels", "drum"])
def test_a_second_evaluation_starts_from_the_first(record: dict[str, Any], evaluations: list[int]):
    """Inputs that move a little cost a few evaluations, and lead to what a search from all starts finds."""
    plan, fresh = planned(record), planned(record)
    key = next(k for k in plan.sheet.leaves if k.startswith("given/states/before/") and "temperature" in k)
    moved = {key: plan.sheet.leaves[key] * 1.001}
    values = evaluate(plan.sheet.steps, plan.sheet.leaves)
    first = evaluations[0]
    again = {**values, **reevaluate(plan.sheet, values, moved)}
    assert 0 < evaluations[0] - first <= 12
    direct = evaluate(fresh.sheet.steps, {**fresh.sheet.leaves, **moved})
    ends = [k for k, value in direct.items() if k.startswith("states/after/") and isinstance(value, float)]
    assert len(ends) >= 2
    assert any(again[k] != values[k] for k in ends)
    for end in ends:
        assert again[end] == pytest.approx(direct[end], rel=1e-10, abs=1e-6), end
    back = reevaluate(plan.sheet, again, {key: plan.sheet.leaves[key]})
    assert all(values[k] == back[k] for k in ends)


def test_a_far_input_is_sought_from_all_starts(evaluations: list[int]):
    """A state that is not close to the first solution is found as if nothing was known."""
    plan, fresh = planned(joined_vessels()), planned(joined_vessels())
    values = evaluate(plan.sheet.steps, plan.sheet.leaves)
    moved = {LEFT: 900.0}
    there = {**values, **reevaluate(plan.sheet, values, moved)}
    count = evaluations[0]
    direct = evaluate(fresh.sheet.steps, {**fresh.sheet.leaves, **moved})
    assert evaluations[0] > count
    for end in SHARED:
        assert there[end] == pytest.approx(direct[end], rel=1e-10)


def test_a_first_evaluation_without_solution_does_not_bar_a_later_one():
    """Volumes that no gas has leave the states open; correct ones find them."""
    plan, fresh = planned(joined_vessels()), planned(joined_vessels())
    key = "given/states/before/left/pressure"
    wrong = evaluate(plan.sheet.steps, {**plan.sheet.leaves, key: -1.0})
    assert all(isinstance(wrong[end], NotEvaluable) for end in SHARED)
    right = evaluate(plan.sheet.steps, plan.sheet.leaves)
    assert {end: right[end] for end in SHARED} == {
        end: evaluate(fresh.sheet.steps, fresh.sheet.leaves)[end] for end in SHARED
    }


def test_no_solution_names_unknowns_and_equations():
    """Two gases that must be warmer than absolute zero allows have no common state, and the words say of what."""
    record = joined_vessels()
    del record["processes"][0]["insulated"]
    record["processes"][0]["heat_transfers"] = [
        {"id": "cold", "boundary_temperature": "200 K", "inputs": {"energy": "-900 kJ"}}
    ]
    plan = planned(record)
    found = evaluate(plan.sheet.steps, plan.sheet.leaves)[SHARED[0]]
    assert isinstance(found, NotEvaluable)
    assert found.reason.startswith("no T of left and right in after")
    assert "energy balance of joining" in found.reason


def waxed() -> dict[str, Any]:
    """Return a block, wax and twice water, cooled until they are at the wax's melting point; the wax melts in part."""
    water = {"substance": "Water", "model": "real fluid"}
    wax = {
        "melting_temperature": "362.952 K",
        "latent_heat": "202868 J/kg",
        "specific_heat_of_solid": "2551.49 J/(kg·K)",
        "specific_heat_of_liquid": "989.178 J/(kg·K)",
        "mass": "3.60755 kg",
    }
    block = {"specific_heat": "1633.04 J/(kg·K)", "mass": "30.7265 kg"}
    start = {
        "block": {"temperature": "406.902 K"},
        "wax": {"temperature": "276.311 K"},
        "liquid": {"temperature": "354.799 K", "pressure": "854842 Pa"},
        "steam": {"temperature": "365.009 K", "quality": "0.837513"},
    }
    return {
        "id": "waxed",
        "bodies": {
            "block": {"substance": "Block", "model": "constant specific heat", "inputs": block},
            "wax": {"substance": "Wax", "model": "phase change", "inputs": wax},
            "liquid": {**water, "inputs": {"mass": "12.9754 kg"}},
            "steam": {**water, "inputs": {"mass": "10.3739 kg"}},
        },
        "states": {
            "before": {name: {"inputs": known} for name, known in start.items()},
            "after": {name: {"results": {"temperature": "362.952 K"}} for name in start},
        },
        "processes": [
            {
                "id": "cooling",
                "from": "before",
                "to": "after",
                "path": dict.fromkeys(("liquid", "steam"), "constant pressure"),
                "equilibrium": ["temperature"],
                "work_transfers": [],
                "heat_transfers": [
                    {"id": "wall", "boundary_temperature": "100 K", "inputs": {"energy": "-20394.323118 kJ"}}
                ],
            }
        ],
    }


def test_a_body_that_melts_in_part_beside_water_is_found():
    """All come to the temperature of melting, at which 61 % of the wax is liquid."""
    plan = planned(waxed())
    values = evaluate(plan.sheet.steps, plan.sheet.leaves)
    for body in ("block", "wax", "liquid", "steam"):
        assert values[f"states/after/{body}/temperature"] == pytest.approx(362.952, rel=1e-9)
    assert values["states/after/wax/specific_internal_energy"] == pytest.approx(0.612318 * 202868.0, rel=1e-4)
