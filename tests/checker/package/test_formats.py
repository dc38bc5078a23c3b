"""One package in several notations is one submission; anything else never raises."""

from __future__ import annotations

import json
import random
import time
from collections.abc import Callable
from dataclasses import replace
from pathlib import Path
from typing import Any

import pytest
from hypothesis import HealthCheck, given, settings
from hypothesis import strategies as st

from checker.document import plain_tree, read_document
from checker.package import KINDS, read_package
from checker.package.blank import blank_package
from checker.submission import Record, Submission

Read = Callable[..., object]

DEMO = sorted(Path(__file__).parents[3].joinpath("fixtures", "demo").glob("revision-*.yaml"))


def tree_of(data: bytes) -> Any:
    """Return a package as dicts, lists and text."""
    return plain_tree(read_document(data, "a.yaml").root)


def content(submission: Submission) -> object:
    """Return what a submission says, apart from where it stands in the file."""
    return [
        submission.head,
        submission.unreadable,
        [
            (
                record.id, record.title, sorted(record.bodies), sorted(record.states), record.work_convention,
                sorted((p.id, p.from_state, p.to_state, tuple(p.paths)) for p in record.processes),
                sorted((s.pointer, s.role, s.value, s.quantity.text, s.usable) for s in record.statements),
                sorted((limit.id, limit.quantity, limit.claim or "") for limit in record.limits),
                sorted(record.sources.items()),
                sorted((problem.kind, problem.quantity or "", problem.message) for problem in record.problems),
            )
            for record in submission.records
        ],
    ]  # fmt: skip


def unplaced(record: Record) -> Record:
    """Return a record whose problems do not say where in the value they are."""
    return replace(record, problems=tuple(replace(problem, offset=0) for problem in record.problems))


def shuffled(value: Any, order: random.Random) -> Any:
    """Return a tree with the keys of every mapping in another order."""
    if isinstance(value, dict):
        keys = list(value)
        order.shuffle(keys)
        return {key: shuffled(value[key], order) for key in keys}
    return [shuffled(item, order) for item in value] if isinstance(value, list) else value


@pytest.mark.parametrize("path", DEMO, ids=lambda path: path.stem)
def test_json_and_yaml_are_the_same_submission(path: Path) -> None:
    """The demo packages written as JSON submit the same, place by place."""
    data = path.read_bytes()
    as_json = json.dumps(tree_of(data), ensure_ascii=False, indent=1).encode()
    _, from_yaml = read_package(data, "a.yaml")
    _, from_json = read_package(as_json, "a.json")
    # A JSON text stands in quotes, so that the column inside it is one more; nothing else differs.
    assert [unplaced(record) for record in from_yaml.records] == [
        unplaced(record) for record in from_json.records
    ]
    assert (from_yaml.head, from_yaml.problems) == (from_json.head, from_json.problems)
    assert len(from_yaml.records) >= 8


@pytest.mark.parametrize("path", DEMO, ids=lambda path: path.stem)
@pytest.mark.parametrize("seed", [1, 2, 3])
def test_the_order_of_keys_means_nothing(path: Path, seed: int) -> None:
    """A package with its keys in another order submits the same."""
    data = path.read_bytes()
    other = json.dumps(shuffled(tree_of(data), random.Random(seed))).encode()
    assert content(read_package(other, "a.json")[1]) == content(read_package(data, "a.yaml")[1])


def test_plain_numbers_are_pure_numbers(read: Read) -> None:
    """A JSON number is a pure number, with its digits, and nothing else."""
    tree = tree_of(blank_package().encode())
    tree["records"][0]["states"]["hot"]["nitrogen"]["results"] = {"quality": 0.9, "pressure": 5}
    _, submission = read_package(json.dumps(tree).encode(), "a.json")
    (record,) = submission.records
    assert [s.quantity.text for s in record.statements if s.pointer.endswith("quality")] == ["0.9"]
    assert [problem.kind for problem in record.problems] == ["quantity-unreadable"]


def test_the_demo_package_reads_without_a_problem() -> None:
    """The correct demo package has no problem of form."""
    _, submission = read_package(DEMO[-1])
    assert submission.file == str(DEMO[-1])
    assert submission.problems == ()
    assert [record.problems for record in submission.records] == [()] * len(submission.records)


def test_reading_is_quick() -> None:
    """The ten records of the demo are read in a small part of a second (a few milliseconds on an idle machine)."""
    data = DEMO[-1].read_bytes()
    read_package(data)
    times = []
    for _ in range(7):
        start = time.perf_counter()
        read_package(data)
        times.append(time.perf_counter() - start)
    assert min(times) < 0.2


