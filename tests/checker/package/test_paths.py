"""Paths in all their ways of writing, and their parameters."""

from __future__ import annotations

from collections.abc import Callable

import pytest

Read = Callable[..., object]
OneProblem = Callable[..., object]

WORD = "path: constant volume"


@pytest.mark.parametrize(
    ("path", "kinds"),
    [
        ("isentropic", ["isentropic"]),
        ("[adiabatic, constant pressure]", ["adiabatic", "constant pressure"]),
        ("{kind: polytropic, exponent: 1.3}", ["polytropic"]),
        ("[{kind: polytropic, exponent: 1.3}, adiabatic]", ["polytropic", "adiabatic"]),
        ("{nitrogen: isothermal}", ["isothermal"]),
        ("{nitrogen: [isothermal, {kind: free expansion}]}", ["isothermal", "free expansion"]),
        ("{nitrogen: {kind: polytropic, exponent: 1.3}}", ["polytropic"]),
        ("[]", []),
    ],
)
def test_ways_of_writing(read: Read, path: str, kinds: list[str]) -> None:
    """A word, a word with parameters, several, and any of them by body are the same path."""
    result = read((WORD, f"path: {path}"))
    assert result.problems == ()
    specs = result.record.processes[0].paths["nitrogen"]
    assert [spec.kind for spec in specs] == kinds
    assert {spec.pointer for spec in specs} <= {"processes/warming/path"}
    if "exponent" in path:
        assert result.statement("processes/warming/path/exponent").value == pytest.approx(1.3)


def test_no_path(read: Read) -> None:
    """A process may leave its path out."""
    assert read((f"        {WORD}\n", "")).record.processes[0].paths == {}


def test_parameters_of_several_bodies(read: Read, pair: str) -> None:
    """In a record of several bodies a parameter belongs to its body."""
    result = read(
        ("{water: constant pressure, block", "{water: {kind: polytropic, exponent: 0}, block"), of=pair
    )
    assert result.problems == ()
    assert result.statement("processes/quench/bodies/water/path/exponent").value == 0.0
    paths = result.record.processes[0].paths
    assert paths["water"][0].pointer == "processes/quench/bodies/water/path"
    assert [spec.kind for spec in paths["block"]] == ["constant volume"]


def test_a_bare_path_does_not_say_whose_it_is(read: Read, pair: str) -> None:
    """With several bodies, a path that is not written by body is refused with what to write."""
    result = read(("{water: constant pressure, block: constant volume}", "constant volume"), of=pair)
    (problem,) = result.problems
    assert (problem.kind, problem.fatal) == ("part-missing", True)
    assert "{block: …, water: …}" in problem.suggestion


@pytest.mark.parametrize(
    ("path", "pointers"),
    [
        ("{kind: against constant external pressure, external_pressure: 2 bar}", ["external_pressure"]),
        (
            "{kind: pressure linear in volume, stiffness: 9 kN/m, piston_area: 1 cm², pressure_at_contact: 1 bar,"
            " volume_at_contact: 1 L}",
            ["stiffness", "piston_area", "pressure_at_contact", "volume_at_contact"],
        ),
        ("{kind: pressure linear in volume, points: [{pressure: 1 bar, volume: 1 L}]}",
         ["points/0/pressure", "points/0/volume"]),
    ],
)  # fmt: skip
def test_parameters(read: Read, path: str, pointers: list[str]) -> None:
    """Every parameter of a path is a statement under the path."""
    result = read((WORD, f"path: {path}"))
    assert result.problems == ()
    stated = [s.pointer for s in result.record.statements if "/path/" in s.pointer]
    assert stated == [f"processes/warming/path/{name}" for name in pointers]


@pytest.mark.parametrize(
    ("path", "says"),
    [
        (
            "{kind: isentropic, «points: [{pressure: 1 bar, volume: 1 L}]}",
            "not a parameter of the path `isentropic`",
        ),
        (
            "{kind: polytropic, exponent: 1.2, «stiffness: 1 kN/m}",
            "belongs to the path `pressure linear in volume`",
        ),
        ("{kind: isothermal, results: {«exponent: 1}}", "not a quantity that a path may state here"),
        ("{kind: polytropic, «exponents: 1.2}", "Perhaps `exponent`?"),
        ("{kind: polytropic, «n: 1.2}", "Perhaps `exponent`?"),
    ],
)
def test_foreign_parameters(one_problem: OneProblem, path: str, says: str) -> None:
    """A parameter that the path does not have is reported at its key."""
    problem = one_problem((WORD, f"path: {path}"))
    assert problem.kind == "name-unknown"
    assert says in f"{problem.message} {problem.suggestion}"


@pytest.mark.parametrize("path", ["«{kind: polytropic, points: 5}", "{kind: polytropic, points: «5}"])
def test_points_are_a_list(read: Read, path: str) -> None:
    """Points of another shape are a structural fault."""
    result = read((WORD, f"path: {path}"))
    (problem,) = result.problems
    assert (problem.kind, problem.fatal) == ("type-wrong", True)
    assert result.document.where(problem).column == len("        path: {kind: polytropic, points: ") + 1


def test_a_point_without_its_volume(one_problem: OneProblem) -> None:
    """A point has both coordinates."""
    problem = one_problem((WORD, "path: {kind: pressure linear in volume, points: [«{pressure: 1 bar}]}"))
    assert problem.kind == "part-missing"
    assert "`volume` is missing in a point of a path" in problem.message
