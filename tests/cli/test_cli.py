from __future__ import annotations

import csv
import json
import os
import signal
import subprocess
import sys
import time
from pathlib import Path

import pytest

from tests.support import DEMOS, ROOT, legbook

NORTH_PACIFIC = str(ROOT / "routes_demo" / "north_pacific_winter.toml")


def test_help_says_the_caution_and_every_verb() -> None:
    done = legbook("--help")
    assert done.returncode == 0
    words = " ".join(done.stdout.decode().split())
    assert "Planning aid only" in words
    for verb in ("table", "leg", "distances", "reckon"):
        assert verb in words
        assert "Planning aid only" in " ".join(legbook(verb, "--help").stdout.decode().split())


@pytest.mark.parametrize("words", [["--help"], ["--version"], ["leg", "--help"], ["leg", "nowhere"]])
def test_words_alone_need_no_numpy(words: list[str]) -> None:
    code = f"import sys; from tui.cli.main import run; run({words!r}); print('numpy' in sys.modules, file=sys.stderr)"
    done = subprocess.run([sys.executable, "-c", code], capture_output=True, text=True, check=False, cwd=ROOT)
    assert done.stderr.splitlines()[-1] == "False"


@pytest.mark.parametrize("path", DEMOS, ids=lambda path: path.stem)
@pytest.mark.parametrize("medium", ["text", "csv", "json", "markdown"])
def test_every_demo_prints_in_every_medium(path: Path, medium: str) -> None:
    done = legbook("table", str(path), "--as", medium)
    assert done.returncode == 0, done.stderr
    assert done.stdout
    assert done.stderr == b""


def test_a_word_that_is_no_verb_is_a_plan() -> None:
    assert legbook(NORTH_PACIFIC).stdout == legbook("table", NORTH_PACIFIC).stdout


def test_two_bad_lines_are_both_named_and_nothing_is_printed(tmp_path: Path) -> None:
    plan = tmp_path / "bad.toml"
    plan.write_text(
        'legbook = 1\n\n[[waypoint]]\nname = "A"\nposition = "48°61.0\'N 125°20.0\'W"\n\n'
        '[[waypoint]]\nname = "B"\nposition = "41°20.0\'N 143°00.0\'E"\nspeed_kn = "fast"\n',
        encoding="utf-8",
    )
    done = legbook("table", str(plan))
    words = done.stderr.decode()
    assert done.returncode == 3
    assert done.stdout == b""
    assert f"{plan}:5:" in words
    assert f"{plan}:10:" in words
    assert "Traceback" not in words


def test_a_missing_plan_is_unreadable_input() -> None:
    done = legbook("table", "no_such_plan.toml")
    assert done.returncode == 3
    assert done.stderr.decode().startswith("legbook: no_such_plan.toml: ")


def test_a_file_is_written_whole_and_its_ending_names_the_medium(tmp_path: Path) -> None:
    target = tmp_path / "table.json"
    done = legbook("table", NORTH_PACIFIC, "-o", str(target))
    assert done.returncode == 0
    assert done.stdout == b""
    assert json.loads(target.read_text(encoding="utf-8"))["title"] == "Salal Roads to Kuromatsu Bay"
    assert [path.name for path in tmp_path.iterdir()] == ["table.json"]


@pytest.mark.parametrize(
    "locale", [{"LC_ALL": "C"}, {"LC_ALL": "POSIX", "TZ": "Asia/Tokyo"}, {"PYTHONIOENCODING": "ascii"}]
)
def test_the_table_is_the_same_bytes_whatever_locale_and_zone(locale: dict[str, str]) -> None:
    assert legbook("table", NORTH_PACIFIC, env=locale).stdout == legbook("table", NORTH_PACIFIC).stdout


def test_leg_as_json_has_the_figures_of_the_contract() -> None:
    done = legbook("leg", "48°30.0'N 125°20.0'W", "41°20.0'N 143°00.0'E", "--json")
    answer = json.loads(done.stdout)
    assert done.returncode == 0
    assert answer["figure"] == "WGS 84"
    # The same leg by another hand: GeodSolve and RhumbSolve 2.1.2 give 3690.7 and 3924.2 NM.
    assert answer["great_circle"]["distance_nmi"] == pytest.approx(3690.7, abs=0.05)
    assert answer["rhumb_line"]["distance_nmi"] == pytest.approx(3924.2, abs=0.05)
    assert answer["great_circle"]["vertex"]["on_leg"] is True
    assert answer["comparison"]["saving_nmi"] == pytest.approx(233.5, abs=0.05)
    assert set(answer["tables"]) == {
        "d_lat_min", "d_long_min", "departure_nmi", "mean_lat_deg", "dmp_min", "mercator_course_deg",
        "mercator_distance_nmi", "middle_latitude_course_deg", "middle_latitude_distance_nmi", "convergency_deg",
        "conversion_angle_deg",
    }  # fmt: skip


