"""Whatever two numbers are asked for, the answer is a checked state or NotEvaluable, in bounded time."""

from __future__ import annotations

import itertools
import math
import time

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.substances import Phase, Substance, make_substance
from checker.substances.properties import ORDER

KINDS = {
    "no-solution",
    "several-roots",
    "outside-range",
    "ill-conditioned",
    "near-saturation",
    "missing",
    "not-supported",
}
LONGEST = 3.0  # seconds of processor time: a scan of a mixture taken as one substance takes the longest
MODELS = {
    "water": ("water", "real fluid", {}, {}),
    "nitrogen": ("nitrogen", "real fluid", {}, {}),
    "R410A": ("R410A", "real fluid", {}, {}),
    "helium": ("helium", "real fluid", {}, {}),
    "siloxane": ("D5", "real fluid", {}, {}),
    "industrial": ("water", "real fluid", {}, {"property_source": "industrial"}),
    "moved": ("R134a", "real fluid", {}, {"density_factor": 1.002, "caloric_factor": 0.99}),
    "ideal": ("air", "ideal gas", {}, {}),
    "gas": (
        "x",
        "constant specific heat",
        {"specific_heat_at_constant_volume": 718.0, "gas_constant": 287.0},
        {},
    ),
    "moist air": ("moist air", "ideal gas", {"water_content": 0.02}, {}),
    "wet air": ("moist air", "real fluid", {"water_content": 3.0}, {}),
    "mixture": ("x", "ideal gas", {}, {"composition": (("nitrogen", 0.7), ("water", 0.3))}),
    "real mixture": ("x", "real fluid", {}, {"composition": (("methane", 0.9), ("n-butane", 0.1))}),
    "glycol": ("ethylene glycol solution", "real fluid", {"mass_fraction": 0.35}, {}),
    "oil": ("hydrogenated terphenyl", "real fluid", {}, {"caloric_factor": 1.01}),
    "solid": ("x", "constant specific heat", {"specific_heat": 460.0, "density": 7850.0}, {}),
}
NUMBERS = st.one_of(
    st.sampled_from([0.0, -0.0, 1.0, -1.0, math.nan, math.inf, -math.inf, 5e-324, 1e308, -1e308, 1e-300]),
    st.floats(-1e7, 1e7),
    st.floats(-9.0, 9.0).map(lambda exponent: 10.0**exponent),
    st.integers(-(10**30), 10**30),
)


def model(name: str) -> Substance:
    """Return the substance of a key of MODELS."""
    substance, word, constants, more = MODELS[name]
    return make_substance(substance, word, constants, **more)  # type: ignore[arg-type]  # junk on purpose


@pytest.mark.parametrize("name", sorted(MODELS))
def test_junk_is_not_evaluable_and_never_an_error(name: str) -> None:
    """For every pair of properties any numbers give states that make sense, or one of the kinds of NotEvaluable."""
    substance = model(name)
    model("water").crosses_saturation(
        300.0, 1.0, 1e5, 1.0
    )  # loads the property library, which is not to be timed
    asked = 0

    @settings(max_examples=120, deadline=None, derandomize=True)
    @given(
        st.sampled_from(list(itertools.combinations(ORDER, 2))),
        NUMBERS,
        NUMBERS,
        st.sampled_from([None, *Phase]),
    )
    def run(pair: tuple[str, str], one: float, two: float, phase: Phase | None) -> None:
        nonlocal asked
        asked += 1
        started = time.process_time()
        try:
            state = substance.state({pair[0]: one, pair[1]: two}, phase)
        except NotEvaluable as refusal:
            seen = refusal.kind in KINDS and bool(refusal.reason)
        else:
            seen = state.temperature > 0.0 and math.isfinite(state.specific_entropy)
        assert seen
        assert time.process_time() - started < LONGEST

    run()
    assert asked >= 100


@pytest.mark.parametrize("name", sorted(MODELS))
@pytest.mark.parametrize(
    "known", [{}, {"colour": 1.0}, {"temperature": "hot", "pressure": None}, {"temperature": [1.0]}]
)
def test_what_is_no_number_is_refused_by_every_model(name: str, known: dict[str, object]) -> None:
    """Text, nothing and lists in place of numbers are refused by state, states and saturation alike."""
    substance = model(name)
    for question in (substance.state, substance.states, substance.saturation):
        with pytest.raises(NotEvaluable):
            question(known)  # type: ignore[operator]  # junk on purpose


@settings(max_examples=100, deadline=None, derandomize=True)
@given(st.sampled_from(["water", "R410A", "industrial", "ideal"]), NUMBERS, NUMBERS, NUMBERS, NUMBERS)
def test_the_question_about_digits_always_has_an_answer(
    name: str, temperature: float, half_temperature: float, pressure: float, half_pressure: float
) -> None:
    """Whether digits reach across saturation is answered with true or false for any numbers."""
    answer = model(name).crosses_saturation(temperature, half_temperature, pressure, half_pressure)
    assert answer in (True, False)
