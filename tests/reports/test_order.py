"""Grouping and numbering of findings, and the verdict on one record."""

from __future__ import annotations

from dataclasses import replace

import pytest
from hypothesis import given

from checker.findings import Finding, Grade, Outcome, Review, Standing, Verdict
from reports.order import grouped
from tests.reports.sample import ACCEPT, EMPTY, REVISE
from tests.reports.sample_records import BOTTLE, DISC, QUENCH, corrected_bottle
from tests.reports.strategies import NO_SHRINKING, reviews


def test_the_package_comes_first_then_the_records_in_their_order() -> None:
    """Groups follow the package, then the records; numbers run on through all of them."""
    groups = grouped(REVISE)
    assert [g.record and g.record.id for g in groups] == [
        None,
        "bottle",
        "steam-cylinder",
        "brake-disc",
        "quench-bath",
    ]
    assert [c.number for g in groups for c in g.comments] == list(range(1, 9))


def test_within_a_record_the_graver_finding_comes_first() -> None:
    """Discrepancies come before queries, and earlier lines before later ones."""
    cylinder = grouped(REVISE)[2]
    assert [c.finding.grade for c in cylinder.comments] == [Grade.DISCREPANCY, Grade.DISCREPANCY, Grade.QUERY]


def test_the_order_does_not_depend_on_the_order_of_the_findings() -> None:
    """Reversed findings give the same groups."""
    assert grouped(replace(REVISE, findings=REVISE.findings[::-1])) == grouped(REVISE)


def test_a_finding_on_an_unknown_record_is_not_lost() -> None:
    """It is listed with the package."""
    stray = Finding("value-disagrees", "energy", Grade.QUERY, "stray", record="nowhere")
    first = grouped(replace(EMPTY, findings=(stray,)))[0]
    assert [c.finding for c in first.comments] == [stray]


@NO_SHRINKING
@given(reviews())
def test_every_finding_has_one_number(review: Review) -> None:
    """Whatever a review holds, each finding appears once, numbered without a gap."""
    comments = [c for group in grouped(review) for c in group.comments]
    assert [c.number for c in comments] == list(range(1, len(review.findings) + 1))
    assert {id(c.finding) for c in comments} == {id(f) for f in review.findings}


@pytest.mark.parametrize(
    ("review", "record", "verdict"),
    [
        (REVISE, BOTTLE, Verdict.REVISE),
        (REVISE, DISC, Verdict.ACCEPT_AS_NOTED),
        (REVISE, QUENCH, Verdict.HOLD),
        (ACCEPT, corrected_bottle(), Verdict.ACCEPT),
        (EMPTY, BOTTLE, Verdict.REVISE),  # what is inherited counts, wherever its origin is reported
        (
            EMPTY,
            replace(DISC, checked=(replace(DISC.checked[0], outcome=Outcome.NOT_EVALUABLE),)),
            Verdict.HOLD,
        ),
        (
            EMPTY,
            replace(DISC, checked=(replace(DISC.checked[0], standing=Standing.EARLY_ROUNDING),)),
            Verdict.ACCEPT,
        ),
    ],
)
def test_the_verdict_on_a_record_follows_what_concerns_it(
    review: Review, record: object, verdict: Verdict
) -> None:
    """A record is judged by its own findings, by what it inherited, and by what could not be recomputed."""
    assert review.verdict_of(record) is verdict  # type: ignore[arg-type]  # a list of parametrize
