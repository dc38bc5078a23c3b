"""The planner: from what is known, the first formula that applies, until nothing more follows.

Candidates stand in the order in which they should be used. What the review assumes comes last, one assumption
at a time, and only where nothing stated tells it.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator, Mapping, Sequence

from checker.sheet.states import StatePlan, best_pair, state_step
from checker.sheet.step import Step

Searches = Callable[[StatePlan, set[str]], Iterable[Step]]
Assumed = Callable[[set[str]], Iterator[Step]]


def plan(
    leaves: Iterable[str],
    candidates: Sequence[Step],
    states: Sequence[StatePlan],
    searches: Searches,
    assumed: Assumed,
) -> list[Step]:
    """Return the steps in an order in which parents come first."""
    known = set(leaves)
    steps: list[Step] = []
    waiting = list(candidates)
    open_states = list(states)
    while True:
        _settle(known, steps, waiting, open_states)
        if _one(known, steps, (s for p in open_states for s in searches(p, known))):
            continue
        if not _one(known, steps, assumed(known)):
            return steps


def _settle(known: set[str], steps: list[Step], waiting: list[Step], states: list[StatePlan]) -> None:
    """Take candidates and states until none applies any more."""
    progress = True
    while progress:
        progress = False
        for state in list(states):
            if state.key in known:
                states.remove(state)
            elif (pair := best_pair(state, known)) is not None:
                take(known, steps, state_step(state, pair))
                states.remove(state)
                progress = True
        for step in list(waiting):
            if not useful(step, known):
                waiting.remove(step)
            elif known.issuperset(step.parents):
                take(known, steps, step)
                waiting.remove(step)
                progress = True


def useful(step: Step, known: set[str]) -> bool:
    """Say whether a step would yield something new."""
    return step.outputs[0] not in known


def take(known: set[str], steps: list[Step], step: Step) -> None:
    """Add a step to the sheet."""
    steps.append(step)
    known.update(step.outputs)


def _one(known: set[str], steps: list[Step], offered: Iterable[Step]) -> bool:
    for step in offered:
        if useful(step, known) and known.issuperset(step.parents):
            take(known, steps, step)
            return True
    return False


def prune(steps: Sequence[Step], wanted: Iterable[str]) -> list[Step]:
    """Return the steps that lead to what is wanted, in their order."""
    needed = set(wanted)
    kept: list[Step] = []
    for step in reversed(steps):
        if not needed.isdisjoint(step.outputs):
            kept.append(step)
            needed.update(step.parents)
    return kept[::-1]


def explain(
    key: str, known: set[str], makers: Mapping[str, Sequence[Step]], say: Callable[[str], str]
) -> str:
    """Return what is missing for a key, from the formulas that could have made it."""
    reasons: dict[str, None] = {}
    seen: set[str] = set()
    waiting = [key]
    while waiting:
        wanted = waiting.pop(0)
        if wanted in seen:
            continue
        seen.add(wanted)
        lacking = _least_lacking(wanted, known, seen, makers)
        if lacking is None:
            reasons[say(wanted)] = None
        else:
            waiting.extend(lacking)
    return "; ".join(reasons) or say(key)


def _least_lacking(
    key: str, known: set[str], seen: set[str], makers: Mapping[str, Sequence[Step]]
) -> list[str] | None:
    """Return what the formula that lacks least still lacks, what was asked before left out; None without one."""
    options = [[parent for parent in step.parents if parent not in known] for step in makers.get(key, ())]
    left = [[parent for parent in lacking if parent not in seen] for lacking in options if lacking]
    return min(left, key=len) if left else None
