"""One body's share in a process of several bodies: its work, its heat, and the heat that passes between bodies."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from checker.outcomes import NotEvaluable
from checker.sheet.balances import constant, same_value, sum_text, total
from checker.sheet.context import ProcessContext
from checker.sheet.keys import given, state_key
from checker.sheet.step import Function, Step
from checker.submission import HeatTransfer

SHARES = ("heat", "work", "boundary_work", "internal_energy_change", "entropy_change")
"""What a review should be able to say of each of several bodies."""

ONE_TEMPERATURE = 1e-6
"""[K]: temperatures closer than this are one."""

Signed = tuple[str, float]
"""A key with its sign in a sum."""


def heats_of_body(ctx: ProcessContext, body: str) -> list[Signed] | None:
    """Return the heat transfers of one body with their signs; None where not all of them are known to be listed.

    A heat transfer that names no body may meet any; where bodies are declared to reach one temperature and no heat
    between them is listed, heat passes between them that nobody named.
    """
    share = ctx.share(body, "heat")
    if ctx.is_given(share):
        return [(given(share), 1.0)]
    if any(path.no_heat for path in ctx.paths_of(body)):
        return []
    if ctx.process.heat_transfers is None:
        return None
    if any(item.body is None for item in ctx.external_heats or ()):
        return None
    if ctx.thermally_linked and not ctx.internal_heats:
        return None
    return list(_touching(ctx, body))


def _touching(ctx: ProcessContext, body: str) -> Iterator[Signed]:
    for item in ctx.process.heat_transfers or ():
        if body in (item.to_body, item.body):
            yield ctx.heat_item(item.id), 1.0
        elif body == item.from_body:
            yield ctx.heat_item(item.id), -1.0


def works_of_body(ctx: ProcessContext, body: str) -> list[str] | None:
    """Return the works of one body beside that of its boundary; None where some work names no body."""
    totals = [ctx.key(name) for name in ctx.other_work_kinds]
    items = [item for item in ctx.process.work_transfers or () if item.kind != "boundary"]
    if not items:
        return None if any(ctx.is_stated(key) for key in totals) else []
    if any(item.body is None for item in items):
        return None
    return [ctx.work_item(item.id) for item in items if item.body == body]


def share_steps(ctx: ProcessContext) -> Iterator[Step]:
    """Yield the candidates of the shares of all bodies, and the total of their boundary works."""
    for body in ctx.bodies:
        yield from _boundary_work(ctx, body)
        yield from _energy_change(ctx, body)
        yield from _work_and_heat(ctx, body)
        yield from _entropy_generation(ctx, body)
    yield _total_boundary_work(ctx)
    for item in ctx.internal_heats:
        key = ctx.heat_item(item.id)
        if ctx.is_given(key):
            yield same_value(key, given(key), f"Heat {item.id}, {ctx.process.id}", "Q_k given")
        yield from _internal_generation(ctx, item)
    for body in ctx.bodies:
        yield from _items_from_balance(ctx, body)


def _of(ctx: ProcessContext, body: str) -> str:
    return f" of {body}, {ctx.process.id}"


def _boundary_work(ctx: ProcessContext, body: str) -> Iterator[Step]:
    """Yield the boundary work of a body: given, along its path, or what the others in a fixed volume leave."""
    key, title = ctx.share(body, "boundary_work"), f"Boundary work{_of(ctx, body)}"
    if ctx.is_given(key):
        yield same_value(key, given(key), title, "W_b given")
    step = ctx.boundary_work_step(body)
    if step is not None:
        yield step
    shared = ctx.process.total_volume
    if body in shared:
        others = tuple(ctx.share(other, "boundary_work") for other in shared if other != body)
        yield Step(
            f"{title}, in the fixed volume",
            (key,),
            others,
            lambda *works: (-sum(works),),
            "W_b = −ΣW_b,others",
            f"−({sum_text(len(others))})",
        )
    yield from _boundary_work_from_balance(ctx, body)


def _boundary_work_from_balance(ctx: ProcessContext, body: str) -> Iterator[Step]:
    """Yield what a body's own balance leaves for its boundary, where its heats and its other works are its own."""
    heats, works = heats_of_body(ctx, body), works_of_body(ctx, body)
    if heats is None or works is None or ctx.boundary_work_is_zero(body):
        return
    signs = (-1.0, *(sign for _, sign in heats), *(-1.0 for _ in works))
    yield Step(
        f"Boundary work from the balance{_of(ctx, body)}",
        (ctx.share(body, "boundary_work"),),
        (ctx.share(body, "energy_change"), *(key for key, _ in heats), *works),
        lambda *terms: (sum(sign * term for sign, term in zip(signs, terms, strict=True)),),
        "W_b = Q − ΔE − ΣW_others" if works else "W_b = Q − ΔE" if heats else "W_b = −ΔE (no heat)",
    )


