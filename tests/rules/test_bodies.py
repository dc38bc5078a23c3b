"""Several bodies: what is right about them stays unquestioned, and what is wrong is found where it stands."""

from __future__ import annotations

import math
from typing import Any

from checker import review
from tests.checker.cases import package

END = (5.0 * 400.0 + 200.0 * 300.0) / 205.0
"""Temperature of a block of 5 kJ/K from 400 K in a bath of 200 kJ/K from 300 K. [K]"""


def quench(**changes: Any) -> dict[str, Any]:
    """Return a block in an insulated bath, the heat between them given."""
    heat = 5.0 * (400.0 - END)

    def body(mass: str, heat_capacity: str) -> dict[str, Any]:
        inputs = {"mass": mass, "specific_heat": heat_capacity}
        return {"substance": "Block", "model": "constant specific heat", "inputs": inputs}

    process = {
        "id": "dip",
        "from": "before",
        "to": "after",
        "insulated": True,
        "heat_transfers": [
            {"id": "skin", "from": "block", "to": "bath", "inputs": {"energy": f"{heat:.5f} kJ"}}
        ],
        "work_transfers": [],
        "results": {
            "internal_energy_change": "0.00 kJ",
            "entropy_generation": f"{5.0 * math.log(END / 400.0) + 200.0 * math.log(END / 300.0):.5f} kJ/K",
        },
        **changes,
    }
    after = {"results": {"temperature": f"{END:.3f} K"}}
    return {
        "id": "quench",
        "bodies": {
            "block": body("10.000 kg", "0.50000 kJ/(kg·K)"),
            "bath": body("100.00 kg", "2.0000 kJ/(kg·K)"),
        },
        "states": {
            "before": {
                "block": {"inputs": {"temperature": "400.00 K"}},
                "bath": {"inputs": {"temperature": "300.00 K"}},
            },
            "after": {"block": after, "bath": after},
        },
        "processes": [process],
    }


def rules_of(record: dict[str, Any]) -> list[str]:
    """Return the names of the rules that a package with this record offends, remarks apart."""
    found = review(package(record), name="trial").findings
    return sorted(f.rule for f in found if f.grade.value != "remark")


def test_heat_between_bodies_may_pass_inside_an_insulated_system():
    """Insulation keeps heat from crossing the boundary of the whole; what passes inside is no part of it."""
    assert rules_of(quench()) == []


def test_shares_of_generation_do_not_make_up_the_total():
    """Each body generates nothing, the heat between them does: the total is no sum of the shares."""
    nothing = {"results": {"entropy_generation": "0.0000 kJ/K"}}
    found = rules_of(quench(bodies={"block": nothing, "bath": nothing}))
    assert "totals-do-not-add-up" not in found


def test_heat_does_not_meet_a_body_on_an_adiabatic_path():
    """A heat transfer that names a body whose own path has no heat contradicts it."""
    assert "adiabatic-with-heat" in rules_of(quench(path={"block": "adiabatic", "bath": "end states only"}))


def test_uphill_heat_that_a_heat_pump_may_carry_is_not_accused():
    """Work that names no body may be that of a machine between the two: only without it the heat is impossible."""
    uphill = [{"id": "skin", "from": "bath", "to": "block", "inputs": {"energy": "100.00 kJ"}}]
    pumped = [{"id": "pump", "kind": "shaft", "direction": "in", "inputs": {"energy": "100.00 kJ"}}]
    assert "heat-between-bodies-uphill" in rules_of(quench(heat_transfers=uphill, results={}))
    found = rules_of(quench(heat_transfers=uphill, work_transfers=pumped, results={}))
    assert "heat-between-bodies-uphill" not in found


def uphill(bath: str, *walls: dict[str, Any]) -> dict[str, Any]:
    """Return a block of 350 K that gives 40 kJ to a hotter bath, which may take more through walls."""
    record = quench(
        heat_transfers=[
            {"id": "skin", "from": "block", "to": "bath", "inputs": {"energy": "40.000 kJ"}},
            *walls,
        ],
        results={"entropy_change": "0.0 kJ/K"},
    )
    del record["processes"][0]["insulated"], record["processes"][0]["results"]
    record["bodies"]["bath"]["inputs"]["mass"] = "20.000 kg"
    for state, block, own in (("before", "350.00 K", "360.00 K"), ("after", "342.00 K", bath)):
        record["states"][state] = {
            "block": {"inputs": {"temperature": block}},
            "bath": {"inputs": {"temperature": own}},
        }
    return record


def test_heat_uphill_is_one_finding():
    """That it destroys entropy in the sum over the bodies is not said again."""
    assert "generation-negative" not in rules_of(uphill("361.00 K"))
    assert rules_of(uphill("361.00 K")).count("heat-between-bodies-uphill") == 1


def test_what_else_destroys_entropy_stays_a_finding_of_its_own():
    """Heat that enters at a wall colder than the bath is wrong also without the heat between the bodies."""
    wall = {
        "id": "wall",
        "body": "bath",
        "boundary_temperature": "250.00 K",
        "inputs": {"energy": "80.000 kJ"},
    }
    found = rules_of(uphill("363.00 K", wall))
    assert {"generation-negative", "heat-between-bodies-uphill"} <= set(found)


def filling(*assumptions: dict[str, str]) -> dict[str, Any]:
    """Return two parcels of gas from one bottle of 60.9 L that fill it and an empty vessel, 100 L together."""
    gas = {"substance": "Purge gas", "model": "constant specific heat"}
    inputs = {"cv": "0.72000 kJ/(kg·K)", "gas_constant": "0.29000 kJ/(kg·K)"}
    shut = {"inputs": {"temperature": "300.00 K", "pressure": "2000.0 kPa"}}
    return {
        "id": "r",
        "title": "Bottle joined to an empty vessel",
        "bodies": {
            "stayed": {**gas, "inputs": {**inputs, "mass": "0.90000 kg"}},
            "passed": {**gas, "inputs": {**inputs, "mass": "0.50000 kg"}},
        },
        "states": {
            "shut": {"stayed": shut, "passed": shut},
            # The energy of a perfect gas is p·V·c_v/R, whatever the temperatures: p₂ = m·R·T₁/V.
            "open": {"stayed": {"results": {"pressure": "1218.0 kPa"}}, "passed": {}},
        },
        "processes": [
            {
                "id": "filling",
                "from": "shut",
                "to": "open",
                "path": {"stayed": "isentropic"},
                "insulated": "true",
                "equilibrium": ["pressure"],
                "total_volume": {"bodies": ["stayed", "passed"], "inputs": {"volume": "0.10000 m³"}},
                "heat_transfers": [],
                "work_transfers": [],
            }
        ],
        "assumptions": list(assumptions),
    }


def test_a_volume_that_is_filled_in_part_needs_the_word_that_the_rest_is_evacuated():
    """Without it the bodies do not add up to the volume; with it the package stands as it is."""
    assert "shared-volume-contradicted" in rules_of(filling())
    assert rules_of(filling({"id": "empty", "text": "Rest of the volume evacuated."})) == []
