"""Balances over several processes: cycles and sequences."""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.balances import same_value, sum_text, total
from checker.sheet.context import ProcessContext
from checker.sheet.keys import given, state_key
from checker.sheet.step import Step
from checker.submission import Record, Role

SUMS = (
    "heat",
    "work",
    "boundary_work",
    "shaft_work",
    "electrical_work",
    "internal_energy_change",
    "kinetic_energy_change",
    "potential_energy_change",
    "energy_change",
    "entropy_change",
    "entropy_transfer",
    "entropy_generation",
    "entropy_generation_with_surroundings",
    "exergy_change",
    "exergy_transfer",
    "exergy_destruction",
    "temperature_change",
    "duration",
)
WITH_SURROUNDINGS: Final = "entropy_generation_with_surroundings"


def is_cycle(record: Record) -> bool:
    """Say whether the processes, in some order, lead from every state back to where they began."""
    starts = sorted(p.from_state for p in record.processes)
    ends = sorted(p.to_state for p in record.processes)
    return bool(starts) and starts == ends and len(set(starts)) == len(starts)


def cycle_steps(record: Record, contexts: Sequence[ProcessContext]) -> Iterator[Step]:
    """Yield net work and heat, heat supplied and rejected (magnitudes), efficiency and COP of the record's cycle."""
    if not record.processes:
        return
    works = tuple(ctx.key("work") for ctx in contexts)
    heats = tuple(key for ctx in contexts for key in _heat_keys(ctx))
    yield Step("Net work", ("results/net_work",), works, total, "W_net = ΣW", sum_text(len(works)))
    yield Step("Net heat", ("results/net_heat",), heats, total, "Q_net = ΣQ", sum_text(len(heats)))
    yield Step(
        "Heat supplied",
        ("results/heat_supplied",),
        heats,
        lambda *q: (sum((x for x in q if x > 0.0), 0.0),),
        "Q_in = ΣQ_k, Q_k > 0",
    )
    yield Step(
        "Heat rejected",
        ("results/heat_rejected",),
        heats,
        lambda *q: (sum((-x for x in q if x < 0.0), 0.0),),
        "Q_out = −ΣQ_k, Q_k < 0",
    )
    yield Step(
        "Thermal efficiency",
        ("results/thermal_efficiency",),
        ("results/net_work", "results/heat_supplied"),
        _per_heat,
        "η = W_net/Q_in",
        "{0}/{1}",
    )
    useful = {"heating": "results/heat_rejected", "cooling": "results/heat_supplied"}.get(
        record.purpose or ""
    )
    if useful:
        yield Step(
            "Coefficient of performance",
            ("results/coefficient_of_performance",),
            (useful, "results/net_work"),
            _per_work,
            "COP = Q_useful/|W_net|",
            "{0}/|{1}|",
        )


def _heat_keys(ctx: ProcessContext) -> tuple[str, ...]:
    items = ctx.external_heats or ()
    return tuple(ctx.heat_item(item.id) for item in items) if len(items) > 1 else (ctx.key("heat"),)


def _per_heat(work: float, heat: float) -> tuple[float]:
    if heat <= 0.0:
        raise NotEvaluable("no heat is supplied, so there is no efficiency")
    return (work / heat,)


def _per_work(useful: float, work: float) -> tuple[float]:
    if work >= 0.0:
        raise NotEvaluable("no net work is put in, so there is no coefficient of performance")
    return (useful / -work,)


def sequence_steps(record: Record, contexts: Sequence[ProcessContext]) -> Iterator[Step]:
    """Yield the totals of every sequence: sums over its processes, and its own inputs where they stay open."""
    by_id = {ctx.process.id: ctx for ctx in contexts}
    for sequence in record.sequences:
        base = f"sequences/{sequence.id}"
        members = [by_id[name] for name in sequence.processes if name in by_id]
        if record.stated(f"{base}/{WITH_SURROUNDINGS}"):
            yield _destruction_with_surroundings(sequence.id)
        for name in SUMS:
            yield Step(
                f"{name.replace('_', ' ').capitalize()}, sequence {sequence.id}",
                (f"{base}/{name}",),
                tuple(ctx.key(name) for ctx in members),
                total,
                "sum over the sequence",
                sum_text(len(members)),
            )
        yield from _stops(sequence.id, members)
        for name in (*SUMS, "lift_pressure", "stop_volume"):
            key = f"{base}/{name}"
            if record.stated(key, Role.INPUT):
                yield same_value(key, given(key), f"{name.replace('_', ' ')}, {sequence.id}", "given")


def _stops(sequence: str, members: Sequence[ProcessContext]) -> Iterator[Step]:
    """Yield the pressure at which the piston lifts and the volume at its stop, from the states where they are known."""
    for ctx in members[:-1]:
        if len(ctx.bodies) != 1:
            continue
        body, end = ctx.bodies[0], ctx.process.to_state
        rests = any(path.holds == "specific_volume" for path in ctx.paths_of(body))
        name, prop = ("lift_pressure", "pressure") if rests else ("stop_volume", "volume")
        title = f"{name.replace('_', ' ').capitalize()}, sequence {sequence}"
        source = state_key(end, body, prop)
        yield same_value(f"sequences/{sequence}/{name}", source, title, f"that of {body} in {end}")


def _destruction_with_surroundings(sequence: str) -> Step:
    """Return X_d = T₀·S_gen,tot of a sequence that claims the generation with surroundings."""
    base = f"sequences/{sequence}"
    return Step(
        f"Exergy destruction, sequence {sequence}",
        (f"{base}/exergy_destruction",),
        (given("surroundings/temperature"), f"{base}/{WITH_SURROUNDINGS}"),
        lambda ambient, generated: (ambient * generated,),
        "X_d = T₀·S_gen,tot",
        "{0}·{1}",
    )
