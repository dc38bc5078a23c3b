"""What stands on every page: the package and its revision above, the page number below."""

from __future__ import annotations

from typing import Any, Final

from reportlab.lib.units import mm
from reportlab.platypus import Flowable, Frame, PageTemplate

from checker.findings import Review
from reports.pdf.fonts import REGULAR
from reports.pdf.styles import FOOTER, HAIRLINE, HEADER, LANDSCAPE, MARGIN, MUTED, PORTRAIT, RULE
from reports.pdf.text import fitting, flat

_SIZE: Final = 8
_ROOM: Final = 80.0
"""Of the text that says which page it is and of how many. [pt]"""


class NumberOfPages(Flowable):  # type: ignore[misc]  # reportlab has no types
    """The last flowable: it takes no room and writes into every footer which page of how many it is."""

    def wrap(self, *_: float) -> tuple[float, float]:
        """Return its size, which is none."""
        return (0, 0)

    def draw(self) -> None:
        """Define the forms that the footers refer to: each ends at the margin, whatever the number of pages."""
        canvas = self.canv
        total = canvas.getPageNumber()
        for number in range(1, total + 1):
            canvas.beginForm(_form(number), 0, -3, _ROOM, 12)
            canvas.setFont(REGULAR, _SIZE)
            canvas.setFillColor(MUTED)
            canvas.drawRightString(_ROOM, 0, f"page {number} of {total}")
            canvas.endForm()


def page_templates(review: Review) -> list[Any]:
    """Return the templates ``cover``, ``portrait`` and ``landscape``."""

    def furnish(canvas: Any, _: object) -> None:
        _footer(canvas)
        _header(canvas, review)

    return [
        PageTemplate(
            "cover", [_frame(PORTRAIT)], onPage=lambda canvas, _: _footer(canvas), pagesize=PORTRAIT
        ),
        PageTemplate("portrait", [_frame(PORTRAIT)], onPage=furnish, pagesize=PORTRAIT),
        PageTemplate("landscape", [_frame(LANDSCAPE)], onPage=furnish, pagesize=LANDSCAPE),
    ]


def _frame(size: tuple[float, float]) -> Any:
    wide, high = size[0] - 2 * MARGIN, size[1] - HEADER - FOOTER
    return Frame(MARGIN, FOOTER, wide, high, leftPadding=0, rightPadding=0, topPadding=0, bottomPadding=0)


def _header(canvas: Any, review: Review) -> None:
    package = review.package
    right, top = canvas._pagesize[0] - MARGIN, canvas._pagesize[1] - 15 * mm
    name = f"{package.number or package.file}, revision {package.revision or 'not stated'}"
    _pen(canvas)
    canvas.drawString(MARGIN, top, fitting(flat(name), REGULAR, _SIZE, (right - MARGIN) * 0.6))
    canvas.drawRightString(right, top, f"Review: {review.verdict.value}")
    canvas.line(MARGIN, top - 5, right, top - 5)


def _footer(canvas: Any) -> None:
    """Write ``page x of y``, a form that is defined on the last page, when y is known."""
    right, bottom = canvas._pagesize[0] - MARGIN, 11 * mm
    _pen(canvas)
    canvas.drawString(MARGIN, bottom, "Alternate calculation and review")
    canvas.saveState()
    canvas.translate(right - _ROOM, bottom)
    canvas.doForm(_form(canvas.getPageNumber()))
    canvas.restoreState()


def _form(number: int) -> str:
    """Return the name of the form with the number of a page."""
    return f"number-of-page-{number}"


def _pen(canvas: Any) -> None:
    canvas.setFont(REGULAR, _SIZE)
    canvas.setFillColor(MUTED)
    canvas.setStrokeColor(RULE)
    canvas.setLineWidth(HAIRLINE)
