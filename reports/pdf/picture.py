"""A picture made of a few kinds of strokes, drawn straight onto the page as vectors."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any, Final

from reportlab.lib.colors import Color, white
from reportlab.platypus import Flowable

from reports.pdf.clipping import Point
from reports.pdf.fonts import REGULAR, width
from reports.pdf.styles import INK
from reports.pdf.text import in_heights, printable

LETTERS: Final = 7.2
"""Size of all texts in pictures [pt]."""

_RAISED_LETTERS: Final = 5.2
_RISE: Final = 2.4
_DOT: Final = 2.4
_SQUARE: Final = 4.0


@dataclass(frozen=True, slots=True)
class Pen:
    """How a curve is drawn."""

    width: float
    colour: Color = INK
    dash: tuple[float, ...] = ()


@dataclass(frozen=True, slots=True)
class Stroke:
    """A curve through points."""

    points: Sequence[Point]
    pen: Pen

    def draw(self, canvas: Any) -> None:
        """Draw it."""
        canvas.setStrokeColor(self.pen.colour)
        canvas.setLineWidth(self.pen.width)
        canvas.setDash(list(self.pen.dash))
        path = canvas.beginPath()
        path.moveTo(*self.points[0])
        for point in self.points[1:]:
            path.lineTo(*point)
        canvas.drawPath(path)


@dataclass(frozen=True, slots=True)
class Area:
    """A filled figure through points, with or without an edge."""

    points: Sequence[Point]
    fill: Color
    edge: Pen | None = None

    def draw(self, canvas: Any) -> None:
        """Draw it."""
        canvas.setFillColor(self.fill)
        if self.edge is not None:
            canvas.setStrokeColor(self.edge.colour)
            canvas.setLineWidth(self.edge.width)
            canvas.setDash(list(self.edge.dash))
        path = canvas.beginPath()
        path.moveTo(*self.points[0])
        for point in self.points[1:]:
            path.lineTo(*point)
        path.close()
        canvas.drawPath(path, stroke=int(self.edge is not None), fill=1)


@dataclass(frozen=True, slots=True)
class Sign:
    """The sign of a state: a dot where it was recomputed, an open square where it was stated."""

    style: str
    x: float
    y: float

    def draw(self, canvas: Any) -> None:
        """Draw it."""
        canvas.setDash([])
        if self.style == "stated":
            canvas.setStrokeColor(INK)
            canvas.setLineWidth(0.9)
            canvas.rect(self.x - _SQUARE, self.y - _SQUARE, 2 * _SQUARE, 2 * _SQUARE)
            return
        canvas.setStrokeColor(white)
        canvas.setLineWidth(0.4)
        canvas.setFillColor(INK)
        canvas.circle(self.x, self.y, _DOT, fill=1)


@dataclass(frozen=True, slots=True)
class Words:
    """A text; ``anchor`` says which part of it lies at x: 0 its start, 0.5 its middle, 1 its end."""

    x: float
    y: float
    text: str
    anchor: float = 0.0
    font: str = REGULAR

    def draw(self, canvas: Any) -> None:
        """Draw it, raised signs raised."""
        parts = in_heights(printable(self.text))
        x = self.x - self.anchor * words_width(self.text, self.font)
        canvas.setFillColor(INK)
        for part, raised in parts:
            size, rise = (_RAISED_LETTERS, _RISE) if raised else (LETTERS, 0.0)
            canvas.setFont(self.font, size)
            canvas.drawString(x, self.y + rise, part)
            x += width(part, self.font, size)


def words_width(text: str, font: str = REGULAR) -> float:
    """Return the width of a text as it is drawn [pt]."""
    parts = in_heights(printable(text))
    return sum(width(part, font, _RAISED_LETTERS if raised else LETTERS) for part, raised in parts)


Element = Stroke | Area | Sign | Words


class Picture(Flowable):  # type: ignore[misc]  # reportlab has no types
    """Elements in the order in which they cover each other; ``below`` is the room under their zero."""

    def __init__(self, width: float, height: float, below: float, elements: Sequence[Element]) -> None:
        super().__init__()
        self.width, self.height = width, height + below
        self.elements = tuple(elements)
        self._below = below

    def draw(self) -> None:
        """Draw all elements."""
        self.canv.translate(0, self._below)
        self.canv.setLineCap(1)
        for element in self.elements:
            element.draw(self.canv)
