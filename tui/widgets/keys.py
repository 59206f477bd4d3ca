"""The keys of a place, from the table of commands."""

from __future__ import annotations

from typing import TYPE_CHECKING

from textual.binding import Binding

from tui.commands import commands_of

if TYPE_CHECKING:
    from textual.binding import BindingType

    from tui.commands import Where

_BOUND_BY_TEXTUAL = frozenset({"palette"})


def bindings_of(where: Where) -> list[BindingType]:
    """Return the bindings of every command that works there; each runs the app's action `do` with its id."""
    return [
        Binding(",".join(command.keys), f"app.do('{command.id}')", command.words, show=False)
        for command in commands_of(where)
        if command.keys and command.id not in _BOUND_BY_TEXTUAL
    ]
