"""Linked states: what they take over, and that what is stated beside a link is held against it."""

from __future__ import annotations

from typing import Any

import pytest

from checker.findings import Outcome
from checker.sheet.links import leaves_of, link_clues
from tests.checker.cases import case, cases, compared, gas_bottle

FIRST = "states/cold/gas"


def linked(
    to: str = "records/bottle/states/hot/gas", inputs: dict[str, str] | None = None, **body: str
) -> dict[str, Any]:
    """Return a bottle whose first state is a linked one, with inputs beside the link."""
    record = gas_bottle(id="other")
    record["states"]["cold"]["gas"] = {"same_as": to, "inputs": inputs or {}}
    record["states"]["hot"]["gas"]["inputs"] = {"temperature": "450.0 K"}
    del record["bodies"]["gas"]["inputs"]["mass"]
    record["bodies"]["gas"]["inputs"].update(body)
    return record


def test_another_record_tells_t_v_and_mass():
    """400 K and 6.667 bar come from the other record, with its 0.1 kg."""
    found = cases(gas_bottle(), linked())["other"]
    assert found.value(f"{FIRST}/temperature") == pytest.approx(400.0)
    assert found.value(f"{FIRST}/pressure") == pytest.approx(20e5 / 3.0)
    assert found.value("bodies/gas/mass") == pytest.approx(0.1)


@pytest.mark.parametrize(
    ("name", "right", "wrong"),
    [
        ("temperature", "400.0 K", "480.0 K"),
        ("pressure", "6.667 bar", "8.000 bar"),
        ("specific_volume", "1.2462 m³/kg", "1.5000 m³/kg"),
        ("density", "0.80244 kg/m³", "0.9 kg/m³"),
        ("volume", "0.12462 m³", "0.15000 m³"),
    ],
)
def test_an_input_beside_a_link_is_held_against_it(name, right, wrong):
    """The link replaces inputs, so that each of them is surplus; none is used in its place."""
    for text, outcome in ((right, Outcome.AGREES), (wrong, Outcome.WRONG)):
        found = cases(gas_bottle(), linked(inputs={name: text}))["other"]
        assert compared(found, f"{FIRST}/{name}").outcome is outcome
        assert found.value(f"{FIRST}/temperature") == pytest.approx(400.0)


def test_two_inputs_beside_a_link_are_both_held_against_it():
    """Temperature and pressure would fix the state by themselves, and another one than the link."""
    inputs = {"temperature": "480.0 K", "pressure": "6.667 bar"}
    found = cases(gas_bottle(), linked(inputs=inputs))["other"]
    assert compared(found, f"{FIRST}/temperature").outcome is Outcome.WRONG
    assert compared(found, f"{FIRST}/pressure").outcome is Outcome.AGREES


@pytest.mark.parametrize(
    ("name", "right", "wrong"),
    [
        ("mass", "0.1000 kg", "0.1200 kg"),
        ("volume", "0.12462 m³", "0.15000 m³"),
        ("amount", "24.98 mol", "30.00 mol"),
    ],
)
def test_how_much_there_is_is_held_against_the_linked_mass(name, right, wrong):
    """The same gas in two records has one mass, however it is given."""
    for text, outcome in ((right, Outcome.AGREES), (wrong, Outcome.WRONG)):
        found = cases(gas_bottle(), linked(**{name: text}))["other"]
        assert compared(found, f"bodies/gas/{name}").outcome is outcome


def test_a_phase_beside_a_link_decides_nothing():
    """The linked state is superheated vapour, whatever word stands beside the link."""
    water = {"substance": "Water", "model": "real fluid", "inputs": {"mass": "1.000 kg"}}
    first = {
        "id": "drum",
        "bodies": {"water": water},
        "states": {
            "a": {"water": {"inputs": {"temperature": "200.0 °C", "pressure": "5.000 bar"}}},
            "b": {"water": {"same_as": "states/a/water", "inputs": {"phase": "subcooled liquid"}}},
        },
        "processes": [],
    }
    found = case(first)
    assert found.word("states/b/water/phase") == "superheated vapour"


def test_a_state_of_the_same_record_is_followed():
    """The last state of a cycle is its first one."""
    record = gas_bottle()
    record["states"]["hot"]["gas"] = {"same_as": "states/cold/gas", "results": {"pressure": "5.000 bar"}}
    found = case(record)
    assert found.value("states/hot/gas/temperature") == pytest.approx(300.0)
    assert compared(found, "states/hot/gas/pressure").outcome is Outcome.AGREES


