"""Sheets that checkers labelled by hand, apart from the project: every label met, no false alarm.

They stand in a folder `shared/examples` beside the project, with the script that judges by them; where it is
not there, the test is skipped and says so.
"""

import subprocess
import sys
from pathlib import Path

import pytest

PROGRAM = Path(sys.executable).with_name("calloutlint")


@pytest.fixture
def examples(project: Path) -> Path:
    folder = project.parent / "shared" / "examples"
    if not (folder / "judge.py").is_file():
        pytest.skip("the labelled sheets (shared/examples beside the project) are not here")
    if not PROGRAM.is_file():
        pytest.skip("the program is not installed in this environment as `calloutlint`")
    return folder


def test_every_label_is_met(examples: Path) -> None:
    """The closing line counts what was missed, what was false, and how many sheets were exactly right."""
    judge = [sys.executable, str(examples / "judge.py"), str(PROGRAM), str(examples)]
    run = subprocess.run(judge, capture_output=True, text=True, check=False)
    *_, summary = run.stdout.splitlines()
    assert "false alarms 0 " in summary, run.stdout
    assert "exact 8/8" in summary, run.stdout
    assert run.returncode == 0, run.stdout
