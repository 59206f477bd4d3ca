"""A print written to a file: asked where to, never over another file unasked, and said where it went."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from navcore.files.store import write_whole
from navcore.text.plain import visible
from tui.pages.file_tasks import path_typed
from tui.widgets.dialogs import Answer, Question
from tui.widgets.form import Field, Form, FormSheet

if TYPE_CHECKING:
    from collections.abc import Sequence

    from tui.pages.desk import Desk

_UNNAMED = "passage"


def write_asking(desk: Desk, what: str, ending: str, data: bytes) -> None:
    """Ask where to write something, and write it there.

    Args:
        desk: Where it is asked and said.
        what: Such as "leg table".
        ending: What follows the plan's name in the usual file, such as ".pdf".
        data: What is written.
    """
    plan_path = desk.session.path
    folder, stem = (plan_path.parent, plan_path.stem) if plan_path else (Path.cwd(), _UNNAMED)
    usual = folder / f"{stem}{ending}"

    def filled(texts: Sequence[str] | None) -> None:
        if texts is not None:
            _put(desk, what, path_typed(field, texts[0], usual), data)

    field = Field("file", visible(str(usual)), str, "Enter writes it there; its folder must exist")
    desk.push_screen(Form(FormSheet(f"Write the {what}", (field,), lambda _: None)), filled)


def _put(desk: Desk, what: str, path: Path, data: bytes) -> None:
    if not path.exists():
        _put_now(desk, what, path, data)
        return

    def answered(key: str | None) -> None:
        if key == "o":
            _put_now(desk, what, path, data)

    answers = (Answer("o", "overwrite it"), Answer("k", "keep it"))
    desk.push_screen(Question(f"{visible(path.name)} is there already", [], answers), answered)


def _put_now(desk: Desk, what: str, path: Path, data: bytes) -> None:
    try:
        write_whole(path, data)
    except OSError as error:
        desk.say(f"{path}: {error.strerror or error}; nothing was written", alert=True)
    else:
        desk.say(f"{what} written to {path.absolute()}")
