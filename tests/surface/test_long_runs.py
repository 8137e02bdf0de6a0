"""Runs that are killed, continued, and spread over processes and a cluster, as a person would start them."""

from __future__ import annotations

import os
import signal
import socket
import subprocess
import sys
import time
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path

import pytest

from tests.surface.running import Certify, command_line, environment, in_process

SHEET = """
[complexes.c]
family = "cyclic-polytope"
m = 12
d = 4
[complexes.small]
family = "polygon"
n = 5
[pairs.planes]  # nothing is dominated where d e = 2 t
cells = [{ degree = 0, in = "A" }, { degree = 1, in = "A" }, { degree = 2, in = "X", boundary = { 2 = 2 } }]
[[claims]]
id = "small"
kind = "homology"
complex = "small"
pair = "(D1, S0)"
[[claims]]
id = "long"
kind = "homology"
complex = "c"
pair = "planes"
"""


@pytest.fixture
def sheet(tmp_path: Path) -> Path:
    """A sheet with a small claim and one with hundreds of records."""
    path = tmp_path / "rig.toml"
    path.write_text(SHEET, encoding="utf-8")
    return path


def proved(sheet: Path, folder: Path, *options: str) -> dict[str, bytes]:
    """Return the certificates of an undisturbed run, by name."""
    assert in_process("prove", sheet, "--out", folder, *options).code == 0
    return {path.name: path.read_bytes() for path in folder.iterdir()}


def killed(sheet: Path, folder: Path, state: Path, *options: str) -> None:
    """Start a run, and kill it when the journal of the long claim has some solutions but not all."""
    command = command_line("prove", sheet, "--out", folder, "--state", state, *options)
    process = subprocess.Popen(command, env=environment(), stdout=subprocess.DEVNULL, start_new_session=True)
    journal = state / "long.state.jsonl"
    while process.poll() is None and not (journal.exists() and journal.stat().st_size > 20_000):
        time.sleep(0.002)
    with_workers = os.getpgid(process.pid)
    os.killpg(with_workers, signal.SIGKILL)
    process.wait()
    assert not (folder / "long.cert.jsonl").exists(), "the run was faster than its murderer"
    assert journal.stat().st_size > 20_000


@pytest.mark.slow
@pytest.mark.parametrize("options", [[], ["--jobs", "2"]], ids=["one process", "two processes"])
def test_a_run_that_was_killed_goes_on_and_ends_with_the_same_bytes(
    sheet: Path, tmp_path: Path, options: list[str]
) -> None:
    folder, state = tmp_path / "out", tmp_path / "state"
    killed(sheet, folder, state, *options)
    before = (state / "long.state.jsonl").read_bytes()
    # Killed again, it has more than before, and what it had is still there but for a torn line.
    kept = before[: before.rindex(b"\n") + 1]
    assert kept.count(b"\n") > 10
    continued = proved(sheet, folder, "--state", str(state))
    assert continued == proved(sheet, tmp_path / "undisturbed")
    assert not state.exists()


@pytest.mark.slow
def test_the_bytes_do_not_depend_on_the_number_of_processes(sheet: Path, tmp_path: Path) -> None:
    runs = [proved(sheet, tmp_path / jobs, "--jobs", jobs) for jobs in ("1", "2", "3")]
    assert runs[0] == runs[1] == runs[2]
    assert len(runs[0]) == 2


def test_the_state_of_another_sheet_is_refused_before_the_work(certify: Certify, sheet: Path, tmp_path: Path) -> None:
    state = tmp_path / "state"
    state.mkdir()
    (state / "other.state.jsonl").write_text("precious\n", encoding="utf-8")
    ended = certify("prove", sheet, "--state", state)
    fault = "expected an empty folder, or the state of an earlier run with this sheet"
    message = f"certify: the folder {state}: {fault}, found other.state.jsonl, of another sheet\n"
    assert (ended.code, ended.out, ended.err) == (3, "", message)
    assert (state / "other.state.jsonl").read_text(encoding="utf-8") == "precious\n"
    assert not (sheet.parent / "certificates").exists()


def test_a_state_that_is_damaged_in_its_first_line_is_refused_and_left(
    certify: Certify, sheet: Path, tmp_path: Path
) -> None:
    state = tmp_path / "state"
    state.mkdir()
    path = state / "small.state.jsonl"
    path.write_text("[1,2]\n", encoding="utf-8")
    ended = certify("prove", sheet, "--state", state)
    assert ended.code == 3
    assert ended.err.startswith(f"certify: claim small: {path}: expected the state of this claim, by this version")
    assert path.read_text(encoding="utf-8") == "[1,2]\n"
    assert "1 of 2 claims proved" in ended.out


def test_a_place_for_the_state_that_is_a_file_is_noticed_before_the_work(certify: Certify, sheet: Path) -> None:
    ended = certify("prove", sheet, "--state", sheet)
    assert ended.code == 3
    assert ended.err == f"certify: the folder {sheet}: expected a folder, found {sheet}, which is a file\n"


