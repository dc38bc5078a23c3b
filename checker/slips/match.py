"""Matches: slips that reproduce the digits of an origin, and how well the rest of the record follows from them."""

from __future__ import annotations

from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.comparison.compare import Compared
from checker.findings import Outcome, Standing
from checker.sheet.step import Values, reevaluate
from checker.slips.bench import Bench
from checker.slips.slip import Candidate
from checker.submission import Role

ROUNDED: Final = 1.02
"""Half-widths within which a candidate agrees with the stated digits: a number on the edge may go either way."""
TIERS: Final = (0, 1, 2)
"""How strictly a candidate agrees: with the stated digits; within what zeros at the end, and the digits of stated
parents, leave open; within the uncertainty of the model as well."""
MOST_ORIGINS_WEIGHED: Final = 20
"""Origins of a record up to which every match is held against all of its results."""


@dataclass(frozen=True, slots=True)
class Match:
    """A candidate that agrees with the stated digits; ``missed`` results of the record do not follow from it.

    ``against`` counts those among them that the review itself confirms, or that follow from what is stated.
    """

    candidate: Candidate
    bench: Bench
    tier: int
    missed: int = 0
    against: int = 0

    @property
    def order(self) -> tuple[int, int, int, str]:
        """Sort key: what leaves least unexplained, then the simplest."""
        slip = self.candidate.slip
        return self.missed, slip.rank + 2 * self.tier, len(self.candidate.change), slip.name


def window(case: Case, c: Compared, bench: Bench, value: float, tier: int) -> float:
    """Return how far a candidate may lie from the stated value."""
    half = ROUNDED * c.statement.quantity.half_width + 1e-12 * abs(c.stated)
    if tier == 0:
        return half
    half = max(half, ROUNDED * c.statement.quantity.open_half_width)
    if tier == 1 and not bench.carried:
        return half
    plain = bench.values.get(c.key)
    scale = min(abs(value / plain), 1e3) if isinstance(plain, float) and plain else 1.0
    wider = case.carried.spread(c.key) * max(scale, 1.0) if bench.carried else 0.0
    if tier == max(TIERS):
        wider += case.moves.uncertainty.get(c.key, 0.0) * scale
    return half + wider


class Weighing:
    """Holds matches against everything else that the record states."""

    def __init__(self, case: Case, lead: Compared, leads: Sequence[Compared]) -> None:
        self.case, self.lead = case, lead
        above = case.plan.sheet.ancestors(lead.key)
        self.others = {c.key for c in leads if c.key != lead.key}
        self.pinned = {c.key: c.stated for c in leads if c.key in above}
        self.base: Values = dict(case.values)
        self.base.update(reevaluate(case.plan.sheet, case.values, self.pinned) if self.pinned else {})
        self.base.update(self.pinned)
        step = case.plan.sheet.made_by.get(lead.key)
        own = set(step.outputs) if step is not None else {lead.key}
        self.rest = tuple(
            c
            for c in case.compared
            if c.statement.role is Role.RESULT
            and c.deviation is not None
            and c.key not in own
            and c.key not in self.pinned
        )

    def weighed(self, match: Match) -> Match:
        """Return the match with what it leaves unexplained, in the reading that leaves least."""
        change, lead = match.candidate.change, self.lead.key
        # A slip of the origin itself may take other outputs of its step along, or be one of the pen alone.
        readings: list[tuple[Mapping[str, float], int]] = [(change, 0), ({}, 0)]
        if lead not in change:
            given = any(key.startswith("given/") for key in change)
            readings = [(change, 0), ({lead: match.candidate.value}, int(given))]
        missed, against = min(self._counted(reading, extra) for reading, extra in readings)
        return Match(match.candidate, match.bench, match.tier, missed, against)

    def _counted(self, change: Mapping[str, float], extra: int) -> tuple[int, int]:
        """Return how many results do not follow under a change, and how many of them speak against it."""
        touched = reevaluate(self.case.plan.sheet, self.base, change, self.pinned) if change else {}
        values = {**touched, **change}
        missed = [c for c in self.rest if not self._follows(c, values.get(c.key, self.base.get(c.key)))]
        return len(missed) + extra, sum(self._speaks(c) for c in missed)

    def _follows(self, c: Compared, value: object) -> bool:
        return isinstance(value, float) and abs(value - c.stated) <= max(c.carried_tolerance, c.tolerance)

    def _speaks(self, c: Compared) -> bool:
        """Say whether a result is none that another origin explains."""
        if c.key in self.others:
            return False
        heir = c.standing is Standing.INHERITED
        return c.outcome is not Outcome.WRONG or (heir and not self.others & set(c.inherits_from))


def distinct(matches: Sequence[Match]) -> Iterator[Match]:
    """Yield the first match of every slip."""
    seen: set[str] = set()
    for match in matches:
        if match.candidate.slip.name not in seen:
            seen.add(match.candidate.slip.name)
            yield match
