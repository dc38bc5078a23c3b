"""Situations of one body and one process: models, paths and what is known of the last state."""

from __future__ import annotations

import random
from collections.abc import Callable
from typing import Any

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.chain import Values
from tests.benchmarks.seeded.draft import Draft, head_of
from tests.benchmarks.seeded.equation import NoStateError
from tests.benchmarks.seeded.fluids import RealFluid
from tests.benchmarks.seeded.gases import ConstantGas, IdealPart, PolynomialGas, Solid
from tests.benchmarks.seeded.leg import ADIABATIC, Leg
from tests.benchmarks.seeded.process import add_process
from tests.benchmarks.seeded.states import ModelOf, claim_state, state_step

KJ_KGK = un.KJ_KGK
CONSTANT_GASES = {
    "Argon": (0.3122, 0.2081),
    "Helium": (3.116, 2.077),
    "test gas": (0.802, 0.2654),
    "Air": (0.718, 0.2871),
    "Nitrogen": (0.743, 0.2968),
}
"""c_v and R as a design basis would state them; those of the last two hold near room temperature only. [kJ/(kg·K)]"""
ANY_SPAN = ("Argon", "Helium", "test gas")
IDEAL_GASES = ("Nitrogen", "Oxygen", "CarbonDioxide", "Methane", "Argon")


def constant_gas(draft: Draft, tree: dict[str, Any], name: str | None = None) -> ModelOf:
    """Take the constants of a gas as inputs of its body."""
    name = name or draft.rng.choice(ANY_SPAN)
    cv, r = CONSTANT_GASES[name]
    inputs = tree["inputs"]
    inputs["specific_heat_at_constant_volume"] = draft.given("cv", "specific heat", f"{cv}", KJ_KGK)
    inputs["gas_constant"] = draft.given("R", "gas constant", f"{r}", KJ_KGK)
    tree.update(substance=name, model="constant specific heat")
    return lambda values: ConstantGas(values["cv"], values["R"])


def ideal_gas(draft: Draft, tree: dict[str, Any], polynomial: bool) -> ModelOf:
    """Take a gas with c_p(T), by the polynomial or by the ideal part of its equation."""
    squeezed = any(word in draft.situation for word in ("isothermal", "isentropic", "polytropic"))
    name = draft.rng.choice(("Nitrogen", "Oxygen", "Argon") if squeezed else IDEAL_GASES)
    tree.update(substance=name, model="ideal gas")
    model = PolynomialGas(name) if polynomial else IdealPart(name)
    return lambda values: model


def real_fluid(draft: Draft, tree: dict[str, Any], name: str) -> ModelOf:
    """Take a fluid by its equation, most of them with a declared datum; water has that of its tables."""
    tree.update(substance=name, model="real fluid")
    draft.notes["fluid"] = name
    datum = None
    if name != "Water" and draft.rng.random() < 0.6:
        datum = (300.0, 1e5)
        zero = ["specific_internal_energy", "specific_entropy"]
        tree["datum"] = {"temperature": "300 K", "pressure": "1.000 bar", "zero": zero}
        draft.notes["datum"] = "declared"
    model = RealFluid(name, datum)
    return lambda values: model


def condensed(draft: Draft, tree: dict[str, Any], low: float, high: float, name: str) -> ModelOf:
    """Take a liquid or solid of constant specific heat, an input of its body."""
    text = draft.given("c", "specific heat", draft.number(low, high), KJ_KGK)
    tree["inputs"]["specific_heat"] = text
    tree.update(substance=name, model="constant specific heat")
    return lambda values: Solid(values["c"])


def mass_or_volume(draft: Draft, tree: dict[str, Any], mass: float, volume: bool) -> None:
    """Give the mass, or the volume in the first state from which the mass follows."""
    rng = draft.rng
    if not volume:
        tree["inputs"]["mass"] = draft.given("m", "mass", draft.number(0.3 * mass, 2.0 * mass), un.KG)
        return
    unit, number = (
        (un.LITRE, draft.number(20.0, 400.0)) if rng.random() < 0.7 else (un.M3, draft.number(0.1, 2.0))
    )
    tree["inputs"]["volume"] = draft.given("V", "volume", number, unit)


