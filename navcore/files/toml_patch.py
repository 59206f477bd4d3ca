"""Changes to a TOML text that leave everything else in it as it stands: comments, order, spacing, unknown keys."""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.files.planfile_values import write_key
from navcore.files.toml_text import Assignment, Section, scan

if TYPE_CHECKING:
    from collections.abc import Iterable

_COMMENT = re.compile(r"[ \t\r]*(#[^\n]*)?")


@dataclass(frozen=True, slots=True)
class Written:
    """The keys of a table as they are to be written, in their order.

    Attributes:
        keys: Each key's TOML value; None where it is left out.
        table: The one key that holds a table; "" for none.
        inner: That table's keys, likewise.
        in_order: Whether the order of the inner keys means something, and any key may stand there.
    """

    keys: dict[str, str | None]
    table: str = ""
    inner: dict[str, str | None] | None = None
    in_order: bool = False

    @property
    def inner_lines(self) -> list[tuple[str, str]]:
        """The inner keys that are written."""
        return [(key, value) for key, value in (self.inner or {}).items() if value is not None]


def write_inline(pairs: Iterable[tuple[str, str]]) -> str:
    """Return an inline table."""
    inside = ", ".join(f"{write_key(key)} = {value}" for key, value in pairs)
    return f"{{ {inside} }}" if inside else "{}"


def patch(text: str, table: tuple[str, ...], old: Written, new: Written) -> str:
    """Return a text in which the values that differ are new.

    Args:
        text: What reads as `old`; one table of its root or one array entry, with sub-tables.
        table: The header under which the keys stand; () for the root.
        old: What it says now.
        new: What it is to say.
    """
    patcher = _Patcher(text, table)
    patcher.change_keys(old, new)
    if old.inner_lines != new.inner_lines:
        patcher.change_table(new)
    return patcher.result()


