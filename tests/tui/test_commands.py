from __future__ import annotations

import subprocess
import sys
from collections import Counter

import pytest

from tests.support import ROOT
from tui.app import PAGES, Workbook
from tui.commands import COMMANDS, Command, Where, commands_of, readme_keys
from tui.pages import file_tasks
from tui.pages.chart import ChartPage
from tui.pages.passage import PassagePage
from tui.pages.prints import PrintPage
from tui.present.key_list import key_lines
from tui.widgets.keys import bindings_of

OTHERS = {"theme", "palette", "page.next", "row.take", "row.leave", *PAGES}
"""Commands that the workbook itself or the open row sees to."""

NEVER_ARRIVE = {"ctrl+i", "ctrl+m", "ctrl+h", "ctrl+j", "ctrl+left_square_bracket"}


@pytest.mark.parametrize("command", COMMANDS, ids=lambda command: command.id)
def test_every_command_is_done_somewhere_and_told_in_words(command: Command) -> None:
    tasks = {**file_tasks.TASKS, **PassagePage.tasks, **ChartPage.tasks, **PrintPage.tasks}
    assert command.id in tasks or command.id in OTHERS
    assert command.words
    assert len(command.does) < 62
    assert not NEVER_ARRIVE & set(command.keys)
    assert not any(key.startswith(("alt+", "super+", "ctrl+shift+")) for key in command.keys)


def test_every_task_is_a_command() -> None:
    known = {command.id for command in COMMANDS}
    assert len(known) == len(COMMANDS)
    assert known >= {*file_tasks.TASKS, *PassagePage.tasks, *ChartPage.tasks, *PrintPage.tasks}


@pytest.mark.parametrize("page", [Where.PASSAGE, Where.CHART, Where.PRINT])
def test_no_key_says_two_things_on_one_page(page: Where) -> None:
    keys = Counter(key for where in (page, Where.EVERYWHERE) for command in commands_of(where) for key in command.keys)
    assert [key for key, count in keys.items() if count > 1] == []


def test_bindings_and_help_have_every_command_of_the_table() -> None:
    bound = {binding.description for where in Where for binding in bindings_of(where)}  # type: ignore[union-attr]  # all are Binding
    assert bound >= {command.words for command in COMMANDS if command.keys and command.id != "palette"}
    told = "\n".join("".join(piece.text for piece in pieces) for pieces in key_lines(70))
    narrow = "\n".join("".join(piece.text for piece in pieces) for pieces in key_lines(30))
    for command in COMMANDS:
        assert command.words in told
        assert command.words in narrow
    assert len(Workbook.BINDINGS) >= len(commands_of(Where.EVERYWHERE)) - 2


def test_the_readme_lists_the_keys_of_the_table() -> None:
    assert readme_keys() in (ROOT / "README.md").read_text(encoding="utf-8")


@pytest.mark.parametrize(
    "code",
    [
        "import tui.session, tui.commands, tui.state, tui.journal",
        "import sys; sys.argv = ['legbook', '--help']; from tui.__main__ import main; main()",
        "import sys; sys.argv = ['legbook', 'leg', '10N 10W', '20N 20W']; from tui.__main__ import main; main()",
    ],
)
def test_verbs_and_session_open_without_the_screen(code: str) -> None:
    ask = f"{code}\nimport sys; sys.stderr.write(str('textual' in sys.modules or 'rich' in sys.modules))"
    done = subprocess.run([sys.executable, "-c", ask], capture_output=True, text=True, check=True, cwd=ROOT)
    assert done.stderr == "False"
