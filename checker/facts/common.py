"""Origins that one wrong value above them explains together: a hidden step, or an input used otherwise than stated.

What an originator does not state is known only by what follows from it. Where the first of several origins is taken as
right, the value that a common parent must have had can be found, and the others either follow from it or do not.
"""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from typing import Final, NamedTuple

from checker.case import Case
from checker.comparison.compare import Compared
from checker.sheet.keys import plain
from checker.sheet.step import reevaluate

MOST_COST: Final = 4000
"""What looking for common parents in one record may cost, in property states (bounded work)."""
MOST_ROUNDS: Final = 12
"""Most values that are tried for one parent."""
MOST_PARENTS: Final = 40
"""Most parents that are tried for one origin."""
FIRST_MOVE: Final = 1e-3
"""Part of its value by which a parent is moved to see what follows from it."""
CLOSE: Final = 0.05
"""Half-widths within which a parent's value is found."""
ROUNDED: Final = 1.02
"""Half-widths within which a stated number agrees: one on the edge may be rounded either way."""
LEAST_CHANCE: Final = 0.03
"""Parents are told as common where fewer agreements by chance than this are expected."""
FACTORS: Final = ("/density_factor", "/caloric_factor")
"""Leaves that stand for the uncertainty of a model and are no value of the originator's."""


@dataclass(frozen=True, slots=True)
class Common:
    """One parent of several origins, and the value of it from which they all follow; SI.

    Attributes
    ----------
    key : str
        The parent.
    lead : str
        Pointer of the first of the origins.
    others : tuple of str
        Pointers of the other ones.
    """

    key: str
    value: float
    lead: str
    others: tuple[str, ...]

    @property
    def pointer(self) -> str:
        """Return the pointer of the parent."""
        return plain(self.key)


def common_parents(case: Case, leads: Sequence[Compared]) -> tuple[Common, ...]:
    """Return the parents from one wrong value of which several origins follow; each origin belongs to one of them.

    Parameters
    ----------
    leads : sequence of Compared
        The first wrong result of each origin, in the order of reading.
    """
    found: list[Common] = []
    left = [c for c in leads if c.deviation is not None]
    purse = _Purse(MOST_COST)
    while len(left) > 1:
        lead, *left = left
        best = _best(case, lead, left, purse)
        if best is not None:
            found.append(best)
            left = [c for c in left if c.statement.pointer not in best.others]
    return tuple(found)


class _Purse:
    """What may still be spent, in property states."""

    def __init__(self, left: int) -> None:
        self.left = left

    def pay(self, cost: int) -> bool:
        """Take a cost; False if there is not enough left."""
        if cost > self.left:
            return False
        self.left -= cost
        return True


def _best(case: Case, lead: Compared, others: Sequence[Compared], purse: _Purse) -> Common | None:
    """Return the parent that explains most of the other origins together with the first one."""
    hidden = {c.key: frozenset(_hidden(case, c.key)) for c in (lead, *others)}
    parents = [key for key in _hidden(case, lead.key) if any(key in hidden[c.key] for c in others)]
    trials = [
        (key, solved, {c: _window(case, c, key, solved) for c in others if key in hidden[c.key]})
        for key in parents[:MOST_PARENTS]
        if (solved := _solved(case, lead, key, purse)) is not None
    ]
    told = len({tuple(f"{window.middle:.3e}" for window in seen.values()) for _, _, seen in trials})
    best: Common | None = None
    for key, solved, seen in trials:
        agree = [c for c, window in seen.items() if window.holds(c)]
        chance = told * math.prod(seen[c].chance(c) for c in agree)
        if agree and chance < LEAST_CHANCE and (best is None or len(agree) > len(best.others)):
            best = Common(key, solved[0], lead.statement.pointer, tuple(c.statement.pointer for c in agree))
    return best


def _hidden(case: Case, key: str) -> Iterator[str]:
    """Yield the parents of a key down from which nothing is stated until the key, nearest first."""
    made, seen = case.plan.sheet.made_by, {key}
    waiting = [key]
    for own in waiting:
        step = made.get(own)
        for parent in step.parents if step is not None else ():
            if parent not in seen and parent not in case.carried.stated and not parent.endswith(FACTORS):
                seen.add(parent)
                waiting.append(parent)
                yield parent


def _follow(case: Case, lead: str, key: str, value: float) -> float | None:
    """Return the carried value of an origin with another value of a hidden parent."""
    carried = case.carried
    found = reevaluate(case.plan.sheet, carried.values, {key: value}, carried.stated).get(lead)
    return found if isinstance(found, float) and math.isfinite(found) else None


def _solved(case: Case, lead: Compared, key: str, purse: _Purse) -> tuple[float, float] | None:
    """Return the value of a parent that gives the stated value of an origin, and what half its last digit moves it."""
    start = case.carried.values.get(key)
    cost = MOST_ROUNDS * sum(
        case.plan.sheet.steps[place].cost for place in case.plan.sheet.users.get(key, ())
    )
    if not isinstance(start, float) or start == 0.0 or not purse.pay(cost):
        return None
    half = max(lead.statement.quantity.half_width, 1e-9 * abs(lead.stated))
    before, at = start, start * (1.0 + FIRST_MOVE)
    low, now = _follow(case, lead.key, key, before), _follow(case, lead.key, key, at)
    for _ in range(MOST_ROUNDS):
        if low is None or now is None or now == low:
            return None
        slope = (now - low) / (at - before)
        if abs(now - lead.stated) <= CLOSE * half:
            return at, abs(half / slope)
        before, low, at = at, now, _next((before, low), (at, now), lead.stated)
        now = _follow(case, lead.key, key, at) if math.isfinite(at) else None
    return None


def _next(one: tuple[float, float], two: tuple[float, float], wanted: float) -> float:
    """Return where a secant meets what is wanted: of the logarithms where all signs allow it, for powers are lines."""
    (x1, y1), (x2, y2) = one, two
    if min(x1 * x2, y1 * y2, y1 * wanted) > 0.0 and y1 != y2 and x1 != x2:
        slope = math.log(y2 / y1) / math.log(x2 / x1)
        step = math.log(wanted / y2) / slope
        return x2 * math.exp(step) if abs(step) < 50.0 else math.inf
    return x2 + (wanted - y2) * (x2 - x1) / (y2 - y1)


class _Window(NamedTuple):
    """What follows for an origin, and how far the digits of all that it follows from may move it."""

    middle: float
    half: float

    def holds(self, c: Compared) -> bool:
        """Say whether the stated value lies within."""
        return abs(self.middle - c.stated) <= self.half

    def chance(self, c: Compared) -> float:
        """Return how likely an origin lies within by chance: the window beside its deviation."""
        if not isinstance(c.carried, float) or c.stated == c.carried:
            return 1.0
        return min(1.0, 2.0 * self.half / abs(c.stated - c.carried))


def _window(case: Case, c: Compared, key: str, solved: tuple[float, float]) -> _Window:
    value, half = solved
    middle, end = _follow(case, c.key, key, value), _follow(case, c.key, key, value + half)
    if middle is None or end is None:
        return _Window(math.nan, 0.0)
    own = ROUNDED * c.statement.quantity.half_width + case.carried.spread(c.key)
    return _Window(middle, own + ROUNDED * abs(end - middle))
