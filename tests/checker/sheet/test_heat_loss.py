"""Losses by UA·ΔT in a record: what follows from what, what does not, and how it is told."""

from typing import Any

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from checker import review
from checker.findings import Outcome, Standing
from tests.checker.cases import case, compared, package


def tank(last: str | None = "60.00 °C", **process: Any) -> dict[str, Any]:
    """Return 300 kg of water with c = 4.186 kJ/(kg·K) that warm from 15 °C by 3 kW and lose 3.5 W/K to 20 °C.

    It takes 5.3428 h; 1.1916 MJ are lost and 57.703 MJ used.
    """
    shell = {"id": "shell", "boundary_temperature": "system", "heat_loss_coefficient": "3.500 W/K"}
    shell["results"] = process.pop("lost", {})
    heater = {"id": "heater", "kind": "electrical", "direction": "in"}
    heater |= {
        "inputs": process.pop("heater", {"mean_power": "3.000 kW"}),
        "results": process.pop("used", {}),
    }
    end: dict[str, Any] = (
        {"results": {"temperature": "60.00 °C"}} if last is None else {"inputs": {"temperature": last}}
    )
    return {
        "id": "tank",
        "title": "Buffer tank",
        "bodies": {
            "store": {
                "substance": "Store water",
                "model": "constant specific heat",
                "inputs": {"mass": "300.0 kg", "specific_heat": "4.186 kJ/(kg·K)"},
            }
        },
        "states": {"cold": {"store": {"inputs": {"temperature": "15.00 °C"}}}, "hot": {"store": end}},
        "processes": [
            {
                "id": "heating",
                "from": "cold",
                "to": "hot",
                "heat_transfers": [shell, *process.pop("heats", [])],
                "work_transfers": [heater],
                **process,
            }
        ],
    }


BASE = "processes/heating"


def test_everything_that_a_heater_s_sizing_states_is_recomputed():
    """Duration, loss and heater energy, each as a claim."""
    record = tank(results={"duration": "5.343 h"}, lost={"energy": "-1.192 MJ"}, used={"energy": "57.70 MJ"})
    found = case(record)
    for pointer in ("duration", "heat_transfers/shell/energy", "work_transfers/heater/energy"):
        assert compared(found, f"{BASE}/{pointer}").outcome is Outcome.AGREES


def test_a_duration_without_losses_is_the_origin_and_the_energy_follows_it():
    """E/P = 5.232 h leaves the losses out; the energy formed with it is inherited, not a second mistake."""
    record = tank(results={"duration": "5.232 h"}, used={"energy": "56.51 MJ"})
    found = case(record)
    assert compared(found, f"{BASE}/duration").standing is Standing.ORIGIN
    assert compared(found, f"{BASE}/work_transfers/heater/energy").standing is Standing.INHERITED


@pytest.mark.parametrize(("last", "duration"), [("60.00 °C", "6.000 h"), ("60.00 °C", "5.343 h")])
def test_a_duration_that_is_one_input_too_many_is_held_against_the_others(last, duration):
    """With power, losses and both temperatures given, the duration follows: 6 h are wrong and 5.343 h are right."""
    found = case(tank(last, inputs={"duration": duration}))
    expected = Outcome.AGREES if duration == "5.343 h" else Outcome.WRONG
    assert compared(found, f"{BASE}/duration").outcome is expected


def test_the_power_of_the_process_is_that_of_its_only_source():
    """Stated of the process, as input or as result, the mean power is that of the heater beside the losses."""
    found = case(tank(heater={}, inputs={"mean_power": "3.000 kW"}, results={"duration": "5.343 h"}))
    assert compared(found, f"{BASE}/duration").outcome is Outcome.AGREES
    assert found.value(f"{BASE}/electrical_work") == pytest.approx(-57.703e6, rel=1e-4)
    found = case(tank(heater={}, inputs={"duration": "5.343 h"}, results={"mean_power": "3.000 kW"}))
    assert compared(found, f"{BASE}/mean_power").outcome is Outcome.AGREES


def test_power_of_one_and_energy_of_another_source():
    """A coil of given energy beside a heater of given power: with the duration both are powers."""
    coil = {"id": "coil", "boundary_temperature": "80.00 °C", "inputs": {"energy": "10.00 MJ"}}
    found = case(tank(None, heats=[coil], inputs={"duration": "4.000 h"}))
    last = found.value("states/hot/store/temperature")
    energy = 300.0 * 4186.0 * (last - 288.15)
    assert energy == pytest.approx(
        10e6 + 3000.0 * 14400.0 + found.value(f"{BASE}/heat_transfers/shell/energy")
    )


@pytest.mark.parametrize(
    ("change", "why"),
    [
        ({"heater": {}}, "neither power nor duration"),
        ({"heats": [{"id": "coil", "boundary_temperature": "80 °C"}], "heater": {}}, "two sources unknown"),
    ],
)
def test_what_does_not_follow_has_no_value(change, why):
    """Without a power, an energy or a duration nothing tells the time: {why}."""
    assert case(tank(results={"duration": "5.343 h"}, **change)).value(f"{BASE}/duration") is None, why


