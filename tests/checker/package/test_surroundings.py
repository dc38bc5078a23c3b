"""Surroundings: resolved for every record, and the atmosphere for its gauge pressures."""

from __future__ import annotations

from collections.abc import Callable

import pytest

Read = Callable[..., object]
OneProblem = Callable[..., object]

OVERRIDE = ("  - id: bottle\n", "  - id: bottle\n    surroundings: {pressure: 900 mbar}\n")
GAUGE = ("pressure: 150 bar", "pressure: 150 bar(g)")


def test_surroundings_are_statements_where_they_are_written(read: Read) -> None:
    """Those of the package stand at the package, and come first."""
    result = read()
    temperature, pressure = result.record.statements[:2]
    assert (temperature.pointer, temperature.place) == (
        "surroundings/temperature", ("package", "surroundings", "temperature"),
    )  # fmt: skip
    assert pressure.pointer == "surroundings/pressure"
    assert temperature.value == pytest.approx(298.15)


def test_a_record_overrides_each_by_itself(read: Read) -> None:
    """The record's pressure goes before the package's, whose temperature stays."""
    result = read(OVERRIDE)
    pressure = result.statement("surroundings/pressure")
    assert pressure.value == pytest.approx(9e4)
    assert pressure.place == ("records", 0, "surroundings", "pressure")
    assert result.statement("surroundings/temperature").place[0] == "package"


def test_gauge_pressures_take_the_pressure_of_the_record(read: Read) -> None:
    """A gauge pressure is counted from the surroundings of its own record."""
    assert read(GAUGE).statement("states/cold/nitrogen/pressure").value == pytest.approx(150e5 + 101.3e3)
    assert read(GAUGE, OVERRIDE).statement("states/cold/nitrogen/pressure").value == pytest.approx(
        150e5 + 90e3
    )


def test_gauge_pressure_without_an_atmosphere(one_problem: OneProblem) -> None:
    """Without a pressure of the surroundings a gauge pressure is refused, at its unit."""
    problem = one_problem((", pressure: 1.013 bar}", "}"), ("pressure: 150 bar", "pressure: 150 «bar(g)"))
    assert problem.kind == "gauge-without-atmosphere"
    assert "state the pressure of the surroundings" in problem.message


def test_the_atmosphere_itself_is_absolute(one_problem: OneProblem) -> None:
    """The pressure of the surroundings cannot be a gauge pressure."""
    problem = one_problem(("pressure: 1.013 bar", "pressure: 0 «bar(g)"))
    assert (problem.kind, problem.record) == ("gauge-without-atmosphere", None)


def test_an_unreadable_override_is_not_replaced(read: Read) -> None:
    """Where a record's own pressure cannot be read, that of the package is not taken in its place."""
    result = read(("  - id: bottle\n", "  - id: bottle\n    surroundings: {p: low}\n"), GAUGE)
    assert [problem.kind for problem in result.problems] == [
        "quantity-unreadable",
        "gauge-without-atmosphere",
    ]
    assert "surroundings/pressure" not in [s.pointer for s in result.record.statements]


def test_problems_of_the_package_surroundings_are_told_once(read: Read, bottle: str) -> None:
    """Two records under wrong surroundings share one problem, which belongs to the package."""
    second = bottle[bottle.index("  - id: bottle") :].replace("id: bottle", "id: second")
    result = read(("temperature: 25 °C", "temperature: 25"), of=bottle + second)
    (problem,) = result.problems
    assert (problem.record, problem.quantity) == (None, "surroundings/temperature")


def test_a_pressure_of_another_kind_is_no_atmosphere(read: Read) -> None:
    """A wrong unit in the surroundings is reported, and not counted from."""
    result = read(("pressure: 1.013 bar", "pressure: 1.013 kJ"), GAUGE)
    assert {problem.kind for problem in result.problems} == {"dimension-wrong", "gauge-without-atmosphere"}
