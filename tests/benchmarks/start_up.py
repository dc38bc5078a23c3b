"""Cost of a review against the bare import of exactly the libraries that it loads.

Fresh processes, medians of five, interleaved in one run. Run it with::

    python tests/benchmarks/start_up.py [PACKAGE]

It prints the two medians and their ratio; the README's target is at most 1.3.
"""

from __future__ import annotations

import json
import os
import statistics
import subprocess
import sys
import tempfile
import time
from pathlib import Path

ROOT = Path(__file__).resolve().parents[2]
REPEATS = 5
TARGET = 1.3

LIST_MODULES = """
import io, json, sys
from checker.command import run
before = set(sys.modules)
run(["review", {package!r}, "--json", {target!r}], io.StringIO(), io.StringIO())
own = ("checker", "rules", "reports")
names = [n for n in sys.modules if n.split(".")[0] not in sys.stdlib_module_names and n.split(".")[0] not in own]
print(json.dumps([n for n in names if n != "__main__" and sys.modules[n].__spec__ is not None]))
"""
REVIEW = """
import io
from checker.command import run
run(["review", {package!r}, "--json", {target!r}], io.StringIO(), io.StringIO())
"""
IMPORTS = """
import importlib
for name in {names!r}:
    try:
        importlib.import_module(name)
    except ImportError:
        pass
"""


ENVIRONMENT = {name: value for name, value in os.environ.items() if name != "PYTHONDONTWRITEBYTECODE"}
"""Compiled modules are kept, as they are where the tool is installed."""


def timed(code: str) -> float:
    """Return the seconds that a fresh process takes to run some code."""
    start = time.perf_counter()
    subprocess.run(
        [sys.executable, "-c", code], check=True, cwd=ROOT, stdout=subprocess.DEVNULL, env=ENVIRONMENT
    )
    return time.perf_counter() - start


def loaded_modules(package: str, target: str) -> list[str]:
    """Return the names of all third-party modules that a review loads, in the order of loading."""
    code = LIST_MODULES.format(package=package, target=target)
    done = subprocess.run([sys.executable, "-c", code], check=True, cwd=ROOT, capture_output=True, text=True)
    names: list[str] = json.loads(done.stdout)
    return names


def main() -> None:
    """Measure and print."""
    package = sys.argv[1] if len(sys.argv) > 1 else "fixtures/demo/revision-b.yaml"
    with tempfile.TemporaryDirectory() as folder:
        target = str(Path(folder) / "review.json")
        names = loaded_modules(package, target)
        review, imports = REVIEW.format(package=package, target=target), IMPORTS.format(names=names)
        timed(review), timed(imports)  # files into the cache
        pairs = [(timed(review), timed(imports)) for _ in range(REPEATS)]
    reviews, bare = (statistics.median(column) for column in zip(*pairs, strict=True))
    libraries = sorted({name.split(".")[0] for name in names})
    sys.stdout.write(
        f"libraries loaded: {', '.join(libraries)}\n"
        f"review of {package}: {reviews:.2f} s; bare import: {bare:.2f} s; "
        f"ratio {reviews / bare:.2f} (target at most {TARGET})\n"
    )


if __name__ == "__main__":
    main()
