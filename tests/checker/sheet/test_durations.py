"""How long a process takes, and which place heat goes to where none is stated."""

from typing import Any

import pytest

from checker.findings import Outcome
from tests.checker.cases import case, compared, gas_bottle


def heated_by(power: str, **results: Any) -> dict[str, Any]:
    """Return the helium bottle heated by a heater of given power, which takes 31.16 kJ."""
    record = gas_bottle()
    heater = {"id": "heater", "kind": "electrical", "direction": "in", "inputs": {"mean_power": power}}
    heater["results"] = results.pop("item", {})
    record["processes"][0].update(heat_transfers=[], work_transfers=[heater], results=results)
    return record


@pytest.mark.parametrize(("text", "outcome"), [("311.6 s", Outcome.AGREES), ("320.0 s", Outcome.WRONG)])
def test_the_power_of_a_heater_tells_how_long_it_takes(text, outcome):
    """31.16 kJ at 100 W take 311.6 s, said of the process or of the heater."""
    found = case(heated_by("100.0 W", duration=text, item={"duration": text}))
    assert compared(found, "processes/warming/duration").outcome is outcome
    assert compared(found, "processes/warming/work_transfers/heater/duration").outcome is outcome


@pytest.mark.parametrize(("boundary", "known"), [("298.0 K", True), ("297.0 K", False)])
def test_heat_that_leaves_at_298_kelvin_meets_surroundings_of_25_celsius(boundary, known):
    """Both are written for one place; heat that leaves at 297 K cannot go to 25 °C."""
    record = gas_bottle({"entropy_generation_with_surroundings": "0.0300 kJ/K"})
    states = record["states"]
    states["hot"]["gas"]["inputs"], states["cold"]["gas"]["inputs"] = (
        {"temperature": "300.0 K"},
        {"temperature": "400.0 K", "pressure": "5.000 bar"},
    )
    record["processes"][0]["heat_transfers"] = [{"id": "wall", "boundary_temperature": boundary}]
    record["surroundings"] = {"temperature": "25 °C", "pressure": "1.013 bar"}
    found = case(record).value("processes/warming/entropy_generation_with_surroundings")
    assert (found is not None) is known
