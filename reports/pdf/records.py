"""One record: verdict, findings, states, balances, diagrams, what was checked, and the calculation sheet."""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any, Final

from reportlab.lib.units import mm
from reportlab.platypus import CondPageBreak, KeepTogether, PageBreak

from checker.findings import RecordReview, Review
from reports.order import Group
from reports.pdf.budgets import budget_table
from reports.pdf.checks import account, checked_table
from reports.pdf.corrections import correction_table
from reports.pdf.diagrams import diagram_rows
from reports.pdf.findings import finding_blocks
from reports.pdf.flows import flow_blocks
from reports.pdf.keys import part_key, record_key
from reports.pdf.ledgers import ledger_blocks
from reports.pdf.sheet import calculation_sheet
from reports.pdf.states import state_table
from reports.pdf.styles import BODY, HEADING, SUBHEADING
from reports.pdf.text import Heading, bold, paragraph
from reports.pdf.totals import totals_blocks
from reports.phrases import grade_counts

_ROOM_FOR_A_START: Final = 36 * mm


def record_section(
    review: Review, record: RecordReview, group: Group, number: int, common: Sequence[str]
) -> list[Any]:
    """Return the pages of one record; ``common`` are the rules that the summary lists for all."""
    findings = [comment.finding for comment in group.comments]
    verdict = review.verdict_of(record).value
    head = [
        PageBreak(),
        Heading(HEADING, f"{record.id}: {record.title}"[:200], record_key(number), 0),
        paragraph(BODY, "Verdict on this record: ", bold(verdict), f". {_capital(grade_counts(findings))}."),
    ]
    if not record.readable:
        head.append(paragraph(BODY, "This record could not be read: nothing in it was checked."))
    parts = [
        _blocks(number, "findings", "Findings", finding_blocks(group.comments)),
        _table(number, "corrections", "Corrections", correction_table(record)),
        _table(number, "states", "States", state_table(record)),
        _blocks(
            number, "balances", "Balances", [*totals_blocks(record.totals), *ledger_blocks(record.ledgers)]
        ),
        _blocks(number, "flows", "Flows between the bodies", flow_blocks(record.flows)),
        _blocks(number, "diagrams", "Diagrams", diagram_rows(record.diagrams)),
        _table(number, "checked", "Results held against the recomputation", checked_table(record)),
        _table(number, "budgets", "What the tolerances are made of", budget_table(record)),
        _table(number, "account", "Not checked, assumed, models", account(record, common)),
        _table(number, "sheet", "Alternate calculation sheet", calculation_sheet(record)),
    ]
    return head + [flowable for part in parts for flowable in part]


def _table(number: int, name: str, title: str, table: Any) -> list[Any]:
    """Return a table with its heading; it may go on over pages."""
    if table is None:
        return []
    return [CondPageBreak(_ROOM_FOR_A_START), Heading(SUBHEADING, title, part_key(number, name), 1), table]


def _blocks(number: int, name: str, title: str, blocks: Sequence[list[Any]]) -> list[Any]:
    """Return blocks that stay on one page each, the heading with the first of them."""
    if not blocks:
        return []
    heading = Heading(SUBHEADING, title, part_key(number, name), 1)
    return [KeepTogether([heading, *blocks[0]]), *(KeepTogether(block) for block in blocks[1:])]


def _capital(text: str) -> str:
    return text[:1].upper() + text[1:]
