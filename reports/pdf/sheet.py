"""The alternate calculation sheet: every step with its formula, the numbers substituted, and its outputs."""

from __future__ import annotations

from typing import Any, Final

from reportlab.lib.units import mm

from checker.findings import Checked, RecordReview, SheetLine, SheetValue
from reports.numbers import shown
from reports.pdf.checks import standing_word
from reports.pdf.styles import CELL, TEXT_WIDTH
from reports.pdf.tables import Band, Column, Row, ruled_table
from reports.pdf.text import Symbol, bold, formula, line_break, paragraph
from reports.phrases import words_of

_VALUE: Final = 28 * mm
_STANDING: Final = 19 * mm
_LONG: Final = 150
"""Characters of a formula beyond which it takes the whole width."""
_COLUMNS: Final = (
    Column("Step", TEXT_WIDTH - 3 * _VALUE - _STANDING),
    Column("Independent", _VALUE, right=True),
    Column("Carried", _VALUE, right=True),
    Column("Stated", _VALUE, right=True),
    Column("", _STANDING, right=True),
)


def calculation_sheet(record: RecordReview) -> Any:
    """Return the sheet, or None where there is none."""
    checked = {item.quantity: item for item in record.checked}
    rows: list[Row] = []
    for number, line in enumerate(record.sheet, 1):
        step = _step(number, line)
        if len(line.outputs) == 1 and len(_worked(line)) < _LONG:  # the usual case: step and value in one row
            rows.append([step, *_values(line.outputs[0], checked)])
        else:
            rows.append(Band(step))
            several = len({_whose(value) for value in line.outputs}) > 1
            rows += [[_name(value, several), *_values(value, checked)] for value in line.outputs]
    return ruled_table(_COLUMNS, rows) if rows else None


def _step(number: int, line: SheetLine) -> Any:
    parts: list[str] = [bold(f"{number}  {line.title}")]
    if worked := _worked(line):
        parts += [line_break(), formula(worked)]
    if line.note:
        parts += [line_break(), line.note]
    return paragraph(CELL, *parts)


def _worked(line: SheetLine) -> str:
    """Return the formula with its numbers: substituted, or listed where they enter in no simple way."""
    if not line.substituted or line.formula.endswith(f"= {line.substituted}"):
        return line.formula
    join = " with " if " = " in line.substituted else " = "
    return f"{line.formula}{join}{line.substituted}"


def _whose(value: SheetValue) -> str:
    """Return in words whose quantity a pointer names, such as ``air in lifted``."""
    parts = value.quantity.split("/")[:-1]
    return f"{parts[2]} in {parts[1]}" if parts[:1] == ["states"] and len(parts) == 3 else "/".join(parts[1:])


def _name(value: SheetValue, several: bool) -> Symbol:
    """Return the last part of a pointer in words, with its symbol, and whose it is where a step finds ``several``."""
    name = words_of(value.quantity.rsplit("/", 1)[-1])
    whose = f", {_whose(value)}" if several else ""
    return Symbol(f"{name} {value.symbol}".rstrip() + whose)


def _values(value: SheetValue, checked: dict[str, Checked]) -> list[Any]:
    item = checked.get(value.quantity)
    return [
        shown(value.independent),
        shown(value.carried),
        shown(value.stated),
        standing_word(item) if item else "",
    ]
