"""Situations of several processes: chains with totals, power and cooling cycles, a piston with stops."""

from __future__ import annotations

import random
from typing import Any

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.draft import Draft, head_of, work_sign
from tests.benchmarks.seeded.equation import NoStateError
from tests.benchmarks.seeded.leg import Leg
from tests.benchmarks.seeded.onebody import constant_gas, direct_and_place, mass_step, process_tree
from tests.benchmarks.seeded.process import add_process
from tests.benchmarks.seeded.states import claim_state, state_step


def _tree(draft: Draft, states: int, legs: list[Leg]) -> dict[str, Any]:
    """Make the tree of one body in states s1, s2, …; return the body's."""
    body: dict[str, Any] = {"substance": "", "model": "", "inputs": {}, "results": {}}
    draft.tree = {
        "id": "trial",
        "bodies": {"body": body},
        "states": {f"s{i}": {"body": {"inputs": {}, "results": {}}} for i in range(1, states + 1)},
        "processes": [process_tree(leg, f"s{leg.first}", f"s{leg.last}", leg.path) for leg in legs],
    }
    return body


def _inputs(draft: Draft, state: str) -> dict[str, str]:
    found: dict[str, str] = draft.tree["states"][f"s{state}"]["body"]["inputs"]
    return found


def _sum(
    draft: Draft, key: str, parts: list[str], pointer: str, kind: str, group: str, sign: float = 1.0
) -> None:
    """Add a total and the slips of sums."""
    draft.step(
        key,
        parts,
        lambda v: (sum(v[part] for part in parts),),
        (
            ("item missing from a sum", lambda v: (sum(v[part] for part in parts[:-1]),)),
            ("item missing from a sum", lambda v: (sum(v[part] for part in parts[1:]),)),
            ("item counted twice", lambda v: (sum(v[part] for part in parts) + v[parts[0]],)),
            ("item counted twice", lambda v: (sum(v[part] for part in parts) + v[parts[-1]],)),
        ),
    )
    draft.claimable(key, pointer, kind, un.KJ if kind == "energy" else un.KJ_K, group, sign)


def gas_chain(rng: random.Random) -> Draft:
    """Make a gas that is warmed at constant volume, then at constant pressure, then perhaps cooled, with totals."""
    draft = Draft(rng, "chain of processes with totals")
    head_of(draft)
    count = rng.choice((2, 3))
    paths = ("constant volume", "constant pressure", "constant volume")[:count]
    legs = [
        Leg(f"step-{i}", str(i), str(i + 1), path, wall=f"tb{i}", exergy=False)
        for i, path in enumerate(paths, 1)
    ]
    body = _tree(draft, count + 1, legs)
    model_of = constant_gas(draft, body)
    body["inputs"]["mass"] = draft.given("m", "mass", draft.number(0.4, 3.0), un.KG)
    first = _inputs(draft, "1")
    first["temperature"] = draft.temperature("1.t", 10.0, 40.0)
    first["pressure"] = draft.pressure("1.p", 2.0, 8.0)
    state_step(draft, "1", model_of, {"t": "1.t", "p": "1.p"})
    claim_state(draft, "1", "states/s1/body", "v", False)
    for leg, ends in zip(legs, ((90.0, 180.0), (220.0, 350.0), (60.0, 180.0)), strict=False):
        fixed = "v" if leg.path == "constant volume" else "p"
        _inputs(draft, leg.last)["temperature"] = draft.temperature(f"{leg.last}.t", *ends)
        pair = {"t": f"{leg.last}.t", fixed: f"{leg.first}.{fixed}"}
        state_step(draft, leg.last, model_of, pair, leg.first)
        claim_state(draft, leg.last, f"states/s{leg.last}/body", "pv", False)
    for leg, process in zip(legs, draft.tree["processes"], strict=True):
        add_process(draft, leg, model_of)
        direct_and_place(draft, leg, process)
    _totals(draft, legs)
    return draft


