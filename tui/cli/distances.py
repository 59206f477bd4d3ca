"""legbook distances: many legs at once, CSV in and CSV out, as a stream."""

from __future__ import annotations

import csv
import io
import sys
from itertools import islice
from pathlib import Path
from typing import TYPE_CHECKING

from navcore.errors import NavError
from navcore.files.csv_rows import CsvRow, csv_rows
from tui.cli.arguments import add_figure
from tui.cli.exit_codes import ExitCode
from tui.cli.output import data_stream, say, writing_to_output
from tui.cli.progress import Progress
from tui.cli.verb import Verb

if TYPE_CHECKING:
    import argparse
    from typing import BinaryIO

    from navcore.earth.figure import Figure
    from navcore.files.legs_csv import Ends, LegColumns

_ROWS_AT_A_TIME = 16384
_STANDARD_INPUT = "-"


def _add_arguments(parser: argparse.ArgumentParser) -> None:
    parser.add_argument(
        "file",
        metavar="FILE",
        help="CSV with columns lat1,lon1,lat2,lon2 (degrees) or from,to (any position form); - is standard input",
    )
    add_figure(parser)


def _run(arguments: argparse.Namespace) -> ExitCode:
    from navcore.earth.figure import figure_named

    figure = figure_named(arguments.figure)
    if arguments.file != _STANDARD_INPUT:
        with Path(arguments.file).open("rb") as stream:
            return _convert(stream, figure)
    if sys.stdin is None:
        say("standard input is closed; name a file, or give it one")
        return ExitCode.WRONG_USAGE
    return _convert(sys.stdin.buffer, figure)


def _convert(stream: BinaryIO, figure: Figure) -> ExitCode:
    """Copy the rows to standard output with their results, a batch at a time, so that a file of any length fits."""
    from navcore.files.legs_csv import RESULTS, leg_columns, work

    # Bytes that are not UTF-8 pass through unchanged: other columns are none of our business.
    rows = csv_rows(io.TextIOWrapper(stream, encoding="utf-8-sig", errors="surrogateescape", newline=""))
    headings = next(rows, CsvRow(1, [])).cells
    columns = leg_columns(headings)
    out = data_stream(errors="surrogateescape")
    writer = csv.writer(out, lineterminator="\n")
    with writing_to_output():
        writer.writerow([*columns.kept(headings), *RESULTS])
    done = unreadable = 0
    empty = [""] * len(RESULTS)
    with Progress(stream) as progress:
        while batch := list(islice(rows, _ROWS_AT_A_TIME)):
            ends = [_ends(columns, row) for row in batch]
            results = iter(work([leg for leg in ends if leg is not None], figure))
            with writing_to_output():
                writer.writerows(
                    [*columns.kept(row.cells), *(empty if leg is None else next(results))]
                    for row, leg in zip(batch, ends, strict=True)
                )
            done += len(batch)
            unreadable += ends.count(None)
            progress.show(done)
    with writing_to_output():
        out.flush()
    if unreadable:
        say(f"{unreadable} of {done} rows could not be read; their results are empty")
    return ExitCode.UNREADABLE if unreadable else ExitCode.DONE


def _ends(columns: LegColumns, row: CsvRow) -> Ends | None:
    if row.fault is not None:
        say(f"line {row.line}: {row.fault}; allowed: CSV by RFC 4180; mend the quotes")
        return None
    try:
        return columns.ends(row.cells)
    except NavError as error:
        say(f"line {row.line}: {error}")
        return None


VERB = Verb("distances", "work many legs at once: CSV in, CSV out", _add_arguments, _run)
