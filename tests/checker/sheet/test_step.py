"""Evaluating a sheet: in order, carried, moved, and with steps that have no value."""

import pytest

from checker.outcomes import NotEvaluable
from checker.sheet.same import SameQuantity
from checker.sheet.step import Sheet, Step, evaluate, reevaluate, users_of


def step(output: str, parents: tuple[str, ...], function, **more) -> Step:
    """Return a step with one output."""
    return Step(output, (output,), parents, lambda *v: (function(*v),), f"{output} = f", **more)


STEPS = (
    step("double", ("given/x",), lambda x: 2 * x),
    step("square", ("double",), lambda d: d * d),
    step("sum", ("double", "square"), lambda d, s: d + s),
    step("apart", ("given/y",), lambda y: -y),
)
LEAVES = {"given/x": 3.0, "given/y": 1.0}
SHEET = Sheet("r", LEAVES, STEPS, {}, SameQuantity(), users=users_of(STEPS))


def test_steps_follow_their_parents():
    """Each step takes the calculated values of its parents."""
    values = evaluate(STEPS, LEAVES)
    assert (values["double"], values["square"], values["sum"]) == (6.0, 36.0, 42.0)


def test_a_substitute_feeds_the_children_and_the_own_value_stays():
    """Carried: the originator's 5 is used below, while the step's own value remains 6."""
    values = evaluate(STEPS, LEAVES, {"double": 5.0})
    assert (values["double"], values["square"], values["sum"]) == (6.0, 25.0, 30.0)


def test_moving_a_leaf_reevaluates_only_what_is_below_it():
    """A moved leaf changes its descendants and nothing else."""
    base = evaluate(STEPS, LEAVES)
    assert reevaluate(SHEET, base, {"given/x": 4.0}) == {"double": 8.0, "square": 64.0, "sum": 72.0}


def test_a_substitute_stops_a_move():
    """In the carried evaluation a move reaches the next stated value and ends there."""
    carried = evaluate(STEPS, LEAVES, {"double": 5.0})
    assert reevaluate(SHEET, carried, {"given/x": 4.0}, {"double": 5.0}) == {"double": 8.0}


def test_no_value_is_inherited_with_its_reason():
    """A step without a value passes its reason on to everything below it, and to nothing else."""

    def fail(_: float) -> float:
        raise NotEvaluable("no root", "several-roots", ("a", "b"))

    values = evaluate(
        (step("root", ("given/x",), fail), step("below", ("root",), lambda r: r), STEPS[3]), LEAVES
    )
    below = values["below"]
    assert isinstance(below, NotEvaluable)
    assert (below.reason, below.roots) == ("no root", ("a", "b"))
    assert values["apart"] == -1.0


def test_arithmetic_that_fails_is_an_outcome_and_no_exception():
    """A division by zero inside a formula is not evaluable."""
    values = evaluate((step("ratio", ("given/x",), lambda x: x / 0.0),), LEAVES)
    assert isinstance(values["ratio"], NotEvaluable)


def test_a_property_that_does_not_exist_is_named():
    """None from a parent (a solid without a density) says which property is missing."""
    values = evaluate((step("v", (), lambda: None), step("work", ("v",), lambda v: v)), {})
    work = values["work"]
    assert isinstance(work, NotEvaluable)
    assert work.reason == "v does not exist here"


def test_a_step_that_takes_none_gets_it():
    """Formulas with an optional property are called with None."""
    values = evaluate((step("v", (), lambda: None), step("w", ("v",), lambda v: 7.0, takes_none=True)), {})
    assert values["w"] == 7.0


def test_ancestors_include_what_the_same_step_yields():
    """Two outputs of one state step stand above whatever uses one of them."""
    state = Step("state", ("t", "u"), ("given/x",), lambda x: (x, x), "")
    change = step("change", ("u",), lambda u: u)
    sheet = Sheet(
        "r", LEAVES, (state, change), {}, SameQuantity(), (), {"t": state, "u": state, "change": change}
    )
    assert sheet.ancestors("change") == {"t", "u", "given/x"}


def test_not_evaluable_survives_pickling():
    """Outcomes go between processes without loss."""
    import pickle

    back = pickle.loads(pickle.dumps(NotEvaluable("why", "several-roots", ("a",))))
    assert (back.reason, back.kind, back.roots) == ("why", "several-roots", ("a",))


@pytest.mark.parametrize("error", [ZeroDivisionError, OverflowError, ValueError])
def test_errors_of_a_formula_keep_the_formula_in_the_reason(error):
    """The reason names the formula that had no value."""

    def fail() -> float:
        raise error("bad")

    value = evaluate((step("z", (), fail),), {})["z"]
    assert isinstance(value, NotEvaluable)
    assert "z = f" in value.reason
