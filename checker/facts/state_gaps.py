"""States that could not be found, and why; states that depend on one another count as one gap."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass, replace
from typing import Final

from checker.case import Case
from checker.outcomes import NotEvaluable
from checker.problems import Place, Problem
from checker.sheet.melting import UNTOLD
from checker.submission import BodyState, Role, Statement
from checker.substances.interface import Phase

RULE_OF_KIND: Final = {
    "outside-range": "outside-range",
    "several-roots": "several-states-possible",
    "no-solution": "state-impossible",
    "ill-conditioned": "state-undetermined",
    "near-saturation": "near-saturation",
}
"""Kind of outcome → the rule that reports it; any other: the state is undetermined."""
UNDETERMINED: Final = "state-undetermined"
SEVERAL_BODIES: Final = "several-bodies-not-closed"
TWO_PHASE: Final = "two-phase-from-temperature-and-pressure"
STATE_RULES: Final = (UNDETERMINED, TWO_PHASE, *RULE_OF_KIND.values())
"""The rules that report states as gaps."""
REACHES_ACROSS: Final = "reach across the saturation line"
URGENCY: Final = (
    "value-not-positive",
    "quality-outside-range",
    TWO_PHASE,
    "near-saturation",
    "outside-range",
    "state-impossible",
    "several-states-possible",
)
"""Which of several dependent states is reported: the first reason that more inputs would not cure."""


@dataclass(frozen=True, slots=True)
class StateGap:
    """A body in a state without independent properties."""

    rule: str
    state: str
    body: str
    place: Place
    reason: str
    marks: tuple[str, ...]

    @property
    def pointer(self) -> str:
        """Pointer of the body in the state."""
        return f"states/{self.state}/{self.body}"


def state_gaps(case: Case) -> tuple[StateGap, ...]:
    """Return one gap for each group of states that depend on one another."""
    groups: list[list[StateGap]] = []
    for gap in _single(case):
        linked = [group for group in groups if any(_connected(case, gap, other) for other in group)]
        merged = [gap, *(other for group in linked for other in group)]
        groups = [group for group in groups if group not in linked] + [merged]
    order = [f"states/{state}/{body}" for state, body in case.record.body_states]
    return tuple(_lead(group, order) for group in groups)


def _lead(group: list[StateGap], order: list[str]) -> StateGap:
    def rank(gap: StateGap) -> tuple[int, int]:
        urgency = URGENCY.index(gap.rule) if gap.rule in URGENCY else len(URGENCY)
        return urgency, order.index(gap.pointer)

    first, *rest = sorted(group, key=rank)
    if not rest:
        return first
    states = dict.fromkeys(gap.state for gap in rest if gap.state != first.state)
    others = ", ".join(states) or f"{first.state} of {', '.join(gap.body for gap in rest)}"
    marks = tuple(mark for gap in (first, *rest) for mark in gap.marks)
    return replace(first, reason=f"{first.reason}; with it state {others} stays open", marks=marks)


def _connected(case: Case, one: StateGap, other: StateGap) -> bool:
    ends = {one.state, other.state}
    if one.rule == other.rule and _cause(one) == _cause(other):
        return True  # one closing looked for both
    return one.body == other.body and any({p.from_state, p.to_state} == ends for p in case.record.processes)


def _cause(gap: StateGap) -> str:
    """Return the reason without the name of the state."""
    return gap.reason.partition(" is not determined")[2] or gap.reason


def _single(case: Case) -> Iterator[StateGap]:
    for (state, body), found in case.record.body_states.items():
        pointer = f"states/{state}/{body}/temperature"
        if body not in case.plan.substances or case.value(pointer) is not None:
            continue
        failure, reason = case.failure(pointer), case.why_not(pointer)
        rule = _rule(case, found, failure, reason)
        if rule == UNDETERMINED and _meets_others(case, found):
            rule = SEVERAL_BODIES
        yield StateGap(rule, state, body, found.place, reason, (reason,))


def _rule(case: Case, found: BodyState, failure: NotEvaluable | None, reason: str) -> str:
    base = f"states/{found.state}/{found.body}/"
    if any(s.pointer.startswith(base) and is_refused(s) for s in case.record.statements):
        return "value-not-positive"
    kinds = [problem.kind for problem in unread(case) if (problem.quantity or "").startswith(base)]
    if kinds:
        return kinds[0]
    if any(s.pointer.startswith(base) for s in without_datum(case)):
        return "datum-missing"
    quality = case.given(f"{base}quality")
    if quality is not None and not 0.0 <= quality <= 1.0:
        return "quality-outside-range"
    near = (
        REACHES_ACROSS in reason
        or UNTOLD in reason
        or (failure is not None and failure.kind == "near-saturation")
    )
    if near:
        return TWO_PHASE if _claims_two_phases(case, found) else "near-saturation"
    return RULE_OF_KIND.get(failure.kind, UNDETERMINED) if failure else UNDETERMINED


def is_refused(s: Statement) -> bool:
    """Say whether an input is never calculated with because it is zero or less."""
    return s.role is Role.INPUT and s.usable and s.term.positive and s.quantity.value <= 0.0


def unread(case: Case) -> tuple[Problem, ...]:
    """Return the problems of reading that left a quantity without a value to calculate with."""
    usable = {s.pointer for s in case.record.statements if s.usable}
    return tuple(p for p in case.record.problems if p.quantity is not None and p.quantity not in usable)


def without_datum(case: Case) -> tuple[Statement, ...]:
    """Return the absolute u, h or s among the inputs that no datum brings to the model's."""
    unusable = case.plan.leaves.unusable
    return tuple(
        s
        for s in case.record.statements
        if s.role is Role.INPUT and s.usable and "datum" in unusable.get(case.key(s.pointer), "")
    )


def _meets_others(case: Case, found: BodyState) -> bool:
    """Say whether a state is the end of a process of several bodies, whose balance would find it."""
    return any(
        found.state in (ctx.process.from_state, ctx.process.to_state) and len(ctx.bodies) > 1
        for ctx in case.plan.contexts
    )


def _claims_two_phases(case: Case, found: BodyState) -> bool:
    quality = case.stated(f"states/{found.state}/{found.body}/quality", Role.RESULT)
    return found.claimed_phase == Phase.WET_VAPOUR or any(0.0 < s.value < 1.0 for s in quality)
