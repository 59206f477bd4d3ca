"""Every command once: its words, its keys, where it works and what it does. Footer, palette, help and README read this.

Keys that do not arrive on common terminals are not used: no ctrl+i, ctrl+m, ctrl+h, ctrl+j, no alt, no ctrl with shift.
"""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum

KEY_WORDS = {
    "question_mark": "?",
    "exclamation_mark": "!",
    "less_than_sign": "<",
    "greater_than_sign": ">",
    "escape": "Esc",
    "enter": "Enter",
    "tab": "Tab",
    "delete": "Del",
    "insert": "Ins",
    "up": "↑",
    "down": "↓",
    "left": "←",
    "right": "→",
    "plus": "+",
    "equals_sign": "=",
    "minus": "-",
    "pageup": "PgUp",
    "pagedown": "PgDn",
    "home": "Home",
    "end": "End",
    "f1": "F1",
    "f2": "F2",
    "f3": "F3",
    "f7": "F7",
}
"""How a key is written for people; any other as it is, Ctrl before it."""


class Where(StrEnum):
    """Where a command works."""

    PASSAGE = "Passage page"
    ROW = "In an open row"
    CHART = "Chart page"
    PRINT = "Print page"
    EVERYWHERE = "Everywhere"


@dataclass(frozen=True, slots=True)
class Command:
    """One thing that can be done.

    Attributes:
        id: Its name in the code.
        words: What it is called, in two or three words.
        keys: Its keys, the one to show first; an empty tuple for the palette alone.
        where: Where it works.
        does: What it does, in one line.
        foot: Its word in the footer; "" where it does not stand there. The footer shows as many as fit, in this order.
        runs: Whether the palette can run it; moves of the cursor are only told.
    """

    id: str
    words: str
    keys: tuple[str, ...]
    where: Where
    does: str
    foot: str = ""
    runs: bool = True

    @property
    def keys_shown(self) -> str:
        """Its keys as written for people, such as Ctrl+Z or z."""
        return " or ".join(key_shown(key) for key in self.keys)


def key_shown(key: str) -> str:
    """Return a key as it is written for people."""
    if key.startswith("ctrl+"):
        return f"Ctrl+{key[5:].upper()}"
    if key.startswith("shift+"):
        return f"Shift+{KEY_WORDS[key[6:]]}"
    return KEY_WORDS.get(key, key)


_P, _R, _C, _E, _T = Where.PASSAGE, Where.ROW, Where.CHART, Where.EVERYWHERE, Where.PRINT