@pytest.mark.parametrize("start", ["-36.0+175.2/", "-36.0 175.2", "36°00.0'S 175°12.0'E", "3600S17512E"])
def test_a_position_may_begin_with_a_minus(start: str) -> None:
    answer = json.loads(legbook("leg", start, "+48.5-004.5/", "--json").stdout)
    assert answer["from"] == {"lat_deg": -36.0, "lon_deg": 175.2}


def test_a_bad_position_is_wrong_usage_and_says_what_to_type() -> None:
    done = legbook("leg", "48°23.5' 004°29.0'W", "50N030W")
    assert done.returncode == 2
    assert done.stdout == b""
    assert "Traceback" not in done.stderr.decode()


def test_a_leg_of_no_length_has_nulls_and_no_nan() -> None:
    done = legbook("leg", "50N030W", "50N030W", "--json")
    assert done.returncode == 0
    answer = json.loads(done.stdout)
    assert answer["great_circle"]["vertex"] is None
    assert answer["comparison"] == {"saving_nmi": 0.0, "saving_percent": 0.0, "greatest_separation_nmi": 0.0}
    assert legbook("leg", "50N030W", "50N030W", "--speed", "12").returncode == 0


def test_reckon_a_traverse_as_json() -> None:
    answer = json.loads(legbook("reckon", "00N000E", "090/60", "000/60", "--figure", "sphere", "--json").stdout)
    assert answer["rhumb_line"]["to"] == pytest.approx({"lat_deg": 1.0, "lon_deg": 1.0})
    assert answer["tables"]["d_lat_min"] == pytest.approx(60.0)
    assert answer["tables"]["made_good_course_deg"] == pytest.approx(45.0)


def test_a_rhumb_line_past_the_pole_is_no_answer_and_says_why() -> None:
    done = legbook("reckon", "89N000E", "000/120", "--json")
    assert done.returncode == 1
    assert json.loads(done.stdout)["rhumb_line"]["to"] is None
    assert "pole" in done.stderr.decode()


def test_distances_keeps_order_other_columns_and_unreadable_rows() -> None:
    rows = 'id,lat1,lon1,lat2,lon2,note\n1,0,0,0,10,"a,b"\n2,x,0,0,10,\n3,0,0,91,10,\n4,10,179,12,-179,c\n'
    done = legbook("distances", "-", stdin=rows.encode())
    assert done.returncode == 3
    out = list(csv.DictReader(done.stdout.decode().splitlines()))
    assert [row["id"] for row in out] == ["1", "2", "3", "4"]
    assert out[0]["note"] == "a,b"
    assert float(out[0]["rl_course_deg"]) == 90.0
    assert [row["gc_distance_nmi"] == "" for row in out] == [False, True, True, False]
    assert float(out[3]["gc_distance_nmi"]) < 200.0
    assert "line 3" in done.stderr.decode()
    assert "line 4" in done.stderr.decode()


def test_distances_reads_places_in_any_form() -> None:
    rows = "from,to\n48°30.0'N 125°20.0'W,41-20N 143-00E\n46N078W,4620N07805W\n"
    done = legbook("distances", "-", stdin=rows.encode())
    assert done.returncode == 0
    out = list(csv.DictReader(done.stdout.decode().splitlines()))
    assert float(out[0]["rl_distance_nmi"]) == pytest.approx(3924.2, abs=0.05)


def test_distances_without_the_columns_says_which_it_takes() -> None:
    done = legbook("distances", "-", stdin=b"a,b\n1,2\n")
    assert done.returncode == 3
    assert "lat1,lon1,lat2,lon2" in done.stderr.decode()


def test_a_reader_that_leaves_early_is_no_error() -> None:
    rows = b"lat1,lon1,lat2,lon2\n" + b"1,2,3,4\n" * 20000
    process = subprocess.Popen(
        f"{sys.executable} -m tui distances - | head -n 2", shell=True, cwd=ROOT, stdin=subprocess.PIPE,
        stdout=subprocess.PIPE, stderr=subprocess.PIPE,
    )  # fmt: skip
    out, err = process.communicate(rows)
    assert out.count(b"\n") == 2
    assert err == b""


