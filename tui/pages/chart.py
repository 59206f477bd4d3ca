"""The Chart page: the plan on a projection, the cross that reads it, and what is read below."""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar

from textual import on
from textual.widgets import Static

from navcore.charts.choice import SheetKind
from navcore.errors import NoAnswerError
from tui.commands import Where
from tui.pages import chart_tasks
from tui.pages.desk import Page
from tui.present.chart_picture import Shown, picture
from tui.present.chart_scene import Scene, coverage, first_kind, projection_of
from tui.present.chart_view import View, fitted
from tui.present.chart_words import readout
from tui.present.tone import content
from tui.widgets.chart_canvas import ChartCanvas
from tui.widgets.keys import bindings_of

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    from textual.app import ComposeResult
    from textual.binding import BindingType

    from tui.history import History

_SHORE_AFTER_S = 0.001
"""The shore follows the first picture on a projection, because laying it off takes longer than a key may."""

_ROLL = 2.0


class ChartPage(Page, can_focus=True):
    """The plan on a chart.

    Attributes:
        kind: Which projection.
        shown: What is shown besides the plan.
        is_fitted: Whether the whole plan is shown because nothing else was asked for.
    """

    BINDINGS: ClassVar[list[BindingType]] = bindings_of(Where.CHART)
    where = Where.CHART
    tasks: ClassVar[Mapping[str, Callable[..., None]]] = chart_tasks.TASKS

    def __init__(self) -> None:
        super().__init__()
        self.kind = SheetKind.MERCATOR
        self.shown = Shown()
        self.is_fitted = True
        self._view: View | None = None
        self._scene: Scene | None = None
        self._history: History | None = None

    def compose(self) -> ComposeResult:
        """The chart, and what is read."""
        yield ChartCanvas()
        yield Static(id="chart-words", markup=False)

    @property
    def view(self) -> View | None:
        """What is seen; None before there is room to show anything."""
        return self._view

    def take_focus(self) -> None:
        """Have the keys."""
        self.focus()

    def show(self) -> None:
        """Show the plan as it stands: whole where it was shown whole, and where another one was opened."""
        columns, rows = self.query_one(ChartCanvas).size
        if not columns or not rows:
            return
        if self._history is not self.session.history:
            self._history = self.session.history
            self.kind = first_kind(self.session.solution)
            self.fit_plan()
        elif self.is_fitted or self._view is None:
            self.fit_plan()
        else:
            self.look_at(self._view.resized(columns, rows))

    def fit_plan(self) -> None:
        """Show the whole plan, on a projection that suits it."""
        solution = self.session.solution
        try:
            projection = projection_of(solution, self.kind)
        except NoAnswerError:
            self.kind = first_kind(solution)
            projection = projection_of(solution, self.kind)
        self.look_at(fitted(projection, coverage(solution), *self.query_one(ChartCanvas).size), is_fitted=True)

    def fit_leg(self, leg: int) -> None:
        """Show a whole leg, on the projection there is."""
        if self._view is not None:
            size = self.query_one(ChartCanvas).size
            self.look_at(fitted(self._view.projection, coverage(self.session.solution, leg), *size))

    def look_at(self, view: View, *, is_fitted: bool = False) -> None:
        """Show what a view is of."""
        self._view, self.is_fitted = view, is_fitted
        self.draw()

    def draw(self) -> None:
        """Draw what is seen, and read the cross."""
        view, solution, row = self._view, self.session.solution, self.session.row
        if view is None:
            return
        scene = self._scene
        if scene is None or scene.solution is not solution or scene.projection != view.projection:
            self._scene = scene = Scene(solution, view.projection, scene)
        self.query_one(ChartCanvas).show(picture(scene, view, row, self.shown).lines())
        self.query_one("#chart-words", Static).update(
            content(readout(solution, view, row, view.columns - 2)), layout=False
        )
        if self.shown.shore and scene.laid_shore is None:
            self.set_timer(_SHORE_AFTER_S, self._lay_shore)

    def _lay_shore(self) -> None:
        if self._scene is not None and self._scene.laid_shore is None:
            self._scene.lay_shore()
            self.draw()

    def _on_resize(self) -> None:
        self.call_after_refresh(self.show)

    @on(ChartCanvas.Pointed)
    def _pointed(self, event: ChartCanvas.Pointed) -> None:
        if self._view is not None:
            column, row = self._view.cross
            chart_tasks.move(self, event.column - column, row - event.row)

    @on(ChartCanvas.Rolled)
    def _rolled(self, event: ChartCanvas.Rolled) -> None:
        if self._view is not None:
            self.look_at(self._view.zoomed(_ROLL if event.up else 1.0 / _ROLL))
