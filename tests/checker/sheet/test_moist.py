"""Records of moist air: where the water content comes from, and what a state of it compares."""

from __future__ import annotations

from typing import Any

import pytest

from checker.findings import Outcome
from tests.checker.cases import case, compared


def vessel(warm: dict[str, str], cold: dict[str, str] | None = None, **body: Any) -> dict[str, Any]:
    """Return a record: a closed vessel of moist air, cooled to 5 °C."""
    stated = {"substance": "moist air", "model": "ideal gas", "inputs": {"volume": "2.000 m³"}, **body}
    return {
        "id": "vessel",
        "title": "Moist air cooled in a closed vessel",
        "bodies": {"air": stated},
        "states": {
            "warm": {"air": {"inputs": {"temperature": "30.0 °C", "pressure": "1.0130 bar", **warm}}},
            "cold": {"air": {"inputs": {"temperature": "5.0 °C"}, "results": cold or {}}},
        },
        "processes": [
            {
                "id": "cooling",
                "from": "warm",
                "to": "cold",
                "path": "constant volume",
                "heat_transfers": [{"id": "wall", "boundary_temperature": "2.0 °C"}],
                "work_transfers": [],
                "results": {"heat": "-74.4 kJ"},
            }
        ],
    }


COLD = {"pressure": "0.9207 bar", "relative_humidity": "100 %", "humidity_ratio": "0.00595"}
"""By hand: p_a = (1.013 bar − 0.45·0.04247 bar)·278.15/303.15, p = p_a + 0.00872 bar, W = 0.622·0.00872 bar/p_a."""


def test_relative_humidity_gives_the_water_content_and_later_states_keep_it() -> None:
    """From 30 °C and 45 % the water content is 0.0120; at 5 °C the vapour is saturated and the rest has condensed."""
    found = case(vessel({"relative_humidity": "45.0 %"}, COLD, results={"water_content": "0.0120"}))
    assert found.values["bodies/air/water_content"] == pytest.approx(0.01197, rel=1e-3)
    for pointer in ("bodies/air/water_content", "processes/cooling/heat"):
        assert compared(found, pointer).outcome is Outcome.AGREES
    for name in COLD:
        assert compared(found, f"states/cold/air/{name}").outcome is Outcome.AGREES, name


def test_the_mass_is_that_of_air_and_water() -> None:
    """M = V/v, v per unit mass of both: 2.284 kg of dry air by p_a·V/(R·T), and 0.012 of that in water."""
    found = case(vessel({"humidity_ratio": "0.0120"}, results={"mass": "2.312 kg"}))
    assert compared(found, "bodies/air/mass").outcome is Outcome.AGREES
    assert found.values["bodies/air/water_content"] == 0.0120


def test_a_stated_water_content_counts_before_any_humidity() -> None:
    """The humidity of a state is then compared with what follows from the water content."""
    inputs = {"volume": "2.000 m³", "water_content": "0.0120"}
    found = case(vessel({"relative_humidity": "60.0 %"}, inputs=inputs))
    assert found.values["bodies/air/water_content"] == 0.0120
    assert compared(found, "states/warm/air/relative_humidity").outcome is Outcome.WRONG


def test_a_wrong_water_content_is_where_later_deviations_start() -> None:
    """A humidity ratio made from a wrong water content inherits the deviation."""
    record = vessel({"relative_humidity": "45.0 %"}, results={"water_content": "0.0200"})
    record["states"]["warm"]["air"]["results"] = {"humidity_ratio": "0.0200"}
    found = case(record)
    assert compared(found, "bodies/air/water_content").outcome is Outcome.WRONG
    assert compared(found, "states/warm/air/humidity_ratio").inherits_from == ("bodies/air/water_content",)


def test_a_humidity_that_cannot_be_leaves_the_body_out_and_says_why() -> None:
    """Relative humidity above 1 is no state of moist air in equilibrium."""
    found = case(vessel({"relative_humidity": "140 %"}))
    assert "air" not in found.plan.substances
    reason = compared(found, "processes/cooling/heat").reason
    assert "not between 0 and 1" in reason


def test_without_any_humidity_it_says_what_is_missing() -> None:
    """The reason asks for the water content or a state with its humidity."""
    found = case(vessel({}))
    assert "needs its water content" in compared(found, "processes/cooling/heat").reason


def test_the_step_reads_as_an_engineer_writes_it() -> None:
    """The sheet shows how the water content follows from temperature, pressure and relative humidity."""
    found = case(vessel({"relative_humidity": "45.0 %"}))
    step = found.plan.sheet.made_by["bodies/air/water_content"]
    assert step.title == "Water content of air, from state warm"
    assert "p_w = φ·p_s(T)" in step.formula


def test_the_last_digit_of_saturation_reaches_no_supersaturation() -> None:
    """A stated 100 % can only be less by its last digit, so the mass (2.291 kg by hand) keeps a tolerance."""
    found = case(vessel({"relative_humidity": "100 %"}, results={"mass": "2.291 kg"}))
    mass = compared(found, "bodies/air/mass")
    assert mass.outcome is Outcome.AGREES
    assert mass.tolerance == pytest.approx(0.005 * 2.3, rel=0.1)


def test_states_of_moist_air_say_that_their_humidity_was_found() -> None:
    """The formula of a state lists φ and W, and no quality."""
    found = case(vessel({"relative_humidity": "45.0 %"}))
    assert found.plan.sheet.made_by["states/warm/air/temperature"].formula == "v, u, h, s, φ, W = f(T, p)"


def test_a_given_humidity_of_a_later_state_is_where_it_is_reached() -> None:
    """Cooled at constant volume until φ = 1: the dew point, 16.04 °C by p_s(T)/T = 0.45·p_s(30 °C)/303.15 K."""
    record = vessel({"relative_humidity": "45.0 %"})
    record["states"]["cold"]["air"] = {
        "inputs": {"relative_humidity": "100 %"},
        "results": {"temperature": "16.04 °C", "humidity_ratio": "0.01197"},
    }
    found = case(record)
    assert compared(found, "states/cold/air/temperature").outcome is Outcome.AGREES
    assert compared(found, "states/cold/air/humidity_ratio").outcome is Outcome.AGREES


def test_moist_air_of_constant_specific_heat_needs_no_water_content() -> None:
    """A gas by its constants is calculated as such, whatever humidity is noted beside it."""
    inputs = {"volume": "2.000 m³", "cv": "0.730 kJ/(kg·K)", "gas_constant": "0.289 kJ/(kg·K)"}
    found = case(vessel({"relative_humidity": "140 %"}, model="constant specific heat", inputs=inputs))
    assert "bodies/air/water_content" not in found.values
    assert isinstance(found.values["processes/cooling/heat"], float)
