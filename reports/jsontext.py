"""JSON as the reports write it: finite numbers, UTF-8, nothing that could steer a terminal."""

from __future__ import annotations

import json
import math
from typing import BinaryIO

from reports.plain import escaped_in_json


def finite(value: float | None) -> float | None:
    """Return the number, or None for one that JSON cannot hold."""
    return value if value is not None and math.isfinite(value) else None


def write_json_text(tree: object, stream: BinaryIO) -> None:
    """Write a tree of dicts, lists, text and finite numbers, indented, with a newline at its end."""
    text = json.dumps(tree, ensure_ascii=False, allow_nan=False, indent=2)
    stream.write(escaped_in_json(text).encode() + b"\n")
