"""Chance: how many slips are expected to give the stated digits by accident."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from typing import Final

from checker.comparison.compare import Compared
from checker.slips.match import Match
from checker.slips.slip import Candidate

LEAST_CHANCE: Final = 0.03
"""A cause is stated where fewer chance matches than this are expected."""
NEAR: Final = math.log(2.0)
"""Candidates within this factor of the stated value (as a logarithm) tell how dense they lie there."""
NEAR_SPREAD: Final = 1.5
"""Width of that neighbourhood as part of the stated value: from the half to the double."""
NARROW: Final = (0.1, 0.025)
"""Narrower neighbourhoods, each way: slips of digits crowd about the right value, and are counted where they do."""


def by_chance(lead: Compared, best: Match, tried: Sequence[Candidate], half: float) -> float:
    """Return how many matches by chance are expected among the candidates as simple as the best one, or simpler.

    Candidates tried near the stated value × width of the window / width of the neighbourhood. ``half`` is half the
    width of the window. [SI]
    """
    stated, plain = lead.stated, best.bench.values.get(lead.key)
    simple = [c.value for c in tried if c.slip.rank <= best.candidate.slip.rank]
    if stated == 0.0:
        size = abs(plain) if isinstance(plain, float) else 0.0
        near = [value for value in simple if abs(value) <= size]
        return _distinct(near) * half / size if size else 1.0
    near = [value for value in simple if value * stated > 0.0 and abs(math.log(value / stated)) < NEAR]
    dense = _distinct(near) / NEAR_SPREAD
    others = [value for value in near if abs(value - stated) > half]
    for part in NARROW:
        count = len({f"{value:.6e}" for value in others if abs(value - stated) <= part * abs(stated)})
        dense = max(dense, count / (2.0 * part))
    return dense * 2.0 * half / abs(stated)


def evidence(further: Iterable[Compared]) -> float:
    """Return the factor by which further independent results that agree make chance less likely."""
    factor = 1.0
    for c in further:
        if c.stated:
            factor *= min(1.0, 2.0 * c.statement.quantity.half_width / (NEAR_SPREAD * abs(c.stated)))
    return factor


def _distinct(values: Iterable[float]) -> int:
    """Return how many different values there are, one at least."""
    return max(len({f"{value:.6e}" for value in values}), 1)
