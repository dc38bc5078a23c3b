"""Composites of several bodies: what is withheld is found again, whatever it is and however it is written.

Set COMPOSITES to try more than the 200 examples of an ordinary run, as in ``COMPOSITES=2000 python -m pytest …``.
"""

from __future__ import annotations

import math
import os
import random
from collections.abc import Iterator
from contextlib import contextmanager
from dataclasses import dataclass, replace
from typing import Any, Final

import pytest
from hypothesis import Phase, given, settings
from hypothesis import strategies as st

from checker import review
from checker.document import read_document
from checker.findings import Grade, Verdict
from checker.outcomes import NotEvaluable
from checker.package import submit
from checker.sheet.build import RecordPlan, build_sheet
from checker.sheet.closing.trials import Search
from checker.sheet.step import Values, evaluate, reevaluate
from tests.properties.composites import KINDS, Composite, Part
from tests.properties.physics import State
from tests.properties.trial import steady

EACH: Final = int(os.environ.get("COMPOSITES", "200")) // len(KINDS)
MOST_EVALUATIONS: Final = 20_000
"""A block of the largest composites here takes some thousand evaluations; a search that does not end takes more."""
FOUND: Final = 1e-6
"""Relative difference between a value withheld and the value found, where both are true to the balance."""
CLOSED: Final = 1e-8
"""Largest residual, relative to the terms of its equation."""
SAME: Final = 1e-9
"""Relative difference between two ways to write one composite."""
FLOOR: Final = 1.0
"""[J/(kg·K)] times mass and temperature: energies below it are no terms."""


@dataclass(frozen=True, slots=True)
class Found:
    """What the alternate calculation makes of a record from its inputs alone."""

    plan: RecordPlan
    values: Values

    def value(self, pointer: str) -> float | None:
        """Return a value, or None where there is none. [SI]"""
        found = self.values.get(self.plan.sheet.key(pointer))
        return found if isinstance(found, float) else None

    def why_not(self, pointer: str) -> str:
        """Return why there is none."""
        key = self.plan.sheet.key(pointer)
        found = self.values.get(key)
        return found.reason if isinstance(found, NotEvaluable) else self.plan.sheet.missing.get(key, "")


def calculated(composite: Composite) -> Found:
    """Read a composite as any package is read, and calculate it."""
    plan = planned(composite)
    return Found(plan, evaluate(plan.sheet.steps, plan.sheet.leaves))


def planned(composite: Composite) -> RecordPlan:
    """Read a composite as any package is read, and plan its sheet."""
    submission = submit(read_document(composite.package(), "trial.json"))
    assert not submission.problems, submission.problems
    (record,) = submission.records
    assert not record.problems, record.problems
    return build_sheet(record)


@contextmanager
def counting(most: int) -> Iterator[list[int]]:
    """Count the evaluations of blocks, and stop the test at too many."""
    count, plain = [0], Search.residuals

    def counted(self: Any, x: Any) -> list[float]:
        count[0] += 1
        assert count[0] <= most, "the search does not end"
        return plain(self, x)

    with pytest.MonkeyPatch.context() as patch:
        patch.setattr(Search, "residuals", counted)
        yield count


def found_state(found: Found, state: str, body: str, part: Part) -> State:
    """Return a state that the alternate calculation found, with u and s by the routes of this folder."""
    names = ("temperature", "pressure", "specific_volume", "melted_fraction")
    t, p, v, x = (found.value(f"states/{state}/{body}/{name}") for name in names)
    assert t is not None, found.why_not(f"states/{state}/{body}/temperature")
    if v is not None and part.kind.is_fluid:
        return replace(part.kind.physics.at(t=t, v=v), p=p)
    if x is not None and t == pytest.approx(part.last.t, rel=1e-12) and 0.0 < x < 1.0:
        return part.kind.physics.at(t=part.last.t, x=x)
    return part.kind.physics.at(t=t)


