"""Every quantity of a record becomes a statement by its pointer, with role, sign and place."""

from __future__ import annotations

import math
from collections.abc import Callable

import pytest

from checker.problems import Place
from checker.quantity import dimensions as dim
from checker.submission import Role

Read = Callable[..., object]

WHOLE = """\
package: {conventions: {work: positive in}, surroundings: {T: 25 °C, p: 1 bar}}
records:
  - id: all
    purpose: heating
    bodies: {gas: {substance: Air, model: ideal gas, inputs: {V: 2 L}, results: {m: 3 g}}}
    states:
      one: {gas: {inputs: {T: 300 K, p: 1 bar(g)}, results: {v: 0.4 m³/kg, u: 214 kJ/kg, h: 300 kJ/kg}}}
      two: {gas: {inputs: {x: 0.5, phase: compressed liquid}, results: {s: 1 kJ/(kg·K), phase: wet vapour}}}
    processes:
      - id: press
        from: one
        to: two
        path: {gas: {kind: polytropic, exponent: 1.25, results: {exponent: 1.3}}}
        heat_transfers:
          - {id: wall, boundary_temperature: system, reservoir_temperature: 280 K, inputs: {energy: 5 kJ}}
          - {id: jacket, boundary_temperature: 290 K, results: {mean_power: 5 kW, duration: 1 s}}
        work_transfers: [{id: rod, kind: boundary, results: {energy: 1 kJ}}]
        inputs: {duration: 10 s, Q: 6 kJ}
        results: {W: 2 kJ, specific_work: 3 kJ/kg, entropy_change: 1 J/K}
        bodies: {gas: {results: {heat: 4 kJ}}}
      - {id: back, from: two, to: one, path: [isentropic, {kind: pressure linear in volume,
         points: [{pressure: 1 bar, volume: 1 L}, {pressure: 2 bar, volume: 2 L}]}]}
    sequences: [{id: both, processes: [press, back], inputs: {lift_pressure: 3 bar}, results: {heat: 1 kJ}}]
    results: {net_work: 7 kJ, coefficient_of_performance: 3}
    assumptions: [{id: wall, text: Wall  heat capacity negligible., inputs: {mass: 1 kg, specific_heat: 5 J/(kg·K)}}]
    limits: [{id: hot, quantity: states/one/gas/temperature, at_least: 20 °C, at_most: 90 °C, claim: not met}]
    sources: {processes/press/path/gas/exponent: guess, bodies/gas: catalogue}
"""

EXPECTED = {
    # pointer: (role, value in SI and in the program's sign, place within the record)
    "bodies/gas/volume": (Role.INPUT, 2e-3, ("bodies", "gas", "inputs", "V")),
    "bodies/gas/mass": (Role.RESULT, 3e-3, ("bodies", "gas", "results", "m")),
    "states/one/gas/temperature": (Role.INPUT, 300.0, ("states", "one", "gas", "inputs", "T")),
    "states/one/gas/pressure": (Role.INPUT, 2e5, ("states", "one", "gas", "inputs", "p")),
    "states/one/gas/specific_volume": (Role.RESULT, 0.4, ("states", "one", "gas", "results", "v")),
    "states/one/gas/specific_internal_energy": (Role.RESULT, 214e3, ("states", "one", "gas", "results", "u")),
    "states/one/gas/specific_enthalpy": (Role.RESULT, 300e3, ("states", "one", "gas", "results", "h")),
    "states/two/gas/quality": (Role.INPUT, 0.5, ("states", "two", "gas", "inputs", "x")),
    "states/two/gas/specific_entropy": (Role.RESULT, 1e3, ("states", "two", "gas", "results", "s")),
    "processes/press/heat_transfers/wall/reservoir_temperature": (
        Role.INPUT, 280.0, ("processes", 0, "heat_transfers", 0, "reservoir_temperature")),
    "processes/press/heat_transfers/wall/energy": (
        Role.INPUT, 5e3, ("processes", 0, "heat_transfers", 0, "inputs", "energy")),
    "processes/press/heat_transfers/jacket/boundary_temperature": (
        Role.INPUT, 290.0, ("processes", 0, "heat_transfers", 1, "boundary_temperature")),
    "processes/press/heat_transfers/jacket/mean_power": (
        Role.RESULT, 5e3, ("processes", 0, "heat_transfers", 1, "results", "mean_power")),
    "processes/press/heat_transfers/jacket/duration": (
        Role.RESULT, 1.0, ("processes", 0, "heat_transfers", 1, "results", "duration")),
    "processes/press/work_transfers/rod/energy": (
        Role.RESULT, -1e3, ("processes", 0, "work_transfers", 0, "results", "energy")),
    "processes/press/duration": (Role.INPUT, 10.0, ("processes", 0, "inputs", "duration")),
    "processes/press/heat": (Role.INPUT, 6e3, ("processes", 0, "inputs", "Q")),
    "processes/press/work": (Role.RESULT, -2e3, ("processes", 0, "results", "W")),
    "processes/press/specific_work": (Role.RESULT, -3e3, ("processes", 0, "results", "specific_work")),
    "processes/press/entropy_change": (Role.RESULT, 1.0, ("processes", 0, "results", "entropy_change")),
    "processes/press/bodies/gas/heat": (Role.RESULT, 4e3, ("processes", 0, "bodies", "gas", "results", "heat")),
    "processes/back/path/points/0/pressure": (Role.INPUT, 1e5, ("processes", 1, "path", 1, "points", 0, "pressure")),
    "processes/back/path/points/0/volume": (Role.INPUT, 1e-3, ("processes", 1, "path", 1, "points", 0, "volume")),
    "processes/back/path/points/1/pressure": (Role.INPUT, 2e5, ("processes", 1, "path", 1, "points", 1, "pressure")),
    "processes/back/path/points/1/volume": (Role.INPUT, 2e-3, ("processes", 1, "path", 1, "points", 1, "volume")),
    "sequences/both/lift_pressure": (Role.INPUT, 3e5, ("sequences", 0, "inputs", "lift_pressure")),
    "sequences/both/heat": (Role.RESULT, 1e3, ("sequences", 0, "results", "heat")),
    "results/net_work": (Role.RESULT, -7e3, ("results", "net_work")),
    "results/coefficient_of_performance": (Role.RESULT, 3.0, ("results", "coefficient_of_performance")),
    "assumptions/wall/mass": (Role.INPUT, 1.0, ("assumptions", 0, "inputs", "mass")),
    "assumptions/wall/specific_heat": (Role.INPUT, 5.0, ("assumptions", 0, "inputs", "specific_heat")),
}  # fmt: skip


