"""A whole record: its parts in turn, its statements in the order of the document."""

from __future__ import annotations

from collections.abc import Iterator, Mapping

from checker.document.nodes import Mapping as MappingNode
from checker.document.nodes import Node
from checker.document.nodes import Sequence as SequenceNode
from checker.package.desk import Desk
from checker.package.flatten.bodies import read_body
from checker.package.flatten.claims import (
    Finder,
    read_assumptions,
    read_limits,
    read_sequences,
    read_sources,
    read_totals,
)
from checker.package.flatten.processes import read_processes
from checker.package.flatten.states import read_states
from checker.package.flatten.surroundings import atmosphere_of, read_surroundings
from checker.package.notebook import Notebook
from checker.package.parts.record import Record as RecordPart
from checker.problems import Place
from checker.submission import PackageHead, Record, Statement


def read_record(
    part: RecordPart,
    notebook: Notebook,
    head: PackageHead,
    package_surroundings: Mapping[str, Statement | None],
    find: Finder,
) -> Record:
    """Return a record as submitted; what is wrong with it goes to the notebook."""
    own = read_surroundings(notebook, part.surroundings, ("surroundings",))
    surroundings = {**package_surroundings, **own}
    convention = part.conventions.work or head.work_convention
    desk = Desk(notebook, atmosphere_of(surroundings), -1 if convention == "positive in" else 1)
    notebook.statements.extend(statement for statement in surroundings.values() if statement is not None)
    read_totals(desk, part)
    return Record(
        id=part.id,
        title=part.title,
        place=notebook.root,
        bodies={name: read_body(desk, name, body) for name, body in part.bodies.items()},
        states=tuple(part.states),
        body_states=read_states(desk, part),
        processes=read_processes(desk, part),
        sequences=read_sequences(desk, part),
        assumptions=read_assumptions(desk, part),
        limits=read_limits(desk, part, find),
        sources=read_sources(desk, part, find),
        statements=_in_document_order(notebook),  # after all that adds to them
        problems=(),
        work_convention=convention,
        purpose=part.purpose,
        state_equilibrium={name: s.equilibrium for name, s in part.states.items() if s.equilibrium},
    )


def _in_document_order(notebook: Notebook) -> tuple[Statement, ...]:
    """Return the statements in the order of the document; those of the package come first."""
    root = notebook.document.node(notebook.root)
    order = {place: n for n, place in enumerate(_places(root, notebook.root))}
    return tuple(sorted(notebook.statements, key=lambda statement: order.get(statement.place, -1)))


def _places(node: Node | None, place: Place) -> Iterator[Place]:
    """Yield the places of all values, in document order."""
    yield place
    if isinstance(node, MappingNode):
        for entry in node.entries:
            yield from _places(entry.value, (*place, entry.key))
    elif isinstance(node, SequenceNode):
        for index, item in enumerate(node.items):
            yield from _places(item, (*place, index))
