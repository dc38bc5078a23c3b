"""Matching, what stays undetermined, and blocks, on small incidences and against brute force."""

from __future__ import annotations

from itertools import combinations, permutations

from hypothesis import given
from hypothesis import strategies as st

from checker.sheet.closing.structure import blocks, match, undetermined


def incidences() -> st.SearchStrategy[list[list[int]]]:
    """Return up to five equations in up to five unknowns."""
    return st.lists(st.lists(st.integers(0, 4), max_size=3, unique=True).map(sorted), max_size=5)


def largest_matching(incidence: list[list[int]], count: int, without: int = -1) -> int:
    """Return the size of the largest matching by trying all; ``without`` leaves one unknown out."""
    unknowns = [u for u in range(count) if u != without]
    for size in range(min(len(incidence), len(unknowns)), 0, -1):
        for chosen in combinations(range(len(incidence)), size):
            for order in permutations(unknowns, size):
                if all(u in incidence[e] for e, u in zip(chosen, order, strict=True)):
                    return size
    return 0


def test_a_square_system_is_one_block():
    """Two equations that share two unknowns are solved together."""
    (block,) = blocks([[0, 1], [0, 1]], 2)
    assert (block.equations, block.unknowns) == ((0, 1), (0, 1))


def test_a_chain_is_solved_one_by_one_from_its_known_end():
    """Each block comes after those that it rests on."""
    assert [block.unknowns for block in blocks([[0, 1], [1, 2], [2]], 3)] == [(2,), (1,), (0,)]


def test_an_unknown_without_an_equation_stays_open_with_all_that_hangs_on_it():
    """One equation for two unknowns determines neither, and a third one apart is found."""
    incidence = [[0, 1], [2]]
    assert undetermined(incidence, match(incidence, 3)) == {0, 1}
    assert [block.unknowns for block in blocks(incidence, 3)] == [(2,)]


@given(incidences())
def test_a_matching_is_as_large_as_any(incidence: list[list[int]]):
    """No assignment of equations to unknowns that they touch is larger."""
    owner = match(incidence, 5)
    taken = [e for e in owner if e is not None]
    assert len(set(taken)) == len(taken) == largest_matching(incidence, 5)
    assert all(u in incidence[e] for u, e in enumerate(owner) if e is not None)


@given(incidences())
def test_what_some_largest_matching_leaves_out_is_undetermined(incidence: list[list[int]]):
    """An unknown is determined only if every largest matching needs it."""
    best = largest_matching(incidence, 5)
    loose = {u for u in range(5) if largest_matching(incidence, 5, without=u) == best}
    assert undetermined(incidence, match(incidence, 5)) == loose


@given(incidences())
def test_blocks_are_square_and_rest_on_earlier_ones(incidence: list[list[int]]):
    """A block has as many equations as unknowns, and its equations touch nothing that is found later."""
    found: set[int] = set()
    for block in blocks(incidence, 5):
        assert len(block.equations) == len(block.unknowns)
        found.update(block.unknowns)
        assert all(set(incidence[e]) <= found for e in block.equations)
    assert found == set(range(5)) - undetermined(incidence, match(incidence, 5))
