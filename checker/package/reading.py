"""From a document to a submission: every record by itself, so that a broken one does not take down the others."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import replace
from functools import partial
from pathlib import Path
from typing import Final

from checker.document import content_of, read_document
from checker.document.nodes import Document, plain_tree
from checker.package.atlas import Branch, Found, Lost, atlas_of, find
from checker.package.draft import Draft, draft, record_names
from checker.package.flatten.record import read_record
from checker.package.head import read_head, records_of
from checker.package.links import Link, check_links, links_of, target_of, written_out
from checker.package.notebook import Notebook
from checker.problems import Problem
from checker.submission import BodyState, PackageHead, Record, Statement, Submission

MAX_PROBLEMS: Final = 1000
"""Problems of a package after which the remaining records are not looked at."""


def read_package(source: Path | bytes, name: str | None = None) -> tuple[Document, Submission]:
    """Return a package as a document and as a submission.

    Parameters
    ----------
    source : Path or bytes
        The file, or its content.
    name : str, optional
        Name of the file for the reports; its path as given, or ``package.yaml`` for bytes.

    Raises
    ------
    OSError
        The file cannot be opened. What it contains never raises.

    """
    data = source if isinstance(source, bytes) else content_of(source)
    file = name or ("package.yaml" if isinstance(source, bytes) else str(source))
    document = read_document(data, file)
    return document, submit(document)


def submit(document: Document) -> Submission:
    """Return what a document submits for review; never raise for what it contains.

    Problems inside a record that can be reviewed are with the record, all others with the submission, those of
    the reading of the file included.
    """
    tree = plain_tree(document.root)
    if not isinstance(tree, dict):
        return Submission(document.file, document.sha256, PackageHead(), (), (), document.problems)
    outside, inside = _by_record(document.problems)
    head, surroundings, head_notes = read_head(document, tree, frozenset(p.place for p in outside))
    top = Notebook(document, None, (), frozenset(p.place for p in outside))
    raw = records_of(tree, top)
    drafts = _drafts(document, raw, inside, top)
    records = _Records(head, surroundings, drafts)
    read = [(item, records.read(item)) for item in drafts]
    return Submission(
        file=document.file,
        sha256=document.sha256,
        head=head,
        records=tuple(record for _, record in read if record is not None),
        unreadable=tuple(item.name for item, record in read if record is None),
        problems=(
            *outside,
            *top.closed(),
            *head_notes.closed(),
            *(problem for item, record in read if record is None for problem in item.notebook.closed()),
        ),
    )


def _by_record(problems: tuple[Problem, ...]) -> tuple[tuple[Problem, ...], dict[int, list[Problem]]]:
    """Divide the problems of the file's form: those outside the records, and those inside by record.

    Outside the records a problem never keeps the package from being reviewed.
    """
    outside: list[Problem] = []
    inside: dict[int, list[Problem]] = {}
    for problem in problems:
        place = problem.place
        if len(place) > 1 and place[0] == "records" and isinstance(place[1], int):
            inside.setdefault(place[1], []).append(problem)
        else:
            outside.append(replace(problem, fatal=False))
    return tuple(outside), inside


def _drafts(
    document: Document, raw: list[object], inside: Mapping[int, list[Problem]], top: Notebook
) -> list[Draft]:
    """Return the drafts of all records; after too many problems the remaining ones are left unread."""
    drafts: list[Draft] = []
    count = 0
    for index, name in enumerate(record_names(raw)):
        if count > MAX_PROBLEMS:
            drafts.append(Draft(name, Notebook(document, name, ("records", index)), None))
            continue
        item = draft(document, index, name, raw[index], tuple(inside.get(index, ())))
        drafts.append(item)
        count += len(item.notebook.problems)
        if count > MAX_PROBLEMS:
            message = f"More than {MAX_PROBLEMS} problems of form up to here; the records after this one were not read."
            top.say("type-wrong", ("records", index), message,
                    "Compare with the package that `jouletally blank` prints.")  # fmt: skip
    return drafts


class _Records:
    """All records of a package, so that one can refer to another."""

    def __init__(
        self, head: PackageHead, surroundings: Mapping[str, Statement | None], drafts: list[Draft]
    ) -> None:
        self.head = head
        self.surroundings = surroundings
        self.atlases: dict[str, Branch | None] = {
            item.name: None if item.part is None else atlas_of(item.part) for item in drafts
        }
        self.links: dict[Link, Link] = {
            origin: target
            for item in drafts
            if item.part is not None
            for origin, text, _ in links_of(item.name, item.part)
            if (target := target_of(item.name, text)) is not None
        }

    def read(self, item: Draft) -> Record | None:
        """Return a record as submitted, or None where it cannot be reviewed; its notebook says why."""
        part, notebook = item.part, item.notebook
        if part is None:
            return None
        record = read_record(part, notebook, self.head, self.surroundings, partial(self.find, item.name))
        check_links(part, item.name, notebook, self.atlases, self.links)
        if notebook.fatal:
            return None
        states = {key: self._linked(item.name, key, state) for key, state in record.body_states.items()}
        return replace(record, body_states=states, problems=notebook.closed())

    def find(self, record: str, pointer: str) -> Found | Lost:
        """Return what a pointer points at, in the record itself or, as ``records/ID/…``, in another."""
        if not pointer.startswith("records/"):
            return find(self.atlases[record] or {}, pointer)
        other, _, rest = pointer.removeprefix("records/").partition("/")
        atlas = self.atlases.get(other)
        if atlas is None:
            return Lost(len("records/"), other, tuple(name for name, known in self.atlases.items() if known))
        found, skipped = find(atlas, rest), len(pointer) - len(rest)
        if isinstance(found, Lost):
            return replace(found, offset=found.offset + skipped)
        return replace(found, pointer=f"records/{other}/{found.pointer}")

    def _linked(self, record: str, key: tuple[str, str], state: BodyState) -> BodyState:
        """Return a body in a state with its link written out."""
        target = self.links.get((record, *key))
        return state if target is None else replace(state, same_as=written_out(target))
