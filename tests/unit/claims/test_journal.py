"""The journal of solved tasks: what was written to its end is known again, and nothing else."""

from __future__ import annotations

import json
from pathlib import Path
from typing import Any

import pytest

from certify.certificate import Spool
from certify.claims import HomologyClaim, prove
from certify.claims.base import Claim, Solved, Task, solve
from certify.claims.characters import CharacterClaim
from certify.claims.journal import Journal
from certify.errors import BadInput
from certify.exact import AbelianGroup
from certify.simplicial import build
from tests.helpers import certificate_of, disc_product

CLAIM = HomologyClaim(disc_product(build("projective-plane"), 1))
CHARACTER = CharacterClaim(disc_product(build("polygon", n=5), 1), 1, ((2, 3, 4, 5, 1),))
HUGE = AbelianGroup(10**5000, (2, 2 * 10**5000))


def solutions(claim: Claim[Any]) -> list[Solved]:
    """Return the solutions of all tasks of a claim."""
    return [solve(task) for task in claim.tasks()]


def journalled(path: Path, claim: Claim[Any], some: list[Solved]) -> None:
    """Write solutions to a journal, as a run does that ends there."""
    with Journal(path, claim) as journal:
        assert list(journal.known()) == []
        for solution in some:
            journal.add(solution)


@pytest.mark.parametrize("claim", [CLAIM, CHARACTER], ids=["homology", "character"])
def test_solutions_are_known_again(tmp_path: Path, claim: Claim[Any]) -> None:
    all_of_them = solutions(claim)
    assert len(all_of_them) > 3
    journalled(tmp_path / "a", claim, all_of_them)
    with Journal(tmp_path / "a", claim) as journal:
        assert list(journal.known()) == all_of_them


def test_large_numbers_are_known_again(tmp_path: Path) -> None:
    solution: Solved = (b'{"x":1}\n', (AbelianGroup(), HUGE), (-(10**5000), 7))
    journalled(tmp_path / "a", CLAIM, [solution, (None, (), ())])
    with Journal(tmp_path / "a", CLAIM) as journal:
        assert list(journal.known()) == [solution, (None, (), ())]


@pytest.mark.parametrize(
    "damage",
    [
        lambda data: data[:-1],
        lambda data: data[:-20],
        lambda data: data + b"[1,",
        lambda data: data + b"\0" * 4096,
        lambda data: data + b"nonsense\n",
        lambda data: data[:-9] + b"7" + data[-8:],
    ],
    ids=["no line feed", "torn", "begun", "zeros", "a line of something else", "a flipped digit"],
)
def test_what_was_not_written_to_its_end_is_forgotten(tmp_path: Path, damage: object) -> None:
    path = tmp_path / "a"
    some = solutions(CLAIM)[:3]
    journalled(path, CLAIM, some)
    assert callable(damage)
    path.write_bytes(damage(path.read_bytes()))
    with Journal(path, CLAIM) as journal:
        known = list(journal.known())
        assert known == some[: len(known)]
        assert len(known) >= 2
        for solution in solutions(CLAIM)[len(known) :]:
            journal.add(solution)
    with Journal(path, CLAIM) as journal:
        assert list(journal.known()) == solutions(CLAIM)


def test_a_journal_that_was_torn_in_its_first_line_begins_again(tmp_path: Path) -> None:
    path = tmp_path / "a"
    journalled(path, CLAIM, [])
    path.write_bytes(path.read_bytes()[:-5])
    journalled(path, CLAIM, solutions(CLAIM)[:1])
    with Journal(path, CLAIM) as journal:
        assert len(list(journal.known())) == 1


def test_tasks_that_are_known_are_not_solved_again(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    count = 5
    journalled(tmp_path / "a", CLAIM, solutions(CLAIM)[:count])
    solved: list[Task] = []

    def counting(task: Task) -> Solved:
        solved.append(task)
        return solve(task)

    monkeypatch.setattr("certify.claims.proof.solve", counting)
    path = tmp_path / "claim.cert.jsonl"
    with Spool() as spool, Journal(tmp_path / "a", CLAIM) as journal:
        prove(CLAIM, spool, journal=journal).write(path, {"claim": "claim"})
    assert len(solved) == len(list(CLAIM.tasks())) - count
    monkeypatch.undo()
    assert path.read_bytes() == certificate_of(CLAIM)


@pytest.mark.parametrize(
    "other",
    [
        HomologyClaim(disc_product(build("projective-plane"), 2)),
        HomologyClaim(disc_product(build("torus"), 1)),
        HomologyClaim(disc_product(build("projective-plane"), 1), degrees=(1,)),
        HomologyClaim(disc_product(build("projective-plane"), 1), route="orbits"),
    ],
    ids=["pair", "complex", "degrees", "route"],
)
def test_the_state_of_another_claim_is_refused_and_left(tmp_path: Path, other: HomologyClaim) -> None:
    path = tmp_path / "a"
    journalled(path, CLAIM, solutions(CLAIM)[:2])
    before = path.read_bytes()
    with pytest.raises(BadInput, match="expected the state of this claim"):
        Journal(path, other)
    assert path.read_bytes() == before


def test_claimed_groups_do_not_matter(tmp_path: Path) -> None:
    """Whoever corrects a false claim after hours of work does not lose them."""
    journalled(tmp_path / "a", CLAIM, solutions(CLAIM)[:2])
    claimed = HomologyClaim(CLAIM.product, groups={0: AbelianGroup(7)})
    with Journal(tmp_path / "a", claimed) as journal:
        assert len(list(journal.known())) == 2


def test_another_version_of_certify_may_work_otherwise(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    journalled(tmp_path / "a", CLAIM, [])
    monkeypatch.setattr("certify.claims.journal.__version__", "9.9")
    with pytest.raises(BadInput, match="by this version of certify"):
        Journal(tmp_path / "a", CLAIM)


def test_two_runs_do_not_write_one_journal(tmp_path: Path) -> None:
    with Journal(tmp_path / "a", CLAIM), pytest.raises(BadInput, match="another run is writing to"):
        Journal(tmp_path / "a", CLAIM)


def test_a_journal_that_cannot_be_made_is_refused(tmp_path: Path) -> None:
    (tmp_path / "file").write_text("x", encoding="utf-8")
    with pytest.raises(BadInput, match="expected a place that can be written"):
        Journal(tmp_path / "file" / "a", CLAIM)


def test_the_first_line_names_the_work(tmp_path: Path) -> None:
    journalled(tmp_path / "a", CLAIM, [])
    (line,) = (tmp_path / "a").read_bytes().splitlines()
    _, title = json.loads(line)
    assert sorted(title) == ["claim", "version"]
