"""Energy balances as equations: what they sum, and when they cannot be written."""

from __future__ import annotations

from typing import Any

import pytest

from checker.sheet.closing import balances
from checker.sheet.closing.world import PROPERTIES, World
from checker.sheet.context import ProcessContext
from checker.sheet.keys import body_key, state_key
from checker.sheet.step import Value
from tests.checker.cases import case
from tests.checker.records_of_several import jacketed, joined_vessels, quench, stops


def context(record: dict[str, Any]) -> tuple[ProcessContext, set[str]]:
    """Return the process of a record, with the keys that nothing needs to be sought for."""
    ctx = case(record).plan.contexts[0]
    known = {ctx.key(name) for name in ("heat", "shaft_work", "electrical_work")}
    known |= {
        ctx.share(body, f"{kind}_energy_change") for body in ctx.bodies for kind in ("kinetic", "potential")
    }
    return ctx, known


def world(ctx: ProcessContext, known: set[str], energies: dict[str, float], **values: float) -> World:
    """Return a trial: 10 kg of block and 20 kg of bath with specific energies that rise from zero."""
    found: dict[str, Value] = dict.fromkeys(known, 0.0)
    found |= {ctx.key(name): value for name, value in values.items()}
    found |= {body_key("block", "mass"): 10.0, body_key("bath", "mass"): 20.0}
    for body, last in energies.items():
        for state, energy in (("before", 0.0), ("after", last)):
            own = (300.0, None, None, energy, None, 0.0)
            found |= {state_key(state, body, p): v for p, v in zip(PROPERTIES, own, strict=True)}
    return World(found)


def test_the_balance_of_a_process_sums_its_bodies():
    """10·Δu + 20·Δu of block and bath are the heat of the jacket."""
    ctx, known = context(jacketed())
    equation = balances.process_balance(ctx, known)
    assert equation is not None
    energies = {"block": 10e3, "bath": 20e3}
    assert equation.residual(world(ctx, known, energies, heat=5e5))[0] == pytest.approx(0.0, abs=1e-6)
    difference, size = equation.residual(world(ctx, known, energies, heat=4e5))
    assert difference == pytest.approx(1e5)
    assert size == pytest.approx(9e5, rel=0.02)
    assert equation.masses == {"block", "bath"}


def test_work_out_takes_from_the_energy():
    """50 kJ of electrical work out of the system count as energy that left it."""
    ctx, known = context(jacketed())
    equation = balances.process_balance(ctx, known)
    assert equation is not None
    trial = world(ctx, known, {"block": 10e3, "bath": 20e3}, heat=5e5, electrical_work=5e4)
    assert equation.residual(trial)[0] == pytest.approx(5e4)


def test_without_a_known_heat_or_motion_there_is_no_balance():
    """A balance with two things missing is none."""
    ctx, known = context(jacketed())
    assert balances.process_balance(ctx, known - {ctx.key("heat")}) is None
    assert balances.process_balance(ctx, known - {ctx.share("bath", "kinetic_energy_change")}) is None
    assert balances.process_balance(ctx, known - {ctx.key("shaft_work")}) is None


def test_bodies_have_balances_of_their_own_where_their_heat_is_their_own():
    """Heat named between block and bath gives two; a jacket of no body gives none."""
    ctx, known = context(quench())
    heat = ctx.heat_item("into-bath")
    found = list(balances.body_balances(ctx, known | {heat}))
    assert [e.name for e in found] == [f"energy balance of {body} in quenching" for body in ctx.bodies]
    trial = world(ctx, known | {heat}, {"block": -40e3, "bath": 20e3})
    trial.values[heat] = 4e5  # type: ignore[index]  # a dictionary here
    assert [e.residual(trial)[0] for e in found] == pytest.approx([0.0, 0.0], abs=1e-6)
    ctx, known = context(jacketed())
    assert list(balances.body_balances(ctx, known)) == []


def test_a_shared_volume_does_no_work_outside():
    """Gases in one fixed volume push each other only: their balance needs no path."""
    ctx, known = context(joined_vessels())
    equation = balances.process_balance(ctx, known)
    assert equation is not None
    assert set(equation.parents) == known


def test_a_sequence_closes_over_its_processes():
    """A total heat whose parts are not known gives one equation over both; known parts give none."""
    found = case(stops("400 kJ")).plan
    total = "given/sequences/all/heat"
    known = {total}
    for ctx in found.contexts:
        known |= {ctx.key(name) for name in ctx.other_work_kinds}
        known |= {ctx.share("gas", f"{kind}_energy_change") for kind in ("kinetic", "potential")}
    (equation,) = balances.sequence_balances(case(stops("400 kJ")).record, found.contexts, known)
    assert equation.name == "energy balance of sequence all"
    assert {state for state, _ in equation.uses} == {"cold", "lifted", "hot"}
    heats = {ctx.key("heat") for ctx in found.contexts}
    assert not list(balances.sequence_balances(case(stops("400 kJ")).record, found.contexts, known | heats))
