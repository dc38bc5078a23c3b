"""The JSON Schema of a package: valid, closed, described, and in agreement with reading."""

from __future__ import annotations

import json
from collections.abc import Iterator
from pathlib import Path
from typing import Any

import pytest
from jsonschema import Draft202012Validator

from checker.document import plain_tree, read_document
from checker.package.blank import blank_package
from checker.package.parts.path import PARAMETERS, POINT_NAMES, PathPoint, PathSpec
from checker.package.quantity_schema import SHARED, UNITS
from checker.package.schema import package_schema
from checker.quantity import dimensions as dim
from checker.vocabulary import PATH_KINDS, SYNONYMS, TERMS, Level

DEMO = sorted(Path(__file__).parents[3].joinpath("fixtures", "demo").glob("revision-*.yaml"))
SCHEMA = package_schema()
VALIDATOR = Draft202012Validator(SCHEMA)


def tree_of(data: bytes) -> Any:
    """Return a package as dicts, lists and text."""
    return plain_tree(read_document(data, "a.yaml").root)


def objects(node: Any, path: str = "") -> Iterator[tuple[str, dict[str, Any]]]:
    """Yield every mapping of a schema with its path."""
    if isinstance(node, dict):
        yield path, node
        for key, value in node.items():
            yield from objects(value, f"{path}/{key}")
    elif isinstance(node, list):
        for index, value in enumerate(node):
            yield from objects(value, f"{path}/{index}")


def test_is_a_schema_of_the_stated_draft() -> None:
    """The schema itself is valid, and says what it is."""
    Draft202012Validator.check_schema(SCHEMA)
    assert SCHEMA["$schema"] == "https://json-schema.org/draft/2020-12/schema"
    assert SCHEMA["$id"].startswith("urn:")
    assert SCHEMA["title"]


def test_every_mapping_is_closed() -> None:
    """No mapping takes keys that the format does not know."""
    checked = 0
    for path, node in objects(SCHEMA):
        if node.get("type") == "object" and not path.endswith("/properties"):
            checked += 1
            assert (
                node.get("additionalProperties") is False
                or "type" in node["additionalProperties"]
                or ("propertyNames" in node)
            ), path
    assert checked > 20


def test_every_field_is_described() -> None:
    """Every field has a description of its own."""
    fields = [
        (f"{path}/{key}", field)
        for path, node in objects(SCHEMA)
        if isinstance(node.get("properties"), dict)
        for key, field in node["properties"].items()
    ]
    assert len(fields) > 150
    assert [path for path, field in fields if not field.get("description")] == []


def test_every_quantity_has_units_and_an_example_that_reads() -> None:
    """The description of a quantity ends with its units, and its example is a quantity of that kind."""
    from checker.quantity import parse_quantity

    count = 0
    for level, names in (("BodyQuantities", Level.BODY), ("StateQuantities", Level.STATE),
                         ("ProcessQuantities", Level.PROCESS), ("HeatTransferQuantities", Level.TRANSFER),
                         ("CycleQuantities", Level.CYCLE), ("SequenceQuantities", Level.SEQUENCE),
                         ("AssumptionQuantities", Level.ASSUMPTION), ("Surroundings", Level.SURROUNDINGS)):  # fmt: skip
        for name, field in SCHEMA["$defs"][level]["properties"].items():
            term = TERMS[names].get(SYNONYMS.get(names, {}).get(name, name))
            assert term is not None
            if term.text:
                continue
            assert field["description"].endswith("]."), name
            quantity = parse_quantity(
                field["examples"][0], expected=term.dimension, scale=term.scale, atmosphere=1e5
            )
            assert quantity.dimension == term.dimension, name
            assert ("number" in field["type"]) == (term.dimension == dim.NONE)
            count += 1
    assert count > 90


def test_no_marks_of_the_generator_are_left() -> None:
    """The schema has standard keywords only."""
    text = json.dumps(SCHEMA)
    assert SHARED not in text
    assert UNITS not in text
    assert "discriminator" not in text


@pytest.mark.parametrize("path", DEMO, ids=lambda path: path.stem)
def test_the_demo_packages_are_valid(path: Path) -> None:
    """The demo packages are valid, as text and with their pure numbers as numbers."""
    tree = tree_of(path.read_bytes())
    assert list(VALIDATOR.iter_errors(tree)) == []