def mass_step(draft: Draft, model_of: ModelOf, state: str = "1") -> None:
    """Add m = V/v where the volume is given."""
    if any(given.key == "V" for given in draft.givens):
        draft.step("m", ("V", f"{state}.v"), lambda v: (v["V"] / v[f"{state}.v"],))
        draft.claimable("m", "bodies/body/mass", "mass", un.KG)


def skeleton(draft: Draft, path: Any, leg: Leg, volume: bool) -> None:
    """Make the record's tree of two states and one process."""
    draft.tree = {
        "id": "trial",
        "bodies": {"body": {"substance": "", "model": "", "inputs": {}, "results": {}}},
        "states": {
            "first": {"body": {"inputs": {}, "results": {}}},
            "last": {"body": {"inputs": {}, "results": {}}},
        },
        "processes": [process_tree(leg, "first", "last", path)],
    }


def process_tree(leg: Leg, first: str, last: str, path: Any) -> dict[str, Any]:
    """Return the tree of a process, with its transfers and no numbers yet."""
    tree: dict[str, Any] = {
        "id": leg.id,
        "from": first,
        "to": last,
        "heat_transfers": [],
        "work_transfers": [],
    }
    if path:
        tree["path"] = path
    if leg.wall or leg.heat:
        tree["heat_transfers"].append({"id": leg.transfer})
    if leg.loss:
        tree["heat_transfers"].append({"id": "loss"})
    if leg.electrical:
        tree["work_transfers"].append({"id": "heater", "kind": "electrical", "direction": "in"})
    tree["results"] = {}
    return tree


def boundary(
    draft: Draft, leg: Leg, process: dict[str, Any], gains: bool, hottest: float, coldest: float
) -> None:
    """Draw the temperatures at which heat crosses: hotter than the body where it gains heat, else colder. [K]"""
    item = process["heat_transfers"][0]
    if gains:
        ends = (hottest + 5.0 - 273.15, hottest + 80.0 - 273.15)
    else:
        ends = (max(coldest - 40.0, 200.0) - 273.15, coldest - 3.0 - 273.15)
    item["boundary_temperature"] = draft.temperature(leg.wall or "", *ends, un.CELSIUS)
    if leg.reservoir:
        wall = draft.givens[-1].value - 273.15
        ends = (wall + 1.0, wall + 25.0) if gains else (wall - 25.0, wall - 1.0)
        item["reservoir_temperature"] = draft.temperature(leg.reservoir, *ends, un.CELSIUS)


Maker = Callable[[random.Random], Draft]


def gas_process(
    situation: str, path: str, kind: str, fluid: str | None = None, reversible: bool = False
) -> Maker:
    """Return the maker of a gas or fluid along a path; ``reversible`` with a wall as warm as the gas."""

    def make(rng: random.Random) -> Draft:
        draft = Draft(rng, situation, hard=reversible)
        head_of(draft)
        adiabatic = path in ADIABATIC
        reservoir = not adiabatic and not reversible and rng.random() < 0.6
        leg = Leg(
            "change",
            "1",
            "2",
            path,
            parameter="n" if path == "polytropic" else "pext" if path.startswith("against") else None,
            wall=None if adiabatic else "tb",
            reservoir="tr" if reservoir else None,
        )
        volume = rng.random() < 0.5
        skeleton(draft, path, leg, volume)
        body, process = draft.tree["bodies"]["body"], draft.tree["processes"][0]
        model_of = _model(draft, body, kind, fluid)
        mass_or_volume(draft, body, 1.0, volume)
        _two_states(draft, leg, model_of, kind)
        add_process(draft, leg, model_of)
        if reversible:
            first = next(given for given in draft.givens if given.key == "1.t")
            text = draft.given(
                "tb", "temperature", first.text.removesuffix(first.unit.text).strip(), first.unit
            )
            process["heat_transfers"][0]["boundary_temperature"] = text
        else:
            _finish(draft, leg, process)
        return draft

    return make


