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
from checker.slips.bench import Bench
from checker.slips.catalogue import CATALOGUE
from checker.slips.slip import Candidate, Change, Slip
from checker.submission import Role

MOST_COST: Final = 3000
"""What the search for the cause of one origin may cost, in property states; where more would be needed, the
diagnosis says so. The simplest slips are tried first."""
LEAST_CHANCE: Final = 0.03
"""A cause is stated where fewer chance matches than this are expected."""
ROUNDED: Final = 1.02
"""Half-widths within which a candidate agrees with the stated digits: a number on the edge may go either way."""
NEAR: Final = math.log(2.0)
"""Candidates within this factor of the stated value (as a logarithm) tell how dense they lie there."""

BARELY: Final = 0.25
"""Part of the stated half-width below which it makes no difference whether the originator rounded early."""

NONE_FITS: Final = "no slip of the catalogue reproduces the stated digits"
BY_CHANCE: Final = "several or chance explanations"
CAPPED: Final = "not all slips were tried"


@dataclass(frozen=True, slots=True)
class Diagnosis:
    """What is known of the cause of one origin.

    Attributes
    ----------
    causes : tuple of Cause
        The slips that reproduce the stated digits, the simplest first.
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

    An origin that the cause of an earlier one reproduces is named under that one, and has none of its own.
    """
    found: dict[str, Diagnosis] = {}
    done: set[str] = set()
    groups = [group for group in origins(case) if any(not c.explained_by_digits for c in group)]
    for group in groups:
        lead = next(c for c in group if not c.explained_by_digits)
        if lead.statement.pointer in done or lead.deviation is None:
            continue
        others = [g for g in groups if g is not group]
        own = _Inquiry(case, lead, catalogue).diagnosis(others)
        found[lead.statement.pointer] = own
        done.update(own.explains)
    return found


