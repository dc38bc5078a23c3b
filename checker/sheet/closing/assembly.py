"""From the open states of a record to systems of equations: what is unknown, what holds, what that determines."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Callable, Iterable, Iterator, Mapping, Sequence
from dataclasses import dataclass
from typing import Final

from checker.sheet.closing import balances, relations
from checker.sheet.closing.block import block_step
from checker.sheet.closing.charts import PRESSURE, TEMPERATURE, Chart, chart_of, usable_clues
from checker.sheet.closing.structure import blocks, match, undetermined
from checker.sheet.closing.system import System, Unknown
from checker.sheet.closing.world import PROPERTIES, Equation, Spot
from checker.sheet.context import ProcessContext
from checker.sheet.keys import body_key, state_key
from checker.sheet.states import Clue, StatePlan
from checker.sheet.step import Step
from checker.sheet.stops import stop_steps
from checker.submission import Record
from checker.substances.interface import Substance

MOST_UNKNOWNS: Final = 200
"""So many unknowns are closed at most in one record."""


@dataclass(frozen=True, slots=True)
class Scene:
    """What does not change while a record is planned."""

    record: Record
    contexts: tuple[ProcessContext, ...]
    substances: Mapping[str, Substance]
    first_state: Callable[[str], str | None]

    def has_pressure(self, body: str) -> bool:
        """Say whether a body's pressure tells something of its state: that of an incompressible body does not."""
        return body in self.substances and not self.substances[body].incompressible


def closing_steps(scene: Scene, open_states: Sequence[StatePlan], known: set[str]) -> Iterator[Step]:
    """Yield the steps that close what several states have in common, in the order in which they can be solved."""
    for sequence in scene.record.sequences:
        yield from stop_steps(sequence, scene.contexts, open_states, known)
    problem = assemble(scene, open_states, known)
    if problem is None or len(problem.unknowns) > MOST_UNKNOWNS:
        return
    for block in blocks(problem.incidence, len(problem.unknowns)):
        equations = tuple(problem.equations[i] for i in block.equations)
        unknowns = tuple(problem.unknowns[i] for i in block.unknowns)
        if problem.can_stand_alone(equations, block.unknowns):
            yield block_step(problem.system(unknowns, equations))


def shortage(scene: Scene, open_states: Sequence[StatePlan], known: set[str]) -> dict[Spot, str]:
    """Return for each state that stays open how many unknowns and equations there are, in words."""
    problem = assemble(scene, open_states, known)
    if problem is None:
        return {}
    count = len(problem.unknowns)
    if count > MOST_UNKNOWNS:
        reason = f"{count} unknowns are more than the {MOST_UNKNOWNS} that are closed together"
        return {spot: reason for unknown in problem.unknowns for spot in unknown.spots}
    found: dict[Spot, str] = {}
    loose = undetermined(problem.incidence, match(problem.incidence, count))
    for group in problem.groups(loose):
        held = [
            e for e, touched in zip(problem.equations, problem.incidence, strict=True) if group & set(touched)
        ]
        words = ", ".join(problem.unknowns[i].words for i in sorted(group))
        names = ", ".join(dict.fromkeys(e.name for e in held)) or "none"
        reason = (
            f"{_counted(len(group), 'unknown')} ({words}) and {_counted(len(held), 'equation')} ({names}): "
            f"{_counted(len(group) - len(held), 'more input')} needed"
        )
        for spot in (spot for i in group for spot in problem.unknowns[i].spots):
            found.setdefault(spot, reason)
    return found


def _counted(number: int, word: str) -> str:
    return f"{max(number, 1)} {word}{'' if number < 2 else 's'}"


@dataclass(frozen=True, slots=True)
class Problem:
    """Unknowns and equations of a record, and which unknowns each equation touches."""

    unknowns: tuple[Unknown, ...]
    equations: tuple[Equation, ...]
    incidence: tuple[tuple[int, ...], ...]
    charts: Mapping[Spot, Chart]
    leaders: Mapping[Spot, Spot]
    near: Mapping[Spot, Spot]
    at: Mapping[tuple[Spot, str], int]
    known: frozenset[str]

    def can_stand_alone(self, equations: Sequence[Equation], unknowns: Sequence[int]) -> bool:
        """Say whether a block's equations touch none of the other unknowns."""
        touched = {
            i for e, t in zip(self.equations, self.incidence, strict=True) if e in equations for i in t
        }
        return touched <= set(unknowns)

    def system(self, unknowns: tuple[Unknown, ...], equations: tuple[Equation, ...]) -> System:
        """Return a block with the charts that it needs."""
        spots = {spot for unknown in unknowns for spot in unknown.spots}
        spots |= {
            spot for e in equations for spot in e.uses if spot in self.charts and self._within(spot, spots)
        }
        spots |= {self.leaders[spot] for spot in tuple(spots) if spot in self.leaders}
        charts = {spot: self.charts[spot] for spot in sorted(spots)}
        held = {(spot, c.fixed.name): c.fixed.key for spot, c in self.charts.items() if c.fixed is not None}
        return System(unknowns, equations, charts, self.leaders, self.near, self.known, held)

    def _within(self, spot: Spot, spots: set[Spot]) -> bool:
        """Say whether a state's coordinates are among those sought, itself or through its leader."""
        return spot in spots or self.leaders.get(spot) in spots

    def groups(self, loose: set[int]) -> Iterator[set[int]]:
        """Yield the undetermined unknowns in groups that share equations."""
        left = set(loose)
        while left:
            group, waiting = set[int](), [min(left)]
            while waiting:
                unknown = waiting.pop()
                if unknown not in group:
                    group.add(unknown)
                    waiting.extend(
                        i for touched in self.incidence if unknown in touched for i in touched if i in loose
                    )
            left -= group
            yield group


