"""The README shows what the program does."""

from __future__ import annotations

import re
import shlex

import pytest

from tests.support import ROOT, legbook

README = (ROOT / "README.md").read_text(encoding="utf-8")


def test_the_leg_table_is_the_one_that_is_printed() -> None:
    (shown,) = re.findall(r"```text\n(.*?)```", README, re.DOTALL)
    printed = legbook("table", str(ROOT / "routes_demo" / "north_pacific_winter.toml")).stdout.decode()
    assert printed.startswith(shown.rstrip("\n"))


def test_the_first_paragraph_states_the_job() -> None:
    paragraph = README.split("\n\n")[1]
    for word in ("planning a passage", "leg by leg", "rhumb line", "great circle", "offline", "leg table"):
        assert word in " ".join(paragraph.split())


EXAMPLES = [
    line.split("#")[0].replace("PLAN OTHER_PLAN", "PLAN PLAN")
    for block in re.findall(r"```sh\n(.*?)```", README, re.DOTALL)
    for line in block.splitlines()
    if line.startswith("legbook ") and ">" not in line
]


@pytest.mark.parametrize("line", EXAMPLES)
def test_every_example_runs(line: str, tmp_path_factory: pytest.TempPathFactory) -> None:
    folder = tmp_path_factory.mktemp("example")
    plan = str(ROOT / "routes_demo" / "north_pacific_winter.toml")
    words = [plan if word == "PLAN" else word for word in shlex.split(line)[1:]]
    if "-o" in words:
        words[words.index("-o") + 1] = str(folder / words[words.index("-o") + 1])
    done = legbook(*words)
    assert done.returncode == 0, done.stderr