def test_the_blank_package_is_valid() -> None:
    """The package to start from is valid."""
    assert list(VALIDATOR.iter_errors(tree_of(blank_package().encode()))) == []


def test_pure_numbers_may_be_numbers() -> None:
    """A quality is a number, and a pressure is not."""
    tree = tree_of(blank_package().encode())
    results = tree["records"][0]["states"]["hot"]["nitrogen"]["results"] = {"quality": 0.5}
    assert VALIDATOR.is_valid(tree)
    results["pressure"] = 5
    assert not VALIDATOR.is_valid(tree)


def record(tree: Any) -> Any:
    """Return the record of the blank package."""
    return tree["records"][0]


REFUSED = [
    lambda tree: tree.pop("records"),
    lambda tree: tree.update(extra=1),
    lambda tree: record(tree).pop("bodies"),
    lambda tree: record(tree).update(id="Bottle 1"),
    lambda tree: record(tree)["bodies"].update(Air=record(tree)["bodies"]["nitrogen"]),
    lambda tree: record(tree)["bodies"]["nitrogen"].update(model="gas"),
    lambda tree: record(tree)["bodies"]["nitrogen"]["inputs"].update(heat="1 kJ"),
    lambda tree: record(tree)["states"]["hot"]["nitrogen"].update(T="5 K"),
    lambda tree: record(tree)["processes"][0].update(path="isochoric"),
    lambda tree: record(tree)["processes"][0].update(path={"exponent": 1.3}),
    lambda tree: record(tree)["processes"][0].update(path={"nitrogen": {"kind": "polytropic", "n": 1.3}}),
    lambda tree: record(tree)["processes"][0].update(heat_transfers=None),
    lambda tree: record(tree)["limits"][0].update(claim="ok"),
]

ACCEPTED = [
    lambda tree: record(tree)["processes"][0].update(path="constant volume"),
    lambda tree: record(tree)["processes"][0].update(path={"kind": "polytropic", "exponent": 1.3}),
    lambda tree: record(tree)["processes"][0].update(
        path=["adiabatic", {"kind": "polytropic", "exponent": "1.3"}]
    ),
    lambda tree: record(tree)["processes"][0].update(path={"nitrogen": ["adiabatic", "constant volume"]}),
    lambda tree: record(tree)["processes"][0].update(insulated=True),
    lambda tree: record(tree)["states"]["hot"].update(equilibrium=["temperature"]),
    lambda tree: record(tree)["states"]["hot"]["nitrogen"]["results"].update(phase="compressed liquid"),
    lambda tree: tree["package"].update(revision=1),
]


@pytest.mark.parametrize("change", REFUSED)
def test_refuses_what_reading_refuses(change: Any) -> None:
    """What is a problem for reading is not valid either."""
    from checker.package import read_package

    tree = tree_of(blank_package().encode())
    change(tree)
    assert not VALIDATOR.is_valid(tree)
    _, submission = read_package(json.dumps(tree).encode(), "a.json")
    assert [*submission.problems, *(p for r in submission.records for p in r.problems)]


@pytest.mark.parametrize("change", ACCEPTED)
def test_accepts_what_reading_accepts(change: Any) -> None:
    """What reads without a problem is valid."""
    from checker.package import read_package

    tree = tree_of(blank_package().encode())
    change(tree)
    assert list(VALIDATOR.iter_errors(tree)) == []
    _, submission = read_package(json.dumps(tree).encode(), "a.json")
    assert [*submission.problems, *(p for r in submission.records for p in r.problems)] == []


def test_the_path_model_follows_the_vocabulary() -> None:
    """Every parameter of the vocabulary is a field of the path, and belongs to a kind of path."""
    names = {name for name in TERMS[Level.PATH] if name not in POINT_NAMES}
    assert names == set(PathSpec.model_fields) - {"kind", "points", "results"}
    assert names | {"points"} == {name for parameters in PARAMETERS.values() for name in parameters}
    assert set(PARAMETERS) <= set(PATH_KINDS)
    assert tuple(PathPoint.model_fields) == POINT_NAMES
