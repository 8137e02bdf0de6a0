"""`certify verify`: what it passes on to the verifier, and what it passes back."""

from __future__ import annotations

import gzip
import hashlib
import json
import os
import re
import signal
import subprocess
from collections.abc import Iterator
from contextlib import suppress
from pathlib import Path

import pytest

from tests.helpers import examined
from tests.surface.running import Certify, command_line, environment


@pytest.fixture
def folder(certify: Certify, rig: Path) -> Path:
    """Return a folder with two good certificates."""
    assert certify("prove", rig).code == 0
    return rig.parent / "certificates"


def test_a_folder_of_good_certificates_is_accepted_with_its_statements(certify: Certify, folder: Path) -> None:
    ended = certify("verify", folder)
    assert (ended.code, ended.err) == (0, "")
    ring = examined(folder / "ring.cert.jsonl")
    assert f"accepted   {folder / 'ring.cert.jsonl'}\n" in ended.out
    assert "H_0((D¹,S⁰)^K; ℤ) ≅ ℤ, H_1 ≅ ℤ³⁴, H_2 ≅ ℤ, H_k = 0 for all other k" in ended.out
    assert f"fingerprint {ring['fingerprint']}\n" in ended.out
    assert ended.out.endswith("2 accepted, 0 rejected, 0 undecided\n")


def test_json_is_that_of_the_verifier(certify: Certify, folder: Path) -> None:
    ended = certify("verify", "--json", folder / "ring.cert.jsonl", folder / "stage.cert.jsonl")
    assert (ended.code, ended.err) == (0, "")
    paths = [folder / "ring.cert.jsonl", folder / "stage.cert.jsonl"]
    assert ended.json == {"verdict": "accepted", "files": [examined(path) for path in paths]}


def test_a_tampered_file_is_rejected_and_the_other_one_is_not(certify: Certify, folder: Path) -> None:
    path = folder / "ring.cert.jsonl"
    data = path.read_bytes()
    assert b"[1,34,[]]" in data
    path.write_bytes(data.replace(b"[1,34,[]]", b"[1,35,[]]"))
    ended = certify("verify", folder)
    assert ended.code == 1
    assert f"rejected   {path}\n" in ended.out
    assert f"accepted   {folder / 'stage.cert.jsonl'}\n" in ended.out
    assert "ℤ³⁵" not in ended.out.split("accepted")[1]


@pytest.mark.parametrize(
    ("name", "data"),
    [("notes.txt", b"no certificate\n"), ("notes.cert.jsonl", b"no certificate\n"), ("notes.cert.jsonl", b"")],
)
def test_a_file_that_is_no_certificate_is_undecided(certify: Certify, tmp_path: Path, name: str, data: bytes) -> None:
    (tmp_path / name).write_bytes(data)
    ended = certify("verify", tmp_path / name)
    assert ended.code == 3
    assert ended.out.startswith(f"undecided  {tmp_path / name}\n")


def test_a_path_that_is_not_there_is_undecided(certify: Certify, tmp_path: Path) -> None:
    ended = certify("verify", tmp_path / "gone.cert.jsonl")
    assert ended.code == 3
    assert ended.out.endswith("0 accepted, 0 rejected, 1 undecided\n")


def test_a_folder_without_certificates_is_not_accepted(certify: Certify, tmp_path: Path) -> None:
    ended = certify("verify", tmp_path)
    assert ended.code == 3
    assert ended.out.endswith("0 accepted, 0 rejected, 1 undecided\n")


def test_nothing_to_check_is_a_wrong_command_line(certify: Certify) -> None:
    ended = certify("verify")
    message = "certify: Missing argument 'PATH...'. (certify verify --help says more.)\n"
    assert (ended.code, ended.out, ended.err) == (2, "", message)


def test_a_rejected_file_counts_more_than_an_undecided_one(certify: Certify, folder: Path) -> None:
    path = folder / "ring.cert.jsonl"
    path.write_bytes(path.read_bytes().replace(b"[1,34,[]]", b"[1,35,[]]"))
    assert certify("verify", folder, folder / "gone.cert.jsonl").code == 1


@pytest.mark.parametrize(("option", "value"), [("--max-bytes", "100"), ("--max-cells", "10")])
def test_limits_reach_the_verifier(certify: Certify, folder: Path, option: str, value: str) -> None:
    ended = certify("verify", option, value, folder / "ring.cert.jsonl")
    assert ended.code == 3
    assert f"raise {option}" in ended.out


def test_the_limit_on_integers_reaches_the_verifier(certify: Certify, folder: Path) -> None:
    path = folder / "ring.cert.jsonl"
    *lines, end = path.read_bytes().splitlines(keepends=True)
    before = b"".join(lines)
    after = before.replace(b'"cycles":[[0,1]]', f'"cycles":[[0,"{2**60}"]]'.encode())
    old, new = (hashlib.sha256(text).hexdigest().encode() for text in (before, after))
    path.write_bytes(after + end.replace(old, new))
    ended = certify("verify", "--max-bits", "10", path)
    assert ended.code == 3
    assert "raise --max-bits" in ended.out
    # With room for it, the integer is read, and the vector is found to be in no basis.
    assert certify("verify", "--max-bits", "100", path).code == 1


