"""Tolerance, digits, standing: stated values against the alternate calculation."""

import math
from typing import Any

import pytest

from checker import review
from checker.basis import Basis
from checker.findings import Outcome, Standing
from tests.checker.cases import case, cases, compared, gas_bottle, package

Q = "processes/warming/heat"
DU = "processes/warming/internal_energy_change"
SGEN = "processes/warming/entropy_generation"
GENERATED = 0.1 * 3.116 * math.log(400 / 300) - 31.16 / 450
"""S_gen of the helium bottle in closed form. [kJ/K]"""


def test_the_right_value_agrees_and_holds():
    """ΔU = m c_v ΔT = 31.16 kJ."""
    c = compared(case(gas_bottle({"internal_energy_change": "31.16 kJ"})), DU)
    assert (c.outcome, c.standing) == (Outcome.AGREES, Standing.HOLDS)
    assert c.independent == pytest.approx(31160.0, rel=1e-12)


def test_tolerance_is_the_allowance_plus_the_expanded_half_width():
    """0.5 % of the largest term, plus 2·0.005/√3 kJ from the two stated decimals; constants add nothing."""
    c = compared(case(gas_bottle({"internal_energy_change": "31.16 kJ"})), DU)
    assert c.tolerance == pytest.approx(0.005 * 31160.0 + 2.0 * 5.0 / math.sqrt(3.0), rel=1e-9)


@pytest.mark.parametrize(
    ("text", "outcome"),
    [
        ("31.32 kJ", Outcome.AGREES),
        ("31.33 kJ", Outcome.WRONG),
        ("31.00 kJ", Outcome.AGREES),
        ("30.98 kJ", Outcome.WRONG),
    ],
)
def test_the_edge_of_the_tolerance_is_where_it_is_said_to_be(text, outcome):
    """Just inside agrees, just outside is wrong, on both sides."""
    assert compared(case(gas_bottle({"internal_energy_change": text})), DU).outcome is outcome


def test_a_result_of_two_digits_is_not_accused():
    """31 kJ is right: its half-width of 0.5 kJ covers 31.16 kJ."""
    c = compared(case(gas_bottle({"internal_energy_change": "31 kJ"})), DU)
    assert c.outcome is Outcome.AGREES


def test_zeros_that_end_an_integer_leave_digits_open():
    """31 320 J may mean ±0.5 J or ±5 J, 31 320. J only ±0.5 J: the deviation of 160 J is open for the first only."""
    closed, open_digits = (
        compared(case(gas_bottle({"internal_energy_change": text})), DU) for text in ("31320. J", "31320 J")
    )
    assert closed.tolerance < 160.0
    assert closed.open_tolerance == closed.tolerance
    assert open_digits.tolerance < 160.0 < open_digits.open_tolerance


def test_a_wrong_heat_is_the_origin_and_what_follows_is_inherited():
    """Q stated as 33.16 kJ: S_gen made from it is inherited, not another origin."""
    wrong = 0.1 * 3.116 * math.log(400 / 300) - 33.16 / 450
    found = case(gas_bottle({"heat": "33.16 kJ", "entropy_generation": f"{wrong:.5f} kJ/K"}))
    assert compared(found, Q).standing is Standing.ORIGIN
    assert compared(found, SGEN).standing is Standing.INHERITED
    assert Q in compared(found, SGEN).inherits_from


def test_two_errors_on_one_chain_are_two_origins():
    """A wrong S_gen that does not follow from the wrong Q starts by itself."""
    found = case(gas_bottle({"heat": "33.16 kJ", "entropy_generation": "0.0500 kJ/K"}))
    assert compared(found, Q).standing is Standing.ORIGIN
    assert compared(found, SGEN).standing is Standing.ORIGIN


def test_a_right_result_from_wrong_numbers_is_seen():
    """S_gen right although Q and ΔS are stated wrong."""
    found = case(gas_bottle({"heat": "35.16 kJ", "entropy_generation": f"{GENERATED:.5f} kJ/K"}))
    assert compared(found, SGEN).standing is Standing.ERRORS_CANCEL


