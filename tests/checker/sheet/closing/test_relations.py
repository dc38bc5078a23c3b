"""Equations without a balance: they vanish where they hold, and say which way leads there where they do not."""

from __future__ import annotations

import math
from collections.abc import Iterable

import pytest

from checker.outcomes import NotEvaluable
from checker.sheet.closing import relations
from checker.sheet.closing.world import PROPERTIES, Equation, World
from checker.sheet.keys import body_key, state_key
from checker.sheet.states import Clue
from checker.sheet.step import Value
from tests.checker.cases import case
from tests.checker.records_of_several import cycle, joined_vessels

PLAN = case(joined_vessels()).plan
(JOINING,) = PLAN.contexts


def state(name: str, body: str, *values: float | None) -> dict[str, Value]:
    """Return the properties T, p, v, u, h, s of a state by their keys."""
    return {state_key(name, body, p): value for p, value in zip(PROPERTIES, values, strict=True)}


def vessels(right: float = 2.0) -> World:
    """Return two parcels of 1 and 3 kg with 2 and ``right`` m³/kg after, and 1 m³/kg each before."""
    values: dict[str, Value] = {body_key("left", "mass"): 1.0, body_key("right", "mass"): 3.0}
    for body in ("left", "right"):
        values |= state("before", body, 300.0, 1e5, 1.0, 0.0, 0.0, 0.0)
    values |= state("after", "left", 300.0, 2e5, 2.0, 0.0, 0.0, 0.0)
    values |= state("after", "right", 330.0, 1e5, right, 0.0, 0.0, 0.0)
    return World(values)


def only(equations: Iterable[Equation]) -> Equation:
    """Return the one equation."""
    (found,) = equations
    return found


def test_equal_pressures_are_apart_by_the_logarithm_of_their_ratio():
    """200 and 100 kPa are ln 2 apart, relative to the larger."""
    group = {"after pressure": ("after", ("left", "right"))}
    equation = only(relations.equilibrium_equations(group))
    difference, size = equation.residual(vessels())
    assert difference / size == pytest.approx(math.log(2.0))
    assert equation.equal == {("after", "left"), ("after", "right")}


def test_a_shared_volume_holds_its_sum():
    """1·2 + 3·v₂ is 4 m³ for v₂ = 2/3; with 2 m³/kg it is twice as much."""
    equation = only(relations.volume_equations(JOINING))
    assert equation.residual(vessels(2.0 / 3.0))[0] == pytest.approx(0.0, abs=1e-12)
    difference, size = equation.residual(vessels())
    assert difference / size == pytest.approx(math.log(2.0))
    assert equation.masses == {"left", "right"}


def test_a_known_property_is_an_equation():
    """A clue wants its value; one that is another state's property marks both as equal."""
    spot = ("after", "right")
    one = relations.clue_equation(spot, Clue("temperature", state_key("before", "right", "temperature")))
    difference, size = one.residual(vessels())
    assert difference / size == pytest.approx(math.log(1.1))
    assert one.equal == {spot, ("before", "right")}
    assert not relations.clue_equation(spot, Clue("temperature", "given/limit")).equal


def test_entropies_differ_in_their_own_measure():
    """The zero of entropy is a convention: 10 J/(kg·K) are a hundredth of the measure whatever the values."""
    values = {
        **state("a", "b", 300.0, None, None, 0.0, None, 5.0),
        **state("c", "b", 300.0, None, None, 0.0, None, 15.0),
    }
    difference, size = relations.equality("specific_entropy", ("a", "b"), ("c", "b"), "x").residual(
        World(values)
    )
    assert difference / size == pytest.approx(-0.01)


def test_paths_hold_a_property_between_their_ends():
    """Each leg of the cycle says that its volume or its pressure is the same at both ends."""
    found = [only(relations.path_equations(ctx, set())) for ctx in case(cycle()).plan.contexts]
    held = [next(iter(next(iter(e.uses.values())))) for e in found]
    assert held == ["specific_volume", "pressure", "specific_volume", "pressure"]


def test_a_property_that_a_model_has_not_is_said():
    """A body without a pressure cannot be held in equilibrium of pressure."""
    world = World({**state("a", "b", 300.0, None, None, 0.0, None, 5.0)})
    with pytest.raises(NotEvaluable, match="states no pressure"):
        world.property(("a", "b"), "pressure")
    with pytest.raises(NotEvaluable, match="is not known"):
        world.state(("z", "b"))
