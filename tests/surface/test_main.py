"""What holds for every verb: help, exit codes, output, progress."""

from __future__ import annotations

import io
import os
import subprocess
import time
from concurrent.futures.process import BrokenProcessPool
from pathlib import Path
from typing import Any

import pytest

from certify.commands import terminal
from certify.commands.main import cli
from certify.errors import InternalError, LimitReached
from tests.surface.running import Certify, command_line, environment, in_process

COMPUTE = ("compute", "--facets", "1 2; 2 3; 3 1", "--pair", "(D1, S0)")


# -- help ---------------------------------------------------------------------------------------


def test_help_lists_the_verbs_in_the_order_of_the_work(certify: Certify) -> None:
    ended = certify("--help")
    assert (ended.code, ended.err) == (0, "")
    assert ended == certify("-h")
    lines = ended.out.splitlines()
    start = lines.index("Commands:") + 1
    verbs = ["prove", "verify", "compute", "multiplicities", "picture", "demo"]
    assert [line.split()[0] for line in lines[start : start + len(verbs)]] == verbs
    # No summary is cut short.
    assert "..." not in "".join(lines[start : start + len(verbs)])


@pytest.mark.parametrize("verb", sorted(cli.commands))
def test_each_verb_has_a_help_of_its_own(certify: Certify, verb: str) -> None:
    ended = certify(verb, "--help")
    assert (ended.code, ended.err) == (0, "")
    assert ended.out.startswith(f"Usage: certify {verb} [OPTIONS]")
    assert ended == certify(verb, "-h")


def test_without_a_verb_the_help_is_shown_as_a_fault(certify: Certify) -> None:
    ended = certify()
    assert (ended.code, ended.out) == (2, "")
    assert ended.err == certify("--help").out


def test_the_version_is_told(certify: Certify) -> None:
    import certify as package

    assert certify("--version").out == f"certify {package.__version__}\n"


@pytest.mark.parametrize(
    ("arguments", "message"),
    [
        (["xyzzy"], "No such command 'xyzzy'. (certify --help says more.)"),
        (["--xyzzy"], "No such option '--xyzzy'. (certify --help says more.)"),
        (["prove"], "Missing argument 'SHEET'. (certify prove --help says more.)"),
        (["demo", "x"], "Got unexpected extra argument (x) (certify demo --help says more.)"),
    ],
)
def test_a_wrong_command_line_ends_with_2_and_a_sentence(certify: Certify, arguments: list[str], message: str) -> None:
    ended = certify(*arguments)
    assert (ended.code, ended.out) == (2, "")
    assert ended.err.splitlines() == [f"certify: {message}"]


def test_the_program_is_the_module(tmp_path: Path) -> None:
    ended = in_process(*COMPUTE, folder=tmp_path)
    assert (ended.code, ended.err) == (0, "")
    assert ended.out.startswith("H_0((D¹,S⁰)^K; ℤ) ≅ ℤ\n")


def test_mathematics_is_printed_where_the_language_of_the_system_is_ascii(tmp_path: Path) -> None:
    ended = in_process(*COMPUTE, folder=tmp_path, PYTHONIOENCODING="ascii")
    assert ended == in_process(*COMPUTE, folder=tmp_path)
    assert ended.code == 0


# -- errors -------------------------------------------------------------------------------------


def raising(error: BaseException) -> Any:
    def function(*_: Any, **__: Any) -> None:
        raise error

    return function


@pytest.mark.parametrize(
    "error", [ZeroDivisionError("division by zero"), InternalError("1 is 2"), AssertionError("no")]
)
def test_an_internal_error_is_no_verdict_and_asks_for_a_report(
    certify: Certify, rig: Path, monkeypatch: pytest.MonkeyPatch, error: Exception
) -> None:
    monkeypatch.setattr("certify.sheet.read_sheet", raising(error))
    ended = certify("prove", rig)
    assert (ended.code, ended.out) == (70, "")
    start = f"certify: internal error, no verdict ({type(error).__name__} in test_main.py, line "
    assert ended.err.startswith(start)
    assert ended.err.endswith(f": {error}); please report it, with what you gave to certify\n")
    assert len(ended.err.splitlines()) == 1


@pytest.mark.parametrize(
    ("error", "sentence"),
    [
        (LimitReached("more than 7 cells"), "more than 7 cells"),
        (MemoryError(), "the memory of this machine does not suffice"),
        (BrokenProcessPool(), "a process that computed was ended from outside, perhaps because memory ran out"),
    ],
)
def test_a_limit_ends_with_3(
    certify: Certify, rig: Path, monkeypatch: pytest.MonkeyPatch, error: Exception, sentence: str
) -> None:
    monkeypatch.setattr("certify.claims.prove", raising(error))
    ended = certify(*COMPUTE)
    assert (ended.code, ended.out, ended.err) == (3, "", f"certify: {sentence}\n")
    ended = certify("prove", rig)
    assert (ended.code, ended.out) == (3, "A rig\n\n0 of 2 claims proved, 2 undecided\n")
    assert ended.err == f"certify: claim ring: {sentence}\ncertify: claim stage: {sentence}\n"


