"""Flows between several bodies: what leaves one box reaches another, and every body's change is accounted for."""

from __future__ import annotations

import math

import pytest

from checker.figures import FlowDiagram
from checker.flows import flows
from tests.checker.cases import case, gas_bottle
from tests.checker.records_of_several import jacketed, joined_vessels, quench


def drawn(record: dict) -> dict[str, FlowDiagram]:
    """Return the flow diagrams of a record of one process by their kind."""
    return {diagram.kind: diagram for diagram in flows(case(record))}


def arrows(diagram: FlowDiagram) -> dict[tuple[str, str], tuple[float, float]]:
    """Return what leaves and what arrives, by the names of the boxes."""
    return {(flow.source, flow.target): (flow.leaves, flow.arrives) for flow in diagram.flows}


def test_listed_heat_goes_from_body_to_body() -> None:
    """400 kJ leave the block and reach the bath."""
    found = drawn(quench())["energy"]
    assert arrows(found) == {("block", "bath"): pytest.approx((400.0, 400.0), abs=1e-6)}
    assert [(flow.label, flow.kind) for flow in found.flows] == [("into-bath", "heat")]


def test_entropy_grows_between_two_bodies_by_what_is_generated() -> None:
    """The block gives off 5 ln(400/320) kJ/K, the bath takes up 20 ln(320/300) kJ/K."""
    found = drawn(quench())["entropy"]
    given, taken = 5 * math.log(400 / 320), 20 * math.log(320 / 300)
    assert arrows(found) == {("block", "bath"): pytest.approx((given, taken), abs=1e-6)}


def test_heat_that_names_no_body_reaches_each_by_its_share() -> None:
    """Of the 500 kJ of the jacket 100 go to the block and 400 to the bath, whatever way they take."""
    found = drawn(jacketed())["energy"]
    assert arrows(found) == {
        ("heat jacket", "bath"): pytest.approx((400.0, 400.0), abs=1e-6),
        ("heat jacket", "block"): pytest.approx((100.0, 100.0), abs=1e-6),
    }


def test_several_that_give_and_several_that_take_meet() -> None:
    """Entropy of the jacket and entropy generated reach both bodies through their meeting."""
    found = arrows(drawn(jacketed())["entropy"])
    into = sum(leaves for (_, target), (leaves, _) in found.items() if target == "meeting entropy")
    out = sum(arrives for (source, _), (_, arrives) in found.items() if source == "meeting entropy")
    assert into == pytest.approx(out)
    assert found["heat jacket", "meeting entropy"][0] == pytest.approx(500 / 350)
    assert found["meeting entropy", "bath"][1] == pytest.approx(20 * math.log(320 / 300))


def test_heat_and_work_that_cannot_be_told_apart_are_one_flow() -> None:
    """How much of what a parcel of gas gains came by work is not known, but its sum is: 36 kJ."""
    (flow,) = drawn(joined_vessels())["energy"].flows
    assert (flow.source, flow.target, flow.kind) == ("right", "left", "energy")
    assert flow.arrives == pytest.approx(36.0)


@pytest.mark.parametrize("record", [quench(), jacketed(), joined_vessels()])
@pytest.mark.parametrize("kind", ["energy", "entropy"])
def test_every_change_is_what_arrives_less_what_leaves(record: dict, kind: str) -> None:
    """The arrows of a body add up to its change."""
    found = drawn(record)[kind]
    for box in found.boxes:
        if box.kind == "body":
            came = sum(flow.arrives for flow in found.flows if flow.target == box.name)
            went = sum(flow.leaves for flow in found.flows if flow.source == box.name)
            assert box.change == pytest.approx(came - went, abs=1e-6)


def test_one_body_has_no_flow_diagram() -> None:
    """Its ledger says it all."""
    assert drawn(gas_bottle({"heat": "31.2 kJ"})) == {}


def test_what_is_not_known_is_not_drawn() -> None:
    """Without the bath's end there is no diagram, and no error."""
    record = quench(insulated=False, equilibrium=[])
    record["processes"][0]["heat_transfers"] = [{"id": "jacket", "boundary_temperature": "350 K"}]
    assert drawn(record) == {}
