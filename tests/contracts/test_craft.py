"""The house rules that a machine can read: sizes, descriptions, leftovers."""

from __future__ import annotations

import ast
import re
from pathlib import Path

import pytest
from house import SOURCE_FILES, TEST_FILES, relative

FILE_LINES = 400
FUNCTION_LINES = 80

#: what must not stay behind
LEFTOVERS = re.compile(r"\b(TO" r"DO|FIX" r"ME|XX" r"X|HACK)\b|breakpoint\(\)|\bpdb\b")


@pytest.mark.parametrize("path", [*SOURCE_FILES, *TEST_FILES], ids=relative)
def test_file_and_functions_are_short(path: Path) -> None:
    text = path.read_text(encoding="utf-8")
    assert text.count("\n") <= FILE_LINES
    long = [
        (node.name, node.end_lineno - node.lineno + 1)
        for node in ast.walk(ast.parse(text))
        if isinstance(node, ast.FunctionDef | ast.AsyncFunctionDef)
        and node.end_lineno is not None
        and node.end_lineno - node.lineno + 1 > FUNCTION_LINES
    ]
    assert long == []


@pytest.mark.parametrize("path", SOURCE_FILES, ids=relative)
def test_module_says_what_it_is_for(path: Path) -> None:
    tree = ast.parse(path.read_text(encoding="utf-8"))
    if tree.body:
        assert ast.get_docstring(tree)


@pytest.mark.parametrize("path", SOURCE_FILES, ids=relative)
def test_public_functions_and_classes_are_described(path: Path) -> None:
    tree = ast.parse(path.read_text(encoding="utf-8"))
    bare = [
        node.name
        for node in tree.body
        if isinstance(node, ast.FunctionDef | ast.ClassDef)
        and not node.name.startswith("_")
        and not ast.get_docstring(node)
    ]
    assert bare == []


def test_nothing_left_behind() -> None:
    found = [
        f"{relative(path)}: {match[0]}"
        for path in (*SOURCE_FILES, *TEST_FILES)
        if path != Path(__file__)
        for match in LEFTOVERS.finditer(path.read_text(encoding="utf-8"))
    ]
    assert found == []


def test_the_rules_see_what_they_look_for() -> None:
    assert LEFTOVERS.search("# TODO later")
