"""What a review says of links that are contradicted, and of links that lead to nothing."""

from __future__ import annotations

from typing import Any

import pytest

from checker import Grade, Review, review
from tests.checker.cases import gas_bottle, package


def reviewed(first: dict[str, Any], mass: str = "0.1000 kg", lost: bool = False) -> Review:
    """Return the review of two bottles, the second of which begins where the first, at 400 K, ends."""
    one, other = gas_bottle(), gas_bottle(id="other")
    if lost:
        one["states"]["hot"]["gas"]["inputs"] = {}
    other["states"]["cold"]["gas"] = {"same_as": "records/bottle/states/hot/gas", **first}
    other["states"]["hot"]["gas"]["inputs"] = {"temperature": "450.0 K"}
    other["bodies"]["gas"]["inputs"]["mass"] = mass
    other["processes"][0]["results"] = {"temperature_change": "50.0 K"}
    return review(package(one, other))


def raised(found: Review) -> list[tuple[str, str | None]]:
    """Return rule and quantity of what is found in the second record."""
    return [
        (f.rule, f.quantity) for f in found.findings if f.record == "other" and f.grade is not Grade.REMARK
    ]


@pytest.mark.parametrize(
    ("name", "right", "wrong"),
    [
        ("temperature", "400.0 K", "480.0 K"),
        ("pressure", "6.667 bar", "9.000 bar"),
        ("volume", "0.12462 m³", "0.15000 m³"),
    ],
)
def test_an_input_that_contradicts_a_link_is_a_discrepancy(name: str, right: str, wrong: str) -> None:
    """It is found once, at the input; the same input with the linked value is no matter."""
    assert raised(reviewed({"inputs": {name: right}})) == []
    ((rule, quantity),) = raised(reviewed({"inputs": {name: wrong}}))
    assert rule in ("surplus-input-disagrees", "mass-not-conserved")
    assert quantity == f"states/cold/gas/{name}"


def test_inputs_that_fix_another_state_than_the_link_are_each_held_against_it() -> None:
    """480 K is not 400 K; the pressure agrees."""
    found = reviewed({"inputs": {"temperature": "480.0 K", "pressure": "6.667 bar"}})
    assert raised(found) == [("surplus-input-disagrees", "states/cold/gas/temperature")]


def test_a_mass_that_contradicts_a_link_is_a_discrepancy() -> None:
    """The linked bottle holds 0.1 kg, and its volume with it."""
    assert ("surplus-input-disagrees", "bodies/gas/mass") in raised(reviewed({}, mass="0.1200 kg"))


@pytest.mark.parametrize(("word", "found"), [("superheated vapour", []), ("wet vapour", ["phase-disagrees"])])
def test_a_phase_beside_a_link_is_held_against_it(word: str, found: list[str]) -> None:
    """Helium of constant specific heats is a gas."""
    assert [rule for rule, _ in raised(reviewed({"inputs": {"phase": word}}))] == found


def test_a_link_that_leads_to_nothing_is_listed_as_not_checked() -> None:
    """The inputs beside it fix the state, so no more is said in the record."""
    found = reviewed({"inputs": {"temperature": "400.0 K", "pressure": "6.667 bar"}}, lost=True)
    assert raised(found) == []
    listed = {note.what for record in found.records if record.id == "other" for note in record.not_checked}
    assert "link of states/cold/gas" in listed


def test_a_surplus_energy_stands_on_the_declared_datum() -> None:
    """Saturated water at 100 °C has h = 419 kJ/kg in the tables and 0 on a datum that is set there."""
    water = {
        "substance": "Water",
        "model": "real fluid",
        "inputs": {"mass": "1.000 kg"},
        "datum": {"temperature": "100.00 °C", "quality": "0", "zero": ["specific_enthalpy"]},
    }
    record = gas_bottle(id="drum")
    record["bodies"] = {"gas": water}
    record["states"]["cold"]["gas"]["inputs"] = {"temperature": "120.0 °C", "pressure": "5.000 bar"}
    for text, expected in (("84.9 kJ/kg", []), ("504.0 kJ/kg", ["surplus-input-disagrees"])):
        record["states"]["cold"]["gas"]["inputs"]["specific_enthalpy"] = text
        rules = [f.rule for f in review(package(record)).findings]
        assert [rule for rule in rules if rule == "surplus-input-disagrees"] == expected
