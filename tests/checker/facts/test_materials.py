"""What the handbook table says of a body: taken constants, their range, and stated ones beside it."""

from __future__ import annotations

from typing import Any

import pytest

from checker.case import Case
from checker.facts.materials import (
    names_material,
    outside_table,
    table_checks,
    taken_from_table,
    temperatures_fit,
)
from tests.checker.cases import case


def block(substance: str, model: str = "constant specific heat", hot: str = "90.0 °C", **inputs: str) -> Case:
    """Return the case of a block that is heated from 20 °C."""
    package: dict[str, Any] = {
        "id": "r",
        "title": "Block",
        "bodies": {
            "block": {"substance": substance, "model": model, "inputs": {"mass": "1.000 kg", **inputs}}
        },
        "states": {
            "cold": {"block": {"inputs": {"temperature": "20.0 °C"}}},
            "hot": {"block": {"inputs": {"temperature": hot}}},
        },
        "processes": [{"id": "heating", "from": "cold", "to": "hot"}],
    }
    return case(package)


def unlike(found: Case) -> list[str]:
    """Return the names of the stated constants outside the spread of the table."""
    return [
        c.statement.term.name
        for c in table_checks(found, "block")
        if not c.low <= c.statement.value <= c.high
    ]


def test_what_is_taken_is_named() -> None:
    """Specific heat and density are taken where neither is stated; of wool there is no density to take."""
    taken = [taken_from_table(block(name), "block") for name in ("steel", "mineral wool")]
    assert [one.names for one in taken if one] == [("specific heat", "density"), ("specific heat",)]
    assert taken_from_table(block("steel", specific_heat="0.47 kJ/(kg·K)"), "block") is None


@pytest.mark.parametrize(
    ("hot", "outside"), [("119.9 °C", False), ("120.2 °C", False), ("121.0 °C", True), ("350 °C", True)]
)
def test_where_the_table_holds(hot: str, outside: bool) -> None:
    """A temperature beyond the range and the allowance is outside; a stated constant has no range."""
    assert (outside_table(block("steel", hot=hot), "hot", "block") is not None) is outside
    assert outside_table(block("steel", hot=hot, specific_heat="0.5 kJ/(kg·K)"), "hot", "block") is None


@pytest.mark.parametrize(
    ("substance", "heat", "wrong"),
    [
        ("aluminium", "0.385 kJ/(kg·K)", True),
        ("aluminium", "0.214 kJ/(kg·K)", True),
        ("aluminium", "0.9 kJ/(kg·K)", False),
        ("aluminium", "0.88 kJ/(kg·K)", False),
        ("steel", "0.45 kJ/(kg·K)", False),
        ("steel", "0.48 kJ/(kg·K)", False),
        ("steel", "0.12 kJ/(kg·K)", True),
        ("stainless steel", "0.46 kJ/(kg·K)", False),
        ("stainless steel", "0.5 kJ/(kg·K)", False),
        ("concrete", "1.0 kJ/(kg·K)", False),
        ("concrete", "0.88 kJ/(kg·K)", False),
        ("wood", "2.4 kJ/(kg·K)", True),
        ("ice", "2.1 kJ/(kg·K)", False),
    ],
)
def test_usual_specific_heats_are_not_asked_about(substance: str, heat: str, wrong: bool) -> None:
    """What handbooks give for a material is within its spread; another material's, or kcal, is not."""
    assert unlike(block(substance, specific_heat=heat)) == (["specific_heat"] if wrong else [])


def test_a_mean_over_a_wide_span_may_be_larger() -> None:
    """0.55 kJ/(kg·K) for steel is asked about up to 90 °C and not up to 400 °C."""
    assert unlike(block("steel", specific_heat="0.55 kJ/(kg·K)")) == ["specific_heat"]
    assert unlike(block("steel", hot="400 °C", specific_heat="0.55 kJ/(kg·K)")) == []
    assert not temperatures_fit(block("steel", hot="900 °C", specific_heat="0.55 kJ/(kg·K)"), "block")


def test_a_density_is_held_against_the_table() -> None:
    """The density of aluminium stated for steel is asked about, one between grades is not."""
    assert unlike(block("steel", specific_heat="0.47 kJ/(kg·K)", density="2700 kg/m³")) == ["density"]
    assert unlike(block("steel", specific_heat="0.47 kJ/(kg·K)", density="7800 kg/m³")) == []


def test_melting_constants_are_held_against_the_table() -> None:
    """A latent heat of evaporation, and a melting temperature 10 K off, are not those of water."""
    found = block("Water", "phase change", latent_heat="2500 kJ/kg", melting_temperature="10 °C")
    assert sorted(unlike(found)) == ["latent_heat", "melting_temperature"]
    assert unlike(block("Water", "phase change", latent_heat="335 kJ/kg")) == []


def test_other_names_and_gases_are_left_alone() -> None:
    """A name out of the table, and a gas with a name of the table, are not held against it."""
    assert not names_material(block("Cast block", specific_heat="0.385 kJ/(kg·K)"), "block")
    assert not names_material(block("steel"), "block")
    gas = block("Water", cp="1.9 kJ/(kg·K)", gas_constant="0.4615 kJ/(kg·K)")
    assert not names_material(gas, "block")
