"""What was checked in a record, what was not and why, and what the review assumed."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any, Final

from reportlab.lib.units import mm

from checker.findings import Checked, Outcome, RecordReview
from reports.numbers import deviation, shown, tolerance
from reports.pdf.styles import BODY, CELL, TEXT_WIDTH
from reports.pdf.tables import Column, Row, fact_table, ruled_table
from reports.pdf.text import Pointer, bold, marked, paragraph

_NAMES: Final = 38 * mm
_VALUE: Final = 23 * mm
_QUANTITY: Final = TEXT_WIDTH - 5 * _VALUE - 19 * mm
_COLUMNS: Final = (
    Column("Quantity", _QUANTITY),
    Column("Stated", _VALUE, right=True),
    Column("Recomputed", _VALUE, right=True),
    Column("Carried", _VALUE, right=True),
    Column("Deviation", _VALUE, right=True),
    Column("Tolerance", _VALUE, right=True),
    Column("", 19 * mm, right=True),
)


def checked_table(record: RecordReview) -> Any:
    """Return the table of comparisons, or None where nothing was compared."""
    rows: list[Row] = [_row(item) for item in record.checked]
    return ruled_table(_COLUMNS, rows) if rows else None


def _row(item: Checked) -> list[Any]:
    return [
        Pointer(item.quantity),
        shown(item.stated),
        shown(item.recomputed),
        shown(item.carried),
        deviation(item.deviation, item.tolerance, item.stated),
        tolerance(item.tolerance, item.stated),
        standing_word(item),
    ]


def standing_word(item: Checked) -> str:
    """Return in a word or two where a deviation comes from; what is wrong stands out by weight."""
    return bold(item.standing.value) if item.outcome is Outcome.WRONG else item.standing.value


def account(record: RecordReview, common: Sequence[str]) -> Any:
    """Return models, what was not checked, what was assumed and the rules that found nothing.

    Parameters
    ----------
    record : RecordReview
        The record; None is returned for an unreadable one.
    common : sequence of str
        Rules that found nothing in any record; the summary lists them, so they are not repeated here.

    Returns
    -------
    flowable or None
    """
    if not record.readable:
        return None
    rows: list[tuple[Any, Any]] = [("Model", model) for model in record.models]
    for item in record.checked:
        if item.outcome is Outcome.NOT_EVALUABLE:
            rows.append(("Not evaluable", f"{item.quantity}: {item.reason}"))
    rows += [("Not checked", f"{item.what}. Missing: {item.missing}") for item in record.not_checked]
    rows += [("Noted", text) for text in record.noted]
    rows += [("Assumed", text) for text in record.assumed]
    if record.rules_held:
        rows.append(("Rules that found nothing", _rules(record.rules_held, common)))
    if not rows:
        return paragraph(BODY, "Nothing in this record was checked.")
    return fact_table(rows, _NAMES, TEXT_WIDTH - _NAMES)


def _rules(names: Sequence[str], common: Sequence[str]) -> Any:
    own = [name for name in names if name not in common]
    shared = f"the {len(common)} listed in the summary" if common else ""
    return rule_list("; ".join(part for part in (shared, ", ".join(own)) if part))


def rule_list(text: str) -> Any:
    """Return a list of rules as a paragraph; the whole rulebook may be in it."""
    return paragraph(CELL, marked(text, 4000))
