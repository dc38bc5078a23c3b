"""The command line: reads arguments, calls the library, writes the reports, returns the exit status."""

from __future__ import annotations

import argparse
import sys
from collections.abc import Iterable, Sequence
from enum import IntEnum
from pathlib import Path
from typing import BinaryIO, Final, TextIO

FORMATS: Final = ("pdf", "json", "sarif")
EXAMPLES: Final = """\
examples:
  jouletally review package.yaml
  jouletally review package.yaml --json -
  jouletally review *.yaml --pdf reviews
  jouletally rules generation-negative
  jouletally blank > package.yaml

exit status: 0 accept or accept as noted; 1 hold for answers or revise and resubmit;
2 no record could be reviewed, or the call is wrong
"""


class Exit(IntEnum):
    """Exit status of the command."""

    ACCEPTED = 0
    RETURNED = 1
    NOTHING_REVIEWED = 2


def main() -> None:
    """Run the command and leave with its exit status."""
    raise SystemExit(run(sys.argv[1:], sys.stdout, sys.stderr))


def run(argv: Sequence[str], out: TextIO, err: TextIO) -> int:
    """Run the command on given arguments and streams; returns the exit status."""
    try:
        arguments = _parser().parse_args(argv)
    except SystemExit as leaving:
        return int(leaving.code or 0)
    try:
        return int(arguments.action(arguments, out, err))
    except BrokenPipeError:
        return int(Exit.ACCEPTED)
    except OSError as error:
        err.write(f"jouletally: {error.filename or ''}: {error.strerror or error}\n")
        return int(Exit.NOTHING_REVIEWED)


def _parser() -> argparse.ArgumentParser:
    parser = argparse.ArgumentParser(
        prog="jouletally",
        description="Checks closed-system calculation packages: recomputes every energy and entropy balance, says "
        "where a discrepancy started and what it spoiled, and writes the review report.",
        epilog=EXAMPLES,
        formatter_class=argparse.RawDescriptionHelpFormatter,
    )
    parser.add_argument("--version", action="version", version=f"jouletally {_version()}")
    commands = parser.add_subparsers(dest="command", required=True, metavar="COMMAND")
    review = commands.add_parser("review", help="review packages and write the report")
    review.add_argument("packages", nargs="+", metavar="PACKAGE", help="a YAML or JSON package")
    review.add_argument("--basis", metavar="FILE", help="review basis: allowances and conventions")
    for name in FORMATS:
        review.add_argument(
            f"--{name}", metavar="F", help=f"write the {name.upper()} report to F; - is standard output"
        )
    review.set_defaults(action=_review)
    rules = commands.add_parser("rules", help="list the rules, or explain one")
    rules.add_argument("name", nargs="?", metavar="NAME", help="name of a rule")
    rules.set_defaults(action=_rules)
    blank = commands.add_parser("blank", help="print an empty package to fill in")
    blank.set_defaults(action=_blank)
    schema = commands.add_parser("schema", help="print the JSON Schema of a package, or of the JSON review")
    schema.add_argument(
        "--of", choices=("package", "review"), default="package", help="which schema (package)"
    )
    schema.set_defaults(action=_schema)
    return parser


def _version() -> str:
    from checker.tool import tool_versions

    return tool_versions(property_library=False)[0][1]


def _review(arguments: argparse.Namespace, out: TextIO, err: TextIO) -> int:
    """Review every package named; a file that cannot be read does not keep the others from being reviewed."""
    wanted = {name: getattr(arguments, name) for name in FORMATS if getattr(arguments, name) is not None}
    if sum(target == "-" for target in wanted.values()) > 1:
        err.write("jouletally: only one report can go to standard output\n")
        return Exit.NOTHING_REVIEWED
    basis = _basis(arguments.basis, err)
    if basis is None:
        return Exit.NOTHING_REVIEWED
    several = len(arguments.packages) > 1
    if several and "-" in wanted.values():
        err.write("jouletally: with several packages an output option names a folder, not standard output\n")
        return Exit.NOTHING_REVIEWED
    codes = [_review_one(Path(name), wanted, several, basis, out, err) for name in arguments.packages]
    return max(codes)


