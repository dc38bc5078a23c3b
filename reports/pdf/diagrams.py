"""p–v and T–s diagrams as vector graphics. States differ by shape and curves by dash; colour is not needed."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import Any, Final

from reportlab.platypus import Table, TableStyle

from checker.figures import Diagram
from reports.pdf.directions import arrow_heads, enclosed
from reports.pdf.fonts import BOLD, REGULAR
from reports.pdf.labels import Box, around, place_labels
from reports.pdf.picture import LETTERS, Area, Element, Pen, Picture, Sign, Stroke, Words, words_width
from reports.pdf.plot import FRAME, WIDTH, Plot, plot, sampled
from reports.pdf.styles import FAINT, INK, MUTED, SHADE, TEXT_WIDTH
from reports.pdf.tables import TABLE_FONT
from reports.pdf.text import fitting

_TOP: Final = FRAME.top + 26
_LEGEND_ROW: Final = 10.0
_MOST_ENTRIES: Final = 12
_MOST_LABELS: Final = 24
_DASHES: Final[tuple[tuple[float, ...], ...]] = ((), (5, 2.5), (1, 2.5), (7, 2.5, 1, 2.5))
_FIXED_PENS: Final = {"dome": Pen(0.6, MUTED), "chord": Pen(0.7, dash=(1, 2.5))}
_TITLES: Final = {"p-v": "p–v diagram", "T-s": "T–s diagram"}
_AXIS: Final = Pen(0.7)
_FAINT_LINE: Final = Pen(0.3, FAINT)
_LEADER: Final = Pen(0.4, MUTED)


def diagram_rows(diagrams: Sequence[Diagram]) -> list[list[Any]]:
    """Return the diagrams that have something to show, two beside each other."""
    pictures = [picture for picture in map(draw, diagrams) if picture is not None]
    rows = []
    for start in range(0, len(pictures), 2):
        pair = [*pictures[start : start + 2], ""][:2]
        style = [TABLE_FONT, ("LEFTPADDING", (0, 0), (-1, -1), 0), ("VALIGN", (0, 0), (-1, -1), "TOP")]
        rows.append([Table([pair], [TEXT_WIDTH / 2] * 2, style=TableStyle(style))])
    return rows


def draw(diagram: Diagram) -> Picture | None:
    """Return a diagram as a picture, or None where it has no state and no path to show."""
    shown = plot(diagram)
    if shown is None:
        return None
    pens = _pens(shown)
    legend = _legend(shown, pens)
    below = _LEGEND_ROW * ((len(legend) + 1) // 2)
    curves = [Stroke(piece, pens[c.label, c.style]) for c, pieces in shown.curves for piece in pieces]
    signs = [Sign(marker.style, x, y) for marker, (x, y) in shown.marks]
    inside = enclosed(shown.curves) if diagram.closed else []
    area = [Area(inside, SHADE)] if inside else []
    arrows = [Area(head, INK) for head in arrow_heads(shown.curves)]
    elements = [*area, *_frame(shown, diagram), *curves, *arrows, *signs, *_labels(shown)]
    for place, (sample, text) in enumerate(legend):
        elements += _entry(place, sample, text)
    return Picture(WIDTH, _TOP, below, elements)


def _frame(shown: Plot, diagram: Diagram) -> Iterator[Element]:
    """Yield title, ticks with faint lines, the two axes and their names."""
    title = f"{_TITLES.get(diagram.kind, diagram.kind)} of {diagram.body}"
    yield Words(0, _TOP - 9, fitting(title, BOLD, LETTERS, WIDTH), font=BOLD)
    yield Words(0, FRAME.top + 6, fitting(diagram.y_label, REGULAR, LETTERS, WIDTH))
    name = fitting(diagram.x_label, REGULAR, LETTERS, WIDTH)
    yield Words((FRAME.left + FRAME.right) / 2, FRAME.bottom - 22, name, 0.5)
    for place, text in shown.y.ticks():
        y = FRAME.bottom + place * (FRAME.top - FRAME.bottom)
        yield Stroke(((FRAME.left, y), (FRAME.right, y)), _FAINT_LINE)
        yield Words(FRAME.left - 4, y - 2.5, text, 1)
    yield from _x_ticks(shown)
    corner = (FRAME.left, FRAME.bottom)
    yield Stroke(((FRAME.left, FRAME.top), corner, (FRAME.right, FRAME.bottom)), _AXIS)


def _x_ticks(shown: Plot) -> Iterator[Element]:
    free = 0.0
    for place, text in shown.x.ticks():
        x = FRAME.left + place * (FRAME.right - FRAME.left)
        yield Stroke(((x, FRAME.bottom), (x, FRAME.top)), _FAINT_LINE)
        half = words_width(text) / 2
        if x - half >= free and x + half <= WIDTH:  # a text that would touch its neighbour is left out
            yield Words(x, FRAME.bottom - 10, text, 0.5)
            free = x + half + 3


def _pens(shown: Plot) -> dict[tuple[str, str], Pen]:
    """Return the pen of every curve by label and style; paths of different names differ by their dash."""
    names = dict.fromkeys(curve.label for curve, _ in shown.curves if curve.style not in _FIXED_PENS)
    dashes = {name: _DASHES[number % len(_DASHES)] for number, name in enumerate(names)}
    return {
        (curve.label, curve.style): _FIXED_PENS.get(curve.style) or Pen(1.3, dash=dashes[curve.label])
        for curve, _ in shown.curves
    }


def _labels(shown: Plot) -> Iterator[Element]:
    """Yield the names of the states, with a line to those that had to stand far off."""
    wanted = [
        (point, fitting(text, REGULAR, LETTERS, WIDTH / 2)) for point, text in shown.labels()[:_MOST_LABELS]
    ]
    sizes = [(x, y, words_width(text)) for (x, y), text in wanted]
    points = [point for _, point in shown.marks]
    places = place_labels(sizes, LETTERS, points, _taken(shown), FRAME)
    for ((x, y), text), (box, far) in zip(wanted, places, strict=True):
        if far:
            edge = min(max(x, box.left), box.right), min(max(y, box.bottom), box.top)
            yield Stroke(((x, y), edge), _LEADER)
        yield Words(box.left, box.bottom + 1.5, text)


def _taken(shown: Plot) -> list[Box]:
    boxes = [around(x, y, 4.5) for _, (x, y) in shown.marks]
    for _, pieces in shown.curves:
        boxes += [around(x, y, 1.5) for piece in pieces for x, y in sampled(piece)]
    boxes += [around(*head[0], 4.0) for head in arrow_heads(shown.curves)]
    return boxes


def _legend(shown: Plot, pens: dict[tuple[str, str], Pen]) -> list[tuple[Pen | str, str]]:
    """Return (pen of a curve or style of a sign, text) of every entry, each text once."""
    styles = {marker.style for marker, _ in shown.marks}
    entries: dict[str, Pen | str] = {
        f"state as {style}": style for style in ("recomputed", "stated") if style in styles
    }
    for curve, pieces in shown.curves:
        if pieces:
            entries.setdefault(curve.label or curve.style, pens[curve.label, curve.style])
    return [(sample, text) for text, sample in entries.items()][:_MOST_ENTRIES]


def _entry(place: int, sample: Pen | str, text: str) -> Iterator[Element]:
    column = (WIDTH - 4) / 2
    x, y = (place % 2) * column, -_LEGEND_ROW * (place // 2 + 1) + 4
    if isinstance(sample, str):
        yield Sign(sample, x + 9, y + 2.5)
    else:
        yield Stroke(((x, y + 2.5), (x + 18, y + 2.5)), sample)
    yield Words(x + 23, y, fitting(text, REGULAR, LETTERS, column - 27))
