"""Balances as ledgers: changes, transfers and generation, their sums, and the residual that closes or does not."""

from __future__ import annotations

import math
import re
from collections.abc import Callable, Sequence
from typing import Any, Final

from reportlab.lib.units import mm
from reportlab.platypus import Spacer

from checker.findings import Amount, Ledger, LedgerLine
from reports.numbers import MISSING, rounded, shown, signed
from reports.pdf.styles import CELL_RIGHT, MINOR, TEXT_WIDTH
from reports.pdf.tables import Band, Column, Row, ruled_table
from reports.pdf.text import Symbol, bold, paragraph

Side = Callable[[LedgerLine], Amount | None]

_VALUE: Final = 40 * mm
_SYMBOL: Final = 28 * mm
_SIDES: Final = (
    ("change", "Change of the system"),
    ("share", "Shares of the bodies in it"),
    ("transfer", "Transfers across the boundary"),
    ("generation", "Generated in the system"),
    ("internal", "Between the bodies, beside the sums"),
)
_PLAIN: Final = re.compile(r"[-+−]?[0-9]+(\.[0-9]*)?")
_LARGEST: Final = 1e7
_NEGLIGIBLE: Final = 1e-9  # of the largest term: what remains there is the rounding of the machine


def ledger_blocks(ledgers: Sequence[Ledger]) -> list[list[Any]]:
    """Return one block for each balance; each is to be kept on one page."""
    return [[paragraph(MINOR, _title(ledger)), _table(ledger), Spacer(1, 4)] for ledger in ledgers]


def _title(ledger: Ledger) -> str:
    return f"{ledger.kind.capitalize()} balance of {ledger.process}"


def _table(ledger: Ledger) -> Any:
    columns = (
        Column("Term", TEXT_WIDTH - _SYMBOL - 2 * _VALUE),
        Column("", _SYMBOL),
        Column("Stated", _VALUE, right=True),
        Column("Recomputed", _VALUE, right=True),
    )
    rows: list[Row] = []
    for side, title in _SIDES:
        lines = [line for line in ledger.lines if line.side == side]
        if lines:
            rows.append(Band(title))
            rows += [
                [Symbol(line.label), _symbol(line), shown(line.stated), shown(line.recomputed)]
                for line in lines
            ]
        if len(lines) > 1 and any(line.sign for line in lines):
            rows.append([bold("Sum"), "", *(_sum(lines, of, ledger.unit) for of in _BOTH)])
    return ruled_table(columns, [*rows, *_closing(ledger)])


_BOTH: Final[tuple[Side, Side]] = (lambda line: line.stated, lambda line: line.recomputed)


def _symbol(line: LedgerLine) -> Symbol:
    sign = {-1: "− ", 0: "", 1: "+ "}.get(line.sign, "")
    return Symbol(f"{sign}{line.symbol}")


def _sum(lines: Sequence[LedgerLine], of: Side, unit: str) -> Any:
    """Return the signed sum of a column, where every term is there in the unit of the ledger."""
    amounts = [of(line) for line in lines]
    numbers = [amount.value for amount in amounts if amount and amount.unit == unit]
    if len(numbers) < len(lines) or not all(map(math.isfinite, numbers)):
        return MISSING
    total = math.fsum(line.sign * number for line, number in zip(lines, numbers, strict=True))
    return paragraph(CELL_RIGHT, bold(f"{sum_text(amounts, total)} {unit}"))


def sum_text(amounts: Sequence[Amount | None], total: float) -> str:
    """Return a sum with as many decimals as the term that is written with most of them."""
    texts = [amount.text.removesuffix(amount.unit).strip() for amount in amounts if amount]
    if not all(map(_PLAIN.fullmatch, texts)) or abs(total) >= _LARGEST:
        return rounded(total, 5)
    decimals = max(len(text.partition(".")[2]) for text in texts)
    written = f"{total:.{decimals}f}".replace("-", "−")
    return written if any(digit in written for digit in "123456789") else "0"


def _closing(ledger: Ledger) -> list[Row]:
    residuals = (ledger.residual_stated, ledger.residual_recomputed)
    closes = (ledger.closes_stated, ledger.closes_recomputed)
    equation = "Change − transfers" + (" − generation" if _generates(ledger) else "")
    return [
        [bold(equation), "", *(_residual(ledger, value) for value in residuals)],
        [bold("The balance"), "", *(paragraph(CELL_RIGHT, bold(_word(value))) for value in closes)],
    ]


def _generates(ledger: Ledger) -> bool:
    return any(line.side == "generation" for line in ledger.lines)


def _residual(ledger: Ledger, value: float | None) -> str:
    if value is None:
        return MISSING
    terms = [abs(a.value) for line in ledger.lines for a in (line.stated, line.recomputed) if a]
    largest = max(filter(math.isfinite, terms), default=0.0)
    return f"{'0' if abs(value) <= _NEGLIGIBLE * largest else signed(value)} {ledger.unit}"


def _word(closes: bool | None) -> str:
    if closes is None:
        return "lacks a term"
    return "closes" if closes else "does not close"
