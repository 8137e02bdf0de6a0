from __future__ import annotations

import errno
import gzip
import hashlib
import json
import os
from pathlib import Path

import pytest

from certify.certificate import Spool, certificate_name, write_whole
from certify.errors import BadInput

HEADER = {"format": 1, "about": {"claim": "ring"}}
HEADER_LINE = b'{"about":{"claim":"ring"},"format":1}\n'
RECORDS = [b'{"block":"0"}\n', b'{"block":"1"}\n']


def _end(count: int, before: bytes) -> bytes:
    return b'{"end":{"records":%d,"sha256":"%s"}}\n' % (count, hashlib.sha256(before).hexdigest().encode())


def _write(path: Path, records: list[bytes]) -> int:
    with Spool() as spool:
        for line in records:
            spool.add(line)
        return spool.write(path, HEADER)


@pytest.mark.parametrize("records", [[], RECORDS])
def test_a_certificate_is_header_records_and_end(tmp_path: Path, records: list[bytes]) -> None:
    path = tmp_path / "ring.cert.jsonl"
    size = _write(path, records)
    before = HEADER_LINE + b"".join(records)
    assert path.read_bytes() == before + _end(len(records), before)
    assert size == len(path.read_bytes())


def test_a_packed_certificate_holds_the_same_bytes(tmp_path: Path) -> None:
    plain, packed = tmp_path / "ring.cert.jsonl", tmp_path / "ring.cert.jsonl.gz"
    _write(plain, RECORDS)
    size = _write(packed, RECORDS)
    assert gzip.decompress(packed.read_bytes()) == plain.read_bytes()
    assert size == len(packed.read_bytes())


def test_packed_bytes_depend_on_nothing_but_the_content(tmp_path: Path) -> None:
    """Neither the name of the file nor the time gets into it: RFC 1952, MTIME 0 and no FNAME."""
    one, two = tmp_path / "one.cert.jsonl.gz", tmp_path / "two.cert.jsonl.gz"
    _write(one, RECORDS)
    _write(two, RECORDS)
    assert one.read_bytes() == two.read_bytes()
    flags, time = one.read_bytes()[3], one.read_bytes()[4:8]
    assert flags == 0
    assert time == bytes(4)


def test_a_spool_can_be_written_twice_and_go_on(tmp_path: Path) -> None:
    first, second, third = (tmp_path / f"{n}.cert.jsonl" for n in range(3))
    with Spool() as spool:
        spool.add(RECORDS[0])
        spool.write(first, HEADER)
        spool.write(second, HEADER)
        spool.add(RECORDS[1])
        spool.write(third, HEADER)
    assert first.read_bytes() == second.read_bytes()
    before = HEADER_LINE + b"".join(RECORDS)
    assert third.read_bytes() == before + _end(2, before)


def test_long_records_are_written_whole(tmp_path: Path) -> None:
    records = [json.dumps("x" * (3 << 20)).encode() + b"\n", *RECORDS]
    path = tmp_path / "ring.cert.jsonl"
    _write(path, records)
    before = HEADER_LINE + b"".join(records)
    assert path.read_bytes() == before + _end(3, before)


def test_the_folder_is_made(tmp_path: Path) -> None:
    path = tmp_path / "new" / "folder" / "ring.cert.jsonl"
    _write(path, RECORDS)
    assert path.exists()
    assert os.listdir(path.parent) == [path.name]


def test_an_older_file_is_replaced(tmp_path: Path) -> None:
    path = tmp_path / "ring.cert.jsonl"
    path.write_bytes(b"older and longer than what follows" * 100)
    _write(path, [])
    assert path.read_bytes() == HEADER_LINE + _end(0, HEADER_LINE)


def _broken_off(path: Path) -> None:
    with write_whole(path) as file:
        file.write(b"half of it")
        raise KeyboardInterrupt


@pytest.mark.parametrize("older", [None, b"older"])
def test_nothing_changes_when_the_writing_is_broken_off(tmp_path: Path, older: bytes | None) -> None:
    path = tmp_path / "ring.cert.jsonl"
    if older is not None:
        path.write_bytes(older)
    with pytest.raises(KeyboardInterrupt):
        _broken_off(path)
    assert [entry.read_bytes() for entry in tmp_path.iterdir()] == ([] if older is None else [older])


def test_a_full_disk_is_a_fault_that_names_the_file(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    def full(_: int) -> None:
        raise OSError(errno.ENOSPC, os.strerror(errno.ENOSPC))

    monkeypatch.setattr(os, "fsync", full)
    path = tmp_path / "ring.cert.jsonl"
    with pytest.raises(BadInput, match=os.strerror(errno.ENOSPC)) as caught:
        _write(path, RECORDS)
    assert str(path) in caught.value.where
    assert list(tmp_path.iterdir()) == []


def test_a_folder_in_the_place_of_the_file_is_a_fault(tmp_path: Path) -> None:
    path = tmp_path / "ring.cert.jsonl"
    path.mkdir()
    with pytest.raises(BadInput):
        _write(path, RECORDS)
    assert list(tmp_path.iterdir()) == [path]


def test_a_file_in_the_place_of_the_folder_is_a_fault(tmp_path: Path) -> None:
    (tmp_path / "folder").write_bytes(b"no folder")
    with pytest.raises(BadInput):
        _write(tmp_path / "folder" / "ring.cert.jsonl", RECORDS)


def test_names_of_certificates() -> None:
    assert certificate_name("ring") == "ring.cert.jsonl"
    assert certificate_name("ring", packed=True) == "ring.cert.jsonl.gz"
