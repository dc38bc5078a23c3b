"""What is structurally known of one process: which quantities are given, stated or unknown, and its paths."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass, field
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.keys import body_key, given, process_key, share_key, state_key
from checker.sheet.loss_plan import LossPlan, loss_plan
from checker.sheet.models import BodyModel
from checker.sheet.paths import PATHS, Path, WorkFormula
from checker.sheet.step import Step
from checker.submission import HeatTransfer, Process, Record
from checker.substances.tabulated import TabulatedCondensed
from checker.vocabulary import WORK_KINDS

ENDS: Final = {
    "p": "pressure",
    "v": "specific_volume",
    "t": "temperature",
    "u": "specific_internal_energy",
    "s": "specific_entropy",
}


def _taking_part(record: Record, process: Process) -> tuple[str, ...]:
    """Return the bodies in both end states of a process."""
    ends = (process.from_state, process.to_state)
    return tuple(b for b in sorted(record.bodies) if all((s, b) in record.body_states for s in ends))


@dataclass(frozen=True, slots=True)
class ProcessContext:
    """One process of a record, with what the record gives and states.

    ``given_keys`` and ``stated_keys`` are calculation keys (aliases resolved) of inputs, and of inputs or
    results; ``bodies`` are those that take part, in a fixed order.
    """

    record: Record
    process: Process
    models: Mapping[str, BodyModel]
    same: Callable[[str], str]
    given_keys: frozenset[str]
    stated_keys: frozenset[str]
    bodies: tuple[str, ...] = field(init=False)

    def __post_init__(self) -> None:
        object.__setattr__(self, "bodies", _taking_part(self.record, self.process))

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
        """Say whether a transfer is given as a mean power over a duration that is given or follows from losses."""
        lasts = self.is_given(f"{base}/duration") or self.is_given(self.key("duration"))
        return (lasts or self.losses is not None) and self.is_given(f"{base}/mean_power")

    def is_supplied(self, kind: str, item: str) -> bool:
        """Say whether the energy of a transfer follows from inputs: energy, power over a time, reservoir or losses."""
        energy = self.heat_item(item) if kind == "heat" else self.work_item(item)
        base = self.item_base(kind, item)
        if self.is_given(energy) or self.has_power(base) or self.has_reservoir_balance(base):
            return True
        return self.loses_by_coefficient(base) and self.losses is not None

    def has_finite_reservoir(self, base: str) -> bool:
        """Say whether the reservoir of a heat transfer cools while it gives heat: its end or capacity is stated."""
        return self.is_stated(f"{base}/final_reservoir_temperature") or self.is_stated(
            f"{base}/reservoir_heat_capacity"
        )

    def has_reservoir_balance(self, base: str) -> bool:
        """Say whether a finite reservoir is given with both temperatures and its heat capacity."""
        names = ("reservoir_temperature", "final_reservoir_temperature", "reservoir_heat_capacity")
        return all(self.is_given(f"{base}/{name}") for name in names)

    def loses_by_coefficient(self, base: str) -> bool:
        """Say whether a heat transfer follows the temperature by UA·ΔT."""
        return self.is_given(f"{base}/heat_loss_coefficient") and not self.has_finite_reservoir(base)

    @property
    def told_twice(self) -> tuple[str, ...]:
        """Return the keys of quantities that are held against another formula where an input gives them."""
        heats = {self.item_base("heat", item.id): item.id for item in self.external_heats or ()}
        finite = [f"{base}/final_reservoir_temperature" for base in heats if self.has_finite_reservoir(base)]
        timed = self.losses is not None
        lost = [
            self.heat_item(item) for base, item in heats.items() if timed and self.loses_by_coefficient(base)
        ]
        return (self.key("boundary_work"), *((self.key("duration"),) if timed else ()), *finite, *lost)

    @property
    def losses(self) -> LossPlan | None:
        """Return how time, powers and losses follow from one another, or None."""
        return loss_plan(self)

    def paths_of(self, body: str) -> tuple[Path, ...]:
        """Return the declared paths of a body."""
        return tuple(PATHS[spec.kind] for spec in self.process.paths.get(body, ()) if spec.kind in PATHS)

    @property
    def external_heats(self) -> tuple[HeatTransfer, ...] | None:
        """Return the heat transfers across the boundary of the whole system; None where nothing is stated of them."""
        items = self.process.heat_transfers
        return None if items is None else tuple(item for item in items if not item.is_internal)

    @property
    def internal_heats(self) -> tuple[HeatTransfer, ...]:
        """Return the heat transfers from one body to another."""
        return tuple(item for item in self.process.heat_transfers or () if item.is_internal)

    @property
    def other_work_kinds(self) -> tuple[str, ...]:
        """Return the names of the totals of work that is not boundary work."""
        rubs = any(item.kind == "friction" for item in self.process.work_transfers or ())
        friction = rubs or self.is_stated(self.key("friction_work"))
        return ("shaft_work", "electrical_work", *(("friction_work",) if friction else ()))

    def together(self, state: str) -> tuple[str, ...]:
        """Return what the bodies share in an end state of this process: ``temperature``, ``pressure``."""
        own = (self.record.state_equilibrium or {}).get(state, ())
        return (*own, *(self.process.equilibrium if state == self.process.to_state else ()))

    @property
    def thermally_linked(self) -> bool:
        """Say whether the bodies are declared to have one temperature at an end, so that heat passes between them."""
        ends = (self.process.from_state, self.process.to_state)
        return len(self.bodies) > 1 and any("temperature" in self.together(state) for state in ends)

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
        return sum(1 for item in self.external_heats or () if not self.is_supplied("heat", item.id))

    @property
    def heat_known_without_balance(self) -> bool:
        """Say whether Q follows from what is given, so that the balance can close another unknown."""
        listed = self.external_heats is not None and self.unknown_heats == 0
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
        named = {self.key(f"{kind}_work") for kind in WORK_KINDS}
        claimed = {key for key in named if self.is_stated(key) and not self.is_given(key)}
        return frozenset(listed | claimed)

    def path_key(self, body: str, name: str) -> str:
        """Return the key of a path parameter of a body, shared or its own."""
        own = self.same(f"processes/{self.process.id}/bodies/{body}/path/{name}")
        return own if own in self.stated_keys else self.same(f"processes/{self.process.id}/path/{name}")

    def boundary_work_step(self, body: str) -> Step | None:
        """Return the step that takes a body's boundary work from its path, or None."""
        output = (self.share(body, "boundary_work"),)
        of = f" of {body}" if len(self.bodies) > 1 else ""
        title = f"Boundary work{of}, {self.process.id}"
        incompressible = self.boundary_work_is_zero(body)
        for path in self.paths_of(body):
            # Without change of volume there is no work, and neither p nor the end state need be known for it.
            held = (
                incompressible
                and path.kind in ("isothermal", "constant pressure")
                and not self._expands(body)
            )
            if path.work is not None and not held:
                return _work_step(self, body, path.work, output, f"{title} ({path.kind})")
        if incompressible:
            return Step(title, output, (), lambda: (0.0,), "W_b = 0 (incompressible)", "0")
        return None

    def boundary_work_is_zero(self, body: str) -> bool:
        """Say whether the model itself excludes boundary work (incompressible)."""
        nominal = self.models[body].at_nominal() if body in self.models else None
        return nominal is not None and nominal.incompressible

    def _expands(self, body: str) -> bool:
        """Say whether the volume of a liquid or solid follows its temperature, by its stated table."""
        nominal = self.models[body].at_nominal() if body in self.models else None
        return isinstance(nominal, TabulatedCondensed) and nominal.columns.volumes is not None

    def is_quasi_static_for(self, body: str) -> bool:
        """Say whether a body passes through equilibrium states only, as far as its path and model tell."""
        return any(path.quasi_static for path in self.paths_of(body)) or self.boundary_work_is_zero(body)

    def power_source(self) -> str | None:
        """Return the one energy to which a mean power of the whole process can refer, or None."""
        timed = self.losses is not None
        heats = [
            item
            for item in self.external_heats or ()
            if not (timed and self.loses_by_coefficient(self.item_base("heat", item.id)))
        ]
        works = [item for item in self.process.work_transfers or () if item.kind in ("shaft", "electrical")]
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
