"""Second ways to a quantity that an input gives."""

from checker.sheet.keys import given
from checker.sheet.second_way import second_ways
from checker.sheet.step import Step


def taken(output: str, *parents: str) -> Step:
    """Return a step without arithmetic of its own."""
    return Step(output, (output,), parents, lambda *values: (sum(values, 0.0),), "")


OWN = taken("w", given("w"))
OTHER = taken("w", "a", "b")


def test_another_formula_is_kept_under_its_own_key():
    """Its parents are known and do not rest on the input."""
    (found,) = second_ways(["w"], [OWN, OTHER], {"a", "b", given("w")}, {"w": OWN})
    assert (found.outputs, found.parents) == (("again/w",), ("a", "b"))


def test_a_formula_that_rests_on_the_input_is_no_second_way():
    """The parent b is made from w, so it would be compared with itself."""
    made = {"w": OWN, "b": taken("b", "w")}
    assert not list(second_ways(["w"], [OWN, OTHER], {"a", "b", "w", given("w")}, made))


def test_what_is_not_known_gives_no_second_way():
    """The parent b is missing."""
    assert not list(second_ways(["w"], [OWN, OTHER], {"a", given("w")}, {"w": OWN}))


def test_a_quantity_that_was_calculated_needs_no_second_way():
    """The planner took the formula already."""
    assert not list(second_ways(["w"], [OWN, OTHER], {"a", "b"}, {"w": OTHER}))
