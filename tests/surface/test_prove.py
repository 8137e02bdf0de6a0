"""`certify prove`: true claims, false claims, and everything that can go wrong."""

from __future__ import annotations

import errno
import gzip
import os
import signal
import subprocess
from pathlib import Path
from typing import Any

import pytest

from certify.certificate import Spool
from tests.helpers import examined
from tests.surface.running import Certify, command_line, environment, in_process

SPACE = "H_{}((D¹,S⁰)^K; ℤ)"


def files(folder: Path) -> list[str]:
    """Return the names of all files in a folder, hidden ones too; none if there is no folder."""
    return sorted(path.name for path in folder.iterdir()) if folder.exists() else []


def change(sheet: Path, old: str, new: str) -> None:
    text = sheet.read_text(encoding="utf-8")
    assert old in text
    sheet.write_text(text.replace(old, new), encoding="utf-8")


# -- true claims --------------------------------------------------------------------------------


def test_true_claims_get_certificates_beside_the_sheet_that_the_verifier_accepts(certify: Certify, rig: Path) -> None:
    ended = certify("prove", rig)
    assert (ended.code, ended.err) == (0, "")
    folder = rig.parent / "certificates"
    assert files(folder) == ["ring.cert.jsonl", "stage.cert.jsonl"]
    reports = [examined(folder / name) for name in files(folder)]
    assert [report["verdict"] for report in reports] == ["accepted", "accepted"]
    size = (folder / "ring.cert.jsonl").stat().st_size
    assert ended.out.splitlines() == [
        "A rig",
        "",
        "ring   H_0((D¹,S⁰)^K; ℤ) ≅ ℤ",
        "       H_1((D¹,S⁰)^K; ℤ) ≅ ℤ³⁴",
        "       H_2((D¹,S⁰)^K; ℤ) ≅ ℤ",
        "       H_k((D¹,S⁰)^K; ℤ) = 0 for all other k",
        "       where K is ring, on 6 vertices",
        f"       certificate {folder / 'ring.cert.jsonl'}, {size:,} bytes",
        f"       fingerprint {reports[0]['fingerprint']}",
        "",
        "stage  H_1((X,A)^K; ℤ) ≅ ℤ",
        "       H_2((X,A)^K; ℤ) = 0",
        "       where K is stage, on 4 vertices",
        "       (X,A) is (D¹,S⁰) at front, back; (D²,S¹) at left, right",
        f"       certificate {folder / 'stage.cert.jsonl'}, {(folder / 'stage.cert.jsonl').stat().st_size:,} bytes",
        f"       fingerprint {reports[1]['fingerprint']}",
        "",
        "2 of 2 claims proved",
    ]


def test_the_folder_can_be_chosen_and_the_files_compressed(certify: Certify, rig: Path, tmp_path: Path) -> None:
    folder = tmp_path / "far" / "away"
    assert certify("prove", rig).code == 0
    assert certify("prove", rig, "--out", folder, "--gzip").code == 0
    assert files(folder) == ["ring.cert.jsonl.gz", "stage.cert.jsonl.gz"]
    for name in files(folder):
        plain = (rig.parent / "certificates" / name.removesuffix(".gz")).read_bytes()
        assert gzip.decompress((folder / name).read_bytes()) == plain
        assert examined(folder / name)["verdict"] == "accepted"


def test_json_says_the_same_to_a_program(certify: Certify, rig: Path) -> None:
    change(rig, "Z^34", "Z^35")
    ended = certify("prove", rig, "--json")
    path = rig.parent / "certificates" / "stage.cert.jsonl"
    assert (ended.code, ended.err) == (1, "")
    assert ended.json == {
        "verdict": "false",
        "claims": [
            {
                "claim": "ring",
                "verdict": "false",
                "sentence": f"{SPACE.format(1)} is claimed to be ℤ³⁵, but is ℤ³⁴",
                "kind": "homology",
                "found": None,
                "path": None,
                "bytes": None,
                "fingerprint": None,
            },
            {
                "claim": "stage",
                "verdict": "proved",
                "sentence": "",
                "kind": "homology",
                "found": {"1": {"rank": 1, "torsion": []}},
                "path": str(path),
                "bytes": path.stat().st_size,
                "fingerprint": examined(path)["fingerprint"],
            },
        ],
    }


