"""What is structurally known of one process: which quantities are given, stated or unknown, and its paths."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.keys import body_key, given, process_key, share_key, state_key
from checker.sheet.models import BodyModel
from checker.sheet.paths import PATHS, Path, WorkFormula
from checker.sheet.step import Step
from checker.submission import Process, Record

ENDS: Final = {
    "p": "pressure",
    "v": "specific_volume",
    "t": "temperature",
    "u": "specific_internal_energy",
    "s": "specific_entropy",
}


@dataclass(frozen=True, slots=True)
class ProcessContext:
    """One process of a record, with what the record gives and states.

    ``given_keys`` and ``stated_keys`` are calculation keys (aliases resolved) of inputs, and of inputs or
    results.
    """

    record: Record
    process: Process
    models: Mapping[str, BodyModel]
    same: Callable[[str], str]
    given_keys: frozenset[str]
    stated_keys: frozenset[str]

    def key(self, name: str) -> str:
        """Return the key of a total of this process."""
        return self.same(process_key(self.process.id, name))

    def heat_item(self, item: str) -> str:
        """Return the key of the energy of a heat transfer."""
        return self.same(f"processes/{self.process.id}/heat_transfers/{item}/energy")

    def work_item(self, item: str) -> str:
        """Return the key of the energy of a work transfer."""
        return self.same(f"processes/{self.process.id}/work_transfers/{item}/energy")

    def share(self, body: str, name: str) -> str:
        """Return the key of one body's share."""
        return self.same(share_key(self.process.id, body, name))

    def is_given(self, key: str) -> bool:
        """Say whether the originator started from this quantity."""
        return key in self.given_keys

    def is_stated(self, key: str) -> bool:
        """Say whether the originator started from this quantity or claims it."""
        return key in self.stated_keys

    def item_base(self, kind: str, item: str) -> str:
        """Return the pointer of a transfer; ``kind`` is ``heat`` or ``work``."""
        return f"processes/{self.process.id}/{kind}_transfers/{item}"

    def duration_of(self, base: str) -> str:
        """Return the key of a transfer's duration: its own where stated, else that of the process."""
        own = f"{base}/duration"
        return given(own) if self.is_given(own) else self.key("duration")

    def has_power(self, base: str) -> bool:
        """Say whether a transfer is given as a mean power over a given duration."""
        lasts = self.is_given(f"{base}/duration") or self.is_given(self.key("duration"))
        return lasts and self.is_given(f"{base}/mean_power")

    def is_supplied(self, kind: str, item: str) -> bool:
        """Say whether the energy of a transfer follows from inputs, as energy or as power over a time."""
        energy = self.heat_item(item) if kind == "heat" else self.work_item(item)
        return self.is_given(energy) or self.has_power(self.item_base(kind, item))

    @property
    def bodies(self) -> tuple[str, ...]:
        """Bodies that take part: those in both end states, in a fixed order."""
        ends = (self.process.from_state, self.process.to_state)
        return tuple(
            b for b in sorted(self.record.bodies) if all((s, b) in self.record.body_states for s in ends)
        )

    def paths_of(self, body: str) -> tuple[Path, ...]:
        """Return the declared paths of a body."""
        return tuple(PATHS[spec.kind] for spec in self.process.paths.get(body, ()) if spec.kind in PATHS)

    @property
    def no_heat(self) -> str:
        """Return why there is no heat (path kind or insulation), or an empty text."""
        if self.process.insulated:
            return "insulated"
        kinds = [next((p.kind for p in self.paths_of(b) if p.no_heat), "") for b in self.bodies]
        return kinds[0] if kinds and all(kinds) else ""

    @property
    def unknown_heats(self) -> int:
        """Return how many heat transfers are listed without an input."""
        return sum(1 for item in self.process.heat_transfers or () if not self.is_supplied("heat", item.id))

    @property
    def heat_known_without_balance(self) -> bool:
        """Say whether Q follows from what is given, so that the balance can close another unknown."""
        items = self.process.heat_transfers
        listed = items is not None and self.unknown_heats == 0
        return bool(self.no_heat) or listed or self.is_given(self.key("heat"))

    @property
    def unknown_work_kind(self) -> str | None:
        """Return the kind of work that alone is listed without an input, if there is exactly one."""
        kinds = {
            self.key(f"{item.kind}_work")
            for item in self.process.work_transfers or ()
            if not self.is_supplied("work", item.id) and item.kind != "boundary"
        }
        return next(iter(kinds)) if len(kinds) == 1 else None

    @property
    def claimed_work_kinds(self) -> frozenset[str]:
        """Return the totals of those kinds of work that are listed or claimed without an input."""
        items = self.process.work_transfers or ()
        listed = {self.key(f"{i.kind}_work") for i in items if not self.is_supplied("work", i.id)}
        named = {self.key(f"{kind}_work") for kind in ("boundary", "shaft", "electrical")}
        claimed = {key for key in named if self.is_stated(key) and not self.is_given(key)}
        return frozenset(listed | claimed)

    def path_key(self, body: str, name: str) -> str:
        """Return the key of a path parameter of a body, shared or its own."""
        own = self.same(f"processes/{self.process.id}/bodies/{body}/path/{name}")
        return own if own in self.stated_keys else self.same(f"processes/{self.process.id}/path/{name}")

    def boundary_work_step(self) -> Step | None:
        """Return the step that takes the boundary work from the path (one body), or None."""
        if len(self.bodies) != 1:
            return None
        body = self.bodies[0]
        output, title = (self.key("boundary_work"),), f"Boundary work, {self.process.id}"
        for path in self.paths_of(body):
            if path.work is not None:
                return _work_step(self, body, path.work, output, f"{title} ({path.kind})")
        nominal = self.models[body].at_nominal() if body in self.models else None
        if nominal is not None and nominal.incompressible:
            return Step(title, output, (), lambda: (0.0,), "W_b = 0 (incompressible)", "0")
        return None

    def boundary_work_is_zero(self, body: str) -> bool:
        """Say whether the model itself excludes boundary work (incompressible)."""
        nominal = self.models[body].at_nominal() if body in self.models else None
        return nominal is not None and nominal.incompressible

    def power_source(self) -> str | None:
        """Return the one energy to which a mean power of the whole process can refer, or None."""
        heats = self.process.heat_transfers or ()
        works = [item for item in self.process.work_transfers or () if item.kind != "boundary"]
        if works and not heats:
            return self.key("shaft_work" if all(w.kind == "shaft" for w in works) else "electrical_work")
        return self.key("heat") if not works else None


def _work_step(
    ctx: ProcessContext, body: str, work: WorkFormula, output: tuple[str, ...], title: str
) -> Step:
    function = work.function

    def boundary_work(*values: float) -> tuple[float]:
        result = function(*values)
        if not abs(result) < float("inf"):
            raise NotEvaluable("the path has no finite work")
        return (result,)

    parents = tuple(_parent(ctx, body, name) for name in work.needs)
    return Step(title, output, parents, boundary_work, work.formula, work.substitution)


def _parent(ctx: ProcessContext, body: str, name: str) -> str:
    """Return the key behind a name of a work formula: mass, an end's property, or a path parameter."""
    if name == "mass":
        return body_key(body, "mass")
    if len(name) == 2 and name[1] in "12":
        state = ctx.process.from_state if name[1] == "1" else ctx.process.to_state
        return state_key(state, body, ENDS[name[0]])
    if name == "exponent":
        return ctx.path_key(body, name)
    return given(ctx.path_key(body, name))
