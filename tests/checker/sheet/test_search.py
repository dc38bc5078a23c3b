"""Searching an end state on a curve."""

import pytest

from checker.outcomes import NotEvaluable
from checker.sheet.search import around, between, find_state
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
