"""One body's share of a process of several: its heat, its works, and the entropy that it generates, in closed form."""

from __future__ import annotations

import math
from copy import deepcopy
from typing import Any

import pytest

from tests.checker.cases import case
from tests.checker.records_of_several import jacketed, quench

GAS = {"mass": "1.0000 kg", "cv": "0.72000 kJ/(kg·K)", "gas_constant": "0.29000 kJ/(kg·K)"}
BLOCK = 5e3 * math.log(320.0 / 400.0)
BATH = 20e3 * math.log(320.0 / 300.0)


def share(body: str, name: str, process: str = "p") -> str:
    """Return the pointer of one body's share."""
    return f"processes/{process}/bodies/{body}/{name}"


def claiming(record: dict[str, Any], *bodies: str) -> dict[str, Any]:
    """Return a record that claims the share of entropy generation of some bodies: only what is asked for is found."""
    claim = {"results": {"entropy_generation": "0.0 kJ/K"}}
    record["processes"][0]["bodies"] = dict.fromkeys(bodies, claim)
    return record


def cylinder(**process: Any) -> dict[str, Any]:
    """Return two gases on both sides of a piston, both with known states: 300 K at 100 kPa, 400 K at 300 kPa."""
    gas = {"substance": "Purge gas", "model": "constant specific heat", "inputs": GAS}
    after = {"l": "360.00 K", "r": "420.00 K"}
    left = 0.29 * 300.0 / 100.0 - 0.05
    right = 0.29 * 400.0 / 300.0 + 0.05
    pressures = {"l": f"{0.29 * 360.0 / left:.9f} kPa", "r": f"{0.29 * 420.0 / right:.9f} kPa"}
    return {
        "id": "cylinder",
        "bodies": {"l": deepcopy(gas), "r": deepcopy(gas)},
        "states": {
            "a": {
                "l": {"inputs": {"temperature": "300.00 K", "pressure": "100.00 kPa"}},
                "r": {"inputs": {"temperature": "400.00 K", "pressure": "300.00 kPa"}},
            },
            "b": {n: {"inputs": {"temperature": after[n], "pressure": pressures[n]}} for n in "lr"},
        },
        "processes": [{"id": "p", "from": "a", "to": "b", "work_transfers": [], **process}],
    }


def test_heat_of_a_body_is_that_of_its_transfers():
    """Block and bath exchange 400 kJ: one gives, the other takes."""
    found = case(quench())
    assert found.value("processes/quenching/heat_transfers/into-bath/energy") == pytest.approx(4e5)
    assert found.value(share("block", "heat", "quenching")) == pytest.approx(-4e5)
    assert found.value(share("bath", "heat", "quenching")) == pytest.approx(4e5)


def test_heat_between_bodies_generates_the_sum_of_their_entropy_changes():
    """Nothing is generated within a body of one temperature; what passes between them generates all of it."""
    found = case(claiming(quench(), "block", "bath"))
    item = "processes/quenching/heat_transfers/into-bath/entropy_generation"
    assert found.value(item) == pytest.approx(BLOCK + BATH)
    for body in ("block", "bath"):
        assert found.value(share(body, "entropy_generation", "quenching")) == pytest.approx(0.0, abs=1e-9)


def test_heat_of_no_body_leaves_the_shares_of_generation_open():
    """A jacket that may meet block and bath tells neither's share, though the total follows."""
    found = case(claiming(jacketed(), "bath"))
    assert found.value("processes/quenching/entropy_generation") is not None
    assert found.value(share("bath", "entropy_generation", "quenching")) is None


def test_a_share_of_generation_is_the_change_less_what_crosses_at_the_wall():
    """Each body with heat through a wall of its own generates ΔS − Q/T_b, and both make up the total."""
    record = cylinder(
        path=dict.fromkeys("lr", "constant volume"),
        heat_transfers=[
            {"id": "lw", "body": "l", "boundary_temperature": "500.00 K"},
            {"id": "rw", "body": "r", "boundary_temperature": "600.00 K"},
        ],
    )
    record["states"]["b"] = {
        "l": {"inputs": {"temperature": "360.00 K"}},
        "r": {"inputs": {"temperature": "420.00 K"}},
    }
    both = case(claiming(record, "l", "r"))
    left = 720.0 * math.log(360.0 / 300.0) - 720.0 * 60.0 / 500.0
    right = 720.0 * math.log(420.0 / 400.0) - 720.0 * 20.0 / 600.0
    assert both.value(share("l", "entropy_generation")) == pytest.approx(left, rel=1e-9)
    assert both.value(share("r", "entropy_generation")) == pytest.approx(right, rel=1e-9)
    assert both.value("processes/p/entropy_generation") == pytest.approx(left + right, rel=1e-9)


def test_a_body_without_heat_generates_its_change_of_entropy():
    """Behind an adiabatic path all of ΔS is generated, and the boundary work is what the energy loses."""
    wall = {"id": "w", "body": "r", "boundary_temperature": "900.00 K"}
    record = cylinder(
        path={"l": "adiabatic", "r": "end states only"},
        heat_transfers=[wall],
        total_volume={"bodies": ["l", "r"]},
    )
    found = case(claiming(record, "l"))
    change = found.value(share("l", "entropy_change"))
    assert change is not None
    assert found.value(share("l", "entropy_generation")) == pytest.approx(change, rel=1e-12)
    assert found.value(share("l", "boundary_work")) == pytest.approx(-720.0 * 60.0, rel=1e-9)
    assert found.value(share("r", "boundary_work")) == pytest.approx(720.0 * 60.0, rel=1e-9)
    assert found.value(share("r", "heat")) == pytest.approx(720.0 * (20.0 + 60.0), rel=1e-9)


def test_boundary_work_inside_a_fixed_volume_follows_from_a_known_heat():
    """W_b = Q − ΔE of the body whose heat is given; the other one takes it up."""
    walls = [
        {"id": "lw", "body": "l", "boundary_temperature": "500.00 K", "inputs": {"energy": "10.000 kJ"}},
        {"id": "rw", "body": "r", "boundary_temperature": "900.00 K"},
    ]
    paths = dict.fromkeys("lr", "end states only")
    found = case(cylinder(path=paths, heat_transfers=walls, total_volume={"bodies": ["l", "r"]}))
    work = 10e3 - 720.0 * 60.0
    assert found.value(share("l", "boundary_work")) == pytest.approx(work, rel=1e-9)
    assert found.value(share("r", "boundary_work")) == pytest.approx(-work, rel=1e-9)
    assert found.value("processes/p/boundary_work") == pytest.approx(0.0, abs=1e-9)