def _basis(file: str | None, err: TextIO) -> object | None:
    from checker.basis import Basis

    if file is None:
        return Basis()
    from checker.basis_file import BasisError, read_basis

    try:
        return read_basis(Path(file))
    except BasisError as error:
        err.write(f"jouletally: {error}\n")
        return None


def _review_one(
    path: Path, wanted: dict[str, str], several: bool, basis: object, out: TextIO, err: TextIO
) -> int:
    from checker.api import review
    from checker.basis import Basis
    from checker.progress import record_progress

    assert isinstance(basis, Basis)
    draws = not wanted or "pdf" in wanted
    try:
        data = path.read_bytes()
    except OSError as error:
        err.write(f"jouletally: {path}: {error.strerror}\n")
        return Exit.NOTHING_REVIEWED
    with record_progress(err, path.name) as progress:
        result = review(data, name=str(path), basis=basis, diagrams=draws, progress=progress)
    if not wanted:
        _write("text", result, out)
        target = Path(f"{path.stem}-review.pdf")
        _write_file("pdf", result, target)
        out.write(f"report: {target}\n")
    for name, target_text in wanted.items():
        if target_text == "-":
            _write(name, result, out)
            continue
        target = Path(target_text) / f"{path.stem}-review.{name}" if several else Path(target_text)
        target.parent.mkdir(parents=True, exist_ok=True)
        _write_file(name, result, target)
        err.write(f"{result.verdict}: {path}: {target}\n")
    return exit_status(result)


def exit_status(result: object) -> int:
    """Return the exit status that a review calls for."""
    from checker.findings import Review, Verdict

    assert isinstance(result, Review)
    if not any(record.readable for record in result.records):
        return Exit.NOTHING_REVIEWED
    accepted = result.verdict in (Verdict.ACCEPT, Verdict.ACCEPT_AS_NOTED)
    return Exit.ACCEPTED if accepted else Exit.RETURNED


def _write(name: str, result: object, out: TextIO) -> None:
    """Write a report to a text stream (its bytes, where it has a buffer)."""
    import io

    buffer = io.BytesIO()
    _writer(name)(result, buffer)
    raw: BinaryIO | None = getattr(out, "buffer", None)
    if raw is not None:
        out.flush()
        raw.write(buffer.getvalue())
        raw.flush()
    else:
        out.write(buffer.getvalue().decode("utf-8", "replace"))


def _write_file(name: str, result: object, target: Path) -> None:
    """Write a report beside its target, then rename, so that no half-written report is left."""
    import io

    buffer = io.BytesIO()
    _writer(name)(result, buffer)
    beside = target.with_name(f".{target.name}.part")
    beside.write_bytes(buffer.getvalue())
    beside.replace(target)


def _writer(name: str):  # type: ignore[no-untyped-def]
    from reports import writer

    return writer(name)


def _rules(arguments: argparse.Namespace, out: TextIO, err: TextIO) -> int:
    from checker.rule_text import explain_rule, list_rules
    from rules import RULEBOOK

    if arguments.name is None:
        out.write(list_rules(RULEBOOK))
        return Exit.ACCEPTED
    text, known = explain_rule(RULEBOOK, arguments.name)
    (out if known else err).write(text)
    return Exit.ACCEPTED if known else Exit.NOTHING_REVIEWED


def _blank(_: argparse.Namespace, out: TextIO, __: TextIO) -> int:
    from checker.package.blank import blank_package

    out.write(blank_package())
    return Exit.ACCEPTED


def _schema(arguments: argparse.Namespace, out: TextIO, _: TextIO) -> int:
    import json

    out.write(json.dumps(_schema_of(arguments.of), indent=2, ensure_ascii=False) + "\n")
    return Exit.ACCEPTED


def _schema_of(name: str) -> object:
    if name == "review":
        from reports.review_schema import review_schema

        return review_schema()
    from checker.package.schema import package_schema

    return package_schema()


def names(items: Iterable[object]) -> str:
    """Return items as a comma-separated text."""
    return ", ".join(str(item) for item in items)
