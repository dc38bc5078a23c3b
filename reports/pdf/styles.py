"""Sizes, greys and measures of the page. Greys only: the document must read in black and white print."""

from __future__ import annotations

from typing import Final

from reportlab.lib.colors import HexColor
from reportlab.lib.enums import TA_RIGHT
from reportlab.lib.pagesizes import A4, landscape
from reportlab.lib.styles import ParagraphStyle
from reportlab.lib.units import mm

from reports.pdf.fonts import BOLD, REGULAR

INK: Final = HexColor(0x1A1A1A)
MUTED: Final = HexColor(0x595959)
RULE: Final = HexColor(0xBDBDBD)
FAINT: Final = HexColor(0xDCDCDC)
SHADE: Final = HexColor(0xF1F1F1)
HAIRLINE: Final = 0.4

PORTRAIT: Final = A4
LANDSCAPE: Final = landscape(A4)
MARGIN: Final = 18 * mm
HEADER: Final = 24 * mm
FOOTER: Final = 20 * mm
TEXT_WIDTH: Final = PORTRAIT[0] - 2 * MARGIN
WIDE_TEXT_WIDTH: Final = LANDSCAPE[0] - 2 * MARGIN


def _style(name: str, size: float, leading: float, **more: object) -> ParagraphStyle:
    settings = {"fontName": REGULAR, "textColor": INK, "splitLongWords": 1, **more}
    return ParagraphStyle(name, fontSize=size, leading=leading, **settings)


BODY: Final = _style("body", 9.5, 13, spaceAfter=4)
MUTED_BODY: Final = _style("muted body", 9, 12.5, textColor=MUTED, spaceAfter=4)
CELL: Final = _style("cell", 8.5, 11)
CELL_RIGHT: Final = _style("cell, right", 8.5, 11, alignment=TA_RIGHT)
CELL_HEAD: Final = _style("cell, head", 8, 10.5, fontName=BOLD)
CELL_HEAD_RIGHT: Final = _style("cell, head, right", 8, 10.5, fontName=BOLD, alignment=TA_RIGHT)
NOTE: Final = _style("note", 8, 10.5, textColor=MUTED)
NOTE_RIGHT: Final = _style("note, right", 8, 10.5, textColor=MUTED, alignment=TA_RIGHT)
MINOR: Final = _style("minor heading", 9, 12, fontName=BOLD, spaceBefore=3, spaceAfter=2)
KICKER: Final = _style("kicker", 10, 13, textColor=MUTED, spaceAfter=2)
TITLE: Final = _style("title", 23, 28, fontName=BOLD, spaceAfter=6)
SUBTITLE: Final = _style("subtitle", 13, 18, spaceAfter=14)
VERDICT: Final = _style("verdict", 17, 22, fontName=BOLD)
HEADING: Final = _style("heading", 14.5, 19, fontName=BOLD, spaceBefore=2, spaceAfter=5)
SUBHEADING: Final = _style("subheading", 10.5, 14, fontName=BOLD, spaceBefore=9, spaceAfter=4)
