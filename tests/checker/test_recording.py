"""What a review records of each stated quantity."""

from __future__ import annotations

import json

import pytest

from checker import review
from checker.findings import Outcome
from tests.checker.cases import gas_bottle, package
from tests.checker.records_of_several import quench, stops


def test_every_comparison_has_its_place_in_the_file():
    """Also where a result holds: a reader of the log finds the line of what was checked."""
    lines = json.dumps(
        json.loads(package(gas_bottle({"internal_energy_change": "31.16 kJ"}, {"pressure": "6.667 bar"}))),
        indent=1,
    ).splitlines()
    found = review("\n".join(lines).encode(), name="trial.json")
    checked = {item.quantity: item for item in found.records[0].checked}
    for quantity, text in (
        ("processes/warming/internal_energy_change", "31.16 kJ"),
        ("states/hot/gas/pressure", "6.667 bar"),
    ):
        location = checked[quantity].location
        assert location is not None
        assert lines[location.line - 1][location.column - 1 :].startswith(f'"{text}"')


@pytest.mark.parametrize(
    ("section", "word", "role", "outcome"),
    [
        ("results", "superheated vapour", "stated result", Outcome.AGREES),
        ("inputs", "superheated vapour", "input", Outcome.AGREES),
        ("results", "wet vapour", "stated result", Outcome.WRONG),
    ],
)
def test_a_stated_phase_is_among_what_was_checked(section, word, role, outcome):
    """Helium of constant specific heats is a gas; the word is listed whether or not it says so."""
    record = gas_bottle({"internal_energy_change": "31.16 kJ"})
    record["states"]["hot"]["gas"].setdefault(section, {})["phase"] = word
    checked = {item.quantity: item for item in review(package(record)).records[0].checked}
    phase = checked["states/hot/gas/phase"]
    assert (phase.role, phase.stated.text, phase.outcome) == (role, word, outcome)
    assert phase.recomputed is not None
    assert phase.recomputed.text == "gas"


def test_a_phase_of_a_state_that_is_not_found_is_not_checked():
    """Nothing fixes the hot state, so its phase is compared with nothing."""
    record = gas_bottle({"internal_energy_change": "31.16 kJ"})
    record["states"]["hot"]["gas"] = {"results": {"phase": "superheated vapour"}}
    record["processes"][0]["path"] = "end states only"
    found = review(package(record)).records[0]
    assert "states/hot/gas/phase" not in {item.quantity for item in found.checked}
    assert "phase of hot/gas" in {item.what for item in found.not_checked}


def test_states_of_moist_air_list_their_humidity():
    """Relative humidity and humidity ratio stand among the properties of the state; of helium they do not."""
    vessel = gas_bottle()
    vessel["bodies"]["gas"] = {
        "substance": "moist air",
        "model": "ideal gas",
        "inputs": {"mass": "0.1000 kg", "water_content": "0.0100"},
    }
    for record, listed in ((vessel, {"relative_humidity", "humidity_ratio"}), (gas_bottle(), set())):
        found = review(package(record), name="trial.json")
        names = {cell.name for cell in found.records[0].states[0].cells}
        assert names & {"relative_humidity", "humidity_ratio"} == listed


def test_a_process_without_extent_is_noted():
    """50 kJ do not lift the piston: the review says so, beside what it assumed."""
    record = review(package(stops("50 kJ"))).records[0]
    assert record.noted == (
        "process lifting of sequence all has no extent: the pressure that lifts the piston (150 kPa) is not reached",
    )
    assert [table.name for table in record.totals] == ["all"]


def test_flows_are_recorded_without_diagrams():
    """They cost no property, so that every report has them."""
    record = review(package(quench()), diagrams=False).records[0]
    assert [(flow.process, flow.kind) for flow in record.flows] == [
        ("quenching", "energy"),
        ("quenching", "entropy"),
    ]


def test_listed_numbers_are_told_once():
    """Two bodies at rest have one ΔKE = 0 in the list of what the closing starts from, and no gaps."""
    sheet = review(package(quench())).records[0].sheet
    closing = next(line.substituted for line in sheet if line.title.startswith("Closing"))
    assert closing.count("ΔKE = 0 kJ") == 1
    assert "…" not in closing
