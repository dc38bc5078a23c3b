"""Energy and entropy that pass between several bodies of a process, for flow diagrams; recomputed values alone.

What a listed transfer brings to a body goes there. What remains of a body's change passes through the meeting of the
bodies; where only one gives there or only one takes, it goes straight from one to the other.
"""

from __future__ import annotations

import math
from collections.abc import Iterable, Iterator
from dataclasses import dataclass, field
from typing import Final

from checker.case import Case
from checker.figures import Flow, FlowBox, FlowDiagram
from checker.ledger_unit import LedgerUnit, ledger_unit
from checker.sheet.context import ProcessContext

MOST_BODIES: Final = 6
"""More cannot be drawn on a page."""
MOST_FLOWS: Final = 16
CLOSED: Final = 1e-6
"""Part of the largest flow up to which what comes and what goes are the same."""
GENERATION: Final = "generation"
MEETING: Final = "meeting"


class UnknownFlowError(Exception):
    """A flow has no value."""


@dataclass(slots=True)
class _Drawing:
    """A flow diagram while it is made. ``pool`` holds what boxes give to the meeting, negative where they take."""

    case: Case
    ctx: ProcessContext
    unit: LedgerUnit
    boxes: dict[str, FlowBox] = field(default_factory=dict)
    flows: list[Flow] = field(default_factory=list)
    pool: dict[str, dict[str, float]] = field(default_factory=dict)

    @property
    def base(self) -> str:
        """Pointer of the process."""
        return f"processes/{self.ctx.process.id}"

    def number(self, pointer: str) -> float:
        """Return a recomputed value in the unit of the diagram."""
        value = self.case.value(pointer)
        if value is None:
            raise UnknownFlowError
        return self.unit.number(value)

    def optional(self, pointer: str) -> float | None:
        """Return a recomputed value, or None."""
        value = self.case.value(pointer)
        return None if value is None else self.unit.number(value)

    def outside(self, name: str, label: str) -> str:
        """Make a box outside the system, and return its name."""
        self.boxes.setdefault(name, FlowBox(name, label, "outside"))
        return name

    def arrow(
        self, source: str, target: str, label: str, kind: str, amount: float, there: float | None = None
    ) -> None:
        """Add an arrow; a negative amount turns it round. ``there`` is what is at the other end, at the target."""
        at_target = amount if there is None else there
        if amount < 0.0:
            source, target, amount, at_target = target, source, -at_target, -amount
        if amount > 0.0 or at_target > 0.0:
            self.flows.append(Flow(source, target, label, kind, amount, at_target))

    def meet(self, kind: str, box: str, gives: float) -> None:
        """Let a box give to the meeting."""
        self.pool.setdefault(kind, {})[box] = gives

    def finished(self, kind: str) -> FlowDiagram | None:
        """Return the diagram, or None where nothing flows or more than can be drawn."""
        for flow_kind, gives in self.pool.items():
            self._settle(flow_kind, gives)
        used = {name for flow in self.flows for name in (flow.source, flow.target)}
        boxes = tuple(box for box in self.boxes.values() if box.kind == "body" or box.name in used)
        if not self.flows or len(self.flows) > MOST_FLOWS:
            return None
        return FlowDiagram(self.ctx.process.id, kind, self.unit.unit, boxes, tuple(self.flows))

    def _settle(self, kind: str, gives: dict[str, float]) -> None:
        """Turn what meets into arrows."""
        least = CLOSED * max(map(abs, self._amounts()), default=0.0)
        if abs(math.fsum(gives.values())) > least:
            raise UnknownFlowError
        givers = {name: value for name, value in gives.items() if value > least}
        takers = {name: -value for name, value in gives.items() if value < -least}
        generated = givers.get(GENERATION, 0.0)
        bodies = [name for name in givers if name != GENERATION]
        if generated and len(bodies) == 1 and len(takers) == 1:
            taker = next(iter(takers))
            self.arrow(bodies[0], taker, kind, kind, givers[bodies[0]], takers[taker])
        elif (len(givers) == 1 or len(takers) == 1) and not self._mixes(kind, givers, takers):
            for giver, given in givers.items():
                for taker, taken in takers.items():
                    self.arrow(giver, taker, kind, kind, min(given, taken))
        else:
            self._through_meeting(kind, givers, takers)

    def _amounts(self) -> Iterator[float]:
        """Yield all that the diagram shows."""
        yield from (box.change or 0.0 for box in self.boxes.values())
        yield from (flow.arrives for flow in self.flows)
        yield from (value for gives in self.pool.values() for value in gives.values())

    def _mixes(self, kind: str, givers: Iterable[str], takers: Iterable[str]) -> bool:
        """Say whether entropy of several bodies meets on ways that only the heat between them tells."""
        giving, taking = (
            [name for name in names if self.boxes[name].kind == "body"] for names in (givers, takers)
        )
        return kind == "entropy" and bool(giving and taking) and len(giving) + len(taking) > 2

    def _through_meeting(self, kind: str, givers: dict[str, float], takers: dict[str, float]) -> None:
        name = f"{MEETING} {kind}"
        self.boxes[name] = FlowBox(name, "between the bodies", MEETING)
        for giver, given in givers.items():
            self.arrow(giver, name, kind, kind, given)
        for taker, taken in takers.items():
            self.arrow(name, taker, kind, kind, taken)


