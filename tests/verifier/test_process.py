"""The verifier as a referee runs it: a process of its own, on files and folders."""

from __future__ import annotations

import json
import os
import subprocess
import sys
from pathlib import Path

import pytest

import certify
from tests.verifier.forging import forged, genuine

VERIFIER = Path(certify.__file__).with_name("verifier.py")


def run(*arguments: str | Path, flags: tuple[str, ...] = ("-I", "-S")) -> subprocess.CompletedProcess[str]:
    """Run the verifier with warnings as errors."""
    command = [sys.executable, *flags, "-W", "error", str(VERIFIER), *map(str, arguments)]
    return subprocess.run(command, capture_output=True, check=False, encoding="utf-8", timeout=120)


@pytest.fixture
def files(tmp_path: Path) -> Path:
    """Return a folder with a good, a false and an unknown certificate."""
    (tmp_path / "good.cert.jsonl").write_bytes(genuine("ring"))
    (tmp_path / "false.cert.jsonl").write_bytes(forged("ring", lambda v: v[0]["statement"]["groups"].pop()))
    (tmp_path / "later.cert.jsonl").write_bytes(forged("ring", lambda v: v[0].update(format=2)))
    return tmp_path


@pytest.mark.parametrize("flags", [("-I", "-S"), ("-I", "-S", "-O"), ("-I", "-S", "-OO"), ("-X", "dev")])
@pytest.mark.parametrize(
    ("names", "code"),
    [
        (["good"], 0),
        (["good", "good"], 0),
        (["false"], 1),
        (["later"], 3),
        (["good", "later"], 3),
        (["later", "false", "good"], 1),
        (["good", "gone"], 3),
    ],
)
def test_the_worst_verdict_counts(files: Path, names: list[str], code: int, flags: tuple[str, ...]) -> None:
    ended = run(*(files / f"{name}.cert.jsonl" for name in names), flags=flags)
    assert (ended.returncode, ended.stderr) == (code, "")


def test_a_folder_is_searched(files: Path) -> None:
    below = files / "below"
    below.mkdir()
    (below / "more.cert.jsonl").write_bytes(genuine("tor"))
    (below / "notes.txt").write_text("no certificate")
    ended = run(files, "--json")
    assert ended.returncode == 1
    value = json.loads(ended.stdout)
    assert value["verdict"] == "rejected"
    assert [Path(report["path"]).name for report in value["files"]] == [
        "more.cert.jsonl",
        "false.cert.jsonl",
        "good.cert.jsonl",
        "later.cert.jsonl",
    ]
    keys = {"path", "verdict", "reason", "where", "claim", "statement", "fingerprint"}
    assert all(keys <= set(report) for report in value["files"])


def test_a_folder_without_certificates_beside_a_good_file_is_undecided(files: Path) -> None:
    empty = files / "empty"
    empty.mkdir()
    assert run(files / "good.cert.jsonl", empty).returncode == 3
    assert run(empty).returncode == 3


@pytest.mark.skipif(os.geteuid() == 0, reason="root may enter every folder")
def test_a_folder_that_cannot_be_entered_is_undecided(files: Path) -> None:
    closed = files / "closed"
    closed.mkdir()
    closed.chmod(0)
    try:
        assert run(files / "good.cert.jsonl", closed).returncode == 3
    finally:
        closed.chmod(0o700)


def test_a_pipe_is_not_waited_for(tmp_path: Path) -> None:
    os.mkfifo(tmp_path / "x.cert.jsonl")
    ended = run(tmp_path)
    assert ended.returncode == 3
    assert "unreadable" in ended.stdout


@pytest.mark.parametrize(
    "arguments",
    [
        [],
        ["--no-such-option", "x"],
        ["x", "--max-bits", "0"],
        ["x", "--max-bits", "-5"],
        ["x", "--max-bytes", "99999999999999999999"],
        ["x", "--max-seconds", "soon"],
    ],
)
def test_a_wrong_command_line(arguments: list[str]) -> None:
    ended = run(*arguments)
    assert (ended.returncode, ended.stdout) == (2, "")


def test_a_path_cannot_forge_a_line(files: Path) -> None:
    forged_name = files / "x\naccepted   y.cert.jsonl"
    forged_name.write_bytes(b"nothing\n")
    ended = run(forged_name)
    assert ended.returncode == 3
    assert not any(line.startswith("accepted") for line in ended.stdout.splitlines())


def test_keys_of_a_file_cannot_disturb_the_terminal(files: Path) -> None:
    path = files / "keys.cert.jsonl"
    path.write_bytes(forged("ring", lambda v: v[1].update({"\x1b[2J\naccepted": 1})))
    ended = run(path)
    assert ended.returncode == 1
    assert "\x1b" not in ended.stdout
    assert not any(line.startswith("accepted") for line in ended.stdout.splitlines())


def test_a_crash_is_no_verdict(files: Path) -> None:
    program = (
        "import runpy, sys, zlib; zlib.decompressobj = None; import json; json.JSONEncoder.encode = None;"
        f"sys.argv = ['verifier.py', {str(files / 'good.cert.jsonl')!r}];"
        f"runpy.run_path({str(VERIFIER)!r}, run_name='__main__')"
    )
    ended = subprocess.run([sys.executable, "-c", program], capture_output=True, check=False, encoding="utf-8")
    assert ended.returncode == 70
    assert ended.stderr.startswith("internal error, no verdict: TypeError")
    assert "accepted" not in ended.stdout
