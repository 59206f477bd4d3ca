"""Where everything stands in a TOML text."""

from __future__ import annotations

import tomllib

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from navcore.files.toml_text import MAX_DEPTH, MAX_ENTRIES, Assignment, scan

TEXT = '''\
# file
a = 1 # one
"b c".'d' = """x
[no] # y"""

# about t
# directly above
[ t ] # t
k = [ # list
  "]", # two
  '#', { x = 1 },
] # end
lit = \'\'\'
'' \'\'\'
i = { p = "}", q.r = [1, 2] } # i
s = "a # \\" b"
d = 2027-03-04 14:00:00Z
[[ "w" . x ]]
'''


def entries(text: str) -> list[Assignment]:
    return [assignment for section in scan(text).sections for assignment in section.assignments]


def test_every_key_and_value_stands_where_it_is_said_to() -> None:
    found = [
        (entry.path, TEXT[entry.start : entry.key_end], TEXT[entry.value_start : entry.value_end])
        for entry in entries(TEXT)
    ]
    assert found == [
        (("a",), "a", "1"),
        (("b c", "d"), "\"b c\".'d'", '"""x\n[no] # y"""'),
        (("t", "k"), "k", "[ # list\n  \"]\", # two\n  '#', { x = 1 },\n]"),
        (("t", "lit"), "lit", "'''\n'' '''"),
        (("t", "i"), "i", '{ p = "}", q.r = [1, 2] }'),
        (("t", "s"), "s", '"a # \\" b"'),
        (("t", "d"), "d", "2027-03-04 14:00:00Z"),
    ]
    assert tomllib.loads(TEXT)["t"]["k"] == ["]", "#", {"x": 1}]


def test_the_keys_within_an_inline_table_are_found() -> None:
    inline = entries(TEXT)[4]
    assert [entry.path for entry in inline.inner] == [("t", "i", "p"), ("t", "i", "q", "r")]
    assert [TEXT[entry.value_start : entry.value_end] for entry in inline.inner] == ['"}"', "[1, 2]"]


def test_comments_directly_above_a_header_are_its_own() -> None:
    sections = scan(TEXT).sections
    assert [section.path for section in sections] == [(), ("t",), ("w", "x")]
    assert [section.is_array for section in sections] == [False, False, True]
    assert TEXT[sections[1].start :].startswith("# about t\n# directly above\n[ t ]")
    assert "".join(TEXT[section.start : section.end] for section in sections) == TEXT


@pytest.mark.parametrize("gap", ["\n", " \t\n", "\r\n"])
def test_a_comment_above_an_empty_line_is_of_the_block_before(gap: str) -> None:
    text = f"# of a\n{gap}# of t\n[t]\n"
    assert text[scan(text).sections[1].start :] == "# of t\n[t]\n"


def test_windows_newlines_are_taken_as_newlines() -> None:
    text = TEXT.replace("\n", "\r\n")
    assert [entry.path for entry in entries(text)] == [entry.path for entry in entries(TEXT)]
    assert text[entries(text)[0].value_start : entries(text)[0].value_end] == "1"
    assert not any(section.lost for section in scan(text).sections)


@pytest.mark.parametrize(
    "bad",
    [
        "x = ",
        "x",
        "= 1",
        'x = "open',
        'x = """open',
        "x = [1, 2",
        "x = { a = 1",
        "x = 1 2 = 3",
        'x = ["a" "b"]',
        "[open",
        "[[open]",
        'x = "a" b',
        ".x = 1",
        "x = 48°30'N",
        "x = " + "[" * (MAX_DEPTH + 2),
        "a." * (MAX_DEPTH + 2) + "b = 1",
        f"x = [{'1,' * (MAX_ENTRIES + 1)}]",
    ],
)
def test_a_line_that_cant_be_followed_hides_nothing_below_it(bad: str) -> None:
    text = f"a = 1\n{bad}\nb = 2\n[t]\nc = 3\n"
    sections = scan(text).sections
    assert [text[lost.start : lost.end] for section in sections for lost in section.lost] == [f"{bad}\n"]
    assert [entry.path[-1] for entry in entries(text)] == ["a", "b", "c"]


@given(st.text(alphabet="ab01=.[]{}\"'#,\\\n\r \t", max_size=60))
@settings(max_examples=300, deadline=None)
def test_any_text_is_cut_in_sections_that_make_it_up_again(text: str) -> None:
    sections = scan(text).sections
    assert "".join(text[section.start : section.end] for section in sections) == text


@given(st.text(alphabet="ab1=.[]{}\"'#,\n", max_size=30))
@settings(max_examples=500, deadline=None)
def test_what_tomllib_reads_is_followed(text: str) -> None:
    try:
        values = tomllib.loads(text)
    except tomllib.TOMLDecodeError:
        return
    scanned = scan(text).sections
    assert not any(section.lost for section in scanned)
    keys = {section.path[0] for section in scanned if section.path} | {entry.path[0] for entry in entries(text)}
    assert keys == set(values)