def flows(case: Case) -> Iterator[FlowDiagram]:
    """Yield the energy and the entropy flow diagram of every process of several bodies whose flows are known."""
    for ctx in case.plan.contexts:
        if not 1 < len(ctx.bodies) <= MOST_BODIES:
            continue
        for make in (_energy, _entropy):
            try:
                diagram = make(case, ctx)
            except UnknownFlowError:
                continue
            if diagram is not None:
                yield diagram


def _drawing(case: Case, ctx: ProcessContext, total: str, others: Iterable[str]) -> _Drawing:
    base = f"processes/{ctx.process.id}"
    own = [f"{base}/{total}", *(f"{base}/{other}" for other in others)]
    shares = [f"{base}/bodies/{body}/{total}" for body in ctx.bodies]
    return _Drawing(case, ctx, ledger_unit(case, [*own, *shares]))


def _energy(case: Case, ctx: ProcessContext) -> FlowDiagram | None:
    drawing = _drawing(case, ctx, "internal_energy_change", ("heat", "work", "boundary_work"))
    rest = {body: _energy_change(drawing, body) for body in ctx.bodies}
    for body, change in rest.items():
        drawing.boxes[body] = FlowBox(body, body, "body", change)
    heats = _named_heats(drawing, rest)
    works = _named_works(drawing, rest)
    shares = {body: _split(drawing, body, heats[body], works[body]) for body in ctx.bodies}
    for body in ctx.bodies:
        split = shares[body]
        if split is None or None in shares.values():
            drawing.meet("energy", body, -rest[body])
        else:
            drawing.meet("heat", body, -split[0])
            drawing.meet("work", body, -split[1])
    _unnamed_energy(drawing, together=None in shares.values())
    return drawing.finished("energy")


def _energy_change(drawing: _Drawing, body: str) -> float:
    base = f"{drawing.base}/bodies/{body}"
    whole = drawing.optional(f"{base}/energy_change")
    if whole is not None:
        return whole
    motion = (drawing.optional(f"{base}/{name}_energy_change") or 0.0 for name in ("kinetic", "potential"))
    return drawing.number(f"{base}/internal_energy_change") + sum(motion)


def _named_heats(drawing: _Drawing, rest: dict[str, float]) -> dict[str, float]:
    """Draw the heat transfers that name their bodies, take them out of the rest, and return their sums."""
    taken = dict.fromkeys(rest, 0.0)
    for item in drawing.ctx.process.heat_transfers or ():
        pointer = f"{drawing.base}/heat_transfers/{item.id}/energy"
        if item.from_body in rest and item.to_body in rest:
            amount = drawing.number(pointer)
            drawing.arrow(str(item.from_body), str(item.to_body), item.id, "heat", amount)
            signed = ((str(item.from_body), -amount), (str(item.to_body), amount))
        elif item.body in rest:
            amount = drawing.number(pointer)
            drawing.arrow(drawing.outside(f"heat {item.id}", item.id), str(item.body), "heat", "heat", amount)
            signed = ((str(item.body), amount), (str(item.body), 0.0))
        else:
            continue
        for body, value in signed:
            taken[body] += value
            rest[body] -= value
    return taken


