"""Situations of liquids and solids of constant specific heat: heated with a loss, lifted and braked."""

from __future__ import annotations

import random
from typing import Any

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.draft import Draft, head_of
from tests.benchmarks.seeded.leg import GRAVITY, Leg
from tests.benchmarks.seeded.onebody import condensed, direct_and_place, skeleton
from tests.benchmarks.seeded.process import add_process
from tests.benchmarks.seeded.states import claim_state, state_step


def heated_store(rng: random.Random) -> Draft:
    """Make a store of liquid that an electrical heater warms; its heat loss is found."""
    draft = Draft(rng, "store heated electrically with a loss")
    head_of(draft)
    leg = Leg("change", "1", "2", "", wall="tb", electrical="el", exergy=False)
    skeleton(draft, None, leg, False)
    body, process = draft.tree["bodies"]["body"], draft.tree["processes"][0]
    model_of = condensed(draft, body, 1.8, 4.2, "store liquid")
    body["inputs"]["mass"] = draft.given("m", "mass", draft.number(50.0, 900.0), un.KG)
    states = draft.tree["states"]
    states["first"]["body"]["inputs"]["temperature"] = draft.temperature("1.t", 10.0, 25.0)
    states["last"]["body"]["inputs"]["temperature"] = draft.temperature("2.t", 45.0, 85.0)
    state_step(draft, "1", model_of, {"t": "1.t"})
    state_step(draft, "2", model_of, {"t": "2.t"}, "1")
    gain = draft.peek("m") * (draft.peek("2.u") - draft.peek("1.u"))
    item = process["work_transfers"][0]
    if rng.random() < 0.5:
        hours = draft.number(3.0, 9.0, 2)
        seconds = float(hours) * 3600.0
        power = draft.number(1.02 * gain / seconds / 1e3, 1.25 * gain / seconds / 1e3)
        watts = un.Unit("kW", 1e3)
        item["inputs"] = {
            "mean_power": draft.given("pw", "power", power, watts),
            "duration": draft.given("dt", "duration", hours, un.Unit("h", 3600.0)),
        }
        draft.step(
            "el",
            ("pw", "dt"),
            lambda v: (v["pw"] * v["dt"],),
            (("kWh and kJ mixed up", lambda v: (v["pw"] * v["dt"] / 3600.0,)),),
        )
        draft.notes["duration"] = "dt"
        draft.claimable(
            "el", "processes/change/work_transfers/heater/energy", "energy", un.MJ, "energy:change"
        )
    else:
        unit = un.fitting(gain, (un.KJ, un.MJ))
        number = draft.number(1.02 * gain / unit.size, 1.25 * gain / unit.size, 4)
        item["inputs"] = {"energy": draft.given("el", "energy", number, unit)}
    add_process(draft, leg, model_of)
    draft.claims = [
        claim
        for claim in draft.claims
        if claim.key != "change.w" or "pw" not in {g.key for g in draft.givens}
    ]
    direct_and_place(draft, leg, process)
    return draft


def heated_to(rng: random.Random) -> Draft:
    """Make a block heated by given heat and losing some: its last temperature is found."""
    draft = Draft(rng, "body heated by a given heat with a loss")
    head_of(draft)
    leg = Leg("change", "1", "2", "", wall="tb", heat="Q", loss="loss", loss_wall="tl", exergy=False)
    skeleton(draft, None, leg, False)
    body, process = draft.tree["bodies"]["body"], draft.tree["processes"][0]
    model_of = condensed(draft, body, 0.4, 1.2, "block")
    body["inputs"]["mass"] = draft.given("m", "mass", draft.number(5.0, 80.0), un.KG)
    states = draft.tree["states"]
    states["first"]["body"]["inputs"]["temperature"] = draft.temperature("1.t", 10.0, 60.0)
    size = draft.peek("m") * draft.peek("c") * rng.uniform(60.0, 200.0) / 1e3
    main, loss = process["heat_transfers"]
    main["inputs"] = {"energy": draft.given("Q", "energy", draft.number(0.9 * size, 1.1 * size, 4), un.KJ)}
    loss["inputs"] = {
        "energy": draft.given("loss", "energy", f"-{draft.number(0.05 * size, 0.2 * size)}", un.KJ)
    }
    state_step(draft, "1", model_of, {"t": "1.t"})
    draft.step(
        "2.uu",
        ("1.u", "Q", "loss", "m"),
        lambda v: (v["1.u"] + (v["Q"] + v["loss"]) / v["m"],),
        (
            ("heat loss omitted", lambda v: (v["1.u"] + v["Q"] / v["m"],)),
            ("heat sign reversed", lambda v: (v["1.u"] + (v["Q"] - v["loss"]) / v["m"],)),
        ),
    )
    state_step(draft, "2", model_of, {"u": "2.uu"})
    claim_state(draft, "2", "states/last/body", "t", False)
    add_process(draft, leg, model_of)
    loss["boundary_temperature"] = draft.temperature("tl", 33.0, 60.0, un.CELSIUS)
    direct_and_place(draft, leg, process)
    return draft


