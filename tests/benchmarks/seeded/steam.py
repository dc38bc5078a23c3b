"""Situations of a fluid with two phases: vessels, pistons, expansion; of a liquid; and of heat that is given."""

from __future__ import annotations

import random
from dataclasses import dataclass

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.draft import Draft, head_of
from tests.benchmarks.seeded.equation import NoStateError
from tests.benchmarks.seeded.fluids import RealFluid
from tests.benchmarks.seeded.leg import Leg
from tests.benchmarks.seeded.onebody import (
    Maker,
    direct_and_place,
    mass_or_volume,
    mass_step,
    real_fluid,
    skeleton,
)
from tests.benchmarks.seeded.process import add_process
from tests.benchmarks.seeded.states import ModelOf, claim_state, state_step


@dataclass(frozen=True)
class Wet:
    """A situation: fluid, path, range of the first temperature [°C], rise, what is known of the last state."""

    fluid: str
    path: str
    first: tuple[float, float]
    rise: tuple[float, float]
    known: str
    quality: tuple[float, float] = (0.05, 0.95)
    pressure: tuple[float, float] | None = None
    hard: bool = False


def wet_process(situation: str, wet: Wet) -> Maker:
    """Return the maker of a situation."""

    def make(rng: random.Random) -> Draft:
        draft = Draft(rng, situation, wet.hard)
        head_of(draft)
        adiabatic = wet.path == "isentropic"
        heat = "Q" if wet.known == "heat" else None
        reservoir = "tr" if not adiabatic and rng.random() < 0.6 else None
        leg = Leg(
            "change", "1", "2", wet.path, wall=None if adiabatic else "tb", reservoir=reservoir, heat=heat
        )
        volume = rng.random() < 0.5
        skeleton(draft, wet.path, leg, volume)
        body, process = draft.tree["bodies"]["body"], draft.tree["processes"][0]
        model_of = real_fluid(draft, body, wet.fluid)
        mass_or_volume(draft, body, 1.5, volume)
        _first(draft, wet, model_of)
        mass_step(draft, model_of)
        _last(draft, wet, leg, model_of)
        add_process(draft, leg, model_of)
        if not adiabatic:
            direct_and_place(draft, leg, process)
        return draft

    return make


def _first(draft: Draft, wet: Wet, model_of: ModelOf) -> None:
    inputs = draft.tree["states"]["first"]["body"]["inputs"]
    if wet.pressure is not None:
        inputs["temperature"] = draft.temperature("1.t", *wet.first)
        inputs["pressure"] = draft.pressure("1.p", *wet.pressure)
        pair = {"t": "1.t", "p": "1.p"}
    else:
        if draft.rng.random() < 0.5:
            inputs["temperature"] = draft.temperature("1.t", *wet.first)
            pair = {"t": "1.t", "x": "1.x"}
        else:
            fluid = RealFluid(wet.fluid)
            low, high = (fluid.at(t=t + 273.15, x=0.0).p / 1e5 for t in wet.first)
            inputs["pressure"] = draft.pressure("1.p", low, high)
            pair = {"p": "1.p", "x": "1.x"}
        inputs["quality"] = draft.given(
            "1.x", "quality", un.number_text(draft.rng.uniform(*wet.quality), 3), un.NONE
        )
    state_step(draft, "1", model_of, pair)
    claim_state(draft, "1", "states/first/body", "tpvush" if draft.rng.random() < 0.3 else "tpvus")


def _last(draft: Draft, wet: Wet, leg: Leg, model_of: ModelOf) -> None:
    inputs = draft.tree["states"]["last"]["body"]["inputs"]
    start = draft.peek("1.t") - 273.15
    fixed = {"constant volume": "v", "constant pressure": "p", "isentropic": "s"}[wet.path]
    pair = {fixed: f"1.{fixed}"}
    if wet.known == "t":
        inputs["temperature"] = draft.temperature("2.t", start + wet.rise[0], start + wet.rise[1])
        pair["t"] = "2.t"
    elif wet.known == "p":
        first = draft.peek("1.p") / 1e5
        inputs["pressure"] = draft.pressure("2.p", wet.rise[0] * first, wet.rise[1] * first)
        pair["p"] = "2.p"
    elif wet.known == "x":
        inputs["quality"] = draft.given(
            "2.x", "quality", un.number_text(draft.rng.uniform(*wet.rise), 3), un.NONE
        )
        pair["x"] = "2.x"
    else:
        _heated(draft, wet, leg, model_of, pair)
        return
    state_step(draft, "2", model_of, pair, "1")
    if fixed == "p" and "t" in pair and abs(draft.peek("2.p") / draft.peek("1.p") - 1.0) > 1e-6:
        raise NoStateError("pressure not kept")
    claim_state(draft, "2", "states/last/body", "tpvushx" if draft.rng.random() < 0.3 else "tpvusx")


