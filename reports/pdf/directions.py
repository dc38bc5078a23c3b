"""Which way paths run in a diagram, and the area that those of a cycle enclose."""

from __future__ import annotations

import itertools
import math
from collections.abc import Iterator, Sequence
from typing import Final

from checker.figures import Curve
from reports.pdf.clipping import Point

LEAST: Final = 22.0
"""A path shorter than this has no arrow, which would hide it. [pt]"""
_LENGTH: Final = 6.5
_HALF: Final = 2.4

Curves = Sequence[tuple[Curve, Sequence[Sequence[Point]]]]


def arrow_heads(curves: Curves) -> Iterator[tuple[Point, Point, Point]]:
    """Yield a triangle in the middle of every path that is long enough, its point first."""
    for curve, pieces in curves:
        longest = max(pieces, key=_length, default=())
        if curve.style != "dome" and _length(longest) >= LEAST:
            yield _head(longest)


def enclosed(curves: Curves) -> list[Point]:
    """Return the corners of the area inside paths that follow each other; none where one of them is cut."""
    paths = [pieces for curve, pieces in curves if curve.style == "path"]
    chords = any(curve.style == "chord" for curve, _ in curves)
    if chords or len(paths) < 2 or any(len(pieces) != 1 for pieces in paths):
        return []
    return [point for pieces in paths for point in pieces[0]]


def _length(piece: Sequence[Point]) -> float:
    return sum(math.dist(a, b) for a, b in itertools.pairwise(piece))


def _head(piece: Sequence[Point]) -> tuple[Point, Point, Point]:
    """Return the triangle around the middle of a curve, in the direction that it has there."""
    half = _length(piece) / 2
    back, front = _along(piece, half - _LENGTH / 2), _along(piece, half + _LENGTH / 2)
    reach = math.dist(back, front) or 1.0
    across = ((back[1] - front[1]) / reach * _HALF, (front[0] - back[0]) / reach * _HALF)
    return (
        front,
        (back[0] + across[0], back[1] + across[1]),
        (back[0] - across[0], back[1] - across[1]),
    )


def _along(piece: Sequence[Point], length: float) -> Point:
    """Return the point at a length along a curve."""
    left = length
    for a, b in itertools.pairwise(piece):
        step = math.dist(a, b)
        if left <= step and step > 0.0:
            part = left / step
            return a[0] + part * (b[0] - a[0]), a[1] + part * (b[1] - a[1])
        left -= step
    return piece[-1]
