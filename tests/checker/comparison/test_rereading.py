"""What a wrong stated value is carried on to: its state read anew, or nothing at all."""

import math
from typing import Any

from checker.findings import Outcome, Standing
from tests.checker.cases import case, compared, gas_bottle

R, CV = 2.077, 3.116
"""Helium. [kJ/(kg·K)]"""


def vessels(pressure: str, **entropies: str) -> dict[str, Any]:
    """Return two vessels of helium at 300 K, 1 m³ at 9 bar and 1 m³ at 1 bar, that come to 5 bar."""
    gas = {"substance": "Helium", "model": "constant specific heat"}
    inputs = {"volume": "1.000 m³", "cv": f"{CV} kJ/(kg·K)", "gas_constant": f"{R} kJ/(kg·K)"}
    bodies = {name: {**gas, "inputs": inputs} for name in ("high", "low")}
    before = {
        name: {"inputs": {"temperature": "300.0 K", "pressure": p}}
        for name, p in (("high", "9.000 bar"), ("low", "1.000 bar"))
    }
    after = {"high": {"inputs": {}, "results": {"pressure": pressure}}, "low": {"inputs": {}}}
    return {
        "id": "vessels",
        "title": "Two vessels",
        "bodies": bodies,
        "states": {"before": before, "after": after},
        "processes": [
            {
                "id": "meeting",
                "from": "before",
                "to": "after",
                "insulated": True,
                "equilibrium": ["temperature", "pressure"],
                "heat_transfers": [],
                "work_transfers": [],
                "total_volume": {"bodies": ["high", "low"]},
                "bodies": {name: {"results": {"entropy_change": text}} for name, text in entropies.items()},
            }
        ],
    }


def changes(pressure: float) -> dict[str, str]:
    """Return the entropy changes of both bodies at 300 K to a pressure [bar]: −m·R·ln(p₂/p₁), m·R = p·V/T."""
    return {
        name: f"{-before * 100.0 / 300.0 * math.log(pressure / before):.4f} kJ/K"
        for name, before in (("high", 9.0), ("low", 1.0))
    }


def test_right_vessels_agree():
    """5 bar, and both entropy changes to it, hold."""
    found = case(vessels("5.000 bar", **changes(5.0)))
    assert {c.standing for c in found.compared} == {Standing.HOLDS}


def test_bodies_in_equilibrium_carry_one_wrong_pressure():
    """6 bar stated for one vessel: the entropies of both, read at 6 bar, follow from it."""
    found = case(vessels("6.000 bar", **changes(6.0)))
    assert compared(found, "states/after/high/pressure").standing is Standing.ORIGIN
    for body in ("high", "low"):
        c = compared(found, f"processes/meeting/bodies/{body}/entropy_change")
        assert (c.outcome, c.standing) == (Outcome.WRONG, Standing.INHERITED)
        assert c.inherits_from == ("states/after/high/pressure",)


def test_an_entropy_of_another_pressure_is_an_origin_of_its_own():
    """6 bar stated, and one entropy made with 7 bar: that one follows from nothing stated."""
    found = case(vessels("6.000 bar", **{**changes(6.0), "low": changes(7.0)["low"]}))
    assert compared(found, "processes/meeting/bodies/low/entropy_change").standing is Standing.ORIGIN


def weighed_bottle(mass: str, results: dict[str, str]) -> dict[str, Any]:
    """Return the helium bottle with its volume given and its mass stated: V = m·R·T/p = 0.124620 m³."""
    record = gas_bottle(results)
    gas = record["bodies"]["gas"]
    del gas["inputs"]["mass"]
    gas["inputs"]["volume"] = "0.124620 m³"
    gas["results"] = {"mass": mass}
    return record


ENERGY = "processes/warming/internal_energy_change"
EXERGY = "processes/warming/exergy_change"
EXERGY_OF = 41.16 - 293.15 * 0.1 * CV * math.log(4.0 / 3.0)
"""ΔU − T0·ΔS with ΔU = 41.16 kJ and ΔS of the right mass. [kJ]"""


def test_a_mass_only_written_wrongly_is_not_carried_on():
    """Mass stated as 0.2 kg and ΔU as 41.16 kJ; ΔX made from that ΔU and the right mass inherits from ΔU alone."""
    record = weighed_bottle(
        "0.2000 kg", {"internal_energy_change": "41.16 kJ", "exergy_change": f"{EXERGY_OF:.3f} kJ"}
    )
    found = case(record)
    assert compared(found, "bodies/gas/mass").standing is Standing.ORIGIN
    assert compared(found, ENERGY).standing is Standing.ORIGIN
    assert compared(found, EXERGY).standing is Standing.INHERITED
    assert compared(found, EXERGY).inherits_from == (ENERGY,)


def test_what_follows_with_no_value_left_out_is_an_origin():
    """An exergy that follows from neither mass is an origin of its own."""
    record = weighed_bottle(
        "0.2000 kg", {"internal_energy_change": "41.16 kJ", "exergy_change": f"{EXERGY_OF + 3.0:.3f} kJ"}
    )
    assert compared(case(record), EXERGY).standing is Standing.ORIGIN
