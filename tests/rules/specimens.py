"""Rule specimens: whole packages with the exact set of findings that each must give."""

from __future__ import annotations

import json
from dataclasses import dataclass
from functools import lru_cache
from pathlib import Path
from typing import Any

import yaml

from checker import review
from checker.findings import Review

ROOT = Path(__file__).parents[2] / "fixtures" / "rules"
WITH_TOLERANCE = frozenset({"offending", "at_tolerance", "past_tolerance", "not_applicable"})
WITHOUT = frozenset({"offending", "corrected", "not_applicable"})


@dataclass(frozen=True)
class Specimen:
    """One specimen; ``document`` is what is reviewed."""

    rule: str
    kind: str
    why: str
    document: bytes
    expect: tuple[tuple[str, str | None], ...]
    not_checked: tuple[str, ...]

    @property
    def id(self) -> str:
        """Name for the test's report."""
        return f"{self.rule}-{self.kind}"

    def review(self) -> Review:
        """Return the review of the specimen."""
        return review(self.document, name="specimen.yaml")


@lru_cache(maxsize=1)
def specimens() -> tuple[Specimen, ...]:
    """Return every specimen, by rule and kind."""
    return tuple(_read(path) for path in sorted(ROOT.glob("*/*.yaml")))


def _read(path: Path) -> Specimen:
    # Only text: a specimen's numbers and words reach the review as they are written.
    tree: dict[str, Any] = yaml.load(path.read_text(encoding="utf-8"), Loader=yaml.BaseLoader)
    assert {"why", "expect"} <= tree.keys() <= {"why", "text", "package", "expect", "not_checked"}, path
    document = tree["text"] if "text" in tree else json.dumps(tree["package"], ensure_ascii=False)
    expect = tuple(
        (found["rule"], None if found["quantity"] == "null" else found["quantity"])
        for found in tree["expect"]
    )
    listed = tuple(tree.get("not_checked", ()))
    return Specimen(path.parent.name, path.stem, tree["why"], document.encode(), expect, listed)
