"""A progress bar on long work; nothing where the output is no terminal."""

from __future__ import annotations

from collections.abc import Callable, Iterator
from contextlib import contextmanager
from typing import TextIO

DELAY = 1.0
"""Seconds of work before a bar appears."""


@contextmanager
def record_progress(err: TextIO, name: str) -> Iterator[Callable[[str], None]]:
    """Yield a function to call with each record's identifier before it is reviewed."""
    if not err.isatty():
        yield lambda _: None
        return
    from tqdm import tqdm

    with tqdm(desc=name, unit=" records", file=err, delay=DELAY, leave=False) as bar:

        def advance(record: str) -> None:
            bar.set_postfix_str(record, refresh=False)
            bar.update()

        yield advance