def test_every_level_of_a_record(read: Read) -> None:
    """Each quantity is stated once, under its whole-word pointer, where it is written."""
    result = read(of=WHOLE)
    assert result.problems == ()
    record = result.record
    stated = {s.pointer: s for s in record.statements if s.pointer in EXPECTED}
    assert {p: (s.role, s.place[2:]) for p, s in stated.items()} == {
        p: (e[0], e[2]) for p, e in EXPECTED.items()
    }
    for pointer, (_, value, _) in EXPECTED.items():
        assert math.isclose(stated[pointer].value, value, rel_tol=1e-12), pointer
    others = [s.pointer for s in record.statements if s.pointer not in EXPECTED]
    assert (
        others
        == ["surroundings/temperature", "surroundings/pressure"] + ["processes/press/path/exponent"] * 2
    )


def test_what_is_no_quantity(read: Read) -> None:
    """Words, links between parts and free text are kept beside the statements."""
    record = read(of=WHOLE).record
    assert record.purpose == "heating"
    assert record.work_convention == "positive in"
    wall, jacket = record.processes[0].heat_transfers
    assert (wall.at_system, jacket.at_system) == (True, False)
    two = record.body_states["two", "gas"]
    assert (two.phase, two.phase_role, two.claimed_phase) == ("subcooled liquid", Role.INPUT, "wet vapour")
    assert [spec.kind for spec in record.processes[1].paths["gas"]] == [
        "isentropic",
        "pressure linear in volume",
    ]
    assert [spec.points for spec in record.processes[1].paths["gas"]] == [0, 2]
    assert record.assumptions[0].word == "wall heat capacity negligible"
    assert record.assumptions[0].text == "Wall  heat capacity negligible."
    (limit,) = record.limits
    assert (limit.at_least.text, limit.at_most.text, limit.claim) == ("20 °C", "90 °C", "not met")
    assert record.sources == {"processes/press/path/exponent": "guess", "bodies/gas": "catalogue"}


def test_statements_stand_in_document_order(read: Read) -> None:
    """The order is that of the lines, whatever the order of the keys."""
    swapped = read(("        inputs: {duration: 10 s, Q: 6 kJ}\n", ""),
                   ("      - id: press\n", "      - inputs: {duration: 10 s, Q: 6 kJ}\n        id: press\n"),
                   of=WHOLE)  # fmt: skip
    places = [swapped.document.position(s.place) for s in swapped.record.statements]
    assert [(p.line, p.column) for p in places] == sorted((p.line, p.column) for p in places)