def test_rounding_of_right_parents_is_not_called_cancelling():
    """S_gen right to five digits beside Q and ΔS of three digits raises nothing."""
    found = case(
        gas_bottle(
            {
                "heat": "31.2 kJ",
                "entropy_change": "0.0896 kJ/K",
                "entropy_generation": f"{GENERATED:.5f} kJ/K",
            }
        )
    )
    assert {c.standing for c in found.compared} == {Standing.HOLDS}


def test_a_wrong_state_property_explains_what_was_made_from_it():
    """The hot pressure read as 7 bar and V, s looked up from it with T: one origin."""
    r, t = 2077.0, 400.0
    volume = 0.1 * r * t / 7e5
    found = case(gas_bottle(hot={"pressure": "7.000 bar", "volume": f"{volume * 1e3:.2f} L"}))
    assert compared(found, "states/hot/gas/pressure").standing is Standing.ORIGIN
    assert compared(found, "states/hot/gas/volume").standing is Standing.INHERITED


def test_a_surplus_input_is_compared():
    """A third property among the inputs must agree with the two that are used."""
    record = gas_bottle()
    record["states"]["cold"]["gas"]["inputs"]["specific_volume"] = "1.300 m³/kg"
    c = compared(case(record), "states/cold/gas/specific_volume")
    assert c.outcome is Outcome.WRONG
    assert c.independent == pytest.approx(2077.0 * 300.0 / 5e5)


def test_without_a_boundary_temperature_the_generation_is_not_evaluable_and_names_it():
    """What is missing is said; it never becomes agreement."""
    record = gas_bottle({"entropy_generation": "0.020 kJ/K"})
    del record["processes"][0]["heat_transfers"][0]["boundary_temperature"]
    c = compared(case(record), SGEN)
    assert c.outcome is Outcome.NOT_EVALUABLE
    assert "boundary temperature" in c.reason


def test_rounded_inputs_widen_the_tolerance_where_the_basis_says_so():
    """input_digits: rounded carries half a unit of every last digit into U."""
    record = gas_bottle({"internal_energy_change": "31.16 kJ"})
    exact = compared(case(record), DU)
    rounded = compared(case(record, basis=Basis(input_digits="rounded")), DU)
    # The two temperatures move ΔU by m·c_v·0.05 K each, the mass by 0.00005 kg, c_v by 0.0005 kJ/(kg·K).
    moves = [311.6 * 0.05, 311.6 * 0.05, 311600 * 0.00005, 0.1 * 100.0 * 0.5]
    carried = 2.0 * math.sqrt(sum(m * m for m in moves) / 3.0)
    u = math.hypot(2.0 * 5.0 / math.sqrt(3.0), carried)
    assert rounded.tolerance == pytest.approx(0.005 * 31160.0 + u, rel=1e-6)
    assert rounded.tolerance > exact.tolerance


def test_a_stated_plus_minus_widens_the_tolerance():
    """± on an input is a half-width unless the basis says standard uncertainty."""
    record = gas_bottle({"internal_energy_change": "31.16 kJ"})
    record["states"]["hot"]["gas"]["inputs"]["temperature"] = "400.0 ± 2.0 K"
    half = compared(case(record), DU)
    standard = compared(case(record, basis=Basis(plus_minus="standard uncertainty")), DU)
    stated = 2.0 * 5.0 / math.sqrt(3.0)
    assert half.tolerance == pytest.approx(155.8 + math.hypot(stated, 2 * 623.2 / math.sqrt(3.0)), rel=1e-6)
    assert standard.tolerance == pytest.approx(155.8 + math.hypot(stated, 2 * 623.2), rel=1e-6)


def test_a_deviation_that_the_inputs_last_digit_explains_is_marked():
    """With T stated as 400 K (±0.5 K) a ΔU off by 0.2 kJ is a question, not an accusation."""
    record = gas_bottle({"internal_energy_change": "31.36 kJ"})
    record["states"]["hot"]["gas"]["inputs"]["temperature"] = "400 K"
    c = compared(case(record), DU)
    assert c.outcome is Outcome.WRONG
    assert c.explained_by_digits


