"""Marked ancestors, against the plain walk up a sheet."""

from __future__ import annotations

from checker.comparison.lineage import Lineage
from tests.checker.cases import case, gas_bottle


def test_the_marked_keys_above_are_those_of_a_walk_up_the_sheet() -> None:
    """For every key of a sheet, whichever keys are marked, inputs included."""
    sheet = case(gas_bottle({"entropy_generation": "0.0204 kJ/K", "exergy_change": "1 kJ"})).plan.sheet
    every = {*sheet.made_by, *sheet.leaves}
    for marked in (every, set(sorted(every)[::3]), {"states/hot/gas/pressure"}, set()):
        lineage = Lineage(sheet, marked)
        for key in sheet.made_by:
            assert lineage.above(key) == sheet.ancestors(key) & marked


def test_a_key_without_a_step_has_nothing_above_it() -> None:
    """An input is where a calculation starts."""
    sheet = case(gas_bottle()).plan.sheet
    assert Lineage(sheet, sheet.made_by).above("given/bodies/gas/mass") == frozenset()
