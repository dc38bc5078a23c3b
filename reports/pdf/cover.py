"""The cover, with what was reviewed, the verdict, cautions and signatures; behind it, the basis of the review."""

from __future__ import annotations

from typing import Any, Final

from reportlab.lib.units import mm
from reportlab.platypus import CondPageBreak, KeepTogether, PageBreak, Spacer, Table, TableStyle

from checker.findings import Grade, Review
from reports.pdf.styles import (
    BODY,
    CELL,
    CELL_HEAD,
    HAIRLINE,
    HEADING,
    INK,
    KICKER,
    RULE,
    SHADE,
    SUBHEADING,
    SUBTITLE,
    TEXT_WIDTH,
    TITLE,
    VERDICT,
)
from reports.pdf.tables import TABLE_FONT, Column, fact_table, ruled_table
from reports.pdf.text import Heading, paragraph
from reports.phrases import PLURALS, VERDICT_MEANS

_NAME: Final = 34 * mm
_VALUE: Final = TEXT_WIDTH / 2 - _NAME
_COUNT: Final = 27 * mm
_SETTING: Final = 85 * mm
_WORDS: Final = (
    ("Stated", "What the originator wrote."),
    ("Recomputed", "What the alternate calculation gives from the originator’s inputs alone (independent)."),
    ("Carried", "What a step gives with the originator’s own earlier values. Where it agrees with what was stated, "
     "the slip lies above this step; where it does not, the slip is here."),
    ("Deviation", "Stated minus recomputed."),
    ("Tolerance", "The allowance of the review basis plus the uncertainty of the comparison."),
    ("Discrepancy", "Must be corrected."),
    ("Query", "Must be answered by the originator."),
    ("Remark", "For information."),
    ("Not evaluable", "Could not be recomputed; it neither agrees nor disagrees."),
)  # fmt: skip


def cover(review: Review) -> list[Any]:
    """Return the cover and the page with the basis of the review."""
    package = review.package
    return [
        paragraph(KICKER, "Review of a calculation package"),
        Heading(TITLE, package.number or package.file, "cover", 0),
        paragraph(SUBTITLE, package.title or "(no title stated)"),
        *_identity(review),
        Spacer(1, 9 * mm),
        _verdict(review),
        Spacer(1, 6 * mm),
        *_cautions(review),
        Spacer(1, 6 * mm),
        KeepTogether(_signatures()),
        PageBreak(),
        Heading(HEADING, "Basis of this review", "basis", 0),
        *_tables(review),
    ]


def _identity(review: Review) -> list[Any]:
    package = review.package
    pairs = (
        (("Revision", package.revision), ("Date", package.date)),
        (("Originator", package.originator), ("Project", package.project)),
        (("Checker", package.checker), ("Work convention", package.work_convention)),
    )
    rows = [
        [cell for name, value in pair for cell in (paragraph(CELL_HEAD, name), value or "not stated")]
        for pair in pairs
    ]
    columns = [Column("", _NAME), Column("", _VALUE)] * 2
    tools = ", ".join(f"{name} {version}" for name, version in review.tool)
    file = (
        ("File", package.file),
        ("SHA-256 of the file", package.sha256 or "unknown"),
        ("Reviewed with", tools or "unknown"),
    )
    return [ruled_table(columns, rows, head=False), fact_table(file, _NAME, TEXT_WIDTH - _NAME)]


def _verdict(review: Review) -> Any:
    """Return the box with the verdict, what it means, and the counts by grade."""
    word = review.verdict.value.capitalize()
    says = [paragraph(VERDICT, word), Spacer(1, 2), paragraph(BODY, VERDICT_MEANS[review.verdict])]
    counts = [[paragraph(VERDICT, str(review.count(g))), paragraph(CELL, PLURALS[g])] for g in Grade]
    box = Table([[says, *counts]], [TEXT_WIDTH - 3 * _COUNT, *[_COUNT] * 3], hAlign="LEFT")
    box.setStyle(TableStyle([
        TABLE_FONT,
        ("BOX", (0, 0), (-1, -1), 1.2, INK),
        ("LINEBEFORE", (1, 0), (-1, 0), HAIRLINE, RULE),
        ("BACKGROUND", (0, 0), (0, 0), SHADE),
        ("VALIGN", (0, 0), (-1, -1), "TOP"),
        ("LEFTPADDING", (0, 0), (-1, -1), 10), ("RIGHTPADDING", (0, 0), (-1, -1), 8),
        ("TOPPADDING", (0, 0), (-1, -1), 9), ("BOTTOMPADDING", (0, 0), (-1, -1), 9),
    ]))  # fmt: skip
    return box


def _cautions(review: Review) -> list[Any]:
    if not review.cautions:
        return []
    body = [paragraph(BODY, text) for text in review.cautions]
    return [Heading(SUBHEADING, "Cautions", "cautions", 1), *body]


def _signatures() -> list[Any]:
    """Return the lines on which the reviewer signs."""
    heads = [paragraph(CELL_HEAD, head) for head in ("", "Name", "Date", "Signature")]
    lines = [[paragraph(CELL_HEAD, who), "", "", ""] for who in ("Reviewer", "Approved by")]
    wide = (TEXT_WIDTH - _NAME - 30 * mm) / 2
    block = Table([heads, *lines], [_NAME, wide, 30 * mm, wide], [16, 13 * mm, 13 * mm], hAlign="LEFT")
    block.setStyle(TableStyle([
        TABLE_FONT,
        ("LINEBELOW", (1, 1), (-1, -1), 0.8, INK),
        ("VALIGN", (0, 0), (-1, -1), "BOTTOM"),
        ("LEFTPADDING", (0, 0), (-1, -1), 4), ("BOTTOMPADDING", (0, 0), (-1, -1), 3),
    ]))  # fmt: skip
    return [Heading(SUBHEADING, "Signatures", "signatures", 1), block]


def _tables(review: Review) -> list[Any]:
    """Return the settings that were applied, what applied them, and the words of the report."""
    parts: list[Any] = []
    for title, key, rows, first in (
        ("Settings", "settings", review.basis, _SETTING),
        ("Words of this report", "words", _WORDS, _NAME),
    ):
        if rows:
            table = fact_table(rows, first, TEXT_WIDTH - first)
            parts += [CondPageBreak(35 * mm), Heading(SUBHEADING, title, key, 1), table]
    return parts
