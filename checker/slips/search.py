"""The search: which slip, at which place above an origin, reproduces the digits that the originator stated."""

from __future__ import annotations

import math
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass, replace
from typing import Final

from checker.case import Case
from checker.comparison.compare import Compared
from checker.facts.origins import origins
from checker.findings import Cause, Outcome
from checker.outcomes import NotEvaluable
from checker.sheet.step import reevaluate
from checker.slips.bench import Bench
from checker.slips.budget import Budget
from checker.slips.catalogue import CATALOGUE
from checker.slips.chance import LEAST_CHANCE, by_chance, evidence
from checker.slips.match import MOST_ORIGINS_WEIGHED, TIERS, Match, Weighing, distinct, window
from checker.slips.slip import Candidate, Change, Slip
from checker.submission import Role

BARELY: Final = 0.25
"""Part of the stated half-width below which it makes no difference whether the originator rounded early."""
MOST_WEIGHED: Final = 8
"""Matches of one origin that are held against all of its record."""

NONE_FITS: Final = "no slip of the catalogue reproduces the stated digits"
BY_CHANCE: Final = "several or chance explanations"
CAPPED: Final = "not all slips were tried"


@dataclass(frozen=True, slots=True)
class Diagnosis:
    """What is known of the cause of one origin.

    Attributes
    ----------
    causes : tuple of Cause
        The slips that reproduce the stated digits: what leaves least unexplained first, then the simplest.
    note : str
        Empty where the first of them is stated as the cause; else why no cause is.
    chance : float
        Expected number of matches by chance.
    explains : tuple of str
        Pointers of the other origins that the first cause reproduces as well.
    """

    causes: tuple[Cause, ...] = ()
    note: str = NONE_FITS
    chance: float = 0.0
    explains: tuple[str, ...] = ()


def diagnose(case: Case, catalogue: Sequence[Slip] = CATALOGUE) -> dict[str, Diagnosis]:
    """Return a diagnosis for the first result of every origin, by its pointer.

    An origin that the cause of an earlier one reproduces is named under that one, and has none of its own. A later
    origin is also looked at with the slips in force that are stated as the causes of earlier ones: that is how two
    slips of one record are told apart.
    """
    found: dict[str, Diagnosis] = {}
    done: set[str] = set()
    made: dict[str, float] = {}
    firm = (next((c for c in group if not c.explained_by_digits), None) for group in origins(case))
    leads = tuple(c for c in firm if c is not None and c.deviation is not None)
    for lead in leads:
        if lead.statement.pointer not in done:
            inquiry = _Inquiry(case, lead, leads, catalogue, made)
            own = inquiry.diagnosis()
            found[lead.statement.pointer] = own
            done.update(own.explains)
            made.update(inquiry.change if not own.note else {})
    return found


