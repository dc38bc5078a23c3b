"""Every kind of problem fires at its line and column, with a message that says what would be right."""

from __future__ import annotations

from collections.abc import Callable

import pytest

from checker.package import KINDS
from checker.problems import Problem

OneProblem = Callable[..., Problem]

FORM = [
    # kind, old text, new text with « where the problem is, whether the record is lost, what is said
    ("part-missing", "- id: warming\n        from: cold\n", "- «id: warming\n", True, "`from` is missing in a process"),
    ("part-missing", "  - id: bottle\n    bodies:", "  - «bodies:", True, "`id` is missing in a record"),
    ("part-missing", "{substance: Nitrogen, ", "«{", True, "`substance` is missing in a body"),
    ("part-missing", "path: constant volume", "path: «{exponent: 1.3}", True, "`kind` is missing in a path"),
    ("part-missing", "{id: wall, ", "«{", True, "`id` is missing in a heat transfer"),
    ("part-missing", "limits: [{id: working, quantity: states/hot/nitrogen/pressure, at_most: 200 bar, ",
     "limits: [«{id: working, quantity: states/hot/nitrogen/pressure, ", False, "neither `at_most` nor `at_least`"),
    ("part-missing", "[{id: working, quantity: states/hot/nitrogen/pressure, ", "[«{id: working, ", False,
     "`quantity` is missing in a limit"),
    ("type-wrong", "from: cold", "from: «[cold]", True, "`from` should be one text, and is a list"),
    ("type-wrong", "heat_transfers: [{id: wall, boundary_temperature: 70 °C, results: {energy: 301 kJ}}]",
     "heat_transfers: «{id: wall}", True, "should be a list"),
    ("type-wrong", "inputs: {volume: 50 L}", "inputs: «50 L", True, "should be a mapping"),
    ("type-wrong", "path: constant volume", "path: constant volume\n        insulated: «maybe", True, "true or false"),
    ("type-wrong", "work_transfers: [{id: fan, kind: shaft, inputs: {energy: 1 kJ}}]", "work_transfers:«", True,
     "Write [] for none"),
    ("type-wrong", "pressure: 150 bar", "pressure: «{value: 150, unit: bar}", False, "is one text"),
    ("type-wrong", "  - id: bottle\n", "  - id: bottle\n    title: «{a: b}\n", False, "`title` should be one text"),
    ("name-unknown", "heat_transfers:", "«heat_transfer:", True, "Perhaps `heat_transfers`?"),
    ("name-unknown", "  - id: bottle\n", "  - id: bottle\n    «remarks: none\n", False, "is not a key of a record"),
    ("name-unknown", "        from: cold\n", "        from: cold\n        «duration: 5 s\n", True,
     "inputs: {duration: …}"),
    ("name-unknown", "{temperature: 15 °C, p", "{«temprature: 15 °C, p", False, "Perhaps `temperature`?"),
    ("name-unknown", "{temperature: 15 °C, p", "{«temperature\u00a0: 15 °C, p", False, "`temperature\\u{A0}` is not"),
    ("name-unknown", "{temperature: 15 °C, p", "{«heat: 15 °C, p", False, "`heat` belongs to a process"),
    ("name-unknown", "pressure: 150 bar", "pressure: 1 bar, «5 bar", False, "a comma starts a new entry"),
    ("name-unknown", "claim: met", "claim: met, basis: code, «edition 2", False, "a comma starts a new entry"),
    ("name-unknown", "path: constant volume", "path: {kind: isothermal, «exponent: 1}", False,
     "belongs to the path `polytropic`"),
    ("name-unknown", "records:\n", "«record: x\nrecords:\n", False, "Perhaps `records`?"),
    ("name-unknown", "kind: shaft, inputs: {energy: 1 kJ}",
     "kind: shaft, inputs: {energy: 1 kJ, «boundary_temperature: 300 K}", False, "not a quantity"),
    ("name-repeated", "temperature: 15 °C, p", "temperature: 15 °C, «T: 15 °C, p", False, "only `temperature`"),
    ("value-missing", "results: {pressure: 181 bar}", "results: {«pressure: }", False, "after # is a comment"),
    ("word-unknown", "model: real fluid", "model: «real gas", True, "Perhaps `ideal gas`?"),
    ("word-unknown", "path: constant volume", "path: «isochoric", True, "Perhaps `constant volume`?"),
    ("word-unknown", "path: constant volume", "path: {kind: «Polytropic}", True, "Perhaps `polytropic`?"),
    ("word-unknown", "kind: shaft", "kind: «Shaft", True, "Perhaps `shaft`?"),
    ("word-unknown", "claim: met", "claim: «ok", False, "met, exceeded, not met"),
    ("word-unknown", "{pressure: 181 bar}", "{pressure: 181 bar, phase: «gas}", False,
     "Perhaps `superheated vapour`?"),
    ("word-unknown", "work: positive out", "work: «out", False, "not a work convention"),
    ("word-unknown", "  - id: bottle\n", "  - id: bottle\n    purpose: «drying\n", False, "not a purpose"),
    ("identifier-wrong", "- id: warming", "- id: «Warming 1", True, "Perhaps `warming-1`?"),
    ("identifier-repeated", "id: fan, kind: shaft, inputs: {energy: 1 kJ}}",
     "id: fan, kind: shaft, inputs: {energy: 1 kJ}}, {id: «fan, kind: shaft}", True, "own identifier"),
    ("identifier-repeated", "    limits:", "    assumptions: [{id: a, text: x}, {id: «a, text: y}]\n    limits:", True,
     "An earlier assumption is `a` as well"),
    ("reference-unknown", "from: cold", "from: «kold", True, "Perhaps `cold`?"),
    ("reference-unknown", "path: constant volume", "path: {«nitrogn: constant volume}", True, "Perhaps `nitrogen`?"),
    ("reference-unknown", "id: wall, ", "id: wall, body: «argon, ", True, "The body `argon` does not exist"),
    ("reference-unknown", "quantity: states/hot/nitrogen/pressure", "quantity: states/hot/nitrogen/«presure", False,
     "Perhaps `pressure`?"),
    ("reference-unknown", "quantity: states/hot/nitrogen/pressure", "quantity: states/hot/nitrogen/«p", False,
     "Perhaps `pressure`?"),
    ("reference-unknown", "quantity: states/hot/nitrogen/pressure", "quantity: «states/hot/nitrogen", False,
     "not a quantity that can be held"),
    ("reference-unknown", "quantity: states/hot/nitrogen/pressure", "quantity: records/«other/results/net_work", False,
     "there is no `other` here"),
    ("reference-unknown", "    limits:", "    sources: {bodies/nitrogen/«colour: photo}\n    limits:", False,
     "there is no `colour` here"),
    ("reference-unknown", "hot: {nitrogen: {inputs", "hot: {nitrogen: {same_as: «records/none/states/a/b, inputs", True,
     "The link names the record `none`"),
    ("reference-unknown", "hot: {nitrogen: {inputs", "hot: {nitrogen: {same_as: «cold, inputs", True,
     "records/RECORD/states/STATE/BODY"),
    ("link-circular", "hot: {nitrogen: {inputs", "hot: {nitrogen: {same_as: «states/hot/nitrogen, inputs", True,
     "leads back"),
]  # fmt: skip

