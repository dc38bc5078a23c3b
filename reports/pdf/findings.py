"""A finding as a block: grade and rule, the sentence, the numbers side by side, then where it comes from."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import Any, Final

from reportlab.platypus import Spacer, Table, TableStyle

from checker.findings import Finding
from reports.budgets import budget_line, open_line, sources
from reports.numbers import deviation, shown, tolerance
from reports.order import Comment
from reports.pdf.keys import comment_key, finding_key
from reports.pdf.styles import CELL, CELL_HEAD, HAIRLINE, INK, NOTE_RIGHT, RULE, SHADE, TEXT_WIDTH
from reports.pdf.tables import PADDING, TABLE_FONT
from reports.pdf.text import anchor, bold, cut, formula, line_break, link, paragraph, pointer
from reports.phrases import cause, origin

_FIFTH: Final = TEXT_WIDTH / 5
_ACROSS: Final = TEXT_WIDTH - _FIFTH - 2 * PADDING


def finding_blocks(comments: Sequence[Comment]) -> list[list[Any]]:
    """Return the blocks of findings; each is to be kept on one page."""
    return [[_block(comment), Spacer(1, 7)] for comment in comments]


def _block(comment: Comment) -> Any:
    finding = comment.finding
    rows: list[list[Any]] = [_title(comment), [paragraph(CELL, finding.message), "", "", "", ""]]
    style = [*_STYLE, ("SPAN", (0, 1), (-1, 1))]
    if finding.stated or finding.recomputed:
        rows += _numbers(finding)
        style.append(("LINEABOVE", (0, 2), (-1, 2), HAIRLINE, RULE))
    for label, text in _particulars(finding):
        style += [("SPAN", (1, len(rows)), (-1, len(rows)))]
        rows.append([paragraph(CELL_HEAD, label), paragraph(CELL, text), "", "", ""])
    return Table(rows, [_FIFTH] * 5, style=TableStyle(style))


_STYLE: Final = (
    ("SPAN", (0, 0), (2, 0)),
    ("SPAN", (3, 0), (4, 0)),
    ("BACKGROUND", (0, 0), (-1, 0), SHADE),
    ("LINEABOVE", (0, 0), (-1, 0), 1, INK),
    ("LINEBELOW", (0, -1), (-1, -1), HAIRLINE, RULE),
    TABLE_FONT,
    ("VALIGN", (0, 0), (-1, -1), "TOP"),
    ("LEFTPADDING", (0, 0), (-1, -1), PADDING),
    ("RIGHTPADDING", (0, 0), (-1, -1), PADDING),
    ("TOPPADDING", (0, 0), (-1, -1), 2),
    ("BOTTOMPADDING", (0, 0), (-1, -1), 2.5),
)


def _title(comment: Comment) -> list[Any]:
    finding, number = comment.finding, comment.number
    place = finding.location
    where = f"{place.file}, line {place.line}, column {place.column}" if place else ""
    name = bold(f"{finding.grade.value.capitalize()}: {finding.rule}")
    to_sheet = link(f"comment {number}", comment_key(number))
    return [
        paragraph(CELL, anchor(finding_key(number)), name),
        "",
        "",
        paragraph(NOTE_RIGHT, to_sheet, *([line_break(), where] if where else [])),
        "",
    ]


def _numbers(finding: Finding) -> list[list[Any]]:
    values = (
        ("Stated", shown(finding.stated)),
        ("Recomputed", shown(finding.recomputed)),
        ("Carried", shown(finding.carried)),
        ("Deviation", deviation(finding.deviation, finding.tolerance, finding.stated)),
        ("Tolerance", tolerance(finding.tolerance, finding.stated)),
    )
    return [
        [paragraph(CELL_HEAD, name) for name, _ in values],
        [paragraph(CELL, cut(value, 8 * (_FIFTH - 2 * PADDING), CELL)) for _, value in values],
    ]


def _particulars(finding: Finding) -> Iterator[tuple[str, str]]:
    if finding.quantity:
        yield "Quantity", pointer(finding.quantity, _ACROSS, CELL)
    if finding.formula:
        yield "Formula", formula(finding.formula)
    yield from _budget(finding)
    if text := origin(finding):
        yield "Origin", text
    for item in finding.causes:
        yield "Likely cause" if item.likely else "Possible cause", cause(item, finding)
    if finding.spoils:
        yield "Spoils", ", ".join(finding.spoils)
    if finding.suggestion:
        yield "Suggestion", finding.suggestion
    if finding.basis:
        yield "Basis", finding.basis


def _budget(finding: Finding) -> Iterator[tuple[str, str]]:
    """Yield what the tolerance is made of."""
    budget = finding.budget
    if text := budget_line(budget, finding.deviation, finding.stated):
        yield "Tolerance", text
    if text := open_line(budget, finding.stated):
        yield "Inputs' last digits", text
    if budget is not None and finding.deviation is not None and (published := sources(budget)):
        yield "Model uncertainty", "; ".join(published)