def _totals(draft: Draft, legs: list[Leg]) -> None:
    draft.tree["sequences"] = [{"id": "whole", "processes": [leg.id for leg in legs], "results": {}}]
    base, sign = "sequences/whole", work_sign(draft)
    totals = (
        ("du", "internal_energy_change", "energy", 1.0),
        ("w", "work", "energy", sign),
        ("q", "heat", "energy", 1.0),
        ("ds", "entropy_change", "entropy", 1.0),
        ("sg", "entropy_generation", "entropy", 1.0),
    )
    for name, word, kind, by in totals:
        parts = [leg.key(name) for leg in legs]
        _sum(draft, f"whole.{name}", parts, f"{base}/{word}", kind, f"{kind}:whole", by)


def cycle(cooling: bool) -> Any:
    """Return the maker of a gas cycle of two isentropic changes and two at constant volume."""

    def make(rng: random.Random) -> Draft:
        draft = Draft(rng, "cooling cycle" if cooling else "power cycle")
        head_of(draft)
        legs = [
            Leg("compression", "1", "2", "isentropic", exergy=False),
            Leg("upper", "2", "3", "constant volume", wall="tb1", exergy=False),
            Leg("expansion", "3", "4", "isentropic", exergy=False),
            Leg("lower", "4", "1", "constant volume", wall="tb2", exergy=False),
        ]
        body = _tree(draft, 4, legs)
        if cooling:
            draft.tree["purpose"] = "cooling"
        model_of = constant_gas(draft, body, rng.choice(("Helium", "test gas")))
        _cycle_states(draft, model_of, cooling)
        for leg, process in zip(legs, draft.tree["processes"], strict=True):
            add_process(draft, leg, model_of)
            if leg.wall:
                direct_and_place(draft, leg, process)
        _cycle_results(draft, legs, cooling)
        return draft

    return make


def _cycle_states(draft: Draft, model_of: Any, cooling: bool) -> None:
    rng, first = draft.rng, _inputs(draft, "1")
    first["temperature"] = draft.temperature("1.t", *((-20.0, 5.0) if cooling else (20.0, 60.0)))
    first["pressure"] = draft.pressure("1.p", 0.9, 3.0)
    large, ratio = rng.uniform(2.0, 8.0), rng.uniform(1.5, 2.2) if cooling else rng.uniform(2.5, 7.0)
    draft.tree["bodies"]["body"]["inputs"]["volume"] = draft.given(
        "V", "volume", draft.number(large, large, 3), un.LITRE
    )
    state_step(draft, "1", model_of, {"t": "1.t", "p": "1.p"})
    mass_step(draft, model_of)
    small = draft.number(large / ratio, large / ratio, 3)
    _inputs(draft, "2")["volume"] = draft.given("2.V", "volume", small, un.LITRE)
    draft.step("2.v", ("2.V", "m"), lambda v: (v["2.V"] / v["m"],))
    state_step(draft, "2", model_of, {"v": "2.v", "s": "1.s"}, "1")
    middle = draft.peek("2.t") - 273.15
    start = draft.peek("1.t") - 273.15
    ends = (
        (start + 0.3 * (middle - start), start + 0.6 * (middle - start))
        if cooling
        else (middle + 200.0, middle + 700.0)
    )
    _inputs(draft, "3")["temperature"] = draft.temperature("3.t", *ends)
    state_step(draft, "3", model_of, {"t": "3.t", "v": "2.v"}, "2")
    state_step(draft, "4", model_of, {"v": "1.v", "s": "3.s"}, "3")
    for state, names in (("2", "tp"), ("3", "p"), ("4", "tp")):
        claim_state(draft, state, f"states/s{state}/body", names, False)


def _cycle_results(draft: Draft, legs: list[Leg], cooling: bool) -> None:
    heats = [leg.key("q") for leg in legs if leg.wall]
    supplied, rejected = (heats[1], heats[0]) if cooling else (heats[0], heats[1])
    if draft.peek(supplied) <= 0.0 or draft.peek(rejected) >= 0.0:
        raise NoStateError("the cycle runs the other way")
    draft.step(
        "qin",
        (supplied,),
        lambda v: (v[supplied],),
        (("heat rejected for heat supplied", lambda v: (-v[rejected],)),),
    )
    draft.step("qout", (rejected,), lambda v: (-v[rejected],))
    works = [leg.key("w") for leg in legs if leg.path == "isentropic"]
    group = "energy:cycle"
    draft.claimable("qin", "results/heat_supplied", "energy", un.KJ, group)
    draft.claimable("qout", "results/heat_rejected", "energy", un.KJ, group)
    _sum(draft, "net", works, "results/net_work", "energy", group, work_sign(draft))
    if cooling:
        draft.step(
            "cop",
            ("qin", "net"),
            lambda v: (v["qin"] / -v["net"],),
            (("heat rejected for heat supplied", lambda v: (v["qout"] / -v["net"],)),),
        )
        draft.claimable("cop", "results/coefficient_of_performance", "performance", un.NONE)
        return
    draft.step(
        "eta",
        ("qin", "net"),
        lambda v: (v["net"] / v["qin"],),
        (("heat rejected for heat supplied", lambda v: (v["net"] / v["qout"],)),),
    )
    draft.claimable("eta", "results/thermal_efficiency", "efficiency", un.NONE, "quality")


