"""Searching an end state on a curve."""

import pytest

from checker.outcomes import NotEvaluable
from checker.sheet.search import around, between, find_parameter, find_state
from checker.substances.interface import Phase, PropertyState


def on_line(t: float) -> PropertyState:
    """Return a state whose temperature is the curve's parameter."""
    return PropertyState(t, 1e5, t / 1e3, t, t, t)


def test_one_root_is_found_and_verified():
    """A residual with one zero gives the state there."""
    found = find_state(on_line, lambda s: s.temperature - 333.25, between(200.0, 500.0), 1.0, "the test")
    assert found.temperature == pytest.approx(333.25, rel=1e-12)


def test_a_root_on_a_grid_point_is_found_once():
    """A zero exactly on the grid is neither lost nor doubled."""
    found = find_state(on_line, lambda s: s.temperature - 350.0, between(200.0, 500.0), 1.0, "the test")
    assert found.temperature == 350.0


def test_no_root_is_said():
    """Without a sign change there is no state, and the message says what was sought."""
    with pytest.raises(NotEvaluable, match="satisfies the balance"):
        find_state(on_line, lambda s: s.temperature + 1.0, between(200.0, 500.0), 1.0, "the balance")


def test_several_roots_are_listed():
    """Two zeros are not decided by chance: both are named."""
    with pytest.raises(NotEvaluable) as caught:
        find_state(on_line, lambda s: (s.temperature - 250.0) * (s.temperature - 401.0), between(200.0, 500.0), 1.0,
                   "the test")  # fmt: skip
    assert caught.value.kind == "several-roots"
    assert len(caught.value.roots) == 2


def test_the_stated_phase_chooses_between_roots():
    """With a phase stated only the root in that phase counts."""

    def with_phase(t: float) -> PropertyState:
        phase = Phase.SUBCOOLED_LIQUID if t < 300.0 else Phase.SUPERHEATED_VAPOUR
        return PropertyState(t, 1e5, t / 1e3, t, t, t, None, phase)

    found = find_state(with_phase, lambda s: (s.temperature - 250.0) * (s.temperature - 401.0),
                       between(200.0, 500.0), 1.0, "the test", Phase.SUPERHEATED_VAPOUR)  # fmt: skip
    assert found.temperature == pytest.approx(401.0)


def test_a_jump_is_not_taken_for_a_root():
    """A sign change across a gap of the model does not verify and is not returned."""
    with pytest.raises(NotEvaluable):
        find_state(
            on_line, lambda s: 1.0 if s.temperature > 300.0 else -1.0, between(200.0, 500.0), 1.0, "the test"
        )


def test_states_outside_the_model_are_stepped_over():
    """Where the curve has no state the scan goes on behind the gap."""

    def broken(t: float) -> PropertyState:
        if t < 300.0:
            raise NotEvaluable("outside")
        return on_line(t)

    found = find_state(broken, lambda s: s.temperature - 410.0, between(200.0, 500.0), 1.0, "the test")
    assert found.temperature == pytest.approx(410.0)


def test_the_logarithmic_grid_contains_its_centre():
    """The known state itself is one of the scanned points."""
    assert 0.37 in around(0.37)


def by_volume(v: float) -> PropertyState:
    """Return a state whose specific volume is the curve's parameter."""
    return PropertyState(300.0, 1e5, v, v, v, v)


def test_on_a_path_the_first_root_of_each_side_counts():
    """What lies behind a root on the same side is not reached; one root on each side remains undecided."""

    def beyond(state: PropertyState) -> float:
        return (state.specific_volume - 2.0) * (state.specific_volume - 5.0)

    found = find_state(by_volume, beyond, around(1.0), 1.0, "the test", outward=True)
    assert found.specific_volume == pytest.approx(2.0)

    def both_ways(state: PropertyState) -> float:
        return (state.specific_volume - 2.0) * (state.specific_volume - 0.3) * (state.specific_volume - 0.1)

    with pytest.raises(NotEvaluable) as caught:
        find_state(by_volume, both_ways, around(1.0), 1.0, "the test", outward=True)
    assert [root.split("v = ")[1] for root in caught.value.roots] == ["0.3 m³/kg", "2 m³/kg"]


def test_a_path_ends_where_the_model_ends():
    """A root behind a gap in the model's range is out of the path's reach."""

    def with_gap(v: float) -> PropertyState:
        if 2.0 < v < 50.0:
            raise NotEvaluable("outside")
        return by_volume(v)

    with pytest.raises(NotEvaluable, match="no state on the path"):
        find_state(with_gap, lambda s: s.specific_volume - 100.0, around(1.0), 1.0, "the test", outward=True)
    found = find_state(with_gap, lambda s: s.specific_volume - 100.0, around(1.0), 1.0, "the test")
    assert found.specific_volume == pytest.approx(100.0)


def test_a_root_between_the_last_point_and_the_edge_of_the_model_is_found():
    """The scan goes close to the edge, where a liquid would take a pressure beyond the equation within one step."""

    def ending(v: float) -> PropertyState:
        if v < 0.95:
            raise NotEvaluable("outside")
        return by_volume(v)

    found = find_state(
        ending, lambda s: s.specific_volume - 0.951, around(1.0), 1.0, "the test", outward=True
    )
    assert found.specific_volume == pytest.approx(0.951)


def test_a_parameter_is_found_without_states():
    """Where the path alone fixes the place no state is evaluated; none and many are said."""
    grid = around(1.0)
    assert find_parameter(lambda v: v**2 - 9.0, grid, "the test") == pytest.approx(3.0)
    with pytest.raises(NotEvaluable, match="no state on the path"):
        find_parameter(lambda v: v + 1.0, grid, "the test")
    with pytest.raises(NotEvaluable, match="more than one state"):
        find_parameter(lambda v: 0.0, grid, "the test")


def test_a_curve_without_any_state_gives_the_reason_of_the_model():
    """Where the model refuses every state of the curve, its own reason is passed on."""

    def refused(v: float) -> PropertyState:
        raise NotEvaluable("above the range of the equation", "outside-range")

    with pytest.raises(NotEvaluable, match="above the range") as caught:
        find_state(refused, lambda s: s.pressure, around(1.0), 1.0, "the test", outward=True)
    assert caught.value.kind == "outside-range"
