"""The handbook table: complete, plausible, and found by its names."""

from __future__ import annotations

from collections import Counter

import pytest

from checker.outcomes import NotEvaluable
from checker.substances import make_substance
from checker.substances.materials import (
    Material,
    all_materials,
    all_melting_materials,
    material_of,
    melting_material_of,
)
from checker.substances.names import fold, table_rows

CONSTANT = "constant specific heat"


def test_the_table_covers_what_packages_are_made_of() -> None:
    """There are at least 70 materials, solids and liquids, and at least 15 that melt."""
    kinds = Counter(material.kind for material in all_materials())
    assert sum(kinds.values()) >= 70
    assert kinds["liquid"] >= 12
    assert kinds.keys() == {"solid", "liquid"}
    assert len(all_melting_materials()) >= 15


@pytest.mark.parametrize("material", all_materials(), ids=lambda material: material.name)
def test_a_material_is_plausible(material: Material) -> None:
    """Specific heats, densities, ranges and spreads lie where those of solids and liquids do."""
    assert 100.0 < material.specific_heat < 4300.0
    assert material.density is None or 450.0 < material.density < 20000.0
    assert 0.0 < material.heat_spread <= 0.2
    assert 0.0 <= material.density_spread <= 0.22
    assert 240.0 < material.temperature_min < material.temperature_max < 500.0
    assert material.second_heat is None or material.second_heat > 0.95 * material.specific_heat
    assert material.source


@pytest.mark.parametrize("file", ["materials.txt", "melting.txt"])
def test_a_name_stands_for_one_material(file: str) -> None:
    """No name or synonym occurs twice."""
    names = [fold(word) for row in table_rows(file) for word in (row[0], *row[-1].split(";")) if word.strip()]
    assert [name for name, count in Counter(names).items() if count > 1] == []


def test_every_source_is_used_and_known() -> None:
    """The keys of sources are those of the two tables."""
    used = {row[-2] for file in ("materials.txt", "melting.txt") for row in table_rows(file)}
    assert used == {key for key, _ in table_rows("sources.txt")}


def test_materials_that_melt_melt_within_their_range() -> None:
    """A melting temperature lies between the ends of the range, and latent heats are those of melting."""
    for material in all_melting_materials():
        if material.melting_temperature is not None:
            assert material.temperature_min < material.melting_temperature < material.temperature_max
        assert 1e4 < material.latent_heat < 5e5


@pytest.mark.parametrize("name", ["Stainless Steel", "stainless-steel", "austenitic stainless steel"])
def test_spelling_does_not_count(name: str) -> None:
    """Case, blanks and hyphens do not count, and synonyms name the same row."""
    found = material_of(name)
    assert found is not None
    assert found.name == "stainless steel"


@pytest.mark.parametrize("name", ["Steel block", "", "x" * 5000, "steel; drop"])
def test_other_names_are_not_in_the_table(name: str) -> None:
    """A name is found whole or not at all."""
    assert material_of(name) is None
    assert melting_material_of(name) is None


def test_without_constants_the_table_counts() -> None:
    """A named material without stated constants has those of the table, with range and uncertainty."""
    steel = make_substance("stainless steel", CONSTANT, {})
    state = steel.state({"temperature": 373.15, "pressure": 1e5})
    assert state.specific_internal_energy == pytest.approx(480.0 * 100.0)
    assert state.specific_volume == pytest.approx(1.0 / 7930.0)
    assert (steel.uncertainty.density, steel.uncertainty.caloric) == (0.015, 0.05)
    assert steel.valid_range is not None
    assert steel.valid_range.temperature_max == pytest.approx(473.15)
    assert "handbook table" in steel.equation
    assert steel.incompressible


def test_a_stated_density_counts_beside_the_tables_specific_heat() -> None:
    """The stated density is used, and carries no uncertainty of the table."""
    steel = make_substance("stainless steel", CONSTANT, {"density": 8000.0})
    assert steel.state({"temperature": 300.0}).specific_volume == pytest.approx(1.0 / 8000.0)
    assert steel.uncertainty.density == 0.0
    assert steel.uncertainty.caloric == 0.05


def test_a_stated_specific_heat_leaves_the_table_out() -> None:
    """With a stated specific heat nothing comes from the table, the density neither."""
    steel = make_substance("stainless steel", CONSTANT, {"specific_heat": 500.0})
    assert steel.state({"temperature": 300.0}).specific_volume is None
    assert steel.uncertainty.caloric == 0.0
    assert steel.valid_range is None


def test_products_without_a_density_of_their_own() -> None:
    """Mineral wool has a specific heat and no density in the table."""
    wool = make_substance("mineral wool", CONSTANT, {})
    assert wool.state({"temperature": 300.0}).specific_volume is None
    assert wool.uncertainty.density == 0.0


def test_names_out_of_the_table_need_constants() -> None:
    """A name that the table does not have is refused without constants."""
    with pytest.raises(NotEvaluable, match="needs its specific heat"):
        make_substance("Steel block", CONSTANT, {})