def test_positive_in_flips_work_and_nothing_else():
    """Work done on the gas is positive where the package says positive in."""
    record = gas_bottle({"shaft_work": "10.00 kJ", "heat": "21.16 kJ"})
    record["processes"][0]["work_transfers"] = [
        {"id": "fan", "kind": "shaft", "inputs": {"energy": "10.00 kJ"}}
    ]
    found = case(record, conventions={"work": "positive in"})
    assert {c.outcome for c in found.compared} == {Outcome.AGREES}


def free_expansion() -> dict[str, Any]:
    """Return helium that doubles its volume freely: Q = W = ΔU = 0, and only ΔS = m·R·ln 2."""
    record = gas_bottle({"internal_energy_change": "0 kJ", "entropy_change": "0.1440 kJ/K"})
    process = record["processes"][0]
    process.update(path="free expansion", heat_transfers=[])
    record["states"]["hot"]["gas"]["inputs"] = {"pressure": "2.500 bar"}
    return record


def test_a_balance_without_terms_is_held_against_what_the_gas_holds():
    """All energies of a free expansion are zero but for rounding: 0.5 % of m·p·v = 62.31 kJ is tolerated."""
    c = compared(case(free_expansion()), DU)
    assert c.outcome is Outcome.AGREES
    assert c.allowance == pytest.approx(0.005 * 0.1 * 2.077e3 * 300.0, rel=1e-9)


def test_a_balance_without_terms_closes():
    """What rounding leaves of a free expansion's balance is nothing, and no finding."""
    document = package(free_expansion())
    assert review(document).findings == ()


def with_input(name: str, text: str, path: str = "constant volume") -> dict[str, Any]:
    """Return the helium bottle with one more input of its process."""
    record = gas_bottle()
    record["processes"][0].update(inputs={name: text}, path=path)
    del record["processes"][0]["work_transfers"]
    return record


@pytest.mark.parametrize(
    ("path", "text"), [("constant volume", "10.00 kJ"), ("constant pressure", "22.00 kJ")]
)
def test_boundary_work_as_an_input_is_held_against_the_path(path, text):
    """Nothing at constant volume, m·R·ΔT = 20.77 kJ at constant pressure: an input cannot say otherwise."""
    c = compared(case(with_input("boundary_work", text, path)), "processes/warming/boundary_work")
    assert c.outcome is Outcome.WRONG
    assert c.independent == pytest.approx(0.0 if path == "constant volume" else 20770.0, abs=1e-6)


def test_boundary_work_as_an_input_that_the_path_gives_agrees():
    """20.77 kJ is what the path says too."""
    record = with_input("boundary_work", "20.77 kJ", "constant pressure")
    assert compared(case(record), "processes/warming/boundary_work").outcome is Outcome.AGREES


def test_boundary_work_that_finds_the_state_is_not_held_against_itself():
    """Where the work is what leads to the last state there is nothing to compare it with."""
    record = with_input("boundary_work", "20.77 kJ", "constant pressure")
    record["states"]["hot"]["gas"] = {"inputs": {}, "results": {"temperature": "400.0 K"}}
    found = case(record)
    assert compared(found, "states/hot/gas/temperature").outcome is Outcome.AGREES
    assert [c.statement.pointer for c in found.compared] == ["states/hot/gas/temperature"]


@pytest.mark.parametrize(
    ("text", "explained"), [("31.1 kJ", None), ("31 kJ", True), ("32 kJ", False), ("31.5 kJ", False)]
)
def test_a_surplus_input_is_exact_as_written(text, explained):
    """The digits of an input widen no tolerance; where they alone would explain a deviation it is marked."""
    c = compared(case(with_input("internal_energy_change", text)), DU)
    assert (c.outcome is Outcome.AGREES) is (explained is None)
    assert c.explained_by_digits is bool(explained)


