"""The command line: reads arguments, calls the library, writes the reports, returns the exit status."""

from __future__ import annotations

import argparse
import os
import sys
from collections.abc import Sequence
from contextlib import suppress
from enum import IntEnum
from io import BytesIO, TextIOWrapper
from pathlib import Path
from typing import TYPE_CHECKING, BinaryIO, Final, TextIO

if TYPE_CHECKING:
    from checker.basis import Basis
    from checker.findings import Review
    from checker.outputs import Targets

FORMATS: Final = ("pdf", "json", "sarif")
CORRECTED: Final = "corrected"
OUTPUTS: Final = (*FORMATS, CORRECTED)
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
INTERRUPTED: Final = 130
"""Exit status after an interrupt from the keyboard, as shells count it."""


class Exit(IntEnum):
    """Exit status of the command."""

    ACCEPTED = 0
    RETURNED = 1
    NOTHING_REVIEWED = 2


def main() -> None:
    """Run the command and leave with its exit status."""
    out, err = _stream(sys.stdout), _stream(sys.stderr)
    try:
        status = run(sys.argv[1:], out, err)
    except KeyboardInterrupt:
        err.write("jouletally: interrupted\n")
        status = INTERRUPTED
    raise SystemExit(_flushed(out, err, status))


def _stream(stream: TextIO | None) -> TextIO:
    """Return a stream that takes every character, whatever the locale, also where the caller closed it."""
    if stream is None:
        return Path(os.devnull).open("w", encoding="utf-8")
    if isinstance(stream, TextIOWrapper):
        stream.reconfigure(encoding="utf-8", errors="backslashreplace")
    return stream


def _flushed(out: TextIO, err: TextIO, status: int) -> int:
    """Return the exit status once everything is written; what cannot be written must not fail again at the end."""
    try:
        out.flush()
        return status
    except OSError as error:
        os.dup2(os.open(os.devnull, os.O_WRONLY), out.fileno())
        if isinstance(error, BrokenPipeError):  # the reader has seen enough
            return status
        _complain(err, error.strerror)
        return Exit.NOTHING_REVIEWED


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
        _complain(err, ": ".join(filter(None, (error.filename, error.strerror or str(error)))))
        return int(Exit.NOTHING_REVIEWED)


def _complain(err: TextIO, text: object) -> None:
    """Write what went wrong on one line; names of files are in it, which may hold anything."""
    from reports.plain import neutral

    err.write(f"jouletally: {neutral(str(text))}\n")


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
            f"--{name}",
            metavar="F",
            help=f"write the {name.upper()} report to F, a file or a folder; - is standard output",
        )
    review.set_defaults(action=_review)
    review.add_argument(
        "--corrected",
        metavar="F",
        help="write the package with its wrong results corrected to F; never over the package itself",
    )
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
    from checker.outputs import OutputError, targets

    wanted = {name: getattr(arguments, name) for name in OUTPUTS if getattr(arguments, name) is not None}
    packages = [Path(name) for name in arguments.packages]
    try:
        reports = targets(packages, wanted, [Path(arguments.basis)] if arguments.basis else ())
    except OutputError as error:
        _complain(err, error)
        return Exit.NOTHING_REVIEWED
    basis = _basis(arguments.basis, err)
    if basis is None:
        return Exit.NOTHING_REVIEWED
    codes: list[int] = []
    for package, files in zip(packages, reports, strict=True):
        data = _content(package, err)
        if data is None:
            codes.append(Exit.NOTHING_REVIEWED)
            continue
        result = _reviewed(data, package, basis, "pdf" in files, err)
        codes.append(exit_status(result))
        _write_reports(result, data, files, not wanted, out, err)
    return max(codes)


def _content(path: Path, err: TextIO) -> bytes | None:
    """Return what a file holds, or None where it cannot be read."""
    from checker.document import content_of

    try:
        return content_of(path)
    except OSError as error:
        _complain(err, f"{path}: {error.strerror}")
        return None


def _basis(file: str | None, err: TextIO) -> Basis | None:
    from checker.basis import Basis

    if file is None:
        return Basis()
    from checker.basis_file import BasisError, read_basis

    try:
        return read_basis(Path(file))
    except BasisError as error:
        _complain(err, error)
        return None


def _reviewed(data: bytes, path: Path, basis: Basis, diagrams: bool, err: TextIO) -> Review:
    """Return the review of one package."""
    from checker.api import review
    from checker.progress import record_progress
    from reports.plain import neutral

    with record_progress(err, neutral(path.name)) as progress:
        return review(data, name=str(path), basis=basis, diagrams=diagrams, progress=progress)


def _write_reports(
    result: Review, data: bytes, files: Targets, prints: bool, out: TextIO, err: TextIO
) -> None:
    """Write the reports of one package, the findings printed first where that is asked for."""
    from checker.outputs import write_bytes
    from reports.plain import neutral

    if prints:
        _put(_report("text", result, data), out)
    for name, target in files.items():
        if target is None:
            _put(_report(name, result, data), out)
            continue
        write_bytes(target, _report(name, result, data))
        with suppress(BrokenPipeError):
            if prints:
                out.write(f"report: {neutral(str(target))}\n")
            else:
                err.write(neutral(f"{result.verdict}: {result.package.file}: {target}") + "\n")


def exit_status(result: Review) -> int:
    """Return the exit status that a review calls for."""
    from checker.findings import Verdict

    if not any(record.readable for record in result.records):
        return Exit.NOTHING_REVIEWED
    accepted = result.verdict in (Verdict.ACCEPT, Verdict.ACCEPT_AS_NOTED)
    return Exit.ACCEPTED if accepted else Exit.RETURNED


def _put(data: bytes, out: TextIO) -> None:
    """Write a report to a text stream (its bytes, where it has a buffer).

    Who reads it may have seen enough before its end: the other reports are written all the same.
    """
    raw: BinaryIO | None = getattr(out, "buffer", None)
    with suppress(BrokenPipeError):
        if raw is None:
            out.write(data.decode("utf-8", "replace"))
        else:
            out.flush()
            raw.write(data)
            raw.flush()


def _report(name: str, result: Review, data: bytes) -> bytes:
    """Return a report in one format, or the corrected package."""
    if name == CORRECTED:
        from checker.correction import corrected_file

        return corrected_file(data, (c for record in result.records for c in record.corrections))
    from reports import writer

    buffer = BytesIO()
    writer(name)(result, buffer)
    return buffer.getvalue()


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