def moving_body(rng: random.Random) -> Draft:
    """Make a load that is moved and lifted, warmed a little by friction."""
    draft = Draft(rng, "moving and lifted body")
    head_of(draft)
    leg = Leg("change", "1", "2", "", wall="tb", motion=True, electrical="el", exergy=False)
    skeleton(draft, None, leg, False)
    body, process = draft.tree["bodies"]["body"], draft.tree["processes"][0]
    model_of = condensed(draft, body, 0.4, 0.9, "load")
    body["inputs"]["mass"] = draft.given("m", "mass", draft.number(100.0, 900.0), un.KG)
    states = draft.tree["states"]
    down = rng.random() < 0.5
    heights = (draft.number(20.0, 90.0), "0") if down else ("0", draft.number(20.0, 90.0))
    speeds = ("0", draft.number(2.0, 30.0)) if rng.random() < 0.5 else (draft.number(2.0, 30.0), "0")
    start = rng.uniform(15.0, 25.0)
    for state, name, height, speed, warm in zip(
        "12", ("first", "last"), heights, speeds, (0.0, 0.6), strict=True
    ):
        inputs = states[name]["body"]["inputs"]
        text = un.number_text(start + warm * rng.uniform(0.5, 2.0), 1)
        inputs["temperature"] = draft.given(f"{state}.t", "temperature", text, un.CELSIUS)
        inputs["velocity"] = draft.given(f"{state}.c", "velocity", speed, un.SPEED)
        inputs["elevation"] = draft.given(f"{state}.z", "elevation", height, un.METRE)
        state_step(draft, state, model_of, {"t": f"{state}.t"}, None if state == "1" else "1")
    _winch(draft, process)
    add_process(draft, leg, model_of)
    direct_and_place(draft, leg, process)
    _rename(draft)
    return draft


def _winch(draft: Draft, process: dict[str, Any]) -> None:
    """Draw the shaft work so that a part of the energy goes off as heat of friction."""
    rng = draft.rng
    m, a, b = draft.peek("m"), draft.peek("1.u"), draft.peek("2.u")
    at = {given.key: given.value for given in draft.givens}
    rise = m * (b - a + 0.5 * (at["2.c"] ** 2 - at["1.c"] ** 2) + GRAVITY * (at["2.z"] - at["1.z"]))
    out = -rise - rng.uniform(0.05, 0.4) * abs(rise)
    number = un.number_text(abs(out) / 1e3, max(un.decimals_for(out, un.KJ, 4), 0))
    item = process["work_transfers"][0]
    item.update(id="winch", kind="shaft", direction="out" if out > 0.0 else "in")
    if out > 0.0:
        item["inputs"] = {"energy": draft.given("rope", "energy", number, un.KJ)}
        draft.step("el", ("rope",), lambda v: (-v["rope"],))
    else:
        item["inputs"] = {"energy": draft.given("el", "energy", number, un.KJ)}


def _rename(draft: Draft) -> None:
    """Name the slips of work by what it is here: shaft work."""
    from dataclasses import replace

    draft.steps = [
        replace(
            step,
            slips=tuple(
                (k.replace("electrical work omitted", "shaft work omitted"), f) for k, f in step.slips
            ),
        )
        for step in draft.steps
    ]