def test_an_interrupt_ends_with_130(certify: Certify, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr("certify.claims.prove", raising(KeyboardInterrupt()))
    ended = certify(*COMPUTE)
    assert (ended.code, ended.out, ended.err) == (130, "", "certify: interrupted\n")


def test_a_message_cannot_disturb_the_terminal(certify: Certify, tmp_path: Path) -> None:
    ended = certify("prove", tmp_path / "a\x1b[2Jb\nc.toml")
    assert ended.code == 3
    assert f"certify: {tmp_path}/a\\x1b[2Jb\\nc.toml: expected a claim sheet" in ended.err


# -- output -------------------------------------------------------------------------------------


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="needs a device that is always full")
@pytest.mark.parametrize("arguments", [COMPUTE, ("--help",)])
def test_output_that_cannot_be_written_ends_with_3(arguments: tuple[str, ...]) -> None:
    with open("/dev/full", "wb") as full:
        done = subprocess.run(
            command_line(*arguments),
            env=environment(),
            stdout=full,
            stderr=subprocess.PIPE,
            encoding="utf-8",
            check=False,
        )
    assert done.returncode == 3
    assert done.stderr == "certify: the system refuses to go on: No space left on device\n"


def test_a_reader_who_goes_away_ends_the_work_with_3() -> None:
    reader, writer = os.pipe()
    os.close(reader)
    with open(writer, "wb") as pipe:
        done = subprocess.run(
            command_line(*COMPUTE),
            env=environment(),
            stdout=pipe,
            stderr=subprocess.PIPE,
            encoding="utf-8",
            check=False,
        )
    assert done.returncode == 3
    assert done.stderr == "certify: the system refuses to go on: Broken pipe\n"


class Screen(io.StringIO):
    """A terminal that remembers everything."""

    def isatty(self) -> bool:
        return True


def test_a_row_is_broken_at_the_edge_of_a_terminal(monkeypatch: pytest.MonkeyPatch) -> None:
    screen = Screen()
    monkeypatch.setattr("sys.stdout", screen)
    monkeypatch.setenv("COLUMNS", "60")
    terminal.say_row("name", ["one two three four five " * 4, "x" * 80], ["name", "longer"])
    rows = screen.getvalue().replace("\x1b[1m", "").replace("\x1b[0m", "").splitlines()
    assert rows == [
        "name    one two three four five one two three four five one",
        "          two three four five one two three four five",
        "        " + "x" * 80,
        "",
    ]


def test_a_row_in_a_file_is_whole_and_a_long_name_has_a_line_of_its_own(capsys: pytest.CaptureFixture[str]) -> None:
    name = "a-very-long-name-for-a-claim"
    terminal.say_row(name, ["word " * 99 + "end"], [name, "b"])
    terminal.say_row("b", ["c"], [name, "b"])
    line = " " * 26 + "word " * 99 + "end"
    assert capsys.readouterr().out.splitlines() == [name, line, "", "b" + " " * 25 + "c", ""]


# -- progress -----------------------------------------------------------------------------------


def test_nobody_looks_so_nothing_is_shown(certify: Certify, rig: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(terminal, "_PATIENCE", 0.0)
    assert certify("prove", rig).err == ""
    with terminal.progress("work") as report:
        assert report is None


def watch(monkeypatch: pytest.MonkeyPatch, patience: float = 0.0) -> Screen:
    """Make standard error a terminal, on which progress is shown after so many seconds."""
    monkeypatch.setattr("sys.stderr", screen := Screen())
    monkeypatch.setenv("TERM", "xterm")
    monkeypatch.setenv("COLUMNS", "80")
    monkeypatch.setattr(terminal, "_PATIENCE", patience)
    monkeypatch.setattr(terminal, "_REFRESH", 0.0)
    return screen


def wait_for(screen: Screen, text: str) -> None:
    """Wait until a terminal shows a text; a test that waits in vain fails, and does not measure anything."""
    for _ in range(2000):
        if text in screen.getvalue():
            return
        time.sleep(0.01)
    pytest.fail(f"{text!r} was never shown")


def test_progress_is_shown_on_a_terminal_and_taken_away(monkeypatch: pytest.MonkeyPatch) -> None:
    screen = watch(monkeypatch)
    with terminal.progress("[b]ring") as report:
        assert report is not None
        wait_for(screen, "[b]ring")
        report(3, 4)
        wait_for(screen, "75 %")
    # At last the line is erased and the cursor is there again.
    assert screen.getvalue().rindex("\x1b[2K") > screen.getvalue().rindex("[b]ring")
    assert screen.getvalue().rindex("\x1b[?25h") > screen.getvalue().rindex("\x1b[?25l")


def test_work_in_one_step_shows_movement_and_no_share(monkeypatch: pytest.MonkeyPatch) -> None:
    screen = watch(monkeypatch)
    with terminal.progress("ring") as report:
        wait_for(screen, "ring")
        assert report is not None
        report(1, 1)
    assert "%" not in screen.getvalue()


def test_work_that_is_done_at_once_shows_nothing(monkeypatch: pytest.MonkeyPatch) -> None:
    screen = watch(monkeypatch, patience=3600.0)
    with terminal.progress("ring") as report:
        assert report is not None
        report(1, 2)
    assert screen.getvalue() == ""


def test_an_error_takes_the_line_away(monkeypatch: pytest.MonkeyPatch) -> None:
    screen = watch(monkeypatch)

    def interrupted() -> None:
        with terminal.progress("ring"):
            wait_for(screen, "ring")
            raise KeyboardInterrupt

    with pytest.raises(KeyboardInterrupt):
        interrupted()
    assert screen.getvalue().rindex("\x1b[2K") > screen.getvalue().rindex("ring")
