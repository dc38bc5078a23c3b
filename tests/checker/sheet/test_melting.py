"""Bodies that melt, in a record: which inputs fix their states, and what the balances find."""

from __future__ import annotations

from typing import Any

import pytest

from checker.case import Case
from checker.findings import Outcome
from tests.checker.cases import case, cases, compared

CONSTANTS = {
    "mass": "10.000 kg",
    "melting_temperature": "0.00 °C",
    "latent_heat": "333.6 kJ/kg",
    "specific_heat_of_solid": "2.100 kJ/(kg·K)",
    "specific_heat_of_liquid": "4.190 kJ/(kg·K)",
}
T, F, PHASE = "temperature", "melted_fraction", "phase"


def record(
    first: dict[str, str], last: dict[str, Any], heat: str | None = None, **more: Any
) -> dict[str, Any]:
    """Return a record of a store that melts or freezes; ``last`` may hold results of its own."""
    transfer: dict[str, Any] = {
        "id": "coil",
        "boundary_temperature": "50 °C",
        "reservoir_temperature": "50 °C",
    }
    transfer |= {"inputs": {"energy": heat}} if heat else {"results": {"energy": "1.0000 kJ"}}
    return {
        "id": "store",
        "title": "Store",
        "bodies": {"store": {"substance": "Salt", "model": "phase change", "inputs": {**CONSTANTS, **more}}},
        "states": {"first": {"store": {"inputs": first}}, "last": {"store": last}},
        "processes": [
            {"id": "p", "from": "first", "to": "last", "heat_transfers": [transfer], "work_transfers": []}
        ],
    }


def energy(found: Case, state: str) -> float | None:
    """Return u of a state above that of the solid at melting. [J/kg]"""
    return found.value(f"states/{state}/store/specific_internal_energy")


LATENT = 333.6e3


@pytest.mark.parametrize(
    ("inputs", "expected"),
    [
        ({T: "-10.0 °C"}, -21e3),
        ({T: "10.0 °C"}, LATENT + 41.9e3),
        ({F: "0.400"}, 0.4 * LATENT),
        ({F: "0.400", T: "0 °C"}, 0.4 * LATENT),
        ({F: "0"}, 0.0),
        ({F: "1"}, LATENT),
        ({F: "0", T: "-10.0 °C"}, -21e3),
        ({F: "1", T: "10.0 °C"}, LATENT + 41.9e3),
        ({F: "1", T: "0 °C"}, LATENT),
        ({T: "0 °C", PHASE: "solid"}, 0.0),
        ({T: "0 °C", PHASE: "subcooled liquid"}, LATENT),
    ],
)
def test_what_fixes_a_state(inputs: dict[str, str], expected: float) -> None:
    """A temperature away from melting does, a melted fraction, and a phase at the melting temperature."""
    found = case(record(inputs, {"inputs": {T: "20.0 °C"}}))
    assert energy(found, "first") == pytest.approx(expected, rel=1e-9, abs=1e-6)


def test_temperature_alone_at_melting_is_no_state() -> None:
    """The state stays open, and the reason names what would tell."""
    found = case(record({T: "0 °C"}, {"inputs": {T: "20.0 °C"}}))
    assert energy(found, "first") is None
    assert "melted fraction, phase or u would" in found.why_not("states/first/store/temperature")


def test_over_a_span_temperature_tells() -> None:
    """A body that melts over a span has a state at every temperature."""
    found = case(record({T: "2.0 °C"}, {"inputs": {T: "20.0 °C"}}, melting_span="4.0 K"))
    assert found.value("states/first/store/melted_fraction") == pytest.approx(0.5)


@pytest.mark.parametrize(
    ("heat", "temperature", "fraction"),
    [("1210.0 kJ", 273.15, 0.29976), ("3756.0 kJ", 278.1619, 1.0), ("105.0 kJ", 268.15, 0.0)],
)
def test_the_balance_finds_how_much_is_melted(heat: str, temperature: float, fraction: float) -> None:
    """From −10 °C the heat warms the solid, melts it, and warms the liquid; the fraction is a result like any."""
    claims = {"results": {F: f"{fraction:.4f}", T: f"{temperature - 273.15:.3f} °C"}}
    found = case(record({T: "-10.0 °C"}, {"inputs": {}, **claims}, heat))
    assert found.value("states/last/store/temperature") == pytest.approx(temperature, abs=2e-3)
    assert found.value("states/last/store/melted_fraction") == pytest.approx(fraction, abs=1e-5)
    for name in (F, T):
        assert compared(found, f"states/last/store/{name}").outcome is Outcome.AGREES


