"""Newton's method close to a root, with Broyden's updates (1965) in place of new derivatives: few evaluations."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.roots import Residuals, Vector

MOST_STEPS: Final = 14
"""Steps after which the start was not close to a root."""
REACH: Final = 0.2
"""So far (in scaled unknowns) from its start a root is sought: further away another one may be as near."""
STILL: Final = 2e-14
"""A step (in scaled unknowns) that moves nothing any more."""
NOISE: Final = 1e-10
"""A step this small that makes the residuals no smaller shows the noise of the property equations."""
APART: Final = 1e-6
"""Difference (in scaled unknowns) for the derivatives."""

Matrix = tuple[Vector, ...]


@dataclass(frozen=True, slots=True)
class Settled:
    """A root to the last digits, with the inverse of the derivatives there, to go on from."""

    root: Vector
    inverse: Matrix


def settled(residuals: Residuals, start: Vector, inverse: Matrix | None = None) -> Settled | None:
    """Return the root next to a start, or None where no few steps lead to one.

    Parameters
    ----------
    residuals : callable
        As many relative residuals as there are unknowns.
    start : tuple of float
        Scaled unknowns.
    inverse : matrix, optional
        Inverse of the derivatives close to the start; found by differences where it is not given or does not do.
    """
    x, here = start, _at(residuals, start)
    if here is None:
        return None
    fresh = inverse is None
    slopes = _inverse_at(residuals, x, here) if inverse is None else inverse
    for _ in range(MOST_STEPS):
        if slopes is None:
            return None
        step = tuple(-part for part in _product(slopes, here))
        size = max(map(abs, step))
        if size <= STILL:
            return Settled(x, slopes)
        there = tuple(a + b for a, b in zip(x, step, strict=True))
        if max(abs(a - b) for a, b in zip(there, start, strict=True)) > REACH:
            return None
        found = _at(residuals, there)
        if found is not None and _largest(found) < _largest(here):
            change = tuple(a - b for a, b in zip(found, here, strict=True))
            slopes = _updated(slopes, step, change)
            x, here, fresh = there, found, False
        elif size <= NOISE:
            return Settled(x, slopes)
        elif fresh:
            return None
        else:
            slopes, fresh = _inverse_at(residuals, x, here), True
    return None


def _at(residuals: Residuals, x: Vector) -> Vector | None:
    try:
        found = tuple(float(value) for value in residuals(x))
    except (NotEvaluable, ArithmeticError, ValueError):
        return None
    return found if all(map(math.isfinite, found)) else None


def _largest(values: Vector) -> float:
    return max(map(abs, values))


def _product(matrix: Matrix, vector: Vector) -> Vector:
    return tuple(math.fsum(a * b for a, b in zip(row, vector, strict=True)) for row in matrix)


def _updated(inverse: Matrix, step: Vector, change: Vector) -> Matrix:
    """Return the inverse that takes the last change of the residuals to the last step (Sherman and Morrison)."""
    made = _product(inverse, change)
    row = _product(tuple(zip(*inverse, strict=True)), step)
    below = math.fsum(a * b for a, b in zip(step, made, strict=True))
    if below == 0.0:
        return inverse
    return tuple(
        tuple(old + (s - m) / below * r for old, r in zip(line, row, strict=True))
        for line, s, m in zip(inverse, step, made, strict=True)
    )


def _inverse_at(residuals: Residuals, x: Vector, here: Vector) -> Matrix | None:
    """Return the inverse of the derivatives by differences, to the side on which there is a state."""
    columns = []
    for index in range(len(x)):
        for apart in (APART, -APART):
            moved = _at(residuals, (*x[:index], x[index] + apart, *x[index + 1 :]))
            if moved is not None:
                columns.append(tuple((a - b) / apart for a, b in zip(moved, here, strict=True)))
                break
        else:
            return None
    return inverted(tuple(zip(*columns, strict=True)))


def inverted(matrix: Sequence[Vector]) -> Matrix | None:
    """Return the inverse of a small matrix by elimination with pivots, or None where it has none."""
    count = len(matrix)
    rows = [[*row, *(float(i == j) for j in range(count))] for i, row in enumerate(matrix)]
    for column in range(count):
        pivot = max(range(column, count), key=lambda i: abs(rows[i][column]))
        rows[column], rows[pivot] = rows[pivot], rows[column]
        top = rows[column][column]
        if top == 0.0:
            return None
        rows[column] = [value / top for value in rows[column]]
        for i, row in enumerate(rows):
            if i != column and row[column] != 0.0:
                factor = row[column]
                rows[i] = [a - factor * b for a, b in zip(row, rows[column], strict=True)]
    found = tuple(tuple(row[count:]) for row in rows)
    return found if all(math.isfinite(value) for row in found for value in row) else None
