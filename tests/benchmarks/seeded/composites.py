"""Situations of several bodies: quenches, vessels that equalise, a store that melts."""

from __future__ import annotations

import math
import random
from typing import Any

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.chain import Function, Values
from tests.benchmarks.seeded.draft import Draft, head_of
from tests.benchmarks.seeded.equation import NoStateError
from tests.benchmarks.seeded.gases import Melting
from tests.benchmarks.seeded.onebody import CONSTANT_GASES

KJ_KGK = un.KJ_KGK
PLACES = {
    "hot": ("steel part", 0.46, 0.50),
    "bath": ("quench bath", 1.9, 4.2),
    "basket": ("steel basket", 0.45, 0.52),
}


def _process(draft: Draft, equilibrium: list[str]) -> dict[str, Any]:
    process: dict[str, Any] = {
        "id": "meeting",
        "from": "before",
        "to": "after",
        "insulated": True,
        "equilibrium": equilibrium,
        "heat_transfers": [],
        "work_transfers": [],
        "bodies": {},
        "results": {},
    }
    draft.tree = {"id": "trial", "bodies": {}, "states": {"before": {}, "after": {}}, "processes": [process]}
    return process


def _add_body(draft: Draft, name: str, substance: str, inputs: dict[str, str]) -> None:
    draft.tree["bodies"][name] = {
        "substance": substance,
        "model": "constant specific heat",
        "inputs": inputs,
        "results": {},
    }
    for state in ("before", "after"):
        draft.tree["states"][state][name] = {"inputs": {}, "results": {}}
    draft.tree["processes"][0]["bodies"][name] = {"results": {}}


def quench(rng: random.Random) -> Draft:
    """Make two or three bodies that come to one temperature in an insulated bath."""
    draft = Draft(rng, "bodies quenched")
    head_of(draft)
    _process(draft, ["temperature"])
    names = ("hot", "bath", "basket")[: rng.choice((2, 3))]
    for name in names:
        substance, low, high = PLACES[name]
        mass = draft.number(*((60.0, 300.0) if name == "bath" else (3.0, 30.0)))
        inputs = {
            "mass": draft.given(f"m:{name}", "mass", mass, un.KG),
            "specific_heat": draft.given(f"c:{name}", "specific heat", draft.number(low, high), KJ_KGK),
        }
        _add_body(draft, name, substance, inputs)
        ends = (250.0, 600.0) if name == "hot" else (15.0, 45.0)
        text = draft.temperature(f"1.t:{name}", *ends)
        draft.tree["states"]["before"][name]["inputs"]["temperature"] = text
    _meet(draft, names)
    for name in names:
        _body_balances(draft, name)
    _whole(draft, names)
    return draft


def _meet(draft: Draft, names: tuple[str, ...]) -> None:
    """Find the common temperature: the mean of the first ones by m·c."""

    def mixed(v: Values, which: tuple[str, ...], mass: bool = True) -> float:
        weights = [v[f"c:{name}"] * (v[f"m:{name}"] if mass else 1.0) for name in which]
        return sum(w * v[f"1.t:{name}"] for w, name in zip(weights, which, strict=True)) / sum(weights)

    slips: list[tuple[str, Function]] = [("mass left out", lambda v: (mixed(v, names, False),))]
    if len(names) == 3:
        slips.append(("second body forgotten", lambda v: (mixed(v, names[:2]),)))
    parents = [f"{what}:{name}" for name in names for what in ("m", "c", "1.t")]
    draft.step("2.t", parents, lambda v: (mixed(v, names),), slips)
    draft.claimable("2.t", f"states/after/{names[0]}/temperature", "temperature", un.CELSIUS)