def assemble(scene: Scene, open_states: Sequence[StatePlan], known: set[str]) -> Problem | None:
    """Return the unknowns and equations of a record at a point of its planning; None where nothing is unknown."""
    processes = {ctx.process.id for ctx in scene.contexts}
    clues = {(s.state, s.body): usable_clues(s, known, processes) for s in open_states}
    charts: dict[Spot, Chart] = {}
    for plan in open_states:
        substance = scene.substances.get(plan.body)
        chart = substance and chart_of(plan, substance, clues[plan.state, plan.body])
        if chart:
            charts[chart.spot] = chart
    if not charts:
        return None
    groups = dict(_equilibria(scene))
    warmed = [group for title, group in groups.items() if title.endswith(f" {TEMPERATURE}")]
    leaders, shared = _temperatures(charts, warmed)
    unknowns, at = _unknowns(charts, leaders, shared, known)
    equations = [
        e
        for e in _distinct(_equations(scene, charts, clues, groups, known))
        if _is_usable(e, charts, known, at)
    ]
    incidence = [tuple(sorted(_touched(e, charts, leaders, at))) for e in equations]
    kept = [
        (e, touched)
        for e, touched in zip(equations, incidence, strict=True)
        if touched and not _is_identity(e, leaders, at)
    ]
    return Problem(
        unknowns,
        tuple(e for e, _ in kept),
        tuple(touched for _, touched in kept),
        charts,
        leaders,
        dict(_near(scene, charts, known)),
        at,
        frozenset(known),
    )


def _equilibria(scene: Scene) -> Iterator[tuple[str, tuple[str, tuple[str, ...]]]]:
    """Yield ``state property`` → the state and the bodies that share the property there."""
    seen: set[str] = set()
    for ctx in scene.contexts:
        for state in (ctx.process.from_state, ctx.process.to_state):
            for name in ctx.together(state):
                title = f"{state} {name}"
                bodies = tuple(
                    b
                    for b in sorted(scene.record.bodies)
                    if (state, b) in scene.record.body_states and (name != PRESSURE or scene.has_pressure(b))
                )
                if title not in seen and len(bodies) > 1:
                    seen.add(title)
                    yield title, (state, bodies)


def _temperatures(
    charts: Mapping[Spot, Chart], groups: Iterable[tuple[str, tuple[str, ...]]]
) -> tuple[dict[Spot, Spot], dict[Spot, Spot]]:
    """Return who takes its temperature from whom, and who shares the unknown of whom, by equal temperatures.

    A state whose coordinates do not include its temperature (a fluid that may boil, a body that may melt) leads:
    the others take theirs from it. Where there is none, they share one unknown.
    """
    leaders: dict[Spot, Spot] = {}
    shared: dict[Spot, Spot] = {}
    for state, bodies in groups:
        spots = [(state, body) for body in bodies if (state, body) in charts]
        warm = [spot for spot in spots if TEMPERATURE in charts[spot].free]
        others = [spot for spot in spots if _sets_temperature(charts[spot])]
        if others:
            leaders.update((spot, others[0]) for spot in warm)
        else:
            shared.update((spot, warm[0]) for spot in warm)
    return leaders, shared


def _sets_temperature(chart: Chart) -> bool:
    fixed = chart.fixed.name if chart.fixed else ""
    return TEMPERATURE not in chart.free and fixed != TEMPERATURE


def _unknowns(
    charts: Mapping[Spot, Chart],
    leaders: Mapping[Spot, Spot],
    shared: Mapping[Spot, Spot],
    known: set[str],
) -> tuple[tuple[Unknown, ...], dict[tuple[Spot, str], int]]:
    """Return the unknowns and where each coordinate (or mass, under an empty state) stands among them."""
    members: dict[tuple[Spot, str], list[Spot]] = defaultdict(list)
    for spot, chart in charts.items():
        for name in chart.free:
            if name == TEMPERATURE and spot in leaders:
                continue
            members[shared.get(spot, spot) if name == TEMPERATURE else spot, name].append(spot)
    unknowns = [Unknown(name, tuple(spots)) for (_, name), spots in members.items()]
    at = {(spot, u.name): i for i, u in enumerate(unknowns) for spot in u.spots}
    for body in sorted({body for _, body in charts}):
        if body_key(body, "mass") not in known:
            at[("", body), "mass"] = len(unknowns)
            unknowns.append(Unknown("mass", (), body))
    return tuple(unknowns), at


