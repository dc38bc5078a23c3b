"""The planner: from what is known, the first formula that applies, until nothing more follows.

Candidates stand in the order in which they should be used. What the review assumes comes last, one assumption
at a time, and only where nothing stated tells it.
"""

from __future__ import annotations

import math
from collections import defaultdict
from collections.abc import Callable, Iterable, Iterator, Mapping, Sequence
from heapq import heappop, heappush
from typing import Final

from checker.sheet.states import StatePlan, best_pair, state_step
from checker.sheet.step import Step

Searches = Callable[[StatePlan, set[str]], Iterable[Step]]
Assumed = Callable[[set[str]], Iterator[Step]]
Closings = Callable[[Sequence[StatePlan], set[str]], Iterable[Step]]


def plan(
    leaves: Iterable[str],
    candidates: Sequence[Step],
    states: Sequence[StatePlan],
    searches: Searches,
    closings: Closings,
    assumed: Assumed,
) -> list[Step]:
    """Return the steps in an order in which parents come first.

    What no formula and no search of a single state finds is left to the closings, then to what is assumed.
    """
    planner = _Planner(candidates, states)
    for leaf in leaves:
        planner.learn(leaf)
    while True:
        planner.settle()
        offered = (step for state in planner.open_states() for step in searches(state, planner.known))
        if planner.take_first(offered):
            continue
        if planner.take_first(closings(planner.open_states(), planner.known)):
            continue
        if planner.take_first(assumed(planner.known)):
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
        self._waiting: list[int] = []
        for index, step in enumerate(candidates):
            for parent in set(step.parents):
                self._users[parent].append(index)
        for index, state in enumerate(states):
            for key in {*(clue.key for clue in state.clues), *state.model.parents}:
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
        """Take states and candidates until none applies any more.

        A state whose link may still be found waits for it until nothing else applies.
        """
        while self._ready_states or self._ready or self._waiting:
            if self._ready_states:
                index = heappop(self._ready_states)
                if self._states[index].awaits_link(self.known):
                    heappush(self._waiting, index)
                else:
                    self._try_state(self._states[index])
            elif self._ready:
                step = self._candidates[heappop(self._ready)]
                if step.outputs[0] not in self.known:
                    self._take(step)
            else:
                self._try_state(self._states[heappop(self._waiting)])

    def _try_state(self, state: StatePlan) -> None:
        """Take a state where two of its clues are known."""
        if state.key not in self.known and (pair := best_pair(state, self.known)) is not None:
            self._take(state_step(state, pair))

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


LAST_RESORT: Final = 1000.0
"""What it costs to state a quantity that the path should tell; a statement that nothing replaces costs one."""
PER_FORMULA: Final = 1e-3
"""What a formula costs beside what it lacks, so that the cheapest way never leads round in a circle."""


def explain(
    keys: Iterable[str], known: set[str], makers: Mapping[str, Sequence[Step]], say: Callable[[str], str]
) -> dict[str, str]:
    """Return what is missing for each key: of the formulas that could have made it, the one that lacks least."""
    wanted = tuple(keys)
    lacking = _lacking(wanted, known, makers)
    costs = _costs(lacking)
    return {key: "; ".join(_reasons(key, lacking, costs, say)) or say(key) for key in wanted}


def _lacking(
    keys: Iterable[str], known: set[str], makers: Mapping[str, Sequence[Step]]
) -> dict[str, list[list[str]]]:
    """Return, for every key above some, what each of its formulas lacks; no formula: nothing can make it."""
    found: dict[str, list[list[str]]] = {}
    waiting = list(keys)
    while waiting:
        key = waiting.pop()
        if key not in found:
            options = ([p for p in step.parents if p not in known] for step in makers.get(key, ()))
            found[key] = [option for option in options if option]
            waiting.extend(parent for option in found[key] for parent in option)
    return found


def _costs(lacking: Mapping[str, Sequence[Sequence[str]]]) -> dict[str, float]:
    """Return how many missing statements each key costs; infinite where formulas only lead round in a circle.

    Heat and work follow from one another; what is missing where neither is known is the work of the boundary.
    """
    costs = {key: math.inf if options else 1.0 for key, options in lacking.items()}
    costs.update({key: LAST_RESORT for key in costs if key.endswith("/boundary_work")})
    changed = True
    while changed:
        changed = False
        for key, options in lacking.items():
            cost = min((sum(costs[p] for p in option) + PER_FORMULA for option in options), default=1.0)
            if cost < costs[key]:
                costs[key], changed = cost, True
    return costs


def _reasons(
    key: str,
    lacking: Mapping[str, Sequence[Sequence[str]]],
    costs: Mapping[str, float],
    say: Callable[[str], str],
) -> list[str]:
    """Return in words what the cheapest way to a key lacks."""
    reasons: dict[str, None] = {}
    seen: set[str] = set()
    waiting = [key]
    while waiting:
        wanted = waiting.pop(0)
        if wanted in seen:
            continue
        seen.add(wanted)
        options = lacking[wanted]
        best = min(options, key=lambda option: sum(costs[p] for p in option), default=())
        if not best or sum(costs[p] for p in best) >= costs[wanted]:
            reasons[say(wanted)] = None
        else:
            waiting.extend(best)
    return list(reasons)
