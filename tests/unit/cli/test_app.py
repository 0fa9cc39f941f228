"""What ends the program, and what it says then: never a traceback."""

import sys
from types import SimpleNamespace

import pytest

from provenzero.cli.app import main

COMMANDS = "provenzero.cli.commands"


def ended(monkeypatch: pytest.MonkeyPatch, reason: BaseException) -> object:
    """The exit code where a command ends for that reason."""

    def app() -> None:
        raise reason

    monkeypatch.setitem(sys.modules, COMMANDS, SimpleNamespace(app=app))
    with pytest.raises(SystemExit) as left:
        main()
    return left.value.code


@pytest.mark.parametrize("code", [0, 1, 2])
def test_the_exit_code_of_a_command_is_passed_on_without_a_word(
    code: int, monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    assert ended(monkeypatch, SystemExit(code)) == code
    assert capsys.readouterr() == ("", "")


@pytest.mark.parametrize("reason", [KeyboardInterrupt(), SystemExit(130)], ids=["while it loads", "while it works"])
def test_a_stop_by_the_user_is_one_line(
    reason: BaseException, monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    assert ended(monkeypatch, reason) == 130
    assert capsys.readouterr() == ("", "stopped; no file was left half-written\n")


def test_a_fault_of_ours_names_itself_and_asks_for_a_report(
    monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    assert ended(monkeypatch, ZeroDivisionError("by zero")) == 70
    said = capsys.readouterr()
    assert said.out == ""
    first, second = said.err.splitlines()
    assert first == "a fault of this program, not of your files: ZeroDivisionError: by zero"
    assert "please report it" in second
