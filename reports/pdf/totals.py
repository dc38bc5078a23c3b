"""What several processes add up to: a table for a cycle or a sequence, with its efficiency beside what is possible."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import Any, Final

from reportlab.lib.units import mm
from reportlab.platypus import Spacer

from checker.findings import Amount, Totals, TotalsFact, TotalsRow
from reports.numbers import MISSING, shown
from reports.pdf.styles import CELL_RIGHT, MINOR, TEXT_WIDTH
from reports.pdf.tables import Column, Row, ruled_table
from reports.pdf.text import Markup, Symbol, bold, formula, paragraph
from reports.plain import capped

_WORD: Final = 20 * mm
_LABEL: Final = 33 * mm
_NAME: Final = 42 * mm
_SYMBOL: Final = 15 * mm
_VALUE: Final = 30 * mm
_LIMIT: Final = TEXT_WIDTH - _NAME - _SYMBOL - 2 * _VALUE
_HEADS: Final = {"Q": "heat in", "W": "work out"}
_LONGEST: Final = 40
"""Characters of a label."""


def totals_blocks(tables: Sequence[Totals]) -> list[list[Any]]:
    """Return one block for each table; each is to be kept on one page."""
    return [_block(table) for table in tables if table.columns]


def _block(table: Totals) -> list[Any]:
    title = "Balance of the cycle" if table.kind == "cycle" else f"Balance of the sequence {table.name}"
    parts = [paragraph(MINOR, capped(title, 120)), _sums(table), Spacer(1, 4)]
    if table.facts:
        parts += [_facts(table.facts), Spacer(1, 4)]
    return parts


def _sums(table: Totals) -> Any:
    wide = (TEXT_WIDTH - _LABEL - _WORD) / len(table.columns)
    columns = [
        Column("Process", _LABEL),
        Column("", _WORD),
        *(Column(_head(symbol, unit), wide, right=True) for symbol, unit in table.columns),
    ]
    rows: list[Row] = [line for row in table.rows for line in _lines(row, table, strong=False)]
    return ruled_table(columns, [*rows, *_lines(table.sum, table, strong=True)])


def _head(symbol: str, unit: str) -> Markup:
    name = f", {_HEADS[symbol]}" if symbol in _HEADS else ""
    return formula(capped(f"{symbol}{name}" + (f" [{unit}]" if unit else ""), _LONGEST))


def _lines(row: TotalsRow, table: Totals, strong: bool) -> Iterator[Row]:
    """Yield the recomputed numbers, and below them the stated ones where there are some."""
    cells = row.cells[: len(table.columns)]
    missing = [""] * (len(table.columns) - len(cells))
    label = bold(row.label) if strong else capped(row.label, _LONGEST)
    for word, amounts in (
        ("recomputed", [cell.recomputed for cell in cells]),
        ("stated", [cell.stated for cell in cells]),
    ):
        if word == "recomputed" or any(amounts):
            units = (unit for _, unit in table.columns)
            numbers = [_number(amount, unit, word) for amount, unit in zip(amounts, units, strict=False)]
            yield [label, word, *(_weighted(text, strong) for text in numbers), *missing]
            label = ""


def _number(amount: Amount | None, unit: str, word: str) -> str:
    """Return an amount without the unit of its column; one that was never stated leaves its place empty."""
    if amount is None:
        return MISSING if word == "recomputed" else ""
    text = shown(amount)
    return text.removesuffix(unit).strip() if amount.unit == unit else text


def _weighted(text: str, strong: bool) -> Any:
    return paragraph(CELL_RIGHT, bold(text)) if strong and text else text


def _facts(facts: Sequence[TotalsFact]) -> Any:
    """Return the results beside the sums; a column for what is possible only where there is such a limit."""
    limited = any(fact.limit for fact in facts)
    columns = (
        Column("", _NAME),
        Column("", _SYMBOL),
        Column("Stated", _VALUE, right=True),
        Column("Recomputed", _VALUE, right=True),
        Column("At most by the second law" if limited else "", _LIMIT, right=True),
    )
    return ruled_table(columns, [_fact(fact) for fact in facts])


def _fact(fact: TotalsFact) -> Row:
    limit = f"{shown(fact.limit)}, {fact.limit_basis}" if fact.limit else ""
    values = (shown(fact.pair.stated), shown(fact.pair.recomputed))
    return [capped(fact.label, _LONGEST), Symbol(fact.symbol), *values, limit]
