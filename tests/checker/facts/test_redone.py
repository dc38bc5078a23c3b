"""A record done once more: its values are those of the better model, and its results are told apart."""

from __future__ import annotations

from typing import Any

import pytest

from checker.facts.idealised import by_real_gas, by_real_heat
from checker.facts.redone import in_words, moved, redone, results_that_matter
from checker.facts.twins import IDEAL, REAL, twin
from tests.checker.cases import case, cases, gas_bottle


def _bottle(substance: str, pressure: str, **hot: str) -> dict[str, Any]:
    """Return a closed bottle of 50 L that warms from 15 °C to 60 °C, calculated as an ideal gas."""
    record = gas_bottle({"heat": "1 kJ"}, {"pressure": "1 bar", **hot})
    record["bodies"]["gas"].update(substance=substance, model="ideal gas", inputs={"volume": "50.0 L"})
    record["states"]["cold"]["gas"]["inputs"] = {"temperature": "15.0 °C", "pressure": pressure}
    record["states"]["hot"]["gas"]["inputs"] = {"temperature": "60.0 °C"}
    return record


def _tank(**process: Any) -> dict[str, Any]:
    """Return 1 m³ of water of constant specific heat that is heated from 20 °C."""
    constants = {"volume": "1.000 m³", "specific_heat": "4.180 kJ/(kg·K)", "density": "998.0 kg/m³"}
    return {
        "id": "tank",
        "bodies": {
            "water": {"substance": "Water", "model": "constant specific heat", "inputs": constants},
        },
        "states": {
            "cold": {"water": {"inputs": {"temperature": "20.0 °C"}}},
            "hot": {"water": {"inputs": {}, "results": {"temperature": "100 °C"}}},
        },
        "processes": [
            {"id": "heating", "from": "cold", "to": "hot", "path": "constant volume", "work_transfers": []}
            | process
        ],
    }


def test_a_bottle_done_again_has_the_pressure_of_the_real_gas() -> None:
    """The pressure at the end is that of the real fluid at T₂ and the specific volume of the first state."""
    found = case(_bottle("Nitrogen", "200.0 bar"))
    again = redone(found, "gas", REAL)
    real = twin("Nitrogen", REAL)
    assert real is not None
    first = real.state({"temperature": 288.15, "pressure": 200e5})
    last = real.state({"temperature": 333.15, "specific_volume": first.specific_volume or 0.0})
    assert again["states/hot/gas/pressure"] == pytest.approx(last.pressure, rel=1e-9)
    mass = 0.05 / (first.specific_volume or 0.0)
    change = last.specific_internal_energy - first.specific_internal_energy
    assert again["processes/warming/heat"] == pytest.approx(mass * change, rel=1e-9)


def test_stated_constants_do_not_reach_the_other_model() -> None:
    """Helium done again as an ideal gas has its own gas constant, not the rounded one of the package."""
    found = case(gas_bottle({"heat": "31.16 kJ"}))
    again = redone(found, "gas", IDEAL)
    assert again["processes/warming/internal_energy_change"] == pytest.approx(
        0.1 * 100.0 * 1.5 * 8.314462618 / 4.002602e-3, rel=1e-5
    )


def test_a_tank_done_again_warms_by_the_enthalpy_of_water() -> None:
    """300 MJ into 998 kg at 1 atm: T₂ where h has risen by Q/m, the mass being kept."""
    record = _tank(
        heat_transfers=[{"id": "coil", "boundary_temperature": "120 °C", "inputs": {"energy": "300.0 MJ"}}]
    )
    again = redone(case(record), "water", REAL)
    real = twin("Water", REAL)
    assert real is not None
    first = real.state({"temperature": 293.15, "pressure": 101325.0})
    enthalpy = (first.specific_enthalpy or 0.0) + 300e6 / 998.0
    last = real.state({"pressure": 101325.0, "specific_enthalpy": enthalpy})
    assert again["states/hot/water/temperature"] == pytest.approx(last.temperature, abs=1e-3)


