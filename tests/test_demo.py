"""The demo packages: the correct one is accepted, every slip of the other is found where it started."""

from functools import cache
from pathlib import Path
from typing import Any

import pytest
import yaml

from checker import Grade, Review, Verdict, review

DEMO = Path(__file__).parents[1] / "fixtures" / "demo"
PACKAGES = {"revision": "slips", "practice": "practice-slips"}
"""Demo package → the list of the slips in its wrong version."""


def _slips(package: str) -> list[dict[str, Any]]:
    """Return the slips of the wrong version of a package."""
    path = DEMO / f"{PACKAGES[package]}.yaml"
    found: list[dict[str, Any]] = yaml.safe_load(path.read_text("utf-8"))["slips"]
    return found


SLIPS = [
    pytest.param(package, slip, id=f"{slip['record']}-{slip['kind']}")
    for package in PACKAGES
    for slip in _slips(package)
]


@cache
def wrong(package: str) -> Review:
    """Return the review of the version with slips."""
    return review(DEMO / f"{package}-a.yaml")


@cache
def right(package: str) -> Review:
    """Return the review of the correct version."""
    return review(DEMO / f"{package}-b.yaml")


@pytest.mark.parametrize("package", PACKAGES)
def test_the_correct_package_is_accepted_without_finding(package):
    """Every stated result of the correct version is recomputed and agrees, and there is nothing to remark."""
    assert right(package).findings == ()
    assert right(package).verdict is Verdict.ACCEPT


def test_the_correct_package_is_checked_and_not_just_silent():
    """At least eight records, each with results that were held against a recomputed value."""
    records = right("revision").records
    assert len(records) >= 8
    assert all(len(record.checked) >= 4 for record in records)
    assert all(c.recomputed is not None for record in records for c in record.checked)


def test_the_practice_package_is_checked_and_not_just_silent():
    """At least fifteen records, each with results that were held against a recomputed value, and nothing left out."""
    records = right("practice").records
    assert len(records) >= 15
    assert all(len(record.checked) >= 3 for record in records)
    assert all(c.recomputed is not None for record in records for c in record.checked)
    assert [n for record in records for n in record.not_checked] == []


@pytest.mark.parametrize("package", PACKAGES)
def test_the_package_with_slips_is_returned(package):
    """The version with slips must be corrected."""
    assert wrong(package).verdict is Verdict.REVISE


@pytest.mark.parametrize(("package", "slip"), SLIPS)
def test_every_slip_is_found_at_its_line(package, slip):
    """Each slip of the list gives a discrepancy at the origin's line, in the right record."""
    found = [
        f
        for f in wrong(package).findings
        if f.record == slip["record"] and f.location is not None and f.location.line == slip["line"]
    ]
    assert found, f"nothing at line {slip['line']}"
    assert Grade.DISCREPANCY in {f.grade for f in found}
    assert slip["quantity"] in {f.quantity for f in found}


@pytest.mark.parametrize("package", PACKAGES)
def test_nothing_else_is_accused(package):
    """Every discrepancy and query of the wrong version stands at the line of a slip."""
    lines = {slip["line"] for slip in _slips(package)}
    stray = [
        f
        for f in wrong(package).findings
        if f.grade is not Grade.REMARK and f.location and f.location.line not in lines
    ]
    assert stray == []


@pytest.mark.parametrize(("package", "slip"), SLIPS)
def test_what_a_slip_spoiled_is_listed_under_it(package, slip):
    """Nothing is listed that the slip did not spoil; what it moved by less than the tolerance may be left out."""
    listed = {
        pointer
        for f in wrong(package).findings
        if f.record == slip["record"] and f.location is not None and f.location.line == slip["line"]
        for pointer in f.spoils
    }
    assert listed <= set(slip["spoils"])
    assert len(listed) >= 0.5 * len(slip["spoils"])


@pytest.mark.parametrize("package", PACKAGES)
def test_two_reviews_of_one_package_are_equal(package):
    """Reviewing again gives the same review, findings in the same order."""
    assert review(DEMO / f"{package}-a.yaml") == wrong(package)
