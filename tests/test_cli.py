"""The command line: what each command gives, its exit status, and what it says of wrong input."""

import json
import os
import re
import subprocess
import sys
from pathlib import Path

import pytest

from calloutlint import __version__
from calloutlint.cli import main
from calloutlint.commands import symbols

HEAD = """\
drawing:    PW-20
revision:   A
title:      Pump well cover
standard:   ASME Y14.5-2018
units:      inch
tolerances: .XX ±.01, .XXX ±.005, angles ±1°

"""
CLEAN = (
    HEAD
    + """\
1) ⏥ | .003
   DATUM A
2) ⌀1.5000 +.0010 -.0000 THRU
   ⟂ | ⌀.002 | A
   DATUM B
3) ⌀1.750 ±.003
   ↗ | .004 | B
4) ⏥ | .002
"""
)
FAULTY = CLEAN.replace("⏥ | .002", "⏥ | .002 | A")
UNREAD = CLEAN.replace("1.750 ±.003", "1.750 ±..003")


@pytest.fixture
def folder(tmp_path: Path) -> Path:
    """A folder with a clean sheet, a faulty one, and one that cannot be read as a whole."""
    for name, text in {"clean": CLEAN, "faulty": FAULTY, "unread": UNREAD}.items():
        (tmp_path / f"{name}.txt").write_text(text, encoding="utf-8")
    return tmp_path


def run(*arguments: str | Path) -> int:
    return main([str(argument) for argument in arguments])


def told(capsys: pytest.CaptureFixture[str], *arguments: str | Path) -> str:
    """What a run that cannot be done says."""
    assert run(*arguments) == 2
    captured = capsys.readouterr()
    assert captured.out == ""
    return captured.err


def process(*arguments: str | Path, **environment: str) -> subprocess.CompletedProcess[bytes]:
    """A run in a process of its own."""
    command = [sys.executable, "-m", "calloutlint", *map(str, arguments)]
    return subprocess.run(command, capture_output=True, check=False, env={**os.environ, **environment})