def test_a_closed_output_is_said_without_a_trace() -> None:
    done = subprocess.run(
        f"{sys.executable} -m tui table {NORTH_PACIFIC} >&-", shell=True, cwd=ROOT, capture_output=True, check=False
    )
    assert done.returncode == 2
    assert b"Traceback" not in done.stderr
    assert b"closed" in done.stderr


def test_ctrl_c_stops_with_130_and_no_trace() -> None:
    process = subprocess.Popen(
        [sys.executable, "-m", "tui", "distances", "-"], cwd=ROOT, stdin=subprocess.PIPE, stdout=subprocess.PIPE,
        stderr=subprocess.PIPE, env={**os.environ, "PYTHONUNBUFFERED": "1"},
    )  # fmt: skip
    assert process.stdin is not None
    assert process.stdout is not None
    process.stdin.write(b"lat1,lon1,lat2,lon2\n" + b"1,2,3,4\n" * 5000)
    process.stdin.flush()
    process.stdout.readline()
    time.sleep(0.1)
    process.send_signal(signal.SIGINT)
    _, err = process.communicate(timeout=30)
    assert process.returncode == 130
    assert b"Traceback" not in err


def test_an_unknown_figure_lists_those_there_are() -> None:
    done = legbook("leg", "50N030W", "51N031W", "--figure", "flat")
    assert done.returncode == 2
    assert "Clarke 1866" in done.stderr.decode()


def test_a_row_with_an_open_quote_keeps_its_place_and_swallows_none() -> None:
    rows = 'lat1,lon1,lat2,lon2,note\n1,2,3,4,"abc\n1,2,3,4,d\n\n5,6,7,8\n'
    done = legbook("distances", "-", stdin=rows.encode())
    out = list(csv.DictReader(done.stdout.decode().splitlines()))
    assert done.returncode == 3
    assert [row["gc_distance_nmi"] != "" for row in out] == [False, True, True]
    assert out[0]["lat1"] == "1"


@pytest.mark.parametrize("cell", ["1_0", "１", "1e400", "nan", "359"])
def test_a_number_that_is_none_is_refused(cell: str) -> None:
    done = legbook("distances", "-", stdin=f"lat1,lon1,lat2,lon2\n1,{cell},3,4\n".encode())
    assert done.returncode == 3
    assert "lon1" in done.stderr.decode()


def test_results_of_an_earlier_run_are_replaced() -> None:
    once = legbook("distances", "-", stdin=b"lat1,lon1,lat2,lon2\n1,2,3,4\n").stdout
    assert legbook("distances", "-", stdin=once).stdout == once


def test_a_speed_of_nothing_is_wrong_usage() -> None:
    assert legbook("leg", "50N030W", "51N031W", "--speed", "0").returncode == 2


def test_nothing_from_a_plan_reaches_the_terminal_as_a_control(tmp_path: Path) -> None:
    odd = "\\u001b[31m\\u0007\\u202e"
    plan = tmp_path / "odd.toml"
    plan.write_text(
        f'legbook = 1\ntitle = "{odd}"\nvoyage = "{odd}"\ndatum = "{odd}"\nprepared = "{odd}"\n'
        f'[craft]\nname = "{odd}"\n'
        f'[[waypoint]]\nname = "{odd}"\nposition = "50N030W"\n'
        f'[[waypoint]]\nname = "{odd}"\nposition = "50N040W"\nline = "composite"\nlimit = "40N"\n',
        encoding="utf-8",
    )
    refused = legbook("table", str(plan))
    assert refused.returncode == 1
    plan.write_text(plan.read_text(encoding="utf-8").replace("40N", "55N"), encoding="utf-8")
    for medium in ("text", "csv", "markdown"):
        done = legbook("table", str(plan), "--as", medium)
        assert done.returncode == 0
        for written in (done.stdout, refused.stderr):
            assert not {"\x1b", "\x07", "\u202e"} & set(written.decode())


@pytest.mark.parametrize(
    ("words", "unused"),
    [
        (["leg", "50N030W", "51N031W"], {"reportlab", "textual", "rich", "tomllib", "navcore.charts"}),
        (["distances", "-"], {"reportlab", "textual", "rich", "tomllib", "navcore.charts", "navcore.prints.leg_table"}),
        (["reckon", "50N030W", "045/60"], {"reportlab", "textual", "rich", "tomllib", "navcore.charts"}),
        (["table", NORTH_PACIFIC], {"reportlab", "textual", "rich", "navcore.charts"}),
        (["table", NORTH_PACIFIC, "--as", "json"], {"reportlab", "textual", "rich", "navcore.charts"}),
    ],
)
def test_a_verb_imports_only_what_it_uses(words: list[str], unused: set[str]) -> None:
    code = f"import sys; from tui.cli.main import run; run({words!r}); print('|'.join(sys.modules), file=sys.stderr)"
    done = subprocess.run(
        [sys.executable, "-c", code],
        capture_output=True,
        text=True,
        check=False,
        cwd=ROOT,
        input="lat1,lon1,lat2,lon2\n",
    )
    loaded = set(done.stderr.splitlines()[-1].split("|"))
    assert "numpy" in loaded
    assert unused & loaded == set()


