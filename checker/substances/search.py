"""Every root of a function along a branch: scan, refine edges and extrema, then bracketed iteration.

Written out here because loading a numerical library would cost more than a whole review.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Iterator, Sequence
from itertools import pairwise
from typing import Final

Function = Callable[[float], float]
"""A function of one number; NaN where it has no value."""
_Sample = tuple[float, float]

_ITERATIONS: Final = 120
_EDGE_STEPS: Final = 30
_GOLDEN: Final = 0.5 * (3.0 - math.sqrt(5.0))
_GOLDEN_STEPS: Final = 60
_PROBES: Final = (1e-4, 1e-2, 0.2)
_PRECISION: Final = 4.0e-16
_VANISHING: Final = 1.0e-14


def bracketed_root(function: Function, low: _Sample, high: _Sample) -> float:
    """Return a root between two samples of opposite sign; NaN where the function has a gap on the way.

    Inverse quadratic interpolation where it is safe, else bisection. Source: T. R. Chandrupatla, Advances in
    Engineering Software 28 (1997) 145 (from memory).
    """
    (a, fa), (b, fb) = high, low
    c, fc = a, fa
    share = 0.5
    for _ in range(_ITERATIONS):
        x = a + share * (b - a)
        fx = function(x)
        if math.isnan(fx):
            return math.nan
        if (fx > 0.0) == (fa > 0.0):
            c, fc = a, fa
        else:
            c, b, fc, fb = b, a, fb, fa
        a, fa = x, fx
        best, residual = (a, fa) if abs(fa) < abs(fb) else (b, fb)
        width, tolerance = abs(b - a), 2.0 * _PRECISION * abs(best)
        if abs(residual) <= _VANISHING or width <= 2.0 * tolerance:
            return best
        share = _next_share((a, fa), (b, fb), (c, fc), tolerance / width)
    return best


def _next_share(a: _Sample, b: _Sample, c: _Sample, least: float) -> float:
    """Return where in the bracket to look next, as a share of its width from a to b."""
    if c[0] == b[0] or c[1] in (a[1], b[1]):
        return 0.5
    xi = (a[0] - b[0]) / (c[0] - b[0])
    phi = (a[1] - b[1]) / (c[1] - b[1])
    if not (phi * phi < xi and (1.0 - phi) * (1.0 - phi) < 1.0 - xi):
        return 0.5
    share = a[1] / (b[1] - a[1]) * c[1] / (b[1] - c[1])
    share += (c[0] - a[0]) / (b[0] - a[0]) * a[1] / (c[1] - a[1]) * b[1] / (c[1] - b[1])
    return min(1.0 - least, max(least, share))


def roots(function: Function, parameters: Sequence[float], tolerance: float) -> list[float]:
    """Return every root that the scan can tell from none, in increasing order.

    Parameters
    ----------
    function : callable
        The residual; NaN where it cannot be evaluated.
    parameters : sequence of float
        Where to scan, increasing.
    tolerance : float
        A residual this small at an end of a run or at an extremum counts as a root; the residual is scaled to 1.
    """
    found = []
    for run in _unbroken(function, parameters):
        samples = _with_probes(function, run)
        found += [x for x, fx in (samples[0], samples[-1]) if abs(fx) <= tolerance]
        found += [bracketed_root(function, *pair) for pair in _changes(samples)]
        found += _at_extrema(function, samples, tolerance)
    return sorted(x for x in found if not math.isnan(x))


def _with_probes(function: Function, run: Sequence[_Sample]) -> list[_Sample]:
    """Return a run with samples close to its ends, where an extremum would hide in the first or last step."""
    if len(run) < 2:
        return list(run)
    (first, second), (before, last) = run[:2], run[-2:]
    probes = [first[0] + share * (second[0] - first[0]) for share in _PROBES]
    probes += [last[0] + share * (before[0] - last[0]) for share in _PROBES]
    samples = {x: function(x) for x in probes}
    samples.update(run)
    return sorted((x, fx) for x, fx in samples.items() if not math.isnan(fx))


def _changes(samples: Sequence[_Sample]) -> Iterator[tuple[_Sample, _Sample]]:
    for low, high in pairwise(samples):
        if (low[1] > 0.0) != (high[1] > 0.0):
            yield low, high


def _unbroken(function: Function, parameters: Sequence[float]) -> Iterator[list[_Sample]]:
    """Yield runs of samples with values; where a run ends, its edge is found by bisection."""
    run: list[_Sample] = []
    before: float | None = None
    for x in parameters:
        fx = function(x)
        if math.isnan(fx):
            if run:
                yield _with_edge(function, run, run[-1][0], x, at_end=True)
            run = []
        else:
            run.append((x, fx))
            if len(run) == 1 and before is not None:
                run = _with_edge(function, run, x, before, at_end=False)
        before = x
    if run:
        yield run


def _with_edge(
    function: Function, run: list[_Sample], inside: float, outside: float, at_end: bool
) -> list[_Sample]:
    edge: _Sample | None = None
    for _ in range(_EDGE_STEPS):
        middle = 0.5 * (inside + outside)
        value = function(middle)
        if math.isnan(value):
            outside = middle
        else:
            inside, edge = middle, (middle, value)
    if edge is None:
        return run
    return [*run, edge] if at_end else [edge, *run]


def _at_extrema(function: Function, samples: Sequence[_Sample], tolerance: float) -> list[float]:
    """Return the two roots (or the double one) beside each extremum that the scan stepped over."""
    found: list[float] = []
    for left, middle, right in zip(samples, samples[1:], samples[2:], strict=False):
        sign = math.copysign(1.0, middle[1])
        if sign * left[1] > sign * middle[1] <= sign * right[1]:
            lowest = _extremum(function, sign, left[0], middle, right[0])
            if abs(lowest[1]) <= tolerance:
                found.append(lowest[0])
            elif sign * lowest[1] < 0.0:
                found += [bracketed_root(function, left, lowest), bracketed_root(function, lowest, right)]
    return found


def _extremum(function: Function, sign: float, low: float, middle: _Sample, high: float) -> _Sample:
    """Return the sample where sign × function is least between low and high, by golden section.

    Stops early where the sign changes: a bracket is all that is needed.
    """
    best, value = middle[0], sign * middle[1]
    for _ in range(_GOLDEN_STEPS):
        left = high - best < best - low
        trial = best - _GOLDEN * (best - low) if left else best + _GOLDEN * (high - best)
        found = sign * function(trial)
        if math.isnan(found):
            break
        if found < value:
            low, high = (low, best) if left else (best, high)
            best, value = trial, found
        else:
            low, high = (trial, high) if left else (low, trial)
        if value < 0.0:
            break
    return best, sign * value
