"""Misjudged trials, in full: the package, what was done to it and what the review said."""

from __future__ import annotations

import json
from collections.abc import Iterator
from pathlib import Path

from tests.benchmarks.seeded.judge import Outcomes


def misjudged(outcome: Outcomes) -> bool:
    """Say whether a review missed something, or said too much."""
    trial = outcome.trial
    if not trial.slips:
        return outcome.detected or bool(outcome.queries) or bool(outcome.not_evaluable)
    return not outcome.detected or not outcome.origin_hit or (trial.identifiable and not outcome.cause_first)


def summary(outcome: Outcomes) -> Iterator[str]:
    """Yield what was done and what was said."""
    trial = outcome.trial
    yield f"{trial.name}: {trial.situation}{', hard' * trial.hard}{', rounds early' * trial.early}"
    for slip, origins, first in zip(trial.slips, trial.origins, trial.first, strict=True):
        used = "" if slip.value is None else f", used as {slip.value:g}"
        how = {"result": ", carried on" if slip.carried else ", not carried on"}.get(slip.place, "")
        yield f"  slip: {slip.kind}, {slip.place} {slip.key}{used}{how}"
        yield f"    starts at: {', '.join(sorted(origins))}; in the first step: {', '.join(sorted(first))}"
    if trial.slips:
        yield f"  moved: {', '.join(sorted(trial.moved))}"
        same = ", ".join(trial.imitators) or "not looked for"
        yield "  identifiable" if trial.identifiable else f"  same digits: {same}"
        yield (
            f"  judged: {'detected' if outcome.detected else 'MISSED'}, origin "
            f"{'right' if outcome.origin_hit else 'WRONG'}, cause "
            f"{'first' if outcome.cause_first else 'named' if outcome.cause_anywhere else 'NOT NAMED'}"
        )
    for finding in (*outcome.discrepancies, *outcome.queries):
        origin = ", origin" if finding.origin else ""
        causes = f" causes: {'; '.join(cause.slip for cause in finding.causes)}" if finding.causes else ""
        yield f"  {finding.grade}{origin}: {finding.rule} {finding.quantity}: {finding.message}{causes}"
    yield from (f"  not evaluable: {quantity}" for quantity in outcome.not_evaluable)


def in_full(outcome: Outcomes) -> Iterator[str]:
    """Yield the summary and the package."""
    yield from summary(outcome)
    yield from json.dumps(json.loads(outcome.trial.package), ensure_ascii=False, indent=1).splitlines()


def dump(folder: Path, outcome: Outcomes) -> None:
    """Write package and summary of a trial into a folder."""
    folder.mkdir(parents=True, exist_ok=True)
    stem = folder / outcome.trial.name.replace(" ", "-")
    tree = json.loads(outcome.trial.package)
    stem.with_suffix(".json").write_text(json.dumps(tree, ensure_ascii=False, indent=1) + "\n", "utf-8")
    stem.with_suffix(".txt").write_text("\n".join(summary(outcome)) + "\n", "utf-8")
