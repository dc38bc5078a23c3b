"""Ruled tables: light lines between rows, a heavier one under the head, which is repeated on every page."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any, Final

from reportlab.platypus import Table, TableStyle

from reports.pdf.fonts import REGULAR, width
from reports.pdf.styles import CELL, CELL_HEAD, CELL_HEAD_RIGHT, CELL_RIGHT, HAIRLINE, INK, RULE, SHADE
from reports.pdf.text import Markup, Pointer, Symbol, cut, formula, needs_markup, paragraph, pointer

PADDING: Final = 4.0
_MOST_LINES: Final = 12  # of one cell: then a row fits a page whatever its cells hold
_FULL: Final = 400.0
Cell = Any
"""A text of others, a paragraph, or a list of flowables."""


@dataclass(frozen=True, slots=True)
class Column:
    """A column: its head, its width in points, and on which side its content stands."""

    head: str
    width: float
    right: bool = False


@dataclass(frozen=True, slots=True)
class Band:
    """A row that runs across the table and opens a group of rows."""

    content: Cell


Row = Sequence[Cell] | Band


def ruled_table(
    columns: Sequence[Column], rows: Sequence[Row], *, head: bool = True, grid: bool = False
) -> Any:
    """Return a table of rows and bands; with a ``grid`` where its cells are to be written in."""
    data = [_heads(columns)] if head else []
    style = list(_BASE)
    for row in rows:
        if isinstance(row, Band):
            style += _band(len(data), last=row is rows[-1])
            data.append([_fit(row.content, None), *[""] * (len(columns) - 1)])
        else:
            data.append([_fit(cell, column) for cell, column in zip(row, columns, strict=True)])
    style += [("ALIGN", (i, 0), (i, -1), "RIGHT") for i, column in enumerate(columns) if column.right]
    if head:
        style.append(("LINEBELOW", (0, 0), (-1, 0), 0.8, INK))
    if grid:
        style.append(("GRID", (0, 0), (-1, -1), HAIRLINE, RULE))
    widths = [column.width for column in columns]
    return Table(data, widths, style=TableStyle(style), repeatRows=int(head), hAlign="LEFT")


def fact_table(rows: Sequence[tuple[Cell, Cell]], first: float, second: float) -> Any:
    """Return a table of names with their contents."""
    named = [(paragraph(CELL_HEAD, name), content) for name, content in rows]
    return ruled_table((Column("", first), Column("", second)), named, head=False)


# Empty cells select a font too; without this one the library's own, which is not embedded, would be referred to.
TABLE_FONT: Final = ("FONT", (0, 0), (-1, -1), REGULAR, CELL.fontSize, CELL.leading)
_BASE: Final = (
    TABLE_FONT,
    ("TEXTCOLOR", (0, 0), (-1, -1), INK),
    ("VALIGN", (0, 0), (-1, -1), "TOP"),
    ("LEFTPADDING", (0, 0), (-1, -1), PADDING),
    ("RIGHTPADDING", (0, 0), (-1, -1), PADDING),
    ("TOPPADDING", (0, 0), (-1, -1), 2.2),
    ("BOTTOMPADDING", (0, 0), (-1, -1), 3.2),
    ("LINEBELOW", (0, 0), (-1, -1), HAIRLINE, RULE),
)


def _band(row: int, last: bool) -> list[tuple[Any, ...]]:
    style: list[tuple[Any, ...]] = [("SPAN", (0, row), (-1, row)), ("BACKGROUND", (0, row), (-1, row), SHADE)]
    return style if last else [*style, ("NOSPLIT", (0, row), (-1, row + 1))]  # no band at the foot of a page


def _heads(columns: Sequence[Column]) -> list[Cell]:
    return [paragraph(CELL_HEAD_RIGHT if column.right else CELL_HEAD, column.head) for column in columns]


def _fit(cell: Cell, column: Column | None) -> Cell:
    """Return a short text as it is, which is cheap to set, and a longer one as a paragraph of limited height."""
    if not isinstance(cell, str):
        return cell
    room = column.width - 2 * PADDING if column else _FULL
    style = CELL_RIGHT if column and column.right else CELL
    if isinstance(cell, Markup):
        return paragraph(style, cell)
    if isinstance(cell, Pointer):
        return paragraph(style, pointer(cell, room, CELL))
    text = cut(cell, _MOST_LINES * room, CELL)
    if isinstance(cell, Symbol):
        return paragraph(style, formula(text))
    if needs_markup(text) or width(text, REGULAR, CELL.fontSize) > room:
        return paragraph(style, text)
    return text