def test_the_order_of_states_is_irrelevant():
    """A state waits for the one that it is linked to, though its own inputs would fix it."""
    record = gas_bottle()
    record["states"] = {
        "hot": {
            "gas": {
                "same_as": "states/cold/gas",
                "inputs": {"temperature": "400.0 K", "pressure": "5.000 bar"},
            }
        },
        "cold": record["states"]["cold"],
    }
    found = case(record)
    assert found.value("states/hot/gas/temperature") == pytest.approx(300.0)
    assert compared(found, "states/hot/gas/temperature").outcome is Outcome.WRONG


def test_links_are_followed_one_after_another():
    """A state linked to a linked one has the properties of the first."""
    record = gas_bottle()
    record["states"]["later"] = {"gas": {"same_as": "states/hot/gas"}}
    record["states"]["last"] = {"gas": {"same_as": "states/later/gas"}}
    found = case(record)
    assert found.value("states/last/gas/pressure") == pytest.approx(20e5 / 3.0)


def two_vessels(**body: str) -> dict[str, Any]:
    """Return a record of two bodies whose first states are one, with the extent of the second."""
    record = gas_bottle()
    gas = record["bodies"]["gas"]
    own = {name: text for name, text in gas["inputs"].items() if name != "mass"}
    record["bodies"]["spare"] = {**gas, "inputs": {**own, **body}}
    record["states"]["cold"]["spare"] = {"same_as": "states/cold/gas"}
    record["processes"] = []
    return record


@pytest.mark.parametrize(
    ("body", "mass"), [({}, 0.1), ({"mass": "0.3000 kg"}, 0.3), ({"volume": "373.86 L"}, 0.3)]
)
def test_another_body_of_the_record_tells_a_mass_only_where_nothing_else_does(body, mass):
    """Two vessels filled alike may differ in size."""
    found = case(two_vessels(**body))
    assert found.value("bodies/spare/mass") == pytest.approx(mass, rel=1e-4)
    assert [c for c in found.compared if c.outcome is not Outcome.AGREES] == []


def test_a_block_takes_the_temperature_over():
    """Of a body whose volume says nothing the temperature is enough, and an own one is held against it."""
    record = gas_bottle()
    record["bodies"] = {
        "block": {
            "substance": "Steel block",
            "model": "constant specific heat",
            "inputs": {"mass": "10.00 kg", "specific_heat": "0.5000 kJ/(kg·K)"},
        }
    }
    record["states"] = {
        "hot": {"block": {"inputs": {"temperature": "333.15 K"}}},
        "later": {"block": {"same_as": "states/hot/block", "inputs": {"temperature": "372.15 K"}}},
    }
    record["processes"] = []
    found = case(record)
    assert found.value("states/later/block/temperature") == pytest.approx(333.15)
    assert compared(found, "states/later/block/temperature").outcome is Outcome.WRONG


def test_inputs_stand_in_for_a_link_that_leads_to_nothing():
    """The other record fixes no such state; temperature and pressure do."""
    lost = gas_bottle()
    lost["states"]["hot"]["gas"]["inputs"] = {}
    inputs = {"temperature": "480.0 K", "pressure": "8.000 bar"}
    record = linked(inputs=inputs, mass="0.1000 kg")
    found = cases(lost, record)["other"]
    assert found.value(f"{FIRST}/temperature") == pytest.approx(480.0)


def test_a_lost_link_without_inputs_is_said_to_be_lost():
    """Nothing fixes the state, and the reason names the link."""
    lost = gas_bottle()
    lost["states"]["hot"]["gas"]["inputs"] = {}
    found = cases(lost, linked())["other"]
    assert found.value(f"{FIRST}/temperature") is None
    assert "linked record" in found.why_not(f"{FIRST}/temperature")


def test_leaves_come_from_other_records_alone():
    """A state of the own record is no leaf: its properties are calculated in the same sheet."""
    record = gas_bottle()
    record["states"]["hot"]["gas"] = {"same_as": "states/cold/gas"}
    own = case(record).record
    assert list(leaves_of(own)) == []
    assert [clue.key for clue in link_clues(own, "hot", "gas")] == [
        "states/cold/gas/temperature",
        "states/cold/gas/specific_volume",
    ]
    other = cases(gas_bottle(), linked())["other"].record
    assert [link.pointer for link in leaves_of(other)] == [
        "states/hot/gas/temperature",
        "states/hot/gas/specific_volume",
        "bodies/gas/mass",
    ]
