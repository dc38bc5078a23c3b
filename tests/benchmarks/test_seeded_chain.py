"""The originator's calculation: slips are carried on, rounding is people's, and the first moved results are known."""

from __future__ import annotations

import math

import pytest

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.chain import Chain, Claim, Given, Slip, Step, values_of
from tests.benchmarks.seeded.equation import NoStateError
from tests.benchmarks.seeded.gases import ConstantGas, Melting
from tests.benchmarks.seeded.trial import frontier
from tests.benchmarks.seeded.wrong_inputs import altered_digits, input_slips


def chain(early: bool = False) -> Chain:
    """Return a chain of an input, a change and a total of twice the change."""
    pressure = Given("p", "2.00 bar(g)", 3.013e5, "pressure", un.gauge(un.BAR, 1.013e5))
    outside = Given("p0", "1.013 bar", 1.013e5, "atmosphere", un.BAR)
    steps = (
        Step(("a",), ("p",), lambda v: (v["p"] / 3.0,), (("halved", lambda v: (v["p"] / 6.0,)),)),
        Step(("b",), ("a",), lambda v: (2.0 * v["a"],)),
    )
    claims = (
        Claim("a", "results/a", "energy", un.KJ, 1, 1e5),
        Claim("b", "results/b", "energy", un.KJ, 1, 2e5),
    )
    return Chain((pressure, outside), steps, claims, early)


def test_a_slip_of_a_step_is_carried_on():
    """What is made from a wrong value is wrong as well."""
    slip = Slip("halved", "a", function=lambda v: (v["p"] / 6.0,))
    _, texts = values_of(chain(), [slip])
    assert texts == {"a": "50.2 kJ", "b": "100.4 kJ"}


def test_a_result_can_be_written_wrongly_and_not_carried_on():
    """The text is wrong, and what follows is right."""
    slip = Slip("doubled", "a", rewrite=lambda right, values: 2.0 * right, carried=False)
    _, texts = values_of(chain(), [slip])
    assert texts == {"a": "200.9 kJ", "b": "200.9 kJ"}


def test_who_rounds_early_goes_on_with_the_text():
    """The second result is twice the first as it is written; the truth is not rounded."""
    assert values_of(chain())[1]["b"] == "200.9 kJ"
    values, texts = values_of(chain(early=True))
    assert texts["b"] == "200.8 kJ"
    assert values_of(chain(early=True), rounded=False)[0]["b"] == pytest.approx(200866.7, rel=1e-6)
    assert values["a"] == pytest.approx(100400.0)


def test_an_input_slip_leaves_its_text():
    """A gauge pressure taken as absolute is used without the atmosphere."""
    slip = next(slip for slip in input_slips(chain()) if slip.kind == "gauge pressure as absolute")
    assert slip.value == pytest.approx(2.0e5)
    assert chain().givens[0].text == "2.00 bar(g)"


def test_the_frontier_is_what_no_moved_result_stands_above():
    """Of two moved results the one that the other is made from is the start."""
    assert frontier(chain(), frozenset({"a", "b"})) == {"a"}
    assert frontier(chain(), frozenset({"b"})) == {"b"}


def test_digits_are_altered_as_pens_do_it():
    """Neighbours change places, one is lost or doubled, the point moves; equal neighbours are left."""
    found = set(altered_digits("12.2"))
    assert ("transposed", "21.2") in found
    assert ("dropped", "1.2") in found
    assert ("doubled", "112.2") in found
    assert ("shifted", "122") in found
    assert ("transposed", "12.2") not in found


def test_a_number_has_no_negative_zero():
    """A small negative number that rounds to zero is written as zero."""
    assert un.number_text(-0.004, 1) == "0.0"


def test_an_isentropic_change_of_a_gas_follows_its_exponent():
    """T2/T1 = (p2/p1)^((k−1)/k)."""
    gas = ConstantGas(718.0, 287.0)
    first = gas.at(t=300.0, p=1e5)
    last = gas.at(p=8e5, s=first.s)
    assert last.t == pytest.approx(300.0 * 8.0 ** (287.0 / 1005.0), rel=1e-10)


def test_a_melting_body_takes_up_its_latent_heat_at_one_temperature():
    """Half the latent heat melts half of it; past it the liquid warms."""
    wax = Melting(320.0, 2e5, 2000.0, 2200.0)
    assert wax.at(u=1e5)[:1] == (320.0,)
    assert wax.at(u=1e5).x == pytest.approx(0.5)
    assert wax.at(u=2e5 + 2200.0).t == pytest.approx(321.0)
    assert wax.at(u=-2000.0).s == pytest.approx(2000.0 * math.log(319.0 / 320.0))


def test_a_gas_has_no_state_below_zero():
    """A slip that leads below absolute zero leads to no number."""
    with pytest.raises(NoStateError):
        ConstantGas(718.0, 287.0).at(t=-5.0, p=1e5)
