"""Slips of the pen: digits transposed, dropped or doubled, a shifted decimal point."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import combinations


def transposed(text: str) -> Iterator[float]:
    """Yield a number with two of its digits exchanged."""
    places = [i for i, character in enumerate(text) if character.isdigit()]
    yield from _parsed(
        text[:i] + text[j] + text[i + 1 : j] + text[i] + text[j + 1 :]
        for i, j in combinations(places, 2)
        if text[i] != text[j]
    )


def dropped(text: str) -> Iterator[float]:
    """Yield a number with one digit left out."""
    digits = sum(ch.isdigit() for ch in text)
    if digits > 1:
        yield from _parsed(text[:i] + text[i + 1 :] for i in range(len(text)) if text[i].isdigit())


def doubled(text: str) -> Iterator[float]:
    """Yield a number with one digit written twice."""
    yield from _parsed(text[: i + 1] + text[i:] for i in range(len(text)) if text[i].isdigit())


def shifted(value: float, places: int) -> Iterator[float]:
    """Yield a number with its decimal point up to so many places beside where it belongs."""
    for count in range(1, places + 1):
        yield value * 10.0**count
        yield value / 10.0**count


def _parsed(texts: Iterator[str]) -> Iterator[float]:
    seen = set()
    for text in texts:
        try:
            value = float(text.replace("−", "-"))
        except ValueError:
            continue
        if value and value not in seen:
            seen.add(value)
            yield value
