"""The summary: every record on one line, and what concerns the package as a whole."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any, Final

from reportlab.lib.units import mm
from reportlab.platypus import KeepTogether

from checker.findings import Grade, RecordReview, Review
from reports.order import Group
from reports.pdf.checks import rule_list
from reports.pdf.findings import finding_blocks
from reports.pdf.keys import record_key
from reports.pdf.styles import BODY, CELL, HEADING, SUBHEADING, TEXT_WIDTH
from reports.pdf.tables import Column, ruled_table
from reports.pdf.text import Heading, link, paragraph
from reports.phrases import held, not_recomputed

_COLUMNS: Final = (
    Column("Record", 29 * mm),
    Column("Title", TEXT_WIDTH - 138 * mm),
    Column("Verdict", 27 * mm),
    Column("Discrepancies", 23 * mm, right=True),
    Column("Queries", 15 * mm, right=True),
    Column("Remarks", 16 * mm, right=True),
    Column("Held", 12 * mm, right=True),
    Column("Not checked", 16 * mm, right=True),
)


def summary(review: Review, package: Group, common: Sequence[str]) -> list[Any]:
    """Return the table of records, the findings on the package itself, and the rules common to all records."""
    parts: list[Any] = [Heading(HEADING, "Summary of records", "summary", 0)]
    if review.records:
        rows = [_row(review, number, record) for number, record in enumerate(review.records, 1)]
        parts.append(ruled_table(_COLUMNS, rows))
    else:
        parts.append(paragraph(BODY, "The package holds no record that could be reviewed."))
    if package.comments:
        first, *others = finding_blocks(package.comments)
        parts.append(KeepTogether([Heading(SUBHEADING, "The package as a whole", "package", 1), *first]))
        parts += [KeepTogether(block) for block in others]
    if common:
        title = f"Rules that found nothing in any record ({len(common)})"
        parts += [Heading(SUBHEADING, title, "rules", 1), rule_list(", ".join(common))]
    return parts


def _row(review: Review, number: int, record: RecordReview) -> list[Any]:
    findings = review.of_record(record.id)
    counts = [str(sum(f.grade is grade for f in findings) or "–") for grade in Grade]
    unchecked = len(record.not_checked) + len(not_recomputed(record))
    return [
        paragraph(CELL, link(record.id, record_key(number))),
        record.title[:90],
        review.verdict_of(record).value,
        *counts,
        str(len(held(record)) or "–"),
        str(unchecked or "–") if record.readable else "all",
    ]