def test_the_balance_closes_a_loss_whose_time_is_not_known():
    """A heater of given energy and an unknown loss through a valve: UA is no help, the balance is."""
    record = tank(heater={"energy": "57.70 MJ"}, lost={"energy": "-1.192 MJ"})
    record["processes"][0]["heat_transfers"][0].pop("heat_loss_coefficient")
    assert case(record).value(f"{BASE}/heat_transfers/shell/energy") == pytest.approx(-1.19e6, rel=1e-3)


def test_a_heater_that_works_for_a_part_of_the_time_is_no_constant_power():
    """5.3 h of heating within a day: the loss follows from the balance and not from an exponential approach."""
    record = tank(heater={"mean_power": "3.000 kW", "duration": "5.343 h"}, inputs={"duration": "24.00 h"})
    loss = case(record).value(f"{BASE}/heat")
    assert loss == pytest.approx(300.0 * 4186.0 * 45.0 - 3000.0 * 5.343 * 3600.0)


def test_heat_that_crosses_at_a_stated_temperature():
    """At 25 °C, where the insulation meets the air, the same loss carries Q/298.15 K."""
    record = tank()
    record["processes"][0]["heat_transfers"][0]["boundary_temperature"] = "25.00 °C"
    found = case(record)
    assert found.value(f"{BASE}/entropy_transfer") == pytest.approx(found.value(f"{BASE}/heat") / 298.15)


def test_a_gas_on_another_path_is_not_followed():
    """Along a polytropic path the energy alone does not tell the temperature: no duration, and no wrong one."""
    record = tank(results={"duration": "5.343 h"})
    record["bodies"]["store"]["inputs"] = {
        "mass": "3.000 kg",
        "cv": "0.718 kJ/(kg·K)",
        "gas_constant": "287 J/(kg·K)",
    }
    record["states"]["cold"]["store"]["inputs"]["pressure"] = "1.000 bar"
    record["processes"][0]["path"] = {"kind": "polytropic", "exponent": 1.2}
    assert case(record).value(f"{BASE}/duration") is None


def rules(*records: dict[str, Any]) -> list[str]:
    """Return the names of the rules that find something wrong."""
    return [finding.rule for finding in review(package(*records), name="trial.json").findings]


def test_a_heat_flow_is_no_heat():
    """UA·ΔT stated as the energy of the loss, without a duration, is a rate for a total."""
    assert "rate-for-total" in rules(tank(lost={"energy": "-62 W"}))


def test_a_heat_flow_with_a_duration_is_the_mean_one():
    """With the duration among the inputs the same text is read as the mean rate, and held against it."""
    for text, wrong in (("-61.95 W", False), ("-80.00 W", True)):
        record = tank(None, inputs={"duration": "5.343 h"}, lost={"energy": text})
        assert ("value-disagrees" in rules(record)) is wrong


def test_a_heater_that_is_too_small_is_one_finding():
    """Where the tank settles below its end temperature, that is told once, and costs the duration."""
    found = rules(tank("80.00 °C", heater={"mean_power": "0.2000 kW"}, results={"duration": "99.0 h"}))
    assert found.count("temperature-out-of-reach") == 1
    assert "result-not-recomputed" not in found


def test_an_insulated_store_has_no_loss_coefficient():
    """`insulated` and a loss coefficient contradict one another; that is told, and no loss is calculated."""
    record = tank(insulated="yes", lost={"energy": "0 MJ"})
    assert "adiabatic-with-heat" in rules(record)
    assert case(record).value(f"{BASE}/heat") == 0.0


def test_a_temperature_that_powers_and_losses_do_not_hold():
    """15 °C at both ends with 3 kW: it is never held."""
    record = tank("15.00 °C", inputs={"duration": "1.000 h"})
    (finding,) = (f for f in review(package(record)).findings if f.rule == "temperature-out-of-reach")
    assert "never held" in finding.message


@settings(max_examples=25)
@given(st.floats(20.0, 55.0))
def test_two_processes_in_a_row_lose_what_one_does(middle):
    """Splitting the heat-up at any temperature gives the same total of time and loss."""
    times, losses = [], []
    for first, last in ((15.0, 60.0), (15.0, middle), (middle, 60.0)):
        record = tank(f"{last!r} °C", results={"duration": "1 h"}, lost={"energy": "-1 J"})
        record["states"]["cold"]["store"]["inputs"]["temperature"] = f"{first!r} °C"
        found = case(record)
        times.append(found.value(f"{BASE}/duration"))
        losses.append(found.value(f"{BASE}/heat_transfers/shell/energy"))
    assert times[1] + times[2] == pytest.approx(times[0], rel=1e-9)
    assert losses[1] + losses[2] == pytest.approx(losses[0], rel=1e-6)


@pytest.mark.parametrize("ua", ["1e-3 W/K", "1e-6 W/K"])
def test_without_losses_energy_is_power_times_time(ua):
    """UA → 0 leaves P·t = ΔE."""
    record = tank(results={"duration": "1 h"})
    record["processes"][0]["heat_transfers"][0]["heat_loss_coefficient"] = ua
    assert case(record).value(f"{BASE}/duration") == pytest.approx(300.0 * 4186.0 * 45.0 / 3000.0, rel=1e-4)