def _body_balances(draft: Draft, name: str) -> None:
    m, c, t = f"m:{name}", f"c:{name}", f"1.t:{name}"

    def gain(v: Values) -> float:
        return v[m] * v[c] * (v["2.t"] - v[t])

    def rise(v: Values) -> float:
        return v[m] * v[c] * math.log(v["2.t"] / v[t])

    fahrenheit = any(given.key == t and given.unit is un.FAHRENHEIT for given in draft.givens)
    draft.step(
        f"du:{name}",
        (m, c, t, "2.t"),
        lambda v: (gain(v),),
        (
            ("states swapped", lambda v: (-gain(v),)),
            ("mass left out", lambda v: (gain(v) / v[m],)),
            ("mass applied twice", lambda v: (gain(v) * v[m],)),
            *((("Fahrenheit difference as kelvin", lambda v: (1.8 * gain(v),)),) if fahrenheit else ()),
        ),
    )
    draft.step(
        f"ds:{name}",
        (m, c, t, "2.t"),
        lambda v: (rise(v),),
        (
            ("decimal logarithm", lambda v: (rise(v) / math.log(10.0),)),
            ("ratio inverted", lambda v: (-rise(v),)),
            ("mass left out", lambda v: (rise(v) / v[m],)),
            (
                "Celsius in a ratio",
                lambda v: (v[m] * v[c] * math.log((v["2.t"] - 273.15) / (v[t] - 273.15)),),
            ),
            (
                "heat over mean temperature for the entropy change",
                lambda v: (gain(v) / (0.5 * (v[t] + v["2.t"])),),
            ),
        ),
    )
    base = f"processes/meeting/bodies/{name}"
    draft.claimable(f"du:{name}", f"{base}/internal_energy_change", "energy", un.KJ, "energy:meeting")
    draft.claimable(f"ds:{name}", f"{base}/entropy_change", "entropy", un.KJ_K, "entropy:meeting")


def _whole(draft: Draft, names: tuple[str, ...]) -> None:
    parts = [f"ds:{name}" for name in names]
    slips: list[tuple[str, Function]] = [
        ("second body forgotten", lambda v: (v[parts[0]],)),
        ("second body forgotten", lambda v: (v[parts[1]],)),
        ("entropy generation sign reversed", lambda v: (-sum(v[part] for part in parts),)),
    ]
    if len(parts) == 3:
        slips.append(("item missing from a sum", lambda v: (v[parts[0]] + v[parts[1]],)))
    draft.step("sg", parts, lambda v: (sum(v[part] for part in parts),), slips)
    draft.step("xd", ("t0", "sg"), lambda v: (v["t0"] * v["sg"],))
    draft.claimable("sg", "processes/meeting/entropy_generation", "entropy", un.KJ_K, "entropy:meeting")
    draft.claimable("xd", "processes/meeting/exergy_destruction", "energy", un.KJ, "energy:meeting")


def equalised(rng: random.Random) -> Draft:
    """Make two vessels of one gas that are joined and come to one temperature and pressure."""
    draft = Draft(rng, "two vessels equalised")
    head_of(draft)
    process = _process(draft, ["temperature", "pressure"])
    process["total_volume"] = {"bodies": ["high", "low"]}
    gas = rng.choice(("Helium", "test gas"))
    cv, r = CONSTANT_GASES[gas]
    for name, ends in (("high", (6.0, 15.0)), ("low", (1.0, 2.0))):
        inputs = {
            "volume": draft.given(f"V:{name}", "volume", draft.number(0.2, 1.5), un.M3),
            "specific_heat_at_constant_volume": f"{cv} {KJ_KGK.text}",
            "gas_constant": f"{r} {KJ_KGK.text}",
        }
        _add_body(draft, name, gas, inputs)
        given = draft.tree["states"]["before"][name]["inputs"]
        given["temperature"] = draft.temperature(f"1.t:{name}", 10.0, 60.0)
        given["pressure"] = draft.pressure(f"1.p:{name}", *ends)
    draft.given("cv", "shared", f"{cv}", KJ_KGK)
    draft.given("R", "shared", f"{r}", KJ_KGK)
    for name in ("high", "low"):
        _gas_mass(draft, name)
    _common(draft)
    for name in ("high", "low"):
        _gas_balances(draft, name)
    _generated(draft)
    return draft


def _gas_mass(draft: Draft, name: str) -> None:
    p, volume, t, key = f"1.p:{name}", f"V:{name}", f"1.t:{name}", f"m:{name}"
    slips = (
        ("Celsius in a ratio", lambda v: (v[p] * v[volume] / (v["R"] * (v[t] - 273.15)),)),
        ("universal for specific gas constant", lambda v: (v[p] * v[volume] / (8314.0 * v[t]),)),
    )
    parents = (p, volume, t, "R")
    draft.step(key, parents, lambda v: (v[p] * v[volume] / (v["R"] * v[t]),), slips)
    draft.claimable(key, f"bodies/{name}/mass", "mass", un.KG)


