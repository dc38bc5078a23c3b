"""JSON Schema of a package (draft 2020-12), for editors: from the models and the vocabulary, and nothing besides."""

from __future__ import annotations

from typing import Any, Final

from checker.package.parts.base import IDENTIFIER_PATTERN
from checker.package.parts.path import PathSpec
from checker.package.parts.record import Package
from checker.package.quantity_schema import SHARED, UNITS

DRAFT: Final = "https://json-schema.org/draft/2020-12/schema"
IDENTIFIER: Final = "urn:jouletally:schema:package:1"


def package_schema() -> dict[str, Any]:
    """Return the JSON Schema of a package.

    It is closed (no key that the format does not know), gives every field a description and every quantity its
    units and an example, and takes numbers for pure numbers. Reading checks more: units, references and words
    that depend on other parts.
    """
    schema = _tidied(Package.model_json_schema())
    definitions: dict[str, Any] = schema.pop("$defs")
    shared: dict[str, Any] = {}
    body = _shared(schema, shared)
    parts = {name: _shared(part, shared) for name, part in definitions.items()}
    return {
        "$schema": DRAFT,
        "$id": IDENTIFIER,
        "title": "Calculation package",
        **{key: value for key, value in body.items() if key != "title"},
        "$defs": {**parts, **shared},
    }


def _tidied(node: Any, in_properties: bool = False) -> Any:
    """Return a schema without what the models' generator adds for its own use."""
    if isinstance(node, list):
        return [_tidied(item) for item in node]
    if not isinstance(node, dict):
        return node
    if in_properties:
        return {name: _tidied(item) for name, item in node.items()}
    tidy = {key: _tidied(value, key in ("properties", "$defs")) for key, value in node.items()}
    # A name for every field says nothing that its key does not; a missing value is no value.
    if not (tidy.get("type") == "object" and "properties" in tidy):
        tidy.pop("title", None)
    tidy.pop("default", None)
    tidy.pop("discriminator", None)
    if units := tidy.pop(UNITS, None):
        tidy["description"] = f"{tidy['description'].rstrip('.')} [{units}]."
    return _closed(_without_null(tidy))


def _without_null(node: dict[str, Any]) -> dict[str, Any]:
    """Return a schema that does not offer null beside something else, nor a choice of one."""
    options = node.pop("anyOf", None) or node.pop("oneOf", None)
    if options is None:
        return node
    left = [option for option in options if option != {"type": "null"}]
    return {**left[0], **node} if len(left) == 1 else {**node, "anyOf": left}


def _closed(node: dict[str, Any]) -> dict[str, Any]:
    """Return a schema of a mapping by identifier that takes no other keys."""
    if isinstance(inner := node.get("additionalProperties"), dict) and "$ref" in inner:
        return {**node, "propertyNames": {"pattern": IDENTIFIER_PATTERN}}
    if "patternProperties" not in node:
        return node
    closed = {**node, "additionalProperties": False}
    if any("anyOf" in value for value in node["patternProperties"].values()):
        # A path by body, and not a path with parameters.
        closed["propertyNames"] = {**node.get("propertyNames", {}), "not": {"enum": [*PathSpec.model_fields]}}
    return closed


def _shared(node: Any, shared: dict[str, Any]) -> Any:
    """Return a schema whose marked parts are moved to the definitions."""
    if isinstance(node, list):
        return [_shared(item, shared) for item in node]
    if not isinstance(node, dict):
        return node
    moved = {key: _shared(value, shared) for key, value in node.items() if key != SHARED}
    if SHARED not in node:
        return moved
    name, description = node[SHARED], moved.pop("description", None)
    shared[name] = moved
    reference = {"$ref": f"#/$defs/{name}"}
    return reference if description is None else {**reference, "description": description}
