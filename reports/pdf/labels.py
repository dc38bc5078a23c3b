"""Places for the labels of a diagram, so that they collide neither with each other nor with what is drawn."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from typing import Final

_DISTANCES: Final = (7.5, 13.0, 21.0, 32.0)
_DIRECTIONS: Final = (45, 135, 315, 225, 0, 180, 90, 270)
_POINT: Final = 1.0  # half the side of the box that a point of a curve occupies
_COST_OF_DISTANCE: Final = 0.4  # in points of area for each point of distance
_WEIGHT_OF_LABELS: Final = 6  # a label that covers a curve can be read, one that covers another cannot
_COST_OF_DOUBT: Final = 60.0  # where the label is nearer to the point of another

Point = tuple[float, float]


@dataclass(frozen=True, slots=True)
class Box:
    """A rectangle on the page, in points."""

    left: float
    bottom: float
    right: float
    top: float

    def overlap(self, other: Box) -> float:
        """Return the area that two boxes share."""
        wide = min(self.right, other.right) - max(self.left, other.left)
        high = min(self.top, other.top) - max(self.bottom, other.bottom)
        return wide * high if wide > 0 and high > 0 else 0.0

    def distance(self, point: Point) -> float:
        """Return how far a point is from the box."""
        x = max(self.left - point[0], 0.0, point[0] - self.right)
        y = max(self.bottom - point[1], 0.0, point[1] - self.top)
        return math.hypot(x, y)

    def outside(self, frame: Box) -> float:
        """Return the area that lies outside a frame."""
        return (self.right - self.left) * (self.top - self.bottom) - self.overlap(frame)


def around(x: float, y: float, half: float = _POINT) -> Box:
    """Return the box around a point."""
    return Box(x - half, y - half, x + half, y + half)


def place_labels(
    wanted: Sequence[tuple[float, float, float]],
    height: float,
    points: Sequence[tuple[float, float]],
    taken: Iterable[Box],
    frame: Box,
) -> tuple[tuple[Box, bool], ...]:
    """Return a box for each label, and whether it lies so far off that a line should lead to it.

    Parameters
    ----------
    wanted : sequence of (float, float, float)
        The point that a label belongs to, and the width of its text [pt].
    height : float
        Height of a label [pt].
    points : sequence of (float, float)
        All points that have or could have a label; one stays away from the points of others.
    taken : iterable of Box
        What else is drawn already.
    frame : Box
        Labels stay inside it if they can.

    Returns
    -------
    tuple of (Box, bool)
        In the order of ``wanted``; the nearest free place, else the one that covers least.
    """
    obstacles = list(taken)
    placed: list[tuple[Box, bool]] = []
    for x, y, width in wanted:
        others = [point for point in points if math.dist(point, (x, y)) > 1]
        box, far = _best((x, y), (width, height), obstacles, others, frame)
        obstacles += [box] * _WEIGHT_OF_LABELS
        placed.append((box, far))
    return tuple(placed)


def _best(
    point: Point, size: Point, obstacles: Sequence[Box], others: Sequence[Point], frame: Box
) -> tuple[Box, bool]:
    """Return the place that costs least: it covers little, is near, and is nearer to its own point than to others."""
    reach = around(*point, _DISTANCES[-1] + size[0])
    near = [box for box in obstacles if box.overlap(reach)]
    best, least, far = around(*point), math.inf, False
    for distance in _DISTANCES:
        if _COST_OF_DISTANCE * distance >= least:
            break
        for direction in _DIRECTIONS:
            box = _beside(*point, *size, distance, direction)
            cost = _COST_OF_DISTANCE * distance + 3 * box.outside(frame) + sum(map(box.overlap, near))
            cost += _COST_OF_DOUBT if any(box.distance(p) < box.distance(point) for p in others) else 0
            if cost < least:
                best, least, far = box, cost, distance > _DISTANCES[1]
    return best, far


def _beside(x: float, y: float, width: float, height: float, distance: float, direction: int) -> Box:
    """Return a box beside a point: its nearest edge or corner lies ``distance`` off."""
    across, up = math.cos(math.radians(direction)), math.sin(math.radians(direction))
    left = x + distance * across - width * (0.5 - 0.5 * _sign(across))
    bottom = y + distance * up - height * (0.5 - 0.5 * _sign(up))
    return Box(left, bottom, left + width, bottom + height)


def _sign(value: float) -> int:
    return 0 if abs(value) < 1e-9 else (1 if value > 0 else -1)
