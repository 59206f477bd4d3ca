"""What a row says while it is typed: the position in full and the leg that would come of it, or what is wrong."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.errors import ParseError
from navcore.plan.entry import FORMS, read_entry
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.quantities import QUANTITIES
from navcore.plan.solve import solve
from navcore.text.direction import format_direction
from navcore.text.plain import cell_width, fit, pad, visible
from navcore.text.position import format_position
from navcore.text.wrap import wrap
from tui.present.tone import Piece, Tone, line

if TYPE_CHECKING:
    from navcore.plan.entry import Entry
    from tui.present.tone import Line as ShownLine

_LABEL = 14


def echo(text: str, plan: Plan, index: int, width: int, *, changes: bool = False) -> list[ShownLine]:
    """Return what is said of a row as typed so far.

    Args:
        text: What was typed.
        plan: The plan that it goes into.
        index: The index that the waypoint gets, or has.
        width: Cells of a line.
        changes: Whether it takes the place of the waypoint there.
    """
    if not text.strip():
        return [line(Piece(part, Tone.QUIET)) for part in wrap(FORMS, width)]
    try:
        entry = read_entry(text, plan, index)
    except ParseError as error:
        return _refusal(error, width)
    return [_where(entry, plan, index, width, changes=changes), *_leg(entry, plan, index, width)]


def _refusal(error: ParseError, width: int) -> list[ShownLine]:
    """Point at what is wrong and say what to type."""
    room = max(width - 1, 1)
    before = min(len(visible(error.text[: error.start])), room)
    marks = "^" * max(len(visible(error.text[error.start : error.end])), 1)
    pointing = line(Piece(fit(" " * before + marks, width), Tone.ALERT))
    reason = [line(Piece(part, Tone.ALERT)) for part in wrap(error.reason, width)]
    return [pointing, *reason, *(line(Piece(part)) for part in wrap(error.advice, width))]


def _where(entry: Entry, plan: Plan, index: int, width: int, *, changes: bool) -> ShownLine:
    name = entry.name
    if name is None and changes:
        name = plan.waypoints[index].name
    position = format_position(entry.position)
    rest = visible(name) if name else ""
    if entry.start is not None and entry.line is not None:
        start = visible(entry.start.name) or "the waypoint above"
        rest = f"{rest}  by {entry.line.value} from {start}".strip()
    return line(Piece(position, Tone.STRONG), Piece(fit(f"  {rest}".rstrip(), max(width - len(position), 0))))


def _leg(entry: Entry, plan: Plan, index: int, width: int) -> list[ShownLine]:
    """Return the leg from the waypoint above by both lines."""
    if index == 0:
        return [line(Piece("the first waypoint", Tone.QUIET))]
    above = plan.waypoints[index - 1]
    two = Plan((above, Waypoint("", entry.position)), (Leg(),), trade=plan.trade, figure=plan.figure)
    solution = solve(two)
    worked = solution.legs[0].worked
    rhumb = QUANTITIES["rhumb_line_nmi"].shown(solution, 0)
    circle = QUANTITIES["great_circle_nmi"].shown(solution, 0)
    cells = max(len(rhumb), len(circle))
    courses = (
        format_direction(worked.rhumb_course_deg),
        f"{format_direction(worked.initial_course_deg)} → {format_direction(worked.final_course_deg)}",
    )
    saving = (
        f"saves {QUANTITIES['saving_nmi'].shown(solution, 0)} NM, {QUANTITIES['saving_percent'].shown(solution, 0)} %"
    )
    usual = two.line_of(Leg())
    lines = []
    for shown, distance, course in zip((Line.RHUMB, Line.GREAT_CIRCLE), (rhumb, circle), courses, strict=True):
        text = f"{pad(distance, cells, 'right')} NM  {course}"
        if shown is Line.GREAT_CIRCLE and _LABEL + len(text) + 3 + len(saving) <= width:
            text += f"   {saving}"
        tone = Tone.PLAIN if shown is usual else Tone.QUIET
        if _LABEL + cell_width(text) > width:
            text, rest = text.split("  ", 1)
            lines.append(line(Piece(pad(shown.value, _LABEL), tone), Piece(text, tone)))
            lines.append(line(Piece(f"  {rest}", tone)))
            continue
        lines.append(line(Piece(pad(shown.value, _LABEL), tone), Piece(text, tone)))
    return lines