def _equations(
    scene: Scene,
    charts: Mapping[Spot, Chart],
    clues: Mapping[Spot, Mapping[str, Clue]],
    groups: Mapping[str, tuple[str, tuple[str, ...]]],
    known: set[str],
) -> Iterator[Equation]:
    """Yield everything that holds, the surest first."""
    for spot, chart in charts.items():
        held = chart.fixed.name if chart.fixed else ""
        for name, one in clues[spot].items():
            if name != held:
                yield relations.clue_equation(spot, one)
    for ctx in scene.contexts:
        yield from relations.path_equations(ctx, known)
    yield from relations.equilibrium_equations(groups)
    for ctx in scene.contexts:
        yield from relations.volume_equations(ctx)
    yield from relations.mass_equations(scene.record, known, scene.first_state)
    for ctx in scene.contexts:
        yield from _balances(ctx, known)
    yield from balances.sequence_balances(scene.record, scene.contexts, known)


def _distinct(equations: Iterable[Equation]) -> Iterator[Equation]:
    """Yield the equations without equalities that were yielded before, as where two paths lead through two states."""
    seen: set[tuple[frozenset[Spot], frozenset[str]]] = set()
    for e in equations:
        if e.equal:
            same = (e.equal, frozenset(name for names in e.uses.values() for name in names))
            if same in seen:
                continue
            seen.add(same)
        yield e


def _balances(ctx: ProcessContext, known: set[str]) -> Iterator[Equation]:
    """Yield the balances of a process; the total restates those of all its bodies."""
    own = tuple(balances.body_balances(ctx, known))
    yield from own
    whole = balances.process_balance(ctx, known)
    if whole is not None and (len(ctx.bodies) == 1 or len(own) < len(ctx.bodies)):
        yield whole
    work = balances.work_equation(ctx, known)
    if work is not None:
        yield work


def _is_usable(
    e: Equation, charts: Mapping[Spot, Chart], known: set[str], at: Mapping[tuple[Spot, str], int]
) -> bool:
    """Say whether everything in an equation is known or among the unknowns."""
    states = all(spot in charts or state_key(*spot, PROPERTIES[0]) in known for spot in e.uses)
    masses = all(body_key(b, "mass") in known or (("", b), "mass") in at for b in e.masses)
    return states and masses and known.issuperset(e.parents)


def _touched(
    e: Equation,
    charts: Mapping[Spot, Chart],
    leaders: Mapping[Spot, Spot],
    at: Mapping[tuple[Spot, str], int],
) -> set[int]:
    """Return the unknowns that an equation touches."""
    found: set[int] = {at[("", body), "mass"] for body in e.masses if (("", body), "mass") in at}
    for spot, names in e.uses.items():
        chart = charts.get(spot)
        if chart is None:
            continue
        fixed = chart.fixed.name if chart.fixed else ""
        for name in names - {fixed}:
            for coordinate in (name,) if name in chart.free else chart.free:
                found.update(_behind(spot, coordinate, charts, leaders, at))
    return found


def _behind(
    spot: Spot,
    coordinate: str,
    charts: Mapping[Spot, Chart],
    leaders: Mapping[Spot, Spot],
    at: Mapping[tuple[Spot, str], int],
) -> Iterator[int]:
    """Yield the unknowns behind a coordinate: itself, or those of the state that it takes its temperature from."""
    if coordinate == TEMPERATURE and spot in leaders:
        yield from (at[leaders[spot], name] for name in charts[leaders[spot]].free)
    else:
        yield at[spot, coordinate]


def _is_identity(e: Equation, leaders: Mapping[Spot, Spot], at: Mapping[tuple[Spot, str], int]) -> bool:
    """Say whether an equality of temperatures is built into the unknowns already."""
    if frozenset({TEMPERATURE}) not in e.uses.values() or len(e.equal) < 2:
        return False
    one, other = e.equal
    if at.get((one, TEMPERATURE), -1) == at.get((other, TEMPERATURE), -2):
        return True
    return leaders.get(one, one) == leaders.get(other, other)


def _near(scene: Scene, charts: Mapping[Spot, Chart], known: set[str]) -> Iterator[tuple[Spot, Spot]]:
    """Yield for each unknown state a known one of the same body: a neighbour through a process, else any."""
    for state, body in charts:
        found = [
            s for s, b in scene.record.body_states if b == body and state_key(s, b, TEMPERATURE) in known
        ]
        ends = [{c.process.from_state, c.process.to_state} for c in scene.contexts]
        best = next((s for s in found if {s, state} in ends), found[0] if found else None)
        if best is not None:
            yield (state, body), (best, body)