COMMANDS: tuple[Command, ...] = (
    Command("row.take", "Take the row", ("enter",), _R, "takes it and opens the next row", "take it", runs=False),
    Command("row.leave", "Leave the row", ("escape",), _R, "closes the row; nothing is changed", "leave", runs=False),
    Command("edit", "Change", ("enter",), _P, "changes the waypoint or leg under the cursor in its place", "change"),
    Command("add.below", "Add below", ("a", "insert"), _P, "opens a row below; typing a figure does the same", "add"),
    Command("line", "Line", ("l",), _P, "sails the leg by the next line: rhumb line, great circle", "line"),
    Command("margin", "Working", ("m",), _P, "shows or folds the working of the leg beside the page", "working"),
    Command("undo", "Undo", ("z", "ctrl+z"), _E, "takes the last change back", "undo"),
    Command("delete", "Delete", ("d", "delete"), _P, "takes the waypoint out; the later leg's choices stay", "delete"),
    Command("add.above", "Add above", ("A",), _P, "opens a row above"),
    Command("move.up", "Move up", ("less_than_sign",), _P, "moves it up, with the leg that ends at it"),
    Command("move.down", "Move down", ("greater_than_sign",), _P, "moves it down, with the leg that ends at it"),
    Command("copy", "Duplicate", ("c",), _P, "puts a copy of the waypoint below it"),
    Command("more", "All of it", ("e",), _P, "changes the waypoint's name, position, stay and remarks"),
    Command("reverse", "Reverse", ("r",), _P, "turns the passage round, from its end to its start"),
    Command("worksheet", "Hand check", ("h",), _P, "works the leg step by step, to check by hand"),
    Command("compare", "Compare", ("v",), _P, "sets every leg's lines, and another plan, side by side"),
    Command("reconcile", "Other figures", ("k",), _P, "finds what explains another system's figures for the leg"),
    Command("columns.next", "More columns", ("right",), _P, "shows the quantities that had no room", "more columns"),
    Command("columns.back", "Columns before", ("left",), _P, "goes back to the columns before"),
    Command("up", "Up", ("up",), _P, "goes a row up", runs=False),
    Command("down", "Down", ("down",), _P, "goes a row down", runs=False),
    Command("page.up", "Page up", ("pageup",), _P, "goes a page up", runs=False),
    Command("page.down", "Page down", ("pagedown",), _P, "goes a page down", runs=False),
    Command("first", "First row", ("home",), _P, "goes to the first row", runs=False),
    Command("last", "Last row", ("end",), _P, "goes to the row at the end, where a waypoint is added", runs=False),
    Command("chart.left", "Left", ("left",), _C, "moves the cross left, the chart under it", runs=False),
    Command("chart.right", "Right", ("right",), _C, "moves it right", runs=False),
    Command("chart.up", "Up", ("up",), _C, "moves it up", runs=False),
    Command("chart.down", "Down", ("down",), _C, "moves it down", runs=False),
    Command("chart.left.little", "A cell left", ("shift+left",), _C, "moves it by one cell", runs=False),
    Command("chart.right.little", "A cell right", ("shift+right",), _C, "moves it by one cell", runs=False),
    Command("chart.up.little", "A cell up", ("shift+up",), _C, "moves it by one cell", runs=False),
    Command("chart.down.little", "A cell down", ("shift+down",), _C, "moves it by one cell", runs=False),
    Command("nearer", "Nearer", ("plus", "equals_sign"), _C, "shows half as much, twice as large", "nearer"),
    Command("wider", "Wider", ("minus",), _C, "shows twice as much, half as large", "wider"),
    Command("fit.plan", "Whole plan", ("f",), _C, "shows the whole plan", "plan"),
    Command("fit.leg", "Whole leg", ("g",), _C, "shows the whole leg under the cursor", "leg"),
    Command("projection", "Projection", ("p",), _C, "takes the next projection that can show the plan", "projection"),
    Command("chart.add", "Add here", ("a", "insert"), _C, "adds a waypoint at the cross, below the cursor", "add here"),
    Command("row.next", "Next row", ("pagedown",), _C, "puts the cursor on the next waypoint or leg", "next row"),
    Command("row.back", "Row before", ("pageup",), _C, "puts the cursor on the waypoint or leg before"),
    Command("to.waypoint", "To the waypoint", ("home",), _C, "puts the cross on the waypoint of the cursor"),
    Command("chart.line", "Line", ("l",), _C, "sails the leg by the next line: rhumb line, great circle", "line"),
    Command("other.lines", "Both lines", ("b",), _C, "shows or leaves out the line by which the leg is not sailed"),
    Command("chart.delete", "Delete", ("d", "delete"), _C, "takes the waypoint of the cursor out"),
    Command("shore", "Shore", ("c",), _C, "shows the shoreline (not for navigation), or leaves it out"),
    Command("sheet.next", "Next sheet", ("pagedown",), _T, "turns to the next sheet", "next sheet"),
    Command("sheet.back", "Sheet before", ("pageup",), _T, "turns back a sheet", "sheet before"),
    Command("sheet.right", "Look right", ("right",), _T, "shows what has no room on the right", runs=False),
    Command("sheet.left", "Look left", ("left",), _T, "goes back to the left", runs=False),
    Command("paper", "Paper", ("p",), _T, "takes the next paper", "paper"),
    Command("print.columns", "Columns", ("c",), _T, "chooses the columns that are printed", "columns"),
    Command("write.pdf", "Write PDF", ("f",), _T, "writes the leg table as PDF and says where it went", "PDF"),
    Command("write.text", "Write text", ("t",), _T, "writes the leg table as text and says where it went", "text"),
    Command("write.csv", "Write CSV", ("v",), _T, "writes the leg table as CSV and says where it went", "CSV"),
    Command("save", "Save", ("s", "ctrl+s"), _E, "writes the plan to its file, whole or not at all", "save"),
    Command("passage", "Passage page", ("f2", "escape"), _E, "waypoints and legs, and the working of the leg"),
    Command("chart", "Chart page", ("f3",), _E, "the plan on a chart, and what lies under the cross"),
    Command("print", "Print page", ("f7",), _E, "the leg table as text, and its prints to paper and file"),
    Command("page.next", "Next page", ("tab",), _E, "turns to the next page"),
    Command("help", "Keys", ("question_mark", "f1"), _E, "shows every key, page by page", "keys"),
    Command("caution", "Caution", ("exclamation_mark",), _E, "shows what this is no substitute for", "caution"),
    Command("redo", "Redo", ("y", "ctrl+y"), _E, "makes the change again that was taken back"),
    Command("plan", "Particulars", ("i",), _E, "changes title, ship, departure, speed, figure and the rest"),
    Command("open", "Open", ("o", "ctrl+o"), _E, "opens another plan: those of last time, or any file"),
    Command("new", "New plan", ("n",), _E, "begins an empty plan"),
    Command("save.as", "Save as", ("w",), _E, "writes the plan to another file"),
    Command("revert", "Go back to the file", (), _E, "reads the plan's file again; undo brings your changes back"),
    Command("theme", "Light", ("x",), _E, "day, dusk or night"),
    Command("palette", "All commands", ("ctrl+p",), _E, "finds a command by its words", runs=False),
    Command("quit", "Quit", ("q", "ctrl+q"), _E, "leaves; with changes that are not saved it asks first", "quit"),
)  # fmt: skip


def commands_of(where: Where) -> tuple[Command, ...]:
    """Return the commands that work there, in the order in which they are told."""
    return tuple(command for command in COMMANDS if command.where is where)


def readme_keys() -> str:
    """Return the key list of the README: a Markdown table for each place."""
    tables = []
    for where in Where:
        rows = [
            f"| {command.keys_shown or 'palette'} | {command.words} | {command.does} |"
            for command in commands_of(where)
        ]
        tables.append("\n".join([f"**{where.value}**", "", "| key | command | what it does |", "|---|---|---|", *rows]))
    return "\n\n".join(tables) + "\n"
