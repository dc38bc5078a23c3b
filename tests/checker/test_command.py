"""The command: what it writes where, and its exit status."""

import io
import json
import os
import subprocess
import sys
from contextlib import nullcontext
from pathlib import Path

import pytest

from checker.command import run
from tests.checker.cases import gas_bottle, package

ROOT = Path(__file__).parents[2]


def call(*argv: str) -> tuple[int, str, str]:
    """Return exit status, standard output and standard error of a call."""
    out, err = io.StringIO(), io.StringIO()
    return run(argv, out, err), out.getvalue(), err.getvalue()


@pytest.fixture
def folder(tmp_path, monkeypatch):
    """Return an empty folder that is the current one."""
    monkeypatch.chdir(tmp_path)
    return tmp_path


@pytest.fixture
def right(folder):
    """Return a correct package file."""
    path = folder / "right.json"
    path.write_bytes(package(gas_bottle({"internal_energy_change": "31.16 kJ"})))
    return path


@pytest.fixture
def wrong(folder):
    """Return a package file with a wrong result."""
    path = folder / "wrong.json"
    path.write_bytes(package(gas_bottle({"internal_energy_change": "35.16 kJ"})))
    return path


def test_an_accepted_package_leaves_with_0(right):
    """Exit status 0, findings printed, the PDF in the current folder."""
    code, out, _ = call("review", str(right))
    assert code == 0
    assert "accept" in out
    assert Path("right-review.pdf").read_bytes().startswith(b"%PDF")


def test_a_returned_package_leaves_with_1(wrong):
    """Exit status 1 for revise and resubmit."""
    code, out, _ = call("review", str(wrong))
    assert code == 1
    assert "revise and resubmit" in out


def test_an_output_option_writes_only_what_it_names(wrong):
    """With --json F neither the terminal report nor a PDF appears."""
    code, out, _ = call("review", str(wrong), "--json", "review.json")
    assert code == 1
    assert out == ""
    assert json.loads(Path("review.json").read_text("utf-8"))["verdict"] == "revise and resubmit"
    assert not Path("wrong-review.pdf").exists()


def test_a_dash_is_standard_output(wrong):
    """--json - prints nothing but JSON."""
    _, out, _ = call("review", str(wrong), "--json", "-")
    assert json.loads(out)["findings"][0]["rule"] == "value-disagrees"


def test_with_several_packages_an_output_option_names_a_folder(right, wrong):
    """Each package gets a report of its own; the status is that of the worst."""
    code, _, _ = call("review", str(right), str(wrong), "--json", "reviews")
    assert code == 1
    assert sorted(p.name for p in Path("reviews").iterdir()) == ["right-review.json", "wrong-review.json"]


def test_an_unreadable_package_leaves_with_2(folder):
    """No record could be reviewed."""
    path = folder / "broken.yaml"
    path.write_text("package: {number: [", "utf-8")
    code, out, _ = call("review", str(path))
    assert code == 2
    assert "broken.yaml" in out


def test_a_missing_file_leaves_with_2_and_says_so(right):
    """The others are still reviewed."""
    code, out, err = call("review", "absent.yaml", str(right))
    assert code == 2
    assert "absent.yaml" in err
    assert "accept" in out


@pytest.mark.parametrize(
    "argv",
    [(), ("reviewe",), ("review",), ("rules", "generation-negativ"), ("review", "a", "b", "--json", "-")],
)
def test_a_wrong_call_leaves_with_2(folder, capsys, argv):
    """Bad arguments are the caller's to correct."""
    assert call(*argv)[0] == 2


def test_a_misspelt_rule_gets_the_nearest_name():
    """`rules generation-negativ` names generation-negative."""
    _, _, err = call("rules", "generation-negativ")
    assert "generation-negative" in err


def test_every_rule_can_be_explained():
    """`rules NAME` prints theme, grade, rationale and basis of each rule."""
    from rules import RULEBOOK

    listed = call("rules")[1]
    for rule in RULEBOOK:
        code, out, _ = call("rules", rule.name)
        assert code == 0
        assert rule.name in listed
        assert all(word in out for word in ("theme", "grade", "why", "basis"))


def test_blank_prints_a_package_that_can_be_read(folder):
    """What `blank` prints is a package without a form problem."""
    from checker.document import read_document
    from checker.package import submit

    document = read_document(call("blank")[1].encode(), "blank.yaml")
    submission = submit(document)
    assert document.problems == ()
    assert submission.problems == ()
    assert submission.unreadable == ()


@pytest.mark.parametrize("which", ["package", "review"])
def test_schema_prints_json_schema_2020_12(which):
    """The printed schema is valid JSON Schema of the named draft."""
    import jsonschema

    schema = json.loads(call("schema", "--of", which)[1])
    assert schema["$schema"] == "https://json-schema.org/draft/2020-12/schema"
    jsonschema.Draft202012Validator.check_schema(schema)


def test_a_misspelt_basis_setting_is_an_error(folder, right):
    """A basis is never half understood: file, line and the nearest word are named."""
    basis = folder / "basis.yaml"
    basis.write_text("coverage_facter: 2\n", "utf-8")
    code, _, err = call("review", str(right), "--basis", str(basis))
    assert code == 2
    assert "basis.yaml:1:" in err
    assert "coverage_factor" in err


def test_a_basis_widens_an_allowance(folder, wrong):
    """With 20 % allowed the wrong result passes, and the report says under which basis."""
    basis = folder / "basis.yaml"
    basis.write_text("allowances: {energy: 0.2}\n", "utf-8")
    code, out, _ = call("review", str(wrong), "--basis", str(basis), "--json", "-")
    assert code == 0
    assert "basis.yaml" in out


