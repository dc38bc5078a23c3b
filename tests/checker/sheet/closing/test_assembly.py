"""Whole records of several bodies: what is counted, closed, and said where it cannot be."""

from __future__ import annotations

from typing import Any

import pytest

from tests.checker.cases import case

GAS = {"mass": "1.0000 kg", "cv": "0.72000 kJ/(kg·K)", "gas_constant": "0.29000 kJ/(kg·K)"}


def bodies_of(*names: str) -> dict[str, Any]:
    """Return gases of constant specific heats; a name that begins with s is a solid."""
    gas = {"substance": "Purge gas", "model": "constant specific heat", "inputs": GAS}
    solid = {**gas, "inputs": {"mass": "2.0000 kg", "specific_heat": "0.50000 kJ/(kg·K)"}}
    return {name: solid if name.startswith("s") else gas for name in names}


def record(names: tuple[str, ...], first: list[dict[str, str]], **process: Any) -> dict[str, Any]:
    """Return bodies with first states and open last ones."""
    claim = {"results": {"temperature": "300.0 K"}}
    return {
        "id": "several",
        "bodies": bodies_of(*names),
        "states": {
            "a": {name: {"inputs": known} for name, known in zip(names, first, strict=True)},
            "b": dict.fromkeys(names, claim),
        },
        "processes": [{"id": "p", "from": "a", "to": "b", "work_transfers": [], **process}],
    }


LEFT = {"temperature": "300.00 K", "pressure": "100.00 kPa"}
RIGHT = {"temperature": "400.00 K", "pressure": "300.00 kPa"}


def test_equal_pressure_is_not_equal_temperature():
    """Behind a piston that lets no heat through, both gases keep temperatures of their own."""
    found = case(
        record(
            ("l", "r"),
            [LEFT, RIGHT],
            path={"l": "isentropic"},
            equilibrium=["pressure"],
            total_volume={"bodies": ["l", "r"]},
            insulated=True,
        )
    )
    left, right = (found.value(f"states/b/{name}/temperature") for name in "lr")
    assert left is not None
    assert right is not None
    assert left + right == pytest.approx(700.0, rel=1e-8)
    assert left > 330.0
    pressures = [found.value(f"states/b/{name}/pressure") for name in "lr"]
    assert pressures[0] == pytest.approx(pressures[1], rel=1e-8)


def test_a_solid_has_no_pressure_to_share():
    """A solid among gases in equilibrium of temperature and pressure keeps none of them from being found."""
    found = case(
        record(
            ("l", "r", "solid"),
            [LEFT, RIGHT, {"temperature": "350.00 K"}],
            equilibrium=["temperature", "pressure"],
            total_volume={"bodies": ["l", "r"]},
            insulated=True,
        )
    )
    end = (0.72 * 700.0 + 350.0) / 2.44
    assert found.value("states/b/solid/temperature") == pytest.approx(end, rel=1e-8)
    volume = 0.29 * (300.0 / 100.0 + 400.0 / 300.0)
    assert found.value("states/b/r/pressure") == pytest.approx(2e3 * 0.29 * end / volume, rel=1e-8)


def test_what_is_missing_is_counted():
    """Without an equilibrium two temperatures stand against one balance, and both are named."""
    found = case(record(("sa", "sb"), [{"temperature": "300 K"}, {"temperature": "400 K"}], insulated=True))
    reason = found.why_not("states/b/sa/temperature")
    assert "2 unknowns" in reason
    assert "1 equation " in reason
    assert "T of sa in b, T of sb in b" in reason


def test_digits_that_reach_across_the_saturation_line_are_not_smuggled_in():
    """T and p that cannot tell water from steam are one clue, not two, also where a block is closed."""
    water = {"substance": "Water", "model": "real fluid", "inputs": {"mass": "1.000 kg"}}
    found = record(
        ("w", "solid"),
        [{"temperature": "100 °C", "pressure": "101 kPa"}, {"temperature": "350 K"}],
        path={"w": "constant pressure"},
        equilibrium=["temperature"],
        insulated=True,
    )
    found["bodies"]["w"] = water
    assert case(found).value("states/b/w/temperature") is None