def test_the_bytes_do_not_depend_on_the_run_or_on_the_number_of_processes(rig: Path, tmp_path: Path) -> None:
    change(rig, 'pair = "(D1, S0)"\ngroups = { 0 = "Z", 1 = "Z^34", 2 = "Z" }', 'pair = "(D2, S1)"')
    change(rig, "facets = [[1, 2], [2, 3], [3, 4], [4, 5], [5, 6], [6, 1]]", 'family = "cyclic-polytope"\nm = 9\nd = 4')
    runs = {"a": ("1", "1"), "b": ("1", "2"), "c": ("2", "3")}
    for folder, (jobs, number) in runs.items():
        ended = in_process("prove", rig, "--out", tmp_path / folder, "--jobs", jobs, PYTHONHASHSEED=number)
        assert (ended.code, ended.err) == (0, "")
    for name in ("ring.cert.jsonl", "stage.cert.jsonl"):
        first, second, third = ((tmp_path / folder / name).read_bytes() for folder in runs)
        assert first == second == third


# -- false claims -------------------------------------------------------------------------------


def test_a_false_claim_gets_nothing_and_stops_nobody(certify: Certify, rig: Path) -> None:
    change(rig, '1 = "Z^34"', '1 = "Z^34 + Z/2"')
    ended = certify("prove", rig)
    assert (ended.code, ended.err) == (1, "")
    assert files(rig.parent / "certificates") == ["stage.cert.jsonl"]
    assert f"ring   false: {SPACE.format(1)} is claimed to be ℤ³⁴ ⊕ ℤ/2, but is ℤ³⁴\n\n" in ended.out
    assert ended.out.endswith("\n1 of 2 claims proved, 1 false\n")


def test_a_degree_that_is_left_out_is_claimed_to_be_zero(certify: Certify, rig: Path) -> None:
    change(rig, ', 2 = "Z" }', " }")
    ended = certify("prove", rig)
    assert ended.code == 1
    assert f"false: {SPACE.format(2)} is claimed to be 0, but is ℤ\n" in ended.out


def test_an_older_certificate_of_a_claim_that_is_false_now_is_pointed_out_and_left(certify: Certify, rig: Path) -> None:
    assert certify("prove", rig).code == 0
    path = rig.parent / "certificates" / "ring.cert.jsonl"
    before = path.read_bytes()
    change(rig, "Z^34", "Z^35")
    ended = certify("prove", rig)
    assert ended.code == 1
    assert f"no certificate was written; {path} is of an earlier run\n" in ended.out
    assert path.read_bytes() == before


# -- bad sheets ---------------------------------------------------------------------------------

BAD_SHEETS: dict[str, tuple[bytes, str]] = {
    "a facet that is not a list": (
        b"[complexes.k]\nfacets = [[1, 2],\n  3]\n",
        "{sheet}, line 3, complex k, key facets, item 2: expected a list, found 3",
    ),
    "a vertex twice in a facet": (
        b"[complexes.k]\nfacets = [[1, 2],\n  [3, 3]]\n",
        "{sheet}, line 3, complex k, key facets, item 2: expected each vertex once, found vertex 3 twice",
    ),
    "an empty sheet": (b"", "{sheet}, the sheet: expected at least one claim ([[claims]]), found none"),
    "an unknown complex": (
        b'[complexes.k]\nfacets = [[1]]\n[[claims]]\nid = "a"\nkind = "homology"\ncomplex = "l"\n',
        "{sheet}, line 6, claim 1, key complex: expected one of the complexes k, found 'l'",
    ),
    "an unknown pair": (
        b'[complexes.k]\nfacets = [[1]]\n[[claims]]\nid = "a"\nkind = "homology"\ncomplex = "k"\npair = "(D2, S2)"\n',
        "{sheet}, line 7, claim 1, key pair: "
        "expected the boundary sphere of the disc, as in \"(D2, S1)\", found '(D2, S2)'",
    ),
    "a group that does not parse": (
        b'complexes.k.facets = [[1]]\n[[claims]]\nid = "a"\nkind = "homology"\ncomplex = "k"\n'
        b'pair = "(D2, S1)"\ngroups = { 0 = "Q" }\n',
        "{sheet}, line 7, claim 1, key groups.0: "
        "expected summands like 0, Z, Z^34, Z/2 or (Z/2)^3 joined by +, found 'Q'",
    ),
    "a negative degree": (
        b'complexes.k.facets = [[1]]\n[[claims]]\nid = "a"\nkind = "homology"\ncomplex = "k"\n'
        b'pair = "(D2, S1)"\ndegrees = [-1]\n',
        "{sheet}, line 7, claim 1, key degrees, item 1: expected a degree from 0 on, of at most 9 digits, found -1",
    ),
    "a claim id twice": (
        b'complexes.k.facets = [[1]]\n[[claims]]\nid = "a"\nkind = "homology"\ncomplex = "k"\npair = "(D2, S1)"\n'
        b'[[claims]]\nid = "a"\nkind = "homology"\ncomplex = "k"\npair = "(D2, S1)"\n',
        "{sheet}, line 8, claim 2, key id: expected an id of its own for each claim, found 'a' again",
    ),
    "a sheet that is not UTF-8": (
        b"# caf\xe9\n",
        "{sheet}, line 1: expected UTF-8, found the byte 0xe9, which is none",
    ),
    "a sheet that is not TOML": (
        b"title = A rig\n",
        "{sheet}, line 1, column 9: expected TOML, "
        "found something that is no value (texts and pairs stand in quotation marks)",
    ),
}


