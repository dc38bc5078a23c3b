"""The comment sheet: one row for each finding, with room for the originator's response and the disposition."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any, Final

from reportlab.lib.units import mm
from reportlab.platypus import CondPageBreak, NextPageTemplate, PageBreak, Spacer

from checker.findings import Finding, Review
from reports.order import Comment
from reports.pdf.keys import comment_key, finding_key
from reports.pdf.styles import BODY, CELL, HEADING, MUTED_BODY, NOTE, SUBHEADING, WIDE_TEXT_WIDTH
from reports.pdf.tables import PADDING, Column, Row, ruled_table
from reports.pdf.text import Heading, Markup, anchor, bold, cut, line_break, link, marked, paragraph, pointer
from reports.phrases import numbers_not_told

_ROOM_TO_WRITE: Final = 15 * mm
_PLACE: Final = 46 * mm
_COMMENT: Final = 88 * mm
_COLUMNS: Final = (
    Column("No.", 11 * mm),
    Column("Place", _PLACE),
    Column("Comment", _COMMENT),
    Column("Originator’s response", WIDE_TEXT_WIDTH - 11 * mm - _PLACE - _COMMENT - 40 * mm),
    Column("Disposition", 40 * mm),
)
_SIGNED: Final = (
    Column("", 40 * mm),
    Column("Name", 75 * mm),
    Column("Date", 40 * mm),
    Column("Signature", 75 * mm),
)


def comment_sheet(review: Review, comments: Sequence[Comment]) -> list[Any]:
    """Return the comment sheet and the grounds of the rules that found something."""
    parts: list[Any] = [
        NextPageTemplate("landscape"),
        PageBreak(),
        Heading(HEADING, "Comment sheet", "comments", 0),
    ]
    if not comments:
        return [*parts, paragraph(BODY, "There are no comments.")]
    parts += [
        paragraph(MUTED_BODY, "One row for each finding. The number leads to the finding in its record."),
        ruled_table(_COLUMNS, [_row(comment) for comment in comments], grid=True),
        *_signatures(),
        *_grounds(review, [comment.finding for comment in comments]),
    ]
    return parts


def _row(comment: Comment) -> Row:
    number = paragraph(CELL, anchor(comment_key(comment.number)), _back(comment.number))
    return [number, _place(comment.finding), _comment(comment.finding), [Spacer(1, _ROOM_TO_WRITE)], ""]


def _back(number: int) -> Markup:
    return link(str(number), finding_key(number))


def _place(finding: Finding) -> Any:
    room = _PLACE - 2 * PADDING
    parts: list[str] = [bold(cut(finding.record or "package", 3 * room, CELL))]
    if finding.quantity:
        parts += [line_break(), pointer(finding.quantity, room, CELL)]
    if finding.location:
        parts += [line_break(), f"line {finding.location.line}, column {finding.location.column}"]
    return paragraph(CELL, *parts)


def _comment(finding: Finding) -> list[Any]:
    """Return the comment in short; its number leads to the whole."""
    sentences = [_lines(finding.message, 8)]
    sentences += [_lines(numbers_not_told(finding), 4), _lines(finding.suggestion, 6)]
    grade = bold(f"{finding.grade.value.capitalize()}: ")
    return [
        paragraph(CELL, grade, Markup(" ".join(marked(sentence) for sentence in sentences if sentence))),
        paragraph(NOTE, _lines(finding.rule, 2)),
    ]


def _lines(text: str, most: int) -> str:
    return cut(text, most * (_COMMENT - 2 * PADDING), CELL)


def _signatures() -> list[Any]:
    rows: list[Row] = [[who, [Spacer(1, 10 * mm)], "", ""] for who in ("Originator", "Reviewer")]
    return [
        CondPageBreak(45 * mm),
        paragraph(SUBHEADING, "Closed out by"),
        ruled_table(_SIGNED, rows, grid=True),
    ]


def _grounds(review: Review, findings: Sequence[Finding]) -> list[Any]:
    """Return why the rules that found something are rules, with their published basis."""
    used = {finding.rule for finding in findings}
    rows: list[Row] = [
        [rule.name, rule.says, rule.rationale, rule.basis] for rule in review.rules if rule.name in used
    ]
    if not rows:
        return []
    columns = (
        Column("Rule", 58 * mm),
        Column("Says", 62 * mm),
        Column("Rationale", WIDE_TEXT_WIDTH - 175 * mm),
        Column("Basis", 55 * mm),
    )
    heading = Heading(SUBHEADING, "Grounds of these comments", "grounds", 1)
    return [CondPageBreak(45 * mm), heading, ruled_table(columns, rows)]
