"""Monte Carlo propagation of distributions (JCGM 101:2008), for results that the first order does not describe.

Trials are drawn in batches, each stratified: every source takes one value from each of as many equally likely parts
as the batch has trials, which needs fewer trials for the same interval. The batches stop the draw as in JCGM 101, 7.9:
once the ends of every interval are known well enough, measured by how far they scatter from batch to batch.
The generator starts from the names of the record and of the source, so that a review is the same every time.
"""

from __future__ import annotations

import hashlib
import math
import random
import statistics
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass
from typing import Final

from checker.comparison.sources import Source, shifted
from checker.sheet.step import Found, Sheet, Step, Values, run_step

BATCH: Final = 100
FEWEST: Final = 400
MOST: Final = 2000
"""Trials. With 2000 the end of a 95 % interval of a normal distribution scatters by 3 % of its half-width at most,
with 400 by 7 %; the stop asks for less wherever stratification gives it (chosen)."""
KNOWN: Final = 0.05
"""Part of an interval's half-width to which its ends must be known (95 %) to stop before the most trials (chosen)."""
WORK: Final = 100_000
"""Largest cost of a draw, in property states; a record whose trials cost more than FEWEST allow is not drawn."""
_NORMAL: Final = statistics.NormalDist()


@dataclass(frozen=True, slots=True)
class Interval:
    """A probabilistically symmetric coverage interval, as distances from the recomputed value, which it includes.

    ``failed`` trials had no value; ``left_out`` is the probability outside the interval.
    """

    below: float
    above: float
    trials: int
    failed: int
    left_out: float

    @property
    def settled(self) -> bool:
        """Whether no more trials lack a value than the interval leaves out."""
        return self.failed <= self.left_out * self.trials


def propagate(
    record: str, sheet: Sheet, base: Values, sources: Sequence[Source], keys: Sequence[str], k: float
) -> dict[str, Interval]:
    """Return the coverage interval of each key, with the coverage probability of ±k of a normal distribution.

    Returns
    -------
    dict
        Empty where the trials would cost more than is allowed.
    """
    steps = _steps_below(sheet, sources, keys)
    most = min(MOST, WORK // max(1, sum(step.cost for step in steps)))
    if most < FEWEST:
        return {}
    left_out = math.erfc(k / math.sqrt(2.0))
    drawn: dict[str, list[list[float]]] = {key: [] for key in keys}
    failed = dict.fromkeys(keys, 0)
    trials = 0
    for batch in _batches(record, sources):
        found = [_trial(steps, base, moved, keys) for moved in batch(base)]
        trials += len(found)
        for place, key in enumerate(keys):
            values = [value for row in found if isinstance(value := row[place], float)]
            failed[key] += len(found) - len(values)
            drawn[key].append(values)
        if trials + BATCH > most or (trials >= FEWEST and all(_known(b, left_out) for b in drawn.values())):
            break
    return {key: _interval(base, key, drawn[key], trials, failed[key], left_out) for key in keys}


def _steps_below(sheet: Sheet, sources: Sequence[Source], keys: Sequence[str]) -> tuple[Step, ...]:
    """Return the steps between the moved leaves and the keys, in their order."""
    needed = set(keys).union(*(sheet.ancestors(key) for key in keys))
    touched = {leaf for source in sources for leaf in source.shifts}
    found = []
    for step in sheet.steps:
        if not touched.isdisjoint(step.parents):
            touched.update(step.outputs)
            if not needed.isdisjoint(step.outputs):
                found.append(step)
    return tuple(found)


class _Batch:
    """One batch of trials: for each, how many standard uncertainties every source is off."""

    def __init__(self, sources: Sequence[Source], generators: Sequence[random.Random]) -> None:
        self._sources = sources
        self._columns = [_column(s, g) for s, g in zip(sources, generators, strict=True)]

    def __call__(self, base: Values) -> Iterator[dict[str, float]]:
        """Yield the moved leaves of each trial."""
        for row in zip(*self._columns, strict=True):
            yield shifted(base, zip(self._sources, row, strict=True))


def _batches(record: str, sources: Sequence[Source]) -> Iterator[_Batch]:
    generators = [random.Random(_seed(record, source)) for source in sources]
    while True:
        yield _Batch(sources, generators)


def _seed(record: str, source: Source) -> int:
    identity = "\n".join((record, source.kind, source.name))
    return int.from_bytes(hashlib.sha256(identity.encode("utf-8", "surrogatepass")).digest()[:8], "big")


def _column(source: Source, generator: random.Random) -> list[float]:
    """Return a stratified sample of a source, in standard uncertainties."""
    parts = list(range(BATCH))
    generator.shuffle(parts)
    levels = [(part + generator.random()) / BATCH for part in parts]
    if source.rectangular:
        return [math.sqrt(3.0) * (2.0 * level - 1.0) for level in levels]
    return [_NORMAL.inv_cdf(max(level, 1e-12)) for level in levels]


def _trial(
    steps: Sequence[Step], base: Values, moved: Mapping[str, float], keys: Sequence[str]
) -> list[Found]:
    values: Values = {**base, **moved}
    for step in steps:
        run_step(step, values, {})
    return [values[key] for key in keys]


def _known(batches: Sequence[Sequence[float]], left_out: float) -> bool:
    """Say whether the ends of an interval scatter little from batch to batch (JCGM 101:2008, 7.9.4)."""
    ends = [_ends(values, left_out) for values in batches if values]
    if len(ends) < 2:
        return True  # nothing has a value, and more trials would not help
    half = (statistics.fmean(high for _, high in ends) - statistics.fmean(low for low, _ in ends)) / 2.0
    scatter = max(statistics.stdev(side) for side in zip(*ends, strict=True)) / math.sqrt(len(ends))
    return bool(2.0 * scatter <= KNOWN * half)


def _ends(values: Sequence[float], left_out: float) -> tuple[float, float]:
    """Return the ends of the probabilistically symmetric interval (JCGM 101:2008, 7.7), interpolated."""
    ordered = sorted(values)
    return _quantile(ordered, left_out / 2.0), _quantile(ordered, 1.0 - left_out / 2.0)


def _quantile(ordered: Sequence[float], level: float) -> float:
    place = min(max(level * len(ordered) - 0.5, 0.0), len(ordered) - 1.0)
    low = int(place)
    high = min(low + 1, len(ordered) - 1)
    return ordered[low] + (place - low) * (ordered[high] - ordered[low])


def _interval(
    base: Values, key: str, batches: Sequence[Sequence[float]], trials: int, failed: int, left_out: float
) -> Interval:
    value = base[key]
    values = [found for batch in batches for found in batch]
    if not values or not isinstance(value, float):
        return Interval(0.0, 0.0, trials, trials, left_out)
    low, high = _ends(values, left_out)
    return Interval(max(0.0, value - low), max(0.0, high - value), trials, failed, left_out)