def test_a_linked_mass_is_held_against_an_own_one():
    """The same gas in two records has one mass."""
    other = gas_bottle(id="other")
    other["states"]["cold"]["gas"] = {"same_as": "records/bottle/states/hot/gas"}
    other["states"]["hot"]["gas"]["inputs"] = {"temperature": "450.0 K"}
    other["bodies"]["gas"]["inputs"]["mass"] = "0.1100 kg"
    found = cases(gas_bottle(), other)["other"]
    assert compared(found, "bodies/gas/mass").outcome is Outcome.WRONG


@pytest.mark.parametrize(
    ("text", "explained"), [("0 kJ/K", True), ("0.0 kJ/K", True), ("0.00 kJ/K", False), ("0.000 kJ/K", False)]
)
def test_a_zero_is_the_claim_of_nothing(text, explained):
    """S_gen of 0.0204 kJ/K is not nothing; digits coarser than a tenth of ΔS = 0.0896 kJ/K may hide it."""
    c = compared(case(gas_bottle({"entropy_generation": text})), SGEN)
    assert (c.outcome, c.explained_by_digits) == (Outcome.WRONG, explained)


def test_a_zero_that_is_nothing_agrees_however_it_is_written():
    """No work is done at constant volume."""
    c = compared(case(gas_bottle({"boundary_work": "0 kJ"})), "processes/warming/boundary_work")
    assert c.outcome is Outcome.AGREES


@pytest.mark.parametrize(("text", "outcome"), [("1", Outcome.WRONG), ("0.5", Outcome.AGREES)])
def test_a_quality_of_one_is_all_vapour(text, outcome):
    """A quality of 0.525 is half-way, and no rounding makes it 1."""
    record = {
        "id": "tank",
        "bodies": {"water": {"substance": "Water", "model": "real fluid", "inputs": {"mass": "1.000 kg"}}},
        "states": {
            "now": {
                "water": {
                    "inputs": {"temperature": "100.0 °C", "specific_volume": "0.8790 m³/kg"},
                    "results": {"quality": text},
                }
            }
        },
        "processes": [],
    }
    assert compared(case(record), "states/now/water/quality").outcome is outcome


def with_coarse_mass(**stated: str) -> dict[str, Any]:
    """Return the bottle with its mass to three digits and S_gen off by 0.00051 kJ/K."""
    record = gas_bottle({**stated, "entropy_generation": f"{GENERATED + 0.00051:.5f} kJ/K"})
    record["bodies"]["gas"]["inputs"]["mass"] = "0.100 kg"
    return record


def test_last_digits_above_stated_results_explain_nothing_below_them():
    """With Q and ΔS stated right to four digits, the open digits of the mass cannot have moved S_gen = ΔS − Q/T_b."""
    alone = compared(case(with_coarse_mass()), SGEN)
    beside = compared(case(with_coarse_mass(heat="31.16 kJ", entropy_change="0.08964 kJ/K")), SGEN)
    assert (alone.outcome, alone.explained_by_digits) == (Outcome.WRONG, True)
    assert (beside.outcome, beside.standing, beside.explained_by_digits) == (
        Outcome.WRONG,
        Standing.ORIGIN,
        False,
    )


def test_last_digits_below_stated_results_still_explain():
    """Q alone stated: ΔS, and with it S_gen, still moves with the digits of the mass."""
    found = compared(case(with_coarse_mass(heat="31.16 kJ")), SGEN)
    assert found.explained_by_digits


@pytest.mark.parametrize(("generation", "standing"), [(2.047, Standing.INHERITED), (2.1, Standing.ORIGIN)])
def test_what_follows_from_a_large_wrong_number_is_held_to_its_own_size(generation, standing):
    """Q and ΔS stated a hundred times too large: S_gen follows within 0.5 % of 8.96 kJ/K, not of 0.0896 kJ/K."""
    stated = {"heat": "3116 kJ", "entropy_change": "8.964 kJ/K"}
    found = case(gas_bottle({**stated, "entropy_generation": f"{generation:.3f} kJ/K"}))
    assert compared(found, SGEN).standing is standing