def assert_closed(composite: Composite, found: Found) -> None:
    """Hold energy, volume and equilibria of the states found against each other, by the routes of this folder."""
    parts = []
    for name, part in composite.named().items():
        mass = found.value(f"bodies/{name}/mass")
        assert mass is not None
        first, last = (found_state(found, state, name, part) for state in ("start", "end"))
        parts.append(replace(part, mass=mass, first=first, last=last))
    alone = [part for part in parts if not (composite.partition and part.kind.is_fluid)]
    terms = [part.gain for part in parts] + [part.work for part in alone] + [-energy_of(composite, found)]
    size = math.fsum(map(abs, terms)) + FLOOR * math.fsum(part.mass * part.last.t for part in parts)
    assert abs(math.fsum(terms)) <= CLOSED * size
    meeting = [part.first if composite.at_start else part.last for part in parts]
    if "temperature" in composite.shares:
        assert max(s.t for s in meeting) <= min(s.t for s in meeting) * (1.0 + CLOSED)
    if "pressure" in composite.shares:
        pressures = [s.p for s, part in zip(meeting, parts, strict=True) if part.kind.is_fluid and s.p]
        assert max(pressures) <= min(pressures) * (1.0 + CLOSED)
    if composite.partition:
        volumes = [math.fsum(p.mass * (s.v or 0.0) for p, s in ends(parts, last)) for last in (False, True)]
        assert volumes[1] == pytest.approx(volumes[0], rel=CLOSED)


def ends(parts: list[Part], last: bool) -> Iterator[tuple[Part, State]]:
    """Yield the parts with one of their end states."""
    return ((part, part.last if last else part.first) for part in parts)


def energy_of(composite: Composite, found: Found) -> float:
    """Return the energy into the composite as the alternate calculation has it. [J]"""
    name, sign = ("heat", 1.0) if composite.supply == "heat" else ("electrical_work", -1.0)
    value = found.value(f"processes/meeting/{name}")
    if composite.supply == "none":
        return 0.0
    assert value is not None, found.why_not(f"processes/meeting/{name}")
    return sign * value


def assert_found(composite: Composite, found: Found) -> None:
    """Hold every state found against that from which the composite was made."""
    for name, part in composite.named().items():
        for state, made in (("start", part.first), ("end", part.last)):
            for long, value in (("temperature", made.t), ("pressure", made.p), ("specific_volume", made.v)):
                if value is not None:
                    pointer = f"states/{state}/{name}/{long}"
                    assert found.value(pointer) == pytest.approx(value, rel=FOUND), (
                        f"{pointer}: {found.why_not(pointer)}"
                    )


@pytest.mark.parametrize("kind", KINDS)
def test_what_is_withheld_is_found_again(kind: str) -> None:
    """States, masses and energies come out as they were made, and every equation closes to a part in 10⁸."""

    @settings(steady(EACH), phases=(Phase.explicit, Phase.generate))
    @given(KINDS[kind])
    def holds(composite: Composite) -> None:
        with counting(MOST_EVALUATIONS):
            found = calculated(composite)
        assert_found(composite, found)
        assert_closed(composite, found)

    holds()


def drawn() -> st.SearchStrategy[Composite]:
    """Return composites of any kind."""
    return st.one_of(*KINDS.values())


def possible(composite: Composite) -> bool:
    """Say whether a composite generates entropy: a heater run backwards, taking work from heat alone, does not."""
    return composite.generation > 1.0


ON_THE_MODEL = ("ideal-gas-too-dense", "constant-specific-heat-over-wide-span")
"""Rules that do the record again with a better model: gas equalised from 8 bar ends a kelvin colder in truth."""


@steady(15)
@given(drawn().filter(possible))
def test_a_correct_composite_is_accepted(composite: Composite) -> None:
    """Everything that is withheld is claimed as it is: nothing is left to answer but for the choice of the model."""
    found = review(composite.package(), name="trial")
    of_calculation = [f for f in found.findings if f.rule not in ON_THE_MODEL]
    blocking = [f"{f.rule} {f.quantity}: {f.message}" for f in of_calculation if f.grade is not Grade.REMARK]
    assert not blocking, "\n".join(blocking)
    assert found.verdict in (Verdict.ACCEPT, Verdict.ACCEPT_AS_NOTED) or len(of_calculation) < len(
        found.findings
    )


