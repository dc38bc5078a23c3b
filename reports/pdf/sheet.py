"""The alternate calculation sheet: every step with its formula, the numbers substituted, and its outputs."""

from __future__ import annotations

from typing import Any, Final

from reportlab.lib.units import mm

from checker.findings import Checked, RecordReview, SheetLine, SheetValue
from reports.numbers import shown
from reports.pdf.checks import standing_word
from reports.pdf.styles import CELL, TEXT_WIDTH
from reports.pdf.tables import Band, Column, Row, ruled_table
from reports.pdf.text import Pointer, Symbol, bold, formula, line_break, paragraph

_VALUE: Final = 29 * mm
_QUANTITY: Final = TEXT_WIDTH - 17 * mm - 3 * _VALUE - 19 * mm
_COLUMNS: Final = (
    Column("Step and outputs", _QUANTITY),
    Column("", 17 * mm),
    Column("Independent", _VALUE, right=True),
    Column("Carried", _VALUE, right=True),
    Column("Stated", _VALUE, right=True),
    Column("", 19 * mm, right=True),
)


def calculation_sheet(record: RecordReview) -> Any:
    """Return the sheet, or None where there is none."""
    checked = {item.quantity: item for item in record.checked}
    rows: list[Row] = []
    for number, line in enumerate(record.sheet, 1):
        rows.append(Band(_step(number, line)))
        rows += [_output(value, checked.get(value.quantity)) for value in line.outputs]
    return ruled_table(_COLUMNS, rows) if rows else None


def _step(number: int, line: SheetLine) -> Any:
    parts: list[str] = [bold(f"{number}  {line.title}")]
    if line.formula:
        parts += [line_break(), formula(line.formula)]
    if line.substituted:
        parts += [line_break(), formula(f"= {line.substituted}")]
    if line.note:
        parts += [line_break(), line.note]
    return paragraph(CELL, *parts)


def _output(value: SheetValue, checked: Checked | None) -> list[Any]:
    return [
        Pointer(value.quantity),
        Symbol(value.symbol),
        shown(value.independent),
        shown(value.carried),
        shown(value.stated),
        standing_word(checked) if checked else "",
    ]
