"""The calculation sheet: how a step shows its numbers."""

from __future__ import annotations

from dataclasses import replace

from checker.findings import SheetLine, SheetValue
from reports.pdf.sheet import _name as named
from reports.pdf.sheet import _worked as worked
from reports.pdf.sheet import calculation_sheet
from tests.reports.sample_records import BOTTLE

LINE = BOTTLE.sheet[1]
LISTED = ", ".join(f"T = {number} K" for number in range(300, 330))


def test_a_substituted_formula_goes_on_with_an_equals_sign() -> None:
    """``m = V/v`` is followed by its numbers."""
    assert worked(LINE) == "m = V / v = 0.05 m³ / 0.005795 m³·kg⁻¹"


def test_a_formula_that_ends_with_its_numbers_does_not_repeat_them() -> None:
    """What is zero needs no second zero."""
    assert worked(SheetLine("Work", "W = 0", "0", ())) == "W = 0"


def test_numbers_that_are_only_listed_follow_a_word() -> None:
    """A list of values is no right-hand side."""
    assert (
        worked(SheetLine("State", "p, u = f(T)", "T = 300 K, x = 0.5", ()))
        == "p, u = f(T) with T = 300 K, x = 0.5"
    )


def test_a_long_formula_takes_the_whole_width() -> None:
    """Its value then stands in a row of its own, so that the step is no narrow column of many lines."""
    short, long = (
        calculation_sheet(replace(BOTTLE, sheet=(replace(LINE, substituted=text),))) for text in ("1", LISTED)
    )
    assert [len(table._cellvalues) for table in (short, long)] == [2, 3]  # the head, and one row or two


def test_outputs_of_several_states_say_whose_they_are() -> None:
    """A step that finds two states at once names them; one that finds one does not repeat its title."""
    value = SheetValue("states/lifted/air/specific_volume", "v", None, None, None)
    assert named(value, several=True) == "specific volume v, air in lifted"
    assert named(value, several=False) == "specific volume v"
