from __future__ import annotations

import pytest

from certify.errors import BadInput
from certify.exact import AbelianGroup
from certify.exact.groups import superscript


@pytest.mark.parametrize(
    ("orders", "torsion"),
    [
        ([], ()),
        ([1, 1], ()),
        ([2, 3], (6,)),
        ([2, 2], (2, 2)),
        ([6, 4], (2, 12)),
        ([4, 6, 10], (2, 2, 60)),
        ([2, 4, 8], (2, 4, 8)),
        ([8, 4, 2], (2, 4, 8)),
        ([12, 18, 5, 1], (6, 180)),
        ([2**70, 3**50, 2], (2, 2**70 * 3**50)),
    ],
)
def test_invariant_factors(orders: list[int], torsion: tuple[int, ...]) -> None:
    assert AbelianGroup.of(3, orders) == AbelianGroup(3, torsion)


@pytest.mark.parametrize(
    ("text", "group"),
    [
        ("0", AbelianGroup()),
        ("0 + 0", AbelianGroup()),
        ("Z^0", AbelianGroup()),
        ("Z/1", AbelianGroup()),
        ("(Z/2)^0", AbelianGroup()),
        ("Z", AbelianGroup(1)),
        ("ℤ", AbelianGroup(1)),
        ("Z^34", AbelianGroup(34)),
        ("ℤ³⁴", AbelianGroup(34)),
        (" Z + Z ", AbelianGroup(2)),
        ("Z/2", AbelianGroup(0, (2,))),
        ("(ℤ/2)³", AbelianGroup(0, (2, 2, 2))),
        ("Z/3+Z/2", AbelianGroup(0, (6,))),
        ("Z/4 ⊕ ℤ^2 ⊕ 0 + (Z/6)^2", AbelianGroup(2, (2, 6, 12))),
        ("Z^9007199254740993", AbelianGroup(2**53 + 1)),
        (f"Z/{10**39}", AbelianGroup(0, (10**39,))),
    ],
)
def test_groups_are_read_as_in_print(text: str, group: AbelianGroup) -> None:
    assert AbelianGroup.parse(text) == group


@pytest.mark.parametrize(
    ("text", "found"),
    [
        ("", "''"),
        ("Z +", "''"),
        ("+ Z", "''"),
        ("Q", "'Q'"),
        ("z", "'z'"),
        ("2", "'2'"),
        ("Z/0", "'Z/0'"),
        ("Z/-2", "'Z/-2'"),
        ("Z^-1", "'Z^-1'"),
        ("Z^1.5", "'Z^1.5'"),
        ("Z/2^3", "'Z/2^3'"),
        ("(Z/2)", "'(Z/2)'"),
        ("Z^", "'Z^'"),
        ("Z/²", "'Z/^2'"),
        ("Z ∪ Z", "'Z ∪ Z'"),
        ("Z + F2 + Z", "'F2'"),
        ("(Z/2)^10000001", "'(Z/2)^10000001'"),
        ("Z^" + "9" * 4001, "'Z^" + "9" * 4001 + "'"),
    ],
)
def test_what_is_no_group_is_refused_with_the_summand(text: str, found: str) -> None:
    with pytest.raises(BadInput) as caught:
        AbelianGroup.parse(text)
    assert caught.value.found == found
    assert caught.value.where == f"the group {text!r}"


@pytest.mark.parametrize("text", ["Z/1 2", "Z^1 0", "(Z/ 2 4)^3", "Z^٣", "Z/１２"])
def test_what_only_looks_like_a_group_is_refused(text: str) -> None:
    with pytest.raises(BadInput):
        AbelianGroup.parse(text)


@pytest.mark.parametrize(
    ("group", "printed", "plain"),
    [
        (AbelianGroup(), "0", "0"),
        (AbelianGroup(1), "ℤ", "Z"),
        (AbelianGroup(10), "ℤ¹⁰", "Z^10"),
        (AbelianGroup(0, (2,)), "ℤ/2", "Z/2"),
        (AbelianGroup(2, (2, 2, 12)), "ℤ² ⊕ (ℤ/2)² ⊕ ℤ/12", "Z^2 + (Z/2)^2 + Z/12"),
    ],
)
def test_groups_are_written_as_in_print(group: AbelianGroup, printed: str, plain: str) -> None:
    assert str(group) == printed
    assert group.plain() == plain


def test_only_the_zero_group_is_false() -> None:
    assert not AbelianGroup()
    assert not AbelianGroup.of(0, [1, 1])
    assert AbelianGroup(1)
    assert AbelianGroup(0, (2,))


def test_direct_sums() -> None:
    assert AbelianGroup(1, (2, 4)) + AbelianGroup(2, (3,)) == AbelianGroup(3, (2, 12))
    assert sum([AbelianGroup(1), AbelianGroup(0, (5,))], AbelianGroup()) == AbelianGroup(1, (5,))


def test_exponents() -> None:
    assert superscript(1234567890) == "¹²³⁴⁵⁶⁷⁸⁹⁰"