class _Patcher:
    """Collects changes to one text."""

    def __init__(self, text: str, table: tuple[str, ...]) -> None:
        self.newline = "\r\n" if "\r\n" in text else "\n"
        self.text = text if text.endswith("\n") else text + self.newline
        self.table = table
        self.sections = scan(self.text).sections
        self.main = next(section for section in self.sections if section.path == table)
        self.edits: list[tuple[int, int, str]] = []
        self.present = {entry.path[-1]: entry for entry in self.main.assignments if len(entry.path) == len(table) + 1}

    def result(self) -> str:
        pieces: list[str] = []
        at = 0
        for start, end, replacement in sorted(self.edits, key=lambda edit: edit[:2]):
            pieces += [self.text[at:start], replacement]
            at = end
        result = "".join([*pieces, self.text[at:]])
        # A comment that a change left at the very end must not come to stand directly above the next header.
        last_line = result[result.rfind("\n", 0, -1) + 1 :]
        return result + self.newline if last_line.lstrip().startswith("#") else result

    def change_keys(self, old: Written, new: Written) -> None:
        earlier: list[str] = []
        for key, value in new.keys.items():
            entry = self.present.get(key)
            if value is None and old.keys[key] is not None:
                self._delete(entry)
            elif value is not None and value != old.keys[key]:
                if entry:
                    self.edits.append((entry.value_start, entry.value_end, value))
                else:
                    self._insert_key(key, value, earlier)
            earlier.append(key)

    def change_table(self, new: Written) -> None:
        inline = self.present.get(new.table)
        sections = self._table_sections(new.table)
        slots = list(inline.inner) if inline else self._slots(new.table)
        if not new.in_order:
            slots = [slot for slot in slots if slot.path[-1] in (new.inner or {})]
        if not inline and not sections and not slots:
            self._add_table(new)
            return
        matched, added = _match(slots, new)
        if inline:
            self._change_inline(inline, matched, added)
        else:
            self._change_lines(new.table, sections, matched, added)

    def _change_inline(
        self, inline: Assignment, matched: dict[Assignment, tuple[str, str] | None], added: list[tuple[str, str]]
    ) -> None:
        items: list[str] = []
        for entry in inline.inner:
            pair = matched.get(entry, ("", ""))
            if pair == ("", ""):
                items.append(self.text[entry.start : entry.value_end])
            elif pair:
                items.append(self._changed(entry, pair))
        items += [f"{write_key(key)} = {value}" for key, value in added]
        inside = ", ".join(items)
        if inside:
            self.edits.append((inline.value_start, inline.value_end, f"{{ {inside} }}"))
        else:
            self._delete(inline)

    def _change_lines(
        self,
        name: str,
        sections: list[Section],
        matched: dict[Assignment, tuple[str, str] | None],
        added: list[tuple[str, str]],
    ) -> None:
        for entry, pair in matched.items():
            if pair is None:
                self._delete(entry)
            else:
                self.edits.append((entry.start, entry.value_end, self._changed(entry, pair)))
        prefix = "" if sections else f"{write_key(name)}."
        at = max([entry.end for entry in matched] or [sections[0].body])
        self._insert(at, (f"{prefix}{write_key(key)} = {value}" for key, value in added))
        for section in sections:
            if not added and all(matched.get(entry, entry) is None for entry in section.assignments):
                self._delete_header(section)

    def _changed(self, entry: Assignment, pair: tuple[str, str]) -> str:
        """Return an entry with another key or value, and everything else of it as it stands."""
        key, value = pair
        if key == entry.path[-1]:
            return self.text[entry.start : entry.value_start] + value
        written = ".".join(map(write_key, (*entry.path[-entry.key_count : -1], key)))
        return written + self.text[entry.key_end : entry.value_start] + value

    def _add_table(self, new: Written) -> None:
        if self.table:
            self._insert_key(new.table, write_inline(new.inner_lines), list(new.keys))
            return
        at = len(self.text.rstrip(" \t\r\n"))
        at = self.text.find("\n", at) + 1
        lines = ["", f"[{write_key(new.table)}]", *(f"{write_key(key)} = {value}" for key, value in new.inner_lines)]
        self._insert(at, lines)

    def _insert_key(self, key: str, value: str, earlier: list[str]) -> None:
        before = [self.present[name].end for name in earlier if name in self.present]
        self._insert(before[-1] if before else self.main.body, [f"{write_key(key)} = {value}"])

    def _insert(self, at: int, lines: Iterable[str]) -> None:
        written = "".join(line + self.newline for line in lines)
        if written:
            self.edits.append((at, at, written))

    def _delete(self, entry: Assignment | None) -> None:
        if entry:
            self._delete_lines(entry.start, entry.value_end, entry.end)

    def _delete_header(self, section: Section) -> None:
        after = self.text.rfind("]", section.header, section.body) + 1
        comment = self.text.find("#", section.header, section.body)
        if comment >= 0:
            after = self.text.rfind("]", section.header, comment) + 1
        self._delete_lines(section.header, after, section.body)

    def _delete_lines(self, start: int, value_end: int, end: int) -> None:
        """Take lines out; a comment beside them stays, on a line of its own."""
        line_start = self.text.rfind("\n", 0, start) + 1
        comment = _COMMENT.match(self.text, value_end)
        kept = self.text[line_start:start] + comment[1].rstrip("\r") + self.newline if comment and comment[1] else ""
        self.edits.append((line_start, end, kept))

    def _table_sections(self, name: str) -> list[Section]:
        return [section for section in self.sections if section.path == (*self.table, name)]

    def _slots(self, name: str) -> list[Assignment]:
        path = (*self.table, name)
        entries = (entry for section in self.sections for entry in section.assignments)
        return [entry for entry in entries if len(entry.path) == len(path) + 1 and entry.path[:-1] == path]


def _match(
    slots: list[Assignment], new: Written
) -> tuple[dict[Assignment, tuple[str, str] | None], list[tuple[str, str]]]:
    """Return what each entry becomes, None where it goes, and what is added."""
    wanted = dict(new.inner_lines)
    names = [slot.path[-1] for slot in slots]
    kept = [name for name in names if name in wanted]
    added = [(name, value) for name, value in wanted.items() if name not in names]
    if not new.in_order or [*kept, *(name for name, _ in added)] == list(wanted):
        return {slot: (name, wanted[name]) if (name := slot.path[-1]) in wanted else None for slot in slots}, added
    pairs = list(wanted.items())
    return {slot: pairs[at] if at < len(pairs) else None for at, slot in enumerate(slots)}, pairs[len(slots) :]
