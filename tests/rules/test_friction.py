"""Friction with other statements of a record."""

from typing import Any

import pytest

from checker import review
from tests.checker.cases import package


def cylinder(path: Any, **process: Any) -> dict[str, Any]:
    """Return 0.5 kg of a gas that expands from 400 K and 8 bar to 4 bar with 3 kJ of friction."""
    rings = {"id": "rings", "kind": "friction", "direction": "in", "inputs": {"energy": "3.000 kJ"}}
    return {
        "id": "cylinder",
        "title": "Cylinder",
        "bodies": {
            "gas": {
                "substance": "Works gas",
                "model": "constant specific heat",
                "inputs": {"mass": "0.5000 kg", "cv": "0.7180 kJ/(kg·K)", "gas_constant": "0.2870 kJ/(kg·K)"},
            }
        },
        "states": {
            "first": {"gas": {"inputs": {"temperature": "400.0 K", "pressure": "800.0 kPa"}}},
            "last": {"gas": {"inputs": {"pressure": "400.0 kPa"}}},
        },
        "processes": [
            {
                "id": "expanding",
                "from": "first",
                "to": "last",
                "path": path,
                "work_transfers": [rings],
                **process,
            }
        ],
    }


def rules(record: dict[str, Any]) -> set[str]:
    """Return the names of the rules that find a discrepancy or a query."""
    return {f.rule for f in review(package(record)).findings if f.grade.value != "remark"}


WALL = [{"id": "wall", "boundary_temperature": "400.0 K"}]


def test_isentropic_with_friction_is_a_contradiction_told_once():
    """An isentropic path is reversible; the balance that does not close is the same mistake."""
    found = rules(cylinder("isentropic", heat_transfers=[]))
    assert "isentropic-contradicted" in found
    assert "inputs-overdetermined" not in found


def test_declared_reversible_with_friction():
    """The friction generates 7.5 J/K, and a reversible process generates nothing."""
    record = cylinder("isothermal", heat_transfers=WALL)
    record["assumptions"] = [{"id": "ideal", "text": "reversible"}]
    assert "reversible-with-generation" in rules(record)


@pytest.mark.parametrize("work", ["36.79 kJ", "39.79 kJ"])
def test_work_left_is_boundary_work_less_friction(work):
    """39.79 kJ are the boundary work; 36.79 kJ come out."""
    found = rules(cylinder("isothermal", heat_transfers=WALL, results={"work": work}))
    assert ("value-disagrees" in found) is (work == "39.79 kJ")


def test_stated_kinds_of_work_add_up_with_friction():
    """A total that leaves the friction out of the stated kinds is not their sum."""
    kinds = {"boundary_work": "39.79 kJ", "friction_work": "-3.000 kJ", "work": "36.79 kJ"}
    assert "totals-do-not-add-up" not in rules(cylinder("isothermal", heat_transfers=WALL, results=kinds))