@pytest.mark.parametrize("option", ["--max-bytes", "--max-cells", "--max-bits"])
def test_limits_that_are_none_are_refused(certify: Certify, folder: Path, option: str) -> None:
    ended = certify("verify", option, "0", folder)
    assert (ended.code, ended.out) == (2, "")
    assert option in ended.err


def test_a_path_may_look_like_an_option(certify: Certify, folder: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    (folder / "ring.cert.jsonl").rename(folder / "--json.cert.jsonl")
    monkeypatch.chdir(folder)
    ended = certify("verify", "--", "--json.cert.jsonl")
    assert ended.code == 0
    assert ended.out.startswith("accepted   --json.cert.jsonl\n")


# -- the process --------------------------------------------------------------------------------


def stand_in(monkeypatch: pytest.MonkeyPatch, folder: Path, text: str) -> None:
    """Put another program in the place of the verifier."""
    (folder / "verifier.py").write_text(text, encoding="utf-8")
    monkeypatch.setattr("certify.commands.verify.files", lambda _: folder)


def test_the_verifier_runs_alone(certify: Certify, tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    stand_in(monkeypatch, tmp_path, "import sys; print(sys.flags.isolated, sys.flags.no_site, sys.argv[1:])")
    ended = certify("verify", "--json", "--max-cells", "7", "x")
    assert (ended.code, ended.out) == (0, "1 1 ['--json', '--max-cells', '7', '--', 'x']\n")


@pytest.mark.parametrize("code", [0, 1, 2, 3, 70])
def test_its_exit_code_is_ours(certify: Certify, tmp_path: Path, monkeypatch: pytest.MonkeyPatch, code: int) -> None:
    stand_in(monkeypatch, tmp_path, f"raise SystemExit({code})")
    ended = certify("verify", "x")
    assert (ended.code, ended.out, ended.err) == (code, "", "")


def test_an_unknown_exit_code_is_no_verdict(certify: Certify, tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    stand_in(monkeypatch, tmp_path, "raise SystemExit(4)")
    ended = certify("verify", "x")
    message = "certify: the verifier ended with the unknown exit code 4, no verdict\n"
    assert (ended.code, ended.out, ended.err) == (70, "", message)


def test_a_signal_is_no_verdict(certify: Certify, tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    stand_in(monkeypatch, tmp_path, "import os; os.kill(os.getpid(), 9)")
    ended = certify("verify", "x")
    message = "certify: the verifier was ended by signal 9, no verdict\n"
    assert (ended.code, ended.out, ended.err) == (70, "", message)


def test_ctrl_c_ends_the_verifier_too(folder: Path) -> None:
    # The 2^26 faces of a simplex keep the verifier busy, after it has told about the first file.
    header = {
        "about": {"claim": "busy"},
        "format": 1,
        "route": "blocks",
        "statement": {
            "degrees": None,
            "facets": [list(range(1, 27))],
            "groups": [[0, 1, []]],
            "kind": "homology",
            "pairs": ["(D1, S0)"] * 26,
            "vertices": 26,
        },
    }
    busy = folder / "busy.cert.jsonl"
    busy.write_text(json.dumps(header, sort_keys=True, separators=(",", ":")) + "\n", "utf-8")
    with subprocess.Popen(
        command_line("verify", "--max-cells", "1000000000", folder / "ring.cert.jsonl", busy),
        env=environment(),
        stdout=subprocess.PIPE,
        stderr=subprocess.PIPE,
        encoding="utf-8",
        start_new_session=True,
    ) as process:
        assert process.stdout
        assert process.stderr
        assert process.stdout.readline().startswith("accepted")
        os.killpg(process.pid, signal.SIGINT)
        # These end only when every process that could write there has ended.
        rest, errors = process.stdout.read(), process.stderr.read()
    assert (process.returncode, errors) == (130, "certify: interrupted\n")
    assert "undecided" not in rest


def test_compressed_certificates_are_found_and_checked(certify: Certify, folder: Path) -> None:
    path = folder / "ring.cert.jsonl"
    (folder / "ring.cert.jsonl.gz").write_bytes(gzip.compress(path.read_bytes(), mtime=0))
    path.unlink()
    ended = certify("verify", folder)
    assert (ended.code, ended.out.count("accepted   ")) == (0, 2)


def test_a_terminal_shows_what_a_file_gets(folder: Path) -> None:
    """On a terminal the verifier's lines pass through a pipe, so that progress can be shown between them."""
    command = command_line("verify", folder)
    plain = subprocess.run(command, env=environment(), capture_output=True, check=True).stdout
    ours, theirs = os.openpty()
    with subprocess.Popen(command, env=environment(), stdout=theirs, stderr=theirs) as process:
        os.close(theirs)
        shown = b"".join(_pieces(ours))
    os.close(ours)
    assert process.returncode == 0
    seen = re.sub(rb"\x1b\[[0-9;?]*[A-Za-z]", b"", shown).replace(b"\r", b"")
    assert seen.endswith(plain.splitlines()[-1] + b"\n")
    assert all(line in seen for line in plain.splitlines())


def _pieces(terminal: int) -> Iterator[bytes]:
    """Yield what is written to a terminal until the other side is closed, which Linux reports as an error."""
    with suppress(OSError):
        while piece := os.read(terminal, 65536):
            yield piece
