"""The demo packages: the correct one is accepted, every slip of the other is found where it started."""

from pathlib import Path
from typing import Any

import pytest
import yaml

from checker import Grade, Review, Verdict, review

DEMO = Path(__file__).parents[1] / "fixtures" / "demo"
SLIPS: list[dict[str, Any]] = yaml.safe_load((DEMO / "slips.yaml").read_text("utf-8"))["slips"]


@pytest.fixture(scope="module")
def revision_a() -> Review:
    """Return the review of revision A."""
    return review(DEMO / "revision-a.yaml")


@pytest.fixture(scope="module")
def revision_b() -> Review:
    """Return the review of revision B."""
    return review(DEMO / "revision-b.yaml")


def test_the_correct_package_is_accepted_without_discrepancy_or_query(revision_b):
    """Revision B: every stated result is recomputed and agrees."""
    raised = [f for f in revision_b.findings if f.grade is not Grade.REMARK]
    assert raised == []
    assert revision_b.verdict is Verdict.ACCEPT


def test_the_correct_package_is_checked_and_not_just_silent(revision_b):
    """At least eight records, each with results that were held against a recomputed value."""
    assert len(revision_b.records) >= 8
    assert all(len(record.checked) >= 4 for record in revision_b.records)
    assert all(c.recomputed is not None for record in revision_b.records for c in record.checked)


def test_the_package_with_slips_is_returned(revision_a):
    """Revision A must be corrected."""
    assert revision_a.verdict is Verdict.REVISE


@pytest.mark.parametrize("slip", SLIPS, ids=lambda slip: f"{slip['record']}-{slip['kind']}")
def test_every_slip_is_found_at_its_line(revision_a, slip):
    """Each slip of the list gives a discrepancy at the origin's line, in the right record."""
    found = [
        f
        for f in revision_a.findings
        if f.record == slip["record"] and f.location is not None and f.location.line == slip["line"]
    ]
    assert found, f"nothing at line {slip['line']}"
    assert Grade.DISCREPANCY in {f.grade for f in found}
    assert slip["quantity"] in {f.quantity for f in found}


def test_nothing_else_is_accused(revision_a):
    """Every discrepancy and query of revision A stands at the line of a slip."""
    lines = {slip["line"] for slip in SLIPS}
    stray = [
        f
        for f in revision_a.findings
        if f.grade is not Grade.REMARK and f.location and f.location.line not in lines
    ]
    assert stray == []


@pytest.mark.parametrize("slip", SLIPS, ids=lambda slip: f"{slip['record']}-{slip['kind']}")
def test_what_a_slip_spoiled_is_listed_under_it(revision_a, slip):
    """Nothing is listed that the slip did not spoil; what it moved by less than the tolerance may be left out."""
    listed = {
        pointer
        for f in revision_a.findings
        if f.record == slip["record"] and f.location is not None and f.location.line == slip["line"]
        for pointer in f.spoils
    }
    assert listed <= set(slip["spoils"])
    assert len(listed) >= 0.5 * len(slip["spoils"])


def test_two_reviews_of_one_package_are_equal(revision_a):
    """Reviewing again gives the same review, findings in the same order."""
    assert review(DEMO / "revision-a.yaml") == revision_a