def test_the_state_is_kept_while_something_is_undecided(certify: Certify, sheet: Path, tmp_path: Path) -> None:
    """The certificate of one claim cannot be written, because a folder stands in its place."""
    folder = tmp_path / "out"
    (folder / "small.cert.jsonl").mkdir(parents=True)
    ended = certify("prove", sheet, "--out", folder, "--state", tmp_path / "state")
    assert ended.code == 3
    assert sorted(path.name for path in (tmp_path / "state").iterdir()) == ["long.state.jsonl", "small.state.jsonl"]
    (folder / "small.cert.jsonl").rmdir()
    assert certify("prove", sheet, "--out", folder, "--state", tmp_path / "state").code == 0
    assert not (tmp_path / "state").exists()


# -- a cluster ----------------------------------------------------------------------------------


def free_port() -> int:
    """Return a port that nobody listens to."""
    with socket.socket() as listener:
        listener.bind(("127.0.0.1", 0))
        return int(listener.getsockname()[1])


@contextmanager
def running(module: str, *arguments: str) -> Iterator[subprocess.Popen[bytes]]:
    """Start a program of dask.distributed, and end it."""
    command = [sys.executable, "-m", module, *arguments, "--no-dashboard"]
    process = subprocess.Popen(command, env=environment(), stdout=subprocess.DEVNULL, stderr=subprocess.DEVNULL)
    try:
        yield process
    finally:
        process.kill()
        process.wait()


@contextmanager
def scheduler() -> Iterator[tuple[str, subprocess.Popen[bytes]]]:
    """Start a scheduler, and give its address."""
    pytest.importorskip("distributed")
    port = free_port()
    address = f"tcp://127.0.0.1:{port}"
    with running("distributed.cli.dask_scheduler", "--host", "127.0.0.1", "--port", str(port)) as process:
        deadline = time.monotonic() + 60
        while time.monotonic() < deadline:
            try:
                socket.create_connection(("127.0.0.1", port), timeout=1).close()
                break
            except OSError:
                time.sleep(0.05)
        yield address, process


def worker(address: str) -> list[str]:
    """Return the command line of a worker."""
    return ["distributed.cli.dask_worker", address, "--nthreads", "1", "--no-nanny"]


@pytest.mark.slow
def test_a_cluster_that_loses_a_worker_gives_the_same_bytes(sheet: Path, tmp_path: Path) -> None:
    folder, state = tmp_path / "out", tmp_path / "state"
    with scheduler() as (address, _), running(*worker(address)) as first, running(*worker(address)):
        command = command_line("prove", sheet, "--out", folder, "--cluster", address, "--state", state)
        process = subprocess.Popen(command, env=environment(), stdout=subprocess.DEVNULL)
        journal = state / "long.state.jsonl"
        while process.poll() is None and not (journal.exists() and journal.stat().st_size > 5_000):
            time.sleep(0.002)
        assert process.poll() is None, "the run was over before a worker could be killed"
        first.kill()
        assert process.wait(timeout=120) == 0
    assert {path.name: path.read_bytes() for path in folder.iterdir()} == proved(sheet, tmp_path / "local")


@pytest.mark.slow
def test_a_cluster_that_vanishes_loses_nothing_that_is_finished(sheet: Path, tmp_path: Path) -> None:
    folder, state = tmp_path / "out", tmp_path / "state"
    with scheduler() as (address, its_process), running(*worker(address)):
        command = command_line("prove", sheet, "--out", folder, "--cluster", address, "--state", state)
        process = subprocess.Popen(
            command, env=environment(), stdout=subprocess.PIPE, stderr=subprocess.PIPE, encoding="utf-8"
        )
        journal = state / "long.state.jsonl"
        while process.poll() is None and not (journal.exists() and journal.stat().st_size > 5_000):
            time.sleep(0.002)
        assert process.poll() is None, "the run was over before the scheduler could be killed"
        its_process.kill()
        _, err = process.communicate(timeout=120)
    assert process.returncode == 3
    assert err == "certify: claim long: those who computed are gone; with --state, what is finished is kept for later\n"
    assert journal.stat().st_size > 5_000
    assert proved(sheet, folder, "--state", str(state)) == proved(sheet, tmp_path / "local")


@pytest.mark.slow
def test_a_cluster_that_is_not_there_is_refused(sheet: Path) -> None:
    pytest.importorskip("distributed")
    address = f"tcp://127.0.0.1:{free_port()}"
    ended = in_process("prove", sheet, "--cluster", address)
    fault = f"expected the address of a Dask scheduler, found nobody who answers at {address}"
    assert (ended.code, ended.out, ended.err) == (3, "", f"certify: the cluster: {fault}\n")


def test_processes_and_a_cluster_at_once_are_refused(certify: Certify, sheet: Path) -> None:
    ended = certify("prove", sheet, "--jobs", "2", "--cluster", "tcp://127.0.0.1:1")
    assert (ended.code, ended.err) == (
        2,
        "certify: Give either --jobs or --cluster. (certify prove --help says more.)\n",
    )