class _Inquiry:
    """The search for the cause of one origin; lives as long as it takes."""

    def __init__(self, case: Case, lead: Compared, catalogue: Sequence[Slip]) -> None:
        self.case, self.lead, self.catalogue = case, lead, catalogue
        self.benches = tuple(_benches(case, lead))
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

    def diagnosis(self, others: Sequence[Sequence[Compared]]) -> Diagnosis:
        """Return what the catalogue says of the origin, and which of the other origins it explains."""
        tried, capped = self._candidates()
        matches = [(c, bench) for c, bench in tried if self._fits(c, bench)]
        if not matches:
            return Diagnosis(note=f"{NONE_FITS}; {CAPPED}" if capped else NONE_FITS)
        ranked = sorted(
            _distinct(matches), key=lambda pair: (pair[0].slip.rank, _place(pair[0]), pair[0].slip.name)
        )
        best, bench = ranked[0]
        explained = tuple(self._explained(best, others))
        chance = self._chance(best, bench, [c for c, _ in tried]) * self._evidence(explained, best)
        note = "" if chance < LEAST_CHANCE else BY_CHANCE
        return Diagnosis(
            tuple(self._cause(c, not note) for c, _ in ranked),
            f"{note}; {CAPPED}" if note and capped else note,
            chance,
            tuple(c.statement.pointer for c in explained) if not note else (),
        )

    def _candidates(self) -> tuple[list[tuple[Candidate, Bench]], bool]:
        """Return every candidate with its bench, and whether some were left out."""
        found: list[tuple[Candidate, Bench]] = []
        left, capped = MOST_COST, False
        for cost, slip, change, bench in sorted(self._offers(), key=lambda offer: (offer[1].rank, offer[0])):
            if cost > left:
                capped = True
                continue
            left -= cost
            value = _value(bench, change)
            if value is not None:
                found.append((Candidate(slip, change, value), bench))
        return found, capped

    def _offers(self) -> Iterator[tuple[int, Slip, Change, Bench]]:
        """Yield everything that might be tried, with its cost."""
        for slip in self.catalogue:
            for bench in self.benches:
                for change in _changes(bench, slip):
                    yield bench.cost_of(change), slip, change, bench

    def _fits(self, candidate: Candidate, bench: Bench) -> bool:
        """Say whether a candidate agrees with every stated digit of the step that the origin belongs to."""
        if abs(candidate.value - self.lead.stated) > self._window(self.lead, bench, candidate.value):
            return False
        if abs(candidate.value - _plain(bench)) <= 0.2 * abs(self.lead.stated - _plain(bench)):
            return False  # it hardly changes anything: the digits of the parents explain as much
        return all(self._agrees(c, candidate, bench) for c in self.siblings)

    def _agrees(self, c: Compared, candidate: Candidate, bench: Bench) -> bool:
        """Say whether a stated output of the same step agrees with a candidate."""
        if self.lead.key in candidate.change and c.key not in candidate.change:
            return c.outcome is not Outcome.WRONG
        other = replace(bench, origin=c)
        value = other.value_with(candidate.change)
        return value is not None and abs(value - c.stated) <= self._window(c, other, value)

    def _window(self, c: Compared, bench: Bench, value: float) -> float:
        """Return how far a candidate may lie from the stated value: its digits, and those of stated parents."""
        half = ROUNDED * c.statement.quantity.half_width + 1e-12 * abs(c.stated)
        if not bench.stated or bench.values is self.case.values:
            return half
        plain = bench.values.get(c.key)
        scale = abs(value / plain) if isinstance(plain, float) and plain else 1.0
        return half + self.case.carried.spread(c.key) * min(max(scale, 1.0), 1e3)

    def _chance(self, best: Candidate, bench: Bench, tried: Sequence[Candidate]) -> float:
        """Return how many matches by chance are expected among slips as simple as the one found."""
        stated = self.lead.stated
        if stated == 0.0:
            return 1.0
        near = {
            float(f"{c.value:.6e}")
            for c in tried
            if c.slip.rank <= best.slip.rank
            and c.value * stated > 0.0
            and abs(math.log(c.value / stated)) < NEAR
        }
        spread = 1.5 * abs(stated)
        return max(len(near), 1) * 2.0 * self._window(self.lead, bench, best.value) / spread

    def _evidence(self, explained: Sequence[Compared], best: Candidate) -> float:
        """Return the factor by which further results that agree make chance less likely."""
        factor = 1.0
        wrong = [c for c in self.siblings if c.outcome is Outcome.WRONG and c.key not in best.change]
        for c in (*explained, *wrong):
            if c.stated:
                factor *= min(1.0, 2.0 * c.statement.quantity.half_width / (1.5 * abs(c.stated)))
        return factor

    def _explained(self, best: Candidate, others: Sequence[Sequence[Compared]]) -> Iterator[Compared]:
        """Yield the leads of other origins that the same change reproduces."""
        for group in others:
            lead = next(c for c in group if not c.explained_by_digits)
            if lead.deviation is None:
                continue
            inquiry = _Inquiry(self.case, lead, ())
            for bench in inquiry.benches:
                if not set(best.change) & bench.parents:
                    continue
                value = bench.value_with(best.change)
                if value is not None and inquiry._fits(Candidate(best.slip, best.change, value), bench):
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
        if case.carried.spread(lead.key) <= BARELY * lead.statement.quantity.half_width:
            return  # the digits of the parents could not move the result beyond its own
    if hidden:
        yield Bench(case, lead, case.carried.values, hidden)


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


def _place(candidate: Candidate) -> int:
    """Return how far from the origin a slip happens: fewer changed keys are simpler."""
    return len(candidate.change)


def _distinct(matches: Sequence[tuple[Candidate, Bench]]) -> Iterator[tuple[Candidate, Bench]]:
    """Yield the first match of every slip."""
    seen: set[str] = set()
    for candidate, bench in matches:
        if candidate.slip.name not in seen:
            seen.add(candidate.slip.name)
            yield candidate, bench