def _entropy_generation(ctx: ProcessContext, body: str) -> Iterator[Step]:
    """Yield ΔS − ΣQ_k/T_b,k of a body, where all its heats are its own.

    Heat from another body crosses at the body's own temperature: no temperature of what lies between is stated.
    """
    if heats_of_body(ctx, body) is None or ctx.is_given(ctx.share(body, "heat")):
        return
    adiabatic = any(path.no_heat for path in ctx.paths_of(body))
    own = () if adiabatic else tuple(i for i in ctx.external_heats or () if i.body == body)
    inner = () if adiabatic else tuple(i for i in ctx.internal_heats if body in (i.from_body, i.to_body))
    alone, change = _only_heat(ctx, body), ctx.share(body, "entropy_change")
    ends = tuple(state_key(s, body, "temperature") for s in (ctx.process.from_state, ctx.process.to_state))
    signs = [1.0 if item.to_body == body else -1.0 for item in inner]
    base = f"processes/{ctx.process.id}/heat_transfers"

    def generated(gained: float, *values: float) -> tuple[float]:
        crossed, rest = values[: len(own)], values[len(own) :]
        if inner:
            first, last, *heats = rest
            taken = [
                _entropy_taken(sign * heat, first, last, gained if alone else None)
                for sign, heat in zip(signs, heats, strict=True)
            ]
            return (gained - sum(crossed) - sum(taken),)
        return (gained - sum(crossed),)

    yield Step(
        f"Entropy generation{_of(ctx, body)}",
        (ctx.share(body, "entropy_generation"),),
        (
            change,
            *(f"{base}/{item.id}/item_entropy" for item in own),
            *(ends if inner else ()),
            *(ctx.heat_item(item.id) for item in inner),
        ),
        generated,
        "S_gen = ΔS − ΣQ_k/T_b,k" if own or inner else "S_gen = ΔS (no heat)",
    )


def _energy_change(ctx: ProcessContext, body: str) -> Iterator[Step]:
    names = ("internal_energy_change", "kinetic_energy_change", "potential_energy_change")
    yield Step(
        f"Energy change{_of(ctx, body)}",
        (ctx.share(body, "energy_change"),),
        tuple(ctx.share(body, name) for name in names),
        total,
        "ΔE = ΔU + ΔKE + ΔPE",
        sum_text(3),
    )


def _work_and_heat(ctx: ProcessContext, body: str) -> Iterator[Step]:
    works = works_of_body(ctx, body)
    work, change = ctx.share(body, "work"), ctx.share(body, "energy_change")
    if works is not None:
        parts = (ctx.share(body, "boundary_work"), *works)
        yield Step(f"Work{_of(ctx, body)}", (work,), parts, total, "W = ΣW_k", sum_text(len(parts)))
    heat, title = ctx.share(body, "heat"), f"Heat{_of(ctx, body)}"
    if ctx.is_given(heat):
        yield same_value(heat, given(heat), title, "Q given")
    yield Step(title, (heat,), (change, work), total, "Q = ΔE + W", sum_text(2))


def _total_boundary_work(ctx: ProcessContext) -> Step:
    """Return the sum of the boundary works; that of bodies in a fixed volume vanishes."""
    key, title = ctx.key("boundary_work"), f"Boundary work, {ctx.process.id}"
    alone = tuple(b for b in ctx.bodies if b not in ctx.process.total_volume)
    if not alone:
        return constant(key, title, "W_b = 0 (the total volume does not change)")
    keys = tuple(ctx.share(body, "boundary_work") for body in alone)
    return Step(title, (key,), keys, total, "W_b = ΣW_b", sum_text(len(keys)))


def _items_from_balance(ctx: ProcessContext, body: str) -> Iterator[Step]:
    """Yield the heat transfers of a body that its own balance tells when the others are known."""
    heats = heats_of_body(ctx, body)
    if heats is None or ctx.is_given(ctx.share(body, "heat")):
        return
    for key, sign in heats:
        others = [(other, factor) for other, factor in heats if other != key]
        yield Step(
            f"Heat transfer from the balance of {body}, {ctx.process.id}",
            (key,),
            (ctx.share(body, "energy_change"), ctx.share(body, "work"), *(other for other, _ in others)),
            _remaining(sign, [factor for _, factor in others]),
            "Q_k = ±(ΔE + W − ΣQ_others)",
        )


def _remaining(sign: float, factors: Sequence[float]) -> Function:
    def remaining(change: float, work: float, *others: float) -> tuple[float]:
        rest = sum(factor * other for factor, other in zip(factors, others, strict=True))
        return (sign * (change + work - rest),)

    return remaining


