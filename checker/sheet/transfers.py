"""Heat and work of a process: what is given, what the path says, and the one unknown that the balance closes.

Candidates are offered in the order in which they should be used; the planner takes the first that it can.
"""

from __future__ import annotations

from collections.abc import Iterator

from checker.sheet.balances import constant, first_less_rest, less_text, same_value, sum_text, total
from checker.sheet.context import ProcessContext
from checker.sheet.keys import given, symbols_of
from checker.sheet.reservoirs import reservoir_energy_step
from checker.sheet.step import Step
from checker.vocabulary import WORK_KINDS

KINDS = {kind: f"{kind}_work" for kind in WORK_KINDS}


def kinds_of(ctx: ProcessContext) -> tuple[str, ...]:
    """Return the kinds of work of a process: friction only where it is stated."""
    return tuple(kind for kind in KINDS if kind == "boundary" or KINDS[kind] in ctx.other_work_kinds)


def heat_candidates(ctx: ProcessContext) -> Iterator[Step]:
    """Yield the ways to the heat: given, none by the path, none listed, sum of items, balance."""
    p, heat = ctx.process.id, ctx.key("heat")
    items = ctx.external_heats
    keys = [ctx.heat_item(item.id) for item in items or ()]
    yield from _given(ctx, heat, f"Heat, {p}", "Q given")
    for item, key in zip(items or (), keys, strict=True):
        if key != heat:
            yield from _given(ctx, key, f"Heat transfer {item.id}, {p}", "Q_k given")
        yield from _from_power(ctx, "heat", item.id, key)
        if (step := reservoir_energy_step(ctx, item.id, key)) is not None:
            yield step
    if ctx.no_heat:
        yield constant(heat, f"Heat, {p}", f"Q = 0 ({ctx.no_heat})")
    if items == ():
        yield constant(heat, f"Heat, {p}", "Q = 0 (no heat transfer listed)")
    if len(keys) > 1:
        yield from _unknown_item(ctx, keys)
        yield Step(f"Heat, {p}", (heat,), tuple(keys), total, "Q = ΣQ_k", sum_text(len(keys)))
    if ctx.unknown_heats <= 1 or len(keys) > 1:
        yield Step(
            f"Heat from the balance, {p}",
            (heat,),
            (ctx.key("energy_change"), ctx.key("work")),
            total,
            "Q = ΔE + W",
            sum_text(2),
        )
    for key in keys:
        if ctx.no_heat and key != heat:
            yield constant(key, f"Heat transfer, {p}", f"Q_k = 0 ({ctx.no_heat})")


def _unknown_item(ctx: ProcessContext, keys: list[str]) -> Iterator[Step]:
    """Yield the one heat transfer that nobody gave, from the balance less the others."""
    supplied = {ctx.heat_item(i.id) for i in ctx.external_heats or () if ctx.is_supplied("heat", i.id)}
    unknown = [key for key in keys if key not in supplied]
    if len(unknown) != 1:
        return
    others = tuple(key for key in keys if key != unknown[0])
    if ctx.is_given(ctx.key("heat")):
        yield Step(
            f"Remaining heat transfer, {ctx.process.id}",
            (unknown[0],),
            (ctx.key("heat"), *others),
            first_less_rest,
            "Q_k = Q − ΣQ_others",
            less_text(1 + len(others)),
        )
        return

    def from_balance(change: float, work: float, *rest: float) -> tuple[float]:
        return (change + work - sum(rest),)

    count = len(others)
    yield Step(
        f"Heat transfer from the balance, {ctx.process.id}",
        (unknown[0],),
        (ctx.key("energy_change"), ctx.key("work"), *others),
        from_balance,
        "Q_k = ΔE + W − ΣQ_others",
        " − ".join(["{0} + {1}", *(f"{{{i + 2}}}" for i in range(count))]),
    )


def _given(ctx: ProcessContext, key: str, title: str, formula: str) -> Iterator[Step]:
    if ctx.is_given(key):
        yield same_value(key, given(key), title, formula)


def _from_power(ctx: ProcessContext, kind: str, item: str, key: str) -> Iterator[Step]:
    """Yield energy = mean power × duration of a transfer that is given as a power."""
    base = ctx.item_base(kind, item)
    if ctx.has_power(base):
        parents = (given(f"{base}/mean_power"), ctx.duration_of(base))
        yield Step(f"Energy of {item}, {ctx.process.id}", (key,), parents, _product, "E = P·t", "{0}·{1}")


def _product(a: float, b: float) -> tuple[float]:
    return (a * b,)


