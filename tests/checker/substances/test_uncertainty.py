"""Published uncertainties."""

from __future__ import annotations

from checker.substances.names import all_fluids
from checker.substances.uncertainty import EXACT, industrial_water_uncertainty, tabled_fluids, uncertainty_of


def test_at_least_twenty_fluids_have_a_published_figure() -> None:
    """Every tabled fluid is one of the table of names, and its source names the equation."""
    known = {fluid.library: fluid.equation for fluid in all_fluids()}
    assert len(tabled_fluids()) >= 20
    for library in tabled_fluids():
        figure = uncertainty_of(library)
        assert 0.0 < figure.density < 0.01
        assert 0.0 < figure.caloric <= 0.03
        assert known[library] in figure.source


def test_other_fluids_get_an_assumption_that_says_so() -> None:
    """A fluid without a figure gets a wider one, called an assumption."""
    figure = uncertainty_of("R1336mzz(E)")
    assert "assumption" in figure.source
    assert figure.density >= max(uncertainty_of(name).density for name in tabled_fluids())


def test_exact_models_have_none() -> None:
    """Ideal gas and constant heats are exact by definition; the industrial formulation is not."""
    assert (EXACT.density, EXACT.caloric) == (0.0, 0.0)
    assert industrial_water_uncertainty().density > 0.0
