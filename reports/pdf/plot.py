"""A diagram brought to the page: axes chosen, curves cut to the frame, states in points of the page."""

from __future__ import annotations

import itertools
import math
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Final

from checker.figures import Curve, Diagram, Marker
from reports.pdf.axes import Axis, axis, extent, usable
from reports.pdf.clipping import Point, clipped, thinned
from reports.pdf.labels import Box
from reports.pdf.styles import TEXT_WIDTH

WIDTH: Final = TEXT_WIDTH / 2 - 4
FRAME: Final = Box(36, 32, WIDTH - 10, 190)
_LEAST_SHARE: Final = 1 / 12
_SPECK: Final = 0.005
_SAME_PLACE: Final = 9.0  # points: nearer than this, a stated state needs no label of its own


@dataclass(frozen=True, slots=True)
class Plot:
    """What a diagram shows, in points of the page; axes keep their ticks."""

    x: Axis
    y: Axis
    curves: tuple[tuple[Curve, tuple[tuple[Point, ...], ...]], ...]
    marks: tuple[tuple[Marker, Point], ...]

    def labels(self) -> tuple[tuple[Point, str], ...]:
        """Return the texts that name the states, each with its point; states at one point share a text."""
        names: dict[Point, list[str]] = {}
        shown: dict[str, list[Point]] = {}
        for marker, point in sorted(
            self.marks, key=lambda mark: mark[0].style
        ):  # "recomputed" before "stated"
            near = any(math.dist(point, other) < _SAME_PLACE for other in shown.get(marker.label, []))
            if near or not marker.label:
                continue
            suffix = " (stated)" if marker.style == "stated" else ""
            spot = next((p for p in names if math.dist(p, point) < 1), point)
            names.setdefault(spot, []).append(marker.label + suffix)
            shown.setdefault(marker.label, []).append(point)
        return tuple((point, ", ".join(texts)) for point, texts in names.items())


def plot(diagram: Diagram) -> Plot | None:
    """Return what a diagram shows, or None where it has neither a state nor a path that can be drawn."""
    curves = [(curve, _usable(diagram, curve.points)) for curve in diagram.curves]
    marks = [(mark, _usable(diagram, ((mark.x, mark.y),))) for mark in diagram.markers]
    states = [p for curve, points in curves if curve.style != "dome" for p in points]
    states += [p for _, points in marks for p in points]
    if not states:
        return None
    everything = [p for _, points in curves for p in points]
    x, y = _axes(diagram, states, everything)
    return Plot(
        x,
        y,
        tuple((curve, _pieces(x, y, points)) for curve, points in curves),
        tuple((mark, _page(x.place(p[0]), y.place(p[1]))) for mark, points in marks for p in points),
    )


def _axes(diagram: Diagram, states: Sequence[Point], everything: Sequence[Point]) -> tuple[Axis, Axis]:
    """Return axes that show everything, unless the states would shrink to a speck: then more of their surroundings.

    States that are a speck on either scale, such as those of a liquid heated at constant pressure, stay one: the
    saturation line then tells more than their distance.
    """
    x = extent((p[0] for p in states), (p[0] for p in everything), diagram.log_x)
    y = extent((p[1] for p in states), (p[1] for p in everything), diagram.log_y)
    if _SPECK < max(x.share, y.share) < _LEAST_SHARE:
        x, y = (x.zoomed(_LEAST_SHARE), y) if x.share > y.share else (x, y.zoomed(_LEAST_SHARE))
    return axis(x, diagram.log_x), axis(y, diagram.log_y)


def sampled(piece: tuple[Point, ...], step: float = 4.0) -> list[Point]:
    """Return points along a curve, at most ``step`` apart."""
    points: list[Point] = []
    for (x1, y1), (x2, y2) in itertools.pairwise(piece):
        parts = max(1, math.ceil(math.hypot(x2 - x1, y2 - y1) / step))
        points += [(x1 + (x2 - x1) * i / parts, y1 + (y2 - y1) * i / parts) for i in range(parts)]
    return [*points, *piece[-1:]]


def _usable(diagram: Diagram, points: tuple[Point, ...]) -> list[Point]:
    return [p for p in points if usable(p[0], diagram.log_x) and usable(p[1], diagram.log_y)]


def _pieces(x: Axis, y: Axis, points: list[Point]) -> tuple[tuple[Point, ...], ...]:
    unit = [(x.place(p[0]), y.place(p[1])) for p in thinned(points)]
    return tuple(tuple(_page(*p) for p in piece) for piece in clipped(unit))


def _page(x: float, y: float) -> Point:
    return FRAME.left + x * (FRAME.right - FRAME.left), FRAME.bottom + y * (FRAME.top - FRAME.bottom)
