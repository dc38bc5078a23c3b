"""Whether time, powers and losses of a process follow from one another, and which of them is the unknown."""

from __future__ import annotations

from dataclasses import dataclass
from enum import Enum
from typing import TYPE_CHECKING

from checker.sheet.keys import given

if TYPE_CHECKING:
    from checker.sheet.context import ProcessContext

COEFFICIENT = "heat_loss_coefficient"
FOLLOWED = ("constant volume", "constant pressure")
"""Paths along which the energy alone tells the temperature. An incompressible body needs none."""


class Unknown(Enum):
    """What the exchange of heat over time tells."""

    DURATION = "duration"
    END = "end state"
    POWER = "power"
    POWER_OF_ENERGY = "power of a given energy"


@dataclass(frozen=True, slots=True)
class Source:
    """A transfer beside the losses: the key of its energy, and the sign that makes it positive into the body.

    ``power`` and ``energy`` are keys of what is given of it, ``base`` is its pointer; empty where there is none.
    """

    key: str
    sign: float
    power: str = ""
    energy: str = ""
    base: str = ""


@dataclass(frozen=True, slots=True)
class LossPlan:
    """A body that exchanges heat by UA·ΔT while powers are constant.

    ``losses`` are the identifiers of the transfers with a coefficient; ``sources`` are all the others, of which
    ``sought`` has no power yet.
    """

    body: str
    at_pressure: bool
    losses: tuple[str, ...]
    sources: tuple[Source, ...]
    unknown: Unknown
    sought: Source | None = None


def loss_plan(ctx: ProcessContext) -> LossPlan | None:
    """Return how losses follow over time, or None where they do not.

    They do for one body on a path that its energy alone describes, where every other transfer has a constant power,
    or all but one have and both end states are known.
    """
    losses = tuple(
        i.id
        for i in ctx.process.heat_transfers or ()
        if ctx.loses_by_coefficient(ctx.item_base("heat", i.id))
    )
    if not losses or len(ctx.bodies) != 1 or "friction_work" in ctx.other_work_kinds:
        return None
    if ctx.no_heat or _is_moved(ctx) or _has_parts(ctx):
        return None
    body = ctx.bodies[0]
    kinds = {path.kind for path in ctx.paths_of(body)}
    solid = ctx.boundary_work_is_zero(body)
    if not solid and kinds.isdisjoint(FOLLOWED):
        return None
    sources = _sources(ctx, losses)
    timed = ctx.is_given(ctx.key("duration"))
    open_sources = _open(sources, timed)
    if len(open_sources) > 1:
        return None
    sought = open_sources[0] if open_sources else None
    if sought is None:
        unknown = Unknown.END if timed else Unknown.DURATION
    elif timed or sought.energy:
        unknown = Unknown.POWER if timed else Unknown.POWER_OF_ENERGY
    else:
        return None
    return LossPlan(body, not solid and "constant pressure" in kinds, losses, sources, unknown, sought)


def _has_parts(ctx: ProcessContext) -> bool:
    """Say whether a transfer lasts for a part of the process only, so that the powers are not constant."""
    items = [("heat", i.id) for i in ctx.process.heat_transfers or ()]
    items += [("work", i.id) for i in ctx.process.work_transfers or ()]
    return any(ctx.is_given(f"{ctx.item_base(kind, item)}/duration") for kind, item in items)


def _open(sources: tuple[Source, ...], timed: bool) -> tuple[Source, ...]:
    """Return the sources without a power."""
    return tuple(s for s in sources if not s.power and not (timed and s.energy))


def missing_powers(ctx: ProcessContext) -> tuple[str, ...]:
    """Return the keys of the powers for want of which losses tell no time; none where they do."""
    bases = [ctx.item_base("heat", i.id) for i in ctx.process.heat_transfers or ()]
    losses = tuple(base.rsplit("/", 1)[-1] for base in bases if ctx.loses_by_coefficient(base))
    if not losses or ctx.losses is not None:
        return ()
    found = _open(_sources(ctx, losses), ctx.is_given(ctx.key("duration")))
    return tuple(given(f"{source.base}/mean_power") for source in found if source.base)


def _is_moved(ctx: ProcessContext) -> bool:
    """Say whether speed or height is stated, of which the powers could be changing as well."""
    names = ("velocity", "elevation")
    return any(s.pointer.startswith("states/") and s.term.name in names for s in ctx.record.statements)


def _sources(ctx: ProcessContext, losses: tuple[str, ...]) -> tuple[Source, ...]:
    """Return every transfer beside the losses and the boundary work."""
    heats = [
        ("heat", i.id, ctx.heat_item(i.id), 1.0)
        for i in ctx.process.heat_transfers or ()
        if i.id not in losses
    ]
    works = [
        ("work", i.id, ctx.work_item(i.id), -1.0)
        for i in ctx.process.work_transfers or ()
        if i.kind != "boundary"
    ]
    found = []
    whole = ctx.key("mean_power")
    for kind, item, key, sign in (*heats, *works):
        base = ctx.item_base(kind, item)
        alone = kind == "work" and len(heats) + len(works) == 1 and ctx.is_given(whole)
        power = whole if alone else f"{base}/mean_power"
        sign = (
            1.0 if alone else sign
        )  # the mean power of a whole process is a magnitude, of what it is supplied with
        found.append(
            Source(
                key,
                sign,
                given(power) if ctx.is_given(power) else "",
                given(key) if ctx.is_given(key) else "",
                base,
            )
        )
    listed = {source.key for source in found}
    for name in ctx.other_work_kinds:
        key = ctx.key(name)
        if ctx.is_given(key) and key not in listed:
            found.append(Source(key, -1.0, "", given(key)))
    return tuple(found)
