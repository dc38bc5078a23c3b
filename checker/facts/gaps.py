"""What stands between the inputs of a record and its results: each gap once, with the results that it costs."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.comparison.compare import Compared
from checker.facts.exchange import NEVER_REACHED, unreachable
from checker.facts.state_gaps import SEVERAL_BODIES, STATE_RULES, StateGap, is_refused, state_gaps, unread
from checker.facts.twins import CONSTANT, IDEAL, REAL
from checker.findings import Outcome
from checker.outcomes import NotEvaluable
from checker.problems import Place
from checker.submission import Body, Process, Role, SequenceOfProcesses
from checker.substances import knows_substance

STOPS: Final = ("lift_pressure", "stop_volume")
"""What says where the path of a sequence changes."""


@dataclass(frozen=True, slots=True)
class Gap:
    """A reason why results have no independent value.

    Attributes
    ----------
    rule : str
        Name of the rule that reports it.
    pointer : str
        What it concerns.
    place : Place
        Where in the document.
    reason : str
        In words.
    marks : tuple of str
        Parts of the reason of a result that is lost by it.
    within : str
        Pointer prefix of the process or sequence that alone is concerned, or an empty text.
    """

    rule: str
    pointer: str
    place: Place
    reason: str
    marks: tuple[str, ...]
    within: str = ""

    def costs(self, c: Compared) -> bool:
        """Say whether a result is lost by this gap."""
        pointer = c.statement.pointer
        elsewhere = self.within and pointer.startswith(("processes/", "sequences/"))
        if elsewhere and not pointer.startswith(self.within):
            return False
        return any(mark in c.reason for mark in self.marks)


def gaps(case: Case) -> tuple[Gap, ...]:
    """Return every gap of a record, in a fixed order."""
    return tuple(gap for _, source in _SOURCES for gap in source(case))


def gaps_of(case: Case, rule: str) -> Iterator[tuple[Gap, tuple[str, ...]]]:
    """Yield the gaps that a rule reports, with the pointers of the stated results that each costs."""
    source = next(source for rules, source in _SOURCES if rule in rules)
    for gap in source(case):
        if gap.rule == rule:
            yield gap, tuple(c.statement.pointer for c in lost(case) if gap.costs(c))


def lost(case: Case) -> Iterator[Compared]:
    """Yield the stated results without an independent value."""
    for c in case.compared:
        if c.outcome is Outcome.NOT_EVALUABLE and c.statement.role is Role.RESULT:
            yield c


def unexplained(case: Case) -> Iterator[Compared]:
    """Yield the results without an independent value that no gap explains."""
    results = tuple(lost(case))
    known = gaps(case) if results else ()
    return (c for c in results if not any(gap.costs(c) for gap in known))


def _models(case: Case) -> Iterator[Gap]:
    for name, body in case.record.bodies.items():
        if name in case.plan.substances:
            continue
        try:
            model = case.plan.models[name]
            model.substance((*model.nominal, 1.0, 1.0))
        except NotEvaluable as outcome:
            rule, reason = _rule_of_model(body, outcome), outcome.reason
            yield Gap(rule, f"bodies/{name}", body.place, reason, (reason,))


def _states(case: Case) -> Iterator[Gap]:
    lost_sequences = {gap.pointer for gap in _sequences(case)}
    elsewhere = {
        state
        for sequence in case.record.sequences
        if f"sequences/{sequence.id}" in lost_sequences
        for state in _states_of(case, sequence)
    }
    for g in state_gaps(case):
        if g.rule != SEVERAL_BODIES and g.state not in elsewhere:
            yield Gap(g.rule, g.pointer, g.place, g.reason, g.marks)


def _refused_inputs(case: Case) -> Iterator[Gap]:
    """Yield inputs that are never calculated with because they are zero or less."""
    for s in case.record.statements:
        if is_refused(s):
            reason = f"{s.quantity.text} is not above zero"
            yield Gap("value-not-positive", s.pointer, s.place, reason, (reason,))


def _unread_inputs(case: Case) -> Iterator[Gap]:
    """Yield quantities that could not be read, or not in their unit: reading has reported them."""
    for problem in unread(case):
        parts = (problem.quantity or "").split("/")
        words = f"{parts[-1].replace('_', ' ')} of {'/'.join(parts[1:-1])}"
        marks = (f"{words} is not stated", f"{words}: ")
        yield Gap(problem.kind, problem.quantity or "", problem.place, problem.message, marks)


def _rule_of_model(body: Body, outcome: NotEvaluable) -> str:
    """Return which rule says that a body has no model that can be used."""
    if body.composition is None and body.model == CONSTANT:
        if outcome.kind != "no-solution":
            return "constants-missing"
        return "value-not-positive" if "must be positive" in outcome.reason else "constants-contradict"
    if body.model == "tabulated":
        return "table-unusable"
    if body.model == "phase change":
        return "value-not-positive" if "must be positive" in outcome.reason else "constants-missing"
    unknown = body.model in (REAL, IDEAL) and not knows_substance(body.substance)
    return "substance-unknown" if body.composition is None and unknown else "model-not-recomputed"


def _sequences(case: Case) -> Iterator[Gap]:
    for sequence in case.record.sequences:
        base = f"sequences/{sequence.id}"
        stops = [s.term.name for s in case.record.statements if s.pointer in (f"{base}/{n}" for n in STOPS)]
        if stops and not _is_followed(case, sequence):
            named = " and ".join(name.replace("_", " ") for name in stops)
            reason = f"the sequence with its {named} could not be followed"
            open_states = _states_of(case, sequence)
            marks = (mark for g in state_gaps(case) if g.state in open_states for mark in g.marks)
            yield Gap("sequence-not-recomputed", base, sequence.place, reason, ("sequence with", *marks))


def _states_of(case: Case, sequence: SequenceOfProcesses) -> frozenset[str]:
    """Return the states that a sequence leads to."""
    return frozenset(p.to_state for p in case.record.processes if p.id in sequence.processes)


def _is_followed(case: Case, sequence: SequenceOfProcesses) -> bool:
    """Say whether the last state of a sequence is found."""
    last = next((p for p in case.record.processes if p.id == sequence.processes[-1]), None)
    bodies = [body for state, body in case.record.body_states if last is not None and state == last.to_state]
    return last is not None and all(
        case.value(f"states/{last.to_state}/{body}/temperature") is not None for body in bodies
    )


def _processes(case: Case) -> Iterator[Gap]:
    open_states = state_gaps(case)
    for process in case.record.processes:
        ctx, base = case.context(process.id), f"processes/{process.id}"
        if ctx is not None and not ctx.bodies:
            reason = (
                f"no body is described both in state {process.from_state} and in state {process.to_state}"
            )
            yield Gap("body-missing-in-state", base, process.place, reason, ("",), f"{base}/")
            continue
        yield from _several_bodies(case, process, open_states)
        yield from _heats(case, process)


def _several_bodies(case: Case, process: Process, open_states: Iterable[StateGap]) -> Iterator[Gap]:
    """Yield what several bodies lack to be closed together, once for each set of unknowns, at its first process."""
    ends = (process.from_state, process.to_state)
    for gap in open_states:
        if gap.rule == SEVERAL_BODIES and process is _first_process(case, gap.state) and gap.state in ends:
            base = f"processes/{process.id}"
            yield Gap(SEVERAL_BODIES, base, process.place, gap.reason, gap.marks)


def _first_process(case: Case, state: str) -> Process | None:
    return next((p for p in case.record.processes if state in (p.from_state, p.to_state)), None)


def _heats(case: Case, process: Process) -> Iterator[Gap]:
    base = f"processes/{process.id}"
    if process.heat_transfers is None:
        mark = f"heat transfers of {process.id} is not stated"
        reason = "no heat transfers are listed, so the entropy that goes with heat is not known"
        yield Gap("heat-transfers-not-stated", base, process.place, reason, (mark,), f"{base}/")
    for item in process.heat_transfers or ():
        if item.is_internal:
            continue
        own = f"{base}/heat_transfers/{item.id}"
        if not item.at_system and case.given(f"{own}/boundary_temperature") is None:
            mark = f"boundary temperature of {process.id}/heat_transfers/{item.id} is not stated"
            reason = f"the temperature at which the heat of {item.id} crosses the boundary is not stated"
            yield Gap("boundary-temperature-missing", own, item.place, reason, (mark,), f"{base}/")
        mark = f"the reservoir of heat transfer {item.id} is not stated"
        reason = f"{mark}, and the surroundings cannot be it at this boundary temperature"
        yield Gap("reservoir-not-stated", own, item.place, reason, (mark,), f"{base}/")
    yield from _unknowns(case, process)


def _unknowns(case: Case, process: Process) -> Iterator[Gap]:
    """Yield the heat transfers of a process of which more than one is unknown."""
    ctx = case.context(process.id)
    if ctx is None or ctx.unknown_heats < 2:
        return
    unknown = [i.id for i in ctx.external_heats or () if not ctx.is_supplied("heat", i.id)]
    base = f"processes/{process.id}"
    marks = tuple(f"energy of {process.id}/heat_transfers/{name} is not stated" for name in unknown)
    reason = f"{len(unknown)} heat transfers are unknown ({', '.join(unknown)}), and one balance closes one unknown"
    yield Gap("too-many-unknowns", base, process.place, reason, marks, f"{base}/")


def _out_of_reach(case: Case) -> Iterator[Gap]:
    """Yield end temperatures that powers and losses never lead to; a rule of its own reports them."""
    for process in case.record.processes:
        found = unreachable(case, process)
        if found is not None:
            base = f"processes/{process.id}"
            reason = f"{NEVER_REACHED}: powers and losses balance before"
            yield Gap("temperature-out-of-reach", base, process.place, reason, (NEVER_REACHED,), f"{base}/")


def _surroundings(case: Case) -> Iterator[Gap]:
    for name, words in (("temperature", "temperature T₀"), ("pressure", "pressure p₀")):
        if case.given(f"surroundings/{name}") is None:
            mark = f"{name} of the surroundings is not stated"
            reason = f"the {words} of the surroundings is not stated"
            yield Gap("surroundings-not-stated", f"surroundings/{name}", case.record.place, reason, (mark,))


_SOURCES: Final[tuple[tuple[tuple[str, ...], Callable[[Case], Iterable[Gap]]], ...]] = (
    (
        (
            "substance-unknown",
            "constants-missing",
            "constants-contradict",
            "model-not-recomputed",
            "table-unusable",
        ),
        _models,
    ),
    ((), _refused_inputs),
    ((), _unread_inputs),
    ((*STATE_RULES, "datum-missing"), _states),
    (("sequence-not-recomputed",), _sequences),
    (
        (
            "body-missing-in-state",
            SEVERAL_BODIES,
            "heat-transfers-not-stated",
            "boundary-temperature-missing",
            "reservoir-not-stated",
            "too-many-unknowns",
        ),
        _processes,
    ),
    (("temperature-out-of-reach",), _out_of_reach),
    (("surroundings-not-stated",), _surroundings),
)
"""Rules with what finds the gaps that they report; what no rule reports as a gap is reported by itself elsewhere."""
