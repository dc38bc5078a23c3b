"""The search for causes: order, chance, caps, several origins of one slip, and what speaks against a match."""

from __future__ import annotations

import math

import pytest

from checker.slips import diagnose, search
from checker.slips.budget import LEAST_PER_ORIGIN, MOST_PER_ORIGIN, Budget, share
from checker.slips.catalogue import CATALOGUE
from checker.slips.search import BY_CHANCE, CAPPED, NONE_FITS, Diagnosis
from checker.slips.slip import Slip
from tests.checker.cases import case
from tests.checker.slips.records_of_slips import CV, DH, DU, P1, T1, T2, R, Record, gas


def only(record: Record, catalogue: tuple[Slip, ...] = CATALOGUE) -> Diagnosis:
    """Return the diagnosis of a record with one origin."""
    (found,) = diagnose(case(record), catalogue).values()
    return found


def change(text: str) -> Record:
    """Return a record with one stated change of internal energy; 31.16 kJ is right."""
    return gas(results={"internal_energy_change": text})


def test_a_cause_is_stated_with_its_value():
    """c_p for c_v gives 51.93 kJ, four digits of which leave little to chance."""
    found = only(change("51.93 kJ"))
    assert found.note == ""
    assert found.causes[0].slip == "cp for cv"
    assert found.causes[0].likely
    assert found.causes[0].value == pytest.approx(DH / 1000.0)
    assert found.chance < 0.03


def test_no_slip_fits_an_arbitrary_number():
    """Where nothing reproduces the digits, no cause is named and that is said."""
    found = only(change("44.719 kJ"))
    assert found.causes == ()
    assert found.note.startswith(NONE_FITS)


def test_two_digits_leave_it_to_chance():
    """A number of two digits is matched by accident: what fits is listed, and none is stated as the cause."""
    found = only(change("52 kJ"))
    assert found.note.startswith(BY_CHANCE)
    assert "cp for cv" in {cause.slip for cause in found.causes}
    assert not any(cause.likely for cause in found.causes)


def test_chance_falls_with_every_digit():
    """Each further digit makes a match by accident less likely, about ten times."""
    chances = [only(change(f"{DH / 1000.0:.{places}f} kJ")).chance for places in (1, 2, 3)]
    assert chances[0] > 5.0 * chances[1] > 25.0 * chances[2] > 0.0


def test_competing_slips_are_all_named_the_simplest_first():
    """The reversed sign may be states swapped or a sign in writing; a digit slip with the same digits comes last."""
    found = only(change("-31.16 kJ"))
    names = [cause.slip for cause in found.causes]
    assert {"states swapped", "sign reversed"} <= set(names)
    ranks = {slip.name: slip.rank for slip in CATALOGUE}
    assert ranks[names[0]] == min(ranks[name] for name in names)


def test_the_rest_of_the_record_decides_between_two_slips():
    """A pressure ten times as large shows in v and in ΔS, a point shifted in writing v down does not."""
    mass, wrong = 0.1234, R * T1 / (10.0 * P1)
    record = gas(
        "isothermal",
        {"entropy_change": f"{mass * R * math.log(2.5):.6g} J/K"},
        body={"mass": "0.1234 kg"},
        cold_results={"specific_volume": f"{wrong:.6g} m³/kg"},
        hot={"pressure": "2.000 bar"},
    )
    written = [cause.slip for cause in only(record).causes]
    assert written[0] == "decimal shifted"
    record["processes"][0]["results"]["entropy_change"] = f"{mass * R * math.log(25.0):.6g} J/K"
    used = next(iter(diagnose(case(record)).values()))
    assert used.causes[0].slip == "pressure in another unit"  # 5 bar as 5 MPa


def test_one_slip_explains_several_origins():
    """A mass of 0.12 kg used as 0.21 kg spoils ΔU and ΔS, which is one finding and not two."""
    found = diagnose(
        case(
            gas(
                results={
                    "internal_energy_change": f"{0.21 * CV * (T2 - T1) / 1000.0:.6g} kJ",
                    "entropy_change": f"{0.21 * CV * math.log(T2 / T1):.6g} J/K",
                },
                body={"mass": "0.1200 kg"},
            )
        )
    )
    ((pointer, own),) = found.items()
    both = {"processes/change/internal_energy_change", "processes/change/entropy_change"}
    assert own.causes[0].slip == "input digits transposed"
    assert own.note == ""
    assert {pointer, *own.explains} == both


