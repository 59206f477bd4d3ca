"""legbook sheet: the plotting sheet of a plan."""

from __future__ import annotations

from typing import TYPE_CHECKING

from tui.cli.arguments import add_output, medium_of
from tui.cli.exit_codes import ExitCode
from tui.cli.output import is_terminal, put, say
from tui.cli.verb import Verb

if TYPE_CHECKING:
    import argparse

    from navcore.charts.sheet_set import SheetSet
    from navcore.plan.model import Plan
    from navcore.plan.solve import Solution
    from navcore.prints.plotting_sheet import SheetOptions

PROJECTIONS = ("mercator", "stereographic", "lambert", "gnomonic")
_ENDINGS = {".pdf": "pdf", ".svg": "svg", ".json": "json"}
_PAPERS = ("A4", "A3", "A2", "A1", "A0")
_TRUE_SCALES = {"mercator": 1, "stereographic": 1, "lambert": 2, "gnomonic": 0}
"""How many latitudes of true scale each projection takes."""
_WIDEST_MARGIN_MM = 40.0
_POLE_DEG = 90.0


def _add_arguments(parser: argparse.ArgumentParser) -> None:
    parser.add_argument("plan", metavar="PLAN", help="a plan file")
    parser.add_argument(
        "--projection",
        choices=PROJECTIONS,
        default=PROJECTIONS[0],
        help="mercator unless said; gnomonic is of the sphere and not conformal",
    )
    parser.add_argument(
        "--scale", metavar="N", help="natural scale, as 2500000 or 1:2500000; fitted to one sheet unless said"
    )
    parser.add_argument("--paper", choices=_PAPERS, default=_PAPERS[0], help="A4 unless said")
    held = parser.add_mutually_exclusive_group()
    held.add_argument("--landscape", action="store_const", const=True, dest="landscape", help="the longer side level")
    held.add_argument("--portrait", action="store_const", const=False, dest="landscape", help="upright")
    parser.add_argument("--margin", type=float, default=8.0, metavar="MM", help="left blank all round; 8 unless said")
    parser.add_argument(
        "--true-scale",
        metavar="LATITUDE[,LATITUDE]",
        help="where the natural scale holds: a latitude, or for lambert two standard parallels, such as 40N,50N",
    )
    parser.add_argument(
        "--meridian", metavar="LONGITUDE", help="the meridian that runs straight up the sheet, such as 150W"
    )
    parser.add_argument(
        "--corners",
        nargs=2,
        metavar=("POSITION", "POSITION"),
        help="show what lies between two corners, not the whole plan",
    )
    parser.add_argument("--no-coast", action="store_false", dest="coast", help="leave the shoreline out")
    parser.add_argument(
        "--sheet", type=int, metavar="N", help="one sheet of a set, for svg and json; 0 is the index (svg)"
    )
    add_output(parser, _ENDINGS, "pdf")


def _run(arguments: argparse.Namespace) -> ExitCode:
    from navcore.plan.solve import solve
    from navcore.prints.plotting_sheet import plotting_sheets
    from tui.cli.plan_argument import open_plan

    medium = medium_of(arguments, _ENDINGS, "pdf")
    if medium == "pdf" and arguments.file is None and is_terminal():
        say("a PDF is nothing for a terminal to show; use -o FILE")
        return ExitCode.WRONG_USAGE
    options = _options(arguments)
    solution = solve(open_plan(arguments.plan))
    sheets = plotting_sheets(solution, options)
    if wrong := _wrong_sheet(arguments.sheet, medium, len(sheets.sheets)):
        say(wrong)
        return ExitCode.WRONG_USAGE
    data = _written(solution, sheets, medium, arguments.sheet)
    if medium != "json":
        _say_lacking(solution.plan)
    put("plotting sheet", data, arguments.file, arguments.plan)
    if arguments.file is not None:
        say(_said(sheets))
    return ExitCode.DONE


