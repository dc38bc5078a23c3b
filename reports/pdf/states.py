"""The state table of a record: every body in every state, stated beside recomputed."""

from __future__ import annotations

from typing import Any, Final

from reportlab.lib.units import mm

from checker.findings import Outcome, RecordReview, StateCell, StateRow
from reports.numbers import deviation, shown
from reports.pdf.styles import CELL, TEXT_WIDTH
from reports.pdf.tables import Band, Column, Row, ruled_table
from reports.pdf.text import Symbol, bold, paragraph
from reports.phrases import words_of

_VALUE: Final = 32 * mm
_COLUMNS: Final = (
    Column("", 12 * mm),
    Column("Property", TEXT_WIDTH - 12 * mm - 3 * _VALUE - 24 * mm),
    Column("Stated", _VALUE, right=True),
    Column("Recomputed", _VALUE, right=True),
    Column("Deviation", _VALUE, right=True),
    Column("Outcome", 24 * mm, right=True),
)


def state_table(record: RecordReview) -> Any:
    """Return the state table, or None where the record has no states."""
    rows: list[Row] = []
    for row in record.states:
        rows += [Band(_title(row)), *map(_row, row.cells)]
    return ruled_table(_COLUMNS, rows) if rows else None


def _title(row: StateRow) -> Any:
    return paragraph(CELL, bold(f"{row.state}: {row.body}"), f", {row.phase}" if row.phase else "")


def _row(cell: StateCell) -> list[Any]:
    return [
        Symbol(cell.symbol),
        words_of(cell.name),
        shown(cell.stated),
        shown(cell.recomputed),
        deviation(cell.deviation, None, cell.stated),
        outcome_word(cell.outcome),
    ]


def outcome_word(outcome: Outcome | None) -> str:
    """Return the outcome as a word; what is wrong stands out by weight."""
    if outcome is None:
        return ""
    return bold(outcome.value) if outcome is Outcome.WRONG else outcome.value