def test_what_the_record_confirms_speaks_against_a_match():
    """Where an input slip would spoil a result that is right, it is listed behind and not stated as the cause."""
    record = gas(
        results={"internal_energy_change": f"{DU / 1000.0:.6g} kJ"},
        cold_results={"specific_volume": f"{R * 350.0 / P1:.6g} m³/kg"},
        cold={"temperature": "300.0 K"},
    )
    found = next(iter(diagnose(case(record)).values()))
    assert not any(cause.likely and cause.slip.startswith("input") for cause in found.causes)


def test_a_capped_search_says_so(monkeypatch):
    """Where the budget is spent before all slips are tried, the diagnosis tells it."""
    monkeypatch.setattr("checker.slips.budget.MOST_PER_ORIGIN", 3)
    monkeypatch.setattr("checker.slips.budget.LEAST_PER_ORIGIN", 3)
    assert CAPPED in only(change("44.719 kJ")).note


def test_many_origins_share_the_budget():
    """One origin may cost more than each of many, and none has less than the slips of one formula need."""
    assert share(1) == MOST_PER_ORIGIN
    assert share(10) < share(1)
    assert share(10_000) == LEAST_PER_ORIGIN


def test_dear_trials_do_not_crowd_out_cheap_ones():
    """After a trial that is too dear, cheap ones are still made."""
    budget = Budget(dear=100, cheap=10)
    assert not budget.spend(101)
    assert budget.hit
    assert budget.spend(1)
    assert budget.spend(100)
    assert not budget.spend(9)


def test_every_slip_costs_something():
    """A trial that changes the result itself is counted, so that the number of trials is bounded."""
    budget = Budget(dear=0, cheap=2)
    assert [budget.spend(0) for _ in range(3)] == [True, True, False]
    assert budget.spent


def test_a_slip_left_out_is_not_replaced_by_a_stranger():
    """Without its kind in the catalogue, c_p for c_v finds no other cause that is stated."""
    kept = tuple(slip for slip in CATALOGUE if slip.name != "cp for cv")
    assert not any(cause.likely for cause in only(change("51.93 kJ"), kept).causes)


def test_a_record_that_agrees_has_no_diagnosis():
    """Nothing is searched for where nothing is wrong."""
    assert diagnose(case(change("31.16 kJ"))) == {}


def test_nothing_stated_is_matched_by_nothing_alone():
    """A stated zero is the result of an omission, never of a unit that makes a number small."""
    found = only(gas(results={"heat": "0.000 kJ"}))
    assert "work for heat" in {cause.slip for cause in found.causes}
    assert "kJ and J mixed up" not in {cause.slip for cause in found.causes}


def test_a_search_of_a_failing_slip_goes_on(monkeypatch):
    """A slip that meets a number without a logarithm is passed over; the others are still tried."""

    def failing(_bench):
        """Fail before anything is yielded."""
        raise ValueError("no value")
        yield {}

    broken = (Slip("broken", "it breaks", 1, failing), *CATALOGUE)
    assert only(change("51.93 kJ"), broken).causes[0].slip == "cp for cv"
    assert search.CATALOGUE is CATALOGUE


def test_the_second_slip_of_a_record_is_found_under_the_first():
    """With a mass of 0.12 kg used as 0.21 kg, ΔS from that mass has the decimal logarithm."""
    record = gas(
        results={
            "internal_energy_change": f"{0.21 * CV * (T2 - T1) / 1000.0:.6g} kJ",
            "entropy_change": f"{0.21 * CV * math.log10(T2 / T1):.6g} J/K",
        },
        body={"mass": "0.1200 kg"},
    )
    found = diagnose(case(record))
    assert [own.causes[0].slip for own in found.values()] == [
        "input digits transposed",
        "decimal logarithm",
    ] or [own.causes[0].slip for own in found.values()] == ["decimal logarithm", "input digits transposed"]