def _options(arguments: argparse.Namespace) -> SheetOptions:
    from navcore.charts.choice import SheetKind
    from navcore.charts.paper import paper_named
    from navcore.prints.plotting_sheet import SheetOptions
    from navcore.text.position import parse_longitude, parse_position

    corners = [parse_position(text) for text in arguments.corners] if arguments.corners else None
    return SheetOptions(
        kind=SheetKind(arguments.projection),
        paper=paper_named(arguments.paper, _margin_mm(arguments.margin)),
        scale=None if arguments.scale is None else _scale(arguments.scale),
        landscape=arguments.landscape,
        meridian_deg=None if arguments.meridian is None else parse_longitude(arguments.meridian),
        true_scale_deg=() if arguments.true_scale is None else _true_scale(arguments.true_scale, arguments.projection),
        corners=(corners[0], corners[1]) if corners else None,
        coast=arguments.coast,
    )


def _margin_mm(margin_mm: float) -> float:
    from navcore.errors import ParseError

    if not 0.0 <= margin_mm <= _WIDEST_MARGIN_MM:
        typed = f"{margin_mm:g}"
        raise ParseError(typed, (0, len(typed)), "this is no margin", f"type 0 to {_WIDEST_MARGIN_MM:g} for --margin")
    return margin_mm


def _true_scale(text: str, projection: str) -> tuple[float, ...]:
    """Return the latitudes of true scale, as many as the projection has."""
    from navcore.errors import ParseError
    from navcore.text.position import parse_latitude

    latitudes = tuple(parse_latitude(part) for part in text.split(","))
    most = _TRUE_SCALES[projection]
    if len(latitudes) > most:
        reason = f"a {projection} sheet takes {('no latitude', 'one latitude', 'two latitudes')[most]} of true scale"
        advice = "leave --true-scale out" if not most else f"type --true-scale {','.join(text.split(',')[:most])}"
        raise ParseError(text, (0, len(text)), reason, advice)
    if projection != "stereographic" and max(map(abs, latitudes)) == _POLE_DEG:
        reason = f"a {projection} sheet has no scale at a pole"
        raise ParseError(text, (0, len(text)), reason, "type a latitude short of it, or --projection stereographic")
    return latitudes


def _scale(text: str) -> float:
    """Return the denominator of a natural scale, written with or without "1:" and with commas or spaces."""
    from navcore.errors import ParseError

    plain = text.strip().removeprefix("1:")
    figures = plain.replace(",", "").replace(" ", "").replace("_", "")
    if not (figures.isascii() and figures.isdigit() and int(figures)):
        raise ParseError(text, (0, len(text)), "this is no natural scale", "type it as 2500000 or 1:2500000")
    return float(figures)


def _wrong_sheet(number: int | None, medium: str, count: int) -> str:
    """Return what is wrong with the sheet asked for; "" where nothing is."""
    if number is None:
        several = medium == "svg" and count > 1
        return (
            f"the plan takes {count} sheets and SVG holds one; give --sheet 1 to {count}, or 0 for the index"
            if several
            else ""
        )
    if medium == "pdf":
        return "a PDF holds every sheet; leave --sheet out, or use --as svg or json"
    least = 0 if medium == "svg" and count > 1 else 1
    return "" if least <= number <= count else f"there is no sheet {number}; give --sheet {least} to {count}"


def _written(solution: Solution, sheets: SheetSet, medium: str, number: int | None) -> bytes:
    from navcore.prints.sheets.json import write_sheets_json
    from navcore.prints.sheets.pages import write_sheet_svg, write_sheets_pdf

    if medium == "pdf":
        return write_sheets_pdf(solution, sheets)
    if medium == "svg":
        return write_sheet_svg(solution, sheets, 1 if number is None else number).encode("utf-8")
    return write_sheets_json(solution, sheets, 1 if number is None else number).encode("utf-8")


def _say_lacking(plan: Plan) -> None:
    from navcore.prints.plotting_sheet import lacking

    if found := lacking(plan):
        codes = ", ".join(f"U+{ord(character):04X}" for character in sorted(found))
        say(f"the print's font lacks {codes}; on paper a mark stands for each, and the sheet says so")


def _said(sheets: SheetSet) -> str:
    first = sheets.sheets[0]
    count = len(sheets.sheets)
    several = f"{count} sheets" if count > 1 else "1 sheet"
    return f"{first.plane.projection.name}, 1:{first.plane.scale:.0f}, {several} of {first.paper.name}"


VERB = Verb("sheet", "draw the plotting sheet of a plan at true scale", _add_arguments, _run)
