"""What is done on the Chart page, each by one command."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.charts.choice import SheetKind
from navcore.errors import NoAnswerError
from navcore.plan.edit import insert_waypoint
from navcore.plan.model import Waypoint
from navcore.text.position import format_position, parse_position
from tui.pages import passage_tasks
from tui.present.chart_scene import projection_of
from tui.present.dots import ACROSS, DOWN
from tui.present.rows import leg_of, place_below, row_count, row_of_waypoint, waypoint_before

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    from tui.pages.chart import ChartPage

_STEPS_UP, _STEPS_ACROSS = 6, 20
"""An arrow goes so far that the chart is crossed in at least so many; as far across as up."""

_NEARER = 2.0


def move(page: ChartPage, columns: int, rows: int) -> None:
    """Move the cross so many cells to the right and up, the chart under it."""
    view = page.view
    if view is None:
        return
    moved = view.moved(columns, rows)
    if moved is None:
        page.desk.say("the chart ends there", alert=True)
        return
    page.look_at(moved)


def _step(page: ChartPage, right: int, up: int) -> None:
    if page.view is not None:
        step = max(min(page.view.rows // _STEPS_UP, page.view.columns // _STEPS_ACROSS), 1)
        move(page, right * step * DOWN // ACROSS, up * step)


def _zoom(page: ChartPage, factor: float) -> None:
    if page.view is None:
        return
    zoomed = page.view.zoomed(factor)
    if zoomed == page.view:
        page.desk.say("nearer than this the chart shows nothing more" if factor > 1.0 else "that is as wide as it goes")
        return
    page.look_at(zoomed)


def _fit_leg(page: ChartPage) -> None:
    leg = leg_of(page.session.plan, page.session.row)
    if leg is None:
        page.desk.say(passage_tasks.NO_LEG, alert=True)
    else:
        page.fit_leg(leg)


def _to_waypoint(page: ChartPage) -> None:
    plan = page.session.plan
    index = waypoint_before(plan, page.session.row)
    if index is not None and page.view is not None:
        page.look_at(page.view.centred(plan.waypoints[index].position))


def _go(page: ChartPage, rows: int) -> None:
    """Go so many rows on; where the waypoint is not seen, the chart comes to it."""
    session = page.session
    session.row = min(max(session.row + rows, 0), row_count(session.plan) - 1)
    index = waypoint_before(session.plan, session.row)
    if page.view is None or index is None or page.view.holds(session.plan.waypoints[index].position):
        page.draw()
    else:
        _to_waypoint(page)


def _next_projection(page: ChartPage) -> None:
    kinds = list(SheetKind)
    refused = []
    at = kinds.index(page.kind)
    for kind in (*kinds[at + 1 :], *kinds[:at]):
        try:
            projection = projection_of(page.session.solution, kind)
        except NoAnswerError:
            refused.append(kind.value)
            continue
        page.kind = kind
        if page.view is None or page.is_fitted:
            page.fit_plan()
        else:
            page.look_at(page.view.on(projection))
        break
    cannot = f"; this plan can't be shown on {', '.join(refused)}" if refused else ""
    name = page.kind.value if page.view is None else page.view.projection.name
    page.desk.say(f"{name}{cannot}")


def _add(page: ChartPage) -> None:
    """Add a waypoint at the cross, with the position that is read there and no other; the cross is put right on it."""
    position = page.view.position if page.view is not None else None
    if page.view is None or position is None:
        page.desk.say("nothing of the Earth is under the cross", alert=True)
        return
    read = parse_position(format_position(position))
    index = place_below(page.session.plan, page.session.row)
    if index and page.session.plan.waypoints[index - 1].position == read:
        page.desk.say(f"waypoint {index} is there already: move the cross first", alert=True)
        return
    page.look_at(page.view.centred(read))
    name = f"add waypoint {index + 1} at the cross"
    page.desk.commit(name, lambda plan: insert_waypoint(plan, index, Waypoint("", read)), row_of_waypoint(index))


def _toggle_shore(page: ChartPage) -> None:
    page.shown = page.shown._replace(shore=not page.shown.shore)
    page.draw()
    page.desk.say("shore shown, not for navigation" if page.shown.shore else "shore left out")


def _toggle_lines(page: ChartPage) -> None:
    page.shown = page.shown._replace(other_lines=not page.shown.other_lines)
    page.draw()
    page.desk.say("both lines of the leg" if page.shown.other_lines else "the line that is sailed alone")


TASKS: Mapping[str, Callable[..., None]] = {
    "chart.left": lambda page: _step(page, -1, 0),
    "chart.right": lambda page: _step(page, 1, 0),
    "chart.up": lambda page: _step(page, 0, 1),
    "chart.down": lambda page: _step(page, 0, -1),
    "chart.left.little": lambda page: move(page, -1, 0),
    "chart.right.little": lambda page: move(page, 1, 0),
    "chart.up.little": lambda page: move(page, 0, 1),
    "chart.down.little": lambda page: move(page, 0, -1),
    "nearer": lambda page: _zoom(page, _NEARER),
    "wider": lambda page: _zoom(page, 1.0 / _NEARER),
    "fit.plan": lambda page: page.fit_plan(),
    "fit.leg": _fit_leg,
    "to.waypoint": _to_waypoint,
    "row.next": lambda page: _go(page, 1),
    "row.back": lambda page: _go(page, -1),
    "projection": _next_projection,
    "chart.add": _add,
    "chart.line": passage_tasks.TASKS["line"],
    "chart.delete": passage_tasks.TASKS["delete"],
    "shore": _toggle_shore,
    "other.lines": _toggle_lines,
}