def test_the_worst_result_comes_first_and_is_counted_in_allowances() -> None:
    """CO₂ at 30 bar: the heat is off by a third of itself, some sixty times its allowance of 0.5 %."""
    found = by_real_gas(case(_bottle("CarbonDioxide", "30.00 bar")), "gas")
    assert found is not None
    assert found[0].pointer == "processes/warming/heat"
    assert found[0].allowances == pytest.approx(abs(found[0].second / found[0].first - 1.0) / 0.005, rel=1e-9)
    assert [m.allowances for m in found] == sorted((m.allowances for m in found), reverse=True)


def test_a_thin_gas_moves_nothing() -> None:
    """Helium at 1 bar is an ideal gas: every result stays within its allowance."""
    found = by_real_gas(case(_bottle("Helium", "1.000 bar")), "gas")
    assert found is not None
    assert found[0].allowances < 0.2


def test_water_that_boils_is_no_question_of_its_specific_heat() -> None:
    """Where the real fluid leaves the liquid region nothing is said about c."""
    record = _tank(heat_transfers=[{"id": "coil", "inputs": {"energy": "900.0 MJ"}}])
    record["states"]["cold"]["water"]["inputs"]["pressure"] = "1.000 bar"
    assert by_real_heat(case(record), "water") is None


def test_results_with_a_datum_and_constants_do_not_count() -> None:
    """Energy and entropy of a state have no absolute value, M is no result; p and limited T do."""
    record = _bottle(
        "Nitrogen", "10.0 bar", specific_internal_energy="1 kJ/kg", specific_entropy="1 kJ/(kg·K)"
    )
    record["bodies"]["gas"]["results"] = {"molar_mass": "28.0 g/mol", "mass": "0.6 kg"}
    record["limits"] = [{"id": "hot", "quantity": "states/hot/gas/temperature", "at_most": "70 °C"}]
    assert set(results_that_matter(case(record))) == {
        "bodies/gas/mass",
        "states/hot/gas/pressure",
        "states/hot/gas/temperature",
        "processes/warming/heat",
    }


def test_a_linked_state_starts_from_the_other_record() -> None:
    """A bottle that goes on from another record has that record's T and v, and its own model from there on."""
    second = _bottle("Nitrogen", "1 bar")
    second["id"] = "second"
    second["states"]["cold"]["gas"] = {"same_as": "records/bottle/states/hot/gas"}
    second["states"]["hot"]["gas"]["inputs"] = {"temperature": "90.0 °C"}
    del second["bodies"]["gas"]["inputs"]["volume"]
    found = cases(_bottle("Nitrogen", "200.0 bar"), second)
    again = redone(found["second"], "gas", REAL)
    real = twin("Nitrogen", REAL)
    assert real is not None
    volume = found["bottle"].value("states/hot/gas/specific_volume")
    assert volume is not None
    last = real.state({"temperature": 363.15, "specific_volume": volume})
    assert again["states/hot/gas/pressure"] == pytest.approx(last.pressure, rel=1e-6)


def test_what_only_one_evaluation_knows_is_left_out() -> None:
    """A result without a value by one of the models is no difference."""
    found = case(_bottle("Nitrogen", "10.0 bar"))
    assert moved(found, {"processes/warming/heat": 1.0}, {}) == ()


@pytest.mark.parametrize(
    ("pointer", "words"),
    [
        ("states/hot/gas/pressure", "pressure of gas in state hot"),
        ("processes/warming/entropy_generation", "entropy generation of warming"),
        ("processes/warming/heat_transfers/coil/energy", "energy of coil in warming"),
        ("bodies/gas/mass", "mass of gas"),
        ("results/net_work", "net work of the cycle"),
    ],
)
def test_a_pointer_is_read_in_words(pointer: str, words: str) -> None:
    """Every kind of pointer has its words."""
    assert in_words(pointer) == words
