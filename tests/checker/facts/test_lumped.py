"""A neglected wall, in closed form: helium of 311.6 J/K warmed by 100 K beside a wall of 92 J/K."""

from __future__ import annotations

from typing import Any

import pytest

from checker.facts.lumped import temperature_change, wall
from tests.checker.cases import case, gas_bottle


def _bottle(heat: str | None = None, **inputs: str) -> Any:
    """Return the bottle's case: its end temperature is given, or the heat in its place."""
    given = {"mass": "0.200 kg", "specific_heat": "0.460 kJ/(kg·K)", **inputs}
    text = {"id": "wall", "text": "wall heat capacity negligible", "inputs": given}
    record = gas_bottle({} if heat else {"heat": "31.16 kJ"}, assumptions=[text])
    if heat:
        record["states"]["hot"]["gas"]["inputs"] = {}
        record["processes"][0]["heat_transfers"][0]["inputs"] = {"energy": heat}
    return case(record)


def test_a_wall_follows_the_only_body() -> None:
    """Without a temperature change of its own it warms by the 100 K of the gas, and takes up 9.2 kJ."""
    found = wall(_bottle(), "wall")
    assert found is not None
    assert found.heat == pytest.approx(9200.0)
    assert found.pointer == "processes/warming/heat"
    assert (found.without, found.with_wall) == (pytest.approx(31160.0), pytest.approx(40360.0))


def test_a_stated_change_of_the_wall_is_taken() -> None:
    """A wall that warms by 40 K takes up 3.68 kJ."""
    found = wall(_bottle(temperature_change="40.0 K"), "wall")
    assert found is not None
    assert found.heat == pytest.approx(3680.0)


def test_given_heat_warms_gas_and_wall_less() -> None:
    """31.16 kJ into 311.6 J/K + 92 J/K: 77.2 K."""
    found = wall(_bottle("31.16 kJ"), "wall")
    assert found is not None
    assert found.pointer == "states/hot/gas/temperature"
    assert found.with_wall == pytest.approx(300.0 + 31160.0 / 403.6, rel=1e-9)


def test_heat_taken_out_cools_gas_and_wall_less() -> None:
    """−15.58 kJ: 50 K for the gas alone, 38.6 K with the wall."""
    found = wall(_bottle("-15.58 kJ"), "wall")
    assert found is not None
    assert found.without == pytest.approx(250.0, rel=1e-9)
    assert found.with_wall == pytest.approx(300.0 - 15580.0 / 403.6, rel=1e-9)


def test_a_wall_without_a_mass_is_not_known() -> None:
    """Nothing is made up where an input of the check is missing."""
    record = gas_bottle(
        assumptions=[{"id": "wall", "text": "wall neglected", "inputs": {"specific_heat": "0.460 kJ/(kg·K)"}}]
    )
    assert wall(case(record), "wall") is None


def test_a_process_without_an_end_has_no_change() -> None:
    """An unknown process has no temperature change."""
    assert temperature_change(_bottle(), "nowhere") is None
