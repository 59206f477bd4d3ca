"""Changes to a TOML text that leave the rest of it as it stands."""

from __future__ import annotations

import pytest

from navcore.files.toml_patch import Written, patch, write_inline

BLOCK = """\
# above
[[waypoint]] # here
name = "A"   # the name
  speed_kn = 12 # slow
# about the notes
odd = { x = 1 }
remarks = "r"
"""


def keys(name: str | None = None, speed_kn: str | None = None, remarks: str | None = None) -> dict[str, str | None]:
    return {"name": name, "line": None, "speed_kn": speed_kn, "remarks": remarks}


OLD = Written(keys('"A"', "12", '"r"'))


def changed(new: Written, old: Written = OLD, text: str = BLOCK) -> str:
    return patch(text, ("waypoint",), old, new)


def test_a_changed_value_takes_the_old_ones_place_beside_its_comment() -> None:
    assert changed(Written(keys('"B"', "12", '"r"'))) == BLOCK.replace('"A"', '"B"')


def test_what_does_not_change_is_the_very_text() -> None:
    assert changed(OLD) == BLOCK


def test_a_new_key_comes_after_the_known_one_before_it() -> None:
    new = Written({"name": '"A"', "line": '"rhumb line"', "speed_kn": "12", "remarks": '"r"'})
    assert changed(new) == BLOCK.replace("# the name\n", '# the name\nline = "rhumb line"\n')


def test_a_first_key_comes_below_the_header() -> None:
    text = "[[waypoint]]\nodd = 1\n"
    assert changed(Written(keys('"A"')), Written(keys()), text) == '[[waypoint]]\nname = "A"\nodd = 1\n'


def test_several_new_keys_come_in_their_order() -> None:
    text = "[[waypoint]]\r\n"
    new = changed(Written(keys('"A"', "12", '"r"')), Written(keys()), text)
    assert new == '[[waypoint]]\r\nname = "A"\r\nspeed_kn = 12\r\nremarks = "r"\r\n'


def test_a_key_that_goes_leaves_its_comment_on_a_line_of_its_own() -> None:
    assert changed(Written(keys('"A"', None, '"r"'))) == BLOCK.replace("  speed_kn = 12 # slow", "  # slow")
    assert changed(Written(keys('"A"', "12", None))) == BLOCK.replace('remarks = "r"\n', "")


def test_a_comment_left_at_the_end_is_kept_off_the_next_header() -> None:
    text = '[[waypoint]]\nname = "A" # x\n'
    assert changed(Written(keys()), Written(keys('"A"')), text) == "[[waypoint]]\n# x\n\n"


def test_a_last_line_without_newline_gets_one() -> None:
    text = '[[waypoint]]\nname = "A"'
    new = changed(Written(keys('"A"', "1")), Written(keys('"A"')), text)
    assert new == '[[waypoint]]\nname = "A"\nspeed_kn = 1\n'


INLINE = '[[waypoint]]\nnotes = {a="1", "b c"= "2"} # n\n'
DOTTED = '[[waypoint]]\nnotes.a = "1" # one\n\'notes\'."b c" = "2"\nz = 1\n'
SUB = '[[waypoint]]\nz = 1\n\n[waypoint.notes] # n\na = "1" # one\n"b c" = "2"\n'


def notes(*pairs: tuple[str, str]) -> Written:
    return Written({"name": None}, "notes", dict(pairs), in_order=True)


A, B, C = ("a", '"1"'), ("b c", '"2"'), ("c", '"3"')


@pytest.mark.parametrize(
    ("text", "new", "expected"),
    [
        (INLINE, notes(("a", '"9"'), B), '{ a="9", "b c"= "2" } # n'),
        (INLINE, notes(A, B, C), '{ a="1", "b c"= "2", c = "3" } # n'),
        (INLINE, notes(B), '{ "b c"= "2" } # n'),
        (INLINE, notes(B, A), '{ "b c"="2", a= "1" } # n'),
        (INLINE, notes(C), '{ c = "3" } # n'),
        (INLINE, notes(), "[[waypoint]]\n# n\n"),
        (DOTTED, notes(("a", '"9"'), B), 'notes.a = "9" # one'),
        (DOTTED, notes(A, B, C), '\'notes\'."b c" = "2"\nnotes.c = "3"\nz'),
        (DOTTED, notes(A), 'notes.a = "1" # one\nz = 1'),
        (DOTTED, notes(B, A), 'notes."b c" = "2" # one\nnotes.a = "1"\nz'),
        (DOTTED, notes(), "[[waypoint]]\n# one\nz = 1\n"),
        (SUB, notes(("a", '"9"'), B), 'notes] # n\na = "9" # one\n"b c" = "2"\n'),
        (SUB, notes(A, B, C), '"b c" = "2"\nc = "3"\n'),
        (SUB, notes(C, A), 'notes] # n\nc = "3" # one\na = "1"\n'),
        (SUB, notes(), "z = 1\n\n# n\n# one\n\n"),
    ],
)
def test_notes_are_changed_in_the_way_that_they_are_written(text: str, new: Written, expected: str) -> None:
    assert expected in changed(new, notes(A, B), text)


def test_notes_that_were_nowhere_come_on_one_line() -> None:
    assert changed(notes(A, B), notes(), "[[waypoint]]\n") == '[[waypoint]]\nnotes = { a = "1", "b c" = "2" }\n'
    assert write_inline([]) == "{}"


def craft(name: str | None, draught_m: str | None) -> Written:
    return Written({"title": None}, "craft", {"name": name, "draught_m": draught_m})


def test_a_craft_that_was_nowhere_comes_below_the_head() -> None:
    text = "legbook = 1\n\n[other]\nx = 1\n\n\n"
    new = patch(text, (), craft(None, None), craft('"Q"', "9.8"))
    assert new == 'legbook = 1\n\n[other]\nx = 1\n\n[craft]\nname = "Q"\ndraught_m = 9.8\n\n\n'


def test_a_craft_keeps_the_keys_that_mean_nothing_and_its_order() -> None:
    text = "[craft] # c\nbeam_m = 32\ndraught_m = 9 # deep\n"
    new = patch(text, (), craft(None, "9"), craft('"Q"', "10"))
    assert new == '[craft] # c\nbeam_m = 32\ndraught_m = 10 # deep\nname = "Q"\n'
    assert patch(text, (), craft(None, "9"), craft(None, None)) == "[craft] # c\nbeam_m = 32\n# deep\n\n"
    inline = "craft = { beam_m = 32, draught_m = 9 }\n"
    assert patch(inline, (), craft(None, "9"), craft('"Q"', None)) == 'craft = { beam_m = 32, name = "Q" }\n'
