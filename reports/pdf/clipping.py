"""Curves cut to the frame of a diagram, in coordinates in which the frame is the unit square."""

from __future__ import annotations

import itertools
from collections.abc import Sequence
from typing import Final

Point = tuple[float, float]

MOST_POINTS: Final = 400


def thinned(points: Sequence[Point]) -> list[Point]:
    """Return at most ``MOST_POINTS`` of the points, the first and the last among them."""
    stride = -(-len(points) // (MOST_POINTS - 1)) if len(points) > MOST_POINTS else 1
    kept = list(points[::stride])
    return kept if not points or kept[-1] == points[-1] else [*kept, points[-1]]


def clipped(points: Sequence[Point]) -> list[list[Point]]:
    """Return the pieces of a curve that lie inside the unit square."""
    pieces: list[list[Point]] = []
    for start, end in itertools.pairwise(points):
        part = _segment(start, end)
        if part is None:
            continue
        if pieces and pieces[-1][-1] == part[0]:
            pieces[-1].append(part[1])
        else:
            pieces.append([part[0], part[1]])
    return pieces


def _segment(start: Point, end: Point) -> tuple[Point, Point] | None:
    """Return the part of a segment inside the unit square (Liang and Barsky's parametric clipping)."""
    first, last = 0.0, 1.0
    dx, dy = end[0] - start[0], end[1] - start[1]
    for rate, room in ((-dx, start[0]), (dx, 1 - start[0]), (-dy, start[1]), (dy, 1 - start[1])):
        if rate == 0:
            if room < 0:
                return None
        elif rate < 0:
            first = max(first, room / rate)
        else:
            last = min(last, room / rate)
    if first > last:
        return None
    return _at(start, end, first), _at(start, end, last)


def _at(start: Point, end: Point, part: float) -> Point:
    if part in (0.0, 1.0):  # exactly the end, so that neighbours join
        return end if part else start
    return start[0] + part * (end[0] - start[0]), start[1] + part * (end[1] - start[1])