def stopped_piston(rng: random.Random) -> Draft:
    """Make a gas under a loaded piston that rests on stops and lifts at its pressure; the total heat is given."""
    draft = Draft(rng, "piston with stops")
    head_of(draft)
    legs = [
        Leg("pressing", "1", "2", "constant volume", wall="tb", exergy=False),
        Leg("rising", "2", "3", "constant pressure", wall="tb", exergy=False),
    ]
    body = _tree(draft, 3, legs)
    model_of = constant_gas(draft, body)
    body["inputs"]["mass"] = draft.given("m", "mass", draft.number(0.3, 2.0), un.KG)
    first = _inputs(draft, "1")
    first["temperature"] = draft.temperature("1.t", 10.0, 40.0)
    first["pressure"] = draft.pressure("1.p", 1.5, 4.0)
    start = draft.peek("1.p") / 1e5
    sequence = {"id": "heating", "processes": ["pressing", "rising"], "inputs": {}, "results": {}}
    lift = draft.pressure("pl", 1.3 * start, 1.8 * start, absolute=True)
    state_step(draft, "1", model_of, {"t": "1.t", "p": "1.p"})
    size = (
        draft.peek("m")
        * draft.peek("cv")
        * draft.peek("1.t")
        * (draft.peek("pl") / draft.peek("1.p") - 1.0)
        / 1e3
    )
    heat = draft.given("Q", "energy", draft.number(2.0 * size, 4.0 * size, 4), un.KJ)
    sequence["inputs"] = {"heat": heat, "lift_pressure": lift}
    draft.tree["sequences"] = [sequence]
    state_step(draft, "2", model_of, {"p": "pl", "v": "1.v"}, "1")
    draft.step(
        "q1",
        ("m", "1.u", "2.u"),
        lambda v: (v["m"] * (v["2.u"] - v["1.u"]),),
        (("states swapped", lambda v: (v["m"] * (v["1.u"] - v["2.u"]),)),),
    )
    draft.step(
        "3.hh",
        ("2.h", "Q", "q1", "m"),
        lambda v: (v["2.h"] + (v["Q"] - v["q1"]) / v["m"],),
        (("item missing from a sum", lambda v: (v["2.h"] + v["Q"] / v["m"],)),),
    )
    state_step(draft, "3", model_of, {"p": "2.p", "h": "3.hh"}, "2")
    for state in "123":
        claim_state(draft, state, f"states/s{state}/body", "tv" if state != "1" else "v", False)
    hottest = draft.peek("3.t") - 273.15
    wall = draft.temperature("tb", hottest + 10.0, hottest + 80.0, un.CELSIUS)
    for process in draft.tree["processes"]:
        process["heat_transfers"][0]["boundary_temperature"] = wall
    for leg in legs:
        add_process(draft, leg, model_of)
    _stop_totals(draft, legs)
    return draft


def _stop_totals(draft: Draft, legs: list[Leg]) -> None:
    base, sign = "sequences/heating", work_sign(draft)
    for name, word, kind, by in (
        ("du", "internal_energy_change", "energy", 1.0),
        ("w", "work", "energy", sign),
        ("ds", "entropy_change", "entropy", 1.0),
        ("sg", "entropy_generation", "entropy", 1.0),
    ):
        parts = [leg.key(name) for leg in legs]
        _sum(draft, f"heating.{name}", parts, f"{base}/{word}", kind, f"{kind}:heating", by)
