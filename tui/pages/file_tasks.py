"""What is done with the plan as a whole: opened, saved, left, undone. Each is one command, on every page."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from navcore.errors import NavError
from navcore.prints.caution import CAUTION
from navcore.text.plain import visible
from tui.pages.forms import plan_sheet
from tui.pages.opening import DIALOG_CELLS, open_path, said_of, welcome
from tui.present.key_list import key_lines
from tui.session import ChangedOnDiskError, NoFileError, WouldOverwriteError
from tui.widgets.dialogs import Answer, Question, Reading
from tui.widgets.file_choice import FileChoice
from tui.widgets.form import Field, Form, FormSheet

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping, Sequence

    from tui.pages.desk import Desk

_SUFFIX = ".toml"


def _if_kept(desk: Desk, then: Callable[[], None], leaving: str) -> None:
    """Go on at once where nothing is lost by it, else ask first."""
    if not desk.session.is_changed:
        then()
        return
    answers = (
        Answer("s", f"save, then {leaving}"),
        Answer("d", f"{leaving} without saving: the changes are gone"),
        Answer("k", "keep working"),
    )

    def answered(key: str | None) -> None:
        if key == "s":
            save(desk, then)
        elif key == "d":
            then()

    desk.push_screen(Question("The plan has changes that are not saved", [], answers), answered)


def save(desk: Desk, then: Callable[[], None] | None = None) -> None:
    """Write the plan to its file; ask where it has none, or where someone else has changed it."""
    try:
        desk.session.save()
    except NoFileError:
        _save_as(desk, then)
    except ChangedOnDiskError:
        _ask_over_others(desk, then)
    except OSError as error:
        desk.say(f"not saved: {error.strerror or error}", alert=True)
    else:
        _saved(desk, then)


def _saved(desk: Desk, then: Callable[[], None] | None) -> None:
    desk.renew()
    desk.say(f"saved in {desk.session.path}")
    if then is not None:
        then()


def _ask_over_others(desk: Desk, then: Callable[[], None] | None) -> None:
    words = said_of("Someone else has written or removed the file since it was read here. Nothing was saved.")
    answers = (
        Answer("a", "save under another name"),
        Answer("o", "overwrite what they wrote"),
        Answer("k", "keep working"),
    )

    def answered(key: str | None) -> None:
        if key == "a":
            _save_as(desk, then)
        elif key == "o":
            _save_over(desk, then)

    desk.push_screen(Question("The file is not the one that was read", words, answers), answered)


def _save_over(desk: Desk, then: Callable[[], None] | None) -> None:
    try:
        desk.session.save(over_others=True)
    except OSError as error:
        desk.say(f"not saved: {error.strerror or error}", alert=True)
    else:
        _saved(desk, then)


def _save_as(desk: Desk, then: Callable[[], None] | None = None) -> None:
    path = desk.session.path
    usual = path or Path.cwd() / f"{_file_name(desk.session.plan.title)}{_SUFFIX}"

    def filled(texts: Sequence[str] | None) -> None:
        if texts is not None:
            _save_there(desk, path_typed(field, texts[0], usual), then)

    field = Field("file", visible(str(usual)), str, "Enter saves it there; its folder must exist")
    desk.push_screen(Form(FormSheet("Save the plan", (field,), lambda _: None)), filled)


def path_typed(field: Field, text: str, usual: Path) -> Path:
    """Return the path that a field says; the usual one where it was not touched, whatever characters that has."""
    return usual if text == field.text else Path(text.strip()).expanduser()


def _file_name(title: str) -> str:
    plain = "".join(letter if letter.isalnum() else "_" for letter in title.strip().lower())
    return "_".join(part for part in plain.split("_") if part)[:60] or "passage"


def _save_there(desk: Desk, path: Path, then: Callable[[], None] | None, *, over: bool = False) -> None:
    if path.exists() and not path.is_file():
        desk.say(f"not saved: {path} is no plain file; type the name of one", alert=True)
        return
    try:
        desk.session.save_as(path, over_others=over)
    except WouldOverwriteError:
        answers = (Answer("o", "overwrite it"), Answer("k", "keep it"))

        def answered(key: str | None) -> None:
            if key == "o":
                _save_there(desk, path, then, over=True)

        desk.push_screen(Question(f"{visible(path.name)} is there already", [], answers), answered)
    except OSError as error:
        desk.say(f"not saved: {path}: {error.strerror or error}", alert=True)
    else:
        _saved(desk, then)


def choose_file(desk: Desk, chosen: Callable[[Path | None], None]) -> None:
    """Ask for the file of a plan: one of last time, or any other."""
    folder = desk.session.path.parent if desk.session.path else Path.cwd()
    desk.push_screen(FileChoice(folder, desk.session.state.recent()), chosen)


def _open(desk: Desk) -> None:
    def chosen(path: Path | None) -> None:
        if path is not None:
            open_path(desk, path)

    _if_kept(desk, lambda: choose_file(desk, chosen), "open another")


def _new(desk: Desk) -> None:
    def begin() -> None:
        desk.session.new()
        desk.renew()
        welcome(desk)

    _if_kept(desk, begin, "begin a new one")


def _revert(desk: Desk) -> None:
    try:
        desk.session.revert()
    except NoFileError:
        desk.say("the plan was never saved: there is no file to go back to", alert=True)
    except (NavError, OSError) as error:
        desk.say(str(error), alert=True)
    else:
        desk.renew()
        desk.say("gone back to the file · z brings your changes back")


def _undo(desk: Desk) -> None:
    name = desk.session.undo()
    desk.renew()
    desk.say(f"taken back: {name} · y makes it again" if name else "there is nothing to take back")


def _redo(desk: Desk) -> None:
    name = desk.session.redo()
    desk.renew()
    desk.say(f"made again: {name}" if name else "there is nothing to make again")


def _particulars(desk: Desk) -> None:
    sheet, made = plan_sheet(desk.session.plan)

    def filled(texts: Sequence[str] | None) -> None:
        if texts is not None:
            desk.commit("change the particulars", lambda _: made(texts))

    desk.push_screen(Form(sheet), filled)


def _quit(desk: Desk) -> None:
    _if_kept(desk, desk.exit, "leave")


def _help(desk: Desk) -> None:
    cells = min(DIALOG_CELLS, desk.size.width - 8)
    desk.push_screen(Reading("Keys", [*key_lines(cells), *said_of(CAUTION, cells)]))


def _caution(desk: Desk) -> None:
    desk.push_screen(Reading("Caution", said_of(CAUTION, min(DIALOG_CELLS, desk.size.width - 8))))


TASKS: Mapping[str, Callable[[Desk], None]] = {
    "save": save,
    "save.as": _save_as,
    "open": _open,
    "new": _new,
    "revert": _revert,
    "undo": _undo,
    "redo": _redo,
    "plan": _particulars,
    "quit": _quit,
    "help": _help,
    "caution": _caution,
}
