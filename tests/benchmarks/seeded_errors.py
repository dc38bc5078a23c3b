"""Seeded errors: how often a review finds a slip, where it started and what it was; how often it accuses the innocent.

Records of many situations are drawn with their truth, which shares no code with the alternate calculation; an
originator slips in some of them, carries the slip on and rounds. Run it with::

    python tests/benchmarks/seeded_errors.py --slipped 3000 --correct 1500 --pairs 600 --seed 1001 --jobs 2

``--show N`` prints the first N misjudged records in full, ``--only slip:17`` one record, ``--dump FOLDER`` writes
every misjudged one. The same seed gives the same records.
"""

from __future__ import annotations

import argparse
import os
import sys
from collections.abc import Iterable, Iterator
from concurrent.futures import ProcessPoolExecutor
from itertools import chain
from pathlib import Path

from tqdm import tqdm

ROOT = Path(__file__).resolve().parents[2]
if str(ROOT) not in sys.path:
    sys.path.insert(0, str(ROOT))

from tests.benchmarks.seeded import score, show  # noqa: E402 - after the path is set
from tests.benchmarks.seeded.judge import Outcomes, judged, left_out  # noqa: E402 - after the path is set
from tests.benchmarks.seeded.trial import Trial, correct_trial, slipped_trial, where_kinds_happen  # noqa: E402 - after the path is set

LEAVE_OUT_EVERY = 3
"""Every third single slip is reviewed once more with its kind left out of the catalogue."""
Task = tuple[str, int, int]
Answer = tuple[Outcomes, bool | None]


def trial_of(task: Task) -> Trial:
    """Return the trial that a task names: correct, slip or pair, seed and number."""
    what, seed, number = task
    if what == "correct":
        return correct_trial(seed, number)
    return slipped_trial(seed, number, 2 if what == "pair" else 1)


def answer(task: Task) -> Answer:
    """Return what the review made of a task; for some slips also whether a wrong cause is stated."""
    what, _, number = task
    trial = trial_of(task)
    found = judged(trial, timed=what != "correct")
    if what != "slip" or number % LEAVE_OUT_EVERY or not trial.identifiable:
        return found, None  # where other kinds give the same digits, to name one of those is not wrong
    with left_out(trial.slips[0].kind) as known:
        return found, bool(judged(trial).likely) if known else None


def tasks_of(options: argparse.Namespace) -> list[Task]:
    """Return everything to do."""
    if options.only:
        what, _, number = options.only.partition(":")
        return [(what, options.seed, int(number))]
    counts = (("correct", options.correct), ("slip", options.slipped), ("pair", options.pairs))
    return [(what, options.seed, number) for what, count in counts for number in range(count)]


def answers(tasks: list[Task], jobs: int) -> Iterator[Answer]:
    """Yield the answers in the order of the tasks."""
    if jobs == 1:
        yield from _with_bar(map(answer, tasks), len(tasks))
        return
    if any(what != "correct" for what, _, _ in tasks):
        where_kinds_happen()  # once, before the processes part
    with ProcessPoolExecutor(jobs) as pool:
        yield from _with_bar(pool.map(answer, tasks, chunksize=8), len(tasks))


def _with_bar(found: Iterator[Answer], total: int) -> Iterator[Answer]:
    yield from tqdm(found, total=total, unit="record", disable=not sys.stderr.isatty(), file=sys.stderr)


def report(found: list[Answer]) -> Iterator[str]:
    """Yield the lines of the score."""
    outcomes = [outcome for outcome, _ in found]
    groups = [
        [o for o in outcomes if len(o.trial.slips) == count and o.trial.name.startswith(name)]
        for count, name in ((0, "correct"), (1, "slip"), (2, "pair"))
    ]
    correct, single, pairs = groups
    wrong = [stated for _, stated in found if stated is not None]
    if correct:
        yield from score.of_correct(correct)
    if single:
        yield from score.of_slipped(single, wrong)
    if pairs:
        yield from score.of_slipped(pairs)
    if single:
        yield from chain(("",), score.by_kind(single), ("",), score.by_situation(single))


def told(lines: Iterable[str]) -> None:
    """Print lines."""
    sys.stdout.write("".join(f"{line}\n" for line in lines))


def options_of(arguments: list[str] | None) -> argparse.Namespace:
    """Return the options of the command line."""
    parser = argparse.ArgumentParser(description="Seeded errors: detection, origins and causes, measured.")
    for name, count in (("slipped", 300), ("correct", 150), ("pairs", 60), ("seed", 1), ("show", 0)):
        parser.add_argument(f"--{name}", type=int, default=count)
    parser.add_argument("--jobs", type=int, default=min(2, os.cpu_count() or 1))
    parser.add_argument("--only", default="", help="one record in full: correct:N, slip:N or pair:N")
    parser.add_argument("--dump", type=Path, help="folder for the misjudged records")
    return parser.parse_args(arguments)


def main(arguments: list[str] | None = None) -> None:
    """Make the records, review them and print the score."""
    options = options_of(arguments)
    found = list(answers(tasks_of(options), 1 if options.only else options.jobs))
    if options.only:
        told(show.in_full(found[0][0]))
        return
    told((f"seed {options.seed}", *report(found)))
    bad = [outcome for outcome, _ in found if show.misjudged(outcome)]
    for outcome in bad[: options.show]:
        told(("", *show.in_full(outcome)))
    if options.dump:
        for outcome in bad:
            show.dump(options.dump, outcome)


if __name__ == "__main__":
    main()
