"""Where a value of a sheet stands: its line, and the words for its place."""

from __future__ import annotations

import tomllib

import pytest

from certify.sheet import line_of
from certify.tables import Keys, in_words, shown

SHEET = '''\
title = "Rig"

# A comment, and a blank line above.
[complexes.ring]
facets = [
  [1, 2],

  [2, 3],  # with a comment
  [3,
   1],
]

[complexes]
line.facets = [[1, 2]]

[[claims]]
id = "a"
title = """
several
lines [[ here
"""
pair = ["(D1, S0)",
        "(D2, S1)"]

[[claims]]
id = "b"
groups = { 0 = "Z", 1 = "Z^2" }

[claims.more]
x = 1
'''


@pytest.mark.parametrize(
    ("keys", "line"),
    [
        (("title",), 1),
        (("complexes",), 4),
        (("complexes", "ring"), 4),
        (("complexes", "ring", "facets"), 5),
        (("complexes", "ring", "facets", 0), 6),
        (("complexes", "ring", "facets", 1), 8),
        (("complexes", "ring", "facets", 2), 9),
        (("complexes", "line"), 14),
        (("complexes", "line", "facets", 0), 14),
        (("claims",), 16),
        (("claims", 0), 16),
        (("claims", 0, "id"), 17),
        (("claims", 0, "title"), 18),
        (("claims", 0, "pair"), 22),
        (("claims", 0, "pair", 0), 22),
        (("claims", 0, "pair", 1), 23),
        (("claims", 1), 25),
        (("claims", 1, "groups", "1"), 27),
        (("claims", 1, "more", "x"), 30),
    ],
)
@pytest.mark.parametrize("ending", ["\n", "\r\n"])
def test_a_value_has_the_line_on_which_it_starts(keys: Keys, line: int, ending: str) -> None:
    assert line_of(SHEET.replace("\n", ending), keys) == line


@pytest.mark.parametrize(
    ("keys", "line"),
    [
        (("claims", 1, "pair"), 25),
        (("claims", 1, "groups", "7"), 27),
        (("claims", 0, "pair", 2), 22),
        (("complexes", "ring", "facets", "x"), 5),
        (("complexes", "tree", "facets"), 4),
    ],
)
def test_a_value_that_is_missing_has_the_line_of_what_should_hold_it(keys: Keys, line: int) -> None:
    assert line_of(SHEET, keys) == line


def test_the_line_is_right_for_every_item_of_a_long_list() -> None:
    text = "[complexes.k]\nfacets = [\n" + "".join(f"  [{i}, {i + 1}],\n" for i in range(40)) + "]\n"
    assert len(tomllib.loads(text)["complexes"]["k"]["facets"]) == 40
    assert [line_of(text, ("complexes", "k", "facets", i)) for i in range(40)] == list(range(3, 43))


def test_the_line_is_right_behind_a_text_of_many_lines() -> None:
    text = 'title = """\n' + "[[claims]]\n" * 30 + '"""\n[[claims]]\nid = "a"\n'
    assert line_of(text, ("title",)) == 1
    assert line_of(text, ("claims", 0)) == 33
    assert line_of(text, ("claims", 0, "id")) == 34


@pytest.mark.parametrize(
    ("keys", "words"),
    [
        (("title",), "key title"),
        (("claims",), "key claims"),
        (("claims", 0), "claim 1"),
        (("claims", 1, "pair", 2), "claim 2, key pair, item 3"),
        (("claims", 1, "groups", "5"), "claim 2, key groups.5"),
        (("complexes",), "key complexes"),
        (("complexes", "ring"), "complex ring"),
        (("complexes", "my ring", "facets", 0), "complex 'my ring', key facets, item 1"),
        (("a\x1b[2J",), "key 'a\\x1b[2J'"),
    ],
)
def test_a_place_is_named_as_a_person_would(keys: Keys, words: str) -> None:
    assert in_words(keys) == words


@pytest.mark.parametrize(
    ("toml", "text"),
    [
        ("true", "true"),
        ("-12", "-12"),
        ("1.5", "1.5"),
        ("nan", "nan"),
        ("[]", "an empty list"),
        ("[1]", "a list"),
        ("{}", "a table"),
        ("'Z^'", "'Z^'"),
        ("1979-05-27", "the date or time 1979-05-27"),
        ("07:32:00", "the date or time 07:32:00"),
        (f"'{'x' * 61}'", "'" + "x" * 57 + "...'"),
        ("1" * 61, "a number of 61 digits"),
    ],
)
def test_a_value_is_shown_in_the_words_of_toml(toml: str, text: str) -> None:
    assert shown(tomllib.loads(f"x = {toml}")["x"]) == text
