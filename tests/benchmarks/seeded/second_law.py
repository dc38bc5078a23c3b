"""Entropy and exergy of one process, and how each goes wrong."""

from __future__ import annotations

import math

from tests.benchmarks.seeded.chain import Function, Values
from tests.benchmarks.seeded.draft import Draft
from tests.benchmarks.seeded.equation import NoStateError
from tests.benchmarks.seeded.fluids import RealFluid
from tests.benchmarks.seeded.gases import ConstantGas, Solid
from tests.benchmarks.seeded.leg import ADIABATIC, Leg
from tests.benchmarks.seeded.states import ModelOf


def entropy_change(draft: Draft, leg: Leg, model_of: ModelOf) -> None:
    """Add ΔS."""
    m, a, b, ds = leg.mass, f"{leg.first}.", f"{leg.last}.", leg.key("ds")

    def change(v: Values) -> float:
        return v[m] * (v[b + "s"] - v[a + "s"])

    def gas(v: Values) -> float:
        model = model_of(v)
        if isinstance(model, RealFluid | Solid):
            raise NoStateError("no gas")
        return model.gas_constant

    def constant(v: Values) -> ConstantGas:
        model = model_of(v)
        if not isinstance(model, ConstantGas):
            raise NoStateError("no constant heat capacity")
        return model

    def c_log(v: Values, ratio: float) -> float:
        model = model_of(v)
        if isinstance(model, Solid):
            return v[m] * model.heat * math.log(ratio)
        r, cv = constant(v).constant, constant(v).cv
        if leg.path == "constant volume":
            return v[m] * cv * math.log(ratio)
        return v[m] * ((cv + r) * math.log(ratio) - r * math.log(v[b + "p"] / v[a + "p"]))

    def warm(v: Values) -> float:
        return v[b + "t"] / v[a + "t"]

    def celsius(v: Values) -> float:
        return (v[b + "t"] - 273.15) / (v[a + "t"] - 273.15)

    def decimal(v: Values) -> float:
        if isinstance(model_of(v), Solid):
            return change(v) / math.log(10.0)
        constant(v)
        return change(v) / math.log(10.0)

    def p_term(v: Values) -> float:
        return v[m] * gas(v) * math.log(v[b + "p"] / v[a + "p"])

    def v_term(v: Values) -> float:
        return v[m] * gas(v) * math.log(v[b + "v"] / v[a + "v"])

    slips: list[tuple[str, Function]] = [
        ("pressure term of the entropy omitted", lambda v: (change(v) + p_term(v),)),
        ("volume term of the entropy omitted", lambda v: (change(v) - v_term(v),)),
        ("temperature term of the entropy omitted", lambda v: (-p_term(v),)),
        ("temperature term of the entropy omitted", lambda v: (v_term(v),)),
        ("decimal logarithm", lambda v: (decimal(v),)),
        ("Celsius in a ratio", lambda v: (c_log(v, celsius(v)),)),
        ("ratio inverted", lambda v: (c_log(v, 1.0 / warm(v)),)),
        ("cv for cp", lambda v: (change(v) - v[m] * gas(v) * math.log(warm(v)),)),
        ("cp for cv", lambda v: (change(v) + v[m] * gas(v) * math.log(warm(v)),)),
        ("states swapped", lambda v: (-change(v),)),
        ("mass left out", lambda v: (change(v) / v[m],)),
    ]
    if leg.path == "isentropic":
        slips = []  # zero by its name; nobody works it out
    if leg.wall and leg.path != "isentropic":
        q = leg.key("q")
        mean: Function = lambda v: (v[q] / (0.5 * (v[a + "t"] + v[b + "t"])),)  # noqa: E731 - a formula
        slips.append(("heat over mean temperature for the entropy change", mean))
    draft.step(ds, (m, a + "s", b + "s"), lambda v: (change(v),), slips)