@pytest.mark.parametrize("verb", ["table", "worksheet", "sheet"])
def test_a_print_never_replaces_the_plan_it_is_made_from(verb: str, tmp_path: Path) -> None:
    plan, link = tmp_path / "plan.toml", tmp_path / "link.txt"
    plan.write_bytes((ROOT / "routes_demo" / "coastal_run.toml").read_bytes())
    before = plan.read_bytes()
    link.symlink_to(plan)
    for target in (plan, link):
        done = legbook(verb, str(plan), "--as", "json", "-o", str(target))
        assert done.returncode == 2
        assert b"is the plan itself" in done.stderr
    assert plan.read_bytes() == before


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="a device that takes nothing")
@pytest.mark.parametrize("words", [["leg", "50N030W", "46N040W"], ["table", NORTH_PACIFIC], ["distances", "-"]])
def test_output_that_takes_no_more_is_named_and_is_no_fault_of_the_input(words: list[str]) -> None:
    with Path("/dev/full").open("wb") as full:
        command = [sys.executable, "-m", "tui", *words]
        rows = b"lat1,lon1,lat2,lon2\n" + b"1,2,3,4\n" * 3000
        done = subprocess.run(command, input=rows, stdout=full, stderr=subprocess.PIPE, check=False, cwd=ROOT)
    assert done.returncode == 2
    assert done.stderr.startswith(b"legbook: standard output: ")
    assert b"Exception ignored" not in done.stderr


def test_a_file_that_can_not_be_written_is_wrong_usage(tmp_path: Path) -> None:
    done = legbook("table", NORTH_PACIFIC, "-o", str(tmp_path / "none" / "x.pdf"))
    assert done.returncode == 2
    assert b"nothing was written" in done.stderr


def test_words_that_begin_with_a_minus_and_a_digit_are_taken_as_they_are(tmp_path: Path) -> None:
    command = [sys.executable, "-m", "tui", "table", NORTH_PACIFIC, "-o", "-2.txt"]
    environment = {**os.environ, "PYTHONPATH": str(ROOT)}
    subprocess.run(command, check=True, cwd=tmp_path, env=environment, capture_output=True)
    assert [path.name for path in tmp_path.iterdir()] == ["-2.txt"]
    assert b"50\xc2\xb000.0'S 030\xc2\xb000.0'W" in legbook("leg", "-50,-30", "-46,-40").stdout
    assert b"'-10'" in legbook("leg", "50N030W", "46N040W", "--meridians", "-10").stderr


@pytest.mark.parametrize("columns", ["only:", "only:eta", "only:name", "only:remarks"])
def test_columns_that_leave_a_leg_none_are_printed_in_every_medium(columns: str) -> None:
    media = ("text", "csv", "markdown", "pdf") if columns == "only:" else ("text",)
    for medium in media:
        assert legbook("table", NORTH_PACIFIC, "--as", medium, "--columns", columns).returncode == 0


def test_a_word_that_is_neither_verb_nor_file_is_told_the_verbs() -> None:
    done = legbook("tabel", NORTH_PACIFIC)
    assert done.returncode == 2
    assert b"tabel is no verb and no file; verbs: table, leg" in done.stderr


def test_reckoning_along_a_parallel_is_called_what_it_is() -> None:
    words = legbook("reckon", "60N 0E", "90/100").stdout.decode()
    assert "Mercator" not in words
    assert "parallel            60\u00b000.0'N 003\u00b020.0'E" in words


def test_from_a_pole_no_table_answers_on_a_course_that_is_none() -> None:
    tables = json.loads(legbook("reckon", "90N 010W", "135/100", "--json").stdout)["tables"]
    assert tables["middle_latitude_to"] is tables["mercator_to"] is None


@pytest.mark.parametrize("verb", ["table", "worksheet", "sheet"])
def test_an_ending_that_stands_for_nothing_is_refused_by_name(verb: str, tmp_path: Path) -> None:
    done = legbook(verb, NORTH_PACIFIC, "-o", str(tmp_path / "x.bmp"))
    assert done.returncode == 2
    assert b".bmp stands for no print of this kind; end the file with one of ." in done.stderr
    assert list(tmp_path.iterdir()) == []
