"""The step and the sheet: the alternate calculation as an ordered list of formulas.

A key is the pointer of a quantity; ``given/`` before it means the value that the originator started from,
``clue/`` a value that fixes a state together with another one.
"""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Callable, Iterable, Mapping, Sequence
from dataclasses import dataclass, field
from heapq import heappop, heappush

from checker.outcomes import NotEvaluable
from checker.sheet.same import SameQuantity

Value = float | str | None
Found = Value | NotEvaluable
Values = dict[str, Found]
Function = Callable[..., tuple[Value, ...]]
SEARCH_COST = 100
"""What a step that searches for a state costs, about, in property states."""
_NO_LINK = NotEvaluable("the linked record gives no value for it", "missing")


@dataclass(frozen=True, slots=True, eq=False)
class Step:
    """One step of a sheet; two steps are the same only if they are one object.

    Attributes
    ----------
    title : str
        What is found, such as ``State hot of nitrogen``.
    outputs, parents : tuple of str
        Keys of what it yields and of what it needs, in the order of the function.
    function : callable
        Takes the parents as floats (SI) and returns the outputs; raises NotEvaluable.
    formula : str
        The formula as an engineer writes it.
    substitution : str
        The right-hand side with ``{0}``, ``{1}`` … for the parents; empty: the parents are listed.
    assumes : str
        What the review itself assumed in this step, or empty.
    takes_none : bool
        The function accepts a parent that the model does not have (a solid without a density).
    trivial : bool
        It only takes an input over and need not be printed.
    cost : int
        What evaluating it costs, about, in property states.
    """

    title: str
    outputs: tuple[str, ...]
    parents: tuple[str, ...]
    function: Function
    formula: str
    substitution: str = ""
    assumes: str = ""
    takes_none: bool = False
    trivial: bool = False
    cost: int = 1


@dataclass(frozen=True, slots=True)
class Link:
    """A leaf whose value comes from another record."""

    key: str
    record: str
    pointer: str


@dataclass(frozen=True, slots=True)
class Sheet:
    """The alternate calculation of one record.

    Attributes
    ----------
    record : str
        Identifier.
    leaves : mapping
        Keys that need no calculation, with their values: inputs in SI, model factors, constants.
    steps : tuple of Step
        In an order in which parents come first.
    missing : mapping
        Key of a quantity without a step → what is missing for it.
    same : SameQuantity
        Which pointers name one quantity.
    links : tuple of Link
        Leaves taken from other records.
    made_by, users : mapping
        Key → the step that yields it, and the places of the steps that take it.
    """

    record: str
    leaves: Mapping[str, float]
    steps: tuple[Step, ...]
    missing: Mapping[str, str]
    same: SameQuantity
    links: tuple[Link, ...] = ()
    made_by: Mapping[str, Step] = field(default_factory=dict)
    users: Mapping[str, tuple[int, ...]] = field(default_factory=dict)

    def key(self, pointer: str) -> str:
        """Return the key under which a quantity is calculated."""
        return self.same.key(pointer)

    def ancestors(self, key: str) -> frozenset[str]:
        """Return every key above ``key``, with all that the same steps yield (one state is one step)."""
        return above(key, self.made_by)


def above(key: str, made_by: Mapping[str, Step]) -> frozenset[str]:
    """Return every key above ``key`` in a set of steps, with all that the same steps yield."""
    found: set[str] = set()
    own = made_by.get(key)
    waiting = list(own.parents if own else ())
    while waiting:
        parent = waiting.pop()
        if parent not in found:
            step = made_by.get(parent)
            found.update(step.outputs if step else (parent,))
            waiting.extend(step.parents if step else ())
    return frozenset(found)


def evaluate(
    steps: Iterable[Step], leaves: Mapping[str, float], substitutes: Mapping[str, float] | None = None
) -> Values:
    """Evaluate steps in order.

    Parameters
    ----------
    leaves : mapping
        Values of the leaves.
    substitutes : mapping, optional
        Values that stand in for a calculated parent (the originator's own, for the carried evaluation). The
        calculated value of the same key is still returned.

    Returns
    -------
    dict
        Key → value, None (the model has no such property) or NotEvaluable.
    """
    values: Values = dict(leaves)
    instead = substitutes or {}
    for step in steps:
        run_step(step, values, instead)
    return values


def users_of(steps: Sequence[Step]) -> dict[str, tuple[int, ...]]:
    """Return key → places of the steps that take it."""
    users: dict[str, list[int]] = defaultdict(list)
    for index, step in enumerate(steps):
        for parent in dict.fromkeys(step.parents):
            users[parent].append(index)
    return {key: tuple(found) for key, found in users.items()}


def reevaluate(
    sheet: Sheet, base: Values, moved: Mapping[str, float], substitutes: Mapping[str, float] | None = None
) -> Values:
    """Return what changes when some leaves or substitutes move: only keys below them, by the same rules.

    Keys of ``moved`` that are calculated act as substitutes for their children.
    """
    values = {**base, **moved}
    instead = {**(substitutes or {}), **moved}
    waiting = sorted({index for key in moved for index in sheet.users.get(key, ())})
    queued = set(waiting)
    touched: Values = {}
    while waiting:
        step = sheet.steps[heappop(waiting)]
        run_step(step, values, instead)
        for key in step.outputs:
            touched[key] = values[key]
            if key in instead:
                continue
            for index in sheet.users.get(key, ()):
                if index not in queued:
                    queued.add(index)
                    heappush(waiting, index)
    return touched


def run_step(step: Step, values: Values, instead: Mapping[str, float]) -> None:
    """Evaluate one step in place."""
    arguments: list[Value] = []
    for key in step.parents:
        value = instead[key] if key in instead else values.get(key, _NO_LINK)
        if value is None and not step.takes_none:
            value = NotEvaluable(f"{key.rsplit('/', 1)[-1].replace('_', ' ')} does not exist here", "missing")
        if isinstance(value, NotEvaluable):
            values.update(dict.fromkeys(step.outputs, value))
            return
        arguments.append(value)
    try:
        results: Iterable[Found] = step.function(*arguments)
    except NotEvaluable as outcome:
        results = (outcome,) * len(step.outputs)
    except (ArithmeticError, ValueError) as error:
        results = (NotEvaluable(f"{step.formula} has no value here ({error})"),) * len(step.outputs)
    values.update(zip(step.outputs, results, strict=True))
