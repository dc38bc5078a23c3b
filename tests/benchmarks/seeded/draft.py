"""A record in the making: its package tree, its inputs as decimal text, its steps, and what may be claimed of it."""

from __future__ import annotations

import random
from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from typing import Any

from tests.benchmarks.seeded import units as un
from tests.benchmarks.seeded.chain import Chain, Claim, Function, Given, Step, values_of
from tests.benchmarks.seeded.units import Unit

Slips = Sequence[tuple[str, Function]]


@dataclass
class Draft:
    """Collects a record; ``situation`` and ``hard`` are for the score."""

    rng: random.Random
    situation: str
    hard: bool = False
    tree: dict[str, Any] = field(default_factory=dict)
    head: dict[str, Any] = field(default_factory=dict)
    givens: list[Given] = field(default_factory=list)
    steps: list[Step] = field(default_factory=list)
    claims: list[Claim] = field(default_factory=list)
    references: dict[str, list[str]] = field(default_factory=dict)
    """Group of quantities → the keys whose largest size is the group's reference."""
    groups: dict[str, str] = field(default_factory=dict)
    notes: dict[str, str] = field(default_factory=dict)
    """Facts that slips of results need: key → what (``mass`` key, ``duration`` key, …)."""

    def given(self, key: str, kind: str, number: str, unit: Unit) -> str:
        """Take an input written as decimal text; return the text with its unit."""
        text = f"{number} {unit.text}".strip()
        self.givens.append(Given(key, text, un.stated_value(text, unit), kind, unit))
        return text

    def number(self, low: float, high: float, digits: int = 0) -> str:
        """Return a random number as text with a number of digits of its upper end (three or four if none is said)."""
        digits = digits or self.rng.choice((3, 4))
        decimals = un.decimals_for(high, un.NONE, digits)
        return un.number_text(self.rng.uniform(low, high), max(decimals, 0))

    def temperature(self, key: str, low: float, high: float, unit: Unit | None = None) -> str:
        """Draw a temperature between two [°C], in °C as a rule, sometimes in K or °F."""
        unit = unit or self.rng.choices((un.CELSIUS, un.KELVIN, un.FAHRENHEIT), (8, 1, 1))[0]
        ends = [(t + 273.15 - unit.zero) / unit.size for t in (low, high)]
        return self.given(
            key, "temperature", un.number_text(self.rng.uniform(*ends), self.rng.choice((0, 1, 1))), unit
        )

    def pressure(self, key: str, low: float, high: float, absolute: bool = False) -> str:
        """Draw an absolute pressure between two [bar], in one of the trade's units, sometimes as a gauge reading."""
        unit = self.rng.choices((un.BAR, un.KPA, un.MPA, un.PSIA), (6, 3, 2, 1))[0]
        atmosphere = next(given.value for given in self.givens if given.key == "p0")
        gauged = (
            not absolute and low * 1e5 > 1.3 * atmosphere and unit is not un.PSIA and self.rng.random() < 0.4
        )
        if gauged:
            unit = un.gauge(unit, atmosphere)
        number = (self.rng.uniform(low, high) * 1e5 - unit.zero) / unit.size
        decimals = max(un.decimals_for(number, un.NONE, self.rng.choice((3, 3, 4))), 0)
        return self.given(key, "pressure", un.number_text(number, decimals), unit)

    def step(
        self, outputs: str | Sequence[str], parents: Sequence[str], function: Function, slips: Slips = ()
    ) -> None:
        """Add a formula."""
        keys = (outputs,) if isinstance(outputs, str) else tuple(outputs)
        self.steps.append(Step(keys, tuple(parents), function, tuple(slips)))

    def claimable(
        self, key: str, pointer: str, kind: str, unit: Unit, group: str = "", sign: float = 1.0
    ) -> None:
        """Say that a key may be written, where, and with which others it shares its reference."""
        self.claims.append(Claim(key, pointer, kind, unit, sign=sign))
        if group:
            self.groups[key] = group
            self.references.setdefault(group, []).append(key)

    def peek(self, key: str) -> float:
        """Return the value of a key by the steps so far. [SI]"""
        return values_of(self.chain())[0][key]

    def chain(self) -> Chain:
        """Return the calculation."""
        return Chain(tuple(self.givens), tuple(self.steps))


def inserted(tree: dict[str, Any], pointer: str, text: str, place: str = "results") -> None:
    """Put a text at a pointer's place in a record, among its results or inputs."""
    parts = pointer.split("/")
    *path, name = parts
    node: Any = tree
    for part in path:
        if isinstance(node, list):
            node = next(item for item in node if item["id"] == part)
        else:
            node = node.setdefault(part, {})
    if parts[0] == "results":
        node[name] = text
    else:
        node.setdefault(place, {})[name] = text


def head_of(draft: Draft) -> None:
    """Draw surroundings and sign convention."""
    draft.temperature("t0", 5.0, 32.0, un.CELSIUS)
    p0 = draft.given("p0", "atmosphere", draft.rng.choice(("1.013", "1.000", "0.995", "1.020")), un.BAR)
    convention = draft.rng.choice(("positive out", "positive out", "positive in"))
    draft.head = {
        "number": "TC-1",
        "title": "Trial",
        "revision": "A",
        "date": "2026-01-01",
        "project": "Northmere store",
        "originator": "Process group",
        "checker": "Utilities group",
        "conventions": {"work": convention},
        "surroundings": {"temperature": draft.givens[0].text, "pressure": p0},
    }


def work_sign(draft: Draft) -> float:
    """Return +1 where work out of the system is written positive."""
    return 1.0 if draft.head["conventions"]["work"] == "positive out" else -1.0


def package_of(draft: Draft, texts: Mapping[str, str], claims: Sequence[Claim]) -> dict[str, Any]:
    """Return the package with the claims in their places."""
    import copy

    tree = copy.deepcopy(draft.tree)
    for claim in claims:
        inserted(tree, claim.pointer, texts[claim.key])
    return {"package": draft.head, "records": [tree]}