def _model(draft: Draft, body: dict[str, Any], kind: str, fluid: str | None) -> ModelOf:
    if kind == "constant":
        narrow = "isothermal" in draft.situation or "free" in draft.situation
        return constant_gas(draft, body, draft.rng.choice(tuple(CONSTANT_GASES)) if narrow else None)
    if kind in ("polynomial", "ideal"):
        return ideal_gas(draft, body, kind == "polynomial")
    return real_fluid(draft, body, fluid or "Nitrogen")


def _two_states(draft: Draft, leg: Leg, model_of: ModelOf, kind: str) -> None:
    """Give both states along the path and add their steps."""
    rng, tree = draft.rng, draft.tree
    first, last = (tree["states"][name]["body"]["inputs"] for name in ("first", "last"))
    compressed = leg.path in ("isothermal", "isentropic", "polytropic") and rng.random() < 0.6
    low, high = (0.5, 1.0) if compressed else (1.0, 4.0)
    if kind in ("ideal", "polynomial"):
        low, high = (0.3, 0.8) if compressed else (0.5, 2.0)
    if kind == "real":
        low, high = (5.0, 20.0) if compressed else (20.0, 150.0)
    warm = leg.path in ("isentropic", "polytropic", "against constant external pressure") and not compressed
    first["temperature"] = draft.temperature("1.t", *((60.0, 250.0) if warm else (10.0, 60.0)))
    first["pressure"] = draft.pressure("1.p", low, high)
    pressure = draft.givens[-1].value / 1e5
    state_step(draft, "1", model_of, {"t": "1.t", "p": "1.p"})
    claim_state(draft, "1", "states/first/body", _names(kind), kind == "real")
    mass_step(draft, model_of)
    start = next(given.value for given in draft.givens if given.key == "1.t") - 273.15
    pair: dict[str, str]
    if leg.path in ("constant volume", "constant pressure"):
        fixed = "v" if leg.path == "constant volume" else "p"
        if rng.random() < 0.75:
            cooled = rng.random() < 0.3
            ends = (
                (start - 60.0, start - 20.0) if cooled and kind != "real" else (start + 30.0, start + 250.0)
            )
            last["temperature"] = draft.temperature("2.t", *ends)
            pair = {"t": "2.t", fixed: f"1.{fixed}"}
        elif leg.path == "constant volume":
            last["pressure"] = draft.pressure("2.p", 1.2 * pressure, 2.0 * pressure)
            pair = {"p": "2.p", "v": "1.v"}
        else:
            last["temperature"] = draft.temperature("2.t", start + 30.0, start + 250.0)
            pair = {"t": "2.t", "p": "1.p"}
    else:
        ratio = (2.0, 6.0) if compressed else (0.2, 0.5)
        if leg.path == "polytropic":
            path = {
                "kind": "polytropic",
                "exponent": draft.given("n", "exponent", draft.number(1.05, 1.6), un.NONE),
            }
            tree["processes"][0]["path"] = path
        if leg.path == "against constant external pressure":
            outside = draft.pressure("pext", ratio[0] * pressure, ratio[1] * pressure, absolute=True)
            tree["processes"][0]["path"] = ["adiabatic", {"kind": leg.path, "external_pressure": outside}]
            _against(draft, model_of)
            return
        if leg.path == "free expansion":
            _free(draft, model_of, last)
            return
        last["pressure"] = draft.pressure("2.p", ratio[0] * pressure, ratio[1] * pressure)
        pair = {"p": "2.p", **({"t": "1.t"} if leg.path == "isothermal" else {"s": "1.s"})}
        if leg.path == "polytropic":
            _polytropic(draft, model_of)
            return
    state_step(draft, "2", model_of, pair, "1")
    claim_state(draft, "2", "states/last/body", _names(kind), kind == "real")


