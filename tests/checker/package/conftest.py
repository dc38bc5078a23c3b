"""A small package of one body, and means to read a variation of it."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import pytest

from checker.document import Document, Position
from checker.package import read_package
from checker.problems import Problem
from checker.submission import Record, Statement, Submission

BOTTLE = """\
package:
  number: TC-1
  conventions: {work: positive out}
  surroundings: {temperature: 25 °C, pressure: 1.013 bar}
records:
  - id: bottle
    bodies:
      nitrogen: {substance: Nitrogen, model: real fluid, inputs: {volume: 50 L}}
    states:
      cold: {nitrogen: {inputs: {temperature: 15 °C, pressure: 150 bar}}}
      hot: {nitrogen: {inputs: {temperature: 60 °C}, results: {pressure: 181 bar}}}
    processes:
      - id: warming
        from: cold
        to: hot
        path: constant volume
        heat_transfers: [{id: wall, boundary_temperature: 70 °C, results: {energy: 301 kJ}}]
        work_transfers: [{id: fan, kind: shaft, inputs: {energy: 1 kJ}}]
        results: {heat: 301 kJ, entropy_change: 0.969 kJ/K}
    limits: [{id: working, quantity: states/hot/nitrogen/pressure, at_most: 200 bar, claim: met}]
"""

PAIR = """\
package: {conventions: {work: positive out}, surroundings: {temperature: 25 °C, pressure: 1 bar}}
records:
  - id: bath
    bodies:
      block: {substance: Copper, model: constant specific heat, inputs: {mass: 5 kg, specific_heat: 385 J/(kg·K)}}
      water: {substance: Water, model: real fluid, inputs: {mass: 20 kg}}
    states:
      apart:
        block: {inputs: {temperature: 300 °C}}
        water: {inputs: {temperature: 20 °C, pressure: 1 bar}}
      together: {equilibrium: [temperature], block: , water: {inputs: {pressure: 1 bar}}}
    processes:
      - id: quench
        from: apart
        to: together
        path: {water: constant pressure, block: constant volume}
        heat_transfers: [{id: inner, from: block, to: water}]
        bodies: {block: {results: {heat: -500 kJ}}, water: {results: {heat: 500 kJ}}}
        equilibrium: [temperature]
        total_volume: {bodies: [block, water], inputs: {volume: 30 L}}
        insulated: true
"""

MARK = "«"
"""Stands in a text where a problem is expected."""


@dataclass(frozen=True)
class Reading:
    """A document with what it submits."""

    document: Document
    submission: Submission

    @property
    def problems(self) -> tuple[Problem, ...]:
        """All problems, of the package and of its records."""
        inside = (problem for record in self.submission.records for problem in record.problems)
        return (*self.submission.problems, *inside)

    @property
    def record(self) -> Record:
        """The only record."""
        (record,) = self.submission.records
        return record

    def statement(self, pointer: str) -> Statement:
        """Return the only statement of a quantity."""
        (statement,) = (s for s in self.record.statements if s.pointer == pointer)
        return statement


Read = Callable[..., Reading]


@pytest.fixture(scope="session")
def read() -> Read:
    """Return a function that reads a variation of the bottle: pairs of old text and new text."""

    def reading(*changes: tuple[str, str], of: str = BOTTLE, file: str = "package.yaml") -> Reading:
        text = of
        for old, new in changes:
            assert text.count(old) == 1, f"{old!r} stands {text.count(old)} times"
            text = text.replace(old, new)
        return Reading(*read_package(text.replace(MARK, "").encode(), file))

    return reading


@pytest.fixture(scope="session")
def bottle() -> str:
    """Return the package with one body."""
    return BOTTLE


@pytest.fixture(scope="session")
def pair() -> str:
    """Return the package with two bodies."""
    return PAIR


def marked(text: str) -> Position:
    """Return the position of the mark in a text."""
    before = text[: text.index(MARK)]
    return Position(before.count("\n") + 1, len(before) - before.rfind("\n"))


@pytest.fixture(scope="session")
def one_problem(read: Read) -> Callable[..., Problem]:
    """Return a function that reads a variation, and returns its only problem, which is at the mark."""

    def problem(*changes: tuple[str, str], of: str = BOTTLE) -> Problem:
        text = of
        for old, new in changes:
            text = text.replace(old, new)
        result = read(*changes, of=of)
        (found,) = result.problems
        assert result.document.where(found) == marked(text)
        return found

    return problem
