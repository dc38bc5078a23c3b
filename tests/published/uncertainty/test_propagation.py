"""Propagation of uncertainty held against closed forms of the guides JCGM 100:2008 and JCGM 101:2008.

The numbers are worked out by hand from the formulas named beside them; those of the examples of the guides are from
memory.
"""

import math

import pytest

from checker.budget import Kind
from checker.comparison.effects import effect_of, joint_bend
from checker.comparison.montecarlo import propagate
from checker.comparison.sources import Source
from checker.sheet.same import SameQuantity
from checker.sheet.step import Sheet, Step, users_of

pytestmark = pytest.mark.published

COVERAGE = 2.0
LEVEL = math.erf(COVERAGE / math.sqrt(2.0))
"""Coverage probability of ±2σ of a normal distribution, 0.9545."""


def sheet_of(function, *leaves):
    """Return a sheet of one step, y = function(x…)."""
    step = Step("y", ("y",), leaves, lambda *x: (function(*x),), "y")
    return Sheet("r", {}, (step,), {}, SameQuantity(), made_by={"y": step}, users=users_of((step,)))


def normal(name, size):
    """Return a normal source of one leaf."""
    return Source(name, Kind.PLUS_MINUS, name, {name: size})


def rectangular(name, half_width):
    """Return a rectangular source of one leaf."""
    return Source(name, Kind.PLUS_MINUS, name, {name: half_width / math.sqrt(3.0)}, rectangular=True)


def drawn(function, sources, **base):
    """Return the Monte Carlo interval of y as its two ends."""
    sheet = sheet_of(function, *base)
    values = {**base, "y": function(*base.values())}
    found = propagate("r", sheet, values, sources, ["y"], COVERAGE)["y"]
    return values["y"] - found.below, values["y"] + found.above


def first_order(function, sources, **base):
    """Return the combined standard uncertainty of y."""
    sheet = sheet_of(function, *base)
    values = {**base, "y": function(*base.values())}
    return math.hypot(*(effect_of(sheet, values, source).moves["y"] for source in sources))


def test_end_gauge_of_the_guide():
    """JCGM 100:2008, H.1: l = l_S + d − l_S(δα·θ + α_S·δθ), u_c² = 25² + 9.7² + 2.9² + 16.6² nm² = (32 nm)².

    From memory: l_S = 50.000623 mm with 25 nm, d = 215 nm with 9.7 nm, δα = 0 with 0.58e-6 /K, θ = −0.1 K,
    α_S = 11.5e-6 /K, δθ = 0 with 0.029 K.
    """

    def length(standard, d, expansion, apart):
        return standard + d - standard * (expansion * -0.1 + 11.5e-6 * apart)

    sources = [
        normal("standard", 25e-9),
        normal("d", 9.7e-9),
        normal("expansion", 0.58e-6),
        normal("apart", 0.029),
    ]
    combined = first_order(length, sources, standard=50.000623e-3, d=215e-9, expansion=0.0, apart=0.0)
    by_hand = math.hypot(25.0, 9.7, 50.000623e6 * 0.1 * 0.58e-6, 50.000623e6 * 11.5e-6 * 0.029)
    assert combined == pytest.approx(by_hand * 1e-9, rel=1e-6)
    assert combined == pytest.approx(32e-9, abs=0.5e-9)


def test_product_by_the_relative_uncertainties():
    """JCGM 100:2008, 5.1.6: of a product the relative standard uncertainties add by their squares."""
    sources = [normal("a", 0.03), normal("b", 0.08)]
    combined = first_order(lambda a, b: a * b, sources, a=3.0, b=2.0)
    assert combined / 6.0 == pytest.approx(math.hypot(0.01, 0.04), rel=1e-9)


def test_product_of_two_about_zero_has_no_first_order():
    """JCGM 100:2008, 5.1.2 note: where the first order vanishes, u² = u(a)²·u(b)² is all there is, and it is seen."""
    sheet = sheet_of(lambda a, b: a * b, "a", "b")
    base = {"a": 0.0, "b": 0.0, "y": 0.0}
    effects = [effect_of(sheet, base, normal(name, 0.1)) for name in ("a", "b")]
    assert all(effect.moves["y"] == 0.0 for effect in effects)
    assert joint_bend(sheet, base, effects)["y"] == pytest.approx(0.01)


def test_sum_of_four_rectangular_quantities():
    """JCGM 101:2008, 9.2.3 (from memory): four rectangular of u = 1 give ±3.88 at 95 %, not ±3.92 of a normal one.

    At 95.45 % the exact distribution (Irwin-Hall of four, width 2√3 each) ends at ±3.952.
    """
    names = ("a", "b", "c", "d")
    sources = [rectangular(name, math.sqrt(3.0)) for name in names]
    low, high = drawn(lambda *x: sum(x), sources, **dict.fromkeys(names, 0.0))
    # P(|S| > s) = (2 − s/(2√3))⁴/12 for the outer part of the density: s = 2√3·(2 − (12·0.0455)^¼).
    end = 2.0 * math.sqrt(3.0) * (2.0 - (12.0 * (1.0 - LEVEL)) ** 0.25)
    assert (-low, high) == (pytest.approx(end, rel=0.05), pytest.approx(end, rel=0.05))


def test_reciprocal_of_a_rectangular_quantity():
    """The function 1/x is monotonic: its interval ends at the reciprocals of those of x (JCGM 101:2008, 7.7)."""
    low, high = drawn(lambda x: 1.0 / x, [rectangular("x", 0.5)], x=1.0)
    assert low == pytest.approx(1.0 / (1.0 + 0.5 * LEVEL), rel=0.01)
    assert high == pytest.approx(1.0 / (1.0 - 0.5 * LEVEL), rel=0.01)


def test_square_about_zero_of_a_normal_quantity():
    """The square about zero is χ² of one degree: it ends at the square of the normal quantile, and at 0."""
    low, high = drawn(lambda x: x * x, [normal("x", 1.0)], x=0.0)
    assert low == 0.0
    assert high == pytest.approx(
        2.2775**2, rel=0.06
    )  # quantile of (1 + 0.9772)/2, from memory of the normal table


def test_where_the_function_is_linear_both_ways_agree():
    """JCGM 101:2008, 8: for a linear function of normal quantities Monte Carlo gives ±k·u."""
    sources = [normal("a", 3.0), normal("b", 4.0)]
    low, high = drawn(lambda a, b: a + b, sources, a=10.0, b=20.0)
    assert first_order(lambda a, b: a + b, sources, a=10.0, b=20.0) == pytest.approx(5.0)
    assert (30.0 - low, high - 30.0) == (pytest.approx(10.0, rel=0.07), pytest.approx(10.0, rel=0.07))
