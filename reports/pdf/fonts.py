"""The typeface, taken from its package and embedded as a subset: Source Sans Pro, under the SIL Open Font License."""

from __future__ import annotations

from functools import cache
from importlib.resources import as_file, files
from typing import Final

from reportlab.pdfbase import pdfmetrics
from reportlab.pdfbase.ttfonts import TTFont

REGULAR: Final = "SourceSansPro"
BOLD: Final = "SourceSansPro-Semibold"
_FILES: Final = {REGULAR: "SourceSansPro-Regular.ttf", BOLD: "SourceSansPro-Semibold.ttf"}


@cache
def glyphs() -> frozenset[int]:
    """Register the typeface on first use, and return the code points that both weights can show."""
    shown: list[frozenset[int]] = []
    for name, file in _FILES.items():
        with as_file(files("font_source_sans_pro") / "files" / file) as path:
            font = TTFont(name, str(path))
        pdfmetrics.registerFont(font)
        shown.append(frozenset(font.face.charToGlyph))
    # The italics of this typeface have no Greek, so emphasis is always by weight.
    pdfmetrics.registerFontFamily(REGULAR, normal=REGULAR, bold=BOLD, italic=REGULAR, boldItalic=BOLD)
    return shown[0] & shown[1]


def width(text: str, font: str, size: float) -> float:
    """Return the width of printable text [pt]."""
    glyphs()
    return float(pdfmetrics.stringWidth(text, font, size))
