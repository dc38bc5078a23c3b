"""What stands on every page: the package and its revision above, the page number below."""

from __future__ import annotations

from typing import Any, Final

from reportlab.lib.units import mm
from reportlab.platypus import Flowable, Frame, PageTemplate

from checker.findings import Review
from reports.pdf.fonts import REGULAR, width
from reports.pdf.styles import FOOTER, HAIRLINE, HEADER, LANDSCAPE, MARGIN, MUTED, PORTRAIT, RULE
from reports.pdf.text import fitting, flat

_SIZE: Final = 8
_TOTAL: Final = "number-of-pages"


class NumberOfPages(Flowable):  # type: ignore[misc]  # reportlab has no types
    """The last flowable: it takes no room and tells every footer how many pages there are."""

    def wrap(self, *_: float) -> tuple[float, float]:
        """Return its size, which is none."""
        return (0, 0)

    def draw(self) -> None:
        """Define the form that the footers refer to."""
        canvas = self.canv
        total = str(canvas.getPageNumber())
        canvas.beginForm(_TOTAL, 0, -3, 40, 12)
        canvas.setFont(REGULAR, _SIZE)
        canvas.setFillColor(MUTED)
        canvas.drawString(0, 0, total)
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
    """Write ``page x of y``; y is a form that is defined on the last page."""
    right, bottom = canvas._pagesize[0] - MARGIN, 11 * mm
    _pen(canvas)
    room = width("0000", REGULAR, _SIZE)
    canvas.drawString(MARGIN, bottom, "Alternate calculation and review")
    canvas.drawRightString(right - room, bottom, f"page {canvas.getPageNumber()} of ")
    canvas.saveState()
    canvas.translate(right - room, bottom)
    canvas.doForm(_TOTAL)
    canvas.restoreState()


def _pen(canvas: Any) -> None:
    canvas.setFont(REGULAR, _SIZE)
    canvas.setFillColor(MUTED)
    canvas.setStrokeColor(RULE)
    canvas.setLineWidth(HAIRLINE)