@pytest.mark.parametrize("fault", BAD_SHEETS)
def test_a_bad_sheet_is_refused_in_one_sentence_before_anything_is_written(
    certify: Certify, rig: Path, fault: str
) -> None:
    data, message = BAD_SHEETS[fault]
    rig.write_bytes(data)
    ended = certify("prove", rig)
    assert (ended.code, ended.out, ended.err) == (3, "", f"certify: {message.format(sheet=rig)}\n")
    assert files(rig.parent) == ["rig.toml"]


def test_a_sheet_with_a_fault_in_its_last_claim_writes_nothing_for_the_first(certify: Certify, rig: Path) -> None:
    change(rig, "degrees = [1, 2]", "degrees = [1, 1]")
    ended = certify("prove", rig)
    assert ended.code == 3
    assert f"{rig}, line 22, claim 2, key degrees, item 2: " in ended.err
    assert files(rig.parent) == ["rig.toml"]


def test_a_sheet_that_is_not_there_is_refused(certify: Certify, tmp_path: Path) -> None:
    ended = certify("prove", tmp_path / "rig.toml")
    message = f"certify: {tmp_path / 'rig.toml'}: expected a claim sheet, found No such file or directory\n"
    assert (ended.code, ended.out, ended.err) == (3, "", message)


# -- places that cannot be written --------------------------------------------------------------


@pytest.mark.parametrize("inner", ["", "deeper/still"])
def test_a_file_in_place_of_the_folder_is_noticed_before_the_work(certify: Certify, rig: Path, inner: str) -> None:
    blocked = rig.parent / "blocked"
    blocked.write_text("I am a file", encoding="utf-8")
    ended = certify("prove", rig, "--out", blocked / inner)
    message = f"certify: the folder {blocked / inner}: expected a folder, found {blocked}, which is a file\n"
    assert (ended.code, ended.out, ended.err) == (3, "", message)
    assert blocked.read_text(encoding="utf-8") == "I am a file"


