"""What every page stands on: the session, one way to change it, and one line to say what was done."""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar

from textual.app import App
from textual.widget import Widget

from navcore.errors import NavError
from tui.commands import Where
from tui.widgets.bars import KeyBar, SaidLine, TitleBar

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    from navcore.plan.model import Plan
    from tui.session import Session

UNTITLED = "New passage"


class Page(Widget):
    """One page of the workbook.

    Attributes:
        where: Which commands are its own.
        tasks: What each of those does.
    """

    where: ClassVar[Where]
    tasks: ClassVar[Mapping[str, Callable[..., None]]]

    @property
    def desk(self) -> Desk:
        """What the page stands on."""
        app = self.app
        if not isinstance(app, Desk):
            message = f"a page stands on a Desk, not on {type(app).__name__}"
            raise TypeError(message)
        return app

    @property
    def session(self) -> Session:
        """The open plan."""
        return self.desk.session

    @property
    def places(self) -> tuple[Where, ...]:
        """Whose keys stand in the footer now."""
        return (self.where, Where.EVERYWHERE)

    @property
    def is_typing(self) -> bool:
        """Whether a row is open, so that nothing else may change the plan."""
        return False

    def show(self) -> None:
        """Show the plan as it stands."""

    def take_focus(self) -> None:
        """Have the keys."""


class Desk(App[None]):
    """The workbook without its commands: a session, and the pages over it."""

    def __init__(self, session: Session) -> None:
        super().__init__()
        self.session = session

    @property
    def page(self) -> Page:
        """The page that is seen."""
        raise NotImplementedError

    def do(self, command_id: str) -> None:
        """Do what a command says, before anything else is."""
        raise NotImplementedError

    def commit(self, name: str, edit: Callable[[Plan], Plan], row: int | None = None) -> bool:
        """Make a change and show it; one that the plan does not allow is said, and False returned."""
        try:
            changed = self.session.change(name, edit, row)
        except NavError as error:
            self.say(str(error), alert=True)
            return False
        if changed:
            self.say(f"{name} · z takes it back")
        self.renew()
        return True

    def renew(self) -> None:
        """Show the plan as it stands, everywhere."""
        self.page.show()
        self.show_bars()
        if self.session.recovery.trouble:
            self.say(f"changes are not kept against a crash: {self.session.recovery.trouble}", alert=True)

    def show_bars(self) -> None:
        """Show the title, the pages and the keys of the moment."""
        session = self.session
        self.query_one(TitleBar).show(
            session.plan.title or UNTITLED,
            session.path.name if session.path else "",
            is_changed=session.is_changed,
            pages=self.tabs(),
        )
        self.query_one(KeyBar).show(self.page.places)

    def tabs(self) -> list[tuple[str, str, bool]]:
        """Return key, name and whether it is seen, of each page."""
        raise NotImplementedError

    def say(self, words: str, *, alert: bool = False) -> None:
        """Say what was done, or why it could not be."""
        self.query_one(SaidLine).say(words, alert=alert)