def _names(kind: str) -> str:
    return "tpvusx" if kind == "real" else "tpv"


def _polytropic(draft: Draft, model_of: ModelOf) -> None:
    """v2 from p·vⁿ, then the state at p2 and v2."""

    def volume(v: Values) -> float:
        return float(v["1.v"] * (v["1.p"] / v["2.p"]) ** (1.0 / v["n"]))

    def isentropic(v: Values) -> float:
        model = model_of(v)
        if not isinstance(model, ConstantGas):
            raise NoStateError("no isentropic exponent")
        k = (model.cv + model.constant) / model.cv
        return float(v["1.v"] * (v["1.p"] / v["2.p"]) ** (1.0 / k))

    slips = (
        ("isentropic exponent for the polytropic", lambda v: (isentropic(v),)),
        ("ratio inverted", lambda v: (v["1.v"] * (v["2.p"] / v["1.p"]) ** (1.0 / v["n"]),)),
    )
    draft.step("2.vp", ("1.v", "1.p", "2.p", "n"), lambda v: (volume(v),), slips)
    state_step(draft, "2", model_of, {"p": "2.p", "v": "2.vp"}, "1")
    claim_state(draft, "2", "states/last/body", "tv", False)


def _against(draft: Draft, model_of: ModelOf) -> None:
    """Let the gas come to rest at the outside pressure: u2 + p·v2 = u1 + p·v1."""
    draft.step("2.p", ("pext",), lambda v: (v["pext"],))
    draft.step("2.hh", ("1.u", "1.v", "pext"), lambda v: (v["1.u"] + v["pext"] * v["1.v"],))
    draft.tree["states"]["last"]["body"]["inputs"]["pressure"] = next(
        g.text for g in draft.givens if g.key == "pext"
    )
    state_step(draft, "2", model_of, {"p": "2.p", "h": "2.hh"}, "1")
    draft.claims = [claim for claim in draft.claims if claim.key != "2.p"]
    claim_state(draft, "2", "states/last/body", "tv", False)


def _free(draft: Draft, model_of: ModelOf, last: dict[str, str]) -> None:
    """Let the gas fill a larger volume; its energy stays."""
    if not any(given.key == "V" for given in draft.givens):
        unit = un.M3
        draft.step("1.V", ("m", "1.v"), lambda v: (v["m"] * v["1.v"],))
    else:
        unit = next(given.unit for given in draft.givens if given.key == "V")
        draft.step("1.V", ("V",), lambda v: (v["V"],))
    size = draft.peek("1.V") / unit.size
    last["volume"] = draft.given("2.V", "volume", draft.number(1.5 * size, 4.0 * size), unit)
    draft.step("2.v", ("2.V", "m"), lambda v: (v["2.V"] / v["m"],))
    state_step(draft, "2", model_of, {"u": "1.u", "v": "2.v"}, "1")
    claim_state(draft, "2", "states/last/body", "tp", False)


def _finish(draft: Draft, leg: Leg, process: dict[str, Any]) -> None:
    """Draw the boundary temperature now that the direction of heat is known."""
    if leg.wall is None:
        return
    direct_and_place(draft, leg, process)


def direct_and_place(draft: Draft, leg: Leg, process: dict[str, Any]) -> None:
    """Run the chain up to the heat, and place the wall above or below the body's temperatures accordingly."""
    values = {given.key: given.value for given in draft.givens}
    for step in draft.steps:
        if leg.wall in step.parents:
            break
        values.update(zip(step.outputs, step.function(values), strict=True))
    temperatures = (values[f"{leg.first}.t"], values[f"{leg.last}.t"])
    boundary(draft, leg, process, values[leg.key("qm")] > 0.0, max(temperatures), min(temperatures))