def test_reports_are_the_same_bytes_every_time(folder, wrong):
    """PDF, JSON and SARIF do not depend on the clock or on the run."""
    for turn in ("one", "two"):
        call(
            "review", str(wrong), "--pdf", f"{turn}.pdf", "--json", f"{turn}.json", "--sarif", f"{turn}.sarif"
        )
    for suffix in ("pdf", "json", "sarif"):
        assert Path(f"one.{suffix}").read_bytes() == Path(f"two.{suffix}").read_bytes()


def command(*argv: str, **settings: object) -> subprocess.CompletedProcess[bytes]:
    """Run the command as a process of its own."""
    code = "from checker.command import main; main()"
    environment = {**os.environ, "PYTHONPATH": str(ROOT), **settings.pop("env", {})}
    return subprocess.run(
        [sys.executable, "-c", code, *argv], check=False, stderr=subprocess.PIPE, env=environment, **settings
    )


@pytest.mark.parametrize("argv", [["blank"], ["rules"], ["rules", "energy-not-closed"], ["schema"]])
def test_the_locale_does_not_matter(argv):
    """Output is UTF-8 also where the terminal is said to have ASCII only."""
    done = command(*argv, env={"PYTHONIOENCODING": "ascii"}, stdout=subprocess.PIPE)
    assert (done.returncode, done.stderr) == (0, b"")
    assert not done.stdout.decode("utf-8").isascii()


def test_a_reader_who_has_seen_enough_does_not_make_it_an_acceptance(wrong):
    """With its output closed early the command writes the PDF and leaves with the status of the review."""
    ends = os.pipe()
    os.close(ends[0])
    with open(ends[1], "wb") as closed:
        done = command("review", "wrong.json", stdout=closed)
    assert (done.returncode, done.stderr) == (1, b"")
    assert Path("wrong-review.pdf").exists()


def test_closed_streams_are_no_reason_to_fail(wrong):
    """Started without standard output and error, as by some schedulers, it does its work."""
    script = f'"{sys.executable}" -c "from checker.command import main; main()" review wrong.json >&- 2>&-'
    done = subprocess.run(script, shell=True, check=False, env={**os.environ, "PYTHONPATH": str(ROOT)})
    assert done.returncode == 1


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="no device that is always full")
@pytest.mark.parametrize("argv", [["rules"], ["review", "right.json", "--json", "-"]])
def test_what_cannot_be_written_is_an_error(right, argv):
    """A full disk leaves with 2 and a line that says so."""
    with open("/dev/full", "wb") as full:
        done = command(*argv, stdout=full)
    assert done.returncode == 2
    assert done.stderr.decode().strip() == "jouletally: No space left on device"


def test_an_interrupt_ends_without_a_traceback(right, monkeypatch, capsys):
    """As shells expect it: 130."""
    import checker.api
    import checker.command

    def interrupted(*_: object, **__: object) -> None:
        raise KeyboardInterrupt

    monkeypatch.setattr(checker.api, "review", interrupted)
    monkeypatch.setattr(sys, "argv", ["jouletally", "review", str(right)])
    with pytest.raises(SystemExit) as leaving:
        checker.command.main()
    assert leaving.value.code == 130
    assert capsys.readouterr().err == "jouletally: interrupted\n"


def test_a_report_does_not_replace_what_is_read(right):
    """`--json` with the package's own name is refused, and the package is as it was."""
    before = right.read_bytes()
    code, _, err = call("review", str(right), "--json", str(right))
    assert code == 2
    assert "which is read" in err
    assert right.read_bytes() == before


def test_a_file_name_cannot_steer_the_terminal(folder, monkeypatch):
    """Escapes in the name of a file are shown as marks."""
    path = folder / "a\x1b[31m.json"
    _, _, err = call("review", str(path))
    assert "\x1b" not in err
    path.write_bytes(package(gas_bottle({"internal_energy_change": "31.16 kJ"})))
    shown: list[str] = []
    monkeypatch.setattr(
        "checker.progress.record_progress", lambda _, name: shown.append(name) or nullcontext(lambda _: None)
    )
    _, out, err = call("review", str(path))
    assert "\x1b" not in out + err
    assert shown == ["a\\u{1B}[31m.json"]


QUICK = """
import io, sys
from checker.command import run
run({argv!r}, io.StringIO(), io.StringIO())
assert "CoolProp" not in sys.modules, "the property library was loaded"
"""


@pytest.mark.parametrize("argv", [["--help"], ["rules"], ["rules", "value-disagrees"], ["schema"], ["blank"]])
def test_what_needs_no_property_does_not_pay_for_the_library(argv):
    """Help, rules, schema and blank answer without loading CoolProp."""
    subprocess.run(
        [sys.executable, "-c", QUICK.format(argv=argv)], check=True, cwd=ROOT, stdout=subprocess.DEVNULL
    )


def test_a_package_without_a_readable_record_does_not_load_the_library(folder):
    """Where nothing can be recomputed nothing is loaded for it."""
    path = folder / "broken.yaml"
    path.write_text("package: {number: X}\nrecords: [{id: a, bodies: 3}]\n", "utf-8")
    argv = ["review", str(path), "--json", str(folder / "x.json")]
    subprocess.run([sys.executable, "-c", QUICK.format(argv=argv)], check=True, cwd=ROOT)