class TestCheck:
    def test_a_clean_sheet_passes(self, folder: Path, capsys: pytest.CaptureFixture[str]) -> None:
        assert run("check", folder / "clean.txt") == 0
        captured = capsys.readouterr()
        assert "PW-20  revision A  Pump well cover" in captured.out
        assert "4 callouts, none with findings." in captured.out
        assert captured.err == ""

    def test_a_finding_at_the_gate_fails_the_run(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        assert run("check", folder / "faulty.txt") == 1
        assert "FRAME-01" in capsys.readouterr().out

    def test_a_finding_below_the_gate_does_not(self, folder: Path) -> None:
        assert run("check", folder / "faulty.txt", "--gate", "critical") == 0

    def test_what_could_not_be_read_fails_the_run_at_every_gate(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        assert run("check", folder / "unread.txt", "--gate", "critical") == 1
        assert "could not be read" in capsys.readouterr().out

    def test_what_it_is_no_substitute_for_is_said_once(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        run("check", folder)
        assert capsys.readouterr().out.count("no substitute") == 1

    def test_plain_output_is_ascii(self, folder: Path, capsys: pytest.CaptureFixture[str]) -> None:
        run("check", "--plain", folder / "faulty.txt")
        assert capsys.readouterr().out.isascii()

    def test_paths_may_stand_before_and_after_options(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        assert run("check", folder / "clean.txt", "--plain", folder / "faulty.txt", "--gate", "major") == 1
        assert "2 drawings" in capsys.readouterr().out

    def test_a_path_that_looks_like_an_option_stands_after_two_dashes(
        self, folder: Path, monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
    ) -> None:
        monkeypatch.chdir(folder)
        (folder / "clean.txt").rename("--clean.txt")
        assert run("check", "--plain", "--", "--clean.txt") == 0
        assert "from --clean.txt" in capsys.readouterr().out
        assert told(capsys, "check", "--clean.txt") == (
            "calloutlint: There is no option '--clean.txt'. If the file '--clean.txt' is meant, "
            "write it after --. 'calloutlint check --help' lists what is understood.\n"
        )

    def test_reports_are_written_beside_the_results(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        one, two = folder / "one.json", folder / "two words.JSON"
        assert run("check", folder / "faulty.txt", "--report", one, "--report", two) == 1
        assert one.read_bytes() == two.read_bytes()
        assert json.loads(one.read_text(encoding="utf-8"))["drawings"][0]["drawing"] == "PW-20"
        assert "PW-20" in capsys.readouterr().out

    def test_the_standard_given_holds_only_for_drawings_that_state_none(self, folder: Path) -> None:
        bare = folder / "bare.txt"
        bare.write_text(CLEAN.replace("standard:   ASME Y14.5-2018\n", ""), encoding="utf-8")
        out = folder / "r.json"
        run("check", bare, folder / "clean.txt", "--standard", "ASME Y14.5-2009", "--report", out)
        standards = [drawing["standard"] for drawing in json.loads(out.read_text(encoding="utf-8"))["drawings"]]
        assert standards == ["ASME Y14.5-2009", "ASME Y14.5-2018"]

    def test_the_datum_scheme_can_be_shown_instead(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        assert run("check", "--datums", folder / "clean.txt") == 0
        assert "PW-20" in capsys.readouterr().out


class TestRefusals:
    @pytest.mark.parametrize(
        ("arguments", "expected"),
        [
            ([], "'calloutlint' needs one of demo, check, redline, "),
            (["chekc", "x"], "'calloutlint' knows no 'chekc'. Was 'check' meant? It knows demo, check, "),
            (["check"], "'calloutlint check' needs a PATH: a callout sheet, or a folder of sheets."),
            (["check", ""], "PATH: the path is empty; a callout sheet or a folder was expected."),
            (["check", "--plain", "a.txt", " "], "PATH: the path is empty;"),
            (["check", "--plian", "x"], "There is no option '--plian'. Was '--plain' meant?"),
            (["check", "x", "--gate", "grave"], "--gate: there is no grade 'grave'. The grades are critical, "),
            (["check", "x", "--report"], "--report: expected one argument."),
            (["check", "x", "--report", "r.pdf"], "No report can be written to 'r.pdf': "),
            (["check", "x", "--report", "no/such/r.json"], "there is no folder 'no/such'"),
            (["symbols", "x"], "'x' is one argument too many."),
            (["rulebook", "shwo"], "'calloutlint rulebook' knows no 'shwo'. Was 'show' meant?"),
            (["rulebook", "show", "FRAME-99"], "There is no rule 'FRAME-99'"),
            (["rulebook", "facts", "fram"], "There is no subject 'fram'; the nearest is 'frame'."),
            (["rulebook", "prove", "no-such-folder"], "no-such-folder"),
        ],
    )  # fmt: skip
    def test_wrong_arguments_are_told_in_a_sentence(
        self, capsys: pytest.CaptureFixture[str], arguments: list[str], expected: str
    ) -> None:
        said = told(capsys, *arguments)
        assert said.startswith("calloutlint: ")
        assert expected in said
        assert said.count("\n") == 1

    def test_a_missing_sheet_is_named(self, folder: Path, capsys: pytest.CaptureFixture[str]) -> None:
        assert str(folder / "gone.txt") in told(capsys, "check", folder / "gone.txt")

    def test_a_standard_that_is_not_known_is_refused(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        assert told(capsys, "check", folder / "clean.txt", "--standard", "DIN 7182") == (
            "calloutlint: --standard: 'DIN 7182' is no standard that is known. "
            "Expected is a standard such as 'ASME Y14.5-2018' or 'ISO 1101'.\n"
        )

    def test_a_broken_rule_sheet_is_named(self, folder: Path, capsys: pytest.CaptureFixture[str]) -> None:
        house = folder / "house"
        house.mkdir()
        (house / "HOUSE-01.toml").write_text('id = "HOUSE-01"\ncolour = "red"\n', encoding="utf-8")
        said = told(capsys, "check", folder / "clean.txt", "--house", house)
        assert "HOUSE-01.toml" in said
        assert "colour" in said

    @pytest.mark.skipif(not hasattr(os, "geteuid") or os.geteuid() == 0, reason="root may write anywhere")
    def test_a_folder_that_takes_no_report_is_named(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        locked = folder / "locked"
        locked.mkdir(mode=0o555)
        assert run("check", folder / "clean.txt", "--report", locked / "r.json") == 2
        assert f"the folder '{locked}' takes no new files" in capsys.readouterr().err

    def test_characters_that_steer_a_terminal_are_not_passed_on(
        self, capsys: pytest.CaptureFixture[str]
    ) -> None:
        assert "\x1b" not in told(capsys, "check", "\x1b[2J.txt")


class TestRedline:
    def test_corrections_are_shown_and_nothing_is_written(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        assert run("redline", folder / "faulty.txt") == 1
        assert "FRAME-01" in capsys.readouterr().out
        assert (folder / "faulty.txt").read_text(encoding="utf-8") == FAULTY

    def test_proven_corrections_are_written_and_a_second_run_changes_nothing(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        assert run("redline", "--incorporate", folder / "faulty.txt") == 0
        assert "1 callout corrected in 1 sheet." in capsys.readouterr().out
        assert (folder / "faulty.txt").read_text(encoding="utf-8") == CLEAN
        assert run("redline", "--incorporate", folder / "faulty.txt") == 0
        assert "Nothing to write" in capsys.readouterr().out
        assert (folder / "faulty.txt").read_text(encoding="utf-8") == CLEAN


class TestTranscribe:
    def test_a_sheet_is_written_in_canonical_text(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        assert run("transcribe", folder / "clean.txt") == 0
        assert "⟂ | ⌀.002 | A" in capsys.readouterr().out

    def test_plain_is_ascii_and_has_the_same_findings(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        assert run("transcribe", "--plain", folder / "clean.txt", "--into", folder / "plain.txt") == 0
        assert (folder / "plain.txt").read_text(encoding="utf-8").isascii()
        assert run("check", folder / "plain.txt") == 0

    def test_several_drawings_need_a_folder(self, folder: Path, capsys: pytest.CaptureFixture[str]) -> None:
        both = (folder / "clean.txt", folder / "faulty.txt")
        assert "--into must name a folder" in told(capsys, "transcribe", *both, "--into", folder / "x.txt")
        (folder / "out").mkdir()
        assert run("transcribe", *both, "--into", folder / "out") == 0
        assert sorted(path.name for path in (folder / "out").iterdir()) == ["clean.txt", "faulty.txt"]

    def test_the_sheet_itself_is_never_overwritten(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        assert "is the sheet itself" in told(capsys, "transcribe", folder / "clean.txt", "--into", folder)


class TestRulebook:
    def test_the_list_has_a_line_for_every_rule(self, capsys: pytest.CaptureFixture[str]) -> None:
        assert run("rulebook", "list", "--plain") == 0
        assert "FRAME-01  major" in capsys.readouterr().out

    def test_a_rule_is_shown_with_its_cases(self, capsys: pytest.CaptureFixture[str]) -> None:
        assert run("rulebook", "show", "frame-01") == 0
        out = capsys.readouterr().out
        assert out.startswith("FRAME-01  ")
        assert "case 1" in out

    def test_a_rule_that_the_house_changed_is_shown_with_the_reason(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        house = folder / "house"
        house.mkdir()
        retiring = 'retires = "FRAME-01"\nwhy = "Our gates have no frames."\n'
        (house / "retired.toml").write_text(retiring, encoding="utf-8")
        assert run("rulebook", "show", "FRAME-01", "--house", house) == 0
        shown = " ".join(capsys.readouterr().out.split())
        assert "house FRAME-01 retired, because: Our gates have no frames. (from " in shown
        assert run("check", folder / "clean.txt", "--house", house) == 0
        assert " House: FRAME-01 retired, because: Our gates have no frames.\n" in capsys.readouterr().out

    def test_the_facts_are_listed_with_what_they_are(self, capsys: pytest.CaptureFixture[str]) -> None:
        assert run("rulebook", "facts") == 0
        assert "characteristic" in capsys.readouterr().out
        assert run("rulebook", "facts", "joint") == 0
        out = capsys.readouterr().out
        assert out.startswith("joint\n")
        assert "characteristic" not in out

    def test_a_house_rule_that_does_not_hold_fails_the_proof(
        self, folder: Path, capsys: pytest.CaptureFixture[str]
    ) -> None:
        house = folder / "house"
        house.mkdir()
        (house / "HOUSE-01.toml").write_text(
            'id = "HOUSE-01"\ntitle = "Flatness is not used here"\ngrade = "minor"\nexamine = "frame"\n'
            'holds = ["ASME Y14.5"]\nbasis = "common practice"\ndemand = "frame is not flatness"\n'
            'say = "Flatness."\n[[case]]\nsheet = """\n1) ⏥ | .003\n"""\nfinds = []\n',
            encoding="utf-8",
        )
        assert run("rulebook", "prove", house) == 1
        assert "HOUSE-01" in capsys.readouterr().out


def test_the_demo_has_findings_and_needs_no_argument(capsys: pytest.CaptureFixture[str]) -> None:
    assert run("demo") == 1
    out = capsys.readouterr().out
    assert "no substitute" in out
    assert "from demo/" in out


def test_a_fault_of_the_program_itself_is_told_without_a_traceback(
    monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    def fail(_options: object) -> int:
        raise KeyError("weir")

    monkeypatch.setattr(symbols, "run", fail)
    said = told(capsys, "symbols")
    assert re.fullmatch(
        r"calloutlint: This is a fault of calloutlint.* KeyError: 'weir' \(test_cli\.py, line \d+\)\.\n", said
    )


def test_every_spelling_is_listed(capsys: pytest.CaptureFixture[str]) -> None:
    assert run("symbols") == 0
    assert "TRUE POSITION" in capsys.readouterr().out
    assert run("symbols", "--plain") == 0
    assert capsys.readouterr().out.isascii()


def test_the_schema_of_the_record_is_printed(capsys: pytest.CaptureFixture[str]) -> None:
    assert run("record-schema") == 0
    assert json.loads(capsys.readouterr().out)["title"] == "calloutlint record"


def test_the_version_is_printed(capsys: pytest.CaptureFixture[str]) -> None:
    with pytest.raises(SystemExit) as caught:
        run("--version")
    assert caught.value.code == 0
    assert capsys.readouterr().out == f"calloutlint {__version__}\n"


class TestProcess:
    def test_it_runs_as_a_module(self, folder: Path) -> None:
        done = process("check", folder / "faulty.txt")
        assert (done.returncode, done.stderr) == (1, b"")
        assert "⏥" in done.stdout.decode("utf-8")

    @pytest.mark.parametrize("environment", [{"LC_ALL": "C"}, {"PYTHONIOENCODING": "ascii"}])
    def test_where_symbols_cannot_be_shown_the_output_is_plain(
        self, folder: Path, environment: dict[str, str]
    ) -> None:
        done = process("check", folder / "faulty.txt", **environment)
        assert (done.returncode, done.stderr) == (1, b"")
        assert b"| FLAT | .002 | A |" in done.stdout

    @pytest.mark.skipif(os.name != "posix", reason="descriptors are closed by a POSIX shell")
    @pytest.mark.parametrize(
        ("closed", "said"),
        [
            (">&-", b"calloutlint: Standard output is closed: the results have nowhere to go.\n"),
            (">&- 2>&-", b""),
        ],
    )
    def test_without_an_output_the_run_cannot_be_done(self, closed: str, said: bytes) -> None:
        done = subprocess.run(
            ["/bin/sh", "-c", f'"$0" -m calloutlint symbols {closed}', sys.executable],
            capture_output=True,
            check=False,
        )
        assert (done.returncode, done.stderr) == (2, said)

    def test_an_interrupt_while_modules_are_loaded_is_told_in_a_line(self, folder: Path) -> None:
        """A module that is not there yet is stood in for by one that is interrupted while it loads."""
        (folder / "rich").mkdir()
        (folder / "rich" / "__init__.py").write_text("raise KeyboardInterrupt", encoding="utf-8")
        done = process("symbols", PYTHONPATH=os.pathsep.join([str(folder), *sys.path]))
        assert (done.returncode, done.stdout, done.stderr) == (2, b"", b"calloutlint: Interrupted.\n")

    @pytest.mark.parametrize(("sheet", "status"), [("clean.txt", 0), ("faulty.txt", 1)])
    def test_a_reader_that_leaves_early_changes_no_exit_status(
        self, folder: Path, sheet: str, status: int
    ) -> None:
        command = [sys.executable, "-m", "calloutlint", "check", str(folder / sheet)]
        with subprocess.Popen(command, stdout=subprocess.PIPE, stderr=subprocess.PIPE) as started:
            assert started.stdout is not None
            assert started.stderr is not None
            started.stdout.close()
            assert started.stderr.read() == b""
            assert started.wait() == status
