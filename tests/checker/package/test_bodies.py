"""Bodies and systems of several bodies."""

from __future__ import annotations

from collections.abc import Callable

import pytest

from checker.submission import Datum, Role

Read = Callable[..., object]
OneProblem = Callable[..., object]

INPUTS = "inputs: {volume: 50 L}"


def test_a_body_as_stated(read: Read) -> None:
    """Substance, model and source of the properties are kept; what is not stated has its default."""
    body = read().record.bodies["nitrogen"]
    assert (body.substance, body.model, body.property_source) == ("Nitrogen", "real fluid", "reference")
    assert (body.datum, body.composition, body.table) == (None, None, ())
    industrial = read((INPUTS, f"{INPUTS}, property_source: industrial")).record.bodies["nitrogen"]
    assert industrial.property_source == "industrial"


def test_datum(read: Read) -> None:
    """The datum is a state with the names of what is zero there, symbols included."""
    body = read((INPUTS, f"{INPUTS}, datum: {{temperature: 0 °C, quality: 0, zero: [u, specific_entropy]}}"))
    expected = Datum(273.15, None, 0.0, ("specific_internal_energy", "specific_entropy"))
    assert body.record.bodies["nitrogen"].datum == expected


def test_a_datum_that_cannot_be_read(read: Read) -> None:
    """A datum with an unreadable quantity is reported, and none."""
    result = read((INPUTS, f"{INPUTS}, datum: {{temperature: cold, zero: [u]}}"))
    assert [problem.kind for problem in result.problems] == ["quantity-unreadable"]
    assert result.record.bodies["nitrogen"].datum is None


@pytest.mark.parametrize(
    ("datum", "kind"),
    [
        ("{temperature: 0 °C}", "part-missing"),
        ("{zero: [u]}", "part-missing"),
        ("{temperature: 0 °C, zero: []}", "part-missing"),
        ("{temperature: 0 °C, zero: [x]}", "word-unknown"),
        ("{temperature: 0 °C, zero: u}", "type-wrong"),
    ],
)
def test_a_datum_of_the_wrong_form(read: Read, datum: str, kind: str) -> None:
    """A datum says where and what is zero."""
    result = read((INPUTS, f"{INPUTS}, datum: {datum}"))
    assert [problem.kind for problem in result.problems] == [kind]
    assert result.submission.unreadable == ("bottle",)


def test_composition(read: Read) -> None:
    """Fractions are plain numbers by substance, of amount unless mass is said."""
    body = read((INPUTS, f"{INPUTS}, composition: {{Nitrogen: 0.79, Oxygen: 21 %}}")).record.bodies[
        "nitrogen"
    ]
    assert body.composition == pytest.approx({"Nitrogen": 0.79, "Oxygen": 0.21})
    assert body.composition_basis == "mole"
    by_mass = read((INPUTS, f"{INPUTS}, composition: {{Argon: 1}}, composition_basis: mass"))
    assert by_mass.record.bodies["nitrogen"].composition_basis == "mass"


def test_a_fraction_with_a_unit(one_problem: OneProblem) -> None:
    """A fraction with a unit is no fraction."""
    problem = one_problem((INPUTS, f"{INPUTS}, composition: {{Nitrogen: 0.79 «kg}}"))
    assert problem.kind == "dimension-wrong"


def test_table(read: Read) -> None:
    """The rows of a table are read with their names in whole words."""
    table = "table: [{T: 20 °C, u: 84 kJ/kg}, {T: 40 °C, u: 168 kJ/kg}]"
    body = read(("model: real fluid", f"model: tabulated, {table}")).record.bodies["nitrogen"]
    assert [sorted(row) for row in body.table] == [["specific_internal_energy", "temperature"]] * 2
    assert body.table[1]["temperature"].value == pytest.approx(313.15)


@pytest.mark.parametrize(
    ("row", "kind"),
    [
        ("{«heat: 1 kJ}", "name-unknown"),
        ("{temperature: «warm}", "quantity-unreadable"),
        ("«7", "type-wrong"),
    ],
)
def test_rows_of_a_table(one_problem: OneProblem, row: str, kind: str) -> None:
    """A wrong cell is reported where it stands."""
    assert one_problem(("model: real fluid", f"model: tabulated, table: [{row}]")).kind == kind


def test_a_system_of_two_bodies(read: Read, pair: str) -> None:
    """Equilibrium, total volume, insulation, internal heat and shares are kept."""
    result = read(of=pair)
    assert result.problems == ()
    record = result.record
    (process,) = record.processes
    assert (process.equilibrium, process.total_volume, process.insulated) == (
        ("temperature",), ("block", "water"), True,
    )  # fmt: skip
    (inner,) = process.heat_transfers
    assert (inner.from_body, inner.to_body) == ("block", "water")
    assert record.state_equilibrium == {"together": ("temperature",)}
    assert result.statement("processes/quench/total_volume/volume").value == pytest.approx(0.03)
    assert result.statement("processes/quench/bodies/block/heat").value == pytest.approx(-500e3)
    assert set(record.body_states) == {(s, b) for s in ("apart", "together") for b in ("block", "water")}


@pytest.mark.parametrize(
    ("old", "new"),
    [
        ("to: water}", "to: «wather}"),
        ("bodies: {block: {results: {heat: -500 kJ}}", "bodies: {«blck: {results: {heat: -500 kJ}}"),
        ("total_volume: {bodies: [block, water]", "total_volume: {bodies: [block, «wate]"),
        ("        block: {inputs: {temperature: 300 °C}}", "        «blok: {inputs: {temperature: 300 °C}}"),
    ],
)
def test_references_to_bodies(one_problem: OneProblem, pair: str, old: str, new: str) -> None:
    """A body that does not exist is reported wherever it is named, with the nearest one."""
    problem = one_problem((old, new), of=pair)
    assert (problem.kind, problem.fatal) == ("reference-unknown", True)
    assert "Perhaps" in problem.suggestion


@pytest.mark.parametrize(
    ("word", "truth"), [("true", True), ("no", False), ("False", False), ("'yes'", True)]
)
def test_insulated(read: Read, pair: str, word: str, truth: bool) -> None:
    """Insulation is a truth value in any usual spelling."""
    assert read(("insulated: true", f"insulated: {word}"), of=pair).record.processes[0].insulated is truth


def test_total_volume_takes_a_volume_only(one_problem: OneProblem, pair: str) -> None:
    """Nothing but a volume belongs to a total volume."""
    problem = one_problem(("inputs: {volume: 30 L}", "inputs: {«mass: 30 kg}"), of=pair)
    assert problem.kind == "name-unknown"


@pytest.mark.parametrize(
    ("inputs", "results", "phase", "role", "claimed"),
    [
        ("compressed liquid", "", "subcooled liquid", Role.INPUT, None),
        ("", "saturated  vapour", "saturated vapour", Role.RESULT, "saturated vapour"),
        ("solid", "supercritical", "solid", Role.INPUT, "supercritical"),
        ("", "", None, None, None),
    ],
)
def test_phases(
    read: Read, inputs: str, results: str, phase: str | None, role: Role | None, claimed: str | None
) -> None:
    """A phase is a word of the closed list; that of the inputs counts, that of the results is a claim."""
    state = read(
        ("inputs: {temperature: 60 °C}", f"inputs: {{temperature: 60 °C, phase: {inputs}}}"),
        ("{pressure: 181 bar}", f"{{pressure: 181 bar, phase: {results}}}"),
    ).record.body_states["hot", "nitrogen"]
    assert (state.phase, state.phase_role, state.claimed_phase) == (phase, role, claimed)
