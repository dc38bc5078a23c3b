"""The score of many trials: rates with their counts, by kind of slip and by situation."""

from __future__ import annotations

import statistics
from collections import defaultdict
from collections.abc import Callable, Iterable, Iterator, Sequence

from tests.benchmarks.seeded.judge import Outcomes


def rate(hits: Iterable[bool]) -> str:
    """Return a rate with its count: ``99.2 % (124 of 125)``."""
    found = list(hits)
    if not found:
        return "none tried"
    return f"{100.0 * sum(found) / len(found):.2f} % ({sum(found)} of {len(found)})"


def of_correct(outcomes: Sequence[Outcomes]) -> Iterator[str]:
    """Yield the lines on correct records."""
    plain = [o for o in outcomes if not o.trial.hard]
    yield f"correct records: {len(outcomes)}, of which {len(plain)} plain and {len(outcomes) - len(plain)} hard"
    yield f"  false alarms                 {rate(o.detected for o in outcomes)}"
    yield f"  false alarms, plain ones     {rate(o.detected for o in plain)}"
    yield f"  with a query                 {rate(bool(o.queries) for o in outcomes)}"
    yield f"  with a query, plain ones     {rate(bool(o.queries) for o in plain)}"
    yield f"  with a result not evaluable  {rate(bool(o.not_evaluable) for o in outcomes)}"


def of_slipped(outcomes: Sequence[Outcomes], wrong: Sequence[bool] = ()) -> Iterator[str]:
    """Yield the lines on records with slips; ``wrong`` says where a cause was stated with the true kind left out."""
    count = max((len(o.trial.slips) for o in outcomes), default=1)
    known = [o for o in outcomes if o.trial.identifiable] if count == 1 else list(outcomes)
    yield f"records with {'one slip' if count == 1 else 'two slips'}: {len(outcomes)}"
    yield f"  detected                     {rate(o.detected for o in outcomes)}"
    yield f"  missed, yet with a query     {rate(bool(o.queries) for o in outcomes if not o.detected)}"
    yield f"  origin right                 {rate(o.origin_hit for o in outcomes)}"
    yield f"  origin in the first step     {rate(o.first_hit for o in outcomes)}"
    yield f"  cause first, identifiable    {rate(o.cause_first for o in known)}"
    yield f"  cause anywhere, identifiable {rate(o.cause_anywhere for o in known)}"
    yield f"  cause anywhere, all          {rate(o.cause_anywhere for o in outcomes)}"
    if wrong:
        yield f"  wrong cause stated, its kind left out {rate(wrong)}"
    if outcomes:
        yield f"  origin findings, mean        {statistics.fmean(o.origin_findings for o in outcomes):.3f}"
    ratios = [o.seconds / o.plain_seconds for o in outcomes if o.plain_seconds > 0.0]
    if ratios:
        mean, most = statistics.fmean(ratios), max(ratios)
        yield f"  cost against the plain record {mean:.1f} × in the mean, {most:.1f} × at most"


def by_kind(outcomes: Sequence[Outcomes]) -> Iterator[str]:
    """Yield a table by kind of slip."""
    yield from _table("kind of slip", outcomes, lambda o: [slip.kind for slip in o.trial.slips])


def by_situation(outcomes: Sequence[Outcomes]) -> Iterator[str]:
    """Yield a table by situation."""
    yield from _table("situation", outcomes, lambda o: [o.trial.situation])


def _table(title: str, outcomes: Sequence[Outcomes], names: Callable[[Outcomes], list[str]]) -> Iterator[str]:
    groups: dict[str, list[Outcomes]] = defaultdict(list)
    for outcome in outcomes:
        for name in names(outcome):
            groups[name].append(outcome)
    yield f"{title:54} {'n':>5} {'detected':>9} {'origin':>9} {'identif.':>9} {'first':>9} {'anywhere':>9}"
    for name in sorted(groups):
        group = groups[name]
        known = [o for o in group if o.trial.identifiable or len(o.trial.slips) > 1]
        cells = (
            f"{sum(o.detected for o in group):>9}",
            f"{sum(o.origin_hit for o in group):>9}",
            f"{len(known):>9}",
            f"{sum(o.cause_first for o in known):>9}",
            f"{sum(o.cause_anywhere for o in known):>9}",
        )
        yield f"{name:54} {len(group):>5} {' '.join(cells)}"
