"""Worksheets as text and as JSON."""

from __future__ import annotations

import json
from typing import TYPE_CHECKING

from navcore.plan.revision import fingerprint
from navcore.prints.caution import CAUTION
from navcore.prints.tracks import parts_json
from navcore.text.plain import pad
from navcore.text.wrap import wrap

if TYPE_CHECKING:
    from collections.abc import Iterator, Sequence

    from navcore.plan.solve import Solution
    from navcore.prints.tracks import Json
    from navcore.prints.worksheet import LegSheet, Section
    from navcore.sailings.checked import CheckedLine
    from navcore.sailings.working import Step, Working

WIDTH = 76
_SYMBOL = 16
_FIGURE = 22
_WORDS = WIDTH - _SYMBOL - _FIGURE - 1
_METHOD = 36


def worksheet_text(sheets: Sequence[LegSheet]) -> str:
    """Return worksheets as text, each leg on a page of its own."""
    return "\f".join("".join(f"{line.rstrip()}\n" for line in _page(sheet)) for sheet in sheets)


def _page(sheet: LegSheet) -> Iterator[str]:
    yield from wrap(sheet.heading, WIDTH)
    for text in sheet.sailed:
        yield from wrap(text, WIDTH)
    for section in sheet.sections:
        yield ""
        yield from _section(section)
    yield ""
    yield from wrap("Results", WIDTH)
    for result in sheet.results:
        yield pad(result.method, _METHOD) + pad(result.distance, 12, "right") + "  " + result.course
        if result.because:
            difference = f"{result.difference}: " if result.difference else ""
            yield from (f"    {line}" for line in wrap(f"{difference}{result.because}", WIDTH - 4))
    for note in sheet.notes:
        yield ""
        yield from wrap(note, WIDTH)


def _section(section: Section) -> Iterator[str]:
    yield from wrap(section.title, WIDTH)
    for line in section.lines:
        words = wrap(line.words, _WORDS) or [""]
        for number, part in enumerate(words):
            symbol, figure = (line.symbol, line.figure) if number == 0 else ("", "")
            yield pad(symbol, _SYMBOL) + pad(part, _WORDS) + " " + pad(figure, _FIGURE, "right")
    for remark in section.remarks:
        yield from (f"  {part}" for part in wrap(remark, WIDTH - 2))


def worksheet_json(solution: Solution, sheets: Sequence[LegSheet]) -> str:
    """Return worksheets as JSON, steps unrounded; what has no value is null."""
    plan = solution.plan
    document: dict[str, Json] = {
        "title": plan.title,
        "revision": plan.revision,
        "fingerprint": fingerprint(plan),
        "figure": plan.figure.name,
        "legs": [_leg_json(solution, sheet) for sheet in sheets],
        "caution": CAUTION,
    }
    return json.dumps(document, ensure_ascii=False, indent=1, allow_nan=False) + "\n"


def _leg_json(solution: Solution, sheet: LegSheet) -> dict[str, Json]:
    leg = solution.legs[sheet.index]
    return {
        "leg": sheet.index + 1,
        "line": leg.line.value,
        "checked": [_checked_json(line) for line in sheet.checked],
        "parts": None if leg.parts is None else parts_json(leg.parts),
        "notes": list(sheet.notes),
    }


def _checked_json(line: CheckedLine) -> dict[str, Json]:
    return {
        "line": line.name,
        "distance_nmi": line.distance_nmi,
        "course_deg": line.course_deg,
        "final_course_deg": line.final_course_deg,
        "workings": [_working_json(working) for working in line.workings],
        "results": [
            {
                "method": row.method,
                "distance_nmi": row.distance_nmi,
                "course_deg": row.course_deg,
                "difference_nmi": row.difference_nmi,
                "causes": list(row.causes),
            }
            for row in line.rows
        ],
    }


def _working_json(working: Working) -> dict[str, Json]:
    return {
        "method": working.method,
        "basis": working.basis,
        "given": [_step_json(step) for step in working.given],
        "steps": [_step_json(step) for step in working.steps],
        "results": list(working.results),
        "remarks": list(working.remarks),
    }


def _step_json(step: Step) -> dict[str, Json]:
    return {"symbol": step.symbol, "words": step.words, "value": step.value, "kind": step.kind.value}