def work_candidates(ctx: ProcessContext) -> Iterator[Step]:
    """Yield the ways to the work: given, by the path, none listed, sums, balance."""
    p, work = ctx.process.id, ctx.key("work")
    for kind in kinds_of(ctx):
        yield from _kind_candidates(ctx, kind, ctx.key(KINDS[kind]))
    yield from _given(ctx, work, f"Work, {p}", "W given")
    kinds = tuple(ctx.key(KINDS[kind]) for kind in kinds_of(ctx))
    if ctx.heat_known_without_balance:
        yield from _kind_from_balance(ctx)
    formula = f"W = {symbols_of((KINDS[kind] for kind in kinds_of(ctx)), ' + ')}"
    yield Step(f"Work, {p}", (work,), kinds, total, formula, sum_text(len(kinds)))
    if ctx.heat_known_without_balance:
        yield Step(
            f"Work from the balance, {p}",
            (work,),
            (ctx.key("heat"), ctx.key("energy_change")),
            first_less_rest,
            "W = Q − ΔE",
            less_text(2),
        )
    for kind in kinds:
        if ctx.unknown_work_kind in (None, kind):
            others = tuple(other for other in kinds if other != kind)
            yield Step(
                f"{_spoken(kind)} from the total, {p}",
                (kind,),
                (work, *others),
                first_less_rest,
                "W_kind = W − W_others",
                less_text(len(kinds)),
            )


def _kind_from_balance(ctx: ProcessContext) -> Iterator[Step]:
    """Yield the one kind of work that is listed or claimed without an input, from the balance less the others."""
    kinds = tuple(ctx.key(KINDS[kind]) for kind in kinds_of(ctx))
    for kind in kinds:
        if kind not in ctx.claimed_work_kinds:
            continue
        others = tuple(other for other in kinds if other != kind)
        yield Step(
            f"{_spoken(kind)} from the balance, {ctx.process.id}",
            (kind,),
            (ctx.key("heat"), ctx.key("energy_change"), *others),
            first_less_rest,
            "W_kind = Q − ΔE − W_others",
            less_text(1 + len(kinds)),
        )


def _spoken(kind: str) -> str:
    return kind.rsplit("/", 1)[-1].replace("_", " ").capitalize()


def _kind_candidates(ctx: ProcessContext, kind: str, key: str) -> Iterator[Step]:
    """Yield the ways to one kind of work, from its items or from nothing being listed."""
    p = ctx.process.id
    items = ctx.process.work_transfers
    keys = [ctx.work_item(item.id) for item in items or () if item.kind == kind]
    name = KINDS[kind].replace("_", " ").capitalize()
    yield from _given(ctx, key, f"{name}, {p}", "W given")
    for item in keys:
        if item != key:
            yield from _given(ctx, item, f"Work transfer {item.split('/')[-2]}, {p}", "W_k given")
    for listed in items or ():
        if listed.kind == kind:
            yield from _from_power(ctx, "work", listed.id, ctx.work_item(listed.id))
    if kind == "boundary":
        if len(ctx.bodies) == 1 and (step := ctx.boundary_work_step(ctx.bodies[0])) is not None:
            yield step
    elif kind != "friction" and items is not None and not keys:
        yield constant(key, f"{name}, {p}", f"W = 0 (no {kind} work listed)")
    if len(keys) > 1:
        yield Step(f"{name}, {p}", (key,), tuple(keys), total, "W = ΣW_k", sum_text(len(keys)))
        supplied = {ctx.work_item(i.id) for i in items or () if ctx.is_supplied("work", i.id)}
        unknown = [item for item in keys if item not in supplied]
        if len(unknown) == 1:
            others = tuple(item for item in keys if item != unknown[0])
            yield Step(
                f"Remaining {kind} work transfer, {p}",
                (unknown[0],),
                (key, *others),
                first_less_rest,
                "W_k = W − ΣW_others",
                less_text(1 + len(others)),
            )


def assumed_candidates(ctx: ProcessContext, known: set[str]) -> Iterator[Step]:
    """Yield what the review assumes where work is not stated and the balance alone cannot tell it."""
    p = ctx.process.id
    if ctx.process.work_transfers is not None:
        return
    if ctx.key("work") in known and ctx.key("boundary_work") in known:
        return
    for kind in kinds_of(ctx):
        name = KINDS[kind]
        key = ctx.key(name)
        if kind != "boundary" and key not in known and not ctx.is_stated(key):
            yield constant(
                key,
                f"{name.replace('_', ' ').capitalize()}, {p}",
                f"W = 0 (no {kind} work stated)",
                assumes=f"{p}: no {kind} work stated, so there is none",
            )
