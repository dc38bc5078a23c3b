"""From a record to its sheet: the candidates of every body, state, process, sequence and cycle, then the plan."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Iterable, Iterator, Mapping
from dataclasses import dataclass
from functools import partial
from typing import Final

from checker.sheet import balances, cycles
from checker.sheet.bodies import body_steps, dead_state_steps, is_per_mass, unit_mass_step
from checker.sheet.closing.assembly import Scene, closing_steps, shortage
from checker.sheet.context import ProcessContext
from checker.sheet.datum import Offset, declared_offset
from checker.sheet.endstates import Neighbour, curve_steps, path_clues
from checker.sheet.humidity import humidity_clues
from checker.sheet.keys import body_key, clue, given, plain, state_key, term_for
from checker.sheet.leaves import Leaves, collect
from checker.sheet.links import link_clues
from checker.sheet.melting import FRACTION, UNTOLD, melting_state
from checker.sheet.models import BodyModel, body_model
from checker.sheet.planner import explain, plan, prune
from checker.sheet.processes import process_steps
from checker.sheet.same import SameQuantity, same_quantities
from checker.sheet.second_way import second_ways
from checker.sheet.shares import SHARES, internal_keys
from checker.sheet.states import CALORIC, SYMBOLS, Clue, StatePlan, clue_steps
from checker.sheet.step import Sheet, Step, above, users_of
from checker.sheet.transfers import assumed_candidates
from checker.submission import Record, Role
from checker.substances.interface import Phase, Substance

DIRECT: Final = (*SYMBOLS,)
"""State properties that are clues as they are given."""


@dataclass(frozen=True, slots=True)
class RecordPlan:
    """A sheet with what was used to plan it."""

    sheet: Sheet
    models: Mapping[str, BodyModel]
    substances: Mapping[str, Substance]
    offsets: Mapping[str, Offset | None]
    contexts: tuple[ProcessContext, ...]
    leaves: Leaves


def build_sheet(record: Record) -> RecordPlan:
    """Return the alternate calculation sheet of a record, planned from its inputs alone."""
    same = same_quantities(record)
    models = {name: body_model(record, body) for name, body in record.bodies.items()}
    substances = {name: found for name, model in models.items() if (found := model.at_nominal()) is not None}
    offsets = {
        name: declared_offset(substances.get(name), body.datum, shares_water_datum(substances.get(name)))
        for name, body in record.bodies.items()
    }
    leaves = collect(record, models, offsets, same)
    contexts = tuple(
        ProcessContext(record, process, models, same.key, leaves.given, leaves.stated)
        for process in record.processes
    )
    builder = _Builder(record, models, substances, leaves, contexts)
    return RecordPlan(builder.sheet(same), models, substances, offsets, contexts, leaves)


def shares_water_datum(substance: Substance | None) -> bool:
    """Say whether all published tables of the substance share one datum: water as a real fluid."""
    return substance is not None and substance.model == "real fluid" and substance.name.lower() == "water"


class _Builder:
    """Collects the candidates of one record; lives only while its sheet is built."""

    def __init__(
        self,
        record: Record,
        models: Mapping[str, BodyModel],
        substances: Mapping[str, Substance],
        leaves: Leaves,
        contexts: tuple[ProcessContext, ...],
    ) -> None:
        self.record, self.models, self.substances = record, models, substances
        self.leaves, self.contexts = leaves, contexts
        self.candidates: list[Step] = []
        self.first_states: dict[str, str | None] = {}
        self.short: dict[tuple[str, str], str] = {}
        self.neighbours: dict[tuple[str, str], list[Neighbour]] = defaultdict(list)
        for ctx in contexts:
            for body in ctx.bodies:
                ends = ctx.process.from_state, ctx.process.to_state
                if ends[0] != ends[1]:
                    self.neighbours[ends[1], body].append(Neighbour(ctx, body, *ends))
                    self.neighbours[ends[0], body].append(Neighbour(ctx, body, ends[1], ends[0]))

    def sheet(self, same: SameQuantity) -> Sheet:
        """Return the planned sheet."""
        states = [self._state_plan(state, body) for state, body in self._body_states()]
        for body in self.record.bodies:
            self.candidates.extend(body_steps(self.record, body, self.models[body], self._first_state(body)))
            self.candidates.extend(dead_state_steps(self.record, body, self.models[body]))
        for ctx in self.contexts:
            self.candidates.extend(process_steps(ctx, self.substances))
        self.candidates.extend(cycles.cycle_steps(self.record, self.contexts))
        self.candidates.extend(cycles.sequence_steps(self.record, self.contexts))
        leaf_keys = {*self.leaves.values, *(link.key for link in self.leaves.links)}
        scene = Scene(self.record, self.contexts, self.substances, self._first_state)
        closings = partial(closing_steps, scene)
        steps = plan(leaf_keys, self.candidates, states, self._searches, closings, self._assumed)
        known = {*leaf_keys, *(output for step in steps for output in step.outputs)}
        self.short = shortage(scene, [s for s in states if s.key not in known], known)
        made = {output: step for step in steps for output in step.outputs}
        again = tuple(second_ways(self._twice_told(), self.candidates, known, made))
        wanted = self._wanted(same, made).union(self._shares(), *(step.outputs for step in again))
        steps = prune([*steps, *again], wanted)
        made = {output: step for step in steps for output in step.outputs}
        return Sheet(
            self.record.id,
            self.leaves.values,
            tuple(steps),
            self._missing(known, same),
            same,
            self.leaves.links,
            made,
            users_of(steps),
        )

    def _twice_told(self) -> Iterator[str]:
        """Yield what path, reservoir, losses or a linked record (mass) tell, whatever the inputs say."""
        for ctx in self.contexts:
            yield from ctx.told_twice
        for link in self.leaves.links:
            if link.key.endswith("/mass"):
                yield body_key(link.key.split("/")[3], "mass")

    def _body_states(self) -> Iterator[tuple[str, str]]:
        for state in self.record.states:
            for body in sorted(self.record.bodies):
                if (state, body) in self.record.body_states:
                    yield state, body

    def _first_state(self, body: str) -> str | None:
        """Return the state in which the body's stated volume applies."""
        if body not in self.first_states:
            self.first_states[body] = self._found_first(body)
        return self.first_states[body]

    def _found_first(self, body: str) -> str | None:
        later = {c.process.to_state for c in self.contexts if body in c.bodies}
        starts = [c.process.from_state for c in self.contexts if body in c.bodies]
        first = next((state for state in starts if state not in later), starts[0] if starts else None)
        own = [state for state, name in self.record.body_states if name == body]
        return first or (own[0] if len(own) == 1 else None)

    def _state_plan(self, state: str, body: str) -> StatePlan:
        model, substance = self.models[body], self.substances.get(body)
        found = self.record.body_states[state, body]
        phase = Phase(found.phase) if found.phase and found.phase_role is Role.INPUT else None
        clues = list(link_clues(self.record, state, body))
        clues += [Clue(name, given(state_key(state, body, name)), stated=True) for name in DIRECT]
        bare = StatePlan(state, body, model, ())
        for made, step in clue_steps(bare, body_key(body, "mass")):
            clues.append(made)
            self.candidates.append(step)
        clues.extend(self._volume_clue(state, body))
        clues.extend(self._shared_clues(state, body))
        for near in self.neighbours.get((state, body), ()):
            for one, made_by in path_clues(near):
                clues.append(one)
                if made_by is not None:
                    self.candidates.append(made_by)
        for one, made_by in humidity_clues(self.record, bare, tuple(clues)):
            clues.append(one)
            self.candidates.append(made_by)
        solid = substance is not None and substance.incompressible
        melting = melting_state(self.record, state, body, substance, phase)
        clues = [one for one in clues if melting is not None or one.name != FRACTION]
        barred = self._barred(state, body, phase)
        return StatePlan(state, body, model, tuple(clues), phase, barred, solid, melting)

    def _shared_clues(self, state: str, body: str) -> Iterator[Clue]:
        """Yield what a closing finds, and what bodies in equilibrium take from each other."""
        for name in SYMBOLS:
            yield Clue(name, clue(state_key(state, body, name), "closing"), stated=True)
        for ctx in self.contexts:
            if state not in (ctx.process.from_state, ctx.process.to_state):
                continue
            for name in ctx.together(state):
                for other in sorted(self.record.bodies):
                    if (
                        other != body
                        and (state, other) in self.record.body_states
                        and self._tells(other, name)
                    ):
                        yield Clue(name, state_key(state, other, name))

    def _tells(self, body: str, name: str) -> bool:
        """Say whether others can take a property from a body: an incompressible one has no pressure of its own."""
        found = self.substances.get(body)
        return name != "pressure" or (found is not None and not found.incompressible)

    def _volume_clue(self, state: str, body: str) -> Iterator[Clue]:
        """Yield v = V/m from the body's own volume and mass, in the state in which that volume applies."""
        if state != self._first_state(body) or body_key(body, "mass") not in self.leaves.given | self._masses(
            body
        ):
            return
        made = clue(state_key(state, body, "specific_volume"), "volume")
        self.candidates.append(
            Step(
                f"Specific volume of {body}, {state}",
                (made,),
                (given(body_key(body, "volume")), body_key(body, "mass")),
                lambda v, m: (v / m,),
                "v = V/m",
                "{0}/{1}",
            )
        )
        yield Clue("specific_volume", made, stated=True)

    def _masses(self, body: str) -> set[str]:
        """Return the mass key where an amount gives the mass."""
        return {body_key(body, "mass")} if body_key(body, "amount") in self.leaves.given else set()

    def _barred(self, state: str, body: str, phase: Phase | None) -> frozenset[tuple[str, str]]:
        """Bar T with p where their stated digits reach across the saturation line and no phase tells."""
        substance = self.substances.get(body)
        t, p = (
            next(iter(self.record.stated(state_key(state, body, name), Role.INPUT)), None)
            for name in ("temperature", "pressure")
        )
        if substance is None or phase is not None or t is None or p is None:
            return frozenset()
        if substance.crosses_saturation(t.value, t.quantity.half_width, p.value, p.quantity.half_width):
            return frozenset({("temperature", "pressure")})
        return frozenset()

    def _searches(self, state: StatePlan, known: set[str]) -> Iterable[Step]:
        for near in self.neighbours.get((state.state, state.body), ()):
            if near.known("temperature") in known:
                yield from curve_steps(near, state, known)

    def _assumed(self, known: set[str]) -> Iterator[Step]:
        for ctx in self.contexts:
            yield from assumed_candidates(ctx, known)
        if is_per_mass(self.record):
            yield from (unit_mass_step(body) for body in self.record.bodies)

    def _wanted(self, same: SameQuantity, made: Mapping[str, Step]) -> set[str]:
        """Return the keys that a review needs: all results and limits, surplus inputs, states, main balances.

        An input is surplus where its quantity also follows without it.
        """
        wanted = {same.key(s.pointer) for s in self.record.statements if s.role is Role.RESULT}
        inputs = {same.key(s.pointer) for s in self.record.statements if s.role is Role.INPUT} - wanted
        wanted.update(key for key in inputs if key in made and given(key) not in above(key, made))
        wanted.update(same.key(limit.quantity) for limit in self.record.limits)
        for ctx in self.contexts:
            wanted.update(ctx.key(name) for name in balances.MAIN)
        wanted.update(state_key(s, b, "temperature") for s, b in self._body_states())
        wanted.update(body_key(body, "mass") for body in self.record.bodies)
        return wanted

    def _shares(self) -> Iterator[str]:
        """Yield what is good to know of each of several bodies, and is not asked for where it cannot be told."""
        for ctx in self.contexts:
            if len(ctx.bodies) > 1:
                yield from (ctx.share(body, name) for body in ctx.bodies for name in SHARES)
                yield from (key for item in ctx.internal_heats for key in internal_keys(ctx, item))

    def _missing(self, known: set[str], same: SameQuantity) -> dict[str, str]:
        """Return what is missing for every stated quantity and every balance that could not be planned."""
        makers: dict[str, list[Step]] = defaultdict(list)
        for step in self.candidates:
            for output in step.outputs:
                makers[output].append(step)
        unknown = sorted(self._wanted(same, {}) - known)
        return explain(unknown, known, makers, self._say)

    def _say(self, key: str) -> str:
        """Say in words what is missing where no formula leads further."""
        pointer = plain(key)
        if pointer in self.leaves.unusable:
            return f"{_words(pointer)}: {self.leaves.unusable[pointer]}"
        parts = pointer.split("/")
        if parts[0] == "states" and len(parts) > 3 and parts[3] in (*SYMBOLS, "density"):
            return self._say_state(parts[1], parts[2])
        return f"{_words(pointer)} is not stated"

    def _say_state(self, state: str, body: str) -> str:
        base = f"{body} in state {state}"
        if body not in self.substances:
            return f"{base}: {self._say_model(body)}"
        have = [SYMBOLS[n] for n in SYMBOLS if state_key(state, body, n) in self.leaves.given]
        blocked = [
            self.leaves.unusable[k]
            for n in CALORIC
            if (k := state_key(state, body, n)) in self.leaves.unusable
        ]
        phase = self._phase_of(state, body)
        melting = melting_state(self.record, state, body, self.substances[body], phase)
        if melting is not None and not melting.stated_tells:
            return f"{base}: T as stated is its melting temperature and {UNTOLD}; melted fraction, phase or u would"
        if self._barred(state, body, phase):
            return f"{base}: T and p as stated reach across the saturation line; quality, phase, v or u would tell"
        if len(self.record.bodies) > 1 and (state, body) in self.short:
            return f"{base} is not determined: {self.short[state, body]}"
        only = f"only {', '.join(have)} given" if have else "no property given"
        return "; ".join([f"{base} is not determined ({only}, and no path or balance fixes it)", *blocked])

    def _phase_of(self, state: str, body: str) -> Phase | None:
        found = self.record.body_states.get((state, body))
        return Phase(found.phase) if found and found.phase and found.phase_role is Role.INPUT else None

    def _say_model(self, body: str) -> str:
        from checker.outcomes import NotEvaluable

        try:
            model = self.models[body]
            model.substance((*model.nominal, 1.0, 1.0))
        except NotEvaluable as outcome:
            return outcome.reason
        return "its model cannot be used"


def _words(pointer: str) -> str:
    """Return a pointer as words: ``heat transfer sunlit-wall of warming: boundary temperature``."""
    parts = pointer.split("/")
    term = term_for(pointer)
    name = (term.name if term else parts[-1]).replace("_", " ")
    if parts[0] == "surroundings":
        return f"{name} of the surroundings"
    return f"{name} of {'/'.join(parts[1:-1])}" if len(parts) > 2 else name