SIGNS = [
    ("positive out", "", "1 kJ", 1e3),
    ("positive out", "direction: out, ", "1 kJ", 1e3),
    ("positive out", "direction: in, ", "1 kJ", -1e3),
    ("positive in", "", "1 kJ", -1e3),
    ("positive in", "direction: out, ", "1 kJ", 1e3),
    ("positive in", "direction: in, ", "1 kJ", -1e3),
    ("positive in", "", "-1 kJ", 1e3),
]


@pytest.mark.parametrize(("convention", "direction", "text", "value"), SIGNS)
def test_sign_of_a_work_item(read: Read, convention: str, direction: str, text: str, value: float) -> None:
    """The work convention gives the sign, and a direction overrides it; inside, work is positive out."""
    result = read(
        ("positive out", convention),
        ("kind: shaft, inputs: {energy: 1 kJ}", f"kind: shaft, {direction}inputs: {{energy: {text}}}"),
    )
    assert result.problems == ()
    assert result.statement("processes/warming/work_transfers/fan/energy").value == pytest.approx(value)


def test_heat_is_always_positive_in(read: Read) -> None:
    """The work convention does not touch heat, energy changes and their totals."""
    result = read(("positive out", "positive in"))
    assert result.statement("processes/warming/heat").value == pytest.approx(301e3)
    assert result.statement("processes/warming/heat_transfers/wall/energy").value == pytest.approx(301e3)


def test_convention_not_stated(read: Read) -> None:
    """Without a convention numbers stay as they are, and the record says that nothing was stated."""
    record = read(("  conventions: {work: positive out}\n", "")).record
    assert record.work_convention is None
    assert [s.sign for s in record.statements] == [1] * len(record.statements)


def test_a_record_overrides_the_convention(read: Read) -> None:
    """The convention of the record counts before that of the package."""
    result = read(("  - id: bottle\n", "  - id: bottle\n    conventions: {work: positive in}\n"))
    assert result.record.work_convention == "positive in"
    assert result.statement("processes/warming/work_transfers/fan/energy").sign == -1


def test_direction_with_a_negative_number_stays_usable(read: Read) -> None:
    """The contradiction is reported, and the value is what direction and number say together."""
    result = read(
        ("kind: shaft, inputs: {energy: 1 kJ}", "kind: shaft, direction: in, inputs: {energy: -1 kJ}")
    )
    statement = result.statement("processes/warming/work_transfers/fan/energy")
    assert statement.usable
    assert statement.value == pytest.approx(1e3)


NOTHING = ("70 °C, ", "70 °C, ")
RATES = [
    # two changes of the text, pointer, value of the total
    (("energy: 301 kJ", "energy: 2 kW"),
     ("results: {heat: 301 kJ", "inputs: {duration: 1 min}\n        results: {heat: 301 kJ"),
     "processes/warming/heat_transfers/wall/energy", 120e3),
    (("inputs: {energy: 1 kJ}", "inputs: {energy: 2 kW, duration: 3 s}"), NOTHING,
     "processes/warming/work_transfers/fan/energy", 6e3),
    (("heat: 301 kJ, entropy_change: 0.969 kJ/K}", "entropy_change: 2 W/K}\n        inputs: {duration: 5 s}"),
     NOTHING, "processes/warming/entropy_change", 10.0),
]  # fmt: skip


@pytest.mark.parametrize(("first", "second", "pointer", "total"), RATES)
def test_a_rate_with_a_duration_is_a_total(
    read: Read, first: tuple[str, str], second: tuple[str, str], pointer: str, total: float
) -> None:
    """The duration of the item or of the process makes a rate a total, which is remarked upon."""
    result = read(first, second)
    statement = result.statement(pointer)
    assert statement.usable
    assert statement.value == pytest.approx(total)
    assert statement.quantity.dimension in (dim.ENERGY, dim.ENTROPY)
    assert statement.quantity.number_text == "2"
    assert statement.quantity.number_of(statement.quantity.value) == pytest.approx(2.0)
    (problem,) = result.problems
    assert problem.kind == "notation-read-as"
    assert "read as a total over the duration of" in problem.message


@pytest.mark.parametrize("duration", ["0 s", "-5 s", "5 kg", "soon"])
def test_a_duration_that_is_none_makes_no_total(read: Read, duration: str) -> None:
    """A rate stays a rate where the duration is not a positive time."""
    result = read(("inputs: {energy: 1 kJ}", f"inputs: {{energy: 2 kW, duration: {duration}}}"))
    assert "rate-for-total" in {problem.kind for problem in result.problems}
    assert not result.statement("processes/warming/work_transfers/fan/energy").usable