def test_a_folder_without_permission_is_noticed_before_the_work(
    certify: Certify, rig: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    # The tests may run as root, who may write everywhere.
    monkeypatch.setattr(os, "access", lambda *_: False)
    ended = certify("prove", rig)
    folder = rig.parent / "certificates"
    message = f"certify: the folder {folder}: expected a place that can be written, found no permission\n"
    assert (ended.code, ended.out, ended.err) == (3, "", message)
    assert files(rig.parent) == ["rig.toml"]


def full(*_: Any) -> None:
    raise OSError(errno.ENOSPC, os.strerror(errno.ENOSPC))


def test_a_disk_that_fills_leaves_nothing_half_written(
    certify: Certify, rig: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.setattr(os, "fsync", full)
    ended = certify("prove", rig)
    folder = rig.parent / "certificates"
    assert ended.code == 3
    assert ended.err.splitlines() == [
        f"certify: claim {name}: writing {folder / name}.cert.jsonl: "
        "expected a place that can be written, found No space left on device"
        for name in ("ring", "stage")
    ]
    assert ended.out == "A rig\n\n0 of 2 claims proved, 2 undecided\n"
    assert files(folder) == []


def test_a_certificate_that_cannot_be_replaced_stays_as_it_was(
    certify: Certify, rig: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    assert certify("prove", rig).code == 0
    folder = rig.parent / "certificates"
    before = {name: (folder / name).read_bytes() for name in files(folder)}
    change(rig, "degrees = [1, 2]", "degrees = [0, 1]")
    monkeypatch.setattr(os, "fsync", full)
    assert certify("prove", rig).code == 3
    assert {name: (folder / name).read_bytes() for name in files(folder)} == before


def test_a_group_that_is_too_large_leaves_the_other_claims(certify: Certify, tmp_path: Path) -> None:
    sheet = tmp_path / "large.toml"
    sheet.write_text(
        '[complexes.ten]\nfamily = "points"\nm = 10\n'
        '[[claims]]\nid = "all"\nkind = "character"\ncomplex = "ten"\ndegree = 1\ngenerators = "all"\n'
        '[[claims]]\nid = "order"\nkind = "automorphisms"\ncomplex = "ten"\norder = 3628800\n',
        encoding="utf-8",
    )
    ended = certify("prove", sheet)
    assert (ended.code, files(tmp_path / "certificates")) == (3, ["order.cert.jsonl"])
    assert ended.err == (
        "certify: claim all: the group has more than 200,000 elements, and larger ones are not enumerated; "
        "give generators of a smaller one\n"
    )
    assert [claim["verdict"] for claim in certify("prove", sheet, "--json").json["claims"]] == ["undecided", "proved"]


def test_a_full_disk_for_temporary_files_is_no_crash(
    certify: Certify, rig: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.setattr(Spool, "add", full)
    ended = certify("prove", rig, "--json")
    assert ended.code == 3
    sentence = "the system refuses to go on: No space left on device"
    assert ended.err == f"certify: claim ring: {sentence}\ncertify: claim stage: {sentence}\n"
    assert ended.json["verdict"] == "undecided"
    assert [claim["sentence"] for claim in ended.json["claims"]] == [sentence, sentence]


def test_a_false_claim_counts_more_than_one_that_could_not_be_written(
    certify: Certify, rig: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    change(rig, "Z^34", "Z^35")
    monkeypatch.setattr(os, "fsync", full)
    ended = certify("prove", rig)
    assert ended.code == 1
    assert ended.out.endswith("0 of 2 claims proved, 1 false, 1 undecided\n")


# -- Ctrl-C -------------------------------------------------------------------------------------


def test_an_interrupt_while_a_file_is_written_leaves_no_part_of_it(
    certify: Certify, rig: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    def interrupted(_: int) -> None:
        raise KeyboardInterrupt

    monkeypatch.setattr(os, "fsync", interrupted)
    ended = certify("prove", rig)
    assert (ended.code, ended.out, ended.err) == (130, "A rig\n\n", "certify: interrupted\n")
    assert files(rig.parent / "certificates") == []


@pytest.mark.parametrize("jobs", ["1", "2"])
def test_ctrl_c_ends_the_work_and_keeps_what_is_proved(rig: Path, jobs: str) -> None:
    change(rig, '[[claims]]\nid = "stage"', '[complexes.large]\nfamily = "polygon"\nn = 24\n\n[[claims]]\nid = "stage"')
    change(
        rig,
        'complex = "stage"\npair = ["(D1, S0)", "(D1, S0)", "(D2, S1)", "(D2, S1)"]',
        'complex = "large"\npair = "(D1, S0)"',
    )
    folder = rig.parent / "certificates"
    # The keyboard reaches every process of the group, so the processes that compute get the signal as well.
    with subprocess.Popen(
        command_line("prove", rig, "--jobs", jobs),
        env=environment(),
        stdout=subprocess.PIPE,
        stderr=subprocess.PIPE,
        encoding="utf-8",
        start_new_session=True,
    ) as process:
        assert process.stdout
        assert process.stderr
        for line in process.stdout:
            if "fingerprint" in line:
                break
        os.killpg(process.pid, signal.SIGINT)
        errors = process.stderr.read()
    assert process.returncode == 130
    assert errors.endswith("certify: interrupted\n")
    assert files(folder) == ["ring.cert.jsonl"]
    assert examined(folder / "ring.cert.jsonl")["verdict"] == "accepted"
