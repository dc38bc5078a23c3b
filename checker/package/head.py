"""The header of a package and the shape of the whole file."""

from __future__ import annotations

from dataclasses import replace
from typing import Any, Final

from checker.document.nodes import Document
from checker.package.flatten.surroundings import read_surroundings
from checker.package.form import fitted
from checker.package.nearest import nearest, perhaps, shortened
from checker.package.notebook import Notebook
from checker.package.parts.head import Head
from checker.problems import Place
from checker.submission import PackageHead, Statement

_KEYS = ("package", "records")
MAX_RECORDS: Final = 1000
"""Most records of one package; a package has five to fifty, and its review a section for each."""


def read_head(
    document: Document, tree: dict[str, Any], damaged: frozenset[Place]
) -> tuple[PackageHead, dict[str, Statement | None], Notebook]:
    """Return the header, the surroundings that it states, and what is wrong with them.

    A header that cannot be understood does not keep the records from being reviewed.
    """
    notebook = Notebook(document, None, ("package",), damaged)
    if tree.get("package") is None:
        if ("package",) not in damaged:
            notebook.root = ()
            notebook.say("part-missing", (), "The header `package` is missing.",
                         "Give at least number, revision, conventions and surroundings.")  # fmt: skip
        return PackageHead(), {}, notebook
    part = fitted(Head, tree["package"], notebook, lambda place: place or None)
    if part is None:
        notebook.problems[:] = [replace(problem, fatal=False) for problem in notebook.problems]
        return PackageHead(), {}, notebook
    surroundings = read_surroundings(notebook, part.surroundings, ("surroundings",))
    texts = {key: getattr(part, key) for key in PackageHead.__dataclass_fields__ if key != "work_convention"}
    return PackageHead(**texts, work_convention=part.conventions.work), surroundings, notebook


def records_of(tree: dict[str, Any], notebook: Notebook) -> list[Any]:
    """Return the records; note unknown keys beside them, and their absence."""
    for key in tree:
        if key not in _KEYS:
            notebook.say("name-unknown", (key,), f"`{shortened(key, 40)}` is not a key of a package: package, records.",
                         perhaps(nearest(key, _KEYS)) or "It was not read.", at_key=True)  # fmt: skip
    records = tree.get("records")
    if not records:
        notebook.say(
            "part-missing", (), "The package has no `records`.", "List at least one record.", fatal=True
        )
        return []
    if not isinstance(records, list):
        notebook.say("type-wrong", ("records",), "`records` should be a list of records.",
                     "Start each record with `- id: …`.", fatal=True)  # fmt: skip
        return []
    if len(records) > MAX_RECORDS:
        message = (
            f"The package has {len(records)} records; those after the first {MAX_RECORDS} were not read."
        )
        notebook.say("type-wrong", ("records", MAX_RECORDS), message, "Divide the package.", fatal=True)
    return records[:MAX_RECORDS]