def test_a_wrong_melted_fraction_is_wrong() -> None:
    """A claimed fraction beyond the allowance of fractions disagrees."""
    found = case(record({T: "-10.0 °C"}, {"inputs": {}, "results": {F: "0.350"}}, "1210.0 kJ"))
    assert compared(found, "states/last/store/melted_fraction").outcome is Outcome.WRONG


def test_a_stated_temperature_at_melting_gives_way_to_the_balance() -> None:
    """The temperature is then more than is needed, and is held against the state that the balance finds."""
    found = case(record({T: "-10.0 °C"}, {"inputs": {T: "0 °C"}}, "1210.0 kJ"))
    assert found.value("states/last/store/melted_fraction") == pytest.approx(0.29976, abs=1e-5)
    assert compared(found, "states/last/store/temperature").outcome is Outcome.AGREES


def test_a_temperature_beside_a_fraction_is_held_against_that_of_melting() -> None:
    """Half melted at 12 °C contradicts a melting temperature of 0 °C."""
    found = case(record({T: "12.0 °C", F: "0.500"}, {"inputs": {T: "20.0 °C"}}))
    assert compared(found, "states/first/store/temperature").outcome is Outcome.WRONG


def test_isothermal_freezing_is_found_by_its_heat() -> None:
    """Along an isothermal path at the melting temperature the heat tells how much freezes."""
    package = record({T: "0 °C", PHASE: "subcooled liquid"}, {"inputs": {}}, "-1000.8 kJ")
    package["processes"][0]["path"] = "isothermal"
    found = case(package)
    assert found.value("states/last/store/melted_fraction") == pytest.approx(0.7, abs=1e-9)


def test_a_link_takes_over_how_much_is_melted() -> None:
    """A state linked to one in another record goes on from its melted fraction."""
    first = record({T: "-10.0 °C"}, {"inputs": {}}, "1210.0 kJ")
    second = record({}, {"inputs": {F: "1"}})
    second["id"] = "next"
    second["states"]["first"]["store"] = {"same_as": "records/store/states/last/store"}
    found = cases(first, second)["next"]
    assert energy(found, "first") == pytest.approx(0.299760 * LATENT, rel=1e-4)


def test_ice_and_water_come_to_equilibrium_at_melting() -> None:
    """4 kg of water at 15 °C melt 0.690 kg of 1 kg of ice at −10 °C: (4·4.19·15 − 2.1·10)/333.6 of it."""
    found = case(
        {
            "id": "mix",
            "title": "Ice in water",
            "bodies": {
                "ice": {"substance": "Salt", "model": "phase change", "inputs": {**CONSTANTS, "mass": "1.000 kg"}},
                "water": {
                    "substance": "Water",
                    "model": "constant specific heat",
                    "inputs": {"mass": "4.000 kg", "specific_heat": "4.190 kJ/(kg·K)"},
                },
            },
            "states": {
                "first": {"ice": {"inputs": {T: "-10.0 °C"}}, "water": {"inputs": {T: "15.0 °C"}}},
                "last": {"ice": {"inputs": {}}, "water": {"inputs": {}}},
            },
            "processes": [
                {
                    "id": "mixing", "from": "first", "to": "last", "insulated": True, "equilibrium": ["temperature"],
                    "heat_transfers": [], "work_transfers": [],
                }
            ],
        }
    )  # fmt: skip
    assert found.value("states/last/ice/melted_fraction") == pytest.approx(
        (4 * 4.19 * 15 - 21) / 333.6, abs=1e-6
    )
    assert found.value("states/last/water/temperature") == pytest.approx(273.15, abs=1e-6)


def test_a_fraction_of_another_model_is_no_clue() -> None:
    """A melted fraction among the inputs of a gas fixes nothing and breaks nothing."""
    package = record({T: "20.0 °C", F: "0.5", "pressure": "2.00 bar"}, {"inputs": {T: "40.0 °C"}})
    package["bodies"]["store"] = {
        "substance": "Nitrogen",
        "model": "ideal gas",
        "inputs": {"mass": "1.000 kg"},
    }
    assert energy(case(package), "first") is not None


def test_a_path_of_constant_pressure_needs_no_pressure() -> None:
    """A solid heated at a pressure that nobody states has its end state, no boundary work, and its heat."""
    package = record({T: "-20.0 °C"}, {"inputs": {T: "-10.0 °C"}})
    package["processes"][0]["path"] = "constant pressure"
    found = case(package)
    assert energy(found, "last") == pytest.approx(-21e3)
    assert found.value("processes/p/boundary_work") == 0.0
    assert found.value("processes/p/heat") == pytest.approx(210e3)