def _named_works(drawing: _Drawing, rest: dict[str, float]) -> dict[str, float]:
    """Draw the works that name their body and those of boundaries to the outside, out of the rest; into the body."""
    taken = dict.fromkeys(rest, 0.0)
    for item in drawing.ctx.process.work_transfers or ():
        if item.kind == "boundary" or item.body not in rest:
            continue
        amount = -drawing.number(f"{drawing.base}/work_transfers/{item.id}/energy")
        drawing.arrow(
            drawing.outside(f"work {item.id}", item.id), str(item.body), f"{item.kind} work", "work", amount
        )
        taken[str(item.body)] += amount
    for body in rest:
        if body not in drawing.ctx.process.total_volume:
            amount = -drawing.number(f"{drawing.base}/bodies/{body}/boundary_work")
            box = drawing.outside(f"boundary {body}", f"boundary of {body}")
            drawing.arrow(box, body, "boundary work", "work", amount)
            taken[body] += amount
    for body, amount in taken.items():
        rest[body] -= amount
    return taken


def _split(drawing: _Drawing, body: str, heats: float, works: float) -> tuple[float, float] | None:
    """Return what is left of a body's heat and of its work (into it), or None where they cannot be told apart."""
    base = f"{drawing.base}/bodies/{body}"
    heat, work = drawing.optional(f"{base}/heat"), drawing.optional(f"{base}/work")
    return None if heat is None or work is None else (heat - heats, -work - works)


def _unnamed_energy(drawing: _Drawing, together: bool) -> None:
    """Let heat and work that name no body come to the meeting."""
    ctx = drawing.ctx
    items = ctx.external_heats or ()
    for item in items:
        if item.body is None:
            amount = drawing.number(f"{drawing.base}/heat_transfers/{item.id}/energy")
            box = drawing.outside(f"heat {item.id}", item.id)
            drawing.meet("energy" if together else "heat", box, amount)
    if not items and (amount := drawing.number(f"{drawing.base}/heat")):
        drawing.meet("energy" if together else "heat", drawing.outside("heat", "heat"), amount)
    listed = {item.kind for item in ctx.process.work_transfers or () if item.body is not None}
    for name in ctx.other_work_kinds:
        amount = drawing.optional(f"{drawing.base}/{name}") or 0.0
        if name.removesuffix("_work") not in listed and amount:
            box = drawing.outside(name, name.replace("_", " "))
            drawing.meet("energy" if together else "work", box, -amount)


def _entropy(case: Case, ctx: ProcessContext) -> FlowDiagram | None:
    drawing = _drawing(case, ctx, "entropy_change", ("entropy_generation", "entropy_transfer"))
    base = drawing.base
    rest = {body: drawing.number(f"{base}/bodies/{body}/entropy_change") for body in ctx.bodies}
    for body, change in rest.items():
        drawing.boxes[body] = FlowBox(body, body, "body", change)
    items = ctx.external_heats or ()
    for item in items:
        alone = len(items) == 1
        of_item = f"{base}/heat_transfers/{item.id}/item_entropy"
        amount = drawing.number(f"{base}/entropy_transfer" if alone else of_item)
        box = drawing.outside(f"heat {item.id}", item.id)
        if item.body in rest:
            drawing.arrow(box, str(item.body), "with heat", "entropy", amount)
            rest[str(item.body)] -= amount
        else:
            drawing.meet("entropy", box, amount)
    if not items and (amount := drawing.number(f"{base}/entropy_transfer")):
        drawing.meet("entropy", drawing.outside("heat", "heat"), amount)
    for body, remains in rest.items():
        drawing.meet("entropy", body, -remains)
    generated = drawing.number(f"{base}/entropy_generation")
    drawing.boxes[GENERATION] = FlowBox(
        GENERATION, "generated" if generated >= 0.0 else "destroyed", GENERATION
    )
    drawing.meet("entropy", GENERATION, generated)
    return drawing.finished("entropy")
