"""`certify demo`: the whole job, for somebody who is new."""

from __future__ import annotations

import re
from pathlib import Path

import pytest

from certify.sheet import read_sheet
from tests.helpers import examined
from tests.surface.running import Certify


def test_the_demo_proves_verifies_and_explains(
    certify: Certify, tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.chdir(tmp_path)
    ended = certify("demo")
    assert (ended.code, ended.err) == (0, "")
    sheet, certificates = Path("certify-demo/lighting-rig.toml"), Path("certify-demo/certificates")
    claims = read_sheet(sheet).claims
    assert sorted(path.name for path in certificates.iterdir()) == sorted(f"{item.id}.cert.jsonl" for item in claims)
    for item in claims:
        report = examined(certificates / f"{item.id}.cert.jsonl")
        assert report["verdict"] == "accepted"
        # Once by the prover and once by the verifier.
        assert ended.out.count(report["fingerprint"]) == 2
    assert f"{len(claims)} of {len(claims)} claims proved\n" in ended.out
    assert f"{len(claims)} accepted, 0 rejected, 0 undecided\n" in ended.out
    for name in ("sheet", "certificates", "fingerprint", "verifier"):
        assert re.search(f"^{name} ", ended.out, re.MULTILINE)


def test_its_rigs_are_a_surface_one_with_torsion_and_one_with_mixed_pairs(certify: Certify, tmp_path: Path) -> None:
    ended = certify("demo", "--out", tmp_path / "here")
    assert ended.code == 0
    # Coxeter's genus for six vertices is 17.
    assert "H_1((D¹,S⁰)^K; ℤ) ≅ ℤ³⁴\n" in ended.out
    # The torsion of the projective plane, and 1 + 31 is the Euler characteristic Σ (-1)^|σ| 2^(6 - |σ|).
    assert "H_2((D¹,S⁰)^K; ℤ) ≅ ℤ³¹ ⊕ ℤ/2\n" in ended.out
    # S¹ × S³.
    assert "H_0 ≅ ℤ, H_1 ≅ ℤ, H_3 ≅ ℤ, H_4 ≅ ℤ, H_k = 0 for all other k" in ended.out.replace("((X,A)^K; ℤ)", "")
    assert "(D¹,S⁰) at front, back; (D²,S¹) at left, right" in ended.out


def test_what_it_advises_ends_as_it_says(certify: Certify, tmp_path: Path) -> None:
    first = certify("demo", "--out", tmp_path)
    sheet = tmp_path / "lighting-rig.toml"
    assert f"    certify prove {sheet}\n" in first.out
    assert f"    certify verify {tmp_path / 'certificates'}\n" in first.out
    sheet.write_text(sheet.read_text(encoding="utf-8").replace("Z^34", "Z^35"), encoding="utf-8")
    proved = certify("prove", sheet)
    assert proved.code == 1
    assert "is claimed to be ℤ³⁵, but is ℤ³⁴\n" in proved.out
    path = tmp_path / "certificates" / "ring.cert.jsonl"
    path.write_text(path.read_text(encoding="utf-8").replace("34", "35", 1), encoding="utf-8")
    checked = certify("verify", tmp_path / "certificates")
    assert checked.code == 1
    assert f"rejected   {path}\n" in checked.out


def test_it_can_be_run_again(certify: Certify, tmp_path: Path) -> None:
    first, second = certify("demo", "--out", tmp_path), certify("demo", "--out", tmp_path)
    assert first == second
    assert first.code == 0


def test_a_sheet_that_was_changed_is_not_overwritten(certify: Certify, tmp_path: Path) -> None:
    sheet = tmp_path / "lighting-rig.toml"
    sheet.write_text("# my own work\n", encoding="utf-8")
    ended = certify("demo", "--out", tmp_path)
    assert (ended.code, ended.out) == (3, "")
    assert ended.err.startswith(f"certify: {sheet}: expected no file, or the sheet of the demo")
    assert sheet.read_text(encoding="utf-8") == "# my own work\n"
    assert [path.name for path in tmp_path.iterdir()] == ["lighting-rig.toml"]


def test_a_file_in_place_of_its_folder_is_named(certify: Certify, tmp_path: Path) -> None:
    (tmp_path / "blocked").write_text("I am a file", encoding="utf-8")
    ended = certify("demo", "--out", tmp_path / "blocked")
    assert (ended.code, ended.out) == (3, "")
    assert ended.err.startswith(
        f"certify: {tmp_path / 'blocked' / 'lighting-rig.toml'}: expected a place for the sheet"
    )
