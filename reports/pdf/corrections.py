"""What has to be written in place of the wrong results of a record, as a table to copy from."""

from __future__ import annotations

from typing import Any, Final

from reportlab.lib.units import mm

from checker.findings import RecordReview
from reports.pdf.styles import TEXT_WIDTH
from reports.pdf.tables import Column, Row, ruled_table
from reports.pdf.text import Pointer, bold

_LINE: Final = 14 * mm
_VALUE: Final = 34 * mm
_QUANTITY: Final = TEXT_WIDTH - _LINE - 2 * _VALUE
_COLUMNS: Final = (
    Column("Line", _LINE),
    Column("Quantity", _QUANTITY),
    Column("Stated", _VALUE, right=True),
    Column("To be written", _VALUE, right=True),
)


def correction_table(record: RecordReview) -> Any:
    """Return the table of corrections in the order of the file, or None where nothing is to be corrected."""
    rows: list[Row] = [
        [str(item.location.line), Pointer(item.quantity), item.stated, bold(item.corrected)]
        for item in record.corrections
    ]
    return ruled_table(_COLUMNS, rows) if rows else None
