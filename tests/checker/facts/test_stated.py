"""Sums of what the originator states."""

from __future__ import annotations

from typing import Any

import pytest

from checker.case import Case
from checker.facts import stated
from checker.facts.sums import sums
from tests.checker.cases import case, gas_bottle

P = "processes/warming/"


def _two_jackets(first: str, second: str, **results: str) -> dict[str, Any]:
    record = gas_bottle(results)
    record["processes"][0]["heat_transfers"] = [
        {"id": "a", "boundary_temperature": "450 K", "inputs": {"energy": first}},
        {"id": "b", "boundary_temperature": "450 K", "results": {"energy": second}},
    ]
    return record


def _case(**results: str) -> Case:
    return case(_two_jackets("20.00 kJ", "11.16 kJ", **results))


def test_stated_heat_is_the_total_before_the_items() -> None:
    """A stated total counts; without one the items are added up, with their half-widths."""
    items = stated.heat(_case(), "warming")
    assert items is not None
    assert items.value == pytest.approx(31160.0)
    assert items.half_width == pytest.approx(10.0)
    total = stated.heat(_case(heat="31.2 kJ"), "warming")
    assert total is not None
    assert total.value == pytest.approx(31200.0)


def test_work_that_the_path_excludes_counts_as_nothing() -> None:
    """At constant volume with no work listed the stated work is nothing, without a statement."""
    found = stated.work(_case(), "warming")
    assert found is not None
    assert (found.value, found.parts) == (0.0, ())


def test_an_energy_change_is_summed_from_its_parts() -> None:
    """ΔU stands for ΔE where no speed and no height is stated; without ΔU there is no sum."""
    found = stated.energy_change(_case(internal_energy_change="31.16 kJ"), "warming")
    assert found is not None
    assert found.value == pytest.approx(31160.0)
    assert stated.energy_change(_case(), "warming") is None


def test_a_missing_term_leaves_no_total() -> None:
    """One missing term makes the sum unknown, never smaller."""
    assert stated.total((stated.NOTHING, None)) is None
    assert stated.total(()) == stated.Stated(0.0, 0.0, ())


def test_a_wrong_statement_is_known_as_wrong() -> None:
    """A statement that deviates from the alternate calculation marks the terms that rest on it."""
    found = _case(internal_energy_change="35.0 kJ")
    change = stated.one(found, f"{P}internal_energy_change")
    assert change is not None
    assert stated.any_wrong(found, change)
    assert not stated.any_wrong(found, stated.NOTHING)


def test_sums_hold_totals_against_their_parts() -> None:
    """The heat of a process is the sum of its two transfers; a total without parts is no sum."""
    found = {
        total.pointer: total for total in sums(_case(heat="31.16 kJ", internal_energy_change="31.16 kJ"))
    }
    assert set(found) == {f"{P}heat"}
    assert found[f"{P}heat"].parts.value == pytest.approx(found[f"{P}heat"].stated.value)