def _heated(draft: Draft, wet: Wet, leg: Leg, model_of: ModelOf, pair: dict[str, str]) -> None:
    """Find the last state from the heat: u of a vessel, h under a piston."""
    size = draft.peek("m") * 1e3
    low, high = wet.rise
    unit = un.fitting(size * high, (un.KJ, un.MJ))
    number = draft.number(size * low / unit.size, size * high / unit.size, 4)
    draft.tree["processes"][0]["heat_transfers"][0]["inputs"] = {
        "energy": draft.given("Q", "energy", number, unit)
    }
    name = "u" if wet.path == "constant volume" else "h"
    slips = (
        ("heat sign reversed", lambda v: (v[f"1.{name}"] - v["Q"] / v["m"],)),
        ("mass left out", lambda v: (v[f"1.{name}"] + v["Q"],)),
    )
    draft.step(
        f"2.{name}{name}", (f"1.{name}", "Q", "m"), lambda v: (v[f"1.{name}"] + v["Q"] / v["m"],), slips
    )
    pair[name] = f"2.{name}{name}"
    state_step(draft, "2", model_of, pair, "1")
    claim_state(draft, "2", "states/last/body", "tpvusx")
    _ = leg


WET: dict[str, Wet] = {
    "wet steam in a closed vessel": Wet("Water", "constant volume", (80.0, 180.0), (-40.0, -10.0), "t"),
    "steam boiled in a closed vessel": Wet(
        "Water", "constant volume", (60.0, 120.0), (1.5, 3.0), "p", (0.01, 0.2)
    ),
    "wet steam under a piston": Wet(
        "Water", "constant pressure", (90.0, 180.0), (0.5, 0.99), "x", (0.05, 0.4)
    ),
    "steam superheated under a piston": Wet("Water", "constant pressure", (100.0, 180.0), (30.0, 200.0), "t"),
    "vessel with given heat": Wet(
        "Water", "constant volume", (90.0, 150.0), (100.0, 800.0), "heat", (0.05, 0.5)
    ),
    "piston with given heat": Wet(
        "Water", "constant pressure", (90.0, 170.0), (200.0, 2500.0), "heat", (0.02, 0.5)
    ),
    "steam expanded": Wet("Water", "isentropic", (250.0, 400.0), (0.1, 0.4), "p", pressure=(5.0, 25.0)),
    "water warmed under pressure": Wet(
        "Water", "constant pressure", (10.0, 40.0), (20.0, 45.0), "t", pressure=(2.0, 30.0)
    ),
    "water evaporated": Wet(
        "Water", "constant pressure", (20.0, 60.0), (180.0, 300.0), "t", pressure=(1.5, 8.0)
    ),
    "refrigerant vessel warmed": Wet(
        "R134a", "constant volume", (-10.0, 20.0), (30.0, 60.0), "t", (0.2, 0.8)
    ),
    "refrigerant compressed": Wet("R134a", "isentropic", (10.0, 40.0), (2.0, 4.0), "p", pressure=(1.0, 2.5)),
    "propane vessel warmed": Wet("Propane", "constant volume", (-10.0, 20.0), (20.0, 50.0), "t", (0.2, 0.8)),
    "steam near saturation": Wet(
        "Water", "constant volume", (100.0, 200.0), (1.0, 5.0), "t", (0.97, 0.999), hard=True
    ),
    "steam near the critical point": Wet(
        "Water", "constant volume", (340.0, 368.0), (5.0, 60.0), "t", (0.1, 0.6), hard=True
    ),
}
