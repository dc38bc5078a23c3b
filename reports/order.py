"""One order for every report: the package's own findings, then record by record, numbered throughout."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import count

from checker.findings import Finding, RecordReview, Review, reading_order


@dataclass(frozen=True, slots=True)
class Comment:
    """A finding with the number that it bears in all printed reports."""

    number: int
    finding: Finding


@dataclass(frozen=True, slots=True)
class Group:
    """The comments on one record; on the package itself where ``record`` is None."""

    record: RecordReview | None
    comments: tuple[Comment, ...]


def grouped(review: Review) -> tuple[Group, ...]:
    """Return all findings, each exactly once, numbered from 1; the package's own, maybe none, come first."""
    known = {record.id for record in review.records}
    buckets: dict[str | None, list[Finding]] = {}
    for finding in sorted(review.findings, key=reading_order):
        buckets.setdefault(finding.record if finding.record in known else None, []).append(finding)
    number = count(1)
    groups = []
    for record in (None, *review.records):
        mine = buckets.pop(record.id if record else None, [])  # a repeated identifier takes its findings once
        groups.append(Group(record, tuple(Comment(next(number), finding) for finding in mine)))
    return tuple(groups)
