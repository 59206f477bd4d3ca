"""The house rules that no linter holds."""

from __future__ import annotations

import ast
import re
import shutil
import subprocess
from pathlib import Path

import pytest

ROOT = Path(__file__).parent.parent
SOURCES = sorted(path for package in ("navcore", "tui") for path in (ROOT / package).rglob("*.py"))


def _body_lines(function: ast.FunctionDef | ast.AsyncFunctionDef) -> int:
    body = function.body[1:] if ast.get_docstring(function) and len(function.body) > 1 else function.body
    last = body[-1].end_lineno
    assert last is not None
    return last - body[0].lineno + 1


@pytest.mark.parametrize("path", SOURCES, ids=lambda path: str(path.relative_to(ROOT)))
def test_no_file_class_or_function_outgrows_the_house(path: Path) -> None:
    text = path.read_text(encoding="utf-8")
    assert text.count("\n") <= 400
    for node in ast.walk(ast.parse(text)):
        if isinstance(node, ast.FunctionDef | ast.AsyncFunctionDef):
            assert _body_lines(node) <= 40, node.name
        if isinstance(node, ast.ClassDef):
            methods = [item for item in node.body if isinstance(item, ast.FunctionDef | ast.AsyncFunctionDef)]
            assert node.end_lineno is not None
            assert node.end_lineno - node.lineno < 300, node.name
            assert len(methods) <= 20, node.name


@pytest.mark.skipif(shutil.which("git") is None, reason="what is tracked is git's to say")
def test_the_top_level_holds_what_it_should() -> None:
    tracked = subprocess.run(["git", "ls-files"], cwd=ROOT, capture_output=True, text=True, check=False)
    if tracked.returncode:
        pytest.skip("no git checkout")
    top = {line.split("/")[0] for line in tracked.stdout.splitlines()}
    allowed = {"README.md", "DEVELOPERS.md", "pyproject.toml", "tui", "navcore", "tests", "routes_demo"}
    assert {name for name in top if not name.startswith(".")} <= allowed


@pytest.mark.parametrize("path", SOURCES, ids=lambda path: str(path.relative_to(ROOT)))
def test_the_core_reads_no_clock_and_no_environment(path: Path) -> None:
    if "navcore" in path.relative_to(ROOT).parts:
        code = path.read_text(encoding="utf-8")
        assert not re.search(r"\b(datetime\.now|time\.time|utcnow|date\.today|os\.environ|getenv)\b", code)