def _internal_generation(ctx: ProcessContext, item: HeatTransfer) -> Iterator[Step]:
    """Yield the entropy that one body takes up less what the other gives off, where both follow.

    A body of uniform temperature whose only heat is this one, and that does no work but along a quasi-static
    path, exchanges its own change of entropy; a body of constant temperature exchanges Q/T.
    """
    base = f"processes/{ctx.process.id}/heat_transfers/{item.id}"
    assert item.from_body is not None
    assert item.to_body is not None
    sides = [(item.from_body, _only_heat(ctx, item.from_body)), (item.to_body, _only_heat(ctx, item.to_body))]
    parents: list[str] = [ctx.heat_item(item.id)]
    for body, alone in sides:
        ends = (ctx.process.from_state, ctx.process.to_state)
        parents.extend(state_key(state, body, "temperature") for state in ends)
        if alone:
            parents.append(ctx.share(body, "entropy_change"))

    def generated(heat: float, *values: float) -> tuple[float]:
        rest = list(values)
        taken = []
        for (_, alone), direction in zip(sides, (-1.0, 1.0), strict=True):
            first, last = rest.pop(0), rest.pop(0)
            own = rest.pop(0) if alone else None
            taken.append(_entropy_taken(direction * heat, first, last, own))
        return (sum(taken),)

    yield Step(
        f"Entropy generated with heat {item.id}, {ctx.process.id}",
        (f"{base}/entropy_generation",),
        tuple(parents),
        generated,
        "S_gen,k = ∫δQ/T (taken up) − ∫δQ/T (given off)",
    )


def _entropy_taken(heat: float, first: float, last: float, own: float | None) -> float:
    if own is not None:
        return own
    if heat == 0.0:
        return 0.0
    if abs(first - last) > 1e-6 * first:
        raise NotEvaluable("a body's temperature changes, and how its heats are spread over it is not stated")
    return heat / first


def at_bodies_step(ctx: ProcessContext, item: HeatTransfer, body: str | None) -> Step:
    """Return ∫δQ/T of heat that crosses at the temperature of a body, or of all bodies where they have but one.

    It is the change of entropy where this is the only heat and the only work is that along quasi-static paths, and
    Q/T where the temperature does not change.
    """
    bodies = ctx.bodies if body is None else (body,)
    base = f"processes/{ctx.process.id}/heat_transfers/{item.id}"
    if body is None:
        alone = len(ctx.external_heats or ()) == 1 and all(ctx.is_quasi_static_for(b) for b in bodies)
        change = ctx.key("entropy_change")
        works = tuple(ctx.key(name) for name in ctx.other_work_kinds)
    else:
        alone, change, works = _only_heat(ctx, body), ctx.share(body, "entropy_change"), ()
    ends = (ctx.process.from_state, ctx.process.to_state)
    temperatures = tuple(state_key(state, b, "temperature") for state in ends for b in bodies)
    count = len(bodies)

    def crossing(heat: float, *values: float) -> tuple[float]:
        first, last, rest = values[:count], values[count : 2 * count], values[2 * count :]
        if max(first) - min(first) > ONE_TEMPERATURE or max(last) - min(last) > ONE_TEMPERATURE:
            raise NotEvaluable(
                f"the bodies have several temperatures: heat transfer {item.id} must name its body"
            )
        own = rest[0] if rest and not any(rest[1:]) else None
        return (_entropy_taken(heat, first[0], last[0], own),)

    return Step(
        f"Entropy with heat transfer {item.id}, {ctx.process.id}",
        (f"{base}/item_entropy",),
        (ctx.heat_item(item.id), *temperatures, *((change, *works) if alone else ())),
        crossing,
        "∫δQ/T = ΔS (the only heat, quasi-static); else Q_k/T, T constant",
    )


def _only_heat(ctx: ProcessContext, body: str) -> bool:
    """Say whether a body has one heat transfer and no work but along a quasi-static path."""
    heats, works = heats_of_body(ctx, body), works_of_body(ctx, body)
    return heats is not None and len(heats) == 1 and works == [] and ctx.is_quasi_static_for(body)


def internal_keys(ctx: ProcessContext, item: HeatTransfer) -> tuple[str, str]:
    """Return the keys of the energy and of the entropy generation of heat between bodies."""
    base = f"processes/{ctx.process.id}/heat_transfers/{item.id}"
    return ctx.heat_item(item.id), f"{base}/entropy_generation"


def body_of(ctx: ProcessContext, item: HeatTransfer) -> str | None:
    """Return the body that a heat transfer meets; None where several may be meant."""
    return item.body or (ctx.bodies[0] if len(ctx.bodies) == 1 else None)
