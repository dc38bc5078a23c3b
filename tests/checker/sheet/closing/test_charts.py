"""Coordinates of an unknown state: what is fixed, what is sought, and what a model's plateaus ask for."""

from __future__ import annotations

import pytest

from checker.sheet.closing.charts import boils, chart_of, melts, usable_clues
from checker.sheet.melting import MeltingState
from checker.sheet.models import BodyModel
from checker.sheet.states import Clue, StatePlan
from checker.submission import Body
from checker.substances import make_substance
from checker.substances.interface import Substance
from tests.checker.cases import case, gas_bottle

WATER = make_substance("Water", "real fluid", {})
GAS = make_substance("Nitrogen", "ideal gas", {})
BLOCK = make_substance("Block", "constant specific heat", {"specific_heat": 500.0})
WAX = make_substance(
    "Wax",
    "phase change",
    {
        "melting_temperature": 330.0,
        "latent_heat": 2e5,
        "specific_heat_of_solid": 2e3,
        "specific_heat_of_liquid": 2.2e3,
    },
)


def planned(*names: str, **more: object) -> tuple[StatePlan, dict[str, Clue]]:
    """Return a state of which some properties are known."""
    (body,) = case(gas_bottle()).record.bodies.values()
    assert isinstance(body, Body)
    clues = {name: Clue(name, f"given/states/s/b/{name}") for name in names}
    plan = StatePlan("s", "b", BodyModel(body, (), ()), tuple(clues.values()), **more)  # type: ignore[arg-type]  # fields by name
    return plan, clues


FLUIDS = [
    (GAS, (), None, ("temperature", "specific_volume")),
    (GAS, ("pressure",), "pressure", ("temperature",)),
    (GAS, ("temperature",), "temperature", ("specific_volume",)),
    (GAS, ("specific_volume", "pressure"), "specific_volume", ("temperature",)),
    (WATER, ("pressure",), "pressure", ("specific_enthalpy",)),
    (WATER, ("quality",), "quality", ("temperature",)),
]


@pytest.mark.parametrize(("substance", "known", "fixed", "free"), FLUIDS)
def test_coordinates_of_a_fluid(
    substance: Substance, known: tuple[str, ...], fixed: str | None, free: tuple[str, ...]
):
    """One known property is held; what is sought beside it has one value for every state, boiling or not."""
    plan, clues = planned(*known)
    chart = chart_of(plan, substance, clues)
    assert chart is not None
    assert (chart.fixed.name if chart.fixed else None, chart.free) == (fixed, free)
    assert chart.spot == ("s", "b")


@pytest.mark.parametrize("held", ["specific_volume", "quality"])
def test_two_clues_leave_nothing_to_seek(held: str):
    """A state with its temperature and a volume or a quality is only to be evaluated."""
    plan, clues = planned("temperature", held)
    assert chart_of(plan, WATER, clues) is None


def test_bodies_without_volume_have_one_coordinate():
    """Temperature tells the state of a block; that of a body that melts needs its energy."""
    plan, clues = planned(incompressible=True)
    block, wax = (chart_of(plan, substance, clues) for substance in (BLOCK, WAX))
    assert block is not None
    assert wax is not None
    assert block.free == ("temperature",)
    assert wax.free == ("specific_internal_energy",)
    plan, clues = planned("temperature", incompressible=True)
    assert chart_of(plan, BLOCK, clues) is None


def test_models_with_plateaus():
    """Water boils, wax melts, a gas by its ideal model and a block do neither."""
    assert [boils(s) for s in (WATER, GAS, BLOCK, WAX)] == [True, False, False, False]
    assert [melts(s) for s in (WATER, GAS, BLOCK, WAX)] == [False, False, False, True]


def test_clues_that_restate_a_balance_are_none():
    """An energy that a process's own balance gives is an equation already; one of another source is not."""
    own = Clue("specific_internal_energy", "clue@heating/states/s/b/specific_internal_energy")
    plan, _ = planned()
    plan = StatePlan("s", "b", plan.model, (own,))
    assert usable_clues(plan, {own.key}, {"heating"}) == {}
    assert usable_clues(plan, {own.key}, {"cooling"}) == {"specific_internal_energy": own}
    assert usable_clues(plan, set(), set()) == {}


def test_digits_across_the_saturation_line_leave_one_of_two():
    """T and p that cannot tell the phase count as T alone."""
    plan, clues = planned("temperature", "pressure", barred=frozenset({("temperature", "pressure")}))
    assert set(usable_clues(plan, {one.key for one in clues.values()}, set())) == {"temperature"}


def test_a_temperature_of_melting_tells_nothing():
    """Where the stated digits reach the melting temperature, the energy is sought."""
    plan, clues = planned("temperature", incompressible=True, melting=MeltingState(False, False))
    assert usable_clues(plan, {one.key for one in clues.values()}, set()) == {}
