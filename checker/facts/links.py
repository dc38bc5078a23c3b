"""Linked states that were found without their link: what the linked state has, against what they have themselves."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from checker.case import Case
from checker.facts.deviation import Deviation, between
from checker.sheet.links import LINKED, Target, rests_on_link, target_of
from checker.submission import BodyState


@dataclass(frozen=True, slots=True)
class Apart:
    """A property in which a state differs from the one that it is declared the same as. [SI]"""

    pointer: str
    name: str
    linked: float
    deviation: Deviation


def found_otherwise(case: Case) -> Iterator[tuple[BodyState, Case | None, Target]]:
    """Yield every linked state that its inputs or its path fix, with the case of the state it is linked to."""
    for (state, body), found in case.record.body_states.items():
        target = target_of(case.record, state, body)
        step = case.plan.sheet.made_by.get(f"states/{state}/{body}/temperature")
        if target is None or step is None or rests_on_link(case.record, state, body, step.parents):
            continue
        if case.value(step.outputs[0]) is not None:
            home = case if target.record == case.record.id else case.others.get(target.record)
            yield found, home, target


def is_known(home: Case | None, target: Target) -> bool:
    """Say whether a linked state has a temperature to compare with."""
    return home is not None and home.value(target.key("temperature")) is not None


def differences(case: Case, found: BodyState, home: Case, target: Target) -> Iterator[Apart]:
    """Yield the properties in which a state and the one that it is linked to are further apart than tolerated."""
    for name in LINKED:
        pointer = f"states/{found.state}/{found.body}/{name}"
        apart = between((home, target.key(name)), (case, pointer), case.allowance(pointer))
        linked = home.value(target.key(name))
        if apart is not None and linked is not None and apart.beyond:
            yield Apart(pointer, name, linked, apart)
