"""One quantity moves everything that it stands in: closed forms of what is shared."""

import math

import pytest

from checker.budget import Kind
from tests.checker.cases import case, cases, compared, gas_bottle

SGEN = "processes/warming/entropy_generation"
WITH = "processes/warming/entropy_generation_with_surroundings"
MC = 311.6
"""m·c_v of the helium bottle. [J/K]"""


def standard(found, pointer, source):
    """Return the standard contribution of one input to a quantity. [SI, with its sign]"""
    effect = next(e for e in found.moves.effects if e.source.name == source)
    return effect.moves.get(found.key(pointer), 0.0)


def bottle(**inputs):
    """Return the helium bottle with a hot temperature of ±3 K, and with other inputs of its heat transfer."""
    record = gas_bottle({"entropy_generation": "0.02040 kJ/K"})
    record["states"]["hot"]["gas"]["inputs"]["temperature"] = "400.0 ± 3.0 K"
    record["processes"][0]["heat_transfers"][0].update(inputs)
    return record


def test_one_temperature_in_two_terms_of_the_generation_moves_both():
    """S_gen = C·ln(T2/T1) − C·(T2 − T1)/T_b, so that ∂S/∂T2 = C/T2 − C/T_b and not the root of their squares."""
    found = case(bottle())
    expected = MC * (1.0 / 400.0 - 1.0 / 450.0) * 3.0 / math.sqrt(3.0)
    assert standard(found, SGEN, "states/hot/gas/temperature") == pytest.approx(expected, rel=1e-3)


def test_a_boundary_at_the_system_is_the_systems_own_temperature():
    """With the boundary at the system S_gen = 0 whatever T2 is: nothing of its ± is left."""
    found = case(bottle(boundary_temperature="system"))
    assert found.value(SGEN) == pytest.approx(0.0, abs=1e-6)
    assert standard(found, SGEN, "states/hot/gas/temperature") == pytest.approx(0.0, abs=1e-6)


def test_surroundings_stated_once_move_every_reservoir_that_they_are():
    """Two heats to the surroundings: S_gen with surroundings moves by Q/T0² of their sum."""
    record = gas_bottle()
    record["states"]["hot"]["gas"]["inputs"]["temperature"] = "250.0 K"
    record["processes"][0]["heat_transfers"] = [
        {"id": "one", "boundary_temperature": "300.0 K", "inputs": {"energy": "-10.00 kJ"}},
        {"id": "two", "boundary_temperature": "300.0 K"},
    ]
    surroundings = {"temperature": "290.0 ± 6.0 K", "pressure": "1.013 bar"}
    found = case(record, surroundings=surroundings)
    heat = MC * -50.0
    expected = heat / 290.0**2 * 6.0 / math.sqrt(3.0)
    assert standard(found, WITH, "surroundings/temperature") == pytest.approx(expected, rel=1e-3)


def test_a_state_that_is_the_same_as_another_moves_with_it():
    """T1 ± in the first record moves the second one's ΔU by −C·u(T1): its first state is the first record's last."""
    other = gas_bottle({"internal_energy_change": "15.58 kJ"}, id="other")
    other["states"]["cold"]["gas"] = {"same_as": "records/bottle/states/hot/gas"}
    other["states"]["hot"]["gas"]["inputs"] = {"temperature": "450.0 K"}
    found = cases(bottle(), other)["other"]
    pointer = "processes/warming/internal_energy_change"
    expected = -MC * 3.0 / math.sqrt(3.0)
    assert standard(found, pointer, "states/hot/gas/temperature") == pytest.approx(expected, rel=1e-6)


def two_vessels(second: str):
    """Return two vessels of gas that come to one temperature, the one cooled by as much as the other is warmed."""
    vessel = {"model": "real fluid", "inputs": {"mass": "1.000 kg"}}
    return {
        "id": "vessels",
        "bodies": {"a": {"substance": "Nitrogen", **vessel}, "b": {"substance": second, **vessel}},
        "states": {
            "first": {
                "a": {"inputs": {"temperature": "300.0 K", "pressure": "1.000 bar"}},
                "b": {"inputs": {"temperature": "400.0 K", "pressure": "1.000 bar"}},
            },
            "last": {
                "a": {"inputs": {"temperature": "350.0 K"}},
                "b": {"inputs": {"temperature": "350.0 K"}},
            },
        },
        "processes": [
            {
                "id": "mixing",
                "from": "first",
                "to": "last",
                "path": {"a": "constant volume", "b": "constant volume"},
                "results": {"internal_energy_change": "0.0 kJ"},
            }
        ],
    }


def caloric(second: str) -> list[tuple[str, float]]:
    """Return bodies and size of what the models' caloric uncertainty contributes to ΔU. [J]"""
    budget = compared(case(two_vessels(second)), "processes/mixing/internal_energy_change").budget
    return [(term.source, term.size) for term in budget.terms if term.kind is Kind.CALORIC]


def test_bodies_of_one_equation_err_together():
    """What nitrogen gains here it loses there: the equation's error of 0.8 % of 37 kJ is gone, but for 0.8 % of ΔU."""
    ((bodies, size),) = caloric("Nitrogen")
    assert bodies == "a, b"
    assert size < 0.008 * 1000.0


def test_bodies_of_two_equations_err_apart():
    """Argon errs by itself: both equations stand in the budget, each with its own share."""
    found = dict(caloric("Argon"))
    assert set(found) == {"a", "b"}
    assert found["a"] == pytest.approx(0.008 * 743.0 * 50.0, rel=0.02)
    assert found["b"] == pytest.approx(0.02 * 312.5 * 50.0, rel=0.02)


def test_two_pointers_that_name_one_quantity_are_one_source():
    """The lone heat transfer is the heat of its process: written twice it is one leaf, and its ± counts once."""
    record = gas_bottle({"temperature_change": "100.0 K"})
    record["states"]["hot"]["gas"] = {"inputs": {}}
    process = record["processes"][0]
    process["inputs"] = {"heat": "31.16 ± 0.30 kJ"}
    process["heat_transfers"][0]["inputs"] = {"energy": "31.16 kJ"}
    found = case(record)
    sources = [e.source for e in found.moves.effects]
    assert [source.kind for source in sources] == [Kind.PLUS_MINUS]
    move = sources[0].shifts["given/processes/warming/heat"]
    assert move == pytest.approx(300.0 / math.sqrt(3.0))