def values_of(composite: Composite) -> dict[str, float]:
    """Return what is found of every body, by the number of its part, and of the process."""
    found = calculated(composite)
    values = {}
    for number, name in enumerate(composite.names()):
        for state in ("start", "end"):
            for prop in ("temperature", "specific_volume", "specific_entropy"):
                value = found.value(f"states/{state}/{name}/{prop}")
                if value is not None:
                    values[f"{state} {number} {prop}"] = value
    for total in ("heat", "work", "internal_energy_change", "entropy_generation"):
        value = found.value(f"processes/meeting/{total}")
        assert value is not None
        values[total] = value
    return values


def assert_same(one: dict[str, float], other: dict[str, float], bodies: float) -> None:
    """Hold two sets of values against each other; energies and entropies by what the bodies hold."""
    assert one.keys() == other.keys()
    for name, value in one.items():
        slack = {"heat": 1.0, "work": 1.0, "internal_energy_change": 1.0, "entropy_generation": 1e-3}
        assert other[name] == pytest.approx(value, rel=SAME, abs=SAME * bodies * slack.get(name, 0.0)), name


def held(composite: Composite) -> float:
    """Return m·T in kilojoule-sized units, the size of what the bodies hold. [J]"""
    return math.fsum(1e3 * part.mass * part.last.t for part in composite.parts)


@steady(10)
@given(drawn(), st.integers(0, 1000))
def test_the_order_of_bodies_is_irrelevant(composite: Composite, seed: int) -> None:
    """Bodies under other names, and so taken in another order, come to the same states and totals."""
    numbers = list(range(len(composite.parts)))
    random.Random(seed).shuffle(numbers)
    other = replace(composite, order=tuple(numbers))
    assert_same(values_of(composite), values_of(other), held(composite))


@steady(10)
@given(drawn().filter(lambda c: c.supply == "heat" and c.hidden != "supply"), st.integers(2, 4))
def test_splitting_a_heat_transfer_changes_nothing(composite: Composite, count: int) -> None:
    """The same heat in several items leads to the same states and totals."""
    other = replace(composite, splits=count)
    assert_same(values_of(composite), values_of(other), held(composite))


@steady(10)
@given(drawn())
def test_two_halves_of_a_body_behave_as_the_body(composite: Composite) -> None:
    """A body cut in two comes to the state of the whole, with half its mass each."""
    cut = composite.parts[-1]
    half = replace(cut, mass=0.5 * cut.mass)
    other = replace(composite, parts=(*composite.parts[:-1], half, half))
    whole, parted = values_of(composite), values_of(other)
    last, extra = len(composite.parts) - 1, len(composite.parts)
    for name in [name for name in whole if f" {last} " in name]:
        assert parted.pop(name.replace(f" {last} ", f" {extra} ")) == pytest.approx(whole[name], rel=SAME)
    assert_same(whole, parted, held(composite))


@steady(10)
@given(KINDS["partition"].filter(lambda c: c.supply == "none"))
def test_equalisation_conserves_the_energy(composite: Composite) -> None:
    """Gases that mix their pressures and temperatures in an insulated vessel keep their energy."""
    change = calculated(composite).value("processes/meeting/internal_energy_change")
    assert change == pytest.approx(0.0, abs=1e-9 * held(composite))


@steady(15)
@given(drawn(), st.floats(0.9, 1.1))
def test_what_was_evaluated_before_changes_nothing(composite: Composite, factor: float) -> None:
    """Inputs that move, and come back, lead to the values of a sheet that was never evaluated with others."""
    found, fresh = calculated(composite), planned(composite)
    sheet = found.plan.sheet
    given_first = sorted(key for key in sheet.leaves if key.startswith("given/states/start/"))
    moved = {key: sheet.leaves[key] * (1.0 + 0.02 * (factor - 1.0)) for key in given_first[:2]}
    there = {**found.values, **reevaluate(sheet, found.values, moved)}
    direct = evaluate(fresh.sheet.steps, {**fresh.sheet.leaves, **moved})
    back = reevaluate(sheet, there, {key: sheet.leaves[key] for key in moved})
    for key, value in back.items():
        assert value == found.values[key] or isinstance(value, NotEvaluable), key
    for spot in [key for key in direct if key.startswith("states/") and key.endswith("/temperature")]:
        one, other = there[spot], direct[spot]
        if isinstance(one, float) and isinstance(other, float):
            assert one == pytest.approx(other, rel=1e-10)
        else:
            assert isinstance(one, NotEvaluable) == isinstance(other, NotEvaluable)
