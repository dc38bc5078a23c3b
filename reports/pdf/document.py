"""The whole document: cover, summary, records, comment sheet. The same review gives the same bytes."""

from __future__ import annotations

from io import BytesIO
from typing import Any, BinaryIO, Final

from reportlab.platypus import BaseDocTemplate, NextPageTemplate, PageBreak
from reportlab.platypus.doctemplate import LayoutError

from checker.findings import Review
from reports.order import grouped
from reports.pdf.canvas import FixedCanvas
from reports.pdf.comments import comment_sheet
from reports.pdf.cover import cover
from reports.pdf.fonts import REGULAR, glyphs
from reports.pdf.frame import NumberOfPages, page_templates
from reports.pdf.records import record_section
from reports.pdf.styles import BODY, CELL, HEADING, PORTRAIT
from reports.pdf.summary import summary
from reports.pdf.text import Heading, flat, paragraph
from reports.phrases import common_rules
from reports.plain import capped
from reports.terminal import TextOptions, text_lines

_APOLOGY: Final = (
    "This review could not be laid out as it should be, because a part of it does not fit a page. "
    "Its content follows in full as plain text."
)


def write_pdf(review: Review, stream: BinaryIO) -> None:
    """Write the review as a PDF document; nothing is written before the document is complete."""
    try:
        data = _built(review, _story(review))
    except LayoutError:  # content that no page can hold must not cost the reader the findings
        data = _built(review, _plain_story(review))
    stream.write(data)


def _story(review: Review) -> list[Any]:
    package, *records = grouped(review)
    common = common_rules(review.records)
    story = [
        NextPageTemplate("portrait"),
        *cover(review),
        PageBreak(),
        *summary(review, package, common),
    ]
    for number, group in enumerate(records, 1):
        if group.record:
            story += record_section(review, group.record, group, number, common)
    comments = [comment for group in (package, *records) for comment in group.comments]
    return [*story, *comment_sheet(review, comments), NumberOfPages()]


def _plain_story(review: Review) -> list[Any]:
    lines = [paragraph(CELL, line) for line in text_lines(review, TextOptions(width=100)) if line.strip()]
    return [
        NextPageTemplate("portrait"),
        Heading(HEADING, "Review", "cover", 0),
        paragraph(BODY, _APOLOGY),
        *lines,
        NumberOfPages(),
    ]


def _built(review: Review, story: list[Any]) -> bytes:
    glyphs()
    package = review.package
    stream = BytesIO()
    document = BaseDocTemplate(
        stream,
        pagesize=PORTRAIT,
        invariant=1,
        pageCompression=1,
        initialFontName=REGULAR,
        lang="en-GB",
        title=capped(flat(f"Review of {package.number or package.file}, revision {package.revision}"), 200),
        author="",
        subject=f"Verdict: {review.verdict.value}",
        creator="jouletally",
        displayDocTitle=True,
    )
    document.addPageTemplates(page_templates(review))
    document.build(story, canvasmaker=FixedCanvas)
    return stream.getvalue()
