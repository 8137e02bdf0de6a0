"""The examples of docs/python.md, run as they stand."""

from __future__ import annotations

import doctest
import re
from pathlib import Path

import pytest

DOCUMENT = Path(__file__).parents[3] / "docs" / "python.md"


def test_the_examples_print_what_the_document_says(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.chdir(tmp_path)
    # The marks around the code are no part of what Python prints; empty lines keep the numbers of the lines.
    text = re.sub(r"^```.*$", "", DOCUMENT.read_text(encoding="utf-8"), flags=re.MULTILINE)
    examples = doctest.DocTestParser().get_doctest(text, {}, DOCUMENT.name, str(DOCUMENT), 0)
    assert len(examples.examples) > 30
    output: list[str] = []
    result = doctest.DocTestRunner(verbose=False).run(examples, out=output.append)
    assert result.failed == 0, "".join(output)
