"""The planner: from what is known, the first formula that applies, until nothing more follows.

Candidates stand in the order in which they should be used. What the review assumes comes last, one assumption
at a time, and only where nothing stated tells it.
"""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Callable, Iterable, Iterator, Mapping, Sequence
from heapq import heappop, heappush

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
    planner = _Planner(candidates, states)
    for leaf in leaves:
        planner.learn(leaf)
    while True:
        planner.settle()
        offered = (step for state in planner.open_states() for step in searches(state, planner.known))
        if planner.take_first(offered) or planner.take_first(assumed(planner.known)):
            continue
        return planner.steps


class _Planner:
    """Takes the first candidate that applies, by its place in the list; states before formulas.

    Every candidate counts its unknown parents, so that a long chain costs no more than its length.
    """

    def __init__(self, candidates: Sequence[Step], states: Sequence[StatePlan]) -> None:
        self.known: set[str] = set()
        self.steps: list[Step] = []
        self._candidates, self._states = candidates, states
        self._lacking = [len(set(step.parents)) for step in candidates]
        self._users: dict[str, list[int]] = defaultdict(list)
        self._clue_of: dict[str, list[int]] = defaultdict(list)
        self._ready = [index for index, count in enumerate(self._lacking) if count == 0]
        self._ready_states: list[int] = []
        for index, step in enumerate(candidates):
            for parent in set(step.parents):
                self._users[parent].append(index)
        for index, state in enumerate(states):
            for key in {clue.key for clue in state.clues}:
                self._clue_of[key].append(index)

    def learn(self, key: str) -> None:
        """Note that a key is known, and what can be tried because of it."""
        if key in self.known:
            return
        self.known.add(key)
        for index in self._users.get(key, ()):
            self._lacking[index] -= 1
            if self._lacking[index] == 0:
                heappush(self._ready, index)
        for index in self._clue_of.get(key, ()):
            heappush(self._ready_states, index)

    def settle(self) -> None:
        """Take states and candidates until none applies any more."""
        while self._ready_states or self._ready:
            if self._ready_states:
                state = self._states[heappop(self._ready_states)]
                if state.key not in self.known and (pair := best_pair(state, self.known)) is not None:
                    self._take(state_step(state, pair))
                continue
            step = self._candidates[heappop(self._ready)]
            if step.outputs[0] not in self.known:
                self._take(step)

    def open_states(self) -> list[StatePlan]:
        """Return the states that are not found yet."""
        return [state for state in self._states if state.key not in self.known]

    def take_first(self, offered: Iterable[Step]) -> bool:
        """Take the first step offered that applies and yields something new."""
        for step in offered:
            if step.outputs[0] not in self.known and self.known.issuperset(step.parents):
                self._take(step)
                return True
        return False

    def _take(self, step: Step) -> None:
        self.steps.append(step)
        for output in step.outputs:
            self.learn(output)


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