def test_a_total_and_a_share_of_a_single_body_stay_apart(read: Read) -> None:
    """The heat of the process and the share of its only body are two pointers."""
    result = read(
        (
            "results: {heat: 301 kJ",
            "bodies: {nitrogen: {results: {Q: 300 kJ}}}\n        results: {heat: 301 kJ",
        )
    )
    pointers = [s.pointer for s in result.record.statements]
    assert "processes/warming/heat" in pointers
    assert "processes/warming/bodies/nitrogen/heat" in pointers


def test_a_wrong_unit_is_stated_and_not_usable(read: Read) -> None:
    """What has the wrong unit is kept for the report, and not calculated with."""
    result = read(("energy: 301 kJ", "energy: 301 kW"))
    assert not result.statement("processes/warming/heat_transfers/wall/energy").usable
    assert result.record.stated("processes/warming/heat_transfers/wall/energy") == ()


def test_an_unreadable_text_is_not_stated(read: Read) -> None:
    """A text that is no quantity leaves no statement; the others stay."""
    result = read(("temperature: 15 °C", "temperature: mild"))
    pointers = [s.pointer for s in result.record.statements]
    assert "states/cold/nitrogen/temperature" not in pointers
    assert "states/cold/nitrogen/pressure" in pointers


@pytest.mark.parametrize("written", ["", "~", "null"])
def test_blank_values_are_not_stated(read: Read, written: str) -> None:
    """A name without a value states nothing; where it was not left open on purpose, it is asked about."""
    result = read(("temperature: 15 °C, p", f"temperature: {written}, p"))
    pointer = "states/cold/nitrogen/temperature"
    asked = [] if written else [("value-missing", pointer, True)]
    assert [(p.kind, p.quantity, p.at_key) for p in result.problems] == asked
    assert pointer not in [s.pointer for s in result.record.statements]


def test_a_boundary_temperature_without_value_is_asked_about(read: Read) -> None:
    """It stands beside the inputs of its transfer and is one of them."""
    result = read(("boundary_temperature: 70 °C", "boundary_temperature: "))
    pointer = "processes/warming/heat_transfers/wall/boundary_temperature"
    assert [(p.kind, p.quantity) for p in result.problems] == [("value-missing", pointer)]


def test_a_value_behind_a_number_sign_is_a_comment(read: Read) -> None:
    """The pointer has the whole word, whatever was written; the rest of the record is read."""
    result = read(
        ("temperature: 15 °C, pressure: 150 bar}", "temperature: 15 °C,\n      p: # 150 bar\n    }")
    )
    ((kind, quantity),) = [(p.kind, p.quantity) for p in result.problems]
    assert (kind, quantity) == ("value-missing", "states/cold/nitrogen/pressure")
    assert "states/cold/nitrogen/temperature" in [s.pointer for s in result.record.statements]


def test_of_a_name_and_its_symbol_the_first_is_read(read: Read) -> None:
    """Where a quantity is given twice in one mapping, the first one counts."""
    result = read(("temperature: 15 °C, p", "T: 16 °C, temperature: 15 °C, p"))
    assert result.statement("states/cold/nitrogen/temperature").quantity.text == "16 °C"


def test_offsets_are_inside_quoted_texts(read: Read) -> None:
    """The column of a wrong unit is right in quoted text as well."""
    result = read(("pressure: 150 bar", "pressure: '150 barr'"))
    (problem,) = result.problems
    where = result.document.where(problem)
    line = result.document.position(problem.place)
    assert where.column == line.column + len("'150 ")


def test_places_are_of_the_document(read: Read) -> None:
    """Every statement's place leads to its text."""
    result = read(of=WHOLE)
    for statement in result.record.statements:
        place: Place = statement.place
        node = result.document.node(place)
        assert node is not None
        assert node.text == statement.quantity.text


@pytest.mark.parametrize(
    ("written", "column"),
    [
        ("'150 barr'", len("'150 ")),
        ("150\n          barr", 0),
        ('"150\n          barr"', 0),
        ('"\\u0031\\u0035\\u0030 barr"', 0),
        ("'150 ''barr'", 0),
    ],
)
def test_offsets_never_leave_the_text(read: Read, written: str, column: int) -> None:
    """Where the file shows other characters than the text has, the text as a whole is meant."""
    result = read(("pressure: 150 bar", f"pressure: {written}"))
    (problem,) = result.problems
    where, start = result.document.where(problem), result.document.position(problem.place)
    assert (where.line, where.column) == (start.line, start.column + column)


def test_offsets_are_inside_quoted_keys(read: Read) -> None:
    """The column of a pointer's wrong part is right in a quoted key, as all keys of JSON are."""
    result = read(("    limits:", "    sources: {'bodies/nitrogen/colour': photo}\n    limits:"))
    (problem,) = result.problems
    assert result.document.where(problem).column == len("    sources: {'bodies/nitrogen/") + 1
