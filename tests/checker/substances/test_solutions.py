"""Brines, glycols and heat transfer liquids."""

from __future__ import annotations

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.substances import Substance, knows_fluid, make_substance
from checker.substances.names import table_rows
from checker.substances.solutions import all_solutions, is_solution

T, P = "temperature", "pressure"
U, H, S = "specific_internal_energy", "specific_enthalpy", "specific_entropy"
NAMES = tuple(row.name for row in all_solutions())


def liquid(name: str, share: float = 0.5) -> Substance:
    """Return a liquid of the table, a solution at a share of the range of its mass fraction."""
    row = next(row for row in all_solutions() if row.name == name)
    if row.fractions is None:
        return make_substance(name, "real fluid", {})
    least, most = row.fractions
    return make_substance(name, "real fluid", {"mass_fraction": least + share * (most - least)})


@settings(max_examples=60, deadline=None)
@given(name=st.sampled_from(NAMES), share=st.floats(0.0, 1.0), part=st.floats(0.0, 1.0))
def test_temperature_energy_entropy_and_enthalpy_find_the_state_again(
    name: str, share: float, part: float
) -> None:
    """Each of T, u, s, and h with p gives the state back; temperature fixes u and s."""
    substance = liquid(name, share)
    span = substance.valid_range
    assert span is not None
    temperature = span.temperature_min + part * (span.temperature_max - span.temperature_min)
    state = substance.state({T: temperature, P: 6e6})
    for known in ({U: state.specific_internal_energy}, {S: state.specific_entropy}):
        assert substance.state(known).temperature == pytest.approx(temperature, rel=1e-9)
    found = substance.state({H: state.specific_enthalpy, P: 6e6})
    assert found.temperature == pytest.approx(temperature, rel=1e-9)


@settings(max_examples=60, deadline=None)
@given(name=st.sampled_from(NAMES), share=st.floats(0.0, 1.0), part=st.floats(0.02, 0.98))
def test_energy_and_entropy_belong_together(name: str, share: float, part: float) -> None:
    """At constant composition du = T ds."""
    substance = liquid(name, share)
    span = substance.valid_range
    assert span is not None
    temperature = span.temperature_min + part * (span.temperature_max - span.temperature_min)
    low, high = (substance.state({T: temperature + step}) for step in (-0.05, 0.05))
    energy = high.specific_internal_energy - low.specific_internal_energy
    assert energy == pytest.approx(temperature * (high.specific_entropy - low.specific_entropy), rel=1e-6)
    assert energy > 0.0


@pytest.mark.parametrize("name", NAMES)
def test_every_liquid_answers_over_its_whole_range(name: str) -> None:
    """Both ends of the range have a state with a density; just outside, neither has one."""
    substance = liquid(name)
    span = substance.valid_range
    assert span is not None
    for temperature in (span.temperature_min, span.temperature_max):
        volume = substance.state({T: temperature}).specific_volume
        assert volume is not None
        assert 3e-4 < volume < 3e-3
    for temperature in (span.temperature_min - 0.1, span.temperature_max + 0.1):
        with pytest.raises(NotEvaluable) as refusal:
            substance.state({T: temperature})
        assert refusal.value.kind == "outside-range"


def test_the_range_begins_where_the_solution_freezes() -> None:
    """More glycol freezes later; without any it is water."""
    lows = [
        make_substance("ethylene glycol solution", "real fluid", {"mass_fraction": x}).valid_range
        for x in (0.0, 0.2, 0.4)
    ]
    temperatures = [span.temperature_min for span in lows if span is not None]
    assert temperatures == sorted(temperatures, reverse=True)
    assert temperatures[0] == pytest.approx(273.15, abs=0.01)


@pytest.mark.parametrize(
    ("substance", "constants", "kind", "words"),
    [
        ("propylene glycol solution", {}, "missing", "needs its mass fraction"),
        ("propylene glycol solution", {"mass_fraction": 0.8}, "outside-range", "outside the data, 0 to 0.6"),
        ("hydrogenated terphenyl", {"mass_fraction": 0.5}, "not-supported", "is no solution"),
    ],
)
def test_a_mass_fraction_that_does_not_fit_says_why(
    substance: str, constants: dict[str, float], kind: str, words: str
) -> None:
    """Missing, outside the data, or stated for a liquid that has none."""
    with pytest.raises(NotEvaluable, match=words) as refusal:
        make_substance(substance, "real fluid", constants)
    assert refusal.value.kind == kind


def test_a_heat_transfer_liquid_below_its_vapour_pressure_boils() -> None:
    """At 380 °C and 1 bar the eutectic of diphenyl oxide and biphenyl is no liquid."""
    oil = make_substance("diphenyl oxide biphenyl eutectic", "real fluid", {})
    assert oil.state({T: 653.15, P: 15e5}).specific_volume is not None
    with pytest.raises(NotEvaluable, match="boils"):
        oil.state({T: 653.15, P: 1e5})


def test_every_name_of_the_table_means_one_liquid_and_no_fluid() -> None:
    """No spelling is that of a pure fluid, which would be found first or hidden."""
    spellings = [name.strip() for row in table_rows("solutions.txt") for name in (row[1], *row[7].split(";"))]
    assert len(spellings) == len(set(spellings))
    assert all(is_solution(name) and not knows_fluid(name) for name in spellings)


def test_the_name_of_the_solute_alone_leads_to_its_solution() -> None:
    """Glycol is no fluid of the table of pure fluids; the reason names the solution."""
    with pytest.raises(NotEvaluable, match="heat transfer liquids: ethylene glycol solution"):
        make_substance("ethylene glycol", "real fluid", {"mass_fraction": 0.3})