def generation(draft: Draft, leg: Leg) -> None:
    """Add the entropy transfer and the generation, with surroundings where a reservoir is named."""
    ds, st, sg = leg.key("ds"), leg.key("st"), leg.key("sg")
    qm, wall, loss, loss_wall = leg.key("qm"), leg.wall, leg.loss, leg.loss_wall
    if wall is None and leg.path not in ADIABATIC and leg.path != "insulated":
        return
    if wall is None:
        draft.step(
            sg, (ds,), lambda v: (v[ds],), (("entropy generation sign reversed", lambda v: (-v[ds],)),)
        )
        return

    def over(v: Values, t: float) -> float:
        rest = v[loss] / v[loss_wall] if loss and loss_wall else 0.0
        return v[qm] / t + rest

    a, b = f"{leg.first}.t", f"{leg.last}.t"
    slips: list[tuple[str, Function]] = [
        ("mean temperature for the boundary temperature", lambda v: (over(v, 0.5 * (v[a] + v[b])),)),
        ("system temperature for the boundary temperature", lambda v: (over(v, v[b]),)),
        ("system temperature for the boundary temperature", lambda v: (over(v, v[a]),)),
        ("surroundings temperature for the boundary temperature", lambda v: (over(v, v["t0"]),)),
        ("heat sign reversed", lambda v: (-over(v, v[wall]),)),
    ]
    parents: tuple[str, ...] = (qm, wall)
    if leg.reservoir:
        reservoir = leg.reservoir
        slips.append(("reservoir for the boundary temperature", lambda v: (over(v, v[reservoir]),)))
    if loss and loss_wall:
        parents = (*parents, loss, loss_wall)
        slips += [
            ("item missing from a sum", lambda v: (v[qm] / v[wall],)),
            ("item missing from a sum", lambda v: (v[loss] / v[loss_wall],)),
        ]
    draft.step(st, parents, lambda v: (over(v, v[wall]),), slips)
    draft.step(sg, (ds, st), lambda v: (v[ds] - v[st],), _generation_slips(ds, st))
    if leg.reservoir:
        _with_surroundings(draft, leg)


def _generation_slips(ds: str, st: str) -> tuple[tuple[str, Function], ...]:
    return (
        ("entropy transfer omitted", lambda v: (v[ds],)),
        ("entropy transfer added", lambda v: (v[ds] + v[st],)),
        ("entropy generation sign reversed", lambda v: (v[st] - v[ds],)),
    )


def _with_surroundings(draft: Draft, leg: Leg) -> None:
    ds, sgs, qm, reservoir, loss = leg.key("ds"), leg.key("sgs"), leg.key("qm"), leg.reservoir or "", leg.loss

    def outside(v: Values) -> float:
        return v[qm] / v[reservoir] + (v[loss] / v["t0"] if loss else 0.0)

    parents = (ds, qm, reservoir, *((loss, "t0") if loss else ()))
    slips: list[tuple[str, Function]] = [
        ("entropy transfer omitted", lambda v: (v[ds],)),
        ("entropy transfer added", lambda v: (v[ds] + outside(v),)),
        ("entropy generation sign reversed", lambda v: (outside(v) - v[ds],)),
    ]
    draft.step(sgs, parents, lambda v: (v[ds] - outside(v),), slips)


def exergy(draft: Draft, leg: Leg) -> None:
    """Add the exergy destroyed and the change of exergy."""
    m, a, b = leg.mass, f"{leg.first}.", f"{leg.last}."
    ds, de = leg.key("ds"), leg.key("de")
    source = leg.key("sgs") if leg.reservoir else leg.key("sg") if leg.wall is None else None
    if source:
        draft.step(
            leg.key("xd"),
            ("t0", source),
            lambda v: (v["t0"] * v[source],),
            (("exergy with the entropy change", lambda v: (v["t0"] * v[ds],)),) if leg.wall else (),
        )
    if leg.path in ("", "insulated"):
        return
    draft.step(
        leg.key("dx"),
        (de, ds, m, a + "v", b + "v", "t0", "p0"),
        lambda v: (v[de] + v["p0"] * v[m] * (v[b + "v"] - v[a + "v"]) - v["t0"] * v[ds],),
        (
            ("item missing from a sum", lambda v: (v[de] - v["t0"] * v[ds],)),
            ("item missing from a sum", lambda v: (v[de] + v["p0"] * v[m] * (v[b + "v"] - v[a + "v"]),)),
        ),
    )