QUANTITIES = [
    ("quantity-unreadable", "pressure: 150 bar", "pressure: «about 150 bar", "a quantity"),
    ("quantity-unreadable", "pressure: 150 bar", "pressure: 150«", "the unit is missing"),
    ("unit-unknown", "pressure: 150 bar", "pressure: 150 «barr", "not a known unit"),
    ("unit-ambiguous", "energy: 301 kJ", "energy: 301 «kJ/kg K", "write the brackets"),
    ("reference-conditions-missing", "{volume: 50 L}", "{amount: 7 «Nm³}", "reference conditions"),
    ("temperature-kind-wrong", "heat: 301 kJ", "heat: 301 kJ, temperature_change: 45 «°C", "difference belongs here"),
    ("below-absolute-zero", "temperature: 15 °C", "temperature: «-300 °C", "below absolute zero"),
    ("dimension-wrong", "pressure: 150 bar", "pressure: 150 «kJ", "pressure is stated in bar"),
    ("dimension-wrong", "{volume: 50 L}", "{mass: 7 «mol}", "state it as `amount`"),
    ("rate-for-total", "energy: 301 kJ", "energy: 301 «kW", "give the `duration` under `inputs`"),
    ("specific-for-total", "energy: 301 kJ", "energy: 301 «kJ/kg", "Multiply by the mass"),
    ("specific-for-total", "{volume: 50 L}", "{volume: 5 «m³/kmol}", "Multiply by the amount"),
    ("total-for-specific", "{pressure: 181 bar}", "{specific_entropy: 1 «kJ/K}", "Divide by the mass"),
    ("direction-and-sign", "kind: shaft, inputs: {energy: 1 kJ}",
     "kind: shaft, direction: in, inputs: {energy: «-1 kJ}", "State the direction with a positive number"),
    ("notation-read-as", "heat: 301 kJ", "heat: 301 kJ, specific_entropy_change: «5 kJ/kgK", "read as kJ/(kg·K)"),
]  # fmt: skip


@pytest.mark.parametrize(("kind", "old", "new", "fatal", "says"), FORM)
def test_form(one_problem: OneProblem, kind: str, old: str, new: str, fatal: bool, says: str) -> None:
    """What is wrong with the form is reported once, where it is, and takes the record down only where it must."""
    problem = one_problem((old, new))
    assert (problem.kind, problem.fatal) == (kind, fatal)
    assert says in f"{problem.message} {problem.suggestion}"


@pytest.mark.parametrize(("kind", "old", "new", "says"), QUANTITIES)
def test_quantities(one_problem: OneProblem, kind: str, old: str, new: str, says: str) -> None:
    """A quantity that cannot be used is reported at the part that is meant, and the record goes on."""
    problem = one_problem((old, new))
    assert (problem.kind, problem.fatal, problem.record) == (kind, False, "bottle")
    assert says in f"{problem.message} {problem.suggestion}"
    assert problem.stated is not None
    assert problem.quantity is not None
    assert "inputs" not in problem.quantity


def test_every_kind_is_tested() -> None:
    """No kind of problem is without a test in which it fires."""
    of_the_file = {"file-unreadable", "syntax-broken", "key-repeated", "alias-used", "nesting-too-deep"}
    of_the_file |= {"character-forbidden", "gauge-without-atmosphere"}
    assert {row[0] for row in FORM} | {row[0] for row in QUANTITIES} | of_the_file == set(KINDS)
