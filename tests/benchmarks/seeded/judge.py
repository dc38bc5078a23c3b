"""One trial reviewed: what the review says, reduced to what the score needs."""

from __future__ import annotations

import time
from collections.abc import Iterator
from contextlib import contextmanager
from dataclasses import dataclass
from functools import cache

from checker import review
from checker.findings import Finding, Grade, Outcome, Review
from tests.benchmarks.seeded.trial import Trial, correct_trial


@dataclass(frozen=True)
class Outcomes:
    """What a review said about a trial."""

    trial: Trial
    discrepancies: tuple[Finding, ...]
    queries: tuple[Finding, ...]
    not_evaluable: tuple[str, ...]
    origins: frozenset[str]
    origin_findings: int
    causes: tuple[tuple[str, ...], ...]
    """For each origin finding the kinds of slips it names, best first."""
    likely: tuple[str, ...]
    """The causes that are stated as such, not as one of several or chance explanations."""
    seconds: float
    plain_seconds: float

    @property
    def detected(self) -> bool:
        """Say whether there is a discrepancy on the slipped chain."""
        return bool(self.discrepancies)

    @property
    def origin_hit(self) -> bool:
        """Say whether every slip has an origin where it may start, and there is no other origin."""
        allowed = frozenset().union(*self.trial.origins)
        return self.origins <= allowed and all(self.origins & front for front in self.trial.origins)

    @property
    def first_hit(self) -> bool:
        """Say whether an origin lies in the first step that each slip reaches."""
        return all(self.origins & front for front in self.trial.first)

    @property
    def first_causes(self) -> tuple[str, ...]:
        """Return the cause in first place of each origin."""
        return tuple(causes[0] for causes in self.causes if causes)

    @property
    def cause_first(self) -> bool:
        """Say whether each slip is the first cause of an origin."""
        return {slip.kind for slip in self.trial.slips} <= set(self.first_causes)

    @property
    def cause_anywhere(self) -> bool:
        """Say whether each slip is among the causes of an origin."""
        return {slip.kind for slip in self.trial.slips} <= {
            cause for causes in self.causes for cause in causes
        }


def judged(trial: Trial, timed: bool = False) -> Outcomes:
    """Review a trial and reduce the review; ``timed`` also reviews the same record without its slips."""
    plain = 0.0
    if timed:
        _warm_up()
        start = time.perf_counter()
        review(trial.plain, name="trial")
        plain = time.perf_counter() - start
    start = time.perf_counter()
    found = review(trial.package, name="trial")
    return outcomes_of(trial, found, time.perf_counter() - start, plain)


@cache
def _warm_up() -> None:
    """Load what the first review of a process loads, so that it is not timed."""
    review(correct_trial(0, 0).package, name="trial")


@contextmanager
def left_out(kind: str) -> Iterator[bool]:
    """Take a kind of slip out of the catalogue for a while; False if the catalogue has no such kind."""
    from checker.slips import search
    from checker.slips.catalogue import CATALOGUE

    kept = tuple(slip for slip in CATALOGUE if slip.name != kind)
    whole = search.diagnose.__defaults__
    search.diagnose.__defaults__ = (kept,)
    try:
        yield len(kept) < len(CATALOGUE)
    finally:
        search.diagnose.__defaults__ = whole


def outcomes_of(trial: Trial, found: Review, seconds: float, plain: float) -> Outcomes:
    """Reduce a review."""
    discrepancies = tuple(f for f in found.findings if f.grade is Grade.DISCREPANCY)
    starting = [f for f in discrepancies if f.origin]
    return Outcomes(
        trial,
        discrepancies,
        tuple(f for f in found.findings if f.grade is Grade.QUERY),
        tuple(
            checked.quantity
            for record in found.records
            for checked in record.checked
            if checked.outcome is Outcome.NOT_EVALUABLE
        ),
        frozenset(f.quantity or "" for f in starting),
        len(starting),
        tuple(tuple(cause.slip for cause in f.causes) for f in starting),
        tuple(f.causes[0].slip for f in starting if f.causes and getattr(f.causes[0], "likely", True)),
        seconds,
        plain,
    )