class _Inquiry:
    """The search for the cause of one origin; lives as long as it takes."""

    def __init__(
        self,
        case: Case,
        lead: Compared,
        leads: Sequence[Compared],
        catalogue: Sequence[Slip],
        made: Mapping[str, float] | None = None,
    ) -> None:
        self.case, self.lead, self.leads, self.catalogue = case, lead, leads, catalogue
        self.budget = Budget.of(len(leads))
        self.change: Change = {}
        self.benches = (*_benches(case, lead), *_slipped_benches(case, lead, made or {}))
        step = case.plan.sheet.made_by.get(lead.key)
        outputs = set(step.outputs) if step is not None else {lead.key}
        self.siblings = [
            c
            for c in case.compared
            if c.key in outputs
            and c is not lead
            and c.statement.role is Role.RESULT
            and c.deviation is not None
        ]

    def diagnosis(self) -> Diagnosis:
        """Return what the catalogue says of the origin, and which of the other origins it explains."""
        tried = list(self._candidates())
        matches = self._matches(tried)
        if not matches:
            return Diagnosis(note=f"{NONE_FITS}; {CAPPED}" if self.budget.hit else NONE_FITS)
        best = matches[0]
        self.change = best.candidate.change
        explained = tuple(self._explained(best))
        half = window(self.case, self.lead, best.bench, best.candidate.value, best.tier)
        chance = by_chance(self.lead, best, [c for c, _ in tried], half) * self._evidence(explained, best)
        note = "" if chance < LEAST_CHANCE and not best.against else BY_CHANCE
        return Diagnosis(
            tuple(self._cause(match.candidate, not note) for match in matches),
            f"{note}; {CAPPED}" if note and self.budget.hit else note,
            chance,
            tuple(c.statement.pointer for c in explained) if not note else (),
        )

    def _candidates(self) -> Iterator[tuple[Candidate, Bench]]:
        """Yield every candidate with its bench, simple and cheap ones first, as long as the budget lasts."""
        for slip in sorted(self.catalogue, key=lambda slip: slip.rank):
            if self.budget.spent:
                self.budget.hit = True
                return
            offers = [
                (bench.cost_of(change), place, change, bench)
                for place, bench in enumerate(self.benches)
                for change in _changes(bench, slip)
            ]
            for cost, _, change, bench in sorted(offers, key=lambda offer: offer[:2]):
                if self.budget.spend(cost) and (value := _value(bench, change)) is not None:
                    yield Candidate(slip, change, value), bench

    def _matches(self, tried: Sequence[tuple[Candidate, Bench]]) -> list[Match]:
        """Return the candidates that agree with the stated digits, the best of each slip, in order."""
        found = [Match(c, bench, tier) for c, bench in tried if (tier := self._tier(c, bench)) is not None]
        found.sort(key=lambda match: match.order)
        if len(self.leads) <= MOST_ORIGINS_WEIGHED and found:
            weighing = Weighing(self.case, self.lead, self.leads)
            found = [weighing.weighed(match) for match in found[:MOST_WEIGHED]]
            found.sort(key=lambda match: match.order)
        return list(distinct(found))

    def _tier(self, candidate: Candidate, bench: Bench) -> int | None:
        """Return how strictly a candidate agrees with every stated digit of the origin's step; None if it does not."""
        away, plain = abs(candidate.value - self.lead.stated), _plain(bench)
        if abs(candidate.value - plain) <= 0.2 * abs(self.lead.stated - plain):
            return None  # it hardly changes anything: the digits of the parents explain as much
        if self.lead.stated == 0.0 and abs(candidate.value) > 1e-9 * abs(plain):
            return None  # nothing is stated: what is small would have been written with its digits
        for tier in TIERS:
            if away <= window(self.case, self.lead, bench, candidate.value, tier):
                agrees = all(self._agrees(c, candidate, bench, tier) for c in self.siblings)
                return tier if agrees else None
        return None

    def _agrees(self, c: Compared, candidate: Candidate, bench: Bench, tier: int) -> bool:
        """Say whether a stated output of the same step agrees with a candidate."""
        if self.lead.key in candidate.change and c.key not in candidate.change:
            return c.outcome is not Outcome.WRONG
        other = replace(bench, origin=c)
        value = other.value_with(candidate.change)
        if value is None:
            return False
        return abs(value - c.stated) <= window(self.case, c, other, value, max(tier, 1))

    def _evidence(self, explained: Sequence[Compared], best: Match) -> float:
        """Return the factor by which further results that agree make chance less likely."""
        change = best.candidate.change
        wrong = [c for c in self.siblings if c.outcome is Outcome.WRONG and c.key not in change]
        return evidence((*explained, *wrong))

    def _explained(self, best: Match) -> Iterator[Compared]:
        """Yield the leads of other origins that the same change reproduces."""
        change = best.candidate.change
        for lead in self.leads:
            if lead is self.lead or set(change) <= {self.lead.key}:
                continue
            inquiry = _Inquiry(self.case, lead, self.leads, ())
            for bench in inquiry.benches:
                if not set(change) & bench.parents:
                    continue
                value = bench.value_with(change)
                if (
                    value is not None
                    and inquiry._tier(Candidate(best.candidate.slip, change, value), bench) is not None
                ):
                    yield lead
                    break

    def _cause(self, candidate: Candidate, likely: bool) -> Cause:
        statement, shift = self.lead.statement, self.lead.shift
        value = statement.quantity.number_of(statement.sign * (candidate.value + shift.value))
        return Cause(candidate.slip.name, value, candidate.slip.sentence, likely)


def _plain(bench: Bench) -> float:
    """Return the value of the origin without any slip."""
    value = bench.values.get(bench.key)
    return value if isinstance(value, float) else 0.0


def _benches(case: Case, lead: Compared) -> Iterator[Bench]:
    """Yield the bench on unrounded values where nothing above is wrong, and that on the originator's own values."""
    stated = {
        c.key: c.stated
        for c in case.compared
        if c.statement.role is Role.RESULT and c.shift.comparable and c.key in case.plan.sheet.made_by
    }
    above = case.plan.sheet.ancestors(lead.key)
    hidden = {key: value for key, value in stated.items() if key in above}
    wrong = {c.key for c in case.compared if c.outcome is Outcome.WRONG}
    if not wrong & set(hidden):
        exact = {key: own for key in hidden if isinstance(own := case.values.get(key), float)}
        yield Bench(case, lead, case.values, exact)
        half = BARELY * lead.statement.quantity.half_width
        away = _difference(case.carried.value(lead.key), lead.independent)
        if case.carried.spread(lead.key) <= half and away <= half:
            return  # the numbers stated above could not move the result beyond its own digits
    if hidden:
        yield Bench(case, lead, case.carried.values, hidden, carried=True)


def _slipped_benches(case: Case, lead: Compared, made: Mapping[str, float]) -> Iterator[Bench]:
    """Yield the bench on which the slips found so far are in force, where they lead to the origin."""
    if set(made).isdisjoint(case.plan.sheet.ancestors(lead.key)):
        return
    changes = {key: value for key, value in made.items() if key != lead.key}
    values = {**case.values, **reevaluate(case.plan.sheet, case.values, changes), **changes}
    own = {c.key for c in case.compared if c.statement.role is Role.RESULT and c.key != lead.key}
    known = {key: value for key in own if isinstance(value := values.get(key), float)}
    yield Bench(case, lead, values, {**known, **changes})


def _difference(one: object, other: object) -> float:
    """Return how far two values lie apart; nothing where one of them is none."""
    return abs(one - other) if isinstance(one, float) and isinstance(other, float) else 0.0


def _changes(bench: Bench, slip: Slip) -> Iterator[Change]:
    """Yield what a slip can change on a bench; nothing more where it cannot happen."""
    try:
        yield from slip.changes(bench)
    except (NotEvaluable, ArithmeticError, ValueError):
        return


def _value(bench: Bench, change: Mapping[str, float]) -> float | None:
    if not all(math.isfinite(value) for value in change.values()):
        return None
    value = bench.value_with(change)
    return value if value is not None and math.isfinite(value) else None
