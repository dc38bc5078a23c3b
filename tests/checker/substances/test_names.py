"""The table of fluid names."""

from __future__ import annotations

import pytest
from CoolProp import CoolProp
from hypothesis import given, settings
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.substances.names import all_fluids, fluid_of, fold, knows_fluid, nearest_fluids, table_rows

PSEUDO_PURE = {"Air", "R404A", "R407C", "R410A", "R507A", "SES36"}


def test_the_table_has_every_fluid_of_the_library_once() -> None:
    """Names drift when they are kept twice: table and library hold the same 136 fluids."""
    ours = [fluid.library for fluid in all_fluids()]
    assert sorted(ours) == sorted(CoolProp.FluidsList())
    assert len(ours) == len(set(ours)) == 136


def test_molar_mass_and_kind_are_those_of_the_library() -> None:
    """The molar masses that are answered without the library are the library's own."""
    compared = 0
    for fluid in all_fluids():
        theirs = CoolProp.AbstractState("HEOS", fluid.library).molar_mass()
        assert fluid.molar_mass == pytest.approx(theirs, rel=1e-10), fluid.library
        assert fluid.pure is (fluid.library not in PSEUDO_PURE)
        compared += 1
    assert compared == 136


def test_equation_keys_are_those_of_the_library() -> None:
    """The citation in a report is that of the equation which the library uses."""
    compared = 0
    for row in table_rows("fluids.txt"):
        assert CoolProp.get_BibTeXKey(row[0], "EOS").split(",")[0] == row[4], row[0]
        compared += 1
    assert compared == 136


def test_no_name_means_two_fluids() -> None:
    """After folding, every spelling of the table still belongs to one fluid."""
    owner: dict[str, str] = {}
    for library, name, _, _, _, synonyms in table_rows("fluids.txt"):
        for spelling in (name, library, *filter(None, synonyms.split(";"))):
            assert owner.setdefault(fold(spelling), library) == library, spelling
    assert len(owner) > 300


@pytest.mark.parametrize(
    ("name", "library"),
    [
        ("Steam", "Water"),
        ("R-134a", "R134a"),
        ("r 134A", "R134a"),
        ("HFC-134a", "R134a"),
        ("Refrigerant 22", "R22"),
        ("R-C318", "RC318"),
        ("Carbon dioxide", "CarbonDioxide"),
        ("CO₂", "CarbonDioxide"),
        ("co", "CarbonMonoxide"),
        ("N2", "Nitrogen"),
        ("O2", "Oxygen"),
        ("dry air", "Air"),
        ("AIR", "Air"),
        ("HC-600a", "IsoButane"),
        ("n-butane", "n-Butane"),
        ("butane", "n-Butane"),
        ("ethene", "Ethylene"),
        ("Sulphur dioxide", "SulfurDioxide"),
        ("R1234ze", "R1234ze(E)"),
        ("heavy water", "HeavyWater"),
        ("hydrogen", "Hydrogen"),
        ("para-hydrogen", "ParaHydrogen"),
        (" Water ", "Water"),
    ],
)
def test_trade_names_are_understood(name: str, library: str) -> None:
    """Case, blanks, hyphens, subscripts and the usual prefixes of refrigerants do not count."""
    assert fluid_of(name).library == library


@pytest.mark.parametrize(
    ("name", "near"), [("nitrogin", "Nitrogen"), ("Watr", "Water"), ("carbondioxid", "Carbon")]
)
def test_a_misspelt_name_gets_its_neighbours(name: str, near: str) -> None:
    """An unknown fluid is refused with the names that look most like it."""
    assert not knows_fluid(name)
    with pytest.raises(NotEvaluable) as refusal:
        fluid_of(name)
    assert refusal.value.kind == "not-supported"
    assert near in refusal.value.reason
    assert near in nearest_fluids(name)[0]


@pytest.mark.parametrize(
    "name", ["REFPROP::Water", "HEOS::Water", "Air.mix", "Water&Ethanol", "TTSE&HEOS::Water", ""]
)
def test_commands_of_the_library_are_no_names(name: str) -> None:
    """What the library would take as a command to load or build something is not a fluid."""
    assert not knows_fluid(name)


@settings(max_examples=200, deadline=None)
@given(st.text(max_size=200))
def test_any_text_is_answered(name: str) -> None:
    """Whatever is asked, the table answers with a fluid of its own or with NotEvaluable."""
    try:
        fluid = fluid_of(name)
    except NotEvaluable:
        assert not knows_fluid(name)
    else:
        assert fluid in all_fluids()
