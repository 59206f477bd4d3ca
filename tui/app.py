"""The workbook: pages over one plan, the keys, the lights, and the question before it is left."""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar

from textual.command import DiscoveryHit, Hit, Provider
from textual.containers import Container

from tui.commands import COMMANDS, Where
from tui.pages.desk import Desk, Page
from tui.pages.opening import tell_failure, try_to_open, welcome
from tui.pages.passage import PassagePage
from tui.present.lights import LIGHTS, NIGHT, NightFilter
from tui.widgets.bars import KeyBar, SaidLine, TitleBar
from tui.widgets.keys import bindings_of

if TYPE_CHECKING:
    from collections.abc import Callable, Sequence
    from pathlib import Path

    from textual.app import ComposeResult
    from textual.binding import BindingType
    from textual.command import Hits
    from textual.filter import LineFilter

    from navcore.errors import PlanFileError
    from tui.commands import Command
    from tui.session import Session


def _chart_page() -> type[Page]:
    from tui.pages.chart import ChartPage

    return ChartPage


def _print_page() -> type[Page]:
    from tui.pages.prints import PrintPage

    return PrintPage


PAGES: dict[str, Callable[[], type[Page]]] = {
    "passage": lambda: PassagePage,
    "chart": _chart_page,
    "print": _print_page,
}
"""Command and page, in the order of their keys; a page joins by a line here and one in the table of commands."""

_KEEP_TYPING_S = 0.3
_WHILE_TYPING = frozenset({"save", "help", "caution", "quit", "theme"})


class CommandProvider(Provider):
    """The table of commands, for the palette."""

    async def discover(self) -> Hits:
        """Yield every command that can be run here."""
        for command in self._commands():
            yield DiscoveryHit(_shown(command), self._runner(command), help=command.does)

    async def search(self, query: str) -> Hits:
        """Yield the commands whose words match."""
        matcher = self.matcher(query)
        for command in self._commands():
            score = matcher.match(f"{command.words} {command.does}")
            if score > 0:
                yield Hit(score, _shown(command), self._runner(command), help=command.does)

    def _commands(self) -> list[Command]:
        places = {Where.EVERYWHERE}
        if isinstance(self.app, Workbook):
            places.add(self.app.page.where)
        return [command for command in COMMANDS if command.runs and command.where in places]

    def _runner(self, command: Command) -> Callable[[], None]:
        def run() -> None:
            self.app.call_later(self.app.run_action, f"do('{command.id}')")

        return run


def _shown(command: Command) -> str:
    return f"{command.words}   {command.keys_shown}"


class Workbook(Desk):
    """The workbook."""

    TITLE = "legbook"
    CSS_PATH = "styles/workbook.tcss"
    COMMANDS: ClassVar[set[type[Provider] | Callable[[], type[Provider]]]] = {CommandProvider}
    BINDINGS: ClassVar[list[BindingType]] = bindings_of(Where.EVERYWHERE)
    AUTO_FOCUS = None

    def __init__(self, session: Session, path: Path | None = None) -> None:
        super().__init__(session)
        self._path = path
        self._failure: PlanFileError | OSError | None = None
        self._seen = next(iter(PAGES))
        self._night = NightFilter()
        for light in LIGHTS:
            self.register_theme(light)
        self.theme = LIGHTS[1].name

    def compose(self) -> ComposeResult:
        """The title, the first page, and the foot; other pages come when they are turned to."""
        yield TitleBar()
        with Container(id="pages"):
            yield PAGES[self._seen]()()
        yield SaidLine()
        yield KeyBar()

    def on_load(self) -> None:
        """Open the plan that was named, or an empty one, before anything is painted."""
        self._failure = None if self._path is None else try_to_open(self.session, self._path)
        if self._path is None or self._failure is not None:
            self.session.new()

    def on_mount(self) -> None:
        """Show the plan, and say what must be said of it."""
        self.set_interval(_KEEP_TYPING_S, self.session.keep_typing)
        self.renew()
        welcome(self)
        if self._path is not None and self._failure is not None:
            tell_failure(self, self._path, self._failure)

    def on_resize(self) -> None:
        """Fit the bars to the new width."""
        self.show_bars()

    @property
    def page(self) -> Page:
        """The page that is seen."""
        return self.screen_stack[0].query_one(PAGES[self._seen]())

    def tabs(self) -> list[tuple[str, str, bool]]:
        """Return key, name and whether it is seen, of each page."""
        keys = {command.id: command.keys[0] for command in COMMANDS if command.keys}
        return [(keys[name], name.capitalize(), name == self._seen) for name in PAGES]

    def get_line_filters(self) -> Sequence[LineFilter]:
        """Return what every line goes through before it is painted; by night, all of it is reddened."""
        filters = super().get_line_filters()
        return [*filters, self._night] if self.theme == NIGHT and not self.no_color else filters

    def do(self, command_id: str) -> None:
        """Do what a command says, before anything else is."""
        if self.page.is_typing and command_id not in _WHILE_TYPING:
            self.say("a row is open: Enter takes it, Esc leaves it", alert=True)
        elif command_id in PAGES:
            if command_id != self._seen:
                self.run_worker(self._turn_to(command_id))
        elif command_id == "page.next":
            names = list(PAGES)
            self.run_worker(self._turn_to(names[(names.index(self._seen) + 1) % len(names)]))
        elif command_id == "palette":
            self.action_command_palette()
        elif command_id == "theme":
            self._next_light()
        elif command_id in self.page.tasks:
            self.page.tasks[command_id](self.page)
        else:
            self._do_task(command_id)

    def action_do(self, command_id: str) -> None:
        """Do what a command says."""
        self.do(command_id)

    def _do_task(self, command_id: str) -> None:
        from tui.pages.file_tasks import TASKS

        TASKS[command_id](self)

    async def action_quit(self) -> None:
        """Leave; with changes that are not saved, ask first."""
        self._do_task("quit")

    def on_unmount(self) -> None:
        """Let go of the plan."""
        self.session.close()

    async def _turn_to(self, name: str) -> None:
        self.page.display = False
        self._seen = name
        if not self.screen_stack[0].query(PAGES[name]()):
            await self.screen_stack[0].query_one("#pages").mount(PAGES[name]()())
        self.page.display = True
        self.renew()
        self.page.take_focus()

    def _next_light(self) -> None:
        names = [light.name for light in LIGHTS]
        at = names.index(self.theme) if self.theme in names else -1
        self.theme = names[(at + 1) % len(names)]
        self.say(f"{self.theme} light")
