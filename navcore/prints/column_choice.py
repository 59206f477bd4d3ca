"""The columns of one print: the trade's own, those that the plan adds, and those that were asked for by name."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.errors import ParseError
from navcore.plan.quantities import QUANTITIES, rows_of, typed_columns, typed_quantity
from navcore.prints.columns import LEG_TABLE, PAPER, Column
from navcore.text.plain import visible

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

    from navcore.plan.solve import Solution

ONLY = "only:"
"""Before the names, it leaves out the trade's own columns."""

_ALWAYS = frozenset({"number", "name", "lat_deg", "lon_deg"})
"""Common practice: a name never stands without its position."""

_ADDED_NEED = 2
_WHERE_FILLED_NEED = 3


def screen_columns(solution: Solution, names: str = "") -> tuple[Column, ...]:
    """Return the columns of a leg table that is no paper, those asked for by name added.

    Raises:
        ParseError: A name that no column has.
    """
    asked = _asked(solution, names)
    if names.startswith(ONLY):
        return tuple(_only(LEG_TABLE, asked))
    return _added(LEG_TABLE, asked)


def paper_columns(solution: Solution, *, landscape: bool, names: str = "") -> tuple[Column, ...]:
    """Return the columns of a leg table on paper: the trade's, the officer's own, and those asked for by name.

    Raises:
        ParseError: A name that no column has.
    """
    trade = solution.plan.trade
    asked = _asked(solution, names)
    if names.startswith(ONLY):
        return tuple(_only(PAPER[trade], asked))
    added = [*map(_named_in_plan, typed_columns(solution)), *asked]
    headings = {column.first.heading(trade).casefold() for column in added}
    usual = (column for column in PAPER[trade] if _stands(column, solution, landscape=landscape))
    kept = (column for column in usual if not (column.to_write and column.to_write.heading.casefold() in headings))
    return _added(kept, added)


def _stands(column: Column, solution: Solution, *, landscape: bool) -> bool:
    if column.need < _WHERE_FILLED_NEED:
        return landscape or column.need == 1
    return any(column.first.shown(solution, index) for index in rows_of(column.row, solution))


def _named_in_plan(name: str) -> Column:
    key = name if name in QUANTITIES else typed_quantity(name).key
    return Column((key,), _ADDED_NEED)


def _only(usual: Iterable[Column], asked: Iterable[Column]) -> Iterator[Column]:
    yield from (column for column in usual if _ALWAYS.issuperset(column.keys) and column.keys)
    yield from (column for column in asked if not _ALWAYS.issuperset(column.keys))


def _added(usual: Iterable[Column], added: Iterable[Column]) -> tuple[Column, ...]:
    columns = list(usual)
    shown = {key for column in columns for key in column.keys}
    for column in added:
        if not shown.issuperset(column.keys):
            columns.append(column)
            shown.update(column.keys)
    return tuple(columns)


def _asked(solution: Solution, names: str) -> list[Column]:
    columns: list[Column] = []
    listed = names.removeprefix(ONLY)
    start = len(names) - len(listed)
    for name in listed.split(",") if listed.strip() else ():
        found = _matching(solution, name.strip())
        if not found:
            reason = f"no column is called “{visible(name.strip())}”"
            raise ParseError(names, (start, start + len(name)), reason, _advice(solution))
        columns += found
        start += len(name) + 1
    return columns


def _matching(solution: Solution, name: str) -> list[Column]:
    """Return the columns with that key or heading: two quantities may share a heading, and then both are meant."""
    own = [column for column in typed_columns(solution) if column.casefold() == name.casefold()]
    if own:
        return [Column((typed_quantity(column).key,), _ADDED_NEED) for column in own]
    if name in QUANTITIES:
        return [Column((name,), _ADDED_NEED)]
    trade = solution.plan.trade
    return [
        Column((key,), _ADDED_NEED)
        for key, quantity in QUANTITIES.items()
        if quantity.heading(trade).casefold() == name.casefold()
    ]


def _advice(solution: Solution) -> str:
    own = ", ".join(visible(column) for column in typed_columns(solution))
    besides = f"; this plan's own: {own}" if own else ""
    return f"type names with commas between them, from: {', '.join(QUANTITIES)}{besides}"
