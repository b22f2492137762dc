"""What the README shows is what the program does today."""

import re
import shlex
from pathlib import Path

import pytest

from calloutlint.cli import main

README = (Path(__file__).parent.parent / "README.md").read_text(encoding="utf-8")
SHEETS = dict(re.findall(r"`([\w-]+\.txt)`[^`]*?\n```text\n(.*?)```", README, re.DOTALL))
HOUSE_SHEETS = re.findall(r"```toml\n(.*?)```", README, re.DOTALL)
RUNS = re.findall(r"```console\n\$ calloutlint ([^\n]+)\n(.*?)```", README, re.DOTALL)


def comparable(text: str) -> list[str]:
    """Lines without what a terminal does not show; another rule shipped is no change worth showing."""
    return [re.sub(r"\b\d+ rules", "… rules", line.rstrip()) for line in text.strip("\n").splitlines()]


@pytest.mark.parametrize(("arguments", "shown"), RUNS, ids=[arguments for arguments, _ in RUNS])
def test_a_shown_run_is_current(
    arguments: str,
    shown: str,
    tmp_path: Path,
    monkeypatch: pytest.MonkeyPatch,
    capsys: pytest.CaptureFixture[str],
) -> None:
    for name, text in SHEETS.items():
        (tmp_path / name).write_text(text, encoding="utf-8")
    monkeypatch.chdir(tmp_path)
    monkeypatch.setenv("COLUMNS", "100")
    main(shlex.split(arguments))
    assert comparable(capsys.readouterr().out) == comparable(shown)


def test_the_readme_shows_a_sheet_and_a_run() -> None:
    assert SHEETS
    assert RUNS


def test_the_shown_house_rule_holds(tmp_path: Path) -> None:
    (tmp_path / "house.toml").write_text(HOUSE_SHEETS[0], encoding="utf-8")
    assert main(["rulebook", "prove", str(tmp_path)]) == 0


def test_the_shown_change_of_a_rule_is_carried_out(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    (tmp_path / "house.toml").write_text(HOUSE_SHEETS[1], encoding="utf-8")
    assert main(["rulebook", "show", "FIT-06", "--house", str(tmp_path)]) == 0
    assert "minor" in capsys.readouterr().out


def test_every_command_is_in_the_table(capsys: pytest.CaptureFixture[str]) -> None:
    with pytest.raises(SystemExit):
        main(["--help"])
    offered = re.findall(r"^    ([a-z-]+)  ", capsys.readouterr().out, re.MULTILINE)
    assert len(offered) > 5
    assert [command for command in offered if f"| `calloutlint {command}" not in README] == []
