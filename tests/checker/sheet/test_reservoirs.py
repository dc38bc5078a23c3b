"""Finite reservoirs in a record: which of their quantities follows, and what is refused."""

from typing import Any

import pytest

from checker import review
from checker.findings import Outcome
from tests.checker.cases import case, compared, package

COIL = "processes/warming/heat_transfers/coil"


def load(last: str | None, coil: dict[str, Any], **process: Any) -> dict[str, Any]:
    """Return 100 kg of a load with c = 2.4 kJ/(kg·K), warmed from 20 °C through a coil."""
    end: dict[str, Any] = (
        {"inputs": {"temperature": last}} if last else {"results": {"temperature": "50.00 °C"}}
    )
    return {
        "id": "load",
        "title": "Load",
        "bodies": {
            "load": {
                "substance": "Load",
                "model": "constant specific heat",
                "inputs": {"mass": "100.0 kg", "specific_heat": "2.400 kJ/(kg·K)"},
            }
        },
        "states": {"cold": {"load": {"inputs": {"temperature": "20.00 °C"}}}, "warm": {"load": end}},
        "processes": [
            {
                "id": "warming",
                "from": "cold",
                "to": "warm",
                "heat_transfers": [{"id": "coil", "boundary_temperature": "system", **coil}],
                "work_transfers": [],
                **process,
            }
        ],
    }


def reservoir(start: str = "80.00 °C", end: str = "", capacity: str = "", **more: Any) -> dict[str, Any]:
    """Return what is stated of a reservoir; an empty text is left out."""
    stated = {
        "reservoir_temperature": start,
        "final_reservoir_temperature": end,
        "reservoir_heat_capacity": capacity,
    }
    return {**{name: text for name, text in stated.items() if text}, **more}


@pytest.mark.parametrize(("end", "outcome"), [("62.00 °C", Outcome.AGREES), ("65.00 °C", Outcome.WRONG)])
def test_a_surplus_end_temperature_is_held_against_heat_and_capacity(end, outcome):
    """7.2 MJ from 400 kJ/K at 80 °C leave 62 °C; an input that says otherwise is wrong."""
    coil = reservoir(end=end, capacity="400.0 kJ/K", inputs={"energy": "7200 kJ"})
    assert compared(case(load(None, coil)), f"{COIL}/final_reservoir_temperature").outcome is outcome


def test_inputs_may_stand_under_inputs():
    """What stands beside `inputs` may stand in it."""
    coil = {"inputs": reservoir(end="62.00 °C", capacity="400.0 kJ/K")}
    assert case(load(None, coil)).value("states/warm/load/temperature") == pytest.approx(323.15)


def test_a_wrong_end_temperature_is_the_origin_of_a_wrong_generation():
    """The generation with the surroundings carries the stated end of the reservoir on."""
    coil = reservoir(capacity="400.0 kJ/K", results={"final_reservoir_temperature": "71.00 °C"})
    results = {"entropy_generation_with_surroundings": "2.731 kJ/K"}
    found = {
        c.statement.term.name: c.standing.value
        for c in case(load("50.00 °C", coil, results=results)).compared
    }
    assert found["final_reservoir_temperature"] == "origin"


def test_a_reservoir_that_warms_while_it_gives_heat_has_no_capacity():
    """From 80 °C to 90 °C with heat given off: refused, and said by its own rule."""
    coil = reservoir(end="90.00 °C", results={"reservoir_heat_capacity": "720 kJ/K"})
    record = load("50.00 °C", coil)
    assert "warms while it gives heat" in case(record).why_not(f"{COIL}/reservoir_heat_capacity")
    assert "finite-reservoir-impossible" in [f.rule for f in review(package(record)).findings]


def test_a_reservoir_too_small_would_end_below_absolute_zero():
    """7.2 MJ from 10 kJ/K at 80 °C."""
    coil = reservoir(capacity="10.00 kJ/K", results={"final_reservoir_temperature": "20 °C"})
    assert "absolute zero" in case(load("50.00 °C", coil)).why_not(f"{COIL}/final_reservoir_temperature")


def test_a_reservoir_that_does_not_change_has_no_finite_capacity():
    """80 °C at both ends."""
    coil = reservoir(end="80.00 °C", results={"reservoir_heat_capacity": "720 kJ/K"})
    assert "not finite" in case(load("50.00 °C", coil)).why_not(f"{COIL}/reservoir_heat_capacity")


def crossed(record: dict[str, Any]) -> bool:
    """Say whether the review finds a finite reservoir impossible."""
    return "finite-reservoir-impossible" in [f.rule for f in review(package(record)).findings]


def test_heat_that_a_heater_finishes_crosses_nothing():
    """The reservoir ends at 44 °C and a heater takes the load on to 50 °C: nothing is impossible."""
    heater = {"id": "heater", "kind": "electrical", "direction": "in", "inputs": {"energy": "1200 kJ"}}
    record = load("50.00 °C", reservoir(capacity="166.7 kJ/K"), work_transfers=[heater])
    assert not crossed(record)


def test_a_second_source_finishes_as_well():
    """Two coils in sequence: the first may end colder than the load in the end."""
    second = {"id": "second", "boundary_temperature": "60.00 °C", "inputs": {"energy": "3600 kJ"}}
    record = load("50.00 °C", reservoir(capacity="100.0 kJ/K"))
    record["processes"][0]["heat_transfers"].append(second)
    assert not crossed(record)


@pytest.mark.parametrize(("boundary", "impossible"), [("43.00 °C", False), ("45.00 °C", True)])
def test_a_stated_boundary_is_held_against_the_end(boundary, impossible):
    """Beside a second source, only the stated place of crossing counts: 44 °C do not heat 45 °C."""
    coil = {**reservoir(capacity="100.0 kJ/K"), "boundary_temperature": boundary}
    record = load("50.00 °C", coil)
    record["processes"][0]["heat_transfers"].append(
        {"id": "second", "boundary_temperature": "60.00 °C", "inputs": {"energy": "3600 kJ"}}
    )
    assert crossed(record) is impossible


def test_a_reservoir_that_cools_what_ends_below_it():
    """Cooling from 20 °C to 5 °C with 400 kJ/K at 0 °C ends at 9 °C: hotter than what it cooled."""
    record = load("5.00 °C", reservoir("0.00 °C", capacity="400.0 kJ/K"))
    assert crossed(record)
    assert not crossed(load("5.00 °C", reservoir("-10.00 °C", capacity="400.0 kJ/K")))