HOSTILE = {
    "unknown names": lambda t: t["records"][0]["states"]["hot"]["nitrogen"].update(
        inputs={f"temperatur{n}x": "1 K" for n in range(30_000)}),
    "unknown keys": lambda t: t["records"][0].update({f"bodie{n}": "x" for n in range(30_000)}),
    "unknown sources": lambda t: t["records"][0].update(sources={f"bodies/nitrogn{n}": "x" for n in range(30_000)}),
    "unknown states": lambda t: t["records"][0].update(
        sequences=[{"id": f"s{n}", "processes": [f"warmin{n}"]} for n in range(9_000)]),
    "empty sequences": lambda t: t["records"][0].update(sequences=[{"id": "s", "processes": []}] * 20_000),
    "wrong limits": lambda t: t["records"][0].update(limits=[{"id": "a", "quantity": "b", "claim": "x"}] * 12_000),
    "records": lambda t: t.update(records=[{"id": f"r{n}", "bodie": {}} for n in range(20_000)]),
    "same records": lambda t: t.update(records=[{"id": "r"}] * 20_000),
    "long words": lambda t: t["records"][0]["bodies"]["nitrogen"].update(model="x" * 900_000),
    "long numbers": lambda t: t["records"][0]["bodies"]["nitrogen"].update(inputs={"volume": "9" * 900_000}),
}  # fmt: skip


@pytest.mark.parametrize("name", HOSTILE)
def test_hostile_packages_return_at_once(name: str) -> None:
    """However much is wrong, reading costs a few seconds at most, and says a bounded number of things."""
    tree = tree_of(blank_package().encode())
    HOSTILE[name](tree)
    data = json.dumps(tree).encode()
    start = time.perf_counter()
    _, submission = read_package(data, "a.json")
    assert time.perf_counter() - start < 10
    problems = [*submission.problems, *(p for record in submission.records for p in record.problems)]
    assert 1 <= len(problems) <= 1200
    assert all(len(problem.message) < 1500 for problem in problems)


json_values = st.recursive(
    st.none()
    | st.booleans()
    | st.integers(-9, 9)
    | st.sampled_from(["x", "5 kJ", "system", "states/cold/nitrogen", ""]),
    lambda inner: (
        st.lists(inner, max_size=3)
        | st.dictionaries(
            st.sampled_from(["id", "kind", "inputs", "temperature", "T", "nitrogen"]), inner, max_size=3
        )
    ),
    max_leaves=5,
)


def spots(value: Any, path: tuple[Any, ...] = ()) -> list[tuple[Any, ...]]:
    """Return the paths of all values in a tree."""
    inner = value.items() if isinstance(value, dict) else enumerate(value) if isinstance(value, list) else ()
    return [path, *(spot for key, item in inner for spot in spots(item, (*path, key)))]


BLANK_TREE = json.dumps(tree_of(blank_package().encode()))
SPOTS = spots(json.loads(BLANK_TREE))[1:]


@settings(max_examples=300, deadline=None, suppress_health_check=[HealthCheck.too_slow])
@given(st.lists(st.tuples(st.sampled_from(SPOTS), json_values), min_size=1, max_size=3))
def test_any_value_anywhere_is_survived(changes: list[tuple[tuple[Any, ...], Any]]) -> None:
    """A package with anything in any place gives records or problems of known kinds, and never raises."""
    tree = json.loads(BLANK_TREE)
    for path, value in changes:
        node = tree
        for part in path[:-1]:
            inside = isinstance(node, dict) and part in node
            inside = inside or (isinstance(node, list) and isinstance(part, int) and part < len(node))
            node = node[part] if inside else None
        if isinstance(node, dict) or (isinstance(node, list) and path[-1] in range(len(node))):
            node[path[-1]] = value
    document, submission = read_package(json.dumps(tree).encode(), "a.json")
    problems = [*submission.problems, *(p for record in submission.records for p in record.problems)]
    assert {problem.kind for problem in problems} <= set(KINDS)
    assert all(document.where(problem).line >= 1 for problem in problems)
    assert submission.records or problems


@settings(max_examples=150, deadline=None)
@given(
    st.integers(0, len(blank_package())),
    st.integers(0, 12),
    st.text("{}[]:,&*!|'\"# \n-\u00e9a1°", max_size=6),
)
def test_any_damage_to_the_text_is_survived(at: int, length: int, text: str) -> None:
    """A package with a piece of its text replaced is read or refused, and never raises."""
    blank = blank_package()
    damaged = blank[:at] + text + blank[at + length :]
    _, submission = read_package(damaged.encode(), "a.yaml")
    problems = [*submission.problems, *(p for record in submission.records for p in record.problems)]
    assert submission.records or any(problem.fatal for problem in problems)


@given(st.binary(max_size=120))
def test_any_bytes_are_survived(data: bytes) -> None:
    """Bytes that are no package give a problem."""
    _, submission = read_package(data)
    assert submission.problems
