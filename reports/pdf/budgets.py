"""The budgets of a record's tolerances as one compact table."""

from __future__ import annotations

from typing import Any, Final

from reportlab.lib.units import mm

from checker.budget import Budget, Kind
from checker.findings import Checked, RecordReview
from reports import numbers
from reports.budgets import INPUTS, MODELS, allowed
from reports.numbers import rounded
from reports.pdf.styles import TEXT_WIDTH
from reports.pdf.tables import Column, Row, ruled_table
from reports.pdf.text import Pointer

_VALUE: Final = 16 * mm
_ALLOWED: Final = 46 * mm
_COLUMNS: Final = (
    Column("Quantity", TEXT_WIDTH - _ALLOWED - 6 * _VALUE),
    Column("Allowance", _ALLOWED),
    Column("Digits", _VALUE, right=True),
    Column("Inputs", _VALUE, right=True),
    Column("Models", _VALUE, right=True),
    Column("U", _VALUE, right=True),
    Column("Tolerance", _VALUE, right=True),
    Column("Last digits", _VALUE, right=True),
)


def budget_table(record: RecordReview) -> Any:
    """Return the table of budgets, or None where nothing was compared.

    Digits, inputs and models are the contributions to U, expanded; the last digits of the inputs are no part of it.
    """
    rows: list[Row] = [
        _row(item, item.budget)
        for item in record.checked
        if item.budget is not None and item.deviation is not None
    ]
    return ruled_table(_COLUMNS, rows) if rows else None


def _row(item: Checked, budget: Budget) -> list[Any]:
    parts = (budget.size_of(Kind.DIGITS), budget.size_of(*INPUTS), budget.size_of(*MODELS))
    return [
        Pointer(item.quantity),
        allowed(budget, item.stated),
        *(rounded(part, 2) for part in parts),
        _sides(budget),
        numbers.tolerance(item.tolerance, item.stated),
        rounded(budget.last_digits, 2),
    ]


def _sides(budget: Budget) -> str:
    """Return U, or both sides where they differ."""
    if budget.below == budget.above:
        return rounded(budget.above, 2)
    return f"−{rounded(budget.below, 2)} +{rounded(budget.above, 2)}"
