"""The sentences that several formats share."""

from __future__ import annotations

from dataclasses import replace

import pytest

from checker.findings import Finding
from reports.phrases import cause, common_rules, counted, deviation, grade_counts, numbers_not_told, origin
from tests.reports.sample import FINDINGS, REVISE
from tests.reports.sample_records import BOTTLE, CYLINDER, QUENCH

FIRST = FINDINGS[0]


@pytest.mark.parametrize(("number", "phrase"), [(0, "no queries"), (1, "1 query"), (2, "2 queries")])
def test_counts_read_as_words(number: int, phrase: str) -> None:
    """None, one and many have their own form."""
    assert counted(number, "query", "queries") == phrase


def test_grades_are_counted_gravest_first() -> None:
    """All three grades are named, those without a finding too."""
    assert grade_counts(FINDINGS) == "4 discrepancies, 3 queries, 1 remark"
    assert grade_counts(()) == "no discrepancies, no queries, no remarks"


@pytest.mark.parametrize(
    ("finding", "sentence"),
    [
        (FIRST, "here: with the originator's own earlier values this step gives 300.6 kJ"),
        (replace(FIRST, carried=None), "here"),
        (FINDINGS[1], "inherited from processes/warming/internal_energy_change"),
        (
            replace(FIRST, origin=None),
            "unknown: the step could not be carried out with the originator's own values",
        ),
        (replace(FIRST, origin=False), ""),
        (FINDINGS[-1], ""),
    ],
)
def test_the_origin_is_told_where_there_is_one(finding: Finding, sentence: str) -> None:
    """Here, inherited and unknown are told apart; where the question does not arise nothing is said."""
    assert origin(finding) == sentence


def test_a_cause_tells_what_it_would_give() -> None:
    """The slip is named with the value it reproduces."""
    assert cause(FIRST.causes[0], FIRST) == "cp was used where cv belongs (gives 422.1 kJ)"


def test_a_deviation_stands_with_its_tolerance() -> None:
    """Without a deviation there is no text; without a tolerance it stands alone."""
    assert deviation(FIRST) == "+121.4 kJ; tolerance 2.1 kJ"
    assert deviation(replace(FIRST, tolerance=None)) == "+121 kJ"
    assert deviation(replace(FIRST, deviation=None)) == ""


def test_numbers_are_not_told_twice() -> None:
    """A message that holds the stated text needs no second sentence with it."""
    assert numbers_not_told(FIRST) == "Stated 422 kJ, recomputed 300.6 kJ."
    assert numbers_not_told(replace(FIRST, message="422 kJ is stated")) == ""
    assert numbers_not_told(replace(FIRST, recomputed=None)) == ""


def test_rules_common_to_all_readable_records() -> None:
    """Only rules that held in each are common; an unreadable record has no say, and no record no rules."""
    assert common_rules([BOTTLE, CYLINDER]) == ("path-contradicts-states",)
    assert common_rules([BOTTLE, QUENCH]) == BOTTLE.rules_held
    assert common_rules(REVISE.records) == ()
    assert common_rules([]) == ()