def _common(draft: Draft) -> None:
    keys = ("m:high", "m:low", "1.t:high", "1.t:low")

    def mixed(v: Values) -> float:
        a, b = v["m:high"], v["m:low"]
        return (a * v["1.t:high"] + b * v["1.t:low"]) / (a + b)

    draft.step(
        "2.t", keys, lambda v: (mixed(v),), (("mass left out", lambda v: (0.5 * (v[keys[2]] + v[keys[3]]),)),)
    )
    draft.step(
        "2.p",
        ("m:high", "m:low", "2.t", "V:high", "V:low", "R"),
        lambda v: ((v["m:high"] + v["m:low"]) * v["R"] * v["2.t"] / (v["V:high"] + v["V:low"]),),
        (
            (
                "second body forgotten",
                lambda v: (v["m:high"] * v["R"] * v["2.t"] / (v["V:high"] + v["V:low"]),),
            ),
        ),
    )
    draft.claimable("2.t", "states/after/high/temperature", "temperature", un.CELSIUS)
    draft.claimable("2.p", "states/after/high/pressure", "pressure", un.BAR)


def _gas_balances(draft: Draft, name: str) -> None:
    m, t, p = f"m:{name}", f"1.t:{name}", f"1.p:{name}"

    def terms(v: Values) -> tuple[float, float]:
        return math.log(v["2.t"] / v[t]), math.log(v["2.p"] / v[p])

    def change(v: Values) -> float:
        warm, pressed = terms(v)
        return v[m] * ((v["cv"] + v["R"]) * warm - v["R"] * pressed)

    draft.step(
        f"ds:{name}",
        (m, t, p, "2.t", "2.p", "cv", "R"),
        lambda v: (change(v),),
        (
            ("pressure term of the entropy omitted", lambda v: (v[m] * (v["cv"] + v["R"]) * terms(v)[0],)),
            ("temperature term of the entropy omitted", lambda v: (-v[m] * v["R"] * terms(v)[1],)),
            ("decimal logarithm", lambda v: (change(v) / math.log(10.0),)),
            ("states swapped", lambda v: (-change(v),)),
            ("mass left out", lambda v: (change(v) / v[m],)),
        ),
    )
    pointer = f"processes/meeting/bodies/{name}/entropy_change"
    draft.claimable(f"ds:{name}", pointer, "entropy", un.KJ_K, "entropy:meeting")


def _generated(draft: Draft) -> None:
    high, low = "ds:high", "ds:low"
    draft.step(
        "sg",
        (high, low),
        lambda v: (v[high] + v[low],),
        (
            ("second body forgotten", lambda v: (v[high],)),
            ("second body forgotten", lambda v: (v[low],)),
            ("entropy generation sign reversed", lambda v: (-v[high] - v[low],)),
        ),
    )
    draft.step("xd", ("t0", "sg"), lambda v: (v["t0"] * v["sg"],))
    draft.claimable("sg", "processes/meeting/entropy_generation", "entropy", un.KJ_K, "entropy:meeting")
    draft.claimable("xd", "processes/meeting/exergy_destruction", "energy", un.KJ, "energy:meeting")


