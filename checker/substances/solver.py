"""Every state with two given properties: directly where the library has one trustworthy root, else by search."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Iterator
from itertools import chain
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.matching import matches, residual_along
from checker.substances.properties import (
    ENERGY,
    ENTROPY,
    PRESSURE,
    QUALITY,
    TEMPERATURE,
    VOLUME,
    Known,
    Point,
)
from checker.substances.search import Function
from checker.substances.surface import Branch, Curve, Surface

_FLAT_STEPS: Final = (0.01, 0.005, 0.0025)
_FLAT: Final = 1e-7
_ROUTES: Final[tuple[tuple[str, Callable[[Surface], Callable[[float], Curve]]], ...]] = (
    (TEMPERATURE, lambda surface: surface.isotherm),
    (QUALITY, lambda surface: surface.quality_line),
    (PRESSURE, lambda surface: surface.isobar),
    (VOLUME, lambda surface: surface.isochore),
    (ENTROPY, lambda surface: surface.isentrope),
    (ENERGY, lambda surface: surface.isenergetic),
)
"""Along which curve to search: the first property of this table that is known is held constant."""
_SETTLED: Final = {(TEMPERATURE, PRESSURE), (TEMPERATURE, VOLUME), (TEMPERATURE, QUALITY)}
"""Pairs of which the library's word is final: nothing simpler is left to search along."""


def solve(surface: Surface, known: Known) -> list[Point]:
    """Return every state with the two known properties, by increasing specific volume.

    Raises
    ------
    NotEvaluable
        No state in the range of the equation, or the pair does not fix one well enough.
    """
    refusal: NotEvaluable | None = None
    try:
        point = surface.direct(known)
        if point is not None:
            return [point]
    except NotEvaluable as caught:
        if known.pair in _SETTLED or caught.kind == "not-supported":
            raise
        # Here and there the library misses a root that is there, or finds one outside the range: search.
        refusal = caught
    held, curve_of = next((name, route) for name, route in _ROUTES if name in known.pair)
    curve = curve_of(surface)(known.value(held))
    sought = known.other(held)
    found = chain.from_iterable(_on_branch(surface, b, sought, known.value(sought)) for b in curve)
    points = _distinct(found, surface.reproduces)
    if not points and refusal is not None and refusal.kind == "outside-range":
        raise refusal
    if not points:
        raise NotEvaluable(f"no state of {surface.name} within the range of its equation has {known}")
    return points


def _on_branch(surface: Surface, branch: Branch, name: str, target: float) -> Iterator[Point]:
    residual = residual_along(branch, name, target, surface.constants)
    for parameter, point in matches(branch, residual, surface.reproduces):
        if branch.flat and _is_flat(residual, parameter):
            raise NotEvaluable(
                f"the {name.replace('_', ' ')} of {surface.name} hardly depends on pressure here: "
                "these two properties do not fix the state",
                "ill-conditioned",
            )
        yield point


def _is_flat(residual: Function, parameter: float) -> bool:
    """Return whether, on one side, up to a hundredth of the parameter changes next to nothing.

    Several steps are taken, for a second root close by would make a single one look flat.
    """
    for side in (-1.0, 1.0):
        moved = [abs(residual(parameter * (1.0 + side * step))) for step in _FLAT_STEPS]
        if max(moved) < _FLAT and not any(map(math.isnan, moved)):
            return True
    return False


def _distinct(points: Iterable[Point], tolerance: float) -> list[Point]:
    """Return the points by increasing volume, those that two branches share once."""
    kept: list[Point] = []
    for point in sorted(points, key=_order):
        if not (kept and _same(kept[-1], point, tolerance)):
            kept.append(point)
    return kept


def _order(point: Point) -> tuple[float, float]:
    """Return specific volume, then temperature where rounding alone tells the volumes apart."""
    return float(f"{point.specific_volume:.8e}"), point.temperature


def _same(one: Point, other: Point, tolerance: float) -> bool:
    volume = abs(one.specific_volume - other.specific_volume) <= tolerance * other.specific_volume
    return volume and abs(one.temperature - other.temperature) <= tolerance * other.temperature