def melted(rng: random.Random) -> Draft:
    """Make a store of wax that takes up given heat: it melts in part or as a whole."""
    draft = Draft(rng, "store that melts")
    head_of(draft)
    wax: dict[str, tuple[str, str, un.Unit]] = {
        "melting_temperature": ("tm", draft.number(44.0, 58.0), un.CELSIUS),
        "latent_heat": ("L", draft.number(150.0, 220.0), un.KJ_KG),
        "specific_heat_of_solid": ("cs", draft.number(1.9, 2.2), KJ_KGK),
        "specific_heat_of_liquid": ("cl", draft.number(2.1, 2.4), KJ_KGK),
    }
    inputs = {"mass": draft.given("m", "mass", draft.number(40.0, 300.0), un.KG)}
    for word, (key, number, unit) in wax.items():
        inputs[word] = draft.given(key, word.replace("_", " "), number, unit)
    start = draft.temperature("1.t", 15.0, 35.0)
    size = draft.peek("m") * draft.peek("L") / 1e6
    part = rng.uniform(0.3, 0.9) if rng.random() < 0.7 else rng.uniform(1.4, 1.7)
    heat = draft.given("Q", "energy", draft.number(0.97 * part * size, 1.03 * part * size, 4), un.MJ)
    wall = draft.temperature("tb", 95.0, 130.0, un.CELSIUS)
    draft.tree = {
        "id": "trial",
        "bodies": {
            "body": {"substance": "store wax", "model": "phase change", "inputs": inputs, "results": {}}
        },
        "states": {
            "before": {"body": {"inputs": {"temperature": start}}},
            "after": {"body": {"results": {}}},
        },
        "processes": [
            {
                "id": "charging",
                "from": "before",
                "to": "after",
                "heat_transfers": [{"id": "coil", "boundary_temperature": wall, "inputs": {"energy": heat}}],
                "work_transfers": [],
                "results": {},
            }
        ],
    }
    _melt(draft)
    return draft


def _melt(draft: Draft) -> None:
    def wax(v: Values, latent: bool = True) -> Melting:
        return Melting(v["tm"], v["L"] if latent else 1.0, v["cs"], v["cl"])

    def last(v: Values, latent: bool = True) -> tuple[float, float, float, float]:
        body = wax(v, latent)
        first = body.at(t=v["1.t"])
        found = body.at(u=first.u + v["Q"] / v["m"])
        return found.t, found.x, found.s - first.s, found.u - first.u

    def molten(v: Values) -> tuple[float, float, float, float]:
        outputs = last(v, latent=False)
        if outputs[1] < 1.0:
            raise NoStateError("does not pass the melting")
        return outputs

    parents = ("tm", "L", "cs", "cl", "1.t", "Q", "m")
    draft.step(("2.t", "2.x", "2.ds", "2.du"), parents, last, (("latent heat left out", molten),))
    draft.step(
        "du",
        ("m", "2.du"),
        lambda v: (v["m"] * v["2.du"],),
        (("states swapped", lambda v: (-v["m"] * v["2.du"],)),),
    )
    draft.step(
        "ds",
        ("m", "2.ds"),
        lambda v: (v["m"] * v["2.ds"],),
        (
            ("mass left out", lambda v: (v["2.ds"],)),
            (
                "heat over mean temperature for the entropy change",
                lambda v: (v["Q"] / (0.5 * (v["1.t"] + v["2.t"])),),
            ),
        ),
    )
    draft.step(
        "st",
        ("Q", "tb"),
        lambda v: (v["Q"] / v["tb"],),
        (
            (
                "mean temperature for the boundary temperature",
                lambda v: (v["Q"] / (0.5 * (v["1.t"] + v["2.t"])),),
            ),
            ("system temperature for the boundary temperature", lambda v: (v["Q"] / v["2.t"],)),
            ("system temperature for the boundary temperature", lambda v: (v["Q"] / v["1.t"],)),
            ("surroundings temperature for the boundary temperature", lambda v: (v["Q"] / v["t0"],)),
            ("heat sign reversed", lambda v: (-v["Q"] / v["tb"],)),
        ),
    )
    draft.step(
        "sg",
        ("ds", "st"),
        lambda v: (v["ds"] - v["st"],),
        (
            ("entropy transfer omitted", lambda v: (v["ds"],)),
            ("entropy transfer added", lambda v: (v["ds"] + v["st"],)),
            ("entropy generation sign reversed", lambda v: (v["st"] - v["ds"],)),
        ),
    )
    base = "processes/charging"
    draft.claimable("2.t", "states/after/body/temperature", "temperature", un.CELSIUS)
    draft.claimable("2.x", "states/after/body/melted_fraction", "quality", un.NONE, "quality")
    draft.claimable("du", f"{base}/internal_energy_change", "energy", un.MJ, "energy:charging")
    draft.claimable("ds", f"{base}/entropy_change", "entropy", un.KJ_K, "entropy:charging")
    draft.claimable("st", f"{base}/entropy_transfer", "entropy", un.KJ_K, "entropy:charging")
    draft.claimable("sg", f"{base}/entropy_generation", "entropy", un.KJ_K, "entropy:charging")
